//! The bar under the lane: the whole front, and the part of it that is in sight, which can be dragged along.

use egui::{CornerRadius, Rect, Role as AccessRole, Sense, Stroke, StrokeKind, Ui, WidgetInfo, pos2};

use super::sight::{Sight, Zoom};
use crate::window::{panels::Cx, widgets::Widgets};

/// Draws the bar; it is there while not all of the front is in sight.
pub(super) fn overview_ui(cx: Cx<'_>, ui: &Ui, widgets: &mut Widgets, bar: Rect, lane: Rect) {
    let side = cx.state.view.side;
    let front = cx.state.derived.strip_on(side);
    let flat = &front.flat;
    let strip = &mut widgets.strip;
    let sight = Sight::new(flat, lane, strip.zoom);
    let whole = sight.whole(flat);
    let seen = f64::from(lane.width());
    let share = f64::from(bar.width()) / whole;
    let response = ui.interact(bar, ui.scope_id().with("overview"), Sense::CLICK | Sense::DRAG);
    let letters = sight.letters(flat);
    response.widget_info(|| WidgetInfo::labeled(AccessRole::ScrollBar, true, "Overview of the front"));
    ui.ctx().accesskit_node_builder(response.id, |node| {
        node.set_value(format!(
            "edges {} to {} of {}",
            letters.start + 1,
            letters.end,
            flat.letters()
        ));
    });
    if (response.dragged() || response.is_pointer_button_down_on())
        && let Some(pos) = response.interact_pointer_pos()
    {
        // The window in sight follows the pointer by its middle.
        strip.zoom = Zoom {
            scale: Some(sight.scale),
            offset: f64::from(pos.x - bar.left()) / share - seen / 2.0,
        };
    }
    let sight = Sight::new(flat, lane, strip.zoom);
    let colours = cx.state.colours();
    let painter = ui.painter_at(bar.expand(1.0));
    painter.rect_filled(bar, 2.0, colours.picture());
    let all = Sight::whole_in(flat, bar);
    painter.add(strip.overview.shape(cx.state, side, &all, 2.0, false));
    let x = |along: f64| bar.left() + (along * share) as f32;
    let window = Rect::from_min_max(
        pos2(x(sight.offset), bar.top()),
        pos2(x(sight.offset + seen).max(x(sight.offset) + 6.0), bar.bottom()),
    );
    let stroke = Stroke::new(1.5, colours.accent());
    painter.rect_stroke(window, CornerRadius::same(2), stroke, StrokeKind::Inside);
}
