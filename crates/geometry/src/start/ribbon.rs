//! Ribbons wound on a helicoid.

use serde::{Deserialize, Serialize};

use super::FirstWord;
use crate::{Angle, Finding};

/// A ribbon: ribs of equal pitch and length, each turned on from the one before.
#[derive(Clone, PartialEq, Debug, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct RibbonForm {
    /// How many ribs.
    pub ribs: u32,
    /// Turn from rib to rib, about the vertical.
    pub turn: Angle,
    /// Pitch of the ribs, from the horizontal.
    pub pitch: Angle,
    /// Length of the ribs, in millimetres.
    pub edge_mm: f64,
    /// Where the first word runs.
    #[serde(default)]
    pub from: RibbonFrom,
}

/// Where the first word of a ribbon runs.
#[derive(Clone, Copy, PartialEq, Eq, Debug, Default, Serialize, Deserialize)]
#[serde(rename_all = "snake_case")]
pub enum RibbonFrom {
    /// Along its outer edge.
    #[default]
    Edge,
    /// In a zigzag across it.
    Across,
}

impl RibbonForm {
    /// See [`crate::Start::first_word`].
    ///
    /// # Errors
    /// As there.
    pub fn first_word(&self) -> Result<FirstWord, Finding> {
        Err(Finding::new(crate::Code::EmptyWord, crate::Place::Design))
    }
}
