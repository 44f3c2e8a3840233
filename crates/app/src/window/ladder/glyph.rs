//! The signs of the steps, drawn: each shows what its step does to the front.

use egui::{Color32, Painter, Pos2, Stroke, vec2};
use zonewright_geometry::Act;

/// Draws the sign of a step about a point.
pub(super) fn glyph(painter: &Painter, at: Pos2, act: &Act, colour: Color32) {
    let pen = Stroke::new(1.5, colour);
    let line = |points: &[(f32, f32)]| {
        let points: Vec<Pos2> = points.iter().map(|(x, y)| at + vec2(*x, *y)).collect();
        painter.line(points, pen);
    };
    match act {
        // Courses, one on the other.
        Act::Lay { .. } => {
            for y in [-3.5, 0.0, 3.5] {
                line(&[(-5.0, y), (5.0, y)]);
            }
        }
        // A V with its panel.
        Act::Fill { .. } => line(&[(-5.0, -1.0), (0.0, 4.5), (5.0, -1.0), (0.0, -5.5), (-5.0, -1.0)]),
        // A spur in a V.
        Act::Splice { .. } => {
            line(&[(-5.5, -3.5), (0.0, 4.0), (5.5, -3.5)]);
            line(&[(0.0, 4.0), (0.0, -5.5)]);
        }
        // A spur that is taken in.
        Act::Retract => {
            line(&[(0.0, -5.0), (0.0, 4.5)]);
            line(&[(-3.5, 1.0), (0.0, 4.5), (3.5, 1.0)]);
        }
        // Two lines that pass through each other.
        Act::Cross { .. } => {
            line(&[(-4.5, -4.5), (4.5, 4.5)]);
            line(&[(-4.5, 4.5), (4.5, -4.5)]);
        }
        // A zigzag whose edges change.
        Act::SetRoles(_) => line(&[(-6.0, 3.0), (-3.0, -3.0), (0.0, 3.0), (3.0, -3.0), (6.0, 3.0)]),
        // A ring.
        Act::CloseRim => {
            painter.circle_stroke(at, 4.5, pen);
        }
        // Two rims side by side.
        Act::JoinRims { .. } => {
            for x in [-1.0, 1.0] {
                line(&[(x * 5.5, -4.5), (x * 1.8, 0.0), (x * 5.5, 4.5)]);
            }
        }
    }
}
