//! Covering: places of the target that the surface is to come close to.
//!
//! Nodes alone can come close to a small part of a target. So places are spread evenly over it, and for each the closest place
//! of the surface is held, by the same argument as for nodes: at the same place of its panel it stands still in the sum when
//! the paths are solved for, and the next closest place is no farther.

use super::{
    net::{Net, many},
    target::Target,
};
use crate::{Point, Vector};

/// Places of the target.
pub(super) struct Cover {
    places: Vec<Point>,
    /// How much a place counts beside a node.
    pub(super) weight: f64,
}

/// The place of the net that is closest to a place of the target: on panel or edge `(i, j)`, at the shares `(u, v)` of its sides.
#[derive(Clone, Copy, Debug)]
pub(super) struct Held {
    pub(super) i: usize,
    pub(super) j: usize,
    pub(super) u: f64,
    pub(super) v: f64,
    pub(super) distance_mm: f64,
    pub(super) place: Point,
}

/// The most places that are spread.
const MOST: usize = 4000;

/// Places for each node.
const PER_NODE: usize = 4;

/// The square of the sine between the sides of a panel below which they make no plane.
const NO_PLANE: f64 = 1e-14;

impl Cover {
    /// Spreads places for so many nodes; `share` says how much all of them count beside all nodes. None when they count nothing.
    pub(super) fn new(target: &Target, nodes: usize, share: f64) -> Option<Self> {
        let places = target.spread((PER_NODE * nodes).min(MOST));
        (share > 0.0 && !places.is_empty()).then(|| Self {
            weight: share * many(nodes) / many(places.len()),
            places,
        })
    }

    /// The closest places of a net.
    pub(super) fn held(&self, net: &Net) -> Vec<Held> {
        let (row, rows) = (net.r.len(), net.s.len());
        let index = |i: usize, j: usize| u32::try_from(j * row + i).unwrap_or(u32::MAX);
        let panels = || (1..rows).flat_map(|j| (1..row).map(move |i| (i - 1, j - 1)));
        let triangles = panels().flat_map(|(i, j)| {
            let [a, b, c, d] = [index(i, j), index(i + 1, j), index(i + 1, j + 1), index(i, j + 1)];
            [[a, b, c], [a, c, d]]
        });
        let line: Vec<u32> = (0..if rows == 1 { row } else { 0 }).map(|i| index(i, 0)).collect();
        let Ok(surface) = Target::new(net.nodes().collect(), triangles.collect(), &[line]) else {
            return Vec::new();
        };
        let across = row - 1;
        self.places
            .iter()
            .map(|place| {
                let closest = surface.closest(*place);
                let part = closest.part as usize;
                let (i, j) = if rows == 1 {
                    (part, 0)
                } else {
                    (part / 2 % across, part / 2 / across)
                };
                let a = net.r[i + 1] - net.r[i];
                let b = net.s.get(j + 1).map_or(Vector::ZERO, |next| *next - net.s[j]);
                let (u, v) = shares(closest.at.0 - (net.r[i] + net.s[j]), a, b);
                Held {
                    i,
                    j,
                    u,
                    v,
                    distance_mm: closest.distance_mm,
                    place: *place,
                }
            })
            .collect()
    }
}

/// The shares of two sides that lead to a place in their plane; on a panel without a plane, of the first side alone.
fn shares(to: Vector, a: Vector, b: Vector) -> (f64, f64) {
    let (aa, ab, bb) = (a.dot(a), a.dot(b), b.dot(b));
    let plane = aa * bb - ab * ab;
    let (u, v) = if plane > NO_PLANE * aa * bb {
        let (ta, tb) = (to.dot(a), to.dot(b));
        ((ta * bb - tb * ab) / plane, (tb * aa - ta * ab) / plane)
    } else if aa > 0.0 {
        (to.dot(a) / aa, 0.0)
    } else {
        (0.0, 0.0)
    };
    (u.clamp(0.0, 1.0), v.clamp(0.0, 1.0))
}
