//! Sheets that touch only at a point keep a vertex each.

use super::{
    mesh::{Mesh, as_index},
    unite::Sets,
};
use crate::{NONE, Pinch};

impl Mesh {
    /// Gives every fan of panels round a suspect vertex a vertex of its own; returns the touches.
    ///
    /// A fan is a set of panels connected by edges at the vertex. The fan of the lowest panel keeps the vertex.
    pub(super) fn part_fans(&mut self, rims: &[u32]) -> Vec<Pinch> {
        let mut suspects = core::mem::take(&mut self.suspects);
        suspects.extend(self.busy_rim_vertices(rims));
        if suspects.is_empty() {
            return Vec::new();
        }
        // One bit a vertex: the whole set stays in the cache while all panels and edges are asked.
        let mut bits = vec![0_u64; self.points.len() / 64 + 1];
        for v in suspects {
            bits[v as usize / 64] |= 1 << (v % 64);
        }
        let suspect = |v: &u32| bits[*v as usize / 64] >> (v % 64) & 1 == 1;
        let mut corners: Vec<(u32, u32)> = Vec::new();
        for (panel, p) in (0_u32..).zip(&self.panels) {
            corners.extend(p.corners.iter().filter(|v| suspect(v)).map(|v| (*v, panel)));
        }
        for tee in &self.tees {
            corners.extend(tee.vertices.iter().filter(|v| suspect(v)).map(|v| (*v, tee.panel)));
        }
        let mut ties: Vec<(u32, u32)> = Vec::new();
        for (edge, e) in (0_u32..).zip(&self.edges) {
            if e.panels != [NONE; 2] {
                ties.extend(e.ends.iter().filter(|v| suspect(v)).map(|v| (*v, edge)));
            }
        }
        corners.sort_unstable();
        corners.dedup();
        ties.sort_unstable();
        let mut pinches = Vec::new();
        let mut ties = ties.chunk_by(|a, b| a.0 == b.0).peekable();
        for fan in corners.chunk_by(|a, b| a.0 == b.0) {
            let vertex = fan[0].0;
            while ties.next_if(|t| t[0].0 < vertex).is_some() {}
            let here = ties.next_if(|t| t[0].0 == vertex).unwrap_or_default();
            let panels: Vec<u32> = fan.iter().map(|(_, panel)| *panel).collect();
            let edges: Vec<u32> = here.iter().map(|(_, edge)| *edge).collect();
            pinches.extend(self.part(vertex, &panels, &edges));
        }
        pinches
    }

    /// A vertex with more than two rim edges may be a touch too.
    fn busy_rim_vertices(&self, rims: &[u32]) -> Vec<u32> {
        let mut ends: Vec<u32> = rims.iter().flat_map(|e| self.edges[*e as usize].ends).collect();
        ends.sort_unstable();
        ends.chunk_by(|a, b| a == b)
            .filter(|c| 2 < c.len())
            .map(|c| c[0])
            .collect()
    }

    fn part(&mut self, vertex: u32, panels: &[u32], edges: &[u32]) -> Option<Pinch> {
        let mut sets = Sets::over((0..as_index(panels.len())).collect());
        let rank = |panel: u32| panels.binary_search(&panel).ok().and_then(|k| u32::try_from(k).ok());
        for &edge in edges {
            let more = self
                .crowded
                .iter()
                .filter(|c| c.edge == edge)
                .flat_map(|c| c.more.iter().copied());
            let at: Vec<u32> = self.edges[edge as usize]
                .panels
                .into_iter()
                .chain(more)
                .filter_map(rank)
                .collect();
            for pair in at.windows(2) {
                sets.unite(pair[0], pair[1]);
            }
        }
        let mut copies: Vec<(u32, u32)> = vec![(0, vertex)];
        for k in 1..u32::try_from(panels.len()).unwrap_or(NONE) {
            let root = sets.find(k);
            if copies.iter().all(|(r, _)| *r != root) {
                copies.push((root, self.add_point(self.points[vertex as usize])));
            }
        }
        if copies.len() == 1 {
            return None;
        }
        let copy_of = |k: u32, sets: &mut Sets| {
            let root = sets.find(k);
            copies.iter().find(|(r, _)| *r == root).map_or(vertex, |(_, v)| *v)
        };
        for (k, &panel) in (0_u32..).zip(panels) {
            let copy = copy_of(k, &mut sets);
            for corner in self.panels[panel as usize].corners.iter_mut().filter(|c| **c == vertex) {
                *corner = copy;
            }
            for inner in self
                .tees
                .iter_mut()
                .filter(|t| t.panel == panel)
                .flat_map(|t| t.vertices.iter_mut())
            {
                if *inner == vertex {
                    *inner = copy;
                }
            }
        }
        for &edge in edges {
            let panel = self.edges[edge as usize].panels.into_iter().find_map(rank);
            let copy = panel.map_or(vertex, |k| copy_of(k, &mut sets));
            for end in self.edges[edge as usize].ends.iter_mut().filter(|e| **e == vertex) {
                *end = copy;
            }
        }
        Some(Pinch {
            vertices: copies.into_iter().map(|(_, v)| v).collect(),
        })
    }
}
