//! A front laid out flat: a zig goes down, a zag goes up, each as wide as its edge is long. Kept by revision.

use std::ops::Range;

use zonewright_geometry::Role;

/// A letter is drawn at least and at most this many times as wide as the mean one: lengths can be compared, and none
/// gets too narrow to be pointed at.
const NARROWEST: f64 = 0.6;
const WIDEST: f64 = 1.8;

/// A front laid out flat, in mean letters across and in letters down.
#[derive(Clone, PartialEq, Debug)]
pub(in crate::window) struct Flat {
    /// Where each node lies across.
    across: Vec<f64>,
    /// How deep each node lies.
    depths: Vec<i32>,
    /// The least and the greatest depth.
    reach: [i32; 2],
}

impl Flat {
    /// Lays letters out, each given by its role and its length. `around` draws the first letter again at the end, for a V that
    /// the last one makes with it.
    #[must_use]
    pub(super) fn new(letters: &[(Role, f64)], around: bool) -> Self {
        let total: f64 = letters.iter().map(|(_, length)| length).sum();
        let mean = total / letters.len().max(1) as f64;
        let (mut across, mut depths) = (vec![0.0], vec![0]);
        let (mut x, mut depth, mut reach) = (0.0, 0_i32, [0, 0]);
        for (role, length) in letters.iter().chain(letters.first().filter(|_| around)) {
            let share = length / mean;
            x += if share.is_finite() {
                share.clamp(NARROWEST, WIDEST)
            } else {
                1.0
            };
            depth += match role {
                Role::Zig => 1,
                Role::Zag => -1,
            };
            reach = [reach[0].min(depth), reach[1].max(depth)];
            across.push(x);
            depths.push(depth);
        }
        Self { across, depths, reach }
    }

    /// How many letters are drawn.
    #[must_use]
    pub(super) const fn letters(&self) -> usize {
        self.depths.len() - 1
    }

    /// How wide the whole is, in mean letters.
    #[must_use]
    pub(super) fn width(&self) -> f64 {
        self.across.last().copied().unwrap_or(0.0)
    }

    /// How many levels lie between its highest and its lowest node; at least 1.
    #[must_use]
    pub(super) fn levels(&self) -> i32 {
        (self.reach[1] - self.reach[0]).max(1)
    }

    /// A node: across in mean letters, and down from the highest node in letters.
    #[must_use]
    pub(super) fn node(&self, node: usize) -> (f64, i32) {
        let node = node.min(self.letters());
        (self.across[node], self.depths[node] - self.reach[0])
    }

    /// The letters that reach into a stretch, given in mean letters.
    #[must_use]
    pub(super) fn within(&self, from: f64, to: f64) -> Range<usize> {
        let first = self.across.partition_point(|x| *x <= from).saturating_sub(1);
        let last = self.across.partition_point(|x| *x < to).min(self.letters());
        first.min(last)..last
    }
}

#[cfg(test)]
mod tests {
    use Role::{Zag, Zig};

    use super::*;

    fn equal(roles: &[Role]) -> Vec<(Role, f64)> {
        roles.iter().map(|role| (*role, 400.0)).collect()
    }

    #[test]
    fn a_zigzag_goes_down_and_up_between_two_levels() {
        let flat = Flat::new(&equal(&[Zig, Zag, Zig, Zag]), false);
        let nodes: Vec<(f64, i32)> = (0..5).map(|n| flat.node(n)).collect();
        assert_eq!(nodes, [(0.0, 0), (1.0, 1), (2.0, 0), (3.0, 1), (4.0, 0)]);
        assert_eq!((flat.levels(), flat.letters()), (1, 4));
    }

    #[test]
    fn depth_is_counted_from_the_highest_node() {
        let flat = Flat::new(&equal(&[Zag, Zag, Zig]), false);
        assert_eq!((0..4).map(|n| flat.node(n).1).collect::<Vec<_>>(), [2, 1, 0, 1]);
    }

    #[test]
    fn longer_edges_are_wider_within_limits() {
        // The mean of 100, 200 and 300 is 200: shares 0.5, 1 and 1.5, the first lifted to the narrowest.
        let flat = Flat::new(&[(Zig, 100.0), (Zag, 200.0), (Zig, 300.0)], false);
        let wide: Vec<f64> = (0..3).map(|n| flat.node(n + 1).0 - flat.node(n).0).collect();
        for (wide, meant) in wide.into_iter().zip([NARROWEST, 1.0, 1.5]) {
            assert!((wide - meant).abs() < 1e-12, "{wide} {meant}");
        }
    }

    #[test]
    fn a_v_round_the_end_has_its_second_letter_drawn_again() {
        let flat = Flat::new(&equal(&[Zag, Zig]), true);
        assert_eq!(flat.letters(), 3);
        assert!(flat.node(3).1 < flat.node(2).1, "the zag goes up");
    }

    #[test]
    fn only_letters_that_reach_into_a_stretch_are_in_it() {
        let flat = Flat::new(&equal(&[Zig; 1000]), false);
        assert_eq!(flat.within(99.5, 150.5), 99..151);
        assert_eq!(flat.within(-5.0, 1e9), 0..1000);
        assert_eq!(Flat::new(&[], false).within(0.0, 9.0), 0..0);
    }
}
