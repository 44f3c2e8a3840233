//! Free paths: links, closing gaps, and edits, each followed by a check of what must hold.

#![expect(clippy::unwrap_used, reason = "a test that cannot go on fails")]

use proptest::prelude::*;
use zonewright_geometry::start::{DragRule, FreeLetter, FreePath, FreeVector, PathEnd, PolarBy, PolarForm};
use zonewright_geometry::{Angle, Code, Point, Role, Sign, Start, Vector};

fn near(a: Point, b: Point) -> bool {
    a.distance(b) < 1e-5
}

fn points(count: usize) -> Vec<Point> {
    // A climbing zigzag without two equal edges.
    let at = |k: usize| {
        let x = k as f64;
        Point::new(100.0 * x, 30.0 * (x * 1.7).sin(), 80.0 * (x * 2.3).cos())
    };
    (0..count).map(at).collect()
}

fn same(id: u32, to: u32, sign: Sign) -> FreeLetter {
    let role = if id.is_multiple_of(2) { Role::Zig } else { Role::Zag };
    FreeLetter {
        id,
        vector: FreeVector::Same(to, sign),
        role,
    }
}

fn polar() -> FreePath {
    let by = PolarBy::PitchEdge {
        pitch: Angle::from_degrees(40.0),
        edge_mm: 300.0,
    };
    Start::Polar(PolarForm { ribs: 7, by }).to_free().unwrap()
}

#[test]
fn polar_letters_share_their_ribs() {
    let path = polar();
    // Letter 2 i runs rib i back; the first letter along rib i + 1 is 2 i + 1.
    assert_eq!(path.letters[2].vector, FreeVector::Same(1, Sign::Minus));
    assert_eq!(path.letters[0].vector, FreeVector::Same(13, Sign::Minus));
    assert!(matches!(path.letters[1].vector, FreeVector::Own(_)));
    assert_eq!(path.first_word().unwrap().zones.len(), 7);
}

#[test]
fn a_tip_of_a_polar_path_moves_with_its_rib_still_shared() {
    let mut path = polar();
    let before = path.points().unwrap();
    for tip in [2, 14] {
        let to = before[tip] + Vector::new(5.0, -3.0, 11.0);
        path.set_point(tip, to, DragRule::Neighbours).unwrap();
        path.check().unwrap();
        let after = path.points().unwrap();
        let moved: Vec<_> = (0..14).filter(|&k| !near(before[k], after[k])).collect();
        assert!(moved.contains(&(tip % 14)) && near(after[tip], to));
    }
    assert_eq!(path.first_word().unwrap().zones.len(), 7, "no rib was split");
    assert!(path.closing_gap().unwrap().length() < 1e-9);
    assert!(near(path.points().unwrap()[1], before[1]), "the pole stays");
}

#[test]
fn a_linked_letter_leaves_its_zone_rather_than_open_the_path() {
    let mut path = polar();
    let before = path.points().unwrap();
    path.set_point(1, before[1] + Vector::Z * 9.0, DragRule::Neighbours)
        .unwrap();
    path.check().unwrap();
    let after = path.points().unwrap();
    for k in 0..=14 {
        assert_eq!(near(after[k], before[k]), k != 1, "point {k}");
    }
    assert_eq!(
        path.first_word().unwrap().zones.len(),
        9,
        "both letters at the point have zones of their own"
    );
}

#[test]
fn letters_linked_to_a_changed_one_follow() {
    let mut path = FreePath::from_points(&points(3), false).unwrap();
    path.letters.push(same(2, 0, Sign::Plus));
    path.letters.push(same(3, 2, Sign::Minus));
    let vectors = path.vectors().unwrap();
    assert_eq!(
        (vectors[2], vectors[3]),
        (vectors[0], -vectors[0]),
        "chains are followed with their signs"
    );
    let to = path.points().unwrap()[1] + Vector::X;
    path.set_point(1, to, DragRule::Neighbours).unwrap();
    path.check().unwrap();
    let after = path.vectors().unwrap();
    assert_eq!((after[2], after[3]), (after[0], -after[0]));
    assert!((after[0] - vectors[0]).distance(Vector::X) < 1e-9);
    // A letter in the middle of the chain leaves; the last stays with the first.
    let to = path.points().unwrap()[3] + Vector::Y;
    path.set_point(3, to, DragRule::Tail).unwrap();
    let last = path.vectors().unwrap();
    assert_eq!(last[3], -last[0]);
    assert_ne!(last[2], last[0]);
}

