//! Fitting a design's paths to its backdrop: from what is wished for to the changed shape. Window and command line share it.

use zonewright_geometry::{
    Role, Shape, Vector,
    fit::{
        Fit, FitOptions, FitStep, MAX_FIT_PARTS, Paths, Target, along, fit_translation, middle_lines, paths_of,
        resampled, with_paths,
    },
};

/// From where a fit of a surface begins.
#[derive(Clone, Copy, PartialEq, Eq, Debug)]
pub enum Begin {
    /// From the middle lines of the backdrop.
    MiddleLines,
    /// From the shell as it stands.
    Shell,
}

/// How the paths are to be fitted.
#[derive(Clone, Copy, PartialEq, Debug)]
pub struct FitWish {
    /// How many parts the zig path and the zag path get.
    pub parts: [u32; 2],
    /// See [`FitOptions::smoothing`].
    pub smoothing: f64,
    /// How much covering the whole backdrop counts; see [`FitOptions::cover`]. Not used for one of lines.
    pub cover: f64,
    /// The most iterations.
    pub iterations: u32,
    /// Whether the corners of the surface, or the ends of the path, stay where the fit begins.
    pub hold_ends: bool,
    /// From where a surface begins.
    pub begin: Begin,
    /// The path that a backdrop of lines only is for.
    pub path: Role,
}

impl Default for FitWish {
    /// 12 by 8 parts, from the middle lines over the whole backdrop, with a little smoothing: enough to even out the edges of a smooth form.
    fn default() -> Self {
        Self {
            parts: [12, 8],
            smoothing: 0.01,
            cover: 1.0,
            iterations: 200,
            hold_ends: false,
            begin: Begin::MiddleLines,
            path: Role::Zig,
        }
    }
}

/// The most smoothing that is taken: beyond it paths are straight.
pub const MAX_SMOOTHING: f64 = 1e6;

/// The most that covering may count: beyond it the nodes hardly matter.
pub const MAX_COVER: f64 = 1e3;

/// The most iterations that may be asked for.
pub const MAX_ITERATIONS: u32 = 100_000;

impl FitWish {
    /// Where the fit begins.
    ///
    /// # Errors
    /// A sentence: which wish cannot be met, and what to do.
    pub fn begin(&self, shape: &Shape, target: &Target) -> Result<Paths, String> {
        for (name, parts) in ["zig", "zag"].into_iter().zip(self.parts) {
            if !(1..=MAX_FIT_PARTS).contains(&parts) {
                return Err(format!(
                    "{parts} parts of the {name} path cannot be fitted; give 1 to {MAX_FIT_PARTS}"
                ));
            }
        }
        if !(0.0..=MAX_SMOOTHING).contains(&self.smoothing) {
            return Err(format!(
                "a smoothing of {} cannot be used; give 0 to {MAX_SMOOTHING}",
                self.smoothing
            ));
        }
        if !(0.0..=MAX_COVER).contains(&self.cover) {
            return Err(format!(
                "a cover of {} cannot be used; give 0 to {MAX_COVER}",
                self.cover
            ));
        }
        if !(1..=MAX_ITERATIONS).contains(&self.iterations) {
            return Err(format!(
                "{} iterations cannot be made; give 1 to {MAX_ITERATIONS}",
                self.iterations
            ));
        }
        if target.is_curve() {
            let points = along(target, self.parts[usize::from(self.path == Role::Zag)]);
            return Ok(Paths {
                origin: points.first().copied().unwrap_or_default(),
                a: points.windows(2).map(|two| two[1] - two[0]).collect(),
                b: Vec::new(),
            });
        }
        match self.begin {
            Begin::MiddleLines => Ok(middle_lines(target, self.parts)),
            Begin::Shell => {
                let paths = paths_of(shape).ok_or(
                    "only a translation surface can be the beginning of a fit; begin with the middle lines instead",
                )?;
                Ok(self.recut(&paths))
            }
        }
    }

    /// The same paths in the wished number of parts.
    fn recut(&self, paths: &Paths) -> Paths {
        let cut = |edges: &[Vector], parts: u32| -> Vec<Vector> {
            if edges.len() == parts as usize {
                return edges.to_vec();
            }
            let line = Paths {
                a: edges.to_vec(),
                ..Paths::default()
            };
            let points = resampled(&line.nodes(), parts);
            points.windows(2).map(|two| two[1] - two[0]).collect()
        };
        Paths {
            origin: paths.origin,
            a: cut(&paths.a, self.parts[0]),
            b: cut(&paths.b, self.parts[1]),
        }
    }

    /// Fits; `watch` is told each step and says whether to go on.
    pub fn run(&self, begin: &Paths, target: &Target, watch: impl FnMut(&FitStep) -> bool) -> Fit {
        let options = FitOptions {
            iterations: self.iterations,
            smoothing: self.smoothing,
            // The points of an arch are to be on it, not its chords about it.
            cover: if target.is_curve() { 0.0 } else { self.cover },
            hold_ends: self.hold_ends,
            ..FitOptions::default()
        };
        fit_translation(begin, target, &options, watch)
    }

    /// The shape with the fitted paths.
    ///
    /// A fitted single path takes the place of its path; the other one stays, or, when there is none, is level and straight across it, with
    /// edges of the mean length of the fitted ones.
    ///
    /// # Errors
    /// A sentence, when the paths make no translation surface.
    pub fn applied(&self, shape: &Shape, fit: &Fit) -> Result<Shape, String> {
        let mut paths = fit.paths.clone();
        if paths.b.is_empty() {
            let zig = self.path == Role::Zig;
            let other = match paths_of(shape) {
                Some(now) if zig => now.b,
                Some(now) => now.a,
                None => vec![across(&paths.a); self.parts[usize::from(zig)] as usize],
            };
            paths = if zig {
                Paths { b: other, ..paths }
            } else {
                Paths {
                    origin: paths.origin,
                    b: paths.a,
                    a: other,
                }
            };
        }
        with_paths(shape, &paths).map_err(|finding| {
            let text = finding.code.text();
            format!(
                "the fitted paths cannot be used: {}. Fewer parts, or more smoothing, help",
                text.what.to_lowercase()
            )
        })
    }
}

/// A level edge across a path, of the mean length of its edges.
fn across(edges: &[Vector]) -> Vector {
    let sum: Vector = edges.iter().copied().sum();
    let length: f64 = edges.iter().map(|e| e.length()).sum();
    let level = Vector::new(-sum.y, sum.x, 0.0).try_normalize().unwrap_or(Vector::Y);
    level * (length / edges.len().max(1) as f64)
}
