//! The window, driven by its accessible names, without a display.

use std::path::PathBuf;

use egui_kittest::kittest::Queryable;
use zonewright::{
    document::{new_design, read_design},
    window::{App, Command},
};
use zonewright_geometry::{Act, Angle, Side, Spurs, Start, Vector};

use crate::common::{drag, open, picture_place, point, polar, snap_off, zigzag};

/// Heron-free area of two parallelograms on three edges: |a x b| each (derived).
fn area(edges: [Vector; 4]) -> f64 {
    edges[0].cross(edges[1]).length() + edges[2].cross(edges[3]).length()
}

fn edges(app: &App) -> [Vector; 4] {
    std::array::from_fn(|k| point(app, k + 1) - point(app, k))
}

#[test]
fn a_dragged_vertex_changes_the_readouts_by_the_computed_amount_and_is_one_undo_step() {
    let mut harness = open(zigzag());
    snap_off(&mut harness);
    let before = harness.state().state().derived.totals.area_mm2;
    // |(3,0,-4) x (3,0,4)| = 24, |(0,3,-4) x (0,3,4)| = 24, in units of 100 mm: 480000 mm2.
    assert!((before - 480_000.0).abs() < 1e-6, "{before}");
    let old = point(harness.state(), 2);
    let camera = harness.state().state().camera();
    let at = picture_place(&harness, old);
    drag(&mut harness, at, egui::vec2(40.0, -25.0));
    let moved = point(harness.state(), 2);
    let meant = old + camera.move_in_view_plane(old, 40.0, -25.0);
    assert!(moved.distance(meant) < 1e-6, "{moved:?} instead of {meant:?}");
    let after = harness.state().state().derived.totals.area_mm2;
    assert!((after - area(edges(harness.state()))).abs() < 1e-6 * after);
    assert!((after - before).abs() > 100.0);
    harness.state().send(Command::Undo);
    harness.run();
    assert_eq!(point(harness.state(), 2), old, "one undo takes the whole drag back");
    harness.state().state().history.check().unwrap();
}

#[test]
fn dragging_a_point_of_a_parametric_start_frees_it_in_one_undo_step() {
    let design = polar(None);
    let mut harness = open(design.clone());
    let state = harness.state().state();
    let path = state.derived.path.clone().unwrap();
    // A grounded start stands where its free points will stand: the first word's points are vertices of the shell.
    for placed in &path.placed {
        let near = state.derived.shell.points.iter().map(|p| p.distance(*placed));
        assert!(near.fold(f64::INFINITY, f64::min) < 1e-6, "{placed:?}");
    }
    let at = picture_place(&harness, path.placed[1]);
    snap_off(&mut harness);
    drag(&mut harness, at, egui::vec2(20.0, 20.0));
    assert_eq!(harness.state().state().shape().start.kind(), "zigzag");
    let dropped = picture_place(&harness, point(harness.state(), 1));
    assert!(
        (dropped - (at + egui::vec2(20.0, 20.0))).length() < 0.5,
        "the point stays under the pointer: {dropped:?}"
    );
    harness.state().send(Command::Undo);
    harness.run();
    assert_eq!(**harness.state().state().design(), design);
}

#[test]
fn turning_into_free_points_leaves_the_shell_where_it_is() {
    let mut harness = open(polar(None));
    let before = harness.state().state().derived.shell.points.clone();
    harness.get_by_label("Turn into free points").click();
    harness.run();
    let after = &harness.state().state().derived.shell.points;
    assert_eq!(before.len(), after.len());
    for (a, b) in before.iter().zip(after) {
        assert!(a.distance(*b) < 1e-6, "{a:?} {b:?}");
    }
}

#[test]
fn a_click_on_an_open_v_splices_and_the_next_one_takes_it_away() {
    let mut harness = open(zigzag());
    let before = harness.state().state().design().clone();
    let open_before = harness.state().state().derived.open_on(Side::Fore).len();
    assert_eq!(open_before, 1, "two Vs filled leave one between them");
    harness.get_by_label("Open V 1").click();
    harness.run();
    let steps = &harness.state().state().shape().steps;
    assert!(matches!(steps.last().unwrap().act, Act::Splice { .. }));
    assert_eq!(
        harness.state().state().derived.open_on(Side::Fore).len(),
        2,
        "one spur makes two of one"
    );
    harness.state().send(Command::AddCourse);
    harness.run();
    assert_eq!(harness.state().state().derived.totals.panels, 4);
    harness.state().send(Command::Undo);
    harness.run();
    harness.get_by_label("Open V 2").click();
    harness.run();
    assert_eq!(harness.state().state().design(), &before);
}

