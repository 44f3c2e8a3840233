//! Star solids: the convex solid of a star.

use serde::{Deserialize, Serialize};

use super::{FirstWord, Role, StartLetter, StartZone, limits};
use crate::{Finding, Point, Sign, Unit, Vector};

/// The convex zonohedron of a star, all edges of one length.
#[derive(Clone, PartialEq, Debug, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct StarSolid {
    /// The star.
    pub star: super::Star,
    /// Length of the edges, in millimetres.
    pub edge_mm: f64,
}

/// Directions to look along, near the vertical so that fore is the upper half; the first along which all axes are seen apart is taken.
const VIEWS: [[f64; 3]; 6] = [
    [0.114_037, 0.063_091, 1.0],
    [-0.087_719, 0.141_421, 1.0],
    [0.031_831, -0.173_205, 1.0],
    [-0.161_803, -0.027_182, 1.0],
    [0.244_949, 0.105_573, 1.0],
    [-0.069_315, 0.316_228, 1.0],
];

/// Two axes seen nearer to each other than this, in radians, are not told apart; a thousandth of what 2000 level axes leave.
const APART: f64 = 1e-7;

impl StarSolid {
    /// See [`crate::Start::first_word`].
    ///
    /// The word is the silhouette of the solid, seen along a direction d that lies in no plane of two axes: closed, convex,
    /// counter-clockwise seen from +d. Its first half runs all axes once, in the order of their angle round d, its second half runs them
    /// all back in the same order. Zone k is axis k of [`super::Star::directions`]. So for two letters in the order of the word's first half, `a x b`
    /// points towards +d: the fore panels are those of the hull that face +d (upwards), aft those that face away. The centre of the solid is the
    /// point 0 before it is lifted. Roles alternate and are not used.
    ///
    /// # Errors
    /// As there.
    pub fn first_word(&self) -> Result<FirstWord, Finding> {
        let axes = self.star.directions()?;
        let edge = limits::length("edge_mm", self.edge_mm)?;
        let half = silhouette(&axes)?;
        let count = u32::try_from(half.len()).unwrap_or(u32::MAX);
        let back = half.iter().map(|&(zone, sign)| (zone, sign.opposite()));
        let letters: Vec<_> = (0..2 * count)
            .zip(half.iter().copied().chain(back))
            .map(|(index, (zone, sign))| StartLetter {
                index,
                zone,
                sign,
                role: if index % 2 == 0 { Role::Zig } else { Role::Zag },
            })
            .collect();
        let zones: Vec<_> = (0..count)
            .zip(&axes)
            .map(|(id, &axis)| StartZone {
                id,
                vector: axis * edge,
                derived: true,
            })
            .collect();
        let across: Vector = half
            .iter()
            .map(|&(zone, sign)| zones[zone as usize].vector * sign.factor())
            .sum();
        Ok(FirstWord {
            origin: Point(-across / 2.0),
            closed: true,
            zones,
            letters,
            grounded: true,
            on_hull: true,
        })
    }
}

/// The axes in the order of their angle, from 0 to below half a turn, round the first direction that tells them all apart.
fn silhouette(axes: &[Vector]) -> Result<Vec<(u32, Sign)>, Finding> {
    VIEWS
        .into_iter()
        .find_map(|view| seen_along(axes, Vector::from_array(view)))
        .ok_or_else(|| Finding::parameter("star", APART.to_degrees(), APART.to_degrees(), Unit::Degrees))
}

fn seen_along(axes: &[Vector], view: Vector) -> Option<Vec<(u32, Sign)>> {
    let toward = view / view.length();
    // right x up = toward, so that angles grow counter-clockwise seen from +d.
    let right = Vector::Y.cross(toward);
    let right = right / right.length();
    let up = toward.cross(right);
    let mut seen = Vec::with_capacity(axes.len());
    for (zone, axis) in (0_u32..).zip(axes) {
        let (x, y) = (axis.dot(right), axis.dot(up));
        if x.hypot(y) < APART {
            return None;
        }
        let along = y > 0.0 || (y == 0.0 && x > 0.0);
        let (x, y, sign) = if along {
            (x, y, Sign::Plus)
        } else {
            (-x, -y, Sign::Minus)
        };
        seen.push((y.atan2(x), zone, sign));
    }
    seen.sort_by(|a, b| a.0.total_cmp(&b.0).then(a.1.cmp(&b.1)));
    let round = seen.first().map_or(0.0, |first| first.0) + core::f64::consts::PI;
    let next = seen.iter().map(|s| s.0).skip(1).chain([round]);
    let apart = seen.iter().zip(next).all(|(s, next)| next - s.0 > APART);
    apart.then(|| seen.into_iter().map(|(_, zone, sign)| (zone, sign)).collect())
}
