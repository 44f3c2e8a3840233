//! Solving for wanted figures: what is wanted, what may change, and what came of it.

use egui::{Align, Button, Label, Layout, Role, ScrollArea, Ui, WidgetInfo};
use zonewright_geometry::{
    Parameter, parameters,
    solve::{Free, Solution, Want, figures},
};
use zonewright_shop::{figure_name, figure_value, parameter_value, text::Units, unsolved_text};

use super::{Cx, small, solve_fields};
use crate::window::{
    command::Command,
    solving::{Answer, SolveAct},
    widgets::Widgets,
};

/// So many parameters are listed at once; the others are found by a part of their name.
const MOST_LISTED: usize = 40;

/// From so many parameters on they can be searched for.
const SEARCHED_FROM: usize = 15;

/// Height of the list of parameters, in points.
const LIST_HEIGHT: f32 = 190.0;

/// What the section shows of the design as it is, kept until it changes.
#[derive(Debug, Default)]
pub(in crate::window) struct SolveCache {
    /// The revision of the design, and that of its shell.
    about: Option<[u64; 2]>,
    parameters: Vec<Parameter>,
    present_of: Vec<Want>,
    present: Vec<Option<f64>>,
    filter: String,
}

impl SolveCache {
    fn follow(&mut self, cx: Cx<'_>) {
        let (state, wants) = (cx.state, &cx.state.solving.wants);
        let about = Some([state.history.revision(), state.derived.revision]);
        if self.about != about {
            self.parameters = parameters(state.shape());
        }
        if self.about != about || self.present_of != *wants {
            let which: Vec<_> = wants.iter().map(|w| w.figure).collect();
            self.present = figures(state.shape(), &state.derived.shell, &which);
            self.present_of.clone_from(wants);
        }
        self.about = about;
    }
}

/// Draws the section. What it shows is worked out only while it is in sight.
pub(super) fn solve_ui(cx: Cx<'_>, ui: &mut Ui, widgets: &mut Widgets) {
    let cache = &mut widgets.solving;
    cache.follow(cx);
    let solving = &cx.state.solving;
    if solving.wants.is_empty() {
        ui.add(
            Label::new(
                egui::RichText::new(
                    "Say what the shell is to have: a height, a span, headroom. Then tick what may change, and solve.",
                )
                .weak(),
            )
            .wrap(),
        );
    }
    if !solving.wants.is_empty() && cx.state.view.ladder.climbed.is_some() {
        let note = "Present values are of the part that is shown. Solving is for the whole.";
        ui.add(Label::new(egui::RichText::new(note).color(cx.state.colours().accent())).wrap());
    }
    for (row, (want, now)) in solving.wants.iter().zip(&cache.present).enumerate() {
        ui.push_id(("want", row), |ui| solve_fields::want_ui(cx, ui, row, *want, *now));
        ui.add_space(2.0);
    }
    solve_fields::add_ui(cx, ui);
    if solving.wants.is_empty() {
        return;
    }
    ui.separator();
    ui.weak("May change");
    free_ui(cx, ui, cache);
    run_ui(cx, ui, cache);
    if let Some(answer) = solving.answer_at(cx.state.history.revision()) {
        answer_ui(cx, ui, answer);
    }
}

fn free_ui(cx: Cx<'_>, ui: &mut Ui, cache: &mut SolveCache) {
    let solving = &cx.state.solving;
    if cache.parameters.len() >= SEARCHED_FROM {
        ui.add(
            egui::TextEdit::singleline(&mut cache.filter)
                .hint_text("Find a parameter")
                .desired_width(f32::INFINITY),
        )
        .accessible_name("Find a parameter");
    } else {
        cache.filter.clear();
    }
    let filter = cache.filter.trim().to_lowercase();
    let matches = |p: &Parameter| {
        filter.is_empty() || p.name.to_lowercase().contains(&filter) || p.key.to_lowercase().contains(&filter)
    };
    ScrollArea::vertical()
        .id_salt("may change")
        .max_height(LIST_HEIGHT)
        .auto_shrink([false, true])
        .show(ui, |ui| {
            ui.spacing_mut().item_spacing.y = 2.0;
            let (mut listed, mut more) = (0, 0);
            for parameter in &cache.parameters {
                let free = solving.free_with(&parameter.key);
                if free.is_none() {
                    if !matches(parameter) {
                        continue;
                    }
                    if listed >= MOST_LISTED {
                        more += 1;
                        continue;
                    }
                    listed += 1;
                }
                ui.push_id(&parameter.key, |ui| parameter_ui(cx, ui, parameter, free));
            }
            if more > 0 {
                ui.weak(format!(
                    "and {} more: type a part of the name",
                    zonewright_shop::text::count(more)
                ));
            } else if listed == 0 && !filter.is_empty() {
                ui.weak("No other parameter has this in its name.");
            }
        });
}

