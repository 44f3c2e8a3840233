//! Everything that the window can be told to do.
//!
//! Widgets never change anything: they send one of these. The executor (see [`super::execute`]) is the only receiver.

use std::path::PathBuf;

use egui::{Key, KeyboardShortcut, Modifiers};
use zonewright_geometry::{Finish, Outside, Placement, Side, Start, Step, VName, start::DragRule};
use zonewright_painter::{ColourBy, Faces, Projection, View};
use zonewright_shop::text::Units;

use super::{
    animating::AnimateAct, backdrop::BackdropAct, guide::GuideAct, ladder::LadderAct, panes::PaneAct,
    path_edit::PathEdit, readings::ReadingAct, safe::SafeAct, selection::SelectAct, solving::SolveAct, strip::StripAct,
    view::Hand, zones::ZoneAct,
};
use crate::document::Design;

/// A command.
#[derive(Clone, Debug)]
pub enum Command {
    /// A new design of a kind of start.
    New(&'static str),
    /// Opens a design: asks which.
    Open,
    /// Opens the design in this file.
    OpenPath(PathBuf),
    /// Opens the design that comes with the program.
    OpenSample,
    /// Imports a path as the start: asks which.
    Import,
    /// Imports the path in this file as the start.
    ImportPath(PathBuf),
    /// Something about the backdrop.
    Backdrop(BackdropAct),
    /// Saves under the name that the design has; asks when it has none.
    Save,
    /// Saves under another name: asks which.
    SaveAs,
    /// Saves under this name.
    SaveTo(PathBuf),
    /// Writes lists, models and drawings: asks for a folder.
    Export,
    /// Writes lists, models and drawings into this folder.
    ExportTo(PathBuf),
    /// Closes the window.
    Quit,
    /// Takes the last change back.
    Undo,
    /// Makes the change again that was taken back last.
    Redo,
    /// Lays one more course on the live front.
    AddCourse,
    /// Takes the last course of the live front away.
    RemoveCourse,
    /// Lays until no V is left to fill.
    LayUntilStill,
    /// Adds a step: at the end, or where one has climbed to.
    AddStep(Box<Step>),
    /// Replaces the step at this place.
    SetStep(usize, Box<Step>),
    /// Moves the step at the first place to the second.
    MoveStep(usize, usize),
    /// Deletes the step at this place.
    DeleteStep(usize),
    /// Climbs the ladder, adds a step there, mends one.
    Ladder(LadderAct),
    /// Leaves this panel of the shell out, in a finishing step.
    LeaveOut(u32),
    /// Replaces the finishing step at this place.
    SetFinish(usize, Box<Finish>),
    /// Puts a panel back: the finishing step, and the panel's place in its list.
    PutBack(usize, usize),
    /// Deletes the finishing step at this place.
    DeleteFinish(usize),
    /// Splices the directions in hand at an open V, or takes that splice away again.
    ToggleSplice(Side, VName),
    /// What the front strip sends.
    Strip(StripAct),
    /// Takes other directions in hand.
    SetHand(Hand),
    /// Changes the kind of start, with that kind's usual parameters.
    SetKind(&'static str),
    /// Replaces the start; the text names the parameter that was changed.
    SetStart(Box<Start>, &'static str),
    /// Turns the start into free points.
    FreePoints,
    /// Shares the closing gap of a free path out over its edges.
    ShareGap,
    /// Edits the free path; a start of another kind is turned into free points first.
    Path(PathEdit),
    /// Moves, turns, scales or mirrors the whole shell.
    SetPlacement(Placement),
    /// Sets which side is outside.
    SetOutside(Outside),
    /// Turns the shell inside out.
    FlipOutside,
    /// Turns the camera about what it looks at, by a movement on the screen.
    Orbit(egui::Vec2),
    /// Moves the camera along the screen.
    Pan(egui::Vec2),
    /// Zooms by a factor, keeping the place under a point of the picture.
    Zoom(egui::Pos2, f32),
    /// Picks things, measures between them.
    Select(SelectAct),
    /// Does something to the views.
    Pane(PaneAct),
    /// Changes, links or picks zones.
    Zone(ZoneAct),
    /// Looks from this side.
    Look(View),
    /// Perspective or parallel.
    SetProjection(Projection),
    /// How faces are drawn.
    SetFaces(Faces),
    /// Whether hidden edges are drawn.
    HiddenEdges,
    /// What the colours say.
    SetColour(ColourBy),
    /// What follows a dragged point.
    SetDragRule(DragRule),
    /// The unit of lengths.
    SetUnits(Units),
    /// Millimetres to inches and back.
    SwapUnits,
    /// The live front.
    SetSide(Side),
    /// The other front.
    SwapSide,
    /// Shows where a finding is; none hides it.
    ShowFinding(Option<usize>),
    /// Picks a point of the path; none picks nothing.
    SelectPoint(Option<usize>),
    /// Picks a panel of the shell; none picks nothing.
    SelectPanel(Option<u32>),
    /// What the readouts are told.
    Readings(ReadingAct),
    /// Recovers, reloads, overwrites, goes several steps back.
    Safe(SafeAct),
    /// Solves for wanted figures.
    Solving(SolveAct),
    /// Plays or writes an animation.
    Animate(AnimateAct),
    /// Light or dark.
    SwapTheme,
    /// Shows or hides what the colours mean.
    SwapLegend,
    /// Begins or leaves the first shell.
    Guide(GuideAct),
    /// Finds a command by its name.
    Find,
    /// Types a path instead of waiting for the system's dialog.
    TypePath,
    /// Closes the message, the search or the question that is open.
    Dismiss,
    /// Answers the question about unsaved changes.
    Unsaved(Unsaved),
    /// Puts a whole design in place of the one shown; used when a file has been read.
    Show(Box<Design>, Option<PathBuf>),
}

/// An answer to the question about unsaved changes.
#[derive(Clone, Copy, PartialEq, Eq, Debug)]
pub enum Unsaved {
    /// Save, then go on.
    Save,
    /// Go on without saving.
    Discard,
    /// Stay.
    Stay,
}

/// A command's words.
#[derive(Clone, Copy, PartialEq, Eq, Debug)]
pub struct Words {
    /// Its name, as the menu shows it.
    pub name: &'static str,
    /// One sentence that says what it does.
    pub hint: &'static str,
}

impl Command {
    /// The commands that need nothing but their name, in the order of the search.
    #[must_use]
    pub fn listed() -> Vec<Self> {
        let mut all: Vec<Self> = super::kinds::KINDS.iter().map(|k| Self::New(k.word)).collect();
        all.extend([
            Self::Open,
            Self::OpenSample,
            Self::Import,
            Self::Save,
            Self::SaveAs,
            Self::Export,
            Self::Quit,
            Self::Undo,
            Self::Redo,
            Self::AddCourse,
            Self::RemoveCourse,
            Self::LayUntilStill,
        ]);
        all.extend(LadderAct::LISTED.map(Self::Ladder));
        all.extend([
            Self::FreePoints,
            Self::ShareGap,
            Self::FlipOutside,
            Self::Look(View::Plan),
            Self::Look(View::Front),
            Self::Look(View::Side),
            Self::Look(View::Iso),
            Self::Look(View::Fit),
            Self::SetProjection(Projection::Perspective),
            Self::SetProjection(Projection::Parallel),
            Self::SetFaces(Faces::ShadedWithEdges),
            Self::SetFaces(Faces::Shaded),
            Self::SetFaces(Faces::Wireframe),
            Self::HiddenEdges,
            Self::SwapUnits,
            Self::SwapSide,
            Self::Solving(SolveAct::Run),
            Self::Readings(ReadingAct::Remember),
            Self::Readings(ReadingAct::GoBack),
            Self::Readings(ReadingAct::Forget),
            Self::SwapLegend,
            Self::SwapTheme,
            Self::Guide(GuideAct::Begin),
            Self::Find,
        ]);
        all.extend(AnimateAct::listed().map(Self::Animate));
        all.extend(PaneAct::listed().map(Self::Pane));
        all.extend(super::safe::listed());
        all.extend(SelectAct::listed().map(Self::Select));
        all.extend(BackdropAct::listed().map(Self::Backdrop));
        all.extend(ZoneAct::listed().map(Self::Zone));
        all.extend(StripAct::listed().map(Self::Strip));
        all
    }

    /// Its name and hint.
    #[must_use]
    pub fn words(&self) -> Words {
        let (name, hint) = match self {
            Self::New(kind) => return super::kinds::new_words(kind),
            Self::Open | Self::OpenPath(_) => ("Open…", "Opens a design from a file."),
            Self::OpenSample => ("Open the sample", "Opens the design that comes with the program."),
            Self::Import | Self::ImportPath(_) => (
                "Import a path…",
                "Makes the path in a CSV, DXF or SVG file the start of the design.",
            ),
            Self::Backdrop(act) => return act.words(),
            Self::Save | Self::SaveTo(_) => ("Save", "Saves the design under its name."),
            Self::SaveAs => ("Save as…", "Saves the design under another name."),
            Self::Export | Self::ExportTo(_) => ("Export…", "Writes lists, models and drawings into a folder."),
            Self::Quit => ("Quit", "Closes the window."),
            Self::Undo => ("Undo", "Takes the last change back."),
            Self::Redo => ("Redo", "Makes the change again that was taken back last."),
            Self::AddCourse => ("Add a course", "Fills every open V of the live front once."),
            Self::RemoveCourse => ("Remove a course", "Takes the last course of the live front away."),
            Self::LayUntilStill => ("Lay until still", "Lays courses until no V is left to fill."),
            Self::Ladder(act) => return act.words(),
            Self::AddStep(_) => ("Add a step", "Adds a step at the end, or where you have climbed to."),
            Self::SetStep(..) => ("Change a step", "Changes what a step does."),
            Self::MoveStep(..) => ("Move a step", "Moves a step up or down in the record."),
            Self::DeleteStep(_) => ("Delete a step", "Takes a step out of the record."),
            Self::LeaveOut(_) => ("Leave this panel out", "Takes the panel out of the finished shell."),
            Self::SetFinish(..) => ("Change a finishing step", "Changes a finishing step."),
            Self::PutBack(..) => ("Put a panel back", "Brings a panel that was left out back."),
            Self::DeleteFinish(_) => ("Delete a finishing step", "Brings all panels of a finishing step back."),
            Self::ToggleSplice(..) => (
                "Splice here",
                "Splices the directions in hand at an open V, or takes them out.",
            ),
            Self::Strip(act) => return act.words(),
            Self::SetHand(_) => ("Directions in hand", "Chooses what the next splice inserts."),
            Self::SetKind(_) => ("Kind of start", "Changes where the first word comes from."),
            Self::SetStart(..) => ("Change the start", "Changes a parameter of the start."),
            Self::FreePoints => (
                "Turn into free points",
                "Keeps the path as it is and lets every point be moved.",
            ),
            Self::ShareGap => (
                "Share out the closing gap",
                "Spreads the closing gap over the edges of the path.",
            ),
            Self::Path(edit) => (edit.label(), "Edits the points of the path."),
            Self::SetPlacement(_) => ("Place the shell", "Moves, turns, scales or mirrors the shell."),
            Self::SetOutside(_) | Self::FlipOutside => ("Flip the outside", "Turns the shell inside out in the lists."),
            Self::Orbit(_) => ("Turn the picture", "Turns the camera about the shell."),
            Self::Pan(_) => ("Move the picture", "Moves the camera along the screen."),
            Self::Zoom(..) => ("Zoom", "Brings the shell nearer or farther."),
            Self::Pane(act) => return act.words(),
            Self::Select(act) => return act.words(),
            Self::Zone(act) => return act.words(),
            Self::Look(view) => return super::view::look_words(*view),
            Self::SetProjection(Projection::Perspective) => ("Perspective", "Draws far things smaller."),
            Self::SetProjection(Projection::Parallel) => ("Parallel", "Draws equal lengths equal."),
            Self::SetFaces(Faces::Shaded) => ("Faces only", "Draws shaded faces without edges."),
            Self::SetFaces(Faces::Wireframe) => ("Edges only", "Draws edges without faces."),
            Self::SetFaces(Faces::ShadedWithEdges) => ("Faces and edges", "Draws shaded faces with their edges."),
            Self::HiddenEdges => ("Hidden edges", "Shows or leaves out the edges behind faces."),
            Self::SetColour(_) => ("Colour by", "Chooses what the colours of the panels say."),
            Self::SetDragRule(_) => (
                "What follows a drag",
                "Chooses whether the rest of the path comes along.",
            ),
            Self::SetUnits(_) | Self::SwapUnits => ("Millimetres or inches", "Changes the unit of all lengths."),
            Self::SetSide(_) | Self::SwapSide => ("The other front", "Works on the other of the two fronts."),
            Self::ShowFinding(_) => ("Show a finding", "Marks where a finding is."),
            Self::SelectPoint(_) => ("Pick a point", "Picks a point of the path."),
            Self::SelectPanel(_) => ("Pick a panel", "Picks a panel and shows its measures."),
            Self::Readings(act) => return act.words(),
            Self::Animate(act) => return act.words(),
            Self::Safe(act) => return act.words(),
            Self::Solving(act) => return act.words(),
            Self::SwapTheme => ("Light or dark", "Changes between the light and the dark look."),
            Self::SwapLegend => ("Legend", "Shows or hides what the colours mean."),
            Self::Guide(act) => return act.words(),
            Self::Find => ("Find a command…", "Lists all commands and finds them by name."),
            Self::TypePath => ("Type a path", "Opens the program's own box for paths."),
            Self::Dismiss => ("Close", "Closes the message that is open."),
            Self::Unsaved(_) => ("Unsaved changes", "Answers the question about unsaved changes."),
            Self::Show(..) => ("Show a design", "Shows a design in place of this one."),
        };
        Words { name, hint }
    }

    /// The keys that send it.
    #[must_use]
    pub fn shortcut(&self) -> Option<KeyboardShortcut> {
        const SHIFTED: Modifiers = Modifiers::COMMAND.plus(Modifiers::SHIFT);
        let (modifiers, key) = match self {
            Self::New("zigzag") => (Modifiers::COMMAND, Key::N),
            Self::Open => (Modifiers::COMMAND, Key::O),
            Self::Save => (Modifiers::COMMAND, Key::S),
            Self::SaveAs => (SHIFTED, Key::S),
            Self::Export => (Modifiers::COMMAND, Key::E),
            Self::Quit => (Modifiers::COMMAND, Key::Q),
            Self::Undo => (Modifiers::COMMAND, Key::Z),
            Self::Redo => (SHIFTED, Key::Z),
            Self::AddCourse => (Modifiers::COMMAND, Key::ArrowUp),
            Self::RemoveCourse => (Modifiers::COMMAND, Key::ArrowDown),
            Self::LayUntilStill => (SHIFTED, Key::ArrowUp),
            Self::FlipOutside => (SHIFTED, Key::O),
            Self::Look(View::Plan) => (Modifiers::COMMAND, Key::Num1),
            Self::Look(View::Front) => (Modifiers::COMMAND, Key::Num2),
            Self::Look(View::Side) => (Modifiers::COMMAND, Key::Num3),
            Self::Look(View::Iso) => (Modifiers::COMMAND, Key::Num4),
            Self::Look(View::Fit) => (Modifiers::COMMAND, Key::Num0),
            Self::HiddenEdges => (Modifiers::COMMAND, Key::H),
            Self::SwapUnits => (Modifiers::COMMAND, Key::U),
            Self::SwapSide => (Modifiers::COMMAND, Key::B),
            Self::Strip(StripAct::SwapRepeat) => (Modifiers::COMMAND, Key::R),
            Self::SwapTheme => (Modifiers::COMMAND, Key::L),
            Self::Find => (Modifiers::COMMAND, Key::K),
            Self::Ladder(act) => act.keys()?,
            Self::Pane(act) => act.shortcut()?,
            Self::Select(act) => act.shortcut()?,
            Self::Zone(act) => act.shortcut()?,
            _ => return None,
        };
        Some(KeyboardShortcut::new(modifiers, key))
    }
}

/// Commands on their way from widgets to the executor.
#[derive(Debug, Default)]
pub(super) struct Sender {
    queue: std::cell::RefCell<Vec<Command>>,
}

impl Sender {
    /// Sends a command; it is carried out before the next frame is drawn.
    pub(super) fn send(&self, command: Command) {
        self.queue.borrow_mut().push(command);
    }

    /// Takes all that has been sent, in order.
    pub(super) fn take(&self) -> Vec<Command> {
        std::mem::take(&mut *self.queue.borrow_mut())
    }

    /// Whether nothing waits.
    #[must_use]
    pub(super) fn is_empty(&self) -> bool {
        self.queue.borrow().is_empty()
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn no_two_commands_have_the_same_keys() {
        let mut seen: Vec<(KeyboardShortcut, &str)> = Vec::new();
        for command in Command::listed() {
            let Some(keys) = command.shortcut() else { continue };
            if let Some((_, other)) = seen.iter().find(|(k, _)| *k == keys) {
                panic!("{} and {other} share {keys:?}", command.words().name);
            }
            seen.push((keys, command.words().name));
        }
        assert!(seen.len() > 15, "shortcuts got lost: {}", seen.len());
    }

    #[test]
    fn every_command_has_a_name_and_a_sentence() {
        for command in Command::listed() {
            let words = command.words();
            assert!(!words.name.is_empty(), "{command:?}");
            assert!(words.hint.ends_with('.'), "{command:?}: {}", words.hint);
        }
    }
}
