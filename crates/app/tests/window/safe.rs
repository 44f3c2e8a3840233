//! Nothing is lost: recovery, files that others change, questions, dropped files, recent files.

use std::{
    fs,
    path::{Path, PathBuf},
    sync::Arc,
};

use egui::{Key, Modifiers};
use egui_kittest::{
    Harness,
    kittest::{NodeT, Queryable},
};
use zonewright::{
    document::{Design, read_design, to_text, write_design},
    window::{App, Command, Disk, InTheWay, SafeAct, Stamp},
};

use crate::common::{drag, open, picture_place, point, polar, zigzag};

/// A window with a state folder of its own, as the program has it.
fn window(state: &Path, design: Design, path: Option<&Path>) -> Harness<'static, App> {
    let session = state.join("session.ron");
    let stamp = path.and_then(|p| Stamp::of_file(p).ok());
    let shown = path.map(Path::to_path_buf);
    let mut harness = Harness::builder()
        .with_size([1280.0, 800.0])
        .with_max_steps(20)
        .build_eframe(move |cc| {
            let app = App::new_headless(&cc.egui_ctx, design).with_path(shown);
            app.with_session(Some(session)).with_stamp(stamp)
        });
    harness.run();
    harness
}

fn send(harness: &mut Harness<'_, App>, command: Command) {
    harness.state().send(command);
    harness.run();
}

fn click(harness: &mut Harness<'_, App>, name: &str) {
    harness.get_by_label(name).click();
    harness.run();
}

fn kept(state: &Path) -> Vec<PathBuf> {
    let entries = fs::read_dir(state.join("recovery")).into_iter().flatten().flatten();
    let paths = entries.map(|e| e.path());
    paths.filter(|p| p.extension().is_some_and(|e| e == "ron")).collect()
}

/// A file with a design in a folder of its own.
fn file_in(folder: &Path, design: &Design) -> PathBuf {
    let file = folder.join("plant.ron");
    write_design(&file, design).unwrap();
    file
}

#[test]
fn a_design_that_was_being_dragged_is_recovered_after_the_window_fell_over() {
    let folder = tempfile::tempdir().unwrap();
    let file = file_in(folder.path(), &zigzag());
    let before = fs::read_to_string(&file).unwrap();
    let mut first = window(folder.path(), zigzag(), Some(&file));
    assert_eq!(
        kept(folder.path()),
        Vec::<PathBuf>::new(),
        "a saved design writes nothing"
    );
    let from = picture_place(&first, point(first.state(), 2));
    // The button stays down.
    first.hover_at(from);
    first.run_steps(1);
    first.drag_at(from);
    first.run_steps(1);
    for step in 1..=5 {
        first.hover_at(from + egui::vec2(8.0, -5.0) * step as f32);
        first.run_steps(2);
    }
    let last = Arc::clone(first.state().state().design());
    assert_ne!(*last, zigzag());
    assert_eq!(kept(folder.path()).len(), 1);
    // A second window while the first one lives is offered nothing.
    let second = window(folder.path(), polar(None), None);
    assert!(second.query_by_label("Recover plant.ron").is_none());
    drop((first, second));
    let mut again = window(folder.path(), polar(None), None);
    click(&mut again, "Recover plant.ron");
    let state = again.state().state();
    assert_eq!(state.design(), &last);
    assert_eq!(state.path.as_deref(), Some(file.as_path()));
    assert!(state.history.unsaved());
    assert_eq!(state.history.undo_label(), Some("Move a point"), "the past comes along");
    assert_eq!(
        fs::read_to_string(&file).unwrap(),
        before,
        "its file waits for the user to save"
    );
    assert_eq!(kept(folder.path()).len(), 2, "the old snapshot stays until then");
    send(&mut again, Command::Save);
    assert_eq!(read_design(&file).unwrap(), *last);
    assert_eq!(kept(folder.path()), Vec::<PathBuf>::new());
}

