//! Polar forms: ribs round a pole.

use serde::{Deserialize, Serialize};

use super::{FirstWord, Role, StartLetter, StartZone, circle, limits};
use crate::{Angle, Finding, Point, Sign, Unit, Vector};

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

/// Which two measures fix a polar form, without their values.
#[derive(Clone, Copy, PartialEq, Eq, PartialOrd, Ord, Hash, Debug)]
#[expect(missing_docs, reason = "each is named as in `PolarBy`")]
pub enum PolarPair {
    PitchEdge,
    PitchWidth,
    PitchHeight,
    EdgeWidth,
    EdgeHeight,
    WidthHeight,
}

impl PolarPair {
    /// All six, in the order in which a list shows them.
    pub const ALL: [Self; 6] = [
        Self::PitchEdge,
        Self::PitchWidth,
        Self::PitchHeight,
        Self::EdgeWidth,
        Self::EdgeHeight,
        Self::WidthHeight,
    ];
}

impl PolarBy {
    /// Which two measures these are.
    #[must_use]
    pub const fn pair(&self) -> PolarPair {
        match self {
            Self::PitchEdge { .. } => PolarPair::PitchEdge,
            Self::PitchWidth { .. } => PolarPair::PitchWidth,
            Self::PitchHeight { .. } => PolarPair::PitchHeight,
            Self::EdgeWidth { .. } => PolarPair::EdgeWidth,
            Self::EdgeHeight { .. } => PolarPair::EdgeHeight,
            Self::WidthHeight { .. } => PolarPair::WidthHeight,
        }
    }
}

/// A rib's horizontal run and fall, in millimetres; both more than 0.
#[derive(Clone, Copy)]
struct Rib {
    run: f64,
    fall: f64,
}

impl PolarForm {
    /// See [`crate::Start::first_word`].
    ///
    /// The pole is the point 0 before the form is lifted, the ribs fall from it, and the word begins at the tip of rib 0. Zone i is
    /// rib i; letter 2 i runs back up it, letter 2 i + 1 down the next.
    ///
    /// # Errors
    /// As there.
    pub fn first_word(&self) -> Result<FirstWord, Finding> {
        let rib = self.rib()?;
        let zones: Vec<_> = (0..self.ribs)
            .map(|i| {
                let (cos, sin) = circle::part_of_turn(i64::from(i), self.ribs);
                StartZone {
                    id: i,
                    vector: Vector::new(rib.run * cos, rib.run * sin, -rib.fall),
                    derived: true,
                }
            })
            .collect();
        let letters = (0..self.ribs)
            .flat_map(|i| {
                [
                    StartLetter {
                        index: 2 * i,
                        zone: i,
                        sign: Sign::Minus,
                        role: Role::Zig,
                    },
                    StartLetter {
                        index: 2 * i + 1,
                        zone: (i + 1) % self.ribs,
                        sign: Sign::Plus,
                        role: Role::Zag,
                    },
                ]
            })
            .collect();
        Ok(FirstWord {
            origin: Point(zones[0].vector),
            closed: true,
            zones,
            letters,
            grounded: true,
            on_hull: false,
        })
    }

    /// Pitch from the horizontal, and length of the ribs in millimetres, whichever two measures were given.
    ///
    /// # Errors
    /// When a measure is outside its limits, or the two cannot go together: an edge whose n fold does not reach
    /// the height, or whose ribs laid flat do not reach the width.
    pub fn pitch_and_edge(&self) -> Result<(Angle, f64), Finding> {
        let rib = self.rib()?;
        // What was typed comes back as it was typed.
        let pitch = match self.by {
            PolarBy::PitchEdge { pitch, .. }
            | PolarBy::PitchWidth { pitch, .. }
            | PolarBy::PitchHeight { pitch, .. } => pitch,
            _ => Angle::from_radians(rib.fall.atan2(rib.run)),
        };
        let edge_mm = match self.by {
            PolarBy::PitchEdge { edge_mm, .. }
            | PolarBy::EdgeWidth { edge_mm, .. }
            | PolarBy::EdgeHeight { edge_mm, .. } => edge_mm,
            _ => rib.run.hypot(rib.fall),
        };
        Ok((pitch, edge_mm))
    }

    /// Size of the whole form in plan along rib 0, in millimetres: a zonotope's width, the sum of its generators' shares.
    ///
    /// # Errors
    /// As [`Self::pitch_and_edge`].
    pub fn width_mm(&self) -> Result<f64, Finding> {
        let rib = self.rib()?;
        Ok(match self.by {
            PolarBy::PitchWidth { width_mm, .. }
            | PolarBy::EdgeWidth { width_mm, .. }
            | PolarBy::WidthHeight { width_mm, .. } => width_mm,
            _ => rib.run * self.ribs_across(),
        })
    }

