//! The adapter for egui: one mesh, nothing feathered.

#![cfg(feature = "egui")]
#![expect(clippy::unwrap_used, reason = "a test may")]

mod common;

use egui::{Context, RawInput, Rect, Shape, epaint::Primitive, pos2, vec2};
use zonewright_painter::{
    Bounds, Camera, Look, Mark, MarkKind, Picture, Projection, Scene, Tints, Tone, View, with_egui,
};

fn picture() -> Picture {
    let shell = common::cube();
    let camera = Camera::view(
        View::Iso,
        Projection::Perspective,
        &Bounds::of(&shell).unwrap(),
        [400.0, 300.0],
    );
    let label = Mark {
        at: vec![shell.points[0]],
        kind: MarkKind::Label {
            text: "A1".to_owned(),
            size: 14.0,
        },
        tone: Tone::Mark,
    };
    Scene::exact(&shell).picture(&shell, &camera, &Look::default(), &Tints::default(), &[label])
}

/// Six quads and twelve lines of one quad each: four vertices and two triangles apiece, all opaque. Feathering would add
/// transparent vertices.
#[test]
fn a_cube_is_eighteen_quads() {
    let mesh = with_egui::mesh(&picture(), vec2(10.0, 20.0));
    assert!(mesh.is_valid());
    assert_eq!((mesh.vertices.len(), mesh.indices.len()), (18 * 4, 18 * 6));
    assert!(mesh.vertices.iter().all(|v| v.color.is_opaque()));
}

#[test]
fn painting_adds_ground_mesh_and_text() {
    let context = Context::default();
    let rect = Rect::from_min_size(pos2(10.0, 20.0), vec2(400.0, 300.0));
    let mut output = context.run_ui(RawInput::default(), |ui| {
        with_egui::paint(&picture(), ui.painter(), rect)
    });
    // No textures are uploaded here; egui wants that said.
    output.textures_delta.clear();
    let shapes: Vec<&Shape> = output
        .shapes
        .iter()
        .map(|s| &s.shape)
        .filter(|s| **s != Shape::Noop)
        .collect();
    let meshes = shapes.iter().filter(|s| matches!(s, Shape::Mesh(_))).count();
    let texts = shapes.iter().filter(|s| matches!(s, Shape::Text(_))).count();
    // The text once, and four times for its halo.
    assert_eq!((meshes, texts), (1, 5));
    let primitives = context.tessellate(output.shapes.clone(), 1.0);
    assert!(primitives.iter().all(|p| matches!(p.primitive, Primitive::Mesh(_))));
    assert!(
        output
            .shapes
            .iter()
            .filter(|s| matches!(s.shape, Shape::Mesh(_)))
            .all(|s| rect.contains_rect(s.clip_rect))
    );
}
