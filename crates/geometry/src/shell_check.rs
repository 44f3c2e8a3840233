//! What must hold of every finished shell.

use std::collections::BTreeMap;

use crate::{NONE, Rim, Shell};

/// The first thing that does not hold, and the index of the panel, edge, vertex or rim where it does not.
#[derive(Clone, Copy, PartialEq, Eq, Debug)]
pub struct Broken {
    /// What should hold.
    pub rule: &'static str,
    /// Where it does not.
    pub index: usize,
}

impl Shell {
    /// States what must hold, and finds the first place where it does not.
    ///
    /// `within_mm` is how far a panel's corners may be from a parallelogram's: the tolerance with which rims were joined.
    ///
    /// # Errors
    /// The rule that is broken.
    pub fn check(&self, within_mm: f64) -> Result<(), Broken> {
        self.check_indices()?;
        self.check_panels(within_mm)?;
        self.check_edges()?;
        self.check_fans()?;
        self.check_rims()?;
        self.check_courses()
    }

    fn check_indices(&self) -> Result<(), Broken> {
        let points = self.points.len();
        for (index, panel) in self.panels.iter().enumerate() {
            let corners = panel.corners.iter().all(|v| (*v as usize) < points);
            let letters = panel.letters.iter().all(|l| (*l as usize) < self.letters.len());
            hold(corners && letters, "a panel's corners and letters exist", index)?;
        }
        for (index, letter) in self.letters.iter().enumerate() {
            let at = letter.at == NONE || (letter.at as usize) < index;
            hold(
                at && (letter.zone as usize) < self.zones.len(),
                "a letter's zone and host exist",
                index,
            )?;
        }
        for (index, zone) in self.zones.iter().enumerate() {
            let root = self
                .zones
                .get(zone.counts_as as usize)
                .is_some_and(|z| z.counts_as == zone.counts_as);
            hold(root, "a zone counts as one that counts as itself", index)?;
        }
        Ok(())
    }

    fn check_panels(&self, within_mm: f64) -> Result<(), Broken> {
        for (index, panel) in self.panels.iter().enumerate() {
            let mut sorted = panel.corners;
            sorted.sort_unstable();
            let distinct = sorted.windows(2).all(|w| w[0] != w[1]);
            hold(distinct, "a panel has four corners", index)?;
            let [a, b, c, d] = panel.corners.map(|v| self.points[v as usize].0);
            let size = (b - a).length() + (d - a).length();
            let off = (a - b + c - d).length();
            hold(
                off <= 4.0 * within_mm + 1e-9 * size,
                "a panel is a parallelogram",
                index,
            )?;
            hold(0.0 < (b - a).cross(d - a).length(), "a panel has an area", index)?;
        }
        for (index, tee) in self.tees.iter().enumerate() {
            let corners = self.panels[tee.panel as usize].corners;
            let side = usize::from(tee.side);
            let [a, b] = [corners[side], corners[(side + 1) % 4]].map(|v| self.points[v as usize]);
            let length = a.distance(b);
            let mut before = 0.0;
            for vertex in &tee.vertices {
                let p = self.points[*vertex as usize];
                let along = a.distance(p);
                let on = (along + p.distance(b) - length).abs() <= within_mm + 1e-9 * length;
                hold(on && before < along, "T-vertices lie on their side, in order", index)?;
                before = along;
            }
        }
        Ok(())
    }

