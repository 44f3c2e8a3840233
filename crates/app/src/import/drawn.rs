//! Backdrops: meshes and lines that a design is held against.

use std::path::Path;

use super::{
    ImportError,
    chain::{Piece, chain},
    csv_points, dxf_lines, meshes, read_bytes, svg_paths,
};
use crate::document::Drawn;

/// The endings of files that hold a backdrop, without the dot.
pub const BACKDROPS: [&str; 5] = ["obj", "stl", "csv", "dxf", "svg"];

/// Reads a backdrop from a file: all its triangles and lines. Curves are replaced by chords that stay within `tolerance_mm` of them.
///
/// Lengths of CSV, DXF and SVG are brought to millimetres; OBJ and STL say no unit, and their numbers are left as they are.
///
/// # Errors
/// When the file cannot be read, is not what its name says, or holds nothing or too much to be a backdrop.
pub fn import_backdrop(path: &Path, tolerance_mm: f64) -> Result<Drawn, ImportError> {
    let shown = || path.display().to_string();
    if !(0.0001..=1000.0).contains(&tolerance_mm) {
        return Err(ImportError::Tolerance(tolerance_mm));
    }
    let ending = path.extension().map(|e| e.to_string_lossy().to_lowercase());
    let reader = match ending.as_deref() {
        Some("obj") => |bytes: &[u8], _: f64| meshes::obj(bytes),
        Some("stl") => |bytes: &[u8], _: f64| meshes::stl(bytes),
        Some("csv" | "txt") => |bytes: &[u8], _: f64| csv(bytes),
        Some("dxf") => |bytes: &[u8], tolerance: f64| dxf_lines::pieces(bytes, tolerance).map(lines),
        Some("svg") => |bytes: &[u8], tolerance: f64| svg_paths::pieces(bytes, tolerance).map(lines),
        _ => return Err(ImportError::BackdropKind { path: shown() }),
    };
    let bytes = read_bytes(path, "export it coarser")?;
    let wrong = |what| ImportError::InFile { path: shown(), what };
    let drawn = reader(&bytes, tolerance_mm).map_err(wrong)?;
    drawn.check().map_err(wrong)?;
    Ok(drawn)
}

/// One line through the points, in their order.
fn csv(bytes: &[u8]) -> Result<Drawn, String> {
    let mut points = csv_points::read(bytes)?.points;
    points.dedup();
    Ok(lines(vec![Piece { points, closed: false }]))
}

/// The pieces as one line where they make one, else as they are.
fn lines(pieces: Vec<Piece>) -> Drawn {
    let pieces = match chain(pieces.clone(), "") {
        Ok(whole) => vec![Piece {
            points: whole.points,
            closed: whole.closed,
        }],
        Err(_) => pieces,
    };
    let mut drawn = Drawn::default();
    for piece in pieces {
        let first = index(drawn.points.len());
        drawn.points.extend(piece.points);
        let mut line: Vec<u32> = (first..index(drawn.points.len())).collect();
        if piece.closed {
            line.push(first);
        }
        if line.len() > 1 {
            drawn.lines.push(line);
        }
    }
    drawn
}

/// Files are too small for more points than this holds.
pub(super) fn index(at: usize) -> u32 {
    u32::try_from(at).unwrap_or(u32::MAX)
}
