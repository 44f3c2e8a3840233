//! From the shell to its parts.

use std::collections::BTreeMap;

use zonewright_geometry::measure::{Borders, dihedral, edge_length};
use zonewright_geometry::{NONE, Shell, Vector};

use super::{Family, Mate, Mates, PartEdge, PartPanel, Parts};
use crate::bevel::{EdgeKind, bevel_deg};
use crate::family::{FamilyTolerance, Side, Sorter, distinct_settings};
use crate::marks::{part_mark, place_marks};

/// A panel's edge: the panel, and the index in its outline.
type Slot = (u32, u32);

/// What is known of an edge of the shell, the same for all its panels.
struct Shared {
    length_mm: f64,
    dihedral_deg: Option<f64>,
    slots: [Slot; 2],
}

const NO_SLOT: Slot = (NONE, NONE);

pub(super) fn build(shell: &Shell, within: &FamilyTolerance) -> Parts {
    let borders = Borders::new(shell);
    let (shared, crowded) = shared_edges(shell, &borders);
    let marks = place_marks(shell);
    let mut sorter = Sorter::new(*within);
    let mut sides: Vec<Side> = Vec::new();
    let mut panels = Vec::with_capacity(shell.panels.len());
    for (panel, mark) in (0_u32..).zip(marks) {
        let area_vector = shell.area_vector(panel);
        let edges = panel_edges(shell, panel, borders.edges(panel), &shared, &crowded, area_vector);
        sides.clear();
        sides.extend(edges.iter().map(|e| Side {
            corner_deg: e.corner_deg,
            side_mm: e.length_mm,
            bevel_deg: e.bevel_deg,
        }));
        let corner = edges.first().map_or(90.0, |e| e.corner_deg);
        panels.push(PartPanel {
            mark,
            part_mark: mark,
            family: sorter.place(&sides),
            hand: crate::family::Hand::None,
            acute_deg: Some(corner.min(180.0 - corner)),
            area_mm2: area_vector.length(),
            edges,
        });
    }
    let families = families(&mut panels, &sorter);
    let distinct_bevels = settings(&panels, &families, within.bevel_deg);
    Parts {
        panels,
        families,
        distinct_bevels,
        shell_edges: shell.edges.len(),
    }
}

/// The shared facts of each edge, and all slots of the crowded ones.
fn shared_edges(shell: &Shell, borders: &Borders) -> (Vec<Shared>, BTreeMap<u32, Vec<Slot>>) {
    let mut shared: Vec<Shared> = (0_u32..)
        .zip(&shell.edges)
        .map(|(edge, _)| Shared {
            length_mm: edge_length(shell, edge),
            dihedral_deg: dihedral(shell, edge).map(f64::to_degrees),
            slots: [NO_SLOT; 2],
        })
        .collect();
    let mut crowded: BTreeMap<u32, Vec<Slot>> = shell.crowded.iter().map(|c| (c.edge, Vec::new())).collect();
    for panel in 0_u32.. {
        if panel as usize == shell.panels.len() {
            break;
        }
        for (slot, &edge) in (0_u32..).zip(borders.edges(panel)) {
            let Some(facts) = shared.get_mut(edge as usize) else {
                continue;
            };
            if !crowded.is_empty()
                && let Some(all) = crowded.get_mut(&edge)
            {
                all.push((panel, slot));
            } else if let Some(free) = facts.slots.iter_mut().find(|s| **s == NO_SLOT) {
                *free = (panel, slot);
            }
        }
    }
    (shared, crowded)
}

fn panel_edges(
    shell: &Shell,
    panel: u32,
    borders: &[u32],
    shared: &[Shared],
    crowded: &BTreeMap<u32, Vec<Slot>>,
    area_vector: Vector,
) -> Vec<PartEdge> {
    let [a, b, _, d] = shell.corner_points(panel);
    let first = area_vector.length().atan2((b - a).dot(d - a)).to_degrees();
    let corners = shell.panels[panel as usize].corners;
    let mut edges = Vec::with_capacity(borders.len());
    let mut put = |corner: u32, corner_deg: f64| {
        let slot = edges.len() as u32;
        let edge = borders.get(slot as usize).copied().unwrap_or(NONE);
        edges.push(part_edge(
            shell,
            (panel, slot),
            corner,
            corner_deg,
            edge,
            shared,
            crowded,
        ));
    };
    for (side, corner) in (0_u8..).zip(corners) {
        put(corner, if side % 2 == 0 { first } else { 180.0 - first });
        if !shell.tees.is_empty() {
            for &tee in shell.tee_vertices(panel, side) {
                put(tee, 180.0);
            }
        }
    }
    edges
}

