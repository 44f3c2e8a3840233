//! Animations in the window: what is to be shown, what is playing, what is being written.

mod playing;
mod writing;

use std::path::PathBuf;

use super::command::Words;
use crate::animation::Subject;
pub use playing::Playing;
pub(super) use writing::{Progress, Writing};

/// The view and the size that animations are written with, in pixels.
pub(super) const WRITTEN_SIZE: [u32; 2] = [800, 600];

/// What can be told to the animations.
#[derive(Clone, PartialEq, Debug)]
pub enum AnimateAct {
    /// Changes what is to be shown.
    Wish(Wish),
    /// Plays it in the picture, from its beginning.
    Play,
    /// Ends playing, or writing.
    Stop,
    /// Writes it: asks for a file.
    Save,
    /// Writes it into this file, or as frames into this folder.
    SaveTo(PathBuf),
}

impl AnimateAct {
    /// The acts that need nothing but their name.
    pub(super) fn listed() -> impl Iterator<Item = Self> {
        [Self::Play, Self::Stop, Self::Save].into_iter()
    }

    /// Its name and hint.
    #[must_use]
    pub(super) const fn words(&self) -> Words {
        let (name, hint) = match self {
            Self::Wish(_) => ("Change the animation", "Chooses what the animation shows."),
            Self::Play => (
                "Play the animation",
                "Shows the growth, or a parameter that runs, in the picture.",
            ),
            Self::Stop => (
                "Stop the animation",
                "Ends playing or writing; the design is shown as it is.",
            ),
            Self::Save | Self::SaveTo(_) => (
                "Save the animation…",
                "Writes a GIF or an animated PNG; a name without an ending becomes a folder of numbered PNGs.",
            ),
        };
        Words { name, hint }
    }
}

/// What is to be shown.
#[derive(Clone, PartialEq, Debug)]
pub struct Wish {
    /// What it shows.
    pub subject: Subject,
    /// Frames a second.
    pub rate: u32,
    /// Whether it also runs back.
    pub back: bool,
}

impl Default for Wish {
    /// The growth, four courses a second.
    fn default() -> Self {
        Self {
            subject: Subject::Growth,
            rate: 4,
            back: false,
        }
    }
}

/// The state of the animations.
#[derive(Debug, Default)]
pub struct Animating {
    /// What is to be shown.
    pub wish: Wish,
    /// What is playing.
    pub playing: Option<Playing>,
    /// What is being written.
    pub(super) writing: Option<Writing>,
}
