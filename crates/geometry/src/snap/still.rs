//! Which vertices stay where they are while something is dragged.

use crate::{Point, Shell, Vector};

/// A vertex that goes by less than this part of the test movement stays.
const STAYS: f64 = 1e-6;

/// The vertices of a shell that do not move relative to a held vertex (or in space, without one) when the record goes through a small test change.
///
/// `before` is the shell as it is, `after` the shell grown with the change; `size_mm` is how large the change is. A shell that grew otherwise has no
/// vertices that can be told to stay.
#[must_use]
pub fn still_vertices(before: &Shell, after: &Shell, held: Option<u32>, size_mm: f64) -> Vec<Point> {
    if before.points.len() != after.points.len() {
        return Vec::new();
    }
    let moved = |v: usize| -> Option<Vector> { Some(*after.points.get(v)? - *before.points.get(v)?) };
    let along = held.and_then(|v| moved(v as usize)).unwrap_or(Vector::ZERO);
    (0..before.points.len())
        .filter(|v| moved(*v).is_some_and(|by| by.distance(along) <= STAYS * size_mm))
        .map(|v| before.points[v])
        .collect()
}
