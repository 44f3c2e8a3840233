//! What is picked, with its measures, and the dimensions that are kept in the picture.

use egui::Ui;
use zonewright_geometry::{measure, start::DragRule};
use zonewright_shop::{Parts, text};

use super::{Cx, panel_panel, readouts::readout, small};
use crate::window::{
    command::Command,
    execute::picked,
    fields,
    path_edit::PathEdit,
    picture::{dimension_text, measured},
    selection::{Dimension, SelectAct},
    thing::{Thing, path_point_at},
};

/// Whether there is anything to show.
pub(super) fn is_empty(cx: Cx<'_>) -> bool {
    picked(cx.state).is_none() && cx.state.view.selection.dimensions.is_empty()
}

/// Draws the section.
pub(super) fn selection_ui(cx: Cx<'_>, ui: &mut Ui) {
    ui.scope(|ui| {
        ui.spacing_mut().item_spacing.y = 3.0;
        if let Some(thing) = picked(cx.state) {
            picked_ui(cx, ui, &thing);
        }
        for (at, dimension) in cx.state.view.selection.dimensions.iter().enumerate() {
            ui.separator();
            dimension_ui(cx, ui, at, dimension);
        }
    });
    if cx.state.view.selection.dimensions.len() > 1 {
        command_button(cx, ui, &SelectAct::DismissAll);
    }
}

fn picked_ui(cx: Cx<'_>, ui: &mut Ui, thing: &Thing) {
    let derived = &cx.state.derived;
    let Some(index) = thing.index(derived) else { return };
    if !matches!(thing, Thing::Panel(_)) {
        readout(ui, "Picked", &thing.title(derived));
    }
    match thing {
        Thing::Point(at) => point_ui(cx, ui, *at),
        Thing::Vertex(_) => vertex_ui(cx, ui, index),
        Thing::Edge(_) => edge_ui(cx, ui, index),
        Thing::Panel(_) => panel_panel::panel_ui(cx, ui, index),
    }
    ui.horizontal(|ui| {
        command_button(cx, ui, &SelectAct::Measure);
        if ui.button("Let go").on_hover_text("Picks nothing.").clicked() {
            cx.tx.send(Command::SelectPoint(None));
        }
    });
    if let Some(from) = &cx.state.view.selection.from {
        ui.weak(format!(
            "Measuring from {}: click what to measure to, or step there by key and press Enter.",
            from.title(derived)
        ));
    }
}

fn command_button(cx: Cx<'_>, ui: &mut Ui, act: &SelectAct) {
    let words = act.words();
    if ui.button(words.name).on_hover_text(words.hint).clicked() {
        cx.tx.send(Command::Select(act.clone()));
    }
}

/// Fields for where a point of the path is, in the frame of the path as the table on the left shows it.
fn point_ui(cx: Cx<'_>, ui: &mut Ui, at: usize) {
    let Some(path) = &cx.state.derived.path else { return };
    let Some(own) = path.own.get(at) else { return };
    let mut to = *own;
    let mut changed = false;
    for (axis, name) in ["x", "y", "z"].into_iter().enumerate() {
        let label = format!("Picked point {name}");
        changed |= fields::row(ui, name, |ui| {
            fields::bare_length(ui, &label, &mut to.0[axis], cx.state.units())
        });
    }
    if changed {
        let rule: DragRule = cx.state.view.rule;
        cx.tx.send(Command::Path(PathEdit::Move { point: at, to, rule }));
    }
}

fn vertex_ui(cx: Cx<'_>, ui: &mut Ui, vertex: u32) {
    let shell = &cx.state.derived.shell;
    let Some(place) = shell.points.get(vertex as usize) else {
        return;
    };
    let units = cx.state.units();
    match path_point_at(&cx.state.derived, *place) {
        Some(at) => point_ui(cx, ui, at),
        None => {
            for (name, mm) in ["x", "y", "z"].into_iter().zip(place.to_array()) {
                readout(ui, name, &units.length(mm));
            }
        }
    }
    let panels = shell.panels.iter().filter(|p| p.corners.contains(&vertex)).count();
    readout(ui, "Panels here", &text::count(panels));
    if let Some(deficit) = measure::angle_deficits(shell).get(vertex as usize) {
        readout(ui, "Angle missing to flat", &text::degrees(deficit.to_degrees(), 2));
    }
}

