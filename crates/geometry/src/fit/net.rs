//! A net of nodes `r[i] + s[j]`, and the least squares that bring it to given places.

use super::{
    banded::{Smooth, roughness},
    cover::{Cover, Held},
    dense::Dense,
    paths::{FitOptions, Paths, places},
};
use crate::{Point, Vector};

/// Places of the two paths; only their sums matter.
#[derive(Clone, PartialEq, Debug)]
pub(super) struct Net {
    pub(super) r: Vec<Vector>,
    pub(super) s: Vec<Vector>,
}

impl Net {
    /// The net of two paths, with the places of the second about their mean: a net has many pairs `r`, `s`, and one of them is kept.
    pub(super) fn of(paths: &Paths) -> Self {
        let (mut r, mut s) = (places(&paths.a), places(&paths.b));
        let mean = sum(&s) / many(s.len());
        s.iter_mut().for_each(|s| *s -= mean);
        r.iter_mut().for_each(|r| *r += paths.origin.0 + mean);
        Self { r, s }
    }

    pub(super) fn paths(&self) -> Paths {
        let edges = |places: &[Vector]| places.windows(2).map(|two| two[1] - two[0]).collect();
        Paths {
            origin: Point(self.r[0] + self.s[0]),
            a: edges(&self.r),
            b: edges(&self.s),
        }
    }

    pub(super) fn nodes(&self) -> impl Iterator<Item = Point> {
        self.s.iter().flat_map(|s| self.r.iter().map(move |r| Point(*r + *s)))
    }
}

/// The least-squares systems of a net of one size.
pub(super) struct Solver {
    rows: Smooth,
    columns: Smooth,
    options: FitOptions,
}

impl Solver {
    pub(super) fn new(net: &Net, options: &FitOptions) -> Self {
        Self {
            rows: Smooth::new(net.r.len(), options.smoothing),
            columns: Smooth::new(net.s.len(), options.smoothing),
            options: *options,
        }
    }

    /// What smoothing adds to the sum of squares.
    pub(super) fn roughness(&self, net: &Net) -> f64 {
        let (m, n) = (many(net.r.len()), many(net.s.len()));
        self.options.smoothing * (n * roughness(&net.r) + m * roughness(&net.s))
    }

    /// The net that makes the sum of squares least for given places `c[j][i]`, exactly.
    ///
    /// With m places `r`, n places `s`, smoothing l and second differences D, setting the derivatives to zero gives
    /// `n (r + l D'D r) + sum(s) 1 = sum over j of c` and `m (s + l D'D s) + sum(r) 1 = sum over i of c`. The sum of all `s` is free, so it is 0; the rows
    /// of D add up to 0, so the sum of the first equation gives `sum(r)`, and both systems stand alone: `(I + l D'D) r` is the mean over
    /// each row and `(I + l D'D) s` the mean over each column less the mean of all. Without smoothing the means are the answer.
    ///
    /// With held ends `sum(r)` and `sum(s)` stay in both: each system is solved for the places and for a one on the right, and two
    /// equations in the two sums are left.
    pub(super) fn solve(&self, net: &Net, closest: &[Point], cover: Option<(&Cover, &[Held])>) -> Net {
        if let Some((cover, held)) = cover {
            return self
                .solve_covering(net, closest, cover.weight, held)
                .unwrap_or_else(|| net.clone());
        }
        let (m, n) = (net.r.len(), net.s.len());
        let mut row_means = vec![Vector::ZERO; m];
        let mut column_means = vec![Vector::ZERO; n];
        for (j, row) in closest.chunks(m).enumerate() {
            for (i, c) in row.iter().enumerate() {
                row_means[i] += c.0 / many(n);
                column_means[j] += c.0 / many(m);
            }
        }
        let mut next = net.clone();
        if !self.options.hold_ends {
            let mean = sum(&row_means) / many(m);
            column_means.iter_mut().for_each(|c| *c -= mean);
            self.rows.solve(&row_means, 0..m, &mut next.r);
            self.columns.solve(&column_means, 0..n, &mut next.s);
            return next;
        }
        let [rows, columns] = [m, n].map(|count| 1.min(count - 1)..(count - 1).max(1.min(count - 1)));
        self.rows.solve(&row_means, rows.clone(), &mut next.r);
        self.columns.solve(&column_means, columns.clone(), &mut next.s);
        // How the places move when the sum of the other path's grows by one.
        let mut by_s = vec![Vector::ZERO; m];
        let mut by_r = vec![Vector::ZERO; n];
        self.rows
            .solve(&vec![Vector::ONE / many(n); m], rows.clone(), &mut by_s);
        self.columns
            .solve(&vec![Vector::ONE / many(m); n], columns.clone(), &mut by_r);
        let (r0, s0) = (sum(&next.r), sum(&next.s));
        let (a, b) = (sum(&by_s).x, sum(&by_r).x);
        // r = r0 - a s and s = s0 - b r; a and b are below 1, as at least the ends are left out.
        let all_r = (r0 - s0 * a) / (1.0 - a * b);
        let all_s = s0 - all_r * b;
        for i in rows {
            next.r[i] -= by_s[i] * all_s;
        }
        for j in columns {
            next.s[j] -= by_r[j] * all_r;
        }
        next
    }
}

