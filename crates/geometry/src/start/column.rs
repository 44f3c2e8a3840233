//! Columns: a closed front that climbs.

use serde::{Deserialize, Serialize};

use super::FirstWord;
use crate::Finding;

/// A closed front of `-h_i` zig, `g_{i+1}` zag. All rise alike; g runs `zag_run_mm` and turns a full turn / n a rib, h runs `zig_run_mm` and turns `turn` times that.
#[derive(Clone, PartialEq, Debug, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct ColumnForm {
    /// n: how many zigs, and how many zags.
    pub ribs: u32,
    /// Horizontal run of the zags, in millimetres.
    pub zag_run_mm: f64,
    /// Horizontal run of the zigs, in millimetres.
    pub zig_run_mm: f64,
    /// Rise of each, in millimetres.
    pub rise_mm: f64,
    /// How many times round the zigs turn while the zags turn once; 1 oscillates, others spiral. Not 0.
    pub turn: i32,
}

impl ColumnForm {
    /// See [`crate::Start::first_word`].
    ///
    /// # Errors
    /// As there.
    pub fn first_word(&self) -> Result<FirstWord, Finding> {
        Err(Finding::new(crate::Code::EmptyWord, crate::Place::Design))
    }
}
