//! The course ladder, climbed and worked on by its accessible names, with real drags and keys.

use egui::{Key, Modifiers, vec2};
use egui_kittest::{
    Harness,
    kittest::{NodeT, Queryable},
};
use zonewright::{
    document::{Design, new_design},
    window::{App, Climbed, Command, LadderAct},
};
use zonewright_geometry::{
    Act, Courses, Direction, LetterName, Level, Side, Sign, Spurs, Start, Step, StepId, VName, Vector, Vs,
    start::{ColumnForm, PolarForm},
};

use crate::common::{drag, open, polar};

fn panels(harness: &Harness<'_, App>) -> usize {
    harness.state().state().derived.totals.panels
}

fn climbed(harness: &Harness<'_, App>) -> Option<Climbed> {
    harness.state().state().view.ladder.climbed
}

fn click(harness: &mut Harness<'_, App>, name: &str) {
    harness.get_by_label(name).click();
    harness.run();
}

fn key(harness: &mut Harness<'_, App>, key: Key) {
    harness.key_press(key);
    harness.run();
}

fn steps(harness: &Harness<'_, App>) -> Vec<Step> {
    harness.state().state().shape().steps.clone()
}

fn lays(harness: &Harness<'_, App>) -> Vec<Option<u32>> {
    let count = |s: &Step| match s.act {
        Act::Lay {
            courses: Courses::Count(n),
            ..
        } => Some(n),
        _ => None,
    };
    steps(harness).iter().map(count).collect()
}

fn with_steps(acts: Vec<Act>) -> Design {
    let mut design = polar(Some(1));
    design.shape.steps = (1..)
        .zip(acts)
        .map(|(id, act)| Step {
            id: StepId(id),
            name: None,
            on: true,
            side: Side::Fore,
            act,
        })
        .collect();
    design
}

fn lay(count: u32) -> Act {
    Act::Lay {
        courses: Courses::Count(count),
        spurs: Spurs::Retract,
    }
}

fn splice(at: Vs) -> Act {
    Act::Splice {
        at,
        directions: vec![Direction::Own(Vector::new(0.0, 0.0, 400.0))],
    }
}

#[test]
fn a_clicked_rung_shows_the_shell_up_to_there_and_leaves_the_design_alone() {
    let mut harness = open(polar(Some(4)));
    let before = harness.state().state().design().clone();
    let camera = harness.state().state().camera();
    // Eight ribs give eight panels a course (derived).
    assert_eq!(panels(&harness), 32);
    harness.get_by_label("Step 1: Lay, 4 courses, on");
    click(&mut harness, "Course 2: 8 panels");
    assert_eq!(panels(&harness), 16);
    harness.get_by_label("Panels: 16");
    assert_eq!(
        harness.state().state().derived.ladder.courses,
        [4, 0],
        "the ladder is that of the whole"
    );
    harness.get_by_label("8 open Vs");
    harness.get_by_label("Showing course 2 of 4");
    let all = &harness.state().state().derived.shell.courses;
    assert_eq!(all.iter().map(|c| c.number).collect::<Vec<_>>(), [1, 2]);
    assert_eq!(
        harness.state().state().camera(),
        camera,
        "the picture stays where it is"
    );
    assert_eq!(harness.state().state().design(), &before);
    click(&mut harness, "Back to the top");
    assert_eq!((panels(&harness), climbed(&harness)), (32, None));
    assert!(harness.query_by_label("Back to the top").is_none());
    click(&mut harness, "Start of the ladder");
    assert_eq!(panels(&harness), 0);
    key(&mut harness, Key::Escape);
    assert_eq!((panels(&harness), climbed(&harness)), (32, None));
    assert_eq!(harness.state().state().camera(), camera);
    // The last rung is the top.
    click(&mut harness, "Course 4: 8 panels");
    assert_eq!(climbed(&harness), None);
}

#[test]
fn a_drag_along_the_rungs_climbs_with_the_pointer() {
    let mut harness = open(polar(Some(5)));
    let [from, to] = [1, 3].map(|k| harness.get_by_label(&format!("Course {k}: 8 panels")).rect().center());
    drag(&mut harness, from, to - from);
    assert_eq!(panels(&harness), 24);
    // On to beyond the top: the whole.
    let top = harness.get_by_label("Course 5: 8 panels").rect().center();
    drag(&mut harness, to, vec2(0.0, top.y - to.y - 80.0));
    assert_eq!((panels(&harness), climbed(&harness)), (40, None));
    let undo = harness.state().state().history.undo_label().map(str::to_owned);
    assert_eq!(undo, None, "climbing is no change");
}

