//! Changing all symmetric zones at once, in the start's own parameters where they can say it.

use super::{SAME, set::shared, set::usable, symmetry::helix, symmetry::images, table::Table, turned};
use crate::{
    Angle, Code, Finding, Place, Shape, Start, Vector, ZoneRef,
    start::{CurveShape, PolarBy, PolarForm, RibbonFrom, circle},
};

/// Gives a zone a new vector, in millimetres, and changes all zones that are symmetric to it alike (see [`super::symmetric`]). Where the parameters of the
/// start can express the change, they are changed: pitch and edge of a polar form or whichever two measures it goes by, and so on; the
/// zones keep following from them. Otherwise each zone gets a vector of its own.
///
/// # Errors
/// As [`super::set_zones`]; also when the change would leave the parameters' limits.
pub fn set_together(shape: &Shape, zone: ZoneRef, vector: Vector) -> Result<Shape, Finding> {
    let table = Table::of(shape)?;
    let state = table.get(zone)?;
    let vector = vector * state.sign.factor();
    let root = *table.get(state.root)?;
    usable(vector)?;
    if let ZoneRef::Start(id) = root.name
        && table.start_is_derived()
        && let Some(start) = in_parameters(&shape.start, id, root.vector, vector)?
    {
        start.first_word()?;
        return Ok(Shape { start, ..shape.clone() });
    }
    let changes = images(shape, &table, root.name)?
        .iter()
        .map(|image| {
            Ok((
                image.zone,
                image.follows(table.get(image.zone)?.vector, root.vector, vector),
            ))
        })
        .collect::<Result<Vec<_>, Finding>>()?;
    shared(shape, &table, &changes)
}

/// The start with its parameters changed so that a zone goes from `old` to `new`; none when they cannot say it.
fn in_parameters(start: &Start, id: u32, old: Vector, new: Vector) -> Result<Option<Start>, Finding> {
    let mut next = start.clone();
    match &mut next {
        Start::Polar(form) => {
            let Some(rib) = upright(new, circle::part_of_turn(i64::from(id), form.ribs)) else {
                return Ok(None);
            };
            form.by = polar(form, rib.run, positive("pitch", -rib.rise)?)?;
        }
        Start::Helical(form) => {
            let Some(rib) = upright(new, circle::part_of_turn(i64::from(id), form.ribs)) else {
                return Ok(None);
            };
            (form.pitch, form.edge_mm) = pitch_and_edge(rib.run, positive("pitch", rib.rise)?);
        }
        Start::Ribbon(form) => {
            let back = form.from == RibbonFrom::Across && id < form.ribs / 2;
            let turn = circle::degrees(form.turn.degrees() * f64::from(id));
            let Some(rib) = upright(if back { -new } else { new }, turn) else {
                return Ok(None);
            };
            (form.pitch, form.edge_mm) = pitch_and_edge(rib.run, positive("pitch", rib.rise)?);
        }
        Start::Column(form) => {
            let n = form.ribs;
            let zag = id < n;
            let turn = if zag {
                circle::part_of_turn(i64::from(id), n)
            } else {
                circle::part_of_turn(i64::from(id - n) * i64::from(form.turn), n)
            };
            let Some(edge) = upright(if zag { new } else { -new }, turn) else {
                return Ok(None);
            };
            *(if zag {
                &mut form.zag_run_mm
            } else {
                &mut form.zig_run_mm
            }) = edge.run;
            form.rise_mm = positive("rise_mm", edge.rise)?;
        }
        Start::Loop(form) => {
            // A chord of half a step; moved nodes stay moved, so only its change counts.
            let (chord, change) = (level(old), new - old);
            let Some(by) = (chord.length() > 0.0).then(|| along(change, chord)).flatten() else {
                return Ok(None);
            };
            let half = circle::part_of_turn(1, 4 * form.sides).1;
            form.radius_mm = positive("radius_mm", form.radius_mm + by / (2.0 * half))?;
            form.rise_mm = positive(
                "rise_mm",
                form.rise_mm + if id.is_multiple_of(2) { -change.z } else { change.z },
            )?;
        }
        Start::Translation(form) => {
            let Some((first, zones, part)) = helix(form, id)? else {
                return Ok(None);
            };
            let curve = if first == 0 { &mut form.zig } else { &mut form.zag };
            let (Some(run), CurveShape::Helix { radius_mm, rise_mm, .. }) = (along(new, level(old)), &mut curve.shape)
            else {
                return Ok(None);
            };
            let half = circle::degrees(part.abs() / 2.0).1;
            *radius_mm = positive("radius_mm", run / (2.0 * half))?;
            *rise_mm = new.z * f64::from(zones);
        }
        Start::StarSolid(solid) => {
            // Directions of a star are fixed: the length alone is taken.
            solid.edge_mm = positive("edge_mm", solid.edge_mm * (new.dot(old) / old.length_squared()))?;
        }
        Start::Zigzag(_) | Start::StarPath(_) => return Ok(None),
    }
    Ok(Some(next))
}

/// A vector in the upright plane of its rib: level run outwards and rise, in millimetres.
#[derive(Clone, Copy)]
struct Upright {
    run: f64,
    rise: f64,
}

/// Run and rise of a vector along the rib at an azimuth; none when it leaves the rib's upright plane or points inwards.
fn upright(v: Vector, (cos, sin): (f64, f64)) -> Option<Upright> {
    let local = turned(v, (cos, -sin));
    let crumb = SAME * v.length();
    (local.y.abs() <= crumb && local.x >= -crumb).then(|| Upright {
        run: local.x.max(0.0),
        rise: local.z,
    })
}

/// The part of a vector along a level direction; none when it has a level part across it.
fn along(v: Vector, direction: Vector) -> Option<f64> {
    let unit = direction / direction.length();
    let across = level(v) - unit * v.dot(unit);
    (across.length() <= SAME * (v.length() + direction.length())).then(|| v.dot(unit))
}

fn level(v: Vector) -> Vector {
    Vector::new(v.x, v.y, 0.0)
}

/// Refuses a measure that has gone to nothing or beyond.
fn positive(name: &'static str, value: f64) -> Result<f64, Finding> {
    if value > 0.0 {
        Ok(value)
    } else {
        Err(Finding::new(Code::ParameterLimit, Place::Parameter(name)))
    }
}

fn pitch_and_edge(run: f64, rise: f64) -> (Angle, f64) {
    (Angle::from_radians(rise.atan2(run)), run.hypot(rise))
}

/// A polar form's two measures, whichever they are, for ribs with this run and fall.
fn polar(form: &PolarForm, run: f64, fall: f64) -> Result<PolarBy, Finding> {
    let (pitch, edge_mm) = pitch_and_edge(run, fall);
    let plain = PolarForm {
        ribs: form.ribs,
        by: PolarBy::PitchEdge { pitch, edge_mm },
    };
    Ok(plain.by_pair(form.by.pair())?.by)
}
