//! Measures of a grown shell.

use crate::{Shell, Vector};

/// Which edges each panel has: one a corner of [`Shell::outline`], in the same order.
#[derive(Clone, PartialEq, Eq, Debug, Default)]
pub struct Borders {
    first: Vec<u32>,
    edges: Vec<u32>,
}

impl Borders {
    /// Looks the borders of all panels up, in time linear in the panels.
    #[must_use]
    pub fn new(shell: &Shell) -> Self {
        let _ = shell;
        Self::default()
    }

    /// The edges of a panel; `edges(p)[k]` runs from outline corner k to the next.
    #[must_use]
    pub fn edges(&self, panel: u32) -> &[u32] {
        let [from, to] = [self.first[panel as usize], self.first[panel as usize + 1]];
        &self.edges[from as usize..to as usize]
    }
}

/// Length of an edge, in millimetres.
#[must_use]
pub fn edge_length(shell: &Shell, edge: u32) -> f64 {
    let [a, b] = shell.edges[edge as usize].ends;
    shell.points[a as usize].distance(shell.points[b as usize])
}

/// Dihedral angle at an edge, measured inside, in radians from 0 to a full turn; none unless exactly two panels meet there.
#[must_use]
pub fn dihedral(shell: &Shell, edge: u32) -> Option<f64> {
    let _ = (shell, edge);
    None
}

/// The angle at which a panel's sides meet in the acute corners, in radians, up to a right angle.
#[must_use]
pub fn acute_angle(shell: &Shell, panel: u32) -> f64 {
    let _ = (shell, panel);
    0.0
}

/// The short and the long diagonal of a panel, in millimetres.
#[must_use]
pub fn diagonals(shell: &Shell, panel: u32) -> [f64; 2] {
    let _ = (shell, panel);
    [0.0; 2]
}

/// Area of a panel, in square millimetres.
#[must_use]
pub fn panel_area(shell: &Shell, panel: u32) -> f64 {
    shell.area_vector(panel).length()
}

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

/// The readouts of a shell that need no inspection.
#[derive(Clone, PartialEq, Debug, Default)]
pub struct Totals {
    /// How many panels.
    pub panels: usize,
    /// How many vertices.
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
    /// Enclosed volume, in cubic millimetres, positive when the outside looks out; none unless every edge has exactly two panels.
    /// Whether panels cross is not looked at here.
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

/// The readouts of a shell.
#[must_use]
pub fn totals(shell: &Shell) -> Totals {
    let _ = shell;
    Totals::default()
}

/// Angle deficit at each vertex, in radians: a full turn less the corner angles inside, half a turn less them on a rim.
#[must_use]
pub fn angle_deficits(shell: &Shell) -> Vec<f64> {
    vec![0.0; shell.points.len()]
}
