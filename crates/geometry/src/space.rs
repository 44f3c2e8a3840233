//! Points, vectors and angles, told apart.
//!
//! Lengths are millimetres, the frame is right-handed with z up.

use core::ops::{Add, AddAssign, Sub};

use glam::DVec3;
use serde::{Deserialize, Serialize};

/// A free vector, in millimetres.
pub type Vector = DVec3;

/// A place in space, in millimetres from the origin.
///
/// Points differ by [`Vector`]s; two points cannot be added.
#[derive(Clone, Copy, PartialEq, Debug, Default, Serialize, Deserialize)]
#[serde(transparent)]
pub struct Point(pub Vector);

impl Point {
    /// The origin of the design's frame.
    pub const ORIGIN: Self = Self(Vector::ZERO);

    /// A point from its three coordinates in millimetres.
    #[must_use]
    pub const fn new(x: f64, y: f64, z: f64) -> Self {
        Self(Vector::new(x, y, z))
    }

    /// Distance to another point, in millimetres.
    #[must_use]
    pub fn distance(self, other: Self) -> f64 {
        self.0.distance(other.0)
    }

    /// Whether all three coordinates are finite.
    #[must_use]
    pub fn is_finite(self) -> bool {
        self.0.is_finite()
    }

    /// The three coordinates in millimetres.
    #[must_use]
    pub const fn to_array(self) -> [f64; 3] {
        self.0.to_array()
    }
}

impl Add<Vector> for Point {
    type Output = Self;
    fn add(self, by: Vector) -> Self {
        Self(self.0 + by)
    }
}

impl AddAssign<Vector> for Point {
    fn add_assign(&mut self, by: Vector) {
        self.0 += by;
    }
}

impl Sub<Vector> for Point {
    type Output = Self;
    fn sub(self, by: Vector) -> Self {
        Self(self.0 - by)
    }
}

impl Sub for Point {
    type Output = Vector;
    fn sub(self, from: Self) -> Vector {
        self.0 - from.0
    }
}

/// An angle of the record.
///
/// It is kept in degrees, exactly as it was typed, so that a design file written and read again holds the
/// same bits; everything that computes asks for [`Angle::radians`].
#[derive(Clone, Copy, PartialEq, PartialOrd, Debug, Default, Serialize, Deserialize)]
#[serde(transparent)]
pub struct Angle(f64);

impl Angle {
    /// An angle from degrees.
    #[must_use]
    pub const fn from_degrees(degrees: f64) -> Self {
        Self(degrees)
    }

    /// An angle from radians.
    #[must_use]
    pub fn from_radians(radians: f64) -> Self {
        Self(radians.to_degrees())
    }

    /// The angle in degrees.
    #[must_use]
    pub const fn degrees(self) -> f64 {
        self.0
    }

    /// The angle in radians.
    #[must_use]
    pub fn radians(self) -> f64 {
        self.0.to_radians()
    }
}
