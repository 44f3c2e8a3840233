//! Which open Vs were just made by a splice, and how an open V is named.

use std::collections::BTreeSet;

use zonewright_geometry::{Act, Side, VName};

use super::{execute::fresh_splice, state::State};

/// The name of an open V, by its place among the open Vs of a front.
#[must_use]
pub(super) fn v_name(state: &State, side: Side, index: usize) -> Option<VName> {
    let shell = &state.derived.shell;
    let front = &shell.fronts[usize::from(side == Side::Aft)];
    let v = state.derived.open_on(side).get(index)?;
    let count = front.letters.len();
    Some(VName {
        zig: shell.letter_name(front.letters[v.position].letter),
        zag: shell.letter_name(front.letters[(v.position + 1) % count].letter),
    })
}

/// The open Vs of a front that a click would unsplice, by their places among the open Vs.
#[must_use]
pub(super) fn spliced(state: &State, side: Side) -> BTreeSet<usize> {
    let shape = state.shown_shape();
    let last = shape.steps.iter().rev().find(|s| s.on && s.side == side);
    if !last.is_some_and(|s| matches!(s.act, Act::Splice { .. })) {
        return BTreeSet::new();
    }
    (0..state.derived.open_on(side).len())
        .filter(|at| v_name(state, side, *at).is_some_and(|v| fresh_splice(&shape, side, &v).is_some()))
        .collect()
}
