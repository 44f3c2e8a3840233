//! What the first shell is told.

use crate::window::command::Words;

/// An act.
#[derive(Clone, Copy, PartialEq, Eq, Debug)]
pub enum GuideAct {
    /// Begins with a new design; asks about unsaved changes first.
    Begin,
    /// Leaves it, or declines the offer.
    Leave,
}

impl GuideAct {
    /// Its words.
    #[must_use]
    pub const fn words(self) -> Words {
        let (name, hint) = match self {
            Self::Begin => (
                "First shell",
                "Five short steps on the real controls, from nothing to a saved shell.",
            ),
            Self::Leave => ("Leave the first shell", "Closes the steps; the design stays as it is."),
        };
        Words { name, hint }
    }
}
