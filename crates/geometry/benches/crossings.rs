//! How long finding crossings takes, and how long the readouts do.

#[path = "../tests/common/by_hand.rs"]
mod by_hand;

use by_hand::{Quad, joined};
use divan::{Bencher, black_box};
use zonewright_geometry::{Point, Shell, Tolerances, Vector, inspect::inspect, measure};

fn main() {
    divan::main();
}

/// A curved sheet of so many panels, and half as many of a second that cuts it.
fn two_sheets(panels: usize) -> Shell {
    let mut quads = sheet(panels * 2 / 3, 900.0, 0.0, 1.0);
    quads.extend(sheet(panels / 3, 500.0, 1350.0, -1.0));
    joined(&quads)
}

/// A translation surface: an arc carried along a wave.
fn sheet(panels: usize, radius: f64, lift: f64, sign: f64) -> Vec<Quad> {
    let side = (panels as f64).sqrt().round() as usize;
    let step = |k: usize| k as f64 / side as f64 - 0.5;
    let arc = |k: usize| Vector::new(radius * step(k).sin(), 0.0, lift + sign * radius * step(k).cos());
    let wave = |k: usize| Vector::new(0.0, radius * step(k), 40.0 * (9.0 * step(k)).sin());
    let place = |i: usize, j: usize| Point(arc(i) + wave(j));
    let cells = (0..side).flat_map(|i| (0..side).map(move |j| (i, j)));
    cells
        .map(|(i, j)| [place(i, j), place(i + 1, j), place(i + 1, j + 1), place(i, j + 1)])
        .collect()
}

#[divan::bench(args = [10_000, 100_000])]
fn crossings(bencher: Bencher, panels: usize) {
    let shell = two_sheets(panels);
    let found = inspect(&shell, &Tolerances::default());
    assert!(!found.crossings.is_empty(), "the sheets cut each other");
    bencher.bench_local(|| inspect(black_box(&shell), &Tolerances::default()));
}

/// A flat sheet: all neighbours lie in one plane, which asks most of exact arithmetic.
#[divan::bench(args = [100_000])]
fn nothing_crosses_in_a_flat_sheet(bencher: Bencher, panels: usize) {
    let mut shell = joined(&sheet(panels, 900.0, 0.0, 1.0));
    let normal = Vector::new(0.36, 0.48, 0.8);
    for point in &mut shell.points {
        *point = Point(point.0 - normal * point.0.dot(normal));
    }
    assert!(inspect(&shell, &Tolerances::default()).crossings.is_empty());
    bencher.bench_local(|| inspect(black_box(&shell), &Tolerances::default()));
}

#[divan::bench(args = [10_000, 100_000])]
fn totals(bencher: Bencher, panels: usize) {
    let shell = two_sheets(panels);
    bencher.bench_local(|| measure::totals(black_box(&shell)));
}

#[divan::bench(args = [10_000, 100_000])]
fn borders(bencher: Bencher, panels: usize) {
    let shell = two_sheets(panels);
    bencher.bench_local(|| measure::Borders::new(black_box(&shell)));
}
