//! Several views of one shell: each with its own camera, its own bar and its own accessible name.

use egui::{Key, Modifiers, PointerButton};
use egui_kittest::{Harness, kittest::Queryable};
use zonewright::window::{App, Command, Layout, PICTURE, Pane, PaneAct};
use zonewright_painter::{Projection, View};

use crate::common::{drag, open, point, polar, zigzag};

const NAMES: [&str; 4] = [PICTURE, "Plan picture", "Front picture", "Side picture"];

fn four() -> Harness<'static, App> {
    let mut harness = open(zigzag());
    harness.state().send(Command::Pane(PaneAct::LayOut(Layout::Four)));
    harness.run();
    harness
}

fn pane(harness: &Harness<'_, App>, at: usize) -> Pane {
    harness.state().state().panes.pane(at).clone()
}

fn active(harness: &Harness<'_, App>) -> usize {
    harness.state().state().panes.active()
}

/// Where a point stands in the window, in one of the panes.
fn place(harness: &Harness<'_, App>, at: usize, of: zonewright_geometry::Point) -> egui::Pos2 {
    let seen = pane(harness, at).camera.project(of).unwrap();
    harness.get_by_label(NAMES[at]).rect().min + egui::Vec2::from(seen.pos)
}

/// A place of a pane where there is only ground.
fn ground(harness: &Harness<'_, App>, at: usize) -> egui::Pos2 {
    harness.get_by_label(NAMES[at]).rect().right_bottom() - egui::vec2(4.0, 4.0)
}

#[test]
fn a_button_shows_four_views_that_share_the_window_and_show_the_whole_shell() {
    let mut harness = open(polar(Some(2)));
    let alone = harness.get_by_label(PICTURE).rect();
    assert!(harness.query_by_label("Plan picture").is_none());
    harness.get_by_label("Four views").click();
    harness.run();
    let rects = NAMES.map(|name| harness.get_by_label(name).rect());
    for (at, rect) in rects.iter().enumerate() {
        assert!(alone.contains_rect(*rect), "{at}: {rect:?} in {alone:?}");
        assert!(rect.area() > alone.area() * 0.22, "{at}: {rect:?}");
        for other in &rects[..at] {
            assert!(!rect.intersects(*other), "{rect:?} {other:?}");
        }
        let camera = pane(&harness, at).camera;
        assert_eq!(camera.size, [rect.width(), rect.height()]);
        for p in &harness.state().state().derived.shell.points {
            let seen = egui::Vec2::from(camera.project(*p).unwrap().pos);
            assert!(
                seen.min_elem() >= 0.0 && (rect.size() - seen).min_elem() >= 0.0,
                "{at}: {seen:?}"
            );
        }
    }
    // A front stands under its plan and a side beside its front.
    assert!(rects[2].min.y > rects[1].max.y && rects[3].min.x > rects[2].max.x);
    harness.get_by_label("One view").click();
    harness.run();
    assert_eq!(harness.get_by_label(PICTURE).rect(), alone);
}

#[test]
fn the_ground_of_a_drawing_moves_it_and_the_ground_of_the_free_view_turns_it() {
    let mut harness = four();
    let before = [0, 1].map(|at| pane(&harness, at).camera);
    let at = ground(&harness, 1);
    drag(&mut harness, at, egui::vec2(-30.0, -20.0));
    let moved = pane(&harness, 1);
    assert_eq!(active(&harness), 1);
    assert_eq!(
        (moved.camera.azimuth, moved.camera.elevation, moved.view),
        (before[1].azimuth, before[1].elevation, Some(View::Plan))
    );
    let meant = before[1].target + -before[1].move_in_view_plane(before[1].target, -30.0, -20.0);
    assert!(moved.camera.target.distance(meant) < 1e-6, "{moved:?}");
    assert_eq!(pane(&harness, 0).camera, before[0], "the other views stay");
    let at = ground(&harness, 0);
    drag(&mut harness, at, egui::vec2(-30.0, -20.0));
    let turned = pane(&harness, 0).camera;
    assert!((turned.azimuth.degrees() - before[0].azimuth.degrees() - 12.0).abs() < 1e-4);
    assert_eq!(turned.target, before[0].target);
    assert_eq!(pane(&harness, 1), moved);
}

