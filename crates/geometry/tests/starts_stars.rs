//! Stars, star paths and star solids against theory 3 and 4.

#![expect(clippy::unwrap_used, reason = "a test that cannot go on fails")]

use std::collections::BTreeMap;

use zonewright_geometry::start::{AxisClass, Star, StarLength, StarLetter, StarPath, StarSolid};
use zonewright_geometry::{Code, FirstWord, Place, Sign, Vector};

use AxisClass::{FiveFold, FourFold, ThreeFold, TwoFold};

/// Acute angles between axes, in millionths of a degree, and how many pairs have each.
fn angles(a: &[Vector], b: &[Vector]) -> BTreeMap<i64, usize> {
    let mut found = BTreeMap::new();
    for (i, x) in a.iter().enumerate() {
        for (j, y) in b.iter().enumerate() {
            if a != b || i < j {
                let angle = x.cross(*y).length().atan2(x.dot(*y).abs()).to_degrees();
                *found.entry((angle * 1e6).round() as i64).or_insert(0) += 1;
            }
        }
    }
    found
}

/// theory 4: the table of angles, which tells one icosahedron from a mixture of two.
#[test]
fn icosahedral_angles() {
    let of = |class| Star::Icosahedral(vec![class]).directions().unwrap();
    let (five, three, two) = (of(FiveFold), of(ThreeFold), of(TwoFold));
    assert_eq!((five.len(), three.len(), two.len()), (6, 10, 15));
    for (a, b, expected) in [
        (&five, &five, &[(63_434_949, 15)][..]),
        (&three, &three, &[(41_810_315, 15), (70_528_779, 30)]),
        (
            &two,
            &two,
            &[(36_000_000, 30), (60_000_000, 30), (72_000_000, 30), (90_000_000, 15)],
        ),
        (&five, &three, &[(37_377_368, 30), (79_187_683, 30)]),
        (&five, &two, &[(31_717_474, 30), (58_282_526, 30), (90_000_000, 30)]),
        (
            &three,
            &two,
            &[(20_905_157, 30), (54_735_610, 60), (69_094_843, 30), (90_000_000, 30)],
        ),
    ] {
        assert_eq!(angles(a, b), expected.iter().copied().collect());
    }
}

/// Angles of the cube's axes (elementary): atan sqrt 2 from a diagonal to an edge, 45 and 90 from an edge to a face's diagonal.
#[test]
fn cubic_and_prismatic_axes() {
    let of = |class| Star::Cubic(vec![class]).directions().unwrap();
    let (four, three, two) = (of(FourFold), of(ThreeFold), of(TwoFold));
    assert_eq!((four.len(), three.len(), two.len()), (3, 4, 6));
    assert_eq!(angles(&four, &three), [(54_735_610, 12)].into());
    assert_eq!(angles(&four, &two), [(45_000_000, 12), (90_000_000, 6)].into());
    assert_eq!(angles(&three, &three), [(70_528_779, 6)].into());
    let prism = Star::Prismatic(5).directions().unwrap();
    assert_eq!(prism.len(), 6);
    assert_eq!(angles(&prism[..5], &prism[5..]), [(90_000_000, 5)].into());
    assert_eq!(
        angles(&prism[..5], &prism[..5]),
        [(36_000_000, 5), (72_000_000, 5)].into()
    );
}

#[test]
fn stars_that_are_refused() {
    for star in [
        Star::Icosahedral(vec![]),
        Star::Icosahedral(vec![FourFold]),
        Star::Cubic(vec![FiveFold]),
        Star::Cubic(vec![TwoFold, TwoFold]),
        Star::Prismatic(0),
        Star::Prismatic(u32::MAX),
    ] {
        let finding = star.directions().unwrap_err();
        assert_eq!(
            (finding.code, finding.place),
            (Code::ParameterLimit, Place::Parameter("star")),
            "{star:?}"
        );
    }
}

fn stars() -> Vec<Star> {
    let mut stars: Vec<_> = [
        vec![FiveFold],
        vec![ThreeFold],
        vec![TwoFold],
        vec![FiveFold, ThreeFold],
        vec![FiveFold, ThreeFold, TwoFold],
    ]
    .map(Star::Icosahedral)
    .to_vec();
    stars.extend([vec![FourFold], vec![FourFold, ThreeFold, TwoFold]].map(Star::Cubic));
    stars.extend([2, 3, 7, 24].map(Star::Prismatic));
    stars
}

