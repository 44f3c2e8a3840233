//! Fitting to a target. All answers are planted or derived.

#![expect(clippy::unwrap_used, reason = "a test may stop where it stands")]

use proptest::prelude::*;
use zonewright_geometry::{
    Point, Vector,
    fit::{
        FitEnd, FitOptions, FitStep, Paths, Plan, Target, TargetError, along, fit_path, fit_translation,
        left_of_panels, middle_lines, paths_of, resampled, with_paths,
    },
};

/// Triangles over the nodes of two paths.
fn meshed(paths: &Paths) -> Target {
    let row = u32::try_from(paths.a.len()).unwrap() + 1;
    let rows = u32::try_from(paths.b.len()).unwrap();
    let mut triangles = Vec::new();
    for j in 0..rows {
        for i in 0..row - 1 {
            let (a, b) = (j * row + i, (j + 1) * row + i);
            triangles.extend([[a, a + 1, b + 1], [a, b + 1, b]]);
        }
    }
    Target::new(paths.nodes(), triangles, &[]).unwrap()
}

/// A barrel that bends more to one end: 6 by 5 edges, no two alike.
fn barrel() -> Paths {
    let edge = |k: u32, rise: f64| rise - 90.0 * f64::from(k);
    Paths {
        origin: Point::new(100.0, -200.0, 300.0),
        a: (0..6)
            .map(|k| Vector::new(400.0 + 10.0 * f64::from(k), 0.0, edge(k, 240.0)))
            .collect(),
        b: (0..5).map(|k| Vector::new(20.0, 500.0, edge(k, 170.0))).collect(),
    }
}

/// A part of a sphere of this radius about the origin, over a square of plan.
fn cap(radius: f64, half: f64, parts: u32) -> Target {
    let place = |k: u32| half * (2.0 * f64::from(k) / f64::from(parts) - 1.0);
    let mut points = Vec::new();
    for j in 0..=parts {
        for i in 0..=parts {
            let (x, y) = (place(i), place(j));
            points.push(Point::new(x, y, (radius * radius - x * x - y * y).sqrt()));
        }
    }
    let mut triangles = Vec::new();
    for j in 0..parts {
        for i in 0..parts {
            let (a, b) = (j * (parts + 1) + i, (j + 1) * (parts + 1) + i);
            triangles.extend([[a, a + 1, b + 1], [a, b + 1, b]]);
        }
    }
    Target::new(points, triangles, &[]).unwrap()
}

fn never_rises(history: &[FitStep]) -> bool {
    history.windows(2).all(|two| two[1].sum_mm2 <= two[0].sum_mm2)
}

#[test]
fn a_meshed_translation_surface_is_found_again() {
    let planted = barrel();
    let target = meshed(&planted);
    let mut begin = planted.clone();
    begin.origin += Vector::new(15.0, -10.0, 60.0);
    for (k, edge) in (0..).zip(begin.a.iter_mut().chain(&mut begin.b)) {
        let by = f64::from(k % 3) - 1.0;
        *edge += Vector::new(9.0 * by, -6.0 * by, 25.0 * by);
    }
    let options = FitOptions {
        iterations: 3000,
        settled_mm: 1e-9,
        ..FitOptions::default()
    };
    let fit = fit_translation(&begin, &target, &options, |_| true);
    let last = fit.history.last().unwrap();
    assert!(fit.history[0].largest_mm > 30.0);
    assert!(
        last.largest_mm < 1e-6,
        "{} after {}",
        last.largest_mm,
        fit.history.len()
    );
    assert!(never_rises(&fit.history));
    let far = fit
        .paths
        .nodes()
        .iter()
        .map(|n| target.closest(*n).distance_mm)
        .fold(0.0, f64::max);
    assert!(
        (far - last.largest_mm).abs() < 1e-9,
        "the history tells of the paths that come out"
    );
}

#[test]
fn the_middle_lines_of_a_translation_surface_make_it() {
    // A paraboloid is one: its height is a sum (x part, y part). Derived: with nodes over the corners of the mesh nothing is left.
    let edges = |count: u32, along: Vector| -> Vec<Vector> {
        (0..count)
            .map(|k| along * 500.0 + Vector::Z * (200.0 * (1.0 - (2.0 * f64::from(k) + 1.0) / f64::from(count))))
            .collect()
    };
    let planted = Paths {
        origin: Point::new(0.0, 0.0, 80.0),
        a: edges(8, Vector::X),
        b: edges(6, Vector::Y),
    };
    let begin = middle_lines(&meshed(&planted), [8, 6]);
    for (found, node) in begin.nodes().iter().zip(planted.nodes()) {
        assert!(found.distance(node) < 1e-6, "{found:?} {node:?}");
    }
}

