//! New, open, save, export, quit, and the question about unsaved changes.

use std::{
    path::{Path, PathBuf},
    sync::Arc,
};

use zonewright_geometry::Spurs;
use zonewright_shop::{FamilyTolerance, Parts};

use crate::{
    document::{self, Design},
    window::{
        command::{Command, Unsaved},
        dialogs::Asked,
        history::History,
        kinds,
        safe::{Overwrite, Stamp},
        session,
        state::State,
    },
};

/// The ending of design files, without the dot.
pub(crate) const ENDING: &str = "ron";

/// Carries out a command about files.
pub(super) fn run(state: &mut State, command: Command) {
    match command {
        Command::New(_)
        | Command::Open
        | Command::OpenPath(_)
        | Command::OpenSample
        | Command::Safe(_)
        | Command::Guide(_)
        | Command::Quit
            if state.history.unsaved() =>
        {
            state.waiting = Some(Box::new(command));
        }
        command => run_saved(state, command),
    }
}

/// The same, once nothing can get lost any more.
fn run_saved(state: &mut State, command: Command) {
    match command {
        Command::New(kind) => make_new(state, kind),
        Command::Open => state
            .dialogs
            .ask(Asked::Open, state.path.as_deref(), &state.file_name()),
        Command::OpenPath(path) => open(state, &path),
        Command::Import => state
            .dialogs
            .ask(Asked::Import, state.path.as_deref(), &state.file_name()),
        Command::OpenSample => match session::sample() {
            Ok(mut design) => {
                design.units = state.safe.session.units().unwrap_or(design.units);
                show(state, design, None);
            }
            Err(text) => state.complain(text),
        },
        Command::Save => match state.path.clone() {
            Some(path) => save(state, &path),
            None => state.dialogs.ask(Asked::Save, None, &state.file_name()),
        },
        Command::SaveAs => state
            .dialogs
            .ask(Asked::Save, state.path.as_deref(), &state.file_name()),
        Command::SaveTo(path) => save(state, &with_ending(path)),
        Command::Export => state
            .dialogs
            .ask(Asked::Export, state.path.as_deref(), &state.file_name()),
        Command::ExportTo(folder) => export(state, &folder),
        Command::Quit => state.closing = true,
        Command::Unsaved(answer) => answered(state, answer),
        Command::Show(design, path) => show(state, *design, path),
        Command::Safe(act) => super::safe::run(state, act),
        Command::Guide(act) => super::guide::run(state, act),
        _ => {}
    }
}

fn answered(state: &mut State, answer: Unsaved) {
    let Some(waiting) = state.waiting.take() else { return };
    match answer {
        Unsaved::Stay => state.say("Nothing was closed"),
        Unsaved::Discard => run_saved(state, *waiting),
        Unsaved::Save => {
            state.after_save = Some(waiting);
            run_saved(state, Command::Save);
        }
    }
}

fn make_new(state: &mut State, word: &str) {
    let kind = kinds::kind(word);
    match document::new_design(kind.usual(), kind.courses, Spurs::default()) {
        Ok(mut design) => {
            design.units = state.safe.session.units().unwrap_or_else(|| state.units());
            show(state, design, None);
            state.say(format!("A new {}", kind.name.to_lowercase()));
        }
        Err(finding) => state.complain(format!("The new design cannot be made: {}.", finding.code.text().what)),
    }
}

/// Shows a design in place of the one that is there; its history begins.
pub(super) fn show(state: &mut State, design: Design, path: Option<PathBuf>) {
    show_history(state, History::new(design, true), path);
}

/// The same, with a past.
pub(super) fn show_history(state: &mut State, history: History, path: Option<PathBuf>) {
    let revision = state.history.revision();
    state.history = history.after(revision);
    state.path = path;
    state.safe.settled();
    state.safe.knows(None);
    state.message = None;
    state.view.point = None;
    state.view.panel = None;
    state.view.selection = Default::default();
    state.view.finding = None;
    state.view.ladder = crate::window::ladder::LadderView::default();
    state.view.shown = None;
    state.remembered = None;
    state.panes.start_afresh();
    remember(state);
    state.say(format!("{} is open", state.file_name()));
}

