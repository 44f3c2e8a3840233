//! The panels that filling an open V would make, as it stands and with directions spliced in.

use crate::{
    Angle, Direction, OpenV, Placement, Shell, Side, Vector, ZoneRef,
    grow::{PARALLEL_SINE, placed_vector},
};

/// A panel that two letters would make.
#[derive(Clone, Copy, PartialEq, Debug)]
pub struct PanelAhead {
    /// Lengths of its two sides, the zig letter's first, in millimetres.
    pub sides_mm: [f64; 2],
    /// Its acute angle, from 0 to a quarter turn.
    pub acute: Angle,
    /// Its area, in square millimetres.
    pub area_mm2: f64,
}

impl PanelAhead {
    /// The panel of two letters, given by their vectors; none when they are parallel, which makes no panel.
    #[must_use]
    pub fn of(zig: Vector, zag: Vector) -> Option<Self> {
        let sides_mm = [zig.length(), zag.length()];
        let area_mm2 = zig.cross(zag).length();
        (PARALLEL_SINE * sides_mm[0] * sides_mm[1] < area_mm2).then(|| Self {
            sides_mm,
            acute: Angle::from_radians(area_mm2.atan2(zig.dot(zag).abs())),
            area_mm2,
        })
    }

    /// The panel that filling an open V as it stands would make.
    #[must_use]
    pub fn of_v(v: &OpenV) -> Option<Self> {
        Self::of(v.nodes[1] - v.nodes[0], v.nodes[2] - v.nodes[1])
    }
}

/// The spurs that splicing directions in at an open V would insert, as vectors from the V's middle node to their tips, in
/// the placed frame and in millimetres. A direction along a zone that does not exist gives none.
#[must_use]
pub fn spurs_of_splice(shell: &Shell, placement: &Placement, v: &OpenV, directions: &[Direction]) -> Vec<Vector> {
    let zone = |name: ZoneRef| shell.zones.iter().find(|z| z.name == name).map(|z| z.vector);
    let mut spurs = Vec::with_capacity(directions.len());
    for direction in directions {
        match *direction {
            Direction::Own(vector) => spurs.push(vector),
            Direction::Zone(name) => spurs.extend(zone(name)),
            Direction::Against(name) => spurs.extend(zone(name).map(|v| -v)),
            Direction::Between => spurs.extend(between(shell, v)),
        }
    }
    spurs.into_iter().map(|x| placed_vector(placement, x)).collect()
}

/// All the start's zones that lie between the V's two, going up from its zig's to its zag's and round, with the zag's sign.
fn between(shell: &Shell, v: &OpenV) -> Vec<Vector> {
    let [zig, zag] = letters(shell, v);
    let start = shell
        .zones
        .iter()
        .take_while(|z| matches!(z.name, ZoneRef::Start(_)))
        .count();
    let [from, to] = [zig, zag].map(|l| shell.zone_of(l) as usize);
    if start <= from || start <= to {
        return Vec::new();
    }
    let sign = shell.letters[zag as usize].sign.factor();
    let steps = (to + start - from) % start;
    (1..steps)
        .map(|k| shell.zones[(from + k) % start].vector * sign)
        .collect()
}

/// The zig and the zag letter of an open V.
pub(super) fn letters(shell: &Shell, v: &OpenV) -> [u32; 2] {
    let front = &shell.fronts[usize::from(v.side == Side::Aft)];
    let behind = (v.position + 1) % front.letters.len();
    [v.position, behind].map(|at| front.letters[at].letter)
}

/// The panels that the next course would make at an open V once these spurs stand in it: m spurs turn one V into m + 1, in
/// order from the zig letter. None stands for a V of parallel letters.
#[must_use]
pub fn panels_of_splice(v: &OpenV, spurs: &[Vector]) -> Vec<Option<PanelAhead>> {
    let zigs = core::iter::once(v.nodes[1] - v.nodes[0]).chain(spurs.iter().map(|x| -*x));
    let zags = spurs.iter().copied().chain([v.nodes[2] - v.nodes[1]]);
    zigs.zip(zags).map(|(zig, zag)| PanelAhead::of(zig, zag)).collect()
}
