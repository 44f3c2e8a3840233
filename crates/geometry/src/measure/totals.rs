//! The readouts of a whole shell.

use core::f64::consts::PI;

use super::{Sum, angles};
use crate::{NONE, Point, Shell, Vector};

/// A smallest and a largest value, and where they are.
#[derive(Clone, Copy, PartialEq, Debug)]
pub struct Range {
    /// The smallest.
    pub least: f64,
    /// Index of the edge or panel that has it; the lowest index of several.
    pub least_at: u32,
    /// The largest.
    pub most: f64,
    /// Index of the edge or panel that has it; the lowest index of several.
    pub most_at: u32,
}

/// Values that differ by less than this part of themselves count as equal when the lowest index is looked for: far
/// above what rounding leaves (1e-12), far below what can be measured on a panel.
const SAME_VALUE: f64 = 1e-9;

impl Range {
    /// The range of values, each with its index, in rising order of the indices; none when there are none.
    ///
    /// Values that are not numbers are passed over.
    #[must_use]
    pub fn of(values: &[(u32, f64)]) -> Option<Self> {
        let [mut least, mut most] = [f64::INFINITY, f64::NEG_INFINITY];
        for &(_, value) in values {
            if value < least {
                least = value;
            }
            if value > most {
                most = value;
            }
        }
        let first = |of: f64| {
            let slack = of.abs() * SAME_VALUE;
            values.iter().find(|v| (v.1 - of).abs() <= slack).map(|v| v.0)
        };
        Some(Self {
            least,
            least_at: first(least)?,
            most,
            most_at: first(most)?,
        })
    }

    fn map(self, value: impl Fn(f64) -> f64) -> Self {
        Self {
            least: value(self.least),
            most: value(self.most),
            ..self
        }
    }
}

/// The readouts of a shell that need no inspection.
#[derive(Clone, PartialEq, Debug, Default)]
pub struct Totals {
    /// How many panels.
    pub panels: usize,
    /// How many vertices; only those of panels count.
    pub vertices: usize,
    /// How many edges, after T-splits.
    pub edges: usize,
    /// How many edges with one panel.
    pub open_edges: usize,
    /// How many rims.
    pub rims: usize,
    /// Vertices - edges + panels.
    pub euler: i64,
    /// How many zones the panels have; linked zones count as one.
    pub zones: usize,
    /// Area of all panels, in square millimetres.
    pub area_mm2: f64,
    /// Enclosed volume, in cubic millimetres, positive when the outside looks out; none unless every edge has exactly two panels
    /// and they have the same side out. Whether panels cross is not looked at here.
    pub volume_mm3: Option<f64>,
    /// Overall size along x, y, z, in millimetres.
    pub size: Vector,
    /// Length of the edges, in millimetres.
    pub lengths: Option<Range>,
    /// Acute angles of the panels, in radians.
    pub acute_angles: Option<Range>,
    /// Dihedral angles, in radians.
    pub dihedrals: Option<Range>,
}

/// The readouts of a shell, in time linear in its panels.
#[must_use]
pub fn totals(shell: &Shell) -> Totals {
    let corners = Corners::of(shell);
    let faces = Faces::of(shell);
    let sides = Sides::of(shell, &faces.normals);
    let count = |n: usize| i64::try_from(n).unwrap_or(i64::MAX);
    Totals {
        panels: shell.panels.len(),
        vertices: corners.vertices,
        edges: shell.edges.len(),
        open_edges: shell.edges.iter().filter(|e| e.rim_panel().is_some()).count(),
        rims: shell.rims.len(),
        euler: count(corners.vertices) - count(shell.edges.len()) + count(shell.panels.len()),
        zones: count_zones(shell),
        area_mm2: faces.area,
        volume_mm3: volume(shell, sides.agree),
        size: corners.size,
        lengths: Range::of(&sides.lengths),
        acute_angles: Range::of(&faces.acute).map(|range| range.map(angle_of_key)),
        dihedrals: Range::of(&sides.folds).map(|range| range.map(|key| PI + angle_of_key(key - 2.0))),
    }
}

/// How many vertices the panels have, and how far they reach.
struct Corners {
    vertices: usize,
    size: Vector,
}

impl Corners {
    fn of(shell: &Shell) -> Self {
        let mut used = vec![false; shell.points.len()];
        for vertex in shell.panels.iter().flat_map(|p| p.corners) {
            used[vertex as usize] = true;
        }
        let mut vertices = 0;
        let [mut least, mut most] = [Vector::INFINITY, Vector::NEG_INFINITY];
        for (point, _) in shell.points.iter().zip(&used).filter(|(_, used)| **used) {
            vertices += 1;
            least = least.min(point.0);
            most = most.max(point.0);
        }
        let size = if vertices == 0 { Vector::ZERO } else { most - least };
        Self { vertices, size }
    }
}

