//! How drags in the picture snap: from pixels to millimetres, and from what was snapped to into words and marks.

use zonewright_geometry::{
    Point, Vector,
    snap::{ANGLE_STEP, INCH_STEPS, MM_STEPS, ORDER, REACH_PX, Rules, SnapTo, round_step},
    start::{AxisClass, Star},
};
use zonewright_painter::Camera;
use zonewright_shop::text::{self, Units};

use super::zone_drag::Tip;
use crate::window::{state::State, zone_table::zone_name};

/// The rules at a place of the picture.
pub(super) fn rules(camera: &Camera, at: Point, units: Units) -> Rules<'static> {
    let scale = camera.pixels_per_mm_at(at);
    let steps = match units {
        Units::Mm => &MM_STEPS[..],
        Units::Inch => &INCH_STEPS[..],
    };
    Rules {
        reach_mm: REACH_PX / scale,
        length_step_mm: round_step(steps, scale),
        angle_step: Some(ANGLE_STEP),
        order: &ORDER,
    }
}

/// The directions of the star in use.
pub(super) fn star_directions(state: &State) -> Vec<Vector> {
    let star = state.view.zones.star.star(&state.shape().start);
    star.and_then(|star| star.directions().ok()).unwrap_or_default()
}

/// What the words need to know.
pub(super) struct Names<'a> {
    pub(super) units: Units,
    pub(super) star: Option<Star>,
    /// The zones of the neighbours.
    pub(super) neighbours: &'a [u32],
}

/// Puts into a tip what was snapped to; `edge` is the edge as it is snapped, `vertices` what there was.
pub(super) fn words(to: &[SnapTo], names: &Names<'_>, tip: &mut Tip, vertices: &[Point], edge: [Point; 2]) {
    if to.is_empty() {
        return;
    }
    let parts: Vec<String> = to.iter().map(|to| word(to, names)).collect();
    tip.lines.push(format!("Snaps to {}", parts.join(", ")));
    tip.ring = Some(edge[1]);
    for to in to {
        match to {
            SnapTo::Vertex(at) => tip.ring = vertices.get(*at).copied(),
            SnapTo::Height(at) => tip.line = vertices.get(*at).map(|vertex| [*vertex, edge[1]]),
            SnapTo::Direction(_) | SnapTo::Square(_) | SnapTo::Slope(_) | SnapTo::Azimuth(_) => {
                // Carried on beyond the end, so that the line is seen.
                tip.line = Some([edge[0], edge[1] + (edge[1] - edge[0]) * 0.5]);
            }
            SnapTo::Length(_) | SnapTo::Along(_) | SnapTo::Plane => {}
        }
    }
}

fn word(to: &SnapTo, names: &Names<'_>) -> String {
    match to {
        SnapTo::Vertex(_) => "a vertex".to_owned(),
        SnapTo::Direction(at) => direction(names.star.as_ref(), *at),
        SnapTo::Square(at) => match names.neighbours.get(*at) {
            Some(zone) => format!("square to {}", zone_name(*zone).to_lowercase()),
            None => "square to its neighbour".to_owned(),
        },
        SnapTo::Length(mm) => names.units.length(*mm),
        SnapTo::Slope(slope) if slope.degrees() == 0.0 => "level".to_owned(),
        SnapTo::Slope(slope) if slope.degrees().abs() == 90.0 => "upright".to_owned(),
        SnapTo::Slope(slope) => format!("slope {}", text::degrees(slope.degrees(), 0)),
        SnapTo::Azimuth(azimuth) => format!("azimuth {}", text::degrees(azimuth.degrees().rem_euclid(360.0), 0)),
        SnapTo::Along(mm) => format!("{} along the axis", names.units.length(*mm)),
        SnapTo::Plane => "the upright plane of its neighbours".to_owned(),
        SnapTo::Height(_) => "the height of a vertex".to_owned(),
    }
}

/// A direction by the order of symmetry of its axis.
fn direction(star: Option<&Star>, at: usize) -> String {
    let order = |class: &AxisClass| format!("a {}-fold direction", class.order());
    let count = |class: AxisClass, cubic: bool| match (class, cubic) {
        (AxisClass::FiveFold, _) => 6,
        (AxisClass::FourFold, _) => 3,
        (AxisClass::ThreeFold, true) => 4,
        (AxisClass::ThreeFold, false) => 10,
        (AxisClass::TwoFold, true) => 6,
        (AxisClass::TwoFold, false) => 15,
    };
    let (classes, cubic) = match star {
        Some(Star::Icosahedral(classes)) => (&classes[..], false),
        Some(Star::Cubic(classes)) => (&classes[..], true),
        Some(Star::Prismatic(_)) | None => return "a direction of the prism".to_owned(),
    };
    let mut behind = 0;
    for class in classes {
        behind += count(*class, cubic);
        if at < behind {
            return order(class);
        }
    }
    "a direction of the star".to_owned()
}
