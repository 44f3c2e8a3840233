use super::*;
use proptest::prelude::*;

const WITHIN: FamilyTolerance = FamilyTolerance {
    side_mm: 0.1,
    corner_deg: 0.05,
    bevel_deg: 0.05,
};

/// A parallelogram from its acute corner on.
fn parallelogram(a: f64, b: f64, acute: f64, bevels: [f64; 4]) -> Vec<Side> {
    let side = |k: usize| Side {
        corner_deg: if k.is_multiple_of(2) { acute } else { 180.0 - acute },
        side_mm: if k.is_multiple_of(2) { a } else { b },
        bevel_deg: bevels[k],
    };
    (0..4).map(side).collect()
}

fn rotated(part: &[Side], turn: usize) -> Vec<Side> {
    turned(part, turn % part.len()).copied().collect()
}

fn mirrored(part: &[Side]) -> Vec<Side> {
    let mut out = Vec::new();
    mirror_into(part, &mut out);
    out
}

fn sort(parts: &[Vec<Side>]) -> (Vec<u32>, Vec<Kind>) {
    let mut sorter = Sorter::new(WITHIN);
    let kinds = parts.iter().map(|p| sorter.place(p)).collect();
    (kinds, sorter.kinds().to_vec())
}

/// Derived: which panels are handed.
#[test]
fn hands_of_plain_shapes() {
    let hand = |part: &[Side]| sort(&[part.to_vec()]).1[0].hand;
    let square = |b| parallelogram(300.0, 300.0, 90.0, b);
    let rhombus = |b| parallelogram(300.0, 300.0, 60.0, b);
    assert_eq!(hand(&rhombus([10.0; 4])), Hand::None);
    // Two bevels at each end of a diagonal: mirrored by that diagonal, as on a polar form.
    assert_eq!(hand(&rhombus([10.0, 20.0, 20.0, 10.0])), Hand::None);
    assert_eq!(hand(&rhombus([10.0, 10.0, 20.0, 20.0])), Hand::None);
    // Opposite edges alike: a rhombus is then handed, a square is not.
    assert_ne!(hand(&rhombus([10.0, 20.0, 10.0, 20.0])), Hand::None);
    assert_eq!(hand(&square([10.0, 20.0, 10.0, 20.0])), Hand::None);
    // A parallelogram of unequal sides is handed, a rectangle is not.
    assert_ne!(hand(&parallelogram(800.0, 500.0, 60.0, [0.0; 4])), Hand::None);
    assert_eq!(hand(&parallelogram(800.0, 500.0, 90.0, [0.0; 4])), Hand::None);
    // Four bevels in ascending order on a square are not their own mirror image.
    assert_ne!(hand(&square([1.0, 2.0, 3.0, 4.0])), Hand::None);
}

#[test]
fn twins_share_a_number_and_the_hand_is_their_own() {
    let part = parallelogram(800.0, 500.0, 60.0, [5.0, 10.0, 15.0, 20.0]);
    let twin = mirrored(&part);
    let other = parallelogram(800.0, 500.0, 61.0, [5.0; 4]);
    let (kinds, found) = sort(&[
        other.clone(),
        part.clone(),
        rotated(&twin, 3),
        rotated(&part, 2),
        twin.clone(),
    ]);
    assert_eq!(kinds, [0, 1, 2, 1, 2]);
    assert_eq!(found.iter().map(|k| k.number).collect::<Vec<_>>(), [1, 2, 2]);
    assert_eq!((found[1].twin, found[2].twin), (Some(2), Some(1)));
    assert_eq!(found[2].first, 2);
    assert_eq!(found[1].hand, found[2].hand.other());
    // Met in the other order, each keeps its hand.
    let (_, again) = sort(&[twin, part]);
    assert_eq!((again[0].hand, again[1].hand), (found[2].hand, found[1].hand));
    assert_eq!(again[0].number, again[1].number);
}

/// The same four bevels in another order are another part.
#[test]
fn the_order_of_bevels_counts() {
    let part = |b| parallelogram(400.0, 400.0, 70.0, b);
    let (kinds, found) = sort(&[
        part([1.0, 2.0, 3.0, 4.0]),
        part([1.0, 3.0, 2.0, 4.0]),
        part([3.0, 4.0, 1.0, 2.0]),
        part([-1.0, 2.0, 3.0, 4.0]),
    ]);
    assert_eq!(kinds, [0, 1, 0, 2]);
    assert!(found.iter().all(|k| k.twin.is_none()));
}

