//! Which Vs an act at some of them reaches: those themselves, or every k-th round the front.

use zonewright_geometry::{
    Direction, Side,
    ahead::{Rank, Turn, turned},
};

use crate::window::state::State;

/// A V that an act reaches, and the V that it repeats; both by their places among the open Vs.
#[derive(Clone, Copy, PartialEq, Eq, Debug)]
pub(in crate::window) struct Reached {
    /// The V.
    pub at: usize,
    /// The V that was pointed at.
    pub like: usize,
}

/// The Vs that an act at these reaches, ascending.
#[must_use]
pub(in crate::window) fn reached(state: &State, side: Side, at: &[usize]) -> Vec<Reached> {
    among(state, side, at, &state.derived.strip_on(side).ranks)
}

/// The Vs that a click on these reaches, ascending: where all of them are spliced already, those whose splices would go. The Vs
/// that a splice made count as the one that was spliced.
#[must_use]
pub(in crate::window) fn clicked(state: &State, side: Side, at: &[usize]) -> Vec<Reached> {
    let front = state.derived.strip_on(side);
    if !at.iter().all(|at| front.fresh.get(*at) == Some(&true)) {
        return reached(state, side, at);
    }
    let mut reached = among(state, side, at, &front.bases);
    reached.retain(|r| front.fresh[r.at]);
    reached
}

fn among(state: &State, side: Side, at: &[usize], ranks: &[Rank]) -> Vec<Reached> {
    let own = at.iter().filter(|at| **at < ranks.len());
    let Some(k) = state.view.strip.repeat else {
        return own.map(|at| Reached { at: *at, like: *at }).collect();
    };
    let closed = state.derived.shell.fronts[usize::from(side == Side::Aft)].closed;
    let mut like: Vec<Option<usize>> = vec![None; ranks.len()];
    for &from in own.clone() {
        like[from] = Some(from);
    }
    let mut done: Vec<(u32, u32)> = Vec::new();
    for &from in own {
        // Vs of one class reach the same ones, so that one of them is enough.
        let class = (ranks[from].family, ranks[from].rank % k.max(1));
        let classes = !closed || ranks[from].of.is_multiple_of(k.max(1));
        if classes && done.contains(&class) {
            continue;
        }
        done.push(class);
        for (to, rank) in ranks.iter().enumerate() {
            if like[to].is_none() && rank.is_kth(ranks[from], k, closed) {
                like[to] = Some(from);
            }
        }
    }
    like.into_iter()
        .enumerate()
        .filter_map(|(at, like)| like.map(|like| Reached { at, like }))
        .collect()
}

/// The directions in hand as they are spliced at a V: turned with it from the V that it repeats, where a turn about the vertical axis
/// takes the one to the other, else as they are.
#[must_use]
pub(in crate::window) fn directions_at(state: &State, side: Side, reached: Reached) -> Vec<Direction> {
    let directions = &state.view.hand.directions;
    if reached.at == reached.like {
        return directions.clone();
    }
    let (shell, open) = (&state.derived.shell, state.derived.open_on(side));
    let turn = Turn::between(shell, &open[reached.like], &open[reached.at]);
    turn.map_or_else(|| directions.clone(), |turn| turned(shell, directions, turn))
}

/// Whether the directions in hand can be turned along to every V that is reached.
#[must_use]
pub(in crate::window) fn all_turn(state: &State, side: Side, reached: &[Reached]) -> bool {
    let (shell, open) = (&state.derived.shell, state.derived.open_on(side));
    reached
        .iter()
        .all(|r| r.at == r.like || Turn::between(shell, &open[r.like], &open[r.at]).is_some())
}

/// What the picture shows of what an act would do: the span that is being chosen, or else the V that is pointed at.
#[must_use]
pub(in crate::window) fn previewed(state: &State, over: Option<(Side, usize)>) -> (Side, Vec<Reached>) {
    if let Some(span) = state.view.strip.span
        && let Some(range) = span.range(&state.derived)
    {
        let at: Vec<usize> = range.collect();
        return (span.side, reached(state, span.side, &at));
    }
    over.map_or((state.view.side, Vec::new()), |(side, at)| {
        (side, clicked(state, side, &[at]))
    })
}
