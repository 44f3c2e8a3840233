//! Translation surfaces: a path moved along a path.

use serde::{Deserialize, Serialize};

use super::FirstWord;
use crate::Finding;

/// A path as zigs, then a path as zags.
#[derive(Clone, PartialEq, Debug, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct TranslationForm {
    /// The first path.
    pub zig: super::Curve,
    /// The second path.
    pub zag: super::Curve,
}

impl TranslationForm {
    /// See [`crate::Start::first_word`].
    ///
    /// # Errors
    /// As there.
    pub fn first_word(&self) -> Result<FirstWord, Finding> {
        Err(Finding::new(crate::Code::EmptyWord, crate::Place::Design))
    }
}