fn part_edge(
    shell: &Shell,
    slot: Slot,
    corner: u32,
    corner_deg: f64,
    edge: u32,
    shared: &[Shared],
    crowded: &BTreeMap<u32, Vec<Slot>>,
) -> PartEdge {
    let mut part = PartEdge {
        edge,
        corner,
        corner_deg,
        length_mm: 0.0,
        mates: Mates::None,
        dihedral_deg: None,
        bevel_deg: 0.0,
        kind: EdgeKind::Rim,
    };
    let Some(facts) = shared.get(edge as usize) else {
        // A border that no edge runs along: a grown shell has none.
        return part;
    };
    part.length_mm = facts.length_mm;
    let whole = |(panel, edge): Slot, dihedral_deg: f64| Mate {
        panel,
        edge,
        from_mm: 0.0,
        to_mm: facts.length_mm,
        dihedral_deg,
    };
    if let Some(all) = crowded.get(&edge).filter(|_| !crowded.is_empty()) {
        let others = all.iter().filter(|&&s| s != slot);
        let mates = others
            .map(|&s| whole(s, dihedral_between(shell, slot, s, edge)))
            .collect();
        part.mates = Mates::Many(mates);
        part.kind = EdgeKind::Flat;
        return part;
    }
    let [one, other] = facts.slots;
    let mate = if one == slot { other } else { one };
    if let (Some(dihedral_deg), true) = (facts.dihedral_deg, mate != NO_SLOT) {
        part.mates = Mates::One([whole(mate, dihedral_deg)]);
        part.dihedral_deg = Some(dihedral_deg);
        part.bevel_deg = bevel_deg(dihedral_deg);
        part.kind = EdgeKind::of_dihedral(dihedral_deg);
    }
    part
}

/// Dihedral angle between two of several panels at an edge, inside the first, in degrees from 0 to 360.
///
/// The turn, about the edge, from the direction in which the first panel leaves it, by way of its inside, to that of the other.
fn dihedral_between(shell: &Shell, (one, _): Slot, (other, _): Slot, edge: u32) -> f64 {
    let [a, b] = shell.edges[edge as usize].ends.map(|v| shell.points[v as usize]);
    let along = (b - a).normalize_or_zero();
    // Into a panel, square to the edge: towards its middle.
    let into = |panel: u32| {
        let [p, _, q, _] = shell.corner_points(panel);
        let middle = p + (q - p) * 0.5 - a;
        (middle - along * middle.dot(along)).normalize_or_zero()
    };
    let (from, to) = (into(one), into(other));
    let inside = -shell.area_vector(one).normalize_or_zero();
    to.dot(inside).atan2(to.dot(from)).to_degrees().rem_euclid(360.0)
}

fn families(panels: &mut [PartPanel], sorter: &Sorter) -> Vec<Family> {
    let mut families: Vec<Family> = (sorter.kinds().iter())
        .map(|kind| Family {
            mark: part_mark(kind.number, kind.hand),
            number: kind.number,
            hand: kind.hand,
            twin: kind.twin,
            panels: Vec::new(),
        })
        .collect();
    for (index, panel) in (0_u32..).zip(panels) {
        let family = &mut families[panel.family as usize];
        family.panels.push(index);
        panel.part_mark = family.mark;
        panel.hand = family.hand;
    }
    families
}

/// The first panel of a family stands for all: one setting serves the whole family.
fn settings(panels: &[PartPanel], families: &[Family], within: f64) -> usize {
    let patterns = families.iter().filter_map(|f| f.panels.first());
    let edges = patterns.flat_map(|&p| &panels[p as usize].edges);
    distinct_settings(
        edges.filter(|e| e.kind.is_bevelled()).map(|e| e.bevel_deg).collect(),
        within,
    )
}
