//! Questions and messages: unsaved changes, what went wrong, waiting for the system.

use egui::{Button, Frame, Key, Modal, Modifiers, Ui};

use super::{
    command::{Command, Unsaved},
    panels::Cx,
};

/// A question in the middle of the window, with room round its words.
pub(super) fn question(ui: &Ui, id: &'static str) -> Modal {
    Modal::new(egui::Id::unique(id)).frame(Frame::popup(ui.style()).inner_margin(16))
}

/// A choice of a question: a button that a letter presses too. The first one has the keyboard when the question opens, so
/// that Enter presses it.
pub(super) fn choice(ui: &mut Ui, text: &str, key: Key, first: bool) -> bool {
    let button = ui.add(Button::new(text).shortcut_text(key.name()));
    let button = button.accessible_name(text);
    if first {
        // The question has just opened when it was not there in the pass before.
        let (id, pass) = (button.id.with("last pass"), ui.ctx().cumulative_pass_nr());
        let last: Option<u64> = ui.data(|d| d.get_temp(id));
        if last.is_none_or(|last| last + 1 < pass) {
            button.request_focus();
        }
        ui.data_mut(|d| d.insert_temp(id, pass));
    }
    button.clicked() || ui.input_mut(|i| i.consume_key(Modifiers::NONE, key))
}

/// Asks about unsaved changes, while something waits for the answer.
pub(super) fn unsaved_ui(cx: Cx<'_>, ui: &Ui) {
    if cx.state.waiting.is_none() {
        return;
    }
    let modal = question(ui, "unsaved").show(ui.ctx(), |ui| {
        ui.set_width(420.0);
        ui.heading("Unsaved changes");
        ui.label(format!("{} has changes that no file holds.", cx.state.file_name()));
        ui.add_space(4.0);
        ui.horizontal(|ui| {
            for (text, key, answer) in [
                ("Save and go on", Key::S, Unsaved::Save),
                ("Discard the changes", Key::D, Unsaved::Discard),
                ("Stay", Key::Escape, Unsaved::Stay),
            ] {
                if choice(ui, text, key, answer == Unsaved::Save) {
                    cx.tx.send(Command::Unsaved(answer));
                }
            }
        });
    });
    if modal.should_close() {
        cx.tx.send(Command::Unsaved(Unsaved::Stay));
    }
}

/// Banners above the picture: what went wrong, and that the system's dialog is open.
pub(super) fn banners_ui(cx: Cx<'_>, ui: &mut Ui) {
    let colours = cx.state.colours();
    if let Some(message) = &cx.state.message {
        let frame = Frame::new()
            .fill(colours.field())
            .stroke((1.5, colours.stop()))
            .corner_radius(4)
            .inner_margin(8);
        frame.show(ui, |ui| {
            ui.with_layout(egui::Layout::right_to_left(egui::Align::Center), |ui| {
                if ui.button("Close").accessible_name("Close the message").clicked() {
                    cx.tx.send(Command::Dismiss);
                }
                ui.with_layout(
                    egui::Layout::left_to_right(egui::Align::Center).with_main_wrap(true),
                    |ui| {
                        ui.label(&message.text);
                    },
                );
            });
        });
    }
    if let Some(asked) = cx.state.dialogs.waiting_for() {
        let frame = Frame::new()
            .fill(colours.field())
            .stroke((1.0, colours.accent()))
            .corner_radius(4)
            .inner_margin(8);
        frame.show(ui, |ui| {
            ui.horizontal_wrapped(|ui| {
                ui.label(format!(
                    "{}: waiting for the system's dialog, or type a path.",
                    asked.heading()
                ));
                if ui.button("Type a path").clicked() {
                    cx.tx.send(Command::TypePath);
                }
                if ui.button("Cancel").clicked() {
                    cx.tx.send(Command::Dismiss);
                }
            });
        });
    }
}

/// The bar at the bottom: what was done last, and how the pointer works.
pub(super) fn status_ui(cx: Cx<'_>, ui: &mut Ui) {
    ui.horizontal(|ui| {
        let panes = &cx.state.panes;
        let hints = if panes.pane(panes.active()).is_measured() {
            "Drag moves · shift-drag turns · wheel zooms · x, y, z lock an axis"
        } else {
            "Drag turns · shift-drag moves · wheel zooms · x, y, z lock an axis"
        };
        ui.with_layout(egui::Layout::right_to_left(egui::Align::Center), |ui| {
            ui.weak(hints);
            ui.with_layout(egui::Layout::left_to_right(egui::Align::Center), |ui| {
                ui.add(egui::Label::new(&cx.state.status).truncate());
            });
        });
    });
}
