//! A click on an open V: splice the directions in hand there, or take that splice away again.

use zonewright_geometry::{Act, LetterName, Maker, Shape, Side, Step, StepId, VName, Vs, grow::open_vs, grow_until};

use super::steps;
use crate::window::state::State;

/// Splices at a V, or, when the V was made by a splice that nothing was laid upon yet, takes that splice away.
pub(super) fn toggle(state: &mut State, side: Side, v: VName) {
    let shown = state.shown_shape();
    if let Some((at, spliced)) = fresh_splice(&shown, side, &v) {
        take_away(state, side, at, &spliced);
        return;
    }
    let directions = state.view.hand.directions.clone();
    if directions.is_empty() {
        state.say("No directions are in hand: add one in the list of steps");
        return;
    }
    let same = |step: &Step| {
        let Act::Splice {
            at: Vs::Picked(_),
            directions: d,
        } = &step.act
        else {
            return false;
        };
        step.on && step.side == side && *d == directions
    };
    let last = shown.steps.len().checked_sub(1);
    let joined = last.filter(|at| {
        let step = &shown.steps[*at];
        same(step) && !made_by_step(&v, Some(step.id))
    });
    match joined {
        Some(at) => state.change("Splice at a V", None, |design| {
            if let Act::Splice {
                at: Vs::Picked(names), ..
            } = &mut design.shape.steps[at].act
            {
                names.push(v);
            }
        }),
        None => {
            let step = Step {
                id: StepId(0),
                name: None,
                on: true,
                side,
                act: Act::Splice {
                    at: Vs::Picked(vec![v]),
                    directions,
                },
            };
            steps::insert(state, state.view.ladder.climbed, step, "Splice at a V");
        }
    }
    state.say("Spliced; lay a course to grow along the new directions");
}

fn made_by_step(v: &VName, step: Option<StepId>) -> bool {
    [&v.zig, &v.zag]
        .into_iter()
        .any(|l| Some(l.maker) == step.map(Maker::Step))
}

/// The splice that made one of a V's letters, when no step of that front comes after it but other splices: its place in
/// the record, and the zig letter of the V that was spliced.
pub(crate) fn fresh_splice(shape: &Shape, side: Side, v: &VName) -> Option<(usize, LetterName)> {
    for (at, step) in shape
        .steps
        .iter()
        .enumerate()
        .rev()
        .filter(|(_, s)| s.on && s.side == side)
    {
        let Act::Splice { .. } = step.act else { return None };
        let letter = [&v.zig, &v.zag].into_iter().find(|l| l.maker == Maker::Step(step.id));
        if let Some(spliced) = letter.and_then(|l| l.at.as_deref()) {
            return Some((at, spliced.clone()));
        }
    }
    None
}

fn take_away(state: &mut State, side: Side, at: usize, spliced: &LetterName) {
    let shape = state.shape();
    let Act::Splice { at: vs, .. } = &shape.steps[at].act else {
        return;
    };
    let names = match vs {
        Vs::Picked(names) => names.clone(),
        // A rule becomes a list of the Vs that it found, so that one of them can be left out.
        Vs::All | Vs::EveryKth { .. } => found_by(shape, side, at, vs),
    };
    let left: Vec<VName> = names.into_iter().filter(|v| v.zig != *spliced).collect();
    if left.is_empty() {
        steps::take_out(state, at, "Take a splice away");
        state.say("The splice was taken away");
        return;
    }
    state.change("Take a splice away", None, |design| {
        if let Act::Splice { at: vs, .. } = &mut design.shape.steps[at].act {
            *vs = Vs::Picked(left);
        }
    });
    state.say("The splice was taken away");
}

/// The Vs that a splice by a rule works on: those of the front before it whose zig letter has a spliced letter behind it after it.
fn found_by(shape: &Shape, side: Side, at: usize, rule: &Vs) -> Vec<VName> {
    let before = v_names(shape, side, at);
    if *rule == Vs::All {
        return before;
    }
    let (after, _) = grow_until(shape, at + 1);
    let step = Maker::Step(shape.steps[at].id);
    let spliced: Vec<LetterName> = (0..after.letters.len())
        .filter_map(|l| u32::try_from(l).ok())
        .filter(|l| after.letters[*l as usize].maker == step)
        .filter_map(|l| after.letter_name(l).at.map(|name| *name))
        .collect();
    before.into_iter().filter(|v| spliced.contains(&v.zig)).collect()
}

pub(super) fn v_names(shape: &Shape, side: Side, steps: usize) -> Vec<VName> {
    let (shell, _) = grow_until(shape, steps);
    let front = &shell.fronts[usize::from(side == Side::Aft)];
    let count = front.letters.len();
    open_vs(&shell, side)
        .iter()
        .map(|v| VName {
            zig: shell.letter_name(front.letters[v.position].letter),
            zag: shell.letter_name(front.letters[(v.position + 1) % count].letter),
        })
        .collect()
}