fn edge_ui(cx: Cx<'_>, ui: &mut Ui, edge: u32) {
    let derived = &cx.state.derived;
    let parts = &derived.parts;
    let users: Vec<_> = (0_u32..)
        .zip(&parts.panels)
        .filter_map(|(k, p)| p.edges.iter().position(|e| e.edge == edge).map(|slot| (k, slot)))
        .collect();
    let Some(&(panel, slot)) = users.first() else { return };
    let facts = &parts.panels[panel as usize].edges[slot];
    readout(ui, "Length", &cx.state.units().length(facts.length_mm));
    if let Some(zone) = zone(cx, panel, facts.corner) {
        readout(ui, "Zone", &text::count(zone));
    }
    readout(ui, "Kind", facts.kind.word());
    let degrees = |deg: Option<f64>| deg.map_or_else(|| "–".to_owned(), |deg| text::degrees(deg, 2));
    readout(ui, "Dihedral", &degrees(facts.dihedral_deg));
    readout(ui, "Fold", &degrees(facts.fold_deg()));
    readout(ui, "Bevel", &text::degrees(facts.bevel_deg, 2));
    for (panel, slot) in users {
        let Some(part) = parts.panels.get(panel as usize) else {
            continue;
        };
        let side = Parts::edge_letter(slot);
        ui.horizontal(|ui| {
            ui.weak("Panel");
            ui.with_layout(egui::Layout::right_to_left(egui::Align::Center), |ui| {
                let name = format!("Panel {}, its side {side}", part.mark);
                let button = ui.small_button(format!("{} {side}", part.mark));
                if button
                    .on_hover_text("Picks this panel.")
                    .accessible_name(name)
                    .clicked()
                {
                    cx.tx.send(Command::SelectPanel(Some(panel)));
                }
            });
        });
    }
}

/// The number of the zone of the side that leaves a corner of a panel, 1 for the first; linked zones count as one.
fn zone(cx: Cx<'_>, panel: u32, corner: u32) -> Option<usize> {
    let shell = &cx.state.derived.shell;
    let zones = shell.panel_zones(panel);
    let outline = shell.outline(panel);
    let corners = shell.panels.get(panel as usize)?.corners;
    // A side that is split has further corners in it: its own corner is the last one of the four before.
    let at = outline.iter().position(|v| *v == corner)?;
    let side = outline[..=at]
        .iter()
        .filter(|v| corners.contains(v))
        .count()
        .checked_sub(1)?;
    usize::try_from(zones[side % 2]).ok().map(|z| z + 1)
}

fn dimension_ui(cx: Cx<'_>, ui: &mut Ui, at: usize, dimension: &Dimension) {
    let [a, b] = dimension.ends.each_ref().map(|t| t.title(&cx.state.derived));
    let name = format!("{a} to {b}");
    let found = measured(cx.state, dimension);
    let value = found.map_or_else(|| "gone for now".to_owned(), |f| dimension_text(cx.state, &f));
    ui.horizontal(|ui| {
        ui.label(&name);
        ui.with_layout(egui::Layout::right_to_left(egui::Align::Center), |ui| {
            if small(ui, true, "×", &format!("Dismiss dimension {}", at + 1)) {
                cx.tx.send(Command::Select(SelectAct::Dismiss(at)));
            }
        });
    });
    readout(ui, &format!("Dimension {}", at + 1), &value);
    let Some(found) = found.filter(|f| f.distance_mm.is_some_and(|mm| mm > 0.0)) else {
        return;
    };
    let run = found.run();
    for (axis, mm) in ["dx", "dy", "dz"].into_iter().zip(run.to_array()) {
        readout(ui, axis, &cx.state.units().length(mm));
    }
}
