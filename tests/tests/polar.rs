//! Polar forms against published and derived figures.
//!
//! Sources: Ball and Coxeter (counts); Chilton and Coxeter, Polar zonohedra (1963), for the rings (from
//! memory); docs/checks.md, for the closed forms and the fixtures F1, F2, F3, derived there and checked against
//! convex hulls. Fixtures are in metres there; here one unit of theirs is 1000 mm, so areas are divided by 1e6.

use core::f64::consts::{FRAC_PI_2, PI, TAU};

use zonewright_geometry::{
    Angle, Point, Shell, Spurs, Start, measure,
    start::{PolarBy, PolarForm, PolarPair},
};
use zonewright_shop::{FamilyTolerance, Hand, Parts};
use zonewright_tests::{
    PRINTED, assert_near, closed_forms, grown, lay,
    look::{self, counts, degrees, tally},
    outside_out,
    polar_fixtures::{F1, F2, F3, Fixture},
    shape, until_still,
};

fn form(ribs: u32, pitch_deg: f64, edge_mm: f64) -> PolarForm {
    let pitch = Angle::from_degrees(pitch_deg);
    PolarForm {
        ribs,
        by: PolarBy::PitchEdge { pitch, edge_mm },
    }
}

fn polar(ribs: u32, pitch_deg: f64, edge_mm: f64) -> Shell {
    let start = Start::Polar(form(ribs, pitch_deg, edge_mm));
    grown(&outside_out(shape(start, vec![until_still(Spurs::Retract)])))
}

/// 0 stands for a figure that the source does not print.
fn printed(expected: f64) -> Option<f64> {
    (expected != 0.0).then_some(expected)
}

fn check_whole(f: &Fixture) {
    let shell = polar(f.ribs, f.pitch_deg, 1000.0 * f.edge);
    assert_eq!(counts(&shell), f.counts);
    assert!(shell.is_closed());
    let totals = measure::totals(&shell);
    assert_near!(totals.area_mm2 / 1e6, f.area, PRINTED);
    assert_near!(look::area(&shell) / 1e6, f.area, PRINTED);
    assert_near!(look::volume(&shell) / 1e9, f.volume, PRINTED);
    assert_near!(totals.size.z / 1e3, f.height, PRINTED);
    for (actual, expected) in [totals.size.x, totals.size.y].into_iter().zip(f.plan) {
        if let Some(expected) = printed(expected) {
            assert_near!(actual / 1e3, expected, PRINTED);
        }
    }
    // The plan is what all panels that look up cover.
    let up = look::panels(&shell).map(|p| shell.area_vector(p).z.max(0.0));
    assert_near!(up.sum::<f64>() / 1e6, f.plan_area, PRINTED);
    let lengths: f64 = look::edges(&shell).map(|e| measure::edge_length(&shell, e)).sum();
    assert_near!(lengths / 1e3, f.counts[1] as f64 * f.edge, PRINTED);
    // 2n of degree 3, n(n-3) of degree 4, two poles of degree n.
    let n = f.ribs as usize;
    assert_eq!(degrees(&shell), [(3, 2 * n), (4, n * (n - 3)), (n, 2)].into());
}

fn check_rings(f: &Fixture) {
    let shell = polar(f.ribs, f.pitch_deg, 1000.0 * f.edge);
    let n = f.ribs as usize;
    let mut on_ring = vec![0; n + 1];
    for point in &shell.points {
        let [x, y, z] = point.to_array().map(|c| c / 1e3);
        let depth = (f.height - z) / f.height * n as f64;
        let ring = depth.round() as usize;
        assert_near!(depth, ring as f64, 1e-9, "rings are evenly spaced");
        on_ring[ring] += 1;
        if ring > 0 && ring < n {
            let mirrored = ring.min(n - ring);
            assert_near!(x.hypot(y), f.radii[mirrored - 1], PRINTED, "ring {ring}");
        } else {
            assert_near!(x.hypot(y), 0.0, 1e-12, "pole");
        }
    }
    let expected: Vec<usize> = (0..=n).map(|ring| if ring % n == 0 { 1 } else { n }).collect();
    assert_eq!(on_ring, expected);
}

