//! A click on an open V: splice the directions in hand there, or take that splice away again.

use std::collections::{BTreeMap, BTreeSet};

use zonewright_geometry::{
    Act, Direction, LetterName, Maker, Shape, Side, Step, StepId, VName, Vs, grow::open_vs, grow_until,
};

use super::steps;
use crate::window::{
    splice_marks::{v_at, v_name},
    state::State,
    strip::{clicked, directions_at},
};

/// Splices at a V and those that an act there reaches, or, when the V was made by a splice that nothing was laid upon yet, takes
/// that away.
pub(super) fn toggle(state: &mut State, side: Side, v: &VName) {
    match v_at(state, side, v) {
        Some(at) => toggle_all(state, side, &[at]),
        None => state.say("This V is not open any more"),
    }
}

/// The same at several Vs, given by their places among the open Vs: when all of them are spliced already, these splices go.
pub(super) fn toggle_all(state: &mut State, side: Side, at: &[usize]) {
    let fresh = &state.derived.strip_on(side).fresh;
    let reached = clicked(state, side, at);
    if at.iter().all(|at| fresh[*at]) {
        let all = reached.iter().filter(|r| fresh[r.at]);
        let shown = state.shown_shape();
        let found = all.filter_map(|r| fresh_splice(&shown, side, &v_name(state, side, r.at)?));
        let found = found.collect();
        take_away(state, side, found);
        return;
    }
    if state.view.hand.directions.is_empty() {
        state.say("No directions are in hand: add one in the list on the left");
        return;
    }
    let wanted = reached.iter().filter(|r| !fresh[r.at]);
    let whole = wanted.clone().count() == reached.len();
    // Vs that get the same directions share a step; turned directions need a step for each turn.
    let mut groups: Vec<(Vec<Direction>, Vec<VName>)> = Vec::new();
    for r in wanted {
        let Some(name) = v_name(state, side, r.at) else {
            continue;
        };
        let directions = directions_at(state, side, *r);
        match groups.iter_mut().find(|(known, _)| *known == directions) {
            Some((_, names)) => names.push(name),
            None => groups.push((directions, vec![name])),
        }
    }
    // One V and those like it are a rule, which goes on counting when the start gets more of them.
    let rule = match (state.view.strip.repeat, at, groups.len(), whole) {
        (Some(k), [one], 1, true) => v_name(state, side, *one).map(|v| Vs::EveryKth { from: v.zig, k }),
        _ => None,
    };
    let count: usize = groups.iter().map(|(_, names)| names.len()).sum();
    splice(state, side, groups, rule);
    state.say(match count {
        1 => "Spliced; lay a course to grow along the new directions".to_owned(),
        n => format!("Spliced at {n} Vs; lay a course to grow along the new directions"),
    });
}

/// Adds the steps, or the Vs to the last step when that one splices the same directions.
fn splice(state: &mut State, side: Side, groups: Vec<(Vec<Direction>, Vec<VName>)>, rule: Option<Vs>) {
    let shown = state.shown_shape();
    let last = shown.steps.len().checked_sub(1);
    let joined = last.filter(|at| {
        let last = &shown.steps[*at];
        let Act::Splice {
            at: Vs::Picked(_),
            directions,
        } = &last.act
        else {
            return false;
        };
        let [(wanted, names)] = &groups[..] else { return false };
        let apart = names.iter().all(|v| !made_by_step(v, last.id));
        rule.is_none() && last.on && last.side == side && directions == wanted && apart
    });
    drop(shown);
    let label = match &groups[..] {
        [(_, names)] if names.len() == 1 => "Splice at a V",
        _ => "Splice at several Vs",
    };
    if let Some(at) = joined {
        state.change(label, None, |design| {
            if let Act::Splice {
                at: Vs::Picked(known), ..
            } = &mut design.shape.steps[at].act
            {
                known.extend(groups.into_iter().flat_map(|(_, names)| names));
            }
        });
        return;
    }
    let splices = groups.into_iter().map(|(directions, names)| Step {
        // The number is given where the step is put in.
        id: StepId(0),
        name: None,
        on: true,
        side,
        act: Act::Splice {
            at: rule.clone().unwrap_or(Vs::Picked(names)),
            directions,
        },
    });
    steps::insert(state, state.view.ladder.climbed, splices.collect(), label);
}

fn made_by_step(v: &VName, step: StepId) -> bool {
    [&v.zig, &v.zag].into_iter().any(|l| l.maker == Maker::Step(step))
}

/// The splice that made one of a V's letters, when no step of that front comes after it but other splices: its place in
/// the record, and the zig letter of the V that was spliced.
fn fresh_splice(shape: &Shape, side: Side, v: &VName) -> Option<(usize, LetterName)> {
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

/// Takes splices away, each given by its place in the record and the zig letter of the V that was spliced; steps that are left
/// without a V go.
fn take_away(state: &mut State, side: Side, found: Vec<(usize, LetterName)>) {
    let mut by_step: BTreeMap<usize, BTreeSet<LetterName>> = BTreeMap::new();
    for (at, zig) in found {
        by_step.entry(at).or_default().insert(zig);
    }
    let shape = state.shape();
    let mut left: Vec<(usize, Vec<VName>)> = Vec::new();
    for (&at, gone) in &by_step {
        let Act::Splice { at: vs, .. } = &shape.steps[at].act else {
            continue;
        };
        let names = match vs {
            Vs::Picked(names) => names.clone(),
            // A rule becomes a list of the Vs that it found, so that one of them can be left out.
            Vs::All | Vs::EveryKth { .. } => found_by(shape, side, at, vs),
        };
        left.push((at, names.into_iter().filter(|v| !gone.contains(&v.zig)).collect()));
    }
    let gone: usize = by_step.values().map(BTreeSet::len).sum();
    let label = if gone == 1 {
        "Take a splice away"
    } else {
        "Take splices away"
    };
    let emptied: Vec<usize> = left.iter().filter(|(_, n)| n.is_empty()).map(|(at, _)| *at).collect();
    steps::step_down(state, &emptied);
    state.change(label, None, |design| {
        // From the back, so that places in front stay what they are.
        for (at, names) in left.into_iter().rev() {
            if names.is_empty() {
                design.shape.steps.remove(at);
            } else if let Act::Splice { at: vs, .. } = &mut design.shape.steps[at].act {
                *vs = Vs::Picked(names);
            }
        }
    });
    state.say(match gone {
        1 => "The splice was taken away".to_owned(),
        n => format!("{n} splices were taken away"),
    });
}

/// The Vs that a splice by a rule works on: those of the front before it whose zig letter has a spliced letter behind it after it.
fn found_by(shape: &Shape, side: Side, at: usize, rule: &Vs) -> Vec<VName> {
    let before = v_names(shape, side, at);
    if *rule == Vs::All {
        return before;
    }
    let (after, _) = grow_until(shape, at + 1);
    let step = Maker::Step(shape.steps[at].id);
    let spliced: BTreeSet<LetterName> = (0..after.letters.len())
        .filter_map(|l| u32::try_from(l).ok())
        .filter(|l| after.letters[*l as usize].maker == step)
        .filter_map(|l| after.letter_name(l).at.map(|name| *name))
        .collect();
    before.into_iter().filter(|v| spliced.contains(&v.zig)).collect()
}

/// The names of all open Vs of a front as it stands before the step at a place in the record.
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
