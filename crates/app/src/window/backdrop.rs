//! The backdrop in the window: what can be done with it, and a fit that is going on.

use std::{
    path::PathBuf,
    sync::{
        Arc,
        atomic::{AtomicBool, Ordering},
        mpsc,
    },
    thread,
};

use zonewright_geometry::{
    Shape,
    fit::{Fit, FitEnd, FitStep},
};

use super::command::Words;
use crate::{
    document::{Backdrop, BackdropPlacement},
    fitting::FitWish,
};

/// What can be done with the backdrop.
#[derive(Clone, PartialEq, Debug)]
pub enum BackdropAct {
    /// Loads one: asks which.
    Load,
    /// Loads the one in this file.
    LoadPath(PathBuf),
    /// Takes it out of the design.
    Remove,
    /// Draws it, or keeps it without drawing it.
    Show(bool),
    /// Puts it somewhere else.
    Place(BackdropPlacement),
    /// Says how paths are to be fitted.
    Wish(FitWish),
    /// Fits the paths to it.
    Fit,
    /// Ends the fit that is going on, with what it has reached.
    Stop,
    /// Picks the panel that is farthest from it, and colours all panels by their distance.
    Largest,
    /// Colours by the distance alone, or by the side as well.
    WithoutSign(bool),
}

impl BackdropAct {
    /// Those that need nothing but their name.
    pub(super) fn listed() -> [Self; 5] {
        [Self::Load, Self::Remove, Self::Fit, Self::Stop, Self::Largest]
    }

    /// Name and hint.
    #[must_use]
    pub(super) const fn words(&self) -> Words {
        let (name, hint) = match self {
            Self::Load | Self::LoadPath(_) => (
                "Load a backdrop…",
                "Shows a drawn arch, site line or form from an OBJ, STL, CSV, DXF or SVG file with the shell.",
            ),
            Self::Remove => ("Remove the backdrop", "Takes the backdrop out of the design."),
            Self::Show(_) => (
                "Show the backdrop",
                "Draws the backdrop, or keeps it without drawing it.",
            ),
            Self::Place(_) => ("Place the backdrop", "Moves, turns or scales the backdrop."),
            Self::Wish(_) => ("How to fit", "Says how paths are to be fitted."),
            Self::Fit => (
                "Fit the paths",
                "Brings the two paths of a translation surface to the backdrop; to one of lines, one path.",
            ),
            Self::Stop => ("Stop fitting", "Ends the fit with what it has reached."),
            Self::Largest => (
                "Show the largest distance",
                "Picks the panel that is farthest from the backdrop, and colours all by their distance.",
            ),
            Self::WithoutSign(_) => (
                "Distance without side",
                "Colours by how far panels are from the backdrop, on whichever side.",
            ),
        };
        Words { name, hint }
    }
}

/// The window's state of the backdrop.
#[derive(Debug, Default)]
pub struct BackdropState {
    /// How paths are to be fitted.
    pub wish: FitWish,
    /// The fit that is going on.
    pub fitting: Option<Fitting>,
    /// The distances of the fit that is going on, or of the last one.
    pub history: Vec<FitStep>,
    /// Why the last fit ended.
    pub end: Option<FitEnd>,
}

/// What a fit tells.
#[derive(Debug)]
pub enum Told {
    /// A step was made.
    Step(FitStep),
    /// It has ended.
    Done(Result<Box<Fit>, String>),
}

/// A fit that is going on.
///
/// It has a thread of its own, not the worker's: it tells its steps, it can be stopped, and meanwhile the shell is inspected as ever.
#[derive(Debug)]
pub struct Fitting {
    /// What is fitted to.
    pub about: Backdrop,
    /// How.
    pub wish: FitWish,
    stop: Arc<AtomicBool>,
    told: mpsc::Receiver<Told>,
}

impl Fitting {
    /// Begins to fit. Without a context to wake, and when the system gives no thread, it is done at once.
    #[must_use]
    pub fn start(ctx: Option<egui::Context>, about: Backdrop, shape: Shape, wish: FitWish) -> Self {
        let stop = Arc::new(AtomicBool::new(false));
        let (send, told) = mpsc::channel();
        let job = Job {
            backdrop: about.clone(),
            shape,
            wish,
            stop: Arc::clone(&stop),
            send,
        };
        if let Some(ctx) = ctx {
            let job = job.clone();
            let spawned = thread::Builder::new()
                .name("zonewright-fit".to_owned())
                .spawn(move || job.run(|| ctx.request_repaint()));
            if spawned.is_ok() {
                return Self {
                    about,
                    wish,
                    stop,
                    told,
                };
            }
        }
        job.run(|| {});
        Self {
            about,
            wish,
            stop,
            told,
        }
    }

    /// Ends it; what it has reached still comes.
    pub fn stop(&self) {
        self.stop.store(true, Ordering::Relaxed);
    }

    /// What it has told since it was last asked.
    pub fn told(&self) -> impl Iterator<Item = Told> {
        self.told.try_iter()
    }
}

impl Drop for Fitting {
    fn drop(&mut self) {
        self.stop();
    }
}

#[derive(Clone)]
struct Job {
    backdrop: Backdrop,
    shape: Shape,
    wish: FitWish,
    stop: Arc<AtomicBool>,
    send: mpsc::Sender<Told>,
}

impl Job {
    fn run(&self, wake: impl Fn()) {
        // Nobody listens any more when the fit was dropped.
        let tell = |told| {
            let heard = self.send.send(told).is_ok();
            wake();
            heard
        };
        let fitted = self.backdrop.target().and_then(|target| {
            let begin = self.wish.begin(&self.shape, &target)?;
            Ok(self.wish.run(&begin, &target, |step| {
                tell(Told::Step(*step)) && !self.stop.load(Ordering::Relaxed)
            }))
        });
        tell(Told::Done(fitted.map(Box::new)));
    }
}
