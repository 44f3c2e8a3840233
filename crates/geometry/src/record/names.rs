//! Names that survive an edit upstream: letters, Vs, zones and panels are never named by position.

use serde::{Deserialize, Serialize};

use super::Side;

/// A step's number. It is given once, and never changes when steps are moved.
#[derive(Clone, Copy, PartialEq, Eq, PartialOrd, Ord, Hash, Debug, Default, Serialize, Deserialize)]
#[serde(transparent)]
pub struct StepId(pub u32);

/// Which way along its zone a letter runs.
#[derive(Clone, Copy, PartialEq, Eq, PartialOrd, Ord, Hash, Debug, Serialize, Deserialize)]
#[serde(rename_all = "snake_case")]
pub enum Sign {
    /// Along the zone's vector.
    Plus,
    /// Against the zone's vector.
    Minus,
}

impl Sign {
    /// +1 or -1.
    #[must_use]
    pub const fn factor(self) -> f64 {
        match self {
            Self::Plus => 1.0,
            Self::Minus => -1.0,
        }
    }

    /// The other sign.
    #[must_use]
    pub const fn opposite(self) -> Self {
        match self {
            Self::Plus => Self::Minus,
            Self::Minus => Self::Plus,
        }
    }
}

/// What put a letter on the front.
#[derive(Clone, Copy, PartialEq, Eq, PartialOrd, Ord, Hash, Debug, Serialize, Deserialize)]
#[serde(rename_all = "snake_case")]
pub enum Maker {
    /// The start's first word.
    Start,
    /// A splice.
    Step(StepId),
}

/// The identity of a letter: who made it, its index there, its sign, and, for a spliced letter, the zig
/// letter of the V that it was spliced into.
#[derive(Clone, PartialEq, Eq, PartialOrd, Ord, Hash, Debug, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct LetterName {
    /// What put the letter there.
    pub maker: Maker,
    /// Its index in what the maker made: along the first word, or among a splice's directions.
    pub index: u32,
    /// Its sign; a splice's spur is a letter and its opposite.
    pub sign: Sign,
    /// The zig letter of the V that was spliced; none for a letter of the first word.
    #[serde(default, skip_serializing_if = "Option::is_none")]
    pub at: Option<Box<LetterName>>,
}

impl LetterName {
    /// The name of a letter of the first word.
    #[must_use]
    pub const fn of_start(index: u32, sign: Sign) -> Self {
        Self {
            maker: Maker::Start,
            index,
            sign,
            at: None,
        }
    }
}

/// The name of a V: its zig letter, which every open V has to itself, and its zag letter as a check.
#[derive(Clone, PartialEq, Eq, PartialOrd, Ord, Hash, Debug, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct VName {
    /// The letter that finds the V again.
    pub zig: LetterName,
    /// The letter that stood behind it when the V was picked. Another one there is a note, not an error.
    pub zag: LetterName,
}

/// A zone, named by who brought it.
#[derive(Clone, Copy, PartialEq, Eq, PartialOrd, Ord, Hash, Debug, Serialize, Deserialize)]
#[serde(rename_all = "snake_case")]
pub enum ZoneRef {
    /// The zone with this index among the start's zones. For free paths the index is the letter's id.
    Start(u32),
    /// A splice's own direction: the step, and the index among its directions.
    Spliced(StepId, u32),
}

/// The name of a panel: the two letters whose exchange made it, on which side, and which time they met.
#[derive(Clone, PartialEq, Eq, PartialOrd, Ord, Hash, Debug, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct PanelName {
    /// The front that made the panel.
    pub side: Side,
    /// The two letters, in either order.
    pub letters: (LetterName, LetterName),
    /// 0 for the first panel that these two letters made on this side, 1 for the second ...
    pub turn: u32,
}
