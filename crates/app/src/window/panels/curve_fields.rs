//! The curves of translation surfaces.

use egui::Ui;
use zonewright_geometry::{
    Angle, Point,
    start::{Curve, CurveShape},
};
use zonewright_shop::text::Units;

use super::small;
use crate::window::fields::{angle, choice, count, length, number, vector};

const SHAPES: [&str; 6] = ["Line", "Arc", "Catenary", "Sine", "Helix", "Free points"];

/// The size of a curve of this kind, so that another kind can take it over.
fn span(shape: &CurveShape) -> (f64, f64) {
    match shape {
        CurveShape::Line { run_mm, rise_mm } => (*run_mm, *rise_mm),
        CurveShape::Arc { span_mm, rise_mm } | CurveShape::Catenary { span_mm, rise_mm } => (*span_mm, *rise_mm),
        CurveShape::Sine {
            length_mm,
            amplitude_mm,
            ..
        } => (*length_mm, *amplitude_mm),
        CurveShape::Helix { radius_mm, rise_mm, .. } => (2.0 * radius_mm, *rise_mm),
        CurveShape::Free(points) => match (points.first(), points.last()) {
            (Some(first), Some(last)) => ((*last - *first).truncate().length(), last.0.z - first.0.z),
            _ => (2000.0, 400.0),
        },
    }
}

fn of_kind(kind: usize, old: &Curve) -> CurveShape {
    let (span_mm, rise_mm) = span(&old.shape);
    match kind {
        0 => CurveShape::Line {
            run_mm: span_mm,
            rise_mm,
        },
        1 => CurveShape::Arc { span_mm, rise_mm },
        2 => CurveShape::Catenary { span_mm, rise_mm },
        3 => CurveShape::Sine {
            length_mm: span_mm,
            amplitude_mm: rise_mm,
            waves: 1.0,
        },
        4 => CurveShape::Helix {
            radius_mm: span_mm / 2.0,
            turn: Angle::from_degrees(180.0),
            rise_mm,
        },
        _ => {
            // The straight curve that is there becomes points; before its azimuth, which the curve keeps.
            let level = Curve {
                azimuth: Angle::default(),
                ..old.clone()
            };
            let mut at = Point::ORIGIN;
            let mut points = vec![at];
            for edge in level.edges().unwrap_or_default() {
                at += edge;
                points.push(at);
            }
            CurveShape::Free(points)
        }
    }
}

/// Draws the fields of a curve. Gives whether it was changed.
pub(super) fn curve_fields(ui: &mut Ui, name: &str, curve: &mut Curve, units: Units) -> bool {
    ui.push_id(name, |ui| {
        let kind = match curve.shape {
            CurveShape::Line { .. } => 0,
            CurveShape::Arc { .. } => 1,
            CurveShape::Catenary { .. } => 2,
            CurveShape::Sine { .. } => 3,
            CurveShape::Helix { .. } => 4,
            CurveShape::Free(_) => 5,
        };
        let mut changed = false;
        if let Some(chosen) = choice(ui, name, kind, &SHAPES) {
            curve.shape = of_kind(chosen, curve);
            changed = true;
        }
        let free = matches!(curve.shape, CurveShape::Free(_));
        changed |= match &mut curve.shape {
            CurveShape::Line { run_mm, rise_mm } => {
                length(ui, "Run", run_mm, units) | length(ui, "Rise", rise_mm, units)
            }
            CurveShape::Arc { span_mm, rise_mm } | CurveShape::Catenary { span_mm, rise_mm } => {
                length(ui, "Span", span_mm, units) | length(ui, "Rise", rise_mm, units)
            }
            CurveShape::Sine {
                length_mm,
                amplitude_mm,
                waves,
            } => {
                length(ui, "Length", length_mm, units)
                    | length(ui, "Amplitude", amplitude_mm, units)
                    | number(ui, "Waves", waves, 0.05)
            }
            CurveShape::Helix {
                radius_mm,
                turn,
                rise_mm,
            } => length(ui, "Radius", radius_mm, units) | angle(ui, "Turn", turn) | length(ui, "Rise", rise_mm, units),
            CurveShape::Free(points) => free_points(ui, points, units),
        };
        if !free {
            changed |= count(ui, "Parts", &mut curve.parts, 1..=10_000);
        }
        changed | angle(ui, "Azimuth", &mut curve.azimuth)
    })
    .inner
}

fn free_points(ui: &mut Ui, points: &mut Vec<Point>, units: Units) -> bool {
    let mut changed = false;
    let mut delete = None;
    let many = points.len() > 2;
    for (at, point) in points.iter_mut().enumerate() {
        ui.push_id(at, |ui| {
            ui.horizontal(|ui| {
                changed |= vector(ui, &format!("Curve point {}", at + 1), &mut point.0, units);
                if small(ui, many, "×", &format!("Delete curve point {}", at + 1)) {
                    delete = Some(at);
                }
            });
        });
    }
    if let Some(at) = delete {
        points.remove(at);
        changed = true;
    }
    if ui.button("Add a curve point").clicked() {
        let next = match points.as_slice() {
            [.., a, b] => *b + (*b - *a),
            _ => Point::new(500.0, 0.0, 0.0),
        };
        points.push(next);
        changed = true;
    }
    changed
}
