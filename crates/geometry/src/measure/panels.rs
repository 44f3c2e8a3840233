//! Measures of single panels and edges.

use crate::{Point, Shell};

/// Length of an edge, in millimetres.
#[must_use]
pub fn edge_length(shell: &Shell, edge: u32) -> f64 {
    let [a, b] = shell.edges[edge as usize].ends;
    shell.points[a as usize].distance(shell.points[b as usize])
}

/// The short and the long diagonal of a panel, in millimetres.
#[must_use]
pub fn diagonals(shell: &Shell, panel: u32) -> [f64; 2] {
    let [a, b, c, d] = shell.corner_points(panel);
    let [one, other] = [a.distance(c), b.distance(d)];
    [one.min(other), one.max(other)]
}

/// Area of a panel, in square millimetres.
#[must_use]
pub fn panel_area(shell: &Shell, panel: u32) -> f64 {
    shell.area_vector(panel).length()
}

/// The middle of a panel, where its diagonals meet.
#[must_use]
pub fn centroid(shell: &Shell, panel: u32) -> Point {
    let [a, b, c, d] = shell.corner_points(panel);
    // From one corner on, so that a shell far from the origin loses no digits.
    a + ((b - a) + (c - a) + (d - a)) * 0.25
}
