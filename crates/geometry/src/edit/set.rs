//! Giving zones new vectors, and closing what that opens.

use std::collections::BTreeMap;

use super::{SAME, rules::own, single, table::Table};
use crate::{Code, Finding, Place, Shape, Unit, Vector, ZoneRef, start::limits};

/// Gives a zone a new vector, in millimetres; see [`set_zones`].
///
/// # Errors
/// As there.
pub fn set_zone(shape: &Shape, zone: ZoneRef, vector: Vector) -> Result<Shape, Finding> {
    set_zones(shape, &[(zone, vector)])
}

/// Gives several zones new vectors at once, in millimetres. A linked zone changes the zone that it is linked to. On an open front everything
/// behind comes along. Where a closed front would open, its other zones take up the gap, each as little as can be; see
/// [`crate::start::FreePath::share_gap`] for how.
///
/// # Errors
/// When there is no such zone; when an edge would have no length or too much; when the front could no longer close.
pub fn set_zones(shape: &Shape, changes: &[(ZoneRef, Vector)]) -> Result<Shape, Finding> {
    let table = Table::of(shape)?;
    shared(shape, &table, changes)
}

/// The same, with the shape's table at hand.
pub(super) fn shared(shape: &Shape, table: &Table, changes: &[(ZoneRef, Vector)]) -> Result<Shape, Finding> {
    let mut roots: BTreeMap<ZoneRef, Vector> = BTreeMap::new();
    for (zone, vector) in changes {
        let state = table.get(*zone)?;
        roots.insert(state.root, *vector * state.sign.factor());
    }
    if table.word.closed {
        share_gap(table, &mut roots)?;
    }
    for vector in roots.values() {
        usable(*vector)?;
    }
    // A zone that stays what it is needs no rule.
    roots.retain(|zone, vector| table.get(*zone).is_ok_and(|state| state.vector != *vector));
    let mut next = shape.clone();
    single::into_parameters(&mut next, table, &mut roots)?;
    for (zone, vector) in roots {
        own(&mut next, zone, vector);
    }
    next.start.first_word()?;
    Ok(next)
}

/// Adds to the new vectors those of the zones that take up the gap of a closed front.
fn share_gap(table: &Table, roots: &mut BTreeMap<ZoneRef, Vector>) -> Result<(), Finding> {
    let counts = table.counts();
    let now = |zone: &ZoneRef| table.get(*zone).map(|state| state.vector);
    let (mut gap, mut size) = (Vector::ZERO, 0.0);
    for (zone, count) in &counts {
        let vector = roots.get(zone).copied().map_or_else(|| now(zone), Ok)?;
        gap += vector * *count;
        size += vector.length() * count.abs();
    }
    // Turned vectors cancel but for crumbs; sharing those out would touch every zone for nothing.
    if gap.length() <= SAME * size {
        return Ok(());
    }
    let others = || {
        counts
            .iter()
            .filter(|(zone, count)| **count != 0.0 && !roots.contains_key(zone))
    };
    let squares: f64 = others().map(|(_, count)| count * count).sum();
    if squares == 0.0 {
        let missed = Finding::new(Code::ClosingGap, Place::Parameter("zones"));
        return Err(missed.with(gap.length(), Some(0.0), Unit::Millimetres));
    }
    let taken: Vec<(ZoneRef, Vector)> = others()
        .map(|(zone, count)| Ok((*zone, now(zone)? - gap * (*count / squares))))
        .collect::<Result<_, Finding>>()?;
    roots.extend(taken);
    Ok(())
}

/// Refuses what no edge can be.
pub(super) fn usable(vector: Vector) -> Result<(), Finding> {
    if !vector.is_finite() {
        return Err(Finding::new(Code::NotFinite, Place::Parameter("zones")));
    }
    let length = vector.length();
    if length < limits::MIN_LENGTH_MM {
        return Err(Finding::new(Code::ZeroVector, Place::Parameter("zones")));
    }
    limits::length("zones", length).map(|_| ())
}
