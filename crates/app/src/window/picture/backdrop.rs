//! The backdrop in a picture: quiet lines behind the shell, fainter ones through it; and the legend of distances.

use egui::{Align2, Rect, Ui};
use zonewright_geometry::Shell;
use zonewright_painter::{Camera, Colour, ColourBy, Look, Mark, MarkKind, Picture, Scene, Tints, Tone};

use crate::window::{panels::Cx, state::State};

/// How opaque the lines are behind the shell and through it, of 255.
const ALPHA: [u8; 2] = [150, 46];

/// Adds the backdrop to a picture.
pub(super) fn add(state: &State, camera: &Camera, look: &Look, picture: &mut Picture) {
    let wire = &state.derived.backdrop.wire;
    if wire.is_empty() {
        return;
    }
    let [r, g, b, _] = state.colours().text_weak().to_array();
    let nothing = Shell::default();
    let lines = |alpha: u8| {
        let mark = Mark {
            at: wire.clone(),
            kind: MarkKind::Line {
                width: 1.0,
                dashed: false,
            },
            tone: Tone::Own(Colour { r, g, b, a: alpha }),
        };
        Scene::quick(&nothing).picture(&nothing, camera, look, &Tints::default(), &[mark])
    };
    picture.under(&lines(ALPHA[0]));
    picture.over(&lines(ALPHA[1]));
}

/// A mark from the farthest place of the picked panel to the backdrop, while distances are shown.
pub(super) fn marks(state: &State, marks: &mut Vec<Mark>) {
    let Some((panel, _)) = &state.view.panel else { return };
    if state.view.colour != ColourBy::Distance {
        return;
    }
    let Some(left) = state.derived.backdrop.left.get(*panel as usize) else {
        return;
    };
    let line = MarkKind::Line {
        width: 2.0,
        dashed: false,
    };
    marks.push(Mark {
        at: vec![left.at, left.closest],
        kind: line,
        tone: Tone::Selection,
    });
    marks.push(Mark {
        at: vec![left.at],
        kind: MarkKind::Dot { radius: 4.0 },
        tone: Tone::Selection,
    });
}

/// Size of the legend's bar, in points.
const BAR: egui::Vec2 = egui::vec2(150.0, 10.0);

/// Draws what the colours of distances mean, in the lower left corner of a picture.
pub(super) fn legend_ui(cx: Cx<'_>, ui: &Ui, rect: Rect) {
    let Some((_, largest)) = cx.state.derived.backdrop.largest() else {
        return;
    };
    if cx.state.view.colour != ColourBy::Distance {
        return;
    }
    let (palette, units) = (super::palette(cx.state), cx.state.units());
    let without_sign = cx.state.view.without_sign;
    let most = units.length(largest.signed_mm.abs());
    let font = egui::TextStyle::Small.resolve(ui.style());
    let (text, painter) = (cx.state.colours().text(), ui.painter_at(rect));
    let bar = Rect::from_min_size(rect.left_bottom() + egui::vec2(14.0, -32.0), BAR);
    let plate = bar.expand2(egui::vec2(8.0, 0.0));
    let plate = Rect::from_min_max(plate.min - egui::vec2(0.0, 22.0), plate.max + egui::vec2(0.0, 20.0));
    painter.rect_filled(plate, 4.0, cx.state.colours().picture().gamma_multiply(0.85));
    let from = if without_sign { 0.0 } else { -1.0 };
    let mut strip = egui::Mesh::default();
    for k in 0..=16_u8 {
        let along = f32::from(k) / 16.0;
        let colour = palette.distance(from + (1.0 - from) * along);
        let colour = egui::Color32::from_rgb(colour.r, colour.g, colour.b);
        let x = bar.left() + bar.width() * along;
        strip.colored_vertex(egui::pos2(x, bar.top()), colour);
        strip.colored_vertex(egui::pos2(x, bar.bottom()), colour);
        if k > 0 {
            let at = u32::from(k) * 2;
            strip.add_triangle(at - 2, at - 1, at);
            strip.add_triangle(at - 1, at, at + 1);
        }
    }
    painter.add(strip);
    let caption = if without_sign {
        "Distance to the backdrop"
    } else {
        "Inside of the backdrop · outside"
    };
    let above = bar.center_top() - egui::vec2(0.0, 5.0);
    painter.text(above, Align2::CENTER_BOTTOM, caption, font.clone(), text);
    let (left, right) = (bar.left_bottom(), bar.right_bottom());
    let down = egui::vec2(0.0, 4.0);
    let first = if without_sign { "0".to_owned() } else { most.clone() };
    painter.text(left + down, Align2::LEFT_TOP, first, font.clone(), text);
    painter.text(right + down, Align2::RIGHT_TOP, most, font.clone(), text);
    if !without_sign {
        painter.text(bar.center_bottom() + down, Align2::CENTER_TOP, "0", font, text);
    }
}
