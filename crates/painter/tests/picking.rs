//! Picking on a cube, where it is plain what is seen; derived.

#![expect(clippy::unwrap_used, reason = "a test may")]

mod common;

use common::{cube, helicoid};
use zonewright_geometry::{Point, Shell};
use zonewright_painter::{Bounds, Camera, Pick, Projection, Scene, View, pick};

const SIZE: [f32; 2] = [400.0, 300.0];

fn at(camera: &Camera, point: Point, by: [f32; 2]) -> [f32; 2] {
    let pos = camera.project(point).unwrap().pos;
    [pos[0] + by[0], pos[1] + by[1]]
}

fn vertex(shell: &Shell, place: [f64; 3]) -> u32 {
    shell.points.iter().position(|p| p.to_array() == place).unwrap() as u32
}

fn each(test: impl Fn(&Shell, &Scene, &Camera)) {
    let shell = cube();
    for scene in [Scene::exact(&shell), Scene::quick(&shell)] {
        for projection in [Projection::Perspective, Projection::Parallel] {
            test(
                &shell,
                &scene,
                &Camera::view(View::Iso, projection, &Bounds::of(&shell).unwrap(), SIZE),
            );
        }
    }
}

#[test]
fn a_vertex_comes_before_edges_and_panels() {
    each(|shell, scene, camera| {
        let corner = Point::new(500.0, -500.0, 500.0);
        let picked = pick(scene, shell, camera, at(camera, corner, [3.0, 2.0]), 8.0);
        assert_eq!(picked, Some(Pick::Vertex(vertex(shell, corner.to_array()))));
    });
}

#[test]
fn an_edge_comes_before_panels() {
    each(|shell, scene, camera| {
        let pos = at(camera, Point::new(500.0, -500.0, 100.0), [4.0, 0.0]);
        let Some(Pick::Edge(edge)) = pick(scene, shell, camera, pos, 8.0) else {
            panic!("no edge");
        };
        let ends = shell.edges[edge as usize].ends.map(|v| shell.points[v as usize]);
        assert!(ends.iter().all(|p| p.0.x == 500.0 && p.0.y == -500.0));
        // Out of reach it is the panel.
        assert!(matches!(pick(scene, shell, camera, pos, 2.0), Some(Pick::Panel(_))));
    });
}

#[test]
fn the_nearest_panel_is_picked() {
    each(|shell, scene, camera| {
        let pos = at(camera, Point::new(40.0, 30.0, 500.0), [0.0; 2]);
        let Some(Pick::Panel(panel)) = pick(scene, shell, camera, pos, 5.0) else {
            panic!("no panel");
        };
        assert!(shell.corner_points(panel).iter().all(|p| p.0.z == 500.0));
    });
}

#[test]
fn what_is_hidden_is_not_picked() {
    each(|shell, scene, camera| {
        // The corner at the back of the cube, behind the middle of its hexagon: the pointer beside it, out of reach of the front.
        let back = Point::new(-500.0, 500.0, -500.0);
        let hidden = vertex(shell, back.to_array());
        let picked = pick(scene, shell, camera, at(camera, back, [0.0, -20.0]), 15.0);
        assert!(picked.is_some());
        assert_ne!(picked, Some(Pick::Vertex(hidden)));
        // The edges that run to it are hidden as well; only ends of seen ones are.
        if let Some(Pick::Edge(edge)) = picked {
            assert!(!shell.edges[edge as usize].ends.contains(&hidden));
        }
    });
}

#[test]
fn beside_the_shell_nothing_is_picked() {
    each(|shell, scene, camera| {
        assert_eq!(pick(scene, shell, camera, [2.0, 2.0], 8.0), None);
        assert_eq!(
            pick(
                &Scene::exact(&Shell::default()),
                &Shell::default(),
                camera,
                [2.0, 2.0],
                8.0
            ),
            None
        );
    });
}

/// The silhouette can be picked from just outside.
#[test]
fn reach_goes_past_the_silhouette() {
    each(|shell, scene, camera| {
        let corner = Point::new(500.0, 500.0, 500.0);
        let pos = at(camera, corner, [4.0, -4.0]);
        assert_eq!(
            pick(scene, shell, camera, pos, 8.0),
            Some(Pick::Vertex(vertex(shell, corner.to_array())))
        );
    });
}

/// What is picked as a panel is what was painted last, panels behind the eye included.
#[test]
fn picking_agrees_with_painting() {
    let shell = helicoid(30, 4);
    let scene = Scene::exact(&shell);
    let mut camera = Camera::view(
        View::Fit,
        Projection::Perspective,
        &Bounds::of(&shell).unwrap(),
        [60.0, 45.0],
    );
    camera.distance *= 0.15;
    let look = zonewright_painter::Look::default();
    let painted = common::ray_cast::rasterise(&scene.picture(&shell, &camera, &look, &Default::default(), &[]));
    let mut wrong = 0;
    for (k, &panel) in painted.iter().enumerate() {
        let pos = [(k % 60) as f32 + 0.5, (k / 60) as f32 + 0.5];
        let picked = pick(&scene, &shell, &camera, pos, 0.0);
        wrong += usize::from(
            picked.map_or(
                zonewright_geometry::NONE,
                |p| if let Pick::Panel(p) = p { p } else { 0 },
            ) != panel,
        );
    }
    assert!(painted.iter().any(|&p| p != zonewright_geometry::NONE));
    assert_eq!(wrong, 0);
}
