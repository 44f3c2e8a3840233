//! The bar above the picture: where one looks from, and how.

use egui::Ui;
use zonewright_painter::{ColourBy, Faces, Projection, View};

use crate::window::{command::Command, fields::wide_choice, panels::Cx};

const FACES: [(Faces, &str); 3] = [
    (Faces::ShadedWithEdges, "Faces and edges"),
    (Faces::Shaded, "Faces only"),
    (Faces::Wireframe, "Edges only"),
];

const COLOURS: [(ColourBy, &str); 7] = [
    (ColourBy::Plain, "Plain"),
    (ColourBy::Zone, "By zone"),
    (ColourBy::Family, "By family"),
    (ColourBy::Course, "By course"),
    (ColourBy::Slope, "By slope"),
    (ColourBy::Fold, "By fold"),
    (ColourBy::Finding, "By finding"),
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
    if let Some(chosen) = wide_choice(ui, name, at, &names) {
        cx.tx.send(command(all[chosen].0));
    }
}
