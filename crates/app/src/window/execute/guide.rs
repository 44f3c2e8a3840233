//! Beginning and leaving the first shell.

use zonewright_geometry::Spurs;

use super::file;
use crate::{
    document,
    window::{
        guide::{Going, Guide, GuideAct},
        kinds,
        state::State,
    },
};

/// Carries out an act.
pub(super) fn run(state: &mut State, act: GuideAct) {
    match act {
        GuideAct::Begin => begin(state),
        GuideAct::Leave => leave(state),
    }
}

/// Leaves it; gives nothing when one was not in it.
pub(super) fn leave(state: &mut State) {
    if state.guide.going.take().is_some() {
        state.say("The first shell is closed; the Help menu begins it again");
    }
    state.guide.offered = false;
}

/// A new design with a start and nothing grown from it.
fn begin(state: &mut State) {
    let start = kinds::kind("zigzag").usual();
    match document::new_design(start.clone(), Some(1), Spurs::default()) {
        Ok(mut design) => {
            design.shape.steps.clear();
            design.units = state.safe.session.units().unwrap_or_else(|| state.units());
            file::show(state, design, None);
            state.guide = Guide {
                offered: false,
                going: Some(Going::new(start)),
            };
            state.say("First shell");
        }
        Err(finding) => state.complain(format!("The new design cannot be made: {}.", finding.code.text().what)),
    }
}
