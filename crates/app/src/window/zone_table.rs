//! The zones of a shell as the window needs them: whose edge is which, and how many edges each zone has.

use zonewright_geometry::{Shell, ZoneRef};

/// The zones of a shell and their edges.
#[derive(Clone, PartialEq, Eq, Debug, Default)]
pub struct ZoneTable {
    /// The zone of each edge, by index in the shell's zones; none where there is no panel.
    pub of_edge: Vec<Option<u32>>,
    /// How many edges each zone has.
    pub edges: Vec<u32>,
}

impl ZoneTable {
    /// Looks all edges of a shell through once.
    #[must_use]
    pub fn of(shell: &Shell) -> Self {
        let count = u32::try_from(shell.edges.len()).unwrap_or(u32::MAX);
        let of_edge: Vec<Option<u32>> = (0..count).map(|edge| shell.edge_zone(edge)).collect();
        let mut edges = vec![0; shell.zones.len()];
        for zone in of_edge.iter().flatten() {
            edges[*zone as usize] += 1;
        }
        Self { of_edge, edges }
    }

    /// The edges of a zone and of all that count as it, by index in the shell.
    pub fn edges_of<'a>(&'a self, shell: &'a Shell, zone: u32) -> impl Iterator<Item = usize> + 'a {
        let counts_as = |zone: u32| shell.zones.get(zone as usize).map(|z| z.counts_as);
        let wanted = counts_as(zone);
        let of_edge = self.of_edge.iter().enumerate();
        of_edge.filter_map(move |(edge, zone)| (zone.and_then(counts_as) == wanted && wanted.is_some()).then_some(edge))
    }
}

/// The place of a zone among a shell's zones.
#[must_use]
pub(super) fn index_of(shell: &Shell, zone: ZoneRef) -> Option<u32> {
    let at = shell.zones.iter().position(|z| z.name == zone)?;
    u32::try_from(at).ok()
}

/// What a zone is called in the window: by its place, as in the lists.
#[must_use]
pub(super) fn zone_name(zone: u32) -> String {
    format!("Zone {}", zone + 1)
}
