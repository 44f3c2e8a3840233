//! What part of the front is in sight, and how large.

use std::ops::Range;

use egui::{Pos2, Rect, pos2};
use zonewright_geometry::OpenV;

use super::flat::Flat;

/// Room left and right of the front, above it, and below it for the numbers of the Vs; in points.
const MARGIN: f32 = 12.0;
const ABOVE: f32 = 9.0;
const BELOW: f32 = 24.0;
/// The tallest letter, in points.
const TALLEST: f32 = 40.0;
/// A mean letter without the user's own zoom: as wide as fits, within these, in points.
const NARROW: f64 = 8.0;
const WIDE: f64 = 28.0;
/// The widest mean letter that can be zoomed to, in points.
const WIDEST: f64 = 90.0;
/// A mean letter narrower than this is not drawn as a line of its own, in points.
pub(super) const SILHOUETTE: f64 = 2.0;

/// The zoom and the scroll of the strip, as the user left them.
#[derive(Clone, Copy, PartialEq, Debug, Default)]
pub(super) struct Zoom {
    /// Points a mean letter; none for as wide as fits.
    pub scale: Option<f64>,
    /// How far the front is scrolled to the left, in points.
    pub offset: f64,
}

/// A front as it stands in the strip's lane.
#[derive(Clone, Copy, PartialEq, Debug)]
pub(super) struct Sight {
    /// The lane.
    pub lane: Rect,
    /// Points a mean letter.
    pub scale: f64,
    /// How far the front is scrolled to the left, in points.
    pub offset: f64,
    least: f64,
    top: f32,
    fall: f32,
}

impl Sight {
    /// The front in a lane, with the user's zoom as far as the lane allows it.
    #[must_use]
    pub(super) fn new(flat: &Flat, lane: Rect, zoom: Zoom) -> Self {
        let width = flat.width().max(1.0);
        let fits = f64::from((lane.width() - 2.0 * MARGIN).max(1.0)) / width;
        let least = fits.min(NARROW);
        let scale = zoom
            .scale
            .map_or_else(|| fits.clamp(NARROW, WIDE), |own| own.clamp(least, WIDEST));
        let free = (lane.height() - ABOVE - BELOW).max(8.0);
        let levels = flat.levels() as f32;
        let fall = (free / levels).min(TALLEST);
        let mut sight = Self {
            lane,
            scale,
            offset: 0.0,
            least,
            top: lane.top() + ABOVE + (free - fall * levels) / 2.0,
            fall,
        };
        sight.offset = zoom.offset.clamp(0.0, sight.most_offset(flat));
        sight
    }

    /// The whole front in a bar, without margins above and below.
    #[must_use]
    pub(super) fn whole_in(flat: &Flat, bar: Rect) -> Self {
        let scale = f64::from((bar.width() - 2.0 * MARGIN).max(1.0)) / flat.width().max(1.0);
        Self {
            lane: bar,
            scale,
            offset: 0.0,
            least: scale,
            top: bar.top() + 2.0,
            fall: (bar.height() - 4.0) / flat.levels() as f32,
        }
    }

    /// The width of the whole front with its margins, in points.
    #[must_use]
    pub(super) fn whole(&self, flat: &Flat) -> f64 {
        flat.width() * self.scale + 2.0 * f64::from(MARGIN)
    }

    /// Whether the whole front is in sight, to half a point.
    #[must_use]
    pub(super) fn is_whole(&self, flat: &Flat) -> bool {
        self.whole(flat) <= f64::from(self.lane.width()) + 0.5
    }

    fn most_offset(&self, flat: &Flat) -> f64 {
        (self.whole(flat) - f64::from(self.lane.width())).max(0.0)
    }

    /// The scale at which the whole front is in sight, if it is not too wide then.
    #[must_use]
    pub(super) const fn least(&self) -> f64 {
        self.least
    }

    /// Whether letters are too narrow to be drawn one by one.
    #[must_use]
    pub(super) fn is_silhouette(&self) -> bool {
        self.scale < SILHOUETTE
    }

    /// The place across the window of a place along the front, in mean letters.
    #[must_use]
    pub(super) fn x(&self, across: f64) -> f32 {
        self.lane.left() + (f64::from(MARGIN) + across * self.scale - self.offset) as f32
    }

    /// The place along the front, in mean letters, that is at a place across the window.
    #[must_use]
    pub(super) fn across(&self, x: f32) -> f64 {
        (f64::from(x - self.lane.left() - MARGIN) + self.offset) / self.scale
    }

    /// Where a node is.
    #[must_use]
    pub(super) fn node(&self, flat: &Flat, node: usize) -> Pos2 {
        let (across, down) = flat.node(node);
        pos2(self.x(across), self.top + self.fall * down as f32)
    }

    /// The letters in sight.
    #[must_use]
    pub(super) fn letters(&self, flat: &Flat) -> Range<usize> {
        flat.within(self.across(self.lane.left()), self.across(self.lane.right()))
    }

    /// The Vs in sight, by their places among the open Vs.
    #[must_use]
    pub(super) fn vs(&self, flat: &Flat, open: &[OpenV]) -> Range<usize> {
        let letters = self.letters(flat);
        let from = open.partition_point(|v| v.position + 1 < letters.start);
        let to = open.partition_point(|v| v.position < letters.end);
        from..to.max(from)
    }

