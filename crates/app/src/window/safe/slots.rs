//! Where snapshots lie: one file a window, beside a file that the window holds locked as long as it lives.
//!
//! The system takes a lock away with the process that held it, however it ended. So a snapshot whose lock can be had is
//! an orphan, and no process number has to be guessed at.

use std::{
    fs::{self, File, TryLockError},
    io,
    path::{Path, PathBuf},
    time::{Duration, SystemTime},
};

use super::snapshot::{self, Snapshot};
use crate::document;

/// The ending of snapshots: they are design files.
const KEPT: &str = "ron";

/// The ending of lock files.
const LOCK: &str = "lock";

/// A snapshot holds a design and some of its past; a longer file is not ours.
const MAX_BYTES: u64 = 2 * document::MAX_FILE_BYTES;

/// What was left half-written is taken away after this time: no writing takes so long.
const LEFT_OVER: Duration = Duration::from_secs(3600);

/// A place for a snapshot that no other window touches.
#[derive(Debug)]
pub(crate) struct Slot {
    folder: PathBuf,
    name: String,
    // Held for its lock.
    _lock: File,
}

impl Slot {
    /// Makes a slot for this window.
    ///
    /// # Errors
    /// What the system says.
    pub(super) fn open(folder: &Path) -> io::Result<Self> {
        fs::create_dir_all(folder)?;
        let mut builder = tempfile::Builder::new();
        let prefix = format!("{}-", std::process::id());
        builder.prefix(&prefix).suffix(".new");
        let new = builder.tempfile_in(folder)?;
        // Locked before it has its name, so that no other window ever sees it without its lock.
        new.as_file().lock()?;
        let name = new
            .path()
            .file_stem()
            .unwrap_or_default()
            .to_string_lossy()
            .into_owned();
        let lock = new.persist(folder.join(&name).with_extension(LOCK))?;
        Ok(Self {
            folder: folder.to_path_buf(),
            name,
            _lock: lock,
        })
    }

    /// Takes the slot of a window that is gone; none while that window lives.
    ///
    /// # Errors
    /// What the system says.
    fn claim(folder: &Path, name: &str) -> io::Result<Option<Self>> {
        let path = folder.join(name).with_extension(LOCK);
        let lock = File::options().create(true).truncate(false).write(true).open(path)?;
        match lock.try_lock() {
            Ok(()) => Ok(Some(Self {
                folder: folder.to_path_buf(),
                name: name.to_owned(),
                _lock: lock,
            })),
            Err(TryLockError::WouldBlock) => Ok(None),
            Err(TryLockError::Error(error)) => Err(error),
        }
    }

    /// What the slot is called.
    pub(super) fn name(&self) -> &str {
        &self.name
    }

    /// The snapshot's file.
    pub(super) fn file(&self) -> PathBuf {
        self.folder.join(&self.name).with_extension(KEPT)
    }

    /// Puts a snapshot in place of the one that is there, safe against a crash and a power cut: it is written to a file
    /// of its own, brought to the disk, renamed, and the folder is brought to the disk too.
    pub(super) fn write(&self, text: &str) -> io::Result<()> {
        document::write_whole(&self.file(), text.as_bytes())
    }

    /// Takes the snapshot away.
    pub(super) fn clear(&self) -> io::Result<()> {
        match fs::remove_file(self.file()) {
            Err(error) if error.kind() != io::ErrorKind::NotFound => Err(error),
            _ => Ok(()),
        }
    }
}

impl Drop for Slot {
    /// Without a snapshot, the lock file is of no use to anybody.
    fn drop(&mut self) {
        if !self.file().exists() {
            let _ = fs::remove_file(self.folder.join(&self.name).with_extension(LOCK));
        }
    }
}

/// A snapshot whose window is gone.
#[derive(Debug)]
pub struct Orphan {
    /// Its place, held so that no other window offers it too.
    pub(super) slot: Slot,
    /// What it holds, or why it cannot be read.
    pub(super) found: Result<Box<Snapshot>, String>,
    /// When the design was changed last.
    pub(super) changed: SystemTime,
    /// Whether discarding it was asked for once.
    pub(super) sure: bool,
}

impl Orphan {
    /// Whether it can be recovered.
    #[must_use]
    pub const fn is_readable(&self) -> bool {
        self.found.is_ok()
    }

    /// What it is called.
    #[must_use]
    pub fn name(&self) -> String {
        match &self.found {
            Ok(snapshot) => snapshot.name(),
            Err(_) => format!("{}.{KEPT}", self.slot.name),
        }
    }

    /// The snapshot's own file.
    #[must_use]
    pub fn file(&self) -> PathBuf {
        self.slot.file()
    }
}

