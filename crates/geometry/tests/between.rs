//! Measures between two things, against closed forms on the cube and planted answers.

#![allow(clippy::unwrap_used, reason = "a test may stop where there is nothing")]

use std::f64::consts::{FRAC_PI_2, FRAC_PI_3, FRAC_PI_4};

use proptest::prelude::*;
use zonewright_geometry::{
    Act, Angle, Courses, Outside, Placement, Point, Shape, Side, Spurs, Start, Step, StepId, Tolerances, Vector, grow,
    measure::{Between, Figure, between},
    start::{PolarBy, PolarForm},
};

fn p(x: f64, y: f64, z: f64) -> Point {
    Point::new(x, y, z)
}

fn line(a: [f64; 3], b: [f64; 3]) -> Figure {
    Figure::Line([a, b].map(|[x, y, z]| p(x, y, z)))
}

fn panel(at: Point, u: Vector, v: Vector) -> Figure {
    Figure::Plane([at, at + u, at + u + v, at + v])
}

fn measured(a: &Figure, b: &Figure) -> Between {
    let there = between(a, b).unwrap();
    let back = between(b, a).unwrap();
    // The same from the other end; between parallel panels the feet are under another middle.
    assert_eq!(there.distance_mm.is_some(), back.distance_mm.is_some());
    if let (Some(one), Some(other)) = (there.distance_mm, back.distance_mm) {
        near(one, other);
        near(one, there.feet[0].distance(there.feet[1]));
        near(one, there.run().length());
    }
    near(there.angle.unwrap_or(0.0), back.angle.unwrap_or(0.0));
    there
}

fn near(found: f64, expected: f64) {
    assert!((found - expected).abs() < 1e-9, "{found} is not {expected}");
}

fn places(found: Point, expected: Point) {
    assert!(found.distance(expected) < 1e-9, "{found:?} is not {expected:?}");
}

/// Distances in a unit cube; closed forms, derived by hand.
#[test]
fn from_a_corner_of_the_unit_cube() {
    let corner = Figure::Point(p(0.0, 0.0, 0.0));
    let far = measured(&corner, &Figure::Point(p(1.0, 1.0, 1.0)));
    near(far.distance_mm.unwrap(), 3_f64.sqrt());
    assert_eq!((far.run(), far.angle), (Vector::ONE, None));
    // To the space diagonal that does not go through it: sqrt(2/3), with the foot a third of the way.
    let diagonal = line([1.0, 0.0, 0.0], [0.0, 1.0, 1.0]);
    let foot = measured(&corner, &diagonal);
    near(foot.distance_mm.unwrap(), (2.0_f64 / 3.0).sqrt());
    places(foot.feet[1], p(2.0 / 3.0, 1.0 / 3.0, 1.0 / 3.0));
    // To the plane through its three neighbours: a third of the space diagonal.
    let plane = panel(
        p(1.0, 0.0, 0.0),
        Vector::new(-1.0, 1.0, 0.0),
        Vector::new(-1.0, 0.0, 1.0),
    );
    let foot = measured(&corner, &plane);
    near(foot.distance_mm.unwrap(), 1.0 / 3_f64.sqrt());
    places(foot.feet[1], p(1.0 / 3.0, 1.0 / 3.0, 1.0 / 3.0));
}

#[test]
fn a_foot_may_lie_beyond_the_edge() {
    let foot = measured(
        &Figure::Point(p(5.0, 2.0, 0.0)),
        &line([0.0, 0.0, 0.0], [1.0, 0.0, 0.0]),
    );
    near(foot.distance_mm.unwrap(), 2.0);
    places(foot.feet[1], p(5.0, 0.0, 0.0));
}

