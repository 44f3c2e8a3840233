//! Any zonohedron, grown from a free path exchange by exchange.
//!
//! The path is one half of the silhouette seen along a direction. Reversing it over the upper half of the hull on the fore
//! side, and over the lower half on the aft side, gives the whole; the two halves share only the far side of the silhouette,
//! which is joined. Which exchange comes next is decided here, from signs of determinants.

use zonewright_geometry::{
    Act, Point, Role, RoleRule, Shape, Side, Start, Vector, Vs,
    start::{FreeLetter, FreePath, FreeVector},
};

/// The generators, each turned so that it goes up in the picture seen along `view`, in the order of their angle there.
#[must_use]
pub fn half_silhouette(generators: &[Vector], view: Vector) -> Vec<Vector> {
    let right = view.cross(Vector::X).normalize();
    let up = view.cross(right).normalize();
    let mut seen: Vec<(f64, Vector)> = generators
        .iter()
        .map(|g| {
            let g = if g.dot(up) < 0.0 { -*g } else { *g };
            (g.dot(up).atan2(g.dot(right)), g)
        })
        .collect();
    seen.sort_by(|a, b| a.0.total_cmp(&b.0));
    seen.into_iter().map(|s| s.1).collect()
}

/// Positions to exchange at, one after the other, to reverse a half silhouette over the half of the hull that faces the
/// viewer (`facing`) or the other. Parallel generators keep their order.
#[must_use]
pub fn hull_exchanges(word: &[Vector], facing: bool) -> Vec<usize> {
    let count = word.len();
    let scale: f64 = word.iter().map(|g| g.length()).fold(0.0, f64::max);
    let flat = 1e-9 * scale.powi(3);
    let mut order: Vec<usize> = (0..count).collect();
    let mut exchanges = Vec::new();
    let supports = |order: &[usize], at: usize| {
        let [a, b] = [order[at], order[at + 1]];
        let normal = word[a].cross(word[b]) * if facing { 1.0 } else { -1.0 };
        let before = |k: usize| order[..at].contains(&k);
        a < b
            && flat / scale < normal.length()
            && (0..count).filter(|k| *k != a && *k != b).all(|k| {
                let height = word[k].dot(normal);
                height.abs() <= flat || before(k) == (0.0 < height)
            })
    };
    while let Some(at) = (0..count.saturating_sub(1)).find(|at| supports(&order, *at)) {
        order.swap(at, at + 1);
        exchanges.push(at);
    }
    exchanges
}

/// Steps that exchange the letters at a position with the next, whatever their roles were.
#[must_use]
pub fn exchange_at(at: usize) -> [Act; 2] {
    let zigs = u32::try_from(at + 1).expect("words are short");
    [Act::SetRoles(RoleRule::FirstAreZig(zigs)), Act::Fill { at: Vs::All }]
}

/// An open path of these vectors from the origin, each a zone of its own, all zig.
#[must_use]
pub fn open_path(vectors: &[Vector]) -> FreePath {
    let letter = |(id, v): (u32, &Vector)| FreeLetter {
        id,
        vector: FreeVector::Own(*v),
        role: Role::Zig,
    };
    FreePath {
        origin: Point::ORIGIN,
        closed: false,
        letters: (0..).zip(vectors).map(letter).collect(),
    }
}

/// The zonohedron of these generators, seen along `view`, in which no two of them may be seen on one line.
#[must_use]
pub fn zonohedron(generators: &[Vector], view: Vector) -> Shape {
    let word = half_silhouette(generators, view);
    let mut acts = Vec::new();
    for (side, facing) in [(Side::Fore, true), (Side::Aft, false)] {
        for at in hull_exchanges(&word, facing) {
            acts.extend(exchange_at(at).map(|act| (side, act)));
        }
    }
    crate::two_sided(Start::Zigzag(open_path(&word)), acts)
}
