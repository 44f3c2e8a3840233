//! Panels that are thought of being added to a shell.

use super::{meetings, tree::Extent};
use crate::{Panel, Point, Shell};

/// How many pairs cross, or lie on the same place, among new panels and between them and those that are there.
///
/// Panels are given by their corners in order. Those that are there are looked at only near the new ones.
#[must_use]
pub fn crossings_of_new(there: &[[Point; 4]], new: &[[Point; 4]]) -> usize {
    let around = new.iter().flatten().fold(Extent::NOTHING, |extent, p| extent.and(*p));
    let near = there.iter().filter(|corners| {
        let own = corners.iter().fold(Extent::NOTHING, |extent, p| extent.and(*p));
        own.least.cmple(around.most).all() && around.least.cmple(own.most).all()
    });
    let mut together = Shell::default();
    for (index, corners) in (0_u32..).zip(new.iter().chain(near)) {
        together.points.extend(corners);
        together.panels.push(Panel {
            corners: [0, 1, 2, 3].map(|k| 4 * index + k),
            letters: [0; 2],
            course: 1,
        });
    }
    let is_new = |panel: u32| (panel as usize) < new.len();
    let found = meetings(&together);
    let crossing = found.crossings.iter().filter(|c| is_new(c.panels[0])).count();
    crossing + found.doubled.iter().filter(|pair| is_new(pair[0])).count()
}