fn check_levels(f: &Fixture) {
    let shell = polar(f.ribs, f.pitch_deg, 1000.0 * f.edge);
    let n = f.ribs as i32;
    assert_eq!(shell.courses.len() as i32, n - 1);
    for p in look::panels(&shell) {
        let level = shell.panels[p as usize].course;
        let below = level.min(n - level);
        let [top, area, slope] = f.levels[below as usize - 1];
        assert_near!(measure::panel_area(&shell, p) / 1e6, area, PRINTED, "level {level}");
        assert_near!(
            measure::acute_angle(&shell, p).to_degrees(),
            top.min(180.0 - top),
            PRINTED,
            "level {level}"
        );
        // Horizontal and slant diagonal: 2 L sin(a/2) and 2 L cos(a/2).
        let (across, along) = (top.to_radians() / 2.0).sin_cos();
        let mut diagonals = [across, along].map(|part| 2.0 * f.edge * part);
        diagonals.sort_by(f64::total_cmp);
        for (actual, expected) in measure::diagonals(&shell, p).into_iter().zip(diagonals) {
            assert_near!(actual / 1e3, expected, PRINTED, "level {level}");
        }
        let seen = measure::slope(&shell, p).to_degrees();
        if let Some(slope) = printed(slope) {
            let expected = if level == below { slope } else { 180.0 - slope };
            assert_near!(seen, expected, PRINTED, "level {level}");
        }
        // tan of the slope is tan t / cos(k pi / n), derived in section 2.
        let cos = (PI * f64::from(level) / f64::from(n)).cos();
        let expected = f.pitch_deg.to_radians().tan().atan2(cos).to_degrees();
        assert_near!(seen, expected, 1e-9, "level {level}");
    }
}

/// The expected dihedral of an edge between panels of two levels, and how often it comes.
fn expected_dihedrals(f: &Fixture) -> Vec<f64> {
    let n = f.ribs as usize;
    let mut all = vec![f.dihedrals[0]; 2 * n];
    for k in 1..n - 1 {
        // Both families of edges between level k and k + 1.
        all.extend(vec![f.dihedrals[k.min(n - 1 - k)]; 2 * n]);
    }
    all.sort_by(f64::total_cmp);
    all
}

fn check_dihedrals(f: &Fixture) {
    let shell = polar(f.ribs, f.pitch_deg, 1000.0 * f.edge);
    let measured = look::edges(&shell).filter_map(|e| measure::dihedral(&shell, e));
    let mut measured: Vec<f64> = measured.map(f64::to_degrees).collect();
    measured.sort_by(f64::total_cmp);
    let expected = expected_dihedrals(f);
    assert_eq!(measured.len(), expected.len());
    for (actual, expected) in measured.into_iter().zip(expected) {
        assert_near!(actual, expected, PRINTED);
    }
}

#[test]
fn f1_whole() {
    check_whole(&F1);
}

#[test]
fn f2_whole() {
    check_whole(&F2);
    // 16 + 8 sqrt 2, printed as the exact form of the volume.
    assert_near!(F2.volume, 16.0 + 8.0 * 2_f64.sqrt(), PRINTED);
}

#[test]
fn f3_whole() {
    check_whole(&F3);
}

#[test]
fn f1_f2_f3_rings() {
    for fixture in [&F1, &F2, &F3] {
        check_rings(fixture);
    }
}

#[test]
fn f1_f2_f3_levels() {
    for fixture in [&F1, &F2, &F3] {
        check_levels(fixture);
    }
}

#[test]
fn f1_f2_f3_dihedrals() {
    for fixture in [&F1, &F2, &F3] {
        check_dihedrals(fixture);
    }
}

#[test]
fn f1_height_is_its_largest_distance() {
    let shell = polar(9, 38.0, 300.0);
    let far = |p: &Point| shell.points.iter().map(|q| q.distance(*p)).fold(0.0, f64::max);
    let largest = shell.points.iter().map(far).fold(0.0, f64::max);
    assert_near!(largest / 1e3, F1.height, PRINTED);
}

#[test]
fn f1_has_four_families_no_hands_and_five_bevels() {
    let shell = polar(9, 38.0, 300.0);
    let parts = Parts::new(&shell, &FamilyTolerance::default());
    assert_eq!(parts.families.len(), 4);
    assert!(
        parts
            .families
            .iter()
            .all(|f| f.hand == Hand::None && f.panels.len() == 18)
    );
    assert_eq!(parts.distinct_bevels, 5);
    // Bevels printed with F1: pole, 1/2, 2/3, 3/4, 4/5.
    let bevels = [
        12.630_335_205_2,
        7.345_300_332_5,
        9.759_186_185_6,
        13.589_423_563_0,
        15.981_844_632_7,
    ];
    let seen = parts
        .panels
        .iter()
        .flat_map(|p| &p.edges)
        .map(|e| e.bevel_deg)
        .collect();
    let classes = look::classes(seen, 1e-6);
    let mut sorted = bevels.to_vec();
    sorted.sort_by(f64::total_cmp);
    assert_eq!(classes.len(), 5);
    for ((actual, _), expected) in classes.into_iter().zip(sorted) {
        assert_near!(actual, expected, PRINTED);
    }
}

