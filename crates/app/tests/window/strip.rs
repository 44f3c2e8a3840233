//! The front strip, by accessible names, with real pointer drags and keys.

use egui::{Key, Modifiers, Pos2, pos2, vec2};
use egui_kittest::{Harness, kittest::Queryable};
use zonewright::{
    document::{Design, new_design},
    window::{App, Command, Hand, STRIP, StripAct},
};
use zonewright_geometry::{
    Act, Direction, LetterName, Point, Role, Sign, Spurs, Start, Vector, Vs,
    start::{FreeLetter, FreePath, FreeVector},
};

use crate::common::{drag, open, polar, zigzag};

fn steps(harness: &Harness<'_, App>) -> Vec<Act> {
    let steps = &harness.state().state().shape().steps;
    steps.iter().map(|s| s.act.clone()).collect()
}

fn panels(harness: &Harness<'_, App>) -> usize {
    harness.state().state().derived.totals.panels
}

fn middle(harness: &Harness<'_, App>, name: &str) -> Pos2 {
    harness.get_by_label(name).rect().center()
}

fn said(harness: &Harness<'_, App>) -> String {
    harness.get_by_label(STRIP).value().unwrap_or_default()
}

/// Points at a V, above its letters.
fn point_at(harness: &mut Harness<'_, App>, name: &str) {
    let rect = harness.get_by_label(name).rect();
    harness.hover_at(pos2(rect.center().x, rect.top() + 6.0));
    harness.run();
}

/// Sets the directions in hand.
fn take(harness: &mut Harness<'_, App>, directions: Vec<Direction>) {
    harness.state().send(Command::SetHand(Hand { directions }));
    harness.run();
}

/// A zigzag of so many letters, 300 mm across and 400 mm down or up each.
fn long(letters: u32) -> Design {
    let letters = (0..letters).map(|id| {
        let down = if id % 2 == 0 { -400.0 } else { 400.0 };
        // Every other V turns aside, so that panels have an area.
        let across = if id % 4 < 2 { (300.0, 0.0) } else { (0.0, 300.0) };
        FreeLetter {
            id,
            vector: FreeVector::Own(Vector::new(across.0, across.1, down)),
            role: if id % 2 == 0 { Role::Zig } else { Role::Zag },
        }
    });
    let path = FreePath {
        origin: Point::ORIGIN,
        closed: false,
        letters: letters.collect(),
    };
    let mut design = new_design(Start::Zigzag(path), Some(1), Spurs::default()).unwrap();
    design.shape.steps.clear();
    design
}

fn focus(harness: &mut Harness<'_, App>) {
    harness.get_by_label(STRIP).focus();
    harness.run();
}

fn press(harness: &mut Harness<'_, App>, keys: &[(Modifiers, Key)]) {
    for (modifiers, key) in keys {
        harness.key_press_modifiers(*modifiers, *key);
        harness.run();
    }
}

const NONE: Modifiers = Modifiers::NONE;
const SHIFT: Modifiers = Modifiers::SHIFT;

#[test]
fn a_pointed_v_says_what_its_panel_measures_and_what_a_splice_adds() {
    let mut harness = open(zigzag());
    point_at(&mut harness, "Open V 1");
    // The two Vs are filled: zag (3, 0, 4) and zig (0, 3, -4) stand exchanged with their neighbours, so the open V is made of zig
    // (3, 0, -4) and zag (0, 3, 4), each 5 long: cosine 16 / 25, area |(12, -12, 9)| = sqrt(369) (derived), times 100 mm.
    let said = said(&harness);
    let acute = (16.0_f64 / 25.0).acos().to_degrees();
    let area = 369.0_f64.sqrt() * 0.01;
    for part in [
        "Open V 1",
        "500 × 500 mm",
        &format!("{acute:.2}°"),
        &format!("{area:.3} m²"),
    ] {
        assert!(said.contains(part), "{part} in {said}");
    }
    // The hand is 400 mm upright: two panels of 500 and 400, each with cosine 4 / 5.
    let acute = 0.8_f64.acos().to_degrees();
    let spliced = "spliced: 2 panels of 500 × 400 mm";
    assert!(
        said.contains(spliced) && said.contains(&format!("{acute:.2}°")),
        "{said}"
    );
    let value = harness.get_by_label("Open V 1").value().unwrap();
    assert!(value.contains("500 × 500 mm"), "{value}");
    harness.get_by_label(&said);
}

