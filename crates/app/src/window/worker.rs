//! Work off the window's thread: the newest request wins, answers come in parts.
//!
//! Growing has a thread of its own beside inspecting, so that a drag never waits for an inspection that is going on.

use std::{
    collections::VecDeque,
    fmt,
    sync::{
        Arc, Condvar, Mutex, PoisonError,
        atomic::{AtomicBool, Ordering},
        mpsc,
    },
    thread,
    time::{Duration, Instant},
};

use super::{
    solving::{SearchDone, SearchJob, search_stages},
    stages::{Grow, Grown, Inspect, Inspected, grow_stages, inspect_stages},
};

/// The threads of a window.
#[derive(Debug)]
pub struct Worker {
    /// Shell, readouts, parts.
    pub growing: Lane<Grow, Grown>,
    /// Crossings and the exact depth order.
    pub inspecting: Lane<Inspect, Inspected>,
    /// Searches for wanted figures.
    pub solving: Lane<SearchJob, SearchDone>,
}

impl Worker {
    /// Starts the threads; `ctx` is woken when something has been worked out that nobody waits for.
    #[must_use]
    pub fn start(ctx: &egui::Context) -> Self {
        Self {
            growing: Lane::start("zonewright-grow", ctx, grow_stages),
            inspecting: Lane::start("zonewright-inspect", ctx, inspect_stages),
            solving: Lane::start("zonewright-solve", ctx, search_stages),
        }
    }

    /// No threads: everything is worked out when it is asked for, so that tests do not depend on timing.
    #[must_use]
    pub const fn inline() -> Self {
        Self {
            growing: Lane::inline(grow_stages),
            inspecting: Lane::inline(inspect_stages),
            solving: Lane::inline(search_stages),
        }
    }
}

/// Works one request out. `answer` takes each part as it is there; it says whether to go on: not when a newer request waits.
pub(super) type Stages<J, A> = fn(J, answer: &mut dyn FnMut(A) -> bool);

/// A thread that works out the newest request, or, in tests, work done at once.
pub struct Lane<J, A> {
    work: Stages<J, A>,
    way: Way<J, A>,
}

enum Way<J, A> {
    Thread {
        shared: Arc<Shared<J>>,
        answers: mpsc::Receiver<A>,
    },
    Inline(VecDeque<A>),
}

struct Shared<J> {
    slot: Mutex<Slot<J>>,
    filled: Condvar,
    /// Whether the window's thread waits for the next answer: it need not be woken then.
    awaited: AtomicBool,
}

struct Slot<J> {
    job: Option<J>,
    closed: bool,
}

impl<J> Shared<J> {
    fn slot(&self) -> std::sync::MutexGuard<'_, Slot<J>> {
        self.slot.lock().unwrap_or_else(PoisonError::into_inner)
    }

    fn next(&self) -> Option<J> {
        let mut slot = self.slot();
        loop {
            if slot.closed {
                return None;
            }
            if let Some(job) = slot.job.take() {
                return Some(job);
            }
            slot = self.filled.wait(slot).unwrap_or_else(PoisonError::into_inner);
        }
    }
}

impl<J: Send + 'static, A: Send + 'static> Lane<J, A> {
    /// Starts the thread. When the system gives none, work is done at once.
    #[must_use]
    pub fn start(name: &str, ctx: &egui::Context, work: Stages<J, A>) -> Self {
        let shared = Arc::new(Shared {
            slot: Mutex::new(Slot {
                job: None,
                closed: false,
            }),
            filled: Condvar::new(),
            awaited: AtomicBool::new(false),
        });
        let (send, answers) = mpsc::channel();
        let (own, ctx) = (Arc::clone(&shared), ctx.clone());
        let started = thread::Builder::new().name(name.to_owned()).spawn(move || {
            while let Some(job) = own.next() {
                work(job, &mut |answer| {
                    let heard = send.send(answer).is_ok();
                    if !own.awaited.load(Ordering::SeqCst) {
                        ctx.request_repaint();
                    }
                    let slot = own.slot();
                    heard && slot.job.is_none() && !slot.closed
                });
            }
        });
        let way = match started {
            Ok(_) => Way::Thread { shared, answers },
            Err(_) => Way::Inline(VecDeque::new()),
        };
        Self { work, way }
    }

