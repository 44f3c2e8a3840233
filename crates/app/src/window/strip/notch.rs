//! A notch: an open V in the strip.

use egui::{
    Painter, Pos2, Rect, Response, Role as AccessRole, Sense, Shape, Stroke, Tooltip, Ui, WidgetInfo, pos2, vec2,
};
use zonewright_geometry::Side;

use super::{
    act::{Picks, StripAct},
    choice::previewed,
    lane::Pointed,
    sight::Sight,
    words,
};
use crate::window::{command::Command, panels::Cx, state::State, widgets::Widgets};

/// Dots are drawn where letters are at least this wide, in points.
const DOTS_FROM: f64 = 4.0;

/// The Vs that the act at hand would reach.
#[derive(Clone, PartialEq, Eq, Debug)]
pub(super) struct Lit {
    at: Vec<usize>,
}

impl Lit {
    /// Those of the span that is being chosen, or of the V that is pointed at.
    pub(super) fn new(state: &State, side: Side, over: Option<(Side, usize)>) -> Self {
        let (of, reached) = previewed(state, over);
        Self {
            at: if of == side {
                reached.into_iter().map(|r| r.at).collect()
            } else {
                Vec::new()
            },
        }
    }

    fn has(&self, at: usize) -> bool {
        self.at.binary_search(&at).is_ok()
    }

    /// Bands behind an outline: one for each stretch of the Vs in sight.
    pub(super) fn bands(&self, cx: Cx<'_>, painter: &Painter, sight: &Sight, side: Side) {
        let (flat, open) = (&cx.state.derived.strip_on(side).flat, cx.state.derived.open_on(side));
        let seen = sight.vs(flat, open);
        let from = self.at.partition_point(|at| *at < seen.start);
        let to = self.at.partition_point(|at| *at < seen.end);
        let x = |at: usize, node: usize| sight.x(flat.node(open[at].position + node).0);
        let mut drawn = f32::MIN;
        for &at in &self.at[from..to.max(from)] {
            // Never more bands than points across.
            let (left, right) = (x(at, 0).max(drawn), x(at, 2).max(x(at, 0) + 1.5));
            if right - drawn < 1.0 {
                continue;
            }
            let rect = Rect::from_min_max(pos2(left, sight.lane.top()), pos2(right, sight.lane.bottom()));
            painter.rect_filled(rect, 0.0, cx.state.colours().preview());
            drawn = right;
        }
    }
}

/// Where a V stands: the place before it, at its foot, behind it.
fn corners(cx: Cx<'_>, sight: &Sight, side: Side, at: usize) -> [Pos2; 3] {
    let flat = &cx.state.derived.strip_on(side).flat;
    let position = cx.state.derived.open_on(side)[at].position;
    [0, 1, 2].map(|node| sight.node(flat, position + node))
}

/// Draws a notch's ground, names it, and carries out a click on it.
#[expect(clippy::too_many_arguments, reason = "the frame's parts are told apart by name here")]
pub(super) fn notch_ui(
    cx: Cx<'_>,
    ui: &Ui,
    widgets: &mut Widgets,
    ground: &Response,
    sight: &Sight,
    at: usize,
    pointed: Pointed,
    lit: &Lit,
) {
    let side = cx.state.view.side;
    let front = cx.state.derived.strip_on(side);
    let (fresh, held) = (front.fresh[at], front.held[at]);
    let corners = corners(cx, sight, side, at);
    let around = Rect::from_x_y_ranges(corners[0].x..=corners[2].x, sight.lane.y_range());
    // Wide enough to be hit where many stand in one point.
    let widen = ((2.0 - around.width()) / 2.0).max(0.0);
    let around = around.expand2(vec2(widen, 0.0)).intersect(sight.lane);
    let response = ui.interact(around, ui.scope_id().with(("v", at)), Sense::CLICK);
    response.widget_info(|| WidgetInfo::selected(AccessRole::CheckBox, true, fresh, words::v_name(cx.state, side, at)));
    ui.ctx().accesskit_node_builder(response.id, |node| {
        node.set_value(words::filled(cx.state, side, at));
    });
    if response.clicked() {
        widgets.strip.cursor = at;
        ground.request_focus();
        cx.tx.send(Command::Strip(StripAct::Splice(Picks {
            side,
            revision: cx.state.derived.revision,
            at: vec![at],
        })));
    }
    let colours = cx.state.colours();
    let by_key = ground.has_focus() && widgets.strip.by_key && widgets.strip.cursor == at;
    if !sight.is_silhouette() {
        let fill = match (lit.has(at), held) {
            (true, _) => Some(colours.preview()),
            (false, true) => None,
            (false, false) => Some(colours.accent_weak()),
        };
        if let Some(fill) = fill {
            ui.painter_at(sight.lane)
                .add(Shape::convex_polygon(corners.to_vec(), fill, Stroke::NONE));
        }
    }
    if by_key {
        let foot = pos2(around.center().x, sight.lane.top() + 1.0);
        let marker = vec![foot + vec2(-5.0, 0.0), foot + vec2(5.0, 0.0), foot + vec2(0.0, 7.0)];
        ui.painter_at(sight.lane)
            .add(Shape::convex_polygon(marker, colours.accent(), Stroke::NONE));
    }
    if pointed.v == Some(at) && !by_key {
        // Above the line that says the same in short.
        let tip = Tooltip::for_enabled(&response).gap(super::LINE + 6.0);
        tip.show(|ui| tooltip(cx, ui, side, at, pointed));
    }
}

fn tooltip(cx: Cx<'_>, ui: &mut Ui, side: Side, at: usize, pointed: Pointed) {
    if let Some(line) = pointed.letter.and_then(|at| words::letter_line(cx.state, side, at)) {
        ui.label(line);
    }
    ui.label(format!(
        "{}: {}",
        words::v_name(cx.state, side, at),
        words::filled(cx.state, side, at)
    ));
    if cx.state.derived.strip_on(side).fresh[at] {
        ui.label("Click to take this splice away.");
    } else {
        ui.label(words::spliced(cx.state, side, at));
        ui.weak("Click to splice the directions in hand. Drag to fill a span.");
    }
}

/// The dot at a V's foot: full when spliced already, a ring when it can be filled, a small grey ring when it is held.
pub(super) fn dot(cx: Cx<'_>, painter: &Painter, sight: &Sight, side: Side, at: usize) {
    let front = cx.state.derived.strip_on(side);
    let colours = cx.state.colours();
    let tip = corners(cx, sight, side, at)[1] + vec2(0.0, 6.0);
    if front.fresh[at] {
        let radius = if sight.scale < DOTS_FROM { 2.0 } else { 3.5 };
        painter.circle_filled(tip, radius, colours.preview());
    } else if sight.scale < DOTS_FROM {
        // No room: the tint tells those that are filled.
    } else if front.held[at] {
        painter.circle_stroke(tip, 2.0, Stroke::new(1.0, colours.text_weak()));
    } else {
        let radius = (sight.scale * 0.4).min(3.0) as f32;
        painter.circle_stroke(tip, radius, Stroke::new(1.3, colours.preview()));
    }
}
