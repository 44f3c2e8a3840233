//! Playing and writing animations.

use egui_kittest::kittest::Queryable;
use zonewright::{
    animation::Subject,
    window::{AnimateAct, Command, Wish},
};

use crate::common::{open, polar};

fn act(harness: &egui_kittest::Harness<'_, zonewright::window::App>, act: AnimateAct) {
    harness.state().send(Command::Animate(act));
}

#[test]
fn the_growth_plays_course_by_course_and_escape_ends_it() {
    let mut harness = open(polar(Some(3)));
    harness.get_by_label("Animation").click();
    harness.run();
    let before = harness.state().state().design().clone();
    harness.get_by_label("Play").click();
    harness.run_steps(2);
    let playing = harness.state().state().animating.playing.as_ref();
    // Three courses are three frames.
    assert_eq!(playing.map(|p| p.at()), Some((0, 3)));
    harness.key_press(egui::Key::Escape);
    harness.run_steps(2);
    let state = harness.state().state();
    assert!(state.animating.playing.is_none());
    assert_eq!(state.design(), &before, "playing changes nothing");
}

#[test]
fn a_change_of_the_design_ends_what_plays() {
    let mut harness = open(polar(Some(3)));
    act(&harness, AnimateAct::Play);
    harness.run_steps(2);
    assert!(harness.state().state().animating.playing.is_some());
    harness.state().send(Command::AddCourse);
    harness.run_steps(2);
    assert!(harness.state().state().animating.playing.is_none());
}

#[test]
fn a_sweep_is_chosen_by_its_fields_and_written_into_a_file() {
    let folder = tempfile::tempdir().unwrap();
    let file = folder.path().join("pitch.gif");
    let mut harness = open(polar(Some(1)));
    let wish = Wish {
        subject: Subject::Sweep {
            key: "start.pitch".to_owned(),
            from: 20.0,
            to: 50.0,
            frames: 3,
        },
        rate: 24,
        back: false,
    };
    act(&harness, AnimateAct::Wish(wish));
    act(&harness, AnimateAct::SaveTo(file.clone()));
    harness.run_steps(3);
    let state = harness.state().state();
    assert!(state.status.contains("pitch.gif"), "{}", state.status);
    let bytes = std::fs::read(&file).unwrap();
    assert_eq!(&bytes[..6], b"GIF89a");
}

#[test]
fn a_value_that_cannot_be_is_said_and_nothing_plays() {
    let mut harness = open(polar(Some(1)));
    let wish = Wish {
        subject: Subject::Sweep {
            key: "start.pitch".to_owned(),
            from: 20.0,
            to: 120.0,
            frames: 5,
        },
        rate: 24,
        back: false,
    };
    act(&harness, AnimateAct::Wish(wish));
    act(&harness, AnimateAct::Play);
    harness.run_steps(2);
    let state = harness.state().state();
    assert!(state.animating.playing.is_none());
    let said = state.message.as_ref().map_or("", |m| m.text.as_str());
    assert!(said.contains("start.pitch"), "{said}");
}
