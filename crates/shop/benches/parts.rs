//! Parts and lists of 10,000 and 100,000 panels, nearly all of them different: the worst case for families.
//!
//! Goal (design figures): within a 60 Hz frame of 16.7 ms together with growing and drawing, on one core.

use divan::{Bencher, black_box};
use zonewright_geometry::{
    Edge, Letter, Maker, NONE, Panel, Point, Role, Shell, Sign, Vector, Zone, ZoneKind, ZoneRef,
};
use zonewright_shop::{FamilyTolerance, Parts, lists};

fn main() {
    divan::main();
}

/// A patch of n by n panels between two paths: `P_i + Q_j`. Bending both at uneven steps makes every panel its own.
fn patch(n: u32, uneven: f64) -> Shell {
    let step = |k: u32, toward: Vector| {
        let k = f64::from(k);
        let turn = (0.3 + 2.4 * (k + uneven * (k * 1.7).sin()) / f64::from(n)).sin_cos();
        toward * turn.1 * 300.0 + Vector::Z * turn.0 * 200.0
    };
    let path = |toward: Vector| {
        let steps = (0..n).map(move |k| step(k, toward));
        let from = core::iter::once(Vector::ZERO);
        from.chain(steps.scan(Vector::ZERO, |at, s| {
            *at += s;
            Some(*at)
        }))
    };
    let across: Vec<Vector> = path(Vector::X).collect();
    let along: Vec<Vector> = path(Vector::new(0.2, 1.0, 0.0)).collect();
    let points = along.iter().flat_map(|&q| across.iter().map(move |&p| Point(p + q)));
    let mut shell = Shell {
        points: points.collect(),
        ..Shell::default()
    };
    let vertex = |i: u32, j: u32| j * (n + 1) + i;
    let panel = |i: u32, j: u32| if i < n && j < n { j * n + i } else { NONE };
    for j in 0..n {
        for i in 0..n {
            shell.panels.push(Panel {
                corners: [vertex(i, j), vertex(i + 1, j), vertex(i + 1, j + 1), vertex(i, j + 1)],
                letters: [i, n + j],
                course: j as i32 + 1,
            });
        }
    }
    for j in 0..=n {
        for i in 0..=n {
            if i < n {
                let below = j.checked_sub(1).map_or(NONE, |j| panel(i, j));
                shell
                    .edges
                    .push(edge([vertex(i, j), vertex(i + 1, j)], [panel(i, j), below]));
            }
            if j < n {
                let before = i.checked_sub(1).map_or(NONE, |i| panel(i, j));
                shell
                    .edges
                    .push(edge([vertex(i, j + 1), vertex(i, j)], [panel(i, j), before]));
            }
        }
    }
    for index in 0..2 * n {
        shell.zones.push(Zone {
            vector: Vector::X,
            name: ZoneRef::Start(index),
            kind: ZoneKind::Derived,
            counts_as: index,
            reversed: false,
        });
        shell.letters.push(Letter {
            maker: Maker::Start,
            index,
            sign: Sign::Plus,
            at: NONE,
            zone: index,
            born: Role::Zig,
        });
    }
    shell
}

fn edge(ends: [u32; 2], panels: [u32; 2]) -> Edge {
    Edge { ends, panels }
}

/// Panels a side, and how uneven the steps are.
const PATCHES: [(u32, f64); 3] = [(100, 0.0), (100, 0.4), (316, 0.4)];

#[divan::bench(args = PATCHES)]
fn parts(bencher: Bencher, (n, uneven): (u32, f64)) {
    let shell = patch(n, uneven);
    bencher.bench_local(|| Parts::new(black_box(&shell), &FamilyTolerance::default()));
}

/// The bare work below it: every edge's dihedral angle and length, nothing kept.
#[divan::bench(args = PATCHES)]
fn baseline_dihedrals(bencher: Bencher, (n, uneven): (u32, f64)) {
    let shell = patch(n, uneven);
    bencher.bench_local(|| {
        (0..shell.edges.len() as u32)
            .filter_map(|e| zonewright_geometry::measure::dihedral(black_box(&shell), e))
            .sum::<f64>()
    });
}

#[divan::bench(args = PATCHES)]
fn panels_csv(bencher: Bencher, (n, uneven): (u32, f64)) {
    let shell = patch(n, uneven);
    let parts = Parts::new(&shell, &FamilyTolerance::default());
    bencher.bench_local(|| lists::panels_csv(black_box(&shell), &parts));
}
