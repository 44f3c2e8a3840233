//! The zones of the shell, in a table; and how they are dragged.

use egui::{Color32, Sense, Ui};
use egui_extras::{Column, TableBuilder};
use zonewright_geometry::edit::Measures;
use zonewright_painter::{Colour, Palette};
use zonewright_shop::text;

use super::{Cx, zone_fields};
use crate::window::{
    command::Command,
    fields,
    path_place::turned,
    zone_table::{index_of, zone_name},
    zones::{SnapStar, ZoneAct},
};

/// Draws the zones.
pub(super) fn zones_ui(cx: Cx<'_>, ui: &mut Ui) {
    let shell = &cx.state.derived.shell;
    if shell.zones.is_empty() {
        ui.weak("The start gives no zones: see the findings.");
        return;
    }
    ui.scope(|ui| table(cx, ui));
    let picked = cx.state.view.zones.picked;
    match picked.and_then(|name| index_of(shell, name)) {
        Some(zone) => zone_fields::fields_ui(cx, ui, zone),
        None => {
            ui.weak("Pick a zone here, or drag any edge in the picture.");
        }
    }
    directions(cx, ui);
}

/// What drags snap to, besides what is round and what is there. How they go is chosen above the picture.
fn directions(cx: Cx<'_>, ui: &mut Ui) {
    let view = &cx.state.view.zones;
    if !view.snap {
        return;
    }
    let names = SnapStar::ALL.map(|(_, name)| name);
    let same = |star: &SnapStar| match (star, view.star) {
        (SnapStar::Prismatic(_), SnapStar::Prismatic(_)) => true,
        (star, now) => *star == now,
    };
    let now = SnapStar::ALL.iter().position(|(star, _)| same(star)).unwrap_or(0);
    if let Some(chosen) = fields::choice(ui, "Snap to directions", now, &names) {
        cx.tx.send(Command::Zone(ZoneAct::Star(SnapStar::ALL[chosen].0)));
    }
    if let SnapStar::Prismatic(mut level) = view.star
        && fields::count(ui, "Level directions", &mut level, 2..=72)
    {
        cx.tx.send(Command::Zone(ZoneAct::Star(SnapStar::Prismatic(level))));
    }
}

fn table(cx: Cx<'_>, ui: &mut Ui) {
    let state = cx.state;
    let (shell, zones) = (&state.derived.shell, &state.derived.zones);
    let placed = turned(&state.shape().placement);
    let palette = if state.view.dark {
        Palette::dark()
    } else {
        Palette::light()
    };
    let row = ui.spacing().interact_size.y;
    let shown = super::rows_shown(ui, shell.zones.len());
    let height = (row + ui.spacing().item_spacing.y) * (shown + 1) as f32 + 2.0;
    ui.spacing_mut().item_spacing.x = 4.0;
    TableBuilder::new(ui)
        .id_salt("zones")
        .column(Column::exact(58.0))
        .column(Column::exact(38.0))
        .columns(Column::remainder().at_least(48.0), 3)
        .cell_layout(egui::Layout::left_to_right(egui::Align::Center))
        .max_scroll_height(height)
        .min_scrolled_height(height.min(80.0))
        .vscroll(true)
        .header(row, |mut header| {
            for title in ["", "edges", "length", "slope", "azimuth"] {
                header.col(|ui| {
                    ui.weak(title);
                });
            }
        })
        .body(|body| {
            // Only the rows that are seen are made.
            body.rows(row, shell.zones.len(), |mut line| {
                let at = line.index();
                let zone = shell.zones[at];
                let measures = Measures::of(placed * zone.vector);
                line.col(|ui| {
                    let [r, g, b, a] = rgba(palette.category(zone.counts_as as usize));
                    let (rect, _) = ui.allocate_exact_size(egui::vec2(10.0, 10.0), Sense::hover());
                    ui.painter()
                        .rect_filled(rect, 2.0, Color32::from_rgba_premultiplied(r, g, b, a));
                    let picked = state.view.zones.picked == Some(zone.name);
                    let label = ui.selectable_label(picked, format!("{}", at + 1));
                    let number = u32::try_from(at).unwrap_or(u32::MAX);
                    let label = label.on_hover_text(zone_fields::kind_words(shell, number));
                    if label.accessible_name(zone_name(number)).clicked() {
                        cx.tx.send(Command::Zone(ZoneAct::Pick((!picked).then_some(zone.name))));
                    }
                });
                let edges = zones.edges.get(at).copied().unwrap_or_default();
                let cells = [
                    text::count(edges as usize),
                    state.units().field(measures.length_mm),
                    text::degrees(measures.slope.degrees(), 1),
                    text::degrees(measures.azimuth.degrees(), 1),
                ];
                for cell in cells {
                    line.col(|ui| {
                        ui.label(cell);
                    });
                }
            });
        });
}

const fn rgba(colour: Colour) -> [u8; 4] {
    [colour.r, colour.g, colour.b, colour.a]
}
