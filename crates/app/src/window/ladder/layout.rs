//! Where the rows of the ladder stand: upright, the start at the bottom.

use egui::{Rect, pos2};

use super::model::{Ladder, Row, RowKind};

/// Height of a step, in points.
const STEP: f32 = 26.0;
/// Height of a course: as much as there is room for, within these.
const COURSE: [f32; 2] = [13.0, 20.0];
/// Room above the top row and below the start.
const AIR: f32 = 10.0;
/// Room for the numbers on the left, and for the counts of panels on the right.
pub(super) const NUMBERS: f32 = 36.0;
const COUNTS: f32 = 34.0;

/// The rows of a ladder in a place of a size.
#[derive(Debug)]
pub(super) struct Layout {
    /// How high each row begins above the bottom; one more than there are rows.
    heights: Vec<f32>,
    bottom: f32,
    left: f32,
    right: f32,
    /// Where the rungs begin: fore courses run to the right from here, aft ones to the left.
    spine: f32,
    /// Points a panel.
    scale: f32,
}

impl Layout {
    /// How high a ladder is that may be so high without scrolling.
    pub(super) fn new(ladder: &Ladder, room: f32) -> Self {
        let courses = ladder.courses.iter().sum::<u32>() as f32;
        let steps = ladder.rows.len() as f32 - courses;
        let course = ((room - 2.0 * AIR - steps * STEP) / courses.max(1.0)).clamp(COURSE[0], COURSE[1]);
        let mut at = 0.0;
        let mut heights = Vec::with_capacity(ladder.rows.len() + 1);
        heights.push(at);
        for row in &ladder.rows {
            at += if matches!(row.kind, RowKind::Course { .. }) {
                course
            } else {
                STEP
            };
            heights.push(at);
        }
        Self {
            heights,
            bottom: 0.0,
            left: 0.0,
            right: 0.0,
            spine: 0.0,
            scale: 0.0,
        }
    }

    /// The height of all rows.
    pub(super) fn height(&self) -> f32 {
        self.heights.last().copied().unwrap_or(0.0) + 2.0 * AIR
    }

    /// Stands the ladder into a place, at its bottom.
    pub(super) fn stand(&mut self, ladder: &Ladder, place: Rect) {
        let [fore, aft] = ladder.longest.map(|n| n as f32);
        let room = place.width() - NUMBERS - COUNTS;
        self.bottom = place.bottom() - AIR;
        self.left = place.left();
        self.right = place.right();
        self.scale = room / (fore + aft).max(1.0);
        self.spine = place.left() + NUMBERS + aft * self.scale;
    }

    pub(super) const fn spine(&self) -> f32 {
        self.spine
    }

    /// The place of a row.
    pub(super) fn row(&self, at: usize) -> Rect {
        let edge = |k: usize| self.bottom - self.heights.get(k).copied().unwrap_or(0.0);
        Rect::from_min_max(pos2(self.left, edge(at + 1)), pos2(self.right, edge(at)))
    }

    /// The rung of a course: never so short that it cannot be seen.
    pub(super) fn rung(&self, at: usize, row: &Row) -> Rect {
        let place = self.row(at);
        let RowKind::Course { number, panels } = row.kind else {
            return place;
        };
        let length = (panels as f32 * self.scale).max(2.0);
        let thick = (place.height() * 0.58).round();
        let [from, to] = if number < 0 {
            [self.spine - length, self.spine]
        } else {
            [self.spine, self.spine + length]
        };
        let top = (place.center().y - thick * 0.5).round();
        Rect::from_min_max(pos2(from, top), pos2(to, top + thick))
    }

    /// The row at a height of the window; above the top and below the start the nearest.
    pub(super) fn row_at(&self, y: f32) -> usize {
        let up = self.bottom - y;
        let rows = self.heights.len().saturating_sub(1);
        self.heights.partition_point(|h| *h <= up).clamp(1, rows.max(1)) - 1
    }

    /// The rows between two heights of the window, from the lower one upwards.
    pub(super) fn seen(&self, top: f32, bottom: f32) -> std::ops::RangeInclusive<usize> {
        self.row_at(bottom)..=self.row_at(top)
    }

    /// The row whose upper edge is near a height of the window.
    pub(super) fn edge_near(&self, y: f32, reach: f32) -> Option<usize> {
        let at = self.row_at(y);
        [Some(at), at.checked_sub(1)]
            .into_iter()
            .flatten()
            .find(|row| (self.row(*row).top() - y).abs() <= reach)
    }

    /// The place in the record that a step dragged to a height would take, and the row that it would stand above.
    pub(super) fn step_at(&self, ladder: &Ladder, from: usize, y: f32) -> (usize, usize) {
        let mut to = 0;
        let mut above = 0;
        for (row, what) in ladder.rows.iter().enumerate() {
            if let RowKind::Step(step) = what.kind
                && step != from
                && y < self.row(row).center().y
            {
                to += 1;
                above = row;
            }
        }
        (to, above)
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::window::ladder::Climbed;

    fn ladder(courses: &[(i32, u32)]) -> Ladder {
        let row = |kind| Row {
            kind,
            place: Some(Climbed::Start),
            stop: true,
        };
        let mut rows = vec![row(RowKind::Start)];
        rows.extend(
            courses
                .iter()
                .map(|&(number, panels)| row(RowKind::Course { number, panels })),
        );
        rows.push(row(RowKind::Step(0)));
        let longest = |aft: bool| {
            let side = courses.iter().filter(|c| (c.0 < 0) == aft);
            side.map(|c| c.1).max().unwrap_or(0)
        };
        Ladder {
            rows,
            longest: [longest(false), longest(true)],
            courses: [courses.len() as u32, 0],
            ..Ladder::default()
        }
    }

    fn standing(ladder: &Ladder, room: f32) -> Layout {
        let mut layout = Layout::new(ladder, room);
        let place = Rect::from_min_max(pos2(10.0, 0.0), pos2(170.0, layout.height().max(room)));
        layout.stand(ladder, place);
        layout
    }

    #[test]
    fn rungs_are_as_long_as_they_have_panels_and_lie_within_the_ladder() {
        let ladder = ladder(&[(1, 10_000), (-1, 5_000), (2, 1)]);
        let layout = standing(&ladder, 600.0);
        let rung = |at: usize| layout.rung(at, &ladder.rows[at]);
        assert!((rung(1).width() - 2.0 * rung(2).width()).abs() < 1e-3);
        assert!((rung(1).width() + rung(2).width() - (160.0 - NUMBERS - COUNTS)).abs() < 1e-3);
        assert_eq!(rung(1).left(), rung(2).right(), "fore and aft part at the spine");
        assert!(rung(3).width() >= 2.0, "one panel of ten thousand is still seen");
    }

    #[test]
    fn rows_are_found_where_they_stand_and_only_those_in_sight() {
        let courses: Vec<(i32, u32)> = (1..=500).map(|n| (n, 8)).collect();
        let ladder = ladder(&courses);
        let layout = standing(&ladder, 600.0);
        for at in [0, 1, 250, 501] {
            assert_eq!(layout.row_at(layout.row(at).center().y), at);
        }
        let seen = layout.seen(layout.row(300).top(), layout.row(280).bottom());
        assert!(*seen.start() >= 279 && *seen.end() <= 301, "{seen:?}");
        assert_eq!((layout.row_at(-1e6), layout.row_at(1e6)), (501, 0));
        let edge = layout.row(250).top();
        assert_eq!(layout.edge_near(edge + 3.0, 4.0), Some(250));
    }
}
