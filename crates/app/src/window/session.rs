//! What is remembered from one session to the next: which design was open.

use std::{
    fs, io,
    path::{Path, PathBuf},
};

use serde::{Deserialize, Serialize};

use crate::document::{self, Design};

/// Where the session is kept instead of the system's place for it; tests use it.
pub const STATE_DIR: &str = "ZONEWRIGHT_STATE_DIR";

/// A session file is a few lines; a longer one is not ours.
const MAX_BYTES: u64 = 64 << 10;

#[derive(Debug, Default, Serialize, Deserialize)]
#[serde(default)]
struct Session {
    design: Option<PathBuf>,
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

/// Remembers which design is open.
///
/// # Errors
/// When the file cannot be written.
pub(super) fn remember(file: &Path, design: &Path) -> io::Result<()> {
    let design = std::path::absolute(design)?;
    let session = Session { design: Some(design) };
    let text = ron::ser::to_string_pretty(&session, ron::ser::PrettyConfig::default()).map_err(io::Error::other)?;
    if let Some(folder) = file.parent() {
        fs::create_dir_all(folder)?;
    }
    document::write_whole(file, text.as_bytes())
}

/// The design that was open last; none when there is no session that can be read.
#[must_use]
pub(super) fn last(file: &Path) -> Option<PathBuf> {
    if fs::metadata(file).ok()?.len() > MAX_BYTES {
        return None;
    }
    let text = fs::read_to_string(file).ok()?;
    ron::from_str::<Session>(&text).ok()?.design
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
    fn the_last_design_is_found_again() {
        let folder = tempfile::tempdir().unwrap();
        let file = folder.path().join("deep").join("session.ron");
        assert_eq!(last(&file), None);
        remember(&file, Path::new("/tmp/a design.ron")).unwrap();
        assert_eq!(last(&file), Some(PathBuf::from("/tmp/a design.ron")));
        fs::write(&file, "not a session").unwrap();
        assert_eq!(last(&file), None);
    }
}
