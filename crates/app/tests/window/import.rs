//! Importing a path in the window, without a display.

use egui_kittest::kittest::Queryable;
use zonewright::window::Command;
use zonewright_geometry::{Point, Start};

use crate::common::{open, polar};

#[test]
fn a_path_typed_into_the_box_becomes_the_start_in_one_undo_step() {
    let folder = tempfile::tempdir().unwrap();
    let file = folder.path().join("saddle.csv");
    std::fs::write(&file, "0,0,0\n300,0,-400\n600,0,0\n600,300,-400\n600,600,0\n").unwrap();
    let mut harness = open(polar(Some(1)));
    let before = harness.state().state().design().clone();
    harness.state().send(Command::Import);
    harness.run();
    harness.get_by_label("File path").focus();
    harness.key_press_modifiers(egui::Modifiers::COMMAND, egui::Key::A);
    harness.run();
    harness.get_by_label("File path").type_text(file.to_str().unwrap());
    harness.run();
    harness.key_press(egui::Key::Enter);
    harness.run();
    let state = harness.state().state();
    assert_eq!(state.message, None);
    let Start::Zigzag(path) = &state.shape().start else {
        panic!("free points")
    };
    let nodes = path.first_word().unwrap().nodes();
    assert_eq!(nodes.len(), 5);
    assert!(nodes[3].distance(Point::new(600.0, 300.0, -400.0)) < 1e-9);
    assert!(state.status.contains("0.1 mm"), "{}", state.status);
    harness.state().send(Command::Undo);
    harness.run();
    assert_eq!(harness.state().state().design(), &before);
}

#[test]
fn a_path_that_cannot_be_read_keeps_the_design() {
    let folder = tempfile::tempdir().unwrap();
    let mut harness = open(polar(Some(1)));
    let before = harness.state().state().design().clone();
    for (name, text) in [
        ("one.csv", "0,0,0\n"),
        ("empty.svg", "<svg"),
        ("words.dxf", "no drawing"),
    ] {
        let file = folder.path().join(name);
        std::fs::write(&file, text).unwrap();
        harness.state().send(Command::ImportPath(file));
        harness.run();
        let said = harness.state().state().message.clone().unwrap().text;
        assert!(said.contains(name) && said.contains("was kept"), "{said}");
        assert_eq!(harness.state().state().design(), &before);
        harness.state().send(Command::Dismiss);
        harness.run();
    }
}
