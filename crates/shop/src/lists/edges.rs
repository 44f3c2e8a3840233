//! `edges.csv`: one row an edge of the shell.

use super::table::{Table, joined};
use crate::Parts;
use crate::marks::edge_letter;

const COLUMNS: [&str; 11] = [
    "edge",
    "panel_1",
    "panel_1_edge",
    "panel_2",
    "panel_2_edge",
    "more",
    "length_mm",
    "dihedral_deg",
    "fold_deg",
    "bevel_deg",
    "kind",
];

/// One row an edge: the panels along it with the letter that it has on each, its length, angles and kind.
///
/// `more` holds panels beyond the second, where such an edge has to be put right first.
#[must_use]
pub fn edges_csv(parts: &Parts) -> String {
    let mut users: Vec<Vec<(u32, u32)>> = vec![Vec::new(); parts.shell_edges];
    for (index, panel) in (0_u32..).zip(&parts.panels) {
        for (slot, edge) in (0_u32..).zip(&panel.edges) {
            if let Some(users) = users.get_mut(edge.edge as usize) {
                users.push((index, slot));
            }
        }
    }
    let mut table = Table::new(COLUMNS.map(str::to_owned).to_vec());
    for (edge, users) in (0_u32..).zip(users) {
        let Some(&(panel, slot)) = users.first() else {
            continue;
        };
        let facts = &parts.panels[panel as usize].edges[slot as usize];
        let mark = |panel: u32| parts.panels[panel as usize].mark;
        table.text(parts.edge_mark(edge));
        for place in 0..2 {
            match users.get(place) {
                Some(&(panel, slot)) => {
                    table.text(mark(panel));
                    table.text(edge_letter(slot as usize));
                }
                None => {
                    table.empty();
                    table.empty();
                }
            }
        }
        let more = users.iter().skip(2);
        table.text(joined(more.map(|&(panel, slot)| {
            format!("{} {}", mark(panel), edge_letter(slot as usize))
        })));
        table.mm(facts.length_mm);
        table.maybe_deg(facts.dihedral_deg);
        table.maybe_deg(facts.fold_deg());
        table.deg(facts.bevel_deg);
        table.text(facts.kind.word());
        table.end_row();
    }
    table.finish()
}
