//! The parameters of a shape as data: every number of the record that can be turned, under a text key.
//!
//! A key names its number by what it belongs to, never by where it is listed: `start.pitch`, `step.3.courses` (step number 3),
//! `zone.start.2.length`, `placement.scale`. Whoever shows, animates or solves for parameters needs to know nothing of the kinds of start.
//!
//! Units: millimetres, degrees (as the record keeps angles), plain factors, counts.

mod of_curve;
mod of_rest;
mod of_start;
#[cfg(test)]
mod tests;
mod walk;

use walk::Walk;

use crate::{Code, Finding, Place, Shape, Unit};

/// What a parameter's number is.
#[derive(Clone, Copy, PartialEq, Eq, PartialOrd, Ord, Hash, Debug)]
pub enum ParameterKind {
    /// A length or a coordinate, in millimetres.
    Length,
    /// An angle, in degrees.
    Angle,
    /// A plain number without a unit.
    Factor,
    /// A whole number.
    Count,
}

impl ParameterKind {
    /// The unit that a finding about such a number has.
    #[must_use]
    pub const fn unit(self) -> Unit {
        match self {
            Self::Length => Unit::Millimetres,
            Self::Angle => Unit::Degrees,
            Self::Factor | Self::Count => Unit::Count,
        }
    }
}

/// A number of the record.
#[derive(Clone, PartialEq, Debug)]
pub struct Parameter {
    /// Its key.
    pub key: String,
    /// Its plain name. Points, letters, directions and zones are counted from 1 in it, and from 0 in the key, as in the record.
    pub name: String,
    /// What its number is.
    pub kind: ParameterKind,
    /// The number, in the unit of its kind.
    pub value: f64,
    /// The least and the greatest number that it takes. Other parameters may narrow what grows further; [`crate::grow()`] then says so.
    pub bounds: [f64; 2],
}

/// All parameters of a shape: the start's, the steps' in their order, the zone rules', the placement's.
#[must_use]
pub fn parameters(shape: &Shape) -> Vec<Parameter> {
    let mut shape = shape.clone();
    let mut walk = Walk::listing();
    walk.shape(&mut shape);
    walk.listed()
}

/// The parameter with this key.
#[must_use]
pub fn parameter(shape: &Shape, key: &str) -> Option<Parameter> {
    let mut shape = shape.clone();
    let mut walk = Walk::listing_only(key);
    walk.shape(&mut shape);
    walk.listed().pop()
}

/// The same shape with one parameter set to a value, in the unit of its kind.
///
/// Setting a point of a free path turns the edges on both sides of it; edges linked to those follow, or leave their zone, as when the point is dragged.
///
/// # Errors
/// [`Code::NoSuchParameter`] when no parameter has this key; [`Code::NotFinite`]; [`Code::ParameterLimit`] with the value and the limit when it is
/// outside its bounds or, for a count, not whole; and what moving a point may say.
pub fn set_parameter(shape: &Shape, key: &str, value: f64) -> Result<Shape, Finding> {
    let mut changed = shape.clone();
    set_parameter_in(&mut changed, key, value)?;
    Ok(changed)
}

/// Sets one parameter in place; see [`set_parameter`]. When it cannot be set, the shape stays as it is.
///
/// # Errors
/// As there.
pub fn set_parameter_in(shape: &mut Shape, key: &str, value: f64) -> Result<(), Finding> {
    let mut walk = Walk::setting(key, value);
    walk.shape(shape);
    walk.was_set()
        .unwrap_or_else(|| Err(Finding::new(Code::NoSuchParameter, Place::Design)))
}
