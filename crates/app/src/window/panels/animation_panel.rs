//! Animations: what is shown, playing, writing.

use egui::Ui;
use zonewright_geometry::{
    ParameterKind,
    parameter::{Parameter, parameter, parameters},
};

use super::Cx;
use crate::{
    animation::{MOST_FRAMES, Subject},
    window::{
        animating::{AnimateAct, Progress, Wish, Writing},
        command::Command,
        fields,
    },
};

/// Frames of a sweep, unless another number is chosen: two seconds at 24 a second.
const USUAL_FRAMES: u32 = 48;

/// Draws what an animation is to show, and its buttons.
pub(super) fn animation_ui(cx: Cx<'_>, ui: &mut Ui) {
    let animating = &cx.state.animating;
    let mut wish = animating.wish.clone();
    let grows = usize::from(wish.subject != Subject::Growth);
    if let Some(chosen) = fields::choice(ui, "Animation of", grows, &["Growth", "A parameter"]) {
        wish = if chosen == 0 {
            Wish::default()
        } else {
            first_sweep(cx).unwrap_or_default()
        };
    }
    sweep_ui(cx, ui, &mut wish.subject);
    fields::count(ui, "Frames a second", &mut wish.rate, 1..=60);
    ui.checkbox(&mut wish.back, "And back again");
    if wish != animating.wish {
        cx.tx.send(Command::Animate(AnimateAct::Wish(wish)));
    }
    ui.horizontal_wrapped(|ui| {
        let button = |ui: &mut Ui, text: &str, act: AnimateAct| {
            let words = act.words();
            if ui.button(text).on_hover_text(words.hint).clicked() {
                cx.tx.send(Command::Animate(act));
            }
        };
        if animating.playing.is_some() || animating.writing.is_some() {
            button(ui, "Stop", AnimateAct::Stop);
        } else {
            button(ui, "Play", AnimateAct::Play);
            button(ui, "Save animation…", AnimateAct::Save);
        }
        if let Some(playing) = &animating.playing {
            let (frame, of) = playing.at();
            ui.weak(format!("frame {} of {of}", frame + 1));
        }
        if let Some(Progress::Frames(done, of)) = animating.writing.as_ref().map(Writing::frames) {
            ui.weak(format!("writing frame {} of {of}", done + 1));
        }
    });
}

/// A sweep of the design's first length or angle, a fifth down and up.
fn first_sweep(cx: Cx<'_>) -> Option<Wish> {
    let all = parameters(cx.state.shape());
    let continuous = |p: &&Parameter| matches!(p.kind, ParameterKind::Length | ParameterKind::Angle);
    let first = all.iter().find(continuous)?;
    Some(Wish {
        subject: about(first),
        rate: 24,
        back: true,
    })
}

fn about(parameter: &Parameter) -> Subject {
    let by = parameter.value.abs() * 0.2;
    Subject::Sweep {
        key: parameter.key.clone(),
        from: parameter.value - by,
        to: parameter.value + by,
        frames: USUAL_FRAMES,
    }
}

fn sweep_ui(cx: Cx<'_>, ui: &mut Ui, subject: &mut Subject) {
    let Subject::Sweep { key, .. } = subject else { return };
    let now = parameter(cx.state.shape(), key);
    // The list of all parameters is made only while it is open: a free path has thousands.
    let shown = now
        .as_ref()
        .map_or_else(|| format!("{key} (not in this design)"), |p| p.name.clone());
    let mut chosen = None;
    fields::row(ui, "Parameter", |ui| {
        let combo = egui::ComboBox::from_id_salt("swept parameter").width(124.0).truncate();
        let combo = combo.selected_text(shown).show_ui(ui, |ui| {
            for p in parameters(cx.state.shape()).into_iter().take(200) {
                if ui.selectable_label(p.key == *key, &p.name).clicked() {
                    chosen = Some(about(&p));
                }
            }
        });
        combo.response.accessible_name("Parameter");
    });
    if let Some(chosen) = chosen {
        *subject = chosen;
        return;
    }
    let Subject::Sweep { from, to, frames, .. } = subject else {
        return;
    };
    let kind = now.map_or(ParameterKind::Factor, |p| p.kind);
    for (label, value) in [("From", from), ("To", to)] {
        match kind {
            ParameterKind::Length => {
                fields::length(ui, label, value, cx.state.units());
            }
            ParameterKind::Angle => {
                let mut angle = zonewright_geometry::Angle::from_degrees(*value);
                if fields::angle(ui, label, &mut angle) {
                    *value = angle.degrees();
                }
            }
            ParameterKind::Factor | ParameterKind::Count => {
                fields::number(ui, label, value, 0.05);
            }
        }
    }
    fields::count(ui, "Frames", frames, 2..=MOST_FRAMES);
}