#[test]
fn deciding_later_keeps_discarding_asks_twice_and_what_cannot_be_read_stays() {
    let folder = tempfile::tempdir().unwrap();
    let mut first = window(folder.path(), zigzag(), None);
    send(&mut first, Command::AddCourse);
    drop(first);
    let cut = folder.path().join("recovery").join("1-cut.ron");
    fs::write(&cut, "// zonewright snapshot: (format:9)\n").unwrap();
    let mut again = window(folder.path(), polar(None), None);
    click(&mut again, "Decide later");
    assert!(again.query_by_label("Recover Untitled").is_none());
    assert_eq!(kept(folder.path()).len(), 2);
    send(&mut again, Command::Safe(SafeAct::LookForOrphans));
    assert!(again.query_by_label_contains("made by a newer version").is_some());
    click(&mut again, "Discard: Untitled");
    assert_eq!(kept(folder.path()).len(), 2, "one press removes nothing");
    click(&mut again, "Discard for good: Untitled");
    assert_eq!(kept(folder.path()), [cut]);
}

#[test]
fn closing_with_the_changes_discarded_leaves_nothing_behind() {
    let folder = tempfile::tempdir().unwrap();
    let mut harness = window(folder.path(), zigzag(), None);
    send(&mut harness, Command::AddCourse);
    assert_eq!(kept(folder.path()).len(), 1);
    send(&mut harness, Command::Quit);
    harness.get_by_label("Discard the changes").click();
    // A window without a system never gets to close.
    harness.run_steps(5);
    assert!(harness.state().state().closing);
    drop(harness);
    assert_eq!(fs::read_dir(folder.path().join("recovery")).unwrap().count(), 0);
}

#[test]
fn a_state_folder_that_cannot_be_written_is_one_note() {
    let folder = tempfile::tempdir().unwrap();
    let taken = folder.path().join("taken");
    fs::write(&taken, "").unwrap();
    let mut harness = window(&taken, zigzag(), None);
    for _ in 0..3 {
        send(&mut harness, Command::FlipOutside);
    }
    click(&mut harness, "Close the note on keeping changes");
    for _ in 0..3 {
        send(&mut harness, Command::FlipOutside);
    }
    assert!(harness.query_by_label("Close the note on keeping changes").is_none());
}

#[test]
fn the_second_window_on_a_file_is_told_and_saving_asks_first() {
    let folder = tempfile::tempdir().unwrap();
    let file = file_in(folder.path(), &zigzag());
    let first = window(folder.path(), zigzag(), Some(&file));
    let mut second = window(folder.path(), zigzag(), Some(&file));
    assert!(first.query_by_label_contains("open in another window").is_none());
    assert!(second.query_by_label_contains("open in another window").is_some());
    send(&mut second, Command::FlipOutside);
    send(&mut second, Command::Save);
    let question = second.state().state().safe.overwrite.clone().unwrap();
    assert_eq!(question.why, InTheWay::OtherWindow);
    assert_eq!(read_design(&file).unwrap(), zigzag(), "nothing was written yet");
    second.key_press(Key::Escape);
    second.run();
    assert_eq!(second.state().state().safe.overwrite, None);
    assert!(second.state().state().history.unsaved());
    // The other window is gone: the note goes when this one has the keyboard again, and saving asks nothing.
    drop(first);
    for focused in [false, true] {
        second.input_mut().focused = focused;
        second.run();
    }
    assert!(second.query_by_label_contains("open in another window").is_none());
    send(&mut second, Command::Save);
    assert_eq!(second.state().state().safe.overwrite, None);
    assert_eq!(read_design(&file).unwrap(), **second.state().state().design());
}

