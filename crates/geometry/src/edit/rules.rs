//! Rules about zones: links, vectors of their own, and taking a rule away.

use super::{
    no_zone,
    set::shared,
    table::{Table, broken},
};
use crate::{Finding, Shape, Sign, Vector, ZoneRef, ZoneRule, ZoneVector};

/// Replaces all rules about a zone by one, or by none.
pub(super) fn set_rule(shape: &mut Shape, zone: ZoneRef, vector: Option<ZoneVector>) {
    let at = shape.zones.iter().position(|rule| rule.zone == zone);
    shape.zones.retain(|rule| rule.zone != zone);
    if let Some(vector) = vector {
        // The rule stays where it stood, so that a drag does not shuffle the file.
        let at = at.unwrap_or(shape.zones.len()).min(shape.zones.len());
        shape.zones.insert(at, ZoneRule { zone, vector });
    }
}

/// Links a zone to another one, the same way or against it: the two then have one vector and count as one zone. A closed front that closed
/// before takes up the gap, as when an edge is dragged.
///
/// # Errors
/// When there is no such zone; when the link would lead back to the zone itself; when a zone of the start would be linked to one that only
/// a splice brings; when the front can no longer close.
pub fn link_zone(shape: &Shape, zone: ZoneRef, to: ZoneRef, sign: Sign) -> Result<Shape, Finding> {
    let before = Table::of(shape)?;
    before.get(zone)?;
    let target = *before.get(to)?;
    let root = target.root;
    let late = |name: ZoneRef| match name {
        ZoneRef::Start(_) => None,
        ZoneRef::Spliced(step, index) => Some((shape.steps.iter().position(|s| s.id == step), index)),
    };
    // A zone can only follow one that is there when it comes.
    if root == zone || late(zone) < late(root) {
        return Err(broken());
    }
    let mut next = shape.clone();
    // Linked to the zone that has the vector, the rule holds without the ones between.
    let sign = if target.sign == Sign::Minus {
        sign.opposite()
    } else {
        sign
    };
    set_rule(&mut next, zone, Some(ZoneVector::Linked(root, sign)));
    let after = Table::of(&next)?;
    shared(&next, &after, &[(root, after.get(root)?.vector)])
}

/// Takes a link away; the zone keeps the vector that it has, as its own.
///
/// # Errors
/// When there is no such zone, or it is not linked.
pub fn unlink_zone(shape: &Shape, zone: ZoneRef) -> Result<Shape, Finding> {
    let table = Table::of(shape)?;
    let state = table.get(zone)?;
    if state.root == zone {
        return Err(no_zone(zone));
    }
    let mut next = shape.clone();
    own(&mut next, zone, state.vector);
    Ok(next)
}

/// Gives a zone the vector again that the start or its splice gives it.
///
/// # Errors
/// When there is no rule about this zone, or links that lead to it would break.
pub fn derive_zone(shape: &Shape, zone: ZoneRef) -> Result<Shape, Finding> {
    if !shape.zones.iter().any(|rule| rule.zone == zone) {
        return Err(no_zone(zone));
    }
    let mut next = shape.clone();
    set_rule(&mut next, zone, None);
    Table::of(&next)?;
    Ok(next)
}

/// Gives a zone its own vector, where such a vector is kept: with a free letter, with a splice's direction, else in a rule.
pub(super) fn own(shape: &mut Shape, zone: ZoneRef, vector: Vector) {
    let kept = super::single::write(shape, zone, vector);
    set_rule(shape, zone, (!kept).then_some(ZoneVector::Own(vector)));
}
