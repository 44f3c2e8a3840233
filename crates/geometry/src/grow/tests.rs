//! Whole shapes grown from words that the tests spell out themselves, so that no start's own code is trusted here.

use core::f64::consts::TAU;

use super::{Growing, alphabet::Alphabet, front::Front, grow, lay::Change, mesh::Mesh};
use crate::{
    Act, Code, Courses, Direction, Outside, Placement, Point, Role, RoleRule, Shape, Shell, Side, Sign, Spurs, Start,
    Step, StepId, Tolerances, Vector, Vs, ZoneRef,
    start::{FreeLetter, FreePath, FreeVector},
};

mod part;
mod properties;

fn shape(path: FreePath, acts: Vec<Act>) -> Shape {
    let step = |(id, act): (u32, Act)| Step {
        id: StepId(id),
        name: None,
        on: true,
        side: Side::Fore,
        act,
    };
    Shape {
        start: Start::Zigzag(path),
        zones: Vec::new(),
        steps: (1..).zip(acts).map(step).collect(),
        finish: Vec::new(),
        placement: Placement::default(),
        outside: Outside::Grown,
        tolerances: Tolerances::default(),
    }
}

fn lay(count: u32, spurs: Spurs) -> Act {
    Act::Lay {
        courses: Courses::Count(count),
        spurs,
    }
}

fn until_still(spurs: Spurs) -> Act {
    Act::Lay {
        courses: Courses::UntilStill,
        spurs,
    }
}

/// Ribs down from a pole: `-g_i` zig, `g_{i+1}` zag, closed.
fn ribs_round_a_pole(ribs: &[Vector]) -> FreePath {
    let n = ribs.len() as u32;
    let mut letters = Vec::new();
    for i in 0..n {
        // Zag i + 1 is letter 2i + 1 and owns rib i + 1; the zig of the same rib comes two letters later.
        let of = |rib: u32| 2 * ((rib + n - 1) % n) + 1;
        let zig = FreeVector::Same(of(i), Sign::Minus);
        let zag = FreeVector::Own(ribs[((i + 1) % n) as usize]);
        letters.push(FreeLetter {
            id: 2 * i,
            vector: zig,
            role: Role::Zig,
        });
        letters.push(FreeLetter {
            id: 2 * i + 1,
            vector: zag,
            role: Role::Zag,
        });
    }
    FreePath {
        origin: Point(ribs[0]),
        closed: true,
        letters,
    }
}

fn polar_ribs(n: u32, pitch_deg: f64, edge: f64) -> Vec<Vector> {
    let (sin, cos) = pitch_deg.to_radians().sin_cos();
    let azimuth = |i: u32| f64::from(i) * TAU / f64::from(n);
    (0..n)
        .map(|i| edge * Vector::new(cos * azimuth(i).cos(), cos * azimuth(i).sin(), -sin))
        .collect()
}

fn open_word(vectors: &[(Vector, Role)]) -> FreePath {
    let letter = |(id, (v, role)): (u32, &(Vector, Role))| FreeLetter {
        id,
        vector: FreeVector::Own(*v),
        role: *role,
    };
    FreePath {
        origin: Point::ORIGIN,
        closed: false,
        letters: (0..).zip(vectors).map(letter).collect(),
    }
}

/// Volume by the divergence theorem, independent of the measures.
fn volume(shell: &Shell) -> f64 {
    let panels = 0..shell.panels.len() as u32;
    let part = |p: u32| {
        let [a, b, c, d] = shell.corner_points(p).map(|p| p.0);
        (a.dot(b.cross(c)) + a.dot(c.cross(d))) / 6.0
    };
    panels.map(part).sum()
}

fn counts(shell: &Shell) -> [usize; 3] {
    [shell.points.len(), shell.edges.len(), shell.panels.len()]
}

fn grown(shape: &Shape) -> Shell {
    let (shell, findings) = grow(shape);
    assert!(findings.iter().all(|f| f.level() != crate::Level::Stop), "{findings:?}");
    assert_eq!(shell.check(0.001), Ok(()));
    shell
}

