//! Panels in the window: picked, left out, put back; by accessible names, without a display.

use egui_kittest::{Harness, kittest::Queryable};
use zonewright::{
    document::new_design,
    window::{App, Command, PICTURE},
};
use zonewright_geometry::{Angle, Code, FinishAct, Point, Spurs, Start, start::HelicalForm};

use crate::common::{open, polar};

fn middle(app: &App, panel: u32) -> Point {
    let [a, _, c, _] = app.state().derived.shell.corner_points(panel);
    a + (c - a) * 0.5
}

fn click_panel(harness: &mut Harness<'_, App>, panel: u32) {
    let corner = harness.get_by_label(PICTURE).rect().min;
    let seen = harness
        .state()
        .state()
        .camera()
        .project(middle(harness.state(), panel))
        .unwrap();
    let at = corner + egui::Vec2::from(seen.pos);
    harness.hover_at(at);
    harness.run();
    harness.drag_at(at);
    harness.run();
    harness.drop_at(at);
    harness.run();
}

fn panels(harness: &Harness<'_, App>) -> usize {
    harness.state().state().derived.totals.panels
}

#[test]
fn a_clicked_panel_is_shown_left_out_and_put_back() {
    let mut harness = open(polar(Some(1)));
    harness.state().send(Command::Look(zonewright_painter::View::Plan));
    harness.run();
    let before = harness.state().state().design().clone();
    assert_eq!(panels(&harness), 8, "one a rib");
    click_panel(&mut harness, 3);
    let name = harness.state().state().derived.shell.panel_name(3);
    assert_eq!(harness.state().state().view.panel, Some((3, name.clone())));
    let mark = harness.state().state().derived.parts.panels[3].mark;
    harness.get_by_label(&format!("Place mark: {mark}"));
    harness.get_by_label("Leave this panel out").click();
    harness.run();
    assert_eq!(panels(&harness), 7);
    let finish = harness.state().state().shape().finish.clone();
    assert_eq!(finish.len(), 1);
    assert_eq!(finish[0].act, FinishAct::Drop(vec![name]));
    assert_eq!(harness.state().state().view.panel, None);
    // Another one goes into the same step.
    click_panel(&mut harness, 0);
    harness.get_by_label("Leave this panel out").click();
    harness.run();
    assert_eq!((panels(&harness), harness.state().state().shape().finish.len()), (6, 1));
    harness.get_by_label("Finishing step 1 on").click();
    harness.run();
    assert_eq!(panels(&harness), 8, "a step that is off leaves nothing out");
    harness.get_by_label("Finishing step 1 on").click();
    harness.run();
    harness.get_by_label("Finishing step 1: 2 panels left out, on").click();
    harness.run();
    harness.get_by_label("Put back panel 1 of finishing step 1").click();
    harness.run();
    assert_eq!(panels(&harness), 7);
    harness.get_by_label("Put back panel 1 of finishing step 1").click();
    harness.run();
    assert_eq!(harness.state().state().design(), &before, "an empty step goes");
    for _ in 0..2 {
        harness.state().send(Command::Undo);
    }
    harness.run();
    assert_eq!(panels(&harness), 6);
    harness.get_by_label("Finishing step 1: 2 panels left out, on").click();
    harness.run();
    harness.get_by_label("Delete finishing step 1").click();
    harness.run();
    assert_eq!(harness.state().state().design(), &before);
    harness.state().state().history.check().unwrap();
}

#[test]
fn a_second_click_and_escape_let_a_panel_go() {
    let mut harness = open(polar(Some(1)));
    harness.state().send(Command::Look(zonewright_painter::View::Plan));
    harness.run();
    click_panel(&mut harness, 2);
    assert!(harness.state().state().view.panel.is_some());
    click_panel(&mut harness, 2);
    assert_eq!(harness.state().state().view.panel, None);
    click_panel(&mut harness, 2);
    harness.key_press(egui::Key::Escape);
    harness.run();
    assert_eq!(harness.state().state().view.panel, None);
    assert!(harness.query_by_label("Leave this panel out").is_none());
}

#[test]
fn one_of_two_doubled_panels_is_left_out_by_its_finding() {
    // With twice the turn equal to the ribs, panels coincide in pairs (common fact of these solids; derived by symmetry).
    let form = HelicalForm {
        ribs: 4,
        turn: 2,
        pitch: Angle::from_degrees(40.0),
        edge_mm: 400.0,
    };
    let mut harness = open(new_design(Start::Helical(form), None, Spurs::default()).unwrap());
    let doubled = |h: &Harness<'_, App>| {
        let findings = &h.state().state().derived.findings;
        findings.iter().filter(|f| f.code == Code::DoubledPanel).count()
    };
    let findings = &harness.state().state().derived.findings;
    let at = findings.iter().position(|f| f.code == Code::DoubledPanel).unwrap();
    let (count, all) = (doubled(&harness), panels(&harness));
    harness
        .get_by_label(&format!("Leave one out: finding {}", at + 1))
        .click();
    harness.run();
    assert_eq!((doubled(&harness), panels(&harness)), (count - 1, all - 1));
}

#[test]
fn a_grounded_start_whose_panels_are_all_left_out_still_has_its_path() {
    let mut harness = open(polar(Some(1)));
    for _ in 0..8 {
        harness.state().send(Command::LeaveOut(0));
        harness.run();
    }
    let derived = &harness.state().state().derived;
    assert_eq!(derived.totals.panels, 0);
    let path = derived.path.as_ref().unwrap();
    assert!(
        path.placed.iter().all(|p| p.0.abs().max_element() < 1e5),
        "{:?}",
        path.placed
    );
}
