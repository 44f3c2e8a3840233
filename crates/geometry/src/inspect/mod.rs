//! What is wrong with a grown shell: crossings, doubled panels, near misses.
//!
//! Growing does not do this; it follows when the shell is still.
//!
//! Two panels cross when their insides meet: when they would have to be moved by more than the contact tolerance to part
//! them. A corner on a face, an edge on an edge, an edge on a face from one side is contact, not a crossing. Panels that
//! share an edge cross only when one is folded flat onto the other. Where an edge lies in a panel and the edge's two panels
//! are on opposite sides of it, the sheet passes through the panel, and both are reported to cross it.

mod contact;
mod near;
mod pair;
mod plate;
mod report;
mod tree;

use contact::Contact;
use pair::Meeting;
use plate::Plate;
pub use report::LISTED;
use tree::{Extent, Tree};

use crate::{Shell, Tolerances, Vector};

/// Two panels that pass through each other.
#[derive(Clone, Copy, PartialEq, Eq, PartialOrd, Ord, Debug)]
pub struct Crossing {
    /// The two panels, the lower index first.
    pub panels: [u32; 2],
    /// Whether they share a corner.
    pub shares_corner: bool,
}

/// Two rim edges, or rim vertices, that nearly meet.
#[derive(Clone, Copy, PartialEq, Debug)]
pub struct NearMiss {
    /// The two rim vertices, the lower index first; of rim edges that nearly meet, the ends that are nearest.
    pub vertices: [u32; 2],
    /// The distance of the vertices or of the edges, in millimetres.
    pub gap_mm: f64,
}

/// All that an inspection finds.
#[derive(Clone, PartialEq, Debug, Default)]
pub struct Inspection {
    /// Panels that pass through each other, sorted.
    pub crossings: Vec<Crossing>,
    /// Panels that lie on the same place, in pairs, sorted. They are not counted as crossings.
    pub doubled: Vec<[u32; 2]>,
    /// Rims that nearly meet, sorted.
    pub near_misses: Vec<NearMiss>,
}

/// Panels that reach into each other by less than this part of the shell's size are only in contact.
///
/// Grown places are sums of edge vectors and carry rounding of about 1e-12 of the size, in long words; a thousand times
/// that is still a millionth of a millimetre on a shell of a metre.
pub const CONTACT: f64 = 1e-9;

/// Rounding of places that are far from the origin, as a part of their distance: some tens of the last bit.
const PLACE_ROUNDING: f64 = 64.0 * f64::EPSILON;

/// Inspects a shell.
///
/// Panels without area, or with a place that is not finite, are passed over. The result does not depend on the order of hashes or
/// threads.
#[must_use]
pub fn inspect(shell: &Shell, tolerances: &Tolerances) -> Inspection {
    let (crossings, doubled) = crossings(shell);
    Inspection {
        crossings,
        doubled,
        near_misses: near::near_misses(shell, tolerances),
    }
}

/// Pairs of panels that cross, and pairs that are doubled, each sorted.
fn crossings(shell: &Shell) -> (Vec<Crossing>, Vec<[u32; 2]>) {
    let contact = contact_tolerance(shell);
    let panels = || 0_u32..u32::try_from(shell.panels.len()).unwrap_or(u32::MAX);
    let plates: Vec<Plate> = panels().map(|p| Plate::new(shell, p, contact)).collect();
    let whole = panels().filter(|&p| plates[p as usize].is_whole());
    let tree = Tree::new(whole.map(|p| (p, plates[p as usize].extent())).collect());

    let [mut crossing, mut doubled] = [Vec::new(), Vec::new()];
    let mut contacts = Vec::new();
    tree.pairs(|one, other| {
        let pair = [one.min(other), one.max(other)];
        let [a, b] = pair.map(|p| &plates[p as usize]);
        match pair::meet(a, b) {
            Meeting::Apart => {}
            Meeting::Crossing => crossing.push(pair),
            Meeting::Doubled => doubled.push(pair),
            Meeting::Lies { first, side, above } => {
                let [panel, on] = if first { pair } else { [pair[1], pair[0]] };
                contacts.push(Contact { panel, side, on, above });
            }
        }
    });
    crossing.extend(contact::passing_through(shell, &plates, &contacts));
    crossing.sort_unstable();
    crossing.dedup();
    doubled.sort_unstable();
    let crossings = crossing.into_iter().map(|panels| {
        let [a, b] = panels.map(|p| &plates[p as usize]);
        Crossing {
            panels,
            shares_corner: a.shares_place(b),
        }
    });
    (crossings.collect(), doubled)
}

/// The depth up to which panels are in contact, in millimetres.
fn contact_tolerance(shell: &Shell) -> f64 {
    let finite = || shell.points.iter().filter(|p| p.is_finite());
    let all = finite().fold(Extent::NOTHING, |extent, p| extent.and(*p));
    let farthest = finite().fold(0.0, |far: f64, p| far.max(p.0.abs().max_element()));
    let size = (all.most - all.least).max(Vector::ZERO).length();
    CONTACT * size + PLACE_ROUNDING * farthest
}
