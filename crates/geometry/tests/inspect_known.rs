//! Crossings of shells whose crossings are known, and of planted ones.

#[path = "common/by_hand.rs"]
mod by_hand;

use by_hand::{Quad, block, helical, joined, loose, quad};
use zonewright_geometry::{
    Code, Place, Point, Shell, Tolerances, Unit, Vector,
    inspect::{Inspection, LISTED, inspect},
};

fn look(shell: &Shell) -> Inspection {
    inspect(shell, &Tolerances::default())
}

fn crossing_pairs(quads: &[Quad]) -> Vec<[u32; 2]> {
    look(&joined(quads)).crossings.iter().map(|c| c.panels).collect()
}

/// The pitch at which the ribs are the edges of a cube seen along its diagonal.
const CUBE_PITCH: f64 = 0.615_479_708_670_387_3;

/// V, E, F of the helical solids: docs/checks.md, worked cases.
#[test]
fn helical_solids_have_their_counts() {
    for (n, r, counts) in [
        (3, 1, [8, 12, 6]),
        (4, 1, [14, 24, 12]),
        (5, 2, [32, 60, 30]),
        (6, 2, [26, 48, 24]),
        (7, 2, [72, 140, 70]),
        (7, 3, [86, 168, 84]),
    ] {
        let shell = joined(&helical(n, r, CUBE_PITCH));
        let found = [shell.points.len(), shell.edges.len(), shell.panels.len()];
        assert_eq!(found, counts, "({n}, {r})");
    }
}

/// docs/checks.md, worked cases: 15 pairs of panels of (5, 2) cross, 10 of them share a corner.
#[test]
fn helical_five_two_crosses_fifteen_times() {
    for pitch in [0.2, CUBE_PITCH, 1.1] {
        let found = look(&joined(&helical(5, 2, pitch)));
        assert_eq!(found.crossings.len(), 15, "pitch {pitch}");
        assert_eq!(found.crossings.iter().filter(|c| c.shares_corner).count(), 10);
        assert!(found.doubled.is_empty());
        assert!(found.crossings.is_sorted());
        assert!(found.crossings.iter().all(|c| c.panels[0] < c.panels[1]));
    }
}

/// docs/checks.md, worked cases: r divides n and 2 r is not n, or they cross; 2 r = n doubles panels.
#[test]
fn helical_solids_cross_unless_turns_divide_ribs() {
    for (n, r) in [(3, 1), (4, 1), (5, 1), (6, 2), (8, 2), (9, 3), (10, 2), (12, 3)] {
        let found = look(&joined(&helical(n, r, CUBE_PITCH)));
        assert_eq!(found, Inspection::default(), "({n}, {r})");
    }
    for (n, r) in [(5, 3), (7, 2), (7, 3), (8, 3), (9, 2)] {
        let found = look(&joined(&helical(n, r, CUBE_PITCH)));
        assert!(!found.crossings.is_empty(), "({n}, {r})");
    }
    let doubled = look(&joined(&helical(4, 2, CUBE_PITCH)));
    assert_eq!(doubled.doubled.len(), 4);
    assert!(doubled.crossings.is_empty());
}

/// Crossings do not depend on which side is out, or on whether panels share vertices.
#[test]
fn helical_crossings_without_shared_vertices() {
    let quads = helical(5, 2, CUBE_PITCH);
    let found = look(&loose(&quads)).crossings;
    assert_eq!(found, look(&joined(&quads)).crossings);
    assert_eq!(look(&joined(&by_hand::reversed(&quads))).crossings, found);
}

