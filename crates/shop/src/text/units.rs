//! Measures as text, for reading.

use super::number::{fixed, trimmed};
use super::{MM_PER_INCH, MM2_PER_M2, MM3_PER_M3};

/// The unit of length that a user reads and writes.
#[derive(Clone, Copy, PartialEq, Eq, Debug, Default)]
pub enum Units {
    /// Millimetres.
    #[default]
    Mm,
    /// Inches, with fractions.
    Inch,
}

/// The finest fraction of an inch that is written.
#[derive(Clone, Copy, PartialEq, Eq, Debug, Default)]
pub enum Fraction {
    /// Sixteenths: what a tape measure shows.
    #[default]
    Sixteenth,
    /// Thirty-seconds: what a steel rule shows.
    ThirtySecond,
}

impl Fraction {
    /// How many make an inch.
    #[must_use]
    pub const fn per_inch(self) -> u32 {
        match self {
            Self::Sixteenth => 16,
            Self::ThirtySecond => 32,
        }
    }
}

impl Units {
    /// A length for reading, its unit written: to 0.1 mm, or to the nearest sixteenth of an inch.
    #[must_use]
    pub fn length(self, mm: f64) -> String {
        match self {
            Self::Mm => millimetres(mm, 1),
            Self::Inch => inches(mm, Fraction::Sixteenth),
        }
    }

    /// Two lengths for reading, the longer first, with one unit for both: `700 × 400 mm`.
    #[must_use]
    pub fn sides(self, mm: [f64; 2]) -> String {
        let [long, short] = [mm[0].max(mm[1]), mm[0].min(mm[1])];
        match self {
            Self::Mm => format!("{} × {}", trimmed(long, 1), self.length(short)),
            Self::Inch => format!("{} × {}", self.length(long), self.length(short)),
        }
    }

    /// A length for a field that is typed in: what [`super::parse_length`] with these units reads back, to 0.001 mm or
    /// 0.0001 inch.
    #[must_use]
    pub fn field(self, mm: f64) -> String {
        match self {
            Self::Mm => trimmed(mm, 3),
            Self::Inch => trimmed(mm / MM_PER_INCH, 4),
        }
    }
}

/// A length in millimetres, with at most so many decimals.
#[must_use]
pub fn millimetres(mm: f64, decimals: usize) -> String {
    format!("{} mm", trimmed(mm, decimals))
}

/// A length given in millimetres, in metres to the millimetre.
#[must_use]
pub fn metres(mm: f64) -> String {
    format!("{} m", fixed(mm / 1000.0, 3))
}

/// A length in inches: `11 3/4"`, rounded to the nearest `fraction`, halves away from zero; fractions are reduced.
///
/// From a million feet up the fraction means nothing, and the length is written with a decimal point.
#[must_use]
pub fn inches(mm: f64, fraction: Fraction) -> String {
    let inches = mm / MM_PER_INCH;
    if !inches.is_finite() || inches.abs() > 12e6 {
        return format!("{}\"", trimmed(inches, 1));
    }
    let per = u64::from(fraction.per_inch());
    // Typed halves come back from millimetres a little short: a billionth of a part makes up for that. At most 12e6 * 32,
    // so the conversion to whole parts is exact.
    let parts = (inches.abs() * per as f64 + 1e-9).round() as u64;
    let sign = if inches < 0.0 && parts > 0 { "-" } else { "" };
    let (whole, mut top, mut bottom) = (parts / per, parts % per, per);
    while top != 0 && top.is_multiple_of(2) {
        top /= 2;
        bottom /= 2;
    }
    match (whole, top) {
        (_, 0) => format!("{sign}{whole}\""),
        (0, _) => format!("{sign}{top}/{bottom}\""),
        _ => format!("{sign}{whole} {top}/{bottom}\""),
    }
}

/// An angle given in degrees, with so many decimals, the sign always written out when negative.
#[must_use]
pub fn degrees(degrees: f64, decimals: usize) -> String {
    format!("{}\u{b0}", fixed(degrees, decimals))
}

/// An area given in square millimetres, in square metres to 0.001.
#[must_use]
pub fn square_metres(mm2: f64) -> String {
    format!("{} m\u{b2}", fixed(mm2 / MM2_PER_M2, 3))
}

/// A volume given in cubic millimetres, in cubic metres to 0.001.
#[must_use]
pub fn cubic_metres(mm3: f64) -> String {
    format!("{} m\u{b3}", fixed(mm3 / MM3_PER_M3, 3))
}

/// A mass in kilograms to 0.1.
#[must_use]
pub fn kilograms(kg: f64) -> String {
    format!("{} kg", fixed(kg, 1))
}
