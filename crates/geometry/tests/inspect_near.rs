//! Rims that nearly meet. All cases are planted.

#[path = "common/by_hand.rs"]
mod by_hand;

use by_hand::{Quad, joined, quad};
use zonewright_geometry::{
    Code, Place, Point, Tolerances, Unit,
    inspect::{Inspection, NearMiss, inspect},
};

fn look(quads: &[Quad]) -> Inspection {
    inspect(&joined(quads), &Tolerances::default())
}

fn misses(quads: &[Quad]) -> Vec<NearMiss> {
    look(quads).near_misses
}

fn square(x: f64, y: f64, z: f64) -> Quad {
    quad([x, y, z], [300.0, 0.0, 0.0], [0.0, 300.0, 0.0])
}

#[test]
fn rims_side_by_side() {
    // Within the join tolerance, within the near tolerance, beyond both.
    for (gap, count) in [(0.0005, 0), (0.002, 2), (0.2, 2), (0.499, 2), (0.501, 0), (2.0, 0)] {
        let found = misses(&[square(0.0, 0.0, 0.0), square(300.0 + gap, 0.0, 0.0)]);
        assert_eq!(found.len(), count, "gap {gap}");
        assert!(found.iter().all(|m| (m.gap_mm - gap).abs() < 1e-9));
    }
    let found = misses(&[square(0.0, 0.0, 0.0), square(300.2, 0.0, 0.0)]);
    assert_eq!(found.iter().map(|m| m.vertices).collect::<Vec<_>>(), [[1, 4], [2, 7]]);
}

#[test]
fn a_corner_near_the_middle_of_an_edge() {
    let found = misses(&[
        square(0.0, 0.0, 0.0),
        quad([300.3, 120.0, 0.0], [90.0, 40.0, 0.0], [90.0, -40.0, 0.0]),
    ]);
    assert_eq!(found.len(), 1);
    // The nearer end of the edge is the corner at (300, 0, 0).
    assert_eq!(found[0].vertices, [1, 4]);
    assert!((found[0].gap_mm - 0.3).abs() < 1e-9);
}

#[test]
fn edges_that_pass_each_other() {
    let above = quad([300.0, 150.0, 0.25], [1.0, 1.0, 80.0], [0.0, 300.0, 0.0]);
    assert!(
        misses(&[square(0.0, 0.0, 0.0), above])
            .iter()
            .any(|m| (m.gap_mm - 0.25).abs() < 1e-3)
    );
    // Only their middles are close.
    let across = quad([200.0, 100.0, 0.4], [200.0, 0.0, 0.0], [0.0, 90.0, 200.0]);
    let found = misses(&[square(0.0, 0.0, 0.0), across]);
    assert_eq!(found.len(), 1);
    assert!((found[0].gap_mm - 0.4).abs() < 1e-9);
}

/// Two panels hinged at a corner, with a slit that opens to 0.3 mm at the far ends.
#[test]
fn a_slit_in_one_rim() {
    let one = quad([0.0; 3], [300.0, 0.0, 0.0], [0.0, -200.0, 0.0]);
    let other = quad([0.0; 3], [300.0, 0.3, 0.0], [0.0, 200.0, 0.0]);
    let found = misses(&[one, other]);
    // From the end of one edge straight to the other edge.
    let gap = 300.0 * 0.001_f64.atan().sin();
    assert_eq!(found.len(), 1);
    assert_eq!(found[0].vertices, [1, 4]);
    assert!((found[0].gap_mm - gap).abs() < 1e-9);
    assert!(look(&[one, other]).crossings.is_empty());
}

#[test]
fn what_is_near_by_nature_is_no_near_miss() {
    // A needle; a row of needles; a rim of short edges; two panels that share an edge.
    let needle = |k: usize| quad([100.0 * k as f64, 0.0, 0.0], [100.0, 0.0, 0.0], [0.0, 0.3, 0.0]);
    assert!(misses(&[needle(0)]).is_empty());
    assert!(misses(&[needle(0), needle(1), needle(2)]).is_empty());
    let short: Vec<Quad> = (0..30)
        .map(|k| quad([0.2 * f64::from(k), 0.0, 0.0], [0.2, 0.0, 0.0], [0.0, 50.0, 0.0]))
        .collect();
    assert!(misses(&short).is_empty());
    assert!(misses(&[square(0.0, 0.0, 0.0), square(300.0, 0.0, 0.0)]).is_empty());
    // A closed block has no rim.
    assert!(misses(&by_hand::block(0.1, 0.1, 0.1)).is_empty());
}

#[test]
fn the_tolerances_are_the_limits() {
    let quads = [square(0.0, 0.0, 0.0), square(302.0, 0.0, 0.0)];
    let shell = joined(&quads);
    let with = |join_mm, near_mm| inspect(&shell, &Tolerances { join_mm, near_mm }).near_misses.len();
    assert_eq!(
        [with(0.5, 3.0), with(2.5, 3.0), with(0.5, 1.5), with(3.0, 0.5)],
        [2, 0, 0, 0]
    );
    assert_eq!(
        [with(f64::NAN, 3.0), with(0.5, f64::INFINITY), with(0.5, f64::NAN)],
        [0; 3]
    );
    let mut lost = shell.clone();
    lost.points[0] = Point::new(f64::NAN, 0.0, 0.0);
    assert_eq!(
        inspect(
            &lost,
            &Tolerances {
                join_mm: 0.1,
                near_mm: 3.0
            }
        )
        .near_misses
        .len(),
        2
    );
}

#[test]
fn findings_have_the_gap_and_the_limit() {
    let found = look(&[square(0.0, 0.0, 0.0), square(300.25, 0.0, 0.0)]);
    let said = found.findings(&Tolerances::default());
    assert_eq!(said.len(), 2);
    assert_eq!(said[0].code, Code::NearMiss);
    assert_eq!(said[0].place, Place::Vertices(vec![1, 4]));
    assert_eq!(
        (said[0].figure, said[0].limit, said[0].unit),
        (Some(0.25), Some(0.5), Unit::Millimetres)
    );
}
