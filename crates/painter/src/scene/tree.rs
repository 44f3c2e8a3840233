//! Growing the tree of planes.
//!
//! Every plane may stand in the tree; what differs is how many pieces it divides and how evenly it parts them.

use std::collections::BTreeMap;

use zonewright_geometry::{NONE, Shell, Vector};

use super::{
    Plane, Scene, Segment,
    split::{Piece, Pieces},
};
use crate::picture::index;

/// Cells with at most so many pieces are ordered by panel planes. Smaller cells divide more panels along the cells' walls,
/// greater ones take longer; around here the pieces to draw and the time to build are both low.
const CELL: usize = 16;
/// A divided piece counts as much as so many pieces by which the two sides differ.
const DIVIDED: usize = 4;
/// So many panels are tried for the plane that divides fewest others.
const TRIED: usize = 32;

/// A plane with what lies before, behind and in it; nodes come before their children.
#[derive(Clone, Copy, Debug)]
pub(crate) struct Node {
    pub(crate) normal: Vector,
    pub(crate) offset: f64,
    /// Before and behind; [`NONE`] where there is nothing.
    pub(crate) children: [u32; 2],
    /// The pieces that lie in the plane.
    pub(crate) first: u32,
    pub(crate) count: u32,
}

struct Task {
    pieces: Vec<u32>,
    /// The parent and which child of it; none for the root.
    under: Option<(u32, usize)>,
    /// Whether walls are worth a try.
    cells: bool,
}

pub(super) struct Grower {
    pieces: Pieces,
    planes: Vec<Plane>,
    nodes: Vec<Node>,
    /// Pieces in the order of the nodes.
    order: Vec<u32>,
    room: usize,
    pub(super) exact: bool,
}

impl Grower {
    /// Starts from the whole panels of a quick scene. `span` is the greatest length in the shell, in millimetres.
    pub(super) fn new(shell: &Shell, scene: &Scene, span: f64) -> Self {
        // Rounding of a height above a plane is below 1e-15 of the span; a billionth of it is far above that and far below a pixel.
        let mut pieces = Pieces::new(shell.points.iter().map(|p| p.0).collect(), span * 1e-9);
        pieces.corners.clone_from(&scene.corners);
        pieces.sides.clone_from(&scene.sides);
        pieces.all = scene
            .piece_panel
            .iter()
            .zip(scene.first.windows(2))
            .map(|(&panel, ends)| Piece {
                first: ends[0],
                count: ends[1] - ends[0],
                panel,
            })
            .collect();
        Self {
            room: 1_000_000 + 16 * pieces.all.len(),
            pieces,
            planes: scene.planes.clone(),
            nodes: Vec::new(),
            order: Vec::new(),
            exact: true,
        }
    }

    pub(super) fn grow(&mut self) {
        let mut tasks = vec![Task {
            pieces: (0..index(self.pieces.all.len())).collect(),
            under: None,
            cells: true,
        }];
        while let Some(task) = tasks.pop() {
            let Some(&any) = task.pieces.first() else { continue };
            let id = index(self.nodes.len());
            if let Some((parent, child)) = task.under {
                self.nodes[parent as usize].children[child] = id;
            }
            let mut cells = task.cells && task.pieces.len() > CELL;
            let wall = cells.then(|| self.wall(&task.pieces)).flatten();
            let (normal, offset, owner) = wall.map_or_else(
                || {
                    cells = false;
                    let owner = self
                        .divider(&task.pieces)
                        .unwrap_or(self.pieces.all[any as usize].panel);
                    let plane = self.planes[owner as usize];
                    (plane.normal, plane.offset, owner)
                },
                |(normal, offset)| (normal, offset, NONE),
            );
            let first = index(self.order.len());
            if self.pieces.all.len() > self.room {
                self.exact = false;
                self.order.extend_from_slice(&task.pieces);
            }
            let full = !self.exact;
            let parted = if full {
                super::split::Parted::default()
            } else {
                self.pieces.part(&task.pieces, normal, offset, owner)
            };
            self.order.extend_from_slice(&parted.within);
            self.nodes.push(Node {
                normal,
                offset,
                children: [NONE; 2],
                first,
                count: index(self.order.len()) - first,
            });
            for (child, pieces) in [parted.before, parted.behind].into_iter().enumerate() {
                tasks.push(Task {
                    pieces,
                    under: Some((id, child)),
                    cells,
                });
            }
        }
    }

