//! The outline round the control that a step is about.

use egui::{Rect, Stroke, StrokeKind, Ui};

use super::{Target, steps};
use crate::window::panels::Cx;

/// Width of the outline, in points.
const WIDTH: f32 = 2.0;

/// The controls that the step is about.
pub(in crate::window) fn wanted(cx: Cx<'_>) -> &'static [Target] {
    let going = cx.state.guide.going.as_ref();
    going.map_or(&[], |going| steps::asked(cx.state, going).0)
}

/// Draws the outline round a control, when the step is about it.
pub(in crate::window) fn outline(cx: Cx<'_>, ui: &Ui, target: Target, rect: Rect) {
    if wanted(cx).contains(&target) {
        let corner = f32::from(cx.state.theme.sizes.corner);
        let stroke = Stroke::new(WIDTH, cx.state.colours().accent());
        ui.painter()
            .rect_stroke(rect.expand(1.0), corner, stroke, StrokeKind::Outside);
    }
}

/// Draws controls, and the outline round them when the step is about them.
pub(in crate::window) fn framed<R>(cx: Cx<'_>, ui: &mut Ui, target: Target, contents: impl FnOnce(&mut Ui) -> R) -> R {
    let inner = ui.scope(contents);
    outline(cx, ui, target, inner.response.rect);
    inner.inner
}
