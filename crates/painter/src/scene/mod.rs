//! The order of a shell's panels from back to front.

mod cast;
mod split;
mod tree;

use std::collections::BTreeMap;

use zonewright_geometry::{NONE, Panel, Shell, Vector};

use crate::{Bounds, Lens, brink::Brink, picture::index};
use tree::{Grower, Node};

/// A panel's plane: `normal . p = offset`, the normal pointing outside, of length 1; zero for a panel without area.
#[derive(Clone, Copy, Debug)]
pub(crate) struct Plane {
    pub(crate) normal: Vector,
    pub(crate) offset: f64,
}

impl Plane {
    pub(crate) fn exists(&self) -> bool {
        self.normal != Vector::ZERO
    }
}

/// A line of an edge between two vertices of the scene. The first segments are the shell's edges, undivided.
#[derive(Clone, Copy, Debug)]
pub(crate) struct Segment {
    pub(crate) ends: [u32; 2],
    pub(crate) edge: u32,
}

/// The depth order of a shell, built once and good for every camera.
///
/// [`Scene::exact`] divides panels where no order of whole panels would be right: walls that part the panels into
/// small cells while dividing few of them, then in each cell a binary space partition on the panels' own planes (Fuchs, Kedem and Naylor, 1980). Walking the tree back
/// to front takes time in proportion to the pieces. [`Scene::quick`] sorts whole panels by their middles: faster to build, for
/// while something is dragged, and wrong where panels are long or cross.
#[derive(Clone, Debug)]
pub struct Scene {
    /// Points where panels are divided; they come after the shell's own.
    pub(crate) extra: Vec<Vector>,
    /// By panel.
    pub(crate) planes: Vec<Plane>,
    /// `first[k]..first[k + 1]` are the corners of piece k.
    pub(crate) first: Vec<u32>,
    pub(crate) piece_panel: Vec<u32>,
    pub(crate) corners: Vec<u32>,
    /// The segment that runs from a corner to the next, or [`NONE`] along a cut.
    pub(crate) sides: Vec<u32>,
    pub(crate) segments: Vec<Segment>,
    /// How many pieces border a segment.
    pub(crate) uses: Vec<u32>,
    pub(crate) rim: Vec<bool>,
    /// Empty for a quick scene.
    pub(crate) nodes: Vec<Node>,
    pub(crate) bounds: Option<Bounds>,
    /// Whether the shell is closed and its outside is outside.
    pub(crate) encloses: bool,
    exact: bool,
}

/// What is due when the walk comes to an entry of its stack.
#[derive(Clone, Copy)]
enum Due {
    /// All of the node.
    Children,
    /// The node's own pieces.
    Pieces,
    /// What lies beyond the node's plane, seen edge-on, is done; the rest comes.
    Brink,
    /// The rest is done too.
    Leave,
}

impl Scene {
    /// The exact order. Panels with corners that are missing, not finite or without area are left out.
    #[must_use]
    pub fn exact(shell: &Shell) -> Self {
        let mut scene = Self::quick(shell);
        let span = scene.bounds.map_or(0.0, |b| {
            b.diagonal().max(b.min.0.abs().max(b.max.0.abs()).max_element())
        });
        let mut grower = Grower::new(shell, &scene, span);
        grower.grow();
        scene.exact = grower.exact;
        grower.finish(&mut scene, shell);
        scene
    }

    /// The order by the middles of panels.
    #[must_use]
    pub fn quick(shell: &Shell) -> Self {
        let bounds = Bounds::of(shell);
        let span = bounds.map_or(0.0, |b| b.diagonal());
        let planes: Vec<Plane> = shell.panels.iter().map(|panel| plane(shell, panel, span)).collect();
        let mut scene = Self {
            extra: Vec::new(),
            first: Vec::with_capacity(shell.panels.len() + 1),
            piece_panel: Vec::with_capacity(shell.panels.len()),
            corners: Vec::with_capacity(4 * shell.panels.len()),
            sides: Vec::with_capacity(4 * shell.panels.len()),
            segments: shell
                .edges
                .iter()
                .zip(0..)
                .map(|(edge, k)| Segment {
                    ends: edge.ends,
                    edge: k,
                })
                .collect(),
            uses: vec![0; shell.edges.len()],
            rim: shell.edges.iter().map(|edge| edge.rim_panel().is_some()).collect(),
            nodes: Vec::new(),
            bounds,
            encloses: shell.is_closed() && volume(shell, &planes) > 0.0,
            exact: false,
            planes,
        };
        scene.add_whole_panels(shell);
        scene
    }

    /// Whether the order is exact. A scene built by [`Scene::exact`] is, unless exactness would have taken more pieces than
    /// there is room for (over a million, and sixteen a panel).
    #[must_use]
    pub const fn is_exact(&self) -> bool {
        self.exact
    }

    /// How many pieces the panels were divided into, undivided ones counted too.
    #[must_use]
    pub const fn piece_count(&self) -> usize {
        self.piece_panel.len()
    }

