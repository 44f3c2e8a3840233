//! What is wrong with a grown shell: crossings, doubled panels, near misses.
//!
//! Growing does not do this; it follows when the shell is still.

use crate::{Finding, Shell, Tolerances};

/// Two panels that pass through each other.
#[derive(Clone, Copy, PartialEq, Eq, PartialOrd, Ord, Debug)]
pub struct Crossing {
    /// The two panels, the lower index first.
    pub panels: [u32; 2],
    /// Whether they share a corner.
    pub shares_corner: bool,
}

/// Two rim edges, or rim vertices, that nearly meet.
#[derive(Clone, Copy, PartialEq, Debug)]
pub struct NearMiss {
    /// The two rim vertices.
    pub vertices: [u32; 2],
    /// Their distance, in millimetres.
    pub gap_mm: f64,
}

/// All that an inspection finds.
#[derive(Clone, PartialEq, Debug, Default)]
pub struct Inspection {
    /// Panels that pass through each other, sorted.
    pub crossings: Vec<Crossing>,
    /// Panels that lie on the same place, in pairs, sorted. They are not counted as crossings.
    pub doubled: Vec<[u32; 2]>,
    /// Rims that nearly meet, sorted.
    pub near_misses: Vec<NearMiss>,
}

/// Inspects a shell.
#[must_use]
pub fn inspect(shell: &Shell, tolerances: &Tolerances) -> Inspection {
    let _ = (shell, tolerances);
    Inspection::default()
}

impl Inspection {
    /// The findings of this inspection.
    #[must_use]
    pub fn findings(&self, tolerances: &Tolerances) -> Vec<Finding> {
        let _ = tolerances;
        Vec::new()
    }
}
