//! Solids of the icosahedral and cubic stars.
//!
//! Sources: docs/checks.md (counts from plane multiplicities and convex hulls, derived there; rows of a single class and the
//! truncated icosidodecahedron published), at edge 1 mm. The hull is also taken by a library that is not ours (crate chull,
//! exact integers), from the grown vertices alone.

use chull::ConvexHullWrapper;
use zonewright_geometry::{
    Angle, Shape, Shell, Side, Spurs, Start, Vector,
    start::{AxisClass, PolarBy, PolarForm, Star, StarSolid},
};
use zonewright_tests::{
    PRINTED, assert_near, closed_forms, grown,
    look::{self, classes, counts, degrees, dihedrals, merged},
    outside_out, shape, two_sided, until_still,
};

use AxisClass::{FiveFold, FourFold, ThreeFold, TwoFold};

fn solid(star: Star) -> Shape {
    let start = Start::StarSolid(StarSolid { star, edge_mm: 1.0 });
    let acts = [Side::Fore, Side::Aft].map(|side| (side, until_still(Spurs::Retract)));
    outside_out(two_sided(start, acts.to_vec()))
}

#[test]
fn all_icosahedral_classes_belong_to_one_icosahedron() {
    // Acute angles between axes in degrees, and pairs (docs/checks.md); the 5-3 row tells the two orientations apart.
    let axes = |class| Star::Icosahedral(vec![class]).directions().expect("a class has axes");
    let between = |a: &[Vector], b: &[Vector], same: bool| {
        let mut found = Vec::new();
        for (i, u) in a.iter().enumerate() {
            for v in b.iter().skip(if same { i + 1 } else { 0 }) {
                found.push(u.cross(*v).length().atan2(u.dot(*v).abs()).to_degrees());
            }
        }
        classes(found, 1e-6)
    };
    let [five, three, two] = [FiveFold, ThreeFold, TwoFold].map(axes);
    for (found, expected) in [
        (between(&five, &five, true), vec![(63.434_949, 15)]),
        (between(&three, &three, true), vec![(41.810_315, 15), (70.528_779, 30)]),
        (
            between(&two, &two, true),
            vec![(36.0, 30), (60.0, 30), (72.0, 30), (90.0, 15)],
        ),
        (between(&five, &three, false), vec![(37.377_368, 30), (79.187_683, 30)]),
        (
            between(&five, &two, false),
            vec![(31.717_474, 30), (58.282_526, 30), (90.0, 30)],
        ),
        (
            between(&three, &two, false),
            vec![(20.905_157, 30), (54.735_610, 60), (69.094_843, 30), (90.0, 30)],
        ),
    ] {
        assert_eq!(found.len(), expected.len(), "{found:?}");
        for ((angle, pairs), (printed, expected_pairs)) in found.into_iter().zip(expected) {
            assert_near!(angle, printed, 6e-7);
            assert_eq!(pairs, expected_pairs);
        }
    }
}

/// Classes; vertices, edges, faces after merging; faces by corners; volume and area.
type Row = (Vec<AxisClass>, [usize; 3], Vec<(usize, usize)>, f64, f64);

fn rows() -> Vec<Row> {
    vec![
        (
            vec![FiveFold],
            [32, 60, 30],
            vec![(4, 30)],
            12.310_734_148_7,
            26.832_815_730_0,
        ),
        (
            vec![ThreeFold],
            [92, 180, 90],
            vec![(4, 90)],
            61.369_531_195_1,
            76.568_542_494_9,
        ),
        (
            vec![TwoFold],
            [120, 180, 62],
            vec![(4, 30), (6, 20), (10, 12)],
            206.803_398_875_0,
            174.292_030_342_3,
        ),
        (
            vec![FiveFold, ThreeFold],
            [152, 240, 90],
            vec![(4, 60), (8, 30)],
            255.914_095_827_2,
            198.759_894_899_9,
        ),
        (
            vec![FiveFold, TwoFold],
            [240, 360, 122],
            vec![(4, 60), (6, 20), (8, 30), (10, 12)],
            586.607_284_077_5,
            343.707_761_300_6,
        ),
        (
            vec![ThreeFold, TwoFold],
            [360, 540, 182],
            vec![(4, 60), (6, 80), (8, 30), (10, 12)],
            988.473_289_090_1,
            486.299_829_472_7,
        ),
        (
            vec![FiveFold, ThreeFold, TwoFold],
            [480, 720, 242],
            vec![(4, 120), (6, 80), (10, 12), (12, 30)],
            1_906.776_980_028_8,
            751.074_097_106_0,
        ),
    ]
}