    /// The place among the open Vs of the V at a place across the window, or, unless `exact`, of the nearest one.
    #[must_use]
    pub(super) fn v_at(&self, flat: &Flat, open: &[OpenV], x: f32, exact: bool) -> Option<usize> {
        let across = self.across(x);
        let next = open.partition_point(|v| flat.node(v.position + 2).0 <= across);
        let far = |at: usize| {
            let v = open.get(at)?;
            let (from, to) = (flat.node(v.position).0, flat.node(v.position + 2).0);
            Some(((from - across).max(across - to).max(0.0), at))
        };
        let near = [next.checked_sub(1), Some(next)].into_iter().flatten().filter_map(far);
        let best = near.min_by(|a, b| a.0.total_cmp(&b.0).then(b.1.cmp(&a.1)));
        best.filter(|(far, _)| !exact || *far == 0.0).map(|(_, at)| at)
    }

    /// The zoom that brings this stretch, in mean letters, into sight; as it is when it is there already.
    #[must_use]
    pub(super) fn reveal(&self, zoom: Zoom, from: f64, to: f64) -> Zoom {
        let (left, right) = (self.x(from) - MARGIN, self.x(to) + MARGIN);
        let by = (self.lane.left() - left).max(0.0) - (right - self.lane.right()).max(0.0);
        Zoom {
            offset: self.offset - f64::from(by),
            ..zoom
        }
    }

    /// The zoom with another scale that leaves a place across the window where it is.
    #[must_use]
    pub(super) fn scaled(&self, flat: &Flat, factor: f64, x: f32) -> Zoom {
        let across = self.across(x).clamp(0.0, flat.width());
        let scale = (self.scale * factor).clamp(self.least, WIDEST);
        Zoom {
            scale: Some(scale),
            offset: f64::from(MARGIN) + across * scale - f64::from(x - self.lane.left()),
        }
    }
}

#[cfg(test)]
mod tests {
    use zonewright_geometry::{Point, Role, Side};

    use super::*;

    fn long() -> (Flat, Vec<OpenV>) {
        let letters: Vec<(Role, f64)> = (0..1000)
            .map(|k| (if k % 2 == 0 { Role::Zig } else { Role::Zag }, 500.0))
            .collect();
        let open = (0..500)
            .map(|k| OpenV {
                side: Side::Fore,
                position: 2 * k,
                nodes: [Point::ORIGIN; 3],
                new: Point::ORIGIN,
                degenerate: false,
            })
            .collect();
        (Flat::new(&letters, false), open)
    }

    fn lane() -> Rect {
        Rect::from_min_max(pos2(100.0, 10.0), pos2(724.0, 90.0))
    }

    #[test]
    fn every_node_lies_within_the_lane_whatever_the_depth() {
        let letters: Vec<(Role, f64)> = (0..100)
            .map(|k| (if k < 50 { Role::Zig } else { Role::Zag }, 1.0))
            .collect();
        let flat = Flat::new(&letters, false);
        let sight = Sight::new(&flat, lane(), Zoom::default());
        assert!((0..=100).all(|n| (10.0..=90.0).contains(&sight.node(&flat, n).y)));
        assert!(sight.whole(&flat) > 624.0, "it scrolls");
    }

    #[test]
    fn the_v_under_a_place_is_found_and_in_sight() {
        let (flat, open) = long();
        let zoom = Zoom {
            scale: Some(10.0),
            offset: 3000.0,
        };
        let sight = Sight::new(&flat, lane(), zoom);
        let vs = sight.vs(&flat, &open);
        assert!(vs.len() <= 33, "{vs:?}");
        for at in vs.clone() {
            let tip = sight.node(&flat, open[at].position + 1);
            assert_eq!(sight.v_at(&flat, &open, tip.x, true), Some(at));
        }
        assert_eq!(sight.v_at(&flat, &open, -1e6, true), None);
        assert_eq!(sight.v_at(&flat, &open, -1e6, false), Some(0));
        assert_eq!(sight.v_at(&flat, &open, 1e6, false), Some(499));
        assert_eq!(sight.v_at(&flat, &[], 200.0, false), None);
    }

    #[test]
    fn zooming_keeps_the_place_under_the_pointer() {
        let (flat, _) = long();
        let before = Sight::new(
            &flat,
            lane(),
            Zoom {
                scale: Some(10.0),
                offset: 3000.0,
            },
        );
        let after = Sight::new(&flat, lane(), before.scaled(&flat, 2.5, 400.0));
        assert!((before.across(400.0) - after.across(400.0)).abs() < 1e-3);
        assert!((after.scale - 25.0).abs() < 1e-9);
    }

    #[test]
    fn what_is_out_of_sight_is_brought_into_it() {
        let (flat, _) = long();
        let zoom = Zoom {
            scale: Some(10.0),
            offset: 0.0,
        };
        let sight = Sight::new(&flat, lane(), zoom);
        assert_eq!(sight.reveal(zoom, 4.0, 6.0).offset, 0.0, "in sight already");
        for to in [700.0, 300.0, 998.0, 0.0] {
            let sight = Sight::new(&flat, lane(), sight.reveal(zoom, to, to + 2.0));
            assert!(
                lane().left() <= sight.x(to) && sight.x(to + 2.0) <= lane().right(),
                "{to}"
            );
        }
    }
}
