//! Whether a file is still as it was when it was read or written here.

use std::{
    fs, io,
    path::Path,
    time::{Duration, SystemTime, UNIX_EPOCH},
};

use serde::{Deserialize, Serialize};

/// What tells one content of a file from another.
///
/// The time of the change is a short cut only: where it or the length differs, the contents decide.
#[derive(Clone, Copy, PartialEq, Eq, Debug, Serialize, Deserialize)]
pub struct Stamp {
    /// Nanoseconds since 1970; none when the system does not say.
    modified_ns: Option<u64>,
    /// Length in bytes.
    bytes: u64,
    /// Of the contents.
    hash: u64,
}

/// How a file stands to what is known of it here.
#[derive(Clone, Copy, PartialEq, Eq, Debug, Default)]
pub enum Disk {
    /// It is as it was read or written here, or nothing is known of it.
    #[default]
    Same,
    /// Something else has changed it.
    Changed,
    /// It is not there any more.
    Gone,
}

impl Stamp {
    /// The stamp of contents that no file holds yet.
    #[must_use]
    pub fn of_bytes(bytes: &[u8]) -> Self {
        Self {
            modified_ns: None,
            bytes: bytes.len() as u64,
            hash: hash(bytes),
        }
    }

    /// The stamp of a file as it is.
    ///
    /// # Errors
    /// What the system says.
    pub fn of_file(path: &Path) -> io::Result<Self> {
        // The time first: if the file is changed in between, it counts as changed later, and is looked at again.
        let modified_ns = modified(&fs::metadata(path)?);
        let bytes = fs::read(path)?;
        Ok(Self {
            modified_ns,
            ..Self::of_bytes(&bytes)
        })
    }

    /// The stamp of a file that was just written with these contents: what something else writes from now on is noticed.
    #[must_use]
    pub fn written(path: &Path, bytes: &[u8]) -> Self {
        let modified_ns = fs::metadata(path).ok().and_then(|data| modified(&data));
        Self {
            modified_ns,
            ..Self::of_bytes(bytes)
        }
    }

    /// Looks at the file again. `thorough` reads it whatever its time says.
    #[must_use]
    pub fn compare(&self, path: &Path, thorough: bool) -> Disk {
        let data = match fs::metadata(path) {
            Ok(data) => data,
            Err(error) if error.kind() == io::ErrorKind::NotFound => return Disk::Gone,
            // A disk that does not answer says nothing about the file.
            Err(_) => return Disk::Same,
        };
        let as_it_was = self.modified_ns.is_some() && modified(&data) == self.modified_ns;
        if data.len() == self.bytes {
            if as_it_was && !thorough {
                return Disk::Same;
            }
            match fs::read(path) {
                Ok(bytes) if hash(&bytes) != self.hash => Disk::Changed,
                _ => Disk::Same,
            }
        } else {
            Disk::Changed
        }
    }
}

fn modified(data: &fs::Metadata) -> Option<u64> {
    let since = data.modified().ok()?.duration_since(UNIX_EPOCH).ok()?;
    u64::try_from(Duration::as_nanos(&since)).ok()
}

/// A time as the user's clock has it: the hour today, the date with it on another day.
#[must_use]
pub(super) fn clock_time(at: SystemTime, now: SystemTime) -> String {
    let local = |t| chrono::DateTime::<chrono::Local>::from(t);
    let (at, now) = (local(at), local(now));
    if at.date_naive() == now.date_naive() {
        at.format("%H:%M").to_string()
    } else {
        at.format("%Y-%m-%d %H:%M").to_string()
    }
}

/// FNV-1a of 64 bits: the same in every version of the program, which names of lock files need.
/// Source of constants and test values: the authors' draft, draft-eastlake-fnv, sections 5 and appendix C (from memory).
#[must_use]
pub(super) fn hash(bytes: &[u8]) -> u64 {
    bytes.iter().fold(0xcbf2_9ce4_8422_2325, |sum, byte| {
        (sum ^ u64::from(*byte)).wrapping_mul(0x0000_0100_0000_01b3)
    })
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn the_hash_has_its_published_values() {
        // draft-eastlake-fnv, appendix C (from memory): "", "a", "foobar".
        assert_eq!(hash(b""), 0xcbf2_9ce4_8422_2325);
        assert_eq!(hash(b"a"), 0xaf63_dc4c_8601_ec8c);
        assert_eq!(hash(b"foobar"), 0x8594_4171_f739_67e8);
    }

    #[test]
    fn a_file_is_changed_by_its_contents_alone() {
        let folder = tempfile::tempdir().unwrap();
        let file = folder.path().join("a.ron");
        fs::write(&file, "one").unwrap();
        let stamp = Stamp::of_file(&file).unwrap();
        assert_eq!(stamp.compare(&file, false), Disk::Same);
        // Written again with the same contents: another time, the same file.
        fs::write(&file, "one").unwrap();
        assert_eq!(stamp.compare(&file, false), Disk::Same);
        fs::write(&file, "two").unwrap();
        assert_eq!(stamp.compare(&file, true), Disk::Changed);
        fs::write(&file, "longer").unwrap();
        assert_eq!(stamp.compare(&file, false), Disk::Changed);
        fs::remove_file(&file).unwrap();
        assert_eq!(stamp.compare(&file, false), Disk::Gone);
    }

    #[test]
    fn the_date_is_said_on_another_day() {
        let at = UNIX_EPOCH + Duration::from_secs(1_700_000_000);
        assert_eq!(clock_time(at, at).len(), "14:02".len());
        let later = at + Duration::from_secs(3 * 86_400);
        assert_eq!(clock_time(at, later).len(), "2023-11-14 22:13".len());
    }
}
