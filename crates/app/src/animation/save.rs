//! An animation into its file, or its frames into their folder.

use std::{fs, path::Path};

use super::Written;
use crate::document::write_whole;

/// Writes what was made: one file, or, when the entries have names, a folder of frames, which is made when it is not there.
///
/// # Errors
/// One sentence that names the file that cannot be written.
pub fn save(output: &Path, written: Written) -> Result<(), String> {
    let unwritten =
        |path: &Path, cause: std::io::Error| format!("cannot write {}: {cause}; choose another place", path.display());
    for (name, bytes) in written {
        let path = if name.is_empty() {
            output.to_path_buf()
        } else {
            fs::create_dir_all(output).map_err(|cause| unwritten(output, cause))?;
            output.join(name)
        };
        write_whole(&path, &bytes).map_err(|cause| unwritten(&path, cause))?;
    }
    Ok(())
}