    fn add_whole_panels(&mut self, shell: &Shell) {
        let mut outlines = BTreeMap::new();
        for tee in &shell.tees {
            outlines.entry(tee.panel).or_insert_with(|| shell.outline(tee.panel));
        }
        self.first.push(0);
        let mut at_of_panel = vec![0_u32; shell.panels.len()];
        for (k, panel) in shell.panels.iter().enumerate() {
            at_of_panel[k] = index(self.corners.len());
            if !self.planes[k].exists() {
                continue;
            }
            let id = index(k);
            match outlines.get(&id) {
                Some(outline) => self.corners.extend_from_slice(outline),
                None => self.corners.extend_from_slice(&panel.corners),
            }
            self.piece_panel.push(id);
            self.first.push(index(self.corners.len()));
        }
        self.sides.resize(self.corners.len(), NONE);
        let more = shell
            .crowded
            .iter()
            .flat_map(|crowd| crowd.more.iter().map(move |&panel| (crowd.edge, panel)));
        let plain = (0..)
            .zip(&shell.edges)
            .flat_map(|(k, e)| e.panels.map(|panel| (k, panel)));
        for (edge, panel) in plain.chain(more) {
            let Some(plane) = self.planes.get(panel as usize) else {
                continue;
            };
            if !plane.exists() {
                continue;
            }
            let at = at_of_panel[panel as usize] as usize;
            let count = outlines.get(&panel).map_or(4, Vec::len);
            let [a, b] = shell.edges[edge as usize].ends;
            let corners = &self.corners[at..at + count];
            let side = (0..count).find(|&k| {
                let [c, d] = [corners[k], corners[(k + 1) % count]];
                (a == c && b == d) || (a == d && b == c)
            });
            if let Some(side) = side {
                self.sides[at + side] = edge;
                self.uses[edge as usize] += 1;
            }
        }
    }

    /// Calls `paint` for each piece, from the farthest to the nearest, and tells it which planes seen edge-on have all of their
    /// other side painted already. `slimmest` is how near to a plane the eye must be for that, as [`Lens::side`] tells it.
    pub(crate) fn walk(&self, lens: &Lens, shell: &Shell, slimmest: f64, mut paint: impl FnMut(usize, &[Brink])) {
        if self.nodes.is_empty() {
            for (_, piece) in self.by_middle(lens, shell) {
                paint(piece as usize, &[]);
            }
            return;
        }
        // An entry is a node to be entered, or one of which something else is due.
        let mut stack = vec![(0_u32, Due::Children)];
        let mut brinks = Vec::new();
        while let Some((id, due)) = stack.pop() {
            let node = &self.nodes[id as usize];
            match due {
                Due::Children if node.children != [NONE; 2] => {
                    let side = lens.side(node.normal, node.offset);
                    let [before, behind] = node.children;
                    let [near, far] = if side > 0.0 { [before, behind] } else { [behind, before] };
                    let brink = side.abs() < slimmest && far != NONE;
                    if brink {
                        stack.push((id, Due::Leave));
                    }
                    if near != NONE {
                        stack.push((near, Due::Children));
                    }
                    if node.count > 0 {
                        stack.push((id, Due::Pieces));
                    }
                    if brink {
                        stack.push((id, Due::Brink));
                    }
                    if far != NONE {
                        stack.push((far, Due::Children));
                    }
                }
                Due::Children | Due::Pieces => {
                    for piece in node.first..node.first + node.count {
                        paint(piece as usize, &brinks);
                    }
                }
                Due::Brink => {
                    let sign = if lens.side(node.normal, node.offset) > 0.0 {
                        1.0
                    } else {
                        -1.0
                    };
                    brinks.push(Brink::new(lens, node.normal * sign, node.offset * sign));
                }
                Due::Leave => {
                    brinks.pop();
                }
            }
        }
    }

    fn by_middle(&self, lens: &Lens, shell: &Shell) -> Vec<(i64, u32)> {
        let mut order: Vec<(i64, u32)> = (0..index(self.piece_count()))
            .map(|piece| {
                let [a, _, c, _] = shell.corner_points(self.piece_panel[piece as usize]);
                let depth = match lens.projection {
                    crate::Projection::Perspective => ((a.0 + c.0) * 0.5 - lens.eye.0).length_squared(),
                    crate::Projection::Parallel => (a.0 + c.0).dot(lens.forward),
                };
                // The bits of an f64, so turned that they sort as the numbers do, the greatest first.
                let bits = depth.to_bits().cast_signed();
                (!(bits ^ ((bits >> 63).cast_unsigned() >> 1).cast_signed()), piece)
            })
            .collect();
        order.sort_unstable();
        order
    }
}

fn plane(shell: &Shell, panel: &Panel, span: f64) -> Plane {
    let nothing = Plane {
        normal: Vector::ZERO,
        offset: 0.0,
    };
    let [Some(a), Some(b), Some(c), Some(d)] = panel.corners.map(|v| shell.points.get(v as usize)) else {
        return nothing;
    };
    if ![a, b, c, d].into_iter().all(|p| p.is_finite()) {
        return nothing;
    }
    let area = (*b - *a).cross(*d - *a);
    // Thinner than a millionth of a millionth of the whole: the direction of the normal is only rounding.
    if area.length() <= 1e-12 * span * span {
        return nothing;
    }
    let normal = area.normalize_or_zero();
    Plane {
        normal,
        offset: normal.dot(a.0 + (c.0 - a.0) * 0.5),
    }
}

/// Three times the enclosed volume, negative when the outside is inside.
fn volume(shell: &Shell, planes: &[Plane]) -> f64 {
    let Some(from) = shell.points.first() else { return 0.0 };
    (0..index(shell.panels.len()))
        .filter(|&k| planes[k as usize].exists())
        .map(|k| (shell.corner_points(k)[0] - *from).dot(shell.area_vector(k)))
        .sum()
}
