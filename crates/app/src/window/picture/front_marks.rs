//! Marks of what is pointed at on a front: the panels that an act there would make, and a letter's edge and zone.

use zonewright_geometry::{Side, ahead::spurs_of_splice};
use zonewright_painter::{Mark, MarkKind, Tone};

use super::marks::{MOST_MARKS, line, mark};
use crate::window::{
    state::State,
    strip::{directions_at, previewed},
};

/// The panels that the act at hand would make, and, where it would splice, the spurs of the directions in hand.
pub(super) fn preview_marks(state: &State, over: Option<(Side, usize)>, marks: &mut Vec<Mark>) {
    let (side, reached) = previewed(state, over);
    let open = state.derived.open_on(side);
    let fills = state.view.strip.span.is_some();
    for r in reached.into_iter().take(MOST_MARKS / 2) {
        let Some(v) = open.get(r.at) else { continue };
        if !v.degenerate {
            let at = vec![v.nodes[0], v.nodes[1], v.nodes[2], v.new];
            marks.push(mark(at.clone(), MarkKind::Polygon, Tone::Preview));
            let outline = [&at[..], &at[..1]].concat();
            marks.push(line(outline, 1.5, Tone::Preview));
        }
        if fills || state.derived.strip_on(side).fresh[r.at] {
            continue;
        }
        let directions = directions_at(state, side, r);
        for spur in spurs_of_splice(&state.derived.shell, &state.shape().placement, v, &directions) {
            let kind = MarkKind::Line {
                width: 2.0,
                dashed: true,
            };
            marks.push(mark(vec![v.nodes[1], v.nodes[1] + spur], kind, Tone::Selection));
        }
    }
}

/// The edge of the letter that is pointed at in the strip, and all edges of its zone.
pub(super) fn letter_marks(state: &State, marks: &mut Vec<Mark>) {
    let Some((side, at)) = state.view.strip.letter else {
        return;
    };
    let shell = &state.derived.shell;
    let front = &shell.fronts[usize::from(side == Side::Aft)];
    let (Some(letter), Some(ends)) = (front.letters.get(at), front.nodes.get(at..at + 2)) else {
        return;
    };
    let counts_as = |letter: u32| shell.zones[shell.zone_of(letter) as usize].counts_as;
    let zone = counts_as(letter.letter);
    let sides = shell.panels.iter().flat_map(|panel| {
        // Sides 0 and 2 belong to the first letter, 1 and 3 to the second.
        (0..4_usize)
            .filter(move |side| counts_as(panel.letters[side % 2]) == zone)
            .map(move |side| [panel.corners[side], panel.corners[(side + 1) % 4]])
    });
    for ends in sides.take(MOST_MARKS) {
        let places = ends.map(|v| shell.points[v as usize]).to_vec();
        marks.push(line(places, 2.0, Tone::Mark));
    }
    marks.push(line(ends.to_vec(), 5.0, Tone::Selection));
}
