//! Old states of the undo list, in little room.
//!
//! A state that no step will soon go back to is kept as what makes it out of its newer neighbour: the lines of its text
//! that differ, deflated. A drag changes a few lines, so a step of a long path costs some hundred bytes and not its whole size.

use std::{
    collections::HashMap,
    io::{Read, Write},
};

use flate2::{Compression, read::DeflateDecoder, write::DeflateEncoder};

use crate::document::{self, Backdrop, Design};

/// A state as the difference from its newer neighbour.
#[derive(Clone, PartialEq, Debug)]
pub(super) struct Packed {
    bytes: Box<[u8]>,
    // What was drawn is shared by all states; it has no place in the text.
    backdrop: Option<Backdrop>,
}

impl Packed {
    /// Packs a state; none when it would not come back exactly as it is.
    pub(super) fn of(state: &Design, newer: &Design) -> Option<Self> {
        let (text, backdrop) = text(state);
        let packed = Self {
            bytes: deflate(&difference(&text, &self::text(newer).0))?.into(),
            backdrop,
        };
        (packed.unpack(newer)? == *state).then_some(packed)
    }

    /// The state again.
    pub(super) fn unpack(&self, newer: &Design) -> Option<Design> {
        let mut bytes = Vec::new();
        DeflateDecoder::new(&self.bytes[..]).read_to_end(&mut bytes).ok()?;
        let text = apply(&bytes, &text(newer).0)?;
        let mut design = document::parse_design(&text).ok()?;
        design.backdrop.clone_from(&self.backdrop);
        Some(design)
    }

    /// How many bytes it holds.
    #[cfg(test)]
    pub(super) const fn bytes(&self) -> usize {
        self.bytes.len() + size_of::<Self>()
    }
}

/// The text of a design without its backdrop, and the backdrop.
fn text(design: &Design) -> (String, Option<Backdrop>) {
    match &design.backdrop {
        None => (document::to_text(design), None),
        Some(backdrop) => {
            let mut bare = Design::clone(design);
            bare.backdrop = None;
            (document::to_text(&bare), Some(backdrop.clone()))
        }
    }
}

fn deflate(bytes: &[u8]) -> Option<Vec<u8>> {
    let mut encoder = DeflateEncoder::new(Vec::new(), Compression::fast());
    encoder.write_all(bytes).ok()?;
    encoder.finish().ok()
}

/// The difference: over and over, where to copy lines of the base from, how many, and how many bytes follow literally.
fn difference(text: &str, base: &str) -> Vec<u8> {
    let old: Vec<&str> = base.split_inclusive('\n').collect();
    // Lines that the base has once: there the texts find together again after something was put in or taken out.
    let mut once: HashMap<&str, Option<usize>> = HashMap::with_capacity(old.len());
    for (at, line) in old.iter().enumerate() {
        once.entry(line).and_modify(|o| *o = None).or_insert(Some(at));
    }
    let mut out = Vec::new();
    let (mut from, mut copied, mut literal) = (0, 0, String::new());
    let mut next = 0;
    for line in text.split_inclusive('\n') {
        if old.get(next) != Some(&line)
            && let Some(Some(at)) = once.get(line)
        {
            next = *at;
        }
        if old.get(next) == Some(&line) {
            if !literal.is_empty() || from + copied != next {
                put(&mut out, from, copied, &literal);
                literal.clear();
                (from, copied) = (next, 0);
            }
            copied += 1;
        } else {
            literal.push_str(line);
        }
        next += 1;
    }
    put(&mut out, from, copied, &literal);
    out
}

fn put(out: &mut Vec<u8>, from: usize, copied: usize, literal: &str) {
    for number in [from, copied, literal.len()] {
        out.extend((number as u64).to_le_bytes());
    }
    out.extend(literal.as_bytes());
}

fn apply(mut bytes: &[u8], base: &str) -> Option<String> {
    let old: Vec<&str> = base.split_inclusive('\n').collect();
    let mut text = String::new();
    let mut take = |count: usize| {
        let (head, rest) = bytes.split_at_checked(count)?;
        bytes = rest;
        Some(head)
    };
    while let Some(head) = take(24) {
        let number = |k: usize| {
            let eight = head[8 * k..8 * k + 8].try_into().ok()?;
            usize::try_from(u64::from_le_bytes(eight)).ok()
        };
        let (from, copied, literal) = (number(0)?, number(1)?, number(2)?);
        for line in old.get(from..from.checked_add(copied)?)? {
            text.push_str(line);
        }
        text.push_str(std::str::from_utf8(take(literal)?).ok()?);
    }
    Some(text)
}

#[cfg(test)]
mod tests {
    use proptest::prelude::*;

    use super::*;

    proptest! {
        /// Any two texts: the one comes out of the other exactly.
        #[test]
        fn a_difference_gives_the_text_again(
            old in proptest::collection::vec(0_u8..12, 0..60),
            new in proptest::collection::vec(0_u8..12, 0..60),
            ends in any::<bool>(),
        ) {
            let text = |lines: &[u8]| {
                let mut text: String = lines.iter().map(|l| format!("line {l}\n")).collect();
                if !ends { text.push_str("no end"); }
                text
            };
            let (old, new) = (text(&old), text(&new));
            prop_assert_eq!(apply(&difference(&new, &old), &old), Some(new));
        }
    }

    #[test]
    fn a_changed_line_in_a_long_text_costs_little() {
        let old: String = (0..10_000).map(|k| format!("letter {k}\nrole\n")).collect();
        let new = old.replacen("letter 5000\n", "letter moved\nrole\nput in\n", 1);
        assert!(difference(&new, &old).len() < 200);
    }
}
