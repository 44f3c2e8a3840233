//! The parameters of every kind of start.

use egui::Ui;
use zonewright_geometry::{
    Start, Vector,
    start::{ColumnForm, HelicalForm, LoopForm, PolarBy, PolarForm, PolarPair, RibbonForm, RibbonFrom},
};
use zonewright_shop::text::Units;

use super::{curve_fields, small, star_fields};
use crate::window::fields::{angle, choice, count, integer, length, vector};

/// Draws the fields of a start. Gives the name of the parameter that was changed.
pub(super) fn start_fields(ui: &mut Ui, start: &mut Start, units: Units) -> Option<&'static str> {
    match start {
        // Free points have the path's table.
        Start::Zigzag(_) => None,
        Start::Translation(form) => {
            let zig = curve_fields::curve_fields(ui, "Zig path", &mut form.zig, units);
            let zag = curve_fields::curve_fields(ui, "Zag path", &mut form.zag, units);
            zig.then_some("the zig path").or(zag.then_some("the zag path"))
        }
        Start::Polar(form) => polar(ui, form, units),
        Start::Loop(form) => tube(ui, form, units),
        Start::Ribbon(form) => ribbon(ui, form, units),
        Start::Column(form) => column(ui, form, units),
        Start::Helical(form) => helical(ui, form, units),
        Start::StarPath(path) => star_fields::star_path(ui, path, units),
        Start::StarSolid(solid) => {
            let star = star_fields::star(ui, &mut solid.star);
            let edge = length(ui, "Edge", &mut solid.edge_mm, units);
            star.then_some("the star").or(edge.then_some("the edge"))
        }
    }
}

/// The two measures that fix a polar form, in the order of the chooser.
const POLAR_BY: [&str; 6] = [
    "Pitch, edge",
    "Pitch, width",
    "Pitch, height",
    "Edge, width",
    "Edge, height",
    "Width, height",
];

fn polar(ui: &mut Ui, form: &mut PolarForm, units: Units) -> Option<&'static str> {
    let mut changed = count(ui, "Ribs", &mut form.ribs, 3..=1000).then_some("the ribs");
    let now = match form.by {
        PolarBy::PitchEdge { .. } => 0,
        PolarBy::PitchWidth { .. } => 1,
        PolarBy::PitchHeight { .. } => 2,
        PolarBy::EdgeWidth { .. } => 3,
        PolarBy::EdgeHeight { .. } => 4,
        PolarBy::WidthHeight { .. } => 5,
    };
    if let Some(chosen) = choice(ui, "Given by", now, &POLAR_BY)
        // The form stays as it is: only what is typed changes.
        && let Ok(same) = form.by_pair(PolarPair::ALL[chosen])
    {
        *form = same;
        changed = Some("the measures");
    }
    let measure = match &mut form.by {
        PolarBy::PitchEdge { pitch, edge_mm } => angle(ui, "Pitch", pitch) | length(ui, "Edge", edge_mm, units),
        PolarBy::PitchWidth { pitch, width_mm } => angle(ui, "Pitch", pitch) | length(ui, "Width", width_mm, units),
        PolarBy::PitchHeight { pitch, height_mm } => angle(ui, "Pitch", pitch) | length(ui, "Height", height_mm, units),
        PolarBy::EdgeWidth { edge_mm, width_mm } => {
            length(ui, "Edge", edge_mm, units) | length(ui, "Width", width_mm, units)
        }
        PolarBy::EdgeHeight { edge_mm, height_mm } => {
            length(ui, "Edge", edge_mm, units) | length(ui, "Height", height_mm, units)
        }
        PolarBy::WidthHeight { width_mm, height_mm } => {
            length(ui, "Width", width_mm, units) | length(ui, "Height", height_mm, units)
        }
    };
    changed.or(measure.then_some("a measure"))
}

fn tube(ui: &mut Ui, form: &mut LoopForm, units: Units) -> Option<&'static str> {
    let mut changed = count(ui, "Sides", &mut form.sides, 2..=1000).then_some("the sides");
    changed = changed.or(length(ui, "Radius", &mut form.radius_mm, units).then_some("the radius"));
    changed = changed.or(length(ui, "Rise", &mut form.rise_mm, units).then_some("the rise"));
    let mut taken = None;
    for (at, (node, by)) in form.moved.iter_mut().enumerate() {
        ui.push_id(("moved", at), |ui| {
            ui.horizontal(|ui| {
                let last = form.sides.saturating_mul(2).saturating_sub(1);
                let label = format!("Moved point {}", at + 1);
                if count(ui, &label, node, 0..=last) {
                    changed = Some("a moved point");
                }
            });
            if vector(ui, &format!("Movement {}", at + 1), by, units) {
                changed = Some("a movement");
            }
            if small(ui, true, "Put back", &format!("Put moved point {} back", at + 1)) {
                taken = Some(at);
            }
        });
    }
    if let Some(at) = taken {
        form.moved.remove(at);
        changed = Some("the moved points");
    }
    if ui.button("Move a point").clicked() {
        let free = (0..form.sides.saturating_mul(2)).find(|n| form.moved.iter().all(|(node, _)| node != n));
        form.moved.push((free.unwrap_or(0), Vector::ZERO));
        changed = Some("the moved points");
    }
    changed
}

fn ribbon(ui: &mut Ui, form: &mut RibbonForm, units: Units) -> Option<&'static str> {
    let mut changed = count(ui, "Ribs", &mut form.ribs, 2..=10_000).then_some("the ribs");
    changed = changed.or(angle(ui, "Turn", &mut form.turn).then_some("the turn"));
    changed = changed.or(angle(ui, "Pitch", &mut form.pitch).then_some("the pitch"));
    changed = changed.or(length(ui, "Edge", &mut form.edge_mm, units).then_some("the edge"));
    let now = usize::from(form.from == RibbonFrom::Across);
    if let Some(chosen) = choice(ui, "Grown from", now, &["Its edge", "Across it"]) {
        form.from = if chosen == 0 {
            RibbonFrom::Edge
        } else {
            RibbonFrom::Across
        };
        changed = Some("where it grows from");
    }
    changed
}

fn column(ui: &mut Ui, form: &mut ColumnForm, units: Units) -> Option<&'static str> {
    let mut changed = count(ui, "Ribs", &mut form.ribs, 2..=1000).then_some("the ribs");
    changed = changed.or(length(ui, "Zag run", &mut form.zag_run_mm, units).then_some("the zag run"));
    changed = changed.or(length(ui, "Zig run", &mut form.zig_run_mm, units).then_some("the zig run"));
    changed = changed.or(length(ui, "Rise", &mut form.rise_mm, units).then_some("the rise"));
    changed.or(integer(ui, "Turns of the zigs", &mut form.turn).then_some("the turn"))
}

fn helical(ui: &mut Ui, form: &mut HelicalForm, units: Units) -> Option<&'static str> {
    let mut changed = count(ui, "Ribs", &mut form.ribs, 3..=1000).then_some("the ribs");
    changed = changed.or(count(ui, "Turn", &mut form.turn, 1..=999).then_some("the turn"));
    changed = changed.or(angle(ui, "Pitch", &mut form.pitch).then_some("the pitch"));
    changed.or(length(ui, "Edge", &mut form.edge_mm, units).then_some("the edge"))
}