#[test]
fn the_plan_of_a_turned_rectangle_is_found() {
    let (sin, cos) = 0.4_f64.sin_cos();
    let turn = |x: f64, y: f64| Point::new(cos * x - sin * y, sin * x + cos * y, 7.0);
    let points = vec![
        turn(0.0, 0.0),
        turn(5000.0, 0.0),
        turn(5000.0, 2000.0),
        turn(0.0, 2000.0),
        turn(900.0, 700.0),
    ];
    let target = Target::new(points, vec![[0, 1, 2], [0, 2, 3], [0, 1, 4]], &[]).unwrap();
    let plan = Plan::of(&target);
    assert!(plan.corner.distance(turn(0.0, 0.0)) < 1e-6);
    assert!(plan.first.distance(turn(5000.0, 0.0) - turn(0.0, 0.0)) < 1e-6);
    assert!(plan.second.distance(turn(0.0, 2000.0) - turn(0.0, 0.0)) < 1e-6);
}

#[test]
fn covering_brings_the_surface_over_the_whole_target() {
    // A cap is no translation surface: without covering, nodes gather where it is flattest; with it, its rim is reached.
    let target = cap(4000.0, 2600.0, 16);
    let begin = middle_lines(&target, [10, 10]);
    let reach = |cover: f64| {
        let options = FitOptions {
            cover,
            smoothing: 0.01,
            iterations: 300,
            ..FitOptions::default()
        };
        let fit = fit_translation(&begin, &target, &options, |_| true);
        assert!(never_rises(&fit.history));
        let nodes = fit.paths.nodes();
        let range = |axis: usize| {
            let along = nodes.iter().map(|p| p.0[axis]);
            along.clone().fold(f64::MIN, f64::max) - along.fold(f64::MAX, f64::min)
        };
        (range(0), range(1))
    };
    let (alone, covering) = (reach(0.0), reach(1.0));
    assert!(alone.0 < 4000.0 && alone.1 < 4000.0, "{alone:?}");
    assert!(covering.0 > 4700.0 && covering.1 > 4700.0, "{covering:?} of 5200");
}

#[test]
fn places_are_spread_evenly() {
    // Two triangles of 3 : 1 by area get places by their areas; each place lies on the target.
    let points = vec![
        Point::ORIGIN,
        Point::new(60.0, 0.0, 0.0),
        Point::new(0.0, 10.0, 0.0),
        Point::new(-20.0, 0.0, 0.0),
    ];
    let target = Target::new(points, vec![[0, 1, 2], [0, 2, 3]], &[]).unwrap();
    let places = target.spread(400);
    let right = places.iter().filter(|p| p.0.x > 0.0).count();
    assert!(right.abs_diff(300) <= 2, "{right}");
    assert!(places.iter().all(|p| target.closest(*p).distance_mm < 1e-9));
}

#[test]
fn held_corners_stay() {
    let begin = barrel();
    let target = cap(9000.0, 3000.0, 20);
    let options = FitOptions {
        hold_ends: true,
        smoothing: 0.5,
        ..FitOptions::default()
    };
    let fit = fit_translation(&begin, &target, &options, |_| true);
    assert!(fit.history.len() > 2 && never_rises(&fit.history));
    let (before, after) = (begin.nodes(), fit.paths.nodes());
    for corner in [0, 6, 35, 41] {
        assert!(before[corner].distance(after[corner]) < 1e-6);
    }
    assert!(before[17].distance(after[17]) > 1.0);
}

#[test]
fn an_arch_is_followed_by_one_path() {
    // A half circle of radius 2 m, drawn in steps of a degree; in 12 equal parts its points are 15 degrees apart (derived).
    let arch: Vec<Point> = (0..=180)
        .map(|k| {
            let (sin, cos) = f64::from(k).to_radians().sin_cos();
            Point::new(-2000.0 * cos, 100.0, 2000.0 * sin)
        })
        .collect();
    let line: Vec<u32> = (0..=180).collect();
    let target = Target::new(arch.clone(), Vec::new(), &[line]).unwrap();
    assert!(target.is_curve());
    let begin = along(&target, 12);
    for (k, point) in begin.iter().enumerate() {
        assert!(point.distance(arch[15 * k]) < 1e-9);
    }
    let mut off = begin.clone();
    for (k, point) in (0..).zip(&mut off) {
        *point += Vector::new(f64::from(k % 2) * 80.0, 30.0, 60.0);
    }
    let fit = fit_path(&off, &target, &FitOptions::default(), |_| true);
    assert!(fit.history.last().unwrap().largest_mm < 1e-6 && fit.paths.b.is_empty());
    assert_eq!(fit.end, FitEnd::Settled);
    assert_eq!(fit.left_mm.len(), 13);
}