    /// Height of the whole form from pole to pole, in millimetres.
    ///
    /// # Errors
    /// As [`Self::pitch_and_edge`].
    pub fn height_mm(&self) -> Result<f64, Finding> {
        let rib = self.rib()?;
        Ok(match self.by {
            PolarBy::PitchHeight { height_mm, .. }
            | PolarBy::EdgeHeight { height_mm, .. }
            | PolarBy::WidthHeight { height_mm, .. } => height_mm,
            _ => rib.fall * f64::from(self.ribs),
        })
    }

    /// The same form, fixed by another two measures.
    ///
    /// # Errors
    /// As [`Self::pitch_and_edge`]; also when a measure of the form is beyond the limit that it has once it is given.
    pub fn by_pair(&self, pair: PolarPair) -> Result<Self, Finding> {
        let (pitch, edge_mm) = self.pitch_and_edge()?;
        let (width_mm, height_mm) = (self.width_mm()?, self.height_mm()?);
        let by = match pair {
            PolarPair::PitchEdge => PolarBy::PitchEdge { pitch, edge_mm },
            PolarPair::PitchWidth => PolarBy::PitchWidth { pitch, width_mm },
            PolarPair::PitchHeight => PolarBy::PitchHeight { pitch, height_mm },
            PolarPair::EdgeWidth => PolarBy::EdgeWidth { edge_mm, width_mm },
            PolarPair::EdgeHeight => PolarBy::EdgeHeight { edge_mm, height_mm },
            PolarPair::WidthHeight => PolarBy::WidthHeight { width_mm, height_mm },
        };
        let form = Self { ribs: self.ribs, by };
        form.rib()?;
        Ok(form)
    }

    /// How many ribs laid flat reach across: the sum of |cos| of their azimuths.
    fn ribs_across(&self) -> f64 {
        (0..self.ribs)
            .map(|i| circle::part_of_turn(i64::from(i), self.ribs).0.abs())
            .sum()
    }

    /// Solves for the rib. All six pairs come from width = run * across and height = n * fall.
    fn rib(&self) -> Result<Rib, Finding> {
        limits::count("ribs", self.ribs, limits::MIN_RIBS, limits::MAX_RIBS)?;
        let n = f64::from(self.ribs);
        let across = self.ribs_across();
        let rib = match self.by {
            PolarBy::PitchEdge { pitch, edge_mm } => {
                let (cos, sin) = circle::degrees(limits::pitch("pitch", pitch)?.degrees());
                let edge = limits::length("edge_mm", edge_mm)?;
                Rib {
                    run: edge * cos,
                    fall: edge * sin,
                }
            }
            PolarBy::PitchWidth { pitch, width_mm } => {
                let (cos, sin) = circle::degrees(limits::pitch("pitch", pitch)?.degrees());
                let run = limits::length("width_mm", width_mm)? / across;
                Rib {
                    run,
                    fall: run * (sin / cos),
                }
            }
            PolarBy::PitchHeight { pitch, height_mm } => {
                let (cos, sin) = circle::degrees(limits::pitch("pitch", pitch)?.degrees());
                let fall = limits::length("height_mm", height_mm)? / n;
                Rib {
                    run: fall * (cos / sin),
                    fall,
                }
            }
            PolarBy::EdgeWidth { edge_mm, width_mm } => {
                let edge = limits::length("edge_mm", edge_mm)?;
                let run = limits::length("width_mm", width_mm)? / across;
                let fall = other_leg(edge, run, "width_mm", width_mm, edge * across)?;
                Rib { run, fall }
            }
            PolarBy::EdgeHeight { edge_mm, height_mm } => {
                let edge = limits::length("edge_mm", edge_mm)?;
                let fall = limits::length("height_mm", height_mm)? / n;
                let run = other_leg(edge, fall, "height_mm", height_mm, edge * n)?;
                Rib { run, fall }
            }
            PolarBy::WidthHeight { width_mm, height_mm } => Rib {
                run: limits::length("width_mm", width_mm)? / across,
                fall: limits::length("height_mm", height_mm)? / n,
            },
        };
        limits::length("edge_mm", rib.run.hypot(rib.fall))?;
        Ok(rib)
    }
}

/// The other leg of a right triangle; refuses a leg that is not shorter than the edge, naming the measure behind the leg.
fn other_leg(edge: f64, leg: f64, name: &'static str, value: f64, limit: f64) -> Result<f64, Finding> {
    if leg < edge {
        // As a product, so that a leg almost as long as the edge keeps its digits.
        Ok(((edge - leg) * (edge + leg)).sqrt())
    } else {
        Err(Finding::parameter(name, value, limit, Unit::Millimetres))
    }
}
