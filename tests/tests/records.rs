//! The record: names survive edits, steps switch and come back, a start becomes free points, a shell is placed.
//!
//! Source: docs/checks.md, worked cases. Answers are planted: an edit is made and undone, or its effect is known beforehand.

use std::collections::BTreeSet;

use zonewright_geometry::{
    Act, Angle, Code, Direction, Finish, FinishAct, LetterName, PanelName, Point, Shape, Shell, Side, Sign, Spurs,
    Start, StepId, VName, Vector, Vs, grow,
    grow::open_vs,
    start::{
        AxisClass, ColumnForm, Curve, CurveShape, FreePath, HelicalForm, LoopForm, PolarBy, PolarForm, RibbonForm,
        RibbonFrom, Star, StarLength, StarLetter, StarPath, StarSolid, TranslationForm,
    },
};
use zonewright_tests::{
    assert_near, grown, lay,
    look::{self, volume},
    outside_out, shape, until_still,
};

fn zigzag() -> FreePath {
    let points: Vec<Point> = (0..9)
        .map(|k| {
            let k = f64::from(k);
            Point::new(100.0 * k, if k % 2.0 == 0.0 { 0.0 } else { 120.0 }, 7.0 * k * k)
        })
        .collect();
    FreePath::from_points(&points, false).expect("a path of points")
}

/// The name of the V whose zig is letter `zig` of the first word, after the first `steps` steps.
fn v_of(shape: &Shape, zig: u32) -> VName {
    let (shell, _) = grow(shape);
    let front = &shell.fronts[0];
    let name = |at: usize| shell.letter_name(front.letters[at % front.letters.len()].letter);
    let found = open_vs(&shell, Side::Fore)
        .into_iter()
        .find(|v| name(v.position).index == zig && name(v.position).at.is_none());
    let at = found.expect("the letter is the zig of an open V").position;
    VName {
        zig: name(at),
        zag: name(at + 1),
    }
}

fn with_splice(start: Start, courses: u32, zig: u32) -> Shape {
    let before = shape(start, vec![lay(courses, Spurs::Hold)]);
    let at = Vs::Picked(vec![v_of(&before, zig)]);
    let directions = vec![Direction::Own(Vector::new(10.0, 20.0, -90.0))];
    let acts = vec![
        lay(courses, Spurs::Hold),
        Act::Splice { at, directions },
        lay(2, Spurs::Hold),
    ];
    shape(before.start, acts)
}

fn names(shell: &Shell) -> BTreeSet<PanelName> {
    look::panels(shell).map(|p| shell.panel_name(p)).collect()
}

#[test]
fn a_splice_stays_at_its_v_when_points_come_in_upstream() {
    let before = with_splice(Start::Zigzag(zigzag()), 1, 4);
    let mut edited = zigzag();
    // Two points, so that the letters behind keep their roles.
    edited.split_letter(0, 3).expect("an edge can be split");
    let mut after = before.clone();
    after.start = Start::Zigzag(edited);
    let (old, new) = (grown(&before), grown(&after));
    let (_, findings) = grow(&after);
    assert!(!findings.iter().any(|f| f.code == Code::NameLost), "{findings:?}");
    let hosts = |shell: &Shell| -> BTreeSet<LetterName> {
        let spliced = shell.letters.iter().filter(|l| l.at != zonewright_geometry::NONE);
        spliced.map(|l| shell.letter_name(l.at)).collect()
    };
    assert_eq!(hosts(&old), [LetterName::of_start(4, Sign::Plus)].into());
    assert_eq!(hosts(&old), hosts(&new));
    // Panels of letters 2 and behind do not know of the edit.
    let far: BTreeSet<PanelName> = names(&old)
        .into_iter()
        .filter(|n| {
            [&n.letters.0, &n.letters.1]
                .iter()
                .all(|l| l.at.is_some() || l.index >= 2)
        })
        .collect();
    assert!(far.len() > 4);
    assert!(far.is_subset(&names(&new)));
    // And deleting the two points again gives the first shell, name for name.
    let Start::Zigzag(path) = &mut after.start else {
        unreachable!("it is a zigzag")
    };
    path.delete_point(1).expect("the point is there");
    path.delete_point(1).expect("the point is there");
    assert_eq!(names(&grown(&after)), names(&old));
}

