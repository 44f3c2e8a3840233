//! Cutting off what lies behind the eye or far outside the picture.

use zonewright_geometry::Vector;

use crate::{Lens, Projection};

/// How far beyond the picture, in pictures' widths, positions are let run before they are cut; keeps them small enough for f32.
pub(crate) const GUARD: f64 = 3.0;

/// The half-spaces, in camera coordinates, in which things are drawn: a point is inside where `normal . p >= offset`.
pub(crate) struct Clip {
    walls: [(Vector, f64); 5],
    spare: Vec<Vector>,
}

impl Clip {
    pub(crate) fn new(lens: &Lens) -> Self {
        let reach = lens
            .centre
            .map(|half| half + 2.0 * GUARD * lens.centre[0].max(lens.centre[1]));
        let walls = match lens.projection {
            Projection::Perspective => {
                let [w, h] = reach.map(|reach| reach / lens.focal);
                [
                    (Vector::Z, lens.near),
                    (Vector::new(1.0, 0.0, w), 0.0),
                    (Vector::new(-1.0, 0.0, w), 0.0),
                    (Vector::new(0.0, 1.0, h), 0.0),
                    (Vector::new(0.0, -1.0, h), 0.0),
                ]
            }
            Projection::Parallel => {
                let [w, h] = reach.map(|reach| reach * lens.distance / lens.focal);
                [
                    (Vector::ZERO, 0.0),
                    (Vector::X, -w),
                    (Vector::NEG_X, -w),
                    (Vector::Y, -h),
                    (Vector::NEG_Y, -h),
                ]
            }
        };
        Self {
            walls,
            spare: Vec::new(),
        }
    }

    /// Cuts a convex polygon, wall by wall (Sutherland and Hodgman, 1974). Nothing may be left.
    pub(crate) fn polygon(&mut self, polygon: &mut Vec<Vector>) {
        for (normal, offset) in self.walls {
            self.spare.clear();
            for (k, &here) in polygon.iter().enumerate() {
                let next = polygon[(k + 1) % polygon.len()];
                let [a, b] = [here, next].map(|p| normal.dot(p) - offset);
                if a >= 0.0 {
                    self.spare.push(here);
                }
                if (a >= 0.0) != (b >= 0.0) {
                    self.spare.push(here.lerp(next, a / (a - b)));
                }
            }
            core::mem::swap(polygon, &mut self.spare);
        }
    }

    /// Cuts a line; none when nothing is left.
    pub(crate) fn line(&self, mut ends: [Vector; 2]) -> Option<[Vector; 2]> {
        for (normal, offset) in self.walls {
            let [a, b] = ends.map(|p| normal.dot(p) - offset);
            match (a >= 0.0, b >= 0.0) {
                (true, true) => {}
                (true, false) => ends[1] = ends[0].lerp(ends[1], a / (a - b)),
                (false, true) => ends[0] = ends[0].lerp(ends[1], a / (a - b)),
                (false, false) => return None,
            }
        }
        Some(ends)
    }
}
