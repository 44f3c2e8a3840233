//! Paths from DXF: LINE, POLYLINE and LWPOLYLINE, with bulges.

use dxf::{
    Drawing,
    entities::{Entity, EntityType, LwPolyline, Polyline},
    enums::Units,
};
use zonewright_geometry::{Point, Vector};

use super::{
    ImportedPath, MAX_IMPORT_POINTS,
    chain::{MAX_PIECES, Piece, chain},
};

/// A corner of a polyline, and the bulge of the edge that leaves it.
struct Corner {
    at: Point,
    bulge: f64,
}

/// Reads the one path of a drawing's model space. Lengths are in the drawing's `$INSUNITS`, in millimetres where it has none.
pub(super) fn read(bytes: &[u8], tolerance_mm: f64) -> Result<ImportedPath, String> {
    chain(
        pieces(bytes, tolerance_mm)?,
        "LINE, POLYLINE or LWPOLYLINE in model space",
    )
}

/// Reads all lines of the model space, in the same units.
pub(super) fn pieces(bytes: &[u8], tolerance_mm: f64) -> Result<Vec<Piece>, String> {
    let drawing =
        Drawing::load(&mut &*bytes).map_err(|error| format!("it is no DXF drawing: {error}; save it again as DXF"))?;
    let mm = unit_mm(drawing.header.default_drawing_units)?;
    let mut pieces = Vec::new();
    let mut points = 0;
    for entity in drawing.entities().filter(|e| !e.common.is_in_paper_space) {
        if let Some(piece) = piece(entity, mm, tolerance_mm)? {
            points += piece.points.len();
            pieces.push(piece);
        }
        if points > MAX_IMPORT_POINTS || pieces.len() > MAX_PIECES {
            return Err(format!(
                "it holds more than {MAX_IMPORT_POINTS} points or {MAX_PIECES} pieces; export only the path"
            ));
        }
    }
    Ok(pieces)
}

/// Millimetres in a drawing unit.
fn unit_mm(units: Units) -> Result<f64, String> {
    Ok(match units {
        Units::Unitless | Units::Millimeters => 1.0,
        Units::Inches => 25.4,
        Units::Feet => 304.8,
        Units::Yards => 914.4,
        Units::Microns => 0.001,
        Units::Centimeters => 10.0,
        Units::Decimeters => 100.0,
        Units::Meters => 1000.0,
        other => {
            return Err(format!(
                "its unit ({other:?}) is not used for shells; set $INSUNITS to millimetres, metres, inches or feet"
            ));
        }
    })
}

fn piece(entity: &Entity, mm: f64, tolerance_mm: f64) -> Result<Option<Piece>, String> {
    let (corners, closed) = match &entity.specific {
        EntityType::Line(line) => {
            let ends = [&line.p1, &line.p2].map(|p| Corner {
                at: Point::new(p.x, p.y, p.z),
                bulge: 0.0,
            });
            (Vec::from(ends), false)
        }
        EntityType::LwPolyline(line) => (light(line, entity.common.elevation), line.is_closed()),
        EntityType::Polyline(line) => (heavy(line)?, line.is_closed()),
        EntityType::Arc(_) => return Err(not_read("ARC")),
        EntityType::Spline(_) => return Err(not_read("SPLINE")),
        EntityType::Ellipse(_) => return Err(not_read("ELLIPSE")),
        _ => return Ok(None),
    };
    let frame = match &entity.specific {
        EntityType::LwPolyline(line) => Some(&line.extrusion_direction),
        EntityType::Polyline(line) if !line.is_3d_polyline() => Some(&line.normal),
        _ => None,
    };
    let frame = frame.map_or([Vector::X, Vector::Y, Vector::Z], |n| axes(Vector::new(n.x, n.y, n.z)));
    let flat = flatten(&corners, closed, tolerance_mm / mm)?;
    let place = |p: Point| Point((frame[0] * p.0.x + frame[1] * p.0.y + frame[2] * p.0.z) * mm);
    Ok(Some(Piece {
        points: flat.into_iter().map(place).collect(),
        closed,
    }))
}