/// Skew diagonals of a unit cube: of neighbouring faces 1/sqrt 3 apart at 60 degrees, a third of the way along; a space diagonal and a face's
/// skew diagonal 1/sqrt 6 at a right angle (classic exercises; derived).
#[test]
fn skew_diagonals_of_the_unit_cube() {
    let face = line([0.0, 0.0, 0.0], [1.0, 1.0, 0.0]);
    let next = line([1.0, 0.0, 0.0], [1.0, 1.0, 1.0]);
    let apart = measured(&face, &next);
    near(apart.angle.unwrap(), FRAC_PI_3);
    // These two meet at no end: the common perpendicular has its feet inside both.
    near(apart.distance_mm.unwrap(), 1.0 / 3_f64.sqrt());
    places(apart.feet[0], p(2.0 / 3.0, 2.0 / 3.0, 0.0));
    places(apart.feet[1], p(1.0, 1.0 / 3.0, 1.0 / 3.0));
    let space = line([0.0, 0.0, 0.0], [1.0, 1.0, 1.0]);
    let skew = measured(&space, &line([0.0, 1.0, 0.0], [1.0, 0.0, 0.0]));
    near(skew.distance_mm.unwrap(), 1.0 / 6_f64.sqrt());
    near(skew.angle.unwrap(), FRAC_PI_2);
}

#[test]
fn edges_that_end_before_their_lines_meet_are_measured_to_their_ends() {
    let apart = measured(
        &line([0.0, 0.0, 0.0], [1.0, 0.0, 0.0]),
        &line([3.0, 1.0, 0.0], [3.0, 5.0, 0.0]),
    );
    near(apart.distance_mm.unwrap(), 5_f64.sqrt());
    near(apart.angle.unwrap(), FRAC_PI_2);
    places(apart.feet[0], p(1.0, 0.0, 0.0));
    places(apart.feet[1], p(3.0, 1.0, 0.0));
    // Parallel: side by side in the middle of what they share; one behind the other, from end to end.
    let beside = measured(
        &line([0.0, 0.0, 0.0], [4.0, 0.0, 0.0]),
        &line([9.0, 2.0, 0.0], [2.0, 2.0, 0.0]),
    );
    near(beside.distance_mm.unwrap(), 2.0);
    near(beside.angle.unwrap(), 0.0);
    places(beside.feet[0], p(3.0, 0.0, 0.0));
    let behind = measured(
        &line([0.0, 0.0, 0.0], [1.0, 0.0, 0.0]),
        &line([4.0, 4.0, 0.0], [9.0, 4.0, 0.0]),
    );
    near(behind.distance_mm.unwrap(), 5.0);
}

/// Angles of planes: of a cube, and of a rhombic dodecahedron's neighbouring faces, whose dihedral of 120 degrees leaves 60 (published).
#[test]
fn panels_have_an_angle_and_parallel_ones_a_distance() {
    let floor = panel(p(0.0, 0.0, 0.0), Vector::X, Vector::Y);
    let wall = measured(&floor, &panel(p(0.0, 0.0, 0.0), Vector::X, Vector::Z));
    assert_eq!(wall.distance_mm, None);
    near(wall.angle.unwrap(), FRAC_PI_2);
    let roof = measured(&floor, &panel(p(7.0, 7.0, 2.5), Vector::Y, Vector::X));
    near(roof.distance_mm.unwrap(), 2.5);
    near(roof.angle.unwrap(), 0.0);
    let g = [
        Vector::new(1.0, 1.0, 1.0),
        Vector::new(1.0, -1.0, -1.0),
        Vector::new(-1.0, 1.0, -1.0),
    ];
    let rhombs = measured(
        &panel(p(0.0, 0.0, 0.0), g[0], g[1]),
        &panel(p(0.0, 0.0, 0.0), g[0], g[2]),
    );
    near(rhombs.angle.unwrap(), FRAC_PI_3);
    // An edge against a panel: steep it has only an angle, level it has a distance.
    let steep = measured(&line([0.0, 0.0, 1.0], [1.0, 0.0, 2.0]), &floor);
    assert_eq!(steep.distance_mm, None);
    near(steep.angle.unwrap(), FRAC_PI_4);
    let level = measured(&line([0.0, 5.0, 3.0], [1.0, 9.0, 3.0]), &floor);
    near(level.distance_mm.unwrap(), 3.0);
    near(level.angle.unwrap(), 0.0);
}

#[test]
fn nothing_is_measured_to_what_has_no_extent() {
    let at = Figure::Point(p(0.0, 0.0, 0.0));
    assert_eq!(between(&at, &line([1.0, 1.0, 1.0], [1.0, 1.0, 1.0])), None);
    assert_eq!(between(&panel(p(0.0, 0.0, 0.0), Vector::X, Vector::X * 2.0), &at), None);
    assert_eq!(between(&at, &Figure::Point(p(f64::NAN, 0.0, 0.0))), None);
}