/// Sum over triples of |det|: McMullen, Shephard; theory of zonotopes.
fn volume_by_determinants(ribs: &[Vector]) -> f64 {
    let n = ribs.len();
    let mut sum = 0.0;
    for i in 0..n {
        for j in i + 1..n {
            for k in j + 1..n {
                sum += ribs[i].dot(ribs[j].cross(ribs[k])).abs();
            }
        }
    }
    sum
}

#[test]
fn a_polar_form_closes_at_its_pole_without_tolerance() {
    for (n, policy) in [
        (3, Spurs::Retract),
        (5, Spurs::Retract),
        (9, Spurs::Retract),
        (12, Spurs::Hold),
    ] {
        let ribs = polar_ribs(n, 38.0, 300.0);
        let shell = grown(&shape(ribs_round_a_pole(&ribs), vec![until_still(policy)]));
        let n = n as usize;
        // Ball and Coxeter: n(n-1)+2, 2n(n-1), n(n-1).
        assert_eq!(counts(&shell), [n * (n - 1) + 2, 2 * n * (n - 1), n * (n - 1)]);
        assert!(shell.is_closed());
        let expected = volume_by_determinants(&ribs);
        assert!((volume(&shell).abs() - expected).abs() < 1e-9 * expected);
        assert_eq!(shell.courses.len(), n - 1);
    }
}

#[test]
fn an_open_polar_dome_has_one_rim() {
    // Levels 1..m of n ribs: V = 1 + n(m+1), E = n(2m+1), F = nm, rim of 2n edges (derived, theory section 2).
    let (n, m) = (9, 3);
    let shell = grown(&shape(
        ribs_round_a_pole(&polar_ribs(9, 38.0, 300.0)),
        vec![lay(3, Spurs::Retract)],
    ));
    assert_eq!(counts(&shell), [1 + n * (m + 1), n * (2 * m + 1), n * m]);
    assert_eq!(shell.rims.len(), 1);
    assert_eq!(shell.rims[0].edges.len(), 2 * n);
}

#[test]
fn crossing_the_pole_goes_on_as_the_infinite_surface() {
    // n - 1 levels to the pole, one pass through it, then the next crown: twice the closed form, joined by a touch at the pole.
    let n = 5_u32;
    let shell = grown(&shape(
        ribs_round_a_pole(&polar_ribs(n, 40.0, 1.0)),
        vec![lay(2 * n - 1, Spurs::Cross)],
    ));
    assert_eq!(shell.panels.len() as u32, 2 * n * (n - 1));
    assert_eq!(shell.courses.len() as u32, 2 * (n - 1));
    assert_eq!(shell.pinches.len(), 1);
    let heights: Vec<f64> = shell.points.iter().map(|p| p.0.z).collect();
    let lowest = heights.iter().copied().fold(f64::INFINITY, f64::min);
    let expected = -2.0 * f64::from(n) * 40_f64.to_radians().sin();
    assert!((lowest - expected).abs() < 1e-9);
}

#[test]
fn five_ribs_with_the_axis_spliced_in_are_the_rhombic_triacontahedron() {
    // 5-fold axes: pitch atan(1/2) from the horizontal for the five round the sixth (derived from the icosahedron's coordinates).
    let ribs = polar_ribs(5, 0.5_f64.atan().to_degrees(), 1.0);
    let axis = Direction::Own(Vector::new(0.0, 0.0, -1.0));
    let splice = Act::Splice {
        at: Vs::All,
        directions: vec![axis],
    };
    let acts = vec![lay(2, Spurs::Retract), splice, until_still(Spurs::Retract)];
    let shell = grown(&shape(ribs_round_a_pole(&ribs), acts));
    assert_eq!(counts(&shell), [32, 60, 30]);
    // 4 sqrt(5 + 2 sqrt 5): published volume at edge 1.
    let expected = 4.0 * (5.0 + 2.0 * 5_f64.sqrt()).sqrt();
    assert!((volume(&shell).abs() - expected).abs() < 1e-9, "{}", volume(&shell));
}

