//! The card of the finishing step that is picked on the ladder: which panels are left out.

use egui::{Align, Layout, Ui};
use zonewright_geometry::{Finish, FinishAct, LetterName, Maker, PanelName, Side};

use super::{Cx, card_head, small, steps_panel::said_ui};
use crate::window::command::Command;

/// Panels of one step that are listed; putting back one by one is for a few.
const MOST_LISTED: usize = 100;

/// Draws the card; nothing when no finishing step is picked.
pub(super) fn card_ui(cx: Cx<'_>, ui: &mut Ui) {
    let picked = cx.state.view.ladder.picked;
    let steps = &cx.state.shape().finish;
    let Some(at) = steps.iter().position(|s| Some(s.id) == picked) else {
        return;
    };
    let step = &steps[at];
    let number = at + 1;
    let of = format!("finishing step {number}");
    card_head(cx, ui, &format!("Finishing step {number}"), &of);
    for said in cx.state.derived.ladder.said.get(&step.id).into_iter().flatten() {
        said_ui(cx, ui, said);
    }
    let mut name = step.name.clone().unwrap_or_default();
    let field = egui::TextEdit::singleline(&mut name)
        .hint_text("Name")
        .desired_width(f32::INFINITY);
    let field = ui.add(field).accessible_name(format!("Name of {of}"));
    if field.changed() {
        let edited = Finish {
            name: (!name.is_empty()).then_some(name),
            ..step.clone()
        };
        cx.tx.send(Command::SetFinish(at, Box::new(edited)));
    }
    let FinishAct::Drop(names) = &step.act;
    for (panel, name) in names.iter().enumerate().take(MOST_LISTED) {
        ui.horizontal(|ui| {
            let of = format!("panel {} of finishing step {number}", panel + 1);
            ui.with_layout(Layout::right_to_left(Align::Center), |ui| {
                if small(ui, true, "Put back", &format!("Put back {of}")) {
                    cx.tx.send(Command::PutBack(at, panel));
                }
                ui.with_layout(Layout::left_to_right(Align::Center), |ui| {
                    ui.add(egui::Label::new(format!("{}  {}", panel + 1, described(name))).truncate());
                });
            });
        });
    }
    if names.len() > MOST_LISTED {
        ui.weak(format!("and {} more", names.len() - MOST_LISTED));
    }
    let delete = ui.button("Delete the step").accessible_name(format!("Delete {of}"));
    if delete.on_hover_text("Brings all these panels back.").clicked() {
        cx.tx.send(Command::DeleteFinish(at));
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
