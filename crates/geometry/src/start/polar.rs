//! Polar forms: ribs round a pole.

use serde::{Deserialize, Serialize};

use super::FirstWord;
use crate::{Angle, Finding};

/// Closed: `-g_i` zig, `g_{i+1}` zag for n ribs; rib 0 at azimuth 0, crown up, lowest vertex at z = 0.
#[derive(Clone, PartialEq, Debug, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct PolarForm {
    /// n.
    pub ribs: u32,
    /// The two measures that fix the ribs.
    pub by: PolarBy,
}

/// Two of pitch, edge, width and height. The pitch is measured from the horizontal. The width is the true size of the whole form
/// in plan along rib 0; the height is that of the whole form from pole to pole.
#[derive(Clone, Copy, PartialEq, Debug, Serialize, Deserialize)]
#[serde(rename_all = "snake_case", deny_unknown_fields)]
#[expect(missing_docs, reason = "the fields are named in the sentence above")]
pub enum PolarBy {
    PitchEdge { pitch: Angle, edge_mm: f64 },
    PitchWidth { pitch: Angle, width_mm: f64 },
    PitchHeight { pitch: Angle, height_mm: f64 },
    EdgeWidth { edge_mm: f64, width_mm: f64 },
    EdgeHeight { edge_mm: f64, height_mm: f64 },
    WidthHeight { width_mm: f64, height_mm: f64 },
}

impl PolarForm {
    /// See [`crate::Start::first_word`].
    ///
    /// # Errors
    /// As there.
    pub fn first_word(&self) -> Result<FirstWord, Finding> {
        Err(Finding::new(crate::Code::EmptyWord, crate::Place::Design))
    }
}
