//! What can be picked in the picture, its measures, and dimensions between two picked things.

use egui::{Key, Modifiers, Pos2};
use egui_kittest::{Harness, kittest::Queryable};
use zonewright::window::{App, Command, Kind, Layout, PICTURE, PaneAct, PathEdit, SelectAct, Selection, Thing};
use zonewright_geometry::{Point, Vector, start::DragRule};

use crate::common::{open, picture_place, point, polar, zigzag};

fn click_with(harness: &mut Harness<'_, App>, at: Pos2, modifiers: Modifiers) {
    harness.hover_at(at);
    harness.run();
    for pressed in [true, false] {
        harness.event(egui::Event::PointerButton {
            pos: at,
            button: egui::PointerButton::Primary,
            pressed,
            modifiers,
        });
        harness.run();
    }
}

fn click(harness: &mut Harness<'_, App>, at: Pos2) {
    click_with(harness, at, Modifiers::NONE);
}

fn selection(harness: &Harness<'_, App>) -> Selection {
    harness.state().state().view.selection.clone()
}

/// The picked vertex or edge, by its index in the shell.
fn part(harness: &Harness<'_, App>) -> Option<(Kind, u32)> {
    let thing = selection(harness).part?;
    Some((thing.kind(), thing.index(&harness.state().state().derived)?))
}

fn place(harness: &Harness<'_, App>, of: Point) -> Pos2 {
    picture_place(harness, of)
}

/// The first vertex, edge or panel that a click in the middle of it picks: others are hidden behind the shell.
fn seen_vertex(harness: &mut Harness<'_, App>) -> (u32, Pos2) {
    let state = harness.state().state();
    let path = state.derived.path.clone().unwrap();
    let points = state.derived.shell.points.clone();
    for (vertex, of) in (0_u32..).zip(points) {
        if path.placed.iter().any(|p| p.distance(of) < 1.0) {
            continue;
        }
        let at = place(harness, of);
        click(harness, at);
        if part(harness) == Some((Kind::Vertex, vertex)) {
            return (vertex, at);
        }
    }
    panic!("no vertex can be picked");
}

#[test]
fn a_vertex_an_edge_and_a_panel_are_picked_by_a_click_and_let_go_by_another_or_by_escape() {
    let mut harness = open(polar(Some(3)));
    let (vertex, at) = seen_vertex(&mut harness);
    harness.get_by_label(&format!("Picked: Vertex {}", vertex + 1));
    harness.get_by_label_contains("Panels here: ");
    click(&mut harness, at);
    assert_eq!(part(&harness), None, "a second click lets it go");
    // An edge at that vertex, near its middle but not in it.
    let shell = harness.state().state().derived.shell.clone();
    let edge = shell.edges.iter().position(|e| e.ends.contains(&vertex)).unwrap();
    let [a, b] = shell.edges[edge].ends.map(|v| shell.points[v as usize]);
    let at = place(&harness, a + (b - a) * 0.45);
    click(&mut harness, at);
    assert_eq!(part(&harness), Some((Kind::Edge, edge as u32)));
    // Every edge of this form is a rib of 500 mm.
    harness.get_by_label("Length: 500 mm");
    let derived = &harness.state().state().derived;
    let side = derived.parts.panels.iter().flat_map(|p| &p.edges);
    let side = side.clone().find(|s| s.edge == edge as u32).unwrap();
    let fold = zonewright_shop::text::degrees(side.fold_deg().unwrap(), 2);
    harness.get_by_label(&format!("Fold: {fold}"));
    harness.key_press(Key::Escape);
    harness.run();
    assert_eq!(part(&harness), None);
    assert!(harness.query_by_label_contains("Picked: ").is_none());
}

#[test]
fn the_next_thing_of_a_kind_is_picked_by_key() {
    let mut harness = open(zigzag());
    harness.state().send(Command::Pane(PaneAct::LayOut(Layout::Two)));
    harness.run();
    harness.key_press(Key::F6);
    harness.run();
    let counts = harness.state().state().derived.totals.clone();
    for (key, kind, count) in [
        (Key::V, Kind::Vertex, counts.vertices),
        (Key::E, Kind::Edge, counts.edges),
    ] {
        for turn in 0..=count {
            harness.key_press(key);
            harness.run();
            assert_eq!(part(&harness), Some((kind, (turn % count) as u32)), "round and round");
        }
        harness.key_press_modifiers(Modifiers::SHIFT, key);
        harness.run();
        assert_eq!(part(&harness), Some((kind, count as u32 - 1)));
    }
    harness.key_press(Key::P);
    harness.run();
    assert_eq!(harness.state().state().view.panel.as_ref().map(|(p, _)| *p), Some(0));
    assert_eq!(part(&harness), None, "one thing at a time");
    harness.key_press(Key::N);
    harness.run();
    assert_eq!(harness.state().state().view.point, Some(0));
    assert_eq!(harness.state().state().view.panel, None);
}

