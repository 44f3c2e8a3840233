//! The head of the strip: which front, how far it is, what is repeated; and the line that says what is pointed at.

use egui::{Align, Label, Layout, Rect, RichText, Role as AccessRole, Ui, WidgetInfo};
use zonewright_geometry::Side;
use zonewright_shop::text;

use super::{act::StripAct, sight::Sight, words};
use crate::window::{command::Command, fields::wide_choice, panels::Cx, widgets::Widgets};

/// Draws the head.
pub(super) fn head_ui(cx: Cx<'_>, ui: &mut Ui, widgets: &mut Widgets, lane: Rect) {
    ui.spacing_mut().item_spacing.y = 3.0;
    let side = cx.state.view.side;
    ui.horizontal(|ui| {
        for (to, name) in [(Side::Fore, "Fore"), (Side::Aft, "Aft")] {
            let button = ui
                .selectable_label(side == to, name)
                .accessible_name(format!("{name} front"));
            if button
                .on_hover_text("The front that is shown here and that courses are laid on.")
                .clicked()
            {
                cx.tx.send(Command::SetSide(to));
            }
        }
        ui.add_space(ui.spacing().item_spacing.x);
        ui.spacing_mut().item_spacing.x = 3.0;
        zoom_ui(cx, ui, widgets, lane);
    });
    let front = &cx.state.derived.shell.fronts[usize::from(side == Side::Aft)];
    let closed = if front.closed { ", closed" } else { "" };
    ui.weak(format!("{} edges{closed}", text::count(front.letters.len())));
    let stands = Label::new(RichText::new(stands(cx, side)).weak()).truncate();
    ui.add(stands).on_hover_text(
        "Tinted: the coming course fills it. Dot: spliced, and nothing laid upon it yet. Small ring: a spur that is held.",
    );
    repeat_ui(cx, ui, side);
}

/// How far a front is: how many Vs can be filled, and how many are spurs, which make no panel.
fn stands(cx: Cx<'_>, side: Side) -> String {
    let vs = cx.state.derived.open_on(side).len();
    let held = cx.state.derived.strip_on(side).held_count;
    let open = match vs - held {
        0 if held == 0 => return "still: no open V".to_owned(),
        0 => "still".to_owned(),
        1 => "1 open V".to_owned(),
        n => format!("{} open Vs", text::count(n)),
    };
    match held {
        0 => open,
        1 => format!("{open}: 1 spur held"),
        n => format!("{open}: {} spurs held", text::count(n)),
    }
}

fn repeat_ui(cx: Cx<'_>, ui: &mut Ui, side: Side) {
    let now = cx.state.view.strip.repeat;
    let mut choices: Vec<Option<u32>> = vec![None];
    choices.extend(cx.state.derived.strip_on(side).repeats.iter().copied().map(Some));
    if !choices.contains(&now) {
        choices.push(now);
    }
    if choices.len() == 1 {
        return;
    }
    let names: Vec<String> = choices
        .iter()
        .map(|k| k.map_or_else(|| "No repeat".to_owned(), |k| format!("At {}", words::every(k))))
        .collect();
    let names: Vec<&str> = names.iter().map(String::as_str).collect();
    let at = choices.iter().position(|k| *k == now).unwrap_or(0);
    if let Some(chosen) = wide_choice(ui, "Repeat round the front", at, &names) {
        cx.tx.send(Command::Strip(StripAct::Repeat(choices[chosen])));
    }
}

/// Draws the line above the lane: what is pointed at.
pub(super) fn line_ui(ui: &mut Ui, widgets: &Widgets) {
    let shown = widgets.strip.told.as_ref().map_or("", |told| told.line.as_str());
    let hint = "Point at a notch to see its panel. A click splices, a drag fills.";
    ui.with_layout(Layout::left_to_right(Align::Center), |ui| {
        let (text, name) = if shown.is_empty() {
            (RichText::new(hint).weak(), "Nothing is pointed at in the strip")
        } else {
            (RichText::new(shown), shown)
        };
        let label = ui.add(Label::new(text.small()).truncate());
        label.widget_info(|| WidgetInfo::labeled(AccessRole::Label, true, name));
    });
}

/// The zoom's buttons.
fn zoom_ui(cx: Cx<'_>, ui: &mut Ui, widgets: &mut Widgets, lane: Rect) {
    let flat = &cx.state.derived.strip_on(cx.state.view.side).flat;
    let strip = &mut widgets.strip;
    let sight = Sight::new(flat, lane, strip.zoom);
    let middle = lane.center().x;
    let steps = [
        ("−", "Zoom the strip out", 1.0 / super::keys::ZOOM_STEP),
        ("+", "Zoom the strip in", super::keys::ZOOM_STEP),
        ("All", "Show the whole front", sight.least() / sight.scale),
    ];
    for (text, name, factor) in steps {
        let button = ui.add(egui::Button::new(text).small()).on_hover_text(name);
        if button.accessible_name(name).clicked() {
            strip.zoom = sight.scaled(flat, factor, middle);
        }
    }
}
