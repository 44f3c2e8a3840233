//! Directions of splices: those in hand, and those of a step.

use egui::Ui;
use zonewright_geometry::{Direction, Vector, ZoneRef};

use super::{Cx, small};
use crate::window::{
    command::Command,
    fields::{bare_choice, vector},
};

/// Draws the directions in hand.
pub(super) fn hand_ui(cx: Cx<'_>, ui: &mut Ui) {
    let mut hand = cx.state.view.hand.clone();
    ui.weak("A click on an open V splices these.");
    if list(cx, ui, "in hand", &mut hand.directions) {
        cx.tx.send(Command::SetHand(hand));
    }
}

/// Draws a list of directions; `of` tells their accessible names apart. Gives whether it was changed.
pub(super) fn list(cx: Cx<'_>, ui: &mut Ui, of: &str, directions: &mut Vec<Direction>) -> bool {
    let mut changed = false;
    let mut delete = None;
    for (at, direction) in directions.iter_mut().enumerate() {
        let name = format!("Direction {} {of}", at + 1);
        ui.push_id((of, at), |ui| {
            ui.horizontal(|ui| {
                changed |= kind(cx, ui, &name, direction);
                changed |= zone(cx, ui, &name, direction);
                if small(ui, true, "×", &format!("Delete direction {} {of}", at + 1)) {
                    delete = Some(at);
                }
            });
            if let Direction::Own(own) = direction {
                changed |= vector(ui, &name, own, cx.state.units());
            }
        });
    }
    if let Some(at) = delete {
        directions.remove(at);
        changed = true;
    }
    let add = ui
        .button("Add a direction")
        .accessible_name(format!("Add a direction {of}"));
    if add.clicked() {
        let last = directions.last().cloned();
        directions.push(last.unwrap_or(Direction::Own(Vector::new(0.0, 0.0, 400.0))));
        changed = true;
    }
    changed
}

fn kind(cx: Cx<'_>, ui: &mut Ui, name: &str, direction: &mut Direction) -> bool {
    let now = match direction {
        Direction::Own(_) => 0,
        Direction::Zone(_) => 1,
        Direction::Against(_) => 2,
        Direction::Between => 3,
    };
    let kinds = ["Own vector", "Along a zone", "Against a zone", "All between"];
    let Some(chosen) = bare_choice(ui, &format!("Kind of {}", lower(name)), now, &kinds) else {
        return false;
    };
    let zones = &cx.state.derived.shell.zones;
    let zone = match direction {
        Direction::Zone(zone) | Direction::Against(zone) => *zone,
        _ => zones.first().map_or(ZoneRef::Start(0), |z| z.name),
    };
    let own = zones.iter().find(|z| z.name == zone).map(|z| z.vector);
    *direction = match chosen {
        0 => Direction::Own(own.unwrap_or(Vector::new(0.0, 0.0, 400.0))),
        1 => Direction::Zone(zone),
        2 => Direction::Against(zone),
        _ => Direction::Between,
    };
    true
}

fn lower(name: &str) -> String {
    name.to_lowercase()
}

fn zone(cx: Cx<'_>, ui: &mut Ui, name: &str, direction: &mut Direction) -> bool {
    let (Direction::Zone(zone) | Direction::Against(zone)) = direction else {
        return false;
    };
    let zones = &cx.state.derived.shell.zones;
    let names: Vec<String> = zones.iter().map(|z| zone_name(z.name)).collect();
    let shown: Vec<&str> = names.iter().map(String::as_str).collect();
    let now = zones.iter().position(|z| z.name == *zone).unwrap_or(usize::MAX);
    match bare_choice(ui, &format!("Zone of {}", lower(name)), now, &shown) {
        Some(chosen) => {
            *zone = zones[chosen].name;
            true
        }
        None => false,
    }
}

/// How a zone is called in lists.
pub(in crate::window) fn zone_name(zone: ZoneRef) -> String {
    match zone {
        ZoneRef::Start(index) => format!("Zone {}", index + 1),
        ZoneRef::Spliced(step, index) => format!("Spliced {}.{}", step.0, index + 1),
    }
}
