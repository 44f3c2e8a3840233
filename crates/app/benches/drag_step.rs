//! One step of a drag: regrow, readouts, parts and picture together, beside one frame of a 60 Hz screen.
//!
//! `cargo bench -p zonewright --bench drag_step`
//!
//! One core, presentation aside. The goal is one frame at 10,000 panels, and at most linear time to 100,000.

#![expect(clippy::print_stdout, reason = "a bench prints its figures")]

use std::{
    hint::black_box,
    time::{Duration, Instant},
};

use zonewright_geometry::{
    Act, Angle, Courses, Outside, Placement, Point, Shape, Side, Spurs, Start, Step, StepId, Tolerances, Vector, grow,
    measure::totals,
    start::{Curve, CurveShape, FreePath, PolarBy, PolarForm, TranslationForm},
};
use zonewright_painter::{Bounds, Camera, ColourBy, Look, Picture, Projection, Scene, Tints, View};
use zonewright_shop::{FamilyTolerance, Parts};

const RUNS: usize = 15;
const FRAME: Duration = Duration::from_micros(16_667);

fn laid(start: Start) -> Shape {
    let act = Act::Lay {
        courses: Courses::UntilStill,
        spurs: Spurs::Retract,
    };
    Shape {
        start,
        zones: Vec::new(),
        steps: vec![Step {
            id: StepId(1),
            name: None,
            on: true,
            side: Side::Fore,
            act,
        }],
        finish: Vec::new(),
        placement: Placement::default(),
        outside: Outside::Grown,
        tolerances: Tolerances::default(),
    }
}

fn polar(ribs: u32) -> Shape {
    let by = PolarBy::PitchEdge {
        pitch: Angle::from_degrees(38.0),
        edge_mm: 300.0,
    };
    laid(Start::Polar(PolarForm { ribs, by }))
}

fn arcs(parts: u32) -> Shape {
    let curve = |azimuth: f64| Curve {
        shape: CurveShape::Arc {
            span_mm: 60_000.0,
            rise_mm: 9_000.0,
        },
        parts,
        azimuth: Angle::from_degrees(azimuth),
    };
    laid(Start::Translation(TranslationForm {
        zig: curve(0.0),
        zag: curve(90.0),
    }))
}

/// A canopy from two free paths, no two of whose edges agree: every panel is a part of its own.
fn free(parts: u32) -> Shape {
    let wave = |k: u32, seed: f64| (f64::from(k) * seed).sin();
    let path = |along: Vector, up: f64, seed: f64| {
        let place = move |k: u32| {
            Point(along * (f64::from(k) * 300.0 + 60.0 * wave(k, seed)) + Vector::Z * (up * wave(k, seed * 1.7)))
        };
        (0..=parts).map(place).collect::<Vec<_>>()
    };
    let [zig, zag] = [path(Vector::X, 200.0, 0.7), path(Vector::Y, 150.0, 1.3)];
    let end = zig[zig.len() - 1];
    let both: Vec<Point> = zig
        .iter()
        .copied()
        .chain(zag[1..].iter().map(|p| end + (*p - zag[0])))
        .collect();
    let mut path = FreePath::from_points(&both, false).expect("a path of finite points");
    for (k, letter) in path.letters.iter_mut().enumerate() {
        letter.role = if k < parts as usize {
            zonewright_geometry::Role::Zig
        } else {
            zonewright_geometry::Role::Zag
        };
    }
    laid(Start::Zigzag(path))
}

fn median(mut times: Vec<Duration>) -> Duration {
    times.sort_unstable();
    times[times.len() / 2]
}

fn milliseconds(time: Duration) -> f64 {
    time.as_secs_f64() * 1e3
}

fn step(name: &str, shape: &Shape) {
    let size = [1280.0, 800.0];
    let look = Look {
        colour: ColourBy::Family,
        ..Look::default()
    };
    let mut picture = Picture::default();
    let mut stages: [Vec<Duration>; 5] = Default::default();
    let mut panels = 0;
    for _ in 0..RUNS {
        let mut at = Instant::now();
        let mut lap = |stage: usize, at: &mut Instant| {
            stages[stage].push(at.elapsed());
            *at = Instant::now();
        };
        let (shell, _) = grow(black_box(shape));
        lap(0, &mut at);
        let totals = totals(&shell);
        lap(1, &mut at);
        let parts = Parts::new(&shell, &FamilyTolerance::default());
        lap(2, &mut at);
        let scene = Scene::quick(&shell);
        lap(3, &mut at);
        let families: Vec<u32> = parts.panels.iter().map(|p| p.family).collect();
        let tints = Tints {
            family: Some(&families),
            ..Tints::default()
        };
        if let Some(bounds) = Bounds::of(&shell) {
            let camera = Camera::view(View::Fit, Projection::Perspective, &bounds, size);
            scene.picture_into(&shell, &camera, &look, &tints, &[], &mut picture);
        }
        lap(4, &mut at);
        black_box((&totals, &parts, &picture));
        panels = shell.panels.len();
    }
    let [grow, readouts, parts, order, draw] = stages.map(|t| milliseconds(median(t)));
    let all = grow + readouts + parts + order + draw;
    println!(
        "{name:<16} {panels:>7} panels  grow {grow:6.2}  readouts {readouts:6.2}  parts {parts:6.2}  order {order:6.2}  \
         draw {draw:6.2}  all {all:7.2} ms  of a frame {:5.2}",
        all / milliseconds(FRAME)
    );
}

fn main() {
    step("polar 10k", &polar(100));
    step("arcs 10k", &arcs(100));
    step("free 10k", &free(100));
    step("polar 100k", &polar(317));
    step("arcs 100k", &arcs(316));
    step("free 100k", &free(316));
}
