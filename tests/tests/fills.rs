//! Fills, helicoids, helical solids, columns and curvature.
//!
//! Sources: Elnitsky (1997) for fills of words; derived figures (docs/checks.md) for the fixtures H6 and HP and for Gauss-Bonnet; its worked
//! cases for helical solids and columns.

use core::f64::consts::{PI, TAU};

use zonewright_geometry::{
    Act, Angle, RoleRule, Shape, Shell, Spurs, Start, Tolerances, Vector, inspect, measure,
    start::{ColumnForm, HelicalForm, LoopForm, PolarBy, PolarForm, RibbonForm, RibbonFrom},
};
use zonewright_tests::{
    PRINTED, assert_near, closed_forms, grown, lay,
    look::{self, counts},
    outside_out, shape, until_still,
    zonohedron::{exchange_at, open_path, zonohedron},
};

/// Six generators on a cone: 20 degrees apart, pitch 30, length 1.
fn h6() -> Vec<Vector> {
    let (up, level) = 30_f64.to_radians().sin_cos();
    let rib = |k: i32| {
        let (sin, cos) = f64::to_radians(20.0 * f64::from(k)).sin_cos();
        Vector::new(level * cos, level * sin, up)
    };
    (0..6).map(rib).collect()
}

/// Positions of the exchanges that reverse a word by bubbling, from the front or from the back.
fn bubbles(count: usize, from_back: bool) -> Vec<usize> {
    let rounds = (1..count).rev().flat_map(|last| 0..last);
    rounds.map(|at| if from_back { count - 2 - at } else { at }).collect()
}

#[test]
fn every_full_fill_of_six_letters_has_fifteen_panels_and_one_area() {
    let g = h6();
    let fill = |order: Vec<usize>| {
        let acts = order.into_iter().flat_map(exchange_at).collect();
        grown(&shape(Start::Zigzag(open_path(&g)), acts))
    };
    let (one, other) = (fill(bubbles(6, false)), fill(bubbles(6, true)));
    for shell in [&one, &other] {
        // n + 1 + n(n-1)/2 vertices, n^2 edges, n(n-1)/2 panels.
        assert_eq!(counts(shell), [22, 36, 15]);
        assert_near!(look::area(shell), 8.934_444_317_5, PRINTED);
        assert_eq!(measure::totals(shell).euler, 1);
        // Sum over the inside of 4 - degree, and over the rim of 3 - degree: 4.
        let mut degree = vec![0_i64; shell.points.len()];
        let mut rim = vec![false; shell.points.len()];
        for edge in &shell.edges {
            for end in edge.ends {
                degree[end as usize] += 1;
                rim[end as usize] |= edge.rim_panel().is_some();
            }
        }
        let sum: i64 = degree
            .iter()
            .zip(&rim)
            .map(|(d, rim)| if *rim { 3 - d } else { 4 - d })
            .sum();
        assert_eq!(sum, 4);
    }
    let places = |shell: &Shell| look::classes(shell.points.iter().map(|p| p.0.z + 7.0 * p.0.x).collect(), 1e-9);
    assert_ne!(
        places(&one),
        places(&other),
        "the two surfaces differ, their panels do not"
    );
}

#[test]
fn h6_whole() {
    let shell = grown(&zonohedron(&h6(), Vector::new(0.1, 0.05, 1.0)));
    assert_eq!(counts(&shell), [32, 60, 30]);
    assert_near!(look::volume(&shell), 1.539_090_645_0, PRINTED);
    assert_near!(look::area(&shell), 17.868_888_635_1, PRINTED);
}

/// The ribbon of fixture HP: its letters' zones are the ribs.
fn ribbon() -> Shell {
    let form = RibbonForm {
        ribs: 14,
        turn: Angle::from_degrees(20.0),
        pitch: Angle::from_degrees(30.0),
        edge_mm: 0.2,
        from: RibbonFrom::Edge,
    };
    grown(&shape(Start::Ribbon(form), vec![until_still(Spurs::Hold)]))
}

fn ribs_of(shell: &Shell, panel: u32) -> [u32; 2] {
    let mut ribs = shell.panel_zones(panel);
    ribs.sort_unstable();
    ribs
}

