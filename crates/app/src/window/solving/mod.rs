//! Solving for what the client said: the wanted figures, what may change, the search that goes on, and its answer.
//!
//! The search has a thread of its own: it may go on for seconds, and neither shell nor findings must wait for it.

mod search;

use zonewright_geometry::{
    ParameterKind, Shape,
    parameter::parameter,
    solve::{Figure, Free, Solution, Unsolved, Want},
};

use super::command::Words;
use search::Stop;
pub(in crate::window) use search::search_stages;
pub(super) use search::{SearchDone, SearchJob};

/// What is wanted, and what came of it.
#[derive(Debug, Default)]
pub struct Solving {
    /// The wanted figures.
    pub wants: Vec<Want>,
    /// The parameters that may change, in the order in which they were chosen. Keys that this design does not have are passed over.
    pub free: Vec<Free>,
    /// The answer of the last search.
    pub answer: Option<Answer>,
    search: Option<Stop>,
}

/// The answer of a search.
#[derive(Clone, PartialEq, Debug)]
pub struct Answer {
    /// The revision of the design that it belongs to: it is shown only beside that.
    pub revision: u64,
    /// The solution, which was taken at once, or why there is none.
    pub result: Result<Solution, Unsolved>,
    /// Whether the nearest was taken, where there was no solution.
    pub nearest_taken: bool,
}

/// What can be told to the search.
#[derive(Clone, PartialEq, Debug)]
pub enum SolveAct {
    /// Wants one more figure, at first with its present value.
    Add(Figure),
    /// Changes what is wanted in this row.
    Set(usize, Want),
    /// Takes this row away.
    Remove(usize),
    /// Lets a parameter change, within these bounds.
    Allow(Free),
    /// Lets a parameter change no more.
    Forbid(String),
    /// Searches.
    Run,
    /// Ends the search that goes on.
    Stop,
    /// Takes the nearest that was reached.
    TakeNearest,
}

impl SolveAct {
    /// Its name and hint.
    #[must_use]
    pub(in crate::window) const fn words(&self) -> Words {
        let (name, hint) = match self {
            Self::Add(_) => ("Want a figure", "Adds a figure that the shell is to have."),
            Self::Set(..) => ("Change a wanted figure", "Changes a figure or its wanted value."),
            Self::Remove(_) => ("Remove a wanted figure", "The figure may be what it will."),
            Self::Allow(_) => ("Let a parameter change", "Solving may change this parameter."),
            Self::Forbid(_) => ("Keep a parameter", "Solving leaves this parameter as it is."),
            Self::Run => (
                "Solve for the wanted figures",
                "Changes the chosen parameters, as little as can be, until the figures are as wanted.",
            ),
            Self::Stop => ("Stop solving", "Ends the search; the design stays as it is."),
            Self::TakeNearest => (
                "Take the nearest",
                "Changes the design to the nearest that was reached, as one undo step.",
            ),
        };
        Words { name, hint }
    }
}

impl Solving {
    /// Whether a search goes on.
    #[must_use]
    pub const fn is_searching(&self) -> bool {
        self.search.is_some()
    }

    /// The bounds of a parameter that may change.
    #[must_use]
    pub fn free_with(&self, key: &str) -> Option<&Free> {
        self.free.iter().find(|f| f.key == key)
    }

    /// The parameters of this shape that may change.
    #[must_use]
    pub fn free_in(&self, shape: &Shape) -> Vec<Free> {
        let there = |free: &&Free| parameter(shape, &free.key).is_some();
        self.free.iter().filter(there).cloned().collect()
    }

    /// The answer, while the design is the one that it belongs to.
    #[must_use]
    pub fn answer_at(&self, revision: u64) -> Option<&Answer> {
        self.answer.as_ref().filter(|a| a.revision == revision)
    }

    /// What to search for on a design of this revision; from now on the search goes on.
    pub(in crate::window) fn begin(&mut self, shape: &Shape, revision: u64) -> SearchJob {
        let stop = Stop::default();
        self.answer = None;
        self.search = Some(stop.clone());
        SearchJob {
            revision,
            shape: shape.clone(),
            wants: self.wants.clone(),
            free: self.free_in(shape),
            stop,
        }
    }

    /// Asks the search to end.
    pub(in crate::window) fn stop(&self) {
        if let Some(search) = &self.search {
            search.stop();
        }
    }

    /// The search has ended.
    pub(in crate::window) fn ended(&mut self) {
        self.search = None;
    }
}

impl Drop for Solving {
    fn drop(&mut self) {
        self.stop();
    }
}

/// The step of a drag in the field of such a number.
pub(in crate::window) const fn speed(kind: ParameterKind) -> f64 {
    match kind {
        ParameterKind::Length => 1.0,
        ParameterKind::Angle => 0.25,
        ParameterKind::Factor => 0.01,
        ParameterKind::Count => 0.1,
    }
}
