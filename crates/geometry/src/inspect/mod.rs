//! What is wrong with a grown shell: crossings, doubled panels, near misses.
//!
//! Growing does not do this; it follows when the shell is still.
//!
//! Two panels cross when their insides meet: when they would have to be moved by more than the contact tolerance to part
//! them. A corner on a face, an edge on an edge, an edge on a face from one side is contact, not a crossing. Panels that
//! share an edge cross only when one is folded flat onto the other. Where an edge lies in the inside of a panel and the edge's
//! own panels are on opposite sides of it, no two insides meet, and yet the sheet passes through: that is a [`Passage`],
//! kept apart so that crossings count what their definition says.

mod contact;
mod near;
mod newcomers;
mod pair;
mod plate;
mod report;
pub(crate) mod tree;

use contact::Contact;
pub use newcomers::crossings_of_new;
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

/// An edge that lies in the inside of a panel, with its own panels on opposite sides of that panel.
#[derive(Clone, Copy, PartialEq, Eq, PartialOrd, Ord, Debug)]
pub struct Passage {
    /// The edge.
    pub edge: u32,
    /// The panel that it lies in.
    pub panel: u32,
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
    /// Edges along which a sheet passes through a panel without any crossing there, sorted.
    pub passages: Vec<Passage>,
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
    Inspection {
        near_misses: near::near_misses(shell, tolerances),
        ..meetings(shell)
    }
}

impl Inspection {
    /// Whether the shell passes through itself or lies on itself anywhere, so that what it encloses is no volume.
    #[must_use]
    pub fn crosses_itself(&self) -> bool {
        !self.crossings.is_empty() || !self.passages.is_empty() || !self.doubled.is_empty()
    }
}

/// Everything but the near misses.
fn meetings(shell: &Shell) -> Inspection {
    let contact = contact_tolerance(shell);
    let panels = 0_u32..u32::try_from(shell.panels.len()).unwrap_or(u32::MAX);
    let plates = panels.map(|p| Plate::new(shell, p, contact));
    let whole = plates.filter(Plate::is_whole);
    let tree = Tree::new(whole.map(|p| (p.panel, p.extent())).collect());
    // Along the curve, so that panels which are close are also close in memory.
    let plates: Vec<Plate> = tree.order().map(|p| Plate::new(shell, p, contact)).collect();

    let (mut crossing, mut doubled) = (Vec::new(), Vec::new());
    let mut contacts = Vec::new();
    tree.pairs(|i, j| {
        let [a, b] = [&plates[i], &plates[j]];
        let pair = [a.panel.min(b.panel), a.panel.max(b.panel)];
        match pair::meet(a, b) {
            Meeting::Apart => {}
            Meeting::Crossing => crossing.push(Crossing {
                panels: pair,
                shares_corner: a.shares_place(b),
            }),
            Meeting::Doubled => doubled.push(pair),
            Meeting::Lies { first, side, above } => {
                let [panel, on] = if first { [a.panel, b.panel] } else { [b.panel, a.panel] };
                contacts.push(Contact { panel, side, on, above });
            }
        }
    });
    crossing.sort_unstable();
    doubled.sort_unstable();
    Inspection {
        crossings: crossing,
        passages: contact::passages(shell, contact, &contacts),
        doubled,
        near_misses: Vec::new(),
    }
}

/// The depth up to which panels are in contact, in millimetres.
fn contact_tolerance(shell: &Shell) -> f64 {
    let finite = || shell.points.iter().filter(|p| p.is_finite());
    let all = finite().fold(Extent::NOTHING, |extent, p| extent.and(*p));
    let farthest = finite().fold(0.0, |far: f64, p| far.max(p.0.abs().max_element()));
    let size = (all.most - all.least).max(Vector::ZERO).length();
    CONTACT * size + PLACE_ROUNDING * farthest
}