fn open(state: &mut State, path: &Path) {
    // Before it is read: what changes it from now on is noticed.
    let stamp = Stamp::of_file(path).ok();
    match document::read_design(path) {
        Ok(design) => {
            show(state, design, Some(path.to_path_buf()));
            state.safe.knows(stamp);
        }
        Err(error) => state.complain(sentence(&format!("{error}. The design in the window was kept."))),
    }
}

/// Saves, unless something speaks against overwriting the file: that is asked about first.
fn save(state: &mut State, path: &Path) {
    match state.safe.in_the_way(path) {
        Some(why) => {
            let path = path.to_path_buf();
            state.safe.overwrite = Some(Overwrite { path, why });
        }
        None => write(state, path),
    }
}

/// Saves, whatever the file holds now.
pub(super) fn write(state: &mut State, path: &Path) {
    let design = Arc::clone(state.design());
    match document::write_design(path, &design) {
        Ok(()) => {
            state
                .safe
                .knows(Some(Stamp::written(path, document::to_text(&design).as_bytes())));
            state.safe.settled();
            state.history.mark_saved(design);
            state.path = Some(path.to_path_buf());
            remember(state);
            state.say(format!("Saved as {}", path.display()));
            if let Some(next) = state.after_save.take() {
                run_saved(state, *next);
            }
        }
        Err(error) => {
            state.after_save = None;
            state.complain(sentence(&format!("{error}.")));
        }
    }
}

fn remember(state: &mut State) {
    let Some(path) = state.path.clone() else { return };
    if let Err(error) = state.safe.remember(|session| session.opened(&path)) {
        let text = format!("{error}; the program will not find this design by itself next time");
        state.say(text);
    }
}

fn export(state: &mut State, folder: &Path) {
    let design = std::sync::Arc::clone(state.design());
    // Lists are always those of the whole shell, however far one has climbed on the ladder.
    let grown;
    let (shell, parts) = if state.view.ladder.climbed.is_some() {
        let (whole, _) = zonewright_geometry::grow(&design.shape);
        grown = (Parts::new(&whole, &FamilyTolerance::default()), whole);
        (&grown.1, &grown.0)
    } else {
        state.derived.climb(None);
        state.derived.catch_up(&design, state.history.revision());
        (&*state.derived.shell, &state.derived.parts)
    };
    if shell.panels.is_empty() {
        state.complain("There is nothing to export: the shell has no panels. Lay a course.");
        return;
    }
    let files = zonewright_shop::export(shell, parts, &[]);
    let files = match files {
        Ok(files) => files,
        Err(error) => return state.complain(error.to_string()),
    };
    let count = files.len();
    match write_all(folder, files) {
        Ok(()) => state.say(format!("{count} files were written into {}", folder.display())),
        Err(text) => state.complain(text),
    }
}

fn write_all(folder: &Path, files: Vec<(String, Vec<u8>)>) -> Result<(), String> {
    let unwritten = |path: &Path, cause: std::io::Error| {
        format!("Cannot write {}: {cause}. Choose another folder.", path.display())
    };
    std::fs::create_dir_all(folder).map_err(|cause| unwritten(folder, cause))?;
    for (name, bytes) in files {
        let path = folder.join(name);
        document::write_whole(&path, &bytes).map_err(|cause| unwritten(&path, cause))?;
    }
    Ok(())
}

/// System dialogs may give a name without an ending.
fn with_ending(path: PathBuf) -> PathBuf {
    if path.extension().is_some() {
        path
    } else {
        path.with_extension(ENDING)
    }
}

/// The same text with a capital letter at its beginning.
pub(crate) fn sentence(text: &str) -> String {
    let mut letters = text.chars();
    letters
        .next()
        .map_or_else(String::new, |first| first.to_uppercase().chain(letters).collect())
}
