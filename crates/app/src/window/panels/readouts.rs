//! The readouts, live with every change.

use egui::{Align, Label, Layout, Role, Ui, WidgetInfo};
use zonewright_geometry::measure::Range;
use zonewright_shop::text;

use super::Cx;
use crate::window::derived::Pending;

/// Draws the readouts.
pub(super) fn readouts_ui(cx: Cx<'_>, ui: &mut Ui) {
    ui.spacing_mut().item_spacing.y = 3.0;
    let pending = cx.state.derived.pending();
    for (name, value) in rows(cx) {
        let behind = match pending {
            Some(Pending::Shell) => true,
            Some(Pending::Parts) => OF_PARTS.contains(&name),
            None => false,
        };
        if behind {
            ui.scope(|ui| {
                // What is shown is of the shell before: faded until the new value is there.
                ui.multiply_opacity(0.5);
                readout(ui, name, &format!("{value} …"));
            });
        } else {
            readout(ui, name, &value);
        }
    }
}

/// Readouts that need the panels as parts.
const OF_PARTS: [&str; 2] = ["Families", "Bevels"];

/// One name and its value.
pub(super) fn readout(ui: &mut Ui, name: &str, value: &str) {
    ui.horizontal(|ui| {
        ui.weak(name);
        ui.with_layout(Layout::right_to_left(Align::Center), |ui| {
            let shown = ui.add(Label::new(value).truncate());
            // The value is read together with its name.
            shown.widget_info(|| WidgetInfo::labeled(Role::Label, true, format!("{name}: {value}")));
        });
    });
}

/// Names and values of all readouts, as they are shown.
pub(super) fn rows(cx: Cx<'_>) -> Vec<(&'static str, String)> {
    let derived = &cx.state.derived;
    let (totals, units) = (&derived.totals, cx.state.units());
    let range = |range: Option<Range>, show: &dyn Fn(f64) -> String| match range {
        Some(r) if show(r.least) == show(r.most) => show(r.least),
        Some(r) => format!("{} – {}", show(r.least), show(r.most)),
        None => "–".to_owned(),
    };
    let degrees = |radians: f64| text::degrees(radians.to_degrees(), 2);
    let mut rows = vec![
        ("Panels", text::count(totals.panels)),
        ("Families", text::count(derived.parts.families.len())),
        ("Bevels", text::count(derived.parts.distinct_bevels)),
        ("Vertices", text::count(totals.vertices)),
        ("Edges", text::count(totals.edges)),
        ("Open edges", text::count(totals.open_edges)),
        ("Rims", text::count(totals.rims)),
        ("Zones", text::count(totals.zones)),
        ("Area", text::square_metres(totals.area_mm2)),
        ("Sides", range(totals.lengths, &|mm| units.length(mm))),
        ("Acute angles", range(totals.acute_angles, &degrees)),
        ("Dihedrals", range(totals.dihedrals, &degrees)),
        ("Size x", units.length(totals.size.x)),
        ("Size y", units.length(totals.size.y)),
        ("Size z", units.length(totals.size.z)),
    ];
    match volume(cx) {
        Some(mm3) => rows.push(("Volume", text::cubic_metres(mm3))),
        None if totals.open_edges > 0 => rows.push(("Volume", "open".to_owned())),
        None => rows.push(("Volume", "–".to_owned())),
    }
    if let Some(gap) = derived.shell.closing_gap {
        rows.push(("Closing gap", units.length(gap)));
    }
    rows
}

/// The volume, unless the inspection found panels that cross or lie on each other.
fn volume(cx: Cx<'_>) -> Option<f64> {
    let derived = &cx.state.derived;
    let crossed = derived
        .inspection
        .as_ref()
        .is_some_and(|i| !i.crossings.is_empty() || !i.doubled.is_empty());
    derived.totals.volume_mm3.filter(|_| !crossed)
}
