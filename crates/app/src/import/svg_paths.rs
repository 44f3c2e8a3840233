//! Paths from SVG: curves flattened, transforms applied, millimetres from the document's units, y up.

use kurbo::{Affine, BezPath, PathEl, Point as Flat, Shape as _};
use usvg::tiny_skia_path::PathSegment;
use zonewright_geometry::Point;

use super::{
    ImportedPath, MAX_IMPORT_POINTS,
    chain::{MAX_PIECES, Piece, chain},
};

/// A CSS pixel, in millimetres: 96 to the inch (CSS Values and Units, section 6.2).
const PIXEL_MM: f64 = 25.4 / 96.0;

/// Paths farther out than this are refused: 10 km. The number of chords grows with the size of a curve.
const MAX_REACH_MM: f64 = 1e7;

/// Lines count whatever their paint; fills, markers and dashes do not matter for a path.
const STYLE: &str = "path,line,polyline,polygon,rect,circle,ellipse{fill:none !important;stroke:#000 !important;\
    stroke-width:1 !important;stroke-opacity:1 !important;stroke-dasharray:none !important;\
    marker-start:none !important;marker-mid:none !important;marker-end:none !important}";

/// Reads the one path of a drawing. The lower left corner of the page is the origin.
pub(super) fn read(bytes: &[u8], tolerance_mm: f64) -> Result<ImportedPath, String> {
    let what = "path, line, polyline or other shape that is shown";
    chain(pieces(bytes, tolerance_mm)?, what)
}

/// Reads all lines of a drawing, in the same frame.
pub(super) fn pieces(bytes: &[u8], tolerance_mm: f64) -> Result<Vec<Piece>, String> {
    let options = usvg::Options {
        style_sheet: Some(STYLE.to_owned()),
        ..usvg::Options::default()
    };
    let tree = usvg::Tree::from_data(bytes, &options)
        .map_err(|error| format!("it is no SVG drawing: {error}; save it again as plain SVG"))?;
    let height = f64::from(tree.size().height()) * PIXEL_MM;
    let to_mm = Affine::new([PIXEL_MM, 0.0, 0.0, -PIXEL_MM, 0.0, height]);
    let mut pieces = Vec::new();
    collect(tree.root(), to_mm, tolerance_mm, &mut pieces)?;
    Ok(pieces)
}

fn collect(group: &usvg::Group, to_mm: Affine, tolerance_mm: f64, pieces: &mut Vec<Piece>) -> Result<(), String> {
    for node in group.children() {
        match node {
            usvg::Node::Group(inner) => collect(inner, to_mm, tolerance_mm, pieces)?,
            usvg::Node::Path(path) => {
                let t = path.abs_transform();
                let own = Affine::new([t.sx, t.ky, t.kx, t.sy, t.tx, t.ty].map(f64::from));
                flatten(&(to_mm * own * bezier(path)), tolerance_mm, pieces)?;
            }
            usvg::Node::Image(_) | usvg::Node::Text(_) => {}
        }
    }
    Ok(())
}

fn bezier(path: &usvg::Path) -> BezPath {
    let flat = |p: usvg::tiny_skia_path::Point| Flat::new(f64::from(p.x), f64::from(p.y));
    path.data()
        .segments()
        .map(|segment| match segment {
            PathSegment::MoveTo(p) => PathEl::MoveTo(flat(p)),
            PathSegment::LineTo(p) => PathEl::LineTo(flat(p)),
            PathSegment::QuadTo(a, p) => PathEl::QuadTo(flat(a), flat(p)),
            PathSegment::CubicTo(a, b, p) => PathEl::CurveTo(flat(a), flat(b), flat(p)),
            PathSegment::Close => PathEl::ClosePath,
        })
        .collect()
}

/// Adds the pieces of a path, one a subpath.
fn flatten(path: &BezPath, tolerance_mm: f64, pieces: &mut Vec<Piece>) -> Result<(), String> {
    let reach = path.bounding_box();
    if ![reach.x0, reach.y0, reach.x1, reach.y1]
        .iter()
        .all(|c| c.abs() <= MAX_REACH_MM)
    {
        return Err("its path lies more than 10 km from the page; look at its transforms".to_owned());
    }
    let mut points: usize = pieces.iter().map(|p| p.points.len()).sum();
    let mut last = Flat::ZERO;
    let mut first = Flat::ZERO;
    for element in path.elements() {
        match *element {
            PathEl::MoveTo(p) => {
                first = p;
                begin(pieces, p);
            }
            PathEl::ClosePath => {
                if let Some(piece) = pieces.last_mut() {
                    piece.closed = true;
                    // The closing edge is there already when the path was drawn back to its beginning.
                    if piece.points.len() > 1 && piece.points.last() == piece.points.first() {
                        piece.points.pop();
                    }
                }
            }
            drawn => {
                if pieces.last().is_some_and(|p| p.closed) {
                    begin(pieces, first);
                }
                let one = [PathEl::MoveTo(last), drawn];
                kurbo::flatten(one, tolerance_mm, |el| {
                    if let (PathEl::LineTo(p), Some(piece)) = (el, pieces.last_mut()) {
                        points += 1;
                        piece.points.push(point(p));
                    }
                });
            }
        }
        last = element.end_point().unwrap_or(first);
        if points > MAX_IMPORT_POINTS || pieces.len() > MAX_PIECES {
            return Err(format!(
                "it holds more than {MAX_IMPORT_POINTS} points or {MAX_PIECES} pieces; export only the path"
            ));
        }
    }
    Ok(())
}

fn begin(pieces: &mut Vec<Piece>, at: Flat) {
    pieces.push(Piece {
        points: vec![point(at)],
        closed: false,
    });
}

const fn point(p: Flat) -> Point {
    Point::new(p.x, p.y, 0.0)
}
