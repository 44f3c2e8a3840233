//! Depth order against a ray cast.

#![expect(clippy::unwrap_used, reason = "a test may")]

mod common;

use common::{crossing, cube, cycle, helicoid, polar, ray_cast::compare, shell, waves};
use proptest::prelude::*;
use zonewright_geometry::{Angle, Shell, Vector};
use zonewright_painter::{Bounds, Camera, Projection, Scene, View};

const SIZE: [f32; 2] = [120.0, 90.0];

fn check(name: &str, shell: &Shell, camera: &Camera) {
    let scene = Scene::exact(shell);
    assert!(scene.is_exact());
    let agreement = compare(shell, &scene, camera);
    assert!(
        agreement.holds(),
        "{name}: {agreement:?}, {} pieces of {} panels",
        scene.piece_count(),
        shell.panels.len()
    );
}

fn from_all_sides(name: &str, shell: &Shell) {
    let bounds = Bounds::of(shell).unwrap();
    for projection in [Projection::Perspective, Projection::Parallel] {
        for view in View::ALL {
            let camera = Camera::view(view, projection, &bounds, SIZE);
            check(&format!("{name} {} {projection:?}", view.name()), shell, &camera);
        }
        for (azimuth, elevation) in [(13.0, -71.0), (101.0, 7.0), (-157.0, 44.0)] {
            let mut camera = Camera::view(View::Fit, projection, &bounds, SIZE);
            camera.azimuth = Angle::from_degrees(azimuth);
            camera.elevation = Angle::from_degrees(elevation);
            check(&format!("{name} {azimuth} {elevation} {projection:?}"), shell, &camera);
        }
    }
}

#[test]
fn cube_is_in_order() {
    from_all_sides("cube", &cube());
}

#[test]
fn convex_shell_is_in_order() {
    let shell = polar(12);
    // n (n - 1) rhombs round two poles (polar zonohedra; Coxeter, Regular Polytopes, from memory).
    assert_eq!(shell.panels.len(), 132);
    assert!(shell.is_closed());
    from_all_sides("polar", &shell);
}

#[test]
fn panels_through_each_other_are_in_order() {
    from_all_sides("crossing", &crossing());
}

#[test]
fn cyclic_slivers_are_in_order() {
    from_all_sides("cycle", &cycle());
}

#[test]
fn helicoid_is_in_order() {
    from_all_sides("helicoid", &helicoid(30, 4));
}

#[test]
fn waves_are_in_order() {
    from_all_sides("waves", &waves(10));
}

#[test]
fn near_and_inside_are_in_order() {
    for (name, shell) in [("cube", cube()), ("polar", polar(12)), ("helicoid", helicoid(30, 4))] {
        let bounds = Bounds::of(&shell).unwrap();
        for share in [0.6, 0.3, 0.1, 0.02] {
            let mut camera = Camera::view(View::Fit, Projection::Perspective, &bounds, SIZE);
            camera.distance = bounds.diagonal() * share;
            check(&format!("{name} from {share}"), &shell, &camera);
        }
    }
}

/// The quick order is wrong somewhere for the cyclic slivers: no order of whole panels is right. So the check above can fail.
#[test]
fn whole_panels_have_no_order_in_a_cycle() {
    let shell = cycle();
    let bounds = Bounds::of(&shell).unwrap();
    let camera = Camera::view(View::Plan, Projection::Parallel, &bounds, SIZE);
    let agreement = compare(&shell, &Scene::quick(&shell), &camera);
    assert!(!agreement.holds(), "{agreement:?}");
}

/// A convex shell needs no cuts on panel planes; what is cut is cut by the cells' walls only.
#[test]
fn quick_order_keeps_whole_panels() {
    let shell = polar(12);
    assert_eq!(Scene::quick(&shell).piece_count(), 132);
    assert_eq!(Scene::exact(&cube()).piece_count(), 6);
}

#[test]
fn degenerate_panels_are_left_out() {
    let x = Vector::X * 100.0;
    let mut shell = shell(&[
        [Vector::ZERO, x, Vector::Y * 100.0],
        [Vector::ZERO, x, x],
        [x, x, Vector::Z * f64::NAN],
    ]);
    shell.panels[2].corners[0] = 9999;
    let scene = Scene::exact(&shell);
    assert_eq!(scene.piece_count(), 1);
    assert_eq!(Scene::exact(&Shell::default()).piece_count(), 0);
}

proptest! {
    #![proptest_config(ProptestConfig { cases: 16, ..ProptestConfig::default() })]
    /// Any heap of parallelograms, long and thin ones among them, from anywhere.
    #[test]
    fn heaps_are_in_order(
        panels in prop::collection::vec(prop::array::uniform9(-100.0..100.0_f64), 2..20),
        azimuth in -180.0..180.0_f64,
        elevation in -90.0..90.0_f64,
        distance in 20.0..600.0_f64,
        parallel: bool,
    ) {
        let panels: Vec<[Vector; 3]> = panels
            .iter()
            .map(|n| [Vector::new(n[0], n[1], n[2]), Vector::new(n[3], n[4], n[5]), Vector::new(n[6], n[7], n[8]) * 0.2])
            .collect();
        let shell = shell(&panels);
        let bounds = Bounds::of(&shell).unwrap();
        let projection = if parallel { Projection::Parallel } else { Projection::Perspective };
        let mut camera = Camera::view(View::Fit, projection, &bounds, SIZE);
        camera.azimuth = Angle::from_degrees(azimuth);
        camera.elevation = Angle::from_degrees(elevation);
        camera.distance = distance;
        check("heap", &shell, &camera);
    }
}
