//! The lane of the strip: letters, notches, what is pointed at.

use egui::{Rect, Response, Role as AccessRole, Sense, Stroke, StrokeKind, Ui, WidgetInfo, pos2};
use zonewright_geometry::Side;
use zonewright_shop::text::Units;

use super::{
    NAME,
    act::{StripAct, StripView},
    ink::ZoneColours,
    keys, notch, pointer,
    sight::Sight,
    words,
};
use crate::window::{command::Command, panels::Cx, view::Hand, widgets::Widgets};

/// The number of a V is written where at least this many points are between one number and the next.
const NUMBERS_APART: f32 = 34.0;

/// What is pointed at in a frame.
#[derive(Clone, Copy, PartialEq, Eq, Debug, Default)]
pub(super) struct Pointed {
    /// A V, by its place among the open Vs.
    pub v: Option<usize>,
    /// A letter, by its position on the front.
    pub letter: Option<usize>,
}

/// What is said and lit, kept until something that it follows from is another.
#[derive(Debug)]
pub(super) struct Told {
    key: ToldKey,
    /// What is pointed at, in one line; empty when nothing is.
    pub line: String,
    lit: notch::Lit,
}

#[derive(PartialEq, Debug)]
struct ToldKey {
    revision: u64,
    side: Side,
    view: StripView,
    hand: Hand,
    units: Units,
    pointed: Pointed,
    over: Option<(Side, usize)>,
}

/// Draws the lane.
pub(super) fn lane_ui(cx: Cx<'_>, ui: &Ui, widgets: &mut Widgets, lane: Rect) {
    let side = cx.state.view.side;
    let flat = &cx.state.derived.strip_on(side).flat;
    let ground = ui.interact(lane, ui.scope_id().with("lane"), Sense::click_and_drag());
    let mut sight = Sight::new(flat, lane, widgets.strip.zoom);
    if ground.has_focus() {
        keys::handle(cx, ui, &ground, &mut widgets.strip, side, &sight);
        sight = Sight::new(flat, lane, widgets.strip.zoom);
    }
    pointer::drag(cx, ui, &ground, &mut widgets.strip, side, &sight);
    let hovered = ui
        .input(|i| i.pointer.hover_pos())
        .filter(|_| ground.contains_pointer());
    if let Some(pos) = hovered {
        pointer::wheel(ui, flat, &mut widgets.strip, &sight, pos);
    }
    sight = Sight::new(flat, lane, widgets.strip.zoom);
    // What is kept is what can be: an offset beyond the end would have to be scrolled back first.
    widgets.strip.zoom.offset = sight.offset;
    let pointed = point(cx, ui, widgets, &ground, &sight, side);
    let key = ToldKey {
        revision: cx.state.derived.growth(),
        side,
        view: cx.state.view.strip.clone(),
        hand: cx.state.view.hand.clone(),
        units: cx.state.units(),
        pointed,
        over: widgets.over,
    };
    let kept = widgets.strip.told.take().filter(|told| told.key == key);
    let told = kept.unwrap_or_else(|| Told {
        line: line(cx, side, pointed, key.over),
        lit: notch::Lit::new(cx.state, side, key.over),
        key,
    });
    draw(cx, ui, widgets, &ground, &sight, pointed, &told.lit);
    ground.widget_info(|| WidgetInfo::labeled(AccessRole::Canvas, true, NAME));
    ui.ctx()
        .accesskit_node_builder(ground.id, |node| node.set_value(told.line.as_str()));
    widgets.strip.told = Some(told);
}

/// Finds what is pointed at, and tells the picture.
fn point(cx: Cx<'_>, ui: &Ui, widgets: &mut Widgets, ground: &Response, sight: &Sight, side: Side) -> Pointed {
    let open = cx.state.derived.open_on(side);
    let front = cx.state.derived.strip_on(side);
    let letters = cx.state.derived.shell.fronts[usize::from(side == Side::Aft)]
        .letters
        .len();
    let strip = &mut widgets.strip;
    let (pos, moved) = ui.input(|i| (i.pointer.hover_pos(), i.pointer.delta() != egui::Vec2::ZERO));
    let pos = pos.filter(|_| ground.contains_pointer() && strip.drag.is_none());
    if pos.is_some() && moved {
        strip.by_key = false;
    }
    let mut pointed = Pointed::default();
    if let Some(pos) = pos.filter(|_| !strip.by_key) {
        pointed.v = sight.v_at(&front.flat, open, pos.x, true);
        pointed.letter = pointer::letter_at(&front.flat, letters, sight, pos);
    } else if ground.has_focus() && strip.by_key {
        strip.cursor = strip.cursor.min(open.len().saturating_sub(1));
        pointed.v = Some(strip.cursor).filter(|at| *at < open.len());
    }
    if ground.gained_focus() && strip.drag.is_none() && !ui.input(|i| i.pointer.any_down() || i.pointer.any_released())
    {
        strip.by_key = true;
        keys::reveal(cx, strip, side, sight);
    }
    if let Some(at) = pointed.v {
        widgets.over_next = Some((side, at));
    }
    let letter = pointed.letter.map(|at| (side, at));
    if letter != cx.state.view.strip.letter {
        cx.tx.send(Command::Strip(StripAct::Letter(letter)));
    }
    pointed
}