impl Solver {
    /// The same with held places of the surface, each the sum of shares of two places of `r` and two of `s`: the two paths no longer
    /// separate, and one system of all places is solved. None when rounding leaves it without a solution.
    fn solve_covering(&self, net: &Net, closest: &[Point], weight: f64, held: &[Held]) -> Option<Net> {
        let (m, n) = (net.r.len(), net.s.len());
        let mut system = Dense::new(m + n);
        for i in 0..m {
            system.add(i, i, many(n));
            for j in 0..n {
                system.add(i, m + j, 1.0);
            }
        }
        for j in 0..n {
            system.add(m + j, m + j, many(m));
            // The sum of all `s` is free unless ends are held; its square makes it 0.
            for k in 0..if self.options.hold_ends { 0 } else { j + 1 } {
                system.add(m + j, m + k, 1.0);
            }
        }
        for (j, row) in closest.chunks(m).enumerate() {
            for (i, place) in row.iter().enumerate() {
                system.add_right(i, place.0);
                system.add_right(m + j, place.0);
            }
        }
        for (first, count, along) in [(0, m, n), (m, n, m)] {
            for k in 1..count.saturating_sub(1) {
                let second = [(first + k - 1, 1.0), (first + k, -2.0), (first + k + 1, 1.0)];
                system.add_square(&second, Vector::ZERO, self.options.smoothing * many(along));
            }
        }
        for at in held {
            let mut shares = vec![(at.i, 1.0 - at.u), (at.i + 1, at.u)];
            if at.j + 1 < n {
                shares.extend([(m + at.j, 1.0 - at.v), (m + at.j + 1, at.v)]);
            } else {
                shares.push((m + at.j, 1.0));
            }
            system.add_square(&shares, at.place.0, weight);
        }
        if self.options.hold_ends {
            for k in [0, m - 1, m, m + n - 1] {
                let place = net.r.iter().chain(&net.s).nth(k);
                system.hold(k, *place?);
            }
        }
        let mut r = system.solve()?;
        let s = r.split_off(m);
        Some(Net { r, s })
    }
}

fn sum(places: &[Vector]) -> Vector {
    places.iter().copied().sum()
}

#[expect(clippy::cast_precision_loss, reason = "a count of nodes, far below 2^52")]
pub(super) const fn many(count: usize) -> f64 {
    count as f64
}

#[cfg(test)]
mod tests {
    use proptest::prelude::*;

    use super::*;

    fn vectors(count: core::ops::Range<usize>) -> impl Strategy<Value = Vec<Vector>> {
        let one = (-9.0..9.0_f64, -9.0..9.0_f64, -9.0..9.0_f64).prop_map(Vector::from);
        proptest::collection::vec(one, count)
    }

    proptest! {
        /// Planted: covering places that count nothing leave the closed form, which is derived another way.
        #[test]
        fn one_system_gives_what_the_two_give(
            a in vectors(1..6), b in vectors(0..5), noise in vectors(36..37), smoothing in 0.0..3.0_f64, hold_ends in any::<bool>(),
        ) {
            let options = FitOptions { smoothing, hold_ends, ..FitOptions::default() };
            let net = Net::of(&Paths { origin: Point::new(1.0, 2.0, 3.0), a, b });
            let places: Vec<Point> = net.nodes().zip(&noise).map(|(p, n)| p + *n).collect();
            let solver = Solver::new(&net, &options);
            let held: Vec<Held> = Vec::new();
            let whole = solver.solve_covering(&net, &places, 1.0, &held).unwrap();
            let parted = solver.solve(&net, &places, None);
            for (one, other) in whole.nodes().zip(parted.nodes()) {
                prop_assert!(one.distance(other) < 1e-8);
            }
        }
    }

    fn sum_of_squares(solver: &Solver, net: &Net, places: &[Point]) -> f64 {
        let far: f64 = net.nodes().zip(places).map(|(p, c)| (p - *c).length_squared()).sum();
        far + solver.roughness(net)
    }

    proptest! {
        /// A minimum: no movement of a place that may move makes the sum of squares smaller.
        #[test]
        fn nothing_near_the_solution_is_better(
            a in vectors(1..6), b in vectors(0..5), noise in vectors(36..37), smoothing in 0.0..3.0_f64, hold_ends in any::<bool>(),
        ) {
            let options = FitOptions { smoothing, hold_ends, ..FitOptions::default() };
            let net = Net::of(&Paths { origin: Point::new(1.0, 2.0, 3.0), a, b });
            let places: Vec<Point> = net.nodes().zip(&noise).map(|(p, n)| p + *n).collect();
            let solver = Solver::new(&net, &options);
            let solved = solver.solve(&net, &places, None);
            let least = sum_of_squares(&solver, &solved, &places);
            prop_assert!(least <= sum_of_squares(&solver, &net, &places) + 1e-9);
            let held = |k: usize, count: usize| hold_ends && (k == 0 || k + 1 == count);
            for by in [Vector::X, Vector::Y, Vector::Z, -Vector::X, -Vector::Y, -Vector::Z] {
                for k in 0..solved.r.len() {
                    let mut other = solved.clone();
                    other.r[k] += by * 1e-3;
                    prop_assert!(held(k, solved.r.len()) || least <= sum_of_squares(&solver, &other, &places) + 1e-12);
                }
                for k in 0..solved.s.len() {
                    let mut other = solved.clone();
                    other.s[k] += by * 1e-3;
                    prop_assert!(held(k, solved.s.len()) || least <= sum_of_squares(&solver, &other, &places) + 1e-12);
                }
            }
            if hold_ends {
                let [first, last] = [&net, &solved].map(|n| (n.r[0] + n.s[0], n.r[n.r.len() - 1] + n.s[n.s.len() - 1]));
                prop_assert!(first.0.distance(last.0) < 1e-12 && first.1.distance(last.1) < 1e-12);
            }
        }
    }
}
