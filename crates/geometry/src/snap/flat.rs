//! Snapping in a drawing: a plan, a front or a side, in parallel projection.

use super::{Around, Rules, SnapTo, Snapped, edge::snap_edge, point::snap_point};
use crate::{Point, Vector, edit::Freedom};

/// A drawing, seen along a direction of length 1. What is dragged in it keeps its depth, and lengths and angles are those of the drawing.
#[derive(Clone, Copy, PartialEq, Debug)]
pub struct Drawing {
    sight: Vector,
}

/// A direction out of the drawing by more than this, as a sine, has no place in it.
const IN_DRAWING: f64 = 1e-9;

impl Drawing {
    /// A drawing seen along a direction of length 1.
    #[must_use]
    pub const fn along(sight: Vector) -> Self {
        Self { sight }
    }

    fn flat(self, v: Vector) -> Vector {
        v - self.sight * v.dot(self.sight)
    }

    /// Snaps an edge's vector as [`snap_edge`] does.
    #[must_use]
    pub fn snap_edge(self, near: Point, vector: Vector, around: &Around<'_>, rules: &Rules<'_>) -> Snapped<Vector> {
        let depth = self.sight * vector.dot(self.sight);
        let flat = Flattened::of(self, near, around);
        let snapped = snap_edge(near, self.flat(vector), Freedom::Space, &flat.around(), rules);
        self.back(snapped, &flat, |v| self.flat(v) + depth)
    }

    /// Snaps a point as [`snap_point`] does.
    #[must_use]
    pub fn snap_point(
        self,
        point: Point,
        before: Option<Point>,
        behind: Option<Point>,
        around: &Around<'_>,
        rules: &Rules<'_>,
    ) -> Snapped<Point> {
        let flat = Flattened::of(self, point, around);
        let onto = |p: Point| point + self.flat(p - point);
        let snapped = snap_point(point, before.map(onto), behind.map(onto), &flat.around(), rules);
        self.back(snapped, &flat, onto)
    }

    /// A result in the drawing's plane, with directions by their places among all of them. What holds of everything in the
    /// drawing is not said: in a plan all is level, in a front all has the azimuth of the drawing.
    fn back<T>(self, snapped: Snapped<T>, flat: &Flattened, onto: impl Fn(T) -> T) -> Snapped<T> {
        let plan = self.sight.z.abs() > 0.5;
        let said = snapped.to.into_iter().filter_map(|to| match to {
            SnapTo::Slope(_) if plan => None,
            SnapTo::Azimuth(_) if !plan => None,
            SnapTo::Plane if !plan => None,
            SnapTo::Height(_) if plan => None,
            SnapTo::Direction(at) => flat.directions.get(at).map(|(of, _)| SnapTo::Direction(*of)),
            other => Some(other),
        });
        Snapped {
            to: said.collect(),
            value: onto(snapped.value),
        }
    }
}

/// What is around, as it is seen in a drawing.
struct Flattened {
    vertices: Vec<Point>,
    directions: Vec<(usize, Vector)>,
    units: Vec<Vector>,
    neighbours: Vec<Vector>,
}

impl Flattened {
    fn of(drawing: Drawing, at: Point, around: &Around<'_>) -> Self {
        let directions: Vec<(usize, Vector)> = around
            .directions
            .iter()
            .copied()
            .enumerate()
            .filter(|(_, d)| d.dot(drawing.sight).abs() <= IN_DRAWING)
            .collect();
        let neighbours = around.neighbours.iter().map(|v| drawing.flat(*v));
        Self {
            vertices: around.vertices.iter().map(|p| at + drawing.flat(*p - at)).collect(),
            units: directions.iter().map(|(_, d)| *d).collect(),
            directions,
            // A neighbour seen end-on has no direction in the drawing; it keeps its place.
            neighbours: neighbours
                .map(|v| if v.length() > IN_DRAWING { v } else { Vector::ZERO })
                .collect(),
        }
    }

    fn around(&self) -> Around<'_> {
        Around {
            vertices: &self.vertices,
            directions: &self.units,
            neighbours: &self.neighbours,
        }
    }
}
