//! The executor: the only code that changes the state of the window.

mod animating;
mod backdrop;
mod file;
mod finish;
mod guide;
mod ladder;
mod panes;
mod path;
mod readings;
mod safe;
mod select;
mod shape;
mod solving;
mod splice;
mod steps;
mod strip;
mod view;
mod zones;

pub(crate) use animating::follow_animation;
pub(crate) use backdrop::follow_fit;
pub(crate) use file::{ENDING, sentence};
pub(crate) use finish::keep_picked;
pub(crate) use ladder::keep_climbed;
pub(crate) use panes::{fit_when_pending, refit};
pub(crate) use path::moved_path;
pub(crate) use select::picked;
pub(crate) use solving::follow_search;

use super::{command::Command, guide::GuideAct, state::State};

/// Carries a command out.
pub(super) fn run(state: &mut State, command: Command) {
    match command {
        Command::New(_)
        | Command::Open
        | Command::OpenPath(_)
        | Command::OpenSample
        | Command::Import
        | Command::Save
        | Command::SaveAs
        | Command::SaveTo(_)
        | Command::Export
        | Command::ExportTo(_)
        | Command::Quit
        | Command::Unsaved(_)
        | Command::Show(..) => file::run(state, command),
        Command::Guide(GuideAct::Begin) => file::run(state, command),
        Command::Guide(act) => guide::run(state, act),
        Command::Undo => match state.history.undo() {
            Some(label) => state.say(format!("Undone: {label}")),
            None => state.say("Nothing to undo"),
        },
        Command::Redo => match state.history.redo() {
            Some(label) => state.say(format!("Redone: {label}")),
            None => state.say("Nothing to redo"),
        },
        Command::AddCourse => steps::add_course(state),
        Command::RemoveCourse => steps::remove_course(state),
        Command::LayUntilStill => steps::lay_until_still(state),
        Command::AddStep(step) => steps::add(state, *step),
        Command::SetStep(at, step) => steps::set(state, at, *step),
        Command::MoveStep(from, to) => steps::shift(state, from, to),
        Command::DeleteStep(at) => steps::delete(state, at),
        Command::Ladder(act) => ladder::run(state, act),
        Command::LeaveOut(panel) => finish::leave_out(state, panel),
        Command::SetFinish(at, step) => finish::set(state, at, *step),
        Command::PutBack(at, panel) => finish::put_back(state, at, panel),
        Command::DeleteFinish(at) => finish::delete(state, at),
        Command::ToggleSplice(side, v) => splice::toggle(state, side, &v),
        Command::Strip(act) => strip::run(state, act),
        Command::SetHand(hand) => state.view.hand = hand,
        Command::SetKind(kind) => shape::set_kind(state, kind),
        Command::SetStart(start, field) => shape::set_start(state, *start, field),
        Command::Backdrop(act) => backdrop::run(state, act),
        Command::ImportPath(path) => shape::import_path(state, &path),
        Command::FreePoints => shape::free_points(state),
        Command::ShareGap => path::share_gap(state),
        Command::Path(edit) => path::edit(state, edit),
        Command::Zone(act) => zones::run(state, act),
        Command::SetPlacement(placement) => shape::set_placement(state, placement),
        Command::SetOutside(outside) => shape::set_outside(state, outside),
        Command::FlipOutside => shape::flip_outside(state),
        Command::SetUnits(units) => shape::set_units(state, units),
        Command::SwapUnits => shape::swap_units(state),
        Command::Safe(act) if act.replaces_design() => file::run(state, Command::Safe(act)),
        Command::Safe(act) => safe::run(state, act),
        Command::Readings(act) => readings::run(state, act),
        Command::Animate(act) => animating::run(state, act),
        Command::Solving(act) => solving::run(state, act),
        Command::TypePath => {
            if let Some(asked) = state.dialogs.waiting_for() {
                state.dialogs.open_own(asked);
            }
        }
        Command::Select(act) => select::run(state, act),
        other => view::run(state, other),
    }
}
