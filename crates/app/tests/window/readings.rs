//! Readouts that show where their extremes are, spreads, a remembered state, remedies of findings.

use egui_kittest::kittest::{NodeT, Queryable};
use zonewright::{
    document::new_design,
    window::{Command, End, Shown},
};
use zonewright_geometry::{
    Act, Code, Point, Role, Spurs, Start, Vector,
    start::{FreeLetter, FreePath, FreeVector},
};
use zonewright_shop::spread::Measure;

use crate::common::{open, polar, zigzag};

/// A dome of eight ribs, one course, has one kind of panel; until still it has four kinds and the sharpest ridge somewhere.
#[test]
fn the_ends_of_a_range_show_where_they_are() {
    let mut harness = open(polar(None));
    let derived = &harness.state().state().derived;
    let range = derived.totals.acute_angles.unwrap();
    let least = zonewright_shop::text::degrees(range.least.to_degrees(), 2);
    harness
        .get_by_label(&format!("Acute angles, smallest: {least}"))
        .click();
    harness.run();
    let shown = harness.state().state().view.shown;
    assert_eq!(shown, Some(Shown::Extreme(Measure::AcuteAngles, End::Least)));
    // A second click hides it again.
    harness
        .get_by_label(&format!("Acute angles, smallest: {least}"))
        .click();
    harness.run();
    assert_eq!(harness.state().state().view.shown, None);
}

#[test]
fn a_bar_of_a_spread_counts_and_shows_its_edges() {
    let mut harness = open(polar(None));
    harness.get_by_label("Spread").click();
    harness.run();
    // All sides of a polar form are as long as its ribs, 500 mm; eight ribs grow 56 panels with 112 edges (n(n-1) panels).
    let bars: Vec<_> = harness
        .query_all_by_label_contains("Sides from ")
        .filter_map(|bar| bar.accesskit_node().label())
        .collect();
    let [bar] = &bars[..] else { panic!("one bar: {bars:?}") };
    assert!(bar.ends_with(": 112 edges"), "{bar}");
    let bar = bar.clone();
    harness.get_by_label(&bar).click();
    harness.run();
    assert_eq!(
        harness.state().state().view.shown,
        Some(Shown::Class(Measure::Sides, 0))
    );
}

#[test]
fn a_remembered_state_is_compared_with_and_gone_back_to_in_one_undo_step() {
    let mut harness = open(polar(Some(2)));
    let before = harness.state().state().design().clone();
    harness.get_by_label("Remember this state").click();
    harness.run();
    assert!(harness.query_by_label_contains("since remembered").is_none());
    harness.state().send(Command::AddCourse);
    harness.run();
    // One course of a form of eight ribs has eight panels.
    harness.get_by_label("Panels since remembered: +8");
    harness.get_by_label("Go back to the remembered state").click();
    harness.run();
    assert_eq!(harness.state().state().design(), &before);
    assert!(harness.query_by_label_contains("since remembered").is_none());
    harness.state().send(Command::Undo);
    harness.run();
    harness.get_by_label("Panels since remembered: +8");
    harness.get_by_label("Forget the remembered state").click();
    harness.run();
    assert!(harness.query_by_label_contains("since remembered").is_none());
}

/// A square of edges that misses its first point by 3 mm.
#[test]
fn a_gap_is_shared_out_by_the_button_of_its_finding() {
    let edges = [
        (400.0, 0.0, -300.0, Role::Zig),
        (0.0, 400.0, 300.0, Role::Zag),
        (-400.0, 0.0, -300.0, Role::Zig),
        (0.0, -397.0, 300.0, Role::Zag),
    ];
    let letters = (0..).zip(edges).map(|(id, (x, y, z, role))| FreeLetter {
        id,
        vector: FreeVector::Own(Vector::new(x, y, z)),
        role,
    });
    let path = FreePath {
        origin: Point::ORIGIN,
        closed: true,
        letters: letters.collect(),
    };
    let mut harness = open(new_design(Start::Zigzag(path), Some(1), Spurs::default()).unwrap());
    let has_gap = |h: &egui_kittest::Harness<'_, zonewright::window::App>| {
        let findings = &h.state().state().derived.findings;
        findings.iter().any(|f| f.code == Code::ClosingGap)
    };
    assert!(has_gap(&harness));
    harness.get_by_label_contains("Share out the gap: finding").click();
    harness.run();
    assert!(!has_gap(&harness));
    harness.state().send(Command::Undo);
    harness.run();
    assert!(has_gap(&harness), "one undo step");
}

#[test]
fn a_front_that_can_be_filled_to_nothing_offers_to_close_its_rim() {
    // The first word of a polar form goes round once as zig and once as zag: its zones cancel. Its spurs are held at the pole.
    let mut design = polar(None);
    for step in &mut design.shape.steps {
        if let Act::Lay { spurs, .. } = &mut step.act {
            *spurs = Spurs::Hold;
        }
    }
    let mut harness = open(design);
    let steps = harness.state().state().shape().steps.len();
    harness.get_by_label("Close the rim");
    harness.get_by_label("Retract the spurs").click();
    harness.run();
    let state = harness.state().state();
    assert_eq!(state.shape().steps.len(), steps + 1);
    assert_eq!(state.shape().steps[steps].act, Act::Retract);
    assert!(harness.query_by_label("Retract the spurs").is_none(), "none is left");
}

#[test]
fn a_step_that_found_nothing_is_switched_off_by_its_button() {
    let mut design = zigzag();
    let step = zonewright_geometry::Step {
        id: design.shape.next_step_id(),
        name: None,
        on: true,
        side: zonewright_geometry::Side::Fore,
        act: Act::Retract,
    };
    design.shape.steps.push(step);
    let mut harness = open(design);
    harness.get_by_label_contains("Switch the step off: finding").click();
    harness.run();
    let state = harness.state().state();
    assert!(!state.shape().steps[1].on);
    assert!(!state.derived.findings.iter().any(|f| f.code == Code::StepFoundNothing));
}