/// n ribs, k courses, then at one open V copies of all ribs between its two, until still, nothing retracted.
fn crowned(n: u32, k: u32, close: bool) -> Shell {
    let path = ribs_round_a_pole(&polar_ribs(n, 38.0, 300.0));
    let (shell, _) = grow(&shape(path.clone(), vec![lay(k, Spurs::Hold)]));
    let v = &super::open_vs(&shell, Side::Fore)[2];
    let front = &shell.fronts[0];
    let zig = shell.letter_name(front.letters[v.position].letter);
    let zag = shell.letter_name(front.letters[v.position + 1].letter);
    let at = Vs::Picked(vec![crate::VName { zig, zag }]);
    let splice = Act::Splice {
        at,
        directions: vec![Direction::Between],
    };
    let mut acts = vec![lay(k, Spurs::Hold), splice, until_still(Spurs::Hold)];
    if close {
        acts.push(Act::CloseRim);
    }
    grown(&shape(path, acts))
}

#[test]
fn a_crown_started_at_one_v_has_the_counts_of_the_worked_cases() {
    let shell = crowned(9, 3, false);
    assert_eq!(counts(&shell), [115, 225, 111]);
    assert_eq!(shell.rims.iter().map(|r| r.edges.len()).collect::<Vec<_>>(), [6]);
    let shell = crowned(12, 4, false);
    assert_eq!(counts(&shell), [207, 408, 202]);
    assert_eq!(shell.rims.iter().map(|r| r.edges.len()).collect::<Vec<_>>(), [8]);
}

#[test]
fn a_balanced_rim_is_closed_with_the_fewest_panels() {
    let shell = crowned(9, 3, true);
    assert_eq!(shell.panels.len(), 111 + 3);
    assert!(shell.is_closed());
    let shell = crowned(12, 4, true);
    // Eight edges in four zones, each pair of which crosses once: 4 * 3 / 2.
    assert_eq!(shell.panels.len(), 202 + 6);
    assert!(shell.is_closed());
}

#[test]
fn reversing_a_word_takes_one_fill_a_pair() {
    // Zigs a1..am, zags b1..bn: a translation surface of m n panels, (m+1)(n+1) vertices.
    let (m, n) = (4_u32, 3_u32);
    let along = |k: u32| Vector::new(1.0, 0.0, 0.3 * f64::from(k));
    let across = |k: u32| Vector::new(0.2, 1.0, -0.2 * f64::from(k));
    let zigs = (0..m).map(|k| (along(k), Role::Zig));
    let word: Vec<_> = zigs.chain((0..n).map(|k| (across(k), Role::Zag))).collect();
    let shell = grown(&shape(open_word(&word), vec![until_still(Spurs::Retract)]));
    assert_eq!(shell.panels.len() as u32, m * n);
    assert_eq!(shell.points.len() as u32, (m + 1) * (n + 1));
    assert_eq!(shell.courses.len() as u32, m + n - 1);
    let area: f64 = (0..m * n).map(|p| shell.area_vector(p).length()).sum();
    let expected: f64 = (0..m)
        .flat_map(|i| (0..n).map(move |j| along(i).cross(across(j)).length()))
        .sum();
    assert!(
        (area - expected).abs() < 1e-12 * expected,
        "every fill of a word has the area of its pairs"
    );
}

/// Helical solids as the record spells them.
fn helical(n: u32, r: u32) -> Shape {
    let (sin, cos) = 35_f64.to_radians().sin_cos();
    let azimuth = |i: u32| f64::from(i) * TAU / f64::from(n);
    let rib = |i: u32| Vector::new(cos * azimuth(i).cos(), cos * azimuth(i).sin(), sin);
    let role = |i: u32| if i < r { Role::Zig } else { Role::Zag };
    let word: Vec<_> = (0..n).map(|i| (rib(i), role(i))).collect();
    let gcd = (1..=r)
        .rev()
        .find(|d| n.is_multiple_of(*d) && r.is_multiple_of(*d))
        .unwrap_or(1);
    let mut acts = vec![until_still(Spurs::Retract)];
    for _ in 1..n / gcd {
        acts.push(Act::SetRoles(RoleRule::FirstAreZig(r)));
        acts.push(until_still(Spurs::Retract));
    }
    shape(open_word(&word), acts)
}