#[test]
fn all_is_undone_all_is_redone_saved_and_reopened_with_the_same_numbers() {
    let folder = tempfile::tempdir().unwrap();
    let file = folder.path().join("a design.ron");
    let first = polar(None);
    let mut harness = open(first.clone());
    for command in [Command::RemoveCourse, Command::RemoveCourse, Command::FreePoints] {
        harness.state().send(command);
        harness.run();
    }
    harness.get_by_label("Open V 1").click();
    harness.run();
    harness.state().send(Command::AddCourse);
    harness.run();
    let last = harness.state().state().design().clone();
    let numbers = harness.state().state().derived.totals.clone();
    assert!(harness.state().state().history.unsaved());
    for _ in 0..5 {
        harness.state().send(Command::Undo);
    }
    harness.run();
    assert_eq!(**harness.state().state().design(), first);
    assert!(
        !harness.state().state().history.unsaved(),
        "undone back to what was opened"
    );
    for _ in 0..5 {
        harness.state().send(Command::Redo);
    }
    harness.run();
    assert_eq!(harness.state().state().design(), &last);
    harness.state().state().history.check().unwrap();
    harness.state().send(Command::SaveTo(file.clone()));
    harness.run();
    assert_eq!(harness.state().state().message, None);
    assert!(!harness.state().state().history.unsaved());
    assert_eq!(read_design(&file).unwrap(), *last);
    harness.state().send(Command::New("loop"));
    harness.run();
    harness.state().send(Command::OpenPath(file));
    harness.run();
    assert_eq!(harness.state().state().derived.totals, numbers);
}

#[test]
fn lengths_are_typed_in_inches_with_fractions() {
    let mut harness = open(zigzag());
    harness.get_by_label("inch").click();
    harness.run();
    let field = harness.get_by_label("Point 2 x");
    field.click();
    harness.run();
    let field = harness.get_by_label("Point 2 x");
    field.focus();
    harness.key_press_modifiers(egui::Modifiers::COMMAND, egui::Key::A);
    harness.run();
    harness.get_by_label("Point 2 x").type_text("11 3/4");
    harness.run();
    harness.key_press(egui::Key::Enter);
    harness.run();
    let x = point(harness.state(), 1).0.x;
    assert!((x - 11.75 * 25.4).abs() < 1e-9, "{x}");
    assert_eq!(harness.get_by_label("Point 2 x").value().as_deref(), Some("11 3/4\""));
}

#[test]
fn an_idle_window_works_nothing_out() {
    let mut harness = open(polar(None));
    harness.run();
    let (counts, pictures) = (harness.state().counts(), harness.state().pictures());
    assert!(counts.grown >= 1 && counts.inspected >= 1 && pictures >= 1);
    harness.run_steps(10);
    assert_eq!(harness.state().counts(), counts);
    assert_eq!(harness.state().pictures(), pictures);
}

#[test]
fn a_change_works_each_stage_out_once() {
    let mut harness = open(polar(None));
    let before = harness.state().counts();
    harness.state().send(Command::RemoveCourse);
    harness.run();
    let after = harness.state().counts();
    assert_eq!(after.grown, before.grown + 1);
    assert_eq!(after.inspected, before.inspected + 1);
}

#[test]
fn unsaved_changes_are_asked_about() {
    let mut harness = open(zigzag());
    harness.state().send(Command::AddCourse);
    harness.state().send(Command::New("polar"));
    harness.run();
    assert_eq!(harness.state().state().shape().start.kind(), "zigzag");
    harness.get_by_label("Stay").click();
    harness.run();
    assert_eq!(harness.state().state().shape().start.kind(), "zigzag");
    harness.state().send(Command::New("polar"));
    harness.run();
    harness.get_by_label("Discard the changes").click();
    harness.run();
    assert_eq!(harness.state().state().shape().start.kind(), "polar");
}