#[test]
fn tolerances_are_each_their_own() {
    let base = parallelogram(300.0, 300.0, 60.0, [10.0, 20.0, 20.0, 10.0]);
    let changed = |f: &dyn Fn(&mut Side)| {
        let mut part = base.clone();
        f(&mut part[1]);
        sort(&[base.clone(), part]).1.len()
    };
    assert_eq!(changed(&|s| s.side_mm += 0.09), 1);
    assert_eq!(changed(&|s| s.side_mm += 0.11), 2);
    assert_eq!(changed(&|s| s.corner_deg -= 0.04), 1);
    assert_eq!(changed(&|s| s.corner_deg -= 0.06), 2);
    assert_eq!(changed(&|s| s.bevel_deg += 0.04), 1);
    assert_eq!(changed(&|s| s.bevel_deg -= 0.06), 2);
}

#[test]
fn settings_are_counted_with_their_sign() {
    assert_eq!(distinct_settings(vec![12.63, 7.35, 12.64, -7.35, 7.35], 0.05), 3);
    assert_eq!(distinct_settings(vec![0.00, 0.04, 0.08], 0.05), 2);
    assert_eq!(distinct_settings(Vec::new(), 0.05), 0);
}

/// Many different panels: the work grows with their number, not with its square. Counted in comparisons, not in time.
#[test]
fn different_panels_are_not_compared_with_each_other() {
    let mut grid = Grid::new(&WITHIN);
    let asked = core::cell::Cell::new(0_usize);
    let n = 10_000_u32;
    for k in 0..n {
        let bevel = f64::from(k) * 0.0037;
        let part = parallelogram(
            300.0,
            300.0,
            60.0 + f64::from(k % 100) * 0.2,
            [bevel, 10.0, 11.0, 30.0 - bevel],
        );
        let found = grid.find(&part, |_| {
            asked.set(asked.get() + 1);
            None::<()>
        });
        assert!(found.is_none());
        grid.add(&part, k);
    }
    assert!(asked.get() < 20 * n as usize, "{} comparisons", asked.get());
}

fn any_part() -> impl Strategy<Value = Vec<Side>> {
    // Steps of five tolerances, so that two values are either equal or plainly different.
    let side = (0..4_i32, 0..3_i32, -3..4_i32).prop_map(|(corner, side, bevel)| Side {
        corner_deg: 60.0 + 0.25 * f64::from(corner),
        side_mm: 300.0 + 0.5 * f64::from(side),
        bevel_deg: 0.25 * f64::from(bevel),
    });
    prop::collection::vec(side, 3..7)
}

proptest! {
    /// Sorting by comparing every two, the plain way, gives the same kinds. The shift moves the parts across the grid.
    #[test]
    fn the_grid_loses_nothing(
        pool in prop::collection::vec(any_part(), 1..6),
        shift in 0.0..1.0_f64,
        picks in prop::collection::vec((0..6_usize, 0..7_usize, any::<bool>(), -1.0..1.0_f64), 1..60),
    ) {
        let noisy: Vec<Vec<Side>> = (picks.iter())
            .map(|&(pick, turn, turned_over, noise)| {
                let part = &pool[pick % pool.len()];
                let part = if turned_over { mirrored(part) } else { part.clone() };
                let shake = |s: Side| Side {
                    corner_deg: s.corner_deg + 0.02 * noise + shift,
                    side_mm: s.side_mm - 0.04 * noise + shift,
                    bevel_deg: s.bevel_deg + 0.02 * noise + shift,
                };
                rotated(&part, turn).into_iter().map(shake).collect()
            })
            .collect();
        let (kinds, _) = sort(&noisy);
        for (i, a) in noisy.iter().enumerate() {
            for (j, b) in noisy.iter().enumerate().take(i) {
                prop_assert_eq!(kinds[i] == kinds[j], same_under_rotation(a, b, &WITHIN), "{} {}", i, j);
            }
        }
    }

    /// A part, any turn of it and its mirror image: one number, and the hand depends on neither turn nor order.
    #[test]
    fn hands_are_opposite(part in any_part(), turn in 0..7_usize, other in 0..7_usize) {
        let (own, found) = sort(&[rotated(&part, turn), rotated(&mirrored(&part), other), part.clone()]);
        prop_assert!(found.iter().all(|k| k.number == 1));
        prop_assert_eq!(own[0], own[2]);
        if found.len() == 2 {
            prop_assert_eq!(found[0].hand, found[1].hand.other());
            prop_assert_ne!(found[0].hand, Hand::None);
        } else {
            prop_assert_eq!(found[0].hand, Hand::None);
        }
        let (_, alone) = sort(&[rotated(&part, other)]);
        prop_assert_eq!(alone[0].hand, found[0].hand);
    }
}