#[test]
fn helical_solids_come_back_to_their_first_front() {
    // Edge-joined counts of docs/checks.md, worked cases; (3,1) is the cube, (4,1) the rhombic dodecahedron.
    let known = [
        (3, 1, [8, 12, 6]),
        (4, 1, [14, 24, 12]),
        (5, 2, [32, 60, 30]),
        (6, 2, [26, 48, 24]),
    ];
    let known = known.into_iter().chain([(7, 2, [72, 140, 70]), (7, 3, [86, 168, 84])]);
    for (n, r, expected) in known {
        let shell = grown(&helical(n, r));
        assert_eq!(counts(&shell), expected, "({n},{r})");
        assert!(shell.is_closed());
    }
}

#[test]
fn parallel_letters_butt_and_the_longer_sides_are_split() {
    // Below the line stand panels 3 and 5 long, above it panels 5 and 3 long: places 0, 3, 5, 8 along it.
    let (a, b) = (Vector::new(3.0, 0.0, 0.0), Vector::new(5.0, 0.0, 0.0));
    let (x, y) = (Vector::new(0.0, 1.0, 0.0), Vector::new(1.0, -1.0, 0.0));
    let word = [(a, Role::Zig), (x, Role::Zag), (y, Role::Zig), (b, Role::Zag)];
    let up = Direction::Own(Vector::new(0.0, 0.0, 2.0));
    let acts = vec![
        // a x y b -> x a b y -> x b a y: two panels, then the slide.
        lay(2, Spurs::Hold),
        Act::SetRoles(RoleRule::Alternate),
        Act::Splice {
            at: Vs::All,
            directions: vec![up],
        },
        lay(1, Spurs::Hold),
    ];
    let shell = grown(&shape(open_word(&word), acts));
    assert_eq!(shell.panels.len(), 6);
    assert_eq!(shell.seams.len(), 1);
    let along: Vec<f64> = shell.seams[0]
        .vertices
        .iter()
        .map(|v| shell.points[*v as usize].0.x)
        .collect();
    assert_eq!(along, [0.0, 3.0, 5.0, 8.0]);
    let split: Vec<(u32, Vec<f64>)> = shell
        .tees
        .iter()
        .map(|t| {
            (
                t.panel,
                t.vertices.iter().map(|v| shell.points[*v as usize].0.x).collect(),
            )
        })
        .collect();
    // The panel below on b is the second one laid, the one above on b the fourth.
    assert_eq!(split, [(1, vec![5.0]), (3, vec![3.0])]);
    assert!(shell.edges.iter().filter(|e| e.rim_panel().is_none()).count() >= 3);
}

#[test]
fn equal_letters_only_change_places() {
    let a = Vector::new(1.0, 0.0, 0.0);
    let up = Vector::new(0.0, 0.0, 1.0);
    let path = FreePath {
        origin: Point::ORIGIN,
        closed: false,
        letters: vec![
            FreeLetter {
                id: 0,
                vector: FreeVector::Own(a),
                role: Role::Zig,
            },
            FreeLetter {
                id: 1,
                vector: FreeVector::Same(0, Sign::Plus),
                role: Role::Zag,
            },
            FreeLetter {
                id: 2,
                vector: FreeVector::Own(up),
                role: Role::Zag,
            },
        ],
    };
    let shell = grown(&shape(path, vec![until_still(Spurs::Retract)]));
    // a a' up -> a' a up -> a' up a: one panel.
    assert_eq!(counts(&shell), [4, 4, 1]);
    let letters: Vec<u32> = shell.fronts[0].letters.iter().map(|l| l.letter).collect();
    assert_eq!(letters, [1, 2, 0]);
}

