//! The camera against closed forms; all derived.

mod common;

use proptest::prelude::*;
use zonewright_geometry::{Angle, Point};
use zonewright_painter::{Bounds, Camera, Projection, View};

const SIZE: [f32; 2] = [800.0, 600.0];

fn bounds() -> Bounds {
    Bounds {
        min: Point::new(-100.0, -200.0, -300.0),
        max: Point::new(100.0, 200.0, 300.0),
    }
}

fn both(test: impl Fn(Projection)) {
    test(Projection::Perspective);
    test(Projection::Parallel);
}

/// The named views put the axes where their names say: which way x, y and z go on the picture, y of the picture down.
#[test]
fn views_show_their_axes() {
    let axes = [
        Point::new(50.0, 0.0, 0.0),
        Point::new(0.0, 50.0, 0.0),
        Point::new(0.0, 0.0, 50.0),
    ];
    let signs = |view: View| {
        let camera = Camera::view(view, Projection::Parallel, &bounds(), SIZE);
        let from = camera.project(Point::ORIGIN).expect("the middle is seen");
        axes.map(|p| {
            let p = camera.project(p).expect("axes are seen");
            let sign = |d: f64| if d.abs() < 1e-3 { 0 } else { d.signum() as i32 };
            [
                sign(f64::from(p.pos[0] - from.pos[0])),
                sign(f64::from(p.pos[1] - from.pos[1])),
                sign(p.depth - from.depth),
            ]
        })
    };
    assert_eq!(signs(View::Plan), [[1, 0, 0], [0, -1, 0], [0, 0, -1]]);
    assert_eq!(signs(View::Front), [[1, 0, 0], [0, 0, 1], [0, -1, 0]]);
    assert_eq!(signs(View::Side), [[0, 0, -1], [1, 0, 0], [0, -1, 0]]);
    assert_eq!(signs(View::Iso)[2], [0, -1, -1]);
}

/// In an isometric view all three axes are shortened by sqrt(2/3) (common knowledge; ISO 5456-3 from memory).
#[test]
fn isometric_shortens_all_axes_alike() {
    let camera = Camera::view(View::Iso, Projection::Parallel, &bounds(), SIZE);
    let from = camera.project(Point::ORIGIN).expect("seen").pos;
    let scale = camera.pixels_per_mm_at(Point::ORIGIN);
    for p in [
        Point::new(100.0, 0.0, 0.0),
        Point::new(0.0, 100.0, 0.0),
        Point::new(0.0, 0.0, 100.0),
    ] {
        let to = camera.project(p).expect("seen").pos;
        let length = f64::from((to[0] - from[0]).hypot(to[1] - from[1])) / scale;
        assert!((length - 100.0 * (2.0_f64 / 3.0).sqrt()).abs() < 1e-3, "{length}");
    }
}

/// A point x right of the view's middle at depth z comes x f / z from the middle of the picture, where f is half the height over
/// the tangent of half the angle of view, 35 degrees.
#[test]
fn perspective_is_by_similar_triangles() {
    let camera = Camera {
        target: Point::ORIGIN,
        distance: 1000.0,
        azimuth: Angle::from_degrees(-90.0),
        elevation: Angle::from_degrees(0.0),
        projection: Projection::Perspective,
        size: SIZE,
    };
    let f = 300.0 / 17.5_f64.to_radians().tan();
    let seen = camera.project(Point::new(120.0, 500.0, 60.0)).expect("seen");
    assert!((seen.depth - 1500.0).abs() < 1e-9);
    assert!((f64::from(seen.pos[0]) - (400.0 + 120.0 * f / 1500.0)).abs() < 1e-3);
    assert!((f64::from(seen.pos[1]) - (300.0 - 60.0 * f / 1500.0)).abs() < 1e-3);
    assert_eq!(camera.project(Point::new(0.0, -1500.0, 0.0)), None);
    assert_eq!(camera.project(Point::new(f64::NAN, 0.0, 0.0)), None);
}

/// A fitted box lies within the picture, and touches its border less the margin of a tenth on two sides.
#[test]
fn fitting_fills_the_picture() {
    both(|projection| {
        for view in View::ALL {
            for size in [SIZE, [300.0, 900.0]] {
                let camera = Camera::view(view, projection, &bounds(), size);
                let ends = [0, 1].map(|axis| {
                    let all = bounds().corners().map(|p| {
                        (f64::from(camera.project(p).expect("seen").pos[axis]) / f64::from(size[axis]) - 0.5) * 2.0
                    });
                    [
                        all.iter().copied().fold(0.0, f64::min),
                        all.iter().copied().fold(0.0, f64::max),
                    ]
                });
                for [low, high] in ends {
                    assert!(low >= -0.9 - 1e-5 && high <= 0.9 + 1e-5, "{view:?} {ends:?}");
                }
                assert!(
                    ends.iter().any(|e| e[0] < -0.89 && e[1] > 0.89),
                    "{view:?} {projection:?} {ends:?}"
                );
            }
        }
    });
}

