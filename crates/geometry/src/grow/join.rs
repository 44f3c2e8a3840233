//! Joining what happens to meet: rim edges at the same place become one edge.

use std::collections::HashMap;

use super::mesh::{Mesh, as_index};
use crate::{Code, Finding, NONE, Place, Point, Unit};

impl Mesh {
    /// Edges with exactly one panel.
    pub(super) fn rim_edges(&self) -> Vec<u32> {
        (0..as_index(self.edges.len()))
            .filter(|e| self.edges[*e as usize].rim_panel().is_some())
            .collect()
    }

    /// Joins those of the given rim edges whose ends lie within `within_mm` of each other, edge to edge. Rims that touch only at a point stay apart.
    ///
    /// Returns whether any were.
    pub(super) fn join_rims(&mut self, rims: &[u32], within_mm: f64, findings: &mut Vec<Finding>) -> bool {
        let mut vertices: Vec<u32> = rims.iter().flat_map(|e| self.edges[*e as usize].ends).collect();
        vertices.sort_unstable();
        vertices.dedup();
        let places = same_places(&vertices, &self.points, within_mm);
        let place = |v: u32| vertices.binary_search(&v).map_or(v, |k| places[k]);
        let mut keyed: Vec<([u32; 2], u32)> = rims
            .iter()
            .map(|&e| {
                let mut ends = self.edges[e as usize].ends.map(place);
                ends.sort_unstable();
                (ends, e)
            })
            .collect();
        keyed.sort_unstable();
        let mut pairs = Vec::new();
        let mut joins: Vec<[u32; 2]> = Vec::new();
        for group in keyed
            .chunk_by(|a, b| a.0 == b.0)
            .filter(|g| 1 < g.len() && g[0].0[0] != g[0].0[1])
        {
            let kept = self.edges[group[0].1 as usize].ends;
            for (_, edge) in &group[1..] {
                let mut ends = self.edges[*edge as usize].ends;
                if place(ends[0]) != place(kept[0]) {
                    ends.reverse();
                }
                pairs.extend(
                    [[kept[0], ends[0]], [kept[1], ends[1]]]
                        .into_iter()
                        .filter(|[a, b]| a != b),
                );
                joins.push([group[0].1, *edge]);
                // Joining closes a fan, also round an end that the two edges had in common already.
                self.suspects.extend(kept);
            }
        }
        self.merge_vertices(&pairs);
        self.gaps |= !joins.is_empty();
        let (mut disagreeing, mut joined) = (Vec::new(), false);
        for [kept, gone] in joins.into_iter().chain(self.edges_between_the_same()) {
            joined = true;
            if self.edges[gone as usize].panels != [NONE; 2] && self.merge_edges(kept, gone) {
                disagreeing.push(kept);
            }
        }
        if !disagreeing.is_empty() {
            let count = disagreeing.len() as f64;
            findings.push(Finding::new(Code::SidesDisagree, Place::Edges(disagreeing)).with(count, None, Unit::Count));
        }
        joined
    }
}

impl Mesh {
    /// Once vertices are zipped or joined, two edges may lie between the same two: they are at one place, and become one.
    fn edges_between_the_same(&self) -> Vec<[u32; 2]> {
        if !self.gaps {
            return Vec::new();
        }
        let mut touched = vec![false; self.points.len()];
        for suspect in &self.suspects {
            touched[*suspect as usize] = true;
        }
        let mut between: Vec<([u32; 2], u32)> = Vec::new();
        for (index, edge) in (0_u32..).zip(&self.edges) {
            let [a, b] = edge.ends;
            if (touched[a as usize] || touched[b as usize]) && edge.panels != [NONE; 2] {
                between.push(([a.min(b), a.max(b)], index));
            }
        }
        between.sort_unstable();
        let groups = between.chunk_by(|p, q| p.0 == q.0).filter(|g| 1 < g.len());
        groups
            .flat_map(|g| g[1..].iter().map(|(_, gone)| [g[0].1, *gone]))
            .collect()
    }
}

/// For each vertex, the first of those given that lies at its place.
///
/// A grid of cells twice the tolerance wide: places within the tolerance are in the same or in neighbouring cells.
pub(super) fn same_places(vertices: &[u32], points: &[Point], within_mm: f64) -> Vec<u32> {
    let cell = (2.0 * within_mm).max(f64::MIN_POSITIVE);
    let key = |p: Point, off: [f64; 3]| {
        let at = p.to_array();
        [0, 1, 2].map(|k| (at[k] / cell + off[k]).floor() as i64)
    };
    // Only looked up, never walked: the order of the map has no influence.
    let mut cells: HashMap<[i64; 3], Vec<u32>> = HashMap::with_capacity(vertices.len());
    let mut places = Vec::with_capacity(vertices.len());
    for &v in vertices {
        let p = points[v as usize];
        let mut found = NONE;
        // The half cells towards which the point leans: eight of them hold all within half a cell.
        for corner in 0..8_u8 {
            let off = [0, 1, 2].map(|k| if corner >> k & 1 == 0 { -0.5 } else { 0.5 });
            let near = cells.get(&key(p, off)).into_iter().flatten();
            for &other in near {
                if points[other as usize].distance(p) <= within_mm && other < found {
                    found = other;
                }
            }
        }
        if found == NONE {
            cells.entry(key(p, [0.0; 3])).or_default().push(v);
            found = v;
        }
        places.push(found);
    }
    places
}
