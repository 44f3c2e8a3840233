//! The pointer on the strip: the wheel scrolls and zooms, a drag chooses a span and fills it.

use egui::{Key, PointerButton, Pos2, Response, Ui};
use zonewright_geometry::{OpenV, Side};

use super::{
    StripWidgets,
    act::{Picks, Span, StripAct},
    flat::Flat,
    sight::{Sight, Zoom},
};
use crate::window::{command::Command, panels::Cx};

/// How near the lane's ends a drag scrolls it, and by how much a frame at most, in points.
const END: f32 = 24.0;
const SCROLL: f32 = 14.0;
/// How near to a letter the pointer must be to point at it: at most this, in points, and this part of its width.
const REACH: f32 = 5.0;
const REACH_OF_WIDTH: f64 = 0.22;

/// A drag that is going on.
#[derive(Clone, Copy, PartialEq, Eq, Debug)]
pub(super) enum Dragged {
    /// A span grows from this V. At another revision it is over.
    Span {
        /// The place of the V where it began.
        anchor: usize,
        /// The revision that the place belongs to.
        revision: u64,
        /// Where it is now; none once it was given up.
        to: Option<usize>,
    },
    /// The front moves along with the pointer.
    Along,
}

/// The wheel: along the front, and with the command key or a pinch nearer and farther.
pub(super) fn wheel(ui: &Ui, flat: &Flat, strip: &mut StripWidgets, sight: &Sight, pos: Pos2) {
    let (scroll, pinch) = ui.input(|i| (i.smooth_scroll_delta(), i.zoom_delta()));
    if pinch != 1.0 {
        strip.zoom = sight.scaled(flat, f64::from(pinch), pos.x);
    }
    let by = scroll.x + scroll.y;
    if by != 0.0 {
        strip.zoom.offset = sight.offset - f64::from(by);
    }
}

/// A drag: from where it began it chooses a span, which is filled where the button is let go. Escape gives it up.
pub(super) fn drag(cx: Cx<'_>, ui: &Ui, ground: &Response, strip: &mut StripWidgets, side: Side, sight: &Sight) {
    let open = cx.state.derived.open_on(side);
    let flat = &cx.state.derived.strip_on(side).flat;
    if ground.drag_started() {
        strip.drag = begin(ui, ground, flat, open, sight, cx.state.derived.revision);
        strip.by_key = false;
        ground.request_focus();
    }
    let Some(dragged) = strip.drag else { return };
    match dragged {
        Dragged::Along => {
            if ground.dragged() {
                strip.zoom.offset = sight.offset - f64::from(ground.drag_delta().x);
            } else {
                strip.drag = None;
            }
        }
        Dragged::Span { anchor, revision, to } => {
            let gone = revision != cx.state.derived.revision || ui.input(|i| i.key_pressed(Key::Escape));
            let to = to.filter(|_| !gone);
            if ground.dragged() {
                let to = to.and_then(|_| {
                    let pos = ground.interact_pointer_pos()?;
                    scroll_at_ends(ui, strip, sight, pos);
                    let x = pos.x.clamp(sight.lane.left(), sight.lane.right());
                    sight.v_at(flat, open, x, false)
                });
                strip.drag = Some(Dragged::Span { anchor, revision, to });
                let span = to.map(|to| Span {
                    side,
                    revision,
                    anchor,
                    to,
                });
                if span != cx.state.view.strip.span {
                    cx.tx.send(Command::Strip(StripAct::Span(span)));
                }
                return;
            }
            strip.drag = None;
            if let Some(to) = to {
                strip.cursor = to;
                let at = (anchor.min(to)..=anchor.max(to)).collect();
                cx.tx.send(Command::Strip(StripAct::Fill(Picks { side, revision, at })));
            }
            cx.tx.send(Command::Strip(StripAct::Span(None)));
        }
    }
}

fn begin(ui: &Ui, ground: &Response, flat: &Flat, open: &[OpenV], sight: &Sight, revision: u64) -> Option<Dragged> {
    let shift = ui.input(|i| i.modifiers.shift);
    if ground.drag_started_by(PointerButton::Middle) || (shift && ground.drag_started_by(PointerButton::Primary)) {
        return Some(Dragged::Along);
    }
    if !ground.drag_started_by(PointerButton::Primary) {
        return None;
    }
    // Where the button went down: the pointer has moved on before it counts as a drag.
    let from = ui
        .input(|i| i.pointer.press_origin())
        .or_else(|| ground.interact_pointer_pos())?;
    let anchor = sight.v_at(flat, open, from.x, false)?;
    Some(Dragged::Span {
        anchor,
        revision,
        to: Some(anchor),
    })
}

/// A drag that comes to an end of the lane scrolls it along.
fn scroll_at_ends(ui: &Ui, strip: &mut StripWidgets, sight: &Sight, pos: Pos2) {
    let past = (pos.x - (sight.lane.right() - END)).max(0.0) - ((sight.lane.left() + END) - pos.x).max(0.0);
    if past != 0.0 {
        let before = sight.offset;
        let by = past.clamp(-END, END) / END * SCROLL;
        strip.zoom = Zoom {
            scale: Some(sight.scale),
            offset: before + f64::from(by),
        };
        ui.ctx().request_repaint();
    }
}

/// The letter that the pointer is at, by its position on the front.
pub(super) fn letter_at(flat: &Flat, letters: usize, sight: &Sight, pos: Pos2) -> Option<usize> {
    if letters == 0 || sight.is_silhouette() {
        return None;
    }
    let across = sight.across(pos.x);
    let at = flat.within(across, across + f64::EPSILON).next()?;
    let [from, to] = [at, at + 1].map(|node| sight.node(flat, node));
    let reach = REACH.min((sight.scale * REACH_OF_WIDTH) as f32);
    let along = to - from;
    let part = ((pos - from).dot(along) / along.length_sq().max(1e-6)).clamp(0.0, 1.0);
    ((from + along * part - pos).length() <= reach).then_some(at % letters)
}
