//! Translation surfaces: a path moved along a path.

use serde::{Deserialize, Serialize};

use super::{FirstWord, Role, StartLetter, StartZone};
use crate::{Finding, Point, Sign};

/// A path as zigs, then a path as zags.
#[derive(Clone, PartialEq, Debug, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct TranslationForm {
    /// The first path.
    pub zig: super::Curve,
    /// The second path.
    pub zag: super::Curve,
}

impl TranslationForm {
    /// See [`crate::Start::first_word`].
    ///
    /// Open, beginning at the origin. Letter k is part k of the zig curve, then of the zag curve. All parts of a straight line are one zone, every
    /// other part is a zone of its own; zones are counted in the order of the letters.
    ///
    /// # Errors
    /// As there.
    pub fn first_word(&self) -> Result<FirstWord, Finding> {
        let mut word = FirstWord {
            origin: Point::ORIGIN,
            closed: false,
            zones: Vec::new(),
            letters: Vec::new(),
            grounded: true,
            on_hull: false,
        };
        let (mut index, mut zones) = (0, 0);
        for (curve, role) in [(&self.zig, Role::Zig), (&self.zag, Role::Zag)] {
            for (part, vector) in curve.edges()?.into_iter().enumerate() {
                if part == 0 || !curve.is_straight() {
                    word.zones.push(StartZone {
                        id: zones,
                        vector,
                        derived: true,
                    });
                    zones += 1;
                }
                word.letters.push(StartLetter {
                    index,
                    zone: zones - 1,
                    sign: Sign::Plus,
                    role,
                });
                index += 1;
            }
        }
        Ok(word)
    }
}
