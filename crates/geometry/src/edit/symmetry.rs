//! Which zones are symmetric to a zone, and how a change is turned for each of them.

use super::{fan, table::Table, turned};
use crate::{
    Finding, Shape, Start, Vector, ZoneKind, ZoneRef,
    start::{CurveShape, RibbonFrom, TranslationForm, circle},
};

/// How a change of one zone becomes that of a symmetric one.
#[derive(Clone, Copy, PartialEq, Debug)]
pub enum Turn {
    /// Turned about the vertical by the angle with this cosine and sine, then kept (1) or reversed (-1).
    About {
        /// Cosine and sine.
        by: (f64, f64),
        /// 1 or -1.
        factor: f64,
    },
    /// The directions are fixed; only the length goes along, in proportion.
    Length,
}

/// A zone that is symmetric to another one.
#[derive(Clone, Copy, PartialEq, Debug)]
pub struct Image {
    /// The zone.
    pub zone: ZoneRef,
    /// What leads to it.
    pub turn: Turn,
}

impl Image {
    const fn about(zone: ZoneRef, by: (f64, f64), factor: f64) -> Self {
        Self {
            zone,
            turn: Turn::About { by, factor },
        }
    }

    /// The vector of this zone, now `own`, after the first zone has gone from `old` to `new`.
    #[must_use]
    pub fn follows(&self, own: Vector, old: Vector, new: Vector) -> Vector {
        match self.turn {
            Turn::About { by, factor } => own + turned(new - old, by) * factor,
            Turn::Length => own * (new.dot(old) / old.length_squared()),
        }
    }
}

/// The zones symmetric to a zone, itself first; zones that are linked to another one follow that one and are left out.
///
/// Of a parametric start these are what its parameters make alike: all ribs of a polar, helical or ribbon form, all zags or all zigs of a column, all
/// falling or all rising edges of a loop, all parts of a helix; all edges of a star solid, in length. Elsewhere, and for splices, they are the
/// zones that make a regular fan about the vertical with it. A zone that has none is alone.
///
/// # Errors
/// When there is no such zone, or the shape cannot be read.
pub fn symmetric(shape: &Shape, zone: ZoneRef) -> Result<Vec<Image>, Finding> {
    let table = Table::of(shape)?;
    images(shape, &table, zone)
}

pub(super) fn images(shape: &Shape, table: &Table, zone: ZoneRef) -> Result<Vec<Image>, Finding> {
    let root = table.get(zone)?.root;
    let family = match root {
        ZoneRef::Start(id) => of_start(&shape.start, id)?,
        ZoneRef::Spliced(..) => None,
    };
    let mut images = family.unwrap_or_else(|| fan::of(table, root));
    images.retain(|image| {
        let kind = table.get(image.zone).map(|state| state.kind);
        image.zone != root && kind.is_ok_and(|kind| kind != ZoneKind::Linked)
    });
    images.insert(0, Image::about(root, (1.0, 0.0), 1.0));
    Ok(images)
}

/// The zones that a start's parameters make alike; none where they do not say.
fn of_start(start: &Start, id: u32) -> Result<Option<Vec<Image>>, Finding> {
    let from = i64::from(id);
    let ring = |zones: std::ops::Range<u32>, step: usize, turn: &dyn Fn(i64) -> (f64, f64)| {
        zones
            .step_by(step)
            .map(|zone| Image::about(ZoneRef::Start(zone), turn(i64::from(zone) - from), 1.0))
            .collect::<Vec<_>>()
    };
    Ok(match start {
        Start::Polar(form) => Some(ring(0..form.ribs, 1, &|k| circle::part_of_turn(k, form.ribs))),
        Start::Helical(form) => Some(ring(0..form.ribs, 1, &|k| circle::part_of_turn(k, form.ribs))),
        Start::Ribbon(form) => {
            let middle = if form.from == RibbonFrom::Across {
                form.ribs / 2
            } else {
                0
            };
            let way = |zone: i64| if zone < i64::from(middle) { -1.0 } else { 1.0 };
            let mut images = ring(0..form.ribs, 1, &|k| rib_turn(form.turn.degrees(), k));
            for (zone, image) in (0..).zip(&mut images) {
                if let Turn::About { factor, .. } = &mut image.turn {
                    *factor = way(zone) * way(from);
                }
            }
            Some(images)
        }
        Start::Column(form) if id < form.ribs => Some(ring(0..form.ribs, 1, &|k| circle::part_of_turn(k, form.ribs))),
        Start::Column(form) => {
            let turn = i64::from(form.turn);
            Some(ring(form.ribs..2 * form.ribs, 1, &|k| {
                circle::part_of_turn(k * turn, form.ribs)
            }))
        }
        Start::Loop(form) => {
            let count = 2 * form.sides;
            Some(ring(id % 2..count, 2, &|k| circle::part_of_turn(k, count)))
        }
        Start::StarSolid(solid) => {
            let zones = u32::try_from(solid.star.directions()?.len()).unwrap_or(u32::MAX);
            let all = (0..zones).map(|zone| Image {
                zone: ZoneRef::Start(zone),
                turn: Turn::Length,
            });
            Some(all.collect())
        }
        Start::Translation(form) => {
            helix(form, id)?.map(|(first, zones, part)| ring(first..first + zones, 1, &|k| rib_turn(part, k)))
        }
        Start::Zigzag(_) | Start::StarPath(_) => None,
    })
}

/// The turn over `k` ribs, each turned on by this many degrees.
#[expect(clippy::cast_precision_loss, reason = "ribs are far fewer than f64 has integers")]
fn rib_turn(degrees: f64, k: i64) -> (f64, f64) {
    circle::degrees(degrees * k as f64)
}

/// The helix that a zone of a translation surface is a part of: its first zone, how many it has, and the turn of a part in degrees.
pub(super) fn helix(form: &TranslationForm, id: u32) -> Result<Option<(u32, u32, f64)>, Finding> {
    let mut first = 0;
    for curve in [&form.zig, &form.zag] {
        let zones = if curve.is_straight() { 1 } else { curve.edges()?.len() };
        let zones = u32::try_from(zones).unwrap_or(u32::MAX);
        if (first..first + zones).contains(&id) {
            return Ok(match &curve.shape {
                CurveShape::Helix { turn, .. } => Some((first, zones, turn.degrees() / f64::from(curve.parts))),
                _ => None,
            });
        }
        first += zones;
    }
    Ok(None)
}