#[test]
fn saving_over_the_file_of_another_window_asks_too() {
    let folder = tempfile::tempdir().unwrap();
    let file = file_in(folder.path(), &zigzag());
    let _first = window(folder.path(), zigzag(), Some(&file));
    let mut second = window(folder.path(), polar(None), None);
    send(&mut second, Command::SaveTo(file.clone()));
    assert!(second.state().state().safe.overwrite.is_some());
    assert_eq!(read_design(&file).unwrap(), zigzag());
    click(&mut second, "Overwrite");
    assert_eq!(read_design(&file).unwrap(), polar(None));
}

#[test]
fn a_file_that_something_else_changed_is_not_overwritten_unasked() {
    let folder = tempfile::tempdir().unwrap();
    let file = file_in(folder.path(), &zigzag());
    let mut harness = window(folder.path(), zigzag(), Some(&file));
    send(&mut harness, Command::FlipOutside);
    let mine = Arc::clone(harness.state().state().design());
    write_design(&file, &polar(None)).unwrap();
    for focused in [false, true] {
        harness.input_mut().focused = focused;
        harness.run();
    }
    assert_eq!(harness.state().state().safe.disk(), Disk::Changed);
    send(&mut harness, Command::Save);
    let question = harness.state().state().safe.overwrite.clone().unwrap();
    assert_eq!(question.why, InTheWay::Changed);
    assert_eq!(read_design(&file).unwrap(), polar(None));
    // Its letter, not the pointer.
    harness.key_press(Key::R);
    harness.run();
    let state = harness.state().state();
    assert_eq!(**state.design(), polar(None), "reloaded");
    assert!(!state.history.unsaved());
    send(&mut harness, Command::Undo);
    assert_eq!(
        harness.state().state().design(),
        &mine,
        "undo brings back what was here"
    );
    send(&mut harness, Command::Save);
    assert_eq!(
        harness.state().state().safe.overwrite,
        None,
        "the reloaded file is known"
    );
    assert_eq!(read_design(&file).unwrap(), *mine);
    fs::remove_file(&file).unwrap();
    for focused in [false, true] {
        harness.input_mut().focused = focused;
        harness.run();
    }
    assert!(harness.query_by_label_contains("not at its place any more").is_some());
}

#[test]
fn every_way_to_another_design_asks_about_unsaved_changes() {
    let folder = tempfile::tempdir().unwrap();
    let file = file_in(folder.path(), &polar(None));
    let mut lost = window(folder.path(), polar(Some(2)), None);
    send(&mut lost, Command::FlipOutside);
    drop(lost);
    let mut harness = window(folder.path(), zigzag(), None);
    send(&mut harness, Command::AddCourse);
    let mine = Arc::clone(harness.state().state().design());
    for command in [
        Command::New("polar"),
        Command::Open,
        Command::OpenPath(file.clone()),
        Command::OpenSample,
        Command::Quit,
        Command::Safe(SafeAct::Recover(0)),
        Command::Safe(SafeAct::Drop(vec![file.clone()])),
    ] {
        send(&mut harness, command.clone());
        assert!(harness.state().state().waiting.is_some(), "{command:?}");
        // Keys of commands do nothing behind the question.
        harness.key_press_modifiers(Modifiers::COMMAND, Key::Z);
        harness.run();
        harness.key_press(Key::Escape);
        harness.run();
        let state = harness.state().state();
        assert!(state.waiting.is_none() && !state.closing, "{command:?}");
        assert_eq!(state.design(), &mine, "{command:?}");
    }
}

#[test]
fn the_question_has_the_keyboard_at_save_and_letters_answer_it() {
    let folder = tempfile::tempdir().unwrap();
    let file = file_in(folder.path(), &zigzag());
    let mut harness = window(folder.path(), zigzag(), Some(&file));
    send(&mut harness, Command::FlipOutside);
    let flipped = Arc::clone(harness.state().state().design());
    send(&mut harness, Command::New("loop"));
    assert!(harness.get_by_label("Save and go on").is_focused());
    harness.key_press(Key::Enter);
    harness.run();
    assert_eq!(read_design(&file).unwrap(), *flipped);
    assert_eq!(harness.state().state().shape().start.kind(), "loop");
    send(&mut harness, Command::FlipOutside);
    send(&mut harness, Command::New("polar"));
    harness.key_press(Key::D);
    harness.run();
    assert_eq!(harness.state().state().shape().start.kind(), "polar");
}