    /// Work done at once.
    #[must_use]
    pub const fn inline(work: Stages<J, A>) -> Self {
        Self {
            work,
            way: Way::Inline(VecDeque::new()),
        }
    }

    /// Whether work is done at once.
    #[must_use]
    pub const fn is_inline(&self) -> bool {
        matches!(self.way, Way::Inline(_))
    }

    /// Asks for something; an older request that has not begun is dropped.
    pub fn request(&mut self, job: J) {
        match &mut self.way {
            Way::Thread { shared, .. } => {
                shared.slot().job = Some(job);
                shared.filled.notify_one();
            }
            Way::Inline(answers) => (self.work)(job, &mut |answer| {
                answers.push_back(answer);
                true
            }),
        }
    }

    /// The next answer, if one is there.
    pub fn poll(&mut self) -> Option<A> {
        match &mut self.way {
            Way::Thread { answers, .. } => answers.try_recv().ok(),
            Way::Inline(answers) => answers.pop_front(),
        }
    }

    /// The next answer, waited for until `until` at the longest.
    pub fn poll_until(&mut self, until: Instant) -> Option<A> {
        let Way::Thread { shared, answers } = &self.way else {
            return self.poll();
        };
        let left = until.saturating_duration_since(Instant::now());
        if left == Duration::ZERO {
            return answers.try_recv().ok();
        }
        shared.awaited.store(true, Ordering::SeqCst);
        let answer = answers.recv_timeout(left).ok();
        shared.awaited.store(false, Ordering::SeqCst);
        // What was sent just before the wait ended woke nobody.
        answer.or_else(|| answers.try_recv().ok())
    }
}

impl<J, A> fmt::Debug for Lane<J, A> {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        f.write_str(match self.way {
            Way::Thread { .. } => "Lane::Thread",
            Way::Inline(_) => "Lane::Inline",
        })
    }
}

impl<J, A> Drop for Lane<J, A> {
    fn drop(&mut self) {
        if let Way::Thread { shared, .. } = &self.way {
            shared.slot().closed = true;
            shared.filled.notify_one();
        }
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    const SOON: Duration = Duration::from_secs(5);

    fn twice(job: u64, answer: &mut dyn FnMut((u64, bool)) -> bool) {
        if answer((job, false)) {
            answer((job, true));
        }
    }

    #[test]
    fn the_newest_request_wins() {
        let mut lane = Lane::start("test", &egui::Context::default(), twice);
        for job in 1..=50 {
            lane.request(job);
        }
        let until = Instant::now() + SOON;
        let mut answers = Vec::new();
        while answers.last() != Some(&(50, true)) {
            answers.push(lane.poll_until(until).expect("an answer within five seconds"));
        }
        // In the order of the requests, each whole one after its first part.
        assert!(answers.is_sorted());
        for (job, _) in answers.iter().filter(|(_, whole)| *whole) {
            assert!(answers.contains(&(*job, false)));
        }
    }

    /// A request that is out of date is left after the part that is being worked out.
    #[test]
    fn a_newer_request_ends_the_older_one_between_its_parts() {
        fn slow(job: u64, answer: &mut dyn FnMut((u64, bool)) -> bool) {
            // Long enough for the second request to be made meanwhile.
            thread::sleep(Duration::from_millis(if job == 1 { 200 } else { 0 }));
            twice(job, answer);
        }
        let mut lane = Lane::start("test", &egui::Context::default(), slow);
        lane.request(1);
        thread::sleep(Duration::from_millis(50));
        lane.request(2);
        let until = Instant::now() + SOON;
        let answers: Vec<_> = std::iter::from_fn(|| lane.poll_until(until)).take(3).collect();
        assert_eq!(answers, [(1, false), (2, false), (2, true)]);
    }

    #[test]
    fn waiting_ends_in_time_and_what_comes_later_is_kept() {
        fn late(job: u64, answer: &mut dyn FnMut(u64) -> bool) {
            thread::sleep(Duration::from_millis(300));
            answer(job);
        }
        let mut lane = Lane::start("test", &egui::Context::default(), late);
        lane.request(7);
        assert_eq!(lane.poll_until(Instant::now() + Duration::from_millis(10)), None);
        assert_eq!(lane.poll_until(Instant::now() + SOON), Some(7));
    }
}
