//! A frame of the front strip on a front of 10,000 letters, beside one of 100 letters and beside drawing every letter bare.
//!
//! `cargo bench -p zonewright --bench strip`
//!
//! One core; the time is that of laying the frame out and of turning its shapes into triangles. The goal is 2 ms a frame at 10,000 letters.

#![expect(clippy::print_stdout, reason = "a bench prints its figures")]

use std::{
    hint::black_box,
    time::{Duration, Instant},
};

use egui::{Event, Modifiers, MouseWheelSource, MouseWheelUnit, Pos2, RawInput, Rect, Stroke, TouchPhase, pos2, vec2};
use zonewright::{
    document::new_design,
    window::{App, Command, StripAct},
};
use zonewright_geometry::{
    Point, Role, Spurs, Start, Vector,
    start::{FreeLetter, FreePath, FreeVector},
};

const RUNS: usize = 201;
const GOAL: Duration = Duration::from_millis(2);
const LETTERS: u32 = 10_000;

/// The room that the strip has in a window of 2560 x 1440.
const ROOM: Rect = Rect {
    min: pos2(0.0, 0.0),
    max: pos2(1956.0, 116.0),
};

/// A window on a closed star of so many letters, as zig and zag by turns.
fn window(ctx: &egui::Context, letters: u32) -> App {
    let letter = |id: u32| {
        let turn = f64::from(id / 2) / f64::from(letters / 2) * std::f64::consts::TAU;
        let down = if id.is_multiple_of(2) { -400.0 } else { 400.0 };
        FreeLetter {
            id,
            vector: FreeVector::Own(Vector::new(-300.0 * turn.sin(), 300.0 * turn.cos(), down)),
            role: if id.is_multiple_of(2) { Role::Zig } else { Role::Zag },
        }
    };
    let path = FreePath {
        origin: Point::ORIGIN,
        closed: true,
        letters: (0..letters).map(letter).collect(),
    };
    let design = new_design(Start::Zigzag(path), Some(1), Spurs::default()).expect("a path of finite points");
    App::new_headless(ctx, design)
}

fn input(events: Vec<Event>) -> RawInput {
    RawInput {
        screen_rect: Some(ROOM),
        events,
        ..RawInput::default()
    }
}

fn median(mut times: Vec<Duration>) -> Duration {
    times.sort_unstable();
    times[times.len() / 2]
}

/// The median time of a frame, and how many shapes it has. `events` gives what comes before each.
fn frames(
    ctx: &egui::Context,
    mut events: impl FnMut(usize) -> Vec<Event>,
    mut draw: impl FnMut(&mut egui::Ui, usize),
) -> (Duration, usize) {
    let mut times = Vec::with_capacity(RUNS);
    let mut shapes = 0;
    for run in 0..RUNS {
        let raw = input(events(run));
        let start = Instant::now();
        let mut output = ctx.run_ui(raw, |ui| draw(ui, run));
        // Nothing is shown, so no texture is made.
        output.textures_delta.clear();
        shapes = output.shapes.len();
        let meshes = ctx.tessellate(output.shapes, output.pixels_per_point);
        times.push(start.elapsed());
        black_box(meshes);
    }
    (median(times), shapes)
}

fn show(name: &str, (time, shapes): (Duration, usize)) -> Duration {
    let ms = time.as_secs_f64() * 1e3;
    let of = ms / (GOAL.as_secs_f64() * 1e3);
    println!("{name:<44} {ms:7.3} ms a frame  of the goal {of:5.2}  {shapes:>6} shapes");
    time
}

fn wheel(run: usize, modifiers: Modifiers) -> Vec<Event> {
    let by = if run % 40 < 20 { -37.0 } else { 37.0 };
    vec![
        Event::PointerMoved(pos2(900.0, 60.0)),
        Event::MouseWheel {
            unit: MouseWheelUnit::Point,
            delta: vec2(0.0, by),
            phase: TouchPhase::Move,
            source: MouseWheelSource::Wheel,
            modifiers,
        },
    ]
}

fn sweep(run: usize) -> Vec<Event> {
    vec![Event::PointerMoved(pos2(300.0 + (run * 7 % 1500) as f32, 60.0))]
}

fn strip(
    name: &str,
    letters: u32,
    events: impl FnMut(usize) -> Vec<Event>,
    prepare: impl FnOnce(&mut App),
) -> Duration {
    let ctx = egui::Context::default();
    let mut app = window(&ctx, letters);
    app.work();
    prepare(&mut app);
    app.work();
    let time = frames(&ctx, events, |ui, _| {
        app.strip_frame(ui);
        app.work();
    });
    show(name, time)
}

fn main() {
    let still = |_| Vec::new();
    let none = |_: &mut App| {};
    show("baseline: all letters bare, one line each", {
        let ctx = egui::Context::default();
        let node = |k: u32| Pos2::new(k as f32 * 0.2, if k.is_multiple_of(2) { 20.0 } else { 60.0 });
        frames(&ctx, still, |ui, _| {
            for k in 0..LETTERS {
                let stroke = Stroke::new(2.5, ui.visuals().text_color());
                ui.painter().line_segment([node(k), node(k + 1)], stroke);
            }
        })
    });
    strip("100 letters, still", 100, still, none);
    strip("10,000 letters, still", LETTERS, still, none);
    strip("10,000 letters, the pointer moves", LETTERS, sweep, none);
    strip(
        "10,000 letters, scrolling",
        LETTERS,
        |run| wheel(run, Modifiers::NONE),
        none,
    );
    let repeat = |app: &mut App| app.send(Command::Strip(StripAct::Repeat(Some(2))));
    strip("10,000 letters, the pointer moves, repeating", LETTERS, sweep, repeat);
    // Zoomed out until letters are an outline: the wheel draws it anew in every frame.
    strip(
        "10,000 letters, zooming",
        LETTERS,
        |run| wheel(run, Modifiers::COMMAND),
        none,
    );
    let out = |run: usize| {
        if run < 40 {
            return vec![Event::PointerMoved(pos2(900.0, 60.0)), Event::Zoom(0.8)];
        }
        Vec::new()
    };
    strip("10,000 letters, whole front, still", LETTERS, out, none);
}
