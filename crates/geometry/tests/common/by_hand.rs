//! Shells made by hand, from the places of their panels' corners, without growing.

#![allow(dead_code, unreachable_pub, reason = "each test and bench uses its own part of this")]

use std::collections::BTreeMap;

use zonewright_geometry::{
    CrowdedEdge, Edge, Letter, Maker, NONE, Panel, Point, Rim, Role, Shell, Sign, Tee, Vector, Zone, ZoneKind, ZoneRef,
};

pub type Quad = [Point; 4];

/// A parallelogram from a corner and its two sides.
pub fn quad(corner: [f64; 3], u: [f64; 3], v: [f64; 3]) -> Quad {
    let [u, v] = [u, v].map(Vector::from_array);
    let a = Point(Vector::from_array(corner));
    [a, a + u, a + u + v, a + v]
}

/// A shell whose panels share the corners and edges that are in the same place; corners inside sides split them.
pub fn joined(quads: &[Quad]) -> Shell {
    build(quads, true)
}

/// A shell whose panels share nothing.
pub fn loose(quads: &[Quad]) -> Shell {
    build(quads, false)
}

/// Split sides are looked for one against all, which is for small shells.
const SPLIT_UP_TO: usize = 300;

fn build(quads: &[Quad], join: bool) -> Shell {
    let mut shell = Shell::default();
    let mut places = BTreeMap::new();
    let mut zones = BTreeMap::new();
    for quad in quads {
        let corners = quad.map(|p| {
            let key = p.to_array().map(|x| (x * 1e6).round() as i64);
            let next = shell.points.len() as u32;
            let vertex = if join { *places.entry(key).or_insert(next) } else { next };
            if vertex == next {
                shell.points.push(p);
            }
            vertex
        });
        let letters = [quad[1] - quad[0], quad[3] - quad[0]].map(|v| zone(&mut shell, &mut zones, v));
        shell.panels.push(Panel {
            corners,
            letters,
            course: 1,
        });
    }
    if join && quads.len() <= SPLIT_UP_TO {
        split_sides(&mut shell);
    }
    edges(&mut shell);
    rims(&mut shell);
    shell
}