#[test]
fn a_drawing_is_turned_only_on_purpose_and_is_then_a_free_view() {
    let mut harness = four();
    let from = ground(&harness, 2);
    harness.hover_at(from);
    harness.run_steps(1);
    let button = |harness: &mut Harness<'_, App>, pos, pressed| {
        harness.event(egui::Event::PointerButton {
            pos,
            button: PointerButton::Secondary,
            pressed,
            modifiers: Modifiers::NONE,
        });
        harness.run_steps(1);
    };
    button(&mut harness, from, true);
    for step in 1..=10 {
        harness.hover_at(from - egui::vec2(4.0, 2.0) * step as f32);
        harness.run_steps(1);
    }
    button(&mut harness, from - egui::vec2(40.0, 20.0), false);
    harness.run();
    let turned = pane(&harness, 2);
    assert_eq!(turned.view, None);
    assert!(
        (turned.camera.azimuth.degrees() + 90.0 - 16.0).abs() < 1.7,
        "{turned:?}"
    );
    harness.get_by_label("Free picture");
    // Its own bar brings the front back.
    harness.get_by_label("View: Free picture").click();
    harness.run();
    harness
        .get_by_role_and_label(egui::accesskit::Role::Button, "Front")
        .click();
    harness.run();
    let back = pane(&harness, 2);
    assert!(back.is_measured() && back.view == Some(View::Front), "{back:?}");
}

#[test]
fn keys_act_on_the_view_under_the_pointer_and_else_on_the_active_one() {
    let mut harness = four();
    let before = [0, 1, 2, 3].map(|at| pane(&harness, at));
    let at = ground(&harness, 3);
    harness.hover_at(at);
    harness.run();
    harness.key_press_modifiers(Modifiers::COMMAND, Key::Num1);
    harness.run();
    assert_eq!((pane(&harness, 3).view, active(&harness)), (Some(View::Plan), 3));
    harness.get_by_label("Plan picture 2");
    for (at, before) in before.iter().enumerate().take(3) {
        assert_eq!(pane(&harness, at), *before, "{at}");
    }
    // With the pointer elsewhere: the pane that was called by key.
    harness.hover_at(egui::pos2(5.0, 5.0));
    harness.run();
    harness.key_press(Key::F6);
    harness.run();
    assert_eq!(active(&harness), 0);
    harness.key_press_modifiers(Modifiers::COMMAND, Key::Num2);
    harness.run();
    assert_eq!(pane(&harness, 0).view, Some(View::Front));
    assert_eq!(pane(&harness, 0).camera.projection, Projection::Parallel);
    // The keyboard is there too: an arrow moves the drawing along.
    let target = pane(&harness, 0).camera.target;
    harness.key_press(Key::ArrowRight);
    harness.run();
    let after = pane(&harness, 0).camera;
    assert_ne!(after.target, target);
    assert_eq!(pane(&harness, 0).view, Some(View::Front));
}

#[test]
fn a_point_is_dragged_in_a_drawing_and_the_drag_stays_in_its_plane() {
    let mut harness = four();
    crate::common::snap_off(&mut harness);
    let old = point(harness.state(), 2);
    let camera = pane(&harness, 1).camera;
    let at = place(&harness, 1, old);
    drag(&mut harness, at, egui::vec2(18.0, -11.0));
    let moved = point(harness.state(), 2);
    let meant = old + camera.move_in_view_plane(old, 18.0, -11.0);
    assert!(moved.distance(meant) < 1e-6, "{moved:?} instead of {meant:?}");
    assert!((moved.0.z - old.0.z).abs() < 1e-9, "a plan leaves heights alone");
    harness.state().send(Command::Undo);
    harness.run();
    assert_eq!(point(harness.state(), 2), old, "one undo takes the whole drag back");
}

#[test]
fn growth_is_followed_in_every_view_that_was_left_alone() {
    let mut harness = four();
    harness.state().send(Command::Pane(PaneAct::Activate(1)));
    harness.state().send(Command::Pan(egui::vec2(30.0, 0.0)));
    harness.run();
    let before = [0, 1, 2, 3].map(|at| pane(&harness, at).camera);
    harness.state().send(Command::AddCourse);
    harness.run();
    let after = [0, 1, 2, 3].map(|at| pane(&harness, at).camera);
    assert_eq!(after[1], before[1], "moved by the user: left alone");
    for at in [0, 2, 3] {
        assert_ne!(after[at], before[at], "{at}");
    }
    let pictures = harness.state().pictures();
    harness.run_steps(5);
    assert_eq!(
        harness.state().pictures(),
        pictures,
        "an idle window puts no picture together"
    );
}