#[test]
fn a_line_is_cut_into_equal_lengths() {
    let line = [Point::ORIGIN, Point::new(30.0, 0.0, 0.0), Point::new(30.0, 90.0, 0.0)];
    let points = resampled(&line, 4);
    let want = [(0.0, 0.0), (30.0, 0.0), (30.0, 30.0), (30.0, 60.0), (30.0, 90.0)];
    for (point, (x, y)) in points.iter().zip(want) {
        assert!(point.distance(Point::new(x, y, 0.0)) < 1e-9);
    }
    assert_eq!(points.len(), 5);
}

#[test]
fn a_fit_that_is_told_to_stop_gives_what_it_has() {
    let target = cap(5000.0, 2500.0, 12);
    let begin = Paths {
        origin: Point::new(-2000.0, -2000.0, 4000.0),
        a: vec![Vector::X * 500.0; 8],
        b: vec![Vector::Y * 500.0; 8],
    };
    let mut told = 0;
    let fit = fit_translation(&begin, &target, &FitOptions::default(), |_| {
        told += 1;
        told < 3
    });
    assert_eq!((fit.end, fit.history.len()), (FitEnd::Stopped, 3));
    assert!(fit.history[2].rms_mm < fit.history[0].rms_mm);
}

#[test]
fn targets_that_cannot_be_used_say_why() {
    let point = Point::ORIGIN;
    let refused = |points, triangles, lines: &[Vec<u32>]| Target::new(points, triangles, lines).unwrap_err();
    assert_eq!(refused(vec![point], vec![], &[vec![0]]), TargetError::Empty);
    assert_eq!(
        refused(vec![Point::new(f64::NAN, 0.0, 0.0)], vec![[0; 3]], &[]),
        TargetError::NotFinite(0)
    );
    assert_eq!(
        refused(vec![point; 3], vec![[0, 1, 3]], &[]),
        TargetError::NoSuchPoint(3)
    );
}

#[test]
fn what_is_left_of_a_level_panel_over_a_level_target() {
    use zonewright_geometry::{Panel, Shell};
    let corners = [(0.0, 0.0), (100.0, 0.0), (100.0, 100.0), (0.0, 100.0)];
    let lift = |z: f64| corners.map(|(x, y)| Point::new(x, y, z));
    let target = Target::new(lift(0.0).to_vec(), vec![[0, 1, 2], [0, 2, 3]], &[]).unwrap();
    for (z, order, sign) in [
        (5.0, [0, 1, 2, 3], 1.0),
        (-5.0, [0, 1, 2, 3], -1.0),
        (5.0, [3, 2, 1, 0], -1.0),
    ] {
        let shell = Shell {
            points: lift(z).to_vec(),
            panels: vec![Panel {
                corners: order,
                letters: [0, 1],
                course: 1,
            }],
            ..Shell::default()
        };
        assert!((left_of_panels(&shell, &target)[0].signed_mm - 5.0 * sign).abs() < 1e-9);
    }
}

#[test]
fn sections_lie_on_their_plane_and_on_the_target() {
    let target = cap(5000.0, 2500.0, 9);
    for axis in 0..2 {
        let cuts = target.section(axis, 130.0);
        // One cut in each of the 9 squares of a strip, on either side of its diagonal.
        assert!((9..=18).contains(&cuts.len()), "{}", cuts.len());
        for end in cuts.iter().flatten() {
            assert!((end.0[axis] - 130.0).abs() < 1e-9);
            assert!(target.closest(*end).distance_mm < 1e-9);
        }
    }
}

/// A translation surface of two arcs, placed with this turn, scale and mirror.
fn shape(turn: [f64; 3], scale: f64, mirrored: bool) -> zonewright_geometry::Shape {
    use zonewright_geometry::{start::*, *};
    let arc = |azimuth: f64, parts| Curve {
        shape: CurveShape::Arc {
            span_mm: 4000.0,
            rise_mm: 700.0,
        },
        parts,
        azimuth: Angle::from_degrees(azimuth),
    };
    Shape {
        start: Start::Translation(TranslationForm {
            zig: arc(0.0, 6),
            zag: arc(80.0, 4),
        }),
        zones: Vec::new(),
        steps: vec![Step {
            id: StepId(1),
            name: None,
            on: true,
            side: Side::Fore,
            act: Act::Lay {
                courses: Courses::UntilStill,
                spurs: Spurs::default(),
            },
        }],
        finish: Vec::new(),
        placement: Placement {
            mirrored,
            scale,
            turn: turn.map(Angle::from_degrees),
            shift: Vector::new(300.0, -50.0, 80.0),
        },
        outside: Outside::Grown,
        tolerances: Tolerances::default(),
    }
}

