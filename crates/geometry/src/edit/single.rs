//! Where a zone's own vector is kept: with its free letter, with its splice's direction, in a start's parameter, else in a rule.

use std::collections::BTreeMap;

use super::{SAME, table::Table, turned};
use crate::{
    Act, Direction, Finding, Shape, Sign, Start, Vector, ZoneRef,
    start::{Curve, CurveShape, FreeVector, LoopForm, StarLength, StarPath, TranslationForm, circle},
};

/// Writes a zone's vector where it belongs to the zone alone. Gives whether there is such a place.
pub(super) fn write(shape: &mut Shape, zone: ZoneRef, vector: Vector) -> bool {
    match (zone, &mut shape.start) {
        (ZoneRef::Start(id), Start::Zigzag(path)) => {
            let letter = path.letters.iter_mut().find(|letter| letter.id == id);
            letter.map(|letter| letter.vector = FreeVector::Own(vector)).is_some()
        }
        (ZoneRef::Start(_), _) => false,
        (ZoneRef::Spliced(step, index), _) => {
            let step = shape.steps.iter_mut().find(|s| s.id == step);
            let Some(Act::Splice { directions, .. }) = step.map(|s| &mut s.act) else {
                return false;
            };
            let direction = directions.get_mut(index as usize);
            direction.map(|direction| *direction = Direction::Own(vector)).is_some()
        }
    }
}

/// Takes those new vectors out of the map that the start's parameters can hold one by one, and puts them there.
pub(super) fn into_parameters(
    shape: &mut Shape,
    table: &Table,
    roots: &mut BTreeMap<ZoneRef, Vector>,
) -> Result<(), Finding> {
    if !table.start_is_derived() {
        return Ok(());
    }
    let changes: Vec<(u32, Vector, Vector)> = roots
        .iter()
        .filter_map(|(zone, new)| match zone {
            ZoneRef::Start(id) => Some((*id, table.get(*zone).ok()?.vector, *new)),
            ZoneRef::Spliced(..) => None,
        })
        .collect();
    let kept = match &mut shape.start {
        Start::Loop(form) => into_loop(form, &changes),
        Start::Translation(form) => into_curves(form, &changes)?,
        Start::StarPath(path) => into_star_path(path, &changes)?,
        _ => Vec::new(),
    };
    for id in kept {
        roots.remove(&ZoneRef::Start(id));
    }
    Ok(())
}

/// A loop keeps moved nodes: node k + 1 moves by the changes of letters 0 to k. The changes cancel, as the loop closes.
fn into_loop(form: &mut LoopForm, changes: &[(u32, Vector, Vector)]) -> Vec<u32> {
    let mut moved: BTreeMap<u32, Vector> = BTreeMap::new();
    for (node, by) in &form.moved {
        *moved.entry(*node).or_insert(Vector::ZERO) += *by;
    }
    let by_letter: BTreeMap<u32, Vector> = changes.iter().map(|(id, old, new)| (*id, *new - *old)).collect();
    let mut sum = Vector::ZERO;
    for node in 1..2 * form.sides {
        sum += by_letter.get(&(node - 1)).copied().unwrap_or(Vector::ZERO);
        *moved.entry(node).or_insert(Vector::ZERO) += sum;
    }
    // Nodes that came back to their regular place, but for crumbs, are not moved.
    let crumb = SAME * form.radius_mm.max(form.rise_mm);
    form.moved = moved.into_iter().filter(|(_, by)| by.length() > crumb).collect();
    changes.iter().map(|(id, ..)| *id).collect()
}

fn into_curves(form: &mut TranslationForm, changes: &[(u32, Vector, Vector)]) -> Result<Vec<u32>, Finding> {
    let mut kept = Vec::new();
    let mut first = 0;
    for curve in [&mut form.zig, &mut form.zag] {
        let zones = if curve.is_straight() { 1 } else { curve.edges()?.len() };
        let behind = first + u32::try_from(zones).unwrap_or(u32::MAX);
        for (id, old, new) in changes.iter().filter(|(id, ..)| (first..behind).contains(id)) {
            if into_curve(curve, (*id - first) as usize, *old, *new) {
                kept.push(*id);
            }
        }
        first = behind;
    }
    Ok(kept)
}

/// Changes a part of a curve; gives whether the curve's parameters can hold it.
fn into_curve(curve: &mut Curve, part: usize, old: Vector, new: Vector) -> bool {
    let (cos, sin) = circle::degrees(curve.azimuth.degrees());
    let local = turned(new, (cos, -sin));
    match &mut curve.shape {
        CurveShape::Line { run_mm, rise_mm } => {
            let parts = f64::from(curve.parts);
            let run = local.x.hypot(local.y);
            // Along its azimuth, but for crumbs: the azimuth stays as it was typed.
            if local.x < 0.0 || local.y.abs() > SAME * new.length() {
                curve.azimuth = crate::Angle::from_radians(new.y.atan2(new.x));
            }
            (*run_mm, *rise_mm) = (run * parts, new.z * parts);
            true
        }
        CurveShape::Free(points) => {
            let by = turned(new - old, (cos, -sin));
            for point in points.iter_mut().skip(part + 1) {
                *point += by;
            }
            true
        }
        _ => false,
    }
}

/// A star path keeps lengths along its axes. All changes go there, or none.
fn into_star_path(path: &mut StarPath, changes: &[(u32, Vector, Vector)]) -> Result<Vec<u32>, Finding> {
    let word = path.first_word()?;
    let mut next = path.clone();
    for (id, old, new) in changes {
        let length = new.length();
        let along = 0.0 < old.dot(*new) && old.cross(*new).length() <= SAME * old.length() * length;
        if !along {
            return Ok(Vec::new());
        }
        for (letter, of) in next.letters.iter_mut().zip(&word.letters) {
            if of.zone == *id {
                letter.length = StarLength::Mm(length);
            }
        }
    }
    // Two zones of one axis and one length would count as one, and other zones would lose their numbers.
    let zones = |word: &crate::FirstWord| {
        word.letters
            .iter()
            .map(|l| (l.zone, l.sign))
            .collect::<Vec<(u32, Sign)>>()
    };
    if zones(&next.first_word()?) != zones(&word) {
        return Ok(Vec::new());
    }
    *path = next;
    Ok(changes.iter().map(|(id, ..)| *id).collect())
}