#[test]
fn what_cannot_be_grown_is_refused() {
    let zero = [(Vector::ZERO, Role::Zig), (Vector::X, Role::Zag)];
    let nan = [(Vector::new(f64::NAN, 0.0, 0.0), Role::Zig), (Vector::X, Role::Zag)];
    let huge = [(Vector::new(1e308, 0.0, 0.0), Role::Zig), (Vector::X, Role::Zag)];
    for (word, code) in [
        (zero, Code::ZeroVector),
        (nan, Code::NotFinite),
        (huge, Code::ParameterLimit),
    ] {
        let (shell, findings) = grow(&shape(open_word(&word), vec![lay(1, Spurs::Retract)]));
        assert!(shell.panels.is_empty());
        assert!(findings.iter().any(|f| f.code == code), "{findings:?}");
    }
    let mut too_many = shape(
        ribs_round_a_pole(&polar_ribs(3, 38.0, 1.0)),
        vec![lay(u32::MAX, Spurs::Cross)],
    );
    too_many.steps.truncate(1);
    let (shell, findings) = grow(&too_many);
    assert!(shell.panels.is_empty());
    assert!(findings.iter().any(|f| f.code == Code::TooManyPanels), "{findings:?}");
}

#[test]
fn a_front_that_misses_is_grown_open_and_says_by_how_much() {
    let mut path = ribs_round_a_pole(&polar_ribs(6, 30.0, 100.0));
    if let FreeVector::Own(v) = &mut path.letters[1].vector {
        v.x += 3.0;
    }
    // The rib's zig follows its zag, so the sum stays zero: free the zig to open the gap.
    let zig = path.letters[2].vector;
    assert!(matches!(zig, FreeVector::Same(1, Sign::Minus)));
    path.letters[2].vector = FreeVector::Own(-polar_ribs(6, 30.0, 100.0)[1]);
    let (shell, findings) = grow(&shape(path, vec![lay(1, Spurs::Retract)]));
    assert!((shell.closing_gap.unwrap() - 3.0).abs() < 1e-9);
    assert!(findings.iter().any(|f| f.code == Code::ClosingGap));
    assert!(!shell.fronts[0].closed);
}

#[test]
fn linked_zones_count_as_one() {
    let mut linked = shape(
        open_word(&[
            (Vector::X, Role::Zig),
            (Vector::Y, Role::Zag),
            (Vector::Z, Role::Zig),
            (Vector::NEG_X, Role::Zag),
        ]),
        vec![lay(1, Spurs::Retract)],
    );
    linked.zones.push(crate::ZoneRule {
        zone: ZoneRef::Start(2),
        vector: crate::ZoneVector::Linked(ZoneRef::Start(1), Sign::Minus),
    });
    let shell = grown(&linked);
    assert_eq!(shell.zones[2].vector, Vector::NEG_Y);
    assert_eq!(shell.zones[2].counts_as, 1);
    assert!(shell.zones[2].reversed);
    linked.zones.push(crate::ZoneRule {
        zone: ZoneRef::Start(1),
        vector: crate::ZoneVector::Linked(ZoneRef::Start(2), Sign::Plus),
    });
    let (_, findings) = grow(&linked);
    assert!(findings.iter().any(|f| f.code == Code::BrokenLink));
}

#[test]
fn a_split_side_follows_its_vertices_when_rims_join() {
    // Found by the property below: a fold that is crossed splits a side, then the rims join and the T's vertex gets another number.
    let zig = |x: f64, y: f64, z: f64| (Vector::new(x, y, z), Role::Zig);
    let (up, out) = (zig(0.0, 0.0, 1.0), zig(1.0, 1.0, 0.0));
    let word = [zig(1.0, 0.0, 0.0), up, up, out, zig(-2.0, -2.0, 0.0), up];
    let acts = vec![
        Act::SetRoles(RoleRule::Alternate),
        lay(1, Spurs::Retract),
        Act::SetRoles(RoleRule::Alternate),
        lay(2, Spurs::Cross),
    ];
    let mut shape = shape(open_word(&word), acts);
    for step in &mut shape.steps {
        step.side = Side::Aft;
    }
    let (shell, _) = grow(&shape);
    assert_eq!(shell.check(0.001), Ok(()));
    assert_eq!(shell.tees.len(), 1);
}
