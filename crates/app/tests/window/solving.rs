//! Solving for wanted figures, by accessible names.

use egui_kittest::{Harness, kittest::Queryable};
use zonewright::window::{App, Command, SolveAct};
use zonewright_geometry::{parameter::parameter, solve::Figure};

use crate::common::{open, polar};

fn value(harness: &Harness<'_, App>, key: &str) -> f64 {
    parameter(harness.state().state().shape(), key).unwrap().value
}

fn height(harness: &Harness<'_, App>) -> f64 {
    harness.state().state().derived.totals.size.z
}

fn click(harness: &mut Harness<'_, App>, name: &str) {
    harness.get_by_label(name).scroll_to_me();
    harness.run();
    harness.get_by_label(name).click();
    harness.run();
}

/// Types into a field as a user does: click it, replace the text, press Enter.
fn type_into(harness: &mut Harness<'_, App>, name: &str, text: &str) {
    click(harness, name);
    harness.get_by_label(name).type_text(text);
    harness.run();
    harness.key_press(egui::Key::Enter);
    harness.run();
}

fn unfold(harness: &mut Harness<'_, App>) {
    click(harness, "Solve for");
}

/// A whole form of eight ribs of 500 mm at 35 degrees.
fn whole() -> Harness<'static, App> {
    let mut harness = open(polar(None));
    unfold(&mut harness);
    harness
}

#[test]
fn a_wanted_height_is_solved_as_one_undo_step() {
    let mut harness = whole();
    let before = harness.state().state().design().clone();
    harness.get_by_label_contains("Say what the shell is to have");
    click(&mut harness, "Want a figure");
    // 8 * 500 * sin 35.
    let now = 4000.0 * 35.0_f64.to_radians().sin();
    assert!((harness.state().state().solving.wants[0].value - now).abs() < 1e-6);
    harness.get_by_label("Figure 1: 2294.3 mm now");
    type_into(&mut harness, "Wanted value 1", "3000");
    click(&mut harness, "Let Pitch change");
    click(&mut harness, "Solve for the wanted figures");
    // asin(3 / 4).
    assert!((height(&harness) - 3000.0).abs() <= 0.5);
    assert!((value(&harness, "start.pitch") - 0.75_f64.asin().to_degrees()).abs() < 0.02);
    assert_eq!(value(&harness, "start.edge"), 500.0);
    assert_eq!(harness.state().state().history.undo_label(), Some("Solve for height"));
    harness.get_by_label("Height from 2294.3 mm to 3000 mm");
    harness.get_by_label_contains("Pitch from 35\u{b0} to 48.59\u{b0}");
    harness.state().send(Command::Undo);
    harness.run();
    assert_eq!(harness.state().state().design(), &before);
    // The answer belongs to the design that it made.
    assert!(harness.query_by_label("Solved.").is_none());
}

#[test]
fn what_cannot_be_says_what_would_do_and_offers_the_nearest() {
    let mut harness = whole();
    click(&mut harness, "Want a figure");
    type_into(&mut harness, "Wanted value 1", "3500");
    click(&mut harness, "Let Pitch change");
    type_into(&mut harness, "Greatest Pitch", "50");
    let before = harness.state().state().design().clone();
    click(&mut harness, "Solve for the wanted figures");
    assert_eq!(harness.state().state().design(), &before, "nothing is taken by itself");
    // 4000 sin 50 = 3064.2; 3500 needs asin(7 / 8).
    let sentence =
        "Height comes to 3064.2 mm, 435.8 mm short of 3500 mm. It needs Pitch above 50\u{b0}: 61.04\u{b0} would do.";
    harness.get_by_label_contains(sentence);
    click(&mut harness, "Take the nearest");
    assert!((value(&harness, "start.pitch") - 50.0).abs() < 1e-3);
    assert_eq!(
        harness.state().state().history.undo_label(),
        Some("Take the nearest to height")
    );
    harness.get_by_label("The nearest was taken.");
    // Without the bound it is reached: an emptied field lets it be anything.
    type_into(&mut harness, "Greatest Pitch", "any");
    click(&mut harness, "Solve for the wanted figures");
    assert!((height(&harness) - 3500.0).abs() <= 0.5);
}

#[test]
fn headroom_is_measured_where_the_fields_say_and_marked() {
    let mut harness = open(polar(Some(2)));
    unfold(&mut harness);
    let send = |harness: &mut Harness<'_, App>, act| {
        harness.state().send(Command::Solving(act));
        harness.run();
    };
    send(&mut harness, SolveAct::Add(Figure::Headroom(Default::default())));
    let pictures = harness.state().pictures();
    type_into(&mut harness, "Distance of figure 1", "500");
    assert!(harness.state().pictures() > pictures, "the mark follows");
    let Figure::Headroom(at) = harness.state().state().solving.wants[0].figure else {
        panic!("headroom")
    };
    assert_eq!(at.distance_mm, 500.0);
    type_into(&mut harness, "Wanted value 1", "1200");
    click(&mut harness, "Let Edge change");
    click(&mut harness, "Solve for the wanted figures");
    let state = harness.state().state();
    let now = zonewright_geometry::solve::figure(state.shape(), &state.derived.shell, Figure::Headroom(at));
    assert!((now.unwrap() - 1200.0).abs() <= 0.5, "{now:?}");
    click(&mut harness, "Remove figure 1");
    assert!(harness.state().state().solving.wants.is_empty());
}

#[test]
fn nothing_to_solve_says_what_is_missing() {
    let mut harness = whole();
    harness.state().send(Command::Solving(SolveAct::Run));
    harness.run();
    assert!(harness.state().state().status.contains("add one under Solve for"));
    click(&mut harness, "Want a figure");
    harness.get_by_label("Tick what may change.");
    harness.state().send(Command::Solving(SolveAct::Run));
    harness.run();
    assert!(harness.state().state().status.contains("tick parameters"));
    // Parameters of another design are passed over, not refused.
    click(&mut harness, "Let Pitch change");
    click(&mut harness, "Let Pitch change");
    assert!(harness.state().state().solving.free.is_empty());
}