#[test]
fn keys_climb_and_the_keys_stay_on_the_ladder() {
    let mut harness = open(polar(Some(4)));
    click(&mut harness, "Course 1: 8 panels");
    key(&mut harness, Key::ArrowUp);
    assert_eq!(panels(&harness), 16);
    key(&mut harness, Key::ArrowUp);
    assert_eq!(panels(&harness), 24);
    key(&mut harness, Key::ArrowDown);
    assert_eq!(panels(&harness), 16);
    assert!(harness.get_by_label("Course 2: 8 panels").is_focused());
    key(&mut harness, Key::Home);
    assert_eq!(panels(&harness), 0);
    key(&mut harness, Key::PageUp);
    assert_eq!((panels(&harness), climbed(&harness)), (32, None));
    key(&mut harness, Key::PageDown);
    assert_eq!(panels(&harness), 0);
    key(&mut harness, Key::End);
    assert_eq!(panels(&harness), 32);
    // Without the ladder's focus: the commands.
    harness.state().send(Command::Ladder(LadderAct::Down));
    harness.run();
    assert_eq!(panels(&harness), 24);
    harness.key_press_modifiers(Modifiers::COMMAND, Key::PageUp);
    harness.run();
    assert_eq!((panels(&harness), climbed(&harness)), (32, None));
}

#[test]
fn a_step_added_between_two_rungs_splits_the_step_that_laid_them() {
    let mut harness = open(polar(Some(4)));
    let id = steps(&harness)[0].id;
    click(&mut harness, "Course 2: 8 panels");
    click(&mut harness, "Add a step after course 2");
    click(&mut harness, "Splice");
    let after = steps(&harness);
    assert_eq!(lays(&harness), [Some(2), None, Some(2)]);
    assert!(matches!(after[1].act, Act::Splice { at: Vs::All, .. }));
    assert_eq!(after[0].id, id, "the first part keeps its number");
    assert_eq!(panels(&harness), 16, "one still stands there, above the new step");
    assert_eq!(climbed(&harness), Some(Climbed::Step(after[1].id)));
    // Every V has become two.
    harness.get_by_label("16 open Vs");
    // Its card is open: one field of it.
    harness.get_by_label("Name of step 2");
    harness.state().send(Command::Undo);
    harness.run();
    assert_eq!(lays(&harness), [Some(4)], "one undo takes it all back");
    assert_eq!((panels(&harness), climbed(&harness)), (32, None), "its place is gone");
}

#[test]
fn courses_and_splices_go_where_one_has_climbed_to() {
    let mut harness = open(with_steps(vec![lay(2), splice(Vs::All), lay(1)]));
    click(&mut harness, "Course 1: 8 panels");
    click(&mut harness, "Add a course");
    assert_eq!(lays(&harness), [Some(3), None, Some(1)]);
    assert_eq!(panels(&harness), 16, "one course further");
    click(&mut harness, "Remove a course");
    assert_eq!((lays(&harness), panels(&harness)), (vec![Some(2), None, Some(1)], 8));
    click(&mut harness, "Open V 3");
    let after = steps(&harness);
    assert_eq!(lays(&harness), [Some(1), None, Some(1), None, Some(1)]);
    assert!(matches!(&after[1].act, Act::Splice { at: Vs::Picked(vs), .. } if vs.len() == 1));
    harness.get_by_label("9 open Vs");
    // A second click takes it out again, and one stands where one stood.
    click(&mut harness, "Open V 3");
    assert_eq!(lays(&harness), [Some(1), Some(1), None, Some(1)]);
    assert_eq!(panels(&harness), 8);
    harness.state().state().history.check().unwrap();
}

#[test]
fn at_the_top_steps_are_added_at_the_end() {
    let mut harness = open(polar(Some(2)));
    click(&mut harness, "Add a step");
    click(&mut harness, "Retract spurs");
    let after = steps(&harness);
    assert!(matches!(after[1].act, Act::Retract));
    assert_eq!(climbed(&harness), None);
    harness.get_by_label("Step 2: Retract spurs, on");
}

