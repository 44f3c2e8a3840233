//! The front strip: the live front drawn flat as the zigzag it is, letter by letter, coloured by zone; each open V a notch.

mod act;
mod choice;
mod flat;
mod front;
mod head;
mod ink;
mod keys;
mod lane;
mod notch;
mod overview;
mod pointer;
mod sight;
mod silhouette;
mod words;

pub use act::{Picks, Span, StripAct, StripView};
pub(super) use choice::{clicked, directions_at, previewed, reached};
use egui::{Rect, Ui, UiBuilder, vec2};
pub use front::StripFront;

use super::{
    guide::{self, Target},
    panels::Cx,
    widgets::Widgets,
};

/// The accessible name of the strip.
pub const NAME: &str = "Front strip";

/// Width of the head, in points.
const HEAD: f32 = 186.0;
/// Height of the line that says what is pointed at, and of the overview, in points.
const LINE: f32 = 22.0;
const OVERVIEW: f32 = 10.0;
/// Space between the lane and the overview, in points.
const BETWEEN: f32 = 3.0;

/// What the strip keeps between frames.
#[derive(Debug, Default)]
pub(super) struct StripWidgets {
    zoom: sight::Zoom,
    /// The V that the keys are at, by its place among the open Vs.
    cursor: usize,
    /// Whether the cursor was moved last, and not the pointer.
    by_key: bool,
    drag: Option<pointer::Dragged>,
    told: Option<lane::Told>,
    outline: silhouette::Kept,
    overview: silhouette::Kept,
}

impl StripWidgets {
    /// How often an outline was drawn anew.
    pub(super) const fn outlines(&self) -> u64 {
        self.outline.times + self.overview.times
    }
}

/// Draws the strip.
pub(super) fn strip_ui(cx: Cx<'_>, ui: &mut Ui, widgets: &mut Widgets) {
    let room = ui.available_rect_before_wrap();
    ui.allocate_rect(room, egui::Sense::hover());
    let gap = ui.spacing().item_spacing.x;
    let (left, right) = room.split_left_right_at_x(room.left() + HEAD);
    let right = Rect::from_min_max(right.min + vec2(gap, 0.0), right.max);
    let (line, below) = right.split_top_bottom_at_y(right.top() + LINE);
    let flat = &cx.state.derived.strip_on(cx.state.view.side).flat;
    let mut lane = below;
    // Whether all is in sight does not depend on the height of the lane.
    let scrolls = !sight::Sight::new(flat, lane, widgets.strip.zoom).is_whole(flat);
    if scrolls {
        lane.max.y -= OVERVIEW + BETWEEN;
    }
    let bar = Rect::from_min_max(egui::pos2(lane.left(), lane.bottom() + BETWEEN), below.max);
    ui.scope_builder(UiBuilder::new().max_rect(left).id_salt("strip head"), |ui| {
        head::head_ui(cx, ui, widgets, lane);
    });
    lane::lane_ui(cx, ui, widgets, lane);
    guide::outline(cx, ui, Target::Strip, lane);
    if scrolls {
        overview::overview_ui(cx, ui, widgets, bar, lane);
    }
    ui.scope_builder(UiBuilder::new().max_rect(line).id_salt("strip line"), |ui| {
        head::line_ui(ui, widgets);
    });
}
