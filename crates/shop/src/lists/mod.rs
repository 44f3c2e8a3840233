//! Lists for the bench and the office: RFC 4180, a point as decimal sign, units in the header.

mod edges;
mod families;
mod panels;
mod table;
#[cfg(test)]
mod tests;

pub use edges::edges_csv;
pub use families::families_csv;
pub use panels::panels_csv;

use crate::Parts;

/// A list has columns for the largest number of corners present, and for four at least, so that the usual shells
/// all have the same columns.
const LEAST_CORNERS: usize = 4;

fn most_corners(parts: &Parts) -> usize {
    parts
        .panels
        .iter()
        .map(|p| p.edges.len())
        .max()
        .unwrap_or(0)
        .max(LEAST_CORNERS)
}
