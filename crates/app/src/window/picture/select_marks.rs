//! Marks of what is picked, of what a click would pick, and of the dimensions.

use zonewright_geometry::{
    Point,
    measure::{Between, Figure, between},
};
use zonewright_painter::{Colour, Mark, MarkKind, Tone};

use super::marks::{line, mark};
use crate::window::{execute::picked, selection::Dimension, state::State, thing::Thing};

/// The height of a dimension's text, in points.
const TEXT: f32 = 13.0;

/// What is picked, and the dimensions.
pub(super) fn select_marks(state: &State, marks: &mut Vec<Mark>) {
    if let Some(figure) = state
        .view
        .selection
        .part
        .as_ref()
        .and_then(|t| t.figure(&state.derived))
    {
        figure_marks(&figure, Tone::Selection, 4.0, marks);
    }
    if let Some(from) = state.view.selection.from.as_ref() {
        // What is measured from keeps its mark while something else is picked.
        let other = picked(state).is_none_or(|t| t != *from);
        if let Some(figure) = from.figure(&state.derived).filter(|_| other) {
            figure_marks(&figure, Tone::Mark, 4.0, marks);
        }
    }
    for dimension in &state.view.selection.dimensions {
        dimension_marks(state, dimension, marks);
    }
}

/// What a click would pick, drawn lightly.
pub(super) fn hover_marks(state: &State, over: &Thing, marks: &mut Vec<Mark>) {
    if picked(state).as_ref() == Some(over) {
        return;
    }
    let [r, g, b, _] = state.colours().accent().to_array();
    let light = Tone::Own(Colour { r, g, b, a: 170 });
    match over.figure(&state.derived) {
        Some(Figure::Plane(corners)) => {
            let outline = [&corners[..], &corners[..1]].concat();
            marks.push(line(outline, 2.5, light));
        }
        Some(figure) => figure_marks(&figure, light, 3.0, marks),
        None => {}
    }
}

fn figure_marks(figure: &Figure, tone: Tone, width: f32, marks: &mut Vec<Mark>) {
    match figure {
        Figure::Point(at) => {
            let ring = MarkKind::Ring {
                radius: 6.5,
                width: width * 0.5,
            };
            marks.push(mark(vec![*at], ring, tone));
        }
        Figure::Line(ends) => marks.push(line(ends.to_vec(), width, tone)),
        Figure::Plane(corners) => {
            let outline = [&corners[..], &corners[..1]].concat();
            marks.push(line(outline, width * 0.5, tone));
        }
    }
}

/// A dimension as it is measured now; none while one of its ends is gone.
pub(in crate::window) fn measured(state: &State, dimension: &Dimension) -> Option<Between> {
    let [a, b] = dimension.ends.each_ref().map(|t| t.figure(&state.derived));
    between(&a?, &b?)
}

/// What a dimension says in the picture.
pub(in crate::window) fn dimension_text(state: &State, found: &Between) -> String {
    let distance = found.distance_mm.map(|mm| state.units().length(mm));
    let angle = found.angle.map(|a| zonewright_shop::text::degrees(a.to_degrees(), 2));
    distance.into_iter().chain(angle).collect::<Vec<_>>().join(", ")
}

fn dimension_marks(state: &State, dimension: &Dimension, marks: &mut Vec<Mark>) {
    let Some(found) = measured(state, dimension) else {
        return;
    };
    let [r, g, b, a] = state.colours().text().to_array();
    let ink = Tone::Own(Colour { r, g, b, a });
    for (thing, foot) in dimension.ends.iter().zip(found.feet) {
        let Some(figure) = thing.figure(&state.derived) else {
            continue;
        };
        // A foot beyond its edge or panel is joined to it, or nobody would see what it belongs to.
        if let Some(from) = reached_from(&figure, foot) {
            let dashed = MarkKind::Line {
                width: 1.0,
                dashed: true,
            };
            marks.push(mark(vec![from, foot], dashed, ink));
        }
    }
    let text = dimension_text(state, &found);
    let mut at = found.feet.to_vec();
    if found.distance_mm.is_none() {
        // Only an angle: the line joins what it is between and has no length to tell, so it has no ticks.
        let dashed = MarkKind::Line {
            width: 1.0,
            dashed: true,
        };
        let middle = at[0] + found.run() * 0.5;
        marks.push(mark(std::mem::replace(&mut at, vec![middle; 2]), dashed, ink));
    }
    marks.push(mark(at, MarkKind::Dimension { text, size: TEXT }, ink));
}

/// Where the line begins that leads from an edge or a panel to a foot beyond it; none when the foot lies on it.
fn reached_from(figure: &Figure, foot: Point) -> Option<Point> {
    match *figure {
        Figure::Point(_) => None,
        Figure::Line([a, b]) => {
            let along = b - a;
            let share = (foot - a).dot(along) / along.length_squared();
            (!(0.0..=1.0).contains(&share)).then_some(if share < 0.0 { a } else { b })
        }
        Figure::Plane(_) => Some(figure.middle()).filter(|m| m.distance(foot) > 0.0),
    }
}
