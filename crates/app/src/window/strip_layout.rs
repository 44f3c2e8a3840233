//! Where the nodes of a front lie in the strip: a zig goes down, a zag goes up.

use zonewright_geometry::Role;

/// Room above and below the zigzag, in points.
const MARGIN: f32 = 14.0;
/// The widest and the narrowest letter, in points.
const WIDEST: f32 = 28.0;
const NARROWEST: f32 = 8.0;
/// The tallest letter, in points.
const TALLEST: f32 = 40.0;

/// A front laid out flat.
#[derive(Clone, PartialEq, Debug)]
pub(super) struct Zigzag {
    /// How deep each node lies, in letters.
    depths: Vec<i32>,
    width: f32,
    height: f32,
    top: f32,
}

impl Zigzag {
    /// Lays a front out in a room. `around` draws the first letter again at the end, for a V that the last one makes with it.
    #[must_use]
    pub(super) fn new(roles: &[Role], around: bool, room: (f32, f32)) -> Self {
        let mut depths = vec![0];
        let again = roles.first().filter(|_| around);
        for role in roles.iter().chain(again) {
            let last = depths.last().copied().unwrap_or(0);
            depths.push(match role {
                Role::Zig => last + 1,
                Role::Zag => last - 1,
            });
        }
        let (least, most) = depths.iter().fold((0, 0), |(l, m), d| (l.min(*d), m.max(*d)));
        let letters = (depths.len() - 1).max(1) as f32;
        let width = ((room.0 - 2.0 * MARGIN) / letters).clamp(NARROWEST, WIDEST);
        let free = (room.1 - 2.0 * MARGIN - 8.0).max(8.0);
        let height = (free / (most - least).max(1) as f32).min(TALLEST);
        let used = height * (most - least) as f32;
        let top = MARGIN + (free - used) / 2.0 - height * least as f32;
        Self {
            depths,
            width,
            height,
            top,
        }
    }

    /// The width of the whole strip.
    #[must_use]
    pub(super) fn width(&self) -> f32 {
        2.0 * MARGIN + self.width * (self.depths.len() - 1) as f32
    }

    /// Where a node lies: right and down from the strip's corner. Nodes count from 0; a closed front's go round.
    #[must_use]
    pub(super) fn node(&self, node: usize) -> (f32, f32) {
        let depth = self.depths.get(node).copied().unwrap_or(0);
        (MARGIN + self.width * node as f32, self.top + self.height * depth as f32)
    }

    /// The letters between two places across the strip.
    #[must_use]
    pub(super) fn seen(&self, left: f32, right: f32) -> std::ops::Range<usize> {
        let last = self.depths.len() - 1;
        let letter = |x: f32| ((x - MARGIN) / self.width).max(0.0) as usize;
        letter(left - self.width).min(last)..(letter(right) + 2).min(last)
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use Role::{Zag, Zig};

    #[test]
    fn a_zigzag_goes_down_and_up_between_two_levels() {
        let strip = Zigzag::new(&[Zig, Zag, Zig, Zag], false, (400.0, 100.0));
        let nodes: Vec<(f32, f32)> = (0..5).map(|n| strip.node(n)).collect();
        assert_eq!([nodes[0].1, nodes[2].1], [nodes[4].1; 2]);
        assert!(nodes[1].1 > nodes[0].1, "a zig goes down");
        assert!(nodes.iter().all(|(_, y)| (0.0..=100.0).contains(y)));
        assert!(nodes.windows(2).all(|w| w[0].0 < w[1].0));
    }

    #[test]
    fn all_zigs_before_all_zags_still_fit_the_height() {
        let roles = [[Zig; 50], [Zag; 50]].concat();
        let strip = Zigzag::new(&roles, false, (600.0, 90.0));
        assert!((0..=100).all(|n| (0.0..=90.0).contains(&strip.node(n).1)));
        assert!(strip.width() > 600.0, "it scrolls");
    }

    #[test]
    fn a_v_round_the_end_has_its_second_letter_drawn_again() {
        let strip = Zigzag::new(&[Zag, Zig], true, (300.0, 90.0));
        assert!(strip.node(3).0 > strip.node(2).0);
        assert!(strip.node(2).1 > strip.node(3).1);
    }

    #[test]
    fn only_letters_in_sight_are_drawn() {
        let strip = Zigzag::new(&[Zig; 1000], false, (600.0, 90.0));
        let seen = strip.seen(1000.0, 1600.0);
        assert!(seen.start > 100 && seen.end < 250, "{seen:?}");
        assert_eq!(strip.seen(0.0, 1e9), 0..1000);
    }
}
