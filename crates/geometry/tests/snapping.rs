//! Snapping: exact values hit, never beyond the reach, nothing moved twice. All expected values are derived.

use proptest::prelude::*;
use zonewright_geometry::{
    Angle, Point, Vector,
    edit::{Freedom, Measures},
    snap::{
        ANGLE_STEP, Around, Drawing, INCH_STEPS, MM_STEPS, ORDER, Rules, SnapTo, on_axis, round_step, snap_edge,
        snap_point,
    },
    start::{AxisClass, Star},
};

const RULES: Rules<'static> = Rules {
    reach_mm: 12.0,
    length_step_mm: Some(50.0),
    angle_step: Some(ANGLE_STEP),
    order: &ORDER,
};

fn polar(length: f64, slope: f64, azimuth: f64) -> Vector {
    let (s, a) = (slope.to_radians(), azimuth.to_radians());
    Vector::new(s.cos() * a.cos(), s.cos() * a.sin(), s.sin()) * length
}

fn near(a: Vector, b: Vector) {
    assert!(a.distance(b) <= 1e-9, "{a:?} instead of {b:?}");
}

#[test]
fn steps_go_by_what_can_be_told_apart_on_the_picture() {
    // 12 pixels a step at least.
    for (scale, step) in [
        (20.0, 1.0),
        (12.0, 1.0),
        (3.0, 5.0),
        (1.2, 10.0),
        (0.5, 50.0),
        (0.2, 100.0),
        (0.001, 100.0),
    ] {
        assert_eq!(round_step(&MM_STEPS, scale), Some(step), "{scale}");
    }
    assert_eq!(round_step(&INCH_STEPS, 1.0), Some(12.7));
    assert_eq!(round_step(&[], 1.0), None);
}

#[test]
fn an_edge_takes_round_length_slope_and_azimuth_together() {
    let dragged = polar(401.5, 34.8, 60.3);
    let snapped = snap_edge(Point::ORIGIN, dragged, Freedom::Space, &Around::default(), &RULES);
    near(snapped.value, polar(400.0, 35.0, 60.0));
    let meant = [
        SnapTo::Length(400.0),
        SnapTo::Slope(Angle::from_degrees(35.0)),
        SnapTo::Azimuth(Angle::from_degrees(60.0)),
    ];
    assert_eq!(snapped.to, meant);
    // 4 mm is a third of the reach: 5 mm of length is too far, the slope is still taken.
    let far = snap_edge(
        Point::ORIGIN,
        polar(405.0, 0.2, 62.5),
        Freedom::Space,
        &Around::default(),
        &RULES,
    );
    near(far.value, polar(405.0, 0.0, 62.5));
    assert_eq!(far.to, [SnapTo::Slope(Angle::from_degrees(0.0))]);
}

#[test]
fn a_vertex_goes_before_round_numbers_and_the_own_beginning_is_none() {
    let near_end = Point::new(10.0, 20.0, 30.0);
    let vertices = [near_end, Point::new(313.0, 27.0, 33.0)];
    let around = Around {
        vertices: &vertices,
        ..Around::default()
    };
    let snapped = snap_edge(near_end, Vector::new(300.0, 0.0, 0.0), Freedom::Space, &around, &RULES);
    near(snapped.value, Vector::new(303.0, 7.0, 3.0));
    assert_eq!(snapped.to, [SnapTo::Vertex(1)]);
    let short = snap_edge(near_end, Vector::new(0.0, 3.0, 11.0), Freedom::Space, &around, &RULES);
    assert!(short.value.length() > 1.0, "an edge keeps a length");
}

#[test]
fn what_is_round_but_within_reach_of_a_vertex_is_left_alone() {
    // 13 mm from the vertex; the round length of 300 is 11 mm from it. Taking it would make the next movement jump.
    let vertices = [Point::new(289.0, 0.0, 0.0)];
    let around = Around {
        vertices: &vertices,
        ..Around::default()
    };
    let rules = Rules {
        angle_step: None,
        order: &ORDER[..4],
        ..RULES
    };
    let snapped = snap_edge(
        Point::ORIGIN,
        Vector::new(302.0, 0.0, 0.0),
        Freedom::Space,
        &around,
        &rules,
    );
    assert_eq!((snapped.value, snapped.to), (Vector::new(302.0, 0.0, 0.0), vec![]));
}

