//! Measures between two things: vertices, edges, panels.

use crate::{Point, Vector};

/// Directions less than this far apart count as parallel, in radians. Over a shell of ten metres that is a hundredth of a millimetre,
/// which no saw cuts; parallel zones of a grown shell agree to rounding, far below.
pub const PARALLEL: f64 = 1e-6;

/// Something that is measured from or to.
#[derive(Clone, Copy, PartialEq, Debug)]
pub enum Figure {
    /// A place.
    Point(Point),
    /// An edge, by its ends. From a point, the whole line that it lies on counts.
    Line([Point; 2]),
    /// A panel, by its corners. The whole plane that it lies in counts.
    Plane([Point; 4]),
}

impl Figure {
    /// The middle.
    #[must_use]
    pub fn middle(&self) -> Point {
        match *self {
            Self::Point(at) => at,
            Self::Line([a, b]) => a + (b - a) * 0.5,
            Self::Plane([a, _, c, _]) => a + (c - a) * 0.5,
        }
    }

    /// What says where it points: nothing for a point, the direction of a line, the normal of a plane; of length 1.
    fn direction(&self) -> Option<Vector> {
        match *self {
            Self::Point(_) => None,
            Self::Line([a, b]) => (b - a).try_normalize(),
            Self::Plane([a, b, _, d]) => (b - a).cross(d - a).try_normalize(),
        }
    }

    fn is_usable(&self) -> bool {
        let finite = match self {
            Self::Point(at) => at.is_finite(),
            Self::Line(ends) => ends.iter().all(|p| p.is_finite()),
            Self::Plane(corners) => corners.iter().all(|p| p.is_finite()),
        };
        finite && (matches!(self, Self::Point(_)) || self.direction().is_some())
    }
}

/// What lies between two things.
#[derive(Clone, Copy, PartialEq, Debug)]
pub struct Between {
    /// Where it is measured, on the first thing and on the second. A foot on the line of an edge or in the plane of a panel can lie beyond
    /// the edge or the panel. Where there is no distance these are the middles.
    pub feet: [Point; 2],
    /// The distance, in millimetres; none for a panel and another thing with a direction, unless they are parallel.
    pub distance_mm: Option<f64>,
    /// The angle between the lines or planes, in radians from 0 to a quarter turn; none when one of the things is a point.
    pub angle: Option<f64>,
}

impl Between {
    /// From the first foot to the second.
    #[must_use]
    pub fn run(&self) -> Vector {
        self.feet[1] - self.feet[0]
    }

    const fn swapped(mut self) -> Self {
        self.feet = [self.feet[1], self.feet[0]];
        self
    }
}

/// Measures from one thing to another. None when a thing is not finite, an edge has no length or a panel no area.
///
/// * Two points: their distance.
/// * A point and an edge: to the line of the edge; a point and a panel: to its plane.
/// * Two edges: the shortest way from one to the other, ends included, and the angle of their lines.
/// * A panel and an edge or a panel: the angle, and the distance when they are parallel, from the middle of the first.
///
/// The angle is taken from the arc tangent of cross and dot product, which keeps its digits near 0 and near a quarter turn.
#[must_use]
pub fn between(first: &Figure, second: &Figure) -> Option<Between> {
    use Figure::{Line, Plane, Point};
    if !(first.is_usable() && second.is_usable()) {
        return None;
    }
    Some(match (first, second) {
        (Point(a), Point(b)) => measured([*a, *b], None),
        (Point(a), Line(ends)) => measured([*a, onto_line(*a, *ends)], None),
        (Point(a), Plane(_)) => measured([*a, onto_plane(*a, second)?], None),
        (Line(a), Line(b)) => measured(nearest(*a, *b), angle(first, second)),
        (Line(_) | Plane(_), Point(_)) | (Plane(_), Line(_)) => between(second, first)?.swapped(),
        (Line(_) | Plane(_), Plane(_)) => {
            let angle = angle(first, second);
            if angle.is_some_and(|a| a < PARALLEL) {
                let from = first.middle();
                measured([from, onto_plane(from, second)?], angle)
            } else {
                Between {
                    feet: [first.middle(), second.middle()],
                    distance_mm: None,
                    angle,
                }
            }
        }
    })
}

fn measured(feet: [Point; 2], angle: Option<f64>) -> Between {
    Between {
        feet,
        distance_mm: Some(feet[0].distance(feet[1])),
        angle,
    }
}

/// The angle between lines, between planes, or between a line and a plane.
fn angle(first: &Figure, second: &Figure) -> Option<f64> {
    let (u, v) = (first.direction()?, second.direction()?);
    let [across, along] = [u.cross(v).length(), u.dot(v).abs()];
    let planes = [first, second].map(|f| matches!(f, Figure::Plane(_)));
    // A line is measured against the plane, not against its normal.
    Some(if planes[0] == planes[1] {
        across.atan2(along)
    } else {
        along.atan2(across)
    })
}

fn onto_line(from: Point, [a, b]: [Point; 2]) -> Point {
    let along = b - a;
    a + along * ((from - a).dot(along) / along.length_squared())
}

fn onto_plane(from: Point, plane: &Figure) -> Option<Point> {
    let normal = plane.direction()?;
    Some(from + normal * (plane.middle() - from).dot(normal))
}

/// The nearest points of two segments (Ericson, Real-Time Collision Detection, 2005, section 5.1.9). Where the segments run
/// side by side there are many; then the middle of the stretch that they share counts.
fn nearest([a0, a1]: [Point; 2], [b0, b1]: [Point; 2]) -> [Point; 2] {
    let (u, v, w) = (a1 - a0, b1 - b0, a0 - b0);
    let (uu, vv, uv) = (u.length_squared(), v.length_squared(), u.dot(v));
    let (uw, vw) = (u.dot(w), v.dot(w));
    let s = if u.cross(v).length() < PARALLEL * (uu * vv).sqrt() {
        // The ends of the other segment, along this one.
        let [c, d] = [-uw / uu, (uv - uw) / uu];
        let [low, high] = [c.min(d).clamp(0.0, 1.0), c.max(d).clamp(0.0, 1.0)];
        (low + high) * 0.5
    } else {
        ((uv * vw - uw * vv) / (uu * vv - uv * uv)).clamp(0.0, 1.0)
    };
    let t = ((uv * s + vw) / vv).clamp(0.0, 1.0);
    // When t was cut off at an end, that end has another nearest point.
    let s = ((uv * t - uw) / uu).clamp(0.0, 1.0);
    let t = ((uv * s + vw) / vv).clamp(0.0, 1.0);
    [a0 + u * s, b0 + v * t]
}
