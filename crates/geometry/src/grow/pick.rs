//! Finding Vs again by their names.

use super::{alphabet::Alphabet, front::Front};
use crate::{LetterName, Vs};

/// What a choice of Vs gave.
#[derive(Clone, PartialEq, Eq, Debug, Default)]
pub(super) struct Chosen {
    /// Positions on the front, ascending.
    pub(super) at: Vec<usize>,
    /// How many named letters are gone, or are no zig of an open V now.
    pub(super) lost: usize,
    /// How many Vs have another zag letter than the name says.
    pub(super) changed: usize,
}

/// The open Vs of a front that a choice names.
pub(super) fn choose(vs: &Vs, front: &Front, alphabet: &Alphabet) -> Chosen {
    let open = front.open_vs();
    match vs {
        Vs::All => Chosen {
            at: open,
            ..Chosen::default()
        },
        Vs::Picked(names) => picked(names, &open, front, alphabet),
        Vs::EveryKth { from, k } => every_kth(from, *k, &open, front, alphabet),
    }
}

fn picked(names: &[crate::VName], open: &[usize], front: &Front, alphabet: &Alphabet) -> Chosen {
    let mut chosen = Chosen::default();
    for name in names {
        let zig = alphabet.find(&name.zig);
        let at = zig.and_then(|zig| open.iter().copied().find(|at| front.slots[*at].letter == zig));
        let Some(at) = at else {
            chosen.lost += 1;
            continue;
        };
        let zag = front.after(at).map(|behind| front.slots[behind].letter);
        if alphabet.find(&name.zag) != zag {
            chosen.changed += 1;
        }
        chosen.at.push(at);
    }
    chosen.at.sort_unstable();
    chosen.at.dedup();
    chosen
}

fn every_kth(from: &LetterName, k: u32, open: &[usize], front: &Front, alphabet: &Alphabet) -> Chosen {
    let Some(from) = alphabet.find(from).filter(|_| 0 < k) else {
        return Chosen {
            lost: 1,
            ..Chosen::default()
        };
    };
    let family: Vec<u32> = alphabet.family(from).collect();
    let Ok(first) = family.binary_search(&from) else {
        return Chosen {
            lost: 1,
            ..Chosen::default()
        };
    };
    let k = k as usize;
    let wanted = |letter: u32| {
        family.binary_search(&letter).is_ok_and(|rank| {
            // Round a closed front the count goes on from the named letter; on an open one it goes both ways.
            let steps = if front.closed {
                (rank + family.len() - first) % family.len()
            } else {
                rank.abs_diff(first)
            };
            steps % k == 0
        })
    };
    let at = open
        .iter()
        .copied()
        .filter(|at| wanted(front.slots[*at].letter))
        .collect();
    Chosen {
        at,
        ..Chosen::default()
    }
}
