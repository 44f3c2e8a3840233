//! Starts: where the first word comes from.
//!
//! Every kind checks its parameters, gives a [`FirstWord`], and can be turned into free points.

pub(crate) mod circle;
mod column;
mod curve;
mod free;
mod free_edit;
mod free_gap;
mod free_links;
mod helical;
pub mod limits;
mod loop_tube;
mod polar;
mod ribbon;
mod star;
mod star_path;
mod star_solid;
mod translation;

use serde::{Deserialize, Serialize};

pub use column::ColumnForm;
pub use curve::{Curve, CurveShape};
pub use free::{DragRule, FreeLetter, FreePath, FreeVector, PathEnd};
pub use helical::HelicalForm;
pub use loop_tube::LoopForm;
pub use polar::{PolarBy, PolarForm, PolarPair};
pub use ribbon::{RibbonForm, RibbonFrom};
pub use star::{AxisClass, Star};
pub use star_path::{StarLength, StarLetter, StarPath};
pub use star_solid::StarSolid;
pub use translation::TranslationForm;

use crate::{Point, Sign, Vector, finding::Finding};

/// Where the first word comes from.
#[derive(Clone, PartialEq, Debug, Serialize, Deserialize)]
#[serde(rename_all = "snake_case")]
pub enum Start {
    /// A path of free points, open or closed; also what every import and every conversion becomes.
    Zigzag(FreePath),
    /// A path moved along a path.
    Translation(TranslationForm),
    /// Ribs round a pole.
    Polar(PolarForm),
    /// A closed zigzag: a tube.
    Loop(LoopForm),
    /// A ribbon wound on a helicoid.
    Ribbon(RibbonForm),
    /// A closed front that climbs.
    Column(ColumnForm),
    /// Ribs from pole to pole.
    Helical(HelicalForm),
    /// A path whose letters are directions of a star.
    StarPath(StarPath),
    /// The convex solid of a star.
    StarSolid(StarSolid),
}

/// The role of a letter: an open V is a zig followed by a zag.
#[derive(Clone, Copy, PartialEq, Eq, PartialOrd, Ord, Hash, Debug, Serialize, Deserialize)]
#[serde(rename_all = "snake_case")]
pub enum Role {
    /// Moves towards the end of the word as it is filled.
    Zig,
    /// Moves towards the beginning.
    Zag,
}

impl Role {
    /// The other role.
    #[must_use]
    pub const fn other(self) -> Self {
        match self {
            Self::Zig => Self::Zag,
            Self::Zag => Self::Zig,
        }
    }
}

/// How the outside of a new design is chosen.
#[derive(Clone, Copy, PartialEq, Eq, Debug)]
pub enum OutsideRule {
    /// The side that looks up.
    Up,
    /// The side that looks away from the vertical axis x = y = 0.
    AwayFromAxis,
    /// The side that makes the volume positive.
    PositiveVolume,
}

/// What a start gives: a word, where it begins, and the zones that its letters belong to.
#[derive(Clone, PartialEq, Debug)]
pub struct FirstWord {
    /// The place before the first letter.
    pub origin: Point,
    /// Whether the last letter leads back to the first.
    pub closed: bool,
    /// The vectors, in millimetres. Letters refer to them by index.
    pub zones: Vec<StartZone>,
    /// The letters in order.
    pub letters: Vec<StartLetter>,
    /// Whether the grown shell is lifted so that its lowest vertex is at z = 0.
    pub grounded: bool,
    /// Whether a V is filled only if its panel lies on the convex hull of the zones' sum, and by neighbours of any role.
    pub on_hull: bool,
}

/// A zone of the first word.
#[derive(Clone, Copy, PartialEq, Debug)]
pub struct StartZone {
    /// The number by which [`crate::ZoneRef::Start`] names it: the position here, or a free letter's id.
    pub id: u32,
    /// Its vector, in millimetres.
    pub vector: Vector,
    /// Whether the vector follows from parameters, and is not the user's own.
    pub derived: bool,
}

