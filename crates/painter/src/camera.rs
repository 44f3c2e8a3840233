//! The camera and its projection.

use zonewright_geometry::{Angle, Point, Vector};

use crate::Bounds;

/// The vertical angle of view, in degrees: about that of a short tele lens, which distorts little.
const ANGLE_OF_VIEW: f64 = 35.0;
/// The part of the picture that a fitted shell fills.
const FILLED: f64 = 0.9;
/// Nothing nearer to the eye than this part of the distance to the target is drawn.
const NEAR: f64 = 1e-3;
/// How far the camera may be from its target, in millimetres: from a tenth of a millimetre to a thousand kilometres.
const DISTANCES: [f64; 2] = [0.1, 1e9];
/// Degrees that the camera turns for a pixel of dragging.
const DEGREES_A_PIXEL: f64 = 0.4;

/// A named view.
#[derive(Clone, Copy, PartialEq, Eq, Debug)]
pub enum View {
    /// From above, x right, y up.
    Plan,
    /// Along +y, x right, z up.
    Front,
    /// Along -x, y right, z up.
    Side,
    /// Isometric: the three axes equally foreshortened, from +x, -y and above.
    Iso,
    /// A free three-quarter view.
    Fit,
}

impl View {
    /// All views.
    pub const ALL: [Self; 5] = [Self::Plan, Self::Front, Self::Side, Self::Iso, Self::Fit];

    /// The view with a name.
    #[must_use]
    pub fn parse(name: &str) -> Option<Self> {
        Self::ALL.into_iter().find(|view| view.name() == name)
    }

    /// The name: `plan`, `front`, `side`, `iso` or `fit`.
    #[must_use]
    pub const fn name(self) -> &'static str {
        match self {
            Self::Plan => "plan",
            Self::Front => "front",
            Self::Side => "side",
            Self::Iso => "iso",
            Self::Fit => "fit",
        }
    }

    /// Azimuth and elevation of the eye.
    fn direction(self) -> [Angle; 2] {
        match self {
            Self::Plan => [Angle::from_degrees(-90.0), Angle::from_degrees(90.0)],
            Self::Front => [Angle::from_degrees(-90.0), Angle::from_degrees(0.0)],
            Self::Side => [Angle::from_degrees(0.0), Angle::from_degrees(0.0)],
            // The elevation whose tangent is 1 / sqrt 2 looks down the diagonal of a cube.
            Self::Iso => [
                Angle::from_degrees(-45.0),
                Angle::from_radians(core::f64::consts::FRAC_1_SQRT_2.atan()),
            ],
            Self::Fit => [Angle::from_degrees(-60.0), Angle::from_degrees(25.0)],
        }
    }
}

/// How space comes onto the picture.
#[derive(Clone, Copy, PartialEq, Eq, Debug, Default)]
pub enum Projection {
    /// Towards the eye.
    #[default]
    Perspective,
    /// Along one direction. Sizes are those that perspective gives at the target.
    Parallel,
}

/// A camera that looks at a target.
#[derive(Clone, Copy, PartialEq, Debug)]
pub struct Camera {
    /// What it looks at and turns about; the middle of the picture.
    pub target: Point,
    /// From the eye to the target, in millimetres; positive.
    pub distance: f64,
    /// The direction from the target to the eye, from x towards y.
    pub azimuth: Angle,
    /// The direction from the target to the eye, above the level; from -90 to 90 degrees.
    pub elevation: Angle,
    /// How space comes onto the picture.
    pub projection: Projection,
    /// Width and height of the picture, in pixels.
    pub size: [f32; 2],
}

/// A place on the picture.
#[derive(Clone, Copy, PartialEq, Debug)]
pub struct Projected {
    /// Pixels from the top left corner, x right, y down.
    pub pos: [f32; 2],
    /// How far before the eye, along the middle of the view, in millimetres. In parallel projection it can be negative.
    pub depth: f64,
}

/// A half line.
#[derive(Clone, Copy, PartialEq, Debug)]
pub struct Ray {
    /// Where it begins: the eye, or in parallel projection a point level with the eye.
    pub from: Point,
    /// Where it goes, of length 1.
    pub along: Vector,
}

impl Camera {
    /// A named view, fitted to a box.
    #[must_use]
    pub fn view(view: View, projection: Projection, bounds: &Bounds, size: [f32; 2]) -> Self {
        let [azimuth, elevation] = view.direction();
        let mut camera = Self {
            target: bounds.centre(),
            distance: 1.0,
            azimuth,
            elevation,
            projection,
            size,
        };
        camera.resize(size);
        camera.fit(bounds);
        camera
    }

