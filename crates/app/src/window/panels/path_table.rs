//! The points of the path, in a table.

use egui::Ui;
use egui_extras::{Column, TableBuilder};
use zonewright_geometry::{Point, Role, start::DragRule};

use super::{Cx, small};
use crate::window::{command::Command, fields, path_edit::PathEdit, path_place::PlacedPath};

/// Draws the table of the start's path.
pub(super) fn path_ui(cx: Cx<'_>, ui: &mut Ui) {
    let Some(path) = &cx.state.derived.path else {
        ui.weak("The start gives no path: see the findings.");
        return;
    };
    if path.free {
        free_ui(cx, ui, path);
    } else {
        let count = path.own.len();
        ui.weak(format!(
            "{count} points follow from the parameters. Dragging one in the picture frees them."
        ));
    }
    if !path.free && button(ui, "Turn into free points", &Command::FreePoints) {
        cx.tx.send(Command::FreePoints);
    }
}

fn button(ui: &mut Ui, text: &str, command: &Command) -> bool {
    ui.button(text).on_hover_text(command.words().hint).clicked()
}

fn free_ui(cx: Cx<'_>, ui: &mut Ui, path: &PlacedPath) {
    table(cx, ui, path);
    ui.horizontal_wrapped(|ui| {
        if ui.button("Add a point").clicked() {
            cx.tx.send(Command::Path(PathEdit::Add));
        }
        let picked = cx.state.view.point;
        let edge = picked.filter(|p| *p < path.roles.len());
        if ui
            .add_enabled(edge.is_some(), egui::Button::new("Insert"))
            .on_hover_text("A point in the middle of the picked point's edge; both halves become edges of their own.")
            .clicked()
            && let Some(at) = edge
        {
            cx.tx.send(Command::Path(PathEdit::Insert(at)));
        }
        if ui
            .add_enabled(edge.is_some(), egui::Button::new("Split"))
            .on_hover_text("Two equal halves that stay one zone.")
            .clicked()
            && let Some(at) = edge
        {
            cx.tx.send(Command::Path(PathEdit::Split(at)));
        }
        if ui
            .add_enabled(picked.is_some() && path.own.len() > 2, egui::Button::new("Delete"))
            .clicked()
            && let Some(at) = picked
        {
            cx.tx.send(Command::Path(PathEdit::Delete(at)));
        }
    });
    let mut closed = path.closed;
    if ui
        .checkbox(&mut closed, "Closed")
        .on_hover_text("The last edge leads back to the first point.")
        .changed()
    {
        cx.tx.send(Command::Path(PathEdit::Close(closed)));
    }
    let tail = usize::from(cx.state.view.rule == DragRule::Tail);
    if let Some(chosen) = fields::choice(ui, "A drag moves", tail, &["The point", "Its tail too"]) {
        let rule = if chosen == 0 {
            DragRule::Neighbours
        } else {
            DragRule::Tail
        };
        cx.tx.send(Command::SetDragRule(rule));
    }
    let gap = cx.state.derived.shell.closing_gap.unwrap_or(0.0);
    if cx.state.shape().tolerances.join_mm < gap {
        ui.label(format!("Closing gap {}", cx.state.units().length(gap)));
        if button(ui, "Share it out", &Command::ShareGap) {
            cx.tx.send(Command::ShareGap);
        }
    }
}

fn table(cx: Cx<'_>, ui: &mut Ui, path: &PlacedPath) {
    let row = ui.spacing().interact_size.y;
    let height = (row + ui.spacing().item_spacing.y) * (super::rows_shown(ui, path.own.len()) + 1) as f32 + 2.0;
    ui.spacing_mut().item_spacing.x = 4.0;
    TableBuilder::new(ui)
        .id_salt("path")
        .column(Column::exact(26.0))
        .columns(Column::remainder().at_least(58.0), 3)
        .column(Column::exact(40.0))
        .cell_layout(egui::Layout::left_to_right(egui::Align::Center))
        .max_scroll_height(height)
        .min_scrolled_height(height.min(80.0))
        .vscroll(true)
        .header(row, |mut header| {
            for title in ["", "x", "y", "z", "edge"] {
                header.col(|ui| {
                    ui.weak(title);
                });
            }
        })
        .body(|body| {
            body.rows(row, path.own.len(), |mut line| {
                let at = line.index();
                let mut point = path.own[at];
                line.col(|ui| {
                    let picked = cx.state.view.point == Some(at);
                    let label = ui.selectable_label(picked, format!("{}", at + 1));
                    if label.accessible_name(format!("Point {}", at + 1)).clicked() {
                        cx.tx.send(Command::SelectPoint((!picked).then_some(at)));
                    }
                });
                for (axis, name) in ["x", "y", "z"].into_iter().enumerate() {
                    line.col(|ui| coordinate(cx, ui, at, &mut point, axis, name));
                }
                line.col(|ui| role(cx, ui, path, at));
            });
        });
}

fn coordinate(cx: Cx<'_>, ui: &mut Ui, at: usize, point: &mut Point, axis: usize, name: &str) {
    let label = format!("Point {} {name}", at + 1);
    if fields::bare_length(ui, &label, &mut point.0[axis], cx.state.units()) {
        cx.tx.send(Command::Path(PathEdit::Move {
            point: at,
            to: *point,
            rule: cx.state.view.rule,
        }));
    }
}

/// The role of the edge that begins at a point.
fn role(cx: Cx<'_>, ui: &mut Ui, path: &PlacedPath, at: usize) {
    let Some(role) = path.roles.get(at) else { return };
    let text = match role {
        Role::Zig => "zig",
        Role::Zag => "zag",
    };
    if small(ui, true, text, &format!("Role of edge {}: {text}", at + 1)) {
        cx.tx.send(Command::Path(PathEdit::Role(at, role.other())));
    }
}
