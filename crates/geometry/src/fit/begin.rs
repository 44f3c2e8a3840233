//! Where a fit begins: paths over the middle of a target, or along a line.

use super::{net::many, paths::Paths, target::Target};
use crate::{Point, Vector};

/// The smallest rectangle in plan around a target.
#[derive(Clone, Copy, PartialEq, Debug)]
pub struct Plan {
    /// A corner; its height is the least of the target.
    pub corner: Point,
    /// Along the first side, level, with its length; the side that points along +x more than along y.
    pub first: Vector,
    /// Along the second side, to the left of the first.
    pub second: Vector,
}

impl Plan {
    /// The rectangle, by trying the direction of every side of the points' convex outline: one of them lies along it (Freeman and Shapira,
    /// Comm. ACM 18 (1975) 409-413; from memory). Directions that are no better than x and y are not taken.
    #[must_use]
    pub fn of(target: &Target) -> Self {
        /// How much smaller an area must be, as a share, to be smaller beyond rounding.
        const SMALLER: f64 = 1e-9;
        let outline = outline(target.points());
        let mut best = extent(&outline, Vector::X);
        for (k, from) in outline.iter().enumerate() {
            let along = (outline[(k + 1) % outline.len()] - *from).normalize_or_zero();
            if along == Vector::ZERO {
                continue;
            }
            let found = extent(&outline, along);
            if found.2 < best.2 * (1.0 - SMALLER) {
                best = found;
            }
        }
        let low = target.points().iter().map(|p| p.0.z).fold(f64::INFINITY, f64::min);
        let (mut corner, mut first, _, mut second) = (best.0, best.1, best.2, best.3);
        // A quarter turn at a time, until the first side points along +x more than along y.
        for _ in 0..3 {
            if first.x > 0.0 && first.x >= first.y.abs() {
                break;
            }
            corner += first;
            (first, second) = (second, -first);
        }
        corner.z = low;
        Self {
            corner: Point(corner),
            first,
            second,
        }
    }
}

/// The rectangle along a direction: corner, first side, area, second side.
fn extent(outline: &[Vector], along: Vector) -> (Vector, Vector, f64, Vector) {
    let left = Vector::new(-along.y, along.x, 0.0);
    let range = |axis: Vector| {
        outline
            .iter()
            .map(|p| p.dot(axis))
            .fold((f64::INFINITY, f64::NEG_INFINITY), |(low, high), d| {
                (low.min(d), high.max(d))
            })
    };
    let (u, v) = (range(along), range(left));
    let (long, wide) = (u.1 - u.0, v.1 - v.0);
    (along * u.0 + left * v.0, along * long, long * wide, left * wide)
}

/// The convex outline in plan, by Andrew's monotone chain (Inf. Proc. Letters 9 (1979) 216-219; from memory).
fn outline(points: &[Point]) -> Vec<Vector> {
    let mut flat: Vec<Vector> = points.iter().map(|p| Vector::new(p.0.x, p.0.y, 0.0)).collect();
    flat.sort_by(|a, b| a.x.total_cmp(&b.x).then(a.y.total_cmp(&b.y)));
    flat.dedup();
    let mut chain: Vec<Vector> = Vec::new();
    for pass in 0..2 {
        let kept = chain.len();
        for &p in &flat {
            while chain.len() >= kept + 2 {
                let (a, b) = (chain[chain.len() - 2], chain[chain.len() - 1]);
                if (b - a).cross(p - b).z > 0.0 {
                    break;
                }
                chain.pop();
            }
            chain.push(p);
        }
        if pass == 0 || chain.len() > 1 {
            chain.pop();
        }
        flat.reverse();
    }
    if chain.is_empty() { flat } else { chain }
}

/// Paths of so many parts over the two middle lines of a target: each follows the highest of the target across its middle, in equal
/// steps in plan. Where nothing lies above the plan, the closest place gives the height.
#[must_use]
pub fn middle_lines(target: &Target, parts: [u32; 2]) -> Paths {
    let plan = Plan::of(target);
    let at = |u: f64, v: f64| {
        let p = plan.corner + plan.first * u + plan.second * v;
        let height = target.height(p.0.x, p.0.y).unwrap_or_else(|| target.closest(p).at.0.z);
        Point::new(p.0.x, p.0.y, height)
    };
    let steps = |parts: u32, place: &dyn Fn(f64) -> Point| -> Vec<Point> {
        let parts = parts.max(1);
        (0..=parts).map(|k| place(f64::from(k) / f64::from(parts))).collect()
    };
    let first = steps(parts[0], &|u| at(u, 0.5));
    let second = steps(parts[1], &|v| at(0.5, v));
    let edges = |points: &[Point]| points.windows(2).map(|two| two[1] - two[0]).collect();
    // Both middle lines go through the middle: the surface of their sum is moved so that it does, too.
    Paths {
        origin: first[0] + (second[0] - at(0.5, 0.5)),
        a: edges(&first),
        b: edges(&second),
    }
}

/// Points along the longest run of joined segments of a target, at equal lengths.
#[must_use]
pub fn along(target: &Target, parts: u32) -> Vec<Point> {
    let place = |v: u32| target.points()[v as usize];
    let mut best: (f64, Vec<Point>) = (-1.0, Vec::new());
    let mut run: Vec<Point> = Vec::new();
    let mut last = None;
    let mut keep = |run: &mut Vec<Point>| {
        let length = run.windows(2).map(|two| two[0].distance(two[1])).sum();
        if length > best.0 {
            best = (length, run.clone());
        }
        run.clear();
    };
    for [from, to] in target.segments() {
        if last != Some(*from) {
            keep(&mut run);
            run.push(place(*from));
        }
        run.push(place(*to));
        last = Some(*to);
    }
    keep(&mut run);
    resampled(&best.1, parts)
}

/// The same line with so many parts, at equal lengths along it.
#[must_use]
pub fn resampled(line: &[Point], parts: u32) -> Vec<Point> {
    let mut gone = 0.0;
    let marks: Vec<f64> = core::iter::once(0.0)
        .chain(line.windows(2).map(|two| {
            gone += two[0].distance(two[1]);
            gone
        }))
        .collect();
    let (Some(&first), Some(&last)) = (line.first(), line.last()) else {
        return Vec::new();
    };
    let parts = parts.max(1) as usize;
    let mut points = Vec::with_capacity(parts + 1);
    points.push(first);
    for k in 1..parts {
        let want = gone * many(k) / many(parts);
        let next = marks
            .partition_point(|&mark| mark <= want)
            .clamp(1, line.len().max(2) - 1);
        let Some(&to) = line.get(next) else { break };
        let span = marks[next] - marks[next - 1];
        let share = if span > 0.0 {
            (want - marks[next - 1]) / span
        } else {
            0.0
        };
        points.push(line[next - 1] + (to - line[next - 1]) * share);
    }
    points.push(last);
    points
}
