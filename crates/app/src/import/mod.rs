//! Imported paths: CSV, DXF and SVG become free points, which the design keeps itself.

mod chain;
mod csv_points;
mod drawn;
mod dxf_lines;
mod meshes;
mod svg_paths;

use std::{fs::File, io::Read, path::Path};

use zonewright_geometry::Point;

pub use drawn::{BACKDROPS, import_backdrop};

/// The most bytes that an imported file may have.
pub const MAX_IMPORT_BYTES: u64 = 64 << 20;

/// The most points that an imported path may have.
pub const MAX_IMPORT_POINTS: usize = 100_000;

/// Why a file cannot be imported. Each says what, where, and what to do.
#[derive(Debug, thiserror::Error)]
pub enum ImportError {
    /// The file is not there, or the system does not let it be read.
    #[error("cannot read {path}: {cause}; give the path of a file that may be read")]
    Read {
        /// The file.
        path: String,
        /// What the system says.
        cause: std::io::Error,
    },
    /// The name does not say what the file is.
    #[error(
        "cannot import {path}: the name must end in .csv, .dxf or .svg; rename it, or export it from where it comes from"
    )]
    Kind {
        /// The file.
        path: String,
    },
    /// The name does not say what a backdrop is.
    #[error(
        "cannot load {path}: the name must end in .obj, .stl, .csv, .dxf or .svg; rename it, or export it from where it comes from"
    )]
    BackdropKind {
        /// The file.
        path: String,
    },
    /// The file is not what its name says, or holds no path.
    #[error("cannot import {path}: {what}")]
    InFile {
        /// The file.
        path: String,
        /// What is wrong, where, and what to do.
        what: String,
    },
    /// The tolerance cannot be used.
    #[error("a tolerance of {0} mm cannot be used; give a length from 0.0001 to 1000 mm")]
    Tolerance(f64),
}

/// A path as it was read: points in millimetres, z up.
#[derive(Clone, PartialEq, Debug, Default)]
pub struct ImportedPath {
    /// The points in order. A closed path does not repeat its first point.
    pub points: Vec<Point>,
    /// Whether the file says that the path closes.
    pub closed: bool,
}

/// Reads a path from a file. Curves are replaced by chords that stay within `tolerance_mm` of them.
///
/// # Errors
/// When the file cannot be read, is not what its name says, or does not hold exactly one path.
pub fn import(path: &Path, tolerance_mm: f64) -> Result<ImportedPath, ImportError> {
    let shown = || path.display().to_string();
    if !(0.0001..=1000.0).contains(&tolerance_mm) {
        return Err(ImportError::Tolerance(tolerance_mm));
    }
    let ending = path.extension().map(|e| e.to_string_lossy().to_lowercase());
    let reader = match ending.as_deref() {
        Some("csv" | "txt") => |bytes: &[u8], _: f64| csv_points::read(bytes),
        Some("dxf") => dxf_lines::read,
        Some("svg") => svg_paths::read,
        _ => return Err(ImportError::Kind { path: shown() }),
    };
    let wrong = |what| ImportError::InFile { path: shown(), what };
    let bytes = read_bytes(path, "export only the path")?;
    let found = reader(&bytes, tolerance_mm).map_err(wrong)?;
    tidy(found).map_err(wrong)
}

/// The bytes of a file that is not too large; `remedy` says what to do about one that is.
fn read_bytes(path: &Path, remedy: &str) -> Result<Vec<u8>, ImportError> {
    let shown = || path.display().to_string();
    let unread = |cause| ImportError::Read { path: shown(), cause };
    let mut bytes = Vec::new();
    let file = File::open(path).map_err(unread)?;
    file.take(MAX_IMPORT_BYTES + 1)
        .read_to_end(&mut bytes)
        .map_err(unread)?;
    if bytes.len() as u64 > MAX_IMPORT_BYTES {
        let what = format!("it is larger than {MAX_IMPORT_BYTES} bytes; {remedy}");
        return Err(ImportError::InFile { path: shown(), what });
    }
    Ok(bytes)
}

/// Drops points that repeat the one before, and looks whether what is left is a path.
fn tidy(mut path: ImportedPath) -> Result<ImportedPath, String> {
    if let Some(at) = path.points.iter().position(|p| !p.is_finite()) {
        return Err(format!("point {} is not finite; give it numbers", at + 1));
    }
    path.points.dedup();
    if path.points.len() > 2 && path.points.first() == path.points.last() {
        path.points.pop();
        path.closed = true;
    }
    match path.points.len() {
        0 | 1 => Err("it holds fewer than two different points; a path needs two".to_owned()),
        n if n > MAX_IMPORT_POINTS => Err(format!(
            "its path has {n} points, and at most {MAX_IMPORT_POINTS} are read; give a larger tolerance or a shorter path"
        )),
        _ => Ok(path),
    }
}