#[test]
fn a_pointed_letter_says_its_zone_length_and_maker_and_is_lit_in_the_picture() {
    let mut harness = open(zigzag());
    harness.get_by_label("Open V 1").click();
    harness.run();
    let rect = harness.get_by_label("Open V 1").rect();
    let pictures = harness.state().pictures();
    // The spliced zag runs up from the foot of the first V to its right end, from below the lane's middle.
    let found = (0..40).find_map(|k| {
        harness.hover_at(pos2(rect.left() + rect.width() * 0.75, rect.top() + 2.0 * k as f32));
        harness.run();
        let letter = harness.state().state().view.strip.letter?;
        Some((letter, said(&harness)))
    });
    let (letter, said) = found.expect("a letter is pointed at");
    let made = harness.state().state().derived.open_on(letter.0)[0].position + 1;
    assert_eq!(letter.1, made, "the zag of the first V");
    for part in ["zag", "Spliced 2.1", "400 mm", "from step 2"] {
        assert!(said.contains(part), "{part} in {said}");
    }
    assert!(pictures < harness.state().pictures(), "the picture shows it");
    harness.hover_at(pos2(5.0, 5.0));
    harness.run();
    assert_eq!(harness.state().state().view.strip.letter, None);
}

#[test]
fn a_drag_over_notches_fills_those_in_one_undo_step() {
    let mut harness = open(polar(Some(1)));
    let before = harness.state().state().design().clone();
    let (from, to) = (middle(&harness, "Open V 2"), middle(&harness, "Open V 4"));
    drag(&mut harness, from, to - from);
    assert_eq!(panels(&harness), 8 + 3);
    let Some(Act::Fill { at: Vs::Picked(names) }) = steps(&harness).pop() else {
        panic!("a step that fills: {:?}", steps(&harness))
    };
    assert_eq!(names.len(), 3);
    assert_eq!(harness.state().state().view.strip.span, None);
    harness.state().send(Command::Undo);
    harness.run();
    assert_eq!(harness.state().state().design(), &before);
}

#[test]
fn the_span_is_previewed_and_said_while_it_is_dragged_and_escape_gives_it_up() {
    let mut harness = open(polar(Some(1)));
    let before = harness.state().state().design().clone();
    let (from, to) = (middle(&harness, "Open V 2"), middle(&harness, "Open V 5"));
    let pictures = harness.state().pictures();
    harness.hover_at(from);
    harness.run_steps(1);
    harness.drag_at(from);
    harness.run_steps(1);
    for step in 1..=10 {
        harness.hover_at(from + (to - from) * (step as f32 / 10.0));
        harness.run_steps(2);
    }
    assert!(said(&harness).starts_with("4 Vs: fills 4 panels"), "{}", said(&harness));
    assert!(pictures + 2 < harness.state().pictures(), "the picture follows");
    harness.key_press(Key::Escape);
    harness.run();
    assert_eq!(harness.state().state().view.strip.span, None);
    harness.hover_at(to + vec2(30.0, 0.0));
    harness.run();
    assert_eq!(harness.state().state().view.strip.span, None, "given up for good");
    harness.drop_at(to + vec2(30.0, 0.0));
    harness.run();
    assert_eq!(harness.state().state().design(), &before);
}

