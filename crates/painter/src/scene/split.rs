//! Convex pieces of panels, and dividing them by a plane.

use std::collections::HashMap;

use zonewright_geometry::{NONE, Vector};

use crate::picture::index;

/// A piece of a panel: corners in [`Pieces::corners`], counter-clockwise from outside.
#[derive(Clone, Copy, Debug)]
pub(super) struct Piece {
    pub(super) first: u32,
    pub(super) count: u32,
    pub(super) panel: u32,
}

/// What a plane leaves of some pieces.
#[derive(Default)]
pub(super) struct Parted {
    /// On the side to which the normal points, behind, and in the plane.
    pub(super) before: Vec<u32>,
    pub(super) behind: Vec<u32>,
    pub(super) within: Vec<u32>,
}

/// All pieces that came up, also those that were divided further.
pub(super) struct Pieces {
    pub(super) points: Vec<Vector>,
    pub(super) corners: Vec<u32>,
    /// The edge from a corner to the next; [`NONE`] along a cut.
    pub(super) sides: Vec<u32>,
    pub(super) all: Vec<Piece>,
    /// What counts as lying in a plane, in millimetres.
    pub(super) slack: f64,
    heights: Vec<f64>,
}

impl Pieces {
    pub(super) fn new(points: Vec<Vector>, slack: f64) -> Self {
        Self {
            points,
            corners: Vec::new(),
            sides: Vec::new(),
            all: Vec::new(),
            slack,
            heights: Vec::new(),
        }
    }

    pub(super) fn corners_of(&self, piece: u32) -> &[u32] {
        let piece = &self.all[piece as usize];
        &self.corners[piece.first as usize..][..piece.count as usize]
    }

    pub(super) fn points_of(&self, piece: u32) -> impl Iterator<Item = Vector> {
        self.corners_of(piece).iter().map(|&v| self.points[v as usize])
    }

    /// The least and the greatest height of a piece above a plane.
    pub(super) fn heights(&self, piece: u32, normal: Vector, offset: f64) -> [f64; 2] {
        let mut range = [f64::MAX, f64::MIN];
        for point in self.points_of(piece) {
            let height = normal.dot(point) - offset;
            range = [range[0].min(height), range[1].max(height)];
        }
        range
    }

    /// Parts pieces by a plane, dividing those that cross it. Pieces of `owner`, whose plane it is, lie in it.
    pub(super) fn part(&mut self, pieces: &[u32], normal: Vector, offset: f64, owner: u32) -> Parted {
        let mut parted = Parted::default();
        // One new point where the plane cuts a line, also when two pieces share the line: no gap opens between them.
        let mut cuts = HashMap::new();
        for &piece in pieces {
            if self.all[piece as usize].panel == owner {
                parted.within.push(piece);
                continue;
            }
            let [least, most] = self.heights(piece, normal, offset);
            match (least < -self.slack, most > self.slack) {
                (false, false) => parted.within.push(piece),
                (false, true) => parted.before.push(piece),
                (true, false) => parted.behind.push(piece),
                (true, true) => {
                    let [before, behind] = self.divide(piece, normal, offset, &mut cuts);
                    parted.before.push(before);
                    parted.behind.push(behind);
                }
            }
        }
        parted
    }

    fn divide(&mut self, piece: u32, normal: Vector, offset: f64, cuts: &mut HashMap<(u32, u32), u32>) -> [u32; 2] {
        let Piece { first, count, panel } = self.all[piece as usize];
        let (first, count) = (first as usize, count as usize);
        let slack = self.slack;
        self.heights.clear();
        for k in 0..count {
            let point = self.points[self.corners[first + k] as usize];
            self.heights.push(normal.dot(point) - offset);
        }
        [1.0, -1.0].map(|sign| {
            let start = self.corners.len();
            for k in 0..count {
                let next = (k + 1) % count;
                let [a, b] = [self.corners[first + k], self.corners[first + next]];
                let side = self.sides[first + k];
                let [ha, hb] = [self.heights[k] * sign, self.heights[next] * sign];
                let crosses = (ha > slack && hb < -slack) || (ha < -slack && hb > slack);
                if ha >= -slack {
                    self.corners.push(a);
                    // From a corner in the plane to the far side, or where the line leaves this half at a corner in the
                    // plane, the next corner of this half is reached along the cut.
                    self.sides.push(if hb < -slack && !crosses { NONE } else { side });
                }
                if crosses {
                    let (low, high) = (a.min(b), a.max(b));
                    let [hl, hh] = if low == a { [ha, hb] } else { [hb, ha] };
                    let points = &mut self.points;
                    let cut = *cuts.entry((low, high)).or_insert_with(|| {
                        let [p, q] = [low, high].map(|v| points[v as usize]);
                        points.push(p.lerp(q, hl / (hl - hh)));
                        index(points.len() - 1)
                    });
                    self.corners.push(cut);
                    self.sides.push(if ha > 0.0 { NONE } else { side });
                }
            }
            self.all.push(Piece {
                first: index(start),
                count: index(self.corners.len() - start),
                panel,
            });
            index(self.all.len() - 1)
        })
    }
}