    /// Moves nearer or away, and sideways, so that a box fills the picture; the direction stays.
    pub fn fit(&mut self, bounds: &Bounds) {
        self.fit_points(&bounds.corners());
    }

    /// The same for points, closer than for the box around them. Without a finite point nothing changes.
    pub fn fit_points(&mut self, points: &[Point]) {
        let Some(bounds) = Bounds::of_points(points.iter().copied()) else {
            return;
        };
        self.target = bounds.centre();
        let lens = self.lens();
        let tangents = [
            f64::from(self.size[0]) * 0.5 / lens.focal * FILLED,
            f64::from(self.size[1]) * 0.5 / lens.focal * FILLED,
        ];
        // A corner at (x, z) from the target is in the picture when |x - shift| <= t (distance + z); the greatest of
        // x - t z and of -x - t z over the corners give the shift and the least distance. Parallel: without z.
        let mut most = [[f64::MIN; 2]; 2];
        let mut nearest = 0.0_f64;
        for &corner in points.iter().filter(|point| point.is_finite()) {
            let from = corner - self.target;
            let z = from.dot(lens.forward);
            nearest = nearest.max(-z);
            for (k, across) in [lens.right, lens.up].into_iter().enumerate() {
                let x = from.dot(across);
                let recede = match self.projection {
                    Projection::Perspective => tangents[k] * z,
                    Projection::Parallel => 0.0,
                };
                most[k][0] = most[k][0].max(x - recede);
                most[k][1] = most[k][1].max(-x - recede);
            }
        }
        let shift = most.map(|[plus, minus]| (plus - minus) * 0.5);
        let needed = [0, 1].map(|k| (most[k][0] + most[k][1]) * 0.5 / tangents[k]);
        self.target += lens.right * shift[0] + lens.up * shift[1];
        let distance = needed[0].max(needed[1]);
        // A box without size, a single point, is looked at from a metre; one without height is not touched by the eye.
        self.distance = if distance > 0.0 {
            distance.max(nearest * 1.01)
        } else {
            1000.0
        };
        self.distance = self.distance.clamp(DISTANCES[0], DISTANCES[1]);
    }

    /// Turns about the target as if a drag took hold of the shell's near side. The distance stays.
    pub fn orbit(&mut self, dx_px: f32, dy_px: f32) {
        let azimuth = self.azimuth.degrees() - f64::from(dx_px) * DEGREES_A_PIXEL;
        let elevation = self.elevation.degrees() + f64::from(dy_px) * DEGREES_A_PIXEL;
        if azimuth.is_finite() && elevation.is_finite() {
            self.azimuth = Angle::from_degrees((azimuth + 180.0).rem_euclid(360.0) - 180.0);
            self.elevation = Angle::from_degrees(elevation.clamp(-90.0, 90.0));
        }
    }

    /// Moves sideways so that the target's surroundings follow the pointer.
    pub fn pan(&mut self, dx_px: f32, dy_px: f32) {
        let by = self.move_in_view_plane(self.target, dx_px, dy_px);
        if by.is_finite() {
            self.target += -by;
        }
    }

    /// Goes nearer (factor above 1) or away; what is under the pointer, as far off as the target, stays under it.
    pub fn zoom_at(&mut self, pointer: [f32; 2], factor: f32) {
        let factor = f64::from(factor);
        if !(factor.is_finite() && factor > 0.0) {
            return;
        }
        let distance = (self.distance / factor).clamp(DISTANCES[0], DISTANCES[1]);
        let factor = self.distance / distance;
        let [w, h] = self.size;
        let to_pointer = self.move_in_view_plane(self.target, pointer[0] - w * 0.5, pointer[1] - h * 0.5);
        if to_pointer.is_finite() {
            self.target += to_pointer * (1.0 - 1.0 / factor);
            self.distance = distance;
        }
    }

    /// Takes a new width and height in pixels; sides below one pixel count as one.
    pub fn resize(&mut self, size: [f32; 2]) {
        self.size = size.map(|side| if side >= 1.0 && side.is_finite() { side } else { 1.0 });
    }

    /// Where a point comes on the picture; none behind the eye (perspective) or for a point that is not finite.
    #[must_use]
    pub fn project(&self, point: Point) -> Option<Projected> {
        self.lens().project(point)
    }

    /// The points that lie under a place on the picture.
    #[must_use]
    pub fn ray(&self, pos: [f32; 2]) -> Ray {
        self.lens().ray(pos)
    }

    /// The scale at a point, for lengths across the view. A point behind the eye counts as just before it.
    #[must_use]
    pub fn pixels_per_mm_at(&self, point: Point) -> f64 {
        let lens = self.lens();
        lens.scale(lens.to_camera(point).z.max(lens.near))
    }