/// Derived: two squares of side 4; the second stands upright across the middle of the first.
#[test]
fn planted_crossing_that_shares_nothing() {
    let floor = quad([0.0; 3], [4.0, 0.0, 0.0], [0.0, 4.0, 0.0]);
    let through = quad([1.0, 2.0, -1.0], [2.0, 0.0, 0.0], [0.0, 0.0, 3.0]);
    let found = look(&joined(&[floor, through]));
    assert_eq!(found.crossings.len(), 1);
    assert!(!found.crossings[0].shares_corner);
    // Longer than the floor; piercing it only near one side; and cutting off one corner.
    let long = quad([-9.0, 2.0, -1.0], [20.0, 0.0, 1.0], [0.0, 1.0, 3.0]);
    let nick = quad([3.0, 1.0, -1.0], [5.0, 0.0, 0.0], [0.0, 0.0, 3.0]);
    let corner = quad([3.0, 5.0, -1.0], [2.0, -3.0, 0.0], [0.0, 0.0, 2.0]);
    for panel in [long, nick, corner] {
        assert_eq!(crossing_pairs(&[floor, panel]), [[0, 1]]);
    }
}

/// Derived: the common line starts at the shared corner and runs through the inside of both.
#[test]
fn planted_crossing_that_starts_at_a_shared_corner() {
    let floor = quad([0.0; 3], [4.0, 0.0, 0.0], [0.0, 4.0, 0.0]);
    let through = quad([0.0; 3], [1.0, 1.0, 2.0], [2.0, 2.0, -1.0]);
    let found = look(&joined(&[floor, through]));
    assert_eq!(found.crossings.len(), 1);
    assert!(found.crossings[0].shares_corner);
    // Sharing the corner, but leaving the other way.
    let away = quad([0.0; 3], [-1.0, -1.0, 2.0], [-2.0, -2.0, -1.0]);
    assert!(crossing_pairs(&[floor, away]).is_empty());
    // Across the corner outside of the floor.
    let beside = quad([0.0; 3], [1.0, -1.0, 2.0], [2.0, -2.0, -1.0]);
    assert!(crossing_pairs(&[floor, beside]).is_empty());
}

/// Derived: panels that share an edge cross only when one lies on the other.
#[test]
fn panels_with_a_shared_edge() {
    let floor = quad([0.0; 3], [4.0, 0.0, 0.0], [0.0, 4.0, 0.0]);
    for fold in [[1.0, 4.0, 1.0], [0.0, 1.0, 1e-3], [0.0, -2.0, -1.0], [1.0, -3.0, 0.0]] {
        let other = quad([0.0; 3], [4.0, 0.0, 0.0], fold);
        assert!(crossing_pairs(&[floor, other]).is_empty(), "{fold:?}");
    }
    for flat in [[0.0, 2.0, 0.0], [1.0, 3.0, 0.0], [-3.0, 8.0, 0.0]] {
        let other = quad([0.0; 3], [4.0, 0.0, 0.0], flat);
        let found = look(&joined(&[floor, other]));
        assert_eq!(found.crossings.len(), 1, "{flat:?}");
        assert!(found.doubled.is_empty());
    }
}

/// Derived: contact is not a crossing.
#[test]
fn touching_panels_do_not_cross() {
    let floor = quad([0.0; 3], [4.0, 0.0, 0.0], [0.0, 4.0, 0.0]);
    let touching = [
        // A corner on the face.
        quad([2.0, 2.0, 0.0], [1.0, 0.0, 1.0], [0.0, 1.0, 1.0]),
        // An edge on the face.
        quad([1.0, 2.0, 0.0], [2.0, 0.0, 0.0], [0.0, 1.0, 2.0]),
        // An edge across the face, and beyond it.
        quad([-1.0, 2.0, 0.0], [8.0, 0.0, 0.0], [0.0, 1.0, -2.0]),
        // An edge across an edge.
        quad([4.0, 2.0, -1.0], [0.0, 0.0, 2.0], [3.0, 1.0, 0.0]),
        // A corner on an edge.
        quad([4.0, 1.0, 0.0], [1.0, 0.0, 1.0], [1.0, 0.0, -1.0]),
        // A corner of the floor inside the other panel.
        quad([4.0, 2.0, -1.0], [0.0, 3.0, 0.0], [0.0, 0.0, 2.0]),
        // Part of an edge along part of an edge, upright and flat.
        quad([4.0, 1.0, 0.0], [0.0, 5.0, 0.0], [0.0, 0.0, 2.0]),
        quad([4.0, 1.0, 0.0], [0.0, 5.0, 0.0], [3.0, 0.0, 0.0]),
        // Corner to corner in the plane.
        quad([4.0, 4.0, 0.0], [2.0, 0.0, 0.0], [0.0, 2.0, 0.0]),
        // In the same plane, apart; and parallel above it.
        quad([5.0, 1.0, 0.0], [2.0, 1.0, 0.0], [0.0, 2.0, 0.0]),
        quad([1.0, 1.0, 1.0], [2.0, 1.0, 0.0], [0.0, 2.0, 0.0]),
    ];
    for (k, other) in touching.into_iter().enumerate() {
        for quads in [[floor, other], [other, floor]] {
            assert!(crossing_pairs(&quads).is_empty(), "case {k}");
            assert!(look(&loose(&quads)).crossings.is_empty(), "case {k}, loose");
        }
    }
}