/// A letter of the first word.
#[derive(Clone, Copy, PartialEq, Debug)]
pub struct StartLetter {
    /// Its index in its [`crate::LetterName`]: the position in the word, or a free letter's id.
    pub index: u32,
    /// Position of its zone in [`FirstWord::zones`].
    pub zone: u32,
    /// Which way along the zone.
    pub sign: Sign,
    /// Its role on the fore front.
    pub role: Role,
}

impl FirstWord {
    /// The vector of a letter, in millimetres.
    #[must_use]
    pub fn vector(&self, letter: &StartLetter) -> Vector {
        self.zones[letter.zone as usize].vector * letter.sign.factor()
    }

    /// For each zone, in order: its id, and the id that it has once the word is made of free letters, which is the index of the first letter that
    /// runs along it. Every zone of every start has one, so the zone keeps its direction.
    #[must_use]
    pub fn free_zone_ids(&self) -> Vec<(u32, u32)> {
        let owners = self.zone_owners();
        let ids = |(zone, owner): (&StartZone, Option<usize>)| owner.map(|k| (zone.id, self.letters[k].index));
        self.zones.iter().zip(owners).filter_map(ids).collect()
    }

    /// For each zone the position of the first letter that runs along it, else of the first that runs against it.
    fn zone_owners(&self) -> Vec<Option<usize>> {
        let mut owners: Vec<Option<usize>> = vec![None; self.zones.len()];
        for sign in [Sign::Plus, Sign::Minus] {
            for (k, letter) in self.letters.iter().enumerate() {
                let owner = &mut owners[letter.zone as usize];
                if letter.sign == sign && owner.is_none() {
                    *owner = Some(k);
                }
            }
        }
        owners
    }

    /// The nodes of the word: one more than letters, the last one equal to the first on a word that closes.
    #[must_use]
    pub fn nodes(&self) -> Vec<Point> {
        let mut at = self.origin;
        let mut nodes = vec![at];
        for letter in &self.letters {
            at += self.vector(letter);
            nodes.push(at);
        }
        nodes
    }
}

impl Start {
    /// The first word.
    ///
    /// # Errors
    /// A [`Finding`] that names the parameter which cannot be used, its value and its limit.
    pub fn first_word(&self) -> Result<FirstWord, Finding> {
        match self {
            Self::Zigzag(path) => path.first_word(),
            Self::Translation(form) => form.first_word(),
            Self::Polar(form) => form.first_word(),
            Self::Loop(form) => form.first_word(),
            Self::Ribbon(form) => form.first_word(),
            Self::Column(form) => form.first_word(),
            Self::Helical(form) => form.first_word(),
            Self::StarPath(path) => path.first_word(),
            Self::StarSolid(solid) => solid.first_word(),
        }
    }

    /// The same first word as free points: each letter keeps its index, so that names made later still find it.
    ///
    /// # Errors
    /// When the parameters cannot be used.
    pub fn to_free(&self) -> Result<FreePath, Finding> {
        match self {
            Self::Zigzag(path) => Ok(path.clone()),
            other => Ok(FreePath::from_word(&other.first_word()?)),
        }
    }

    /// Which side of a new design of this kind is outside.
    #[must_use]
    pub const fn outside_rule(&self) -> OutsideRule {
        match self {
            Self::Zigzag(_) | Self::Translation(_) | Self::Polar(_) | Self::Ribbon(_) | Self::StarPath(_) => {
                OutsideRule::Up
            }
            Self::Loop(_) | Self::Column(_) | Self::Helical(_) => OutsideRule::AwayFromAxis,
            Self::StarSolid(_) => OutsideRule::PositiveVolume,
        }
    }

    /// The word that the command line and the file use for this kind.
    #[must_use]
    pub const fn kind(&self) -> &'static str {
        match self {
            Self::Zigzag(_) => "zigzag",
            Self::Translation(_) => "translation",
            Self::Polar(_) => "polar",
            Self::Loop(_) => "loop",
            Self::Ribbon(_) => "ribbon",
            Self::Column(_) => "column",
            Self::Helical(_) => "helical",
            Self::StarPath(_) => "star-path",
            Self::StarSolid(_) => "star-solid",
        }
    }
}
