//! Where the path of the start stands in the picture.
//!
//! The path has its own frame; the shell is placed, and some kinds lift it to the ground. One affine map leads from the
//! one to the other: the lift, which the shell keeps, and then the placing.

use glam::{DMat3, DVec3};
use zonewright_geometry::{Placement, Point, Role, Shape, Shell, Start, Vector};

/// The start's path where it stands.
#[derive(Clone, PartialEq, Debug)]
pub struct PlacedPath {
    /// Its points in the path's own frame, without the repeated last one of a closed path.
    pub own: Vec<Point>,
    /// The same points in the picture.
    pub placed: Vec<Point>,
    /// The role of each edge.
    pub roles: Vec<Role>,
    /// Whether it is closed.
    pub closed: bool,
    /// Whether the start is a free path.
    pub free: bool,
    placement: Placement,
}

impl PlacedPath {
    /// Places the path of a shape; none when the start gives no path.
    #[must_use]
    pub fn of(shape: &Shape, shell: &Shell) -> Option<Self> {
        let path = shape.start.to_free().ok()?;
        let word = path.first_word().ok()?;
        let mut own = word.nodes();
        if word.closed {
            own.pop();
        }
        let placement = shape.placement;
        // The own frame is the one that the path has once it is free: a drag that frees it goes on in the same frame.
        let lifted = Vector::Z * shell.lift_mm;
        for point in &mut own {
            *point += lifted;
        }
        let placed = own
            .iter()
            .map(|p| Point(turned(&placement) * p.0 + placement.shift))
            .collect();
        Some(Self {
            own,
            placed,
            roles: word.letters.iter().map(|l| l.role).collect(),
            closed: word.closed,
            free: matches!(shape.start, Start::Zigzag(_)),
            placement,
        })
    }

    /// A movement in the picture, as a movement in the path's own frame.
    #[must_use]
    pub fn own_movement(&self, movement: Vector) -> Vector {
        own_movement(&self.placement, movement)
    }

    /// A movement in the path's own frame, as a movement in the picture.
    #[must_use]
    pub(super) fn placed_movement(&self, movement: Vector) -> Vector {
        turned(&self.placement) * movement
    }
}

/// A movement in the placed frame, as a movement in the frame before placement.
#[must_use]
pub(super) fn own_movement(placement: &Placement, movement: Vector) -> Vector {
    turned(placement).inverse() * movement
}

/// The linear part of a placement: mirrored, then scaled, then turned about x, y and z.
pub(super) fn turned(placement: &Placement) -> DMat3 {
    let [x, y, z] = placement.turn.map(zonewright_geometry::Angle::radians);
    let mirror = if placement.mirrored { -1.0 } else { 1.0 };
    let scale = DMat3::from_diagonal(DVec3::new(mirror, 1.0, 1.0) * placement.scale);
    DMat3::from_rotation_z(z) * DMat3::from_rotation_y(y) * DMat3::from_rotation_x(x) * scale
}