#[test]
fn giving_up_the_save_gives_up_what_was_to_follow_it() {
    let folder = tempfile::tempdir().unwrap();
    let mut harness = open(zigzag());
    send(&mut harness, Command::AddCourse);
    send(&mut harness, Command::Quit);
    click(&mut harness, "Save and go on");
    click(&mut harness, "Cancel");
    // A later save, for itself, must not close the window.
    send(&mut harness, Command::SaveTo(folder.path().join("a.ron")));
    assert!(!harness.state().state().closing);
}

#[test]
fn dropped_files_are_opened_imported_or_refused_with_the_reason() {
    let folder = tempfile::tempdir().unwrap();
    let file = file_in(folder.path(), &polar(None));
    let csv = folder.path().join("path.csv");
    fs::write(&csv, "0,0,0\n300,0,-400\n600,0,0\n").unwrap();
    let mut harness = open(zigzag());
    let drop = |files: &[&Path]| Command::Safe(SafeAct::Drop(files.iter().map(|f| f.to_path_buf()).collect()));
    for (files, said) in [
        (vec![file.as_path(), csv.as_path()], "2 files were dropped"),
        (vec![folder.path()], "is a folder"),
        (vec![Path::new("/tmp/drawing.pdf")], "drawing.pdf is neither"),
    ] {
        send(&mut harness, drop(&files));
        assert!(harness.query_by_label_contains(said).is_some(), "{said}");
        assert_eq!(**harness.state().state().design(), zigzag());
        send(&mut harness, Command::Dismiss);
    }
    send(&mut harness, drop(&[&csv]));
    assert_eq!(harness.state().state().history.undo_label(), Some("Import a path"));
    send(&mut harness, Command::Undo);
    send(&mut harness, drop(&[&file]));
    assert_eq!(**harness.state().state().design(), polar(None));
}

#[test]
fn recent_files_are_in_the_menu_and_in_the_search_and_missing_ones_say_so() {
    let folder = tempfile::tempdir().unwrap();
    let file = file_in(folder.path(), &polar(None));
    let gone = folder.path().join("gone.ron");
    write_design(&gone, &zigzag()).unwrap();
    let mut harness = window(folder.path(), zigzag(), None);
    send(&mut harness, Command::OpenPath(gone.clone()));
    send(&mut harness, Command::OpenPath(file.clone()));
    send(&mut harness, Command::New("loop"));
    fs::remove_file(&gone).unwrap();
    click(&mut harness, "File");
    click(&mut harness, "Recent");
    harness.run();
    let row = harness.get_by_label_contains("gone.ron");
    assert!(row.accesskit_node().is_disabled());
    assert!(
        row.accesskit_node().label().unwrap().contains("not there any more"),
        "{:?}",
        row.accesskit_node().label()
    );
    harness.get_by_label_contains("plant.ron").click();
    harness.run();
    assert_eq!(**harness.state().state().design(), polar(None));
    // The next session knows them too, until they are forgotten.
    drop(harness);
    let mut again = window(folder.path(), zigzag(), None);
    again.key_press_modifiers(Modifiers::COMMAND, Key::K);
    again.run();
    again.get_by_label("Name of a command").type_text("recent plant");
    again.run();
    again.key_press(Key::Enter);
    again.run();
    assert_eq!(**again.state().state().design(), polar(None));
    send(&mut again, Command::Safe(SafeAct::ForgetRecent));
    drop(again);
    let session = fs::read_to_string(folder.path().join("session.ron")).unwrap();
    assert!(session.contains("recent: []"), "{session}");
}

