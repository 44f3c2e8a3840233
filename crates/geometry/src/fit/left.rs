//! What is left between a shell and its target, panel by panel.

use super::target::Target;
use crate::{Point, Shell, Vector};

/// The place of a panel that is farthest from the target.
#[derive(Clone, Copy, PartialEq, Debug)]
pub struct PanelLeft {
    /// How far, in millimetres; negative where the target lies outside of the panel.
    pub signed_mm: f64,
    /// The place of the panel: a corner, or its middle.
    pub at: Point,
    /// The closest place of the target.
    pub closest: Point,
}

/// For each panel, whichever of its corners and its middle is farthest from the target.
///
/// Positive distances stand outside of the target: the way from the target to the panel goes with the panel's outside.
#[must_use]
pub fn left_of_panels(shell: &Shell, target: &Target) -> Vec<PanelLeft> {
    let corners: Vec<_> = shell.points.iter().map(|p| target.closest(*p)).collect();
    shell
        .panels
        .iter()
        .map(|panel| {
            let places = panel.corners.map(|v| shell.points[v as usize]);
            let middle = places[0] + (places[2] - places[0]) * 0.5;
            let outside = normal(places);
            let near = target.closest(middle);
            let all = panel
                .corners
                .iter()
                .map(|&v| (shell.points[v as usize], corners[v as usize]));
            let (at, closest) = all.fold((middle, near), |far, next| {
                if next.1.distance_mm > far.1.distance_mm {
                    next
                } else {
                    far
                }
            });
            let way = at - closest.at;
            let sign = if way.dot(outside) < 0.0 { -1.0 } else { 1.0 };
            PanelLeft {
                signed_mm: closest.distance_mm * sign,
                at,
                closest: closest.at,
            }
        })
        .collect()
}

fn normal([a, b, c, _]: [Point; 4]) -> Vector {
    (b - a).cross(c - b)
}
