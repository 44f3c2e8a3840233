//! The panel that is picked in the picture.

use egui::Ui;
use zonewright_shop::{PartEdge, Parts, text};

use super::Cx;
use crate::window::command::Command;

/// Draws what there is to know about the picked panel.
pub(super) fn panel_ui(cx: Cx<'_>, ui: &mut Ui, panel: u32) {
    if cx.state.derived.pending().is_some() {
        ui.weak("Being worked out…");
        return;
    }
    let parts = &cx.state.derived.parts;
    let Some(part) = parts.panels.get(panel as usize) else {
        return;
    };
    let units = cx.state.units();
    let acute = part
        .acute_deg
        .map_or_else(|| "–".to_owned(), |deg| text::degrees(deg, 2));
    for (name, value) in [
        ("Place mark", part.mark.to_string()),
        ("Part mark", part.part_mark.to_string()),
        ("Acute angle", acute),
    ] {
        super::readouts::readout(ui, name, &value);
    }
    egui::Grid::new("edges of the panel").striped(true).show(ui, |ui| {
        for head in ["", "Side", "Bevel", "Mate"] {
            ui.weak(head);
        }
        ui.end_row();
        for (at, edge) in part.edges.iter().enumerate() {
            ui.weak(Parts::edge_letter(at));
            ui.label(units.length(edge.length_mm));
            ui.label(text::degrees(edge.bevel_deg, 2));
            ui.label(mates(parts, edge));
            ui.end_row();
        }
    });
    let button = ui.button("Leave this panel out");
    if button.on_hover_text(Command::LeaveOut(panel).words().hint).clicked() {
        cx.tx.send(Command::LeaveOut(panel));
    }
}

/// The panels on the other side of an edge, by their place marks.
fn mates(parts: &Parts, edge: &PartEdge) -> String {
    let marks = edge
        .mates
        .iter()
        .filter_map(|mate| parts.panels.get(mate.panel as usize));
    let marks: Vec<&str> = marks.map(|p| p.mark.as_str()).collect();
    if marks.is_empty() {
        "rim".to_owned()
    } else {
        marks.join(" ")
    }
}
