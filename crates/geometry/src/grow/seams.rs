//! Butted seams: where panels meet along parts of their sides, the sides are split.

use std::collections::BTreeMap;

use super::{mesh::Mesh, unite::Sets};
use crate::{NONE, Seam, Tee, Vector};

/// An edge of a line of edges, as places along the line.
struct Stretch {
    edge: u32,
    from: usize,
    to: usize,
}

impl Mesh {
    /// Splits the edges that lie on one line at each other's ends.
    ///
    /// `within_mm`: ends nearer than this along the line are one vertex.
    pub(super) fn split_seams(&mut self, within_mm: f64) {
        let slides = core::mem::take(&mut self.slides);
        if slides.is_empty() {
            return;
        }
        self.gaps = true;
        let mut sets = Sets::over(slides.iter().flatten().copied().collect());
        for [first, rest @ ..] in &slides {
            for other in rest {
                sets.unite(*first, *other);
            }
        }
        let mut lines: BTreeMap<u32, Vec<u32>> = BTreeMap::new();
        let mut members: Vec<u32> = slides.into_iter().flatten().collect();
        members.sort_unstable();
        members.dedup();
        for edge in members {
            if self.edges[edge as usize].panels != [NONE; 2] {
                lines.entry(sets.find(edge)).or_default().push(edge);
            }
        }
        for line in lines.values() {
            self.split_line(line, within_mm);
        }
        self.tees.sort_by_key(|t| (t.panel, t.side));
    }

    fn split_line(&mut self, line: &[u32], within_mm: f64) {
        let vertices = self.vertices_along(line, within_mm);
        let place = |v: u32| {
            vertices
                .binary_search_by_key(&v, |(vertex, _)| *vertex)
                .map(|k| vertices[k].1)
        };
        let stretches: Vec<Stretch> = line
            .iter()
            .filter_map(|&edge| {
                let [a, b] = self.edges[edge as usize].ends;
                Some(Stretch {
                    edge,
                    from: place(a).ok()?,
                    to: place(b).ok()?,
                })
            })
            .collect();
        let mut order: Vec<(usize, u32)> = vertices.iter().map(|(v, k)| (*k, *v)).collect();
        order.sort_unstable();
        order.dedup();
        let mut pieces: BTreeMap<usize, u32> = BTreeMap::new();
        let mut has_tee = false;
        for stretch in &stretches {
            let [low, high] = [stretch.from.min(stretch.to), stretch.from.max(stretch.to)];
            let panels = self.edges[stretch.edge as usize].panels;
            self.edges[stretch.edge as usize].panels = [NONE; 2];
            for (slot, panel) in panels.into_iter().enumerate().filter(|(_, p)| *p != NONE) {
                if high - low > 1 {
                    has_tee = true;
                    let inner: Vec<u32> = (low + 1..high).map(|k| order[k].1).collect();
                    let tee = self.tee(panel, stretch.edge, inner);
                    self.tees.extend(tee);
                }
                for piece in low..high {
                    let ends = [order[piece].1, order[piece + 1].1];
                    let edge = *pieces.entry(piece).or_insert_with(|| self.add_edge(ends));
                    // A piece runs with the line; the panel keeps its way along it.
                    let slot = slot ^ usize::from(stretch.to < stretch.from);
                    let other = if self.edges[edge as usize].panels[slot] == NONE {
                        slot
                    } else {
                        1 - slot
                    };
                    self.put_panel(edge, other, panel);
                }
            }
        }
        if has_tee {
            self.seams.push(Seam {
                vertices: order.into_iter().map(|(_, v)| v).collect(),
            });
        }
    }

    /// The vertices of a line with their rank along it, sorted by vertex; those at one place are merged.
    fn vertices_along(&mut self, line: &[u32], within_mm: f64) -> Vec<(u32, usize)> {
        let ends = |mesh: &Self, edge: u32| mesh.edges[edge as usize].ends;
        let [a, b] = ends(self, line[0]);
        let origin = self.points[a as usize];
        let along: Vector = (self.points[b as usize] - origin).normalize_or_zero();
        let mut placed: Vec<(f64, u32)> = line
            .iter()
            .flat_map(|&edge| ends(self, edge))
            .map(|v| ((self.points[v as usize] - origin).dot(along), v))
            .collect();
        placed.sort_by(|a, b| a.0.total_cmp(&b.0).then(a.1.cmp(&b.1)));
        placed.dedup_by_key(|p| p.1);
        let mut pairs = Vec::new();
        let mut ranked: Vec<(u32, usize)> = Vec::with_capacity(placed.len());
        let (mut rank, mut kept) = (0, placed[0]);
        for (t, vertex) in placed {
            if within_mm < t - kept.0 {
                rank += 1;
                kept = (t, vertex);
            } else if vertex != kept.1 {
                pairs.push([kept.1, vertex]);
            }
            ranked.push((vertex, rank));
        }
        self.merge_vertices(&pairs);
        if !pairs.is_empty() {
            // The lowest number of a set stands for it; ask an edge what became of its ends.
            let mut sets = Sets::over(pairs.iter().flatten().copied().collect());
            for [a, b] in pairs {
                sets.unite(a, b);
            }
            for (vertex, _) in &mut ranked {
                *vertex = sets.find(*vertex);
            }
        }
        ranked.sort_unstable();
        ranked.dedup();
        ranked
    }

    /// The split of the side of a panel that lies on an edge.
    fn tee(&mut self, panel: u32, edge: u32, inner: Vec<u32>) -> Option<Tee> {
        let [a, b] = self.edges[edge as usize].ends;
        let corners = self.panels[panel as usize].corners;
        let side = (0..4_usize).find(|k| {
            let [from, to] = [corners[*k], corners[(*k + 1) % 4]];
            [from, to] == [a, b] || [from, to] == [b, a]
        })?;
        let from = self.points[corners[side] as usize];
        let mut vertices = inner;
        let distance = |v: &u32| self.points[*v as usize].distance(from);
        vertices.sort_by(|p, q| distance(p).total_cmp(&distance(q)));
        self.suspects.extend_from_slice(&vertices);
        Some(Tee {
            panel,
            side: u8::try_from(side).unwrap_or_default(),
            vertices,
        })
    }
}
