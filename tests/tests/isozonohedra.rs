//! The zonohedra with one kind of face, and the rhombic enneacontahedron, at edge 1 mm.
//!
//! Sources: Bilinski (1960), Gruenbaum (2010), and the figures of docs/checks.md (marked there as published or derived).
//! Each solid is grown in every way the program has: as the solid of a star, from ribs, spliced, exchange by exchange.

use std::collections::BTreeMap;

use zonewright_geometry::{
    Act, Angle, Direction, Shape, Shell, Spurs, Start, Vector, Vs, grow, measure,
    start::{AxisClass, PolarBy, PolarForm, Star, StarSolid},
};
use zonewright_tests::{
    PRINTED, assert_near, closed_forms, grown, lay,
    look::{self, classes, counts, degrees, dihedrals},
    outside_out, shape, until_still,
    zonohedron::zonohedron,
};

const PHI: f64 = core::f64::consts::GOLDEN_RATIO;
const VIEW: Vector = Vector::new(0.114, 0.063, 1.0);

fn star_solid(star: Star) -> Shape {
    use zonewright_geometry::Side::{Aft, Fore};
    let start = Start::StarSolid(StarSolid { star, edge_mm: 1.0 });
    let acts = [Fore, Aft].map(|side| (side, until_still(Spurs::Retract)));
    outside_out(zonewright_tests::two_sided(start, acts.to_vec()))
}

fn polar(ribs: u32, pitch_deg: f64) -> Start {
    let pitch = Angle::from_degrees(pitch_deg);
    Start::Polar(PolarForm {
        ribs,
        by: PolarBy::PitchEdge { pitch, edge_mm: 1.0 },
    })
}

fn whole(start: Start) -> Shape {
    outside_out(shape(start, vec![until_still(Spurs::Retract)]))
}

/// Pitch of five 5-fold axes round the sixth: atan(1/2).
fn golden_pitch() -> f64 {
    0.5_f64.atan().to_degrees()
}

struct Solid {
    counts: [usize; 3],
    volume: f64,
    area: f64,
    dihedrals: &'static [(f64, usize)],
    degrees: &'static [(usize, usize)],
}

fn check(shape: &Shape, expected: &Solid) -> Shell {
    let shell = grown(shape);
    assert_eq!(counts(&shell), expected.counts);
    assert_near!(look::volume(&shell), expected.volume, PRINTED);
    assert_near!(look::area(&shell), expected.area, PRINTED);
    let found = dihedrals(&shell);
    assert_eq!(found.len(), expected.dihedrals.len(), "{found:?}");
    for ((angle, count), (printed, edges)) in found.into_iter().zip(expected.dihedrals) {
        assert_near!(angle, *printed, PRINTED);
        assert_eq!(count, *edges);
    }
    assert_eq!(
        degrees(&shell),
        expected.degrees.iter().copied().collect::<BTreeMap<_, _>>()
    );
    shell
}

#[test]
fn rhombic_dodecahedron() {
    let expected = Solid {
        counts: [14, 24, 12],
        volume: 3.079_201_435_7,
        area: 11.313_708_499_0,
        dihedrals: &[(120.0, 24)],
        degrees: &[(3, 8), (4, 6)],
    };
    for shape in [
        star_solid(Star::Cubic(vec![AxisClass::ThreeFold])),
        whole(polar(4, 0.5_f64.sqrt().atan().to_degrees())),
        zonohedron(
            &[[1, 1, 1], [-1, 1, 1], [1, -1, 1], [-1, -1, 1]]
                .map(|g: [i32; 3]| Vector::from_array(g.map(f64::from)).normalize()),
            VIEW,
        ),
    ] {
        let shell = check(&shape, &expected);
        for p in look::panels(&shell) {
            let [short, long] = measure::diagonals(&shell, p);
            assert_near!(short, 1.154_700_538_4, PRINTED);
            assert_near!(long, 1.632_993_161_9, PRINTED);
        }
    }
}