#[test]
fn a_point_can_be_looked_at() {
    let one = Bounds {
        min: Point::new(5.0, 6.0, 7.0),
        max: Point::new(5.0, 6.0, 7.0),
    };
    let camera = Camera::view(View::Iso, Projection::Perspective, &one, [0.0, f32::NAN]);
    assert!(camera.distance > 0.0 && camera.size == [1.0, 1.0]);
    assert!(camera.project(one.min).is_some());
}

#[test]
fn names_of_views_are_read_back() {
    for view in View::ALL {
        assert_eq!(View::parse(view.name()), Some(view));
    }
    assert_eq!(View::parse("top"), None);
}

prop_compose! {
    fn any_camera()(
        azimuth in -180.0..180.0_f64,
        elevation in -90.0..90.0_f64,
        distance in 200.0..5000.0_f64,
        target in prop::array::uniform3(-300.0..300.0_f64),
        parallel: bool,
    ) -> Camera {
        Camera {
            target: Point::new(target[0], target[1], target[2]),
            distance,
            azimuth: Angle::from_degrees(azimuth),
            elevation: Angle::from_degrees(elevation),
            projection: if parallel { Projection::Parallel } else { Projection::Perspective },
            size: SIZE,
        }
    }
}

proptest! {
    #[test]
    fn the_ray_to_a_projected_point_meets_it(camera in any_camera(), p in prop::array::uniform3(-300.0..300.0_f64)) {
        let point = Point::new(p[0], p[1], p[2]);
        let Some(seen) = camera.project(point) else { return Ok(()) };
        prop_assume!(seen.depth > 20.0 && seen.pos.iter().all(|x| x.abs() < 5000.0));
        let ray = camera.ray(seen.pos);
        let to = point - ray.from;
        let off = (to - ray.along * to.dot(ray.along)).length() * camera.pixels_per_mm_at(point);
        prop_assert!((ray.along.length() - 1.0).abs() < 1e-12);
        prop_assert!(off < 2e-3, "{} px", off);
    }

    #[test]
    fn turning_keeps_distance_and_target(mut camera in any_camera(), dx in -500.0..500.0_f32, dy in -500.0..500.0_f32) {
        let before = camera;
        camera.orbit(dx, dy);
        prop_assert!((camera.lens().eye.distance(camera.target) - before.distance).abs() < 1e-9 * before.distance);
        prop_assert_eq!(camera.target, before.target);
        prop_assert!(camera.elevation.degrees().abs() <= 90.0);
    }

    #[test]
    fn zooming_keeps_what_is_under_the_pointer(
        mut camera in any_camera(), x in 0.0..800.0_f32, y in 0.0..600.0_f32, factor in 0.2..5.0_f32,
    ) {
        let under = camera.target + camera.move_in_view_plane(camera.target, x - 400.0, y - 300.0);
        let before = camera.distance;
        camera.zoom_at([x, y], factor);
        let seen = camera.project(under).expect("seen").pos;
        prop_assert!((seen[0] - x).abs() < 1e-2 && (seen[1] - y).abs() < 1e-2, "{:?}", seen);
        prop_assert!((camera.distance * f64::from(factor) - before).abs() < 1e-6 * before);
    }

    #[test]
    fn what_is_dragged_follows_the_pointer(
        camera in any_camera(), p in prop::array::uniform3(-100.0..100.0_f64), dx in -50.0..50.0_f32, dy in -50.0..50.0_f32,
    ) {
        let point = Point::new(p[0], p[1], p[2]);
        let Some(from) = camera.project(point) else { return Ok(()) };
        prop_assume!(from.depth > 50.0 && from.pos.iter().all(|x| x.abs() < 5000.0));
        let to = camera.project(point + camera.move_in_view_plane(point, dx, dy)).expect("as far off");
        prop_assert!((to.pos[0] - from.pos[0] - dx).abs() < 1e-2 && (to.pos[1] - from.pos[1] - dy).abs() < 1e-2);
        prop_assert!((to.depth - from.depth).abs() < 1e-6);
    }

    #[test]
    fn panning_takes_the_target_along(mut camera in any_camera(), dx in -300.0..300.0_f32, dy in -300.0..300.0_f32) {
        let target = camera.target;
        camera.pan(dx, dy);
        let seen = camera.project(target).expect("seen").pos;
        prop_assert!((seen[0] - 400.0 - dx).abs() < 1e-2 && (seen[1] - 300.0 - dy).abs() < 1e-2);
    }
}
