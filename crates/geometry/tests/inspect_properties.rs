//! Crossings against a slow exact answer, and under motions that must not matter.

#[path = "common/by_hand.rs"]
mod by_hand;
#[path = "common/exact.rs"]
mod exact;

use by_hand::{Quad, joined, loose, quad};
use exact::{Answer, Slab};
use proptest::prelude::*;
use zonewright_geometry::{
    Point, Shell, Tolerances, Vector,
    inspect::{Inspection, inspect},
};

fn look(shell: &Shell) -> Inspection {
    inspect(shell, &Tolerances::default())
}

/// A parallelogram with whole coordinates and an area.
fn slab(reach: i64, side: i64) -> impl Strategy<Value = Slab> {
    let whole = move |to: i64| prop::array::uniform3(-to..=to);
    (whole(reach), whole(side), whole(side))
        .prop_map(|(corner, u, v)| Slab { corner, u, v })
        .prop_filter("no area", Slab::has_area)
}

fn panel(slab: &Slab) -> Quad {
    let [corner, u, v] = [slab.corner, slab.u, slab.v].map(|w| w.map(|x| x as f64));
    quad(corner, u, v)
}

fn found(shell: &Shell) -> Answer {
    let found = look(shell);
    match (found.crossings.len(), found.doubled.len()) {
        (0, 0) => Answer::Apart,
        (1, 0) => Answer::Crossing,
        (0, 1) => Answer::Doubled,
        other => panic!("{other:?}"),
    }
}

/// The same panel from another corner on, and perhaps with the other side out.
fn turned(quad: Quad, by: usize, over: bool) -> Quad {
    let mut quad = quad;
    quad.rotate_left(by);
    if over {
        quad.reverse();
    }
    quad
}

fn agrees(a: &Slab, b: &Slab, by: usize, over: bool) {
    let expected = exact::meet(a, b);
    let [p, q] = [panel(a), turned(panel(b), by, over)];
    for quads in [[p, q], [q, p]] {
        assert_eq!(found(&joined(&quads)), expected, "{a:?} {b:?}");
        assert_eq!(found(&loose(&quads)), expected, "{a:?} {b:?}, loose");
    }
}

proptest! {
    #![proptest_config(ProptestConfig { cases: 3000, failure_persistence: None, ..ProptestConfig::default() })]

    /// Many of these share corners or edges, lie in one plane, touch, or coincide.
    #[test]
    fn small_whole_panels_meet_as_they_do_exactly(
        a in slab(1, 1), b in slab(1, 1), by in 0_usize..4, over: bool
    ) {
        agrees(&a, &b, by, over);
    }

    #[test]
    fn middling_whole_panels_meet_as_they_do_exactly(
        a in slab(2, 3), b in slab(2, 3), by in 0_usize..4, over: bool
    ) {
        agrees(&a, &b, by, over);
    }

    /// Needles and large panels.
    #[test]
    fn large_whole_panels_meet_as_they_do_exactly(
        a in slab(40, 90), b in slab(40, 90), by in 0_usize..4, over: bool
    ) {
        agrees(&a, &b, by, over);
    }

    /// Flat ones, all in a plane that is not along the axes.
    #[test]
    fn whole_panels_in_one_plane_meet_as_they_do_exactly(
        p in prop::array::uniform6(-4_i64..=4), q in prop::array::uniform6(-4_i64..=4), by in 0_usize..4, over: bool
    ) {
        let lift = |x: i64, y: i64| [2 * x - y, x + 3 * y, y - 5 * x];
        let lay = |w: [i64; 6]| Slab { corner: lift(w[0], w[1]), u: lift(w[2], w[3]), v: lift(w[4], w[5]) };
        let [a, b] = [lay(p), lay(q)];
        prop_assume!(a.has_area() && b.has_area());
        agrees(&a, &b, by, over);
    }
}

proptest! {
    #![proptest_config(ProptestConfig { cases: 300, failure_persistence: None, ..ProptestConfig::default() })]

    /// Turned, scaled and moved, the same pairs are found; corners on faces then carry rounding.
    #[test]
    fn motions_do_not_matter(
        slabs in prop::collection::vec(slab(3, 3), 2..14),
        axis in prop::array::uniform3(-1.0_f64..1.0), angle in 0.0_f64..6.3,
        shift in prop::array::uniform3(-50.0_f64..50.0), power in -3_i32..6,
    ) {
        let quads: Vec<Quad> = slabs.iter().map(panel).collect();
        let axis = Vector::from_array(axis);
        prop_assume!(axis.length() > 0.1);
        let turn = glam::DQuat::from_axis_angle(axis.normalize(), angle);
        for shell in [joined(&quads), loose(&quads)] {
            let mut moved = shell.clone();
            for point in &mut moved.points {
                *point = Point((turn * point.0 + Vector::from_array(shift)) * 10.0_f64.powi(power));
            }
            let [before, after] = [look(&shell), look(&moved)];
            prop_assert_eq!(before.crossings, after.crossings);
            prop_assert_eq!(before.passages, after.passages);
            prop_assert_eq!(before.doubled, after.doubled);
        }
    }

    /// Among many panels of very different sizes, those pairs cross that cross when they are alone.
    #[test]
    fn crowds_cross_in_pairs(
        places in prop::collection::vec((prop::array::uniform9(-1.0_f64..1.0), -3.0_f64..1.0), 2..40)
    ) {
        let quads: Vec<Quad> = places.iter().map(|(x, power)| {
            let size = 10.0_f64.powf(*power);
            quad([x[0], x[1], x[2]], [x[3] * size, x[4] * size, x[5] * size], [x[6] * size, x[7] * size, x[8] * size])
        }).collect();
        let mut alone = Vec::new();
        for (i, p) in (0_u32..).zip(&quads) {
            for (j, q) in (0_u32..i).zip(&quads) {
                if !look(&loose(&[*p, *q])).crossings.is_empty() {
                    alone.push([j, i]);
                }
            }
        }
        alone.sort_unstable();
        let crowd: Vec<[u32; 2]> = look(&loose(&quads)).crossings.iter().map(|c| c.panels).collect();
        prop_assert_eq!(crowd, alone);
    }
}
