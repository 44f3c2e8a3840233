//! Keys of the strip while it has the focus: arrows move along the notches, with shift they choose a span.

use egui::{Event, EventFilter, Key, Modifiers, Response, Ui};
use zonewright_geometry::Side;

use super::{
    StripWidgets,
    act::{Picks, Span, StripAct},
    sight::{Sight, Zoom},
};
use crate::window::{command::Command, panels::Cx};

/// How much larger one step of the zoom makes the front.
pub(super) const ZOOM_STEP: f64 = 1.5;

/// Vs that page up and page down move by when few are in sight.
const LEAST_PAGE: usize = 4;

/// Carries out what is typed.
pub(super) fn handle(cx: Cx<'_>, ui: &Ui, ground: &Response, strip: &mut StripWidgets, side: Side, sight: &Sight) {
    let span = cx.state.view.strip.span.filter(|s| s.side == side);
    let filter = EventFilter {
        horizontal_arrows: true,
        // Escape lets the span go, and only then the focus.
        escape: span.is_some() || strip.drag.is_some(),
        ..EventFilter::default()
    };
    ui.memory_mut(|m| m.set_focus_lock_filter(ground.id, filter));
    zoom(cx, ui, strip, side, sight);
    let count = cx.state.derived.open_on(side).len();
    if count == 0 {
        return;
    }
    let flat = &cx.state.derived.strip_on(side).flat;
    let open = cx.state.derived.open_on(side);
    strip.cursor = strip.cursor.min(count - 1);
    let page = sight.vs(flat, open).len().max(LEAST_PAGE);
    // Key by key, with the modifiers that each came with: a slow frame may bring several.
    let known = span.filter(|s| s.range(&cx.state.derived).is_some());
    let (mut to, mut anchor) = (strip.cursor, known.map(|s| s.anchor));
    let mut moved = false;
    ui.input(|i| {
        for event in &i.events {
            let Event::Key {
                key,
                pressed: true,
                modifiers,
                ..
            } = event
            else {
                continue;
            };
            if modifiers.command || modifiers.alt {
                continue;
            }
            let next = match key {
                Key::ArrowRight => to + 1,
                Key::ArrowLeft => to.saturating_sub(1),
                Key::PageDown => to + page,
                Key::PageUp => to.saturating_sub(page),
                Key::Home => 0,
                Key::End => count - 1,
                _ => continue,
            };
            anchor = modifiers.shift.then(|| anchor.unwrap_or(to));
            to = next.min(count - 1);
            moved = true;
        }
    });
    let span = if moved {
        let revision = cx.state.derived.revision;
        let next = anchor.map(|anchor| Span {
            side,
            revision,
            anchor,
            to,
        });
        if next != cx.state.view.strip.span {
            cx.tx.send(Command::Strip(StripAct::Span(next)));
        }
        strip.cursor = to;
        strip.by_key = true;
        reveal(cx, strip, side, sight);
        next
    } else {
        known
    };
    let picks = || {
        let range = span.and_then(|s| s.range(&cx.state.derived));
        Picks {
            side,
            revision: cx.state.derived.revision,
            at: range.map_or_else(|| vec![to], Iterator::collect),
        }
    };
    let pressed = |key| ui.input_mut(|i| i.consume_key(Modifiers::NONE, key));
    for (key, act) in [
        (Key::Enter, StripAct::Fill as fn(Picks) -> StripAct),
        (Key::Space, StripAct::Splice),
    ] {
        if pressed(key) {
            strip.by_key = true;
            cx.tx.send(Command::Strip(act(picks())));
            cx.tx.send(Command::Strip(StripAct::Span(None)));
        }
    }
}

/// Scrolls so that the V that the keys are at is in sight.
pub(super) fn reveal(cx: Cx<'_>, strip: &mut StripWidgets, side: Side, sight: &Sight) {
    let flat = &cx.state.derived.strip_on(side).flat;
    if let Some(v) = cx.state.derived.open_on(side).get(strip.cursor) {
        let [from, to] = [v.position, v.position + 2].map(|node| flat.node(node).0);
        strip.zoom = sight.reveal(strip.zoom, from, to);
    }
}

/// Plus and minus zoom about the V that the keys are at, 0 goes back to the zoom that the strip chooses.
fn zoom(cx: Cx<'_>, ui: &Ui, strip: &mut StripWidgets, side: Side, sight: &Sight) {
    let (steps, back) = ui.input(|i| {
        let plain = !i.modifiers.command;
        let times = |key| if plain { i.num_presses(key) as i32 } else { 0 };
        let steps = times(Key::Plus) + times(Key::Equals) - times(Key::Minus);
        (steps, 0 < times(Key::Num0))
    });
    let flat = &cx.state.derived.strip_on(side).flat;
    if steps != 0 {
        let at = cx.state.derived.open_on(side).get(strip.cursor);
        let x = at.map_or(sight.lane.center().x, |v| sight.x(flat.node(v.position + 1).0));
        let x = x.clamp(sight.lane.left(), sight.lane.right());
        strip.zoom = sight.scaled(flat, ZOOM_STEP.powi(steps), x);
    }
    if back {
        strip.zoom = Zoom::default();
        let sight = Sight::new(flat, sight.lane, strip.zoom);
        reveal(cx, strip, side, &sight);
    }
}
