//! What the ladder can be told to do.

use egui::{Key, Modifiers};
use zonewright_geometry::{Act, StepId};

use super::Climbed;
use crate::window::command::Words;

/// A command about the ladder.
#[derive(Clone, PartialEq, Debug)]
pub enum LadderAct {
    /// Climbs to a place; none is the top.
    Climb(Option<Climbed>),
    /// One rung or step up.
    Up,
    /// One rung or step down.
    Down,
    /// Down to the start.
    Foot,
    /// Opens the card of a step, or closes it.
    Pick(Option<StepId>),
    /// Adds a step on the live front at a place; none is the top.
    Add(Option<Climbed>, Box<Act>),
    /// Keeps of a step's picks only what is found, as it stands there now.
    Mend(StepId),
}

impl LadderAct {
    /// Those that need nothing but their name.
    pub(in crate::window) const LISTED: [Self; 4] = [Self::Up, Self::Down, Self::Climb(None), Self::Foot];

    pub(in crate::window) const fn words(&self) -> Words {
        let (name, hint) = match self {
            Self::Climb(None) => ("Back to the top", "Shows the whole shell again."),
            Self::Climb(Some(_)) => ("Climb the ladder", "Shows the shell as it was at a course or a step."),
            Self::Up => ("Climb up", "Shows the shell one course or step further."),
            Self::Down => ("Climb down", "Shows the shell one course or step before."),
            Self::Foot => ("Climb down to the start", "Shows the start before anything has grown."),
            Self::Pick(_) => ("Pick a step", "Opens the card of a step beside the ladder."),
            Self::Add(..) => ("Add a step here", "Adds a step at a place of the ladder."),
            Self::Mend(_) => (
                "Keep what is found",
                "Takes out of a step what is no longer there, and keeps the rest as it stands now.",
            ),
        };
        Words { name, hint }
    }

    pub(in crate::window) const fn keys(&self) -> Option<(Modifiers, Key)> {
        match self {
            Self::Up => Some((Modifiers::COMMAND, Key::PageUp)),
            Self::Down => Some((Modifiers::COMMAND, Key::PageDown)),
            Self::Climb(None) => Some((Modifiers::COMMAND, Key::End)),
            Self::Foot => Some((Modifiers::COMMAND, Key::Home)),
            _ => None,
        }
    }
}