/// Four of the six 5-fold axes.
fn bilinski_axes() -> Vec<Vector> {
    [(0.0, 1.0, PHI), (0.0, -1.0, PHI), (1.0, PHI, 0.0), (-1.0, PHI, 0.0)]
        .map(|(x, y, z)| Vector::new(x, y, z).normalize())
        .to_vec()
}

#[test]
fn bilinski_dodecahedron() {
    let expected = Solid {
        counts: [14, 24, 12],
        volume: 2.462_146_829_7,
        area: 10.733_126_292_0,
        dihedrals: &[(72.0, 4), (108.0, 8), (144.0, 12)],
        degrees: &[(3, 8), (4, 6)],
    };
    check(&zonohedron(&bilinski_axes(), VIEW), &expected);
}

#[test]
fn rhombic_icosahedron() {
    let expected = Solid {
        counts: [22, 40, 20],
        volume: 6.155_367_074_4,
        area: 17.888_543_820_0,
        dihedrals: &[(108.0, 10), (144.0, 30)],
        degrees: &[(3, 10), (4, 10), (5, 2)],
    };
    let shell = check(&whole(polar(5, golden_pitch())), &expected);
    for p in look::panels(&shell) {
        // Golden rhombi: atan 2, area 2 / sqrt 5.
        assert_near!(measure::acute_angle(&shell, p).to_degrees(), 63.434_948_822_9, PRINTED);
        assert_near!(measure::panel_area(&shell, p), 0.894_427_191_0, PRINTED);
    }
}

const TRIACONTAHEDRON: Solid = Solid {
    counts: [32, 60, 30],
    volume: 12.310_734_148_7,
    area: 26.832_815_730_0,
    dihedrals: &[(144.0, 60)],
    degrees: &[(3, 20), (5, 12)],
};

/// Five ribs, two courses, a direction spliced in everywhere, until still.
fn spliced(direction: Direction) -> Shape {
    let splice = Act::Splice {
        at: Vs::All,
        directions: vec![direction],
    };
    let acts = vec![lay(2, Spurs::Retract), splice, until_still(Spurs::Retract)];
    outside_out(shape(polar(5, golden_pitch()), acts))
}

#[test]
fn rhombic_triacontahedron_as_a_star_solid_and_spliced() {
    let down = Direction::Own(Vector::NEG_Z);
    for shape in [star_solid(Star::Icosahedral(vec![AxisClass::FiveFold])), spliced(down)] {
        let shell = check(&shape, &TRIACONTAHEDRON);
        let centre = shell.points.iter().map(|p| p.0).sum::<Vector>() / 32.0;
        for p in look::panels(&shell) {
            // Inradius sqrt(1 + 2 / sqrt 5), published.
            let distance = shell
                .area_vector(p)
                .normalize()
                .dot(measure::centroid(&shell, p).0 - centre);
            assert_near!(distance, 1.376_381_920_5, PRINTED);
        }
    }
}

#[test]
fn the_axis_spliced_the_wrong_way_has_the_counts_but_not_the_volume() {
    // Counts alone prove nothing (docs/checks.md, worked cases).
    let up = Direction::Own(Vector::Z);
    let (shell, _) = grow(&spliced(up));
    assert_eq!(counts(&shell), TRIACONTAHEDRON.counts);
    assert!(shell.is_closed());
    assert_near!(
        look::area(&shell),
        TRIACONTAHEDRON.area,
        PRINTED,
        "the same pairs of edges"
    );
    assert!((look::volume(&shell).abs() - TRIACONTAHEDRON.volume).abs() > 0.1);
}

