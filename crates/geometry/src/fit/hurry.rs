//! Longer steps: an iteration that creeps is extrapolated from its last few steps.
//!
//! Anderson's mixing (J. ACM 12 (1965) 547-560), as used for closest-point iterations by Zhang, Yao and Deng (IEEE PAMI 44 (2022)
//! 3450-3466); both from memory. The caller keeps an extrapolated net only if its sum of squares has not grown.

use super::net::Net;
use crate::Vector;

/// How many steps are looked back at.
const WINDOW: usize = 5;

/// What is left of the pivot of a difference that depends on the others.
const DEPENDENT: f64 = 1e-12;

/// The last steps.
#[derive(Default)]
pub(super) struct Hurry {
    /// Of each step: where it led, and by how much it moved.
    steps: Vec<(Vec<Vector>, Vec<Vector>)>,
}

impl Hurry {
    /// Forgets the steps, after one that was not kept.
    pub(super) fn forget(&mut self) {
        self.steps.clear();
    }

    /// Where the steps seem to lead; none after the first.
    pub(super) fn ahead(&mut self, from: &Net, to: &Net) -> Option<Net> {
        let all = |net: &Net| -> Vec<Vector> { net.r.iter().chain(&net.s).copied().collect() };
        let led = all(to);
        let moved: Vec<Vector> = led.iter().zip(all(from)).map(|(to, from)| *to - from).collect();
        self.steps.push((led, moved));
        if self.steps.len() > WINDOW + 1 {
            self.steps.remove(0);
        }
        let ((led, moved), before) = self.steps.split_last()?;
        if before.is_empty() {
            return None;
        }
        // The mixture of the steps' differences that comes closest to cancelling the last movement.
        let differences: Vec<Vec<Vector>> = before
            .iter()
            .map(|(_, earlier)| moved.iter().zip(earlier).map(|(a, b)| *a - *b).collect())
            .collect();
        let shares = shares(&differences, moved)?;
        let mut ahead = led.clone();
        for ((earlier, _), share) in before.iter().zip(&shares) {
            for ((place, led), earlier) in ahead.iter_mut().zip(led).zip(earlier) {
                *place -= (*led - *earlier) * *share;
            }
        }
        let s = ahead.split_off(to.r.len());
        Some(Net { r: ahead, s })
    }
}

/// Least squares of `moved = sum of share * difference`, by the normal equations with pivots in the order of the steps.
fn shares(differences: &[Vec<Vector>], moved: &[Vector]) -> Option<Vec<f64>> {
    let dot = |a: &[Vector], b: &[Vector]| -> f64 { a.iter().zip(b).map(|(a, b)| a.dot(*b)).sum() };
    let count = differences.len();
    let mut rows: Vec<Vec<f64>> = differences
        .iter()
        .map(|d| {
            let mut row: Vec<f64> = differences.iter().map(|e| dot(d, e)).collect();
            row.push(dot(d, moved));
            row
        })
        .collect();
    let scale = (0..count).map(|k| rows[k][k]).fold(0.0, f64::max);
    for k in 0..count {
        let pivot = (k..count).max_by(|a, b| rows[*a][k].abs().total_cmp(&rows[*b][k].abs()))?;
        rows.swap(k, pivot);
        if rows[k][k].abs() <= DEPENDENT * scale {
            return None;
        }
        for other in k + 1..count {
            let (above, below) = rows.split_at_mut(other);
            let factor = below[0][k] / above[k][k];
            for (entry, over) in below[0].iter_mut().zip(&above[k]).skip(k) {
                *entry -= factor * over;
            }
        }
    }
    let mut shares = vec![0.0; count];
    for k in (0..count).rev() {
        let known: f64 = (k + 1..count).map(|other| rows[k][other] * shares[other]).sum();
        shares[k] = (rows[k][count] - known) / rows[k][k];
    }
    shares.iter().all(|s| s.is_finite()).then_some(shares)
}
