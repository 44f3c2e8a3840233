//! Paths along the directions of a star.

use std::collections::BTreeMap;

use serde::{Deserialize, Serialize};

use super::{FirstWord, Role, StartLetter, StartZone, limits};
use crate::{Finding, Point, Sign, Unit};

/// A path whose letters are directions of a star; zig, zag, zig, zag ...
#[derive(Clone, PartialEq, Debug, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct StarPath {
    /// The star.
    pub star: super::Star,
    /// The length of golden step 0, in millimetres.
    pub unit_mm: f64,
    /// Whether the path is meant to close.
    #[serde(default)]
    pub closed: bool,
    /// The letters.
    pub letters: Vec<StarLetter>,
}

/// A letter of a star path.
#[derive(Clone, Copy, PartialEq, Debug, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct StarLetter {
    /// The axis, counted from 0 in the order of [`super::Star::directions`].
    pub axis: u32,
    /// Which way along it.
    pub sign: crate::Sign,
    /// How far.
    pub length: StarLength,
}

/// The length of a letter of a star path.
#[derive(Clone, Copy, PartialEq, Debug, Serialize, Deserialize)]
#[serde(rename_all = "snake_case")]
pub enum StarLength {
    /// In millimetres.
    Mm(f64),
    /// The unit times the golden ratio to this power.
    Golden(i32),
}

impl StarLength {
    /// The length in millimetres, where golden step 0 is `unit_mm`.
    ///
    /// # Errors
    /// When it is outside the limits of an edge, or more than [`limits::MAX_GOLDEN_STEPS`] up or down.
    pub fn mm(self, unit_mm: f64) -> Result<f64, Finding> {
        let length = match self {
            Self::Mm(length) => length,
            Self::Golden(steps) => {
                let most = f64::from(limits::MAX_GOLDEN_STEPS);
                limits::within("golden", f64::from(steps), -most, most, Unit::Count)?;
                unit_mm * core::f64::consts::GOLDEN_RATIO.powi(steps)
            }
        };
        limits::length("length", length)
    }
}

impl StarPath {
    /// See [`crate::Start::first_word`].
    ///
    /// The word begins at the origin, roles alternate from zig. Letters of one axis and the same stated length are one zone, which runs as
    /// the first of them; zones are counted in the order in which they first come.
    ///
    /// # Errors
    /// As there.
    pub fn first_word(&self) -> Result<FirstWord, Finding> {
        let axes = self.star.directions()?;
        limits::length("unit_mm", self.unit_mm)?;
        let count = limits::letter_count("letters", self.letters.len())?;
        let last_axis = u32::try_from(axes.len() - 1).unwrap_or(u32::MAX);
        let mut seen: BTreeMap<(u32, LengthKey), (u32, Sign)> = BTreeMap::new();
        let mut zones = Vec::new();
        let mut letters = Vec::with_capacity(self.letters.len());
        for (index, letter) in (0..count).zip(&self.letters) {
            limits::count("axis", letter.axis, 0, last_axis)?;
            let length = letter.length.mm(self.unit_mm)?;
            let next = u32::try_from(zones.len()).unwrap_or(u32::MAX);
            let key = (letter.axis, letter.length.key());
            let &mut (zone, along) = seen.entry(key).or_insert((next, letter.sign));
            if zone == next {
                zones.push(StartZone {
                    id: zone,
                    vector: axes[letter.axis as usize] * (length * along.factor()),
                    derived: true,
                });
            }
            letters.push(StartLetter {
                index,
                zone,
                sign: if letter.sign == along { Sign::Plus } else { Sign::Minus },
                role: if index % 2 == 0 { Role::Zig } else { Role::Zag },
            });
        }
        Ok(FirstWord {
            origin: Point::ORIGIN,
            closed: self.closed,
            zones,
            letters,
            grounded: false,
            on_hull: false,
        })
    }
}

/// A stated length as something that can be looked up: golden steps, or the bits of the millimetres.
type LengthKey = (Option<i32>, u64);

impl StarLength {
    fn key(self) -> LengthKey {
        match self {
            Self::Mm(length) => (None, length.to_bits()),
            Self::Golden(steps) => (Some(steps), 0),
        }
    }
}
