//! `panels.csv`: one row a panel.

use zonewright_geometry::Shell;
use zonewright_geometry::measure::diagonals;

use super::most_corners;
use super::table::{Table, joined};
use crate::marks::{edge_letter, zone_mark};
use crate::{PartEdge, PartPanel, Parts};

/// What is said of a panel as a whole, and in what unit.
const PANEL_COLUMNS: [&str; 14] = [
    "mark",
    "part_mark",
    "family",
    "hand",
    "zones",
    "course",
    "corners",
    "side_1_mm",
    "side_2_mm",
    "acute_deg",
    "short_diagonal_mm",
    "long_diagonal_mm",
    "area_m2",
    "pattern_edge",
];

/// What is said of each of its edges, behind the edge's letter.
const EDGE_COLUMNS: [&str; 8] = [
    "edge",
    "corner_deg",
    "length_mm",
    "mate",
    "mate_edge",
    "dihedral_deg",
    "bevel_deg",
    "kind",
];

/// One row a panel: its marks, its shape, and its edges in order, counter-clockwise from outside.
///
/// `side_1_mm` and `side_2_mm` are the sides of the whole parallelogram; edges are what is left of sides after T-splits.
/// `pattern_edge` is the edge of the family's pattern that lies at this panel's edge a.
#[must_use]
pub fn panels_csv(shell: &Shell, parts: &Parts) -> String {
    let corners = most_corners(parts);
    let mut header: Vec<String> = PANEL_COLUMNS.map(str::to_owned).to_vec();
    for edge in 0..corners {
        let letter = edge_letter(edge);
        header.extend(EDGE_COLUMNS.map(|column| format!("{letter}_{column}")));
    }
    let mut table = Table::new(header);
    for (index, panel) in (0_u32..).zip(&parts.panels) {
        panel_cells(&mut table, shell, parts, index, panel);
        for edge in &panel.edges {
            edge_cells(&mut table, parts, edge);
        }
        table.end_row();
    }
    table.finish()
}

fn panel_cells(table: &mut Table, shell: &Shell, parts: &Parts, index: u32, panel: &PartPanel) {
    let [a, b, c, _] = shell.corner_points(index);
    let [short, long] = diagonals(shell, index);
    table.text(panel.mark);
    table.text(panel.part_mark);
    table.count(Parts::family_number(panel.family) as usize);
    table.text(panel.hand.word());
    table.text(joined(shell.panel_zones(index).iter().map(|&z| zone_mark(z))));
    table.whole(shell.panels[index as usize].course);
    table.count(panel.edges.len());
    table.mm(a.distance(b));
    table.mm(b.distance(c));
    table.maybe_deg(panel.acute_deg);
    table.mm(short);
    table.mm(long);
    table.m2(panel.area_mm2);
    table.text(edge_letter(parts.pattern_turn(index)));
}

fn edge_cells(table: &mut Table, parts: &Parts, edge: &PartEdge) {
    table.text(parts.edge_mark(edge.edge));
    table.deg(edge.corner_deg);
    table.mm(edge.length_mm);
    table.text(joined(edge.mates.iter().map(|m| parts.panels[m.panel as usize].mark)));
    table.text(joined(edge.mates.iter().map(|m| edge_letter(m.edge as usize))));
    table.maybe_deg(edge.dihedral_deg);
    table.deg(edge.bevel_deg);
    table.text(edge.kind.word());
}
