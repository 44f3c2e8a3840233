//! What is remembered from one session to the next: which design was open, which before it, and how the window was set.

use std::{
    fs::{self, File},
    io,
    path::{Path, PathBuf},
    thread,
    time::Duration,
};

use serde::{Deserialize, Serialize};
use zonewright_shop::text::Units;

use crate::document::{self, Design};

/// Where the session is kept instead of the system's place for it; tests use it.
pub const STATE_DIR: &str = "ZONEWRIGHT_STATE_DIR";

/// A session file is a few lines; a longer one is not ours.
const MAX_BYTES: u64 = 64 << 10;

/// The number of the format, and the newest that is written over.
const FORMAT: u32 = 1;

/// The most recent files that are remembered.
pub(super) const MOST_RECENT: usize = 10;

/// The sizes of a window that are believed, in points; one from a screen that is gone would not be seen.
const SIZES: (f32, f32) = (400.0, 8000.0);

/// What is remembered. Unknown fields are passed over, so that older versions read what newer ones write.
#[derive(Clone, PartialEq, Debug, Default, Serialize, Deserialize)]
#[serde(default)]
pub(super) struct Session {
    format: u32,
    design: Option<String>,
    recent: Vec<String>,
    size: Option<(f32, f32)>,
    /// Whether the look is dark.
    pub dark: bool,
    inches: Option<bool>,
}

impl Session {
    /// The design that was open last.
    pub(super) fn last(&self) -> Option<PathBuf> {
        self.design.as_ref().map(PathBuf::from)
    }

    /// The files that were open, the last one first.
    pub(super) fn recent(&self) -> Vec<PathBuf> {
        self.recent.iter().map(PathBuf::from).collect()
    }

    /// Says that this design is open now.
    pub(super) fn opened(&mut self, design: &Path) {
        let design = std::path::absolute(design).unwrap_or_else(|_| design.to_path_buf());
        // A name that is not text cannot be kept in a text; such a file is not remembered.
        let Some(text) = design.to_str() else { return };
        self.recent.retain(|other| other != text);
        self.recent.insert(0, text.to_owned());
        self.recent.truncate(MOST_RECENT);
        self.design = Some(text.to_owned());
    }

    /// Forgets which files were open.
    pub(super) fn forget_recent(&mut self) {
        self.recent.clear();
    }

    /// The size of the window, in points.
    pub(super) fn size(&self) -> Option<[f32; 2]> {
        let usual = |v: f32| (SIZES.0..=SIZES.1).contains(&v);
        self.size.filter(|s| usual(s.0) && usual(s.1)).map(Into::into)
    }

    /// Remembers the size of the window, in points.
    pub(super) const fn set_size(&mut self, size: [f32; 2]) {
        self.size = Some((size[0], size[1]));
    }

    /// The unit that the user chose last.
    pub(super) fn units(&self) -> Option<Units> {
        self.inches.map(|inches| if inches { Units::Inch } else { Units::Mm })
    }

    /// Remembers the unit that the user chose.
    pub(super) fn set_units(&mut self, units: Units) {
        self.inches = Some(units == Units::Inch);
    }
}

/// The file that the session is kept in; none when the system has no place for it.
#[must_use]
pub(super) fn file() -> Option<PathBuf> {
    let folder = match std::env::var_os(STATE_DIR) {
        Some(folder) => PathBuf::from(folder),
        None => {
            let dirs = directories::ProjectDirs::from("", "", "zonewright")?;
            dirs.state_dir().unwrap_or_else(|| dirs.data_local_dir()).to_path_buf()
        }
    };
    Some(folder.join("session.ron"))
}

/// What is remembered; nothing when there is no session that can be read.
#[must_use]
pub(super) fn read(file: &Path) -> Session {
    if fs::metadata(file).map_or(true, |data| data.len() > MAX_BYTES) {
        return Session::default();
    }
    let text = fs::read_to_string(file).unwrap_or_default();
    let options = ron::Options::default().with_default_extension(ron::extensions::Extensions::IMPLICIT_SOME);
    // Files before format 1 wrote their options out.
    let read = options.from_str(&text).or_else(|_| ron::from_str(&text));
    read.unwrap_or_default()
}

