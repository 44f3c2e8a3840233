//! The readouts, live with every change, beside what they were when a state was remembered.

use egui::{Align, Button, Label, Layout, Role, Ui, WidgetInfo};
use zonewright_geometry::measure::Range;
use zonewright_shop::spread::Measure;

use super::Cx;
use crate::window::{
    command::Command,
    derived::Pending,
    readings::{End, Reading, ReadingAct, Shown, Value, measured, readings},
};

/// Draws the readouts.
pub(super) fn readouts_ui(cx: Cx<'_>, ui: &mut Ui) {
    ui.scope(|ui| {
        ui.spacing_mut().item_spacing.y = 3.0;
        let pending = cx.state.derived.pending();
        for reading in readings(&cx.state.derived) {
            let behind = match pending {
                Some(Pending::Shell) => true,
                Some(Pending::Parts) => OF_PARTS.contains(&reading.name),
                None => false,
            };
            if behind {
                // What is there is of the shell before: faded until the new value is there.
                ui.scope(|ui| {
                    ui.multiply_opacity(0.5);
                    let value = reading.value.text(cx.state.units());
                    readout(ui, reading.name, &format!("{value} …"));
                });
            } else {
                one(cx, ui, &reading);
            }
        }
    });
    compare_ui(cx, ui);
}

fn one(cx: Cx<'_>, ui: &mut Ui, reading: &Reading) {
    let units = cx.state.units();
    match &reading.value {
        Value::Range(measure, Some(range)) if !reads_one(*measure, range, cx) => {
            range_ui(cx, ui, reading.name, *measure, range);
        }
        value => readout(ui, reading.name, &value.text(units)),
    }
    let then = cx.state.remembered.as_ref().and_then(|r| r.reading(reading.name));
    if let Some(change) = then.and_then(|then| reading.value.since(&then.value, units)) {
        ui.with_layout(Layout::right_to_left(Align::Min), |ui| {
            let name = format!("{} since remembered: {change}", reading.name);
            let shown =
                ui.add(Label::new(egui::RichText::new(change).small().color(cx.state.colours().accent())).truncate());
            shown.widget_info(|| WidgetInfo::labeled(Role::Label, true, &name));
        });
    }
}

fn reads_one(measure: Measure, range: &Range, cx: Cx<'_>) -> bool {
    let units = cx.state.units();
    measured(measure, range.least, units) == measured(measure, range.most, units)
}

/// The smallest and the largest, each a button that shows where it is.
fn range_ui(cx: Cx<'_>, ui: &mut Ui, name: &'static str, measure: Measure, range: &Range) {
    let units = cx.state.units();
    ui.horizontal(|ui| {
        ui.weak(name);
        ui.with_layout(Layout::right_to_left(Align::Center), |ui| {
            ui.spacing_mut().item_spacing.x = 4.0;
            ui.spacing_mut().button_padding = egui::vec2(3.0, 0.0);
            for (end, word, value) in [
                (End::Most, "largest", range.most),
                (End::Least, "smallest", range.least),
            ] {
                let shown = Shown::Extreme(measure, end);
                let is_shown = cx.state.view.shown == Some(shown);
                let text = measured(measure, value, units);
                let button = ui.add(Button::selectable(is_shown, &text).min_size(egui::vec2(0.0, 0.0)));
                let button = button.on_hover_text("Click to show where it is.");
                let accessible = format!("{name}, {word}: {text}");
                button.widget_info(|| WidgetInfo::selected(Role::Button, true, is_shown, &accessible));
                if button.clicked() {
                    let show = (!is_shown).then_some(shown);
                    cx.tx.send(Command::Readings(ReadingAct::Show(show)));
                }
                if end == End::Most {
                    ui.weak("–");
                }
            }
        });
    });
}

/// Remembering a state, and what can be done with a remembered one.
fn compare_ui(cx: Cx<'_>, ui: &mut Ui) {
    let button = |ui: &mut Ui, text: &str, act: ReadingAct| {
        let words = act.words();
        let button = ui.small_button(text).on_hover_text(words.hint);
        if button.accessible_name(words.name).clicked() {
            cx.tx.send(Command::Readings(act));
        }
    };
    ui.horizontal_wrapped(|ui| {
        if cx.state.remembered.is_some() {
            ui.weak("Compared with a remembered state");
            button(ui, "Go back to it", ReadingAct::GoBack);
            button(ui, "Remember this one instead", ReadingAct::Remember);
            button(ui, "Forget it", ReadingAct::Forget);
        } else {
            button(ui, "Remember this state", ReadingAct::Remember);
        }
    });
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
