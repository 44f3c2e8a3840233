//! The five steps, and when each is done.

use zonewright_geometry::{Act, Start};

use crate::window::state::State;

/// How many steps there are.
pub const STEPS: usize = 5;

/// Courses that are asked for: two are there to be laid on the least polar form, which has three ribs.
const COURSES: usize = 2;

/// A control that a step is about.
#[derive(Clone, Copy, PartialEq, Eq, Debug)]
pub enum Target {
    /// The chooser of the kind of start.
    Kind,
    /// The parameters of the start.
    Parameters,
    /// The button that adds a course.
    Courses,
    /// The lane of the front strip.
    Strip,
    /// The findings.
    Findings,
    /// The menu in which one saves.
    File,
}

impl Target {
    /// The section in which it stands, when it can be folded away.
    #[must_use]
    pub const fn section(self) -> Option<&'static str> {
        match self {
            Self::Kind | Self::Parameters => Some("Start"),
            Self::Findings => Some("Findings"),
            Self::Courses | Self::Strip | Self::File => None,
        }
    }
}

/// The step that one is at.
#[derive(Clone, PartialEq, Debug)]
pub struct Going {
    /// Its place, from 0; [`STEPS`] once all are done.
    pub at: usize,
    /// The start as it was when this step began.
    pub start: Start,
}

impl Going {
    /// The first step, on a start.
    pub(in crate::window) const fn new(start: Start) -> Self {
        Self { at: 0, start }
    }
}

/// Goes on to the next step when what this one asks for is so.
pub(in crate::window) fn follow(state: &mut State) {
    // A question that waits for an answer may still put another design here.
    if state.waiting.is_some() {
        return;
    }
    let Some(mut going) = state.guide.going.take() else {
        return;
    };
    while going.at < STEPS && is_done(state, &going) {
        going.at += 1;
        going.start.clone_from(&state.shape().start);
    }
    state.guide.going = Some(going);
}

fn is_done(state: &State, going: &Going) -> bool {
    let shape = state.shape();
    match going.at {
        0 => matches!(shape.start, Start::Polar(_)),
        1 => shape.start != going.start,
        2 => COURSES <= state.derived.shell.courses.len(),
        3 => shape.steps.iter().any(|s| s.on && matches!(s.act, Act::Splice { .. })),
        4 => state.path.is_some() && !state.history.unsaved(),
        _ => false,
    }
}

/// What a step is about, and what it asks for.
pub(super) fn asked(state: &State, going: &Going) -> (&'static [Target], &'static str) {
    match going.at {
        0 => (
            &[Target::Kind],
            "On the left, choose Polar form as the kind of start: equal ribs round a pole.",
        ),
        1 => (
            &[Target::Parameters],
            "Change the number of ribs, or the pitch. The front strip below shows the front that follows.",
        ),
        2 => (
            &[Target::Courses],
            "Add two courses. Each fills every open V of the front once, with a panel.",
        ),
        3 if has_open_v(state) => (
            &[Target::Strip],
            "Click an open V in the front strip. The directions in hand are spliced there, and the next course goes round them.",
        ),
        3 => (
            &[Target::Courses],
            "The front has no open V left. Take a course away again with −, then click an open V in the front strip.",
        ),
        4 => (
            &[Target::Findings, Target::File],
            "Read the findings on the right: they say what stands in the way of building. Then save the design: File, Save.",
        ),
        _ => (
            &[],
            "That is a first shell, and it is saved. Export in the File menu writes its lists and drawings.",
        ),
    }
}

fn has_open_v(state: &State) -> bool {
    state.derived.open_on(state.view.side).iter().any(|v| !v.degenerate)
}
