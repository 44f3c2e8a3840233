//! What paths are fitted to: triangles and lines, in millimetres.

use super::closest::{on_segment, on_triangle};
use crate::{
    Point, Vector,
    inspect::tree::{Extent, Tree},
};

/// Why a target cannot be used.
#[derive(Clone, Copy, PartialEq, Eq, Debug)]
pub enum TargetError {
    /// It has neither a triangle nor a line.
    Empty,
    /// This point is not finite.
    NotFinite(usize),
    /// A triangle or a line names a point that is not there.
    NoSuchPoint(u32),
}

/// Triangles, lines, or both. Lengths are in millimetres.
///
/// A closest place is found through a tree of boxes: some tens of boxes and triangles are looked at, of any number.
pub struct Target {
    points: Vec<Point>,
    triangles: Vec<[u32; 3]>,
    segments: Vec<[u32; 2]>,
    tree: Tree,
}

/// A place of a target.
#[derive(Clone, Copy, PartialEq, Debug)]
pub struct Closest {
    /// Where.
    pub at: Point,
    /// How far from the place that was asked for, in millimetres.
    pub distance_mm: f64,
    /// The triangle, or behind all triangles the segment, that it lies on; a hint for the next place nearby.
    pub part: u32,
}

impl core::fmt::Debug for Target {
    fn fmt(&self, f: &mut core::fmt::Formatter<'_>) -> core::fmt::Result {
        let (triangles, segments) = (self.triangles.len(), self.segments.len());
        write!(f, "Target({triangles} triangles, {segments} segments)")
    }
}

impl Target {
    /// A target of triangles and of lines through points.
    ///
    /// # Errors
    /// When there is nothing to come close to, a point is not finite, or an index is out of range.
    pub fn new(points: Vec<Point>, triangles: Vec<[u32; 3]>, lines: &[Vec<u32>]) -> Result<Self, TargetError> {
        if let Some(at) = points.iter().position(|p| !p.is_finite()) {
            return Err(TargetError::NotFinite(at));
        }
        let named = triangles.iter().flatten().chain(lines.iter().flatten());
        if let Some(&lost) = named.into_iter().find(|&&v| points.len() <= v as usize) {
            return Err(TargetError::NoSuchPoint(lost));
        }
        let segments: Vec<[u32; 2]> = lines
            .iter()
            .flat_map(|line| line.windows(2).map(|two| [two[0], two[1]]))
            .collect();
        let bound = |corners: &[u32]| {
            let places = corners.iter().map(|&v| points[v as usize]);
            places.fold(Extent::NOTHING, Extent::and)
        };
        let bounds = triangles
            .iter()
            .map(|t| bound(t))
            .chain(segments.iter().map(|s| bound(s)));
        let items: Vec<(u32, Extent)> = (0..).zip(bounds).collect();
        if items.is_empty() {
            return Err(TargetError::Empty);
        }
        Ok(Self {
            tree: Tree::new(items),
            points,
            triangles,
            segments,
        })
    }

    /// The points that triangles and lines refer to.
    #[must_use]
    pub fn points(&self) -> &[Point] {
        &self.points
    }

    /// The triangles, by index of their points.
    #[must_use]
    pub fn triangles(&self) -> &[[u32; 3]] {
        &self.triangles
    }

    /// The straight parts of the lines, by index of their points.
    #[must_use]
    pub fn segments(&self) -> &[[u32; 2]] {
        &self.segments
    }

    /// Whether it has lines only: a path is fitted to it, not a surface.
    #[must_use]
    pub const fn is_curve(&self) -> bool {
        self.triangles.is_empty()
    }

    /// The closest place of the target.
    #[must_use]
    pub fn closest(&self, to: Point) -> Closest {
        self.closest_from(to, None)
    }

    /// The same, faster where the place lies near one whose [`Closest::part`] is given.
    #[must_use]
    pub fn closest_from(&self, to: Point, hint: Option<u32>) -> Closest {
        let mut best = Closest {
            at: to,
            distance_mm: f64::INFINITY,
            part: 0,
        };
        let mut least = f64::INFINITY;
        let mut look = |part: u32| {
            let at = self.on(part, to.0);
            let far = at.distance_squared(to.0);
            if far < least {
                least = far;
                best.at = Point(at);
                best.part = part;
            }
            least
        };
        let parts = self.triangles.len() + self.segments.len();
        let within = hint.filter(|&h| (h as usize) < parts).map_or(f64::INFINITY, &mut look);
        self.tree.near(to.0, within, look);
        best.distance_mm = best.at.distance(to);
        best
    }

    fn on(&self, part: u32, to: Vector) -> Vector {
        let part = part as usize;
        let place = |v: u32| self.points[v as usize].0;
        match self.triangles.get(part) {
            Some(triangle) => on_triangle(to, triangle.map(place)),
            None => {
                let [a, b] = self.segments[part - self.triangles.len()].map(place);
                on_segment(to, a, b)
            }
        }
    }

    /// The greatest height of a triangle over a place in plan; none where no triangle lies.
    #[must_use]
    pub fn height(&self, x: f64, y: f64) -> Option<f64> {
        let mut highest: Option<f64> = None;
        for triangle in &self.triangles {
            let [a, b, c] = triangle.map(|v| self.points[v as usize].0 - Vector::new(x, y, 0.0));
            let [area_a, area_b, area_c] = [b.x * c.y - b.y * c.x, c.x * a.y - c.y * a.x, a.x * b.y - a.y * b.x];
            let whole = area_a + area_b + area_c;
            let inside = [area_a, area_b, area_c].iter().all(|part| part * whole >= 0.0);
            if inside && whole != 0.0 {
                let z = (a.z * area_a + b.z * area_b + c.z * area_c) / whole;
                highest = Some(highest.map_or(z, |h| h.max(z)));
            }
        }
        highest
    }

