//! The limits that every start holds its parameters against.
//!
//! They keep a hostile file from asking for more memory than a machine has, and a typing slip from growing
//! something that no workshop can make. The window takes the ends of its sliders from here.

use crate::{Angle, Code, Finding, Place, Unit};

/// The fewest ribs or sides that go round an axis.
pub const MIN_RIBS: u32 = 3;

/// The most ribs, sides or axes. A polar form of so many ribs has 4 million panels, more than are grown.
pub const MAX_RIBS: u32 = 2000;

/// The most parts of a curve.
pub const MAX_PARTS: u32 = 10_000;

/// The most letters of a path that is given letter by letter; two curves of the most parts have as many.
pub const MAX_LETTERS: u32 = 20_000;

/// The shortest length of an edge, in millimetres: far below what can be made, far above where products vanish.
pub const MIN_LENGTH_MM: f64 = 1e-6;

/// The greatest length and coordinate, in millimetres: 10 km.
pub const MAX_LENGTH_MM: f64 = 1e7;

/// The most turns of a helix, and the most waves of a sine.
pub const MAX_TURNS: f64 = 1000.0;

/// The most golden steps up or down.
pub const MAX_GOLDEN_STEPS: i32 = 40;

/// Refuses what is not a finite number.
pub(super) fn finite(name: &'static str, value: f64) -> Result<f64, Finding> {
    if value.is_finite() {
        Ok(value)
    } else {
        Err(Finding::new(Code::NotFinite, Place::Parameter(name)))
    }
}

/// Refuses a number outside `min..=max`, both allowed.
pub(crate) fn within(name: &'static str, value: f64, min: f64, max: f64, unit: Unit) -> Result<f64, Finding> {
    finite(name, value)?;
    if value < min {
        Err(Finding::parameter(name, value, min, unit))
    } else if value > max {
        Err(Finding::parameter(name, value, max, unit))
    } else {
        Ok(value)
    }
}

/// Refuses a count outside `min..=max`, both allowed.
pub(super) fn count(name: &'static str, value: u32, min: u32, max: u32) -> Result<u32, Finding> {
    within(name, f64::from(value), f64::from(min), f64::from(max), Unit::Count).map(|_| value)
}

/// Refuses a number of letters that is 0 or more than [`MAX_LETTERS`].
pub(super) fn letter_count(name: &'static str, letters: usize) -> Result<u32, Finding> {
    if letters == 0 {
        return Err(Finding::new(Code::EmptyWord, Place::Parameter(name)));
    }
    count(name, u32::try_from(letters).unwrap_or(u32::MAX), 1, MAX_LETTERS)
}

/// Refuses a length that no edge can have, in millimetres.
pub(crate) fn length(name: &'static str, value: f64) -> Result<f64, Finding> {
    within(name, value, MIN_LENGTH_MM, MAX_LENGTH_MM, Unit::Millimetres)
}

/// Refuses a length below 0 or above the greatest, in millimetres.
pub(super) fn length_or_zero(name: &'static str, value: f64) -> Result<f64, Finding> {
    within(name, value, 0.0, MAX_LENGTH_MM, Unit::Millimetres)
}

/// Refuses a rise or fall beyond the greatest length, in millimetres.
pub(crate) fn signed_length(name: &'static str, value: f64) -> Result<f64, Finding> {
    within(name, value, -MAX_LENGTH_MM, MAX_LENGTH_MM, Unit::Millimetres)
}

/// Refuses a pitch that is not between level and upright, both refused.
pub(super) fn pitch(name: &'static str, value: Angle) -> Result<Angle, Finding> {
    within(name, value.degrees(), 0.0, 90.0, Unit::Degrees)?;
    for end in [0.0, 90.0] {
        if value.degrees() == end {
            return Err(Finding::parameter(name, end, end, Unit::Degrees));
        }
    }
    Ok(value)
}
