//! A part of a record grows as the whole did so far, and a split step changes nothing.

use proptest::prelude::*;

use super::{properties::record, *};
use crate::{
    Course, Finish, FinishAct, Panel, Stage, grow_part, measure, split_lay,
    start::{AxisClass, PolarBy, PolarForm, Star, StarSolid},
};

/// Where the course at `at`, counted as they were laid, ends in the record.
fn stage_of(shape: &Shape, course: &Course) -> Stage {
    let step = shape.steps.iter().position(|s| s.id == course.step).unwrap();
    match shape.steps[step].act {
        Act::Lay { .. } => Stage {
            steps: step,
            passes: course.pass,
        },
        _ => Stage::after(step + 1),
    }
}

fn numbers(shell: &Shell) -> Vec<(i32, u32)> {
    shell.courses.iter().map(|c| (c.number, c.panels)).collect()
}

/// The same shell, but for which step laid which course.
fn same(a: &Shell, b: &Shell) -> bool {
    let courses = b.courses.clone();
    let a = Shell { courses, ..a.clone() };
    a == *b
}

fn made(panel: &Panel) -> ([u32; 2], i32) {
    (panel.letters, panel.course)
}

fn star_solid() -> Shape {
    let star = Star::Icosahedral(vec![AxisClass::FiveFold]);
    let mut shape = shape(open_word(&[(Vector::X, Role::Zig)]), vec![until_still(Spurs::Retract)]);
    shape.start = Start::StarSolid(StarSolid { star, edge_mm: 100.0 });
    let aft = Step {
        id: StepId(2),
        side: Side::Aft,
        ..shape.steps[0].clone()
    };
    shape.steps.push(aft);
    shape
}

proptest! {
    #![proptest_config(ProptestConfig::with_cases(400))]

    #[test]
    fn splitting_a_laying_step_changes_nothing(shape in record(), at in any::<prop::sample::Index>()) {
        let (whole, _) = grow(&shape);
        prop_assume!(!whole.courses.is_empty());
        let course = *at.get(&whole.courses);
        let stage = stage_of(&shape, &course);
        let Some(split) = split_lay(&shape, stage.steps, stage.passes) else { return Ok(()) };
        prop_assert_eq!(split.steps.len(), shape.steps.len() + 1);
        prop_assert_eq!(split.steps[stage.steps].id, course.step, "the first part keeps its number");
        prop_assert!(shape.steps.iter().all(|s| s.id != split.steps[stage.steps + 1].id));
        let (again, _) = grow(&split);
        prop_assert_eq!(numbers(&again), numbers(&whole));
        prop_assert!(same(&again, &whole));
    }

    #[test]
    fn a_part_is_what_the_whole_was_so_far(shape in record()) {
        let (whole, _) = grow(&shape);
        let mut panels = 0;
        for course in &whole.courses {
            panels += course.panels as usize;
            let (part, _) = grow_part(&shape, stage_of(&shape, course), Some(whole.lift_mm));
            let (grown, expected): (Vec<_>, Vec<_>) =
                (part.panels.iter().map(made).collect(), whole.panels[..panels].iter().map(made).collect());
            prop_assert_eq!(grown, expected);
        }
        let (top, _) = grow_part(&shape, Stage::after(shape.steps.len()), Some(whole.lift_mm));
        prop_assert!(top == whole, "the top is the whole");
    }
}

#[test]
fn a_star_solid_laid_in_two_steps_is_the_same_solid() {
    let shape = star_solid();
    let (whole, findings) = grow(&shape);
    // The rhombic triacontahedron: 30 faces, volume 4 sqrt(5 + 2 sqrt 5) a^3 (common fact).
    let volume = measure::totals(&whole).volume_mm3.unwrap();
    let known = 4.0 * (5.0 + 2.0 * 5.0_f64.sqrt()).sqrt() * 1e6;
    assert_eq!(whole.panels.len(), 30, "{findings:?}");
    assert!((volume - known).abs() < 1e-6 * known, "{volume}");
    let mut cuts = 0;
    for course in &whole.courses {
        let stage = stage_of(&shape, course);
        let Some(split) = split_lay(&shape, stage.steps, stage.passes) else {
            continue;
        };
        cuts += 1;
        assert!(same(&grow(&split).0, &whole), "{course:?}");
    }
    assert_eq!(cuts, whole.courses.len());
}

#[test]
fn a_part_of_a_grounded_start_stands_where_it_stands_in_the_whole() {
    let mut shape = shape(open_word(&[(Vector::X, Role::Zig)]), vec![lay(4, Spurs::Retract)]);
    shape.start = Start::Polar(PolarForm {
        ribs: 9,
        by: PolarBy::PitchEdge {
            pitch: crate::Angle::from_degrees(40.0),
            edge_mm: 300.0,
        },
    });
    let (whole, _) = grow(&shape);
    let stage = Stage { steps: 0, passes: 2 };
    let (part, _) = grow_part(&shape, stage, Some(whole.lift_mm));
    assert_eq!(part.panels.len(), 18);
    for (a, b) in part.panels.iter().zip(&whole.panels) {
        for (p, q) in a.corners.into_iter().zip(b.corners) {
            assert_eq!(part.points[p as usize], whole.points[q as usize]);
        }
    }
    // Alone it stands on the ground.
    let lowest = |shell: &Shell| shell.points.iter().map(|p| p.0.z).fold(f64::INFINITY, f64::min);
    assert!(lowest(&grow_part(&shape, stage, None).0).abs() < 1e-9);
    assert!(lowest(&part) > 1.0);
    // A finishing step about a panel that has not grown yet says nothing.
    let last = whole.panel_name(30);
    shape.finish.push(Finish {
        id: StepId(9),
        name: None,
        on: true,
        act: FinishAct::Drop(vec![last]),
    });
    assert_eq!(grow_part(&shape, stage, None).1, []);
    assert_eq!(grow(&shape).0.panels.len(), 35);
}

#[test]
fn steps_that_lay_nothing_are_not_split() {
    let shape = shape(
        open_word(&[(Vector::X, Role::Zig), (Vector::Y, Role::Zag)]),
        vec![lay(3, Spurs::Hold), Act::Retract],
    );
    assert_eq!(split_lay(&shape, 0, 0), None);
    assert_eq!(split_lay(&shape, 0, 3), None, "nothing would be left");
    assert_eq!(split_lay(&shape, 1, 1), None);
    assert_eq!(split_lay(&shape, 7, 1), None);
    assert!(split_lay(&shape, 0, 2).is_some());
}