    /// Places spread evenly over the triangles, or, where there are none, along the lines; always the same ones.
    #[must_use]
    pub fn spread(&self, count: usize) -> Vec<Point> {
        let place = |v: u32| self.points[v as usize];
        let sizes: Vec<f64> = if self.is_curve() {
            let length = |s: &[u32; 2]| place(s[0]).distance(place(s[1]));
            self.segments.iter().map(length).collect()
        } else {
            let area = |t: &[u32; 3]| {
                let [a, b, c] = t.map(place);
                (b - a).cross(c - a).length()
            };
            self.triangles.iter().map(area).collect()
        };
        let whole: f64 = sizes.iter().sum();
        let mut places = Vec::with_capacity(count);
        let (mut part, mut gone) = (0, 0.0);
        for k in 0..count {
            #[expect(clippy::cast_precision_loss, reason = "a count of places")]
            let (k, count) = (k as f64, count as f64);
            let want = whole * (k + 0.5) / count;
            while part + 1 < sizes.len() && gone + sizes[part] < want {
                gone += sizes[part];
                part += 1;
            }
            // Along a line the rest of the way; in a triangle, an even sequence of pairs folded into it (Roberts, 2018; from memory).
            let u = if sizes[part] > 0.0 {
                ((want - gone) / sizes[part]).clamp(0.0, 1.0)
            } else {
                0.0
            };
            if let Some(triangle) = self.triangles.get(part) {
                let [a, b, c] = triangle.map(place);
                let (mut s, mut t) = (
                    (k * 0.754_877_666_246_692_8).fract(),
                    (k * 0.569_840_290_998_053_3).fract(),
                );
                if s + t > 1.0 {
                    (s, t) = (1.0 - s, 1.0 - t);
                }
                places.push(a + (b - a) * s + (c - a) * t);
            } else if let Some([a, b]) = self.segments.get(part).map(|s| s.map(place)) {
                places.push(a + (b - a) * u);
            }
        }
        places
    }

    /// Where the level or upright plane at `at` along an axis (0 x, 1 y, 2 z) cuts the triangles, as pairs of ends.
    #[must_use]
    pub fn section(&self, axis: usize, at: f64) -> Vec<[Point; 2]> {
        let mut cuts = Vec::new();
        for triangle in &self.triangles {
            let corners = triangle.map(|v| self.points[v as usize].0);
            let over = corners.map(|c| c[axis] - at);
            let mut ends = (0..3).filter_map(|k| {
                let (p, q) = (over[k], over[(k + 1) % 3]);
                // A corner on the plane counts as above it, so that each cut has two ends or none.
                ((p >= 0.0) != (q >= 0.0)).then(|| Point(corners[k].lerp(corners[(k + 1) % 3], p / (p - q))))
            });
            if let (Some(one), Some(other)) = (ends.next(), ends.next()) {
                cuts.push([one, other]);
            }
        }
        cuts
    }

    /// Straight lines that show it: all its lines, its borders, its sharp edges, and between them every edge that is not flat, or, where those
    /// would be too many to be quiet, sections along x and y.
    #[must_use]
    pub fn wire(&self) -> Vec<[Point; 2]> {
        let place = |v: u32| self.points[v as usize];
        let mut wire: Vec<[Point; 2]> = self.segments.iter().map(|s| s.map(place)).collect();
        let few = self.triangles.len() <= FEW_TRIANGLES;
        let most_level = if few { FLAT.cos() } else { SHARP.cos() };
        let mut sides: Vec<(u32, u32, u32)> = Vec::with_capacity(3 * self.triangles.len());
        for (at, [a, b, c]) in (0..).zip(&self.triangles) {
            sides.extend([(a, b), (b, c), (c, a)].map(|(p, q)| (*p.min(q), *p.max(q), at)));
        }
        sides.sort_unstable();
        for side in sides.chunk_by(|one, other| (one.0, one.1) == (other.0, other.1)) {
            let across = match side {
                [(_, _, one), (_, _, other)] => self.normal(*one).dot(self.normal(*other)),
                _ => -1.0,
            };
            // The two sides of a mesh need not run the same way round.
            if across.abs() < most_level || side.len() != 2 {
                wire.push([place(side[0].0), place(side[0].1)]);
            }
        }
        if !few {
            let least = self.points.iter().fold(Vector::INFINITY, |least, p| least.min(p.0));
            let most = self.points.iter().fold(Vector::NEG_INFINITY, |most, p| most.max(p.0));
            for axis in 0..2 {
                for k in 1..SECTIONS {
                    let share = f64::from(k) / f64::from(SECTIONS);
                    wire.extend(self.section(axis, least[axis] + (most[axis] - least[axis]) * share));
                }
            }
        }
        wire
    }

    fn normal(&self, triangle: u32) -> Vector {
        let [a, b, c] = self.triangles[triangle as usize].map(|v| self.points[v as usize]);
        (b - a).cross(c - a).normalize_or_zero()
    }
}

/// So many triangles are drawn edge by edge.
const FEW_TRIANGLES: usize = 3000;

/// Sections along each axis.
const SECTIONS: u32 = 14;

/// Edges whose triangles lie flatter than this are no edges to the eye, in radians: a tenth of a degree.
const FLAT: f64 = 0.1 * core::f64::consts::PI / 180.0;

/// Edges sharper than this are drawn on any target, in radians: 25 degrees.
const SHARP: f64 = 25.0 * core::f64::consts::PI / 180.0;
