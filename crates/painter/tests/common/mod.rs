//! Shells built by hand, and the ray cast that pictures are held against.

#![allow(dead_code, reason = "each test file uses a part")]

#[path = "../../../../tests/src/ray_cast.rs"]
#[allow(unreachable_pub, reason = "the file is a public module of another member")]
pub(crate) mod ray_cast;

use std::collections::BTreeMap;

use zonewright_geometry::{Edge, NONE, Panel, Point, Rim, Shell, Vector};

/// A shell of panels given by their corner and two sides, with shared vertices, edges and a rim where there is one.
pub(crate) fn shell(panels: &[[Vector; 3]]) -> Shell {
    let mut shell = Shell::default();
    let mut vertices = BTreeMap::new();
    for &[at, u, v] in panels {
        let corners = [at, at + u, at + u + v, at + v].map(|p| {
            let key = p.to_array().map(|x| (x * 1e6).round() as i64);
            *vertices.entry(key).or_insert_with(|| {
                shell.points.push(Point(p));
                shell.points.len() as u32 - 1
            })
        });
        shell.panels.push(Panel {
            corners,
            letters: [0, 1],
            course: 1,
        });
    }
    add_edges(&mut shell);
    shell
}

pub(crate) fn add_edges(shell: &mut Shell) {
    let mut edges: BTreeMap<[u32; 2], usize> = BTreeMap::new();
    for (panel, p) in (0..).zip(&shell.panels) {
        for k in 0..4 {
            let ends = [p.corners[k], p.corners[(k + 1) % 4]];
            if let Some(&edge) = edges.get(&[ends[1], ends[0]]) {
                shell.edges[edge].panels[1] = panel;
            } else {
                edges.insert(ends, shell.edges.len());
                shell.edges.push(Edge {
                    ends,
                    panels: [panel, NONE],
                });
            }
        }
    }
    let open: Vec<u32> = (0..)
        .zip(&shell.edges)
        .filter(|(_, e)| e.panels[1] == NONE)
        .map(|(k, _)| k)
        .collect();
    if !open.is_empty() {
        shell.rims.push(Rim {
            vertices: open.iter().map(|&e| shell.edges[e as usize].ends[0]).collect(),
            edges: open,
        });
    }
}

const fn v(x: f64, y: f64, z: f64) -> Vector {
    Vector::new(x, y, z)
}

/// A cube of side 1000 about the origin, outside outside.
pub(crate) fn cube() -> Shell {
    let h = 500.0;
    let (x, y, z) = (v(1000.0, 0.0, 0.0), v(0.0, 1000.0, 0.0), v(0.0, 0.0, 1000.0));
    let low = v(-h, -h, -h);
    shell(&[
        [low, y, x],
        [low + z, x, y],
        [low, x, z],
        [low + y, z, x],
        [low, z, y],
        [low + x, y, z],
    ])
}

/// Courses of rhombs round a pole, from the pole down to the other: a convex polar zonohedron, closed.
pub(crate) fn polar(ribs: usize) -> Shell {
    let rib = |k: usize| {
        let a = k as f64 / ribs as f64 * core::f64::consts::TAU;
        v(a.cos() * 300.0, a.sin() * 300.0, -200.0)
    };
    let mut panels = Vec::new();
    for course in 1..ribs {
        for k in 0..ribs {
            // The vertex after `course - 1` steps along consecutive ribs, and the next on either side.
            let at = (1..course).map(|j| rib(k + j)).sum::<Vector>();
            panels.push([at, rib(k), rib(k + course)]);
        }
    }
    shell(&panels)
}

/// Two squares through each other at a slant.
pub(crate) fn crossing() -> Shell {
    shell(&[
        [v(-500.0, -500.0, -100.0), v(1000.0, 0.0, 100.0), v(0.0, 1000.0, 80.0)],
        [v(-450.0, -480.0, -520.0), v(900.0, 70.0, 600.0), v(30.0, 950.0, 400.0)],
    ])
}

/// Three long slivers, each over the next and under the one before.
pub(crate) fn cycle() -> Shell {
    let sliver = |turn: f64| {
        let (s, c) = turn.to_radians().sin_cos();
        let along = v(c, s, 0.0);
        let across = v(-s, c, 0.0);
        // Beside the middle, rising along its length: at one crossing above, at the other below.
        [
            across * 150.0 - along * 800.0 - v(0.0, 0.0, 75.0),
            along * 1600.0 + v(0.0, 0.0, 150.0),
            across * 50.0,
        ]
    };
    shell(&[sliver(0.0), sliver(120.0), sliver(240.0)])
}

/// A sheet of parallelograms between rays of a helicoid: every panel leans across its neighbours' planes.
pub(crate) fn helicoid(turns: usize, across: usize) -> Shell {
    let mut panels = Vec::new();
    for k in 0..turns {
        for j in 0..across {
            let a = k as f64 * 0.2;
            let ray = v(a.cos(), a.sin(), 0.0) * 100.0;
            let at = v(0.0, 0.0, k as f64 * 40.0) + ray * (j as f64 - across as f64 / 2.0);
            let step = v(0.0, 0.0, 40.0) + v(-a.sin(), a.cos(), 0.0) * (20.0 * (j as f64 + 0.5 - across as f64 / 2.0));
            panels.push([at, ray, step]);
        }
    }
    shell(&panels)
}

/// A wavy sheet of `n * n` panels that is a sum of two plane curves.
pub(crate) fn waves(n: usize) -> Shell {
    let curve = |t: f64, k: f64| (t * k).sin() * 3.0 * 40.0;
    let mut panels = Vec::with_capacity(n * n);
    for i in 0..n {
        for j in 0..n {
            let (x, y) = (i as f64, j as f64);
            let at = v(x * 40.0, y * 40.0, curve(x, 0.11) + curve(y, 0.07));
            panels.push([
                at,
                v(40.0, 0.0, curve(x + 1.0, 0.11) - curve(x, 0.11)),
                v(0.0, 40.0, curve(y + 1.0, 0.07) - curve(y, 0.07)),
            ]);
        }
    }
    shell(&panels)
}

/// The waves, turned so that nothing in them is parallel to an axis.
pub(crate) fn turned_waves(n: usize) -> Shell {
    let mut shell = waves(n);
    let (s, c) = 0.5_f64.sin_cos();
    for p in &mut shell.points {
        let q = p.0;
        *p = Point::new(q.x * c - q.y * s, q.x * s + q.y * c, q.z + 0.3 * q.x);
    }
    shell
}