#[test]
fn an_edge_takes_the_directions_of_a_star_and_is_square_to_its_neighbours() {
    let axes = Star::Icosahedral(vec![AxisClass::FiveFold]).directions().unwrap();
    let around = Around {
        directions: &axes,
        ..Around::default()
    };
    for (index, axis) in axes.iter().enumerate() {
        let across = axis.cross(Vector::new(0.3, 0.9, 0.1)).normalize();
        let snapped = snap_edge(
            Point::ORIGIN,
            *axis * -302.0 + across * 4.0,
            Freedom::Space,
            &around,
            &RULES,
        );
        near(snapped.value, *axis * -300.0);
        assert_eq!(snapped.to, [SnapTo::Direction(index), SnapTo::Length(300.0)]);
    }
    let neighbours = [Vector::new(3.0, 1.0, 2.0)];
    let around = Around {
        neighbours: &neighbours,
        ..Around::default()
    };
    let snapped = snap_edge(
        Point::ORIGIN,
        Vector::new(101.0, -297.0, 0.3),
        Freedom::Space,
        &around,
        &RULES,
    );
    assert!(snapped.value.dot(neighbours[0]).abs() < 1e-9);
    assert_eq!(snapped.to[0], SnapTo::Square(0));
}

#[test]
fn a_plane_or_a_line_is_never_left() {
    let across = Vector::new(-0.6, 0.8, 0.0);
    let in_plane = Vector::new(0.8, 0.6, 0.0) * 330.0 + Vector::Z * -228.0;
    let snapped = snap_edge(
        Point::ORIGIN,
        in_plane,
        Freedom::Plane(across),
        &Around::default(),
        &RULES,
    );
    assert!(snapped.value.dot(across).abs() < 1e-9);
    assert!((snapped.value.length() - 400.0).abs() < 1e-9);
    let line = Vector::new(2.0, 3.0, 6.0) / 7.0;
    let snapped = snap_edge(
        Point::ORIGIN,
        line * 352.0,
        Freedom::Line(line),
        &Around::default(),
        &RULES,
    );
    near(snapped.value, line * 350.0);
    let vertices = [Point::new(900.0, 900.0, 157.0)];
    let around = Around {
        vertices: &vertices,
        ..Around::default()
    };
    let near_end = Point::new(0.0, 0.0, 100.0);
    let level = on_axis(near_end, Vector::new(300.0, 11.0, 50.0), Vector::Z, &around, &RULES);
    assert_eq!(
        (level.value, level.to),
        (Vector::new(300.0, 11.0, 57.0), vec![SnapTo::Height(0)])
    );
    let round = on_axis(
        near_end,
        Vector::new(293.0, 11.0, 20.0),
        Vector::X,
        &Around::default(),
        &RULES,
    );
    assert_eq!(
        (round.value, round.to),
        (Vector::new(300.0, 11.0, 20.0), vec![SnapTo::Along(300.0)])
    );
}

#[test]
fn a_point_takes_the_plane_of_its_neighbours_and_the_height_of_a_vertex() {
    let (a, b) = (Point::new(0.0, 0.0, 0.0), Point::new(800.0, 600.0, 40.0));
    let rules = Rules {
        angle_step: None,
        length_step_mm: None,
        ..RULES
    };
    let on = Vector::new(0.8, 0.6, 0.0) * 430.0 + Vector::Z * 210.0;
    let aside = Point(on + Vector::new(-0.6, 0.8, 0.0) * 9.0);
    let snapped = snap_point(aside, Some(a), Some(b), &Around::default(), &rules);
    near(snapped.value.0, on);
    assert_eq!(snapped.to, [SnapTo::Plane]);
    let vertices = [Point::new(5000.0, 0.0, 215.0)];
    let around = Around {
        vertices: &vertices,
        ..Around::default()
    };
    let snapped = snap_point(Point::new(100.0, 400.0, 220.0), Some(a), None, &around, &rules);
    near(snapped.value.0, Vector::new(100.0, 400.0, 215.0));
    assert_eq!(snapped.to, [SnapTo::Height(0)]);
}

