//! Which window works on which file.
//!
//! A window holds a lock as long as it has a file open. The lock lies in the state folder, under a name made of the
//! file's true path, so that nothing lies about beside the user's designs; the system takes it away with the window.

use std::{
    fs::{self, File, TryLockError},
    io,
    path::{Path, PathBuf},
};

use super::stamp::hash;

/// A file that this window works on.
#[derive(Debug)]
pub(super) struct Claim {
    lock: PathBuf,
    file: File,
}

impl Claim {
    /// Takes the lock of a design file; none while another window has it.
    ///
    /// # Errors
    /// What the system says.
    pub(super) fn take(folder: &Path, design: &Path) -> io::Result<Option<Self>> {
        fs::create_dir_all(folder)?;
        let true_path = fs::canonicalize(design)
            .or_else(|_| in_true_folder(design))
            .or_else(|_| std::path::absolute(design))?;
        let lock = folder.join(format!("{:016x}.lock", hash(true_path.as_os_str().as_encoded_bytes())));
        // A window that ends takes its lock file away; one that was opened just before that is no lock any more.
        for _ in 0..100 {
            let file = File::options().create(true).truncate(false).write(true).open(&lock)?;
            match file.try_lock() {
                Ok(()) if is_there(&lock, &file)? => return Ok(Some(Self { lock, file })),
                Ok(()) => {}
                Err(TryLockError::WouldBlock) => return Ok(None),
                Err(TryLockError::Error(error)) => return Err(error),
            }
        }
        Err(io::Error::other("its lock file keeps being taken away"))
    }
}

impl Drop for Claim {
    fn drop(&mut self) {
        // While the lock is still held.
        #[cfg(unix)]
        let _ = fs::remove_file(&self.lock);
        let _ = self.file.unlock();
    }
}

/// A file that is not there yet, in a folder that is.
fn in_true_folder(design: &Path) -> io::Result<PathBuf> {
    let folder = match design.parent() {
        Some(folder) if !folder.as_os_str().is_empty() => folder,
        _ => Path::new("."),
    };
    let name = design.file_name().ok_or(io::ErrorKind::InvalidInput)?;
    Ok(fs::canonicalize(folder)?.join(name))
}

/// Whether the path still leads to the open file.
#[cfg(unix)]
fn is_there(path: &Path, file: &File) -> io::Result<bool> {
    use std::os::unix::fs::MetadataExt;
    let open = file.metadata()?;
    match fs::metadata(path) {
        Ok(there) => Ok((there.dev(), there.ino()) == (open.dev(), open.ino())),
        Err(error) if error.kind() == io::ErrorKind::NotFound => Ok(false),
        Err(error) => Err(error),
    }
}

#[cfg(not(unix))]
#[expect(clippy::unnecessary_wraps, reason = "the same signature everywhere")]
const fn is_there(_path: &Path, _file: &File) -> io::Result<bool> {
    Ok(true)
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn one_file_is_had_once_however_it_is_called() {
        let folder = tempfile::tempdir().unwrap();
        let locks = folder.path().join("open");
        let design = folder.path().join("a.ron");
        fs::write(&design, "").unwrap();
        let first = Claim::take(&locks, &design).unwrap().unwrap();
        let other_name = folder.path().join("open").join("..").join("a.ron");
        assert!(Claim::take(&locks, &other_name).unwrap().is_none());
        let other = Claim::take(&locks, &folder.path().join("b.ron")).unwrap();
        assert!(other.is_some(), "another file is free");
        drop((first, other));
        let again = Claim::take(&locks, &design).unwrap();
        assert!(again.is_some(), "a window that is gone has nothing");
        drop(again);
        assert_eq!(fs::read_dir(&locks).unwrap().count(), 0, "nothing is left lying about");
    }
}
