//! Angles: at edges, in corners, around vertices, from the horizontal.

use core::f64::consts::{PI, TAU};

use crate::{Edge, NONE, Shell, Vector};

/// Dihedral angle at an edge, measured inside, in radians from 0 to a full turn; none unless exactly two panels meet there.
///
/// Ridges are below half a turn, valleys above. Where the two panels have opposite sides out, the inside of the first one counts.
#[must_use]
pub fn dihedral(shell: &Shell, edge: u32) -> Option<f64> {
    // Crowded edges are few and sorted; a shell mostly has none.
    if shell.crowded.binary_search_by_key(&edge, |c| c.edge).is_ok() {
        return None;
    }
    let edge = &shell.edges[edge as usize];
    if edge.panels.contains(&NONE) {
        return None;
    }
    let normals = edge.panels.map(|p| shell.area_vector(p));
    let [a, b] = edge.ends.map(|v| shell.points[v as usize]);
    let along = (b - a).normalize_or_zero();
    let [sine, cosine] = fold_parts(normals, along, sides_agree(shell, edge));
    Some(PI - sine.atan2(cosine))
}

/// Sine and cosine of the fold (half a turn less the dihedral), both times the same positive factor.
pub(super) fn fold_parts(normals: [Vector; 2], along: Vector, sides_agree: bool) -> [f64; 2] {
    let [normal, other] = normals;
    let against = if sides_agree { other } else { -other };
    [normal.cross(against).dot(along), normal.dot(against)]
}

/// Whether the second panel of an edge runs against it, as it does where both panels have the same side out.
///
/// An edge with fewer than two panels agrees.
#[must_use]
pub fn sides_agree(shell: &Shell, edge: &Edge) -> bool {
    let second = edge.panels[1];
    if edge.panels[0] == NONE || second == NONE {
        return true;
    }
    let [a, b] = edge.ends;
    let [p, q, r, s] = shell.panels[second as usize].corners;
    let runs = |from: u32, to: u32| [[p, q], [q, r], [r, s], [s, p]].contains(&[from, to]);
    if runs(b, a) {
        return true;
    }
    if runs(a, b) {
        return false;
    }
    // The edge is a part of a split side.
    let outline = shell.outline(second);
    let next = outline.iter().cycle().skip(1);
    outline.iter().zip(next).any(|(&from, &to)| [from, to] == [b, a])
}

/// The angle at which a panel's sides meet in the acute corners, in radians, up to a right angle.
#[must_use]
pub fn acute_angle(shell: &Shell, panel: u32) -> f64 {
    let [a, b, _, d] = shell.corner_points(panel);
    let [u, v] = [b - a, d - a];
    u.cross(v).length().atan2(u.dot(v).abs())
}

/// The slope of a panel: the angle of its outward normal from the vertical, in radians from 0 to half a turn.
///
/// 0 lies flat with the outside up, a right angle stands upright, more than that overhangs.
#[must_use]
pub fn slope(shell: &Shell, panel: u32) -> f64 {
    let normal = shell.area_vector(panel);
    normal.x.hypot(normal.y).atan2(normal.z)
}

/// Angle deficit at each vertex, in radians: a full turn less the corner angles inside, half a turn less them on a rim.
///
/// A vertex inside the side of a panel counts half a turn of that panel. The deficits of a shell add up to a full turn
/// times its Euler number (Gauss-Bonnet for surfaces with boundary); where several sheets or more than two panels
/// meet, each edge beyond the corners takes half a turn more, which keeps that sum. A vertex without panels has none.
#[must_use]
pub fn angle_deficits(shell: &Shell) -> Vec<f64> {
    // At each vertex: edges less corners, and the sum of the corner angles.
    let mut edges_beyond = vec![0_i32; shell.points.len()];
    let mut angles = vec![0.0; shell.points.len()];
    let mut bare = vec![true; shell.points.len()];
    let mut corner = |vertex: u32, angle: f64| {
        edges_beyond[vertex as usize] -= 1;
        angles[vertex as usize] += angle;
        bare[vertex as usize] = false;
    };
    for panel in &shell.panels {
        let points = panel.corners.map(|v| shell.points[v as usize]);
        for (k, &vertex) in panel.corners.iter().enumerate() {
            let next = points[(k + 1) % 4] - points[k];
            let previous = points[(k + 3) % 4] - points[k];
            corner(vertex, angle_between(next, previous));
        }
    }
    // A vertex inside a side has one corner more there, of half a turn: the two cancel.
    for vertex in shell.edges.iter().flat_map(|e| e.ends) {
        edges_beyond[vertex as usize] += 1;
    }
    let around = edges_beyond.iter().zip(angles).zip(bare);
    let deficit = |((&beyond, angle), bare): ((&i32, f64), bool)| {
        if bare {
            0.0
        } else {
            TAU - PI * f64::from(beyond) - angle
        }
    };
    around.map(deficit).collect()
}

/// Angle between two vectors, in radians from 0 to half a turn; exact to rounding also for very small ones.
fn angle_between(u: Vector, v: Vector) -> f64 {
    u.cross(v).length().atan2(u.dot(v))
}
