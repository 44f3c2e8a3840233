//! The card above the picture: which step one is at, what it asks for, and how to leave; and the offer to begin.

use egui::{Align, Frame, Layout, Sense, Ui, vec2};

use super::{GuideAct, STEPS, steps};
use crate::window::{command::Command, panels::Cx};

/// Radius of the dots that count the steps, and the distance between two, in points.
const DOT: f32 = 3.5;
const PITCH: f32 = 12.0;

/// Draws the card while one is at a step, or the offer.
pub(in crate::window) fn card_ui(cx: Cx<'_>, ui: &mut Ui) {
    let guide = &cx.state.guide;
    if let Some(going) = &guide.going {
        let (_, text) = steps::asked(cx.state, going);
        let done = going.at == STEPS;
        frame(cx, ui, |ui| {
            ui.horizontal(|ui| {
                ui.strong(if done {
                    "First shell".to_owned()
                } else {
                    format!("First shell, step {} of {STEPS}", going.at + 1)
                });
                dots(cx, ui, going.at);
                ui.with_layout(Layout::right_to_left(Align::Center), |ui| {
                    let (text, hint) = if done {
                        ("Close", "Closes this card. Escape does the same.")
                    } else {
                        (
                            "Leave",
                            "Closes the steps; the design stays as it is. Escape does the same.",
                        )
                    };
                    let leave = ui.button(text).on_hover_text(hint);
                    if leave.accessible_name(format!("{text} the first shell")).clicked() {
                        cx.tx.send(Command::Guide(GuideAct::Leave));
                    }
                });
            });
            ui.label(text);
        });
    } else if guide.offered {
        frame(cx, ui, |ui| {
            ui.horizontal_wrapped(|ui| {
                ui.label("New here? Five short steps on the real controls:");
                offer_ui(cx, ui);
                if ui.button("Close").accessible_name("Close the offer").clicked() {
                    cx.tx.send(Command::Guide(GuideAct::Leave));
                }
            });
        });
    }
}

/// Draws the button that begins.
pub(in crate::window) fn offer_ui(cx: Cx<'_>, ui: &mut Ui) {
    let hint = GuideAct::Begin.words().hint;
    if ui.button("Make a first shell").on_hover_text(hint).clicked() {
        cx.tx.send(Command::Guide(GuideAct::Begin));
    }
}

fn frame(cx: Cx<'_>, ui: &mut Ui, contents: impl FnOnce(&mut Ui)) {
    Frame::new()
        .fill(cx.state.colours().field())
        .stroke((1.0, cx.state.colours().accent()))
        .corner_radius(4)
        .inner_margin(8)
        .show(ui, |ui| {
            ui.set_width(ui.available_width());
            contents(ui);
        });
}

/// A dot a step: full when it is done, a ring round the one that one is at.
fn dots(cx: Cx<'_>, ui: &mut Ui, at: usize) {
    let size = vec2(PITCH * STEPS as f32, ui.spacing().interact_size.y);
    let (rect, _) = ui.allocate_exact_size(size, Sense::hover());
    let colours = cx.state.colours();
    for step in 0..STEPS {
        let middle = rect.left_center() + vec2(PITCH * (step as f32 + 0.5), 0.0);
        let painter = ui.painter();
        match step.cmp(&at) {
            std::cmp::Ordering::Less => painter.circle_filled(middle, DOT, colours.accent()),
            std::cmp::Ordering::Equal => painter.circle_stroke(middle, DOT, (2.0, colours.accent())),
            std::cmp::Ordering::Greater => painter.circle_filled(middle, DOT * 0.6, colours.text_weak()),
        };
    }
}