#[test]
fn a_further_span_goes_into_the_same_step_when_the_order_makes_no_difference() {
    let mut harness = open(polar(Some(1)));
    for name in [["Open V 2", "Open V 3"], ["Open V 5", "Open V 6"]] {
        // Two Vs filled leave one between them, and take the count down by one.
        let [from, to] = name.map(|name| middle(&harness, name));
        drag(&mut harness, from, to - from);
    }
    let acts = steps(&harness);
    assert_eq!(acts.len(), 2, "{acts:?}");
    assert_eq!(panels(&harness), 8 + 4);
    harness.state().send(Command::Undo);
    harness.run();
    assert_eq!(panels(&harness), 8 + 2, "each span is an undo step");
    // The V between two filled ones was not open before: it needs a step of its own. V 2 stands where V 2 and V 3 stood.
    let at = middle(&harness, "Open V 2");
    drag(&mut harness, at, vec2(7.0, 0.0));
    assert_eq!(steps(&harness).len(), 3, "{:?}", steps(&harness));
    assert_eq!(panels(&harness), 8 + 3);
}

#[test]
fn arrows_move_shift_extends_enter_fills_and_space_splices() {
    let mut harness = open(polar(Some(1)));
    focus(&mut harness);
    assert!(said(&harness).starts_with("Open V 1:"), "{}", said(&harness));
    press(&mut harness, &[(NONE, Key::ArrowRight), (NONE, Key::ArrowRight)]);
    assert!(said(&harness).starts_with("Open V 3:"), "{}", said(&harness));
    press(&mut harness, &[(NONE, Key::End)]);
    assert!(said(&harness).starts_with("Open V 8:"), "{}", said(&harness));
    press(
        &mut harness,
        &[(NONE, Key::Home), (SHIFT, Key::ArrowRight), (SHIFT, Key::ArrowRight)],
    );
    assert!(said(&harness).starts_with("3 Vs"), "{}", said(&harness));
    press(&mut harness, &[(NONE, Key::Escape)]);
    assert!(
        harness.get_by_label(STRIP).is_focused(),
        "escape lets the span go first"
    );
    assert!(said(&harness).starts_with("Open V 3:"), "{}", said(&harness));
    press(&mut harness, &[(SHIFT, Key::ArrowLeft), (NONE, Key::Enter)]);
    assert_eq!(panels(&harness), 8 + 2);
    assert_eq!(steps(&harness).len(), 2);
    press(&mut harness, &[(NONE, Key::End), (NONE, Key::Space)]);
    assert!(matches!(steps(&harness).pop(), Some(Act::Splice { .. })));
    press(&mut harness, &[(NONE, Key::Space)]);
    assert_eq!(steps(&harness).len(), 2, "the next one takes it away");
    harness.state().state().history.check().unwrap();
}

#[test]
fn repeating_acts_on_every_kth_v_round_the_front() {
    let mut harness = open(polar(Some(1)));
    harness.get_by_label("Repeat round the front").click();
    harness.run();
    for offered in ["At every V", "At every 2nd V", "At every 4th V"] {
        harness.get_by_label(offered);
    }
    assert!(
        harness.query_by_label("At every 3rd V").is_none(),
        "3 does not divide 8"
    );
    harness.get_by_label("At every 2nd V").click();
    harness.run();
    point_at(&mut harness, "Open V 3");
    assert!(said(&harness).starts_with("Open V 3, at 4 Vs: "), "{}", said(&harness));
    harness.get_by_label("Open V 3").click();
    harness.run();
    let Some(Act::Splice {
        at: Vs::EveryKth { from, k: 2 },
        ..
    }) = steps(&harness).pop()
    else {
        panic!("{:?}", steps(&harness))
    };
    // The upright direction is the same for all, and the count goes on from the V that was clicked.
    assert_eq!((from.index % 2, from.sign), (0, Sign::Minus));
    let open = harness
        .state()
        .state()
        .derived
        .open_on(zonewright_geometry::Side::Fore)
        .len();
    assert_eq!(open, 8 + 4);
    // V 1 and V 3 have become two Vs each: either of V 3's takes all four splices away again, in one step.
    for name in ["Open V 4", "Open V 5"] {
        point_at(&mut harness, name);
        assert!(said(&harness).contains("spliced already"), "{}", said(&harness));
        harness.get_by_label(name).click();
        harness.run();
        assert_eq!(steps(&harness).len(), 1, "{name}");
        harness.state().send(Command::Undo);
        harness.run();
        assert_eq!(steps(&harness).len(), 2);
    }
    harness.state().send(Command::Undo);
    harness.run();
    // A span of two, repeated at every second V, fills all eight.
    let (from, to) = (middle(&harness, "Open V 3"), middle(&harness, "Open V 4"));
    drag(&mut harness, from, to - from);
    assert_eq!(panels(&harness), 8 + 8);
    harness.state().send(Command::Strip(StripAct::SwapRepeat));
    harness.run();
    assert_eq!(harness.state().state().view.strip.repeat, None);
}

