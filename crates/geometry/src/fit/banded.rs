//! The least-squares systems of a path: symmetric, positive, two bands beside the diagonal.

use crate::Vector;

/// `I + smoothing * D'D`, where `D` takes second differences of a row of `count` places.
pub(super) struct Smooth {
    /// Diagonal and the two bands above it, by row.
    rows: Vec<[f64; 3]>,
}

impl Smooth {
    pub(super) fn new(count: usize, smoothing: f64) -> Self {
        let mut rows = vec![[1.0, 0.0, 0.0]; count];
        for k in 1..count.saturating_sub(1) {
            // The difference p[k - 1] - 2 p[k] + p[k + 1], times itself.
            rows[k - 1][0] += smoothing;
            rows[k - 1][1] -= 2.0 * smoothing;
            rows[k - 1][2] += smoothing;
            rows[k][0] += 4.0 * smoothing;
            rows[k][1] -= 2.0 * smoothing;
            rows[k + 1][0] += smoothing;
        }
        Self { rows }
    }

    /// The places `x` with `A x = right` on the rows of `free`, all others held at what `x` says already.
    pub(super) fn solve(&self, right: &[Vector], free: core::ops::Range<usize>, x: &mut [Vector]) {
        let at = |i: usize, j: usize| {
            let (low, high) = (i.min(j), i.max(j));
            self.rows[low].get(high - low).copied().unwrap_or(0.0)
        };
        let (first, count) = (free.start, free.len());
        // L D L' of a band matrix; positive because the identity is in it.
        let mut pivots = vec![0.0; count];
        let mut below = vec![[0.0; 2]; count];
        let mut z = vec![Vector::ZERO; count];
        for k in 0..count {
            let row = first + k;
            let mut sum = right[row];
            for (other, held) in x.iter().enumerate().skip(row.saturating_sub(2)).take(5) {
                if !free.contains(&other) {
                    sum -= *held * at(row, other);
                }
            }
            let two = if k > 1 { at(row, row - 2) / pivots[k - 2] } else { 0.0 };
            let mut one = if k > 0 { at(row, row - 1) } else { 0.0 };
            if k > 1 {
                one -= two * pivots[k - 2] * below[k - 1][0];
            }
            let one = if k > 0 { one / pivots[k - 1] } else { 0.0 };
            let mut pivot = at(row, row);
            if k > 0 {
                pivot -= one * one * pivots[k - 1];
                sum -= z[k - 1] * one;
            }
            if k > 1 {
                pivot -= two * two * pivots[k - 2];
                sum -= z[k - 2] * two;
            }
            pivots[k] = pivot;
            below[k] = [one, two];
            z[k] = sum;
        }
        for k in (0..count).rev() {
            let mut sum = z[k] / pivots[k];
            if k + 1 < count {
                sum -= x[first + k + 1] * below[k + 1][0];
            }
            if k + 2 < count {
                sum -= x[first + k + 2] * below[k + 2][1];
            }
            x[first + k] = sum;
        }
    }
}

/// The sum of the squares of all second differences, in square millimetres.
pub(super) fn roughness(places: &[Vector]) -> f64 {
    places
        .windows(3)
        .map(|three| (three[0] - 2.0 * three[1] + three[2]).length_squared())
        .sum()
}

#[cfg(test)]
mod tests {
    use proptest::prelude::*;

    use super::*;

    proptest! {
        /// Planted: places are multiplied out and come back, with their ends held or free.
        #[test]
        fn what_was_multiplied_out_comes_back(
            places in proptest::collection::vec((-9.0..9.0_f64, -9.0..9.0_f64, -9.0..9.0_f64), 1..12),
            smoothing in 0.0..50.0_f64,
            held in any::<bool>(),
        ) {
            let places: Vec<Vector> = places.into_iter().map(Vector::from).collect();
            let count = places.len();
            let mut right = places.clone();
            for k in 1..count.saturating_sub(1) {
                let second = (places[k - 1] - 2.0 * places[k] + places[k + 1]) * smoothing;
                right[k - 1] += second;
                right[k] -= 2.0 * second;
                right[k + 1] += second;
            }
            let free = if held && count > 1 { 1..count - 1 } else { 0..count };
            let mut found = places.clone();
            for k in free.clone() {
                found[k] = Vector::NAN;
            }
            Smooth::new(count, smoothing).solve(&right, free, &mut found);
            for (found, place) in found.iter().zip(&places) {
                prop_assert!(found.distance(*place) < 1e-8, "{found} {place}");
            }
        }
    }
}
