//! Looking at a grown shell from outside the program: counts, classes, faces after merging.

use std::collections::{BTreeMap, BTreeSet};

use zonewright_geometry::{Shell, Vector, measure};

/// Vertices, edges, panels.
#[must_use]
pub fn counts(shell: &Shell) -> [usize; 3] {
    [shell.points.len(), shell.edges.len(), shell.panels.len()]
}

/// Indices of all panels.
#[must_use]
pub fn panels(shell: &Shell) -> std::ops::Range<u32> {
    0..u32::try_from(shell.panels.len()).expect("fewer panels than u32 holds")
}

/// Indices of all edges.
#[must_use]
pub fn edges(shell: &Shell) -> std::ops::Range<u32> {
    0..u32::try_from(shell.edges.len()).expect("fewer edges than u32 holds")
}

/// The enclosed volume.
///
/// # Panics
/// When the shell is not closed with the same side out everywhere.
#[must_use]
pub fn volume(shell: &Shell) -> f64 {
    measure::totals(shell).volume_mm3.expect("the shell encloses a volume")
}

/// Area by cross products of the corners' places, not by the measures.
#[must_use]
pub fn area(shell: &Shell) -> f64 {
    let of = |p: u32| {
        let [a, b, _, d] = shell.corner_points(p);
        (b - a).cross(d - a).length()
    };
    panels(shell).map(of).sum()
}

/// How many vertices have how many edges.
#[must_use]
pub fn degrees(shell: &Shell) -> BTreeMap<usize, usize> {
    let mut of_vertex = vec![0; shell.points.len()];
    for end in shell.edges.iter().flat_map(|e| e.ends) {
        of_vertex[end as usize] += 1;
    }
    tally(of_vertex)
}

/// How often each value comes.
pub fn tally<T: Ord>(values: impl IntoIterator<Item = T>) -> BTreeMap<T, usize> {
    let mut found = BTreeMap::new();
    for value in values {
        *found.entry(value).or_default() += 1;
    }
    found
}

/// Values that differ by no more than `within` from the lowest of their class: that lowest value, and how many. Ascending.
#[must_use]
pub fn classes(mut values: Vec<f64>, within: f64) -> Vec<(f64, usize)> {
    values.sort_by(f64::total_cmp);
    let mut found: Vec<(f64, usize)> = Vec::new();
    for value in values {
        match found.last_mut() {
            Some((first, count)) if value - *first <= within => *count += 1,
            _ => found.push((value, 1)),
        }
    }
    found
}

/// Dihedral angles in degrees and how many edges have each; classes a millionth of a degree wide.
#[must_use]
pub fn dihedrals(shell: &Shell) -> Vec<(f64, usize)> {
    let all = edges(shell).filter_map(|e| measure::dihedral(shell, e));
    classes(all.map(f64::to_degrees).collect(), 1e-6)
}

/// A closed shell after panels that lie in one plane next to each other are merged.
#[derive(Clone, PartialEq, Eq, Debug)]
pub struct Merged {
    /// Vertices, edges, faces.
    pub counts: [usize; 3],
    /// How many faces have how many corners.
    pub polygons: BTreeMap<usize, usize>,
}

/// Merges panels across edges that fold by less than a millionth of a degree. A vertex counts where three faces or more meet.
#[must_use]
pub fn merged(shell: &Shell) -> Merged {
    let mut face: Vec<usize> = (0..shell.panels.len()).collect();
    fn root(face: &[usize], mut of: usize) -> usize {
        while face[of] != of {
            of = face[of];
        }
        of
    }
    for edge in edges(shell) {
        let flat = measure::dihedral(shell, edge).is_some_and(|d| (d.to_degrees() - 180.0).abs() < 1e-6);
        if flat {
            let [a, b] = shell.edges[edge as usize].panels.map(|p| root(&face, p as usize));
            face[a.max(b)] = a.min(b);
        }
    }
    let mut faces_at: Vec<BTreeSet<usize>> = vec![BTreeSet::new(); shell.points.len()];
    for panel in panels(shell) {
        for corner in shell.outline(panel) {
            faces_at[corner as usize].insert(root(&face, panel as usize));
        }
    }
    let corners: Vec<&BTreeSet<usize>> = faces_at.iter().filter(|f| 3 <= f.len()).collect();
    let of_face = tally(corners.iter().flat_map(|f| f.iter().copied()));
    Merged {
        counts: [corners.len(), of_face.values().sum::<usize>() / 2, of_face.len()],
        polygons: tally(of_face.into_values()),
    }
}

/// For each zone the sum of fold times length over all its edges, divided by its length: the sum of the folds round the
/// zone, in radians; parts of split sides count by their length.
#[must_use]
pub fn folds_by_zone(shell: &Shell) -> Vec<f64> {
    let mut sums = vec![0.0; shell.zones.len()];
    for edge in edges(shell) {
        let fold = measure::dihedral(shell, edge).map_or(0.0, |d| core::f64::consts::PI - d);
        let [a, b] = shell.edges[edge as usize].ends.map(|v| shell.points[v as usize]);
        let along: Vector = b - a;
        let panel = shell.edges[edge as usize].panels[0];
        let zone = shell
            .panel_zones(panel)
            .into_iter()
            .min_by(|p, q| {
                let off = |z: &u32| {
                    let zone = shell.zones[*z as usize].vector;
                    along.cross(zone).length() / zone.length()
                };
                off(p).total_cmp(&off(q))
            })
            .expect("a panel has two zones");
        sums[zone as usize] += fold * along.length() / shell.zones[zone as usize].vector.length();
    }
    sums
}
