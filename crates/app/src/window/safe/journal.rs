//! Keeping the unsaved design on the disk, beside the window's own work.
//!
//! The window hands over what there is, at most once a frame, and never waits. The newest wins. A thread writes it at
//! once, and after that at most every half second; the policy ([`Pace`]) knows no clock and no thread, so that tests
//! decide what time it is.

use std::{
    path::{Path, PathBuf},
    sync::{Arc, Condvar, Mutex, PoisonError},
    thread,
    time::{Duration, Instant},
};

use super::{
    slots::Slot,
    snapshot::{self, Snapshot, Texts},
};

/// The least time between two writings: with it, a crash costs less than a second of work, and a disk that spins is not
/// kept busy.
pub(super) const EVERY: Duration = Duration::from_millis(500);

/// The time until a writing that failed is tried again: a full disk is not emptied by asking.
const AGAIN: Duration = Duration::from_secs(5);

/// How long closing the window waits for the last writing; a disk that hangs must not keep the window.
const PATIENCE: Duration = Duration::from_secs(3);

/// What the disk is to hold.
#[derive(Clone, PartialEq, Debug)]
pub(super) enum Job {
    /// This design.
    Keep(Box<Snapshot>),
    /// Nothing: all is saved.
    Clear,
}

/// Where a snapshot is put.
pub(super) trait Shelf {
    /// Makes the disk hold what the job says.
    ///
    /// # Errors
    /// One sentence that says what went wrong.
    fn put(&mut self, job: &Job) -> Result<(), String>;
}

/// When to write what.
#[derive(Debug)]
pub(super) struct Pace<S> {
    shelf: S,
    waiting: Option<Job>,
    not_before: Duration,
    /// What went wrong the last time.
    pub(super) trouble: Option<String>,
}

impl<S: Shelf> Pace<S> {
    pub(super) const fn new(shelf: S) -> Self {
        Self {
            shelf,
            waiting: None,
            not_before: Duration::ZERO,
            trouble: None,
        }
    }

    /// Takes the newest job, if there is one, and does what is due. `now` counts from any fixed moment. Gives how long to
    /// wait for the next thing to do; none when there is nothing.
    pub(super) fn step(&mut self, now: Duration, newest: Option<Job>) -> Option<Duration> {
        if newest.is_some() {
            self.waiting = newest;
        }
        match &self.waiting {
            None => return None,
            // Taking the snapshot of a saved design away is due at once.
            Some(Job::Clear) => {}
            Some(Job::Keep(_)) if now < self.not_before => return Some(self.not_before - now),
            Some(Job::Keep(_)) => {}
        }
        self.write(now);
        self.waiting.as_ref().map(|_| self.not_before.saturating_sub(now))
    }

    /// Does what waits, whatever the time.
    pub(super) fn flush(&mut self, now: Duration, newest: Option<Job>) {
        if newest.is_some() {
            self.waiting = newest;
        }
        self.write(now);
    }

    fn write(&mut self, now: Duration) {
        let Some(job) = self.waiting.take() else { return };
        match self.shelf.put(&job) {
            Ok(()) => {
                self.trouble = None;
                self.not_before = now + EVERY;
            }
            Err(text) => {
                self.trouble = Some(text);
                self.not_before = now + AGAIN;
                // A snapshot that cannot be taken away is offered at the next start, which loses nothing.
                self.waiting = Some(job).filter(|job| *job != Job::Clear);
            }
        }
    }
}

/// A slot on the disk, made when it is first needed.
#[derive(Debug)]
struct OnDisk {
    folder: PathBuf,
    slot: Option<Slot>,
    texts: Texts,
}

impl Shelf for OnDisk {
    fn put(&mut self, job: &Job) -> Result<(), String> {
        let unkept = |cause: &dyn std::fmt::Display| format!("cannot write into {}: {cause}", self.folder.display());
        let snapshot = match (job, &self.slot) {
            (Job::Keep(snapshot), _) => snapshot,
            (Job::Clear, Some(slot)) => return slot.clear().map_err(|error| unkept(&error)),
            (Job::Clear, None) => return Ok(()),
        };
        let text = snapshot::to_text(snapshot, &mut self.texts)?;
        if self.slot.is_none() {
            self.slot = Some(Slot::open(&self.folder).map_err(|error| unkept(&error))?);
        }
        let Some(slot) = &self.slot else { return Ok(()) };
        slot.write(&text).map_err(|error| unkept(&error))
    }
}

