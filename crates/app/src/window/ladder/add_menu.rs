//! The menu of steps that can be added at a place of the ladder.

use egui::Ui;
use zonewright_geometry::{Act, Courses, RoleRule, Spurs, Vs};

use super::{Climbed, LadderAct};
use crate::window::{command::Command, panels::Cx};

/// The kinds of step, with the usual values and what they do.
fn kinds(cx: Cx<'_>) -> [(&'static str, Act, &'static str); 8] {
    let lay = Act::Lay {
        courses: Courses::Count(1),
        spurs: Spurs::default(),
    };
    let splice = Act::Splice {
        at: Vs::All,
        directions: cx.state.view.hand.directions.clone(),
    };
    [
        ("Lay courses", lay, "Fills every open V, once a course."),
        (
            "Splice",
            splice,
            "Puts the directions in hand in at every open V; choose which on its card.",
        ),
        ("Fill Vs", Act::Fill { at: Vs::All }, "Fills chosen Vs once."),
        (
            "Retract spurs",
            Act::Retract,
            "Takes in every edge that runs out and straight back.",
        ),
        (
            "Cross spurs",
            Act::Cross { at: Vs::All },
            "Grows on through the ends of spurs.",
        ),
        (
            "Set roles",
            Act::SetRoles(RoleRule::Alternate),
            "Makes the edges of the front zig and zag anew.",
        ),
        (
            "Close the rim",
            Act::CloseRim,
            "Fills what is left of a closed front with few panels.",
        ),
        (
            "Join rims",
            Act::JoinRims { within_mm: 1.0 },
            "Joins rims that nearly meet.",
        ),
    ]
}

/// Draws the entries; the step is added at `place`, none is the top.
pub(super) fn entries(cx: Cx<'_>, ui: &mut Ui, place: Option<Climbed>) {
    for (name, act, hint) in kinds(cx) {
        if ui.button(name).on_hover_text(hint).clicked() {
            cx.tx.send(Command::Ladder(LadderAct::Add(place, Box::new(act))));
            ui.close();
        }
    }
}
