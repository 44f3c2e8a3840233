//! Pieces of a drawing, chained where their ends touch.

use zonewright_geometry::Point;

use super::ImportedPath;

/// A piece of a path: at least two points.
#[derive(Clone)]
pub(super) struct Piece {
    /// The points in order; a closed piece does not repeat its first.
    pub(super) points: Vec<Point>,
    /// Whether it closes on itself.
    pub(super) closed: bool,
}

/// The most pieces that are chained. The time for it grows with their square.
pub(super) const MAX_PIECES: usize = 10_000;

/// Ends nearer than this touch, in millimetres. Drawing programs write six decimals of a metre or better.
const TOUCH_MM: f64 = 0.001;

/// The one path that all pieces make together.
///
/// The pieces are taken in the order of the drawing: from the first piece on at its end, then back from its beginning.
///
/// # Errors
/// When the pieces make no path, several, or one that branches.
pub(super) fn chain(mut pieces: Vec<Piece>, what: &str) -> Result<ImportedPath, String> {
    pieces.retain(|p| p.points.len() > 1);
    let Some(at) = pieces.iter().position(|p| !p.closed) else {
        return match pieces.len() {
            0 => Err(format!("it holds no {what}; draw the path with them")),
            1 => Ok(pieces.pop().map(whole).unwrap_or_default()),
            n => Err(format!(
                "it holds {n} separate closed paths; leave only the one to import"
            )),
        };
    };
    let first = pieces.remove(at);
    let mut path = first.points;
    while let Some(end) = path.last().copied() {
        let Some(next) = take_touching(&mut pieces, end)? else {
            break;
        };
        path.extend(next.into_iter().skip(1));
    }
    path.reverse();
    while let Some(end) = path.last().copied() {
        let Some(next) = take_touching(&mut pieces, end)? else {
            break;
        };
        path.extend(next.into_iter().skip(1));
    }
    path.reverse();
    if let (0, Some(p)) = (pieces.len(), path.first().copied()) {
        let closes = path.len() > 3 && path.last().is_some_and(|q| q.distance(p) <= TOUCH_MM);
        if closes {
            path.pop();
        }
        return Ok(ImportedPath {
            points: path,
            closed: closes,
        });
    }
    Err(format!(
        "it holds {} more pieces that do not touch the path that begins at {}; join them, or leave only the path to import",
        pieces.len(),
        place(path.first().copied().unwrap_or_default())
    ))
}

fn whole(piece: Piece) -> ImportedPath {
    ImportedPath {
        points: piece.points,
        closed: piece.closed,
    }
}

/// Takes the piece that touches a place out of the pieces, turned so that it begins there.
fn take_touching(pieces: &mut Vec<Piece>, end: Point) -> Result<Option<Vec<Point>>, String> {
    let touches = |p: Option<&Point>| p.is_some_and(|p| p.distance(end) <= TOUCH_MM);
    let mut found = pieces
        .iter()
        .enumerate()
        .filter(|(_, p)| !p.closed && (touches(p.points.first()) || touches(p.points.last())))
        .map(|(at, _)| at);
    let Some(at) = found.next() else { return Ok(None) };
    if found.next().is_some() {
        return Err(format!("its path branches at {}; leave only one way on", place(end)));
    }
    let mut points = pieces.remove(at).points;
    if !touches(points.first()) {
        points.reverse();
    }
    Ok(Some(points))
}

/// A place, as an error message names it.
fn place(p: Point) -> String {
    let [x, y, z] = p.to_array();
    format!("({x}, {y}, {z}) mm")
}
