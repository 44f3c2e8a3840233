//! How two panels meet.

use super::plate::{Plate, triple};
use crate::Vector;

/// How two panels meet.
#[derive(Clone, Copy, PartialEq, Eq, Debug)]
pub(super) enum Meeting {
    /// Not, or in contact only.
    Apart,
    /// Their insides meet.
    Crossing,
    /// They lie on the same place.
    Doubled,
    /// A side of one lies in the inside of the other.
    Lies {
        /// Whether it is a side of the first panel.
        first: bool,
        /// Which side.
        side: u8,
        /// Whether the rest of its panel is above the other, on the side of its normal.
        above: bool,
    },
}

/// Where a panel is, seen from another's plane.
enum Stand {
    /// On one side, or on it with a corner.
    Aside,
    /// In the plane.
    Within,
    /// On one side, and in the plane with this side.
    OnSide { side: u8, above: bool },
    /// On both sides.
    Split,
}

/// How two panels meet.
///
/// Panels whose planes differ meet in their insides when each is split by the other's plane, and the pieces of the common line
/// that they cut out overlap. Where the pieces end is asked of the edges that end them: by how much one edge passes
/// the other is a triple product over a cross product, and its sign is exact (the test of Guigue and Devillers, Fast and robust
/// triangle-triangle overlap test, J. Graphics Tools 8 (2003), carried over from triangles; from memory).
pub(super) fn meet(a: &Plate, b: &Plate) -> Meeting {
    let tolerance = a.tolerance.max(b.tolerance);
    let of_b = signs(a.heights(b, tolerance), tolerance);
    match stand(of_b) {
        Stand::Aside => return Meeting::Apart,
        Stand::Within => return in_plane(a, b, tolerance),
        Stand::OnSide { side, above } => return lies(a, b, false, side, above, tolerance),
        Stand::Split => {}
    }
    let of_a = signs(b.heights(a, tolerance), tolerance);
    match stand(of_a) {
        Stand::Aside => Meeting::Apart,
        Stand::Within => in_plane(a, b, tolerance),
        Stand::OnSide { side, above } => lies(b, a, true, side, above, tolerance),
        Stand::Split if pieces_overlap(a, of_a, b, of_b, tolerance) => Meeting::Crossing,
        Stand::Split => Meeting::Apart,
    }
}

/// -1, 0, 1 for below, on, above.
fn signs(heights: [f64; 4], tolerance: f64) -> [i8; 4] {
    heights.map(|h| i8::from(h > tolerance) - i8::from(h < -tolerance))
}

fn stand(signs: [i8; 4]) -> Stand {
    let above = signs.contains(&1);
    let below = signs.contains(&-1);
    if above && below {
        return Stand::Split;
    }
    if !above && !below {
        return Stand::Within;
    }
    let on = |k: usize| signs[k % 4] == 0;
    let side = (0_u8..4).find(|&k| on(usize::from(k)) && on(usize::from(k) + 1));
    side.map_or(Stand::Aside, |side| Stand::OnSide { side, above })
}

/// A side of `other` lies in the plane of `ground`: does it lie in its inside?
fn lies(ground: &Plate, other: &Plate, first: bool, side: u8, above: bool, tolerance: f64) -> Meeting {
    let ends = [usize::from(side), (usize::from(side) + 1) % 4];
    let place = |v: u32| ground.vertices.iter().position(|&w| w == v);
    let shared = ends.map(|k| place(other.vertices[k]));
    if let [Some(p), Some(q)] = shared
        && p % 2 != q % 2
    {
        // The two panels share an edge; that is how panels meet.
        return Meeting::Apart;
    }
    let [from, to] = ends.map(|k| other.corners[k]);
    if length_inside(ground, [from, to], tolerance) > tolerance {
        Meeting::Lies { first, side, above }
    } else {
        Meeting::Apart
    }
}