fn any_vector(size: f64) -> impl Strategy<Value = Vector> {
    [-size..size, -size..size, -size..size].prop_map(Vector::from)
}

proptest! {
    /// Planted: two edges with their middles on a common perpendicular of known length, turned and moved anywhere.
    #[test]
    fn a_planted_distance_and_angle_are_found(
        axis in any_vector(1.0), turn in -3.0..3.0_f64, shift in any_vector(5000.0),
        gap in 1.0..900.0_f64, angle in 0.05..1.5_f64, reach in 10.0..4000.0_f64,
    ) {
        prop_assume!(axis.length() > 0.1);
        let turned = |v: Vector| {
            // Rodrigues' rotation.
            let k = axis.normalize();
            Point(shift + v * turn.cos() + k.cross(v) * turn.sin() + k * (k.dot(v) * (1.0 - turn.cos())))
        };
        let u = Vector::X * reach;
        let v = Vector::new(angle.cos(), angle.sin(), 0.0) * reach;
        let up = Vector::Z * gap;
        let first = Figure::Line([turned(-u), turned(u)]);
        let second = Figure::Line([turned(up - v), turned(up + v * 0.5)]);
        let found = between(&first, &second).unwrap();
        prop_assert!((found.distance_mm.unwrap() - gap).abs() < 1e-7, "{found:?}");
        prop_assert!((found.angle.unwrap() - angle).abs() < 1e-9);
        prop_assert!(found.feet[0].distance(turned(Vector::ZERO)) < 1e-6);
        prop_assert!(found.feet[1].distance(turned(up)) < 1e-6);
    }

    /// No pair of points of two edges is nearer than the feet.
    #[test]
    fn nothing_is_nearer_than_the_feet(ends in [any_vector(9.0), any_vector(9.0), any_vector(9.0), any_vector(9.0)]) {
        let [a, b, c, d] = ends.map(Point);
        prop_assume!(a.distance(b) > 0.01 && c.distance(d) > 0.01);
        let least = between(&Figure::Line([a, b]), &Figure::Line([c, d])).unwrap().distance_mm.unwrap();
        for s in 0..=20 {
            for t in 0..=20 {
                let one = a + (b - a) * (f64::from(s) / 20.0);
                let other = c + (d - c) * (f64::from(t) / 20.0);
                prop_assert!(least <= one.distance(other) + 1e-9);
            }
        }
    }
}

/// A polar form of seven ribs.
fn dome(courses: u32) -> Shape {
    let form = PolarForm {
        ribs: 7,
        by: PolarBy::PitchEdge {
            pitch: Angle::from_degrees(35.0),
            edge_mm: 500.0,
        },
    };
    let lay = Act::Lay {
        courses: Courses::Count(courses),
        spurs: Spurs::default(),
    };
    Shape {
        start: Start::Polar(form),
        zones: Vec::new(),
        steps: vec![Step {
            id: StepId(1),
            name: None,
            on: true,
            side: Side::Fore,
            act: lay,
        }],
        finish: Vec::new(),
        placement: Placement::default(),
        outside: Outside::Grown,
        tolerances: Tolerances::default(),
    }
}

/// A panel is found again by its name, also when the shell has been turned inside out.
#[test]
fn panels_are_found_by_name() {
    let mut shape = dome(3);
    let (shell, _) = grow(&shape);
    let names: Vec<_> = (0..shell.panels.len() as u32).map(|k| shell.panel_name(k)).collect();
    for (k, name) in (0_u32..).zip(&names) {
        assert_eq!(shell.panel_named(name), Some((k, false)));
    }
    shape.outside = match shape.outside {
        Outside::Grown => Outside::Reversed,
        Outside::Reversed => Outside::Grown,
    };
    let (turned, _) = grow(&shape);
    for (k, name) in (0_u32..).zip(&names) {
        assert_eq!(turned.panel_named(name), Some((k, true)));
        let [a, b, c, d] = shell.corner_points(k);
        assert_eq!(turned.corner_points(k), [a, d, c, b]);
    }
    let (fewer, _) = grow(&dome(1));
    assert_eq!(fewer.panel_named(&names[names.len() - 1]), None);
}