/// Derived: what touches goes on touching when rounding moves it, and crosses when it is moved by more.
#[test]
fn contact_allows_rounding_only() {
    let floor = quad([0.0; 3], [4.0, 0.0, 0.0], [0.0, 4.0, 0.0]);
    for (sunk, crosses) in [(1e-12, false), (1e-6, true)] {
        let corner = quad([2.0, 2.0, -sunk], [1.0, 0.0, 1.0], [0.0, 1.0, 1.0]);
        let edge = quad([4.0 - sunk, 2.0, -1.0], [0.0, 0.0, 2.0], [3.0, 1.0, 0.0]);
        let flat = quad([4.0 - sunk, 1.0, 0.0], [0.0, 5.0, 0.0], [3.0, 0.0, 0.0]);
        for other in [corner, edge, flat] {
            assert_eq!(!crossing_pairs(&[floor, other]).is_empty(), crosses);
        }
    }
}

/// The panels that an edge lies in, with the edge's own panels on opposite sides.
fn passed_through(quads: &[Quad]) -> Vec<u32> {
    let found = look(&joined(quads));
    assert!(found.crossings.is_empty() && found.doubled.is_empty());
    assert_eq!(found.crosses_itself(), !found.passages.is_empty());
    assert_eq!(
        found.findings(&Tolerances::default()).is_empty(),
        found.passages.is_empty()
    );
    found.passages.iter().map(|p| p.panel).collect()
}

/// Derived: a sheet folded along a line in the floor passes through it when its two panels are on opposite sides.
#[test]
fn an_edge_that_lies_in_a_panel() {
    let floor = quad([0.0; 3], [4.0, 0.0, 0.0], [0.0, 4.0, 0.0]);
    let above = quad([1.0, 2.0, 0.0], [2.0, 0.0, 0.0], [0.0, 1.0, 2.0]);
    let below = quad([1.0, 2.0, 0.0], [2.0, 0.0, 0.0], [0.0, 1.0, -2.0]);
    assert_eq!(passed_through(&[above, floor, below]), [1]);
    let above_too = quad([1.0, 2.0, 0.0], [2.0, 0.0, 0.0], [0.0, -1.0, 2.0]);
    assert!(passed_through(&[above, floor, above_too]).is_empty());
    // The line reaches from outside of the floor over a part of it; and runs along a side of the floor.
    let shift = |by: [f64; 3]| [above, below].map(|q| q.map(|p| p + Vector::from_array(by)));
    let [a, b] = shift([-2.0, 0.0, 0.0]);
    assert_eq!(passed_through(&[a, b, floor]), [2]);
    let [a, b] = shift([0.0, 2.0, 0.0]);
    assert!(passed_through(&[a, b, floor]).is_empty());
    // Not joined, the two are two sheets that each touch the floor.
    assert_eq!(look(&loose(&[above, floor, below])), Inspection::default());
    // Along a diagonal of the floor, from corner to corner.
    let up = quad([0.0; 3], [4.0, 4.0, 0.0], [0.0, 1.0, 2.0]);
    let down = quad([0.0; 3], [4.0, 4.0, 0.0], [0.0, 1.0, -2.0]);
    assert_eq!(passed_through(&[up, floor, down]), [1]);
}

