//! Uniting vertices and edges that are one: what the word zipped together.

use super::mesh::{Mesh, as_index};
use crate::NONE;

/// A forest of sets over numbers, the lowest of which stands for each; numbers that were not named are alone.
#[derive(Clone, Debug)]
pub(super) struct Sets {
    /// The numbers named, ascending.
    members: Vec<u32>,
    /// By rank.
    parent: Vec<u32>,
}

impl Sets {
    /// Every number that is to be united with another must be among these.
    pub(super) fn over(mut members: Vec<u32>) -> Self {
        members.sort_unstable();
        members.dedup();
        let parent = (0..as_index(members.len())).collect();
        Self { members, parent }
    }

    /// The number that stands for a number's set.
    pub(super) fn find(&mut self, of: u32) -> u32 {
        match self.members.binary_search(&of) {
            Ok(rank) => {
                let root = self.root(as_index(rank));
                self.members[root as usize]
            }
            Err(_) => of,
        }
    }

    pub(super) fn unite(&mut self, a: u32, b: u32) {
        let [Ok(a), Ok(b)] = [a, b].map(|v| self.members.binary_search(&v)) else {
            debug_assert!(false, "only members are united");
            return;
        };
        let [a, b] = [a, b].map(|rank| self.root(as_index(rank)));
        self.parent[a.max(b) as usize] = a.min(b);
    }

    fn root(&mut self, of: u32) -> u32 {
        let mut root = of;
        while self.parent[root as usize] != root {
            root = self.parent[root as usize];
        }
        let mut at = of;
        while self.parent[at as usize] != root {
            at = core::mem::replace(&mut self.parent[at as usize], root);
        }
        root
    }
}

impl Mesh {
    /// Gives every vertex of the same set one number, the lowest.
    pub(super) fn merge_vertices(&mut self, pairs: &[[u32; 2]]) {
        if pairs.is_empty() {
            return;
        }
        let mut sets = Sets::over(pairs.iter().flatten().copied().collect());
        for [a, b] in pairs {
            sets.unite(*a, *b);
        }
        // Only vertices that give up their number matter, and none of them is in what was made before the lowest of them.
        let mut gone: Vec<u32> = pairs
            .iter()
            .flatten()
            .copied()
            .filter(|v| sets.find(*v) != *v)
            .collect();
        gone.sort_unstable();
        let [Some(&lowest), Some(&highest)] = [gone.first(), gone.last()] else {
            return;
        };
        let highest_of = |of: &[u32]| of.iter().copied().max().unwrap_or(0);
        let panels = self.panels.partition_point(|p| highest_of(&p.corners) < lowest);
        let edges = self.edges.partition_point(|e| highest_of(&e.ends) < lowest);
        let [panels, edges] = if self.gaps { [0, 0] } else { [panels, edges] };
        let corners = self.panels[panels..].iter_mut().flat_map(|p| &mut p.corners);
        for vertex in corners.chain(self.edges[edges..].iter_mut().flat_map(|e| &mut e.ends)) {
            if lowest <= *vertex && *vertex <= highest {
                *vertex = sets.find(*vertex);
            }
        }
        self.gaps = true;
        self.suspects.extend(pairs.iter().map(|[a, _]| *a));
        let on_tees = self.tees.iter_mut().flat_map(|t| &mut t.vertices);
        let on_seams = self.seams.iter_mut().flat_map(|s| &mut s.vertices);
        for vertex in self.suspects.iter_mut().chain(on_tees).chain(on_seams) {
            *vertex = sets.find(*vertex);
        }
    }

    /// Moves the panels of the second edge to the first, which must have the same ends already.
    ///
    /// Returns whether two panels run the same way along it now.
    pub(super) fn merge_edges(&mut self, kept: u32, gone: u32) -> bool {
        let opposite = self.edges[kept as usize].ends != self.edges[gone as usize].ends;
        let taken = core::mem::replace(&mut self.edges[gone as usize].panels, [NONE; 2]);
        let mut more: Vec<u32> = Vec::new();
        self.crowded.retain(|c| {
            if c.edge == gone {
                more.extend_from_slice(&c.more);
            }
            c.edge != gone
        });
        let mut disagree = false;
        for (slot, panel) in taken.into_iter().enumerate().filter(|(_, panel)| *panel != NONE) {
            let wanted = slot ^ usize::from(opposite);
            let panels = self.edges[kept as usize].panels;
            // A panel that runs the same way as the one that is there takes the other place, when that is free.
            let same_way = panels[wanted] != NONE && panels[1 - wanted] == NONE;
            disagree |= same_way;
            self.put_panel(kept, if same_way { 1 - wanted } else { wanted }, panel);
        }
        for panel in more {
            self.put_panel(kept, 0, panel);
        }
        disagree
    }

    /// Settles what the word zipped together: no tolerance, only names.
    pub(super) fn settle_links(&mut self) {
        let pairs = core::mem::take(&mut self.vertex_links);
        self.merge_vertices(&pairs);
        let links = core::mem::take(&mut self.edge_links);
        if links.is_empty() {
            return;
        }
        let mut sets = Sets::over(links.iter().flatten().copied().collect());
        for link in &links {
            let [a, b] = link.map(|e| sets.find(e));
            if a != b {
                let [kept, gone] = [a.min(b), a.max(b)];
                self.merge_edges(kept, gone);
                sets.unite(a, b);
            }
        }
        // Slides name edges too.
        let mut slides = core::mem::take(&mut self.slides);
        for slide in &mut slides {
            *slide = slide.map(|e| sets.find(e));
        }
        self.slides = slides;
    }
}