fn parameter_ui(cx: Cx<'_>, ui: &mut Ui, parameter: &Parameter, free: Option<&Free>) {
    ui.horizontal(|ui| {
        let mut ticked = free.is_some();
        let tick = ui.checkbox(&mut ticked, &parameter.name);
        if tick.accessible_name(format!("Let {} change", parameter.name)).changed() {
            cx.tx.send(Command::Solving(if ticked {
                SolveAct::Allow(Free::new(&parameter.key))
            } else {
                SolveAct::Forbid(parameter.key.clone())
            }));
        }
        ui.with_layout(Layout::right_to_left(Align::Center), |ui| {
            ui.weak(parameter_value(parameter.kind, parameter.value, cx.state.units()));
        });
    });
    if let Some(free) = free {
        solve_fields::bounds_ui(cx, ui, parameter, free);
    }
}

fn run_ui(cx: Cx<'_>, ui: &mut Ui, cache: &SolveCache) {
    let solving = &cx.state.solving;
    ui.add_space(4.0);
    ui.horizontal(|ui| {
        if solving.is_searching() {
            let words = SolveAct::Stop.words();
            if ui
                .button("Stop")
                .on_hover_text(words.hint)
                .accessible_name(words.name)
                .clicked()
            {
                cx.tx.send(Command::Solving(SolveAct::Stop));
            }
            ui.weak("Searching…");
            return;
        }
        let ready = cache.parameters.iter().any(|p| solving.free_with(&p.key).is_some());
        let words = SolveAct::Run.words();
        let button = ui.add_enabled(ready, Button::new("Solve")).on_hover_text(words.hint);
        let button = button.on_disabled_hover_text("Tick what may change first.");
        if button.accessible_name(words.name).clicked() {
            cx.tx.send(Command::Solving(SolveAct::Run));
        }
        if !ready {
            ui.weak("Tick what may change.");
        }
    });
}

fn answer_ui(cx: Cx<'_>, ui: &mut Ui, answer: &Answer) {
    let (colours, units) = (cx.state.colours(), cx.state.units());
    ui.add_space(4.0);
    match &answer.result {
        Ok(found) => {
            let changed = found.changes.iter().any(|c| c.before != c.after);
            let text = if changed {
                "Solved."
            } else {
                "All figures are as wanted already."
            };
            ui.colored_label(colours.accent(), text);
            ui.scope(|ui| lines_ui(ui, found, units));
        }
        Err(failed) => {
            let text = unsolved_text(failed, units);
            let colour = if answer.nearest_taken {
                colours.text_weak()
            } else {
                colours.look()
            };
            let label = ui.add(Label::new(egui::RichText::new(&text).color(colour)).wrap());
            label.widget_info(|| WidgetInfo::labeled(Role::Label, true, &text));
            let Some(nearest) = &failed.nearest else { return };
            ui.add_space(2.0);
            ui.scope(|ui| lines_ui(ui, nearest, units));
            if answer.nearest_taken {
                ui.weak("The nearest was taken.");
            } else if nearest.shape == *cx.state.shape() {
                ui.weak("The design as it is comes nearest.");
            } else {
                let words = SolveAct::TakeNearest.words();
                if ui.button(words.name).on_hover_text(words.hint).clicked() {
                    cx.tx.send(Command::Solving(SolveAct::TakeNearest));
                }
            }
        }
    }
}

/// From what to what: each figure, then each parameter that changed.
fn lines_ui(ui: &mut Ui, solution: &Solution, units: Units) {
    ui.spacing_mut().interact_size.y = ui.text_style_height(&egui::TextStyle::Body);
    ui.spacing_mut().item_spacing.y = 3.0;
    for f in &solution.figures {
        let value = |v| figure_value(f.figure, v, units);
        let before = f.before.map_or_else(|| "none".to_owned(), value);
        from_to(ui, &figure_name(f.figure, units), &before, &value(f.after));
    }
    for c in solution.changes.iter().filter(|c| c.before != c.after) {
        let value = |v| parameter_value(c.kind, v, units);
        from_to(ui, &c.name, &value(c.before), &value(c.after));
    }
}

fn from_to(ui: &mut Ui, name: &str, before: &str, after: &str) {
    ui.horizontal_wrapped(|ui| {
        ui.spacing_mut().item_spacing.x = 4.0;
        ui.weak(format!("{name}:"));
        ui.weak(before);
        ui.weak("to");
        let shown = ui.label(after);
        shown.widget_info(|| WidgetInfo::labeled(Role::Label, true, format!("{name} from {before} to {after}")));
    });
}

/// A small button that takes a row away.
pub(super) fn remove(ui: &mut Ui, name: &str) -> bool {
    small(ui, true, "×", name)
}
