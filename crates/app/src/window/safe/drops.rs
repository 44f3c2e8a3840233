//! Files that are held over the window or dropped on it.

use std::path::{Path, PathBuf};

use egui::{Align2, FontId, LayerId, Order, Ui};

use crate::window::{dialogs::Asked, panels::Cx, path_box::fits_ending};

/// What dropped files are taken for.
#[derive(Clone, PartialEq, Eq, Debug)]
pub(in super::super) enum Dropped {
    /// A design to open.
    Design(PathBuf),
    /// A path to import.
    Path(PathBuf),
    /// A form to load as the backdrop.
    Backdrop(PathBuf),
    /// Nothing that can be used; the text says why and what to do.
    Refused(String),
}

const WANTED: &str = "one design (.ron), one path (.csv, .dxf, .svg) or one form (.obj, .stl)";

/// Decides what dropped files are taken for.
pub(in super::super) fn what(files: &[PathBuf]) -> Dropped {
    let refused = |why: String| Dropped::Refused(format!("{why} Drop {WANTED}. Nothing was changed."));
    let [file] = files else {
        let names: Vec<String> = files.iter().take(4).map(|f| name(f)).collect();
        let more = if files.len() > names.len() { ", …" } else { "" };
        return refused(format!(
            "{} files were dropped, and a window holds one design: {}{more}.",
            files.len(),
            names.join(", ")
        ));
    };
    if file.is_dir() {
        return refused(format!("{} is a folder.", name(file)));
    }
    if fits_ending(file, Asked::Open.endings()) {
        Dropped::Design(file.clone())
    } else if fits_ending(file, Asked::Import.endings()) {
        Dropped::Path(file.clone())
    } else if fits_ending(file, Asked::Backdrop.endings()) {
        Dropped::Backdrop(file.clone())
    } else {
        refused(format!(
            "{} is neither a design, nor a path that can be imported, nor a mesh.",
            name(file)
        ))
    }
}

fn name(file: &Path) -> String {
    let name = file.file_name().unwrap_or(file.as_os_str());
    name.to_string_lossy().into_owned()
}

/// Marks the window while files are held over it, and says what dropping them would do.
pub(in super::super) fn hover_ui(cx: Cx<'_>, ui: &Ui) {
    let hovered: Vec<PathBuf> = ui.input(|i| i.raw.hovered_files.iter().filter_map(|f| f.path.clone()).collect());
    if hovered.is_empty() {
        return;
    }
    let colours = cx.state.colours();
    let (text, colour) = match what(&hovered) {
        Dropped::Design(file) => (format!("Drop to open {}", name(&file)), colours.accent()),
        Dropped::Path(file) => (
            format!("Drop to make the path in {} the start", name(&file)),
            colours.accent(),
        ),
        Dropped::Backdrop(file) => (
            format!("Drop to load {} as the backdrop", name(&file)),
            colours.accent(),
        ),
        Dropped::Refused(why) => (why, colours.stop()),
    };
    let painter = ui
        .ctx()
        .layer_painter(LayerId::new(Order::Foreground, egui::Id::unique("drop")));
    let window = ui.ctx().content_rect();
    let text = painter.layout(text, FontId::proportional(18.0), colours.text(), window.width() * 0.7);
    let place = Align2::CENTER_CENTER.anchor_size(window.center(), text.size() + egui::vec2(48.0, 32.0));
    painter.rect_filled(window, 0, colours.picture().gamma_multiply(0.6));
    painter.rect_stroke(window.shrink(3.0), 6, (3.0, colour), egui::StrokeKind::Inside);
    painter.rect(place, 6, colours.field(), (1.5, colour), egui::StrokeKind::Inside);
    painter.galley(place.min + egui::vec2(24.0, 16.0), text, colours.text());
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn each_kind_of_drop_is_told_apart_and_refusals_say_why() {
        let folder = tempfile::tempdir().unwrap();
        let paths = |names: &[&str]| names.iter().map(|n| folder.path().join(n)).collect::<Vec<_>>();
        assert!(matches!(what(&paths(&["A.RON"])), Dropped::Design(_)));
        for name in ["a.csv", "a.Dxf", "a.svg"] {
            assert!(matches!(what(&paths(&[name])), Dropped::Path(_)), "{name}");
        }
        for name in ["a.obj", "a.STL"] {
            assert!(matches!(what(&paths(&[name])), Dropped::Backdrop(_)), "{name}");
        }
        for (files, part) in [
            (paths(&["a.pdf"]), "a.pdf is neither"),
            (paths(&["noending"]), "noending is neither"),
            (paths(&["a.ron", "b.csv"]), "2 files were dropped"),
            (vec![folder.path().to_path_buf()], "is a folder"),
        ] {
            let Dropped::Refused(text) = what(&files) else {
                panic!("{files:?}")
            };
            assert!(text.contains(part) && text.contains("Nothing was changed"), "{text}");
        }
    }
}
