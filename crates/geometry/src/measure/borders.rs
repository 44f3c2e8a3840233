//! Which edges a panel has.

use crate::{NONE, Shell};

/// Which edges each panel has: one a corner of [`Shell::outline`], in the same order.
#[derive(Clone, PartialEq, Eq, Debug, Default)]
pub struct Borders {
    first: Vec<u32>,
    edges: Vec<u32>,
}

impl Borders {
    /// Looks the borders of all panels up, in time linear in the panels.
    ///
    /// A panel beyond the second at a crowded edge has that edge too. A border that no edge of the shell runs along
    /// is [`NONE`]; a grown shell has none.
    #[must_use]
    pub fn new(shell: &Shell) -> Self {
        let mut first = Vec::with_capacity(shell.panels.len() + 1);
        let mut tees = shell.tees.iter().peekable();
        let mut slots = 0_u32;
        first.push(0);
        for panel in 0_u32.. {
            if panel as usize == shell.panels.len() {
                break;
            }
            slots += 4;
            while let Some(tee) = tees.next_if(|t| t.panel <= panel) {
                slots += u32::try_from(tee.vertices.len()).unwrap_or(0);
            }
            first.push(slots);
        }
        let mut borders = Self {
            first,
            edges: vec![NONE; slots as usize],
        };
        for (index, edge) in (0_u32..).zip(&shell.edges) {
            for panel in edge.panels {
                if panel != NONE {
                    borders.enter(shell, panel, index);
                }
            }
        }
        for crowd in &shell.crowded {
            for &panel in &crowd.more {
                borders.enter(shell, panel, crowd.edge);
            }
        }
        borders
    }

    /// The edges of a panel; `edges(p)[k]` runs from outline corner k to the next.
    #[must_use]
    pub fn edges(&self, panel: u32) -> &[u32] {
        let [from, to] = [self.first[panel as usize], self.first[panel as usize + 1]];
        &self.edges[from as usize..to as usize]
    }

    fn enter(&mut self, shell: &Shell, panel: u32, edge: u32) {
        let from = self.first[panel as usize] as usize;
        let slots = &mut self.edges[from..self.first[panel as usize + 1] as usize];
        let corners = shell.panels[panel as usize].corners;
        let longer;
        let outline: &[u32] = if slots.len() == 4 {
            &corners
        } else {
            longer = shell.outline(panel);
            &longer
        };
        let [a, b] = shell.edges[edge as usize].ends;
        let count = outline.len();
        let place = (0..count).find(|&k| {
            let [from, to] = [outline[k], outline[(k + 1) % count]];
            slots[k] == NONE && ((from == a && to == b) || (from == b && to == a))
        });
        if let Some(place) = place {
            slots[place] = edge;
        }
    }
}
