//! Loops: a regular tube, each of its points movable.

use serde::{Deserialize, Serialize};

use super::{FirstWord, Role, StartLetter, StartZone, circle, limits};
use crate::{Code, Finding, Place, Point, Sign, Vector};

/// A closed zigzag between a lower and an upper ring of points.
#[derive(Clone, PartialEq, Debug, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct LoopForm {
    /// How many points each ring has.
    pub sides: u32,
    /// Radius of both rings, in millimetres.
    pub radius_mm: f64,
    /// Height of the upper ring above the lower, in millimetres.
    pub rise_mm: f64,
    /// Points moved from their regular place: the node's number along the zigzag, and by how much, in millimetres.
    #[serde(default, skip_serializing_if = "Vec::is_empty")]
    pub moved: Vec<(u32, Vector)>,
}

impl LoopForm {
    /// See [`crate::Start::first_word`].
    ///
    /// Node 2 k is on the upper ring at azimuth k / n of a full turn, node 2 k + 1 on the lower ring (z = 0) half a step on; the axis is x = y = 0. Letter
    /// k runs from node k to the next, down as zig and up as zag, and is a zone of its own. A node that is moved twice is moved by the sum.
    ///
    /// # Errors
    /// As there.
    pub fn first_word(&self) -> Result<FirstWord, Finding> {
        let nodes = self.nodes()?;
        let count = 2 * self.sides;
        let mut zones = Vec::with_capacity(nodes.len());
        for (id, (&from, &to)) in (0..count).zip(nodes.iter().zip(nodes.iter().cycle().skip(1))) {
            let vector = to - from;
            if vector == Vector::ZERO {
                return Err(Finding::new(Code::ZeroVector, Place::Parameter("moved")));
            }
            zones.push(StartZone {
                id,
                vector,
                derived: true,
            });
        }
        let letters = (0..count)
            .map(|k| StartLetter {
                index: k,
                zone: k,
                sign: Sign::Plus,
                role: if k % 2 == 0 { Role::Zig } else { Role::Zag },
            })
            .collect();
        Ok(FirstWord {
            origin: nodes[0],
            closed: true,
            zones,
            letters,
            grounded: false,
            on_hull: false,
        })
    }

    /// The nodes in order along the zigzag, as many as letters, with what was moved.
    fn nodes(&self) -> Result<Vec<Point>, Finding> {
        limits::count("sides", self.sides, limits::MIN_RIBS, limits::MAX_RIBS)?;
        let radius = limits::length("radius_mm", self.radius_mm)?;
        let rise = limits::length("rise_mm", self.rise_mm)?;
        let count = 2 * self.sides;
        let mut nodes: Vec<_> = (0..count)
            .map(|k| {
                let (cos, sin) = circle::part_of_turn(i64::from(k), count);
                let z = if k % 2 == 0 { rise } else { 0.0 };
                Point::new(radius * cos, radius * sin, z)
            })
            .collect();
        for &(node, by) in &self.moved {
            limits::count("moved", node, 0, count - 1)?;
            for part in by.to_array() {
                limits::signed_length("moved", part)?;
            }
            nodes[node as usize] += by;
        }
        Ok(nodes)
    }
}