    /// The sides of the outlines are exactly what the edges say.
    fn check_edges(&self) -> Result<(), Broken> {
        let mut runs: BTreeMap<[u32; 2], Vec<(u32, bool)>> = BTreeMap::new();
        for panel in 0..self.panels.len() as u32 {
            let outline = self.outline(panel);
            for k in 0..outline.len() {
                let [from, to] = [outline[k], outline[(k + 1) % outline.len()]];
                runs.entry([from.min(to), from.max(to)])
                    .or_default()
                    .push((panel, from < to));
            }
        }
        hold(
            runs.len() == self.edges.len(),
            "edges are the sides of the panels, each once",
            self.edges.len(),
        )?;
        for (index, edge) in self.edges.iter().enumerate() {
            let [a, b] = edge.ends;
            let mut found = runs.get(&[a.min(b), a.max(b)]).cloned().unwrap_or_default();
            found.sort_unstable();
            let more = self
                .crowded
                .iter()
                .filter(|c| c.edge as usize == index)
                .flat_map(|c| c.more.iter().copied());
            let mut said: Vec<u32> = edge.panels.into_iter().filter(|p| *p != NONE).chain(more).collect();
            said.sort_unstable();
            let panels: Vec<u32> = found.iter().map(|(panel, _)| *panel).collect();
            hold(said == panels, "an edge knows the panels whose side it is", index)?;
            // Where sides disagree, or more than two meet, the slots cannot tell the way.
            let one_way = found.iter().filter(|(_, up)| *up).count();
            if found.len() <= 2 && one_way <= 1 && found.len() - one_way <= 1 {
                let slot = edge.panels.iter().enumerate().filter(|(_, p)| **p != NONE);
                let right = slot
                    .into_iter()
                    .all(|(slot, p)| found.contains(&(*p, (a < b) == (slot == 0))));
                hold(
                    right,
                    "the first panel of an edge runs with it, the second against it",
                    index,
                )?;
            }
        }
        Ok(())
    }

    /// The panels at a vertex hang together by edges at the vertex.
    fn check_fans(&self) -> Result<(), Broken> {
        let mut panels_at: Vec<Vec<u32>> = vec![Vec::new(); self.points.len()];
        for panel in 0..self.panels.len() as u32 {
            for vertex in self.outline(panel) {
                panels_at[vertex as usize].push(panel);
            }
        }
        let mut edges_at: Vec<Vec<usize>> = vec![Vec::new(); self.points.len()];
        for (index, edge) in self.edges.iter().enumerate() {
            for end in edge.ends {
                edges_at[end as usize].push(index);
            }
        }
        for (vertex, panels) in panels_at.iter().enumerate() {
            hold(!panels.is_empty(), "every vertex belongs to a panel", vertex)?;
            let mut reached = vec![panels[0]];
            let mut next = 0;
            while next < reached.len() {
                let panel = reached[next];
                next += 1;
                for index in &edges_at[vertex] {
                    let more = self
                        .crowded
                        .iter()
                        .filter(|c| c.edge as usize == *index)
                        .flat_map(|c| &c.more);
                    let at: Vec<u32> = self.edges[*index].panels.iter().chain(more).copied().collect();
                    if at.contains(&panel) {
                        let new: Vec<u32> = at.into_iter().filter(|p| *p != NONE && !reached.contains(p)).collect();
                        reached.extend(new);
                    }
                }
            }
            hold(
                reached.len() == panels.len(),
                "sheets that touch only at a point keep a vertex each",
                vertex,
            )?;
        }
        Ok(())
    }

    fn check_rims(&self) -> Result<(), Broken> {
        let open = self.edges.iter().filter(|e| e.rim_panel().is_some()).count();
        let walked: usize = self.rims.iter().map(|r| r.edges.len()).sum();
        hold(open == walked, "every open edge lies on one rim", walked)?;
        for (index, Rim { vertices, edges }) in self.rims.iter().enumerate() {
            hold(
                vertices.len() == edges.len(),
                "a rim has as many vertices as edges",
                index,
            )?;
            for k in 0..edges.len() {
                let [from, to] = [vertices[k], vertices[(k + 1) % vertices.len()]];
                let ends = self.edges[edges[k] as usize].ends;
                // Where three panels meet in an edge that ends on the border, a rim ends too.
                let closes = k + 1 < edges.len() || self.crowded.is_empty();
                let walks = ends == [from, to] || ends == [to, from];
                hold(walks || !closes, "a rim is a closed walk", index)?;
            }
        }
        Ok(())
    }

    fn check_courses(&self) -> Result<(), Broken> {
        let mut at = 0;
        for (index, course) in self.courses.iter().enumerate() {
            let until = at + course.panels as usize;
            let same = self
                .panels
                .get(at..until)
                .is_some_and(|p| p.iter().all(|p| p.course == course.number));
            hold(same && 0 < course.panels, "panels stand course by course", index)?;
            at = until;
        }
        hold(at == self.panels.len(), "every panel is in a course", at)
    }
}

fn hold(holds: bool, rule: &'static str, index: usize) -> Result<(), Broken> {
    if holds { Ok(()) } else { Err(Broken { rule, index }) }
}
