//! The camera that follows the growth, and the strip's count, without a display.

use std::path::Path;

use egui_kittest::{Harness, kittest::Queryable};
use zonewright::{
    document::read_design,
    window::{App, Command},
};

use crate::common::{open, polar};

#[test]
fn the_camera_follows_growth_until_the_user_moves_it() {
    let mut harness = open(polar(Some(1)));
    let camera = |h: &Harness<'_, App>| h.state().state().camera();
    let first = camera(&harness);
    for _ in 0..2 {
        harness.state().send(Command::AddCourse);
        harness.run();
    }
    let grown = camera(&harness);
    assert_ne!(grown, first);
    // The same place as a fit by hand.
    harness.state().send(Command::Look(zonewright_painter::View::Fit));
    harness.run();
    assert_eq!(camera(&harness), grown);
    harness.state().send(Command::Orbit(egui::vec2(30.0, 5.0)));
    harness.run();
    let own = camera(&harness);
    harness.state().send(Command::AddCourse);
    harness.run();
    assert_eq!(camera(&harness), own, "moved by the user: left alone");
}

#[test]
fn held_spurs_are_told_from_open_vs() {
    let file = Path::new(env!("CARGO_MANIFEST_DIR")).join("../../assets/designs/pier-head-housing.ron");
    let mut harness = open(read_design(&file).unwrap());
    let state = harness.state().state();
    let vs = state.derived.open_on(state.view.side);
    assert!(!vs.is_empty() && vs.iter().all(|v| v.degenerate), "held spurs only");
    let steps = state.shape().steps.len();
    harness.get_by_label(&format!("still: {} spurs held", vs.len()));
    harness.get_by_label("Held spur 1").click();
    harness.run();
    assert!(
        harness.state().state().shape().steps.len() > steps,
        "a click splices there too"
    );
}