#[test]
fn bad_paths_are_refused() {
    let refused = |change: fn(&mut FreePath)| {
        let mut path = FreePath::from_points(&points(4), false).unwrap();
        change(&mut path);
        path.first_word().unwrap_err().code
    };
    assert_eq!(refused(|p| p.letters.clear()), Code::EmptyWord);
    assert_eq!(refused(|p| p.letters[1].id = 0), Code::BrokenLink);
    assert_eq!(refused(|p| p.letters[1] = same(1, 1, Sign::Plus)), Code::BrokenLink);
    assert_eq!(refused(|p| p.letters[1] = same(1, 9, Sign::Plus)), Code::BrokenLink);
    let circle = |p: &mut FreePath| {
        p.letters[0] = same(0, 2, Sign::Minus);
        p.letters[2] = same(2, 0, Sign::Plus);
    };
    assert_eq!(refused(circle), Code::BrokenLink);
    assert_eq!(refused(|p| p.origin.0.y = f64::NAN), Code::NotFinite);
    assert_eq!(
        refused(|p| p.letters[0].vector = FreeVector::Own(Vector::X * f64::INFINITY)),
        Code::NotFinite
    );
    assert_eq!(
        refused(|p| p.letters[0].vector = FreeVector::Own(Vector::ZERO)),
        Code::ZeroVector
    );
    assert_eq!(
        refused(|p| p.letters[0].vector = FreeVector::Own(Vector::X * 1e300)),
        Code::ParameterLimit
    );
    let many = |p: &mut FreePath| p.letters = (0..30_000).map(|id| same(id, id, Sign::Plus)).collect();
    assert_eq!(refused(many), Code::ParameterLimit);
    let twice = [Point::ORIGIN, Point::new(1.0, 0.0, 0.0), Point::new(1.0, 0.0, 0.0)];
    assert_eq!(FreePath::from_points(&twice, false).unwrap_err().code, Code::ZeroVector);
    assert_eq!(FreePath::from_points(&[], false).unwrap_err().code, Code::EmptyWord);
    assert_eq!(
        FreePath::from_points(&twice[..1], true).unwrap_err().code,
        Code::EmptyWord
    );
}

#[test]
fn a_long_chain_of_links_is_followed_once() {
    let mut path = FreePath::from_points(&points(2), false).unwrap();
    path.letters
        .splice(0..0, (1..20_000).rev().map(|id| same(id, id - 1, Sign::Minus)));
    let vectors = path.vectors().unwrap();
    assert_eq!(vectors[0], -vectors[19_999]);
}

#[test]
fn closing_and_opening() {
    let mut path = FreePath::from_points(&points(5), false).unwrap();
    path.set_closed(true, 0.001).unwrap();
    assert_eq!(path.letters.len(), 5);
    assert!(path.closing_gap().unwrap().length() < 1e-9);
    path.set_closed(false, 0.001).unwrap();
    path.set_closed(true, 0.001).unwrap();
    assert_eq!(path.letters.len(), 5, "a path that comes back needs no letter more");
    let closed = FreePath::from_points(&points(5), true).unwrap();
    for (a, b) in closed.points().unwrap().iter().zip(path.points().unwrap()) {
        assert!(near(*a, b));
    }
    let mut repeated = points(5);
    repeated.push(repeated[0]);
    assert_eq!(FreePath::from_points(&repeated, true).unwrap(), closed);
}

#[test]
fn roles_after_inserting() {
    let roles = |path: &FreePath| path.letters.iter().map(|l| l.role).collect::<Vec<_>>();
    let mut path = FreePath::from_points(&points(4), false).unwrap();
    path.insert_point(1, None).unwrap();
    assert_eq!(roles(&path), [Role::Zig, Role::Zag, Role::Zig, Role::Zag]);
    assert_eq!(path.letters.iter().map(|l| l.id).collect::<Vec<_>>(), [0, 1, 3, 2]);
    path.set_role(1, Role::Zig).unwrap();
    path.insert_point(0, None).unwrap();
    assert_eq!(roles(&path), [Role::Zig, Role::Zig, Role::Zig, Role::Zig, Role::Zag]);
    path.split_letter(4, 3).unwrap();
    assert_eq!(roles(&path)[4..], [Role::Zag; 3]);
    let vectors = path.vectors().unwrap();
    assert_eq!([vectors[5], vectors[6]], [vectors[4]; 2]);
    assert_eq!(path.first_word().unwrap().zones.len(), 5, "the parts are one zone");
}

