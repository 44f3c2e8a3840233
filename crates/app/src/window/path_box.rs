//! The program's own box for paths: a typed path, and the folder's entries to click.

use std::{fs, path::Path, path::PathBuf};

use egui::{Key, ScrollArea, TextEdit, Ui};

use super::{
    command::Command,
    dialogs::{Asked, OwnBox},
    execute::ENDING,
    panels::Cx,
    widgets::{PathText, Widgets},
};

/// Entries that are listed; a longer folder is better typed.
const MOST_ENTRIES: usize = 500;

/// Draws the box while it is open.
pub(super) fn path_box_ui(cx: Cx<'_>, ui: &Ui, widgets: &mut Widgets) {
    let Some(own) = &cx.state.dialogs.own else { return };
    let fresh = widgets.path.serial != own.serial;
    if fresh {
        begin(&mut widgets.path, own);
    }
    let modal = super::prompts::question(ui, "path box").show(ui.ctx(), |ui| {
        ui.set_width(480.0);
        ui.heading(own.asked.heading());
        let field = TextEdit::singleline(&mut widgets.path.text).desired_width(f32::INFINITY);
        let field = ui.add(field).accessible_name("File path");
        if fresh {
            field.request_focus();
        }
        if field.changed() || fresh {
            look_up(&mut widgets.path, own.asked);
        }
        entries_ui(ui, &mut widgets.path, own.asked);
        let entered = field.lost_focus() && ui.input(|i| i.key_pressed(Key::Enter));
        ui.horizontal(|ui| {
            let replaces = matches!(own.asked, Asked::Save | Asked::Animation) && widgets.path.exists;
            let text = if replaces {
                "Replace the file"
            } else {
                own.asked.action()
            };
            let ready = !widgets.path.text.trim().is_empty();
            let pressed = ui.add_enabled(ready, egui::Button::new(text)).clicked();
            // Enter never replaces a file: that takes a click.
            if ready && (pressed || (entered && !replaces)) {
                let path = PathBuf::from(widgets.path.text.trim());
                cx.tx.send(Command::Dismiss);
                cx.tx.send(own.asked.command(path));
            }
            if ui.button("Cancel").clicked() {
                cx.tx.send(Command::Dismiss);
            }
        });
    });
    if modal.should_close() {
        cx.tx.send(Command::Dismiss);
    }
}

fn begin(path: &mut PathText, own: &OwnBox) {
    path.serial = own.serial;
    let mut text = own.folder.join(&own.name).to_string_lossy().into_owned();
    if own.name.is_empty() && !text.ends_with(std::path::MAIN_SEPARATOR) {
        text.push(std::path::MAIN_SEPARATOR);
    }
    path.text = text;
    path.folder = PathBuf::new();
}

/// Reads the folder of the typed path, when it is another one than before.
fn look_up(path: &mut PathText, asked: Asked) {
    let typed = Path::new(path.text.trim());
    path.exists = typed.is_file() || typed.with_extension(ENDING).is_file() && typed.extension().is_none();
    let folder = if typed.is_dir() {
        typed
    } else {
        typed.parent().unwrap_or(Path::new(""))
    };
    if folder == path.folder {
        return;
    }
    path.folder = folder.to_path_buf();
    let mut entries: Vec<(String, bool)> = fs::read_dir(folder)
        .into_iter()
        .flatten()
        .flatten()
        .filter_map(|entry| {
            let is_folder = entry.path().is_dir();
            let name = entry.file_name().into_string().ok()?;
            let fits = is_folder || fits_ending(Path::new(&name), asked.endings());
            (fits && !name.starts_with('.')).then_some((name, is_folder))
        })
        .collect();
    entries.sort_by(|a, b| b.1.cmp(&a.1).then_with(|| a.0.cmp(&b.0)));
    entries.truncate(MOST_ENTRIES);
    path.entries = entries;
}

/// Whether a file has one of these endings, in letters of either case.
pub(super) fn fits_ending(file: &Path, endings: &[&str]) -> bool {
    let ending = file.extension().unwrap_or_default();
    endings.iter().any(|e| ending.eq_ignore_ascii_case(e))
}

fn entries_ui(ui: &mut Ui, path: &mut PathText, asked: Asked) {
    let mut chosen: Option<PathBuf> = None;
    ScrollArea::vertical()
        .max_height(220.0)
        .auto_shrink([false, false])
        .show(ui, |ui| {
            if let Some(up) = path.folder.parent()
                && ui.selectable_label(false, "Folder above").clicked()
            {
                chosen = Some(up.to_path_buf());
            }
            for (name, is_folder) in &path.entries {
                let shown = if *is_folder {
                    format!("{name}{}", std::path::MAIN_SEPARATOR)
                } else {
                    name.clone()
                };
                if ui.selectable_label(false, shown).clicked() {
                    chosen = Some(path.folder.join(name));
                }
            }
        });
    if let Some(chosen) = chosen {
        // A folder that was clicked keeps the name that was typed.
        let name = Path::new(&path.text)
            .file_name()
            .filter(|_| matches!(asked, Asked::Save | Asked::Animation) && chosen.is_dir());
        let full = name
            .filter(|n| Path::new(n).extension().is_some())
            .map_or_else(|| chosen.clone(), |n| chosen.join(n));
        path.text = full.to_string_lossy().into_owned();
        if full.is_dir() && !path.text.ends_with(std::path::MAIN_SEPARATOR) {
            path.text.push(std::path::MAIN_SEPARATOR);
        }
        look_up(path, asked);
    }
}