    /// The move in space, across the view, that takes a point by so many pixels right and down.
    #[must_use]
    pub fn move_in_view_plane(&self, point: Point, dx_px: f32, dy_px: f32) -> Vector {
        let lens = self.lens();
        let scale = self.pixels_per_mm_at(point);
        (lens.right * f64::from(dx_px) - lens.up * f64::from(dy_px)) / scale
    }

    /// The camera made ready for projecting many points.
    #[must_use]
    pub fn lens(&self) -> Lens {
        let (sin_a, cos_a) = self.azimuth.radians().sin_cos();
        let (sin_e, cos_e) = self.elevation.radians().sin_cos();
        let to_eye = Vector::new(cos_e * cos_a, cos_e * sin_a, sin_e);
        let [w, h] = self.size.map(f64::from);
        Lens {
            eye: self.target + to_eye * self.distance,
            right: Vector::new(-sin_a, cos_a, 0.0),
            up: Vector::new(-sin_e * cos_a, -sin_e * sin_a, cos_e),
            forward: -to_eye,
            focal: h * 0.5 / (ANGLE_OF_VIEW * 0.5).to_radians().tan(),
            centre: [w * 0.5, h * 0.5],
            near: self.distance * NEAR,
            distance: self.distance,
            projection: self.projection,
        }
    }
}

/// A camera made ready: its axes, its eye and its scale.
#[derive(Clone, Copy, PartialEq, Debug)]
pub struct Lens {
    /// The eye.
    pub eye: Point,
    /// To the right on the picture, of length 1.
    pub right: Vector,
    /// Up on the picture, of length 1.
    pub up: Vector,
    /// Into the picture, of length 1.
    pub forward: Vector,
    /// The distance of the picture from the eye, in pixels.
    pub focal: f64,
    /// The middle of the picture, in pixels.
    pub centre: [f64; 2],
    /// The least depth that is drawn in perspective, in millimetres.
    pub near: f64,
    /// From the eye to the target, in millimetres.
    pub distance: f64,
    /// How space comes onto the picture.
    pub projection: Projection,
}

impl Lens {
    /// A point seen from the eye: right, up, and into the picture, in millimetres.
    #[must_use]
    pub fn to_camera(&self, point: Point) -> Vector {
        let from = point - self.eye;
        Vector::new(from.dot(self.right), from.dot(self.up), from.dot(self.forward))
    }

    /// Pixels a millimetre at a depth.
    #[must_use]
    pub fn scale(&self, depth: f64) -> f64 {
        match self.projection {
            Projection::Perspective => self.focal / depth,
            Projection::Parallel => self.focal / self.distance,
        }
    }

    /// Whether something at a depth is drawn at all.
    #[must_use]
    pub fn shows(&self, depth: f64) -> bool {
        match self.projection {
            Projection::Perspective => depth >= self.near,
            Projection::Parallel => depth.is_finite(),
        }
    }

    /// The picture position of a point in camera coordinates at a depth that is drawn.
    #[must_use]
    #[expect(clippy::cast_possible_truncation, reason = "pixels need no more than f32")]
    pub fn onto(&self, seen: Vector) -> [f32; 2] {
        let scale = self.scale(seen.z);
        [
            (self.centre[0] + seen.x * scale) as f32,
            (self.centre[1] - seen.y * scale) as f32,
        ]
    }

    /// Where a point comes on the picture; none behind the eye (perspective) or for a point that is not finite.
    #[must_use]
    pub fn project(&self, point: Point) -> Option<Projected> {
        let seen = self.to_camera(point);
        (seen.is_finite() && self.shows(seen.z)).then(|| Projected {
            pos: self.onto(seen),
            depth: seen.z,
        })
    }

    /// The points that lie under a place on the picture.
    #[must_use]
    pub fn ray(&self, pos: [f32; 2]) -> Ray {
        let x = (f64::from(pos[0]) - self.centre[0]) / self.focal;
        let y = (self.centre[1] - f64::from(pos[1])) / self.focal;
        match self.projection {
            Projection::Perspective => Ray {
                from: self.eye,
                along: (self.forward + self.right * x + self.up * y).normalize(),
            },
            Projection::Parallel => Ray {
                from: self.eye + (self.right * x + self.up * y) * self.distance,
                along: self.forward,
            },
        }
    }

    /// On which side of a plane the eye is: positive on the side that `normal` points to.
    ///
    /// The plane is where `normal . p = offset`. In parallel projection the eye is infinitely far and the offset does not count.
    #[must_use]
    pub fn side(&self, normal: Vector, offset: f64) -> f64 {
        match self.projection {
            Projection::Perspective => normal.dot(self.eye.0) - offset,
            Projection::Parallel => -normal.dot(self.forward),
        }
    }
}
