//! Nothing is ever lost: what keeps the unsaved design against a crash, and files against being overwritten unseen.
//!
//! * `journal`, `slots`, `snapshot`: the unsaved design on the disk, and finding it again after a crash.
//! * `claim`, `stamp`: another window on the same file, and a file that something else has changed.
//! * `banners`, `drops`, `recent`: what of this is seen.

mod act;
mod banners;
mod claim;
mod drops;
mod journal;
mod lookup;
mod recent;
mod slots;
mod snapshot;
mod stamp;
mod steps;

use std::{
    path::{Path, PathBuf},
    time::SystemTime,
};

pub use act::SafeAct;
pub(super) use act::listed;
pub(super) use banners::{banners_ui, overwrite_ui};
pub(super) use drops::{Dropped, hover_ui, what};
pub(super) use recent::{openings, recent_ui};
pub use slots::Orphan;
pub use stamp::{Disk, Stamp};
pub(super) use steps::steps_ui;

use self::{
    claim::Claim,
    journal::{Job, Journal},
    lookup::Lookup,
    slots::{Slot, orphans},
    snapshot::{MOST_EARLIER, Snapshot},
};
use super::{
    history::History,
    session::{self, Session},
};

/// Why a file is not simply overwritten.
#[derive(Clone, Copy, PartialEq, Eq, Debug)]
pub enum InTheWay {
    /// Another window works on it.
    OtherWindow,
    /// Something else has changed it since it was read or written here.
    Changed,
}

/// A question before a file is overwritten.
#[derive(Clone, PartialEq, Eq, Debug)]
pub struct Overwrite {
    /// The file.
    pub path: PathBuf,
    /// What speaks against it.
    pub why: InTheWay,
}

/// Who works on the design's file.
#[derive(Debug, Default)]
enum Held {
    /// Nobody knows: there is no file, or no folder for locks.
    #[default]
    Unknown,
    /// This window.
    Here(#[expect(dead_code, reason = "held for its lock")] Claim),
    /// Another window.
    Elsewhere,
}

/// What was handed to the journal last.
#[derive(Clone, PartialEq, Eq, Debug, Default)]
struct Noted {
    revision: u64,
    unsaved: bool,
    path: Option<PathBuf>,
}

/// What keeps designs and files from being lost.
#[derive(Debug, Default)]
pub struct Safe {
    /// The state folder; none in tests that do not ask for one, and where the system has no place for it.
    folder: Option<PathBuf>,
    /// Woken by threads; without it everything is done at once.
    ctx: Option<egui::Context>,
    journal: Option<Journal>,
    noted: Noted,
    /// Designs that a crash left unsaved, as far as they are offered.
    pub orphans: Vec<Orphan>,
    /// Snapshots that the design in the window was recovered from: kept until it is saved or given up.
    adopted: Vec<Slot>,
    trouble_closed: bool,
    held: Held,
    held_path: Option<PathBuf>,
    other_closed: bool,
    stamp: Option<Stamp>,
    disk: Disk,
    disk_look: Lookup<(PathBuf, Disk)>,
    /// The question before a file is overwritten, while it is open.
    pub overwrite: Option<Overwrite>,
    session_file: Option<PathBuf>,
    /// What is remembered from one session to the next.
    pub(super) session: Session,
    missing: Vec<(PathBuf, String)>,
    recent_look: Lookup<Vec<(PathBuf, String)>>,
}

impl Safe {
    /// Begins to keep things in the folder of this session file, and looks for what a crash left there.
    pub(super) fn start(session_file: &Path, ctx: Option<egui::Context>) -> Self {
        let folder = session_file.parent().map(Path::to_path_buf);
        let recovery = folder.as_deref().map(recovery);
        Self {
            journal: recovery.as_deref().map(|f| Journal::start(f, ctx.as_ref())),
            orphans: recovery.as_deref().map(orphans).unwrap_or_default(),
            session: session::read(session_file),
            session_file: Some(session_file.to_path_buf()),
            folder,
            ctx,
            ..Self::default()
        }
    }

