//! Depth order against a ray cast: at each pixel's centre a ray is sent at every panel, in f64, by solving for the panel's own
//! coordinates; what it meets first must be what was painted last. Derived; no figure comes from the painter.

#![expect(clippy::unwrap_used, reason = "a test may")]

mod common;

use common::{crossing, cube, cycle, helicoid, polar, rasterise, shell, waves};
use proptest::prelude::*;
use zonewright_geometry::{Angle, NONE, Point, Shell, Vector};
use zonewright_painter::{Bounds, Camera, Faces, Look, Projection, Scene, Tints, View};

const SIZE: [f32; 2] = [120.0, 90.0];

/// Where the ray `from + t along` meets the parallelogram `a + r u + s w`, 0 <= r, s <= 1, by Cramer's rule.
fn meets(shell: &Shell, panel: u32, from: Point, along: Vector) -> Option<f64> {
    let [a, b, _, d] = shell.corner_points(panel);
    let (u, w, to) = (b - a, d - a, from - a);
    let whole = u.cross(w).dot(-along);
    let r = to.cross(w).dot(-along) / whole;
    let s = u.cross(to).dot(-along) / whole;
    let t = u.cross(w).dot(to) / whole;
    (whole != 0.0 && (0.0..=1.0).contains(&r) && (0.0..=1.0).contains(&s)).then_some(t)
}

/// Picture positions are f32: at 120 pixels they are rounded by up to 4e-6, cut ones more. A centre that near to a border may go either way.
const ROUNDING: f32 = 4e-5;

/// The panel's and the nearest panel's place on the ray through a picture position; none where there is none.
fn cast(shell: &Shell, camera: &Camera, pos: [f32; 2], panel: u32) -> [Option<f64>; 2] {
    let ray = camera.ray(pos);
    let lens = camera.lens();
    // The near plane of the camera hides what lies before it; the ray cast must too.
    let least = match camera.projection {
        Projection::Perspective => lens.near / ray.along.dot(lens.forward),
        Projection::Parallel => f64::MIN,
    };
    let hit = |panel| meets(shell, panel, ray.from, ray.along).filter(|&t| t >= least);
    let nearest = (0..shell.panels.len() as u32).filter_map(hit).min_by(f64::total_cmp);
    [if panel == NONE { None } else { hit(panel) }, nearest]
}

/// Wrong pixels and covered pixels.
fn wrong(shell: &Shell, scene: &Scene, camera: &Camera) -> (usize, usize) {
    let look = Look {
        faces: Faces::Shaded,
        ..Look::default()
    };
    let picture = scene.picture(shell, camera, &look, &Tints::default(), &[]);
    let painted = rasterise(&picture);
    let (mut wrong, mut covered) = (0, 0);
    for (at, &panel) in painted.iter().enumerate() {
        let w = SIZE[0] as usize;
        let centre = [(at % w) as f32 + 0.5, (at / w) as f32 + 0.5];
        let right = |hits: [Option<f64>; 2]| match hits {
            [None, None] => panel == NONE,
            // Of two panels at the same place either is right.
            [Some(own), Some(nearest)] => own - nearest <= 1e-6 * camera.distance,
            _ => false,
        };
        let hits = cast(shell, camera, centre, panel);
        covered += usize::from(hits[1].is_some());
        let beside = |dx, dy| cast(shell, camera, [centre[0] + dx, centre[1] + dy], panel);
        let off = [-ROUNDING, ROUNDING];
        let all_right = right(hits) || off.iter().any(|x| off.iter().any(|y| right(beside(x, y))));
        wrong += usize::from(!all_right);
    }
    (wrong, covered)
}

fn check(name: &str, shell: &Shell, camera: &Camera) {
    let scene = Scene::exact(shell);
    assert!(scene.is_exact());
    let (wrong, covered) = wrong(shell, &scene, camera);
    assert!(
        wrong * 1000 <= covered,
        "{name}: {wrong} wrong of {covered} covered, {} pieces of {} panels",
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
    let (bad, covered) = wrong(&shell, &Scene::quick(&shell), &camera);
    assert!(bad * 1000 > covered, "{bad} of {covered}");
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