#[test]
fn a_splice_stays_at_its_v_when_a_rib_is_added() {
    let polar = |ribs| {
        let pitch = Angle::from_degrees(38.0);
        Start::Polar(PolarForm {
            ribs,
            by: PolarBy::PitchEdge { pitch, edge_mm: 300.0 },
        })
    };
    let before = with_splice(polar(9), 2, 6);
    let after = Shape {
        start: polar(10),
        ..before.clone()
    };
    let (new, findings) = grow(&after);
    assert!(!findings.iter().any(|f| f.code == Code::NameLost), "{findings:?}");
    let hosts = new.letters.iter().filter(|l| l.at != zonewright_geometry::NONE);
    let hosts: BTreeSet<u32> = hosts.map(|l| new.letters[l.at as usize].index).collect();
    assert_eq!(hosts, [6].into());
    assert_eq!(
        new.panels.len(),
        grown(&before).panels.len() + 4,
        "a panel more a course"
    );
}

fn records() -> Vec<Shape> {
    let pitch = Angle::from_degrees(33.0);
    let curve = |azimuth: f64, rise_mm| Curve {
        shape: CurveShape::Arc {
            span_mm: 900.0,
            rise_mm,
        },
        parts: 5,
        azimuth: Angle::from_degrees(azimuth),
    };
    let starts = vec![
        Start::Zigzag(zigzag()),
        Start::Translation(TranslationForm {
            zig: curve(0.0, 200.0),
            zag: curve(90.0, 150.0),
        }),
        Start::Polar(PolarForm {
            ribs: 7,
            by: PolarBy::PitchEdge { pitch, edge_mm: 100.0 },
        }),
        Start::Loop(LoopForm {
            sides: 6,
            radius_mm: 300.0,
            rise_mm: 150.0,
            moved: Vec::new(),
        }),
        Start::Ribbon(RibbonForm {
            ribs: 6,
            turn: Angle::from_degrees(25.0),
            pitch,
            edge_mm: 100.0,
            from: RibbonFrom::Edge,
        }),
        Start::Column(ColumnForm {
            ribs: 8,
            zag_run_mm: 100.0,
            zig_run_mm: 60.0,
            rise_mm: 80.0,
            turn: 1,
        }),
        Start::StarPath(StarPath {
            star: Star::Icosahedral(vec![AxisClass::FiveFold]),
            unit_mm: 100.0,
            closed: false,
            letters: [0, 1, 2, 3, 4, 0]
                .map(|axis| StarLetter {
                    axis,
                    sign: Sign::Plus,
                    length: StarLength::Golden(0),
                })
                .to_vec(),
        }),
        Start::Helical(HelicalForm {
            ribs: 6,
            turn: 2,
            pitch,
            edge_mm: 100.0,
        }),
    ];
    let splice = Act::Splice {
        at: Vs::All,
        directions: vec![Direction::Own(Vector::new(3.0, 5.0, -70.0))],
    };
    let acts = vec![lay(1, Spurs::Retract), splice, lay(2, Spurs::Retract)];
    starts.into_iter().map(|start| shape(start, acts.clone())).collect()
}

#[test]
fn steps_switched_off_and_on_again_leave_no_trace() {
    for shape in records() {
        let first = grow(&shape);
        for step in 0..shape.steps.len() {
            let mut switched = shape.clone();
            switched.steps[step].on = false;
            assert_ne!(
                grow(&switched).0,
                first.0,
                "{} step {step} does something",
                shape.start.kind()
            );
            switched.steps[step].on = true;
            assert_eq!(grow(&switched), first);
        }
        let mut moved = shape.clone();
        moved.steps.swap(0, 2);
        moved.steps.swap(0, 2);
        assert_eq!(grow(&moved), first);
    }
}

