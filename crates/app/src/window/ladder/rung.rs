//! How a rung and a step of the ladder look.

use egui::{Align2, Color32, FontId, Painter, Rect, Stroke, StrokeKind, TextStyle, Ui, pos2, text::LayoutJob, vec2};
use zonewright_geometry::{Level, Side};
use zonewright_painter::ColourBy;
use zonewright_shop::text;

use super::{
    glyph,
    layout::{Layout, NUMBERS},
    model::{Row, RowKind, left_out, title},
};
use crate::window::{panels::Cx, picture, theme::Colours};

/// How a row is to look.
#[derive(Clone, Copy, PartialEq, Eq, Debug, Default)]
pub(super) struct Looks {
    /// Above the place that one has climbed to: not shown in the picture.
    pub beyond: bool,
    /// Under the pointer or with the keys.
    pub hot: bool,
    /// With the keys.
    pub focused: bool,
    /// The card of the step is open.
    pub picked: bool,
    /// The step is being dragged.
    pub dragged: bool,
}

/// How much is left of the colour of what is not shown.
const FAINT: f32 = 0.22;

/// Draws a course.
pub(super) fn course(cx: Cx<'_>, painter: &Painter, layout: &Layout, at: usize, row: &Row, looks: Looks) {
    let RowKind::Course { number, panels } = row.kind else {
        return;
    };
    let colours = cx.state.colours();
    let place = layout.row(at);
    if looks.hot {
        painter.rect_filled(place, 2.0, colours.accent_weak().gamma_multiply(0.55));
    }
    let rung = layout.rung(at, row);
    let colour = rung_colour(cx, number);
    let corner = (rung.height() * 0.3).min(3.0);
    if looks.beyond {
        painter.rect_stroke(
            rung,
            corner,
            Stroke::new(1.0, colour.gamma_multiply(FAINT * 2.0)),
            StrokeKind::Inside,
        );
    } else {
        painter.rect_filled(rung, corner, colour);
    }
    let font = FontId::proportional((place.height() - 2.0).clamp(9.5, 11.5));
    let ink = if looks.beyond {
        colours.text_weak().gamma_multiply(0.55)
    } else {
        colours.text_weak()
    };
    let y = place.center().y;
    let label = number.unsigned_abs().to_string();
    painter.text(
        pos2(place.left() + NUMBERS - 6.0, y),
        Align2::RIGHT_CENTER,
        label,
        font.clone(),
        ink,
    );
    let count = text::count(panels as usize);
    painter.text(pos2(place.right() - 4.0, y), Align2::RIGHT_CENTER, count, font, ink);
    if looks.focused {
        focus(painter, place, colours);
    }
}

fn focus(painter: &Painter, place: Rect, colours: &Colours) {
    painter.rect_stroke(place, 2.0, Stroke::new(1.5, colours.accent()), StrokeKind::Inside);
}

/// The colour of the picture when courses are what its colours say, else a quiet one.
fn rung_colour(cx: Cx<'_>, number: i32) -> Color32 {
    let colours = cx.state.colours();
    if cx.state.view.colour != ColourBy::Course {
        return colours.accent().lerp_to_gamma(colours.line(), 0.45);
    }
    // The same count as the picture's: fore and aft courses take turns.
    let place = 2 * number.unsigned_abs() as usize + usize::from(number < 0);
    let colour = picture::palette(cx.state).category(place.saturating_sub(2));
    Color32::from_rgb(colour.r, colour.g, colour.b)
}

/// Draws the start, a growing step or a finishing step: a plate across the ladder.
pub(super) fn plate(cx: Cx<'_>, ui: &Ui, layout: &Layout, at: usize, row: &Row, looks: Looks, level: Option<Level>) {
    let colours = cx.state.colours();
    let shape = cx.state.shape();
    let place = layout.row(at).shrink2(vec2(0.0, 2.0));
    let painter = ui.painter();
    let on = match row.kind {
        RowKind::Step(at) => shape.steps[at].on,
        RowKind::Finish(at) => shape.finish[at].on,
        RowKind::Start | RowKind::Course { .. } => true,
    };
    let fill = if looks.picked {
        colours.accent_weak()
    } else if looks.hot {
        colours.accent_weak().gamma_multiply(0.55)
    } else {
        colours.field()
    };
    let alpha = if looks.dragged || looks.beyond || !on {
        0.55
    } else {
        1.0
    };
    painter.rect_filled(place, 3.0, fill);
    let line = if looks.picked { colours.accent() } else { colours.line() };
    painter.rect_stroke(
        place,
        3.0,
        Stroke::new(1.0, line.gamma_multiply(alpha)),
        StrokeKind::Inside,
    );
    if looks.focused {
        focus(painter, place, colours);
    }
    let ink = colours.text().gamma_multiply(alpha);
    let weak = colours.text_weak().gamma_multiply(alpha);
    let sign = pos2(place.left() + 13.0, place.center().y);
    let (what, how) = match row.kind {
        RowKind::Step(at) => {
            let step = &shape.steps[at];
            glyph::glyph(painter, sign, &step.act, if on { ink } else { weak });
            let (what, mut how) = title(step);
            if step.side == Side::Aft {
                how = if how.is_empty() {
                    "aft".to_owned()
                } else {
                    format!("{how}, aft")
                };
            }
            match &step.name {
                Some(name) => (name.clone(), String::new()),
                None => (what.to_owned(), how),
            }
        }
        RowKind::Finish(at) => {
            painter.rect_stroke(
                Rect::from_center_size(sign, vec2(9.0, 9.0)),
                1.0,
                Stroke::new(1.5, ink),
                StrokeKind::Middle,
            );
            let step = &shape.finish[at];
            match &step.name {
                Some(name) => (name.clone(), String::new()),
                None => (left_out(step), String::new()),
            }
        }
        RowKind::Start | RowKind::Course { .. } => {
            painter.circle_filled(sign, 3.5, weak);
            ("Start".to_owned(), String::new())
        }
    };
    // Room for the mark of a finding and the switch.
    let mut room = place.width() - 28.0 - 4.0;
    if !matches!(row.kind, RowKind::Start) {
        room -= 20.0;
    }
    if let Some(level) = level {
        room -= 14.0;
        let at = pos2(place.right() - 31.0, place.center().y);
        painter.circle_filled(at, 4.5, level_colour(colours, level));
    }
    let mut job = LayoutJob::default();
    let format = |font: FontId, color: Color32| egui::TextFormat {
        font_id: font,
        color,
        valign: egui::Align::Center,
        strikethrough: Stroke::NONE,
        ..egui::TextFormat::default()
    };
    job.append(&what, 0.0, format(TextStyle::Body.resolve(ui.style()), ink));
    if !how.is_empty() {
        job.append(&how, 6.0, format(TextStyle::Small.resolve(ui.style()), weak));
    }
    job.wrap = egui::text::TextWrapping::truncate_at_width(room);
    let galley = ui.fonts_mut(|f| f.layout_job(job));
    let corner = pos2(place.left() + 27.0, place.center().y - galley.size().y * 0.5);
    painter.galley(corner, galley, ink);
}

/// The colour of a level of findings.
pub(super) const fn level_colour(colours: &Colours, level: Level) -> Color32 {
    match level {
        Level::Stop => colours.stop(),
        Level::Look => colours.look(),
        Level::Note => colours.note(),
    }
}
