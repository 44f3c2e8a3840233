//! What is told ahead against what growing then does.

use super::{PanelAhead, Turn, panels_of_splice, ranks, spurs_of_splice, turned};
use crate::{
    Act, Angle, Courses, Direction, Maker, OpenV, Outside, Placement, Shape, Shell, Side, Sign, Spurs, Start, Step,
    StepId, Tolerances, VName, Vector, Vs, ZoneRef, grow,
    grow::open_vs,
    start::{ColumnForm, LoopForm, PolarBy, PolarForm},
};

fn polar(ribs: u32) -> Start {
    let by = PolarBy::PitchEdge {
        pitch: Angle::from_degrees(35.0),
        edge_mm: 500.0,
    };
    Start::Polar(PolarForm { ribs, by })
}

fn shape(start: Start, acts: &[Act]) -> Shape {
    let step = |(id, act): (u32, &Act)| Step {
        id: StepId(id),
        name: None,
        on: true,
        side: Side::Fore,
        act: act.clone(),
    };
    Shape {
        start,
        zones: Vec::new(),
        steps: (1..).zip(acts).map(step).collect(),
        finish: Vec::new(),
        placement: Placement::default(),
        outside: Outside::Grown,
        tolerances: Tolerances::default(),
    }
}

fn lay(count: u32) -> Act {
    Act::Lay {
        courses: Courses::Count(count),
        spurs: Spurs::Retract,
    }
}

fn name(shell: &Shell, v: &OpenV) -> VName {
    let [zig, zag] = super::panel::letters(shell, v).map(|l| shell.letter_name(l));
    VName { zig, zag }
}

/// Sides, acute angle and area of a grown panel from its corners alone.
fn measured(shell: &Shell, panel: u32) -> [f64; 4] {
    let [a, b, _, d] = shell.corner_points(panel);
    let (ab, ad) = (b - a, d - a);
    let cos = (ab.dot(ad) / (ab.length() * ad.length())).abs();
    let mut sides = [ab.length(), ad.length()];
    sides.sort_by(f64::total_cmp);
    [sides[0], sides[1], cos.acos(), ab.cross(ad).length()]
}

fn told(panel: &PanelAhead) -> [f64; 4] {
    let mut sides = panel.sides_mm;
    sides.sort_by(f64::total_cmp);
    [sides[0], sides[1], panel.acute.radians(), panel.area_mm2]
}

fn assert_near(a: [f64; 4], b: [f64; 4]) {
    for (a, b) in a.into_iter().zip(b) {
        assert!((a - b).abs() <= 1e-9 * b.abs().max(1.0), "{a} {b}");
    }
}

#[test]
fn a_right_angle_of_three_and_four_has_area_twelve() {
    let panel = PanelAhead::of(Vector::X * 3.0, Vector::Z * -4.0).unwrap();
    assert_near(told(&panel), [3.0, 4.0, core::f64::consts::FRAC_PI_2, 12.0]);
    assert_eq!(PanelAhead::of(Vector::X, Vector::X * -2.0), None);
}

#[test]
fn the_panel_told_is_the_panel_filled() {
    let mut before = shape(polar(8), &[lay(2)]);
    before.placement.scale = 1.5;
    before.placement.mirrored = true;
    let (shell, _) = grow(&before);
    let open = open_vs(&shell, Side::Fore);
    let v = &open[3];
    let mut after = before.clone();
    after.steps.push(Step {
        id: StepId(9),
        act: Act::Fill {
            at: Vs::Picked(vec![name(&shell, v)]),
        },
        ..after.steps[0].clone()
    });
    let (grown, _) = grow(&after);
    assert_eq!(grown.panels.len(), shell.panels.len() + 1);
    let last = u32::try_from(grown.panels.len() - 1).unwrap();
    assert_near(told(&PanelAhead::of_v(v).unwrap()), measured(&grown, last));
}

#[test]
fn the_panels_of_a_splice_are_those_of_the_next_course_there() {
    // One direction of its own, one along a zone, one against one, and all between: rib 5 lies opposite the V of ribs 3 and 4.
    let directions = [
        Direction::Own(Vector::new(0.0, 100.0, 400.0)),
        Direction::Zone(ZoneRef::Start(6)),
        Direction::Against(ZoneRef::Start(1)),
        Direction::Between,
    ];
    for mirrored in [false, true] {
        let mut before = shape(polar(8), &[lay(3)]);
        before.placement.mirrored = mirrored;
        before.placement.scale = 0.8;
        let (shell, _) = grow(&before);
        let open = open_vs(&shell, Side::Fore);
        let v = &open[2];
        let spurs = spurs_of_splice(&shell, &before.placement, v, &directions);
        let ahead = panels_of_splice(v, &spurs);
        assert_eq!(ahead.len(), spurs.len() + 1);
        let mut after = before.clone();
        for (id, act) in [
            (
                8,
                Act::Splice {
                    at: Vs::Picked(vec![name(&shell, v)]),
                    directions: directions.to_vec(),
                },
            ),
            (9, Act::Fill { at: Vs::All }),
        ] {
            let step = Step {
                id: StepId(id),
                act,
                ..after.steps[0].clone()
            };
            after.steps.push(step);
        }
        let (grown, _) = grow(&after);
        // The other seven Vs are filled too: those panels have no letter of the splice.
        let spliced = |letter: u32| grown.letters[letter as usize].maker == Maker::Step(StepId(8));
        let mut real: Vec<[f64; 4]> = (0..u32::try_from(grown.panels.len()).unwrap())
            .filter(|p| grown.panels[*p as usize].letters.into_iter().any(spliced))
            .map(|p| measured(&grown, p))
            .collect();
        let mut ahead: Vec<[f64; 4]> = ahead.iter().flatten().map(told).collect();
        assert!(3 < ahead.len(), "{ahead:?}");
        let order = |a: &[f64; 4], b: &[f64; 4]| a[3].total_cmp(&b[3]);
        real.sort_by(order);
        ahead.sort_by(order);
        assert_eq!(real.len(), ahead.len());
        for (real, ahead) in real.into_iter().zip(ahead) {
            assert_near(ahead, real);
        }
    }
}