#[test]
fn a_broken_file_is_said_and_the_design_is_kept() {
    let folder = tempfile::tempdir().unwrap();
    let file = folder.path().join("broken.ron");
    std::fs::write(&file, "(format: 1, nonsense").unwrap();
    let mut harness = open(zigzag());
    let before = harness.state().state().design().clone();
    harness.state().send(Command::OpenPath(file.clone()));
    harness.run();
    let message = harness.state().state().message.clone().unwrap().text;
    assert!(message.contains("broken.ron") && message.contains("line"), "{message}");
    assert_eq!(harness.state().state().design(), &before);
    assert_eq!(std::fs::read_to_string(file).unwrap(), "(format: 1, nonsense");
    harness.get_by_label("Close the message").click();
    harness.run();
    assert_eq!(harness.state().state().message, None);
}

#[test]
fn without_a_dialog_service_the_path_box_saves() {
    let folder = tempfile::tempdir().unwrap();
    let mut harness = open(zigzag());
    harness.state().send(Command::SaveAs);
    harness.run();
    let typed: PathBuf = folder.path().join("typed");
    harness.get_by_label("File path").focus();
    harness.key_press_modifiers(egui::Modifiers::COMMAND, egui::Key::A);
    harness.run();
    harness.get_by_label("File path").type_text(typed.to_str().unwrap());
    harness.run();
    harness.key_press(egui::Key::Enter);
    harness.run();
    assert!(folder.path().join("typed.ron").is_file(), "the ending is added");
}

#[test]
fn every_kind_of_start_opens_with_named_fields_and_grows() {
    let mut harness = open(zigzag());
    for kind in [
        "translation",
        "polar",
        "loop",
        "ribbon",
        "column",
        "helical",
        "star-path",
        "star-solid",
        "zigzag",
    ] {
        harness.state().send(Command::New(kind));
        // Every input without a name makes this panic.
        harness.run();
        let state = harness.state().state();
        assert_eq!(state.shape().start.kind(), kind);
        assert!(
            state.derived.totals.panels > 3,
            "{kind}: {}",
            state.derived.totals.panels
        );
        assert_eq!(state.message, None, "{kind}");
        let stops: Vec<&String> = state.derived.texts.iter().collect();
        let stop = state
            .derived
            .findings
            .iter()
            .any(|f| f.level() == zonewright_geometry::Level::Stop);
        assert!(!stop, "{kind}: {stops:?}");
    }
}

#[test]
fn the_search_finds_a_command_and_enter_sends_it() {
    let mut harness = open(zigzag());
    harness.key_press_modifiers(egui::Modifiers::COMMAND, egui::Key::K);
    harness.run();
    harness.get_by_label("Name of a command").type_text("light");
    harness.run();
    harness.key_press(egui::Key::Enter);
    harness.run();
    assert!(harness.state().state().view.dark);
    assert_eq!(harness.state().state().search, None);
}

#[test]
fn export_writes_the_files_that_the_shop_makes() {
    let folder = tempfile::tempdir().unwrap();
    let mut harness = open(polar(None));
    harness.state().send(Command::ExportTo(folder.path().join("bench")));
    harness.run();
    assert_eq!(harness.state().state().message, None);
    for file in zonewright_shop::FILES {
        assert!(folder.path().join("bench").join(file.name).is_file(), "{}", file.name);
    }
}

#[test]
fn a_finding_is_shown_in_the_picture() {
    // With twice the turn equal to the ribs, panels coincide in pairs (common fact of these solids; derived by symmetry).
    let form = zonewright_geometry::start::HelicalForm {
        ribs: 4,
        turn: 2,
        pitch: Angle::from_degrees(40.0),
        edge_mm: 400.0,
    };
    let mut harness = open(new_design(Start::Helical(form), None, Spurs::default()).unwrap());
    let before = harness.state().pictures();
    harness.get_by_label("Show finding 1").click();
    harness.run();
    assert_eq!(harness.state().state().view.finding, Some(0));
    assert!(harness.state().pictures() > before);
    harness.get_by_label("Hide finding 1").click();
    harness.run();
    assert_eq!(harness.state().state().view.finding, None);
}
