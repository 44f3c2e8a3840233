//! What is to be said about the design; a click shows the place.

use egui::{RichText, Ui};
use zonewright_geometry::{Finding, Level, Place};

use super::Cx;
use crate::window::{
    command::Command,
    derived::{MOST_SHOWN, Pending},
    remedies::{next_steps, remedy_of},
};

/// Draws the list of findings.
pub(super) fn findings_ui(cx: Cx<'_>, ui: &mut Ui) {
    let findings = &cx.state.derived.findings;
    if findings.is_empty() {
        let derived = &cx.state.derived;
        ui.weak(match derived.inspection {
            _ if derived.pending() == Some(Pending::Shell) => "Being worked out…",
            Some(_) => "Nothing to report.",
            None => "Being inspected…",
        });
    }
    for (at, finding) in findings.iter().enumerate().take(MOST_SHOWN) {
        ui.push_id(at, |ui| one(cx, ui, at, finding));
    }
    if findings.len() > MOST_SHOWN {
        ui.weak(format!("and {} more", findings.len() - MOST_SHOWN));
    }
    let next = next_steps(cx.state);
    if !next.is_empty() {
        ui.horizontal_wrapped(|ui| {
            ui.weak("Could be done next:");
            for remedy in next {
                let hint = "Adds this step to the live front.";
                if ui.small_button(remedy.text).on_hover_text(hint).clicked() {
                    cx.tx.send(remedy.command);
                }
            }
        });
    }
}

fn one(cx: Cx<'_>, ui: &mut Ui, at: usize, finding: &Finding) {
    let colours = cx.state.colours();
    let (word, colour) = match finding.level() {
        Level::Stop => ("Stop", colours.stop()),
        Level::Look => ("Look", colours.look()),
        Level::Note => ("Note", colours.note()),
    };
    let shown = cx.state.view.finding == Some(at);
    let said = cx
        .state
        .derived
        .texts
        .get(at)
        .map_or(finding.code.text().what, String::as_str);
    ui.horizontal_wrapped(|ui| {
        ui.label(RichText::new(word).color(colour).strong());
        if has_place(&finding.place) {
            let text = if shown { "Hide" } else { "Show" };
            if super::small(ui, true, text, &format!("{text} finding {}", at + 1)) {
                cx.tx.send(Command::ShowFinding((!shown).then_some(at)));
            }
        }
        if let Some(remedy) = remedy_of(cx.state, finding) {
            let name = format!("{}: finding {}", remedy.text, at + 1);
            if super::small(ui, true, remedy.text, &name) {
                cx.tx.send(remedy.command);
            }
        }
        ui.label(said);
    });
}

/// Whether a finding has a place that can be shown in the picture.
const fn has_place(place: &Place) -> bool {
    matches!(place, Place::Vertices(_) | Place::Edges(_) | Place::Panels(_))
}