    /// Says that a file has just been read or written, and what it then was.
    pub(super) fn knows(&mut self, stamp: Option<Stamp>) {
        self.stamp = stamp;
        self.disk = Disk::Same;
        self.disk_look = Lookup::default();
    }

    /// Follows the state of the window: hands an unsaved design to the journal, and takes the lock of the design's file.
    /// Costs a comparison when nothing has changed.
    pub(super) fn follow(&mut self, history: &History, path: Option<&Path>) {
        if self.held_path.as_deref() != path {
            self.held_path = path.map(Path::to_path_buf);
            self.other_closed = false;
            self.hold();
        }
        if let Some((path, disk)) = self.disk_look.poll()
            && Some(path.as_path()) == self.held_path.as_deref()
        {
            self.disk = disk;
        }
        if let Some(missing) = self.recent_look.poll() {
            self.missing = missing;
        }
        let Some(journal) = &mut self.journal else { return };
        let noted = &mut self.noted;
        let same_path = noted.path.as_deref() == path;
        if noted.revision == history.revision() && noted.unsaved == history.unsaved() && same_path {
            return;
        }
        let was_unsaved = noted.unsaved;
        noted.revision = history.revision();
        noted.unsaved = history.unsaved();
        if !same_path {
            noted.path = path.map(Path::to_path_buf);
        }
        if history.unsaved() {
            journal.put(Job::Keep(Box::new(Snapshot {
                path: noted.path.clone(),
                changed: SystemTime::now(),
                stamp: self.stamp,
                follows: self.adopted.iter().map(|s| s.name().to_owned()).collect(),
                design: std::sync::Arc::clone(history.now()),
                earlier: history.newest(MOST_EARLIER),
            })));
        } else if was_unsaved {
            journal.put(Job::Clear);
        }
    }

    fn hold(&mut self) {
        // The old lock goes first: the new one may be the same file under another name.
        self.held = Held::Unknown;
        self.held = match (&self.folder, &self.held_path) {
            (Some(folder), Some(path)) => match Claim::take(&folder.join("open"), path) {
                Ok(Some(claim)) => Held::Here(claim),
                Ok(None) => Held::Elsewhere,
                // Without a lock there is no warning; the design can be worked on all the same.
                Err(_) => Held::Unknown,
            },
            _ => Held::Unknown,
        };
    }

    /// The window has the keyboard again: the file may have been changed, and another window on it may be gone.
    pub(super) fn look_at_file(&mut self) {
        if matches!(self.held, Held::Elsewhere) {
            self.hold();
        }
        if let (Some(stamp), Some(path)) = (self.stamp, self.held_path.clone()) {
            self.disk_look.begin(self.ctx.as_ref(), move || {
                let disk = stamp.compare(&path, false);
                (path, disk)
            });
        }
    }

    /// What speaks against overwriting this file with the design.
    pub(super) fn in_the_way(&self, path: &Path) -> Option<InTheWay> {
        // The same file may be called by another name.
        let own = self.held_path.as_deref().and_then(|p| p.canonicalize().ok());
        let same = own.is_some() && own == path.canonicalize().ok();
        if same || self.held_path.as_deref() == Some(path) {
            if matches!(self.held, Held::Elsewhere) {
                return Some(InTheWay::OtherWindow);
            }
            let changed = self.stamp.is_some_and(|s| s.compare(path, true) == Disk::Changed);
            return changed.then_some(InTheWay::Changed);
        }
        let locks = self.folder.as_ref()?.join("open");
        matches!(Claim::take(&locks, path), Ok(None)).then_some(InTheWay::OtherWindow)
    }

    /// Whether another window works on the design's file, and the user has not closed the banner that says so.
    fn told_of_other(&self) -> bool {
        matches!(self.held, Held::Elsewhere) && !self.other_closed
    }

