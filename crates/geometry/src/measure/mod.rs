//! Measures of a grown shell.

mod angles;
mod between;
mod borders;
mod panels;
mod sum;
mod totals;

pub use angles::{acute_angle, angle_deficits, dihedral, sides_agree, slope};
pub use between::{Between, Figure, PARALLEL, between};
pub use borders::Borders;
pub use panels::{centroid, diagonals, edge_length, panel_area};
pub use sum::Sum;
pub use totals::{Range, Totals, totals};