#[test]
fn in_a_drawing_lengths_are_those_of_the_drawing_and_the_depth_stays() {
    // A front, seen along y: the edge runs 77 in depth; 398 and 302 across and up make 499.6, at 37.2 degrees.
    let front = Drawing::along(Vector::Y);
    let rules = Rules {
        angle_step: None,
        ..RULES
    };
    let v = Vector::new(398.0, 77.0, 302.0);
    let snapped = front.snap_edge(Point::ORIGIN, v, &Around::default(), &rules);
    let flat = Vector::new(398.0, 0.0, 302.0);
    near(snapped.value, flat * (500.0 / flat.length()) + Vector::Y * 77.0);
    assert_eq!(snapped.to, [SnapTo::Length(500.0)]);
    // In a plan every edge is level: that is not said, and the height stays.
    let plan = Drawing::along(-Vector::Z);
    let point = Point::new(401.0, 3.0, 123.0);
    let snapped = plan.snap_point(point, Some(Point::ORIGIN), None, &Around::default(), &RULES);
    near(snapped.value.0, Vector::new(400.0, 0.0, 123.0));
    assert_eq!(
        snapped.to,
        [SnapTo::Length(400.0), SnapTo::Azimuth(Angle::from_degrees(0.0))]
    );
    // A vertex far behind the drawing's plane is one seen from it.
    let vertices = [Point::new(405.0, 900.0, 307.0)];
    let around = Around {
        vertices: &vertices,
        ..Around::default()
    };
    let snapped = front.snap_edge(Point::ORIGIN, v, &around, &rules);
    near(snapped.value, Vector::new(405.0, 77.0, 307.0));
    assert_eq!(snapped.to, [SnapTo::Vertex(0)]);
}

#[test]
fn measures_are_what_a_bench_reads() {
    // 3, 4, 12: a run of 5, a length of 13.
    let m = Measures::of(Vector::new(-3.0, 4.0, -12.0));
    assert!((m.length_mm - 13.0).abs() < 1e-12);
    assert!((m.slope.degrees() - -(12.0_f64 / 5.0).atan().to_degrees()).abs() < 1e-12);
    assert!((m.azimuth.degrees() - (180.0 - (4.0_f64 / 3.0).atan().to_degrees())).abs() < 1e-12);
    near(m.vector(), Vector::new(-3.0, 4.0, -12.0));
    let upright = Measures::of(Vector::Z * 7.0);
    assert_eq!((upright.slope.degrees(), upright.azimuth.degrees()), (90.0, 0.0));
}

proptest! {
    /// Whatever is around: never beyond the reach, and a second time nothing changes.
    #[test]
    fn an_edge_is_moved_at_most_by_the_reach_and_only_once(
        v in (-600.0..600.0, -600.0..600.0, -600.0..600.0),
        others in prop::collection::vec((-600.0..600.0, -600.0..600.0, -600.0..600.0), 0..40),
        neighbour in (-1.0..1.0, -1.0..1.0, 0.1..1.0),
        reach in 1.0..60.0,
        step in prop::sample::select(vec![1.0, 10.0, 50.0, 12.7]),
        rotate in 0_usize..6,
    ) {
        let vertices: Vec<Point> = others.into_iter().map(|(x, y, z)| Point::new(x, y, z)).collect();
        let directions = Star::Cubic(vec![AxisClass::ThreeFold, AxisClass::TwoFold]).directions().unwrap();
        let neighbours = [Vector::from(neighbour)];
        let around = Around { vertices: &vertices, directions: &directions, neighbours: &neighbours };
        let mut order = ORDER;
        order.rotate_left(rotate);
        let rules = Rules { reach_mm: reach, length_step_mm: Some(step), angle_step: Some(ANGLE_STEP), order: &order };
        let near_end = Point::new(20.0, -30.0, 10.0);
        let v = Vector::from(v);
        let once = snap_edge(near_end, v, Freedom::Space, &around, &rules);
        prop_assert!(once.value.distance(v) <= reach + 1e-9, "{:?}", once);
        let twice = snap_edge(near_end, once.value, Freedom::Space, &around, &rules);
        prop_assert!(twice.value.distance(once.value) <= 1e-9, "{:?} then {:?}", once, twice);
        let point = near_end + v;
        let behind = Point::new(300.0, 200.0, -100.0);
        let once = snap_point(point, Some(near_end), Some(behind), &around, &rules);
        prop_assert!(once.value.distance(point) <= reach + 1e-9, "{:?}", once);
        let twice = snap_point(once.value, Some(near_end), Some(behind), &around, &rules);
        prop_assert!(twice.value.distance(once.value) <= 1e-9, "{:?} then {:?}", once, twice);
    }
}