/// Derived: the lower panel covers half of the upper one's side, so the edge is a part of a side.
#[test]
fn a_part_of_a_side_that_lies_in_a_panel() {
    let floor = quad([0.0; 3], [9.0, 0.0, 0.0], [0.0, 4.0, 0.0]);
    let above = quad([1.0, 2.0, 0.0], [6.0, 0.0, 0.0], [0.0, 1.0, 2.0]);
    let below = quad([1.0, 2.0, 0.0], [3.0, 0.0, 0.0], [0.0, 1.0, -2.0]);
    let shell = joined(&[floor, above, below]);
    assert_eq!(shell.tees.len(), 1);
    assert_eq!(passed_through(&[floor, above, below]), [0]);
    let edge = look(&shell).passages[0].edge;
    let ends = shell.edges[edge as usize].ends.map(|v| shell.points[v as usize].0.x);
    assert_eq!(ends, [1.0, 4.0]);
}

#[test]
fn doubled_panels_are_found_also_without_shared_vertices() {
    let floor = quad([0.0; 3], [4.0, 1.0, 0.0], [0.0, 4.0, 2.0]);
    let turned = [floor[2], floor[1], floor[0], floor[3]];
    for shell in [joined(&[floor, turned]), loose(&[floor, turned])] {
        let found = look(&shell);
        assert_eq!(found.doubled, [[0, 1]]);
        assert!(found.crossings.is_empty());
    }
    // The same diagonal, other corners: overlapping, not doubled.
    let [one, other] = [
        quad([0.0; 3], [4.0, 0.0, 0.0], [0.0, 4.0, 0.0]),
        quad([0.0; 3], [4.0, 1.0, 0.0], [0.0, 3.0, 0.0]),
    ];
    let found = look(&joined(&[one, other]));
    assert!(found.doubled.is_empty());
    assert_eq!(found.crossings.len(), 1);
}

/// Blocks side by side and inside each other do not cross; shifted by half they do.
#[test]
fn two_blocks() {
    let shifted = |by: [f64; 3]| {
        let mut quads = block(2.0, 2.0, 2.0);
        quads.extend(
            block(2.0, 2.0, 2.0)
                .iter()
                .map(|q| q.map(|p| p + Vector::from_array(by))),
        );
        look(&joined(&quads))
    };
    let beside = shifted([2.0, 0.0, 0.0]);
    assert_eq!((beside.doubled.len(), beside.crossings.len()), (1, 0));
    assert_eq!(shifted([2.0, 1.0, 1.0]).crossings.len(), 1);
    assert_eq!(shifted([5.0, 1.0, 1.0]), Inspection::default());
    // Each of the three faces at a corner of one crosses two faces of the other.
    assert_eq!(shifted([1.0, 1.0, 1.0]).crossings.len(), 6);
}

/// Derived: a needle a thousandth of a millimetre wide, where plain rounding is larger than the heights that decide.
#[test]
fn a_needle_needs_exact_heights() {
    let needle = quad([0.0; 3], [1000.0, 0.0, 0.0], [1000.0, 1e-3, 0.0]);
    for (low, crosses) in [
        (-5e-5, true),
        (0.0, false),
        (-1e-4, false),
        (-2e-4, false),
        (-2e-5, true),
    ] {
        let strip = quad([900.0, 4e-4, low], [0.0, 200.0, 0.0], [0.0, 0.0, 1e-4]);
        for quads in [[needle, strip], [strip, needle]] {
            assert_eq!(!crossing_pairs(&quads).is_empty(), crosses, "{low}");
        }
    }
}

