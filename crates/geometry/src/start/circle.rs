//! Directions round a circle, without the crumbs that a rounded pi leaves.
//!
//! Angles are reduced to an eighth of a turn before a sine is taken, so that quarter turns are exact and directions that
//! mirror each other have the same bits. Ribs then close, and mirrored panels agree, as well as the numbers can.

use core::f64::consts::FRAC_PI_4;

/// Cosine and sine of `k / n` of a full turn; `n` is not 0.
pub(crate) fn part_of_turn(k: i64, n: u32) -> (f64, f64) {
    let n = i64::from(n);
    let eighths = k.rem_euclid(n) * 8;
    let (octant, over) = (eighths / n, eighths % n);
    #[expect(clippy::cast_precision_loss, reason = "n is at most the largest u32, exact in f64")]
    eighth(octant, over as f64 / n as f64, (n - over) as f64 / n as f64)
}

/// Cosine and sine of an angle in degrees; finite.
pub(crate) fn degrees(angle: f64) -> (f64, f64) {
    let eighths = angle.rem_euclid(360.0) / 45.0;
    let part = eighths - eighths.floor();
    #[expect(clippy::cast_possible_truncation, reason = "between 0 and 8")]
    eighth(eighths.floor() as i64, part, 1.0 - part)
}

/// Cosine and sine of `octant` eighths of a turn and `part` of the next, where `rest` is left of it. Both are given, so that
/// mirrored directions are computed from the same bits.
fn eighth(octant: i64, part: f64, rest: f64) -> (f64, f64) {
    let within = if octant % 2 == 0 { part } else { rest };
    let (small, large) = (within * FRAC_PI_4).sin_cos();
    match octant.rem_euclid(8) {
        0 => (large, small),
        1 => (small, large),
        2 => (-small, large),
        3 => (-large, small),
        4 => (-large, -small),
        5 => (-small, -large),
        6 => (small, -large),
        _ => (large, -small),
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn quarter_turns_are_exact() {
        let corners = [(1.0, 0.0), (0.0, 1.0), (-1.0, 0.0), (0.0, -1.0)];
        for (k, corner) in (0..4_i64).zip(corners) {
            for n in [4, 8, 12, 2000] {
                assert_eq!(part_of_turn(k * i64::from(n) / 4, n), corner, "k = {k}, n = {n}");
                assert_eq!(degrees(90.0 * f64::from(k as i32)), corner, "k = {k}");
            }
        }
    }

    #[test]
    fn agrees_with_the_plain_sine_and_goes_round() {
        for n in [3_u32, 5, 7, 9, 12, 97] {
            for k in -i64::from(n)..3 * i64::from(n) {
                let angle = core::f64::consts::TAU * k as f64 / f64::from(n);
                for (cos, sin) in [part_of_turn(k, n), degrees(angle.to_degrees())] {
                    assert!((cos - angle.cos()).abs() < 1e-14, "cos {k}/{n}");
                    assert!((sin - angle.sin()).abs() < 1e-14, "sin {k}/{n}");
                }
                let (cos, sin) = part_of_turn(k, n);
                assert_eq!(part_of_turn(-k, n), (cos, -sin), "mirror of {k}/{n}");
            }
        }
    }
}