#[test]
fn helicoid_patch_hp() {
    let shell = ribbon();
    assert_eq!(shell.panels.len(), 14 * 13 / 2);
    // sin of half the angle at the corner depends on j - i only; figures for j - i from 4 to 12.
    let angles = [
        67.651_689_941_1,
        83.121_525_140_3,
        97.180_755_781_5,
        108.937_304_474_4,
        117.050_102_221_6,
        120.0,
        117.050_102_221_6,
        108.937_304_474_4,
        97.180_755_781_5,
    ];
    let mut area = 0.0;
    for p in look::panels(&shell) {
        let [i, j] = ribs_of(&shell, p);
        if i <= 5 && (9..=12).contains(&j) {
            area += measure::panel_area(&shell, p);
            let expected: f64 = angles[(j - i) as usize - 4];
            let acute = measure::acute_angle(&shell, p).to_degrees();
            assert_near!(acute, expected.min(180.0 - expected), PRINTED, "{i} {j}");
        }
    }
    assert_near!(area, 0.890_109_309_7, PRINTED);
    let nearest = |at: Vector| shell.points.iter().map(|p| (p.0 - at).length()).fold(1.0, f64::min);
    assert!(nearest(Vector::new(0.173_205_080_8, 0.982_294_825_6, 0.9)) < 1e-10);
    assert!(nearest(Vector::new(0.173_205_080_8, 1.323_442_238_3, 1.9)) < 1e-10);
    // A saddle: seen from one side a valley between (2,9) and (2,10), a ridge between (2,9) and (3,9).
    let between = |a: [u32; 2], b: [u32; 2]| {
        let edge = look::edges(&shell).find(|e| {
            let panels = shell.edges[*e as usize].panels;
            panels.iter().all(|p| *p != zonewright_geometry::NONE)
                && [[a, b], [b, a]].contains(&panels.map(|p| ribs_of(&shell, p)))
        });
        measure::dihedral(&shell, edge.expect("the panels are neighbours")).map_or(0.0, f64::to_degrees)
    };
    let [along, across] = [between([2, 9], [2, 10]), between([2, 9], [3, 9])];
    assert_near!(along.min(360.0 - along), 163.373_011_408_3, PRINTED);
    assert_near!(across.min(360.0 - across), 166.945_783_381_5, PRINTED);
    assert!((along > 180.0) != (across > 180.0), "a valley and a ridge");
    // The deficit at the point P_3 + P_11.
    let ribs: Vec<Vector> = closed_forms::zones_of(&Start::Ribbon(RibbonForm {
        ribs: 14,
        turn: Angle::from_degrees(20.0),
        pitch: Angle::from_degrees(30.0),
        edge_mm: 0.2,
        from: RibbonFrom::Edge,
    }));
    let at: Vector = ribs[..3].iter().sum::<Vector>() + ribs[..11].iter().sum::<Vector>();
    let vertex = shell.points.iter().position(|p| (p.0 - at).length() < 1e-9);
    let deficit = measure::angle_deficits(&shell)[vertex.expect("the point is there")];
    assert_near!(deficit.to_degrees(), -5.162_899_968_9, PRINTED);
}

fn helical(ribs: u32, turn: u32) -> Shape {
    let gcd = (1..=turn)
        .rev()
        .find(|d| ribs.is_multiple_of(*d) && turn.is_multiple_of(*d))
        .unwrap_or(1);
    let mut acts = vec![until_still(Spurs::Retract)];
    for _ in 1..ribs / gcd {
        acts.push(Act::SetRoles(RoleRule::FirstAreZig(turn)));
        acts.push(until_still(Spurs::Retract));
    }
    let pitch = Angle::from_degrees(35.0);
    outside_out(shape(
        Start::Helical(HelicalForm {
            ribs,
            turn,
            pitch,
            edge_mm: 1.0,
        }),
        acts,
    ))
}

