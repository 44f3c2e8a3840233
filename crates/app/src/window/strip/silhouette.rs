//! A front drawn as its outline, one column a point: for letters too narrow to be told apart, and for the overview. Kept
//! until what it shows is another.

use std::{ops::Range, sync::Arc};

use egui::{Color32, Mesh, Rect, Shape, pos2};
use zonewright_geometry::Side;

use super::{front::StripFront, ink::ZoneColours, sight::Sight};
use crate::window::state::State;

/// What an outline was drawn from.
#[derive(Clone, Copy, PartialEq, Debug)]
struct Key {
    revision: u64,
    side: Side,
    dark: bool,
    sight: Sight,
}

/// An outline, kept.
#[derive(Debug, Default)]
pub(super) struct Kept {
    drawn: Option<(Key, Arc<Mesh>)>,
    /// How often it was drawn anew.
    pub(super) times: u64,
}

impl Kept {
    /// The outline of a front in sight; `line` is the least height of a column.
    pub(super) fn shape(&mut self, state: &State, side: Side, sight: &Sight, line: f32, vs: bool) -> Shape {
        let key = Key {
            revision: state.derived.growth(),
            side,
            dark: state.view.dark,
            sight: *sight,
        };
        if let Some((known, mesh)) = &self.drawn
            && *known == key
        {
            return Shape::mesh(Arc::clone(mesh));
        }
        let mesh = Arc::new(draw(state, side, sight, line, vs));
        self.drawn = Some((key, Arc::clone(&mesh)));
        self.times += 1;
        Shape::mesh(mesh)
    }
}

/// Draws one column a point, coloured by the zone of a letter that is in it, and along the foot of the lane, when `vs`, what
/// the coming course fills there and what is spliced already.
fn draw(state: &State, side: Side, sight: &Sight, line: f32, vs: bool) -> Mesh {
    let front = state.derived.strip_on(side);
    let open = state.derived.open_on(side);
    let mut mesh = Mesh::default();
    let zones = ZoneColours::new(state);
    let columns = sight.lane.width().ceil() as usize;
    for column in 0..columns {
        let left = sight.lane.left() + column as f32;
        let letters = front.flat.within(sight.across(left), sight.across(left + 1.0));
        if letters.is_empty() {
            continue;
        }
        let ys = (letters.start..=letters.end).map(|node| sight.node(&front.flat, node).y);
        let (low, high) = ys.fold((f32::MAX, f32::MIN), |(l, h), y| (l.min(y), h.max(y)));
        let grow = ((line - (high - low)) / 2.0).max(0.0);
        let rect = Rect::from_min_max(pos2(left, low - grow), pos2(left + 1.0, high + grow));
        mesh.add_colored_rect(rect, zones.of(side, letters.start));
        let here = open.partition_point(|v| v.position + 2 <= letters.start)
            ..open.partition_point(|v| v.position < letters.end);
        if vs && let Some(colour) = band(state, front, here) {
            let foot = sight.lane.bottom() - 9.0;
            let band = Rect::from_min_max(pos2(left, foot), pos2(left + 1.0, foot + 4.0));
            mesh.add_colored_rect(band, colour);
        }
    }
    mesh
}

/// The colour that says what becomes of these Vs: one that is spliced is not lost among others.
fn band(state: &State, front: &StripFront, vs: Range<usize>) -> Option<Color32> {
    if vs.clone().any(|at| front.fresh[at]) {
        return Some(state.colours().preview());
    }
    vs.into_iter()
        .any(|at| !front.held[at])
        .then(|| state.colours().accent())
}
