//! How two parallelograms with whole coordinates meet, worked out exactly and slowly, in another way than the program does it.
//!
//! A place of the first is corner + s u + t v, of the second corner + p u + q v, with all four between 0 and 1 inside. In planes
//! that differ the places of both are a line, on which p, q, s and t are linear in one number m; the insides meet when some m
//! satisfies all eight inequalities.

#![allow(unreachable_pub, reason = "shared by tests")]

#[derive(Clone, Copy, Debug)]
pub struct Slab {
    pub corner: [i64; 3],
    pub u: [i64; 3],
    pub v: [i64; 3],
}

#[derive(Clone, Copy, PartialEq, Eq, Debug)]
pub enum Answer {
    Apart,
    Crossing,
    Doubled,
}

type Whole = [i128; 3];

fn dot(a: Whole, b: Whole) -> i128 {
    a[0] * b[0] + a[1] * b[1] + a[2] * b[2]
}

fn cross(a: Whole, b: Whole) -> Whole {
    [
        a[1] * b[2] - a[2] * b[1],
        a[2] * b[0] - a[0] * b[2],
        a[0] * b[1] - a[1] * b[0],
    ]
}

fn less(a: Whole, b: Whole) -> Whole {
    [a[0] - b[0], a[1] - b[1], a[2] - b[2]]
}

fn plus(a: Whole, b: Whole, times: i128) -> Whole {
    [a[0] + times * b[0], a[1] + times * b[1], a[2] + times * b[2]]
}

impl Slab {
    fn parts(&self) -> [Whole; 3] {
        [self.corner, self.u, self.v].map(|w| w.map(i128::from))
    }

    pub fn has_area(&self) -> bool {
        let [_, u, v] = self.parts();
        cross(u, v) != [0; 3]
    }

    fn corners(&self) -> Vec<Whole> {
        let [a, u, v] = self.parts();
        let mut corners = vec![a, plus(a, u, 1), plus(plus(a, u, 1), v, 1), plus(a, v, 1)];
        corners.sort_unstable();
        corners
    }
}

pub fn meet(one: &Slab, other: &Slab) -> Answer {
    if one.corners() == other.corners() {
        return Answer::Doubled;
    }
    if insides_meet(one, other) {
        Answer::Crossing
    } else {
        Answer::Apart
    }
}

fn insides_meet(one: &Slab, other: &Slab) -> bool {
    let [a, u, v] = one.parts();
    let [b, w, z] = other.parts();
    let n = cross(u, v);
    let nn = dot(n, n);
    // n . (b + p w + q z - a) = 0: alpha p + beta q = k.
    let [alpha, beta, k] = [dot(n, w), dot(n, z), dot(n, less(a, b))];
    if alpha == 0 && beta == 0 {
        return k == 0 && overlap_in_plane(one, other, n);
    }
    // p = (k alpha - m beta) / d, q = (k beta + m alpha) / d.
    let d = alpha * alpha + beta * beta;
    let p = [k * alpha, -beta];
    let q = [k * beta, alpha];
    // (place - a) times d, as constant and factor of m; then s = (place - a) x v . n / nn and t = u x (place - a) . n / nn.
    let place = [0, 1].map(|i| {
        let start = if i == 0 { less(b, a).map(|x| x * d) } else { [0; 3] };
        plus(plus(start, w, p[i]), z, q[i])
    });
    let s = place.map(|r| dot(cross(r, v), n));
    let t = place.map(|r| dot(cross(u, r), n));
    let mut bounds = Bounds::default();
    for (value, most) in [(p, d), (q, d), (s, d * nn), (t, d * nn)] {
        bounds.positive(value[0], value[1]);
        bounds.positive(most - value[0], -value[1]);
    }
    bounds.leave_room()
}

/// What is left of the line after inequalities c0 + c1 m > 0. A bound is a fraction with a positive denominator.
#[derive(Default)]
struct Bounds {
    lower: Vec<(i128, i128)>,
    upper: Vec<(i128, i128)>,
    never: bool,
}

impl Bounds {
    fn positive(&mut self, c0: i128, c1: i128) {
        match c1.signum() {
            1 => self.lower.push((-c0, c1)),
            -1 => self.upper.push((c0, -c1)),
            _ => self.never |= c0 <= 0,
        }
    }

    fn leave_room(&self) -> bool {
        let below = |l: &(i128, i128), u: &(i128, i128)| l.0 * u.1 < u.0 * l.1;
        !self.never && self.lower.iter().all(|l| self.upper.iter().all(|u| below(l, u)))
    }
}

/// In one plane: the insides are apart exactly when the line along some side parts them (convex polygons).
fn overlap_in_plane(one: &Slab, other: &Slab, n: Whole) -> bool {
    let [_, u, v] = one.parts();
    let [_, w, z] = other.parts();
    [u, v, w, z].into_iter().all(|side| {
        let axis = cross(n, side);
        let reach = |slab: &Slab| {
            let along: Vec<i128> = slab.corners().into_iter().map(|p| dot(p, axis)).collect();
            [along.iter().copied().min(), along.iter().copied().max()]
        };
        let [p, q] = [reach(one), reach(other)];
        p[1].min(q[1]) > p[0].max(q[0])
    })
}