#[test]
fn helical_solids_have_the_known_counts_and_crossings() {
    for (n, r, expected) in [
        (3, 1, [8, 12, 6]),
        (4, 1, [14, 24, 12]),
        (5, 2, [32, 60, 30]),
        (6, 2, [26, 48, 24]),
        (7, 2, [72, 140, 70]),
        (7, 3, [86, 168, 84]),
    ] {
        assert_eq!(counts(&grown(&helical(n, r))), expected, "({n},{r})");
    }
    let seen = |n, r| inspect::inspect(&grown(&helical(n, r)), &Tolerances::default());
    let five = seen(5, 2);
    assert_eq!(five.crossings.len(), 15);
    assert_eq!(five.crossings.iter().filter(|c| c.shares_corner).count(), 10);
    for (n, r) in [(6, 2), (8, 2), (9, 3), (10, 2), (12, 3)] {
        assert!(!seen(n, r).crosses_itself(), "({n},{r})");
    }
    for (n, r) in [(7, 2), (7, 3)] {
        assert!(!seen(n, r).crossings.is_empty(), "({n},{r})");
    }
}

#[test]
fn half_the_ribs_double_four_panels() {
    // (4,2): panels coincide in four pairs. The shell may say stop for it, so it is not held to saying nothing.
    let (shell, _) = zonewright_geometry::grow(&helical(4, 2));
    assert_eq!(inspect::inspect(&shell, &Tolerances::default()).doubled.len(), 4);
}

#[test]
fn a_column_of_one_turn_swings_between_two_radii_and_is_back_after_n_courses() {
    let n = 12;
    let (a, b) = (40.0, 25.0);
    let form = ColumnForm {
        ribs: n,
        zag_run_mm: a,
        zig_run_mm: b,
        rise_mm: 30.0,
        turn: 1,
    };
    let shell = grown(&outside_out(shape(Start::Column(form), vec![lay(n, Spurs::Hold)])));
    assert_eq!(shell.panels.len() as u32, n * n);
    let r = |run: f64| run / (2.0 * (PI / f64::from(n)).sin());
    for point in &shell.points {
        let radius = point.0.x.hypot(point.0.y);
        assert!(
            (r(a) - r(b)).abs() - 1e-9 < radius && radius < r(a) + r(b) + 1e-9,
            "{radius}"
        );
    }
    // Every zig has met every zag: the front is the first word again.
    let front: Vec<u32> = shell.fronts[0]
        .letters
        .iter()
        .map(|l| shell.letters[l.letter as usize].zone)
        .collect();
    let first: Vec<u32> = (0..n).flat_map(|i| [n + i, (i + 1) % n]).collect();
    let turned = (0..front.len()).any(|k| front.iter().cycle().skip(k).zip(&first).all(|(p, q)| p == q));
    assert!(turned, "{front:?}");
}

#[test]
fn deficits_add_up_to_a_full_turn_times_the_euler_number() {
    let polar = |courses| {
        let pitch = Angle::from_degrees(38.0);
        let by = PolarBy::PitchEdge { pitch, edge_mm: 300.0 };
        grown(&shape(
            Start::Polar(PolarForm { ribs: 9, by }),
            vec![lay(courses, Spurs::Retract)],
        ))
    };
    // Inside, in degrees; the rim has the rest of 360 (docs/checks.md). Levels 1..5 hold half of the whole turn of 720.
    for (courses, inside) in [(3, 133.166_550_681_9), (5, 360.0), (8, 720.0)] {
        let shell = polar(courses);
        let deficits = measure::angle_deficits(&shell);
        let rim: Vec<u32> = shell.rims.iter().flat_map(|r| r.vertices.iter().copied()).collect();
        let of = |on_rim: bool| -> f64 {
            let own = (0_u32..).zip(&deficits).filter(|(v, _)| rim.contains(v) == on_rim);
            own.map(|(_, d)| d.to_degrees()).sum()
        };
        assert_near!(of(false), inside, 3e-10, "{courses} courses");
        let whole = 360.0 * measure::totals(&shell).euler as f64;
        assert_near!(of(false) + of(true), whole, 1e-9, "{courses} courses");
    }
    let tube = Start::Loop(LoopForm {
        sides: 8,
        radius_mm: 500.0,
        rise_mm: 200.0,
        moved: vec![(3, Vector::new(20.0, 10.0, -5.0))],
    });
    let shell = grown(&shape(tube, vec![lay(4, Spurs::Hold)]));
    assert_eq!(measure::totals(&shell).euler, 0);
    assert_near!(measure::angle_deficits(&shell).iter().sum(), 0.0, 1e-9 * TAU);
}
