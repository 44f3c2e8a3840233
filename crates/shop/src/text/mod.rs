//! The one place where numbers become text and text becomes numbers.
//!
//! Nothing here asks for the locale: the decimal sign is a point, there is no grouping, and zero has no sign.

mod number;
mod parse;
mod units;

pub use number::{count, exact, fixed, trimmed};
pub(crate) use number::{digits_of, push_count};
pub use parse::{ParseError, parse_angle, parse_length};
pub use units::{Fraction, Units, cubic_metres, degrees, inches, kilograms, metres, millimetres, square_metres};

/// Millimetres in an inch (exact by definition, 1959).
pub const MM_PER_INCH: f64 = 25.4;
/// Millimetres in a foot.
pub const MM_PER_FOOT: f64 = 12.0 * MM_PER_INCH;
/// Square millimetres in a square metre.
pub const MM2_PER_M2: f64 = 1e6;
/// Cubic millimetres in a cubic metre.
pub const MM3_PER_M3: f64 = 1e9;

/// Decimals of a length in millimetres in a list: a thousandth, far below what a saw can do.
pub const MM_DECIMALS: usize = 3;
/// Decimals of an angle in degrees in a list: on a leg of 3 m the last digit is worth 0.005 mm.
pub const DEG_DECIMALS: usize = 4;
/// Decimals of an area in square metres in a list: one square millimetre.
pub const M2_DECIMALS: usize = 6;

#[cfg(test)]
mod tests;
