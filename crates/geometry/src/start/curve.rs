//! Curves for translation surfaces, cut into straight parts.

use serde::{Deserialize, Serialize};

use super::{circle, limits};
use crate::{Angle, Code, Finding, Place, Point, Unit, Vector};

/// A curve, cut into straight parts of equal parameter steps, in a vertical plane at an azimuth.
///
/// The parameter is the length along lines, arcs, catenaries and helices, and the length in plan of a sine.
#[derive(Clone, PartialEq, Debug, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct Curve {
    /// What curve.
    pub shape: CurveShape,
    /// How many parts; not used by free points.
    pub parts: u32,
    /// The direction it runs in plan, from x towards y.
    #[serde(default)]
    pub azimuth: Angle,
}

/// What curve. All run from their first point along +x before they are turned to their azimuth; lengths in millimetres.
#[derive(Clone, PartialEq, Debug, Serialize, Deserialize)]
#[serde(rename_all = "snake_case", deny_unknown_fields)]
#[expect(missing_docs, reason = "the fields are named in the sentence above each kind")]
pub enum CurveShape {
    /// A straight line: run in plan and rise.
    Line { run_mm: f64, rise_mm: f64 },
    /// A circular arc over a span; the rise at the middle, negative hangs.
    Arc { span_mm: f64, rise_mm: f64 },
    /// A catenary over a span; the rise at the middle, negative hangs.
    Catenary { span_mm: f64, rise_mm: f64 },
    /// A sine wave along a length.
    Sine {
        length_mm: f64,
        amplitude_mm: f64,
        waves: f64,
    },
    /// A helix about a vertical axis; the first chord starts towards +x.
    Helix { radius_mm: f64, turn: Angle, rise_mm: f64 },
    /// Free points; the first is the curve's beginning.
    Free(Vec<Point>),
}

impl Curve {
    /// The edge vectors of the curve, in order, in millimetres.
    ///
    /// # Errors
    /// When a parameter cannot be used: its name, its value and its limit; or when a part has no length.
    pub fn edges(&self) -> Result<Vec<Vector>, Finding> {
        let azimuth = limits::finite("azimuth", self.azimuth.degrees())?;
        let (cos, sin) = circle::degrees(azimuth);
        let mut edges = self.edges_along_x()?;
        for edge in &mut edges {
            *edge = Vector::new(cos * edge.x - sin * edge.y, sin * edge.x + cos * edge.y, edge.z);
            let length = edge.length();
            if length < limits::MIN_LENGTH_MM {
                return Err(Finding::new(Code::ZeroVector, Place::Parameter("shape")));
            }
            limits::length("shape", length)?;
        }
        Ok(edges)
    }

    /// Whether all its parts are equal and count as one zone.
    #[must_use]
    pub const fn is_straight(&self) -> bool {
        matches!(self.shape, CurveShape::Line { .. })
    }

    fn edges_along_x(&self) -> Result<Vec<Vector>, Finding> {
        if let CurveShape::Free(points) = &self.shape {
            return free(points);
        }
        limits::count("parts", self.parts, 1, limits::MAX_PARTS)?;
        match self.shape {
            CurveShape::Line { run_mm, rise_mm } => {
                limits::length_or_zero("run_mm", run_mm)?;
                limits::signed_length("rise_mm", rise_mm)?;
                let part = Vector::new(run_mm, 0.0, rise_mm) / f64::from(self.parts);
                Ok(vec![part; self.parts as usize])
            }
            CurveShape::Arc { span_mm, rise_mm } => {
                limits::length("span_mm", span_mm)?;
                limits::signed_length("rise_mm", rise_mm)?;
                Ok(arc(span_mm, rise_mm, self.parts))
            }
            CurveShape::Catenary { span_mm, rise_mm } => {
                limits::length("span_mm", span_mm)?;
                limits::signed_length("rise_mm", rise_mm)?;
                Ok(catenary(span_mm, rise_mm, self.parts))
            }
            CurveShape::Sine {
                length_mm,
                amplitude_mm,
                waves,
            } => {
                limits::length("length_mm", length_mm)?;
                limits::signed_length("amplitude_mm", amplitude_mm)?;
                limits::within("waves", waves, -limits::MAX_TURNS, limits::MAX_TURNS, Unit::Count)?;
                Ok(chords(self.parts, |part| {
                    Vector::new(
                        length_mm * part,
                        0.0,
                        amplitude_mm * circle::degrees(360.0 * waves * part).1,
                    )
                }))
            }
            CurveShape::Helix {
                radius_mm,
                turn,
                rise_mm,
            } => {
                limits::length("radius_mm", radius_mm)?;
                limits::signed_length("rise_mm", rise_mm)?;
                helix(radius_mm, turn, rise_mm, self.parts)
            }
            CurveShape::Free(_) => Ok(Vec::new()),
        }
    }
}