/// The snapshots of windows that are gone, the newest first. Those that a newer one carries on come with it.
pub(super) fn orphans(folder: &Path) -> Vec<Orphan> {
    let Ok(entries) = fs::read_dir(folder) else {
        return Vec::new();
    };
    let mut found = Vec::new();
    for path in entries.flatten().map(|e| e.path()) {
        let ending = path.extension().and_then(|e| e.to_str()).unwrap_or_default();
        let name = path.file_stem().and_then(|s| s.to_str()).unwrap_or_default();
        match ending {
            KEPT => found.extend(orphan(folder, name)),
            // A lock without a snapshot is of use only to a window that lives, and such a one cannot be had.
            LOCK if !path.with_extension(KEPT).exists() => drop(Slot::claim(folder, name)),
            "part" | "new" => remove_left_over(&path),
            _ => {}
        }
    }
    // By name where two are equally old, so that the order never depends on the folder's.
    found.sort_by(|a, b| b.changed.cmp(&a.changed).then_with(|| a.slot.name.cmp(&b.slot.name)));
    found
}

fn orphan(folder: &Path, name: &str) -> Option<Orphan> {
    let slot = Slot::claim(folder, name).ok()??;
    let file = slot.file();
    // It may have been taken away just before its lock was free.
    let data = fs::metadata(&file).ok()?;
    let read = if data.len() > MAX_BYTES {
        Err("it is longer than any design".to_owned())
    } else {
        let text = fs::read(&file).map_err(|error| error.to_string());
        let text = text.and_then(|bytes| String::from_utf8(bytes).map_err(|_| "it is not text".to_owned()));
        text.and_then(|text| snapshot::parse(&text)).map(Box::new)
    };
    if read.as_ref().is_ok_and(|snapshot| is_saved(snapshot)) {
        // The window was ended between saving the design and taking the snapshot away.
        let _ = slot.clear();
        return None;
    }
    let changed = match &read {
        Ok(snapshot) => snapshot.changed,
        Err(_) => data.modified().unwrap_or(SystemTime::UNIX_EPOCH),
    };
    Some(Orphan {
        slot,
        found: read,
        changed,
        sure: false,
    })
}

/// Whether the design's own file holds the very same design.
fn is_saved(snapshot: &Snapshot) -> bool {
    let path = snapshot.path.as_deref().filter(|p| p.is_file());
    path.and_then(|p| document::read_design(p).ok())
        .is_some_and(|saved| saved == *snapshot.design)
}

fn remove_left_over(path: &Path) {
    let age = fs::metadata(path).and_then(|d| d.modified()).map(|m| m.elapsed());
    if matches!(age, Ok(Ok(age)) if age > LEFT_OVER) {
        let _ = fs::remove_file(path);
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::window::safe::snapshot::{Texts, tests::snapshot, to_text};

    fn text(name: &str) -> String {
        to_text(&snapshot(name), &mut Texts::default()).unwrap()
    }

    #[test]
    fn a_snapshot_is_an_orphan_only_when_its_window_is_gone() {
        let folder = tempfile::tempdir().unwrap();
        let slot = Slot::open(folder.path()).unwrap();
        slot.write(&text("a")).unwrap();
        assert!(orphans(folder.path()).is_empty(), "its window lives");
        drop(slot);
        let found = orphans(folder.path());
        assert_eq!(found.len(), 1);
        assert_eq!(found[0].found.as_ref().unwrap().design.name, "a");
        assert!(orphans(folder.path()).is_empty(), "it is offered by one window only");
        drop(found);
        assert_eq!(orphans(folder.path()).len(), 1, "deciding later keeps it");
    }

    #[test]
    fn what_cannot_be_read_is_kept_and_named() {
        let folder = tempfile::tempdir().unwrap();
        let whole = text("a");
        fs::write(folder.path().join("1-cut.ron"), &whole[..whole.len() / 2]).unwrap();
        fs::write(
            folder.path().join("2-newer.ron"),
            whole.replacen("format:1", "format:9", 1),
        )
        .unwrap();
        fs::write(folder.path().join("3-noise.ron"), [0xff, 0xfe, 0]).unwrap();
        let mut names: Vec<String> = orphans(folder.path()).iter().map(Orphan::name).collect();
        names.sort();
        assert_eq!(names, ["1-cut.ron", "2-newer.ron", "3-noise.ron"]);
        assert!(orphans(folder.path()).iter().all(|o| o.found.is_err()));
        for name in names {
            assert!(folder.path().join(name).is_file());
        }
    }

    #[test]
    fn nothing_is_left_of_a_slot_without_a_snapshot() {
        let folder = tempfile::tempdir().unwrap();
        let slot = Slot::open(folder.path()).unwrap();
        slot.write(&text("a")).unwrap();
        slot.clear().unwrap();
        drop(slot);
        assert_eq!(fs::read_dir(folder.path()).unwrap().count(), 0);
    }

    #[test]
    fn a_design_that_its_file_holds_is_no_orphan() {
        let folder = tempfile::tempdir().unwrap();
        let mut kept = snapshot("a");
        let file = folder.path().join("design.file");
        document::write_design(&file, &kept.design).unwrap();
        kept.path = Some(file);
        fs::write(
            folder.path().join("1-x.ron"),
            to_text(&kept, &mut Texts::default()).unwrap(),
        )
        .unwrap();
        assert!(orphans(folder.path()).is_empty());
    }
}
