//! What the adapters share about strokes.

use crate::Picture;

/// Calls `draw` with each straight part of a line: the dashes of a dashed one, whole sides of any other.
///
/// Dashes run on round corners. `closed` leads the last point back to the first. Parts outside the picture's size, by more than
/// `margin`, are left out, so that a line of any length has few dashes.
pub(crate) fn parts(
    points: &[[f32; 2]],
    closed: bool,
    dashed: bool,
    size: [f32; 2],
    margin: f32,
    mut draw: impl FnMut([f32; 2], [f32; 2]),
) {
    let mut gone = 0.0_f32;
    let count = points.len();
    let sides = if closed { count } else { count.saturating_sub(1) };
    for k in 0..sides {
        let [a, b] = [points[k], points[(k + 1) % count]];
        let outside = (0..2).any(|axis| {
            let far = size[axis] + margin;
            (a[axis] < -margin && b[axis] < -margin) || (a[axis] > far && b[axis] > far)
        });
        let length = (b[0] - a[0]).hypot(b[1] - a[1]);
        if outside || length <= 0.0 || !length.is_finite() {
            continue;
        }
        if !dashed {
            draw(a, b);
            continue;
        }
        let at = |t: f32| [a[0] + (b[0] - a[0]) * t / length, a[1] + (b[1] - a[1]) * t / length];
        let period = 2.0 * Picture::DASH;
        let mut from = -(gone % period);
        while from < length {
            let to = (from + Picture::DASH).min(length);
            if to > 0.0 {
                draw(at(from.max(0.0)), at(to));
            }
            from += period;
        }
        gone += length;
    }
}
