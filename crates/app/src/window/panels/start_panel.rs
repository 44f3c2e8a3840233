//! The kind of start and its parameters.

use egui::Ui;

use super::{Cx, start_fields};
use crate::window::{command::Command, fields, kinds};

/// Draws the chooser and the parameters.
pub(super) fn start_ui(cx: Cx<'_>, ui: &mut Ui) {
    let start = &cx.state.shape().start;
    let names = kinds::KINDS.map(|k| k.name);
    let now = kinds::KINDS.iter().position(|k| k.word == start.kind()).unwrap_or(0);
    if let Some(chosen) = fields::choice(ui, "Kind", now, &names) {
        cx.tx.send(Command::SetKind(kinds::KINDS[chosen].word));
    }
    let mut edited = start.clone();
    if let Some(field) = start_fields::start_fields(ui, &mut edited, cx.state.units()) {
        cx.tx.send(Command::SetStart(Box::new(edited), field));
    }
}