#[test]
fn ranks_count_as_every_kth_does() {
    // After a splice at every second V there are letters of two makers, some of them with several letters a V.
    let directions = vec![
        Direction::Own(Vector::new(0.0, 0.0, 300.0)),
        Direction::Own(Vector::new(0.0, 0.0, 500.0)),
    ];
    let first = crate::LetterName::of_start(0, Sign::Minus);
    let splice = Act::Splice {
        at: Vs::EveryKth { from: first, k: 2 },
        directions,
    };
    for (start, acts) in [
        (polar(9), vec![lay(2)]),
        (polar(12), vec![lay(2), splice.clone()]),
        (polar(12), vec![lay(2), splice, lay(1)]),
    ] {
        let before = shape(start, &acts);
        let (shell, _) = grow(&before);
        let open = open_vs(&shell, Side::Fore);
        let ranks = ranks(&shell, &open);
        assert_eq!(ranks.len(), open.len());
        for (at, v) in open.iter().enumerate() {
            for k in [1, 2, 3, 4, 5] {
                let told = (0..open.len())
                    .filter(|to| ranks[*to].is_kth(ranks[at], k, shell.fronts[0].closed))
                    .count();
                // A direction that no letter has marks what the step chose.
                let mut after = before.clone();
                let mark = Direction::Own(Vector::new(7.0, 11.0, 13.0));
                after.steps.push(Step {
                    id: StepId(50),
                    act: Act::Splice {
                        at: Vs::EveryKth {
                            from: name(&shell, v).zig,
                            k,
                        },
                        directions: vec![mark],
                    },
                    ..after.steps[0].clone()
                });
                let (grown, _) = grow(&after);
                let marked = grown.letters.iter().filter(|l| l.maker == Maker::Step(StepId(50)));
                assert_eq!(marked.count(), 2 * told, "V {at}, k {k}");
            }
            // Letters of another family are never counted, however few they are.
            let other = super::Rank {
                family: 9999,
                rank: 90,
                of: 99,
            };
            assert!(!ranks[at].is_kth(other, 1, true));
        }
    }
}

#[test]
fn ribs_turn_with_their_vs_and_a_spiral_column_does_not() {
    let (shell, _) = grow(&shape(polar(8), &[lay(2)]));
    let open = open_vs(&shell, Side::Fore);
    let turn = Turn::between(&shell, &open[0], &open[2]).unwrap();
    // Two of eight ribs on: a quarter turn, so x goes to y.
    let of_x = turn.apply(Vector::X);
    assert!(of_x.distance(Vector::Y) < 1e-12, "{of_x:?}");
    let own = Direction::Own(Vector::new(200.0, 0.0, 300.0));
    let up = Direction::Own(Vector::new(0.0, 0.0, 300.0));
    let turned = turned(
        &shell,
        &[
            own,
            up.clone(),
            Direction::Zone(ZoneRef::Start(7)),
            Direction::Against(ZoneRef::Start(0)),
            Direction::Between,
        ],
        turn,
    );
    let Direction::Own(vector) = turned[0] else {
        panic!("a direction of its own")
    };
    assert!(vector.distance(Vector::new(0.0, 200.0, 300.0)) < 1e-9);
    assert_eq!(
        turned[1..],
        [
            up,
            Direction::Zone(ZoneRef::Start(1)),
            Direction::Against(ZoneRef::Start(2)),
            Direction::Between
        ]
    );
    let spiral = |turn: i32| {
        Start::Column(ColumnForm {
            ribs: 8,
            zag_run_mm: 400.0,
            zig_run_mm: 300.0,
            rise_mm: 300.0,
            turn,
        })
    };
    for (start, whether) in [(spiral(1), true), (spiral(3), false)] {
        let (shell, _) = grow(&shape(start, &[lay(1)]));
        let open = open_vs(&shell, Side::Fore);
        assert_eq!(Turn::between(&shell, &open[0], &open[1]).is_some(), whether);
    }
    let moved = |moved: Vec<(u32, Vector)>| {
        Start::Loop(LoopForm {
            sides: 6,
            radius_mm: 900.0,
            rise_mm: 300.0,
            moved,
        })
    };
    for (start, whether) in [
        (moved(Vec::new()), true),
        (moved(vec![(1, Vector::new(5.0, 0.0, 0.0))]), false),
    ] {
        let (shell, _) = grow(&shape(start, &[lay(2)]));
        let open = open_vs(&shell, Side::Fore);
        let all = (1..open.len()).all(|k| Turn::between(&shell, &open[0], &open[k]).is_some());
        assert_eq!(all, whether);
    }
}