#[test]
fn repeated_directions_turn_with_their_ribs() {
    let mut harness = open(polar(Some(2)));
    take(&mut harness, vec![Direction::Own(Vector::new(250.0, 40.0, 300.0))]);
    harness.state().send(Command::Strip(StripAct::Repeat(Some(1))));
    harness.run();
    harness.get_by_label("Open V 1").click();
    harness.run();
    assert_eq!(steps(&harness).len(), 1 + 8, "one turn each");
    harness.state().send(Command::AddCourse);
    harness.run();
    // The form has the symmetry of its eight ribs: turned by an eighth about the vertical through the pole it comes to itself.
    let shell = &harness.state().state().derived.shell;
    let pole = shell.points.iter().map(|p| p.0.z).fold(f64::MIN, f64::max);
    let pole = shell.points.iter().find(|p| p.0.z == pole).unwrap().0.truncate();
    let (sin, cos) = std::f64::consts::FRAC_PI_4.sin_cos();
    for p in &shell.points {
        let d = p.0.truncate() - pole;
        let turned = Point::new(pole.x + cos * d.x - sin * d.y, pole.y + sin * d.x + cos * d.y, p.0.z);
        let near = shell.points.iter().map(|q| q.distance(turned)).fold(f64::MAX, f64::min);
        assert!(near < 1e-6, "{p:?} turned has no partner: {near}");
    }
    harness.state().send(Command::Undo);
    harness.state().send(Command::Undo);
    harness.run();
    assert_eq!(steps(&harness).len(), 1, "all of it was one undo step");
    // All between needs no turning: one step does it, and says so as a rule.
    take(&mut harness, vec![Direction::Between]);
    harness.get_by_label("Open V 1").click();
    harness.run();
    let from = LetterName::of_start(0, Sign::Minus);
    let Some(Act::Splice { at, .. }) = steps(&harness).pop() else {
        panic!("{:?}", steps(&harness))
    };
    assert!(matches!(at, Vs::EveryKth { k: 1, from: f } if f.maker == from.maker));
    assert_eq!(steps(&harness).len(), 2);
}

#[test]
fn a_long_front_scrolls_zooms_and_is_reached_by_keys() {
    let mut harness = open(long(400));
    assert!(harness.query_by_label("Open V 200").is_none(), "out of sight");
    let wide = harness.get_by_label("Open V 3").rect().width();
    let at = middle(&harness, "Open V 3");
    harness.hover_at(at);
    harness.run();
    // The wheel with the command key zooms about the pointer.
    harness.event_modifiers(
        egui::Event::MouseWheel {
            unit: egui::MouseWheelUnit::Point,
            delta: vec2(0.0, 120.0),
            phase: egui::TouchPhase::Move,
            source: egui::MouseWheelSource::Wheel,
            modifiers: Modifiers::COMMAND,
        },
        Modifiers::COMMAND,
    );
    harness.run();
    let rect = harness.get_by_label("Open V 3").rect();
    assert!(wide * 1.2 < rect.width() && rect.contains(at), "{rect:?} {at:?}");
    // The wheel alone scrolls.
    harness.event(egui::Event::MouseWheel {
        unit: egui::MouseWheelUnit::Point,
        delta: vec2(0.0, -900.0),
        phase: egui::TouchPhase::Move,
        source: egui::MouseWheelSource::Wheel,
        modifiers: NONE,
    });
    harness.run();
    assert!(harness.query_by_label("Open V 3").is_none());
    focus(&mut harness);
    press(&mut harness, &[(NONE, Key::End)]);
    let lane = harness.get_by_label(STRIP).rect();
    let last = harness.get_by_label("Open V 200").rect();
    assert!(lane.contains_rect(last), "{last:?} in {lane:?}");
    press(&mut harness, &[(NONE, Key::ArrowLeft), (NONE, Key::ArrowLeft)]);
    assert!(said(&harness).starts_with("Open V 198:"), "{}", said(&harness));
    let before = harness.get_by_label("Open V 198").rect().width();
    press(&mut harness, &[(NONE, Key::Plus)]);
    assert!(before * 1.3 < harness.get_by_label("Open V 198").rect().width());
    harness.get_by_label("Zoom the strip out").click();
    harness.run();
    harness.get_by_label("Show the whole front").click();
    harness.run();
    assert!(
        harness.query_by_label("Overview of the front").is_none(),
        "all is in sight"
    );
    press(&mut harness, &[(NONE, Key::Tab)]);
}