/// Changes what is remembered. What another window has remembered meanwhile stays; a file of a newer version is left alone.
///
/// # Errors
/// What the system says.
pub(super) fn update(file: &Path, change: impl Fn(&mut Session)) -> io::Result<()> {
    if let Some(folder) = file.parent() {
        fs::create_dir_all(folder)?;
    }
    let _turn = turn(&file.with_extension("lock"));
    let mut session = read(file);
    if session.format > FORMAT {
        return Ok(());
    }
    change(&mut session);
    session.format = FORMAT;
    let text = ron::ser::to_string_pretty(&session, ron::ser::PrettyConfig::default()).map_err(io::Error::other)?;
    document::write_whole(file, text.as_bytes())
}

/// Waits a moment for other windows that write the session; a window that hangs must not hang this one.
fn turn(lock: &Path) -> Option<File> {
    let file = File::options()
        .create(true)
        .truncate(false)
        .write(true)
        .open(lock)
        .ok()?;
    for _ in 0..50 {
        if file.try_lock().is_ok() {
            return Some(file);
        }
        thread::sleep(Duration::from_millis(2));
    }
    None
}

/// The design that comes with the program.
///
/// # Errors
/// A sentence, when it cannot be read.
pub(super) fn sample() -> Result<Design, String> {
    let (name, text) = document::bundled()
        .first()
        .ok_or("No sample comes with this program.")?;
    document::parse_design(text).map_err(|error| format!("The sample {name} cannot be read: {error}."))
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn the_last_design_and_the_settings_are_found_again() {
        let folder = tempfile::tempdir().unwrap();
        let file = folder.path().join("deep").join("session.ron");
        assert_eq!(read(&file), Session::default());
        update(&file, |s| {
            s.opened(Path::new("/tmp/a design.ron"));
            s.set_size([1000.0, 700.0]);
            s.set_units(Units::Inch);
            s.dark = true;
        })
        .unwrap();
        let back = read(&file);
        assert_eq!(back.last(), Some(PathBuf::from("/tmp/a design.ron")));
        assert_eq!(back.size(), Some([1000.0, 700.0]));
        assert_eq!((back.units(), back.dark), (Some(Units::Inch), true));
    }

    #[test]
    fn a_broken_session_is_no_session_and_an_old_or_unknown_one_is_read_as_far_as_it_goes() {
        let folder = tempfile::tempdir().unwrap();
        let file = folder.path().join("session.ron");
        for broken in ["not a session", "(recent: 5)", "\u{0}", "(size: (1, "] {
            fs::write(&file, broken).unwrap();
            assert_eq!(read(&file), Session::default(), "{broken}");
        }
        fs::write(&file, "(design: Some(\"/tmp/a.ron\"))").unwrap();
        assert_eq!(read(&file).last(), Some(PathBuf::from("/tmp/a.ron")));
        let newer = "(format: 2, design: \"/tmp/b.ron\", later: [1, 2], size: (1.0, 99999.0))";
        fs::write(&file, newer).unwrap();
        assert_eq!(read(&file).last(), Some(PathBuf::from("/tmp/b.ron")));
        assert_eq!(read(&file).size(), None, "no screen is that large");
        update(&file, |s| s.dark = true).unwrap();
        assert_eq!(
            fs::read_to_string(&file).unwrap(),
            newer,
            "what a newer version wrote is left alone"
        );
    }

    #[test]
    fn ten_recent_files_are_kept_each_once() {
        let mut session = Session::default();
        for k in 0..15 {
            session.opened(Path::new(&format!("/tmp/{k}.ron")));
        }
        session.opened(Path::new("/tmp/10.ron"));
        let recent = session.recent();
        assert_eq!(recent.len(), MOST_RECENT);
        assert_eq!(recent[0], Path::new("/tmp/10.ron"));
        assert_eq!(recent.iter().filter(|p| p.ends_with("10.ron")).count(), 1);
    }
}
