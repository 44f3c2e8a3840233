//! Writing a design file: beside the old one, then in its place, so that the old one survives any crash.

use std::{
    fs::{self, File},
    io::{self, Write},
    path::{Path, PathBuf},
};

use ron::ser::PrettyConfig;
use serde::Serialize;

use zonewright_geometry::Shape;
use zonewright_shop::text::Units;

use super::{Backdrop, Design, DesignError, FORMAT, parse_design, read::syntax, units_word};

#[derive(Serialize)]
struct FileOne<'a> {
    format: u32,
    #[serde(skip_serializing_if = "str::is_empty")]
    name: &'a str,
    #[serde(with = "units_word")]
    units: Units,
    shape: &'a Shape,
    #[serde(skip_serializing_if = "Option::is_none")]
    backdrop: Option<&'a Backdrop>,
}

/// The text of a design file.
///
/// A design that nests names deeper than a file may gives a text that [`parse_design`] refuses; [`write_design`] looks.
#[must_use]
pub fn to_text(design: &Design) -> String {
    let layout = PrettyConfig::new()
        .new_line("\n")
        .indentor("    ")
        .struct_names(false)
        .separate_tuple_members(false);
    let file = FileOne {
        format: FORMAT,
        name: &design.name,
        units: design.units,
        shape: &design.shape,
        backdrop: design.backdrop.as_ref(),
    };
    // Writing to a string fails only where the nesting is too deep; the empty text is refused on reading back.
    let mut text = syntax().to_string_pretty(&file, layout).unwrap_or_default();
    text.push('\n');
    text
}

/// The text of a design on one line, for keeping many of them; [`parse_design`] reads it.
///
/// It is empty where the design nests names deeper than a file may.
#[must_use]
pub fn to_line(design: &Design) -> String {
    let file = FileOne {
        format: FORMAT,
        name: &design.name,
        units: design.units,
        shape: &design.shape,
        backdrop: design.backdrop.as_ref(),
    };
    syntax().to_string(&file).unwrap_or_default()
}

/// Writes a design file.
///
/// What is written is read back first, so a file that cannot be read again never takes the place of one that can.
///
/// # Errors
/// When the design cannot be kept in a file, or the file cannot be written. The old file is then unchanged.
pub fn write_design(path: &Path, design: &Design) -> Result<(), DesignError> {
    let text = to_text(design);
    parse_design(&text).map_err(|error| DesignError::Unkeepable(error.to_string()))?;
    write_whole(path, text.as_bytes()).map_err(|cause| DesignError::Write {
        path: path.display().to_string(),
        cause,
    })
}

/// Writes a file as a whole or not at all: a new file beside the old one takes its place when it is safely on the
/// disk. The old one's permissions are kept; a symbolic link stays a link, and the file that it points to is replaced.
///
/// # Errors
/// What the system says. The old file is then unchanged.
pub fn write_whole(path: &Path, bytes: &[u8]) -> io::Result<()> {
    let target = fs::canonicalize(path).or_else(|error| through_link(path, error))?;
    if target.is_dir() {
        return Err(io::Error::new(io::ErrorKind::IsADirectory, "it is a directory"));
    }
    let beside = match target.parent() {
        Some(folder) if !folder.as_os_str().is_empty() => folder,
        _ => Path::new("."),
    };
    let mut builder = tempfile::Builder::new();
    builder.prefix(".zonewright-").suffix(".part");
    let permissions = fs::metadata(&target).map(|old| old.permissions());
    #[cfg(unix)]
    {
        use std::os::unix::fs::PermissionsExt;
        // The system takes its umask off these, as it does for any new file.
        builder.permissions(fs::Permissions::from_mode(0o666));
    }
    let mut part = builder.tempfile_in(beside)?;
    part.write_all(bytes)?;
    if let Ok(kept) = permissions {
        part.as_file().set_permissions(kept)?;
    }
    part.as_file().sync_all()?;
    part.persist(&target).map_err(|error| error.error)?;
    #[cfg(unix)]
    File::open(beside)?.sync_all()?;
    Ok(())
}

/// Where a path leads that has no file yet: a dangling link is followed once.
fn through_link(path: &Path, error: io::Error) -> io::Result<PathBuf> {
    if error.kind() != io::ErrorKind::NotFound {
        return Err(error);
    }
    match fs::read_link(path) {
        Ok(to) => Ok(path.parent().unwrap_or(Path::new("")).join(to)),
        Err(_) => Ok(path.to_owned()),
    }
}