#[test]
fn every_icosahedral_star_has_its_solid() {
    for (classes, expected, polygons, volume, area) in rows() {
        let shape = solid(Star::Icosahedral(classes.clone()));
        let shell = grown(&shape);
        assert!(shell.is_closed());
        let faces = merged(&shell);
        assert_eq!(faces.counts, expected, "{classes:?}");
        assert_eq!(faces.polygons, polygons.into_iter().collect(), "{classes:?}");
        // As parallelograms it has the counts of general position.
        let n = closed_forms::zones_of(&shape.start).len();
        assert_eq!(counts(&shell), [n * (n - 1) + 2, 2 * n * (n - 1), n * (n - 1)]);
        assert_near!(look::volume(&shell), volume, 2e-10, "{classes:?}");
        assert_near!(look::area(&shell), area, 2e-10, "{classes:?}");
    }
}

#[test]
fn truncated_icosidodecahedron_dihedrals() {
    // Published: 6-10, 4-10, 4-6; flat edges come from decagons and hexagons that stay parallelograms.
    let shell = grown(&solid(Star::Icosahedral(vec![TwoFold])));
    let found: Vec<f64> = dihedrals(&shell).into_iter().map(|d| d.0).collect();
    let expected = [142.622_631_859_4, 148.282_525_588_5, 159.094_842_552_1, 180.0];
    assert_eq!(found.len(), expected.len());
    for (angle, printed) in found.into_iter().zip(expected) {
        assert_near!(angle, printed, PRINTED);
    }
}

#[test]
fn cubic_and_prismatic_stars_against_determinants() {
    // The cube; the rhombic dodecahedron; six 2-fold axes make the truncated octahedron (24, 36, 14; edge 1: 8 sqrt 2); a
    // prismatic star makes a prism (closed forms).
    for (star, expected) in [
        (Star::Cubic(vec![FourFold]), [8, 12, 6]),
        (Star::Cubic(vec![ThreeFold]), [14, 24, 12]),
        (Star::Cubic(vec![TwoFold]), [24, 36, 14]),
        (Star::Prismatic(5), [20, 30, 12]),
    ] {
        let shape = solid(star);
        let generators = closed_forms::zones_of(&shape.start);
        let shell = grown(&shape);
        assert_eq!(merged(&shell).counts, expected);
        let (volume, area) = (closed_forms::volume(&generators), closed_forms::area(&generators));
        assert_near!(look::volume(&shell), volume, 1e-12 * volume);
        assert_near!(look::area(&shell), area, 1e-12 * area);
    }
    let octahedron = grown(&solid(Star::Cubic(vec![TwoFold])));
    assert_near!(look::volume(&octahedron), 8.0 * 2_f64.sqrt(), 1e-12);
    assert_eq!(
        degrees(&grown(&solid(Star::Cubic(vec![ThreeFold])))),
        [(3, 8), (4, 6)].into()
    );
}

/// Volume and area of the convex hull of a shell's vertices, from the library's triangles.
fn hull(shell: &Shell) -> [f64; 2] {
    let points: Vec<Vec<f64>> = shell.points.iter().map(|p| p.to_array().to_vec()).collect();
    let hull = ConvexHullWrapper::try_new(&points, None).expect("the vertices span a body");
    let (vertices, indices) = hull.vertices_indices();
    let at = |i: &usize| Vector::new(vertices[*i][0], vertices[*i][1], vertices[*i][2]);
    let centre = shell.points.iter().map(|p| p.0).sum::<Vector>() / shell.points.len() as f64;
    let (mut volume, mut area) = (0.0, 0.0);
    for triangle in indices.chunks(3) {
        let [a, b, c] = [&triangle[0], &triangle[1], &triangle[2]].map(|i| at(i) - centre);
        volume += a.dot(b.cross(c)).abs() / 6.0;
        area += (b - a).cross(c - a).length() / 2.0;
    }
    [volume, area]
}

#[test]
fn a_general_hull_library_finds_the_same_bodies() {
    let polar = |ribs, pitch: f64, edge_mm| {
        let pitch = Angle::from_degrees(pitch);
        let by = PolarBy::PitchEdge { pitch, edge_mm };
        outside_out(shape(
            Start::Polar(PolarForm { ribs, by }),
            vec![until_still(Spurs::Retract)],
        ))
    };
    for shape in [
        polar(9, 38.0, 300.0),
        polar(8, 45.0, 1.0),
        polar(5, 20.0, 1.0),
        solid(Star::Icosahedral(vec![FiveFold])),
        solid(Star::Icosahedral(vec![ThreeFold])),
        solid(Star::Icosahedral(vec![TwoFold])),
        solid(Star::Cubic(vec![FourFold, ThreeFold])),
    ] {
        let shell = grown(&shape);
        let [volume, area] = hull(&shell);
        assert_near!(look::volume(&shell), volume, 1e-9 * volume, "{}", shape.start.kind());
        assert_near!(look::area(&shell), area, 1e-9 * area, "{}", shape.start.kind());
    }
}
