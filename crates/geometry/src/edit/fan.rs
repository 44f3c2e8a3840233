//! Zones that stand about the vertical like the ribs of a fan, whatever made them.

use core::f64::consts::TAU;

use super::{
    SAME,
    symmetry::{Image, Turn},
    table::{Table, ZoneState},
};
use crate::{ZoneKind, ZoneRef, start::circle};

/// Azimuths nearer than this, in radians, are equal: typed coordinates of a hundredth of a millimetre on a 1 m edge stay within.
const SAME_AZIMUTH: f64 = 1e-5;

/// Lengths and heights that differ by less than this part are equal, for the same reason.
const SAME_PART: f64 = 1e-5;

/// The largest regular fan about the vertical that a zone belongs to: zones of its length and rise, at equal angles all round.
/// Start zones make fans with start zones, splices with splices.
pub(super) fn of(table: &Table, zone: ZoneRef) -> Vec<Image> {
    let Ok(first) = table.get(zone) else { return Vec::new() };
    let length = first.vector.length();
    if first.vector.x.hypot(first.vector.y) <= SAME * length {
        return Vec::new();
    }
    let alike = |other: &ZoneState| {
        let same_maker = matches!(
            (zone, other.name),
            (ZoneRef::Start(_), ZoneRef::Start(_)) | (ZoneRef::Spliced(..), ZoneRef::Spliced(..))
        );
        let near = |a: f64, b: f64| (a - b).abs() <= SAME_PART * length;
        same_maker
            && other.kind != ZoneKind::Linked
            && near(other.vector.length(), length)
            && near(other.vector.z, first.vector.z)
    };
    let from = azimuth(first);
    let mut fan: Vec<(f64, ZoneRef)> = table
        .zones
        .iter()
        .filter(|other| alike(other))
        .map(|other| ((azimuth(other) - from).rem_euclid(TAU), other.name))
        .collect();
    fan.sort_by(|a, b| a.0.total_cmp(&b.0).then(a.1.cmp(&b.1)));
    let most = u32::try_from(fan.len()).unwrap_or(u32::MAX);
    let of_count = |count: u32| {
        (1..count)
            .map(|k| {
                let name = at(&fan, TAU * f64::from(k) / f64::from(count))?;
                Some(Image {
                    zone: name,
                    turn: Turn::About {
                        by: circle::part_of_turn(i64::from(k), count),
                        factor: 1.0,
                    },
                })
            })
            .collect::<Option<Vec<_>>>()
    };
    (2..=most).rev().find_map(of_count).unwrap_or_default()
}

/// The first zone at an azimuth.
fn at(fan: &[(f64, ZoneRef)], azimuth: f64) -> Option<ZoneRef> {
    let first = fan.partition_point(|(a, _)| *a < azimuth - SAME_AZIMUTH);
    fan.get(first)
        .filter(|(a, _)| *a <= azimuth + SAME_AZIMUTH)
        .map(|(_, zone)| *zone)
}

fn azimuth(zone: &ZoneState) -> f64 {
    zone.vector.y.atan2(zone.vector.x)
}
