//! The place of a V within its family: what "every k-th" counts.

use std::collections::BTreeMap;

use crate::{Maker, OpenV, Role, Shell, Sign, ahead::panel::letters};

/// The place of a V's zig letter in its family: the letters of the same maker, sign and role at birth, in the order in
/// which they were made (see [`crate::Vs::EveryKth`]).
#[derive(Clone, Copy, PartialEq, Eq, Debug)]
pub struct Rank {
    /// The family, told by its first letter.
    pub family: u32,
    /// Which of the family, from 0.
    pub rank: u32,
    /// How many letters the family has, those that are on no front any more included.
    pub of: u32,
}

impl Rank {
    /// Whether "every k-th from there" takes this one, round a closed front or both ways along an open one.
    #[must_use]
    pub const fn is_kth(self, from: Self, k: u32, closed: bool) -> bool {
        if self.family != from.family || k == 0 {
            return false;
        }
        let steps = if closed {
            (self.rank + self.of - from.rank) % self.of
        } else {
            self.rank.abs_diff(from.rank)
        };
        steps.is_multiple_of(k)
    }
}

/// The rank of each of these open Vs.
#[must_use]
pub fn ranks(shell: &Shell, open: &[OpenV]) -> Vec<Rank> {
    let zigs: Vec<u32> = open.iter().map(|v| letters(shell, v)[0]).collect();
    ranks_of_letters(shell, &zigs)
}

/// The rank of each of these letters.
#[must_use]
pub fn ranks_of_letters(shell: &Shell, of: &[u32]) -> Vec<Rank> {
    type Key = (Maker, Sign, bool);
    let mut families: BTreeMap<Key, (u32, u32)> = BTreeMap::new();
    let mut of_letter: Vec<(Key, u32)> = Vec::with_capacity(shell.letters.len());
    for (index, letter) in (0_u32..).zip(&shell.letters) {
        let key = (letter.maker, letter.sign, letter.born == Role::Zig);
        let family = families.entry(key).or_insert((index, 0));
        of_letter.push((key, family.1));
        family.1 += 1;
    }
    let rank = |letter: &u32| {
        let (key, rank) = of_letter[*letter as usize];
        let (family, of) = families[&key];
        Rank { family, rank, of }
    };
    of.iter().map(rank).collect()
}
