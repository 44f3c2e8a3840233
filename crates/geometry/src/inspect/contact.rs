//! Edges that lie in panels.

use super::{Passage, pair::length_inside, plate::Plate};
use crate::{NONE, Shell, measure::Borders};

/// A side of a panel that lies in the inside of another.
pub(super) struct Contact {
    /// The panel with the side.
    pub(super) panel: u32,
    /// The side, 0 to 3.
    pub(super) side: u8,
    /// The panel that it lies in.
    pub(super) on: u32,
    /// Whether the rest of its panel is above that one.
    pub(super) above: bool,
}

/// Edges that lie in panels with their own panels on opposite sides, sorted.
pub(super) fn passages(shell: &Shell, tolerance: f64, contacts: &[Contact]) -> Vec<Passage> {
    if contacts.is_empty() {
        return Vec::new();
    }
    let borders = Borders::new(shell);
    // The edge, the panel that it lies in, and whether what comes there comes from above.
    let mut touches = Vec::new();
    for contact in contacts {
        let [on, of] = [contact.on, contact.panel].map(|p| Plate::new(shell, p, tolerance));
        let tolerance = on.tolerance.max(of.tolerance);
        for &edge in side_edges(shell, &borders, contact.panel, contact.side) {
            if edge == NONE {
                continue;
            }
            let ends = shell.edges[edge as usize].ends.map(|v| shell.points[v as usize]);
            if length_inside(&on, ends, tolerance) > tolerance {
                touches.push((edge, contact.on, contact.above));
            }
        }
    }
    touches.sort_unstable();
    touches.dedup();
    // What is left twice comes from both sides.
    let both = |two: &[(u32, u32, bool)]| (two[0].0, two[0].1) == (two[1].0, two[1].1);
    let passages = touches.windows(2).filter(|two| both(two));
    passages
        .map(|two| Passage {
            edge: two[0].0,
            panel: two[0].1,
        })
        .collect()
}

/// The edges along a side of a panel.
fn side_edges<'a>(shell: &Shell, borders: &'a Borders, panel: u32, side: u8) -> &'a [u32] {
    let split = |side: u8| shell.tee_vertices(panel, side).len();
    let before: usize = (0..side).map(|s| 1 + split(s)).sum();
    &borders.edges(panel)[before..=before + split(side)]
}