fn any_point() -> impl Strategy<Value = Point> {
    prop::array::uniform3(-1000.0..1000.0_f64).prop_map(|[x, y, z]| Point::new(x, y, z))
}

/// A path with some letters linked to earlier ones, open or closed, as a drawing hand leaves them.
fn any_path() -> impl Strategy<Value = FreePath> {
    let links = prop::collection::vec((0..3_u8, 0..20_u32, any::<bool>()), 14);
    (prop::collection::vec(any_point(), 4..14), any::<bool>(), links).prop_filter_map(
        "edges too short",
        |(p, closed, links)| {
            let mut path = FreePath::from_points(&p, closed).ok()?;
            for (letter, (linked, to, minus)) in path.letters.iter_mut().zip(links) {
                if linked == 0 && letter.id > 0 {
                    let sign = if minus { Sign::Minus } else { Sign::Plus };
                    letter.vector = FreeVector::Same(to % letter.id, sign);
                }
            }
            path.check().ok()?;
            Some(path)
        },
    )
}

fn gap(path: &FreePath) -> Vector {
    path.closing_gap().unwrap()
}

/// Vectors of the zones, in the order of their letters.
fn zones(path: &FreePath) -> Vec<Vector> {
    path.first_word().unwrap().zones.iter().map(|z| z.vector).collect()
}

