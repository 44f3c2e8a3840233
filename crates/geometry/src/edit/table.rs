//! The zones of a record, with its rules applied: what growing will make of them, without growing.

use std::collections::BTreeMap;

use super::no_zone;
use crate::{Act, Code, Direction, Finding, FirstWord, Place, Shape, Sign, Vector, ZoneKind, ZoneRef, ZoneVector};

/// A zone of a record.
#[derive(Clone, Copy, PartialEq, Debug)]
pub struct ZoneState {
    /// Its name.
    pub name: ZoneRef,
    /// Its vector, in millimetres.
    pub vector: Vector,
    /// Where the vector comes from.
    pub kind: ZoneKind,
    /// The zone whose vector it is: itself unless it is linked.
    pub root: ZoneRef,
    /// Which way along the root's vector.
    pub sign: Sign,
}

/// All zones: the start's in their order, then those of the splices, step by step, switched off ones included.
///
/// # Errors
/// When the start cannot be used, or links lead round in a ring or to no zone.
pub fn zone_states(shape: &Shape) -> Result<Vec<ZoneState>, Finding> {
    Ok(Table::of(shape)?.zones)
}

/// The zones of a record, findable by name.
pub(super) struct Table {
    pub(super) zones: Vec<ZoneState>,
    pub(super) word: FirstWord,
    by_name: BTreeMap<ZoneRef, usize>,
}

impl Table {
    pub(super) fn of(shape: &Shape) -> Result<Self, Finding> {
        let word = shape.start.first_word()?;
        let start = word.zones.iter().map(|zone| {
            let kind = if zone.derived { ZoneKind::Derived } else { ZoneKind::Own };
            (ZoneRef::Start(zone.id), zone.vector, kind)
        });
        let mut zones: Vec<ZoneState> = start.chain(spliced(shape)).map(plain).collect();
        let by_name: BTreeMap<_, _> = zones.iter().enumerate().map(|(at, z)| (z.name, at)).collect();
        let mut links = BTreeMap::new();
        // As when growing: of several rules about a zone the last of a kind counts, and a link goes before a vector.
        for rule in &shape.zones {
            match rule.vector {
                ZoneVector::Own(vector) => {
                    if let Some(zone) = by_name.get(&rule.zone).map(|at| &mut zones[*at]) {
                        (zone.vector, zone.kind) = (vector, ZoneKind::Own);
                    }
                }
                ZoneVector::Linked(to, sign) => {
                    links.insert(rule.zone, (to, sign));
                }
            }
        }
        for (name, (to, sign)) in &links {
            let Some(&at) = by_name.get(name) else { continue };
            let (root, sign) = follow(*to, *sign, &links)?;
            let target = by_name.get(&root).filter(|target| **target != at).ok_or_else(broken)?;
            let vector = zones[*target].vector * sign.factor();
            zones[at] = ZoneState {
                vector,
                kind: ZoneKind::Linked,
                root,
                sign,
                name: *name,
            };
        }
        Ok(Self { zones, word, by_name })
    }

    /// The zone of this name.
    pub(super) fn get(&self, name: ZoneRef) -> Result<&ZoneState, Finding> {
        self.by_name
            .get(&name)
            .map(|at| &self.zones[*at])
            .ok_or_else(|| no_zone(name))
    }

    /// How often each zone of the start comes in the first word, with signs and through links; by the name of its root.
    pub(super) fn counts(&self) -> BTreeMap<ZoneRef, f64> {
        let mut counts = BTreeMap::new();
        for letter in &self.word.letters {
            let zone = &self.zones[letter.zone as usize];
            *counts.entry(zone.root).or_insert(0.0) += letter.sign.factor() * zone.sign.factor();
        }
        counts
    }

    /// Whether no rule is about a zone of the start: all its vectors are those of its parameters.
    pub(super) fn start_is_derived(&self) -> bool {
        let start = &self.zones[..self.word.zones.len()];
        start.iter().all(|zone| zone.kind == ZoneKind::Derived)
    }
}

fn spliced(shape: &Shape) -> impl Iterator<Item = (ZoneRef, Vector, ZoneKind)> + '_ {
    shape.steps.iter().flat_map(|step| {
        let directions = match &step.act {
            Act::Splice { directions, .. } => &directions[..],
            _ => &[],
        };
        (0..).zip(directions).filter_map(|(index, direction)| match direction {
            Direction::Own(vector) => Some((ZoneRef::Spliced(step.id, index), *vector, ZoneKind::Own)),
            _ => None,
        })
    })
}

const fn plain((name, vector, kind): (ZoneRef, Vector, ZoneKind)) -> ZoneState {
    ZoneState {
        name,
        vector,
        kind,
        root: name,
        sign: Sign::Plus,
    }
}

/// Follows links to the zone that has the vector.
fn follow(
    mut to: ZoneRef,
    mut sign: Sign,
    links: &BTreeMap<ZoneRef, (ZoneRef, Sign)>,
) -> Result<(ZoneRef, Sign), Finding> {
    let mut hops = 0;
    while let Some((next, turn)) = links.get(&to) {
        to = *next;
        sign = if *turn == Sign::Minus { sign.opposite() } else { sign };
        hops += 1;
        if links.len() < hops {
            return Err(broken());
        }
    }
    Ok((to, sign))
}

pub(super) const fn broken() -> Finding {
    Finding::new(Code::BrokenLink, Place::Parameter("zones"))
}
