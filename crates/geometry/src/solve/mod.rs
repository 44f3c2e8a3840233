//! Solving for what is wanted: parameters are changed until figures of the shell have wanted values.
//!
//! Continuous parameters go by damped Gauss-Newton steps within their bounds (K. Levenberg, Quart. Appl. Math. 2 (1944) 164-168;
//! D. W. Marquardt, J. SIAM 11 (1963) 431-441; both from memory), each in a scale of its own: lengths that cannot vanish by their logarithm. Counts are
//! searched around their value, fewest changes first. Of many solutions the one with the least change is looked for. Nothing is random.

mod answer;
mod count;
mod descend;
mod figure;
mod ground;
mod headroom;
mod linear;
mod problem;
#[cfg(test)]
mod tests;
mod variable;

pub use answer::{Change, Held, Missed, Needed, Reached, Solution, Unsolved, Why};
pub use figure::{Figure, FigureKind, Headroom, figure, figures, middle};

use crate::Shape;
use problem::Problem;

/// Places to start from, when the first does not lead there.
const PLACES: u32 = 12;

/// A figure that is wanted.
#[derive(Clone, Copy, PartialEq, Debug)]
pub struct Want {
    /// Which.
    pub figure: Figure,
    /// Its wanted value, in the figure's unit.
    pub value: f64,
    /// By how much it may miss, in the same unit; more than 0.
    pub tolerance: f64,
}

/// A parameter that may change.
#[derive(Clone, PartialEq, Debug)]
pub struct Free {
    /// Its key; see [`crate::parameters()`].
    pub key: String,
    /// Narrower bounds than its own: the least, the greatest.
    pub bounds: [Option<f64>; 2],
}

impl Free {
    /// A parameter within its own bounds.
    #[must_use]
    pub fn new(key: impl Into<String>) -> Self {
        Self {
            key: key.into(),
            bounds: [None; 2],
        }
    }
}

/// How much work a search does at most.
#[derive(Clone, Copy, PartialEq, Eq, Debug)]
pub struct Effort {
    /// How often the shape is grown.
    pub shells: usize,
    /// How many panels are grown, all shells together.
    pub panels: usize,
}

impl Default for Effort {
    /// A few seconds on a small machine; most answers need some tens of shells.
    fn default() -> Self {
        Self {
            shells: 6000,
            panels: 12_000_000,
        }
    }
}

/// Changes parameters of a shape until its figures are as wanted, changing as little as can be.
///
/// `stop` is asked before every shell; the search ends soon after it says so. The same input gives the same answer, unless it is stopped.
///
/// # Errors
/// [`Unsolved`]: why, with the nearest that was reached.
pub fn solve(
    shape: &Shape,
    wants: &[Want],
    free: &[Free],
    effort: Effort,
    stop: &mut dyn FnMut() -> bool,
) -> Result<Solution, Unsolved> {
    let mut problem = Problem::new(shape, wants, free, effort, stop)?;
    let at_start = problem.start.clone();
    if let Some(found) = problem.near(&at_start, PLACES) {
        return Ok(answer::solution(&problem, &found));
    }
    if let Some(found) = problem.with_other_counts() {
        return Ok(answer::solution(&problem, &found));
    }
    Err(answer::unsolved(problem, free))
}
