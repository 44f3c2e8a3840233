//! The menu bar.

use egui::{Button, MenuBar, Ui};
use zonewright_painter::{Faces, Projection, View};
use zonewright_shop::text::Units;

use super::{
    backdrop::BackdropAct,
    command::Command,
    guide::{self, GuideAct, Target},
    kinds,
    ladder::LadderAct,
    panels::Cx,
    panes::{Layout, PaneAct},
    safe::{self, SafeAct},
};

/// Draws the menu bar.
pub(super) fn menu_ui(cx: Cx<'_>, ui: &mut Ui) {
    MenuBar::new().ui(ui, |ui| {
        let file = ui.menu_button("File", |ui| {
            ui.menu_button("New", |ui| {
                for kind in &kinds::KINDS {
                    named(cx, ui, kind.name, Command::New(kind.word));
                }
            });
            items(cx, ui, [Command::Open]);
            safe::recent_ui(cx, ui);
            items(
                cx,
                ui,
                [
                    Command::OpenSample,
                    Command::Import,
                    Command::Backdrop(BackdropAct::Load),
                ],
            );
            ui.separator();
            items(cx, ui, [Command::Save, Command::SaveAs, Command::Export]);
            ui.separator();
            items(cx, ui, [SafeAct::Reload, SafeAct::LookForOrphans].map(Command::Safe));
            ui.separator();
            items(cx, ui, [Command::Quit]);
        });
        guide::outline(cx, ui, Target::File, file.response.rect);
        ui.menu_button("Edit", |ui| {
            let history = &cx.state.history;
            undo(cx, ui, "Undo", history.undo_label(), Command::Undo);
            undo(cx, ui, "Redo", history.redo_label(), Command::Redo);
            safe::steps_ui(cx, ui);
            ui.separator();
            items(cx, ui, [Command::FreePoints, Command::ShareGap, Command::FlipOutside]);
        });
        ui.menu_button("Growth", |ui| {
            items(
                cx,
                ui,
                [Command::AddCourse, Command::RemoveCourse, Command::LayUntilStill],
            );
            ui.separator();
            items(cx, ui, LadderAct::LISTED.map(Command::Ladder));
            ui.separator();
            items(cx, ui, [Command::SwapSide]);
        });
        ui.menu_button("View", |ui| {
            items(cx, ui, Layout::ALL.map(|layout| Command::Pane(PaneAct::LayOut(layout))));
            items(cx, ui, [Command::Pane(PaneAct::Next)]);
            ui.separator();
            items(
                cx,
                ui,
                [View::Plan, View::Front, View::Side, View::Iso].map(Command::Look),
            );
            items(cx, ui, [Command::Pane(PaneAct::Free), Command::Look(View::Fit)]);
            ui.separator();
            items(
                cx,
                ui,
                [Projection::Perspective, Projection::Parallel].map(Command::SetProjection),
            );
            items(
                cx,
                ui,
                [Faces::ShadedWithEdges, Faces::Shaded, Faces::Wireframe].map(Command::SetFaces),
            );
            items(cx, ui, [Command::HiddenEdges]);
            ui.separator();
            items(cx, ui, [Command::SwapLegend, Command::SwapTheme]);
        });
        ui.menu_button("Help", |ui| {
            items(cx, ui, [Command::Guide(GuideAct::Begin), Command::Find])
        });
        ui.with_layout(egui::Layout::right_to_left(egui::Align::Center), |ui| right_ui(cx, ui));
    });
}

fn right_ui(cx: Cx<'_>, ui: &mut Ui) {
    let units = cx.state.units();
    for (to, name, hint) in [
        (Units::Inch, "inch", "Lengths in inches, with fractions."),
        (Units::Mm, "mm", "Lengths in millimetres."),
    ] {
        let label = ui.selectable_label(units == to, name).on_hover_text(hint);
        if label.clicked() && units != to {
            cx.tx.send(Command::SetUnits(to));
        }
    }
    ui.separator();
    let dot = if cx.state.history.unsaved() { " •" } else { "" };
    ui.weak(format!("{}{dot}", cx.state.file_name()));
}

fn items<const N: usize>(cx: Cx<'_>, ui: &mut Ui, commands: [Command; N]) {
    for command in commands {
        named(cx, ui, command.words().name, command);
    }
}

fn named(cx: Cx<'_>, ui: &mut Ui, name: &str, command: Command) {
    if ui
        .add(button(ui, name, &command))
        .on_hover_text(command.words().hint)
        .clicked()
    {
        cx.tx.send(command);
    }
}

fn undo(cx: Cx<'_>, ui: &mut Ui, name: &str, label: Option<&str>, command: Command) {
    let text = label.map_or_else(|| name.to_owned(), |label| format!("{name}: {label}"));
    let button = button(ui, &text, &command);
    if ui
        .add_enabled(label.is_some(), button)
        .on_hover_text(command.words().hint)
        .clicked()
    {
        cx.tx.send(command);
    }
}

fn button<'a>(ui: &Ui, name: &'a str, command: &Command) -> Button<'a> {
    let button = Button::new(name);
    match command.shortcut() {
        Some(keys) if egui::containers::menu::is_in_menu(ui) => button.shortcut_text(ui.ctx().format_shortcut(&keys)),
        _ => button,
    }
}
