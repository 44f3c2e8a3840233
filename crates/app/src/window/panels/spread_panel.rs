//! How sides, angles and folds are spread: a row of bars each; a click on a bar shows its edges or panels in the picture.

use egui::{Rect, Role, Sense, Ui, WidgetInfo, pos2, vec2};
use zonewright_shop::spread::{Measure, Spread};

use super::Cx;
use crate::window::{
    command::Command,
    readings::{MOST_CLASSES, ReadingAct, Shown, measured},
    widgets::Widgets,
};

/// The height of the tallest bar, in points.
const TALLEST: f32 = 44.0;

/// The spreads of the shell as it is, kept until it changes.
#[derive(Debug, Default)]
pub(in crate::window) struct SpreadCache {
    /// The revision of the parts that they were worked out of.
    parts: Option<u64>,
    spreads: Vec<Option<Spread>>,
}

/// Draws the spreads. They are worked out only while they are in sight.
pub(super) fn spread_ui(cx: Cx<'_>, ui: &mut Ui, widgets: &mut Widgets) {
    let derived = &cx.state.derived;
    let cache = &mut widgets.spreads;
    if cache.parts != Some(derived.parts_revision()) {
        cache.parts = Some(derived.parts_revision());
        cache.spreads = Measure::ALL
            .map(|measure| Spread::of(&derived.parts, measure, MOST_CLASSES))
            .to_vec();
    }
    if cache.spreads.iter().all(Option::is_none) {
        ui.weak("No panels yet: there is nothing to spread.");
    }
    for spread in cache.spreads.iter().flatten() {
        one(cx, ui, spread);
    }
}

const fn name(measure: Measure) -> &'static str {
    match measure {
        Measure::Sides => "Sides",
        Measure::AcuteAngles => "Acute angles",
        Measure::Folds => "Folds",
    }
}

fn one(cx: Cx<'_>, ui: &mut Ui, spread: &Spread) {
    let units = cx.state.units();
    let (Some(first), Some(last)) = (spread.classes.first(), spread.classes.last()) else {
        return;
    };
    let name = name(spread.measure);
    ui.weak(name);
    let size = vec2(ui.available_width(), TALLEST + 2.0);
    let (rect, _) = ui.allocate_exact_size(size, Sense::hover());
    let colours = cx.state.colours();
    ui.painter().rect_filled(rect, 2.0, colours.picture());
    let wide = rect.width() / spread.classes.len() as f32;
    let tallest = spread.tallest().max(1) as f32;
    for (at, class) in spread.classes.iter().enumerate() {
        let left = rect.left() + wide * at as f32;
        let around = Rect::from_min_max(pos2(left, rect.top()), pos2(left + wide, rect.bottom()));
        if class.count == 0 {
            continue;
        }
        let shown = Shown::Class(spread.measure, at);
        let is_shown = cx.state.view.shown == Some(shown);
        let response = ui.interact(around, ui.scope_id().with((spread.measure, at)), Sense::click());
        let [from, to] = [class.from, class.to].map(|value| measured(spread.measure, value, units));
        let what = format!("{name} from {from} to {to}: {}", count(spread.measure, class.count));
        response.widget_info(|| WidgetInfo::selected(Role::Button, true, is_shown, &what));
        // A single edge among thousands still shows.
        let high = (TALLEST * class.count as f32 / tallest).max(2.0);
        let bar = Rect::from_min_max(
            pos2(left + 0.5, rect.bottom() - high),
            pos2(left + (wide - 0.5).max(1.0), rect.bottom()),
        );
        let colour = if is_shown {
            colours.preview()
        } else if response.hovered() || response.has_focus() {
            colours.accent()
        } else {
            colours.handle().gamma_multiply(0.6)
        };
        ui.painter().rect_filled(bar, 0.0, colour);
        if response.clicked() {
            let show = (!is_shown).then_some(shown);
            cx.tx.send(Command::Readings(ReadingAct::Show(show)));
        }
        response.on_hover_text(what);
    }
    ui.horizontal(|ui| {
        let ends = [first.from, last.to].map(|value| measured(spread.measure, value, units));
        ui.small(&ends[0]);
        ui.with_layout(egui::Layout::right_to_left(egui::Align::Min), |ui| ui.small(&ends[1]));
    });
}

fn count(measure: Measure, count: usize) -> String {
    match (measure.of_panels(), count) {
        (true, 1) => "1 panel".to_owned(),
        (true, n) => format!("{n} panels"),
        (false, 1) => "1 edge".to_owned(),
        (false, n) => format!("{n} edges"),
    }
}