#[test]
fn free_points_grow_the_same_panels() {
    for shape in records() {
        let free = shape.to_free().expect("the start can be used");
        let (one, other) = (grow(&shape).0, grow(&free).0);
        let kind = shape.start.kind();
        assert!(!one.panels.is_empty(), "{kind}");
        assert_eq!(one.panels, other.panels, "{kind}");
        assert_eq!(one.edges, other.edges, "{kind}");
        // Free points are not lifted on to z = 0, so places agree up to one shift.
        let shift = other.points[0] - one.points[0];
        for (p, q) in one.points.iter().zip(&other.points) {
            assert!((*q - *p - shift).length() < 1e-9, "{kind}");
        }
        assert!(shift.x.hypot(shift.y) < 1e-12, "{kind}");
    }
}

#[test]
fn a_star_solid_made_of_free_points_keeps_its_silhouette() {
    // Free points do not keep to the hull; what is kept is the word: the same places, the same letters.
    let solid = Start::StarSolid(StarSolid {
        star: Star::Cubic(vec![AxisClass::ThreeFold]),
        edge_mm: 100.0,
    });
    let word = solid.first_word().expect("the star has axes");
    let free = Start::Zigzag(solid.to_free().expect("the star has axes"));
    let path = free.first_word().expect("a path");
    assert_eq!(path.nodes(), word.nodes());
    let indices = |w: &zonewright_geometry::start::FirstWord| w.letters.iter().map(|l| l.index).collect::<Vec<_>>();
    assert_eq!(indices(&path), indices(&word));
}

#[test]
fn a_placed_or_mirrored_shell_keeps_its_outside() {
    let pitch = Angle::from_degrees(38.0);
    let by = PolarBy::PitchEdge { pitch, edge_mm: 300.0 };
    let start = Start::Polar(PolarForm { ribs: 9, by });
    let plain = outside_out(shape(start, vec![until_still(Spurs::Retract)]));
    let expected = volume(&grown(&plain));
    for mirrored in [false, true] {
        let mut placed = plain.clone();
        placed.placement.mirrored = mirrored;
        placed.placement.scale = 2.0;
        placed.placement.turn = [10.0, 100.0, -30.0].map(Angle::from_degrees);
        placed.placement.shift = Vector::new(5000.0, -20.0, 300.0);
        let shell = grown(&placed);
        assert_near!(volume(&shell), 8.0 * expected, 1e-11 * expected);
    }
}

#[test]
fn panels_are_dropped_by_name() {
    let mut shape = records().remove(2);
    let whole = grown(&shape);
    let dropped: Vec<PanelName> = [3, 9].map(|p| whole.panel_name(p)).to_vec();
    shape.finish.push(Finish {
        id: StepId(40),
        name: None,
        on: true,
        act: FinishAct::Drop(dropped.clone()),
    });
    let left = names(&grown(&shape));
    let mut expected = names(&whole);
    for name in &dropped {
        assert!(expected.remove(name));
    }
    assert_eq!(left, expected);
    shape.finish[0].on = false;
    assert_eq!(grown(&shape), whole);
}

#[test]
fn what_is_too_large_is_refused_at_once() {
    let pitch = Angle::from_degrees(38.0);
    let by = PolarBy::PitchEdge { pitch, edge_mm: 300.0 };
    // More than five million panels: 2000 ribs round and round.
    let start = Start::Polar(PolarForm { ribs: 2000, by });
    let began = std::time::Instant::now();
    let (shell, findings) = grow(&shape(start, vec![lay(u32::MAX, Spurs::Cross)]));
    assert!(shell.panels.is_empty());
    assert!(findings.iter().any(|f| f.code == Code::TooManyPanels), "{findings:?}");
    assert!(began.elapsed().as_secs() < 20);
}
