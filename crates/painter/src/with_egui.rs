//! Draws the neutral picture with egui's 2D painter.
//!
//! Fills and strokes become one mesh without feathering: on software OpenGL the number of triangles is what costs, and feathered
//! borders between panels would show as a net of pale lines. Smooth borders come from the window's multisampling.

use core::f32::consts::FRAC_1_SQRT_2;
use std::sync::Arc;

use egui::{Align2, Color32, FontId, Mesh, Painter, Pos2, Rect, Shape, Vec2, epaint::Vertex};

use crate::{Anchor, Colour, Paint, Picture, stroke::parts};

/// Paints a picture into a rectangle, its top left corner at the rectangle's; whatever lies outside is cut off.
///
/// The picture's pixels are egui's points.
pub fn paint(picture: &Picture, painter: &Painter, rect: Rect) {
    paint_with(picture, &Arc::new(mesh(picture, rect.min.to_vec2())), painter, rect);
}

/// The same with a mesh that was made before, by [`mesh_into`], and still stands at the same place.
pub fn paint_with(picture: &Picture, mesh: &Arc<Mesh>, painter: &Painter, rect: Rect) {
    let painter = painter.with_clip_rect(rect.intersect(painter.clip_rect()));
    painter.add(Shape::rect_filled(rect, 0.0, colour(picture.background)));
    if !mesh.is_empty() {
        painter.add(Shape::Mesh(Arc::clone(mesh)));
    }
    for text in &picture.texts {
        let at = Pos2::from(text.pos) + rect.min.to_vec2();
        let anchor = match text.anchor {
            Anchor::Centre => Align2::CENTER_CENTER,
            Anchor::Left => Align2::LEFT_CENTER,
        };
        let font = FontId::proportional(text.size);
        for x in [-1.0, 1.0] {
            for y in [-1.0, 1.0] {
                let by = Vec2::new(x, y) * FRAC_1_SQRT_2 * 1.5;
                painter.text(at + by, anchor, &text.text, font.clone(), colour(text.halo));
            }
        }
        painter.text(at, anchor, &text.text, font, colour(text.colour));
    }
}

/// The fills and strokes of a picture as triangles, moved by `by`.
#[must_use]
pub fn mesh(picture: &Picture, by: Vec2) -> Mesh {
    let mut mesh = Mesh::default();
    mesh_into(picture, by, &mut mesh);
    mesh
}

/// The same, into the arrays of a mesh that is no longer needed.
pub fn mesh_into(picture: &Picture, by: Vec2, mesh: &mut Mesh) {
    mesh.clear();
    mesh.vertices.reserve(picture.points.len() + picture.items.len());
    mesh.indices.reserve(2 * picture.points.len() + picture.items.len());
    for item in &picture.items {
        let points = picture.points_of(item);
        let colour = colour(item.colour);
        match item.paint {
            Paint::Fill { .. } => fan(mesh, points.iter().map(|&p| Pos2::from(p) + by), colour),
            Paint::Stroke {
                width, dashed, closed, ..
            } => {
                let half = width * 0.5;
                // Inner corners of a longer line would gape without a little overlap.
                let more = if points.len() > 2 && !dashed { half } else { 0.0 };
                parts(points, closed, dashed, picture.size, width, |a, b| {
                    let [a, b] = [a, b].map(|p| Pos2::from(p) + by);
                    let along = (b - a).normalized();
                    let (ahead, aside) = (along * more, along.rot90() * half);
                    let quad = [
                        a - ahead - aside,
                        b + ahead - aside,
                        b + ahead + aside,
                        a - ahead + aside,
                    ];
                    fan(mesh, quad.into_iter(), colour);
                });
            }
        }
    }
}

#[expect(clippy::cast_possible_truncation, reason = "a mesh has fewer than 2^32 vertices")]
fn fan(mesh: &mut Mesh, points: impl Iterator<Item = Pos2>, color: Color32) {
    let first = mesh.vertices.len() as u32;
    mesh.vertices.extend(points.map(|pos| Vertex {
        pos,
        uv: egui::epaint::WHITE_UV,
        color,
    }));
    let end = mesh.vertices.len() as u32;
    for k in first + 2..end {
        mesh.indices.extend_from_slice(&[first, k - 1, k]);
    }
}

fn colour(colour: Colour) -> Color32 {
    Color32::from_rgba_unmultiplied(colour.r, colour.g, colour.b, colour.a)
}
