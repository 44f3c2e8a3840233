//! What counts as the same place.

use egui::Ui;
use zonewright_geometry::Tolerances;

use super::Cx;
use crate::window::{command::Command, fields::length, zones::ZoneAct};

/// Draws the tolerances of the design.
pub(super) fn tolerances_ui(cx: Cx<'_>, ui: &mut Ui) {
    let units = cx.state.units();
    let mut tolerances = cx.state.shape().tolerances;
    let mut changed = false;
    ui.scope(|ui| {
        changed |= length(ui, "Join within", &mut tolerances.join_mm, units);
    })
    .response
    .on_hover_text("Vertices nearer than this become one where edges meet; a closed front may miss by this much.");
    ui.scope(|ui| {
        changed |= length(ui, "Report gaps up to", &mut tolerances.near_mm, units);
    })
    .response
    .on_hover_text("Rims that miss each other by no more than this are reported as near misses.");
    let usual = Tolerances::default();
    if ui
        .add_enabled(tolerances != usual, egui::Button::new("Usual tolerances"))
        .clicked()
    {
        tolerances = usual;
        changed = true;
    }
    if changed {
        cx.tx.send(Command::Zone(ZoneAct::Tolerances(tolerances)));
    }
}
