//! The head of the ladder, and what says in the picture that a part of the shell is shown.

use egui::{Align, Frame, Layout, Margin, Rect, RichText, Ui, UiBuilder, pos2};

use super::{LadderAct, add_menu};
use crate::window::{
    command::Command,
    guide::{self, Target},
    panels::Cx,
};

/// Draws the buttons for courses and steps, and where one is.
pub(super) fn head_ui(cx: Cx<'_>, ui: &mut Ui) {
    let climbed = cx.state.view.ladder.climbed;
    ui.horizontal(|ui| {
        guide::framed(cx, ui, Target::Courses, |ui| {
            button(cx, ui, "Add a course", Command::AddCourse);
        });
        ui.with_layout(Layout::right_to_left(Align::Center), |ui| {
            button(cx, ui, "−", Command::RemoveCourse);
        });
    });
    ui.horizontal(|ui| {
        button(cx, ui, "Until still", Command::LayUntilStill);
        ui.with_layout(Layout::right_to_left(Align::Center), |ui| {
            let menu = ui.menu_button("Add a step", |ui| add_menu::entries(cx, ui, climbed));
            menu.response
                .on_hover_text("Adds a step at the top, or where you have climbed to.");
        });
    });
    let shown = cx.state.derived.ladder.shown(climbed, cx.state.shape());
    let colours = cx.state.colours();
    let (text, colour) = match climbed {
        Some(_) => (capital(&shown), colours.accent()),
        None => (shown, colours.text_weak()),
    };
    ui.add(egui::Label::new(RichText::new(text).color(colour)).truncate());
}

fn button(cx: Cx<'_>, ui: &mut Ui, text: &str, command: Command) {
    let words = command.words();
    let name = if text.len() > 3 { text } else { words.name };
    let button = ui.button(text).on_hover_text(words.hint);
    if button.accessible_name(name).clicked() {
        cx.tx.send(command);
    }
}

fn capital(text: &str) -> String {
    let mut letters = text.chars();
    let first = letters.next().map(|c| c.to_uppercase().to_string());
    first.unwrap_or_default() + letters.as_str()
}

/// Says at the foot of the picture that a part of the shell is shown, and leads back.
pub(in crate::window) fn banner_ui(cx: Cx<'_>, ui: &mut Ui, picture: Rect) {
    let Some(climbed) = cx.state.view.ladder.climbed else {
        return;
    };
    let colours = cx.state.colours();
    let shown = cx.state.derived.ladder.shown(Some(climbed), cx.state.shape());
    let room = Rect::from_min_max(pos2(picture.left() + 12.0, picture.bottom() - 52.0), picture.max);
    let mut ui = ui.new_child(
        UiBuilder::new()
            .id_salt("climbed")
            .max_rect(room)
            .layout(Layout::left_to_right(Align::Min)),
    );
    let frame = Frame::new()
        .fill(colours.accent_weak())
        .stroke((1.0, colours.accent()))
        .corner_radius(4)
        .inner_margin(Margin::symmetric(10, 6));
    frame.show(&mut ui, |ui| {
        ui.set_height(ui.spacing().interact_size.y);
        ui.with_layout(Layout::left_to_right(Align::Center), |ui| {
            ui.label(RichText::new(format!("Showing {shown}")).color(colours.text()));
            let back = ui.button("Back to the top");
            if back
                .on_hover_text("Shows the whole shell again. Escape does the same.")
                .clicked()
            {
                cx.tx.send(Command::Ladder(LadderAct::Climb(None)));
            }
        });
    });
}