#[test]
fn f1_deficits_and_what_they_add_up_to() {
    // docs/checks.md: the pole, then rings 1 to 4, then mirrored.
    let expected = [
        78.562_055_722_4,
        1.676_682_906_5,
        4.390_483_200_2,
        9.473_843_400_1,
        15.729_873_190_8,
    ];
    let shell = polar(9, 38.0, 300.0);
    let deficits = measure::angle_deficits(&shell);
    for (point, deficit) in shell.points.iter().zip(&deficits) {
        let ring = ((1e3 * F1.height - point.0.z) / (1e3 * F1.height) * 9.0).round() as usize;
        assert_near!(
            deficit.to_degrees(),
            expected[ring.min(9 - ring)],
            PRINTED,
            "ring {ring}"
        );
    }
    // Descartes.
    assert_near!(deficits.iter().sum(), 2.0 * TAU, 1e-12);
}

#[test]
fn ribs_of_many_counts_and_pitches_against_sums_of_determinants() {
    for (n, pitch) in [(3, 35.0), (4, 20.0), (5, 50.0), (7, 12.0), (11, 61.0), (16, 33.0)] {
        let shape = outside_out(shape(
            Start::Polar(form(n, pitch, 70.0)),
            vec![until_still(Spurs::Retract)],
        ));
        let generators = closed_forms::zones_of(&shape.start);
        let shell = grown(&shape);
        let n = n as usize;
        assert_eq!(counts(&shell), [n * (n - 1) + 2, 2 * n * (n - 1), n * (n - 1)]);
        let (volume, area) = (closed_forms::volume(&generators), closed_forms::area(&generators));
        assert_near!(look::volume(&shell), volume, 1e-12 * volume, "{n} ribs");
        assert_near!(look::area(&shell), area, 1e-12 * area, "{n} ribs");
        // Derived: L^3 sin t cos^2 t (n^2 / 2) cot(pi / n).
        let (sin, cos) = f64::to_radians(pitch).sin_cos();
        let count = n as f64;
        let closed = 70_f64.powi(3) * sin * cos * cos * (count * count / 2.0) / (PI / count).tan();
        assert_near!(look::volume(&shell), closed, 1e-12 * closed, "{n} ribs");
        // The level of the pole and those behind it fold by half a turn in all.
        for folds in look::folds_by_zone(&shell) {
            assert_near!(folds, TAU, 1e-10, "{n} ribs");
        }
        // Every vertex lies on a sine: r = (L cos t / sin(pi/n)) sin(pi z / H), exactly.
        let height = count * 70.0 * sin;
        for point in &shell.points {
            let expected = 70.0 * cos / (PI / count).sin() * (PI * point.0.z / height).sin();
            assert_near!(point.0.x.hypot(point.0.y), expected, 1e-9, "{n} ribs");
        }
    }
}

#[test]
fn volume_at_a_given_edge_is_largest_at_one_pitch_whatever_the_ribs() {
    // docs/checks.md: atan(1 / sqrt 2), Vmax = L^3 n^2 cot(pi/n) / (3 sqrt 3): figures for L = 1.
    let best = 0.5_f64.sqrt().atan().to_degrees();
    assert_near!(best, 35.264_389_682_8, PRINTED);
    for (n, most) in [
        (3, 1.0),
        (4, 3.079_201_435_7),
        (6, 12.0),
        (8, 29.735_399_469_2),
        (12, 103.425_625_842_2),
    ] {
        assert_near!(look::volume(&polar(n, best, 1.0)), most, PRINTED, "{n} ribs");
        for off in [-1.0, -0.05, 0.05, 1.0] {
            assert!(look::volume(&polar(n, best + off, 1.0)) < most - 1e-8, "{n} ribs");
        }
    }
}