#[test]
fn rhombic_enneacontahedron() {
    let expected = Solid {
        counts: [92, 180, 90],
        volume: 61.369_531_195_1,
        area: 76.568_542_494_9,
        // Wide to slim 120 edges, wide to wide 60.
        dihedrals: &[(157.761_243_907_0, 120), (164.477_512_185_9, 60)],
        degrees: &[(3, 60), (5, 12), (6, 20)],
    };
    let shell = check(&star_solid(Star::Icosahedral(vec![AxisClass::ThreeFold])), &expected);
    let angles = look::panels(&shell).map(|p| measure::acute_angle(&shell, p).to_degrees());
    let found = classes(angles.collect(), 1e-6);
    assert_eq!(found.iter().map(|c| c.1).collect::<Vec<_>>(), [30, 60]);
    assert_near!(found[0].0, 41.810_314_895_8, PRINTED);
    assert_near!(found[1].0, 70.528_779_365_5, PRINTED);
    // Slim panels have diagonals in the ratio phi squared, not phi as is sometimes printed; wide ones sqrt 2.
    for p in look::panels(&shell) {
        let [short, long] = measure::diagonals(&shell, p);
        let slim = measure::panel_area(&shell, p) < 0.8;
        assert_near!(long / short, if slim { PHI * PHI } else { 2_f64.sqrt() }, 1e-12);
    }
    // Planes at 2.38992712 (wide) and 2.44569499 (slim) from the centre, printed to 8 decimals.
    let centre = shell.points.iter().map(|p| p.0).sum::<Vector>() / 92.0;
    for p in look::panels(&shell) {
        let distance = shell
            .area_vector(p)
            .normalize()
            .dot(measure::centroid(&shell, p).0 - centre);
        let slim = measure::panel_area(&shell, p) < 0.8;
        assert_near!(distance, if slim { 2.445_694_99 } else { 2.389_927_12 }, 6e-9);
    }
}

#[test]
fn enneacontahedron_cells() {
    // 120 cells in five classes of |det| (docs/checks.md, derived from Shephard's paving).
    let start = star_solid(Star::Icosahedral(vec![AxisClass::ThreeFold])).start;
    let g = closed_forms::zones_of(&start);
    let mut cells = Vec::new();
    for i in 0..10 {
        for j in i + 1..10 {
            for k in j + 1..10 {
                cells.push(g[i].dot(g[j].cross(g[k])).abs());
            }
        }
    }
    let expected = [
        (0.237_881_393, 30),
        (0.384_900_179, 30),
        (0.622_781_573, 30),
        (0.769_800_359, 20),
        (0.860_662_966, 10),
    ];
    for ((volume, count), (printed, cells)) in classes(cells, 1e-6).into_iter().zip(expected) {
        assert_near!(volume, printed, 6e-10);
        assert_eq!(count, cells);
    }
}

#[test]
fn golden_rhombohedra_and_the_cube() {
    // Derived.
    for (pitch, volume) in [
        (52.622_631_859_350_3, 0.760_845_213_0),
        (10.812_316_963_571_7, 0.470_228_201_8),
        (35.264_389_682_754_654, 1.0),
    ] {
        let shell = grown(&whole(polar(3, pitch)));
        assert_eq!(counts(&shell), [8, 12, 6]);
        assert_near!(look::volume(&shell), volume, PRINTED);
    }
}

#[test]
fn deficits_of_the_solids() {
    // docs/checks.md, printed to 6 decimals.
    let golden = whole(polar(5, golden_pitch()));
    for (shape, expected) in [
        (
            star_solid(Star::Cubic(vec![AxisClass::ThreeFold])),
            vec![(31.586_338, 8), (77.884_883, 6)],
        ),
        (golden, vec![(10.304_846, 10), (42.825_256, 2), (53.130_102, 10)]),
        (
            star_solid(Star::Icosahedral(vec![AxisClass::FiveFold])),
            vec![(10.304_846, 20), (42.825_256, 12)],
        ),
        (
            star_solid(Star::Icosahedral(vec![AxisClass::ThreeFold])),
            vec![(2.867_874, 60), (7.356_103, 12), (22.982_717, 20)],
        ),
    ] {
        let shell = grown(&shape);
        let deficits = measure::angle_deficits(&shell);
        let found = classes(deficits.iter().map(|d| d.to_degrees()).collect(), 1e-6);
        assert_eq!(found.len(), expected.len());
        for ((angle, count), (printed, vertices)) in found.into_iter().zip(expected) {
            assert_near!(angle, printed, 6e-7);
            assert_eq!(count, vertices);
        }
    }
}
