//! `families.csv`: one row a kind of part.

use zonewright_geometry::Shell;
use zonewright_geometry::measure::diagonals;

use super::most_corners;
use super::table::{Table, joined};
use crate::Parts;
use crate::marks::edge_letter;

const FAMILY_COLUMNS: [&str; 13] = [
    "part_mark",
    "family",
    "hand",
    "mirror_part",
    "quantity",
    "corners",
    "side_1_mm",
    "side_2_mm",
    "acute_deg",
    "short_diagonal_mm",
    "long_diagonal_mm",
    "area_each_m2",
    "area_total_m2",
];

const EDGE_COLUMNS: [&str; 4] = ["corner_deg", "length_mm", "bevel_deg", "kind"];

/// One row a family: how many, its shape, its edges with their bevels in order, and where its panels go.
///
/// Dimensions are those of the pattern, the family's first panel; edges go counter-clockwise from outside, and a corner
/// is the one that the edge leaves. The total area adds up the panels one by one.
#[must_use]
pub fn families_csv(shell: &Shell, parts: &Parts) -> String {
    let mut header: Vec<String> = FAMILY_COLUMNS.map(str::to_owned).to_vec();
    for edge in 0..most_corners(parts) {
        let letter = edge_letter(edge);
        header.extend(EDGE_COLUMNS.map(|column| format!("{letter}_{column}")));
    }
    header.push("place_marks".to_owned());
    let columns = header.len();
    let mut table = Table::new(header);
    for (index, family) in (0_u32..).zip(&parts.families) {
        let Some(&first) = family.panels.first() else {
            continue;
        };
        let pattern = &parts.panels[first as usize];
        let [a, b, c, _] = shell.corner_points(first);
        let [short, long] = diagonals(shell, first);
        table.text(family.mark);
        table.count(Parts::family_number(index) as usize);
        table.text(family.hand.word());
        match family.twin.and_then(|t| parts.families.get(t as usize)) {
            Some(twin) => table.text(twin.mark),
            None => table.empty(),
        }
        table.count(family.panels.len());
        table.count(pattern.edges.len());
        table.mm(a.distance(b));
        table.mm(b.distance(c));
        table.maybe_deg(pattern.acute_deg);
        table.mm(short);
        table.mm(long);
        table.m2(pattern.area_mm2);
        table.m2(family.panels.iter().map(|&p| parts.panels[p as usize].area_mm2).sum());
        for edge in &pattern.edges {
            table.deg(edge.corner_deg);
            table.mm(edge.length_mm);
            table.deg(edge.bevel_deg);
            table.text(edge.kind.word());
        }
        table.pad_to(columns - 1);
        table.text(joined(family.panels.iter().map(|&p| parts.panels[p as usize].mark)));
        table.end_row();
    }
    table.finish()
}