fn zone(shell: &mut Shell, zones: &mut BTreeMap<[i64; 3], u32>, vector: Vector) -> u32 {
    let key = vector.to_array().map(|x| (x * 1e6).round() as i64);
    let key = if key < [0; 3] { key.map(|x| -x) } else { key };
    let next = shell.zones.len() as u32;
    let index = *zones.entry(key).or_insert(next);
    if index == next {
        shell.zones.push(Zone {
            vector,
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
    index
}

fn split_sides(shell: &mut Shell) {
    for (panel, p) in (0_u32..).zip(&shell.panels) {
        for side in 0..4_u8 {
            let [from, to] = [0, 1].map(|k| shell.points[p.corners[(usize::from(side) + k) % 4] as usize]);
            let along = to - from;
            let mut inside: Vec<(f64, u32)> = (0_u32..)
                .zip(&shell.points)
                .filter_map(|(v, &at)| {
                    let t = (at - from).dot(along) / along.length_squared();
                    let off = (at - (from + along * t)).length();
                    (off < 1e-7 && t > 1e-6 && t < 1.0 - 1e-6).then_some((t, v))
                })
                .collect();
            inside.sort_by(|a, b| a.0.total_cmp(&b.0));
            let vertices: Vec<u32> = inside.into_iter().map(|i| i.1).collect();
            if !vertices.is_empty() {
                shell.tees.push(Tee { panel, side, vertices });
            }
        }
    }
}

fn edges(shell: &mut Shell) {
    let mut known: BTreeMap<[u32; 2], u32> = BTreeMap::new();
    for panel in 0..shell.panels.len() as u32 {
        let outline = shell.outline(panel);
        for (k, &from) in outline.iter().enumerate() {
            let to = outline[(k + 1) % outline.len()];
            let next = shell.edges.len() as u32;
            let index = *known.entry([from.min(to), from.max(to)]).or_insert(next);
            if index == next {
                shell.edges.push(Edge {
                    ends: [from, to],
                    panels: [panel, NONE],
                });
            } else if shell.edges[index as usize].panels[1] == NONE {
                shell.edges[index as usize].panels[1] = panel;
            } else if let Some(crowd) = shell.crowded.iter_mut().find(|c| c.edge == index) {
                crowd.more.push(panel);
            } else {
                shell.crowded.push(CrowdedEdge {
                    edge: index,
                    more: vec![panel],
                });
            }
        }
    }
    shell.crowded.sort_by_key(|c| c.edge);
}

fn rims(shell: &mut Shell) {
    let mut open: BTreeMap<u32, Vec<u32>> = BTreeMap::new();
    for (index, edge) in (0_u32..).zip(&shell.edges) {
        if edge.panels[1] == NONE {
            open.entry(edge.ends[0]).or_default().push(index);
        }
    }
    while let Some((&start, _)) = open.iter().find(|(_, edges)| !edges.is_empty()) {
        let mut rim = Rim {
            vertices: Vec::new(),
            edges: Vec::new(),
        };
        let mut at = start;
        while let Some(edge) = open.get_mut(&at).and_then(Vec::pop) {
            rim.vertices.push(at);
            rim.edges.push(edge);
            at = shell.edges[edge as usize].ends[1];
        }
        shell.rims.push(rim);
    }
}

/// The panels of a helical solid of edge 1: n ribs at pitch t, the first r of them zig, the rest zag; exchange until still; the
/// first r again; until the front is the first front again (docs/checks.md, worked cases).
pub fn helical(n: usize, r: usize, t: f64) -> Vec<Quad> {
    let turn = std::f64::consts::TAU / n as f64;
    let rib = |i: usize| {
        let a = turn * i as f64;
        Vector::new(t.cos() * a.cos(), t.cos() * a.sin(), t.sin())
    };
    let mut word: Vec<usize> = (0..n).collect();
    let mut quads = Vec::new();
    let rounds = n / gcd(n, r);
    let mut nodes = vec![Point::ORIGIN];
    for &i in &word {
        nodes.push(nodes[nodes.len() - 1] + rib(i));
    }
    for _ in 0..rounds {
        let mut zig: Vec<bool> = (0..n).map(|k| k < r).collect();
        while let Some(k) = (1..n).find(|&k| zig[k - 1] && !zig[k]) {
            let new = nodes[k - 1] + rib(word[k]);
            quads.push([nodes[k - 1], nodes[k], nodes[k + 1], new]);
            nodes[k] = new;
            word.swap(k - 1, k);
            zig.swap(k - 1, k);
        }
    }
    quads
}

/// The panels of a polar zonohedron of edge 1 from its pole on, this many levels of them, outside out.
pub fn polar(n: usize, t: f64, levels: usize) -> Vec<Quad> {
    let turn = std::f64::consts::TAU / n as f64;
    let rib = |i: usize| {
        let a = turn * (i % n) as f64;
        Vector::new(t.cos() * a.cos(), t.cos() * a.sin(), -t.sin())
    };
    // The top corner of the panel at level k is the sum of k - 1 ribs that follow each other.
    let mut quads = Vec::new();
    for k in 1..=levels {
        for i in 0..n {
            let top = (i + 1..i + k).fold(Point::ORIGIN, |p, j| p + rib(j));
            let [a, b] = [rib(i), rib(i + k)];
            quads.push([top, top + a, top + a + b, top + b]);
        }
    }
    quads
}

fn gcd(a: usize, b: usize) -> usize {
    if b == 0 { a } else { gcd(b, a % b) }
}

/// Turns every panel over.
pub fn reversed(quads: &[Quad]) -> Vec<Quad> {
    quads.iter().map(|&[a, b, c, d]| [a, d, c, b]).collect()
}

/// The faces of a box from the origin, outside out.
pub fn block(x: f64, y: f64, z: f64) -> Vec<Quad> {
    vec![
        quad([0.0; 3], [0.0, y, 0.0], [x, 0.0, 0.0]),
        quad([0.0, 0.0, z], [x, 0.0, 0.0], [0.0, y, 0.0]),
        quad([0.0; 3], [x, 0.0, 0.0], [0.0, 0.0, z]),
        quad([0.0, y, 0.0], [0.0, 0.0, z], [x, 0.0, 0.0]),
        quad([0.0; 3], [0.0, 0.0, z], [0.0, y, 0.0]),
        quad([x, 0.0, 0.0], [0.0, y, 0.0], [0.0, 0.0, z]),
    ]
}
