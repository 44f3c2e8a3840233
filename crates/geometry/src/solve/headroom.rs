//! Headroom: how high the underside is above the ground.

use glam::DVec2;

use super::Headroom;
use crate::{Shell, Vector};

/// A place outside a panel by less than this part of the panel still counts as on it, so that no vertical line slips between neighbours.
const ON_PANEL: f64 = 1e-9;

/// The lowest height at which vertical lines at a distance from a place meet the shell, in millimetres above z = 0; none when none meets it.
///
/// With a direction, or no distance, there is one such line. Without, the lines stand on a circle: over a panel the height goes as a linear function
/// along that circle, so it is lowest where the circle enters or leaves the panel, or where it runs level (derived); nothing is sampled.
pub(super) fn headroom(shell: &Shell, from: [f64; 2], at: Headroom) -> Option<f64> {
    let centre = DVec2::from(from);
    let radius = at.distance_mm;
    let mut lowest = f64::INFINITY;
    let one_line = match at.azimuth {
        Some(azimuth) => Some(centre + radius * DVec2::from_angle(azimuth.radians())),
        None if radius == 0.0 => Some(centre),
        None => None,
    };
    for panel in (0_u32..).take(shell.panels.len()) {
        let [a, b, _, d] = shell.corner_points(panel);
        let face = Face {
            at: a.0,
            sides: [b - a, d - a],
        };
        let height = match one_line {
            Some(place) => face.height_at(place),
            None => face.lowest_on_circle(centre, radius),
        };
        lowest = lowest.min(height.unwrap_or(f64::INFINITY));
    }
    lowest.is_finite().then_some(lowest)
}

/// A panel: a corner and the two sides from it.
struct Face {
    at: Vector,
    sides: [Vector; 2],
}

impl Face {
    /// Its height over a place in plan; none beside it. A panel that stands upright is met at its lower side.
    fn height_at(&self, place: DVec2) -> Option<f64> {
        let [u, v] = self.sides.map(Vector::truncate);
        let area = u.perp_dot(v);
        let to = place - self.at.truncate();
        if area == 0.0 {
            return None;
        }
        let [s, t] = [to.perp_dot(v) / area, u.perp_dot(to) / area];
        let on = -ON_PANEL..=1.0 + ON_PANEL;
        (on.contains(&s) && on.contains(&t)).then(|| self.at.z + s * self.sides[0].z + t * self.sides[1].z)
    }

    fn lowest_on_circle(&self, centre: DVec2, radius: f64) -> Option<f64> {
        let [u, v] = self.sides;
        let mut lowest = f64::INFINITY;
        for (from, along) in [(self.at, u), (self.at, v), (self.at + u, v), (self.at + v, u)] {
            for part in crossings(from.truncate() - centre, along.truncate(), radius) {
                lowest = lowest.min(from.z + part * along.z);
            }
        }
        // Downhill in plan, at the circle's point in that direction the height is stationary.
        let normal = u.cross(v);
        let downhill = normal.truncate() * normal.z.signum();
        if downhill != DVec2::ZERO && normal.z != 0.0 {
            let place = centre + downhill.normalize() * radius;
            lowest = lowest.min(self.height_at(place).unwrap_or(f64::INFINITY));
        } else if let Some(level) = self.height_at(centre + DVec2::X * radius) {
            // A level panel that holds the whole circle.
            lowest = lowest.min(level);
        }
        lowest.is_finite().then_some(lowest)
    }
}

/// Where a segment, seen from the centre of a circle, meets it: parts of the segment from 0 to 1.
fn crossings(from: DVec2, along: DVec2, radius: f64) -> impl Iterator<Item = f64> {
    // |from + t along| = radius.
    let [a, half_b] = [along.length_squared(), from.dot(along)];
    let c = (from.length() - radius) * (from.length() + radius);
    let root = (half_b * half_b - a * c).sqrt();
    let both = [(-half_b - root) / a, (-half_b + root) / a];
    both.into_iter().filter(|t| (-ON_PANEL..=1.0 + ON_PANEL).contains(t))
}