#[test]
fn paths_are_where_the_shell_is_and_go_back_there() {
    for (turn, scale, mirrored) in [([0.0; 3], 1.0, false), ([10.0, -20.0, 130.0], 1.5, true)] {
        let shape = shape(turn, scale, mirrored);
        let paths = paths_of(&shape).unwrap();
        let (shell, _) = zonewright_geometry::grow(&shape);
        let near = |shell: &zonewright_geometry::Shell, node: &Point| {
            shell
                .points
                .iter()
                .map(|p| p.distance(*node))
                .fold(f64::INFINITY, f64::min)
        };
        assert_eq!(paths.nodes().len(), shell.points.len());
        assert!(paths.nodes().iter().all(|node| near(&shell, node) < 1e-6));
        // Other paths, put in: the shell then is where they are.
        let mut moved = paths.clone();
        moved.origin += Vector::new(1000.0, 200.0, -500.0);
        moved.a[2] += Vector::new(5.0, 60.0, -40.0);
        moved.b[0] += Vector::new(0.0, -30.0, 90.0);
        let next = with_paths(&shape, &moved).unwrap();
        assert_eq!(
            (next.placement.turn, next.placement.mirrored),
            (shape.placement.turn, mirrored)
        );
        let (grown, findings) = zonewright_geometry::grow(&next);
        assert!(findings.is_empty(), "{findings:?}");
        assert_eq!(grown.panels.len(), 24);
        assert!(moved.nodes().iter().all(|node| near(&grown, node) < 1e-6));
        let again = paths_of(&next).unwrap();
        assert!(again.origin.distance(moved.origin) < 1e-6);
    }
}

#[test]
fn paths_that_cannot_be_walked_are_refused() {
    let shape = shape([0.0; 3], 1.0, false);
    let paths = paths_of(&shape).unwrap();
    for edge in [Vector::ZERO, Vector::X * 1e9, Vector::NAN] {
        let mut bad = paths.clone();
        bad.a[1] = edge;
        assert!(with_paths(&shape, &bad).is_err(), "{edge}");
    }
}

proptest! {
    #![proptest_config(ProptestConfig::with_cases(48))]

    /// The step that looks for closest places cannot make the sum grow, nor can the least squares.
    #[test]
    fn the_sum_never_rises(
        (m, n) in (1_usize..9, 1_usize..9),
        noise in proptest::collection::vec((-400.0..400.0_f64, -400.0..400.0_f64, -400.0..400.0_f64), 18),
        smoothing in prop_oneof![Just(0.0), 0.0..5.0_f64],
        hold_ends in any::<bool>(),
        cover in prop_oneof![Just(0.0), 0.0..3.0_f64],
    ) {
        let target = cap(5000.0, 2500.0, 10);
        let mut edge = noise.into_iter().map(Vector::from);
        let begin = Paths {
            origin: Point::new(-2000.0, -2200.0, 4200.0),
            a: (0..m).map(|_| Vector::X * 500.0 + edge.next().unwrap()).collect(),
            b: (0..n).map(|_| Vector::Y * 500.0 + edge.next().unwrap()).collect(),
        };
        let options = FitOptions { iterations: 40, settled_mm: 0.0, smoothing, cover, hold_ends };
        let fit = fit_translation(&begin, &target, &options, |_| true);
        prop_assert!(never_rises(&fit.history));
        if smoothing == 0.0 && cover == 0.0 {
            prop_assert!(fit.history.windows(2).all(|two| two[1].rms_mm <= two[0].rms_mm));
        }
    }

    /// The tree finds what looking at every part finds.
    #[test]
    fn the_closest_place_is_the_closest(
        coordinates in proptest::collection::vec((-9.0..9.0_f64, -9.0..9.0_f64, -9.0..9.0_f64), 40),
        asked in proptest::collection::vec((-15.0..15.0_f64, -15.0..15.0_f64, -15.0..15.0_f64), 10),
        hint in 0_u32..60,
    ) {
        let points: Vec<Point> = coordinates.into_iter().map(|p| Point(p.into())).collect();
        let triangles: Vec<[u32; 3]> = (0..38).map(|k| [k, k + 1, k + 2]).collect();
        let lines = [vec![0, 20, 39], vec![5, 9]];
        let whole = Target::new(points.clone(), triangles.clone(), &lines).unwrap();
        for place in asked {
            let place = Point(place.into());
            let singly = triangles.iter().map(|t| Target::new(points.clone(), vec![*t], &[]).unwrap());
            let singly = singly.chain(lines.iter().map(|l| Target::new(points.clone(), vec![], std::slice::from_ref(l)).unwrap()));
            let least = singly.map(|one| one.closest(place).distance_mm).fold(f64::INFINITY, f64::min);
            prop_assert!((whole.closest(place).distance_mm - least).abs() < 1e-12);
            prop_assert!((whole.closest_from(place, Some(hint)).distance_mm - least).abs() < 1e-12);
        }
    }
}
