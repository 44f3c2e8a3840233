//! A whole frame of the window on one core: logic, widgets, picture and triangles, presentation aside.
//!
//! `cargo bench -p zonewright --bench frame`
//!
//! The baseline is a frame of the same window while nothing changes: its picture is there already. Turning changes the camera with
//! every frame, dragging a parameter grows the shell anew.

#![expect(clippy::print_stdout, reason = "a bench prints its figures")]

use std::{
    hint::black_box,
    time::{Duration, Instant},
};

use egui_kittest::Harness;
use zonewright::{
    document::{Design, new_design},
    window::{App, Command},
};
use zonewright_geometry::{
    Angle, Spurs, Start,
    start::{Curve, CurveShape, PolarBy, PolarForm, TranslationForm},
};

const RUNS: usize = 15;

fn design(start: Start) -> Design {
    new_design(start, None, Spurs::default()).expect("a start within its limits")
}

fn polar(ribs: u32, pitch: f64) -> Start {
    let by = PolarBy::PitchEdge {
        pitch: Angle::from_degrees(pitch),
        edge_mm: 300.0,
    };
    Start::Polar(PolarForm { ribs, by })
}

fn canopy(parts: u32, rise_mm: f64) -> Start {
    let curve = |azimuth: f64| Curve {
        shape: CurveShape::Arc {
            span_mm: 60_000.0,
            rise_mm,
        },
        parts,
        azimuth: Angle::from_degrees(azimuth),
    };
    Start::Translation(TranslationForm {
        zig: curve(0.0),
        zag: curve(90.0),
    })
}

fn frame(harness: &mut Harness<'_, App>) {
    harness.step();
    let shapes = harness.output().shapes.clone();
    black_box(harness.ctx.tessellate(shapes, 1.0).len());
}

fn median(mut once: impl FnMut(usize)) -> f64 {
    let mut times: Vec<Duration> = (0..RUNS)
        .map(|run| {
            let began = Instant::now();
            once(run);
            began.elapsed()
        })
        .collect();
    times.sort_unstable();
    times[RUNS / 2].as_secs_f64() * 1e3
}

fn window(name: &str, start: impl Fn(f64) -> Start) {
    let first = design(start(0.0));
    let mut harness = Harness::builder()
        .with_size([1280.0, 800.0])
        .with_max_steps(20)
        .build_eframe(move |cc| App::new_headless(&cc.egui_ctx, first));
    harness.run();
    let panels = harness.state().state().derived.totals.panels;
    let still = median(|_| frame(&mut harness));
    let turning = median(|_| {
        harness.state().send(Command::Orbit(egui::vec2(3.0, 0.2)));
        frame(&mut harness);
    });
    let dragging = median(|run| {
        let start = Box::new(start(run as f64 * 0.01 + 0.01));
        harness.state().send(Command::SetStart(start, "drag"));
        frame(&mut harness);
    });
    println!(
        "{name:<12} {panels:>7} panels  still {still:7.2}  turning {turning:7.2} ({:5.2} x)  dragging, all at once {dragging:8.2} ms",
        turning / still
    );
}

fn main() {
    for (name, ribs) in [("polar 5k", 71), ("polar 10k", 100), ("polar 100k", 317)] {
        window(name, |by| polar(ribs, 38.0 + by));
    }
    for (name, parts) in [("canopy 5k", 71), ("canopy 10k", 100), ("canopy 100k", 316)] {
        window(name, |by| canopy(parts, 9000.0 + by));
    }
}
