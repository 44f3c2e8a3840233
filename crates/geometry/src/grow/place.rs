//! Placement: mirrored, scaled, turned, moved.

use glam::{DMat3, DVec3};

use crate::{Code, Finding, Place, Placement, Point, Unit, Vector};

/// Refuses a placement that would leave no shell.
pub(super) fn usable(placement: &Placement) -> Result<(), Finding> {
    let turn = placement.turn.map(crate::Angle::degrees);
    if !placement.shift.is_finite() || !DVec3::from(turn).is_finite() || !placement.scale.is_finite() {
        return Err(Finding::new(Code::NotFinite, Place::Parameter("placement")));
    }
    if placement.scale <= 0.0 {
        return Err(Finding::parameter("placement.scale", placement.scale, 0.0, Unit::Count));
    }
    Ok(())
}

/// A placement as one map of points.
#[derive(Clone, Copy, Debug)]
pub(crate) struct Placed {
    turned: DMat3,
    shift: DVec3,
    /// Added before everything else: puts the lowest vertex at z = 0.
    lift: DVec3,
    identity: bool,
}

impl Placed {
    pub(crate) fn new(placement: &Placement, lift: f64) -> Self {
        let [x, y, z] = placement.turn.map(crate::Angle::radians);
        let mirror = DVec3::new(if placement.mirrored { -1.0 } else { 1.0 }, 1.0, 1.0);
        let turned = DMat3::from_rotation_z(z)
            * DMat3::from_rotation_y(y)
            * DMat3::from_rotation_x(x)
            * DMat3::from_diagonal(mirror * placement.scale);
        Self {
            turned,
            shift: placement.shift,
            lift: DVec3::new(0.0, 0.0, lift),
            identity: *placement == Placement::default(),
        }
    }

    /// Whether every point stays where it is.
    pub(super) fn is_nothing(&self) -> bool {
        self.identity && self.lift == DVec3::ZERO
    }

    pub(crate) fn apply(&self, p: Point) -> Point {
        let lifted = p.0 + self.lift;
        if self.identity {
            Point(lifted)
        } else {
            Point(self.turned * lifted + self.shift)
        }
    }

    /// A movement after placement, as it is before.
    pub(crate) fn back(&self, movement: DVec3) -> DVec3 {
        if self.identity {
            movement
        } else {
            self.turned.inverse() * movement
        }
    }
}

/// A vector of the grown frame as a placement turns, mirrors and scales it; in millimetres.
#[must_use]
pub fn placed_vector(placement: &Placement, vector: Vector) -> Vector {
    Placed::new(placement, 0.0).turned * vector
}
