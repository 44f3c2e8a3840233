//! What is to be said about the design; a click shows the place.

use egui::{RichText, Ui};
use zonewright_geometry::{Code, Finding, Level, Place};

use super::Cx;
use crate::window::{
    command::Command,
    derived::{MOST_SHOWN, Pending},
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
        if let Some(panel) = spare(finding) {
            let name = format!("Leave one panel of finding {} out", at + 1);
            if super::small(ui, true, "Leave one out", &name) {
                cx.tx.send(Command::LeaveOut(panel));
            }
        }
        ui.label(said);
    });
}

/// The panel to leave out of two that lie on the same place: the later one.
fn spare(finding: &Finding) -> Option<u32> {
    match (&finding.code, &finding.place) {
        (Code::DoubledPanel, Place::Panels(panels)) => match panels[..] {
            [_, later] => Some(later),
            _ => None,
        },
        _ => None,
    }
}

/// Whether a finding has a place that can be shown in the picture.
const fn has_place(place: &Place) -> bool {
    matches!(place, Place::Vertices(_) | Place::Edges(_) | Place::Panels(_))
}