#[test]
fn several_steps_are_undone_by_one_click() {
    let mut harness = open(zigzag());
    for command in [Command::AddCourse, Command::FlipOutside, Command::SwapUnits] {
        send(&mut harness, command);
    }
    click(&mut harness, "Edit");
    assert!(harness.query_by_label_contains("Undo: Change the unit").is_some());
    click(&mut harness, "Undo list");
    click(&mut harness, "Undo: Add a course (3)");
    assert_eq!(**harness.state().state().design(), zigzag());
    assert_eq!(harness.state().state().history.redo_labels().count(), 3);
}

#[test]
fn undo_and_redo_of_every_kind_of_change_are_exact_to_the_byte() {
    use zonewright::window::PathEdit;
    use zonewright_geometry::{
        Act, Courses, Outside, Placement, Role, Side, Spurs, Step, StepId, Vector, start::DragRule,
    };
    use zonewright_shop::text::Units;
    let step = Step {
        id: StepId(0),
        name: Some("again".to_owned()),
        on: true,
        side: Side::Fore,
        act: Act::Lay {
            courses: Courses::Count(1),
            spurs: Spurs::default(),
        },
    };
    let placement = Placement {
        scale: 1.0 / 3.0,
        shift: Vector::new(0.1, -1e-300, 12_345.678_9),
        ..Placement::default()
    };
    let moved = PathEdit::Move {
        point: 2,
        to: zonewright_geometry::Point::new(612.3, 0.1, 1.0 / 3.0),
        rule: DragRule::Neighbours,
    };
    let mut off = step.clone();
    off.on = false;
    let commands = vec![
        Command::AddCourse,
        Command::LayUntilStill,
        Command::RemoveCourse,
        Command::AddStep(Box::new(step)),
        Command::SetStep(0, Box::new(off)),
        Command::MoveStep(0, 1),
        Command::DeleteStep(0),
        Command::LeaveOut(0),
        Command::PutBack(0, 0),
        Command::Path(moved),
        Command::Path(PathEdit::Insert(1)),
        Command::Path(PathEdit::Split(0)),
        Command::Path(PathEdit::Delete(1)),
        Command::Path(PathEdit::Add),
        Command::Path(PathEdit::Role(0, Role::Zag)),
        Command::Path(PathEdit::Close(true)),
        Command::ShareGap,
        Command::SetPlacement(placement),
        Command::SetOutside(Outside::Reversed),
        Command::FlipOutside,
        Command::SetUnits(Units::Inch),
        Command::SwapUnits,
        Command::SetKind("polar"),
        Command::FreePoints,
        Command::SetKind("loop"),
    ];
    let mut harness = open(zigzag());
    let mut texts = vec![to_text(harness.state().state().design())];
    for command in commands {
        send(&mut harness, command.clone());
        let text = to_text(harness.state().state().design());
        if text != *texts.last().unwrap() {
            assert!(harness.state().state().history.undo_label().is_some());
            texts.push(text);
        }
    }
    assert!(texts.len() > 20, "most of them change something: {}", texts.len());
    for text in texts.iter().rev().skip(1) {
        send(&mut harness, Command::Undo);
        assert_eq!(&to_text(harness.state().state().design()), text);
    }
    assert_eq!(harness.state().state().history.undo_label(), None);
    for text in &texts[1..] {
        send(&mut harness, Command::Redo);
        assert_eq!(&to_text(harness.state().state().design()), text);
    }
}

#[test]
fn a_drag_is_one_step_of_the_list() {
    let mut harness = open(zigzag());
    let from = picture_place(&harness, point(harness.state(), 2));
    drag(&mut harness, from, egui::vec2(30.0, -20.0));
    assert_eq!(
        harness.state().state().history.undo_labels().collect::<Vec<_>>(),
        ["Move a point"]
    );
}
