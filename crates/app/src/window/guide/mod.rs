//! The first shell: five short steps on the real controls, for whoever opens the window for the first time.
//!
//! A step is done when the design says so, whichever way it was brought there: by a button, a key or a command. Nothing is blocked
//! meanwhile, and nothing is remembered.

mod act;
mod card;
mod outline;
mod steps;

pub use act::GuideAct;
pub(super) use card::{card_ui, offer_ui};
pub(super) use outline::{framed, outline, wanted};
pub(super) use steps::follow;
pub use steps::{Going, STEPS, Target};

/// Where one is in the first shell.
#[derive(Clone, PartialEq, Debug, Default)]
pub struct Guide {
    /// Whether it is offered above the picture.
    pub offered: bool,
    /// The step that one is at, while it goes on.
    pub going: Option<Going>,
}
