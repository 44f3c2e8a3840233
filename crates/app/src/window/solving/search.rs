//! A search on a thread of its own.

use std::{
    sync::{
        Arc,
        atomic::{AtomicBool, Ordering},
        mpsc,
    },
    thread,
};

use zonewright_geometry::{
    Shape,
    solve::{Effort, Free, Solution, Unsolved, Want, solve},
};

type Found = Result<Solution, Unsolved>;

/// A search that goes on, or whose result waits to be fetched. One that is dropped ends soon.
#[derive(Debug)]
pub(super) struct Search {
    revision: u64,
    stop: Arc<AtomicBool>,
    result: mpsc::Receiver<Found>,
}

impl Search {
    /// Begins. With a context to wake it has a thread of its own; without, or when the system gives no thread, it is done when this returns.
    pub(super) fn begin(
        shape: Shape,
        wants: Vec<Want>,
        free: Vec<Free>,
        revision: u64,
        wake: Option<egui::Context>,
    ) -> Self {
        let stop = Arc::new(AtomicBool::new(false));
        let (send, result) = mpsc::channel();
        let work = {
            let stop = Arc::clone(&stop);
            move || {
                let mut stopped = || stop.load(Ordering::Relaxed);
                let found = solve(&shape, &wants, &free, Effort::default(), &mut stopped);
                // Nobody listens any more when the window has closed.
                let _ = send.send(found);
            }
        };
        match wake {
            None => work(),
            Some(ctx) => {
                let spawned = thread::Builder::new()
                    .name("zonewright-solve".to_owned())
                    .spawn(move || {
                        work();
                        ctx.request_repaint();
                    });
                // Without a thread the work is gone, and with it the sender: polling then says so.
                drop(spawned);
            }
        }
        Self { revision, stop, result }
    }

    pub(super) fn stop(&self) {
        self.stop.store(true, Ordering::Relaxed);
    }

    /// The result, once it is there, with the revision that the search began on.
    pub(super) fn poll(&mut self) -> Option<(u64, Found)> {
        match self.result.try_recv() {
            Ok(found) => Some((self.revision, found)),
            Err(mpsc::TryRecvError::Empty) => None,
            Err(mpsc::TryRecvError::Disconnected) => {
                let why = zonewright_geometry::solve::Why::Stopped;
                Some((self.revision, Err(Unsolved { why, nearest: None })))
            }
        }
    }
}

impl Drop for Search {
    fn drop(&mut self) {
        self.stop();
    }
}
