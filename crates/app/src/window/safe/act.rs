//! Commands about what must not be lost.

use std::path::PathBuf;

use super::Banner;
use crate::window::command::{Command, Words};

/// What can be done about files and states that might get lost.
#[derive(Clone, PartialEq, Eq, Debug)]
pub enum SafeAct {
    /// Recovers the unsaved design at this place of the list that is offered.
    Recover(usize),
    /// Recovers the unsaved design that was changed last.
    RecoverNewest,
    /// Discards the unsaved design at this place; asks once more first.
    DiscardOrphan(usize),
    /// Leaves the unsaved designs where they are, for another time.
    Later,
    /// Shows what unsaved designs there are.
    LookForOrphans,
    /// Reads the design's file again; undo brings back what was there.
    Reload,
    /// Overwrites the file that the question is about.
    Overwrite,
    /// Saves under another name instead.
    SaveElsewhere,
    /// Overwrites nothing.
    Stay,
    /// Closes a banner.
    Close(Banner),
    /// Goes so many undo steps back.
    Back(usize),
    /// Goes so many undo steps forward.
    Forward(usize),
    /// Forgets the recent files.
    ForgetRecent,
    /// Looks which recent files are there.
    LookAtRecent,
    /// Files were dropped on the window.
    Drop(Vec<PathBuf>),
}

impl SafeAct {
    /// Whether it shows another design in place of the one in the window: unsaved changes are asked about first.
    #[must_use]
    pub const fn replaces_design(&self) -> bool {
        matches!(self, Self::Recover(_) | Self::RecoverNewest)
    }

    /// Its name and hint.
    #[must_use]
    pub const fn words(&self) -> Words {
        let (name, hint) = match self {
            Self::Recover(_) | Self::RecoverNewest => (
                "Recover the newest unsaved design",
                "Opens the design that a crash left unsaved, the newest first.",
            ),
            Self::DiscardOrphan(_) => ("Discard", "Removes an unsaved design for good."),
            Self::Later => ("Decide later", "Keeps the unsaved designs for another time."),
            Self::LookForOrphans => (
                "Unsaved designs after a crash…",
                "Shows the designs that were not saved when a window ended by a crash.",
            ),
            Self::Reload => (
                "Reload the file",
                "Reads the design's file again; undo brings back what was there.",
            ),
            Self::Overwrite => ("Overwrite", "Overwrites the file with the design in this window."),
            Self::SaveElsewhere => ("Save as…", "Saves under another name instead."),
            Self::Stay => ("Stay", "Overwrites nothing."),
            Self::Close(_) => ("Close", "Closes the banner."),
            Self::Back(_) => ("Undo several steps", "Takes the last changes back, up to this one."),
            Self::Forward(_) => ("Redo several steps", "Makes changes again, up to this one."),
            Self::ForgetRecent => ("Clear the recent files", "Forgets which files were open recently."),
            Self::LookAtRecent => ("Look at the recent files", "Looks which recent files are there."),
            Self::Drop(_) => ("Drop", "Opens or imports what was dropped on the window."),
        };
        Words { name, hint }
    }
}

/// The commands of this family that need nothing but their name.
#[must_use]
pub(in super::super) fn listed() -> Vec<Command> {
    let all = [
        SafeAct::Reload,
        SafeAct::LookForOrphans,
        SafeAct::RecoverNewest,
        SafeAct::ForgetRecent,
    ];
    all.into_iter().map(Command::Safe).collect()
}
