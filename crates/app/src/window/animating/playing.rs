//! An animation that plays in the picture.

use zonewright_geometry::Shell;
use zonewright_painter::Scene;

use crate::animation::Film;

/// A film and the frame of it that is shown.
#[derive(Debug)]
pub struct Playing {
    film: Film,
    rate: u32,
    began: Option<f64>,
    frame: Option<usize>,
    /// The revision of the design that it is about.
    pub(in crate::window) revision: u64,
    /// The shell of the frame.
    pub(in crate::window) shell: Shell,
    /// The same, ready to be drawn.
    pub(in crate::window) scene: Scene,
}

impl Playing {
    /// A film from its beginning. `rate` is in frames a second.
    #[must_use]
    pub(in crate::window) fn new(film: Film, rate: u32, revision: u64) -> Self {
        let shell = Shell::default();
        Self {
            film,
            rate: rate.max(1),
            began: None,
            frame: None,
            revision,
            scene: Scene::quick(&shell),
            shell,
        }
    }

    /// The frame that is shown, counted from 0, and how many there are.
    #[must_use]
    pub fn at(&self) -> (usize, usize) {
        (self.frame.unwrap_or(0), self.film.frames())
    }

    /// Goes to the frame of this time, in seconds. Gives how long it is shown; none when the film is over.
    ///
    /// # Errors
    /// As [`Film::shell`].
    pub(in crate::window) fn go_to(&mut self, now: f64) -> Result<Option<f64>, String> {
        let began = *self.began.get_or_insert(now);
        let rate = f64::from(self.rate);
        let place = ((now - began) * rate).max(0.0);
        // The last frame stays for a second, as in the files.
        let over = self.film.frames() as f64 + rate;
        if place >= over {
            return Ok(None);
        }
        let frame = (place as usize).min(self.film.frames().saturating_sub(1));
        if self.frame != Some(frame) {
            self.shell = self.film.shell(frame)?;
            self.scene = Scene::exact(&self.shell);
            self.frame = Some(frame);
        }
        let next = if frame + 1 < self.film.frames() {
            (frame + 1) as f64
        } else {
            over
        };
        Ok(Some(((next - place) / rate).max(0.0)))
    }
}
