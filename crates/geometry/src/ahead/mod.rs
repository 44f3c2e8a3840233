//! What filling or splicing an open V would make, told before it is done, and which Vs stand alike round a front.
//!
//! Growing itself needs none of this: it is for whoever shows a front as it stands and lets Vs be chosen on it.

mod panel;
mod rank;
#[cfg(test)]
mod tests;
mod turn;

pub use panel::{PanelAhead, panels_of_splice, spurs_of_splice};
pub use rank::{Rank, ranks, ranks_of_letters};
pub use turn::{TURN_FIT, Turn, turned};
