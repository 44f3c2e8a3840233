//! The bar above the views, and the small one in each of them: from where one looks, and how.

use egui::Ui;
use zonewright_painter::{ColourBy, Faces, Projection, View};

use crate::window::{
    command::Command,
    fields::wide_choice,
    panels::Cx,
    panes::{Layout, PaneAct},
    zones::ZoneAct,
};

/// What a view can show; none is the free view.
const VIEWS: [Option<View>; 5] = [
    None,
    Some(View::Plan),
    Some(View::Front),
    Some(View::Side),
    Some(View::Iso),
];

/// A view of this width has room for a button a side, in points; a narrower one has a list.
const ROOMY: f32 = 400.0;

const PROJECTIONS: [(Projection, &str); 2] = [
    (Projection::Perspective, "Perspective"),
    (Projection::Parallel, "Parallel"),
];

const FACES: [(Faces, &str); 3] = [
    (Faces::ShadedWithEdges, "Faces and edges"),
    (Faces::Shaded, "Faces only"),
    (Faces::Wireframe, "Edges only"),
];

const COLOURS: [(ColourBy, &str); 8] = [
    (ColourBy::Plain, "Plain"),
    (ColourBy::Zone, "By zone"),
    (ColourBy::Family, "By family"),
    (ColourBy::Course, "By course"),
    (ColourBy::Slope, "By slope"),
    (ColourBy::Fold, "By fold"),
    (ColourBy::Finding, "By finding"),
    (ColourBy::Distance, "By distance"),
];

/// Draws the bar above all views: which views there are, and how faces and edges are drawn in all of them.
pub(super) fn bar_ui(cx: Cx<'_>, ui: &mut Ui) {
    let view = &cx.state.view;
    let panes = &cx.state.panes;
    ui.horizontal_wrapped(|ui| {
        for layout in Layout::ALL {
            layout_button(cx, ui, layout);
        }
        ui.separator();
        let now = panes.pane(panes.active()).camera.projection;
        pick(cx, ui, "Projection", now, &PROJECTIONS, Command::SetProjection);
        pick(cx, ui, "Faces", view.faces, &FACES, Command::SetFaces);
        pick(cx, ui, "Colour by", view.colour, &COLOURS, Command::SetColour);
        let mut hidden = view.hidden_edges;
        if ui.checkbox(&mut hidden, "Hidden edges").changed() {
            cx.tx.send(Command::HiddenEdges);
        }
        ui.separator();
        for (on, act, text) in [
            (view.zones.together, ZoneAct::Together, "Alike"),
            (view.zones.snap, ZoneAct::Snap, "Snap"),
        ] {
            toggle(ui, cx, on, act, text);
        }
    });
}

/// A toggle of how zones and points are dragged.
fn toggle(ui: &mut Ui, cx: Cx<'_>, on: bool, act: ZoneAct, text: &str) {
    let hint = act.hint(ui.ctx());
    let name = act.words().name;
    let button = egui::Button::selectable(on, text).frame_when_inactive(true);
    if ui.add(button).on_hover_text(hint).accessible_name(name).clicked() {
        cx.tx.send(Command::Zone(act));
    }
}

/// A button that shows how a layout shares the window.
fn layout_button(cx: Cx<'_>, ui: &mut Ui, layout: Layout) {
    let on = cx.state.panes.layout == layout;
    let words = layout.words();
    let side = ui.spacing().interact_size.y;
    let button = egui::Button::new("").min_size(egui::vec2(side, side)).selected(on);
    let button = ui.add(button).on_hover_text(format!("{}. {}", words.name, words.hint));
    let colour = ui.style().interact_selectable(&button, on).text_color();
    let icon = egui::Rect::from_center_size(button.rect.center(), egui::vec2(side * 0.6, side * 0.5));
    for rect in super::places(layout, icon, 1.5) {
        ui.painter()
            .rect_stroke(rect, 0.0, egui::Stroke::new(1.0, colour), egui::StrokeKind::Inside);
    }
    if button.accessible_name(words.name).clicked() {
        cx.tx.send(Command::Pane(PaneAct::LayOut(layout)));
    }
}

/// Draws a view's own bar, in its corner: from where it looks, and a button that fits it.
pub(super) fn pane_bar_ui(cx: Cx<'_>, ui: &mut Ui, at: usize, rect: egui::Rect) {
    let pane = cx.state.panes.pane(at);
    // While there is one view, its buttons need no name of the view.
    let of = match cx.state.panes.layout {
        Layout::One => String::new(),
        _ => format!(": {}", cx.state.panes.name(at)),
    };
    let here = |command: Command| {
        cx.tx.send(Command::Pane(PaneAct::Activate(at)));
        cx.tx.send(command);
    };
    let builder = egui::UiBuilder::new()
        .id_salt(("pane bar", at))
        .max_rect(rect.shrink(5.0))
        .layout(egui::Layout::left_to_right(egui::Align::Min));
    ui.scope_builder(builder, |ui| {
        if rect.width() < ROOMY {
            let names = VIEWS.map(|view| look(view).words().name);
            let now = VIEWS.iter().position(|v| *v == pane.view).unwrap_or(0);
            if let Some(chosen) = wide_choice(ui, &format!("View{of}"), now, &names) {
                here(look(VIEWS[chosen]));
            }
        } else {
            for view in VIEWS {
                let words = look(view).words();
                let button = egui::Button::selectable(view == pane.view, words.name).frame_when_inactive(true);
                let button = ui.add(button).on_hover_text(words.hint);
                if button.accessible_name(format!("{}{of}", words.name)).clicked() {
                    here(look(view));
                }
            }
        }
        let words = Command::Look(View::Fit).words();
        let fit = ui.button(words.name).on_hover_text(words.hint);
        if fit.accessible_name(format!("{}{of}", words.name)).clicked() {
            here(Command::Look(View::Fit));
        }
    });
}

/// The command that looks from a side, or freely.
const fn look(view: Option<View>) -> Command {
    match view {
        Some(view) => Command::Look(view),
        None => Command::Pane(PaneAct::Free),
    }
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