    /// How the design's file stands to what is known of it here.
    #[must_use]
    pub const fn disk(&self) -> Disk {
        self.disk
    }

    /// What keeps unsaved designs from being kept, until it is closed.
    fn trouble(&self) -> Option<String> {
        let trouble = self.journal.as_ref().and_then(Journal::trouble);
        trouble.filter(|_| !self.trouble_closed)
    }

    /// The window is about to close with nothing unsaved that is wanted: nothing is left behind.
    pub(super) fn leave(&mut self) {
        if self.noted.unsaved
            && let Some(journal) = &mut self.journal
        {
            journal.put(Job::Clear);
            self.noted.unsaved = false;
        }
        self.settled();
    }

    /// The design in the window was saved or given up: what it was recovered from is not needed any more.
    pub(super) fn settled(&mut self) {
        for slot in self.adopted.drain(..) {
            // What cannot be taken away is offered again, which loses nothing.
            let _ = slot.clear();
        }
    }

    /// Takes a recoverable design from the list of those that are offered.
    pub(super) fn take(&mut self, at: usize) -> Option<(Snapshot, Vec<Slot>)> {
        let orphan = self.orphans.get(at)?;
        let follows = orphan.found.as_ref().ok()?.follows.clone();
        let orphan = self.orphans.remove(at);
        let snapshot = *orphan.found.ok()?;
        let mut slots = vec![orphan.slot];
        for before in self
            .orphans
            .extract_if(.., |o| follows.iter().any(|f| f == o.slot.name()))
        {
            slots.push(before.slot);
        }
        Some((snapshot, slots))
    }

    /// Keeps these snapshots until the design in the window is saved or given up.
    pub(super) fn adopt(&mut self, slots: Vec<Slot>) {
        self.adopted.extend(slots);
    }

    /// Discards an offered design: the first time it only asks again. Gives its name once it is gone.
    pub(super) fn discard(&mut self, at: usize) -> Option<Result<String, String>> {
        let orphan = self.orphans.get_mut(at)?;
        if !orphan.sure {
            orphan.sure = true;
            return None;
        }
        let (name, file) = (orphan.name(), orphan.file());
        if let Err(error) = orphan.slot.clear() {
            return Some(Err(format!("Cannot remove {}: {error}.", file.display())));
        }
        self.orphans.remove(at);
        Some(Ok(name))
    }

    /// Looks again for what crashes left.
    pub(super) fn look_for_orphans(&mut self) {
        self.orphans.clear();
        self.orphans = self
            .folder
            .as_deref()
            .map(|f| orphans(&recovery(f)))
            .unwrap_or_default();
    }

    /// Closes a banner.
    pub(super) const fn close_banner(&mut self, banner: Banner) {
        match banner {
            Banner::Trouble => self.trouble_closed = true,
            Banner::OtherWindow => self.other_closed = true,
            Banner::Disk => self.disk = Disk::Same,
        }
    }

    /// Changes what is remembered for the next session.
    ///
    /// # Errors
    /// What the system says.
    pub(super) fn remember(&mut self, change: impl Fn(&mut Session)) -> std::io::Result<()> {
        change(&mut self.session);
        match &self.session_file {
            Some(file) => session::update(file, change),
            None => Ok(()),
        }
    }

    /// Looks, beside the window's own work, which of the recent files are not there.
    pub(super) fn look_at_recent(&mut self) {
        let recent = self.session.recent();
        self.recent_look
            .begin(self.ctx.as_ref(), move || recent::missing(&recent));
    }
}

/// A banner that can be closed.
#[derive(Clone, Copy, PartialEq, Eq, Debug)]
pub enum Banner {
    /// Unsaved designs are not being kept.
    Trouble,
    /// Another window works on the file.
    OtherWindow,
    /// The file has been changed or is gone.
    Disk,
}

/// Where unsaved designs are kept.
fn recovery(folder: &Path) -> PathBuf {
    folder.join("recovery")
}
