//! A vector as a bench reads it: length, slope, azimuth.

use crate::{Angle, Vector, start::circle};

/// Length, slope and azimuth of a vector.
#[derive(Clone, Copy, PartialEq, Debug)]
pub struct Measures {
    /// Its length, in millimetres.
    pub length_mm: f64,
    /// Its slope above the horizontal, -90 to 90 degrees.
    pub slope: Angle,
    /// Its azimuth, from x towards y, from 0 to below 360 degrees; 0 for an upright vector.
    pub azimuth: Angle,
}

impl Measures {
    /// The measures of a vector.
    #[must_use]
    pub fn of(v: Vector) -> Self {
        let run = v.x.hypot(v.y);
        let azimuth = if run > 0.0 { v.y.atan2(v.x).to_degrees() } else { 0.0 };
        Self {
            length_mm: v.length(),
            slope: Angle::from_radians(v.z.atan2(run)),
            // Adding 0 turns -0 into 0; a crumb below 0 would come out as a whole turn.
            azimuth: Angle::from_degrees(if azimuth < 0.0 { azimuth + 360.0 } else { azimuth + 0.0 }),
        }
    }

    /// The vector with these measures.
    #[must_use]
    pub fn vector(&self) -> Vector {
        let (run, rise) = circle::degrees(self.slope.degrees());
        let (cos, sin) = circle::degrees(self.azimuth.degrees());
        Vector::new(run * cos, run * sin, rise) * self.length_mm
    }
}