#[test]
fn steps_are_moved_by_dragging_and_by_keys() {
    let mut harness = open(with_steps(vec![lay(2), splice(Vs::All), lay(3)]));
    let from = harness.get_by_label("Step 2: Splice, 1 direction, on").rect().center();
    let to = harness.get_by_label("Step 3: Lay, 3 courses, on").rect().center();
    drag(&mut harness, from, vec2(0.0, to.y - from.y - 14.0));
    assert_eq!(lays(&harness), [Some(2), Some(3), None]);
    harness.state().send(Command::Undo);
    harness.run();
    assert_eq!(lays(&harness), [Some(2), None, Some(3)], "one drag is one undo step");
    // A short way, to no other place.
    drag(&mut harness, from, vec2(0.0, -30.0));
    assert_eq!(lays(&harness), [Some(2), None, Some(3)]);
    click(&mut harness, "Step 2: Splice, 1 direction, on");
    harness.key_press_modifiers(Modifiers::ALT, Key::ArrowDown);
    harness.run();
    assert_eq!(lays(&harness), [None, Some(2), Some(3)]);
    assert!(harness.get_by_label("Step 1: Splice, 1 direction, on").is_focused());
    harness.key_press_modifiers(Modifiers::ALT, Key::ArrowUp);
    harness.run();
    assert_eq!(lays(&harness), [Some(2), None, Some(3)]);
    key(&mut harness, Key::Delete);
    assert_eq!(lays(&harness), [Some(2), Some(3)]);
    assert_eq!(panels(&harness), 16, "one stands where the step was");
}

#[test]
fn a_step_is_switched_off_named_and_edited_on_its_card() {
    let mut harness = open(polar(Some(3)));
    click(&mut harness, "Step 1 on");
    assert_eq!(panels(&harness), 0);
    harness.get_by_label("Step 1: Lay, 3 courses, off");
    click(&mut harness, "Step 1 on");
    assert_eq!(panels(&harness), 24);
    assert!(harness.query_by_label("Name of step 1").is_none(), "no card is open");
    click(&mut harness, "Step 1: Lay, 3 courses, on");
    assert_eq!(climbed(&harness), None, "the last step is the top");
    harness.get_by_label("Name of step 1").focus();
    harness.run();
    harness.get_by_label("Name of step 1").type_text("crown");
    harness.run();
    harness.get_by_label("Step 1: Lay, 3 courses, crown, on");
    let field = |h: &Harness<'_, App>, what: &dyn Fn(egui_kittest::Node<'_>)| {
        what(h.get_by_role_and_label(egui::Role::SpinButton, "Courses of step 1"));
    };
    field(&harness, &|f| f.focus());
    harness.key_press_modifiers(Modifiers::COMMAND, Key::A);
    harness.run();
    field(&harness, &|f| f.type_text("5"));
    harness.run();
    key(&mut harness, Key::Enter);
    assert_eq!(panels(&harness), 40);
    click(&mut harness, "Close the card of step 1");
    assert!(harness.query_by_label("Name of step 1").is_none());
    click(&mut harness, "Step 1: Lay, 5 courses, crown, on");
    click(&mut harness, "Delete step 1");
    assert_eq!(steps(&harness), []);
}

#[test]
fn what_an_edit_upstream_broke_is_said_at_the_step_and_mended_there() {
    let zig = |index| LetterName::of_start(index, Sign::Minus);
    let zag = |index| LetterName::of_start(index, Sign::Plus);
    // The second V does not exist: a polar start of eight ribs has sixteen letters.
    let vs = [(0, 1), (96, 97)].map(|(a, b)| VName {
        zig: zig(a),
        zag: zag(b),
    });
    let mut harness = open(with_steps(vec![splice(Vs::Picked(vs.to_vec())), lay(2)]));
    let said = harness.state().state().derived.ladder.said.clone();
    assert_eq!(said.keys().collect::<Vec<_>>(), [&StepId(1)]);
    assert_eq!(said[&StepId(1)][0].level, Level::Look);
    // The step itself carries the sentence.
    let step = harness.get_by_label("Step 1: Splice, 1 direction, on");
    let described = step.accesskit_node().description().unwrap_or_default();
    assert!(described.contains("no longer there"), "{described}");
    click(&mut harness, "Step 1: Splice, 1 direction, on");
    click(&mut harness, "Keep what is found");
    assert_eq!(steps(&harness)[0].act, splice(Vs::Picked(vs[..1].to_vec())));
    assert!(harness.state().state().derived.ladder.said.is_empty());
    assert!(harness.query_by_label("Keep what is found").is_none());
    // The whole ladder says it, however far one has climbed: the step above is off the picture.
    harness.state().send(Command::Undo);
    click(&mut harness, "Start of the ladder");
    assert_eq!(harness.state().state().derived.ladder.said, said);
    assert_eq!(
        harness
            .state()
            .state()
            .derived
            .findings
            .iter()
            .filter(|f| f.level() == Level::Look)
            .count(),
        0
    );
}