#[derive(Debug, Default)]
struct Shared {
    newest: Option<Job>,
    trouble: Option<String>,
    closing: bool,
    ended: bool,
}

type Both = (Mutex<Shared>, Condvar);

fn locked(both: &Both) -> std::sync::MutexGuard<'_, Shared> {
    both.0.lock().unwrap_or_else(PoisonError::into_inner)
}

/// Keeps the unsaved design on the disk.
#[derive(Debug)]
pub(super) struct Journal {
    way: Way,
}

#[derive(Debug)]
enum Way {
    Thread(Arc<Both>),
    /// For tests, and where the system gives no thread: each job is done when it comes.
    Inline(Box<Pace<OnDisk>>),
}

impl Journal {
    /// Begins to keep designs in this folder. Nothing is written until there is something unsaved. `ctx` is woken when
    /// something goes wrong; without it, everything is written at once.
    pub(super) fn start(folder: &Path, ctx: Option<&egui::Context>) -> Self {
        let shelf = || OnDisk {
            folder: folder.to_path_buf(),
            slot: None,
            texts: Texts::default(),
        };
        let inline = || Way::Inline(Box::new(Pace::new(shelf())));
        let Some(ctx) = ctx.cloned() else {
            return Self { way: inline() };
        };
        let both = Arc::new(Both::default());
        let (theirs, pace) = (Arc::clone(&both), Pace::new(shelf()));
        let started = thread::Builder::new()
            .name("zonewright-journal".to_owned())
            .spawn(move || run(&theirs, pace, &ctx));
        Self {
            way: started.map_or_else(|_| inline(), |_| Way::Thread(both)),
        }
    }

    /// Says what the disk is to hold from now on.
    pub(super) fn put(&mut self, job: Job) {
        match &mut self.way {
            Way::Thread(both) => {
                locked(both).newest = Some(job);
                both.1.notify_all();
            }
            Way::Inline(pace) => pace.flush(Duration::ZERO, Some(job)),
        }
    }

    /// What went wrong with the last writing.
    pub(super) fn trouble(&self) -> Option<String> {
        match &self.way {
            Way::Thread(both) => locked(both).trouble.clone(),
            Way::Inline(pace) => pace.trouble.clone(),
        }
    }
}

impl Drop for Journal {
    /// Writes what still waits.
    fn drop(&mut self) {
        let Way::Thread(both) = &self.way else { return };
        locked(both).closing = true;
        both.1.notify_all();
        // The thread is given a moment, and is left alone when the disk hangs.
        let _ = both
            .1
            .wait_timeout_while(locked(both), PATIENCE, |shared| !shared.ended);
    }
}

