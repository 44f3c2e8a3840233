//! Backdrops and fitting in the window, without a display.

use std::path::{Path, PathBuf};

use egui_kittest::{Harness, kittest::Queryable};
use zonewright::{
    document::{parse_design, to_text},
    window::{App, BackdropAct, Command},
};
use zonewright_geometry::{Start, fit::FitEnd};
use zonewright_painter::ColourBy;

use crate::common::{open, polar, zigzag};

/// A bowl over 4 by 3 m turned over: its height is a part of x and a part of y, added, so a translation surface meets it (derived).
fn mesh(folder: &Path) -> PathBuf {
    let height = |share: f64| 900.0 * (1.0 - (2.0 * share - 1.0).powi(2));
    let mut text = String::new();
    for j in 0..=6 {
        for i in 0..=8 {
            let (u, v) = (f64::from(i) / 8.0, f64::from(j) / 6.0);
            text.push_str(&format!("v {} {} {}\n", 4000.0 * u, 3000.0 * v, height(u) + height(v)));
        }
    }
    for j in 0..6 {
        for i in 0..8 {
            let a = 9 * j + i + 1;
            text.push_str(&format!("f {a} {} {} {}\n", a + 1, a + 10, a + 9));
        }
    }
    let file = folder.join("bowl.obj");
    std::fs::write(&file, text).unwrap();
    file
}

fn send(harness: &mut Harness<'_, App>, act: BackdropAct) {
    harness.state().send(Command::Backdrop(act));
    harness.run();
}

fn loaded(folder: &Path) -> Harness<'static, App> {
    let mut harness = open(polar(Some(2)));
    send(&mut harness, BackdropAct::LoadPath(mesh(folder)));
    harness
}

#[test]
fn a_backdrop_is_loaded_from_the_menu_shown_and_kept_by_the_design() {
    let folder = tempfile::tempdir().unwrap();
    let file = mesh(folder.path());
    let mut harness = open(polar(Some(2)));
    harness.get_by_label("File").click();
    harness.run();
    harness.get_by_label("Load a backdrop…").click();
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
    assert!(state.status.contains("96 triangles"), "{}", state.status);
    assert!(!state.derived.backdrop.wire.is_empty());
    assert_eq!(state.derived.backdrop.left.len(), state.derived.totals.panels);
    harness.get_by_label("bowl.obj");
    // Saved and opened again it is the same.
    let design = state.design();
    assert_eq!(&parse_design(&to_text(design)).unwrap(), design.as_ref());
    harness.get_by_label("Backdrop shown").click();
    harness.run();
    let state = harness.state().state();
    assert!(state.derived.backdrop.wire.is_empty() && state.design().backdrop.is_some());
    harness.state().send(Command::Undo);
    harness.state().send(Command::Undo);
    harness.run();
    assert_eq!(harness.state().state().design().backdrop, None);
}

#[test]
fn a_broken_backdrop_leaves_the_design_alone() {
    let folder = tempfile::tempdir().unwrap();
    let file = folder.path().join("broken.stl");
    std::fs::write(&file, "solid\nfacet").unwrap();
    let mut harness = open(polar(Some(1)));
    let before = harness.state().state().design().clone();
    send(&mut harness, BackdropAct::LoadPath(file));
    let state = harness.state().state();
    let said = &state.message.as_ref().unwrap().text;
    assert!(said.contains("broken.stl") && said.contains("was kept"), "{said}");
    assert_eq!(state.design(), &before);
}

#[test]
fn fitting_makes_a_translation_surface_of_the_backdrop_in_one_undo_step() {
    let folder = tempfile::tempdir().unwrap();
    let mut harness = loaded(folder.path());
    let before = harness.state().state().design().clone();
    let mut wish = harness.state().state().backdrop.wish;
    wish.parts = [8, 6];
    wish.smoothing = 0.0;
    send(&mut harness, BackdropAct::Wish(wish));
    harness.get_by_label("Fit the paths").click();
    harness.run();
    let state = harness.state().state();
    assert_eq!(state.message, None);
    assert!(matches!(state.shape().start, Start::Translation(_)));
    assert_eq!(state.derived.totals.panels, 48);
    assert_eq!(state.backdrop.end, Some(FitEnd::Settled));
    assert!(state.backdrop.history.last().unwrap().largest_mm < 1e-3);
    assert_eq!(state.history.undo_label(), Some("Fit the paths to the backdrop"));
    // The quads of the mesh are flat, as a part of x and a part of y make them: nothing is left (derived).
    assert_eq!(state.view.colour, ColourBy::Distance);
    let (_, left) = state.derived.backdrop.largest().unwrap();
    assert!(left.signed_mm.abs() < 1e-2, "{left:?}");
    harness.get_by_label("Distances by iteration");
    harness.state().send(Command::Undo);
    harness.run();
    assert_eq!(harness.state().state().design(), &before);
}

