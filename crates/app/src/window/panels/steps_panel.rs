//! The card of the growing step that is picked on the ladder.

use egui::{RichText, TextEdit, Ui};
use zonewright_geometry::Level;

use super::{Cx, Icon, card_head, icon, step_fields};
use crate::window::{
    command::Command,
    ladder::{LadderAct, Said, title},
};

/// Draws the card; nothing when no growing step is picked.
pub(super) fn card_ui(cx: Cx<'_>, ui: &mut Ui) {
    let steps = &cx.state.shape().steps;
    let picked = cx.state.view.ladder.picked;
    let Some(at) = steps.iter().position(|s| Some(s.id) == picked) else {
        return;
    };
    let step = &steps[at];
    let (number, count) = (at + 1, steps.len());
    let mut edited = step.clone();
    let mut changed = false;
    card_head(
        cx,
        ui,
        &format!("Step {number}: {}", title(step).0),
        &format!("step {number}"),
    );
    for said in cx.state.derived.ladder.said.get(&step.id).into_iter().flatten() {
        said_ui(cx, ui, said);
    }
    if cx
        .state
        .derived
        .ladder
        .said
        .get(&step.id)
        .is_some_and(|all| all.iter().any(|s| s.names))
    {
        let command = Command::Ladder(LadderAct::Mend(step.id));
        let button = ui.button("Keep what is found").on_hover_text(command.words().hint);
        if button.clicked() {
            cx.tx.send(command);
        }
    }
    let mut name = step.name.clone().unwrap_or_default();
    let field = TextEdit::singleline(&mut name)
        .hint_text("Name")
        .desired_width(f32::INFINITY);
    let field = ui.add(field).accessible_name(format!("Name of step {number}"));
    if field.changed() {
        edited.name = (!name.is_empty()).then_some(name);
        changed = true;
    }
    ui.push_id(("step", step.id.0), |ui| {
        changed |= step_fields::act_fields(cx, ui, at, &mut edited);
    });
    ui.horizontal(|ui| {
        if icon(ui, number < count, Icon::Up, &format!("Move step {number} up")) {
            cx.tx.send(Command::MoveStep(at, at + 1));
        }
        if icon(ui, 0 < at, Icon::Down, &format!("Move step {number} down")) {
            cx.tx.send(Command::MoveStep(at, at - 1));
        }
        let delete = ui
            .button("Delete the step")
            .accessible_name(format!("Delete step {number}"));
        if delete.clicked() {
            cx.tx.send(Command::DeleteStep(at));
        }
    });
    if changed {
        cx.tx.send(Command::SetStep(at, Box::new(edited)));
    }
}

/// One finding of a step: its level and its sentence.
pub(super) fn said_ui(cx: Cx<'_>, ui: &mut Ui, said: &Said) {
    let colours = cx.state.colours();
    let (word, colour) = match said.level {
        Level::Stop => ("Stop", colours.stop()),
        Level::Look => ("Look", colours.look()),
        Level::Note => ("Note", colours.note()),
    };
    ui.horizontal_wrapped(|ui| {
        ui.label(RichText::new(word).color(colour).strong());
        ui.label(&said.text);
    });
}
