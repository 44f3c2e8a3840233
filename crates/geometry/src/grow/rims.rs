//! Rims: closed walks along the border.

use crate::{Edge, NONE, Rim};

/// Traces the rims, with the shell on their left seen from outside; each begins at its lowest edge.
pub(super) fn trace(edges: &[Edge]) -> Vec<Rim> {
    // (from, to, edge): the panel of a rim edge runs along it with itself on the left, and so does the rim.
    let mut walk: Vec<(u32, u32, u32)> = Vec::new();
    for (index, edge) in (0_u32..).zip(edges) {
        match edge.panels {
            [_, NONE] => walk.push((edge.ends[0], edge.ends[1], index)),
            [NONE, _] => walk.push((edge.ends[1], edge.ends[0], index)),
            _ => {}
        }
    }
    // Both ends of every edge: where sides disagree, a rim has to run against one.
    let mut by_end: Vec<(u32, bool, usize)> = Vec::with_capacity(2 * walk.len());
    for (k, (from, to, _)) in walk.iter().enumerate() {
        by_end.extend([(*from, false, k), (*to, true, k)]);
    }
    by_end.sort_unstable();
    let mut used = vec![false; walk.len()];
    let mut rims = Vec::new();
    for first in 0..walk.len() {
        if used[first] {
            continue;
        }
        let mut rim = Rim {
            vertices: Vec::new(),
            edges: Vec::new(),
        };
        let mut at = Some((first, false));
        while let Some((k, against)) = at {
            used[k] = true;
            let (from, to, edge) = walk[k];
            let [from, to] = if against { [to, from] } else { [from, to] };
            rim.vertices.push(from);
            rim.edges.push(edge);
            let start = by_end.partition_point(|(v, _, _)| *v < to);
            let here = by_end[start..].iter().take_while(|(v, _, _)| *v == to);
            at = here.map(|(_, against, k)| (*k, *against)).find(|(k, _)| !used[*k]);
        }
        rims.push(rim);
    }
    rims
}
