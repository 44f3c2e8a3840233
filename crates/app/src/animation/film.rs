//! The shells of an animation, one a frame, seen from a camera that does not move.

use zonewright_geometry::{
    Act, Course, Finding, Shape, Shell, Stage, grow, grow_part,
    parameter::{parameter, set_parameter},
};
use zonewright_painter::{Bounds, Camera, Look, Picture, Projection, Scene, Tints, View};

/// Frames of an animation at the most: 24 s at 25 a second. Every frame is a whole picture in the file.
pub const MOST_FRAMES: u32 = 600;

/// What an animation shows.
#[derive(Clone, PartialEq, Debug)]
pub enum Subject {
    /// The growth: one frame a course, from the first course to the whole shell.
    Growth,
    /// One parameter runs from a value to another, in equal steps. Lengths in millimetres, angles in degrees.
    Sweep {
        /// Its key, as `zonewright parameters` lists it.
        key: String,
        /// The value of the first frame.
        from: f64,
        /// The value of the last frame.
        to: f64,
        /// How many frames; at least 2.
        frames: u32,
    },
}

/// How a frame is grown.
#[derive(Clone, PartialEq, Debug)]
enum Still {
    /// The whole record up to a stage.
    Part(Stage),
    /// The record with a parameter at this value.
    At(f64),
}

/// An animation of a shape: it keeps no shell, but grows each when it is asked for.
#[derive(Clone, Debug)]
pub struct Film {
    shape: Shape,
    key: String,
    lift: f64,
    stills: Vec<Still>,
    bounds: Bounds,
}

impl Film {
    /// Plans an animation; with `back` it also runs back to the first frame.
    ///
    /// # Errors
    /// One sentence: a parameter that is not there, a value that cannot be used, no panels in any frame, too many frames.
    pub fn new(shape: &Shape, subject: &Subject, back: bool) -> Result<Self, String> {
        let (whole, findings) = grow(shape);
        let mut film = Self {
            shape: shape.clone(),
            key: String::new(),
            lift: whole.lift_mm,
            stills: Vec::new(),
            bounds: Bounds::of_points([]).unwrap_or(NOTHING),
        };
        film.stills = match subject {
            Subject::Growth => {
                let mut stages: Vec<Stage> = whole.courses.iter().filter_map(|c| stage_of(shape, c)).collect();
                // What comes after the last course, such as spurs retracted, belongs to the last frame.
                stages.pop();
                stages.push(Stage::after(shape.steps.len()));
                stages.into_iter().map(Still::Part).collect()
            }
            Subject::Sweep { key, from, to, frames } => {
                film.key.clone_from(key);
                sweep(shape, key, [*from, *to], *frames)?
            }
        };
        if back {
            let forth = film.stills.len();
            let returned: Vec<Still> = film
                .stills
                .iter()
                .take(forth.saturating_sub(1))
                .skip(1)
                .rev()
                .cloned()
                .collect();
            film.stills.extend(returned);
        }
        if film.stills.len() > MOST_FRAMES as usize {
            return Err(format!(
                "that would be {} frames; {MOST_FRAMES} can be made: take fewer frames",
                film.stills.len()
            ));
        }
        film.bounds = film.look_through(&findings)?;
        Ok(film)
    }

    /// How many frames it has.
    #[must_use]
    pub const fn frames(&self) -> usize {
        self.stills.len()
    }

    /// The shell of a frame, counted from 0; beyond the last one it is the last one's.
    ///
    /// # Errors
    /// A sentence that names the frame, when a value cannot be used.
    pub fn shell(&self, frame: usize) -> Result<Shell, String> {
        match self.stills.get(frame.min(self.stills.len().saturating_sub(1))) {
            None => Ok(Shell::default()),
            Some(Still::Part(stage)) => Ok(grow_part(&self.shape, *stage, Some(self.lift)).0),
            Some(Still::At(value)) => {
                let shape = self.shape_at(*value)?;
                Ok(grow(&shape).0)
            }
        }
    }

    /// The shape with the swept parameter at a value.
    fn shape_at(&self, value: f64) -> Result<Shape, String> {
        set_parameter(&self.shape, &self.key, value).map_err(|finding| refused(&self.key, value, &finding))
    }