fn not_read(what: &str) -> String {
    format!("it holds a curve of kind {what}, which is not read; turn it into a polyline with arcs first")
}

fn light(line: &LwPolyline, elevation: f64) -> Vec<Corner> {
    let corner = |v: &dxf::LwPolylineVertex| Corner {
        at: Point::new(v.x, v.y, elevation),
        bulge: v.bulge,
    };
    line.vertices.iter().map(corner).collect()
}

fn heavy(line: &Polyline) -> Result<Vec<Corner>, String> {
    if line.is_3d_polygon_mesh() || line.is_polyface_mesh() {
        return Err("it holds a mesh of kind POLYLINE, which is no path; draw the path as a polyline".to_owned());
    }
    let solid = line.is_3d_polyline();
    // The control points of a fitted spline are not on the curve.
    let corners = line
        .vertices()
        .filter(|v| !v.is_spline_frame_control_point())
        .map(|v| Corner {
            at: Point::new(
                v.location.x,
                v.location.y,
                if solid { v.location.z } else { line.location.z },
            ),
            bulge: if solid { 0.0 } else { v.bulge },
        });
    Ok(corners.collect())
}

/// The axes of an entity's own frame, by the format's arbitrary axis rule: close to z, x is y cross z, else z cross z.
fn axes(normal: Vector) -> [Vector; 3] {
    // The format's own limit.
    const NEAR_Z: f64 = 1.0 / 64.0;
    let z = normal.try_normalize().unwrap_or(Vector::Z);
    let near = z.x.abs() < NEAR_Z && z.y.abs() < NEAR_Z;
    let x = if near { Vector::Y } else { Vector::Z }
        .cross(z)
        .normalize_or(Vector::X);
    [x, z.cross(x), z]
}

/// Replaces arcs by chords that stay within the tolerance, in drawing units.
fn flatten(corners: &[Corner], closed: bool, tolerance: f64) -> Result<Vec<Point>, String> {
    let mut points = Vec::with_capacity(corners.len());
    for (at, corner) in corners.iter().enumerate() {
        points.push(corner.at);
        let next = corners.get(at + 1).or_else(|| corners.first().filter(|_| closed));
        if let Some(next) = next {
            arc(corner, next.at, tolerance, &mut points)?;
        }
    }
    Ok(points)
}

/// The points between the ends of an arc. A bulge is the tangent of a quarter of the arc's angle, counter-clockwise positive.
fn arc(from: &Corner, to: Point, tolerance: f64, out: &mut Vec<Point>) -> Result<(), String> {
    let bulge = from.bulge;
    let chord = to - from.at;
    let length = chord.length();
    // The height of the arc over its chord, exact for any bulge.
    let height = (bulge * length / 2.0).abs();
    if bulge == 0.0 || length == 0.0 || (height <= tolerance && bulge.abs() <= 1.0) {
        return Ok(());
    }
    let angle = 4.0 * bulge.atan();
    let radius = length * (1.0 + bulge * bulge) / (4.0 * bulge.abs());
    // A chord over an angle d is r (1 - cos(d / 2)) from its arc.
    let step = 2.0 * (1.0 - (tolerance / radius).min(1.0)).acos();
    let parts = (angle.abs() / step).ceil();
    if !(parts.is_finite() && parts < 1e5 && out.len() < MAX_IMPORT_POINTS) {
        return Err("one of its arcs needs more than 100000 chords; give a larger tolerance".to_owned());
    }
    // The centre is beside the middle of the chord, to the left of it for a counter-clockwise arc of less than half a turn.
    let left = Vector::new(-chord.y, chord.x, 0.0);
    let centre = from.at + chord / 2.0 + left * ((1.0 - bulge * bulge) / (4.0 * bulge));
    let arm = from.at - centre;
    let mut part = 1.0;
    while part < parts {
        let (sin, cos) = (angle * part / parts).sin_cos();
        out.push(centre + Vector::new(arm.x * cos - arm.y * sin, arm.x * sin + arm.y * cos, 0.0));
        part += 1.0;
    }
    Ok(())
}
