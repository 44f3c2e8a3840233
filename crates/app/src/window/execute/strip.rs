//! What the front strip sends: repeating, a span that is chosen, and filling.

use std::collections::BTreeSet;

use zonewright_geometry::{Act, Side, Step, StepId, VName, Vs};

use super::{
    splice::{self, v_names},
    steps,
};
use crate::window::{
    splice_marks::v_name,
    state::State,
    strip::{Picks, StripAct, reached},
};

/// Carries out what the strip sends.
pub(super) fn run(state: &mut State, act: StripAct) {
    match act {
        StripAct::Fill(picks) if stands(state, &picks) => fill(state, &picks),
        StripAct::Splice(picks) if stands(state, &picks) => splice::toggle_all(state, picks.side, &picks.at),
        StripAct::Fill(_) | StripAct::Splice(_) => state.say("The front has changed meanwhile: choose again"),
        StripAct::Repeat(k) => state.view.strip.repeat = k.filter(|k| 0 < *k),
        StripAct::SwapRepeat => {
            let repeat = &mut state.view.strip.repeat;
            *repeat = if repeat.is_some() { None } else { Some(1) };
        }
        StripAct::Span(span) => state.view.strip.span = span,
        StripAct::Letter(letter) => state.view.strip.letter = letter,
    }
}

/// Whether the places are those of the front as it is: nothing sent before has changed it.
fn stands(state: &State, picks: &Picks) -> bool {
    let open = state.derived.open_on(picks.side).len();
    let derived = &state.derived;
    let now = derived.revision == state.history.revision() && derived.climbed == state.view.ladder.climbed;
    now && picks.revision == state.derived.revision && picks.at.iter().all(|at| *at < open)
}

/// Fills Vs as a course of their own; in the last step, when that one fills Vs of the same front that were all open
/// together with these: then the order makes no difference.
fn fill(state: &mut State, picks: &Picks) {
    let side = picks.side;
    let front = state.derived.strip_on(side);
    let at: Vec<usize> = reached(state, side, &picks.at)
        .into_iter()
        .map(|r| r.at)
        .filter(|at| !front.held[*at])
        .collect();
    if at.is_empty() {
        state.say("There is nothing to fill: a spur makes no panel");
        return;
    }
    let names: Vec<VName> = at.iter().filter_map(|at| v_name(state, side, *at)).collect();
    let filled = match names.len() {
        1 => "1 V was filled".to_owned(),
        n => format!("{n} Vs were filled"),
    };
    if let Some(step) = joins(state, side, &names) {
        state.change("Fill Vs", None, |design| {
            if let Act::Fill { at: Vs::Picked(known) } = &mut design.shape.steps[step].act {
                known.extend(names);
            }
        });
        state.say(format!("{filled}, in step {}", step + 1));
        return;
    }
    // One V and those like it are a rule, which goes on counting when the start gets more of them.
    let vs = match (state.view.strip.repeat, &picks.at[..]) {
        (Some(k), [one]) => v_name(state, side, *one).map(|v| Vs::EveryKth { from: v.zig, k }),
        _ => None,
    };
    let step = Step {
        // The number is given where the step is put in.
        id: StepId(0),
        name: None,
        on: true,
        side,
        act: Act::Fill {
            at: vs.unwrap_or(Vs::Picked(names)),
        },
    };
    steps::insert(state, state.view.ladder.climbed, vec![step], "Fill Vs");
    state.say(filled);
}

/// The last step of a front, when it fills picked Vs and all of these were open before it too.
fn joins(state: &State, side: Side, names: &[VName]) -> Option<usize> {
    let shown = state.shown_shape();
    let steps = &shown.steps;
    let at = steps.iter().rposition(|s| s.on && s.side == side)?;
    if !matches!(steps[at].act, Act::Fill { at: Vs::Picked(_) }) {
        return None;
    }
    let before: BTreeSet<VName> = v_names(&shown, side, at).into_iter().collect();
    names.iter().all(|name| before.contains(name)).then_some(at)
}
