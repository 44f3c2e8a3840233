//! From a shape to the paths of its translation surface where it stands, and back.

use super::paths::{Paths, places};
use crate::{
    Act, Courses, Finding, Outside, Point, Shape, Side, Spurs, Start, Step, StepId, Vector, ZoneRef,
    grow::{grow, place::Placed},
    start::{Curve, CurveShape, TranslationForm},
};

/// The paths of a shape's translation surface, placed; none for other kinds of start, and where they cannot be read.
#[must_use]
pub fn paths_of(shape: &Shape) -> Option<Paths> {
    let Start::Translation(form) = &shape.start else {
        return None;
    };
    let (shell, _) = grow(shape);
    let place = Placed::new(&shape.placement, shell.lift_mm);
    let line = |curve: &Curve| -> Option<Vec<Vector>> {
        let points: Vec<Point> = places(&curve.edges().ok()?)
            .into_iter()
            .map(|p| place.apply(Point(p)))
            .collect();
        Some(points.windows(2).map(|two| two[1] - two[0]).collect())
    };
    Some(Paths {
        origin: place.apply(Point::ORIGIN),
        a: line(&form.zig)?,
        b: line(&form.zag)?,
    })
}

/// The shape with these placed paths as the two free paths of a translation surface: the first as zigs, the second as zags.
///
/// Turn, scale and mirror of its placement stay; its movement brings the surface to where the paths are. Vectors that the shape
/// gave to zones of its start are left out: the paths have them now. The steps of a translation surface stay; in place of those of any other start
/// the surface is laid until still, and its outside is up.
///
/// # Errors
/// When an edge is too short or too long to be one, or there are too many.
pub fn with_paths(shape: &Shape, paths: &Paths) -> Result<Shape, Finding> {
    let mut next = shape.clone();
    // Edges before placement: the placement without its movement, turned back.
    let linear = Placed::new(
        &crate::Placement {
            shift: Vector::ZERO,
            ..shape.placement
        },
        0.0,
    );
    let curve = |edges: &[Vector]| {
        let own: Vec<Vector> = edges.iter().map(|edge| linear.back(*edge)).collect();
        Curve {
            parts: u32::try_from(own.len()).unwrap_or(u32::MAX),
            shape: CurveShape::Free(places(&own).into_iter().map(Point).collect()),
            azimuth: crate::Angle::default(),
        }
    };
    next.start = Start::Translation(TranslationForm {
        zig: curve(&paths.a),
        zag: curve(&paths.b),
    });
    next.start.first_word()?;
    let of_start = |zone: &ZoneRef| matches!(zone, ZoneRef::Start(_));
    next.zones.retain(|rule| !of_start(&rule.zone));
    if !matches!(shape.start, Start::Translation(_)) {
        next.zones.clear();
        next.finish.clear();
        next.steps = vec![Step {
            id: StepId(1),
            name: None,
            on: true,
            side: Side::Fore,
            act: Act::Lay {
                courses: Courses::UntilStill,
                spurs: Spurs::default(),
            },
        }];
        next.outside = Outside::by_rule(&next);
    }
    next.placement.shift = Vector::ZERO;
    let (shell, _) = grow(&next);
    let begins = Placed::new(&next.placement, shell.lift_mm).apply(Point::ORIGIN);
    next.placement.shift = paths.origin - begins;
    Ok(next)
}
