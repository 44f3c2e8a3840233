//! A search, as it is asked for and answered.

use std::sync::{
    Arc,
    atomic::{AtomicBool, Ordering},
};

use zonewright_geometry::{
    Shape,
    solve::{Effort, Free, Solution, Unsolved, Want, solve},
};

/// What to search for.
#[derive(Debug)]
pub struct SearchJob {
    /// The revision of the design.
    pub(super) revision: u64,
    pub(super) shape: Shape,
    pub(super) wants: Vec<Want>,
    pub(super) free: Vec<Free>,
    pub(super) stop: Stop,
}

/// What was found.
#[derive(Debug)]
pub struct SearchDone {
    /// The revision of the design that the search began on.
    pub(in crate::window) revision: u64,
    /// The solution, or why there is none.
    pub(in crate::window) result: Result<Solution, Unsolved>,
}

/// Ends a search from outside.
#[derive(Clone, Debug, Default)]
pub(super) struct Stop(Arc<AtomicBool>);

impl Stop {
    pub(super) fn stop(&self) {
        self.0.store(true, Ordering::Relaxed);
    }

    fn is_stopped(&self) -> bool {
        self.0.load(Ordering::Relaxed)
    }
}

/// Works a search out, in one part.
pub(in crate::window) fn search_stages(job: SearchJob, answer: &mut dyn FnMut(SearchDone) -> bool) {
    let mut stopped = || job.stop.is_stopped();
    let result = solve(&job.shape, &job.wants, &job.free, Effort::default(), &mut stopped);
    answer(SearchDone {
        revision: job.revision,
        result,
    });
}
