//! The one worker: slow stages run here, and the newest request wins.

use std::{
    sync::{Arc, Condvar, Mutex, PoisonError, mpsc},
    thread,
};

use zonewright_geometry::{
    Shell, Tolerances,
    fit::{PanelLeft, left_of_panels},
    inspect::{Inspection, inspect},
};
use zonewright_painter::Scene;

use crate::document::Backdrop;

/// What to work out.
#[derive(Clone, Debug)]
pub struct Job {
    /// The revision that it is about.
    pub revision: u64,
    /// The shell.
    pub shell: Arc<Shell>,
    /// What counts as the same place.
    pub tolerances: Tolerances,
    /// What the panels' distances are measured to.
    pub backdrop: Option<Backdrop>,
}

/// What was worked out.
#[derive(Debug)]
pub struct Done {
    /// The revision that it is about.
    pub revision: u64,
    /// Crossings, doubled panels, near misses.
    pub inspection: Inspection,
    /// The scene whose depth order is exact.
    pub scene: Scene,
    /// How far each panel is from the backdrop; empty without one.
    pub left: Vec<PanelLeft>,
}

fn work(job: &Job) -> Done {
    Done {
        revision: job.revision,
        inspection: inspect(&job.shell, &job.tolerances),
        scene: Scene::exact(&job.shell),
        left: left(job),
    }
}

fn left(job: &Job) -> Vec<PanelLeft> {
    let target = job.backdrop.as_ref().and_then(|backdrop| backdrop.target().ok());
    target.map_or_else(Vec::new, |target| left_of_panels(&job.shell, &target))
}

/// What waits for the thread.
#[derive(Debug, Default)]
struct Slot {
    job: Option<Job>,
    closed: bool,
}

/// The worker, or, in tests, work done at once.
#[derive(Debug)]
pub enum Worker {
    /// A thread of its own.
    Thread {
        /// The newest request.
        slot: Arc<(Mutex<SlotBox>, Condvar)>,
        /// What was worked out.
        results: mpsc::Receiver<Done>,
    },
    /// Everything is worked out when it is asked for, so that tests do not depend on timing.
    Inline(Option<Box<Done>>),
}

/// Keeps the slot's fields to this file.
#[derive(Debug, Default)]
pub struct SlotBox(Slot);

impl Worker {
    /// Starts the thread; `ctx` is woken when something has been worked out. When the system gives no thread, work is done at once.
    #[must_use]
    pub fn start(ctx: &egui::Context) -> Self {
        let slot = Arc::new((Mutex::new(SlotBox::default()), Condvar::new()));
        let (send, results) = mpsc::channel();
        let (shared, ctx) = (Arc::clone(&slot), ctx.clone());
        let started = thread::Builder::new()
            .name("zonewright-inspect".to_owned())
            .spawn(move || {
                while let Some(job) = next(&shared) {
                    if send.send(work(&job)).is_err() {
                        break;
                    }
                    ctx.request_repaint();
                }
            });
        match started {
            Ok(_) => Self::Thread { slot, results },
            Err(_) => Self::Inline(None),
        }
    }

    /// Asks for something; an older request that has not begun is dropped.
    pub fn request(&mut self, job: Job) {
        match self {
            Self::Thread { slot, .. } => {
                slot.0.lock().unwrap_or_else(PoisonError::into_inner).0.job = Some(job);
                slot.1.notify_one();
            }
            Self::Inline(done) => *done = Some(Box::new(work(&job))),
        }
    }

    /// The newest that has been worked out since it was last asked.
    pub fn poll(&mut self) -> Option<Done> {
        match self {
            Self::Thread { results, .. } => results.try_iter().last(),
            Self::Inline(done) => done.take().map(|done| *done),
        }
    }
}

impl Drop for Worker {
    fn drop(&mut self) {
        if let Self::Thread { slot, .. } = self {
            slot.0.lock().unwrap_or_else(PoisonError::into_inner).0.closed = true;
            slot.1.notify_one();
        }
    }
}

fn next(shared: &(Mutex<SlotBox>, Condvar)) -> Option<Job> {
    let mut slot = shared.0.lock().unwrap_or_else(PoisonError::into_inner);
    loop {
        if slot.0.closed {
            return None;
        }
        if let Some(job) = slot.0.job.take() {
            return Some(job);
        }
        slot = shared.1.wait(slot).unwrap_or_else(PoisonError::into_inner);
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn the_newest_request_wins() {
        let ctx = egui::Context::default();
        let mut worker = Worker::start(&ctx);
        for revision in 1..=50 {
            worker.request(Job {
                revision,
                shell: Arc::new(Shell::default()),
                tolerances: Tolerances::default(),
                backdrop: None,
            });
        }
        let deadline = std::time::Instant::now() + std::time::Duration::from_secs(5);
        let mut last = 0;
        while last != 50 && std::time::Instant::now() < deadline {
            last = worker.poll().map_or(last, |done| done.revision);
            thread::yield_now();
        }
        assert_eq!(last, 50);
    }
}