#[test]
fn the_overview_is_dragged_along() {
    let mut harness = open(long(400));
    let bar = harness.get_by_label("Overview of the front").rect();
    let first = harness.get_by_label("Overview of the front").value().unwrap();
    assert!(first.starts_with("edges 1 to "), "{first}");
    let from = pos2(bar.left() + 10.0, bar.center().y);
    drag(&mut harness, from, vec2(bar.width() - 15.0, 0.0));
    let last = harness.get_by_label("Overview of the front").value().unwrap();
    assert!(last.ends_with("to 400 of 400"), "{last}");
    harness.get_by_label("Open V 200");
}

#[test]
fn a_drag_that_comes_to_the_end_of_the_lane_scrolls_along() {
    let mut harness = open(long(400));
    let lane = harness.get_by_label(STRIP).rect();
    let from = middle(&harness, "Open V 1");
    harness.hover_at(from);
    harness.run_steps(1);
    harness.drag_at(from);
    harness.run_steps(1);
    harness.hover_at(pos2(lane.right() - 2.0, from.y));
    harness.run_steps(150);
    harness.drop_at(pos2(lane.right() - 2.0, from.y));
    harness.run();
    let filled = panels(&harness);
    assert!(100 < filled, "{filled} panels");
}

/// How many nodes the strip's Vs have, and how many shapes the whole window is drawn with.
fn load(harness: &Harness<'_, App>) -> (usize, usize) {
    let vs = harness.query_all_by_label_contains("Open V ").count();
    (vs, harness.output().shapes.len())
}

#[test]
fn a_front_of_10000_letters_is_drawn_with_a_bounded_number_of_shapes() {
    let mut small = open(long(400));
    let mut large = open(long(10_000));
    let (few, many) = (load(&small), load(&large));
    assert!(many.0 <= few.0 + 1 && many.0 < 60, "{few:?} {many:?}");
    assert!(many.1 < few.1 + 60, "{few:?} {many:?}");
    for harness in [&mut small, &mut large] {
        harness.get_by_label("Show the whole front").click();
        harness.run();
    }
    let (few, many) = (load(&small), load(&large));
    assert!(many.0 <= 2, "an outline has no notches of its own: {many:?}");
    assert!(many.1 < few.1 + 60, "{few:?} {many:?}");
    let drawn = large.state().outlines();
    large.run_steps(5);
    assert_eq!(large.state().outlines(), drawn, "an outline is kept");
    // What is pointed at in the outline is a notch, and a click there splices.
    let lane = large.get_by_label(STRIP).rect();
    large.hover_at(lane.center());
    large.run();
    let said = said(&large);
    assert!(said.starts_with("Open V "), "{said}");
    let name = said.split(':').next().unwrap().to_owned();
    large.get_by_label(&name).click();
    large.run();
    assert!(matches!(steps(&large).pop(), Some(Act::Splice { .. })));
}
