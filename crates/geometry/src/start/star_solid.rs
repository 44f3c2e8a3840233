//! Star solids: the convex solid of a star.

use serde::{Deserialize, Serialize};

use super::FirstWord;
use crate::Finding;

/// The convex zonohedron of a star, all edges of one length.
#[derive(Clone, PartialEq, Debug, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct StarSolid {
    /// The star.
    pub star: super::Star,
    /// Length of the edges, in millimetres.
    pub edge_mm: f64,
}

impl StarSolid {
    /// See [`crate::Start::first_word`].
    ///
    /// # Errors
    /// As there.
    pub fn first_word(&self) -> Result<FirstWord, Finding> {
        Err(Finding::new(crate::Code::EmptyWord, crate::Place::Design))
    }
}
