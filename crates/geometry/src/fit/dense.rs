//! A symmetric positive system with three right sides, solved by Cholesky's method.

use crate::Vector;

/// A matrix of which only the lower half is kept, and its right side.
pub(super) struct Dense {
    rows: Vec<Vec<f64>>,
    right: Vec<Vector>,
}

impl Dense {
    pub(super) fn new(count: usize) -> Self {
        Self {
            rows: (1..=count).map(|width| vec![0.0; width]).collect(),
            right: vec![Vector::ZERO; count],
        }
    }

    /// Adds to an entry and to the one across the diagonal.
    pub(super) fn add(&mut self, i: usize, j: usize, value: f64) {
        self.rows[i.max(j)][i.min(j)] += value;
    }

    /// Adds to the right side.
    pub(super) fn add_right(&mut self, i: usize, value: Vector) {
        self.right[i] += value;
    }

    /// Adds `weight (sum of share x - to)^2` to the sum of squares whose least is looked for.
    pub(super) fn add_square(&mut self, shares: &[(usize, f64)], to: Vector, weight: f64) {
        for (at, (i, share)) in shares.iter().enumerate() {
            self.right[*i] += to * (weight * share);
            // Each unknown comes once, so every pair is one entry.
            for (j, other) in &shares[..=at] {
                self.add(*i, *j, weight * share * other);
            }
        }
    }

    /// Holds an unknown at a value.
    pub(super) fn hold(&mut self, k: usize, value: Vector) {
        for i in 0..self.rows.len() {
            let (row, column) = (i.max(k), i.min(k));
            let entry = self.rows[row][column];
            self.rows[row][column] = 0.0;
            self.right[i] -= value * entry;
        }
        self.rows[k][k] = 1.0;
        self.right[k] = value;
    }

    /// The unknowns; none when the matrix is not positive.
    pub(super) fn solve(mut self) -> Option<Vec<Vector>> {
        for i in 0..self.rows.len() {
            let (above, below) = self.rows.split_at_mut(i);
            let row = &mut below[0];
            for j in 0..=i {
                let sum: f64 = if j < i {
                    row[..j].iter().zip(&above[j][..j]).map(|(a, b)| a * b).sum()
                } else {
                    row[..j].iter().map(|a| a * a).sum()
                };
                let left = row[j] - sum;
                if j < i {
                    row[j] = left / above[j][j];
                } else {
                    if left.is_nan() || left <= 0.0 {
                        return None;
                    }
                    row[j] = left.sqrt();
                }
            }
        }
        let count = self.rows.len();
        let mut x = self.right;
        for i in 0..count {
            let sum: Vector = (0..i).map(|j| x[j] * self.rows[i][j]).sum();
            x[i] = (x[i] - sum) / self.rows[i][i];
        }
        for i in (0..count).rev() {
            let sum: Vector = (i + 1..count).map(|j| x[j] * self.rows[j][i]).sum();
            x[i] = (x[i] - sum) / self.rows[i][i];
        }
        Some(x)
    }
}
