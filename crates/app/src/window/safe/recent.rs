//! The files that were open recently: in the menu and in the search.

use std::path::{Path, PathBuf};

use egui::{Button, Ui};

use super::SafeAct;
use crate::window::{command::Command, panels::Cx};

/// How old the knowledge of what is there may be while the menu is open, in seconds.
const FRESH_SECONDS: f64 = 2.0;

/// Which of these files cannot be opened, each with the reason.
pub(super) fn missing(recent: &[PathBuf]) -> Vec<(PathBuf, String)> {
    let why = |path: &Path| match path.metadata() {
        Ok(data) if data.is_file() => None,
        Ok(_) => Some("it is not a file".to_owned()),
        Err(error) if error.kind() == std::io::ErrorKind::NotFound => Some("it is not there any more".to_owned()),
        Err(error) => Some(error.to_string()),
    };
    let all = recent.iter();
    all.filter_map(|path| Some((path.clone(), why(path)?))).collect()
}

fn name(path: &Path) -> String {
    path.file_name()
        .unwrap_or(path.as_os_str())
        .to_string_lossy()
        .into_owned()
}

/// The commands that open the recent files, with what the search calls them.
pub(in super::super) fn openings(cx: Cx<'_>) -> Vec<(String, Command)> {
    let recent = cx.state.safe.session.recent().into_iter();
    let open = cx.state.path.as_deref();
    recent
        .filter(|path| Some(path.as_path()) != open)
        .map(|path| (format!("Open recent: {}", name(&path)), Command::OpenPath(path)))
        .collect()
}

/// The menu of recent files.
pub(in super::super) fn recent_ui(cx: Cx<'_>, ui: &mut Ui) {
    let safe = &cx.state.safe;
    let recent = safe.session.recent();
    ui.menu_button("Recent", |ui| {
        look(cx, ui);
        for path in &recent {
            let why = safe.missing.iter().find(|(p, _)| p == path).map(|(_, why)| why);
            let folder = path.parent().unwrap_or(Path::new("")).display();
            let button = Button::new(name(path)).shortcut_text(match why {
                Some(why) => why.clone(),
                None => short(&folder.to_string()),
            });
            let button = ui.add_enabled(why.is_none(), button);
            let full = path.display();
            let button = button.on_hover_text(full.to_string());
            let button = match why {
                Some(why) => button.on_disabled_hover_text(format!("{full}: {why}")),
                None => button,
            };
            if button.clicked() {
                cx.tx.send(Command::OpenPath(path.clone()));
            }
        }
        if recent.is_empty() {
            ui.weak("No file was open yet.");
        } else {
            ui.separator();
            let act = SafeAct::ForgetRecent;
            let words = act.words();
            if ui.button(words.name).on_hover_text(words.hint).clicked() {
                cx.tx.send(Command::Safe(act));
            }
        }
    });
}

/// Has the files looked at when the menu opens, and now and then while it is open.
fn look(cx: Cx<'_>, ui: &Ui) {
    let (id, now) = (egui::Id::unique("recent looked at"), ui.input(|i| i.time));
    let last: Option<f64> = ui.data(|d| d.get_temp(id));
    if last.is_none_or(|last| now - last > FRESH_SECONDS) {
        ui.data_mut(|d| d.insert_temp(id, now));
        cx.tx.send(Command::Safe(SafeAct::LookAtRecent));
    }
}

/// The end of a long path.
fn short(path: &str) -> String {
    const MOST: usize = 40;
    let count = path.chars().count();
    if count <= MOST {
        return path.to_owned();
    }
    let end: String = path.chars().skip(count + 1 - MOST).collect();
    format!("…{end}")
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn what_is_not_there_is_said_with_the_reason() {
        let folder = tempfile::tempdir().unwrap();
        let file = folder.path().join("a.ron");
        std::fs::write(&file, "").unwrap();
        let gone = folder.path().join("gone.ron");
        let found = missing(&[file, gone.clone(), folder.path().to_path_buf()]);
        assert_eq!(found[0], (gone, "it is not there any more".to_owned()));
        assert_eq!(found[1].1, "it is not a file");
        assert_eq!(found.len(), 2);
    }

    #[test]
    fn the_end_of_a_long_path_is_kept() {
        let long = format!("/home/{}/designs", "a".repeat(60));
        assert_eq!(short(&long).chars().count(), 40);
        assert!(short(&long).ends_with("/designs"));
        assert_eq!(short("/home"), "/home");
    }
}
