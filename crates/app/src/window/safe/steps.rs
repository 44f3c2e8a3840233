//! The undo list: going several steps back or forward by one click.

use egui::{Button, ScrollArea, Ui};

use super::SafeAct;
use crate::window::{command::Command, panels::Cx};

/// Steps that are listed either way; who wants to go further back, does so again from there.
const MOST: usize = 50;

/// The menu with the last steps, the newest first, and, above them, those that were taken back.
pub(in super::super) fn steps_ui(cx: Cx<'_>, ui: &mut Ui) {
    let history = &cx.state.history;
    let back: Vec<&str> = history.undo_labels().take(MOST).collect();
    let forward: Vec<&str> = history.redo_labels().take(MOST).collect();
    ui.add_enabled_ui(!(back.is_empty() && forward.is_empty()), |ui| {
        ui.menu_button("Undo list", |ui| {
            ScrollArea::vertical().max_height(420.0).show(ui, |ui| {
                for (at, label) in forward.iter().enumerate().rev() {
                    let hint = "Makes the changes again, up to this one.";
                    step(cx, ui, &format!("Redo: {label}"), at, hint, SafeAct::Forward(at + 1));
                }
                ui.weak("Now");
                for (at, label) in back.iter().enumerate() {
                    let hint = "Takes the changes back, this one included.";
                    step(cx, ui, &format!("Undo: {label}"), at, hint, SafeAct::Back(at + 1));
                }
            });
        });
    });
}

fn step(cx: Cx<'_>, ui: &mut Ui, text: &str, at: usize, hint: &str, act: SafeAct) {
    let button = ui.add(Button::new(text)).on_hover_text(hint);
    if button.accessible_name(format!("{text} ({})", at + 1)).clicked() {
        cx.tx.send(Command::Safe(act));
    }
}
