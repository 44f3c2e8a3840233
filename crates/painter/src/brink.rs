//! Keeping strokes on their side of planes that are seen edge-on.
//!
//! A stroke is wider than the edge it stands for. Back to front, what lies on one side of a plane is drawn before all that lies on
//! the other, and where the plane faces the eye or turns away, what a stroke covers beyond it is behind the stroke. Seen edge-on
//! it is not: the plane is a line on the picture, and across it lie things nearer than the stroke that are drawn already.

use zonewright_geometry::{Shell, Vector};

use crate::{Lens, Scene};

/// How much nearer than a stroke something must be to hide it, in half widths of the stroke: panels that border the edge or bend
/// away from it are nearer than that within the stroke's width unless they are very steep, another side of the shell is not.
const NEARER: f64 = 8.0;

/// A plane seen edge-on, one side of which is drawn already.
#[derive(Clone, Copy, Debug)]
pub(crate) struct Brink {
    /// In camera coordinates, towards the side that is being drawn; as long as a move across the picture of length 1, away from
    /// the plane, raises by 1.
    normal: Vector,
    /// The height of the eye's place above the plane, in the same measure.
    eye: f64,
}

impl Brink {
    /// The plane where `normal . p = offset`; what lies where `normal` points to is drawn last.
    pub(crate) fn new(lens: &Lens, normal: Vector, offset: f64) -> Self {
        let seen = Vector::new(normal.dot(lens.right), normal.dot(lens.up), normal.dot(lens.forward));
        let across = seen.x.hypot(seen.y);
        Self {
            normal: seen / across,
            eye: (normal.dot(lens.eye.0) - offset) / across,
        }
    }

    /// How far a point is from the plane across the picture, in millimetres.
    fn away(&self, seen: Vector) -> f64 {
        self.normal.dot(seen) + self.eye
    }
}

impl Scene {
    /// How near to a plane, as [`Lens::side`] tells it, the eye must be to see it edge-on: over the whole depth of the shell the
    /// plane then moves on the picture by less than `reach` pixels, so that strokes of that reach can come out on its other side.
    pub(crate) fn slimmest(&self, lens: &Lens, reach: f64) -> f64 {
        let Some(bounds) = self.bounds else { return 0.0 };
        let depths = bounds.corners().map(|corner| lens.to_camera(corner).z);
        let far = depths.into_iter().fold(f64::MIN, f64::max);
        let near = depths.into_iter().fold(f64::MAX, f64::min);
        let moves = match lens.projection {
            crate::Projection::Perspective => lens.scale(near.max(lens.near)) - lens.scale(far.max(lens.near)),
            crate::Projection::Parallel => lens.scale(near) * (far - near),
        };
        if moves > 0.0 { reach / moves } else { 0.0 }
    }

    /// The ends, in camera coordinates, of a stroke as they come on the picture, moved by up to `reach`, half the stroke's width,
    /// so that it does not come out beyond planes seen edge-on where something nearer is.
    pub(crate) fn held_back(
        &self,
        shell: &Shell,
        lens: &Lens,
        brinks: &[Brink],
        ends: [Vector; 2],
        reach: f64,
    ) -> [[f32; 2]; 2] {
        let mut moved = ends.map(|seen| lens.onto(seen));
        let reaches = ends.map(|seen| reach / lens.scale(seen.z));
        for brink in brinks {
            let aways = ends.map(|seen| brink.away(seen));
            let touches = [aways[0] < reaches[0], aways[1] < reaches[1]];
            if touches == [false; 2] {
                continue;
            }
            let away = [brink.normal.x, -brink.normal.y];
            // The middle of what comes out beyond the plane.
            let hidden = |seen: Vector| {
                let across = (reach + brink.away(seen) * lens.scale(seen.z)) * -0.5;
                self.hides(shell, lens, seen, away.map(|x| x * across), NEARER * reach)
            };
            let middle = touches == [true; 2] && hidden((ends[0] + ends[1]) * 0.5);
            for k in 0..2 {
                if touches[k] && (middle || hidden(ends[k])) {
                    let by = (reaches[k] - aways[k]) * lens.scale(ends[k].z);
                    moved[k] = [0, 1].map(|axis| moved[k][axis] + pixels(away[axis] * by));
                }
            }
        }
        moved
    }

    /// Whether something is nearer than a point seen, by more than so many pixels, so far beside it on the picture.
    fn hides(&self, shell: &Shell, lens: &Lens, seen: Vector, beside: [f64; 2], nearer: f64) -> bool {
        let place = lens.onto(seen);
        let ray = lens.ray([place[0] + pixels(beside[0]), place[1] + pixels(beside[1])]);
        let along = ray.along.dot(lens.forward);
        let first = match lens.projection {
            crate::Projection::Perspective => lens.near,
            // Before all of the shell, also where that begins behind the eye.
            crate::Projection::Parallel => self
                .bounds
                .map_or(0.0, |bounds| lens.to_camera(bounds.centre()).z - bounds.diagonal()),
        };
        let last = seen.z - nearer / lens.scale(seen.z);
        self.meets(shell, &ray, [first / along, last / along])
    }
}

#[expect(clippy::cast_possible_truncation, reason = "pixels need no more than f32")]
const fn pixels(length: f64) -> f32 {
    length as f32
}
