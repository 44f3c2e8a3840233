//! The first shell: its five steps on the real controls, by accessible names, and the ways to leave it.

use egui::{Key, Modifiers, Rect, Role, Shape};
use egui_kittest::{Harness, kittest::Queryable};
use zonewright::window::{App, Command, GuideAct, Unsaved};
use zonewright_geometry::Start;

use crate::common::{open, polar};

/// The step that one is at, from 0.
fn at(harness: &Harness<'_, App>) -> Option<usize> {
    harness.state().state().guide.going.as_ref().map(|going| going.at)
}

/// Whether an outline in the colour of what is live is drawn just round a control.
fn is_outlined(harness: &Harness<'_, App>, control: Rect) -> bool {
    let accent = harness.state().state().colours().accent();
    harness.output().shapes.iter().any(|clipped| match &clipped.shape {
        Shape::Rect(shape) => {
            let strokes = shape.stroke.color == accent && shape.stroke.width == 2.0;
            strokes && shape.rect.contains_rect(control) && clipped.clip_rect.intersects(control)
        }
        _ => false,
    })
}

fn of_role(harness: &Harness<'_, App>, role: Role, name: &str) -> Rect {
    harness.get_by_role_and_label(role, name).rect()
}

fn click(harness: &mut Harness<'_, App>, role: Role, name: &str) {
    harness.get_by_role_and_label(role, name).click();
    harness.run();
}

fn begin(harness: &mut Harness<'_, App>) {
    harness.get_by_label("Help").click();
    harness.run();
    harness.get_by_label("First shell").click();
    harness.run();
}

#[test]
fn the_five_steps_are_done_on_the_real_controls() {
    let folder = tempfile::tempdir().unwrap();
    let file = folder.path().join("first.ron");
    let mut harness = open(polar(Some(2)));
    begin(&mut harness);
    assert_eq!(at(&harness), Some(0), "a polar start of before does not count");
    assert_eq!(harness.state().state().derived.totals.panels, 0);
    harness.get_by_label("First shell, step 1 of 5");
    harness.get_by_label("Nothing has grown yet.");

    assert!(is_outlined(&harness, of_role(&harness, Role::ComboBox, "Kind")));
    click(&mut harness, Role::ComboBox, "Kind");
    harness.get_by_label("Polar form").click();
    harness.run();
    harness.get_by_label("First shell, step 2 of 5");

    let ribs = of_role(&harness, Role::SpinButton, "Ribs");
    assert!(is_outlined(&harness, ribs));
    assert!(!is_outlined(&harness, of_role(&harness, Role::ComboBox, "Kind")));
    click(&mut harness, Role::SpinButton, "Ribs");
    harness.key_press_modifiers(Modifiers::COMMAND, Key::A);
    harness.run();
    harness.event(egui::Event::Text("9".to_owned()));
    harness.run();
    harness.key_press(Key::Enter);
    harness.run();
    let Start::Polar(form) = &harness.state().state().shape().start else {
        panic!("a polar start")
    };
    assert_eq!(form.ribs, 9);
    harness.get_by_label("First shell, step 3 of 5");

    assert!(is_outlined(&harness, of_role(&harness, Role::Button, "Add a course")));
    for _ in 0..2 {
        assert_eq!(at(&harness), Some(2));
        click(&mut harness, Role::Button, "Add a course");
    }
    harness.get_by_label("First shell, step 4 of 5");

    let v = harness.get_by_label("Open V 3").rect();
    assert!(is_outlined(&harness, v));
    harness.get_by_label("Open V 3").click();
    harness.run();
    harness.get_by_label("First shell, step 5 of 5");

    for name in ["Findings", "File"] {
        assert!(is_outlined(&harness, harness.get_by_label(name).rect()), "{name}");
    }
    harness.key_press_modifiers(Modifiers::COMMAND, Key::S);
    harness.run();
    harness.get_by_label("File path").focus();
    harness.key_press_modifiers(Modifiers::COMMAND, Key::A);
    harness.run();
    harness.get_by_label("File path").type_text(file.to_str().unwrap());
    harness.run();
    harness.key_press(Key::Enter);
    harness.run();
    assert!(file.is_file(), "{}", harness.state().state().status);
    assert_eq!(at(&harness), Some(5), "all are done");
    harness.get_by_label("First shell");
    harness.get_by_label("Close the first shell").click();
    harness.run();
    assert_eq!(at(&harness), None);
}

#[test]
fn it_is_left_by_escape_or_its_button_and_the_design_stays() {
    let mut harness = open(polar(Some(2)));
    for by_key in [true, false] {
        begin(&mut harness);
        harness.state().send(Command::SetKind("loop"));
        harness.run();
        let design = harness.state().state().design().clone();
        if by_key {
            harness.key_press(Key::Escape);
        } else {
            harness.get_by_label("Leave the first shell").click();
        }
        harness.run();
        assert_eq!(at(&harness), None);
        assert_eq!(harness.state().state().design(), &design);
        harness.state().send(Command::Undo);
        harness.run();
    }
}

#[test]
fn it_asks_about_unsaved_changes_before_it_begins() {
    let mut harness = open(polar(Some(2)));
    harness.state().send(Command::AddCourse);
    harness.run();
    let design = harness.state().state().design().clone();
    begin(&mut harness);
    harness.get_by_label("Unsaved changes");
    harness.state().send(Command::Unsaved(Unsaved::Stay));
    harness.run();
    assert_eq!((at(&harness), harness.state().state().design()), (None, &design));
    begin(&mut harness);
    harness.state().send(Command::Unsaved(Unsaved::Discard));
    harness.run();
    assert_eq!(at(&harness), Some(0));
}

#[test]
fn every_step_is_noticed_by_the_design_whichever_way_it_came() {
    let mut harness = open(polar(Some(2)));
    harness.state().send(Command::Guide(GuideAct::Begin));
    harness.run();
    harness.state().send(Command::SetKind("polar"));
    harness.run();
    assert_eq!(at(&harness), Some(1));
    // Laid before they are asked for: they count once the parameters were changed.
    harness.state().send(Command::LayUntilStill);
    harness.run();
    assert_eq!(at(&harness), Some(1));
    let start = polar(None).shape.start;
    harness.state().send(Command::SetStart(Box::new(start), "the ribs"));
    harness.run();
    assert_eq!(at(&harness), Some(3));
    // A still front has no open V to splice at: the card says how to get one.
    assert!(is_outlined(&harness, of_role(&harness, Role::Button, "Add a course")));
    harness.state().send(Command::RemoveCourse);
    harness.run();
    let v = harness.get_by_label("Open V 1").rect();
    assert!(is_outlined(&harness, v));
}

#[test]
fn an_empty_picture_says_what_to_do_and_offers_it() {
    let mut design = polar(Some(1));
    design.shape.steps.clear();
    let mut harness = open(design);
    harness.get_by_label("Nothing has grown yet.");
    harness.get_by_label("Add a course to fill every open V at once.");
    harness.get_by_label("Make a first shell").click();
    harness.run();
    assert_eq!(at(&harness), Some(0));
}

#[test]
fn whoever_opens_the_window_for_the_first_time_is_offered_it() {
    let mut harness = Harness::builder()
        .with_size([1280.0, 800.0])
        .build_eframe(|cc| App::new_headless(&cc.egui_ctx, polar(Some(2))).with_offer(true));
    harness.run();
    harness.get_by_label("Make a first shell");
    harness.get_by_label("Close the offer").click();
    harness.run();
    assert!(harness.query_by_label("Make a first shell").is_none());
    assert!(!harness.state().state().guide.offered);
}