#[test]
fn a_changed_v_is_kept_as_it_is_now() {
    let vs = VName {
        zig: LetterName::of_start(0, Sign::Minus),
        zag: LetterName::of_start(7, Sign::Plus),
    };
    let mut harness = open(with_steps(vec![splice(Vs::Picked(vec![vs.clone()])), lay(1)]));
    let said = harness.state().state().derived.ladder.said.clone();
    assert_eq!(said[&StepId(1)][0].level, Level::Note);
    click(&mut harness, "Step 1: Splice, 1 direction, on");
    click(&mut harness, "Keep what is found");
    let Act::Splice {
        at: Vs::Picked(now), ..
    } = &steps(&harness)[0].act
    else {
        panic!("a splice")
    };
    // Behind zig 0 stands zag 1 (the polar start's word: -g0 zig, g1 zag ...).
    assert_eq!((&now[0].zig, now[0].zag.index), (&vs.zig, 1));
    assert!(harness.state().state().derived.ladder.said.is_empty());
}

#[test]
fn of_hundreds_of_courses_only_those_in_sight_are_there() {
    let form = ColumnForm { ribs: 6, ..column() };
    let mut harness = open(new_design(Start::Column(form), Some(400), Spurs::Retract).unwrap());
    harness.get_by_label("Course 400: 6 panels");
    assert!(harness.query_by_label("Course 1: 6 panels").is_none());
    click(&mut harness, "Course 395: 6 panels");
    assert_eq!(panels(&harness), 395 * 6);
    key(&mut harness, Key::Home);
    harness.get_by_label("Course 1: 6 panels");
    assert!(harness.query_by_label("Course 400: 6 panels").is_none());
    key(&mut harness, Key::ArrowUp);
    assert_eq!(panels(&harness), 6);
    assert!(harness.get_by_label("Course 1: 6 panels").is_focused());
    harness.state().send(Command::Ladder(LadderAct::Climb(None)));
    harness.run();
    harness.get_by_label("Course 400: 6 panels");
}

fn column() -> ColumnForm {
    let design = new_kind("column");
    let Start::Column(form) = design.shape.start else {
        panic!("a column")
    };
    form
}

fn new_kind(kind: &'static str) -> Design {
    let mut harness = open(polar(Some(1)));
    harness.state().send(Command::New(kind));
    harness.run();
    Design::clone(harness.state().state().design())
}

#[test]
fn lists_are_those_of_the_whole_however_far_one_has_climbed() {
    let folder = tempfile::tempdir().unwrap();
    let mut harness = open(polar(Some(4)));
    click(&mut harness, "Course 1: 8 panels");
    harness.state().send(Command::ExportTo(folder.path().join("bench")));
    harness.run();
    assert_eq!(harness.state().state().message, None);
    let list = std::fs::read_to_string(folder.path().join("bench/panels.csv")).unwrap();
    assert_eq!(list.lines().count(), 1 + 32);
}

#[test]
fn each_place_is_worked_out_once_and_an_idle_ladder_nothing() {
    let mut harness = open(polar(Some(4)));
    let before = harness.state().counts();
    click(&mut harness, "Course 3: 8 panels");
    let after = harness.state().counts();
    assert_eq!((after.grown, after.inspected), (before.grown + 1, before.inspected + 1));
    let pictures = harness.state().pictures();
    harness.run_steps(10);
    assert_eq!(harness.state().counts(), after);
    assert_eq!(harness.state().pictures(), pictures);
    // What is upstream is edited, and what is shown follows.
    let Start::Polar(form) = harness.state().state().shape().start.clone() else {
        panic!("a polar start")
    };
    let form = PolarForm { ribs: 11, ..form };
    harness
        .state()
        .send(Command::SetStart(Box::new(Start::Polar(form)), "ribs"));
    harness.run();
    assert_eq!(panels(&harness), 33);
    harness.get_by_label("Course 4: 11 panels");
}

#[test]
fn aft_courses_run_the_other_way_and_make_their_front_live() {
    let mut design = with_steps(vec![lay(2)]);
    design.shape.start = zigzag_start();
    let aft = Step {
        id: StepId(2),
        side: Side::Aft,
        ..design.shape.steps[0].clone()
    };
    design.shape.steps.insert(0, aft);
    let mut harness = open(design);
    // Zig zag zig zag: fore fills two Vs and then the one between, aft only the one between (derived by hand).
    let height = |h: &Harness<'_, App>, name: &str| h.get_by_label(name).rect().center().y;
    let rungs = ["Course 1 aft: 1 panel", "Course 1: 2 panels", "Course 2: 1 panel"];
    let heights = rungs.map(|name| height(&harness, name));
    assert!(
        heights[0] > heights[1] && heights[1] > heights[2],
        "later is higher: {heights:?}"
    );
    click(&mut harness, rungs[0]);
    harness.get_by_label("Showing course 1 aft of 1");
    assert_eq!((panels(&harness), harness.state().state().view.side), (1, Side::Aft));
    click(&mut harness, rungs[1]);
    assert_eq!((panels(&harness), harness.state().state().view.side), (3, Side::Fore));
}

fn zigzag_start() -> Start {
    crate::common::zigzag().shape.start
}