fn count_zones(shell: &Shell) -> usize {
    let mut has_panel = vec![false; shell.zones.len()];
    for letter in shell.panels.iter().flat_map(|p| p.letters) {
        let zone = &shell.zones[shell.zone_of(letter) as usize];
        has_panel[zone.counts_as as usize] = true;
    }
    has_panel.iter().filter(|has| **has).count()
}

/// What is measured panel by panel.
struct Faces {
    /// Area vectors.
    normals: Vec<Vector>,
    area: f64,
    /// Sort keys of the acute angles.
    acute: Vec<(u32, f64)>,
}

impl Faces {
    fn of(shell: &Shell) -> Self {
        let mut sum = Sum::default();
        let mut normals = Vec::with_capacity(shell.panels.len());
        let mut acute = Vec::with_capacity(shell.panels.len());
        for (panel, [a, b, _, d]) in (0_u32..).zip(corner_points(shell)) {
            let [u, v] = [b - a, d - a];
            let normal = u.cross(v);
            let area = normal.length();
            sum.add(area);
            normals.push(normal);
            acute.push((panel, sort_key(area, u.dot(v).abs())));
        }
        Self {
            normals,
            area: sum.value(),
            acute,
        }
    }
}

/// What is measured edge by edge.
struct Sides {
    lengths: Vec<(u32, f64)>,
    /// Sort keys of the dihedrals, moved up by 2.
    folds: Vec<(u32, f64)>,
    /// Whether panels that meet have the same side out.
    agree: bool,
}

impl Sides {
    fn of(shell: &Shell, normals: &[Vector]) -> Self {
        let mut all = Self {
            lengths: Vec::with_capacity(shell.edges.len()),
            folds: Vec::with_capacity(shell.edges.len()),
            agree: true,
        };
        let mut crowded = shell.crowded.iter().map(|c| c.edge).peekable();
        for (index, edge) in (0_u32..).zip(&shell.edges) {
            let [a, b] = edge.ends.map(|v| shell.points[v as usize]);
            let length = a.distance(b);
            all.lengths.push((index, length));
            let agree = angles::sides_agree(shell, edge);
            all.agree &= agree;
            while crowded.next_if(|&c| c < index).is_some() {}
            if edge.panels.contains(&NONE) || crowded.peek() == Some(&index) {
                continue;
            }
            let along = if length > 0.0 { (b - a) / length } else { Vector::ZERO };
            let normals = edge.panels.map(|p| normals[p as usize]);
            let [sine, cosine] = angles::fold_parts(normals, along, agree);
            // The dihedral is half a turn less the fold.
            all.folds.push((index, sort_key(-sine, cosine) + 2.0));
        }
        all
    }
}

/// The divergence theorem: a third of the sum of place times area vector.
fn volume(shell: &Shell, sides_agree: bool) -> Option<f64> {
    if !shell.is_closed() || !sides_agree {
        return None;
    }
    // From a vertex on, so that a shell far from the origin loses no digits.
    let from = shell.points[shell.panels.first()?.corners[0] as usize];
    let mut sum = Sum::default();
    for [a, b, c, d] in corner_points(shell) {
        sum.add((a - from).dot((c - a).cross(d - b)));
    }
    // The product of the diagonals is twice the area vector.
    Some(sum.value() / 6.0)
}

fn corner_points(shell: &Shell) -> impl Iterator<Item = [Point; 4]> {
    let place = |v: u32| shell.points[v as usize];
    shell.panels.iter().map(move |p| p.corners.map(place))
}

/// A number from -2 to 2 that rises with the angle from minus to plus half a turn, without an arc tangent an edge.
fn sort_key(sine: f64, cosine: f64) -> f64 {
    let key = sine / (sine.abs() + cosine.abs());
    if cosine >= 0.0 {
        key
    } else if sine.is_sign_negative() {
        -2.0 - key
    } else {
        2.0 - key
    }
}

/// The angle that has this key, in radians.
fn angle_of_key(key: f64) -> f64 {
    // With its sign also where it is 0: there a panel is folded flat, and the dihedral nothing or a full turn.
    let sine = key.abs().min(2.0 - key.abs()).copysign(key);
    let cosine = 1.0 - key.abs();
    sine.atan2(cosine)
}
