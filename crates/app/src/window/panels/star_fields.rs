//! Stars, and paths along their axes.

use egui::Ui;
use zonewright_geometry::{
    Sign,
    start::{AxisClass, Star, StarLength, StarLetter, StarPath},
};
use zonewright_shop::text::Units;

use super::small;
use crate::window::fields::{bare_choice, bare_length, choice, count, length};

const CLASSES: [(AxisClass, &str); 4] = [
    (AxisClass::FiveFold, "5-fold axes"),
    (AxisClass::FourFold, "4-fold axes"),
    (AxisClass::ThreeFold, "3-fold axes"),
    (AxisClass::TwoFold, "2-fold axes"),
];

/// Draws the fields of a star. Gives whether it was changed.
pub(super) fn star(ui: &mut Ui, star: &mut Star) -> bool {
    let now = match star {
        Star::Icosahedral(_) => 0,
        Star::Cubic(_) => 1,
        Star::Prismatic(_) => 2,
    };
    let mut changed = false;
    if let Some(chosen) = choice(ui, "Star", now, &["Icosahedral", "Cubic", "Prismatic"]) {
        *star = match chosen {
            0 => Star::Icosahedral(vec![AxisClass::FiveFold]),
            1 => Star::Cubic(vec![AxisClass::FourFold]),
            _ => Star::Prismatic(6),
        };
        changed = true;
    }
    let (classes, left_out) = match star {
        Star::Icosahedral(classes) => (classes, AxisClass::FourFold),
        Star::Cubic(classes) => (classes, AxisClass::FiveFold),
        Star::Prismatic(axes) => return changed | count(ui, "Level axes", axes, 2..=200),
    };
    for (class, name) in CLASSES.into_iter().filter(|(class, _)| *class != left_out) {
        let mut on = classes.contains(&class);
        if ui.checkbox(&mut on, name).changed() {
            if on {
                classes.push(class);
                classes.sort();
            } else {
                classes.retain(|c| *c != class);
            }
            changed = true;
        }
    }
    changed
}

/// Draws the fields of a star path. Gives the name of what was changed.
pub(super) fn star_path(ui: &mut Ui, path: &mut StarPath, units: Units) -> Option<&'static str> {
    let mut changed = star(ui, &mut path.star).then_some("the star");
    changed = changed.or(length(ui, "Unit length", &mut path.unit_mm, units).then_some("the unit length"));
    changed = changed.or(ui
        .checkbox(&mut path.closed, "Closed")
        .changed()
        .then_some("the closing"));
    let axes = path.star.directions().map_or(1, |d| d.len());
    let (mut delete, mut insert) = (None, None);
    for (at, letter) in path.letters.iter_mut().enumerate() {
        ui.push_id(("letter", at), |ui| {
            ui.horizontal_wrapped(|ui| {
                if letter_fields(ui, at, letter, axes, units) {
                    changed = Some("a letter");
                }
                if small(ui, true, "+", &format!("Insert a letter after {}", at + 1)) {
                    insert = Some(at);
                }
                if small(ui, true, "×", &format!("Delete letter {}", at + 1)) {
                    delete = Some(at);
                }
            });
        });
    }
    if let Some(at) = insert {
        path.letters.insert(at + 1, path.letters[at]);
        changed = Some("the letters");
    }
    if let Some(at) = delete {
        path.letters.remove(at);
        changed = Some("the letters");
    }
    if ui.button("Add a letter").clicked() {
        path.letters.push(StarLetter {
            axis: 0,
            sign: Sign::Plus,
            length: StarLength::Golden(0),
        });
        changed = Some("the letters");
    }
    changed
}

fn letter_fields(ui: &mut Ui, at: usize, letter: &mut StarLetter, axes: usize, units: Units) -> bool {
    let number = at + 1;
    let mut changed = false;
    let sign = if letter.sign == Sign::Plus { "+" } else { "−" };
    if small(ui, true, sign, &format!("Turn letter {number} round")) {
        letter.sign = letter.sign.opposite();
        changed = true;
    }
    let last = u32::try_from(axes.saturating_sub(1)).unwrap_or(u32::MAX);
    let axis = egui::DragValue::new(&mut letter.axis)
        .range(0..=last)
        .clamp_existing_to_range(false);
    let axis = ui
        .add(axis.update_while_editing(false))
        .accessible_name(format!("Axis of letter {number}"));
    changed |= axis.changed();
    let golden = matches!(letter.length, StarLength::Golden(_));
    let name = format!("Length of letter {number} by");
    if let Some(chosen) = bare_choice(ui, &name, usize::from(!golden), &["φ steps", "Length"]) {
        letter.length = if chosen == 0 {
            StarLength::Golden(0)
        } else {
            StarLength::Mm(400.0)
        };
        changed = true;
    }
    let name = format!("Length of letter {number}");
    changed
        | match &mut letter.length {
            StarLength::Mm(mm) => bare_length(ui, &name, mm, units),
            StarLength::Golden(steps) => ui
                .add(egui::DragValue::new(steps).range(-20..=20).update_while_editing(false))
                .accessible_name(name)
                .changed(),
        }
}