    /// The plane that parts pieces most evenly while dividing few; none when none does well.
    ///
    /// Tried are axis-aligned planes, and planes upright on a panel along one of its sides: where a surface bends gently these
    /// run between two rows of panels for a long way.
    fn wall(&self, pieces: &[u32]) -> Option<(Vector, f64)> {
        let count = pieces.len();
        let middles: Vec<Vector> = pieces
            .iter()
            .map(|&piece| {
                let corners = self.pieces.corners_of(piece);
                let [a, b] = [corners[0], corners[corners.len() / 2]].map(|v| self.pieces.points[v as usize]);
                (a + b) * 0.5
            })
            .collect();
        let mut tried = Vec::with_capacity(16);
        let mut order: Vec<usize> = (0..count).collect();
        for (axis, normal) in [Vector::X, Vector::Y, Vector::Z].into_iter().enumerate() {
            let by_place = |a: &usize, b: &usize| middles[*a][axis].total_cmp(&middles[*b][axis]).then(a.cmp(b));
            let (_, &mut middle, _) = order.select_nth_unstable_by(count / 2, by_place);
            let piece = pieces[middle];
            let corners = self.pieces.corners_of(piece);
            let upright = self.planes[self.pieces.all[piece as usize].panel as usize].normal;
            for (k, &from) in corners.iter().enumerate() {
                let to = corners[(k + 1) % corners.len()];
                let [from, to] = [from, to].map(|v| self.pieces.points[v as usize]);
                let across = upright.cross(to - from).normalize_or_zero();
                if across != Vector::ZERO {
                    tried.push((across, across.dot(from)));
                }
                // At a corner, not through the middle: in regular shells whole rows end there.
                tried.push((normal, from[axis]));
            }
        }
        let slack = self.pieces.slack;
        let mut best: Option<(usize, Vector, f64)> = None;
        for (normal, offset) in tried {
            let (mut before, mut behind) = (0, 0);
            for &piece in pieces {
                let [least, most] = self.pieces.heights(piece, normal, offset);
                before += usize::from(most > slack);
                behind += usize::from(least < -slack);
            }
            let divided = (before + behind).saturating_sub(count);
            let most = before.max(behind);
            let cost = most - before.min(behind) + DIVIDED * divided;
            if most * 10 <= count * 8 && best.is_none_or(|(least, ..)| cost < least) {
                best = Some((cost, normal, offset));
            }
        }
        best.map(|(_, normal, offset)| (normal, offset))
    }

    /// The panel whose plane divides the fewest pieces, and of those the one that parts them most evenly.
    fn divider(&self, pieces: &[u32]) -> Option<u32> {
        let step = pieces.len().div_ceil(TRIED).max(1);
        let slack = self.pieces.slack;
        let mut best: Option<(usize, u32)> = None;
        for &candidate in pieces.iter().step_by(step) {
            let panel = self.pieces.all[candidate as usize].panel;
            let plane = self.planes[panel as usize];
            let (mut before, mut behind) = (0_usize, 0_usize);
            for &piece in pieces {
                if self.pieces.all[piece as usize].panel != panel {
                    let [least, most] = self.pieces.heights(piece, plane.normal, plane.offset);
                    before += usize::from(most > slack);
                    behind += usize::from(least < -slack);
                }
            }
            let divided = (before + behind).saturating_sub(pieces.len() - 1);
            let cost = divided * 2 * DIVIDED + before.abs_diff(behind);
            if best.is_none_or(|(least, _)| cost < least) {
                best = Some((cost, panel));
                if cost <= 1 {
                    break;
                }
            }
        }
        best.map(|(_, panel)| panel)
    }

    /// Packs nodes and pieces into the scene, in the order in which they are met.
    pub(super) fn finish(self, scene: &mut Scene, shell: &Shell) {
        let Self {
            pieces, nodes, order, ..
        } = self;
        let mut first = vec![0];
        let mut piece_panel = Vec::with_capacity(order.len());
        let mut corners = Vec::with_capacity(4 * order.len());
        let mut sides = Vec::with_capacity(4 * order.len());
        let mut segments: Vec<Segment> = scene.segments.clone();
        let mut parts: BTreeMap<(u32, u32, u32), u32> = BTreeMap::new();
        let mut uses = vec![0; segments.len()];
        for piece in order {
            let own = pieces.corners_of(piece);
            let piece = pieces.all[piece as usize];
            for (k, &a) in own.iter().enumerate() {
                let b = own[(k + 1) % own.len()];
                let edge = pieces.sides[piece.first as usize + k];
                corners.push(a);
                if edge == NONE {
                    sides.push(NONE);
                    continue;
                }
                let [c, d] = shell.edges[edge as usize].ends;
                let segment = if (a, b) == (c, d) || (a, b) == (d, c) {
                    edge
                } else {
                    *parts.entry((edge, a.min(b), a.max(b))).or_insert_with(|| {
                        segments.push(Segment { ends: [a, b], edge });
                        uses.push(0);
                        index(segments.len() - 1)
                    })
                };
                uses[segment as usize] += 1;
                sides.push(segment);
            }
            piece_panel.push(piece.panel);
            first.push(index(corners.len()));
        }
        scene.extra = pieces.points[shell.points.len()..].to_vec();
        scene.first = first;
        scene.piece_panel = piece_panel;
        scene.corners = corners;
        scene.sides = sides;
        scene.segments = segments;
        scene.uses = uses;
        scene.nodes = nodes;
    }
}
