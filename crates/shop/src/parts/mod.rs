//! Parts: what the report, the lists and the window share about the panels of a shell.

mod build;
mod check;
mod mates;
#[cfg(test)]
mod tests;

use zonewright_geometry::Shell;

use crate::bevel::EdgeKind;
use crate::family::{FamilyTolerance, Hand};
use crate::marks::{Mark, edge_letter, edge_mark};

pub use mates::{Mate, Mates};

/// All parts of a shell.
#[derive(Clone, PartialEq, Debug, Default)]
pub struct Parts {
    /// One for each of [`Shell::panels`], in that order.
    pub panels: Vec<PartPanel>,
    /// The families, in the order in which their first panels come.
    pub families: Vec<Family>,
    /// How many different saw settings the bevelled edges ask for. Rims and flat edges are cut square and not counted;
    /// a ridge and a valley of the same tilt are two settings.
    pub distinct_bevels: usize,
    /// How many edges the shell has; edge marks have as many digits as the last one needs.
    pub shell_edges: usize,
}

/// A panel as a part.
#[derive(Clone, PartialEq, Debug)]
pub struct PartPanel {
    /// The place mark: its address on the shell.
    pub mark: Mark,
    /// The part mark: its family's name, with the hand.
    pub part_mark: Mark,
    /// Its family, by index in [`Parts::families`].
    pub family: u32,
    /// Its hand.
    pub hand: Hand,
    /// The angle in the acute corners, in degrees, up to 90; none unless the panel is a parallelogram.
    pub acute_deg: Option<f64>,
    /// Area in square millimetres.
    pub area_mm2: f64,
    /// One a corner of [`Shell::outline`], counter-clockwise from outside, in that order.
    pub edges: Vec<PartEdge>,
}

/// A corner of a panel, and the edge that leaves it.
#[derive(Clone, PartialEq, Debug)]
pub struct PartEdge {
    /// The edge, by index in [`Shell::edges`].
    pub edge: u32,
    /// The corner that it leaves, by index in [`Shell::points`].
    pub corner: u32,
    /// The angle inside at that corner, in degrees; 180 where a neighbour's corner butts against the side.
    pub corner_deg: f64,
    /// Its length, in millimetres.
    pub length_mm: f64,
    /// The panels on the other side.
    pub mates: Mates,
    /// Dihedral angle, measured inside, in degrees from 0 to 360; none unless there is exactly one mate.
    pub dihedral_deg: Option<f64>,
    /// Tilt of the saw from the square cut, in degrees: ridges positive, valleys negative; 0 without exactly one mate.
    pub bevel_deg: f64,
    /// What kind of edge it is.
    pub kind: EdgeKind,
}

impl PartEdge {
    /// The mate, when there is exactly one.
    #[must_use]
    pub fn mate(&self) -> Option<&Mate> {
        match &*self.mates {
            [mate] => Some(mate),
            _ => None,
        }
    }

    /// 180 less the dihedral angle, in degrees; none unless there is exactly one mate.
    #[must_use]
    pub fn fold_deg(&self) -> Option<f64> {
        self.dihedral_deg.map(crate::bevel::fold_deg)
    }
}

impl PartPanel {
    /// The corners after T-splits, by index in [`Shell::points`].
    pub fn outline(&self) -> impl ExactSizeIterator<Item = u32> + '_ {
        self.edges.iter().map(|e| e.corner)
    }

    /// The sides, one a corner, from it to the next, in millimetres.
    pub fn sides_mm(&self) -> impl ExactSizeIterator<Item = f64> + '_ {
        self.edges.iter().map(|e| e.length_mm)
    }

    /// The angles inside at the corners, in degrees.
    pub fn corner_angles_deg(&self) -> impl ExactSizeIterator<Item = f64> + '_ {
        self.edges.iter().map(|e| e.corner_deg)
    }
}

/// A family: all panels that are the same part.
#[derive(Clone, PartialEq, Debug)]
pub struct Family {
    /// The part mark: `P3`, or `P3L` and `P3R` for mirror images.
    pub mark: Mark,
    /// The number in the mark, shared with the mirror image.
    pub number: u32,
    /// Its hand.
    pub hand: Hand,
    /// The family of the mirror image, where the shell has one.
    pub twin: Option<u32>,
    /// Its panels, ascending; the first one is the pattern for the others.
    pub panels: Vec<u32>,
}

impl Parts {
    /// Works out the parts of a shell, in time about linear in its panels.
    #[must_use]
    pub fn new(shell: &Shell, within: &FamilyTolerance) -> Self {
        build::build(shell, within)
    }

    /// The panel with this place mark.
    #[must_use]
    pub fn panel_marked(&self, mark: &str) -> Option<u32> {
        let at = self.panels.iter().position(|p| p.mark == mark)?;
        u32::try_from(at).ok()
    }

    /// The mark of an edge of the shell.
    #[must_use]
    pub fn edge_mark(&self, edge: u32) -> Mark {
        edge_mark(edge, self.shell_edges)
    }

    /// A family's number in the lists and the report: 1 for the first. Every family has its own, mirror images too.
    #[must_use]
    pub const fn family_number(family: u32) -> u32 {
        family + 1
    }

    /// Which edge of the family's pattern lies at edge 0 of this panel.
    ///
    /// Panels of a family are turned against each other on the shell; the one set of pattern dimensions holds for all.
    #[must_use]
    pub fn pattern_turn(&self, panel: u32) -> usize {
        let panel = &self.panels[panel as usize];
        let pattern = &self.panels[self.families[panel.family as usize].panels[0] as usize];
        let count = panel.edges.len();
        let off = |turn: usize| {
            let pairs = panel
                .edges
                .iter()
                .enumerate()
                .map(|(k, own)| (own, &pattern.edges[(k + turn) % count]));
            // One degree weighs as much as two millimetres, as in the default tolerances.
            pairs.fold(0.0_f64, |worst, (own, theirs)| {
                worst
                    .max((own.length_mm - theirs.length_mm).abs() / 2.0)
                    .max((own.corner_deg - theirs.corner_deg).abs())
                    .max((own.bevel_deg - theirs.bevel_deg).abs())
            })
        };
        // Turns that differ by rounding only are the same: the first of them counts.
        const ROUNDING: f64 = 1e-6;
        let mut best = (0, off(0));
        for turn in 1..count {
            let this = off(turn);
            if this < best.1 - ROUNDING {
                best = (turn, this);
            }
        }
        best.0
    }

    /// The letter of an edge of a panel.
    #[must_use]
    pub fn edge_letter(edge: usize) -> String {
        edge_letter(edge)
    }
}
