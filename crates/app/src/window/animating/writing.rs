//! An animation that is being written, on a thread of its own: a frame takes many times longer than the window may wait.

use std::{
    path::PathBuf,
    sync::{
        Arc,
        atomic::{AtomicBool, AtomicUsize, Ordering},
        mpsc,
    },
    thread,
};

use zonewright_painter::View;

use super::WRITTEN_SIZE;
use crate::animation::{Film, kind_of, save, write};

/// How far writing is.
#[derive(Clone, PartialEq, Eq, Debug)]
pub(in crate::window) enum Progress {
    /// So many frames are drawn, of so many.
    Frames(usize, usize),
    /// It has ended: where it is now, or why not.
    Ended(Result<PathBuf, String>),
}

/// An animation that is being written.
#[derive(Debug)]
pub(in crate::window) struct Writing {
    done: Arc<AtomicUsize>,
    of: usize,
    stop: Arc<AtomicBool>,
    result: mpsc::Receiver<Result<PathBuf, String>>,
}

impl Writing {
    /// Begins to write. Without a context the work is done at once, as tests want it; so it is when the system gives no thread.
    #[must_use]
    pub(in crate::window) fn begin(film: Film, path: PathBuf, rate: u16, ctx: Option<egui::Context>) -> Self {
        let (done, stop) = (Arc::new(AtomicUsize::new(0)), Arc::new(AtomicBool::new(false)));
        let (send, result) = mpsc::channel();
        let of = film.frames();
        let (counter, stopped, wake) = (Arc::clone(&done), Arc::clone(&stop), ctx.clone());
        let work = move || {
            let mut go_on = |frame: usize| {
                counter.store(frame, Ordering::Relaxed);
                if let Some(ctx) = &wake {
                    ctx.request_repaint();
                }
                !stopped.load(Ordering::Relaxed)
            };
            let made = write(&film, kind_of(&path), View::Fit, WRITTEN_SIZE, rate, &mut go_on);
            // Nobody listens any more when the window was closed meanwhile.
            let _ = send.send(made.and_then(|written| save(&path, written)).map(|()| path));
            if let Some(ctx) = &wake {
                ctx.request_repaint();
            }
        };
        if ctx.is_some() {
            // When no thread is to be had, the channel is closed, and that is said.
            let _ = thread::Builder::new().name("zonewright-animate".to_owned()).spawn(work);
        } else {
            work();
        }
        Self { done, of, stop, result }
    }

    /// How far it is.
    pub(in crate::window) fn progress(&self) -> Progress {
        match self.result.try_recv() {
            Ok(result) => Progress::Ended(result),
            Err(mpsc::TryRecvError::Empty) => self.frames(),
            Err(mpsc::TryRecvError::Disconnected) => {
                Progress::Ended(Err("the system gave no thread to write with; try again".to_owned()))
            }
        }
    }

    /// How many frames are drawn.
    #[must_use]
    pub(in crate::window) fn frames(&self) -> Progress {
        Progress::Frames(self.done.load(Ordering::Relaxed), self.of)
    }

    /// Asks it to end.
    pub(in crate::window) fn stop(&self) {
        self.stop.store(true, Ordering::Relaxed);
    }
}

impl Drop for Writing {
    fn drop(&mut self) {
        self.stop();
    }
}
