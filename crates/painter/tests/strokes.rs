//! Whether strokes show only where their edge can be seen.
//!
//! Samples of each stroke, out to its border, that nothing drawn later covers are compared with a ray cast at every panel that has
//! no corner in common with the edge: what the ray meets must not be nearer than the edge. Derived; no figure comes from the painter.

#![expect(clippy::unwrap_used, reason = "a test may")]

mod common;

use common::{
    polar,
    ray_cast::{covers, meets},
    shell,
};
use zonewright_geometry::{Angle, Shell, Vector};
use zonewright_painter::{Bounds, Camera, Look, Paint, Picture, Projection, Scene, Tints, View};

const SIZE: [f32; 2] = [1400.0, 1200.0];

/// How much nearer, in widths of the stroke, a panel hides an edge: one that crosses the edge's depth within the stroke does not.
const NEARER: f64 = 20.0;

/// How far a place is from a line on the picture.
fn away(from: [f32; 2], to: [f32; 2], place: [f32; 2]) -> f32 {
    let [dx, dy] = [to[0] - from[0], to[1] - from[1]];
    let [px, py] = [place[0] - from[0], place[1] - from[1]];
    let length = dx * dx + dy * dy;
    let t = if length > 0.0 {
        ((px * dx + py * dy) / length).clamp(0.0, 1.0)
    } else {
        0.0
    };
    (px - t * dx).hypot(py - t * dy)
}

/// Whether an item after this one covers a place.
fn covered(picture: &Picture, item: usize, place: [f32; 2]) -> bool {
    picture.items[item + 1..].iter().any(|later| {
        let points = picture.points_of(later);
        match later.paint {
            Paint::Fill { .. } => covers(points, f64::from(place[0]), f64::from(place[1])),
            Paint::Stroke { width, .. } => away(points[0], points[1], place) <= width * 0.5,
        }
    })
}

/// Samples of strokes that show though the edge is hidden there, and how many samples show at all.
fn wrong(shell: &Shell, camera: &Camera) -> (usize, usize) {
    let picture = Scene::exact(shell).picture(shell, camera, &Look::default(), &Tints::default(), &[]);
    let lens = camera.lens();
    let (mut wrong, mut shown) = (0, 0);
    for (k, item) in picture.items.iter().enumerate() {
        let Paint::Stroke { width, edge, .. } = item.paint else {
            continue;
        };
        let ends = shell.edges[edge as usize].ends.map(|v| shell.points[v as usize]);
        let corners = shell.edges[edge as usize].ends;
        let others: Vec<u32> = (0..)
            .zip(&shell.panels)
            .filter(|(_, panel)| !panel.corners.iter().any(|corner| corners.contains(corner)))
            .map(|(k, _)| k)
            .collect();
        let places = picture.points_of(item);
        for share in [0.0_f32, 0.5, 1.0] {
            let on = [0, 1].map(|axis| places[0][axis] + (places[1][axis] - places[0][axis]) * share);
            for turn in 0..8 {
                let (sin, cos) = (turn as f32 * core::f32::consts::FRAC_PI_4).sin_cos();
                let place = [on[0] + cos * width * 0.45, on[1] + sin * width * 0.45];
                if covered(&picture, k, place) {
                    continue;
                }
                shown += 1;
                let ray = camera.ray(place);
                let nearest = others
                    .iter()
                    .filter_map(|&panel| meets(shell, panel, ray.from, ray.along))
                    .filter(|&t| t > 0.0)
                    .min_by(f64::total_cmp);
                let Some(nearest) = nearest else { continue };
                let depth = lens.to_camera(ray.from + ray.along * nearest).z;
                // The depth of the edge, no nearer than either of its ends.
                let own = ends.map(|p| lens.to_camera(p).z);
                let own = own[0].min(own[1]);
                wrong += usize::from((own - depth) * lens.scale(own) > NEARER * f64::from(width));
            }
        }
    }
    (wrong, shown)
}

