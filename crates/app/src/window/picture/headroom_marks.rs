//! Where wanted headroom is measured: the line or circle on the ground, and the height above it.

use core::f64::consts::TAU;

use zonewright_geometry::{
    Point,
    solve::{Figure, Headroom, figure, middle},
};
use zonewright_painter::{Mark, MarkKind, Tone};

use super::marks::{line, mark};
use crate::window::state::State;

/// Parts of a drawn circle.
const PARTS: u32 = 72;

/// Where headroom is wanted.
pub(super) fn wanted(state: &State) -> Vec<Headroom> {
    let of = |figure: Figure| match figure {
        Figure::Headroom(at) => Some(at),
        _ => None,
    };
    state.solving.wants.iter().filter_map(|w| of(w.figure)).collect()
}

pub(super) fn marks(state: &State, marks: &mut Vec<Mark>) {
    let shell = &state.derived.shell;
    for at in wanted(state) {
        let Some(height) = figure(state.shape(), shell, Figure::Headroom(at)) else {
            continue;
        };
        let [x, y] = at.from.unwrap_or_else(|| middle(state.shape(), shell));
        let place =
            |angle: f64, z: f64| Point::new(x + at.distance_mm * angle.cos(), y + at.distance_mm * angle.sin(), z);
        let dashed = MarkKind::Line {
            width: 1.5,
            dashed: true,
        };
        let one = at.azimuth.map(|a| a.radians());
        if one.is_none() && at.distance_mm > 0.0 {
            for z in [0.0, height] {
                let round = (0..=PARTS).map(|k| place(TAU * f64::from(k) / f64::from(PARTS), z));
                marks.push(mark(round.collect(), dashed.clone(), Tone::Preview));
            }
        }
        let angle = one.unwrap_or(0.0);
        let ends = vec![place(angle, 0.0), place(angle, height)];
        marks.push(line(ends.clone(), 2.5, Tone::Preview));
        marks.push(mark(ends, MarkKind::Dot { radius: 3.0 }, Tone::Preview));
    }
}
