//! General zonohedra, grown from free paths.
//!
//! Sources: Coxeter, Regular Polytopes, 2.8; Ball and Coxeter, Mathematical Recreations and Essays (counts); McMullen, On
//! zonotopes (1971), and Shephard (1974) (volume by determinants); docs/checks.md, for the fixtures and for what is
//! marked derived there.

use core::f64::consts::TAU;

use proptest::prelude::*;
use zonewright_geometry::{
    Act, Code, Point, Role, Side, Sign, Start, Tolerances, Vector, grow, inspect, measure,
    start::{FreeLetter, FreePath, FreeVector},
};
use zonewright_tests::{
    PRINTED, ROUNDING, assert_near, closed_forms, grown,
    look::{self, counts, degrees, merged, tally},
    two_sided,
    zonohedron::{half_silhouette, zonohedron},
};

/// Lies in no plane of two of the fixtures' generators.
const VIEW: Vector = Vector::new(0.313, 0.171, 1.0);

fn vectors(of: &[[i32; 3]]) -> Vec<Vector> {
    of.iter().map(|g| Vector::from_array(g.map(f64::from))).collect()
}

fn z5() -> Vec<Vector> {
    vectors(&[[2, 0, 1], [0, 3, 1], [-1, 1, 2], [1, -2, 2], [-2, -1, 2]])
}

#[test]
fn z5_has_the_derived_counts_volume_area_and_size() {
    // Fixture Z5 of docs/checks.md (integers, derived there).
    let shell = grown(&zonohedron(&z5(), VIEW));
    assert_eq!(counts(&shell), [22, 40, 20]);
    assert_eq!(degrees(&shell), [(3, 10), (4, 10), (5, 2)].into());
    assert_near!(look::volume(&shell), 132.0, 132.0 * ROUNDING);
    assert_near!(look::area(&shell), 137.890_866_493_1, PRINTED);
    assert_near!(measure::totals(&shell).area_mm2, 137.890_866_493_1, PRINTED);
    // From (-3, -3, 0) to (3, 4, 8).
    assert!((measure::totals(&shell).size - Vector::new(6.0, 7.0, 8.0)).length() < 1e-12);
}

#[test]
fn z5_has_each_pair_of_zones_twice_with_the_listed_areas() {
    let shell = grown(&zonohedron(&z5(), VIEW));
    // |g_i x g_j| squared, pairs in the order of a dictionary (fixture Z5).
    let mut expected: Vec<i64> = [49, 30, 29, 41, 35, 74, 89, 53, 29, 65].repeat(2);
    expected.sort_unstable();
    let squares = look::panels(&shell).map(|p| shell.area_vector(p).length_squared());
    let mut found: Vec<i64> = squares.map(|s| s.round() as i64).collect();
    found.sort_unstable();
    assert_eq!(found, expected);
    let pairs = tally(look::panels(&shell).map(|p| {
        let mut zones = shell.panel_zones(p);
        zones.sort_unstable();
        zones
    }));
    assert_eq!(pairs.len(), 10);
    assert!(pairs.values().all(|count| *count == 2));
}

#[test]
fn three_coplanar_generators_make_hexagons() {
    // Fixture Z5c: 20, 34, 16 after merging, 14 parallelograms and 2 hexagons; volume 38 (docs/checks.md, derived).
    let g = vectors(&[[2, 0, 0], [0, 1, 0], [1, 1, 0], [0, 1, 2], [1, 0, 3]]);
    let shell = grown(&zonohedron(&g, VIEW));
    let faces = merged(&shell);
    assert_eq!(faces.counts, [20, 34, 16]);
    assert_eq!(faces.polygons, [(4, 14), (6, 2)].into());
    assert_near!(look::volume(&shell), 38.0, 38.0 * ROUNDING);
    assert_near!(look::area(&shell), 63.469_939_891_0, PRINTED);
    // As parallelograms it has the counts of general position.
    assert_eq!(counts(&shell), [22, 40, 20]);
}

#[test]
fn parallel_generators_add_up() {
    // Fixture "parallel pair": a box of 3 by 1 by 1 (docs/checks.md).
    let g = vectors(&[[1, 0, 0], [2, 0, 0], [0, 1, 0], [0, 0, 1]]);
    let shell = grown(&zonohedron(&g, VIEW));
    assert_eq!(merged(&shell).counts, [8, 12, 6]);
    assert_near!(look::volume(&shell), 3.0, 3.0 * ROUNDING);
    assert_near!(look::area(&shell), 14.0, 14.0 * ROUNDING);
}

