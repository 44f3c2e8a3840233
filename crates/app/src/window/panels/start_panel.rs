//! The kind of start and its parameters.

use egui::Ui;

use super::{Cx, start_fields};
use crate::window::{
    command::Command,
    fields,
    guide::{self, Target},
    kinds,
};

/// Draws the chooser and the parameters.
pub(super) fn start_ui(cx: Cx<'_>, ui: &mut Ui) {
    let start = &cx.state.shape().start;
    let names = kinds::KINDS.map(|k| k.name);
    let now = kinds::KINDS.iter().position(|k| k.word == start.kind()).unwrap_or(0);
    let chosen = guide::framed(cx, ui, Target::Kind, |ui| fields::choice(ui, "Kind", now, &names));
    if let Some(chosen) = chosen {
        cx.tx.send(Command::SetKind(kinds::KINDS[chosen].word));
    }
    let mut edited = start.clone();
    let units = cx.state.units();
    let changed = guide::framed(cx, ui, Target::Parameters, |ui| {
        start_fields::start_fields(ui, &mut edited, units)
    });
    if let Some(field) = changed {
        cx.tx.send(Command::SetStart(Box::new(edited), field));
    }
}
