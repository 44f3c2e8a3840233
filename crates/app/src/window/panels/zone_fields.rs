//! The picked zone: its measures typed, its link, its way back to what it is derived from.

use egui::Ui;
use zonewright_geometry::{Shell, Sign, Vector, ZoneKind, ZoneRef, edit::Measures};

use super::Cx;
use crate::window::{command::Command, fields, path_place::turned, zone_table::zone_name, zones::ZoneAct};

/// Draws the fields of a zone, by its index in the shell. All measures are of the zone as the shell stands.
pub(super) fn fields_ui(cx: Cx<'_>, ui: &mut Ui, zone: u32) {
    let shell = &cx.state.derived.shell;
    let Some(state) = shell.zones.get(zone as usize) else {
        return;
    };
    let name = zone_name(zone);
    ui.separator();
    ui.horizontal(|ui| {
        ui.strong(&name);
        ui.weak(kind_words(shell, zone));
    });
    let placed = turned(&cx.state.shape().placement);
    let vector = placed * state.vector;
    let set = |to: Vector, measure: &'static str| {
        let own = placed.inverse() * to;
        cx.tx.send(Command::Zone(ZoneAct::Set(state.name, own, measure)));
    };
    let units = cx.state.units();
    let now = Measures::of(vector);
    let mut typed = now;
    if fields::length(ui, "Zone length", &mut typed.length_mm, units) && now.length_mm > 0.0 {
        // Straight along, so that the direction keeps its digits.
        set(vector * (typed.length_mm / now.length_mm), "Length");
    }
    if fields::angle(ui, "Zone slope", &mut typed.slope) {
        set(typed.vector(), "Slope");
    }
    if fields::angle(ui, "Zone azimuth", &mut typed.azimuth) {
        set(typed.vector(), "Azimuth");
    }
    let mut parts = vector;
    if fields::vector(ui, &name, &mut parts, units) {
        set(parts, "Vector");
    }
    link_ui(cx, ui, zone, state.name, state.kind);
}

fn link_ui(cx: Cx<'_>, ui: &mut Ui, zone: u32, name: ZoneRef, kind: ZoneKind) {
    let shell = &cx.state.derived.shell;
    let send = |act: ZoneAct| cx.tx.send(Command::Zone(act));
    let ruled = cx.state.shape().zones.iter().any(|rule| rule.zone == name);
    ui.horizontal_wrapped(|ui| {
        let linked = kind == ZoneKind::Linked;
        let button = ui.add_enabled(linked, egui::Button::new("Unlink"));
        if button.on_hover_text("The zone keeps its vector, as its own.").clicked() {
            send(ZoneAct::Unlink(name));
        }
        let button = ui.add_enabled(ruled, egui::Button::new("Back to derived"));
        let hint = "Takes the zone's own vector or link away.";
        if button.on_hover_text(hint).on_disabled_hover_text(hint).clicked() {
            send(ZoneAct::Derive(name));
        }
    });
    if shell.zones.len() < 2 {
        return;
    }
    ui.horizontal_wrapped(|ui| {
        let last = u32::try_from(shell.zones.len()).unwrap_or(u32::MAX);
        let mut to = cx.state.view.zones.link_to.min(last - 1) + 1;
        ui.label("Link to zone");
        let field = egui::DragValue::new(&mut to)
            .range(1..=last)
            .speed(0.1)
            .update_while_editing(false);
        if ui.add(field).accessible_name("Link to zone").changed() {
            send(ZoneAct::LinkTo(to - 1));
        }
        let target = shell.zones[(to - 1) as usize].name;
        for (text, sign) in [("Link", Sign::Plus), ("Link against", Sign::Minus)] {
            let button = ui.add_enabled(to - 1 != zone, egui::Button::new(text));
            if button
                .on_hover_text("The two get one vector and count as one zone.")
                .clicked()
            {
                send(ZoneAct::Link(name, target, sign));
            }
        }
    });
}

/// Where a zone's vector comes from, in words.
pub(super) fn kind_words(shell: &Shell, zone: u32) -> String {
    let Some(state) = shell.zones.get(zone as usize) else {
        return String::new();
    };
    match state.kind {
        ZoneKind::Own => "own vector".to_owned(),
        ZoneKind::Derived => "derived from the start".to_owned(),
        ZoneKind::Linked => {
            let way = if state.reversed { "linked against" } else { "linked to" };
            format!("{way} {}", zone_name(state.counts_as).to_lowercase())
        }
    }
}
