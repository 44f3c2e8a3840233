//! Marks on the picture: points of the path, open Vs, the panel that a V would make, places of findings.

use zonewright_geometry::{Place, Point, Shell, Side};
use zonewright_painter::{Colour, Mark, MarkKind, Tone};

use super::{front_marks, headroom_marks, hit};
use crate::window::state::State;

/// More marks than this would hide the picture and slow the window down.
pub(super) const MOST_MARKS: usize = 2000;

/// All marks.
pub(super) fn marks(state: &State, over: Option<(Side, usize)>) -> Vec<Mark> {
    let mut marks = Vec::new();
    panel_marks(state, &mut marks);
    path_marks(state, &mut marks);
    v_marks(state, &mut marks);
    super::select_marks::select_marks(state, &mut marks);
    front_marks::letter_marks(state, &mut marks);
    front_marks::preview_marks(state, over, &mut marks);
    headroom_marks::marks(state, &mut marks);
    if let Some(place) = state.view.shown.and_then(|shown| shown.place(&state.derived)) {
        place_marks(&state.derived.shell, &place, Tone::Selection, &mut marks);
    }
    if let Some(finding) = state.view.finding.and_then(|at| state.derived.findings.get(at)) {
        place_marks(
            &state.derived.shell,
            &finding.place,
            Tone::Finding(finding.level()),
            &mut marks,
        );
    }
    marks
}

pub(super) const fn mark(at: Vec<Point>, kind: MarkKind, tone: Tone) -> Mark {
    Mark { at, kind, tone }
}

pub(super) const fn line(at: Vec<Point>, width: f32, tone: Tone) -> Mark {
    mark(at, MarkKind::Line { width, dashed: false }, tone)
}

fn panel_marks(state: &State, marks: &mut Vec<Mark>) {
    let Some((panel, _)) = &state.view.panel else { return };
    let shell = &state.derived.shell;
    if let Some(panel) = shell.panels.get(*panel as usize) {
        let corners = panel.corners.map(|v| shell.points[v as usize]);
        marks.push(mark(corners.to_vec(), MarkKind::Polygon, Tone::Selection));
        let outline = [&corners[..], &corners[..1]].concat();
        marks.push(line(outline, 2.0, Tone::Selection));
    }
}

fn path_marks(state: &State, marks: &mut Vec<Mark>) {
    let Some(path) = &state.derived.path else { return };
    let points: Vec<Point> = path.placed.iter().copied().take(MOST_MARKS).collect();
    let mut outline = points.clone();
    if path.closed {
        outline.extend(points.first().copied());
    }
    marks.push(line(outline, 1.5, Tone::Mark));
    marks.push(mark(points, MarkKind::Dot { radius: 4.0 }, Tone::Mark));
    if let Some(picked) = state.view.point.and_then(|at| path.placed.get(at)) {
        let ring = MarkKind::Ring {
            radius: 7.5,
            width: 2.0,
        };
        marks.push(mark(vec![*picked], ring, Tone::Selection));
    }
}

fn v_marks(state: &State, marks: &mut Vec<Mark>) {
    let vs = state.derived.open_on(state.view.side);
    let strip = state.derived.strip_on(state.view.side);
    let mut open = Vec::new();
    let mut fresh = Vec::new();
    let mut held = Vec::new();
    for (index, v) in vs.iter().enumerate().take(MOST_MARKS) {
        let dots = if strip.fresh[index] {
            &mut fresh
        } else if strip.held[index] {
            &mut held
        } else {
            &mut open
        };
        dots.push(hit::middle(v));
    }
    marks.push(mark(
        open,
        MarkKind::Ring {
            radius: 3.5,
            width: 1.3,
        },
        Tone::Preview,
    ));
    let [r, g, b, a] = state.colours().text_weak().to_array();
    let quiet = MarkKind::Ring {
        radius: 2.5,
        width: 1.0,
    };
    marks.push(mark(held, quiet, Tone::Own(Colour { r, g, b, a })));
    marks.push(mark(fresh, MarkKind::Dot { radius: 4.0 }, Tone::Preview));
}

fn place_marks(shell: &Shell, place: &Place, tone: Tone, marks: &mut Vec<Mark>) {
    let points = |of: &[u32]| -> Vec<Point> {
        of.iter()
            .take(MOST_MARKS)
            .filter_map(|v| shell.points.get(*v as usize).copied())
            .collect()
    };
    match place {
        Place::Vertices(vertices) => {
            let ring = MarkKind::Ring {
                radius: 9.0,
                width: 2.5,
            };
            marks.push(mark(points(vertices), ring, tone));
        }
        Place::Edges(edges) => {
            for edge in edges
                .iter()
                .take(MOST_MARKS)
                .filter_map(|e| shell.edges.get(*e as usize))
            {
                marks.push(line(points(&edge.ends), 3.5, tone));
            }
        }
        Place::Panels(panels) => {
            for panel in panels
                .iter()
                .take(MOST_MARKS)
                .filter_map(|p| shell.panels.get(*p as usize))
            {
                let corners = points(&panel.corners);
                let outline = [&corners[..], &corners[..1.min(corners.len())]].concat();
                marks.push(mark(corners, MarkKind::Polygon, tone));
                marks.push(line(outline, 2.0, tone));
            }
        }
        Place::Design | Place::Parameter(_) | Place::Step(_) => {}
    }
}
