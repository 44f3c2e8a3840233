//! The steps of the record.

use egui::{Align, Layout, Ui};
use zonewright_geometry::{Act, Courses, Side, Spurs, Step, StepId, Vs};

use super::{Cx, Icon, icon, small, step_fields};
use crate::window::{command::Command, fields};

/// Draws the list of steps and the buttons for courses.
pub(super) fn steps_ui(cx: Cx<'_>, ui: &mut Ui) {
    let steps = &cx.state.shape().steps;
    let side = usize::from(cx.state.view.side == Side::Aft);
    if let Some(chosen) = fields::choice(ui, "Live front", side, &["Fore", "Aft"]) {
        cx.tx
            .send(Command::SetSide(if chosen == 0 { Side::Fore } else { Side::Aft }));
    }
    ui.horizontal_wrapped(|ui| {
        for (text, command) in [
            ("Add a course", Command::AddCourse),
            ("Remove a course", Command::RemoveCourse),
            ("Until still", Command::LayUntilStill),
        ] {
            if ui.button(text).on_hover_text(command.words().hint).clicked() {
                cx.tx.send(command);
            }
        }
    });
    if steps.is_empty() {
        ui.weak("No steps yet: nothing grows. Add a course.");
    }
    for (at, step) in steps.iter().enumerate() {
        ui.push_id(("step", step.id.0), |ui| one(cx, ui, at, step, steps.len()));
    }
    ui.menu_button("Add a step", |ui| add_menu(cx, ui));
}

fn one(cx: Cx<'_>, ui: &mut Ui, at: usize, step: &Step, count: usize) {
    let mut edited = step.clone();
    let mut changed = false;
    let number = at + 1;
    ui.horizontal(|ui| {
        let on = ui
            .checkbox(&mut edited.on, "")
            .on_hover_text("A step switched off is kept and skipped.");
        changed |= on.accessible_name(format!("Step {number} on")).changed();
        ui.with_layout(Layout::right_to_left(Align::Center), |ui| {
            if small(ui, true, "×", &format!("Delete step {number}")) {
                cx.tx.send(Command::DeleteStep(at));
            }
            if icon(ui, number < count, Icon::Down, &format!("Move step {number} down")) {
                cx.tx.send(Command::MoveStep(at, at + 1));
            }
            if icon(ui, 0 < at, Icon::Up, &format!("Move step {number} up")) {
                cx.tx.send(Command::MoveStep(at, at - 1));
            }
            let mut name = step.name.clone().unwrap_or_default();
            let hint = format!("{number}  {}", title(step));
            let field = egui::TextEdit::singleline(&mut name)
                .hint_text(hint)
                .desired_width(f32::INFINITY);
            if ui
                .add(field)
                .accessible_name(format!("Name of step {number}"))
                .changed()
            {
                edited.name = (!name.is_empty()).then_some(name);
                changed = true;
            }
        });
    });
    ui.indent("act", |ui| {
        changed |= step_fields::act_fields(cx, ui, at, &mut edited);
    });
    if changed {
        cx.tx.send(Command::SetStep(at, Box::new(edited)));
    }
}

/// What a step does, in a few words.
fn title(step: &Step) -> &'static str {
    match step.act {
        Act::Lay { .. } => "Lay courses",
        Act::Fill { .. } => "Fill Vs",
        Act::Splice { .. } => "Splice",
        Act::Retract => "Retract spurs",
        Act::Cross { .. } => "Cross spurs",
        Act::SetRoles(_) => "Set roles",
        Act::CloseRim => "Close the rim",
        Act::JoinRims { .. } => "Join rims",
    }
}

fn add_menu(cx: Cx<'_>, ui: &mut Ui) {
    let acts = [
        Act::Lay {
            courses: Courses::Count(1),
            spurs: Spurs::default(),
        },
        Act::Splice {
            at: Vs::All,
            directions: cx.state.view.hand.directions.clone(),
        },
        Act::Fill { at: Vs::All },
        Act::Retract,
        Act::Cross { at: Vs::All },
        Act::SetRoles(zonewright_geometry::RoleRule::Alternate),
        Act::CloseRim,
        Act::JoinRims { within_mm: 1.0 },
    ];
    for act in acts {
        let step = Step {
            // The executor gives the number.
            id: StepId(0),
            name: None,
            on: true,
            side: cx.state.view.side,
            act,
        };
        if ui.button(title(&step)).clicked() {
            cx.tx.send(Command::AddStep(Box::new(step)));
            ui.close();
        }
    }
}