#[test]
fn square_levels_and_equal_areas() {
    // docs/checks.md: level k is square at cos t = 1 / (sqrt 2 s_k).
    for (n, level, pitch) in [
        (6, 2, 35.264_389_682_8),
        (9, 4, 44.109_159_048_7),
        (5, 2, 41.969_915_234_4),
        (8, 3, 40.060_359_026_4),
        (8, 4, 45.0),
    ] {
        let shell = polar(n, pitch, 100.0);
        for p in look::panels(&shell).filter(|p| shell.panels[*p as usize].course == level) {
            assert_near!(
                measure::acute_angle(&shell, p),
                FRAC_PI_2,
                1e-11,
                "{n} ribs, level {level}"
            );
        }
    }
    // All panels have one area: four ribs at 35.264, five at atan(1/2). Six at 35.264 have cos a_k = 2/3, 0, -1/3: three areas.
    let areas = |n: u32, pitch: f64| {
        let shell = polar(n, pitch, 1.0);
        look::classes(
            look::panels(&shell).map(|p| measure::panel_area(&shell, p)).collect(),
            1e-9,
        )
        .len()
    };
    assert_eq!(areas(4, 35.264_389_682_754_654), 1);
    assert_eq!(areas(5, 0.5_f64.atan().to_degrees()), 1);
    assert_eq!(areas(6, 35.264_389_682_754_654), 3);
}

#[test]
fn five_ribs_at_one_pitch_touch_a_sphere() {
    // docs/checks.md, derived: cos^2 t = 2 - 3 / sqrt 5; distance 1.0913216780 L, V, A.
    let pitch = (2.0 - 3.0 / 5_f64.sqrt()).sqrt().acos().to_degrees();
    assert_near!(pitch, 35.767_707_562_0, PRINTED);
    let shell = polar(5, pitch, 1.0);
    let centre = shell.points.iter().map(|p| p.0).sum::<zonewright_geometry::Vector>() / shell.points.len() as f64;
    for p in look::panels(&shell) {
        let normal = shell.area_vector(p).normalize();
        let distance = normal.dot(measure::centroid(&shell, p).0 - centre);
        // Printed to eight decimals: three times the volume over the area.
        assert_near!(distance, 1.091_321_678_0, 6e-9);
        assert_near!(distance, 3.0 * 6.620_590_805_2 / 18.199_741_478_2, PRINTED);
    }
    assert_near!(look::volume(&shell), 6.620_590_805_2, PRINTED);
    assert_near!(look::area(&shell), 18.199_741_478_2, PRINTED);
}

#[test]
fn open_domes_have_the_derived_counts() {
    // docs/checks.md: levels 1..m: V = 1 + n(m+1), E = n(2m+1), F = nm, one rim of 2n edges.
    for (n, m) in [(9, 3), (9, 5), (6, 1), (12, 7)] {
        let shell = grown(&shape(Start::Polar(form(n, 38.0, 300.0)), vec![lay(m, Spurs::Retract)]));
        let (n, m) = (n as usize, m as usize);
        assert_eq!(counts(&shell), [1 + n * (m + 1), n * (2 * m + 1), n * m]);
        assert_eq!(shell.rims.iter().map(|r| r.edges.len()).collect::<Vec<_>>(), [2 * n]);
        assert_eq!(measure::totals(&shell).euler, 1);
    }
}

#[test]
fn any_two_measures_fix_the_same_form() {
    let given = form(9, 38.0, 300.0);
    let whole = polar(9, 38.0, 300.0);
    for pair in PolarPair::ALL {
        let by = given.by_pair(pair).expect("the measures go together");
        assert_eq!(by.by.pair(), pair);
        let shell = grown(&outside_out(shape(Start::Polar(by), vec![until_still(Spurs::Retract)])));
        assert_eq!(shell.panels, whole.panels);
        for (p, q) in shell.points.iter().zip(&whole.points) {
            assert!(p.distance(*q) < 1e-9, "{pair:?}");
        }
    }
    // F1's own figures, in mm: width along rib 0 and height, each with the pitch.
    for by in [
        PolarBy::PitchWidth {
            pitch: Angle::from_degrees(38.0),
            width_mm: 1_361.391_920_5,
        },
        PolarBy::PitchHeight {
            pitch: Angle::from_degrees(38.0),
            height_mm: 1_662.285_983_4,
        },
    ] {
        let start = Start::Polar(PolarForm { ribs: 9, by });
        let shell = grown(&outside_out(shape(start, vec![until_still(Spurs::Retract)])));
        assert_near!(look::area(&shell) / 1e6, F1.area, 1e-9);
    }
}

#[test]
fn levels_have_as_many_panels_as_ribs() {
    let shell = polar(9, 38.0, 300.0);
    let of_course = tally(shell.panels.iter().map(|p| p.course));
    assert_eq!(of_course, (1..9).map(|k| (k, 9)).collect());
}
