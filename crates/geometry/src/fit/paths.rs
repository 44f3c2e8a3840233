//! What is fitted, how, and what comes of it.

use crate::{Point, Vector};

/// The two paths of a translation surface. Lengths in millimetres.
#[derive(Clone, PartialEq, Debug, Default)]
pub struct Paths {
    /// Where both begin.
    pub origin: Point,
    /// The edges of the first path.
    pub a: Vec<Vector>,
    /// The edges of the second path; none when only one path is fitted.
    pub b: Vec<Vector>,
}

impl Paths {
    /// The nodes: those of the first path for the beginning of the second, then for its next point, and so on.
    #[must_use]
    pub fn nodes(&self) -> Vec<Point> {
        let [first, second] = [&self.a, &self.b].map(|edges| places(edges));
        let rows = second
            .iter()
            .map(|s| first.iter().map(move |r| self.origin + (*r + *s)));
        rows.flatten().collect()
    }
}

/// The places along a path, from its beginning at zero.
pub(super) fn places(edges: &[Vector]) -> Vec<Vector> {
    let mut at = Vector::ZERO;
    core::iter::once(at)
        .chain(edges.iter().map(|edge| {
            at += *edge;
            at
        }))
        .collect()
}

/// How a fit is made.
#[derive(Clone, Copy, PartialEq, Debug)]
pub struct FitOptions {
    /// The most iterations.
    pub iterations: u32,
    /// When no node moves farther than this in an iteration, in millimetres, the fit has settled.
    pub settled_mm: f64,
    /// How much the paths are smoothed and their edges made alike, without unit; 0 only comes close. Each second difference of a
    /// path, squared, counts that many times as much as a node's distance, squared, for each node along the other path.
    pub smoothing: f64,
    /// How much it counts that the surface covers the whole target, beside that its nodes come close to it; without unit. With 0 a small part of the
    /// target is as good as all of it; with 1 both count the same.
    pub cover: f64,
    /// Whether the four corners of the surface, or the two ends of a single path, stay where they are.
    pub hold_ends: bool,
}

impl Default for FitOptions {
    /// 200 iterations, until nothing moves by a thousandth of a millimetre; no smoothing, no cover, nothing held.
    fn default() -> Self {
        Self {
            iterations: 200,
            settled_mm: 1e-3,
            smoothing: 0.0,
            cover: 0.0,
            hold_ends: false,
        }
    }
}

/// How far the nodes are from the target, before the first iteration or after one.
#[derive(Clone, Copy, PartialEq, Debug)]
pub struct FitStep {
    /// The root of the mean square of all nodes' distances, in millimetres.
    pub rms_mm: f64,
    /// The largest distance of a node, in millimetres.
    pub largest_mm: f64,
    /// The largest distance from the target's places to the surface, in millimetres; 0 while covering does not count.
    pub uncovered_mm: f64,
    /// What is made small as one length, in millimetres: the root of `sum_mm2` over all that counts. Never grows.
    pub mean_mm: f64,
    /// What is made small, in square millimetres: the squares of all distances and, with smoothing, of second differences. Never
    /// grows from one step to the next; where only nodes count, neither does `rms_mm`.
    pub sum_mm2: f64,
}

/// Why a fit ended.
#[derive(Clone, Copy, PartialEq, Eq, Debug)]
pub enum FitEnd {
    /// Nothing moved any more.
    Settled,
    /// The most iterations were reached.
    Iterations,
    /// It was told to stop.
    Stopped,
}

/// A fitted surface or path.
#[derive(Clone, PartialEq, Debug)]
pub struct Fit {
    /// The paths.
    pub paths: Paths,
    /// The distances before the first iteration, and after each.
    pub history: Vec<FitStep>,
    /// The distance of each node from the target, in millimetres, in the order of [`Paths::nodes`].
    pub left_mm: Vec<f64>,
    /// Why it ended.
    pub end: FitEnd,
}
