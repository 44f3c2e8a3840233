//! Snapping: a dragged end of an edge or point of a path is taken to something exact nearby.
//!
//! Everything here is pure: the caller turns pixels into millimetres, says what is around, and gets the place and what it is. All
//! vectors are in the frame that the user sees. A snap never moves anything by more than its reach, hits the exact value, and leaves alone
//! what it has snapped: applied again it changes nothing.
//!
//! Kinds of target are tried in an order of priority. What is snapped by one kind must not lie within reach of a kind tried
//! before it: otherwise the next movement of the pointer would make it jump.

mod edge;
mod flat;
mod point;
mod round;
mod still;

pub use edge::{on_axis, snap_edge};
pub use flat::Drawing;
pub use point::snap_point;
pub use round::{INCH_STEPS, MM_STEPS, round_step};
pub use still::still_vertices;

use crate::{Angle, Point, Vector};

/// A kind of target.
#[derive(Clone, Copy, PartialEq, Eq, Debug)]
pub enum Family {
    /// Another vertex.
    Vertex,
    /// A direction of the star in use, and a round length along it.
    Direction,
    /// Square to a neighbouring edge, and a round length.
    Square,
    /// A round length, slope or azimuth.
    Round,
    /// The upright plane through both neighbours of a point.
    Plane,
    /// The height of another vertex.
    Height,
}

/// The usual order: what is exactly there goes before what is only a round number, and what fixes more before what fixes less.
pub const ORDER: [Family; 6] = [
    Family::Vertex,
    Family::Direction,
    Family::Square,
    Family::Round,
    Family::Plane,
    Family::Height,
];

/// Slopes and azimuths snap to multiples of this: the finest angle that is read at a glance off a bench's protractor stop.
pub const ANGLE_STEP: Angle = Angle::from_degrees(5.0);

/// How near the pointer must come, in pixels. It is a little less than that of picking, so that one can also drop beside a target.
pub const REACH_PX: f64 = 8.0;

/// How snapping goes.
#[derive(Clone, Copy, Debug)]
pub struct Rules<'a> {
    /// The farthest that anything is moved, in millimetres.
    pub reach_mm: f64,
    /// Lengths snap to multiples of this, in millimetres; see [`round_step`]. None leaves lengths alone.
    pub length_step_mm: Option<f64>,
    /// Slopes and azimuths snap to multiples of this. None leaves them alone.
    pub angle_step: Option<Angle>,
    /// Kinds of target, the first goes first.
    pub order: &'a [Family],
}

/// What there is to snap to.
#[derive(Clone, Copy, Default, Debug)]
pub struct Around<'a> {
    /// Vertices that stay where they are during the drag.
    pub vertices: &'a [Point],
    /// Directions of length 1; either way along them counts.
    pub directions: &'a [Vector],
    /// Neighbouring edges to be square to.
    pub neighbours: &'a [Vector],
}

/// What something was snapped to.
#[derive(Clone, Copy, PartialEq, Debug)]
pub enum SnapTo {
    /// A vertex, by its place in [`Around::vertices`].
    Vertex(usize),
    /// A direction, by its place in [`Around::directions`].
    Direction(usize),
    /// Square to a neighbour, by its place in [`Around::neighbours`].
    Square(usize),
    /// A round length, in millimetres.
    Length(f64),
    /// A round slope above the horizontal.
    Slope(Angle),
    /// A round azimuth, from x towards y.
    Azimuth(Angle),
    /// A round measure along a locked axis, in millimetres.
    Along(f64),
    /// The upright plane through both neighbours.
    Plane,
    /// The height of a vertex, by its place in [`Around::vertices`]; along a locked axis, level with it across that axis.
    Height(usize),
}

/// Something snapped.
#[derive(Clone, PartialEq, Debug)]
pub struct Snapped<T> {
    /// Where it is now.
    pub value: T,
    /// What it was snapped to; empty when nothing was in reach.
    pub to: Vec<SnapTo>,
}

impl<T> Snapped<T> {
    const fn free(value: T) -> Self {
        Self { value, to: Vec::new() }
    }
}

/// Values nearer than this, in millimetres, are the same place.
const SAME_MM: f64 = 1e-9;

/// The first target whose result no target before it would take away.
fn first_that_holds(at: Vector, targets: &[&dyn Fn(Vector) -> Option<Snapped<Vector>>]) -> Snapped<Vector> {
    for (priority, target) in targets.iter().enumerate() {
        let Some(found) = target(at) else { continue };
        let holds = targets[..priority]
            .iter()
            .all(|before| before(found.value).is_none_or(|taken| taken.value.distance(found.value) <= SAME_MM));
        if holds {
            return found;
        }
    }
    Snapped::free(at)
}
