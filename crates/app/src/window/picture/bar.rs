//! The bar above the picture: where one looks from, and how.

use egui::Ui;
use zonewright_painter::{ColourBy, Faces, Projection, View};

use crate::window::{command::Command, fields::bare_choice, panels::Cx};

const FACES: [(Faces, &str); 3] = [
    (Faces::ShadedWithEdges, "Faces and edges"),
    (Faces::Shaded, "Faces only"),
    (Faces::Wireframe, "Edges only"),
];

const COLOURS: [(ColourBy, &str); 7] = [
    (ColourBy::Plain, "Plain"),
    (ColourBy::Zone, "Zone"),
    (ColourBy::Family, "Family"),
    (ColourBy::Course, "Course"),
    (ColourBy::Slope, "Slope"),
    (ColourBy::Fold, "Fold"),
    (ColourBy::Finding, "Finding"),
];

/// Draws the bar.
pub(super) fn bar_ui(cx: Cx<'_>, ui: &mut Ui) {
    let view = &cx.state.view;
    ui.horizontal_wrapped(|ui| {
        for to in [View::Plan, View::Front, View::Side, View::Iso, View::Fit] {
            let words = Command::Look(to).words();
            if ui.button(words.name).on_hover_text(words.hint).clicked() {
                cx.tx.send(Command::Look(to));
            }
        }
        ui.separator();
        let projections = [
            (Projection::Perspective, "Perspective"),
            (Projection::Parallel, "Parallel"),
        ];
        pick(
            cx,
            ui,
            "Projection",
            view.projection,
            &projections,
            Command::SetProjection,
        );
        pick(cx, ui, "Faces", view.faces, &FACES, Command::SetFaces);
        ui.weak("Colour by");
        pick(cx, ui, "Colour by", view.colour, &COLOURS, Command::SetColour);
        let mut hidden = view.hidden_edges;
        if ui.checkbox(&mut hidden, "Hidden edges").changed() {
            cx.tx.send(Command::HiddenEdges);
        }
    });
}

fn pick<T: Copy + PartialEq>(
    cx: Cx<'_>,
    ui: &mut Ui,
    name: &str,
    now: T,
    all: &[(T, &str)],
    command: impl Fn(T) -> Command,
) {
    let names: Vec<&str> = all.iter().map(|(_, n)| *n).collect();
    let at = all.iter().position(|(t, _)| *t == now).unwrap_or(0);
    if let Some(chosen) = bare_choice(ui, name, at, &names) {
        cx.tx.send(command(all[chosen].0));
    }
}
