//! Remembering a state, going back to it, showing what a readout speaks of.

use std::sync::Arc;

use crate::{
    document::Design,
    window::{
        readings::{ReadingAct, Remembered},
        state::State,
    },
};

/// Carries out what the readouts are told.
pub(super) fn run(state: &mut State, act: ReadingAct) {
    match act {
        ReadingAct::Remember => {
            let design = Arc::clone(state.design());
            state.derived.catch_up(&design, state.history.revision());
            state.remembered = Some(Remembered::new(state.design(), &state.derived));
            state.say("Remembered: the readouts show what changes from here");
        }
        ReadingAct::Forget => {
            state.remembered = None;
            state.say("The remembered state was forgotten");
        }
        ReadingAct::GoBack => match &state.remembered {
            Some(remembered) => {
                let then = Arc::clone(&remembered.design);
                state.change("Go back to the remembered state", None, |design| {
                    *design = Design::clone(&then);
                });
                state.say("Back at the remembered state; undo brings the other one again");
            }
            None => state.say("No state is remembered"),
        },
        ReadingAct::Show(shown) => {
            state.view.shown = shown;
            state.view.finding = None;
        }
    }
}
