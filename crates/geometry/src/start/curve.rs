//! Curves for translation surfaces, cut into straight parts.

use serde::{Deserialize, Serialize};

use crate::{Angle, Finding, Point, Vector};

/// A curve, cut into straight parts of equal parameter steps, in a vertical plane at an azimuth.
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
    /// When a parameter cannot be used.
    pub fn edges(&self) -> Result<Vec<Vector>, Finding> {
        Err(Finding::new(crate::Code::EmptyWord, crate::Place::Design))
    }
}
