//! Round lengths and angles.

use super::{Around, Rules, SnapTo, Snapped};
use crate::{Angle, Vector, start::circle};

/// Round lengths in millimetres, for a design in millimetres: what a tape and a stop are set to.
pub const MM_STEPS: [f64; 5] = [1.0, 5.0, 10.0, 50.0, 100.0];

/// Round lengths in millimetres, for a design in inches: sixteenths to a third of a foot.
pub const INCH_STEPS: [f64; 7] = [25.4 / 16.0, 25.4 / 8.0, 25.4 / 4.0, 25.4 / 2.0, 25.4, 50.8, 101.6];

/// Steps narrower than this on the picture, in pixels, are finer than a hand can choose between.
const LEAST_STEP_PX: f64 = 12.0;

/// The finest of these steps that can be told apart at a scale, in millimetres; the coarsest when none can.
#[must_use]
pub fn round_step(steps: &[f64], pixels_per_mm: f64) -> Option<f64> {
    let wide = steps.iter().find(|step| LEAST_STEP_PX <= **step * pixels_per_mm);
    wide.or(steps.last()).copied()
}

/// A multiple of a step within reach of a measure. Nothing rounds to 0: an edge has a length.
pub(super) fn nearest_multiple(value: f64, step: Option<f64>, reach: f64) -> Option<f64> {
    let step = step.filter(|step| *step > 0.0)?;
    let round = (value / step).round() * step;
    (round > 0.0 && (round - value).abs() <= reach).then_some(round)
}

/// Which of the three measures of a vector may change.
#[derive(Clone, Copy, PartialEq, Eq, Debug)]
pub(super) struct Free {
    pub(super) slope: bool,
    pub(super) azimuth: bool,
}

/// Rounds length, and slope and azimuth if they are free, each if it moves the vector's end by at most its share of the reach: together
/// by at most the reach.
pub(super) fn round(v: Vector, rules: &Rules<'_>, free: Free) -> Option<Snapped<Vector>> {
    let share = rules.reach_mm / f64::from(1 + u8::from(free.slope) + u8::from(free.azimuth));
    let (old, run) = (v.length(), v.x.hypot(v.y));
    if old <= 0.0 {
        return None;
    }
    let mut to = Vec::new();
    let mut length = old;
    if let Some(round) = nearest_multiple(old, rules.length_step_mm, share) {
        length = round;
        to.push(SnapTo::Length(round));
    }
    let mut slope = (run / old, v.z / old);
    let mut azimuth = if run > 0.0 { (v.x / run, v.y / run) } else { (1.0, 0.0) };
    if free.slope
        && let Some((degrees, parts)) = nearest_angle(slope, rules.angle_step, share / length)
    {
        slope = parts;
        to.push(SnapTo::Slope(degrees));
    }
    let level = length * slope.0;
    if free.azimuth
        && level > 0.0
        && let Some((degrees, parts)) = nearest_angle(azimuth, rules.angle_step, share / level)
    {
        azimuth = parts;
        to.push(SnapTo::Azimuth(degrees));
    }
    let value = Vector::new(level * azimuth.0, level * azimuth.1, length * slope.1);
    (!to.is_empty()).then_some(Snapped { value, to })
}

/// The multiple of a step nearest to the angle with this cosine and sine, when the chord between them, on a circle of radius 1, is at most `reach`.
fn nearest_angle((cos, sin): (f64, f64), step: Option<Angle>, reach: f64) -> Option<(Angle, (f64, f64))> {
    let step = step.map(Angle::degrees).filter(|step| *step > 0.0)?;
    let degrees = (sin.atan2(cos).to_degrees() / step).round() * step;
    let parts = circle::degrees(degrees);
    let chord = (parts.0 - cos).hypot(parts.1 - sin);
    // Adding 0 turns -0 into 0.
    (chord <= reach).then_some((Angle::from_degrees(degrees + 0.0), parts))
}

/// A direction of a star within half the reach, and a round length along it within the other half.
pub(super) fn along_direction(v: Vector, around: &Around<'_>, rules: &Rules<'_>) -> Option<Snapped<Vector>> {
    let share = rules.reach_mm / 2.0;
    let mut best: Option<(f64, usize, Vector)> = None;
    for (index, direction) in around.directions.iter().enumerate() {
        let on = *direction * v.dot(*direction);
        let away = on.distance(v);
        if away <= share && best.is_none_or(|(least, ..)| away < least) {
            best = Some((away, index, on));
        }
    }
    let (_, index, on) = best?;
    with_round_length(on, SnapTo::Direction(index), share, rules)
}

/// Square to the neighbour that takes the least, within half the reach, and a round length within the other half.
pub(super) fn square(v: Vector, around: &Around<'_>, rules: &Rules<'_>) -> Option<Snapped<Vector>> {
    let share = rules.reach_mm / 2.0;
    let mut best: Option<(f64, usize, Vector)> = None;
    for (index, neighbour) in around.neighbours.iter().enumerate() {
        let length = neighbour.length();
        if length <= 0.0 {
            continue;
        }
        let unit = *neighbour / length;
        let away = v.dot(unit).abs();
        if away <= share && best.is_none_or(|(least, ..)| away < least) {
            let on = v - unit * v.dot(unit);
            best = Some((away, index, on - unit * on.dot(unit)));
        }
    }
    let (_, index, on) = best?;
    with_round_length(on, SnapTo::Square(index), share, rules)
}

fn with_round_length(on: Vector, to: SnapTo, reach: f64, rules: &Rules<'_>) -> Option<Snapped<Vector>> {
    let length = on.length();
    if length <= reach {
        // So short an edge has no direction to speak of.
        return None;
    }
    let mut snapped = Snapped {
        value: on,
        to: vec![to],
    };
    if let Some(round) = nearest_multiple(length, rules.length_step_mm, reach) {
        snapped.value = on * (round / length);
        snapped.to.push(SnapTo::Length(round));
    }
    Some(snapped)
}
