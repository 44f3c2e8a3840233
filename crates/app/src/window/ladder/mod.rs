//! The course ladder: the courses as rungs, each as long as it has panels, upright in the order they grew, and between them
//! the steps where they happened. One climbs it to see the growth at any point, and works on the record there.

mod act;
mod add_menu;
mod glyph;
mod head;
mod keys;
mod layout;
mod model;
mod place;
mod rows;
mod rung;

pub use act::LadderAct;
pub(super) use head::banner_ui;
pub(super) use model::title;
pub use model::{Ladder, Laid, Row, RowKind, Said};
pub use place::{Climbed, LadderView};
pub(super) use rows::LadderWidgets;

use egui::Ui;

use super::{panels::Cx, widgets::Widgets};

/// Draws the ladder with its head.
pub(super) fn ladder_ui(cx: Cx<'_>, ui: &mut Ui, widgets: &mut Widgets) {
    head::head_ui(cx, ui);
    ui.separator();
    rows::rows_ui(cx, ui, &mut widgets.ladder);
}
