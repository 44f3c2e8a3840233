//! The backdrop: a drawn arch, site line or form that the design is held against. The design keeps it itself.

use std::sync::Arc;

use serde::{Deserialize, Deserializer, Serialize, Serializer};
use zonewright_geometry::{
    Angle, Point, Vector,
    fit::{Target, TargetError},
};

/// The most points of a backdrop; its text in a design file is then some 15 MB.
pub const MAX_BACKDROP_POINTS: usize = 200_000;

/// The most triangles of a backdrop, and the most straight parts of its lines.
pub const MAX_BACKDROP_PARTS: usize = 200_000;

/// The greatest coordinate of a backdrop once it is placed, in millimetres: 10 km, as for everything that is grown.
const REACH_MM: f64 = 1e7;

/// What was drawn, in the units of its file.
#[derive(Clone, PartialEq, Debug, Default, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct Drawn {
    /// The points.
    pub points: Vec<Point>,
    /// Triangles, by index of their points.
    #[serde(default, skip_serializing_if = "Vec::is_empty")]
    pub triangles: Vec<[u32; 3]>,
    /// Lines through points, by index. A closed line repeats its first point.
    #[serde(default, skip_serializing_if = "Vec::is_empty")]
    pub lines: Vec<Vec<u32>>,
}

impl Drawn {
    /// How many straight parts its lines have.
    #[must_use]
    pub fn segments(&self) -> usize {
        self.lines.iter().map(|l| l.len().saturating_sub(1)).sum()
    }

    /// Why it cannot be a backdrop.
    ///
    /// # Errors
    /// The rest of a sentence that begins with what is looked at: what is wrong, and what to do.
    pub fn check(&self) -> Result<(), String> {
        let (points, parts) = (self.points.len(), self.triangles.len().max(self.segments()));
        if points > MAX_BACKDROP_POINTS || parts > MAX_BACKDROP_PARTS {
            return Err(format!(
                "it has {points} points, {} triangles and {} straight parts of lines, and at most {MAX_BACKDROP_POINTS} \
                 points and {MAX_BACKDROP_PARTS} of each of the others are kept in a design; export it coarser",
                self.triangles.len(),
                self.segments()
            ));
        }
        if self.triangles.is_empty() && self.segments() == 0 {
            return Err(refused(TargetError::Empty));
        }
        let mut named = self.triangles.iter().flatten().chain(self.lines.iter().flatten());
        if let Some(lost) = named.find(|v| points <= **v as usize) {
            return Err(refused(TargetError::NoSuchPoint(*lost)));
        }
        self.placed(&BackdropPlacement::default()).map(|_| ())
    }

    fn placed(&self, placement: &BackdropPlacement) -> Result<Vec<Point>, String> {
        let points: Vec<Point> = self.points.iter().map(|p| placement.place(*p)).collect();
        if let Some(at) = points.iter().position(|p| !p.is_finite()) {
            return Err(refused(TargetError::NotFinite(at)));
        }
        if let Some(at) = points.iter().position(|p| p.0.abs().max_element() > REACH_MM) {
            return Err(format!(
                "its point {} lies more than 10 km from the origin; move it near the origin",
                at + 1
            ));
        }
        Ok(points)
    }
}

/// Where a backdrop stands: scaled, its y turned up where it says so, turned about z, moved.
#[derive(Clone, Copy, PartialEq, Debug, Serialize, Deserialize)]
#[serde(deny_unknown_fields, default)]
pub struct BackdropPlacement {
    /// Movement, in millimetres.
    pub shift: Vector,
    /// Turn about z.
    pub turn: Angle,
    /// Millimetres in a unit of what was drawn; more than 0.
    pub scale: f64,
    /// Whether y is up in what was drawn.
    pub y_up: bool,
}

impl Default for BackdropPlacement {
    fn default() -> Self {
        Self {
            shift: Vector::ZERO,
            turn: Angle::default(),
            scale: 1.0,
            y_up: false,
        }
    }
}

impl BackdropPlacement {
    /// A drawn point where it stands.
    #[must_use]
    pub fn place(&self, point: Point) -> Point {
        let [x, y, z] = (point.0 * self.scale).to_array();
        let (y, z) = if self.y_up { (-z, y) } else { (y, z) };
        let (sin, cos) = self.turn.radians().sin_cos();
        Point::new(cos * x - sin * y, sin * x + cos * y, z) + self.shift
    }

    fn check(&self) -> Result<(), String> {
        let finite = self.shift.is_finite() && self.turn.degrees().is_finite() && self.scale.is_finite();
        if finite && self.scale > 0.0 {
            Ok(())
        } else {
            Err("its placement needs finite numbers and a scale above 0; mend them".to_owned())
        }
    }
}

/// A backdrop.
#[derive(Clone, Debug, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct Backdrop {
    /// The name of the file that it came from.
    #[serde(default, skip_serializing_if = "String::is_empty")]
    pub name: String,
    /// Whether it is drawn.
    #[serde(default = "shown")]
    pub shown: bool,
    /// Where it stands.
    #[serde(default)]
    pub placement: BackdropPlacement,
    /// What was drawn; shared by all states of the design.
    #[serde(serialize_with = "write_drawn", deserialize_with = "read_drawn")]
    pub drawn: Arc<Drawn>,
}

impl PartialEq for Backdrop {
    fn eq(&self, other: &Self) -> bool {
        // What was drawn never changes in place: nearly always it is the very same.
        self.name == other.name
            && self.shown == other.shown
            && self.placement == other.placement
            && (Arc::ptr_eq(&self.drawn, &other.drawn) || self.drawn == other.drawn)
    }
}

impl Backdrop {
    /// What was drawn, where it stands, to be fitted to.
    ///
    /// # Errors
    /// As [`Drawn::check`], or when the placement cannot be used.
    pub fn target(&self) -> Result<Target, String> {
        self.placement.check()?;
        let points = self.drawn.placed(&self.placement)?;
        Target::new(points, self.drawn.triangles.clone(), &self.drawn.lines).map_err(refused)
    }

    /// Whether it can be kept.
    ///
    /// # Errors
    /// As [`Backdrop::target`].
    pub fn check(&self) -> Result<(), String> {
        self.placement.check()?;
        self.drawn.check()?;
        self.drawn.placed(&self.placement).map(|_| ())
    }

    /// Whether both stand at the same place and are drawn alike; cheap.
    #[must_use]
    pub fn same_place(&self, other: &Self) -> bool {
        self.placement == other.placement && Arc::ptr_eq(&self.drawn, &other.drawn)
    }
}

fn refused(error: TargetError) -> String {
    match error {
        TargetError::Empty => "it holds no triangle and no line of two points; export the form or the line".to_owned(),
        TargetError::NotFinite(at) => format!("its point {} is not finite; give it numbers", at + 1),
        TargetError::NoSuchPoint(v) => format!("it names a point {v} that it does not have; export it again"),
    }
}

const fn shown() -> bool {
    true
}

fn write_drawn<S: Serializer>(drawn: &Arc<Drawn>, to: S) -> Result<S::Ok, S::Error> {
    drawn.as_ref().serialize(to)
}

fn read_drawn<'a, D: Deserializer<'a>>(from: D) -> Result<Arc<Drawn>, D::Error> {
    Drawn::deserialize(from).map(Arc::new)
}
