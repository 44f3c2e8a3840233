//! Where the path of the start stands in the picture.
//!
//! The path has its own frame; the shell is placed, and some kinds lift it to the ground. One affine map leads from the
//! one to the other: it is found by placing, and by the difference between a grown node and the same node of the path.

use glam::{DMat3, DVec3};
use zonewright_geometry::{Placement, Point, Role, Shape, Shell, Start, Vector, grow};

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
        let lifted = own_movement(&placement, lift(shape, shell));
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
}

/// A movement in the placed frame, as a movement in the frame before placement.
#[must_use]
pub(super) fn own_movement(placement: &Placement, movement: Vector) -> Vector {
    turned(placement).inverse() * movement
}

/// The linear part of a placement: mirrored, then scaled, then turned about x, y and z.
fn turned(placement: &Placement) -> DMat3 {
    let [x, y, z] = placement.turn.map(zonewright_geometry::Angle::radians);
    let mirror = if placement.mirrored { -1.0 } else { 1.0 };
    let scale = DMat3::from_diagonal(DVec3::new(mirror, 1.0, 1.0) * placement.scale);
    DMat3::from_rotation_z(z) * DMat3::from_rotation_y(y) * DMat3::from_rotation_x(x) * scale
}

/// By how much growing lifts a start to the ground, in the placed frame: the difference to the same path as free points,
/// which is never lifted.
#[must_use]
pub(super) fn lift(shape: &Shape, shell: &Shell) -> Vector {
    let grounded = shape.start.first_word().is_ok_and(|word| word.grounded);
    let free = if grounded { shape.to_free().ok() } else { None };
    let Some(free) = free else { return Vector::ZERO };
    let (other, _) = grow(&free);
    // Both grow alike, so that their first vertices belong together; without a panel there are only the fronts' nodes.
    let first = |shell: &Shell| {
        let node = shell.fronts.iter().find_map(|front| front.nodes.first());
        shell.points.first().or(node).copied()
    };
    match (first(shell), first(&other)) {
        (Some(lifted), Some(plain)) => lifted - plain,
        _ => Vector::ZERO,
    }
}
