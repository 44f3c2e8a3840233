//! A state that the readouts are compared with.

use std::sync::Arc;

use super::{
    Shown,
    values::{Reading, readings},
};
use crate::{
    document::Design,
    window::{command::Words, derived::Derived},
};

/// What can be told to the readouts.
#[derive(Clone, Copy, PartialEq, Eq, Debug)]
pub enum ReadingAct {
    /// Remembers the design as it is; the readouts are compared with it from now on.
    Remember,
    /// Ends the comparison.
    Forget,
    /// Goes back to the remembered design, as one undo step.
    GoBack,
    /// Shows something in the picture; none hides it.
    Show(Option<Shown>),
}

impl ReadingAct {
    /// Its name and hint.
    #[must_use]
    pub(in crate::window) const fn words(self) -> Words {
        let (name, hint) = match self {
            Self::Remember => (
                "Remember this state",
                "Compares the readouts with the design as it is now, from now on.",
            ),
            Self::Forget => ("Forget the remembered state", "Ends the comparison of the readouts."),
            Self::GoBack => (
                "Go back to the remembered state",
                "Brings the remembered design back, as one undo step.",
            ),
            Self::Show(_) => ("Show a readout", "Marks in the picture what a readout speaks of."),
        };
        Words { name, hint }
    }
}

/// A remembered state.
#[derive(Clone, Debug)]
pub struct Remembered {
    /// The design as it was.
    pub(in crate::window) design: Arc<Design>,
    /// What its readouts said.
    pub(in crate::window) readings: Vec<Reading>,
}

impl Remembered {
    /// Remembers a design with what follows from it.
    #[must_use]
    pub(in crate::window) fn new(design: &Arc<Design>, derived: &Derived) -> Self {
        Self {
            design: Arc::clone(design),
            readings: readings(derived),
        }
    }

    /// What the readout with this name said.
    #[must_use]
    pub(in crate::window) fn reading(&self, name: &str) -> Option<&Reading> {
        self.readings.iter().find(|r| r.name == name)
    }
}
