//! Fitting: the paths of a translation surface, or one path, are brought to a drawn target.
//!
//! The nodes of a translation surface are `p[i][j] = r[i] + s[j]`: places of the first path and of the second, added. Two
//! steps take turns, as in the iterative closest point method (Besl and McKay, IEEE PAMI 14 (1992) 239-256; from memory): the
//! closest place of the target is found for every node, then `r` and `s` are solved for by linear least squares with those places held.
//! That translation surfaces are what flat parallelogram panels cover a form with is from Glymph, Shelden, Ceccato,
//! Mussel and Schober (Automation in Construction 13 (2004) 187-202; from memory).
//!
//! Neither step can make the sum of squares grow: the second is a minimum with the closest places held, the first then
//! replaces each of them by one that is no farther. So the history of a fit never rises.

mod banded;
mod begin;
mod closest;
mod cover;
mod dense;
mod hurry;
mod left;
mod net;
mod paths;
mod shape;
mod surface;
mod target;

pub use begin::{Plan, along, middle_lines, resampled};
pub use left::{PanelLeft, left_of_panels};
pub use paths::{Fit, FitEnd, FitOptions, FitStep, Paths};
pub use shape::{paths_of, with_paths};
pub use surface::{fit_path, fit_translation};
pub use target::{Closest, Target, TargetError};

/// The most parts of a fitted path: 500 by 500 nodes are a quarter of a million closest places an iteration.
pub const MAX_FIT_PARTS: u32 = 500;
