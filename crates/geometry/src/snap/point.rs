//! Snapping a dragged point of a path, whose neighbours are held.

use super::{
    Around, Family, Rules, SnapTo, Snapped, edge, first_that_holds,
    round::{Free, along_direction, round, square},
};
use crate::{Point, Vector};

/// Snaps a point. The edges from the point before and from the point behind, where there are any, snap in length, slope and azimuth, the one before
/// first; with both, the point also snaps to the upright plane through them.
#[must_use]
pub fn snap_point(
    point: Point,
    before: Option<Point>,
    behind: Option<Point>,
    around: &Around<'_>,
    rules: &Rules<'_>,
) -> Snapped<Point> {
    type Target<'t> = Box<dyn Fn(Vector) -> Option<Snapped<Vector>> + 't>;
    let mut targets: Vec<Target<'_>> = Vec::new();
    let neighbours = || [before, behind].into_iter().flatten();
    for family in rules.order {
        match family {
            Family::Vertex => targets.push(Box::new(|p| edge::on_vertex(Point::ORIGIN, p, around, rules))),
            Family::Height => targets.push(Box::new(|p| edge::at_height(Point::ORIGIN, p, around, rules))),
            Family::Plane => {
                if let (Some(a), Some(b)) = (before, behind) {
                    targets.push(Box::new(move |p| in_upright_plane(p, a, b, rules)));
                }
            }
            Family::Direction | Family::Square | Family::Round => {
                for from in neighbours() {
                    let family = *family;
                    targets.push(Box::new(move |p| {
                        let v = p - from.0;
                        let snapped = match family {
                            Family::Direction => along_direction(v, around, rules),
                            Family::Square => square(v, around, rules),
                            _ => {
                                let all = Free {
                                    slope: true,
                                    azimuth: true,
                                };
                                round(v, rules, all)
                            }
                        }?;
                        Some(Snapped {
                            value: from.0 + snapped.value,
                            to: snapped.to,
                        })
                    }));
                }
            }
        }
    }
    let targets: Vec<_> = targets.iter().map(AsRef::as_ref).collect();
    let Snapped { value, to } = first_that_holds(point.0, &targets);
    Snapped {
        value: Point(value),
        to,
    }
}

fn in_upright_plane(p: Vector, a: Point, b: Point, rules: &Rules<'_>) -> Option<Snapped<Vector>> {
    let along = b - a;
    let across = Vector::new(-along.y, along.x, 0.0);
    let length = across.length();
    if length <= rules.reach_mm {
        // One above the other: every upright plane through one holds both.
        return None;
    }
    let across = across / length;
    let away = (p - a.0).dot(across);
    (away.abs() <= rules.reach_mm).then(|| {
        let on = p - across * away;
        Snapped {
            value: on - across * (on - a.0).dot(across),
            to: vec![SnapTo::Plane],
        }
    })
}