fn run<S: Shelf>(both: &Both, mut pace: Pace<S>, ctx: &egui::Context) {
    let begun = Instant::now();
    let mut wait: Option<Duration> = None;
    loop {
        let mut shared = locked(both);
        if shared.newest.is_none() && !shared.closing {
            shared = match wait {
                None => both.1.wait(shared).unwrap_or_else(PoisonError::into_inner),
                Some(wait) => {
                    let woken = both.1.wait_timeout(shared, wait);
                    woken.unwrap_or_else(PoisonError::into_inner).0
                }
            };
        }
        let (newest, closing) = (shared.newest.take(), shared.closing);
        drop(shared);
        if closing {
            pace.flush(begun.elapsed(), newest);
            // The slot goes first: without a snapshot, its lock file goes with it.
            drop(pace);
            locked(both).ended = true;
            both.1.notify_all();
            return;
        }
        wait = pace.step(begun.elapsed(), newest);
        let changed = {
            let mut shared = locked(both);
            let changed = shared.trouble.is_some() != pace.trouble.is_some();
            shared.trouble.clone_from(&pace.trouble);
            changed
        };
        if changed {
            ctx.request_repaint();
        }
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::window::safe::{slots::orphans, snapshot::tests::snapshot};

    #[derive(Default)]
    struct Noted {
        written: Vec<String>,
        full: bool,
    }

    impl Shelf for Noted {
        fn put(&mut self, job: &Job) -> Result<(), String> {
            if self.full {
                return Err("no room".to_owned());
            }
            self.written.push(match job {
                Job::Keep(snapshot) => snapshot.design.name.clone(),
                Job::Clear => "cleared".to_owned(),
            });
            Ok(())
        }
    }

    fn keep(name: &str) -> Option<Job> {
        Some(Job::Keep(Box::new(snapshot(name))))
    }

    const fn ms(ms: u64) -> Duration {
        Duration::from_millis(ms)
    }

    #[test]
    fn a_drag_is_written_at_once_and_then_every_half_second_with_the_newest_state() {
        let mut pace = Pace::new(Noted::default());
        // A change each 16 ms, as a drag makes them, for a second and a bit.
        for frame in 0..70_u64 {
            pace.step(ms(frame * 16), keep(&format!("{frame}")));
        }
        // Derived: written at 0, at the first frame from 500 ms on (32 * 16 = 512), and 500 ms after that (64 * 16 = 1024).
        assert_eq!(pace.shelf.written, ["0", "32", "64"]);
        // The rest is written when its time has come, without another change.
        let wait = pace.step(ms(1105), None).unwrap();
        assert_eq!(wait, ms(1024 + 500 - 1105));
        assert_eq!(pace.step(ms(1105) + wait, None), None);
        assert_eq!(pace.shelf.written.last().unwrap(), "69");
        // Then nothing is written any more.
        assert_eq!(pace.step(ms(60_000), None), None);
        assert_eq!(pace.shelf.written.len(), 4);
    }

    #[test]
    fn saving_takes_the_snapshot_away_at_once_and_drops_what_waited() {
        let mut pace = Pace::new(Noted::default());
        pace.step(ms(0), keep("a"));
        assert_eq!(pace.step(ms(10), keep("b")), Some(ms(490)));
        assert_eq!(pace.step(ms(20), Some(Job::Clear)), None);
        assert_eq!(pace.step(ms(5_000), None), None);
        assert_eq!(pace.shelf.written, ["a", "cleared"]);
    }

    #[test]
    fn a_full_disk_is_tried_again_later_with_the_newest_state() {
        let mut pace = Pace::new(Noted::default());
        pace.shelf.full = true;
        assert_eq!(pace.step(ms(0), keep("a")), Some(AGAIN));
        assert_eq!(pace.trouble.as_deref(), Some("no room"));
        assert_eq!(pace.step(ms(1_000), keep("b")), Some(AGAIN - ms(1_000)));
        pace.shelf.full = false;
        assert_eq!(pace.step(AGAIN, None), None);
        assert_eq!(pace.trouble, None);
        assert_eq!(pace.shelf.written, ["b"]);
    }

    #[test]
    fn a_window_that_falls_over_leaves_its_newest_state_and_one_that_is_done_leaves_nothing() {
        let folder = tempfile::tempdir().unwrap();
        let ctx = egui::Context::default();
        let mut journal = Journal::start(folder.path(), Some(&ctx));
        for k in 0..=50 {
            journal.put(Job::Keep(Box::new(snapshot(&format!("{k}")))));
        }
        drop(journal);
        let found = orphans(folder.path());
        assert_eq!(found.len(), 1);
        assert_eq!(found[0].found.as_ref().unwrap().design.name, "50");
        found[0].slot.clear().unwrap();
        drop(found);
        let mut journal = Journal::start(folder.path(), Some(&ctx));
        journal.put(Job::Keep(Box::new(snapshot("b"))));
        journal.put(Job::Clear);
        drop(journal);
        assert_eq!(std::fs::read_dir(folder.path()).unwrap().count(), 0);
    }

    #[test]
    fn a_folder_that_cannot_be_made_is_one_trouble() {
        let folder = tempfile::tempdir().unwrap();
        let taken = folder.path().join("file");
        std::fs::write(&taken, "").unwrap();
        let mut journal = Journal::start(&taken.join("recovery"), None);
        journal.put(Job::Keep(Box::new(snapshot("a"))));
        let said = journal.trouble().unwrap();
        assert!(said.contains("recovery"), "{said}");
    }
}
