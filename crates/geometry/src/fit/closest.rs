//! The place of a triangle or of a line that is closest to a place.

use crate::Vector;

/// The closest place of the segment from `a` to `b`.
pub(super) fn on_segment(p: Vector, a: Vector, b: Vector) -> Vector {
    let along = b - a;
    let length = along.length_squared();
    if length > 0.0 {
        a + along * ((p - a).dot(along) / length).clamp(0.0, 1.0)
    } else {
        a
    }
}

/// The closest place of a triangle: by the region of its plane that the place lies over (Ericson, Real-Time Collision
/// Detection, 2005, section 5.1.5; from memory). A triangle without area is its longest side.
pub(super) fn on_triangle(p: Vector, [a, b, c]: [Vector; 3]) -> Vector {
    let (ab, ac, ap) = (b - a, c - a, p - a);
    let sides = ab
        .length_squared()
        .max(ac.length_squared())
        .max((c - b).length_squared());
    if ab.cross(ac).length() <= NO_AREA * sides {
        let onto = [on_segment(p, a, b), on_segment(p, b, c), on_segment(p, c, a)];
        let far = onto.map(|q| q.distance_squared(p));
        let least = (0..3).fold(0, |least, k| if far[k] < far[least] { k } else { least });
        return onto[least];
    }
    let (d1, d2) = (ab.dot(ap), ac.dot(ap));
    if d1 <= 0.0 && d2 <= 0.0 {
        return a;
    }
    let bp = p - b;
    let (d3, d4) = (ab.dot(bp), ac.dot(bp));
    if d3 >= 0.0 && d4 <= d3 {
        return b;
    }
    let vc = d1 * d4 - d3 * d2;
    if vc <= 0.0 && d1 >= 0.0 && d3 <= 0.0 {
        return a + ab * (d1 / (d1 - d3));
    }
    let cp = p - c;
    let (d5, d6) = (ab.dot(cp), ac.dot(cp));
    if d6 >= 0.0 && d5 <= d6 {
        return c;
    }
    let vb = d5 * d2 - d1 * d6;
    if vb <= 0.0 && d2 >= 0.0 && d6 <= 0.0 {
        return a + ac * (d2 / (d2 - d6));
    }
    let va = d3 * d6 - d5 * d4;
    if va <= 0.0 && d4 >= d3 && d5 >= d6 {
        return b + (c - b) * ((d4 - d3) / ((d4 - d3) + (d5 - d6)));
    }
    let whole = va + vb + vc;
    a + ab * (vb / whole) + ac * (vc / whole)
}

/// Twice the area of a triangle, beside the square of its longest side, below which its plane is rounding.
const NO_AREA: f64 = 1e-12;

#[cfg(test)]
mod tests {
    use proptest::prelude::*;

    use super::*;

    fn vector() -> impl Strategy<Value = Vector> {
        (-10.0..10.0_f64, -10.0..10.0_f64, -10.0..10.0_f64).prop_map(Vector::from)
    }

    /// Another way: the foot on the plane when it is inside, by signed areas; else the nearest of the three sides.
    fn by_feet(p: Vector, [a, b, c]: [Vector; 3]) -> Vector {
        let normal = (b - a).cross(c - a);
        let foot = p - normal * ((p - a).dot(normal) / normal.length_squared());
        let inside = [(a, b), (b, c), (c, a)]
            .iter()
            .all(|(u, v)| (*v - *u).cross(foot - *u).dot(normal) >= 0.0);
        if inside {
            return foot;
        }
        [(a, b), (b, c), (c, a)]
            .map(|(u, v)| on_segment(p, u, v))
            .into_iter()
            .min_by(|q, r| q.distance(p).total_cmp(&r.distance(p)))
            .unwrap()
    }

    proptest! {
        #[test]
        fn two_ways_agree(p in vector(), a in vector(), b in vector(), c in vector()) {
            prop_assume!((b - a).cross(c - a).length() > 1e-3);
            let found = on_triangle(p, [a, b, c]);
            prop_assert!((found.distance(p) - by_feet(p, [a, b, c]).distance(p)).abs() < 1e-9);
        }

        /// Planted: a place over the inside, moved along the normal.
        #[test]
        fn a_place_over_the_inside_comes_back(
            a in vector(), b in vector(), c in vector(), u in 0.05..0.9_f64, v in 0.05..0.9_f64, up in -5.0..5.0_f64,
        ) {
            prop_assume!(u + v < 0.95);
            let normal = (b - a).cross(c - a);
            prop_assume!(normal.length() > 0.5);
            let inside = a + (b - a) * u + (c - a) * v;
            let found = on_triangle(inside + normal.normalize() * up, [a, b, c]);
            prop_assert!(found.distance(inside) < 1e-9);
        }
    }

    #[test]
    fn a_triangle_without_area_is_a_line() {
        let line = [Vector::ZERO, Vector::X * 3.0, Vector::X];
        let found = on_triangle(Vector::new(2.0, 1.0, 0.0), line);
        assert_eq!(found, Vector::X * 2.0);
        assert_eq!(on_triangle(Vector::Y, [Vector::X; 3]), Vector::X);
    }
}