#[test]
fn the_place_of_the_largest_distance_is_shown_on_a_click() {
    let folder = tempfile::tempdir().unwrap();
    let mut harness = loaded(folder.path());
    let (panel, left) = harness.state().state().derived.backdrop.largest().unwrap();
    let most = harness.state().state().derived.backdrop.left.iter();
    assert!(most.clone().all(|l| l.signed_mm.abs() <= left.signed_mm.abs()));
    harness.get_by_label("Show the largest distance").click();
    harness.run();
    let view = &harness.state().state().view;
    assert_eq!(view.panel.as_ref().map(|(p, _)| *p), Some(panel));
    assert_eq!(view.colour, ColourBy::Distance);
    let pictures = harness.state().pictures();
    harness.get_by_label("Without side").click();
    harness.run();
    assert!(harness.state().state().view.without_sign);
    assert!(harness.state().pictures() > pictures);
}

#[test]
fn a_moved_backdrop_is_measured_anew_and_one_step() {
    let folder = tempfile::tempdir().unwrap();
    let mut harness = loaded(folder.path());
    let first = harness
        .state()
        .state()
        .derived
        .backdrop
        .largest()
        .unwrap()
        .1
        .signed_mm
        .abs();
    let mut placement = harness.state().state().design().backdrop.clone().unwrap().placement;
    placement.shift.z += 50_000.0;
    send(&mut harness, BackdropAct::Place(placement));
    let state = harness.state().state();
    let now = state.derived.backdrop.largest().unwrap().1.signed_mm.abs();
    assert!(now > first + 40_000.0, "{first} {now}");
    assert_eq!(state.history.undo_label(), Some("Place the backdrop"));
    // What cannot be: said, and not done.
    placement.scale = 0.0;
    let before = state.design().clone();
    send(&mut harness, BackdropAct::Place(placement));
    assert_eq!(harness.state().state().design(), &before);
    assert!(harness.state().state().status.contains("scale"));
}

#[test]
fn an_arch_gives_one_path() {
    let folder = tempfile::tempdir().unwrap();
    let file = folder.path().join("arch.csv");
    // A half circle of radius 2 m (derived).
    let arch: String = (0..=180)
        .map(|k| {
            let (sin, cos) = f64::from(k).to_radians().sin_cos();
            format!("{},0,{}\n", -2000.0 * cos, 2000.0 * sin)
        })
        .collect();
    std::fs::write(&file, arch).unwrap();
    let mut harness = open(zigzag());
    send(&mut harness, BackdropAct::LoadPath(file));
    let mut wish = harness.state().state().backdrop.wish;
    (wish.parts, wish.smoothing) = ([12, 3], 0.0);
    send(&mut harness, BackdropAct::Wish(wish));
    harness.get_by_label("Fit the paths").click();
    harness.run();
    let state = harness.state().state();
    assert_eq!(state.message, None);
    assert_eq!(state.derived.totals.panels, 36);
    // Chords of 15 degrees (derived): 2 r sin(7.5 degrees).
    let Start::Translation(form) = &state.shape().start else {
        panic!("a translation surface")
    };
    for edge in form.zig.edges().unwrap() {
        assert!(
            (edge.length() - 4000.0 * 7.5_f64.to_radians().sin()).abs() < 1.0,
            "{}",
            edge.length()
        );
    }
}

#[test]
fn an_idle_window_with_a_backdrop_does_no_work() {
    let folder = tempfile::tempdir().unwrap();
    let mut harness = loaded(folder.path());
    let (counts, pictures) = (harness.state().counts(), harness.state().pictures());
    for _ in 0..5 {
        harness.run_steps(1);
    }
    assert_eq!(
        (harness.state().counts(), harness.state().pictures()),
        (counts, pictures)
    );
}
