//! Figures in plan: span, and the rectangle round the ground rim.

use glam::DVec2;
use robust::{Coord, orient2d};

use crate::{Shell, measure::Sum};

/// The narrowest rectangle round a convex hull.
#[derive(Clone, Copy, PartialEq, Debug)]
pub(super) struct Rectangle {
    /// Area of the hull itself, in square millimetres.
    pub(super) hull_area: f64,
    /// Extent along the side that the least width is measured from, in millimetres.
    pub(super) length: f64,
    /// The least width, in millimetres.
    pub(super) width: f64,
}

/// The greatest distance in plan between two vertices of panels, in millimetres.
pub(super) fn span(shell: &Shell) -> f64 {
    let corners = shell.panels.iter().flat_map(|p| p.corners);
    diameter(&hull(corners.map(|v| plan(shell, v)).collect()))
}

/// The greatest distance between two corners of a hull.
pub(super) fn diameter(hull: &[DVec2]) -> f64 {
    let mut farthest: f64 = 0.0;
    for_opposite(hull, |_, a, b| farthest = farthest.max(hull[a].distance(hull[b])));
    farthest
}

/// The ground rim in plan: the rim with the lowest vertex, the first of several.
pub(super) fn footprint(shell: &Shell) -> Option<Rectangle> {
    let lowest = |rim: &crate::Rim| {
        let heights = rim.vertices.iter().map(|&v| shell.points[v as usize].0.z);
        heights.fold(f64::INFINITY, f64::min)
    };
    let mut rims = shell.rims.iter();
    let first = rims.next()?;
    let (_, ground) = rims.fold((lowest(first), first), |best, rim| {
        let height = lowest(rim);
        if height < best.0 { (height, rim) } else { best }
    });
    let hull = hull(ground.vertices.iter().map(|&v| plan(shell, v)).collect());
    if hull.len() < 3 {
        return None;
    }
    Some(rectangle(&hull))
}

fn plan(shell: &Shell, vertex: u32) -> DVec2 {
    shell.points[vertex as usize].0.truncate()
}

fn turn(a: DVec2, b: DVec2, c: DVec2) -> f64 {
    let [a, b, c] = [a, b, c].map(|p| Coord { x: p.x, y: p.y });
    orient2d(a, b, c)
}

/// The convex hull, counter-clockwise, without points inside its sides.
///
/// Source: A. M. Andrew, Another efficient algorithm for convex hulls in two dimensions, Inf. Proc. Letters 9 (1979) 216-219 (from memory).
pub(super) fn hull(mut points: Vec<DVec2>) -> Vec<DVec2> {
    points.sort_by(|a, b| a.x.total_cmp(&b.x).then(a.y.total_cmp(&b.y)));
    points.dedup();
    if points.len() < 3 {
        return points;
    }
    let mut hull: Vec<DVec2> = Vec::new();
    for back in [false, true] {
        let floor = hull.len();
        let mut add = |p: DVec2| {
            while hull.len() >= floor + 2 && turn(hull[hull.len() - 2], hull[hull.len() - 1], p) <= 0.0 {
                hull.pop();
            }
            hull.push(p);
        };
        if back {
            points.iter().rev().for_each(|p| add(*p));
        } else {
            points.iter().for_each(|p| add(*p));
        }
        // The last point begins the other half.
        hull.pop();
    }
    hull
}

/// Goes round a hull; for each side `i` the corners that can be farthest from it, each paired with both ends of the side.
///
/// The rotating calipers of M. I. Shamos, Computational Geometry, Yale 1978 (from memory).
fn for_opposite(hull: &[DVec2], mut see: impl FnMut(usize, usize, usize)) {
    let n = hull.len();
    if n == 2 {
        see(0, 0, 1);
    }
    if n < 3 {
        return;
    }
    let above = |i: usize, j: usize| (hull[(i + 1) % n] - hull[i]).perp_dot(hull[j % n] - hull[i]);
    let mut far = 1;
    for i in 0..n {
        // No more than once round: rounding must not keep it going.
        for _ in 0..n {
            if above(i, far + 1) <= above(i, far) {
                break;
            }
            far += 1;
        }
        // A side parallel to this one has both its ends farthest.
        for j in [far % n, (far + 1) % n] {
            see(i, i, j);
            see(i, (i + 1) % n, j);
        }
    }
}

pub(super) fn rectangle(hull: &[DVec2]) -> Rectangle {
    let n = hull.len();
    let mut sum = Sum::default();
    for k in 1..n - 1 {
        sum.add((hull[k] - hull[0]).perp_dot(hull[k + 1] - hull[0]) / 2.0);
    }
    let (mut width, mut side) = (f64::INFINITY, 0);
    let mut widths = vec![0.0_f64; n];
    for_opposite(hull, |i, _, j| {
        let along = (hull[(i + 1) % n] - hull[i]).normalize_or_zero();
        widths[i] = widths[i].max(along.perp_dot(hull[j] - hull[i]));
    });
    for (i, own) in widths.into_iter().enumerate() {
        if own < width {
            (width, side) = (own, i);
        }
    }
    let along = (hull[(side + 1) % n] - hull[side]).normalize_or_zero();
    let [mut least, mut most] = [f64::INFINITY, f64::NEG_INFINITY];
    for p in hull {
        let at = along.dot(*p - hull[0]);
        (least, most) = (least.min(at), most.max(at));
    }
    Rectangle {
        hull_area: sum.value(),
        length: most - least,
        width,
    }
}