/// Joining rims may bend panels a little; flat bent neighbours are not taken for crossing ones.
#[test]
fn bent_panels_only_touch() {
    let floor = quad([0.0; 3], [4.0, 0.0, 0.0], [0.0, 4.0, 0.0]);
    let mut beside = quad([4.0, 1.0, 0.0], [4.0, 0.0, 0.0], [0.0, 2.0, 0.0]);
    beside[0] += Vector::new(-1e-4, 0.0, -1e-4);
    beside[3] += Vector::new(-1e-4, 0.0, 1e-4);
    assert!(look(&loose(&[floor, beside])).crossings.is_empty());
    // As deep, and not bent.
    let mut shifted = quad([4.0, 1.0, 0.0], [4.0, 0.0, 0.0], [0.0, 2.0, 2e-4]);
    shifted.iter_mut().for_each(|p| *p += Vector::new(-1e-4, 0.0, -1e-4));
    assert_eq!(look(&loose(&[floor, shifted])).crossings.len(), 1);
}

/// Bad places and panels without area are passed over.
#[test]
fn broken_shells_do_no_harm() {
    assert_eq!(look(&Shell::default()), Inspection::default());
    let floor = quad([0.0; 3], [4.0, 0.0, 0.0], [0.0, 4.0, 0.0]);
    let flat = quad([0.0; 3], [4.0, 0.0, 0.0], [2.0, 0.0, 0.0]);
    let lost = quad([f64::NAN; 3], [4.0, 0.0, 0.0], [2.0, 0.0, 0.0]);
    let far = quad([f64::INFINITY; 3], [4.0, 0.0, 0.0], [2.0, 0.0, 1.0]);
    let through = quad([1.0, 2.0, -1.0], [2.0, 0.0, 0.0], [0.0, 0.0, 3.0]);
    let found = look(&loose(&[floor, flat, lost, far, through]));
    assert_eq!(found.crossings.len(), 1);
    assert_eq!(found.crossings[0].panels, [0, 4]);
}

#[test]
fn findings_name_each_pair_up_to_a_limit() {
    let floor = quad([0.0; 3], [400.0, 0.0, 0.0], [0.0, 4.0, 0.0]);
    let pin = |k: usize| quad([1.0 + k as f64, 2.0, -1.0], [0.5, 0.1, 0.0], [0.0, 0.0, 3.0]);
    for (count, findings) in [(3, 3), (LISTED, LISTED), (LISTED + 7, LISTED + 1)] {
        let quads: Vec<Quad> = [floor].into_iter().chain((0..count).map(pin)).collect();
        let found = look(&loose(&quads));
        assert_eq!(found.crossings.len(), count);
        let said = found.findings(&Tolerances::default());
        assert_eq!(said.len(), findings);
        assert!(said.iter().all(|f| f.code == Code::Crossing));
        assert_eq!(said[1].place, Place::Panels(vec![0, 2]));
        if findings > LISTED {
            assert_eq!(said[LISTED].figure, Some(count as f64));
            assert_eq!(said[LISTED].unit, Unit::Count);
            let rest: Vec<u32> = [0].into_iter().chain(LISTED as u32 + 1..=count as u32).collect();
            assert_eq!(said[LISTED].place, Place::Panels(rest));
        }
    }
}

/// Moved far away, places carry more rounding; what is found stays the same.
#[test]
fn far_from_the_origin() {
    let shift = Vector::new(1e7, -3e7, 2e7);
    let moved = |quads: Vec<Quad>| -> Vec<Quad> { quads.iter().map(|q| q.map(|p: Point| p + shift)).collect() };
    let cube_like = |n, r| moved(helical(n, r, CUBE_PITCH));
    assert_eq!(look(&joined(&cube_like(5, 2))).crossings.len(), 15);
    assert!(look(&joined(&cube_like(6, 2))).crossings.is_empty());
}
