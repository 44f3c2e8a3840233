//! Which boxes overlap: a tree of boxes over a space-filling curve.

use crate::{Point, Vector};

/// A box along the axes.
#[derive(Clone, Copy)]
pub(crate) struct Extent {
    pub(crate) least: Vector,
    pub(crate) most: Vector,
}

impl Extent {
    /// The box of nothing.
    pub(crate) const NOTHING: Self = Self {
        least: Vector::INFINITY,
        most: Vector::NEG_INFINITY,
    };

    /// The box of this and a place.
    pub(crate) fn and(self, place: Point) -> Self {
        Self {
            least: self.least.min(place.0),
            most: self.most.max(place.0),
        }
    }

    /// The box of both.
    fn with(self, other: Self) -> Self {
        Self {
            least: self.least.min(other.least),
            most: self.most.max(other.most),
        }
    }

    /// The box moved out by `by` on all sides.
    pub(crate) fn grown(self, by: f64) -> Self {
        Self {
            least: self.least - Vector::splat(by),
            most: self.most + Vector::splat(by),
        }
    }

    /// The squared distance to a place; 0 inside.
    fn squared_distance(&self, place: Vector) -> f64 {
        let outside = (self.least - place).max(place - self.most).max(Vector::ZERO);
        outside.length_squared()
    }

    /// All six comparisons without a branch between them: most pairs that are asked for are a toss-up.
    fn overlaps(&self, other: &Self) -> bool {
        (self.least.x <= other.most.x)
            & (other.least.x <= self.most.x)
            & (self.least.y <= other.most.y)
            & (other.least.y <= self.most.y)
            & (self.least.z <= other.most.z)
            & (other.least.z <= self.most.z)
    }
}

/// Items with boxes, and boxes of boxes above them, two by two.
pub(crate) struct Tree {
    items: Vec<(u32, Extent)>,
    /// `levels[0]` has a box for each run of [`RUN`] items, every further level one for two of the level below.
    levels: Vec<Vec<Extent>>,
}

/// How many items have the lowest boxes in common.
const RUN: usize = 4;

/// Cells along an axis of the curve: three times 21 bits fill a key.
const CELLS: f64 = 2_097_151.0;

impl Tree {
    /// A tree over items with finite boxes.
    pub(crate) fn new(items: Vec<(u32, Extent)>) -> Self {
        let all = items.iter().fold(Extent::NOTHING, |all, item| all.with(item.1));
        let span = (all.most - all.least).max_element();
        let scale = if span > 0.0 { 0.5 * CELLS / span } else { 0.0 };
        let key = |extent: &Extent| {
            let cell = (extent.least + extent.most - 2.0 * all.least) * scale;
            let [x, y, z] = cell.to_array().map(spread);
            x | y << 1 | z << 2
        };
        let mut keyed: Vec<_> = (0_u32..).zip(&items).map(|(k, (_, e))| (key(e), k)).collect();
        keyed.sort_unstable();
        let items: Vec<_> = keyed.into_iter().map(|(_, k)| items[k as usize]).collect();

        let bound = |run: &[(u32, Extent)]| run.iter().fold(Extent::NOTHING, |all, item| all.with(item.1));
        let mut levels = vec![items.chunks(RUN).map(bound).collect::<Vec<_>>()];
        while let Some(below) = levels.last()
            && below.len() > 1
        {
            let bound = |two: &[Extent]| two.iter().fold(Extent::NOTHING, |all, e| all.with(*e));
            levels.push(below.chunks(2).map(bound).collect());
        }
        Self { items, levels }
    }

    /// The items along the curve.
    pub(crate) fn order(&self) -> impl Iterator<Item = u32> {
        self.items.iter().map(|item| item.0)
    }

    /// Calls for every two items whose boxes overlap, once each, with their positions in [`Tree::order`]. The order of the calls
    /// depends only on the boxes.
    pub(crate) fn pairs(&self, mut visit: impl FnMut(usize, usize)) {
        let mut stack = vec![(self.levels.len() - 1, 0, 0)];
        while let Some((level, i, j)) = stack.pop() {
            let boxes = &self.levels[level];
            // The last node of a level may have one child only.
            if i >= boxes.len() || j >= boxes.len() || !boxes[i].overlaps(&boxes[j]) {
                continue;
            }
            if level == 0 {
                self.pairs_of_runs(i, j, &mut visit);
            } else if i == j {
                stack.extend(
                    [(2 * i, 2 * i), (2 * i, 2 * i + 1), (2 * i + 1, 2 * i + 1)].map(|(p, q)| (level - 1, p, q)),
                );
            } else {
                let four = [
                    (2 * i, 2 * j),
                    (2 * i, 2 * j + 1),
                    (2 * i + 1, 2 * j),
                    (2 * i + 1, 2 * j + 1),
                ];
                stack.extend(four.map(|(p, q)| (level - 1, p, q)));
            }
        }
    }

    /// Calls for the items whose boxes are within a distance of a place, given squared; nearer boxes go first where the tree can tell.
    /// What a call gives back is the squared distance that counts from then on.
    pub(crate) fn near(&self, place: Vector, mut within: f64, mut visit: impl FnMut(u32) -> f64) {
        let mut stack = vec![(self.levels.len() - 1, 0, 0.0)];
        while let Some((level, node, far)) = stack.pop() {
            if far > within {
                continue;
            }
            if level == 0 {
                let run = node * RUN..self.items.len().min(node * RUN + RUN);
                for (item, extent) in &self.items[run] {
                    if extent.squared_distance(place) <= within {
                        within = visit(*item);
                    }
                }
                continue;
            }
            let below = &self.levels[level - 1];
            let far = |child: usize| below.get(child).map(|e| (level - 1, child, e.squared_distance(place)));
            let [one, other] = [far(2 * node), far(2 * node + 1)];
            let one_first = one.is_some_and(|a| other.is_none_or(|b| a.2 <= b.2));
            let ordered = if one_first { [other, one] } else { [one, other] };
            stack.extend(ordered.into_iter().flatten());
        }
    }

    fn pairs_of_runs(&self, i: usize, j: usize, visit: &mut impl FnMut(usize, usize)) {
        let run = |k: usize| k * RUN..self.items.len().min(k * RUN + RUN);
        let whole = self.levels[0][j];
        for one in run(i) {
            let extent = self.items[one].1;
            if !extent.overlaps(&whole) {
                continue;
            }
            let others = if i == j { one + 1..run(j).end } else { run(j) };
            for other in others {
                if extent.overlaps(&self.items[other].1) {
                    visit(one, other);
                }
            }
        }
    }
}

/// The lowest 21 bits of a whole number, two zeros between any two of them.
#[expect(
    clippy::cast_possible_truncation,
    clippy::cast_sign_loss,
    reason = "the cell is between 0 and 2^21, and a cast of a float saturates"
)]
fn spread(cell: f64) -> u64 {
    let mut bits = cell as u64 & 0x1f_ffff;
    bits = (bits | bits << 32) & 0x001f_0000_0000_ffff;
    bits = (bits | bits << 16) & 0x001f_0000_ff00_00ff;
    bits = (bits | bits << 8) & 0x100f_00f0_0f00_f00f;
    bits = (bits | bits << 4) & 0x10c3_0c30_c30c_30c3;
    (bits | bits << 2) & 0x1249_2492_4924_9249
}
