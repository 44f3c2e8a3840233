//! The readouts as one JSON object. The keys are kept stable: other programs read them.

use serde::Serialize;
use zonewright_shop::{
    parts::{Mate, PartEdge, PartPanel, Parts},
    text::{MM2_PER_M2, MM3_PER_M3},
};

use super::Report;

#[derive(Serialize)]
struct Readouts<'a> {
    name: &'a str,
    kind: &'a str,
    panels: usize,
    vertices: usize,
    edges: usize,
    open_edges: usize,
    rims: usize,
    euler: i64,
    zones: usize,
    families: usize,
    distinct_bevels: usize,
    butted_seams: usize,
    doubled: usize,
    pinches: usize,
    crossings: usize,
    area_m2: f64,
    volume_m3: Option<f64>,
    size_mm: [f64; 3],
    closing_gap_mm: Option<f64>,
    courses: Vec<Course>,
    panel_list: Vec<Panel<'a>>,
}

#[derive(Serialize)]
struct Course {
    course: i32,
    panels: u32,
}

#[derive(Serialize)]
struct Panel<'a> {
    mark: &'a str,
    part_mark: &'a str,
    zones: [u32; 2],
    family: u32,
    hand: &'static str,
    course: i32,
    corners_mm: Vec<[f64; 3]>,
    sides_mm: Vec<f64>,
    acute_deg: Option<f64>,
    area_m2: f64,
    edges: Vec<Edge<'a>>,
}

#[derive(Serialize)]
struct Edge<'a> {
    length_mm: f64,
    mate: Option<&'a str>,
    mate_edge: Option<u32>,
    mates: Vec<Neighbour<'a>>,
    dihedral_deg: Option<f64>,
    bevel_deg: f64,
    kind: &'static str,
}

#[derive(Serialize)]
struct Neighbour<'a> {
    mark: &'a str,
    edge: u32,
    from_mm: f64,
    to_mm: f64,
    dihedral_deg: f64,
}

impl Report {
    /// The readouts as one JSON object, numbers at full precision. `docs/format.md` lists the keys.
    #[must_use]
    pub fn to_json(&self) -> String {
        let (totals, shell) = (&self.totals, &self.shell);
        let courses = shell.courses.iter().map(|c| Course {
            course: c.number,
            panels: c.panels,
        });
        let readouts = Readouts {
            name: &self.name,
            kind: self.kind,
            panels: totals.panels,
            vertices: totals.vertices,
            edges: totals.edges,
            open_edges: totals.open_edges,
            rims: totals.rims,
            euler: totals.euler,
            zones: totals.zones,
            families: self.parts.families.len(),
            distinct_bevels: self.parts.distinct_bevels,
            butted_seams: shell.seams.len(),
            doubled: self.inspection.doubled.len(),
            pinches: shell.pinches.len(),
            crossings: self.inspection.crossings.len(),
            area_m2: totals.area_mm2 / MM2_PER_M2,
            volume_m3: self.volume_mm3().map(|v| v / MM3_PER_M3),
            size_mm: totals.size.to_array(),
            closing_gap_mm: shell.closing_gap,
            courses: courses.collect(),
            panel_list: (0..)
                .zip(&self.parts.panels)
                .map(|(at, part)| self.panel(at, part))
                .collect(),
        };
        // Writing plain numbers and texts to a string cannot fail.
        serde_json::to_string(&readouts).unwrap_or_default()
    }

    fn panel<'a>(&'a self, at: u32, part: &'a PartPanel) -> Panel<'a> {
        let shell = &self.shell;
        Panel {
            mark: part.mark.as_str(),
            part_mark: part.part_mark.as_str(),
            zones: shell.panel_zones(at),
            family: Parts::family_number(part.family),
            hand: part.hand.word(),
            course: shell.panels[at as usize].course,
            corners_mm: part.outline().map(|v| shell.points[v as usize].to_array()).collect(),
            sides_mm: part.sides_mm().collect(),
            acute_deg: part.acute_deg,
            area_m2: part.area_mm2 / MM2_PER_M2,
            edges: part.edges.iter().map(|edge| self.edge(edge)).collect(),
        }
    }

    fn edge<'a>(&'a self, edge: &'a PartEdge) -> Edge<'a> {
        let mark = |mate: &Mate| self.parts.panels[mate.panel as usize].mark.as_str();
        let mate = edge.mate();
        let mates = edge.mates.iter().map(|mate| Neighbour {
            mark: mark(mate),
            edge: mate.edge,
            from_mm: mate.from_mm,
            to_mm: mate.to_mm,
            dihedral_deg: mate.dihedral_deg,
        });
        Edge {
            length_mm: edge.length_mm,
            mate: mate.map(mark),
            mate_edge: mate.map(|m| m.edge),
            mates: mates.collect(),
            dihedral_deg: edge.dihedral_deg,
            bevel_deg: edge.bevel_deg,
            kind: edge.kind.word(),
        }
    }
}
