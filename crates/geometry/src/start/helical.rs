//! Helical solids: ribs from pole to pole.

use serde::{Deserialize, Serialize};

use super::{FirstWord, Role, StartLetter, StartZone, circle, limits};
use crate::{Angle, Finding, Point, Sign, Vector};

/// n ribs from pole to pole; the first r letters are zig, the rest zag.
#[derive(Clone, PartialEq, Debug, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct HelicalForm {
    /// n.
    pub ribs: u32,
    /// r: how many letters are zig.
    pub turn: u32,
    /// Pitch of the ribs, from the horizontal.
    pub pitch: Angle,
    /// Length of the ribs, in millimetres.
    pub edge_mm: f64,
}

impl HelicalForm {
    /// See [`crate::Start::first_word`].
    ///
    /// Open, from the lower pole at 0 up to the upper pole straight above it. Letter i and zone i are rib i, at azimuth i / n of a full turn.
    ///
    /// # Errors
    /// As there.
    pub fn first_word(&self) -> Result<FirstWord, Finding> {
        limits::count("ribs", self.ribs, limits::MIN_RIBS, limits::MAX_RIBS)?;
        limits::count("turn", self.turn, 1, self.ribs - 1)?;
        let (level, up) = circle::degrees(limits::pitch("pitch", self.pitch)?.degrees());
        let edge = limits::length("edge_mm", self.edge_mm)?;
        let zones = (0..self.ribs)
            .map(|i| {
                let (cos, sin) = circle::part_of_turn(i64::from(i), self.ribs);
                StartZone {
                    id: i,
                    vector: Vector::new(level * cos, level * sin, up) * edge,
                    derived: true,
                }
            })
            .collect();
        let letters = (0..self.ribs)
            .map(|i| StartLetter {
                index: i,
                zone: i,
                sign: Sign::Plus,
                role: if i < self.turn { Role::Zig } else { Role::Zag },
            })
            .collect();
        Ok(FirstWord {
            origin: Point::ORIGIN,
            closed: false,
            zones,
            letters,
            grounded: false,
            on_hull: false,
        })
    }
}
