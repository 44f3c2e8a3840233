//! Points from CSV: x, y and perhaps z, with or without a header.

use zonewright_geometry::Point;

use super::ImportedPath;

/// Which columns hold the coordinates, and how many millimetres their unit has.
struct Columns {
    at: [Option<usize>; 3],
    mm: [f64; 3],
}

/// Reads points. A header names the columns `x`, `y`, `z`, with a unit after an underscore, in brackets or after a
/// space (`x_mm`, `y [in]`, `z (m)`); without one the first two or three columns are x, y, z in millimetres. Commas, semicolons
/// and tabs separate; lines that begin with `#` are comments.
pub(super) fn read(bytes: &[u8]) -> Result<ImportedPath, String> {
    let text = std::str::from_utf8(bytes).map_err(|_| "it is not text in UTF-8; save it as CSV in UTF-8".to_owned())?;
    let text = text.trim_start_matches('\u{feff}');
    let mut reader = csv::ReaderBuilder::new()
        .has_headers(false)
        .flexible(true)
        .comment(Some(b'#'))
        .delimiter(delimiter(text))
        .trim(csv::Trim::All)
        .from_reader(text.as_bytes());
    let mut columns: Option<Columns> = None;
    let mut points = Vec::new();
    for row in reader.records() {
        let row = row.map_err(|error| format!("it is no CSV: {error}; save it again as CSV"))?;
        let line = row.position().map_or(0, csv::Position::line);
        if row.iter().all(str::is_empty) {
            continue;
        }
        if let Some(columns) = &columns {
            points.push(point(&row, columns, line)?);
            continue;
        }
        if row.get(0).is_some_and(|field| number(field).is_some()) {
            let bare = Columns {
                at: [Some(0), Some(1), (row.len() > 2).then_some(2)],
                mm: [1.0; 3],
            };
            points.push(point(&row, &bare, line)?);
            columns = Some(bare);
        } else {
            columns = Some(header(&row, line)?);
        }
    }
    Ok(ImportedPath { points, closed: false })
}

/// The separator of the first line that is no comment.
fn delimiter(text: &str) -> u8 {
    let line = text.lines().find(|l| !l.trim().is_empty() && !l.starts_with('#'));
    let line = line.unwrap_or_default();
    *b";\t".iter().find(|&&c| line.as_bytes().contains(&c)).unwrap_or(&b',')
}

fn header(row: &csv::StringRecord, line: u64) -> Result<Columns, String> {
    let mut columns = Columns {
        at: [None; 3],
        mm: [1.0; 3],
    };
    for (at, field) in row.iter().enumerate() {
        let field = field.to_lowercase();
        let mut words = field.split(|c: char| !c.is_alphanumeric()).filter(|w| !w.is_empty());
        let Some(axis) = words
            .next()
            .and_then(|w| ["x", "y", "z"].iter().position(|axis| *axis == w))
        else {
            continue;
        };
        columns.at[axis] = Some(at);
        columns.mm[axis] = match words.next() {
            None | Some("mm") => 1.0,
            Some("cm") => 10.0,
            Some("m") => 1000.0,
            Some("in" | "inch" | "inches") => 25.4,
            Some("ft" | "feet" | "foot") => 304.8,
            Some(unit) => {
                return Err(format!(
                    "line {line}: the unit `{unit}` is not known; write mm, cm, m, in or ft, as in x_mm"
                ));
            }
        };
    }
    if columns.at[0].is_none() || columns.at[1].is_none() {
        return Err(format!(
            "line {line}: the header names no x or no y column; name the columns x, y and z, or leave the header out"
        ));
    }
    Ok(columns)
}

fn point(row: &csv::StringRecord, columns: &Columns, line: u64) -> Result<Point, String> {
    let mut out = [0.0; 3];
    for ((axis, at), (slot, mm)) in ["x", "y", "z"]
        .iter()
        .zip(columns.at)
        .zip(out.iter_mut().zip(columns.mm))
    {
        let Some(at) = at else { continue };
        let field = row.get(at).unwrap_or_default();
        let value = number(field)
            .ok_or_else(|| format!("line {line}: `{field}` is no number for {axis}; write one with a decimal point"))?;
        *slot = value * mm;
    }
    Ok(Point::new(out[0], out[1], out[2]))
}

fn number(field: &str) -> Option<f64> {
    field.parse().ok().filter(|v: &f64| v.is_finite())
}
