//! A panel made ready for many questions: its plane, its reach, its tolerance.

use robust::{Coord3D, orient3d};

use super::tree::Extent;
use crate::{Point, Shell, Vector};

/// A panel with what every question about it needs.
pub(super) struct Plate {
    pub(super) panel: u32,
    pub(super) vertices: [u32; 4],
    pub(super) corners: [Point; 4],
    /// Cross product of the sides at corner 0.
    pub(super) normal: Vector,
    /// Length of `normal`.
    pub(super) area: f64,
    /// Product of the side lengths, which scales the rounding of `normal`.
    reach: f64,
    /// How deep something may reach in and still only touch.
    pub(super) tolerance: f64,
}

/// Bound on the rounding of a plain 3 x 3 determinant, as a part of the product of the lengths. The textbook bound is 7 + 56 eps
/// half-ulps of the permanent (Shewchuk 1997); the permanent is at most 6 times that product, and twice that is safe.
const PLAIN_ROUNDING: f64 = 42.0 * f64::EPSILON;

/// A plain height is taken when its rounding is below this part of it, or of the tolerance; else the exact determinant is asked.
const PLAIN_ENOUGH: f64 = 0.01;

impl Plate {
    pub(super) fn new(shell: &Shell, panel: u32, contact: f64) -> Self {
        let corners = shell.corner_points(panel);
        let [a, b, c, d] = corners;
        let [u, v] = [b - a, d - a];
        let normal = u.cross(v);
        // Zero on a grown panel. Joining rims moves corners, and what is bent by so much cannot be told apart by less.
        let bend = ((c - b) - v).length();
        Self {
            panel,
            vertices: shell.panels[panel as usize].corners,
            corners,
            normal,
            area: normal.length(),
            reach: u.length() * v.length(),
            tolerance: contact + bend,
        }
    }

    /// Whether the panel has an area and finite places.
    pub(super) fn is_whole(&self) -> bool {
        self.area > 0.0 && self.area.is_finite() && self.corners.iter().all(|p| p.is_finite())
    }

    /// The box of the panel and its tolerance.
    pub(super) fn extent(&self) -> Extent {
        let [a, b, c, d] = self.corners;
        Extent::NOTHING.and(a).and(b).and(c).and(d).grown(self.tolerance)
    }

    /// Height of a place above the panel's plane, in millimetres, on the side of its normal positive.
    pub(super) fn height(&self, place: Point, tolerance: f64) -> f64 {
        let [a, b, _, d] = self.corners;
        let from = place - a;
        let plain = self.normal.dot(from);
        let rounding = PLAIN_ROUNDING * self.reach * (from.x.abs() + from.y.abs() + from.z.abs());
        if rounding <= PLAIN_ENOUGH * plain.abs().max(tolerance * self.area) {
            plain / self.area
        } else {
            triple(a, b, d, place) / self.area
        }
    }

    /// Heights of another panel's corners; exactly 0 for corners that both share.
    pub(super) fn heights(&self, other: &Self, tolerance: f64) -> [f64; 4] {
        core::array::from_fn(|k| {
            if self.vertices.contains(&other.vertices[k]) {
                0.0
            } else {
                self.height(other.corners[k], tolerance)
            }
        })
    }

    /// Whether the two panels have a corner in the same place.
    pub(super) fn shares_place(&self, other: &Self) -> bool {
        let tolerance = self.tolerance.max(other.tolerance);
        self.corners.iter().any(|&p| other.has_corner_at(p, tolerance))
    }

    /// Whether every corner is where a corner of the other panel is.
    pub(super) fn is_at(&self, other: &Self) -> bool {
        let tolerance = self.tolerance.max(other.tolerance);
        let within = |p: &Plate, q: &Plate| p.corners.iter().all(|&at| q.has_corner_at(at, tolerance));
        within(self, other) && within(other, self)
    }

    fn has_corner_at(&self, place: Point, tolerance: f64) -> bool {
        self.corners.iter().any(|&q| q.distance(place) <= tolerance)
    }
}

/// The triple product (b - a) x (c - a) . (d - a), with its sign exact (adaptive predicate of J. R. Shewchuk, Discrete Comput. Geom. 18 (1997) 305-363; from memory).
pub(super) fn triple(a: Point, b: Point, c: Point, d: Point) -> f64 {
    let coord = |p: Point| {
        let [x, y, z] = p.to_array();
        Coord3D { x, y, z }
    };
    // The predicate is positive when d lies below the plane of a, b, c.
    -orient3d(coord(a), coord(b), coord(c), coord(d))
}
