//! How an open V is named.

use zonewright_geometry::{Side, VName};

use super::state::State;

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

/// The place among the open Vs of a front of the V with this name.
#[must_use]
pub(super) fn v_at(state: &State, side: Side, v: &VName) -> Option<usize> {
    let shell = &state.derived.shell;
    let front = &shell.fronts[usize::from(side == Side::Aft)];
    state.derived.open_on(side).iter().position(|open| {
        let letter = front.letters[open.position].letter;
        shell.letters[letter as usize].index == v.zig.index && shell.letter_name(letter) == v.zig
    })
}
