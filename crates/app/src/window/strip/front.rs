//! What the strip shows of a front, worked out once a revision.

use std::collections::BTreeSet;

use zonewright_geometry::{
    Act, Maker, NONE, OpenV, Shape, Shell, Side, StepId,
    ahead::{Rank, ranks, ranks_of_letters},
};

use super::flat::Flat;

/// A front as the strip shows it. Lists go along the open Vs.
#[derive(Clone, PartialEq, Debug)]
pub struct StripFront {
    /// The front laid out flat.
    pub(in crate::window) flat: Flat,
    /// Whether the V is a spur or a fold, which no fill goes through.
    pub(in crate::window) held: Vec<bool>,
    /// Whether a splice that nothing was laid upon yet made the V.
    pub(in crate::window) fresh: Vec<bool>,
    /// The place of the V in its family.
    pub(in crate::window) ranks: Vec<Rank>,
    /// The same of the V that was spliced, where a splice made this one.
    pub(in crate::window) bases: Vec<Rank>,
    /// The k for which "every k-th V" is offered, 1 first.
    pub(in crate::window) repeats: Vec<u32>,
    /// How many Vs are held.
    pub(in crate::window) held_count: usize,
}

impl StripFront {
    /// A front without letters.
    #[must_use]
    pub(in crate::window) fn empty() -> Self {
        Self {
            flat: Flat::new(&[], false),
            held: Vec::new(),
            fresh: Vec::new(),
            ranks: Vec::new(),
            bases: Vec::new(),
            repeats: Vec::new(),
            held_count: 0,
        }
    }

    /// The front of a side.
    #[must_use]
    pub(in crate::window) fn of(shape: &Shape, shell: &Shell, side: Side, open: &[OpenV]) -> Self {
        let front = &shell.fronts[usize::from(side == Side::Aft)];
        let around = open.last().is_some_and(|v| v.position + 1 == front.letters.len());
        let ends = front.nodes.iter().zip(front.nodes.iter().skip(1));
        let letters: Vec<_> = front
            .letters
            .iter()
            .zip(ends)
            .map(|(letter, (from, to))| (letter.role, from.distance(*to)))
            .collect();
        let ranks = ranks(shell, open);
        let fresh = fresh(shape, shell, side, open);
        let base = |(v, fresh): (&OpenV, &bool)| {
            let zig = front.letters[v.position].letter;
            let at = shell.letters[zig as usize].at;
            if *fresh && at != NONE { at } else { zig }
        };
        let bases: Vec<u32> = open.iter().zip(&fresh).map(base).collect();
        let held: Vec<bool> = open.iter().map(is_held).collect();
        Self {
            flat: Flat::new(&letters, around),
            held_count: held.iter().filter(|held| **held).count(),
            held,
            fresh,
            bases: ranks_of_letters(shell, &bases),
            repeats: repeats(&ranks, front.closed),
            ranks,
        }
    }
}

/// Whether a V runs out and straight back: a spur or a fold. Parallel letters that run the same way are filled, though
/// they make no panel.
fn is_held(v: &OpenV) -> bool {
    v.degenerate && (v.nodes[1] - v.nodes[0]).dot(v.nodes[2] - v.nodes[1]) < 0.0
}

/// Which Vs have a letter of one of the splices that end the front's steps.
fn fresh(shape: &Shape, shell: &Shell, side: Side, open: &[OpenV]) -> Vec<bool> {
    let splices: BTreeSet<StepId> = shape
        .steps
        .iter()
        .rev()
        .filter(|s| s.on && s.side == side)
        .take_while(|s| matches!(s.act, Act::Splice { .. }))
        .map(|s| s.id)
        .collect();
    let letters = &shell.fronts[usize::from(side == Side::Aft)].letters;
    let made = |position: usize| {
        let letter = &shell.letters[letters[position % letters.len()].letter as usize];
        letter.at != NONE && matches!(letter.maker, Maker::Step(step) if splices.contains(&step))
    };
    open.iter()
        .map(|v| !splices.is_empty() && (made(v.position) || made(v.position + 1)))
        .collect()
}

/// What "every k-th" can be: round a closed front the divisors of the largest family, along an open one small numbers.
fn repeats(ranks: &[Rank], closed: bool) -> Vec<u32> {
    /// More choices than this are no help.
    const MOST: usize = 12;
    let most = ranks.iter().map(|r| r.of).max().unwrap_or(0);
    (1..most)
        .filter(|k| !closed || most.is_multiple_of(*k))
        .take(MOST)
        .collect()
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn round_a_closed_front_divisors_are_offered() {
        let family = |of: u32| -> Vec<Rank> { (0..of).map(|rank| Rank { family: 0, rank, of }).collect() };
        assert_eq!(repeats(&family(12), true), [1, 2, 3, 4, 6]);
        assert_eq!(repeats(&family(7), true), [1]);
        assert_eq!(repeats(&family(5), false), [1, 2, 3, 4]);
        assert_eq!(repeats(&family(1), true), Vec::<u32>::new());
        assert_eq!(repeats(&[], true), Vec::<u32>::new());
    }
}