fn check(name: &str, shell: &Shell, view: View, projection: Projection, turns: &[[f64; 2]]) {
    let bounds = Bounds::of(shell).unwrap();
    for &[azimuth, elevation] in turns {
        let mut camera = Camera::view(view, projection, &bounds, SIZE);
        camera.azimuth = Angle::from_degrees(azimuth);
        camera.elevation = Angle::from_degrees(elevation);
        let (wrong, shown) = wrong(shell, &camera);
        assert_eq!(
            wrong, 0,
            "{name} {projection:?} from {azimuth} {elevation}: of {shown} that show"
        );
        assert!(shown > 500, "{name}: {shown}");
    }
}

/// Level, the rows of vertices on the far side lie behind the middles of panels on the near side, at the same height as walls.
#[test]
fn far_corners_do_not_show_when_seen_level() {
    let turns = [[-90.0, 0.0], [13.0, 0.0], [7.5, 0.0], [45.0, 0.01]];
    check("polar", &polar(12), View::Front, Projection::Parallel, &turns);
    check("polar", &polar(12), View::Front, Projection::Perspective, &turns);
}

/// Two half rings of level courses, at different heights: the level edges of one half lie, with their whole length, in walls that
/// cut through the middles of the other half's panels. `place` puts it into space.
fn stack(place: impl Fn(Vector) -> Vector) -> Shell {
    let (sides, courses) = (14, 12);
    let at = |k: usize| {
        let (sin, cos) = (k as f64 / sides as f64 * core::f64::consts::TAU).sin_cos();
        Vector::new(cos * 400.0, sin * 400.0, 0.0)
    };
    let mut panels = Vec::new();
    for course in 0..courses {
        // Courses lean to and fro by turns, so that planes of panels go on for one course only.
        let (start, lean) = if course % 2 == 0 { (0.0, 17.0) } else { (17.0, -17.0) };
        for k in 0..sides {
            let lift = if k < sides / 2 { 0.0 } else { 22.0 };
            let base = Vector::new(start, f64::from(course) * 5.0, f64::from(course) * 60.0 + lift);
            panels.push([at(k) + base, at(k + 1) - at(k), Vector::new(lean, 5.0, 60.0)].map(&place));
        }
    }
    shell(&panels)
}

#[test]
fn far_level_edges_do_not_show() {
    let turns = [[-90.0, 0.0], [10.0, 0.0], [80.0, 0.0], [100.0, 0.01], [-80.0, -0.01]];
    check("stack", &stack(|p| p), View::Front, Projection::Parallel, &turns);
}

/// The same lying on its side, from above: now upright walls are seen edge-on.
#[test]
fn far_edges_do_not_show_from_above() {
    let turns = [[-90.0, 90.0], [20.0, 90.0], [20.0, 89.99], [30.0, -90.0], [30.0, 35.0]];
    let lying = stack(|p| Vector::new(p.z, p.x, p.y));
    check("stack", &lying, View::Plan, Projection::Parallel, &turns);
}

/// What can be seen stays in its place: on a convex shell, each edge between two panels that face the eye.
#[test]
fn near_edges_are_not_moved() {
    let shell = polar(12);
    let bounds = Bounds::of(&shell).unwrap();
    let mut seen = 0;
    for (azimuth, elevation) in [(-90.0, 0.0), (13.0, 0.0), (20.0, 90.0)] {
        let mut camera = Camera::view(View::Front, Projection::Parallel, &bounds, SIZE);
        camera.azimuth = Angle::from_degrees(azimuth);
        camera.elevation = Angle::from_degrees(elevation);
        let lens = camera.lens();
        let picture = Scene::exact(&shell).picture(&shell, &camera, &Look::default(), &Tints::default(), &[]);
        for item in &picture.items {
            let Paint::Stroke { edge, .. } = item.paint else {
                continue;
            };
            let edge = &shell.edges[edge as usize];
            if edge
                .panels
                .iter()
                .any(|&p| shell.area_vector(p).dot(lens.forward) > -1e-6)
            {
                continue;
            }
            let [from, to] = edge.ends.map(|v| camera.project(shell.points[v as usize]).unwrap().pos);
            for &place in picture.points_of(item) {
                // Positions are f32, rounded by up to 6e-5 at 1400 pixels.
                assert!(
                    away(from, to, place) < 1e-3,
                    "{edge:?} at {place:?} from {azimuth} {elevation}"
                );
            }
            seen += 1;
        }
    }
    assert!(seen > 100, "{seen}");
}
