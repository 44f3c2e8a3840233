//! Spurs, folds, parallel letters, crowns started at one V and the rims that they leave.
//!
//! Source: docs/checks.md, worked cases.

use zonewright_geometry::{
    Act, Angle, Direction, Point, Role, Shape, Side, Sign, Spurs, Start, VName, Vector, Vs, grow,
    grow::open_vs,
    measure,
    start::{FreeLetter, FreePath, FreeVector, PolarBy, PolarForm},
};
use zonewright_tests::{
    assert_near, closed_forms, grown, lay,
    look::{self, counts},
    shape, until_still,
    zonohedron::open_path,
};

fn polar(ribs: u32) -> Start {
    let pitch = Angle::from_degrees(38.0);
    Start::Polar(PolarForm {
        ribs,
        by: PolarBy::PitchEdge { pitch, edge_mm: 300.0 },
    })
}

/// n ribs, k courses, at one open V copies of all ribs between its two, until still, nothing retracted.
fn crowned(ribs: u32, courses: u32) -> Shape {
    let before = shape(polar(ribs), vec![lay(courses, Spurs::Hold)]);
    let (shell, _) = grow(&before);
    let front = &shell.fronts[0];
    let at = open_vs(&shell, Side::Fore)[1].position;
    let name = |at: usize| shell.letter_name(front.letters[at % front.letters.len()].letter);
    let v = VName {
        zig: name(at),
        zag: name(at + 1),
    };
    let splice = Act::Splice {
        at: Vs::Picked(vec![v]),
        directions: vec![Direction::Between],
    };
    shape(
        before.start,
        vec![lay(courses, Spurs::Hold), splice, until_still(Spurs::Hold)],
    )
}

#[test]
fn worked_cases_of_closing_a_rim() {
    // The plan: 115, 225, 111 with a rim of 6, closed by three panels; 207, 408, 202 with a rim of 8, in four zones each pair
    // of which crosses once: six panels (derived).
    for (ribs, courses, expected, rim, more) in [(9, 3, [115, 225, 111], 6, 3), (12, 4, [207, 408, 202], 8, 6)] {
        let mut record = crowned(ribs, courses);
        let shell = grown(&record);
        assert_eq!(counts(&shell), expected);
        assert_eq!(shell.rims.iter().map(|r| r.edges.len()).collect::<Vec<_>>(), [rim]);
        let close = zonewright_geometry::Step {
            id: record.next_step_id(),
            act: Act::CloseRim,
            ..record.steps[0].clone()
        };
        record.steps.push(close);
        let closed = grown(&record);
        assert_eq!(closed.panels.len(), expected[2] + more);
        assert!(closed.is_closed());
        assert_eq!(measure::totals(&closed).euler, 2);
    }
}

#[test]
fn every_policy_closes_a_polar_form_or_goes_on() {
    let panels = |spurs, courses| grown(&shape(polar(6), vec![lay(courses, spurs)])).panels.len();
    // Five levels of six; retracted or held there is no more to lay, crossed there is the next crown.
    for spurs in [Spurs::Retract, Spurs::Hold] {
        assert_eq!(panels(spurs, 40), 30);
    }
    assert_eq!(panels(Spurs::Cross, 5), 30);
    assert_eq!(panels(Spurs::Cross, 11), 60);
}

fn two(a: Vector, b: FreeVector) -> Start {
    let letter = |id, vector, role| FreeLetter { id, vector, role };
    // Something to make a panel with stands behind.
    let letters = vec![
        letter(0, FreeVector::Own(a), Role::Zig),
        letter(1, b, Role::Zag),
        letter(2, FreeVector::Own(Vector::Z), Role::Zag),
    ];
    Start::Zigzag(FreePath {
        origin: Point::ORIGIN,
        closed: false,
        letters,
    })
}

#[test]
fn opposite_and_unequal_is_never_retracted() {
    let start = || two(Vector::X, FreeVector::Own(Vector::NEG_X * 2.0));
    let retracted = grow(&shape(start(), vec![Act::Retract])).0;
    assert_eq!(retracted.fronts[0].letters.len(), 3);
    let held = grow(&shape(start(), vec![until_still(Spurs::Retract)])).0;
    assert!(held.panels.is_empty(), "a fold that is held lets nothing through");
    // Crossed, the zig meets the letter behind: one panel of X and Z.
    let crossed = grown(&shape(start(), vec![until_still(Spurs::Cross)]));
    assert_eq!(crossed.panels.len(), 1);
    assert_near!(look::area(&crossed), 1.0, 1e-12);
}

#[test]
fn opposite_and_equal_is_retracted_held_or_crossed() {
    let start = || two(Vector::X, FreeVector::Same(0, Sign::Minus));
    let letters = |spurs| {
        let (shell, _) = grow(&shape(start(), vec![until_still(spurs)]));
        (shell.fronts[0].letters.len(), shell.panels.len())
    };
    assert_eq!(letters(Spurs::Retract), (1, 0));
    assert_eq!(letters(Spurs::Hold), (3, 0));
    assert_eq!(letters(Spurs::Cross), (3, 1));
}

#[test]
fn parallel_letters_make_no_panel() {
    // Zigs and zags of which one pair is parallel: every other pair makes its panel once (docs/checks.md).
    let zigs = [Vector::new(3.0, 0.0, 0.0), Vector::new(0.0, 2.0, 1.0)];
    let zags = [Vector::new(5.0, 0.0, 0.0), Vector::new(1.0, 1.0, 4.0)];
    let mut path = open_path(&[zigs, zags].concat());
    for letter in &mut path.letters[2..] {
        letter.role = Role::Zag;
    }
    let shell = grown(&shape(Start::Zigzag(path), vec![until_still(Spurs::Retract)]));
    assert_eq!(shell.panels.len(), 3);
    let expected: f64 = zigs
        .iter()
        .flat_map(|a| zags.iter().map(|b| a.cross(*b).length()))
        .sum();
    assert_near!(look::area(&shell), expected, 1e-12 * expected);
    let whole = closed_forms::pairs(&[zigs, zags].concat(), |a, b| a.cross(b).length());
    assert!(expected < whole);
}
