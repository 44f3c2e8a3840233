//! Damped Gauss-Newton steps within bounds, from one place and from several.

use super::{
    linear::bounded_step,
    problem::{Problem, Tried, Values},
};

/// A difference quotient's step, in the scale of a variable: the figures are exact to some 1e-13 of themselves, so that slopes keep 6 digits.
const DIFFERENCE: f64 = 1e-6;

/// Once every figure is within this part of its tolerance, nothing is gained by going on.
const FINE: f64 = 1e-3;

/// Steps from one place. Where Newton's steps work at all, a dozen is many.
const STEPS: usize = 40;

/// Steps that try to change less, once the figures are met.
const EASING: usize = 8;

/// The longest step downhill, in the scale of a variable: farther away the slopes say nothing.
const REACH: f64 = 2.0;

impl Problem<'_> {
    /// Looks for a solution with the counts as given: from there, then from this many places around.
    pub(super) fn near(&mut self, values: &Values, places: u32) -> Option<Tried> {
        let vary = self.continuous();
        for k in 0..=places {
            let place = if k == 0 {
                values.clone()
            } else {
                self.place(values, &vary, k)
            };
            let Some(at) = self.try_values(&place) else { continue };
            // As it is, nothing need change.
            if k == 0 && self.within(&at, 1.0) {
                return Some(at);
            }
            if vary.is_empty() || self.spent() {
                return None;
            }
            let found = self.descend(at, &vary);
            if self.within(&found, 1.0) {
                return Some(self.ease(found, values, &vary));
            }
        }
        None
    }

    /// A place around the values: the k-th of a sequence that fills a box evenly.
    ///
    /// Source: J. H. Halton, Numer. Math. 2 (1960) 84-90 (from memory).
    fn place(&self, values: &Values, vary: &[usize], k: u32) -> Values {
        const PRIMES: [u32; 10] = [2, 3, 5, 7, 11, 13, 17, 19, 23, 29];
        let mut place = values.clone();
        for (n, &v) in vary.iter().enumerate() {
            let variable = &self.variables[v];
            let [low, high] = variable.scaled_bounds();
            let here = variable.scaled(values[v]);
            // Lengths from a fifth to five times, angles 60 degrees either way.
            let [low, high] = [low.max(here - 1.6), high.min(here + 1.6)];
            let part = radical_inverse(k, PRIMES[n % PRIMES.len()]);
            place[v] = variable.value(low + part * (high - low));
        }
        place
    }

    /// Steps downhill until every figure is met, or no step helps.
    fn descend(&mut self, from: Tried, vary: &[usize]) -> Tried {
        let mut at = from;
        let mut damping = 1e-6;
        for _ in 0..STEPS {
            if self.within(&at, FINE) || self.spent() {
                break;
            }
            let jacobian = self.jacobian(&at, vary);
            let aim: Vec<f64> = self.residuals(&at).iter().map(|r| -r).collect();
            let miss = self.miss(&at);
            let mut better = None;
            while better.is_none() && damping < 1e8 && !self.spent() {
                let next = self.step(&at, vary, &jacobian, &aim, (damping, REACH));
                better = next.filter(|next| self.miss(next) < miss);
                damping *= if better.is_some() { 0.1 } else { 10.0 };
            }
            damping = damping.clamp(1e-12, 1e3);
            let Some(better) = better else { break };
            // A step that gains less than this has come to rest.
            let rests = self.miss(&better) > miss * (1.0 - 1e-9);
            at = better;
            if rests {
                break;
            }
        }
        at
    }

    /// Of all solutions near this one, goes to the one that changes the least.
    ///
    /// With v the change in the scales, it is the shortest v with `J v = J v_now - r`; each such step is taken back to the figures before it counts.
    fn ease(&mut self, from: Tried, origin: &Values, vary: &[usize]) -> Tried {
        let mut at = from;
        if vary.len() <= self.wants.len() {
            return at;
        }
        for _ in 0..EASING {
            if self.spent() {
                break;
            }
            let change = self.change(&at, origin, vary);
            let jacobian = self.jacobian(&at, vary);
            let residuals = self.residuals(&at);
            let aim: Vec<f64> = jacobian
                .iter()
                .zip(residuals)
                .map(|(row, r)| row.iter().zip(&change).map(|(j, v)| j * v).sum::<f64>() - r)
                .collect();
            // From the origin on.
            let mut base = at.clone();
            for &v in vary {
                base.values[v] = origin[v];
            }
            let Some(next) = self.step(&base, vary, &jacobian, &aim, (1e-12, f64::INFINITY)) else {
                break;
            };
            let next = self.descend(next, vary);
            let length = |values: &[f64]| values.iter().map(|v| v * v).sum::<f64>();
            let shorter = length(&self.change(&next, origin, vary)) < 0.999 * length(&change);
            if !shorter || !self.within(&next, 1.0) {
                break;
            }
            at = next;
        }
        at
    }

    /// The change from the origin, in the scales.
    fn change(&self, at: &Tried, origin: &Values, vary: &[usize]) -> Vec<f64> {
        let scaled = |v: usize| self.variables[v].scaled(at.values[v]) - self.variables[v].scaled(origin[v]);
        vary.iter().map(|&v| scaled(v)).collect()
    }

    /// One step with a damping, no longer than a reach.
    fn step(
        &mut self,
        at: &Tried,
        vary: &[usize],
        jacobian: &[Vec<f64>],
        aim: &[f64],
        (damping, reach): (f64, f64),
    ) -> Option<Tried> {
        let (mut low, mut high) = (Vec::new(), Vec::new());
        for &v in vary {
            let variable = &self.variables[v];
            let here = variable.scaled(at.values[v]);
            let [least, most] = variable.scaled_bounds();
            low.push((least - here).clamp(-reach, 0.0));
            high.push((most - here).clamp(0.0, reach));
        }
        let size: f64 = jacobian.iter().flatten().map(|j| j * j).sum();
        if size == 0.0 || !size.is_finite() {
            return None;
        }
        let step = bounded_step(jacobian, aim, damping * size, &low, &high)?;
        let mut values = at.values.clone();
        for (&v, d) in vary.iter().zip(step) {
            let variable = &self.variables[v];
            // A step of 0 leaves the last digit where it is.
            if d != 0.0 {
                values[v] = variable.value(variable.scaled(values[v]) + d);
            }
        }
        self.try_values(&values)
    }

    /// The slopes of the figures, in the scales: one row a figure.
    pub(super) fn jacobian(&mut self, at: &Tried, vary: &[usize]) -> Vec<Vec<f64>> {
        let mut rows = vec![vec![0.0; vary.len()]; self.wants.len()];
        let here = self.residuals(at);
        for (column, &v) in vary.iter().enumerate() {
            let variable = self.variables[v].clone();
            let scaled = variable.scaled(at.values[v]);
            for step in [DIFFERENCE, -DIFFERENCE] {
                let mut values = at.values.clone();
                values[v] = variable.value(scaled + step);
                let moved = variable.scaled(values[v]) - scaled;
                // At a bound there is room on one side only.
                if moved.abs() < DIFFERENCE / 2.0 {
                    continue;
                }
                if let Some(there) = self.try_values(&values) {
                    for ((row, there), here) in rows.iter_mut().zip(self.residuals(&there)).zip(&here) {
                        row[column] = (there - here) / moved;
                    }
                    break;
                }
            }
        }
        rows
    }
}

/// The digits of k in a base, mirrored at the point: a number between 0 and 1.
fn radical_inverse(mut k: u32, base: u32) -> f64 {
    let (mut part, mut unit) = (0.0, 1.0);
    while k > 0 {
        unit /= f64::from(base);
        part += unit * f64::from(k % base);
        k /= base;
    }
    part
}