/// What is pointed at, in one line: the span that is being chosen, else the letter, else the V; one in the picture counts too.
fn line(cx: Cx<'_>, side: Side, pointed: Pointed, over: Option<(Side, usize)>) -> String {
    let span = cx.state.view.strip.span.filter(|s| s.side == side);
    if let Some(range) = span.and_then(|s| s.range(&cx.state.derived)) {
        return words::span_line(cx.state, side, &range.collect::<Vec<_>>());
    }
    if let Some(line) = pointed.letter.and_then(|at| words::letter_line(cx.state, side, at)) {
        return line;
    }
    let over = over.filter(|(of, at)| *of == side && *at < cx.state.derived.open_on(side).len());
    match pointed.v.or(over.map(|(_, at)| at)) {
        Some(at) => words::v_line(cx.state, side, at),
        None => String::new(),
    }
}

fn draw(
    cx: Cx<'_>,
    ui: &Ui,
    widgets: &mut Widgets,
    ground: &Response,
    sight: &Sight,
    pointed: Pointed,
    lit: &notch::Lit,
) {
    let side = cx.state.view.side;
    let front = cx.state.derived.strip_on(side);
    let open = cx.state.derived.open_on(side);
    let colours = cx.state.colours();
    let painter = ui.painter_at(sight.lane);
    painter.rect_filled(sight.lane, 3.0, colours.picture());
    if sight.is_silhouette() {
        lit.bands(cx, &painter, sight, side);
        painter.add(widgets.strip.outline.shape(cx.state, side, sight, 2.0, true));
        // Only what is pointed at is a notch of its own here.
        let mut named: Vec<usize> = pointed.v.into_iter().collect();
        if ground.has_focus() && !named.contains(&widgets.strip.cursor) && widgets.strip.cursor < open.len() {
            named.push(widgets.strip.cursor);
        }
        for at in named {
            notch::notch_ui(cx, ui, widgets, ground, sight, at, pointed, lit);
        }
    } else {
        for at in sight.vs(&front.flat, open) {
            notch::notch_ui(cx, ui, widgets, ground, sight, at, pointed, lit);
        }
        let zones = ZoneColours::new(cx.state);
        let letters = sight.letters(&front.flat);
        let all = cx.state.derived.shell.fronts[usize::from(side == Side::Aft)]
            .letters
            .len();
        let width = if sight.scale < 5.0 { 1.5 } else { 2.5 };
        for letter in letters {
            let thick = cx.state.view.strip.letter == Some((side, letter % all.max(1)));
            let stroke = Stroke::new(if thick { width + 2.5 } else { width }, zones.of(side, letter));
            let ends = [letter, letter + 1].map(|node| sight.node(&front.flat, node));
            painter.line_segment(ends, stroke);
        }
        for at in sight.vs(&front.flat, open) {
            notch::dot(cx, &painter, sight, side, at);
        }
    }
    numbers(cx, ui, sight, side);
    if ground.has_focus() {
        let stroke = Stroke::new(1.5, colours.accent());
        painter.rect_stroke(sight.lane, 3.0, stroke, StrokeKind::Inside);
    }
}

/// Numbers of the Vs along the foot of the lane, as many as there is room for.
fn numbers(cx: Cx<'_>, ui: &Ui, sight: &Sight, side: Side) {
    let front = cx.state.derived.strip_on(side);
    let open = cx.state.derived.open_on(side);
    let vs = sight.vs(&front.flat, open);
    let Some(stretch) = vs.clone().last().zip(vs.clone().next()) else {
        return;
    };
    let x = |at: usize| sight.x(front.flat.node(open[at].position + 1).0);
    let apart = (x(stretch.0) - x(stretch.1)) / (stretch.0 - stretch.1).max(1) as f32;
    // Ones, twos, fives, tens ... whatever leaves room for the digits.
    let fits = |step: &usize| NUMBERS_APART <= apart * *step as f32;
    let step = [1, 2, 5, 10, 20, 50, 100, 200, 500, 1000, 2000, 5000]
        .into_iter()
        .find(fits)
        .unwrap_or(10_000);
    let font = egui::TextStyle::Small.resolve(ui.style());
    let painter = ui.painter_at(sight.lane);
    let foot = sight.lane.bottom() - if sight.is_silhouette() { 10.0 } else { 2.0 };
    // Numbers count from 1: the first shown is the first that the step divides.
    let first = (vs.start + 1).next_multiple_of(step) - 1;
    for at in (first..vs.end).step_by(step) {
        painter.text(
            pos2(x(at), foot),
            egui::Align2::CENTER_BOTTOM,
            at + 1,
            font.clone(),
            cx.state.colours().text_weak(),
        );
    }
}
