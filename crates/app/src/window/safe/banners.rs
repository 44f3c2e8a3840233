//! Banners and questions about what could get lost.

use std::time::SystemTime;

use egui::{Color32, Frame, Key, ScrollArea, Ui};

use super::{Banner, Disk, InTheWay, Orphan, SafeAct, stamp::clock_time};
use crate::window::{command::Command, panels::Cx, prompts};

/// Draws the banners that there is a reason for.
pub(in super::super) fn banners_ui(cx: Cx<'_>, ui: &mut Ui) {
    orphans_ui(cx, ui);
    let safe = &cx.state.safe;
    let file = cx.state.file_name();
    if safe.told_of_other() {
        banner(ui, cx, cx.state.colours().look(), |ui| {
            ui.label(format!(
                "{file} is open in another window. Changes there and here overwrite each other: save here under another name."
            ));
            send(cx, ui, "Save as…", Command::SaveAs);
            close(cx, ui, Banner::OtherWindow, "Close the note on the other window");
        });
    }
    match safe.disk() {
        Disk::Same => {}
        Disk::Changed => banner(ui, cx, cx.state.colours().look(), |ui| {
            ui.label(format!(
                "{file} was changed by something else since it was read or saved here."
            ));
            act(cx, ui, "Reload", SafeAct::Reload);
            send(cx, ui, "Save as…", Command::SaveAs);
            act(cx, ui, "Overwrite", SafeAct::Overwrite);
            close(cx, ui, Banner::Disk, "Close the note on the changed file");
        }),
        Disk::Gone => banner(ui, cx, cx.state.colours().look(), |ui| {
            ui.label(format!("{file} is not at its place any more. Saving writes it again."));
            send(cx, ui, "Save", Command::Save);
            send(cx, ui, "Save as…", Command::SaveAs);
            close(cx, ui, Banner::Disk, "Close the note on the missing file");
        }),
    }
    if let Some(trouble) = safe.trouble() {
        banner(ui, cx, cx.state.colours().line(), |ui| {
            ui.label(format!(
                "Unsaved changes are not kept against a crash at present: {trouble}. Save often."
            ));
            close(cx, ui, Banner::Trouble, "Close the note on keeping changes");
        });
    }
}

fn banner(ui: &mut Ui, cx: Cx<'_>, line: Color32, contents: impl FnOnce(&mut Ui)) {
    Frame::new()
        .fill(cx.state.colours().field())
        .stroke((1.0, line))
        .corner_radius(4)
        .inner_margin(8)
        .show(ui, |ui| {
            ui.set_width(ui.available_width());
            ui.horizontal_wrapped(contents);
        });
}

fn send(cx: Cx<'_>, ui: &mut Ui, text: &str, command: Command) {
    let hint = command.words().hint;
    if ui.button(text).on_hover_text(hint).clicked() {
        cx.tx.send(command);
    }
}

fn act(cx: Cx<'_>, ui: &mut Ui, text: &str, act: SafeAct) {
    send(cx, ui, text, Command::Safe(act));
}

fn close(cx: Cx<'_>, ui: &mut Ui, banner: Banner, name: &str) {
    if ui.button("Close").accessible_name(name).clicked() {
        cx.tx.send(Command::Safe(SafeAct::Close(banner)));
    }
}

/// Designs that a crash left unsaved.
fn orphans_ui(cx: Cx<'_>, ui: &mut Ui) {
    let orphans = &cx.state.safe.orphans;
    if orphans.is_empty() {
        return;
    }
    banner(ui, cx, cx.state.colours().accent(), |ui| {
        ui.vertical(|ui| {
            ui.horizontal_wrapped(|ui| {
                ui.strong(match orphans.len() {
                    1 => "A design was not saved".to_owned(),
                    count => format!("{count} designs were not saved"),
                });
                act(cx, ui, "Decide later", SafeAct::Later);
            });
            ScrollArea::vertical()
                .max_height(150.0)
                .id_salt("unsaved designs")
                .show(ui, |ui| {
                    for (at, orphan) in orphans.iter().enumerate() {
                        ui.horizontal_wrapped(|ui| orphan_ui(cx, ui, at, orphan));
                    }
                });
        });
    });
}

fn orphan_ui(cx: Cx<'_>, ui: &mut Ui, at: usize, orphan: &Orphan) {
    let name = orphan.name();
    let time = clock_time(orphan.changed, SystemTime::now());
    match &orphan.found {
        Ok(snapshot) => {
            let place = match &snapshot.path {
                Some(path) => path.display().to_string(),
                None => "it has no file yet".to_owned(),
            };
            ui.label(format!("{name}, changed {time}"));
            ui.weak(place);
            let recover = ui.button("Recover").accessible_name(format!("Recover {name}"));
            if recover
                .on_hover_text("Opens it as it was last; its file stays as it is until you save.")
                .clicked()
            {
                cx.tx.send(Command::Safe(SafeAct::Recover(at)));
            }
        }
        Err(why) => {
            ui.label(format!("{name}, changed {time}, cannot be read: {why}."));
            ui.weak(orphan.file().display().to_string());
        }
    }
    let text = if orphan.sure { "Discard for good" } else { "Discard" };
    let button = ui.button(text).accessible_name(format!("{text}: {name}"));
    if button
        .on_hover_text("Removes what was kept of it. Asks once more.")
        .clicked()
    {
        cx.tx.send(Command::Safe(SafeAct::DiscardOrphan(at)));
    }
}

/// Asks before a file is overwritten that another window works on, or that something else has changed.
pub(in super::super) fn overwrite_ui(cx: Cx<'_>, ui: &Ui) {
    let Some(question) = &cx.state.safe.overwrite else {
        return;
    };
    let file = question.path.file_name().unwrap_or_default().to_string_lossy();
    let (heading, text) = match question.why {
        InTheWay::OtherWindow => (
            "Open in another window",
            format!("{file} is open in another window. What is saved there and here overwrites each other."),
        ),
        InTheWay::Changed => (
            "Changed by something else",
            format!("{file} was changed since it was read or saved here. Overwriting it loses that change."),
        ),
    };
    let modal = prompts::question(ui, "overwrite").show(ui.ctx(), |ui| {
        ui.set_width(440.0);
        ui.heading(heading);
        ui.label(text);
        ui.add_space(4.0);
        ui.horizontal(|ui| {
            choice(cx, ui, "Save as…", Key::S, SafeAct::SaveElsewhere, true);
            if question.why == InTheWay::Changed {
                choice(cx, ui, "Reload", Key::R, SafeAct::Reload, false);
            }
            choice(cx, ui, "Overwrite", Key::O, SafeAct::Overwrite, false);
            choice(cx, ui, "Stay", Key::Escape, SafeAct::Stay, false);
        });
    });
    if modal.should_close() {
        cx.tx.send(Command::Safe(SafeAct::Stay));
    }
}

fn choice(cx: Cx<'_>, ui: &mut Ui, text: &str, key: Key, act: SafeAct, first: bool) {
    if prompts::choice(ui, text, key, first) {
        cx.tx.send(Command::Safe(act));
    }
}
