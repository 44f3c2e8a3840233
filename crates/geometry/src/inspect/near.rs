//! Rims that nearly meet.

use super::{
    NearMiss,
    tree::{Extent, Tree},
};
use crate::{Point, Shell, Tolerances};

/// Two places of one rim count as far apart along it when the way between them is longer than this many times the widest
/// gap that is reported; nearer ones are the two sides of a corner, or the ends of a short edge.
const FAR_ALONG: f64 = 10.0;

/// An edge of a rim.
struct RimEdge {
    vertices: [u32; 2],
    ends: [Point; 2],
    panel: u32,
    rim: usize,
    /// Way along the rim to its first end, and the length of the whole rim.
    start: f64,
    around: f64,
}

/// A place of a rim edge: 0 is its first end, 1 its second.
type Along = f64;

/// Rims that meet within the near tolerance, but not within the join tolerance, sorted.
pub(super) fn near_misses(shell: &Shell, tolerances: &Tolerances) -> Vec<NearMiss> {
    let edges = rim_edges(shell);
    let limits = [tolerances.join_mm, tolerances.near_mm];
    let extent = |e: &RimEdge| Extent::NOTHING.and(e.ends[0]).and(e.ends[1]).grown(0.5 * limits[1]);
    let usable = limits.iter().all(|l| l.is_finite()) && limits[0] < limits[1];
    let finite = |e: &RimEdge| e.ends.iter().all(|p| p.is_finite());
    let items: Vec<_> = (0_u32..)
        .zip(&edges)
        .filter(|(_, e)| usable && finite(e))
        .map(|(k, e)| (k, extent(e)))
        .collect();
    if items.is_empty() {
        return Vec::new();
    }
    let mut found: Vec<NearMiss> = Vec::new();
    let tree = Tree::new(items);
    let order: Vec<u32> = tree.order().collect();
    tree.pairs(|i, j| {
        let [one, other] = [i, j].map(|k| &edges[order[k] as usize]);
        if one.panel == other.panel {
            return;
        }
        for (at, there) in close_places(one, other) {
            let gap_mm = one.place(at).distance(other.place(there));
            let vertices = [one.vertex_near(at), other.vertex_near(there)];
            let of_one_panel = [one.panel, other.panel].iter().any(|&p| {
                let corners = &shell.panels[p as usize].corners;
                vertices.iter().all(|v| corners.contains(v))
            });
            let near = gap_mm > limits[0] && gap_mm <= limits[1];
            if near && !of_one_panel && far_along(one, at, other, there, FAR_ALONG * limits[1]) {
                let vertices = [vertices[0].min(vertices[1]), vertices[0].max(vertices[1])];
                found.push(NearMiss { vertices, gap_mm });
            }
        }
    });
    found.sort_unstable_by(|a, b| a.vertices.cmp(&b.vertices).then(a.gap_mm.total_cmp(&b.gap_mm)));
    found.dedup_by_key(|miss| miss.vertices);
    found
}

fn rim_edges(shell: &Shell) -> Vec<RimEdge> {
    let mut edges = Vec::new();
    for (rim, walk) in shell.rims.iter().enumerate() {
        let from = edges.len();
        let mut way = 0.0;
        for (k, &edge) in walk.edges.iter().enumerate() {
            let vertices = [walk.vertices[k], walk.vertices[(k + 1) % walk.vertices.len()]];
            let ends = vertices.map(|v| shell.points[v as usize]);
            if let Some(panel) = shell.edges[edge as usize].rim_panel() {
                edges.push(RimEdge {
                    vertices,
                    ends,
                    panel,
                    rim,
                    start: way,
                    around: 0.0,
                });
            }
            way += ends[0].distance(ends[1]);
        }
        for edge in &mut edges[from..] {
            edge.around = way;
        }
    }
    edges
}

impl RimEdge {
    fn place(&self, at: Along) -> Point {
        self.ends[0] + (self.ends[1] - self.ends[0]) * at
    }

    fn vertex_near(&self, at: Along) -> u32 {
        self.vertices[usize::from(at > 0.5)]
    }

    fn nearest_to(&self, place: Point) -> Along {
        let along = self.ends[1] - self.ends[0];
        let square = along.length_squared();
        if square == 0.0 {
            return 0.0;
        }
        ((place - self.ends[0]).dot(along) / square).clamp(0.0, 1.0)
    }

    fn way(&self, at: Along) -> f64 {
        self.start + at * self.ends[0].distance(self.ends[1])
    }
}

/// Places where two edges can be closest: ends over ends, ends over edges, and where they pass each other.
fn close_places(one: &RimEdge, other: &RimEdge) -> [(Along, Along); 9] {
    let of_one = |at: Along| (at, other.nearest_to(one.place(at)));
    let of_other = |there: Along| (one.nearest_to(other.place(there)), there);
    let [u, v] = [one, other].map(|e| e.ends[1] - e.ends[0]);
    let between = other.ends[0] - one.ends[0];
    let normal = u.cross(v);
    let square = normal.length_squared();
    // Of parallel edges an end is always among the closest places.
    let passing = if square > 0.0 {
        let at = between.cross(v).dot(normal) / square;
        of_one(at.clamp(0.0, 1.0))
    } else {
        (0.0, 0.0)
    };
    [
        (0.0, 0.0),
        (0.0, 1.0),
        (1.0, 0.0),
        (1.0, 1.0),
        of_one(0.0),
        of_one(1.0),
        of_other(0.0),
        of_other(1.0),
        passing,
    ]
}

/// Whether two places are on different rims, or farther apart along their rim than `far`.
fn far_along(one: &RimEdge, at: Along, other: &RimEdge, there: Along, far: f64) -> bool {
    let way = (one.way(at) - other.way(there)).abs();
    one.rim != other.rim || way.min(one.around - way) > far
}
