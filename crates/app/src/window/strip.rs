//! The front strip: the live front drawn flat as the zigzag it is, letter by letter, coloured by zone; each open V a notch.

use std::collections::BTreeSet;

use egui::{Color32, Pos2, Rect, Role as AccessRole, ScrollArea, Sense, Shape, Stroke, Ui, WidgetInfo, pos2, vec2};
use zonewright_geometry::{FrontState, Role, Side};

use super::{command::Command, panels::Cx, picture, splice_marks, strip_layout::Zigzag, widgets::Widgets};

/// Draws the strip.
pub(super) fn strip_ui(cx: Cx<'_>, ui: &mut Ui, widgets: &mut Widgets) {
    let height = ui.available_height();
    ui.horizontal_top(|ui| {
        ui.set_min_height(height);
        ui.vertical(|ui| {
            ui.set_width(128.0);
            head_ui(cx, ui);
        });
        front_ui(cx, ui, widgets, height);
    });
}

fn head_ui(cx: Cx<'_>, ui: &mut Ui) {
    let side = cx.state.view.side;
    ui.horizontal(|ui| {
        for (to, name) in [(Side::Fore, "Fore"), (Side::Aft, "Aft")] {
            let button = ui
                .selectable_label(side == to, name)
                .accessible_name(format!("{name} front"));
            if button
                .on_hover_text("The front that is shown here and that courses are laid on.")
                .clicked()
            {
                cx.tx.send(Command::SetSide(to));
            }
        }
    });
    let front = front(cx, side);
    ui.weak(format!(
        "{} edges{}",
        front.letters.len(),
        if front.closed { ", closed" } else { "" }
    ));
    ui.add(egui::Label::new(egui::RichText::new(stands(cx, side)).weak()).wrap());
}

/// How far a front is: how many Vs can be filled, and how many are spurs, which make no panel.
fn stands(cx: Cx<'_>, side: Side) -> String {
    let vs = cx.state.derived.open_on(side);
    let held = vs.iter().filter(|v| v.degenerate).count();
    let open = match vs.len() - held {
        0 if held == 0 => return "still: no open V".to_owned(),
        0 => "still".to_owned(),
        1 => "1 open V".to_owned(),
        n => format!("{n} open Vs"),
    };
    match held {
        0 => open,
        1 => format!("{open}: 1 spur held"),
        n => format!("{open}: {n} spurs held"),
    }
}

fn front(cx: Cx<'_>, side: Side) -> &FrontState {
    &cx.state.derived.shell.fronts[usize::from(side == Side::Aft)]
}

fn front_ui(cx: Cx<'_>, ui: &mut Ui, widgets: &mut Widgets, height: f32) {
    let side = cx.state.view.side;
    let roles: Vec<Role> = front(cx, side).letters.iter().map(|l| l.role).collect();
    let vs = cx.state.derived.open_on(side);
    let around = vs.last().is_some_and(|v| v.position + 1 == roles.len());
    let room = vec2(ui.available_width(), height);
    let zigzag = Zigzag::new(&roles, around, room.into());
    ScrollArea::horizontal()
        .id_salt("strip")
        .auto_shrink(false)
        .show_viewport(ui, |ui, seen| {
            let (rect, ground) = ui.allocate_exact_size(vec2(zigzag.width(), room.y), Sense::hover());
            ground.widget_info(|| WidgetInfo::labeled(AccessRole::Canvas, true, "Front strip"));
            ui.painter().rect_filled(rect, 3.0, cx.state.colours().picture());
            let spliced = splice_marks::spliced(cx.state, side);
            let at = |node: usize| rect.min + egui::Vec2::from(zigzag.node(node));
            for (index, v) in vs.iter().enumerate() {
                let first = v.position;
                let around = Rect::from_min_max(pos2(at(first).x, rect.top()), pos2(at(first + 2).x, rect.bottom()));
                if seen.left() - 4.0 <= around.right() - rect.left()
                    && around.left() - rect.left() <= seen.right() + 4.0
                {
                    notch(
                        cx,
                        ui,
                        widgets,
                        index,
                        &spliced,
                        around,
                        [at(first), at(first + 1), at(first + 2)],
                    );
                }
            }
            let letters = zigzag.seen(seen.left(), seen.right());
            for letter in letters {
                let colour = letter_colour(cx, side, letter % roles.len().max(1));
                ui.painter()
                    .line_segment([at(letter), at(letter + 1)], Stroke::new(2.5, colour));
            }
        });
}

fn letter_colour(cx: Cx<'_>, side: Side, letter: usize) -> Color32 {
    let shell = &cx.state.derived.shell;
    let zone = shell.zone_of(front(cx, side).letters[letter].letter);
    let counts_as = shell.zones[zone as usize].counts_as;
    let colour = picture::palette(cx.state).category(counts_as as usize);
    Color32::from_rgb(colour.r, colour.g, colour.b)
}

fn notch(
    cx: Cx<'_>,
    ui: &Ui,
    widgets: &mut Widgets,
    index: usize,
    spliced: &BTreeSet<usize>,
    around: Rect,
    corners: [Pos2; 3],
) {
    let side = cx.state.view.side;
    let fresh = spliced.contains(&index);
    let response = ui.interact(around, ui.scope_id().with(("v", index)), Sense::click());
    let held = cx.state.derived.open_on(side)[index].degenerate;
    let what = if held { "Held spur" } else { "Open V" };
    let name = format!("{what} {}", index + 1);
    response.widget_info(|| WidgetInfo::selected(AccessRole::CheckBox, true, fresh, &name));
    if response.hovered() || response.has_focus() {
        widgets.over_next = Some((side, index));
    }
    if response.clicked()
        && let Some(v) = splice_marks::v_name(cx.state, side, index)
    {
        cx.tx.send(Command::ToggleSplice(side, v));
    }
    let over = widgets.over == Some((side, index));
    let colours = cx.state.colours();
    let fill = match (over, held) {
        (true, _) => Some(colours.preview()),
        (false, true) => None,
        (false, false) => Some(colours.accent_weak()),
    };
    if let Some(fill) = fill {
        ui.painter()
            .add(Shape::convex_polygon(corners.to_vec(), fill, Stroke::NONE));
    }
    let tip = corners[1] + vec2(0.0, 6.0);
    if fresh {
        ui.painter().circle_filled(tip, 3.5, colours.preview());
    } else if held {
        ui.painter()
            .circle_stroke(tip, 2.0, Stroke::new(1.0, colours.text_weak()));
    } else {
        ui.painter()
            .circle_stroke(tip, 3.0, Stroke::new(1.3, colours.preview()));
    }
    if fresh || over {
        let hint = if fresh {
            "Click to take this splice away."
        } else {
            "Click to splice the directions in hand."
        };
        response.on_hover_text(hint);
    }
}
