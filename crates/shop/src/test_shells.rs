//! Small shells built by hand, for tests.

use std::collections::BTreeMap;

use zonewright_geometry::{
    Course, CrowdedEdge, Edge, Letter, Maker, NONE, Panel, Point, Role, Shell, Sign, Tee, Vector, Zone, ZoneKind,
    ZoneRef,
};

/// A shell of quads given counter-clockwise from outside, with the course and the two zones of each.
pub(crate) fn shell_of(
    points: Vec<Point>,
    quads: &[([u32; 4], i32, [u32; 2])],
    tees: Vec<Tee>,
    zones: &[Vector],
) -> Shell {
    let panels = quads.iter().map(|&(corners, course, letters)| Panel {
        corners,
        letters,
        course,
    });
    let mut shell = Shell {
        points,
        panels: panels.collect(),
        tees,
        ..Shell::default()
    };
    for (index, &vector) in (0_u32..).zip(zones) {
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
    let mut found: BTreeMap<[u32; 2], u32> = BTreeMap::new();
    let mut crowds: BTreeMap<u32, Vec<u32>> = BTreeMap::new();
    let mut counts: BTreeMap<i32, u32> = BTreeMap::new();
    for panel in 0..quads.len() as u32 {
        *counts.entry(quads[panel as usize].1).or_default() += 1;
        let outline = shell.outline(panel);
        for (k, &a) in outline.iter().enumerate() {
            let b = outline[(k + 1) % outline.len()];
            let edge = *found.entry([a.min(b), a.max(b)]).or_insert_with(|| {
                shell.edges.push(Edge {
                    ends: [a, b],
                    panels: [NONE; 2],
                });
                shell.edges.len() as u32 - 1
            });
            let panels = &mut shell.edges[edge as usize].panels;
            match panels.iter_mut().find(|p| **p == NONE) {
                Some(free) => *free = panel,
                None => crowds.entry(edge).or_default().push(panel),
            }
        }
    }
    shell.crowded = crowds
        .into_iter()
        .map(|(edge, more)| CrowdedEdge { edge, more })
        .collect();
    shell.courses = counts
        .into_iter()
        .map(|(number, panels)| Course {
            number,
            panels,
            step: zonewright_geometry::StepId(1),
            pass: number.unsigned_abs(),
        })
        .collect();
    shell
}

/// The polar form of n ribs of this length at this pitch (degrees), closed: docs/checks.md.
///
/// Level k has n rhombi, spanned by ribs i and i + k; ring j has the vertices `e_i + .. + e_(i+j-1)`.
pub(crate) fn polar(n: u32, pitch: f64, length: f64) -> Shell {
    let (rise, reach) = (pitch.to_radians().sin() * length, pitch.to_radians().cos() * length);
    let rib = |i: u32| {
        let azimuth = core::f64::consts::TAU * f64::from(i % n) / f64::from(n);
        Vector::new(reach * azimuth.cos(), reach * azimuth.sin(), rise)
    };
    let mut points = vec![Point::ORIGIN];
    for ring in 1..n {
        for i in 0..n {
            points.push((i..i + ring).fold(Point::ORIGIN, |p, m| p + rib(m)));
        }
    }
    points.push(Point::new(0.0, 0.0, rise * f64::from(n)));
    let vertex = |i: u32, ring: u32| match ring {
        0 => 0,
        _ if ring == n => (n - 1) * n + 1,
        _ => 1 + (ring - 1) * n + i % n,
    };
    let mut quads = Vec::new();
    for level in 1..n {
        for i in 0..n {
            let corners = [
                vertex(i + 1, level - 1),
                vertex(i + 1, level),
                vertex(i, level + 1),
                vertex(i, level),
            ];
            quads.push((corners, level as i32, [(i + level) % n, i]));
        }
    }
    let ribs: Vec<Vector> = (0..n).map(rib).collect();
    let shell = shell_of(points, &quads, Vec::new(), &ribs);
    assert!(
        zonewright_geometry::measure::totals(&shell)
            .volume_mm3
            .is_some_and(|v| v > 0.0)
    );
    shell
}

/// Two panels of 800 by 500, 60 degrees, mirror images of each other in the plane of their shared edge, folded along it.
pub(crate) fn mirror_pair() -> Shell {
    let (s, c) = (60_f64.to_radians().sin() * 500.0, 250.0);
    let points = vec![
        Point::new(0.0, 0.0, 0.0),
        Point::new(800.0, 0.0, 0.0),
        Point::new(800.0 + c, 0.9 * s, -s * 0.19_f64.sqrt()),
        Point::new(c, 0.9 * s, -s * 0.19_f64.sqrt()),
        Point::new(800.0 + c, -0.9 * s, -s * 0.19_f64.sqrt()),
        Point::new(c, -0.9 * s, -s * 0.19_f64.sqrt()),
    ];
    let zones = [points[1] - points[0], points[3] - points[0], points[5] - points[0]];
    shell_of(
        points,
        &[([0, 1, 2, 3], 1, [0, 1]), ([0, 5, 4, 1], -1, [2, 0])],
        Vec::new(),
        &zones,
    )
}

/// A square of 600 with two squares of 300 butted against one side, folded down by 30 degrees.
pub(crate) fn butted() -> Shell {
    let (y, z) = (-300.0 * 30_f64.to_radians().cos(), -300.0 * 30_f64.to_radians().sin());
    let points = vec![
        Point::new(0.0, 0.0, 0.0),
        Point::new(600.0, 0.0, 0.0),
        Point::new(600.0, 600.0, 0.0),
        Point::new(0.0, 600.0, 0.0),
        Point::new(300.0, 0.0, 0.0),
        Point::new(0.0, y, z),
        Point::new(300.0, y, z),
        Point::new(600.0, y, z),
    ];
    let zones = [
        Vector::X * 600.0,
        Vector::Y * 600.0,
        Vector::X * 300.0,
        points[5] - points[0],
    ];
    let quads = [
        ([0, 1, 2, 3], 1, [0, 1]),
        ([5, 6, 4, 0], 2, [2, 3]),
        ([6, 7, 1, 4], 2, [2, 3]),
    ];
    let tee = Tee {
        panel: 0,
        side: 0,
        vertices: vec![4],
    };
    shell_of(points, &quads, vec![tee], &zones)
}

/// Three squares of 100 on one edge.
pub(crate) fn fan() -> Shell {
    let points = vec![
        Point::new(0.0, 0.0, 0.0),
        Point::new(100.0, 0.0, 0.0),
        Point::new(100.0, 100.0, 0.0),
        Point::new(0.0, 100.0, 0.0),
        Point::new(100.0, -100.0, 0.0),
        Point::new(0.0, -100.0, 0.0),
        Point::new(100.0, 0.0, -100.0),
        Point::new(0.0, 0.0, -100.0),
    ];
    let zones = [Vector::X * 100.0, Vector::Y * 100.0, Vector::Z * 100.0];
    let quads = [
        ([0, 1, 2, 3], 1, [0, 1]),
        ([5, 4, 1, 0], 1, [0, 1]),
        ([7, 6, 1, 0], 2, [0, 2]),
    ];
    shell_of(points, &quads, Vec::new(), &zones)
}
