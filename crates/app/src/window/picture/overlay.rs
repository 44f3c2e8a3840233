//! What is drawn over the pictures while zones are worked on: the zone under the pointer, the picked one, what a drag snaps to.

use egui::{Color32, FontId, Pos2, Rect, Stroke, Ui, Vec2};
use zonewright_geometry::{Point, edit::Measures};
use zonewright_painter::Lens;

use super::zone_drag::ZoneWork;
use crate::window::{
    panels::Cx,
    path_place::turned,
    state::State,
    zone_table::{index_of, zone_name},
};

/// More edges than this are not lit one by one: the lines would hide the shell, and cost more than the picture.
const MOST_EDGES: usize = 4000;

/// Draws it in one pane.
pub(super) fn overlay_ui(cx: Cx<'_>, ui: &Ui, at: usize, rect: Rect, work: &ZoneWork) {
    let state = cx.state;
    let camera = &state.panes.pane(at).camera;
    let lens = camera.lens();
    let canvas = Canvas {
        painter: ui.painter_at(rect),
        rect,
        lens: &lens,
    };
    let colours = state.colours();
    let picked = state
        .view
        .zones
        .picked
        .and_then(|name| index_of(&state.derived.shell, name));
    let dragged = work.dragged();
    if let Some(zone) = picked.filter(|zone| dragged != Some(*zone)) {
        canvas.zone(state, zone, Stroke::new(2.0, colours.accent()));
    }
    if let Some(zone) = dragged.or(work.over.map(|(zone, ..)| zone)) {
        canvas.zone(state, zone, Stroke::new(3.0, colours.accent()));
    }
    let font = egui::TextStyle::Body.resolve(ui.style());
    let plate = |at: Pos2, lines: &[String]| plate(&canvas.painter, rect, at, lines, &font, state);
    if let Some((tip, pos)) = &work.tip {
        let mark = colours.preview();
        if let Some(ends) = tip.line {
            canvas.dashed(ends, Stroke::new(1.5, mark));
        }
        if let Some(pos) = tip.ring.and_then(|point| canvas.place(point)) {
            canvas.painter.circle_stroke(pos, 7.0, Stroke::new(2.0, mark));
        }
        if state.panes.active() == at && !tip.lines.is_empty() {
            // A zone's tip is where the pointer is, in the window; a point's is in its pane.
            let pos = if dragged.is_some() {
                *pos
            } else {
                rect.min + pos.to_vec2()
            };
            plate(pos, &tip.lines);
        }
    } else if let Some((zone, _, pos)) = work.over.filter(|(_, pane, _)| *pane == at) {
        plate(rect.min + pos, &[hint(state, zone)]);
    }
}

/// What the plate of a pane says, for those who do not see it.
pub(super) fn said(state: &State, at: usize, work: &ZoneWork) -> Option<String> {
    if let Some((tip, _)) = &work.tip {
        return (state.panes.active() == at).then(|| tip.lines.join("; "));
    }
    let (zone, ..) = work.over.filter(|(_, pane, _)| *pane == at)?;
    Some(hint(state, zone))
}

/// The name of a zone under the pointer, with its length.
fn hint(state: &State, zone: u32) -> String {
    let vector = state.derived.shell.zones[zone as usize].vector;
    let measures = Measures::of(turned(&state.shape().placement) * vector);
    format!("{}: {}", zone_name(zone), state.units().length(measures.length_mm))
}

struct Canvas<'a> {
    painter: egui::Painter,
    rect: Rect,
    lens: &'a Lens,
}

impl Canvas<'_> {
    fn place(&self, point: Point) -> Option<Pos2> {
        let seen = self.lens.project(point)?;
        Some(self.rect.min + Vec2::from(seen.pos))
    }

    fn zone(&self, state: &State, zone: u32, stroke: Stroke) {
        let shell = &state.derived.shell;
        for edge in state.derived.zones.edges_of(shell, zone).take(MOST_EDGES) {
            let ends = shell.edges[edge].ends.map(|v| self.place(shell.points[v as usize]));
            if let [Some(a), Some(b)] = ends {
                self.painter.line_segment([a, b], stroke);
            }
        }
    }

    fn dashed(&self, ends: [Point; 2], stroke: Stroke) {
        if let [Some(a), Some(b)] = ends.map(|p| self.place(p)) {
            self.painter.extend(egui::Shape::dashed_line(&[a, b], stroke, 6.0, 4.0));
        }
    }
}

/// Lines of text on a plate beside the pointer, within the pane.
fn plate(painter: &egui::Painter, rect: Rect, at: Pos2, lines: &[String], font: &FontId, state: &State) {
    let colours = state.colours();
    let galley = painter.layout_no_wrap(lines.join("\n"), font.clone(), colours.text());
    let size = galley.size() + egui::vec2(12.0, 8.0);
    let wanted = Rect::from_min_size(at + egui::vec2(16.0, 16.0), size);
    let room = rect.shrink(4.0);
    // Beyond the right or the lower edge it goes to the other side of the pointer.
    let x = if wanted.max.x > room.max.x {
        at.x - 12.0 - size.x
    } else {
        wanted.min.x
    };
    let y = if wanted.max.y > room.max.y {
        at.y - 12.0 - size.y
    } else {
        wanted.min.y
    };
    let place = Rect::from_min_size(Pos2::new(x.max(room.min.x), y.max(room.min.y)), size);
    painter.rect_filled(place, 4.0, colours.field());
    painter.rect_stroke(place, 4.0, Stroke::new(1.0, colours.line()), egui::StrokeKind::Inside);
    painter.galley(place.min + egui::vec2(6.0, 4.0), galley, Color32::PLACEHOLDER);
}
