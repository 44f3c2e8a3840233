//! The panels beside the picture.

mod animation_panel;
mod backdrop_panel;
mod curve_fields;
mod directions;
mod findings_panel;
mod finish_panel;
mod panel_panel;
mod path_table;
mod placement_panel;
mod readouts;
mod selection_panel;
mod solve_fields;
mod solve_panel;
mod spread_panel;
mod star_fields;
mod start_fields;
mod start_panel;
mod step_fields;
mod steps_panel;
mod tolerances_panel;
mod zone_fields;
mod zones_panel;

pub(super) use directions::zone_name;
use egui::{Align, Frame, Layout, Margin, Panel, RichText, ScrollArea, Ui};

pub(super) use solve_panel::SolveCache;
pub(super) use spread_panel::SpreadCache;

use super::{
    command::{Command, Sender},
    guide::{self, Target},
    ladder::LadderAct,
    state::State,
    widgets::Widgets,
};

/// What a panel reads, and where it sends commands.
#[derive(Clone, Copy, Debug)]
pub(super) struct Cx<'a> {
    /// The state, to read.
    pub state: &'a State,
    /// Where commands go.
    pub tx: &'a Sender,
}

/// The left panel: the start, its path, where the shell stands; below, the card of the step that is picked on the ladder.
pub(super) fn left_ui(cx: Cx<'_>, ui: &mut Ui) {
    if cx.state.view.ladder.picked.is_some() {
        let most = (ui.available_height() * 0.6).max(120.0);
        let frame = Frame::side_top_panel(ui.style()).inner_margin(Margin::symmetric(0, 8));
        Panel::bottom("card of a step")
            .frame(frame)
            .resizable(false)
            .show(ui, |ui| {
                ScrollArea::vertical()
                    .max_height(most)
                    .min_scrolled_height(most)
                    .auto_shrink([false, true])
                    .id_salt("card")
                    .show(ui, |ui| {
                        steps_panel::card_ui(cx, ui);
                        finish_panel::card_ui(cx, ui);
                    });
            });
    }
    ScrollArea::vertical()
        .auto_shrink(false)
        .id_salt("left")
        .show(ui, |ui| {
            section(cx, ui, "Start", true, |ui| start_panel::start_ui(cx, ui));
            if let Some(backdrop) = &cx.state.design().backdrop {
                section(cx, ui, "Backdrop", true, |ui| {
                    backdrop_panel::backdrop_ui(cx, ui, backdrop)
                });
            }
            section(cx, ui, "Path", true, |ui| path_table::path_ui(cx, ui));
            section(cx, ui, "Directions in hand", true, |ui| directions::hand_ui(cx, ui));
            section(cx, ui, "Zones", true, |ui| zones_panel::zones_ui(cx, ui));
            section(cx, ui, "Placement", false, |ui| placement_panel::placement_ui(cx, ui));
            section(cx, ui, "Tolerances", false, |ui| {
                tolerances_panel::tolerances_ui(cx, ui)
            });
        });
}

/// The right panel: what is picked, readouts and findings.
pub(super) fn right_ui(cx: Cx<'_>, ui: &mut Ui, widgets: &mut Widgets) {
    ScrollArea::vertical()
        .auto_shrink(false)
        .id_salt("right")
        .show(ui, |ui| {
            if !selection_panel::is_empty(cx) {
                section(cx, ui, "Selection", true, |ui| selection_panel::selection_ui(cx, ui));
            }
            section(cx, ui, "Readouts", true, |ui| {
                if cx.state.view.ladder.climbed.is_some() {
                    ui.colored_label(cx.state.colours().accent(), "Of the part that is shown");
                }
                readouts::readouts_ui(cx, ui);
            });
            section(cx, ui, "Findings", true, |ui| findings_panel::findings_ui(cx, ui));
            section(cx, ui, "Solve for", false, |ui| solve_panel::solve_ui(cx, ui, widgets));
            section(cx, ui, "Animation", false, |ui| animation_panel::animation_ui(cx, ui));
            section(cx, ui, "Spread", false, |ui| spread_panel::spread_ui(cx, ui, widgets));
        });
}

/// How many rows of a table are shown before it scrolls: so many that a long one leaves the sections after it in sight.
fn rows_shown(ui: &Ui, rows: usize) -> usize {
    /// Rows that are shown in any case, and at most.
    const ROWS: std::ops::RangeInclusive<usize> = 5..=12;
    /// The part of the window's height that a table may take.
    const SHARE: f32 = 0.2;
    let row = ui.spacing().interact_size.y + ui.spacing().item_spacing.y;
    let room = (ui.ctx().content_rect().height() * SHARE / row) as usize;
    rows.min(room.clamp(*ROWS.start(), *ROWS.end()))
}

/// A section that can be folded away.
fn section(cx: Cx<'_>, ui: &mut Ui, title: &str, open: bool, contents: impl FnOnce(&mut Ui)) {
    let shown = egui::CollapsingHeader::new(egui::RichText::new(title).heading())
        .id_salt(title)
        .default_open(open)
        .show_unindented(ui, |ui| {
            contents(ui);
            ui.add_space(ui.spacing().item_spacing.y);
        });
    // Of a section that is folded away, the first shell marks the head; of the findings always, for they may be many.
    let mut wanted = guide::wanted(cx).iter().copied();
    if let Some(target) = wanted.find(|target| target.section() == Some(title))
        && (shown.openness < 1.0 || target == Target::Findings)
    {
        guide::outline(cx, ui, target, shown.header_response.rect);
    }
}

/// The head of a card: what it is about, and a button that closes it.
fn card_head(cx: Cx<'_>, ui: &mut Ui, title: &str, of: &str) {
    ui.horizontal(|ui| {
        ui.label(RichText::new(title).heading());
        ui.with_layout(Layout::right_to_left(Align::Center), |ui| {
            if small(ui, true, "×", &format!("Close the card of {of}")) {
                cx.tx.send(Command::Ladder(LadderAct::Pick(None)));
            }
        });
    });
}

/// A small button whose accessible name is longer than its text.
fn small(ui: &mut Ui, enabled: bool, text: &str, name: &str) -> bool {
    let button = ui.add_enabled(enabled, egui::Button::new(text).small());
    let button = button.on_hover_text(name).on_disabled_hover_text(name);
    button.accessible_name(name).clicked()
}

/// What an icon button shows.
#[derive(Clone, Copy, PartialEq, Eq, Debug)]
enum Icon {
    /// A triangle that points up.
    Up,
    /// A triangle that points down.
    Down,
}

/// A small button with a drawn icon: the fonts have no arrows.
fn icon(ui: &mut Ui, enabled: bool, icon: Icon, name: &str) -> bool {
    let side = ui.spacing().interact_size.y * 0.8;
    let button = egui::Button::new("").small().min_size(egui::vec2(side, side));
    let button = ui.add_enabled(enabled, button).on_hover_text(name);
    let colour = ui.style().interact(&button).text_color();
    let colour = if enabled { colour } else { colour.gamma_multiply(0.4) };
    let (middle, reach) = (button.rect.center(), side * 0.22);
    let up = if icon == Icon::Up { -reach } else { reach };
    let corners = vec![
        middle + egui::vec2(0.0, up),
        middle + egui::vec2(reach * 1.2, -up),
        middle + egui::vec2(-reach * 1.2, -up),
    ];
    ui.painter()
        .add(egui::Shape::convex_polygon(corners, colour, egui::Stroke::NONE));
    button.accessible_name(name).clicked()
}