/// The chords between points at equal steps of a parameter from 0 to 1.
fn chords(parts: u32, at: impl Fn(f64) -> Vector) -> Vec<Vector> {
    let mut before = at(0.0);
    (1..=parts)
        .map(|k| {
            let next = at(f64::from(k) / f64::from(parts));
            let chord = next - before;
            before = next;
            chord
        })
        .collect()
}

/// Chords of a circular arc, from their common length and their slopes; nothing cancels, however flat the arc is.
///
/// Half the arc's angle is `2 atan(2 rise / span)`; beyond a half circle the rise is more than half the span.
fn arc(span: f64, rise: f64, parts: u32) -> Vec<Vector> {
    let n = f64::from(parts);
    let half = 2.0 * (2.0 * rise.abs()).atan2(span);
    let chord = if half == 0.0 {
        span / n
    } else if 2.0 * rise.abs() <= span {
        span * ((half / n).sin() / half.sin())
    } else {
        let radius = rise.abs() / 2.0 + span * (span / (8.0 * rise.abs()));
        2.0 * radius * (half / n).sin()
    };
    (0..parts)
        .map(|k| {
            let slope = half * (1.0 - (2.0 * f64::from(k) + 1.0) / n);
            Vector::new(chord * slope.cos(), 0.0, chord * slope.sin().copysign(rise * slope))
        })
        .collect()
}

/// Chords of a catenary, its points at equal lengths along it.
///
/// With a the catenary's parameter and `u = span / 2 a`, the rise is `a (cosh u - 1)`. A point at the part tau of half the length, from -1 to 1,
/// is at `a asinh(tau sinh u)` from the middle.
fn catenary(span: f64, rise: f64, parts: u32) -> Vec<Vector> {
    let u = catenary_parameter(2.0 * rise.abs() / span);
    chords(parts, |part| {
        let tau = 2.0 * part - 1.0;
        // Below this the catenary is a parabola to the last digit.
        if u < 1e-9 {
            return Vector::new(span * part, 0.0, rise * (1.0 - tau * tau));
        }
        let (sinh, cosh) = (u.sinh(), u.cosh());
        let x = f64::midpoint(span, span * ((tau * sinh).asinh() / u));
        let z = rise * (1.0 - tau * tau) * ((cosh + 1.0) / (cosh + (1.0 + (tau * sinh).powi(2)).sqrt()));
        Vector::new(x, 0.0, z)
    })
}

/// Solves `(cosh u - 1) / u = ratio` for u, where ratio is the rise over half the span.
///
/// The left side grows with u and is at least u / 2, so u lies between 0 and twice the ratio. Halving needs no start value and
/// cannot run away; it ends when no number is left between the two ends.
fn catenary_parameter(ratio: f64) -> f64 {
    let (mut low, mut high) = (0.0, 2.0 * ratio);
    loop {
        let middle = f64::midpoint(low, high);
        if middle <= low || middle >= high {
            return middle;
        }
        let half_sinh = (middle / 2.0).sinh();
        if 2.0 * half_sinh * (half_sinh / middle) < ratio {
            low = middle;
        } else {
            high = middle;
        }
    }
}

/// Chords of a helix; each is turned on from the one before by the turn of a part.
fn helix(radius: f64, turn: Angle, rise: f64, parts: u32) -> Result<Vec<Vector>, Finding> {
    let n = f64::from(parts);
    let degrees = limits::finite("turn", turn.degrees())?;
    let most = 360.0 * limits::MAX_TURNS;
    limits::within("turn", degrees, -most, most, Unit::Degrees)?;
    // A chord that goes more than half round no longer shows the helix.
    limits::within("turn", degrees, -180.0 * n, 180.0 * n, Unit::Degrees)?;
    let step = degrees / n;
    let run = 2.0 * radius * (step.abs() / 2.0).to_radians().sin();
    Ok((0..parts)
        .map(|k| {
            let (cos, sin) = circle::degrees(step * f64::from(k));
            Vector::new(run * cos, run * sin, rise / n)
        })
        .collect())
}

fn free(points: &[Point]) -> Result<Vec<Vector>, Finding> {
    limits::letter_count("free", points.len().saturating_sub(1))?;
    for part in points.iter().flat_map(|point| point.to_array()) {
        limits::signed_length("free", part)?;
    }
    Ok(points.windows(2).map(|pair| pair[1] - pair[0]).collect())
}
