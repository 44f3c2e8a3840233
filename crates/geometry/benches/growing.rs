//! Growing a million panels to the finished shell, beside a bare loop that writes the same bytes.
//!
//! `cargo bench -p zonewright-geometry --bench growing`
//!
//! Each line: the median of several runs of both in turn, and their ratio.

#![expect(clippy::print_stdout, reason = "a bench prints its figures")]

use std::{
    hint::black_box,
    time::{Duration, Instant},
};

use zonewright_geometry::{
    Act, Angle, Courses, Direction, LetterName, Outside, Placement, Shape, Shell, Side, Sign, Spurs, Start, Step,
    StepId, Tolerances, Vector, Vs, grow,
    start::{Curve, CurveShape, PolarBy, PolarForm, TranslationForm},
};

const RUNS: usize = 7;

fn shape(start: Start, acts: Vec<Act>) -> Shape {
    let step = |(id, act): (u32, Act)| Step {
        id: StepId(id),
        name: None,
        on: true,
        side: Side::Fore,
        act,
    };
    Shape {
        start,
        zones: Vec::new(),
        steps: (1..).zip(acts).map(step).collect(),
        finish: Vec::new(),
        placement: Placement::default(),
        outside: Outside::Grown,
        tolerances: Tolerances::default(),
    }
}

fn translation(parts: u32) -> Shape {
    let curve = |azimuth: f64| Curve {
        shape: CurveShape::Arc {
            span_mm: 60_000.0,
            rise_mm: 9_000.0,
        },
        parts,
        azimuth: Angle::from_degrees(azimuth),
    };
    let start = Start::Translation(TranslationForm {
        zig: curve(0.0),
        zag: curve(90.0),
    });
    shape(
        start,
        vec![Act::Lay {
            courses: Courses::UntilStill,
            spurs: Spurs::Retract,
        }],
    )
}

/// Ribs round a pole, courses, a spur of a new direction at every third V, and courses until the pole closes.
fn polar_with_splices(ribs: u32) -> Shape {
    let by = PolarBy::PitchEdge {
        pitch: Angle::from_degrees(38.0),
        edge_mm: 300.0,
    };
    let lay = |count| Act::Lay {
        courses: Courses::Count(count),
        spurs: Spurs::Retract,
    };
    let splice = Act::Splice {
        at: Vs::EveryKth {
            from: LetterName::of_start(0, Sign::Minus),
            k: 3,
        },
        directions: vec![Direction::Own(Vector::new(0.0, 0.0, -300.0))],
    };
    shape(
        Start::Polar(PolarForm { ribs, by }),
        vec![lay(ribs / 3), splice, lay(ribs * 3 / 5)],
    )
}

/// Writes what the finished shell holds: 3 f64 a vertex; 4 u32, 2 zones and a course a panel; 4 u32 an edge.
fn baseline(vertices: usize, panels: usize, edges: usize) -> usize {
    let mut points: Vec<[f64; 3]> = Vec::with_capacity(vertices);
    for k in 0..vertices {
        let k = k as f64;
        points.push([k, 0.5 * k, 0.25 * k]);
    }
    let mut faces: Vec<([u32; 4], [u32; 2], i32)> = Vec::with_capacity(panels);
    for k in 0..panels as u32 {
        faces.push(([k, k + 1, k + 2, k + 3], [k, k + 1], 1));
    }
    let mut sides: Vec<[u32; 4]> = Vec::with_capacity(edges);
    for k in 0..edges as u32 {
        sides.push([k, k + 1, k, k + 1]);
    }
    let written = black_box((&points, &faces, &sides));
    written.0.len() + written.1.len() + written.2.len()
}

fn timed<T>(work: impl FnOnce() -> T) -> (Duration, T) {
    let start = Instant::now();
    let result = work();
    (start.elapsed(), result)
}

fn median(mut times: Vec<Duration>) -> Duration {
    times.sort_unstable();
    times[times.len() / 2]
}

fn compare(name: &str, shape: &Shape) {
    let (shell, findings): (Shell, _) = grow(shape);
    assert!(!shell.panels.is_empty(), "{name}: {findings:?}");
    let [v, p, e] = [shell.points.len(), shell.panels.len(), shell.edges.len()];
    drop(shell);
    let (mut grown, mut written) = (Vec::new(), Vec::new());
    for _ in 0..RUNS {
        written.push(timed(|| baseline(v, p, e)).0);
        let (time, result) = timed(|| grow(shape));
        grown.push(time);
        drop(result);
    }
    let [grown, written] = [median(grown), median(written)].map(|t| t.as_secs_f64() * 1e3);
    println!(
        "{name:<22} {p:>9} panels  grow {grown:8.1} ms  baseline {written:8.1} ms  ratio {:5.2}",
        grown / written
    );
}

fn main() {
    compare("translation 10k", &translation(100));
    compare("translation 1M", &translation(1000));
    compare("polar, splices 10k", &polar_with_splices(100));
    compare("polar, splices 1M", &polar_with_splices(960));
    if let Ok(status) = std::fs::read_to_string("/proc/self/status") {
        let peak = status.lines().find(|l| l.starts_with("VmHWM"));
        println!(
            "peak memory of this process: {}",
            peak.unwrap_or("unknown").trim_start_matches("VmHWM:").trim()
        );
    }
}