#[test]
fn a_dimension_is_measured_by_shift_click_and_follows_the_shell() {
    let mut harness = open(zigzag());
    let before = harness.state().state().design().clone();
    let at = [0, 2].map(|k| place(&harness, point(harness.state(), k)));
    click(&mut harness, at[0]);
    click_with(&mut harness, at[1], Modifiers::SHIFT);
    // From (0, 0, 0) to (600, 0, 0).
    harness.get_by_label("Dimension 1: 600 mm");
    harness.get_by_label("dx: 600 mm");
    harness.get_by_label("dy: 0 mm");
    assert_eq!(harness.state().state().view.point, Some(0), "the first stays picked");
    // The second point goes 250 up and 300 aside: 600, 300, 250 is 716.0 long (derived: sqrt 512500).
    let to = point(harness.state(), 2) + Vector::new(0.0, 300.0, 250.0);
    let rule = DragRule::Neighbours;
    harness
        .state()
        .send(Command::Path(PathEdit::Move { point: 2, to, rule }));
    harness.run();
    let long = zonewright_shop::text::Units::Mm.length(512_500_f64.sqrt());
    harness.get_by_label(&format!("Dimension 1: {long}"));
    harness.state().send(Command::Undo);
    harness.run();
    harness.get_by_label("Dimension 1: 600 mm");
    harness.get_by_label("Dismiss dimension 1").click();
    harness.run();
    assert!(selection(&harness).dimensions.is_empty());
    assert_eq!(**harness.state().state().design(), *before, "measuring changes nothing");
}

#[test]
fn a_dimension_is_measured_by_keys_alone() {
    let mut harness = open(zigzag());
    harness.key_press(Key::F6);
    harness.key_press(Key::P);
    harness.run();
    harness.key_press_modifiers(Modifiers::COMMAND, Key::M);
    harness.run();
    harness.key_press(Key::P);
    harness.run();
    harness.key_press(Key::Enter);
    harness.run();
    let dimensions = selection(&harness).dimensions;
    assert_eq!(dimensions.len(), 1);
    assert_eq!(selection(&harness).from, None, "done");
    // (3, 0, -4) x (3, 0, 4) is along y, (0, 3, -4) x (0, 3, 4) along x: upright panels at a right angle.
    harness.get_by_label("Dimension 1: 90.00°");
    // Begun anew and let go by Escape: what is picked stays.
    harness.key_press_modifiers(Modifiers::COMMAND, Key::M);
    harness.run();
    assert!(selection(&harness).from.is_some());
    harness.key_press(Key::Escape);
    harness.run();
    assert_eq!(selection(&harness).from, None);
    assert!(harness.state().state().view.panel.is_some());
}

#[test]
fn a_dimension_waits_while_its_panel_is_gone_and_comes_back_with_it() {
    let mut harness = open(polar(Some(2)));
    let derived = &harness.state().state().derived;
    let last = derived.shell.panels.len() as u32 - 1;
    let [a, b] = [0, last].map(|p| Kind::Panel.thing(derived, p).unwrap());
    harness.state().send(Command::Select(SelectAct::Pick(a)));
    harness.state().send(Command::Select(SelectAct::MeasureTo(b)));
    harness.run();
    let said = |h: &Harness<'_, App>| format!("{:?}", h.get_by_label_contains("Dimension 1: "));
    let before = said(&harness);
    harness.state().send(Command::RemoveCourse);
    harness.run();
    harness.get_by_label("Dimension 1: gone for now");
    harness.state().send(Command::AddCourse);
    harness.run();
    assert_eq!(said(&harness), before);
    // Inside out, the same edge is still the same edge.
    let derived = &harness.state().state().derived;
    let edge = Kind::Edge.thing(derived, 9).unwrap();
    let vertex = Kind::Vertex.thing(derived, 7).unwrap();
    let places = |h: &Harness<'_, App>, t: &Thing| t.figure(&h.state().state().derived).unwrap().middle();
    let meant = [places(&harness, &edge), places(&harness, &vertex)];
    harness.state().send(Command::Select(SelectAct::Pick(edge)));
    harness.state().send(Command::Select(SelectAct::MeasureTo(vertex)));
    harness.run();
    harness.state().send(Command::FlipOutside);
    harness.run();
    let ends = selection(&harness).dimensions[1].ends.clone();
    for (end, meant) in ends.iter().zip(meant) {
        assert!(places(&harness, end).distance(meant) < 1e-6, "{end:?}");
    }
}

#[test]
fn a_picked_point_takes_typed_numbers_in_inches_with_fractions() {
    let mut harness = open(zigzag());
    let at = place(&harness, point(harness.state(), 2));
    click(&mut harness, at);
    harness.get_by_label("inch").click();
    harness.run();
    harness.get_by_label("Picked point z").click();
    harness.run();
    harness.get_by_label("Picked point z").type_text("4 3/8");
    harness.key_press(Key::Enter);
    harness.run();
    let z = point(harness.state(), 2).0.z;
    assert!((z - 4.375 * 25.4).abs() < 1e-9, "{z}");
    assert_eq!(harness.state().state().history.undo_label(), Some("Move a point"));
    harness.state().send(Command::Undo);
    harness.run();
    assert_eq!(point(harness.state(), 2).0.z, 0.0);
}

#[test]
fn hovering_shows_what_a_click_would_pick_and_puts_no_picture_together() {
    let mut harness = open(polar(Some(2)));
    let corner = harness.get_by_label(PICTURE).rect().center();
    harness.hover_at(corner);
    harness.run();
    let pictures = harness.state().pictures();
    let design = harness.state().state().design().clone();
    for step in 0..12 {
        harness.hover_at(corner + egui::vec2(4.0 * step as f32, 3.0 * step as f32));
        harness.run_steps(2);
    }
    // Open Vs have a preview in the picture; there are none near the middle.
    assert_eq!(harness.state().pictures(), pictures);
    assert_eq!(*harness.state().state().design(), design);
}
