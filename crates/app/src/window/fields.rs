//! Fields for typed values: lengths in millimetres or inches with fractions, angles, counts, choices.
//!
//! Every field has its label as its accessible name. A field takes a typed value when it is left or Enter is pressed, so
//! that one typed value is one undo step.

use egui::{DragValue, Ui};
use zonewright_geometry::{Angle, Vector};
use zonewright_shop::text::{self, MM_PER_INCH, Units};

/// Width of a value field, in points.
const VALUE_WIDTH: f32 = 124.0;

/// A labelled length. Gives whether it was changed.
pub(super) fn length(ui: &mut Ui, label: &str, mm: &mut f64, units: Units) -> bool {
    row(ui, label, |ui| bare_length(ui, label, mm, units))
}

/// A length without a visible label; `name` is its accessible name. Gives whether it was changed.
pub(super) fn bare_length(ui: &mut Ui, name: &str, mm: &mut f64, units: Units) -> bool {
    let speed = match units {
        Units::Mm => 1.0,
        Units::Inch => MM_PER_INCH / 16.0,
    };
    let before = *mm;
    let response = ui
        .add(
            DragValue::new(mm)
                .speed(speed)
                .update_while_editing(false)
                .custom_formatter(move |mm, _| length_text(mm, units))
                .custom_parser(move |typed| text::parse_length(typed, units).ok()),
        )
        .accessible_name(name);
    // Leaving a field untouched must not round its value to what the text shows.
    if *mm != before && length_text(*mm, units) == length_text(before, units) {
        *mm = before;
    }
    response.changed() && *mm != before
}

/// A length as a field shows it: whole sixteenths of an inch as fractions, everything else as decimals.
fn length_text(mm: f64, units: Units) -> String {
    let sixteenths = mm / MM_PER_INCH * 16.0;
    // Far below the four decimals that a field shows.
    if units == Units::Inch && (sixteenths - sixteenths.round()).abs() < 1e-6 {
        return text::inches(mm, text::Fraction::Sixteenth);
    }
    units.field(mm)
}

/// A labelled angle, shown in degrees. Gives whether it was changed.
pub(super) fn angle(ui: &mut Ui, label: &str, value: &mut Angle) -> bool {
    let mut degrees = value.degrees();
    let changed = row(ui, label, |ui| {
        ui.add(
            DragValue::new(&mut degrees)
                .speed(0.25)
                .update_while_editing(false)
                .custom_formatter(|degrees, _| format!("{}°", text::trimmed(degrees, 4)))
                .custom_parser(|typed| text::parse_angle(typed).ok().map(Angle::degrees)),
        )
        .accessible_name(label)
        .changed()
    });
    if changed {
        *value = Angle::from_degrees(degrees);
    }
    changed
}

/// A labelled whole number. Gives whether it was changed.
pub(super) fn count(ui: &mut Ui, label: &str, value: &mut u32, range: std::ops::RangeInclusive<u32>) -> bool {
    row(ui, label, |ui| {
        ui.add(
            DragValue::new(value)
                .range(range)
                .clamp_existing_to_range(false)
                .speed(0.1)
                .update_while_editing(false),
        )
        .accessible_name(label)
        .changed()
    })
}

/// A labelled whole number that may be negative. Gives whether it was changed.
pub(super) fn integer(ui: &mut Ui, label: &str, value: &mut i32) -> bool {
    row(ui, label, |ui| {
        ui.add(DragValue::new(value).speed(0.05).update_while_editing(false))
            .accessible_name(label)
            .changed()
    })
}

/// A labelled plain number. Gives whether it was changed.
pub(super) fn number(ui: &mut Ui, label: &str, value: &mut f64, speed: f64) -> bool {
    row(ui, label, |ui| {
        ui.add(
            DragValue::new(value)
                .speed(speed)
                .max_decimals(4)
                .update_while_editing(false),
        )
        .accessible_name(label)
        .changed()
    })
}

/// Three lengths beside each other, named after `name`. Gives whether one was changed.
pub(super) fn vector(ui: &mut Ui, name: &str, value: &mut Vector, units: Units) -> bool {
    let mut changed = false;
    ui.horizontal(|ui| {
        for (axis, part) in ["x", "y", "z"].into_iter().zip(value.as_mut()) {
            ui.weak(axis);
            changed |= bare_length(ui, &format!("{name} {axis}"), part, units);
        }
    });
    changed
}

/// A labelled choice from a list. Gives the index of the choice when it was changed.
pub(super) fn choice(ui: &mut Ui, label: &str, now: usize, names: &[&str]) -> Option<usize> {
    row(ui, label, |ui| bare_choice(ui, label, now, names))
}

/// A choice from a list without a visible label, as wide as a value field; `name` is its accessible name.
pub(super) fn bare_choice(ui: &mut Ui, name: &str, now: usize, names: &[&str]) -> Option<usize> {
    let combo = egui::ComboBox::from_id_salt(name).width(VALUE_WIDTH).truncate();
    chosen(ui, combo, name, now, names)
}

/// The same, as wide as its text.
pub(super) fn wide_choice(ui: &mut Ui, name: &str, now: usize, names: &[&str]) -> Option<usize> {
    chosen(ui, egui::ComboBox::from_id_salt(name).width(0.0), name, now, names)
}

fn chosen(ui: &mut Ui, combo: egui::ComboBox<'_>, name: &str, now: usize, names: &[&str]) -> Option<usize> {
    let mut chosen = now;
    let shown = names.get(now).copied().unwrap_or_default();
    let combo = combo.selected_text(shown).show_ui(ui, |ui| {
        for (index, text) in names.iter().enumerate() {
            ui.selectable_value(&mut chosen, index, *text);
        }
    });
    combo.response.accessible_name(name);
    (chosen != now).then_some(chosen)
}

/// A row: the label on the left, the value on the right.
pub(super) fn row<R>(ui: &mut Ui, label: &str, value: impl FnOnce(&mut Ui) -> R) -> R {
    ui.horizontal(|ui| {
        let width = (ui.available_width() - VALUE_WIDTH - ui.spacing().item_spacing.x).max(60.0);
        let height = ui.spacing().interact_size.y;
        ui.allocate_ui_with_layout(
            egui::vec2(width, height),
            egui::Layout::left_to_right(egui::Align::Center),
            |ui| {
                ui.set_min_width(width);
                ui.add(egui::Label::new(label).truncate());
            },
        );
        ui.spacing_mut().interact_size.x = VALUE_WIDTH;
        value(ui)
    })
    .inner
}
