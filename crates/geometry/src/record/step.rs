//! Steps: what is done to the fronts, in order.

use serde::{Deserialize, Serialize};

use super::{LetterName, PanelName, StepId, VName, ZoneRef};
use crate::Vector;

/// One of the two fronts that a start gives.
#[derive(Clone, Copy, PartialEq, Eq, PartialOrd, Ord, Hash, Debug, Default, Serialize, Deserialize)]
#[serde(rename_all = "snake_case")]
pub enum Side {
    /// The front that grows with the roles as the start gave them. Its courses count 1, 2, 3 ...
    #[default]
    Fore,
    /// The front that grows the other way, with the roles exchanged. Its courses count -1, -2, -3 ...
    Aft,
}

/// A step of the record.
#[derive(Clone, PartialEq, Debug, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct Step {
    /// Its number, which names made by it refer to.
    pub id: StepId,
    /// A name given by the user.
    #[serde(default, skip_serializing_if = "Option::is_none")]
    pub name: Option<String>,
    /// A step switched off is kept and skipped.
    #[serde(default = "yes", skip_serializing_if = "is_true")]
    pub on: bool,
    /// The front that it works on.
    #[serde(default)]
    pub side: Side,
    /// What it does.
    pub act: Act,
}

/// What a step does.
#[derive(Clone, PartialEq, Debug, Serialize, Deserialize)]
#[serde(rename_all = "snake_case", deny_unknown_fields)]
pub enum Act {
    /// Fill every open V at once, a number of times.
    Lay {
        /// How often.
        courses: Courses,
        /// What happens to spurs on the way.
        #[serde(default)]
        spurs: Spurs,
    },
    /// Fill chosen Vs once; it counts as a course of its own.
    Fill {
        /// Which.
        at: Vs,
    },
    /// Insert spurs of new directions at chosen Vs.
    Splice {
        /// Which.
        at: Vs,
        /// One spur each, in order from the zig letter to the zag letter.
        directions: Vec<Direction>,
    },
    /// Cancel every spur, leftmost first, until none is left.
    Retract,
    /// Pass through the node at chosen spurs, and on.
    Cross {
        /// Which.
        at: Vs,
    },
    /// Give letters new roles.
    SetRoles(RoleRule),
    /// Fill what is left of a closed front to nothing, with few panels and nothing crossed.
    CloseRim,
    /// Join rims that meet within this distance, in millimetres.
    JoinRims {
        /// The largest gap that is closed.
        within_mm: f64,
    },
}

/// How many courses to lay.
#[derive(Clone, Copy, PartialEq, Eq, Debug, Serialize, Deserialize)]
#[serde(rename_all = "snake_case")]
pub enum Courses {
    /// This many, fewer when the front falls still.
    Count(u32),
    /// Until no V is left to fill; on a front that never falls still, until every zig has met every zag.
    UntilStill,
}

/// What laying does with spurs: open Vs of two opposite and equal letters.
#[derive(Clone, Copy, PartialEq, Eq, Debug, Default, Serialize, Deserialize)]
#[serde(rename_all = "snake_case")]
pub enum Spurs {
    /// Cancel the pair, zipping its two edges together.
    #[default]
    Retract,
    /// Leave it.
    Hold,
    /// Pass through the node and go on.
    Cross,
}

/// A choice of Vs on the front as it stands when the step comes.
#[derive(Clone, PartialEq, Debug, Serialize, Deserialize)]
#[serde(rename_all = "snake_case")]
pub enum Vs {
    /// Every open V.
    All,
    /// These.
    Picked(Vec<VName>),
    /// Every k-th, counted from a named zig letter within its family: the letters of the same maker, sign and role.
    EveryKth {
        /// Where the count begins.
        from: LetterName,
        /// 1 takes every one of the family.
        k: u32,
    },
}

/// A direction spliced into a V.
#[derive(Clone, PartialEq, Debug, Serialize, Deserialize)]
#[serde(rename_all = "snake_case")]
pub enum Direction {
    /// A new zone with this vector, in millimetres.
    Own(Vector),
    /// Letters of a zone that exists.
    Zone(ZoneRef),
    /// Letters of an existing zone, run against its vector.
    Against(ZoneRef),
    /// Copies of all the start's zones that lie between the V's two, going up from its zig's zone to its zag's and round.
    Between,
}

/// How letters get new roles.
#[derive(Clone, PartialEq, Debug, Serialize, Deserialize)]
#[serde(rename_all = "snake_case")]
pub enum RoleRule {
    /// The first letters of the front, this many, become zig, the rest zag.
    FirstAreZig(u32),
    /// Zig, zag, zig, zag ...
    Alternate,
    /// Every letter changes its role.
    Swap,
    /// These letters change their role.
    Flip(Vec<LetterName>),
}

/// A finishing step: it comes after all growth.
#[derive(Clone, PartialEq, Debug, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct Finish {
    /// Its number; shared with the numbers of the growing steps.
    pub id: StepId,
    /// A name given by the user.
    #[serde(default, skip_serializing_if = "Option::is_none")]
    pub name: Option<String>,
    /// A step switched off is kept and skipped.
    #[serde(default = "yes", skip_serializing_if = "is_true")]
    pub on: bool,
    /// What it does.
    pub act: FinishAct,
}

/// What a finishing step does.
#[derive(Clone, PartialEq, Debug, Serialize, Deserialize)]
#[serde(rename_all = "snake_case")]
pub enum FinishAct {
    /// Leave these panels out.
    Drop(Vec<PanelName>),
}

const fn yes() -> bool {
    true
}

#[expect(clippy::trivially_copy_pass_by_ref, reason = "the signature serde asks for")]
const fn is_true(on: &bool) -> bool {
    *on
}
