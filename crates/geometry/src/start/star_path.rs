//! Paths along the directions of a star.

use serde::{Deserialize, Serialize};

use super::FirstWord;
use crate::Finding;

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

impl StarPath {
    /// See [`crate::Start::first_word`].
    ///
    /// # Errors
    /// As there.
    pub fn first_word(&self) -> Result<FirstWord, Finding> {
        Err(Finding::new(crate::Code::EmptyWord, crate::Place::Design))
    }
}
