//! The shape: a start, steps, finishing steps, placement, and which side is outside.

use std::collections::BTreeMap;

use serde::{Deserialize, Serialize};

use super::{Act, Direction, Finish, Sign, Step, StepId, ZoneRef};
use crate::{Angle, Finding, Vector, start::Start};

/// The whole record of a shape. Growing replays it; see [`crate::grow()`].
#[derive(Clone, PartialEq, Debug, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct Shape {
    /// Where the first word comes from.
    pub start: Start,
    /// Zones whose vector is not the one that the start or a splice gives them.
    #[serde(default, skip_serializing_if = "Vec::is_empty")]
    pub zones: Vec<ZoneRule>,
    /// The steps, in the order they are replayed.
    #[serde(default, skip_serializing_if = "Vec::is_empty")]
    pub steps: Vec<Step>,
    /// Finishing steps, after all growth.
    #[serde(default, skip_serializing_if = "Vec::is_empty")]
    pub finish: Vec<Finish>,
    /// Where the shell stands.
    #[serde(default, skip_serializing_if = "is_default")]
    pub placement: Placement,
    /// Which side is outside.
    #[serde(default)]
    pub outside: Outside,
    /// What counts as the same place.
    #[serde(default, skip_serializing_if = "is_default")]
    pub tolerances: Tolerances,
}

impl Shape {
    /// The same shape with its start turned into free points. Steps, zone rules and finishing steps find their letters and zones again.
    ///
    /// # Errors
    /// When the start's parameters cannot be used.
    pub fn to_free(&self) -> Result<Self, Finding> {
        let ids: BTreeMap<u32, u32> = self.start.first_word()?.free_zone_ids().into_iter().collect();
        let mut free = Self {
            start: Start::Zigzag(self.start.to_free()?),
            ..self.clone()
        };
        let rename = |zone: &mut ZoneRef| {
            if let ZoneRef::Start(id) = zone {
                *id = ids.get(id).copied().unwrap_or(*id);
            }
        };
        for rule in &mut free.zones {
            rename(&mut rule.zone);
            if let ZoneVector::Linked(to, _) = &mut rule.vector {
                rename(to);
            }
        }
        for step in &mut free.steps {
            if let Act::Splice { directions, .. } = &mut step.act {
                for direction in directions {
                    if let Direction::Zone(zone) | Direction::Against(zone) = direction {
                        rename(zone);
                    }
                }
            }
        }
        Ok(free)
    }

    /// A number for a new step that no step of this shape has.
    #[must_use]
    pub fn next_step_id(&self) -> StepId {
        let steps = self.steps.iter().map(|s| s.id.0);
        let highest = steps.chain(self.finish.iter().map(|f| f.id.0)).max();
        StepId(highest.map_or(1, |id| id.saturating_add(1)))
    }
}

/// A zone's vector, where it is not the derived one.
#[derive(Clone, PartialEq, Debug, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct ZoneRule {
    /// The zone that this is about.
    pub zone: ZoneRef,
    /// What its vector is instead.
    pub vector: ZoneVector,
}

/// Where a zone's vector comes from.
#[derive(Clone, Copy, PartialEq, Debug, Serialize, Deserialize)]
#[serde(rename_all = "snake_case")]
pub enum ZoneVector {
    /// Its own, in millimetres.
    Own(Vector),
    /// Another zone's, the same way or against; the two count as one zone.
    Linked(ZoneRef, Sign),
}

/// Where the grown shell stands: first mirrored, then scaled, then turned, then moved.
#[derive(Clone, Copy, PartialEq, Debug, Serialize, Deserialize)]
#[serde(deny_unknown_fields, default)]
pub struct Placement {
    /// Mirrored in the plane x = 0. The outside stays outside.
    pub mirrored: bool,
    /// Scaled by this factor; more than 0.
    pub scale: f64,
    /// Turned about x, then y, then z, right-handed.
    pub turn: [Angle; 3],
    /// Moved by this, in millimetres.
    pub shift: Vector,
}

impl Default for Placement {
    fn default() -> Self {
        Self {
            mirrored: false,
            scale: 1.0,
            turn: [Angle::default(); 3],
            shift: Vector::ZERO,
        }
    }
}

/// Which side of the panels is outside.
///
/// It is chosen when a design is made, by the kind of start (see [`Outside::by_rule`]), and kept: a drag never turns a
/// shell inside out in the lists.
#[derive(Clone, Copy, PartialEq, Eq, Debug, Default, Serialize, Deserialize)]
#[serde(rename_all = "snake_case")]
pub enum Outside {
    /// The side from which a fore panel shows its corners before, at, after the V and the new one counter-clockwise.
    #[default]
    Grown,
    /// The other side.
    Reversed,
}

/// What counts as the same place.
#[derive(Clone, Copy, PartialEq, Debug, Serialize, Deserialize)]
#[serde(deny_unknown_fields, default)]
pub struct Tolerances {
    /// Vertices nearer than this are joined where edges meet edges; a closed front may miss by this much. In millimetres.
    pub join_mm: f64,
    /// Gaps up to this, beyond the join tolerance, are reported as near misses. In millimetres.
    pub near_mm: f64,
}

impl Default for Tolerances {
    /// 0.001 mm joins: far above what rounding leaves on a shell of 100 m (about 1e-9 mm), far below what a saw can do.
    /// 0.5 mm is the workshop's usual tolerance on a length (common practice, no source).
    fn default() -> Self {
        Self {
            join_mm: 0.001,
            near_mm: 0.5,
        }
    }
}

fn is_default<T: Default + PartialEq>(value: &T) -> bool {
    *value == T::default()
}