/// Generators on a small lattice, any three of which are independent, and no two seen on one line.
fn general_position(count: std::ops::RangeInclusive<usize>) -> impl Strategy<Value = Vec<Vector>> {
    let part = || -9_i32..=9;
    prop::collection::vec([part(), part(), part()], count)
        .prop_map(|g| vectors(&g))
        .prop_filter("any three are independent", |g| {
            let n = g.len();
            (0..n).all(|i| {
                (i + 1..n).all(|j| {
                    let normal = g[i].cross(g[j]);
                    VIEW.dot(normal).abs() > 1e-3 && g[j + 1..].iter().all(|c| normal.dot(*c) != 0.0)
                })
            })
        })
}

/// The whole silhouette as a closed path: each generator is met going out and coming back.
fn closed_silhouette(generators: &[Vector]) -> Start {
    let half = half_silhouette(generators, VIEW);
    let n = half.len() as u32;
    let out = (0..).zip(&half).map(|(id, v)| (id, FreeVector::Own(*v)));
    let back = (0..n).map(|k| (n + k, FreeVector::Same(k, Sign::Minus)));
    let letters = out.chain(back).map(|(id, vector)| FreeLetter {
        id,
        vector,
        role: if id % 2 == 0 { Role::Zig } else { Role::Zag },
    });
    Start::Zigzag(FreePath {
        origin: Point::ORIGIN,
        closed: true,
        letters: letters.collect(),
    })
}

fn is_sum_of_some_determinants(volume: f64, g: &[Vector]) -> bool {
    let n = g.len();
    let mut sums = vec![0.0];
    for i in 0..n {
        for j in i + 1..n {
            for k in j + 1..n {
                let det = g[i].dot(g[j].cross(g[k])).abs();
                let more: Vec<f64> = sums.iter().map(|s| s + det).collect();
                sums.extend(more);
            }
        }
    }
    sums.iter().any(|s| (s - volume).abs() < 1e-9 * (1.0 + volume))
}

proptest! {
    #![proptest_config(ProptestConfig { failure_persistence: None, ..ProptestConfig::with_cases(48) })]

    #[test]
    fn any_generators_in_general_position(g in general_position(3..=8)) {
        let n = g.len();
        let shell = grown(&zonohedron(&g, VIEW));
        // Ball and Coxeter: n(n-1)+2, 2n(n-1), n(n-1).
        prop_assert_eq!(counts(&shell), [n * (n - 1) + 2, 2 * n * (n - 1), n * (n - 1)]);
        let (volume, area) = (closed_forms::volume(&g), closed_forms::area(&g));
        prop_assert!((look::volume(&shell) - volume).abs() < 1e-11 * volume);
        prop_assert!((look::area(&shell) - area).abs() < 1e-11 * area);
        let totals = measure::totals(&shell);
        prop_assert!((totals.area_mm2 - area).abs() < 1e-11 * area);
        prop_assert!((totals.size - closed_forms::size(&g)).length() < 1e-9);
        // Convex: no fold is a valley; and the folds round every zone are a full turn (docs/checks.md).
        prop_assert!(totals.dihedrals.is_some_and(|d| d.most < core::f64::consts::PI));
        for folds in look::folds_by_zone(&shell) {
            prop_assert!((folds - TAU).abs() < 1e-9, "{}", folds);
        }
        prop_assert!(!inspect::inspect(&shell, &Tolerances::default()).crosses_itself());
    }

    #[test]
    fn closing_both_fronts_of_a_silhouette(g in general_position(3..=5)) {
        // The surface that closes a rim need not lie on the hull, so the volume is only bounded by it; the panels are
        // those of the pairs whichever surface it is (docs/checks.md).
        let n = g.len();
        let acts = vec![(Side::Fore, Act::CloseRim), (Side::Aft, Act::CloseRim)];
        let (shell, findings) = grow(&two_sided(closed_silhouette(&g), acts));
        prop_assert_eq!(shell.panels.len(), n * (n - 1), "{:?}", findings);
        let area = closed_forms::area(&g);
        prop_assert!((look::area(&shell) - area).abs() < 1e-11 * area);
        prop_assert!(shell.is_closed());
        let seen = inspect::inspect(&shell, &Tolerances::default());
        // Where the second surface could not keep clear of the first, that is said, and only there.
        let said = findings.iter().any(|f| f.code == Code::RimClosedCrossing);
        prop_assert_eq!(seen.crosses_itself(), said, "{:?}", findings);
        prop_assume!(!said);
        prop_assert_eq!(counts(&shell), [n * (n - 1) + 2, 2 * n * (n - 1), n * (n - 1)]);
        let volume = look::volume(&shell).abs();
        // Between two surfaces of one word lie cells of single triples, each at most once.
        prop_assert!(volume <= closed_forms::volume(&g) * (1.0 + 1e-11));
        prop_assert!(is_sum_of_some_determinants(volume, &g), "{}", volume);
    }
}