    /// The picture of a frame. The camera is the same for all frames: it shows whatever any of them shows.
    ///
    /// # Errors
    /// As [`Film::shell`].
    pub fn picture(&self, frame: usize, view: View, size: [u32; 2], look: &Look) -> Result<Picture, String> {
        let shell = self.shell(frame)?;
        #[expect(clippy::cast_precision_loss, reason = "at most 16384")]
        let size = size.map(|side| side as f32);
        let camera = Camera::view(view, projection_of(view), &self.bounds, size);
        Ok(Scene::exact(&shell).picture(&shell, &camera, look, &Tints::default(), &[]))
    }

    /// What must hold; the first thing that does not.
    ///
    /// # Errors
    /// A sentence that names it.
    pub fn check(&self) -> Result<(), String> {
        for frame in 0..self.frames() {
            let shell = self.shell(frame)?;
            if let Some(bounds) = Bounds::of(&shell)
                && union(self.bounds, bounds) != self.bounds
            {
                return Err(format!("frame {frame} reaches out of the picture"));
            }
        }
        Ok(())
    }

    /// Grows every frame once, and gives the box that holds all of them.
    fn look_through(&self, findings: &[Finding]) -> Result<Bounds, String> {
        let mut all: Option<Bounds> = None;
        for frame in 0..self.frames() {
            if let Some(bounds) = Bounds::of(&self.shell(frame)?) {
                all = Some(all.map_or(bounds, |so_far| union(so_far, bounds)));
            }
        }
        all.ok_or_else(|| {
            let why = findings.first().map_or("lay a course", |f| f.code.text().remedy);
            format!("there is nothing to show: no frame has a panel; {why}")
        })
    }
}

/// The projection of a named view: measured views are drawn to scale, the others as an eye sees them.
#[must_use]
pub const fn projection_of(view: View) -> Projection {
    match view {
        View::Plan | View::Front | View::Side | View::Iso => Projection::Parallel,
        View::Fit => Projection::Perspective,
    }
}

/// The box before any frame was looked at.
const NOTHING: Bounds = Bounds {
    min: zonewright_geometry::Point::ORIGIN,
    max: zonewright_geometry::Point::ORIGIN,
};

fn union(a: Bounds, b: Bounds) -> Bounds {
    Bounds {
        min: zonewright_geometry::Point(a.min.0.min(b.min.0)),
        max: zonewright_geometry::Point(a.max.0.max(b.max.0)),
    }
}

/// The stage at which a course has just been laid.
fn stage_of(shape: &Shape, course: &Course) -> Option<Stage> {
    let steps = shape.steps.iter().position(|s| s.id == course.step)?;
    Some(match shape.steps[steps].act {
        Act::Lay { .. } => Stage {
            steps,
            passes: course.pass,
        },
        _ => Stage::after(steps + 1),
    })
}

/// The values of a sweep. A parameter that counts takes whole numbers only.
fn sweep(shape: &Shape, key: &str, [from, to]: [f64; 2], frames: u32) -> Result<Vec<Still>, String> {
    let Some(parameter) = parameter(shape, key) else {
        return Err(format!(
            "this design has no parameter `{key}`; zonewright parameters lists those that it has"
        ));
    };
    if !from.is_finite() || !to.is_finite() {
        return Err("give two finite values to run between".to_owned());
    }
    if !(2..=MOST_FRAMES).contains(&frames) {
        return Err(format!("take from 2 to {MOST_FRAMES} frames"));
    }
    let last = f64::from(frames - 1);
    let mut values: Vec<f64> = (0..frames)
        .map(|k| {
            let part = f64::from(k) / last;
            // Both ends exactly as they were given.
            from * (1.0 - part) + to * part
        })
        .collect();
    if parameter.kind == zonewright_geometry::parameter::ParameterKind::Count {
        for value in &mut values {
            *value = value.round();
        }
        // More frames than whole numbers would only stand still.
        values.dedup();
    }
    Ok(values.into_iter().map(Still::At).collect())
}

fn refused(key: &str, value: f64, finding: &Finding) -> String {
    let text = finding.code.text();
    format!(
        "`{key}` cannot be {}: {}; {}",
        zonewright_shop::text::trimmed(value, 4),
        text.what.to_lowercase(),
        text.remedy.trim_end_matches('.').to_lowercase()
    )
}
