//! The finishing steps: which panels are left out.

use egui::{Align, Layout, Ui};
use zonewright_geometry::{Finish, FinishAct, LetterName, Maker, PanelName, Side};

use super::{Cx, small};
use crate::window::command::Command;

/// Panels of one step that are listed; putting back one by one is for a few.
const MOST_LISTED: usize = 100;

/// Draws the list of finishing steps; nothing when there are none.
pub(super) fn finish_ui(cx: Cx<'_>, ui: &mut Ui) {
    for (at, step) in cx.state.shape().finish.iter().enumerate() {
        ui.push_id(("finish", step.id.0), |ui| one(cx, ui, at, step));
    }
}

fn one(cx: Cx<'_>, ui: &mut Ui, at: usize, step: &Finish) {
    let mut edited = step.clone();
    let mut changed = false;
    let number = at + 1;
    ui.horizontal(|ui| {
        let on = ui
            .checkbox(&mut edited.on, "")
            .on_hover_text("A finishing step switched off is kept and skipped: its panels are in the shell.");
        changed |= on.accessible_name(format!("Finishing step {number} on")).changed();
        ui.with_layout(Layout::right_to_left(Align::Center), |ui| {
            if small(ui, true, "×", &format!("Delete finishing step {number}")) {
                cx.tx.send(Command::DeleteFinish(at));
            }
            let mut name = step.name.clone().unwrap_or_default();
            let field = egui::TextEdit::singleline(&mut name)
                .hint_text("Leave panels out")
                .desired_width(f32::INFINITY);
            let field = ui
                .add(field)
                .accessible_name(format!("Name of finishing step {number}"));
            if field.changed() {
                edited.name = (!name.is_empty()).then_some(name);
                changed = true;
            }
        });
    });
    ui.indent("left out", |ui| {
        let FinishAct::Drop(names) = &step.act;
        for (panel, name) in names.iter().enumerate().take(MOST_LISTED) {
            ui.horizontal(|ui| {
                let of = format!("panel {} of finishing step {number}", panel + 1);
                ui.add(egui::Label::new(format!("{}  {}", panel + 1, described(name))).truncate());
                if small(ui, true, "Put back", &format!("Put back {of}")) {
                    cx.tx.send(Command::PutBack(at, panel));
                }
            });
        }
        if names.len() > MOST_LISTED {
            ui.weak(format!("and {} more", names.len() - MOST_LISTED));
        }
    });
    if changed {
        cx.tx.send(Command::SetFinish(at, Box::new(edited)));
    }
}

/// A panel by the two edges that made it.
fn described(name: &PanelName) -> String {
    let side = match name.side {
        Side::Fore => "fore",
        Side::Aft => "aft",
    };
    let (a, b) = &name.letters;
    format!("{side}, edges {} and {}", edge(a), edge(b))
}

/// An edge by its number along the path, or by the number of its splice and its number there.
fn edge(letter: &LetterName) -> String {
    match letter.maker {
        Maker::Start => format!("{}", letter.index + 1),
        Maker::Step(id) => format!("{} of splice {}", letter.index + 1, id.0),
    }
}
