//! Where the shell stands, and which side is outside.

use egui::Ui;
use zonewright_geometry::Outside;

use super::Cx;
use crate::window::{
    command::Command,
    fields::{angle, choice, length, number},
};

/// Draws the fields of the placement.
pub(super) fn placement_ui(cx: Cx<'_>, ui: &mut Ui) {
    let mut placement = cx.state.shape().placement;
    let units = cx.state.units();
    let mut changed = false;
    for (name, part) in ["Move x", "Move y", "Move z"].into_iter().zip(placement.shift.as_mut()) {
        changed |= length(ui, name, part, units);
    }
    for (name, part) in ["Turn about x", "Turn about y", "Turn about z"]
        .into_iter()
        .zip(&mut placement.turn)
    {
        changed |= angle(ui, name, part);
    }
    changed |= number(ui, "Scale", &mut placement.scale, 0.01);
    changed |= ui.checkbox(&mut placement.mirrored, "Mirrored").changed();
    if changed {
        cx.tx.send(Command::SetPlacement(placement));
    }
    let now = usize::from(cx.state.shape().outside == Outside::Reversed);
    if let Some(chosen) = choice(ui, "Outside", now, &["As grown", "Reversed"]) {
        let outside = if chosen == 0 { Outside::Grown } else { Outside::Reversed };
        cx.tx.send(Command::SetOutside(outside));
    }
}
