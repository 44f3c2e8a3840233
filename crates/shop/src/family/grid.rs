//! Finds parts that may agree, without comparing every two.

use std::collections::HashMap;
use std::hash::{BuildHasherDefault, Hasher};

use super::{FamilyTolerance, Side};

/// How many numbers stand for a part: the smallest and largest side, the smallest corner, the two smallest and the two
/// largest bevels. None of them moves by more than a tolerance when every side and angle moves by at most one.
const FEATURES: usize = 7;

/// Cells are this many tolerances wide: one query in eight is near a border, for each number.
const TOLERANCES_WIDE: f64 = 16.0;

/// Cells begin here, in parts of a cell, so that values that users type (0, 30, 300 ...) do not fall on a border.
const SHIFT: f64 = 0.37;

/// No cell is narrower, so that a tolerance of zero has a grid too.
const NARROWEST: f64 = 1e-6;

const END: u32 = u32::MAX;

/// Keys are mixed already.
#[derive(Default)]
struct Mixed(u64);

impl Hasher for Mixed {
    fn finish(&self) -> u64 {
        self.0
    }

    fn write(&mut self, bytes: &[u8]) {
        for &byte in bytes {
            self.0 = self.0.rotate_left(8) ^ u64::from(byte);
        }
    }

    fn write_u64(&mut self, key: u64) {
        self.0 = key;
    }
}

/// Where a part lies on the grid.
struct Spot {
    len: usize,
    own: [i64; FEATURES],
    /// The other cell within a tolerance; its own again when there is none.
    near: [i64; FEATURES],
}

impl Spot {
    /// `moved` says, bit by bit, which numbers take the other cell.
    fn key(&self, moved: u32) -> u64 {
        let mut key = self.len as u64;
        for k in 0..FEATURES {
            let cell = if moved >> k & 1 == 1 { self.near[k] } else { self.own[k] };
            // Multiply and fold: keys that collide only cost a comparison.
            key = (key.rotate_left(23) ^ cell.cast_unsigned()).wrapping_mul(0x9e37_79b9_7f4a_7c15);
        }
        key ^ key >> 32
    }
}

struct Entry {
    form: u32,
    next: u32,
}

/// A grid over numbers that neither turning nor mirroring changes.
pub(super) struct Grid {
    within: [f64; FEATURES],
    /// The last entry of each cell. Only ever asked by key.
    cells: HashMap<u64, u32, BuildHasherDefault<Mixed>>,
    entries: Vec<Entry>,
    bevels: Vec<f64>,
}

impl Grid {
    pub(super) fn new(within: &FamilyTolerance) -> Self {
        let [side, corner, bevel] =
            [within.side_mm, within.corner_deg, within.bevel_deg].map(|t| t.max(NARROWEST / TOLERANCES_WIDE));
        Self {
            within: [side, side, corner, bevel, bevel, bevel, bevel],
            cells: HashMap::default(),
            entries: Vec::new(),
            bevels: Vec::new(),
        }
    }

    pub(super) fn add(&mut self, part: &[Side], form: u32) {
        let key = self.spot(part).key(0);
        self.put(key, form);
    }

    /// Looks for the first form that `accept` takes: in the part's own cell, then in the cells within a tolerance.
    pub(super) fn find<T>(&mut self, part: &[Side], accept: impl Fn(u32) -> Option<T>) -> Option<(u32, T)> {
        let spot = self.spot(part);
        let own = spot.key(0);
        if let Some(found) = self.in_cell(own, &accept) {
            return Some(found);
        }
        let mut near = [0; FEATURES];
        let mut count = 0;
        for k in (0..FEATURES).filter(|&k| spot.near[k] != spot.own[k]) {
            near[count] = k;
            count += 1;
        }
        for choice in 1_usize..1 << count {
            let moved = near[..count].iter().enumerate();
            let moved = moved
                .filter(|(bit, _)| choice >> bit & 1 == 1)
                .fold(0_u32, |m, (_, k)| m | 1 << k);
            if let Some(found) = self.in_cell(spot.key(moved), &accept) {
                // The next part like this one finds the form in its own cell.
                self.put(own, found.0);
                return Some(found);
            }
        }
        None
    }

    fn in_cell<T>(&self, key: u64, accept: impl Fn(u32) -> Option<T>) -> Option<(u32, T)> {
        let mut at = *self.cells.get(&key)?;
        while at != END {
            let entry = &self.entries[at as usize];
            if let Some(how) = accept(entry.form) {
                return Some((entry.form, how));
            }
            at = entry.next;
        }
        None
    }

    fn put(&mut self, key: u64, form: u32) {
        let entry = super::index(self.entries.len());
        let next = self.cells.insert(key, entry).unwrap_or(END);
        self.entries.push(Entry { form, next });
    }

    fn features(&mut self, part: &[Side]) -> [f64; FEATURES] {
        let bevels = &mut self.bevels;
        bevels.clear();
        bevels.extend(part.iter().map(|s| s.bevel_deg));
        bevels.sort_unstable_by(f64::total_cmp);
        let n = bevels.len();
        let bevel = |k: usize| bevels.get(k).copied().unwrap_or(0.0);
        let sides = part.iter().map(|s| s.side_mm);
        [
            sides.clone().fold(f64::INFINITY, f64::min),
            sides.fold(0.0, f64::max),
            part.iter().map(|s| s.corner_deg).fold(f64::INFINITY, f64::min),
            bevel(0),
            bevel(1),
            bevel(n.saturating_sub(2)),
            bevel(n.saturating_sub(1)),
        ]
    }

    fn spot(&mut self, part: &[Side]) -> Spot {
        let features = self.features(part);
        let mut spot = Spot {
            len: part.len(),
            own: [0; FEATURES],
            near: [0; FEATURES],
        };
        for (k, value) in features.into_iter().enumerate() {
            let place = value / (self.within[k] * TOLERANCES_WIDE) + SHIFT;
            // The conversion saturates; a cell at the end of the range is only a full one.
            let own = place.floor() as i64;
            // A little more than a tolerance, so that rounding in the division loses nothing.
            const MARGIN: f64 = 1.001 / TOLERANCES_WIDE;
            let into = place - own as f64;
            spot.own[k] = own;
            spot.near[k] = if into < MARGIN {
                own.wrapping_sub(1)
            } else if into > 1.0 - MARGIN {
                own.wrapping_add(1)
            } else {
                own
            };
        }
        spot
    }
}
