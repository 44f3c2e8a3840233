//! Edges that lie in panels.

use super::{pair::length_inside, plate::Plate};
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

/// Pairs of panels that cross because an edge lies in a panel and the edge's panels are on opposite sides of it.
pub(super) fn passing_through(shell: &Shell, plates: &[Plate], contacts: &[Contact]) -> Vec<[u32; 2]> {
    if contacts.is_empty() {
        return Vec::new();
    }
    let borders = Borders::new(shell);
    // The edge, the panel that it lies in, and what comes there.
    let mut touches = Vec::new();
    for contact in contacts {
        let on = &plates[contact.on as usize];
        let tolerance = on.tolerance.max(plates[contact.panel as usize].tolerance);
        for &edge in side_edges(shell, &borders, contact.panel, contact.side) {
            if edge == NONE {
                continue;
            }
            let ends = shell.edges[edge as usize].ends.map(|v| shell.points[v as usize]);
            if length_inside(on, ends, tolerance) > tolerance {
                touches.push((edge, contact.on, contact.panel, contact.above));
            }
        }
    }
    touches.sort_unstable();
    let same_place = |one: &(u32, u32, u32, bool), other: &(u32, u32, u32, bool)| (one.0, one.1) == (other.0, other.1);
    let through = |group: &&[(u32, u32, u32, bool)]| group.iter().any(|t| t.3) && group.iter().any(|t| !t.3);
    let groups = touches.chunk_by(same_place).filter(through);
    groups
        .flatten()
        .map(|&(_, on, panel, _)| [on.min(panel), on.max(panel)])
        .collect()
}

/// The edges along a side of a panel.
fn side_edges<'a>(shell: &Shell, borders: &'a Borders, panel: u32, side: u8) -> &'a [u32] {
    let split = |side: u8| shell.tee_vertices(panel, side).len();
    let before: usize = (0..side).map(|s| 1 + split(s)).sum();
    &borders.edges(panel)[before..=before + split(side)]
}
