//! Ribbons wound on a helicoid.

use serde::{Deserialize, Serialize};

use super::{FirstWord, Role, StartLetter, StartZone, circle, limits};
use crate::{Angle, Finding, Point, Sign, Unit, Vector};

/// A ribbon: ribs of equal pitch and length, each turned on from the one before.
#[derive(Clone, PartialEq, Debug, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct RibbonForm {
    /// How many ribs.
    pub ribs: u32,
    /// Turn from rib to rib, about the vertical.
    pub turn: Angle,
    /// Pitch of the ribs, from the horizontal.
    pub pitch: Angle,
    /// Length of the ribs, in millimetres.
    pub edge_mm: f64,
    /// Where the first word runs.
    #[serde(default)]
    pub from: RibbonFrom,
}

/// Where the first word of a ribbon runs.
#[derive(Clone, Copy, PartialEq, Eq, Debug, Default, Serialize, Deserialize)]
#[serde(rename_all = "snake_case")]
pub enum RibbonFrom {
    /// Along its outer edge.
    #[default]
    Edge,
    /// In a zigzag across it.
    Across,
}

impl RibbonForm {
    /// See [`crate::Start::first_word`].
    ///
    /// With `P_i` the sum of the ribs before rib i, the points of the ribbon are the sums `P_i + P_j`; they lie on a right helicoid, the points
    /// with i = j on its outer edge (a helix sliding on itself). The word begins at the origin. From the edge each rib comes twice,
    /// as zag and as zig, and an open V leads from `P_i + P_i` inwards. Across, the word begins on the edge at the middle rib m and goes
    /// inwards: rib m on as zag, rib m - 1 back as zig, rib m + 1 on, rib m - 2 back; filling an open V climbs along the helicoid.
    /// Zone j is rib j, or on the way across, for the ribs that run back, its opposite, so that every zone has a letter along it.
    ///
    /// # Errors
    /// As there.
    pub fn first_word(&self) -> Result<FirstWord, Finding> {
        self.check()?;
        let (level, up) = circle::degrees(self.pitch.degrees());
        // Across, the ribs below the middle run back.
        let middle = match self.from {
            RibbonFrom::Edge => 0,
            RibbonFrom::Across => self.ribs / 2,
        };
        let zones = (0..self.ribs)
            .map(|j| {
                let (cos, sin) = circle::degrees(self.turn.degrees() * f64::from(j));
                let rib = Vector::new(level * cos, level * sin, up) * self.edge_mm;
                StartZone {
                    id: j,
                    vector: if j < middle { -rib } else { rib },
                    derived: true,
                }
            })
            .collect();
        let count = match self.from {
            RibbonFrom::Edge => 2 * self.ribs,
            RibbonFrom::Across => self.ribs,
        };
        let letters = (0..count)
            .map(|k| StartLetter {
                index: k,
                zone: match self.from {
                    RibbonFrom::Edge => k / 2,
                    RibbonFrom::Across if k % 2 == 0 => middle + k / 2,
                    RibbonFrom::Across => middle - 1 - k / 2,
                },
                sign: Sign::Plus,
                role: if k % 2 == 0 { Role::Zag } else { Role::Zig },
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

    fn check(&self) -> Result<(), Finding> {
        // Two ribs make the first panel.
        limits::count("ribs", self.ribs, 2, limits::MAX_RIBS)?;
        let turn = limits::finite("turn", self.turn.degrees())?;
        // Ribs turned by nothing, or by a whole turn, are all parallel.
        if turn == 0.0 {
            return Err(Finding::parameter("turn", turn, 0.0, Unit::Degrees));
        }
        if turn.abs() >= 360.0 {
            return Err(Finding::parameter(
                "turn",
                turn,
                360.0_f64.copysign(turn),
                Unit::Degrees,
            ));
        }
        limits::pitch("pitch", self.pitch)?;
        limits::length("edge_mm", self.edge_mm)?;
        Ok(())
    }
}
