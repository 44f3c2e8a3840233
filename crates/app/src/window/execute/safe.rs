//! Recovering, reloading, overwriting, dropped files, going several steps back.

use std::sync::Arc;

use super::file;
use crate::{
    document,
    window::{
        backdrop::BackdropAct,
        command::Command,
        dialogs::Asked,
        history::History,
        safe::{Dropped, Orphan, SafeAct, Stamp, what},
        state::State,
    },
};

/// Carries out a command of this family.
pub(super) fn run(state: &mut State, act: SafeAct) {
    match act {
        SafeAct::Recover(at) => recover(state, at),
        SafeAct::RecoverNewest => recover_newest(state),
        SafeAct::DiscardOrphan(at) => match state.safe.discard(at) {
            Some(Ok(name)) => state.say(format!("{name} was discarded")),
            Some(Err(text)) => state.complain(text),
            None => state.say("Press once more to discard it for good"),
        },
        SafeAct::Later => {
            state.safe.orphans.clear();
            state.say("Kept: File, Unsaved designs after a crash, shows them again");
        }
        SafeAct::LookForOrphans => {
            state.safe.look_for_orphans();
            state.say(match state.safe.orphans.len() {
                0 => "There is no unsaved design of a window that is gone".to_owned(),
                1 => "There is 1 unsaved design".to_owned(),
                count => format!("There are {count} unsaved designs"),
            });
        }
        SafeAct::Reload => reload(state),
        SafeAct::Overwrite => overwrite(state),
        SafeAct::SaveElsewhere => {
            state.safe.overwrite = None;
            let name = state.file_name();
            state.dialogs.ask(Asked::Save, state.path.as_deref(), &name);
        }
        SafeAct::Stay => {
            state.safe.overwrite = None;
            state.after_save = None;
            state.say("Nothing was overwritten");
        }
        SafeAct::Close(banner) => state.safe.close_banner(banner),
        SafeAct::Back(steps) => several(state, steps, "Undone", History::undo),
        SafeAct::Forward(steps) => several(state, steps, "Redone", History::redo),
        SafeAct::ForgetRecent => {
            // What cannot be written now is forgotten in this window all the same.
            let _ = state.safe.remember(crate::window::session::Session::forget_recent);
            state.say("The recent files were forgotten");
        }
        SafeAct::LookAtRecent => state.safe.look_at_recent(),
        SafeAct::Drop(files) => drop_files(state, &files),
    }
}

fn recover(state: &mut State, at: usize) {
    let Some((snapshot, slots)) = state.safe.take(at) else {
        return;
    };
    let name = snapshot.name();
    let history = History::recovered(snapshot.design, snapshot.earlier);
    file::show_history(state, history, snapshot.path);
    state.safe.knows(snapshot.stamp);
    state.safe.look_at_file();
    state.safe.adopt(slots);
    state.say(format!("{name} was recovered; it is not saved yet"));
}

fn recover_newest(state: &mut State) {
    if state.safe.orphans.is_empty() {
        state.safe.look_for_orphans();
    }
    match state.safe.orphans.iter().position(Orphan::is_readable) {
        Some(at) => recover(state, at),
        None => state.say("There is no unsaved design of a window that is gone"),
    }
}

/// Reads the file again, as a change that undo takes back.
fn reload(state: &mut State) {
    state.safe.overwrite = None;
    state.after_save = None;
    let Some(path) = state.path.clone() else {
        return state.say("The design has no file yet");
    };
    let stamp = Stamp::of_file(&path).ok();
    match document::read_design(&path) {
        Ok(design) => {
            let design = Arc::new(design);
            state.history.change(Arc::clone(&design), "Reload the file", None);
            state.history.mark_saved(design);
            state.safe.knows(stamp);
            state.say(format!(
                "{} was read again; undo brings back what was here",
                state.file_name()
            ));
        }
        Err(error) => state.complain(super::sentence(&format!("{error}. The design in the window was kept."))),
    }
}

fn overwrite(state: &mut State) {
    let asked = state.safe.overwrite.take().map(|question| question.path);
    match asked.or_else(|| state.path.clone()) {
        Some(path) => file::write(state, &path),
        None => file::run(state, Command::Save),
    }
}

fn several(state: &mut State, steps: usize, done: &str, step: impl Fn(&mut History) -> Option<String>) {
    let mut count = 0;
    let mut last = None;
    while count < steps
        && let Some(label) = step(&mut state.history)
    {
        count += 1;
        last = Some(label);
    }
    match last {
        Some(label) if count == 1 => state.say(format!("{done}: {label}")),
        Some(label) => state.say(format!("{done}: {count} steps, up to {label}")),
        None => state.say("There is nothing there"),
    }
}

fn drop_files(state: &mut State, files: &[std::path::PathBuf]) {
    if state.waiting.is_some() || state.safe.overwrite.is_some() {
        return state.say("Answer the question first, then drop the file again");
    }
    match what(files) {
        Dropped::Design(path) => file::run(state, Command::OpenPath(path)),
        Dropped::Path(path) => super::shape::import_path(state, &path),
        Dropped::Backdrop(path) => super::run(state, Command::Backdrop(BackdropAct::LoadPath(path))),
        Dropped::Refused(text) => state.complain(text),
    }
}