fn word_of(star: Star) -> FirstWord {
    StarSolid { star, edge_mm: 100.0 }.first_word().unwrap()
}

/// All pairs in the order of the word's first half turn the same way seen from some direction near the vertical: then
/// the word is a silhouette. Its middle is half the sum of all generators (theory 1).
#[test]
fn star_solids_begin_on_a_convex_silhouette() {
    for star in stars() {
        let axes = star.directions().unwrap();
        let word = word_of(star.clone());
        let n = axes.len();
        assert!(word.on_hull && word.closed && word.letters.len() == 2 * n, "{star:?}");
        let vectors: Vec<_> = word.letters.iter().map(|l| word.vector(l)).collect();
        for k in 0..n {
            assert_eq!(vectors[k], -vectors[k + n], "{star:?}");
        }
        let nodes = word.nodes();
        for k in 0..n {
            let middle = (nodes[k].0 + nodes[k + n].0) / 2.0;
            assert!(middle.length() < 1e-6, "{star:?}: the solid is centred");
        }
        // Some direction sees every pair counter-clockwise: their normals' directions share a half space. It is
        // looked for by the perceptron rule, which ends when there is one.
        let normals: Vec<_> = (0..n)
            .flat_map(|k| (k + 1..n).map(move |later| (k, later)))
            .map(|(k, later)| vectors[k].cross(vectors[later]))
            .map(|normal| normal / normal.length())
            .collect();
        let mut toward = Vector::Z;
        for _ in 0..100_000 {
            match normals.iter().find(|normal| normal.dot(toward) <= 0.0) {
                Some(normal) => toward += *normal,
                None => break,
            }
        }
        assert!(normals.iter().all(|normal| normal.dot(toward) > 0.0), "{star:?}");
        assert!(toward.z > 0.0, "{star:?}: fore looks up");
    }
}

#[test]
fn the_largest_prisms_are_told_apart() {
    for level in [1999, 2000] {
        let word = word_of(Star::Prismatic(level));
        let mut axes: Vec<_> = word.letters.iter().take(level as usize + 1).map(|l| l.zone).collect();
        axes.sort_unstable();
        assert!(
            axes.into_iter().eq(0..=level),
            "each axis comes once before any comes back"
        );
    }
}

/// theory 4: golden multiples keep a path in whole numbers of 1 and phi; phi^2 = phi + 1 closes a triangle's worth of steps.
#[test]
fn golden_steps_add_up() {
    let step = |sign, length| StarLetter { axis: 3, sign, length };
    let path = StarPath {
        star: Star::Icosahedral(vec![FiveFold]),
        unit_mm: 70.0,
        closed: true,
        letters: vec![
            step(Sign::Plus, StarLength::Golden(2)),
            step(Sign::Minus, StarLength::Golden(1)),
            step(Sign::Minus, StarLength::Golden(0)),
        ],
    };
    let word = path.first_word().unwrap();
    assert!(word.nodes()[3].0.length() < 1e-9);
    assert_eq!(word.zones.len(), 3);
    assert!(
        word.letters.iter().all(|l| l.sign == Sign::Plus),
        "each zone runs as its first letter"
    );
    let refused = |change: fn(&mut StarPath)| {
        let mut path = path.clone();
        change(&mut path);
        let finding = path.first_word().unwrap_err();
        (finding.code, finding.place)
    };
    assert_eq!(
        refused(|p| p.letters.clear()),
        (Code::EmptyWord, Place::Parameter("letters"))
    );
    assert_eq!(
        refused(|p| p.letters[0].axis = 6),
        (Code::ParameterLimit, Place::Parameter("axis"))
    );
    let golden = |p: &mut StarPath| p.letters[0].length = StarLength::Golden(i32::MAX);
    assert_eq!(refused(golden), (Code::ParameterLimit, Place::Parameter("golden")));
    let nan = |p: &mut StarPath| p.letters[0].length = StarLength::Mm(f64::NAN);
    assert_eq!(refused(nan), (Code::NotFinite, Place::Parameter("length")));
    assert_eq!(
        refused(|p| p.unit_mm = 0.0),
        (Code::ParameterLimit, Place::Parameter("unit_mm"))
    );
}
