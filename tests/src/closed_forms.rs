//! Sums over generators that fix a zonohedron's volume, area and size.

use zonewright_geometry::{Start, Vector};

/// Volume of the zonohedron: the sum of |det| over all triples (McMullen 1971; Shephard 1974; docs/checks.md).
#[must_use]
pub fn volume(generators: &[Vector]) -> f64 {
    let mut sum = 0.0;
    for (i, a) in generators.iter().enumerate() {
        for (j, b) in generators.iter().enumerate().skip(i + 1) {
            let normal = a.cross(*b);
            sum += generators[j + 1..].iter().map(|c| normal.dot(*c).abs()).sum::<f64>();
        }
    }
    sum
}

/// Area of the zonohedron: twice the sum of |a x b| over all pairs (docs/checks.md).
#[must_use]
pub fn area(generators: &[Vector]) -> f64 {
    2.0 * pairs(generators, |a, b| a.cross(b).length())
}

/// Sum of a function over all pairs.
#[must_use]
pub fn pairs(generators: &[Vector], of: impl Fn(Vector, Vector) -> f64) -> f64 {
    let mut sum = 0.0;
    for (i, a) in generators.iter().enumerate() {
        sum += generators[i + 1..].iter().map(|b| of(*a, *b)).sum::<f64>();
    }
    sum
}

/// Width along x, y and z: the sum of the generators' shares (docs/checks.md).
#[must_use]
pub fn size(generators: &[Vector]) -> Vector {
    generators.iter().map(|g| g.abs()).sum()
}

/// The vectors of a start's zones.
///
/// # Panics
/// When the start is refused.
#[must_use]
pub fn zones_of(start: &Start) -> Vec<Vector> {
    let word = start.first_word().expect("the start can be used");
    word.zones.iter().map(|z| z.vector).collect()
}
