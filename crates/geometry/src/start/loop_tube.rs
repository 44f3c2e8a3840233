//! Loops: a regular tube, each of its points movable.

use serde::{Deserialize, Serialize};

use super::FirstWord;
use crate::{Finding, Vector};

/// A closed zigzag between a lower and an upper ring of points.
#[derive(Clone, PartialEq, Debug, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct LoopForm {
    /// How many points each ring has.
    pub sides: u32,
    /// Radius of both rings, in millimetres.
    pub radius_mm: f64,
    /// Height of the upper ring above the lower, in millimetres.
    pub rise_mm: f64,
    /// Points moved from their regular place: the node's number along the zigzag, and by how much, in millimetres.
    #[serde(default, skip_serializing_if = "Vec::is_empty")]
    pub moved: Vec<(u32, Vector)>,
}

impl LoopForm {
    /// See [`crate::Start::first_word`].
    ///
    /// # Errors
    /// As there.
    pub fn first_word(&self) -> Result<FirstWord, Finding> {
        Err(Finding::new(crate::Code::EmptyWord, crate::Place::Design))
    }
}
