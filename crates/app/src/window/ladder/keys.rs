//! Keys on the ladder: arrows, Home, End, Page Up and Page Down climb; with Alt the arrows move the step; Delete takes it out.

use egui::{EventFilter, Key, Modifiers, Response, Ui};

use super::model::{Ladder, RowKind};
use crate::window::{command::Command, panels::Cx};

/// Rows that Page Up and Page Down climb at once.
const PAGE: usize = 10;

/// Does what the keys say on the row that has them. Gives the row that is climbed to.
pub(super) fn handle(cx: Cx<'_>, ui: &Ui, response: &Response, ladder: &Ladder, at: usize) -> Option<usize> {
    ui.memory_mut(|m| {
        let filter = EventFilter {
            vertical_arrows: true,
            ..EventFilter::default()
        };
        m.set_focus_lock_filter(response.id, filter);
    });
    let pressed = |modifiers: Modifiers, key: Key| ui.input_mut(|i| i.consume_key(modifiers, key));
    let steps = cx.state.shape().steps.len();
    let last = ladder.rows.len().saturating_sub(1);
    match ladder.rows[at].kind {
        RowKind::Step(step) => {
            if pressed(Modifiers::ALT, Key::ArrowUp) && step + 1 < steps {
                cx.tx.send(Command::MoveStep(step, step + 1));
                return None;
            }
            if pressed(Modifiers::ALT, Key::ArrowDown) && 0 < step {
                cx.tx.send(Command::MoveStep(step, step - 1));
                return None;
            }
            if pressed(Modifiers::NONE, Key::Delete) {
                cx.tx.send(Command::DeleteStep(step));
                return None;
            }
        }
        RowKind::Finish(step) => {
            if pressed(Modifiers::NONE, Key::Delete) {
                cx.tx.send(Command::DeleteFinish(step));
                return None;
            }
        }
        RowKind::Start | RowKind::Course { .. } => {}
    }
    // An arrow with Alt or Ctrl means something else.
    if ui.input(|i| i.modifiers.any()) {
        return None;
    }
    let to = if pressed(Modifiers::NONE, Key::ArrowUp) {
        at + 1
    } else if pressed(Modifiers::NONE, Key::ArrowDown) {
        at.saturating_sub(1)
    } else if pressed(Modifiers::NONE, Key::PageUp) {
        at + PAGE
    } else if pressed(Modifiers::NONE, Key::PageDown) {
        at.saturating_sub(PAGE)
    } else if pressed(Modifiers::NONE, Key::Home) {
        0
    } else if pressed(Modifiers::NONE, Key::End) {
        last
    } else {
        return None;
    };
    let to = to.min(last);
    (to != at).then_some(to)
}