proptest! {
    // A failure is printed; the case that it shrinks to becomes a test of its own.
    #![proptest_config(ProptestConfig { failure_persistence: None, ..ProptestConfig::default() })]

    #[test]
    fn from_word_is_the_same_path(path in any_path()) {
        let word = path.first_word().unwrap();
        let again = FreePath::from_word(&word);
        prop_assert_eq!(again.points().unwrap(), path.points().unwrap());
        prop_assert_eq!(again.first_word().unwrap().zones.len(), word.zones.len());
        for (a, b) in again.letters.iter().zip(&path.letters) {
            prop_assert_eq!((a.id, a.role), (b.id, b.role));
        }
    }

    #[test]
    fn a_dragged_point_lands_and_a_closed_path_keeps_its_gap(
        path in any_path(), at in 0..20_usize, to in prop::array::uniform3(-1000.0..1000.0_f64), tail in any::<bool>(),
    ) {
        let to = Point::new(to[0], to[1], to[2]);
        let at = at % (path.letters.len() + 1);
        let rule = if tail { DragRule::Tail } else { DragRule::Neighbours };
        let mut after = path.clone();
        if after.set_point(at, to, rule).is_err() {
            prop_assert_eq!(after, path);
            return Ok(());
        }
        after.check().unwrap();
        if path.closed && at == path.letters.len() {
            prop_assert!(near(after.points().unwrap()[0], to));
        } else {
            prop_assert!(near(after.points().unwrap()[at], to));
        }
        if path.closed {
            prop_assert!(gap(&after).distance(gap(&path)) < 1e-5);
        }
    }

    #[test]
    fn without_links_only_what_the_rule_names_moves(
        before in prop::collection::vec(any_point(), 4..14), closed in any::<bool>(),
        at in 0..20_usize, by in prop::array::uniform3(1.0..50.0_f64), tail in any::<bool>(),
    ) {
        let Ok(mut path) = FreePath::from_points(&before, closed) else { return Ok(()) };
        let last = before.len() - 1;
        let (at, by) = (at % (last + 1), Vector::from_array(by));
        let rule = if tail { DragRule::Tail } else { DragRule::Neighbours };
        if path.set_point(at, before[at] + by, rule).is_err() {
            return Ok(());
        }
        path.check().unwrap();
        let after = path.points().unwrap();
        for k in 0..=last {
            let moves = if tail { k >= at } else { k == at };
            let expected = if moves { before[k] + by } else { before[k] };
            prop_assert!(near(after[k], expected), "point {}", k);
        }
    }

    #[test]
    fn inserting_and_deleting_give_the_path_back(path in any_path(), at in 0..20_usize, off in 1.0..50.0_f64) {
        let letter = at % path.letters.len();
        let before = path.points().unwrap();
        let mut edited = path.clone();
        let new = before[letter] + (before[letter + 1] - before[letter]) / 3.0 + Vector::Z * off;
        edited.insert_point(letter, Some(new)).unwrap();
        edited.check().unwrap();
        let between = edited.points().unwrap();
        prop_assert!(near(between[letter + 1], new));
        prop_assert_eq!(between.len(), before.len() + 1);
        prop_assert_eq!(edited.letters[letter].id, path.letters[letter].id);
        prop_assert_eq!(edited.letters[letter + 1].id, path.next_id());
        edited.delete_point(letter + 1).unwrap();
        edited.check().unwrap();
        for (a, b) in edited.points().unwrap().iter().zip(&before) {
            prop_assert!(near(*a, *b));
        }
        prop_assert_eq!(edited.alternates(), path.alternates());
        let ids = |p: &FreePath| p.letters.iter().map(|l| (l.id, l.role)).collect::<Vec<_>>();
        prop_assert_eq!(ids(&edited), ids(&path));
    }

    #[test]
    fn deleting_a_point_leaves_the_others(path in any_path(), at in 0..20_usize) {
        let count = path.letters.len();
        let at = at % (count + 1);
        let mut expected = path.points().unwrap();
        let mut edited = path.clone();
        if edited.delete_point(at).is_err() {
            prop_assert_eq!(edited, path);
            return Ok(());
        }
        edited.check().unwrap();
        if path.closed && (at == 0 || at == count) {
            // The second point is the first now; the last letter leads there, by as much as it missed before.
            let missed = gap(&path);
            expected.remove(0);
            expected[count - 1] = expected[0] + missed;
        } else {
            expected.remove(at);
        }
        let found = edited.points().unwrap();
        prop_assert_eq!(found.len(), expected.len());
        for (a, b) in found.iter().zip(&expected) {
            prop_assert!(near(*a, *b));
        }
    }

    #[test]
    fn points_added_at_the_ends(path in any_path(), to in prop::array::uniform3(2000.0..3000.0_f64)) {
        let to = Point::new(to[0], to[1], to[2]);
        let before = path.points().unwrap();
        for end in [PathEnd::First, PathEnd::Last] {
            let mut edited = path.clone();
            edited.add_point(end, to).unwrap();
            edited.check().unwrap();
            let mut expected = before.clone();
            match end {
                _ if path.closed => expected.insert(before.len() - 1, to),
                PathEnd::First => expected.insert(0, to),
                PathEnd::Last => expected.push(to),
            }
            for (a, b) in edited.points().unwrap().iter().zip(&expected) {
                prop_assert!(near(*a, *b));
            }
        }
    }

    #[test]
    fn sharing_the_gap_is_the_least_change(path in any_path(), spread in prop::array::uniform3(-1.0..1.0_f64), pick in (0..20_usize, 0..20_usize)) {
        let mut path = path;
        path.closed = true;
        let before = zones(&path);
        let mut shared = path.clone();
        if shared.share_gap().is_err() {
            prop_assert_eq!(shared, path);
            return Ok(());
        }
        shared.check().unwrap();
        prop_assert!(gap(&shared).length() < 1e-6);
        let after = zones(&shared);
        let size = |zones: &[Vector]| zones.iter().zip(&before).map(|(a, b)| (*a - *b).length_squared()).sum::<f64>();
        // Any other way to close is longer: change two zones so that their counts cancel.
        let word = path.first_word().unwrap();
        let count = |zone: usize| word.letters.iter().filter(|l| l.zone as usize == zone).map(|l| l.sign.factor()).sum::<f64>();
        let (i, j) = (pick.0 % after.len(), pick.1 % after.len());
        if i == j {
            return Ok(());
        }
        let mut other = after.clone();
        other[i] += Vector::from_array(spread) * count(j);
        other[j] -= Vector::from_array(spread) * count(i);
        let total: Vector = word.letters.iter().map(|l| other[l.zone as usize] * l.sign.factor()).sum();
        prop_assert!(total.length() < 1e-6, "the other way closes too");
        prop_assert!(size(&other) >= size(&after) - 1e-6);
    }

    #[test]
    fn a_dragged_edge_takes_its_zone_and_the_others_close(path in any_path(), at in 0..20_usize, to in prop::array::uniform3(-500.0..500.0_f64)) {
        let at = at % path.letters.len();
        let to = Vector::from_array(to);
        let mut dragged = path.clone();
        if dragged.drag_edge(at, to).is_err() {
            prop_assert_eq!(dragged, path);
            return Ok(());
        }
        dragged.check().unwrap();
        prop_assert!(dragged.vectors().unwrap()[at].distance(to) < 1e-9);
        prop_assert_eq!(zones(&dragged).len(), zones(&path).len());
        if path.closed {
            prop_assert!(gap(&dragged).length() < 1e-6);
        } else {
            let changed = zones(&dragged).iter().zip(&zones(&path)).filter(|(a, b)| a != b).count();
            prop_assert!(changed <= 1);
        }
    }
}