/// How much of a line in a panel's plane lies in the panel's inside, farther than the tolerance from its sides.
pub(super) fn length_inside(ground: &Plate, line: [crate::Point; 2], tolerance: f64) -> f64 {
    let along = line[1] - line[0];
    let [mut from, mut to] = [0.0_f64, 1.0_f64];
    for k in 0..4 {
        let corner = ground.corners[k];
        let inward = ground
            .normal
            .cross(ground.corners[(k + 1) % 4] - corner)
            .normalize_or_zero();
        let start = (line[0] - corner).dot(inward) - tolerance;
        let rise = along.dot(inward);
        // The part with start + t * rise > 0.
        if rise > 0.0 {
            from = from.max(-start / rise);
        } else if rise < 0.0 {
            to = to.min(-start / rise);
        } else if start <= 0.0 {
            return 0.0;
        }
    }
    (to - from).max(0.0) * along.length()
}

/// Two panels in one plane: doubled, overlapping with an area, or beside each other.
fn in_plane(a: &Plate, b: &Plate, tolerance: f64) -> Meeting {
    let normal = if a.area >= b.area { a.normal } else { b.normal };
    // Parallelograms in a plane are apart exactly when a line along a side of one parts them.
    let sides = [
        a.corners[1] - a.corners[0],
        a.corners[3] - a.corners[0],
        b.corners[1] - b.corners[0],
        b.corners[3] - b.corners[0],
    ];
    let overlap = |side: Vector| {
        let axis = normal.cross(side).normalize_or_zero();
        let reach = |plate: &Plate| {
            let along = plate.corners.map(|p| (p - a.corners[0]).dot(axis));
            let least = along.into_iter().fold(f64::INFINITY, f64::min);
            [least, along.into_iter().fold(f64::NEG_INFINITY, f64::max)]
        };
        let [of_a, of_b] = [reach(a), reach(b)];
        of_a[1].min(of_b[1]) - of_a[0].max(of_b[0])
    };
    if !sides.into_iter().all(|side| overlap(side) > tolerance) {
        Meeting::Apart
    } else if a.is_at(b) {
        Meeting::Doubled
    } else {
        Meeting::Crossing
    }
}

/// Whether the pieces that two split panels cut out of the common line overlap.
///
/// Along normal(a) x normal(b), panel a begins where it rises above b's plane and ends where it falls below it; panel b begins
/// where it falls below a's plane and ends where it rises.
fn pieces_overlap(a: &Plate, of_a: [i8; 4], b: &Plate, of_b: [i8; 4], tolerance: f64) -> bool {
    let ends_after = |sign: i8| {
        let [of_a, of_b] = [of_a, of_b].map(|signs| turning_sides(signs.map(|s| s * sign)));
        let pairs = of_a.into_iter().flat_map(|k| of_b.map(|m| (k, m)));
        pairs
            .into_iter()
            .all(|(k, m)| f64::from(sign) * passes(a, k, b, m) > tolerance)
    };
    ends_after(1) && ends_after(-1)
}

/// The sides on which the signs turn from 1 to -1: one, given twice, or the two at a corner that is on the plane.
fn turning_sides(signs: [i8; 4]) -> [usize; 2] {
    let leaves = (0..4).find(|&k| signs[k] == 1 && signs[(k + 1) % 4] < 1).unwrap_or(0);
    let arrives = (leaves..leaves + 4).find(|&k| signs[(k + 1) % 4] == -1);
    [leaves, arrives.unwrap_or(leaves) % 4]
}

/// By how much side k of a passes side m of b, along the normal of both: positive when a falling side of a comes after a
/// falling side of b, negative when a rising side of a comes before a rising side of b.
fn passes(a: &Plate, k: usize, b: &Plate, m: usize) -> f64 {
    let [p, q] = [a.corners[k], a.corners[(k + 1) % 4]];
    let [r, s] = [b.corners[m], b.corners[(m + 1) % 4]];
    let between = (q - p).cross(s - r).length();
    // Sides that share a corner, or are parallel, do not pass each other.
    if between == 0.0 {
        return 0.0;
    }
    triple(p, q, s, r) / between
}
