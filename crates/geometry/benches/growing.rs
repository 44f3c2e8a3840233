//! Growing a million panels to the finished shell, beside a bare loop that writes the same bytes.
//!
//! `cargo bench -p zonewright-geometry --bench growing`
//!
//! Each line: the median of several runs of both in turn, and their ratio. Every run is a process of its own, so that both work in
//! fresh memory, as a program does that grows a shell once.

#![expect(clippy::print_stdout, reason = "a bench prints its figures")]

use std::{
    hint::black_box,
    process::Command,
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

fn median(mut times: Vec<f64>) -> f64 {
    times.sort_by(f64::total_cmp);
    times[times.len() / 2]
}

fn cases() -> [(&'static str, Shape); 4] {
    [
        ("translation 10k", translation(100)),
        ("translation 1M", translation(1000)),
        ("polar, splices 10k", polar_with_splices(100)),
        ("polar, splices 1M", polar_with_splices(1030)),
    ]
}

/// Prints how many vertices, panels and edges a case has.
fn count(case: usize) {
    let (shell, findings): (Shell, _) = grow(&cases()[case].1);
    assert!(!shell.panels.is_empty(), "{findings:?}");
    println!("{} {} {}", shell.points.len(), shell.panels.len(), shell.edges.len());
}

/// One piece of work: growing, or with counts the bare loop.
fn one(case: usize, counts: [usize; 3]) -> Duration {
    let (_, shape) = &cases()[case];
    if counts[0] == 0 {
        let (time, result) = timed(|| grow(shape));
        drop(black_box(result));
        time
    } else {
        timed(|| baseline(counts[0], counts[1], counts[2])).0
    }
}

fn peak_kb() -> u64 {
    let status = std::fs::read_to_string("/proc/self/status").unwrap_or_default();
    let line = status.lines().find_map(|l| l.strip_prefix("VmHWM:")).unwrap_or("0 kB");
    line.trim().trim_end_matches(" kB").parse().unwrap_or(0)
}

/// Runs this program again as a child with these words, and reads the numbers that it prints.
fn ask(words: &[String]) -> Vec<f64> {
    let program = std::env::current_exe().expect("this program has a path");
    let output = Command::new(program).args(words).output().expect("a child starts");
    let text = String::from_utf8_lossy(&output.stdout);
    text.split_whitespace().filter_map(|word| word.parse().ok()).collect()
}

fn compare(case: usize, name: &str) {
    let counts = ask(&["count".into(), case.to_string()]);
    let [v, p, e] = [counts[0], counts[1], counts[2]];
    let words = |counts: [f64; 3]| {
        let mut words = vec!["one".to_string(), case.to_string()];
        words.extend(counts.iter().map(|c| format!("{c:.0}")));
        words
    };
    let (mut grown, mut written, mut peaks) = (Vec::new(), Vec::new(), [0.0, 0.0]);
    for _ in 0..RUNS {
        let base = ask(&words([v, p, e]));
        let own = ask(&words([0.0; 3]));
        written.push(base[0]);
        grown.push(own[0]);
        peaks = [own[1], base[1]];
    }
    let [grown, written] = [median(grown), median(written)].map(|t| t * 1e3);
    let bytes = v * 24.0 + p * 28.0 + e * 16.0;
    println!(
        "{name:<20} {p:>8} panels  grow {grown:7.1} ms  baseline {written:7.1} ms  ratio {:5.2}   peak {:6.1} MB  baseline {:6.1} MB  \
         bytes written {:5.1} MB",
        grown / written,
        peaks[0] / 1024.0,
        peaks[1] / 1024.0,
        bytes / 1048576.0
    );
}

fn main() {
    let words: Vec<String> = std::env::args().skip(1).filter(|w| w != "--bench").collect();
    let number = |k: usize| words.get(k).and_then(|w| w.parse::<usize>().ok()).unwrap_or(0);
    match words.first().map(String::as_str) {
        Some("count") => count(number(1)),
        Some("one") => {
            let time = one(number(1), [number(2), number(3), number(4)]);
            println!("{} {}", time.as_secs_f64(), peak_kb());
        }
        _ => {
            for (case, (name, _)) in cases().iter().enumerate() {
                compare(case, name);
            }
        }
    }
}
