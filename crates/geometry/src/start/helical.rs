//! Helical solids: ribs from pole to pole.

use serde::{Deserialize, Serialize};

use super::FirstWord;
use crate::{Angle, Finding};

/// n ribs from pole to pole; the first r letters are zig, the rest zag.
#[derive(Clone, PartialEq, Debug, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct HelicalForm {
    /// n.
    pub ribs: u32,
    /// r: how many letters are zig.
    pub turn: u32,
    /// Pitch of the ribs, from the horizontal.
    pub pitch: Angle,
    /// Length of the ribs, in millimetres.
    pub edge_mm: f64,
}

impl HelicalForm {
    /// See [`crate::Start::first_word`].
    ///
    /// # Errors
    /// As there.
    pub fn first_word(&self) -> Result<FirstWord, Finding> {
        Err(Finding::new(crate::Code::EmptyWord, crate::Place::Design))
    }
}
