//! Snapping the far end of a dragged edge, whose near end is held.

use super::{
    Around, Family, Rules, SnapTo, Snapped, first_that_holds,
    round::{Free, along_direction, nearest_multiple, round, square},
};
use crate::{Point, Vector, edit::Freedom};

/// Snaps an edge's vector. `near` is its held end; `free` says where the far end may go at all, and nothing leaves that.
#[must_use]
pub fn snap_edge(
    near: Point,
    vector: Vector,
    free: Freedom,
    around: &Around<'_>,
    rules: &Rules<'_>,
) -> Snapped<Vector> {
    let keep = |slope: bool, azimuth: bool| Free { slope, azimuth };
    let only = |free: Free| round(vector, rules, free).unwrap_or(Snapped::free(vector));
    match free {
        // Rules and the plane agree only for upright planes, as those of ribs are; across them lies the azimuth.
        Freedom::Plane(across) if across.z == 0.0 => return only(keep(true, false)),
        Freedom::Plane(_) | Freedom::Line(_) => return only(keep(false, false)),
        Freedom::Space => {}
    }
    // The edge's own beginning is no place for its end.
    let vertex = |v: Vector| on_vertex(near, v, around, rules).filter(|s| s.value.length() > rules.reach_mm);
    let direction = |v: Vector| along_direction(v, around, rules);
    let squared = |v: Vector| square(v, around, rules);
    let rounded = |v: Vector| round(v, rules, keep(true, true));
    let height = |v: Vector| at_height(near, v, around, rules);
    let targets: Vec<&dyn Fn(Vector) -> Option<Snapped<Vector>>> = rules
        .order
        .iter()
        .filter_map(|family| match family {
            Family::Vertex => Some(&vertex as &dyn Fn(Vector) -> Option<Snapped<Vector>>),
            Family::Direction => Some(&direction),
            Family::Square => Some(&squared),
            Family::Round => Some(&rounded),
            Family::Height => Some(&height),
            Family::Plane => None,
        })
        .collect();
    first_that_holds(vector, &targets)
}

/// Snaps along a locked axis: level with another vertex across the axis, or a round measure of the vector along it. `axis` has length 1.
#[must_use]
pub fn on_axis(near: Point, vector: Vector, axis: Vector, around: &Around<'_>, rules: &Rules<'_>) -> Snapped<Vector> {
    let now = vector.dot(axis);
    let level = |v: Vector| {
        let along = v.dot(axis);
        let (away, index) = nearest(around, |p| ((*p - near).dot(axis) - along).abs())?;
        let to = (around.vertices[index] - near).dot(axis);
        (away <= rules.reach_mm).then_some(Snapped {
            value: v + axis * (to - along),
            to: vec![SnapTo::Height(index)],
        })
    };
    let round = |v: Vector| {
        let along = v.dot(axis);
        let to = nearest_multiple(along.abs(), rules.length_step_mm, rules.reach_mm)?.copysign(now);
        Some(Snapped {
            value: v + axis * (to - along),
            to: vec![SnapTo::Along(to.abs())],
        })
    };
    first_that_holds(vector, &[&level, &round])
}

pub(super) fn on_vertex(near: Point, v: Vector, around: &Around<'_>, rules: &Rules<'_>) -> Option<Snapped<Vector>> {
    let far = near + v;
    let (away, index) = nearest(around, |p| p.distance(far))?;
    let value = around.vertices[index] - near;
    (away <= rules.reach_mm).then_some(Snapped {
        value,
        to: vec![SnapTo::Vertex(index)],
    })
}

pub(super) fn at_height(near: Point, v: Vector, around: &Around<'_>, rules: &Rules<'_>) -> Option<Snapped<Vector>> {
    let far = near + v;
    let (away, index) = nearest(around, |p| (p.0.z - far.0.z).abs())?;
    (away <= rules.reach_mm).then(|| Snapped {
        value: Vector::new(v.x, v.y, around.vertices[index].0.z - near.0.z),
        to: vec![SnapTo::Height(index)],
    })
}

/// The vertex with the least measure; the first of equals.
fn nearest(around: &Around<'_>, away: impl Fn(&Point) -> f64) -> Option<(f64, usize)> {
    let measured = around.vertices.iter().map(away).zip(0..);
    measured.fold(None, |best: Option<(f64, usize)>, next| match best {
        Some(best) if best.0 <= next.0 => Some(best),
        _ => Some(next),
    })
}
