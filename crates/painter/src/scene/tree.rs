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

/// Among more pieces than this only walls are tried, as long as they make headway: evenness counts there, for the time it takes
/// to build. Among fewer, dividing none comes first, and panels' own planes before walls: the walk is no longer for being uneven.
const CELL: usize = 64;
/// Among many pieces, a divided one counts as much as so many by which the two sides differ.
const DIVIDED: usize = 6;
/// Walls are weighed by so many of the pieces.
const SAMPLE: usize = 512;
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

/// A plane to part pieces by.
struct Choice {
    normal: Vector,
    offset: f64,
    owner: u32,
    divided: usize,
    cost: usize,
}

struct Task {
    pieces: Vec<u32>,
    /// The parent and which child of it; none for the root.
    under: Option<(u32, usize)>,
    /// Whether walls are worth a try.
    walls: bool,
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
            walls: true,
        }];
        while let Some(task) = tasks.pop() {
            if task.pieces.is_empty() {
                continue;
            }
            let id = index(self.nodes.len());
            if let Some((parent, child)) = task.under {
                self.nodes[parent as usize].children[child] = id;
            }
            let Some(Choice {
                normal, offset, owner, ..
            }) = self.choose(&task.pieces, task.walls)
            else {
                continue;
            };
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
            let count = task.pieces.len();
            for (child, pieces) in [parted.before, parted.behind].into_iter().enumerate() {
                tasks.push(Task {
                    // Of many pieces a sample is weighed: should a wall part nothing, or no wall be good, only panels are tried.
                    walls: pieces.len() <= CELL || (task.walls && owner == NONE && pieces.len() < count),
                    pieces,
                    under: Some((id, child)),
                });
            }
        }
    }

    /// The plane, and the panel whose it is ([`NONE`] for a wall), that parts pieces most evenly while dividing few.
    fn choose(&self, pieces: &[u32], walls: bool) -> Option<Choice> {
        let mut best: Option<Choice> = None;
        let small = pieces.len() <= CELL;
        if small {
            self.try_panels(pieces, &mut best);
        }
        if walls && best.as_ref().is_none_or(|best| best.divided > 0) {
            self.try_walls(pieces, &mut best);
        }
        if best.is_none() {
            self.try_panels(pieces, &mut best);
        }
        best
    }

    /// Tries axis-aligned planes, and planes along the sides of panels, upright on the panel or standing vertically: where a
    /// surface bends gently, and in a sum of two curves, these run between two rows of panels for a long way.
    fn try_walls(&self, pieces: &[u32], best: &mut Option<Choice>) {
        let sample: Vec<u32> = pieces.iter().copied().step_by(pieces.len().div_ceil(SAMPLE)).collect();
        let middles: Vec<Vector> = sample
            .iter()
            .map(|&piece| {
                let corners = self.pieces.corners_of(piece);
                let [a, b] = [corners[0], corners[corners.len() / 2]].map(|v| self.pieces.points[v as usize]);
                (a + b) * 0.5
            })
            .collect();
        let mut order: Vec<usize> = (0..sample.len()).collect();
        for (axis, along) in [Vector::X, Vector::Y, Vector::Z].into_iter().enumerate() {
            let by_place = |a: &usize, b: &usize| middles[*a][axis].total_cmp(&middles[*b][axis]).then(a.cmp(b));
            let (_, &mut middle, _) = order.select_nth_unstable_by(sample.len() / 2, by_place);
            let piece = sample[middle];
            let corners = self.pieces.corners_of(piece);
            let upright = self.planes[self.pieces.all[piece as usize].panel as usize].normal;
            for (k, &from) in corners.iter().enumerate() {
                let to = corners[(k + 1) % corners.len()];
                let [from, to] = [from, to].map(|v| self.pieces.points[v as usize]);
                // Axis-aligned planes at a corner too, not through the middle: in regular shells whole rows end there.
                for normal in [along, upright.cross(to - from), Vector::Z.cross(to - from)] {
                    let normal = normal.normalize_or_zero();
                    if normal != Vector::ZERO {
                        self.weigh(&sample, normal, normal.dot(from), NONE, best);
                    }
                }
            }
        }
    }

    /// Tries the planes of panels themselves. One of them always makes headway: its own pieces are done with.
    fn try_panels(&self, pieces: &[u32], best: &mut Option<Choice>) {
        for &candidate in pieces.iter().step_by(pieces.len().div_ceil(TRIED).max(1)) {
            let panel = self.pieces.all[candidate as usize].panel;
            let plane = self.planes[panel as usize];
            self.weigh(pieces, plane.normal, plane.offset, panel, best);
            if best.as_ref().is_some_and(|best| best.divided == 0) {
                break;
            }
        }
    }

    fn weigh(&self, pieces: &[u32], normal: Vector, offset: f64, owner: u32, best: &mut Option<Choice>) {
        let slack = self.pieces.slack;
        let weight = if pieces.len() <= CELL { 2 * CELL } else { DIVIDED };
        let enough = best.as_ref().map_or(usize::MAX, |best| best.cost);
        let (mut before, mut behind, mut divided) = (0_usize, 0_usize, 0_usize);
        for &piece in pieces {
            if self.pieces.all[piece as usize].panel == owner {
                continue;
            }
            let [least, most] = self.pieces.heights(piece, normal, offset);
            let sides = [most > slack, least < -slack];
            before += usize::from(sides[0]);
            behind += usize::from(sides[1]);
            divided += usize::from(sides[0] && sides[1]);
            if divided * weight >= enough {
                return;
            }
        }
        let cost = divided * weight + before.abs_diff(behind);
        let headway = owner != NONE || before.max(behind) * 10 <= pieces.len() * 8;
        if headway && cost < enough {
            *best = Some(Choice {
                normal,
                offset,
                owner,
                divided,
                cost,
            });
        }
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
