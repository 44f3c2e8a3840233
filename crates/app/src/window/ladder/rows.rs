//! The rows of the ladder under pointer and keys.

use egui::{
    Checkbox, CursorIcon, Id, Popup, PopupCloseBehavior, Pos2, Rect, Response, Role, ScrollArea, Sense, Shape, Stroke,
    Ui, WidgetInfo, pos2, style::ScrollAnimation, vec2,
};
use zonewright_geometry::{Finish, Step, StepId};

use super::{
    Climbed, LadderAct, add_menu, keys,
    layout::Layout,
    model::{Ladder, Row, RowKind, Said, name},
    rung::{self, Looks},
};
use crate::window::{command::Command, panels::Cx};

/// How near the pointer must come to the upper edge of a row for a step to be added there, in points.
const EDGE: f32 = 6.0;

/// What is being dragged along the ladder.
#[derive(Clone, Copy, PartialEq, Eq, Debug)]
enum Held {
    /// The place that one has climbed to.
    Climbed,
    /// A step.
    Step(StepId),
}

/// What the ladder remembers from frame to frame.
#[derive(Debug, Default)]
pub(in crate::window) struct LadderWidgets {
    held: Option<Held>,
    /// The row that has the keys; it is kept while it is out of sight.
    focused: Option<usize>,
    /// What was brought into sight last: a place, among so many rows.
    followed: (Option<Climbed>, usize),
}

/// What all rows of one frame share.
struct Rows<'a> {
    cx: Cx<'a>,
    ladder: &'a Ladder,
    layout: Layout,
    /// The row that one has climbed to.
    marked: usize,
    held: Option<Held>,
    base: Id,
}

/// Draws the rows that are in sight.
pub(super) fn rows_ui(cx: Cx<'_>, ui: &mut Ui, widgets: &mut LadderWidgets) {
    let ladder = &cx.state.derived.ladder;
    let room = ui.available_height();
    let layout = Layout::new(ladder, room);
    ScrollArea::vertical()
        .id_salt("ladder")
        .auto_shrink(false)
        .show_viewport(ui, |ui, seen| {
            let size = vec2(ui.available_width(), layout.height().max(room));
            let (place, ground) = ui.allocate_exact_size(size, Sense::hover());
            ground.widget_info(|| WidgetInfo::labeled(Role::ListBox, true, "Course ladder"));
            let mut rows = Rows {
                cx,
                ladder,
                layout,
                marked: ladder.row_of(cx.state.view.ladder.climbed),
                held: widgets.held,
                base: ui.scope_id(),
            };
            rows.layout.stand(ladder, place);
            rows.spine(ui);
            let sight = rows.layout.seen(place.top() + seen.top(), place.top() + seen.bottom());
            let hidden = widgets
                .focused
                .filter(|at| !sight.contains(at) && *at < ladder.rows.len());
            widgets.focused = None;
            // From the top down, as one reads and as the tabulator goes.
            for at in sight.clone().rev().chain(hidden) {
                rows.one(ui, at, widgets);
            }
            rows.mark(ui);
            let pointer = ui.input(|i| i.pointer.latest_pos()).filter(|pos| place.contains(*pos));
            let near = pointer.filter(|_| rows.held.is_none() && ui.ui_contains_pointer());
            let near = near.and_then(|pos| rows.layout.edge_near(pos.y, EDGE));
            for at in sight {
                rows.plus(ui, at, near == Some(at));
            }
            rows.drag_on(ui, widgets);
            let now = (cx.state.view.ladder.climbed, ladder.rows.len());
            if widgets.followed != now && widgets.held.is_none() {
                widgets.followed = now;
                bring(ui, rows.layout.row(rows.marked).expand(12.0));
            }
        });
}

/// Scrolls until a place is in sight.
fn bring(ui: &Ui, place: Rect) {
    ui.scroll_to_rect_animation(place, None, ScrollAnimation::none());
}

impl Rows<'_> {
    fn row(&self, at: usize) -> Row {
        self.ladder.rows[at]
    }

    /// The id of a row: by what it is, not by where it stands.
    fn id(&self, at: usize) -> Id {
        let row = self.row(at);
        match row.kind {
            RowKind::Finish(k) => self.base.with(("finish", k)),
            RowKind::Course { .. } => self.base.with(("course", row.place)),
            RowKind::Step(_) | RowKind::Start => self.base.with(("step", row.place)),
        }
    }

    fn step(&self, at: usize) -> Option<&Step> {
        match self.row(at).kind {
            RowKind::Step(k) => self.cx.state.shape().steps.get(k),
            _ => None,
        }
    }

    fn finish(&self, at: usize) -> Option<&Finish> {
        match self.row(at).kind {
            RowKind::Finish(k) => self.cx.state.shape().finish.get(k),
            _ => None,
        }
    }

    fn number(&self, at: usize) -> Option<StepId> {
        self.step(at).map(|s| s.id).or_else(|| self.finish(at).map(|f| f.id))
    }

    fn said(&self, at: usize) -> &[Said] {
        let said = self.number(at).and_then(|id| self.ladder.said.get(&id));
        said.map_or(&[], Vec::as_slice)
    }

    /// The line that the rungs grow from.
    fn spine(&self, ui: &Ui) {
        let [first, last] = [0, self.ladder.rows.len().saturating_sub(1)].map(|at| self.layout.row(at));
        let x = self.layout.spine();
        let line = Stroke::new(1.0, self.cx.state.colours().line());
        ui.painter().vline(x, last.center().y..=first.center().y, line);
    }

    fn one(&self, ui: &mut Ui, at: usize, widgets: &mut LadderWidgets) {
        let row = self.row(at);
        let place = self.layout.row(at);
        let response = ui.interact(place, self.id(at), Sense::click_and_drag());
        let shape = self.cx.state.shape();
        response.widget_info(|| WidgetInfo::selected(Role::ListBoxOption, true, at == self.marked, name(&row, shape)));
        if let Some(first) = self.said(at).first() {
            let text = first.text.clone();
            ui.ctx()
                .accesskit_node_builder(response.id, |node| node.set_description(text));
        }
        if response.has_focus() {
            widgets.focused = Some(at);
            if let Some(to) = keys::handle(self.cx, ui, &response, self.ladder, at) {
                widgets.focused = Some(to);
                ui.memory_mut(|m| m.request_focus(self.id(to)));
                self.cx.tx.send(climb(self.row(to)));
                bring(ui, self.layout.row(to).expand(12.0));
            }
        }
        if response.clicked() {
            response.request_focus();
            self.cx.tx.send(climb(row));
            if let Some(id) = self.number(at) {
                self.cx.tx.send(Command::Ladder(LadderAct::Pick(Some(id))));
            }
        }
        if response.drag_started_by(egui::PointerButton::Primary) {
            widgets.held = match (row.kind, self.number(at)) {
                (RowKind::Step(_), Some(id)) => Some(Held::Step(id)),
                (RowKind::Finish(_), _) => None,
                _ => Some(Held::Climbed),
            };
        }
        self.draw(ui, at, &response);
    }

    fn draw(&self, ui: &mut Ui, at: usize, response: &Response) {
        let row = self.row(at);
        let view = self.cx.state.view.ladder;
        let number = self.number(at);
        let looks = Looks {
            beyond: view.climbed.is_some() && self.marked < at && row.place.is_some() && row.place != view.climbed,
            hot: response.hovered() && self.held.is_none(),
            focused: response.has_focus(),
            picked: number.is_some() && number == view.picked,
            dragged: number.is_some_and(|id| self.held == Some(Held::Step(id))),
        };
        if let RowKind::Course { .. } = row.kind {
            rung::course(self.cx, ui.painter(), &self.layout, at, &row, looks);
            if response.hovered() {
                ui.set_cursor_icon(CursorIcon::PointingHand);
            }
            return;
        }
        let said = self.said(at);
        rung::plate(
            self.cx,
            ui,
            &self.layout,
            at,
            &row,
            looks,
            said.first().map(|s| s.level),
        );
        self.switch(ui, at);
        let hint = match row.kind {
            RowKind::Step(_) if said.is_empty() => {
                "Click: its card, and the shell up to here. Drag, or Alt and arrows: to another place."
            }
            RowKind::Start => "Click: the start alone.",
            RowKind::Finish(_) if said.is_empty() => "Panels that are left out. Click: its card.",
            _ => "",
        };
        let text = said.iter().map(|s| s.text.as_str()).collect::<Vec<_>>().join("\n");
        let text = if hint.is_empty() { text } else { hint.to_owned() };
        if self.held.is_none() {
            response.clone().on_hover_text(text);
        }
    }

    /// The switch of a step.
    fn switch(&self, ui: &mut Ui, at: usize) {
        let place = self.layout.row(at);
        let middle = pos2(place.right() - 14.0, place.center().y);
        let spot = Rect::from_center_size(middle, vec2(18.0, 18.0));
        let put = |ui: &mut Ui, mut on: bool, name: String| {
            let switch = ui.put(spot, Checkbox::without_text(&mut on)).accessible_name(name);
            switch.changed().then_some(on)
        };
        match (self.row(at).kind, self.step(at), self.finish(at)) {
            (RowKind::Step(k), Some(step), _) => {
                if let Some(on) = put(ui, step.on, format!("Step {} on", k + 1)) {
                    let step = Step { on, ..step.clone() };
                    self.cx.tx.send(Command::SetStep(k, Box::new(step)));
                }
            }
            (RowKind::Finish(k), _, Some(finish)) => {
                if let Some(on) = put(ui, finish.on, format!("Finishing step {} on", k + 1)) {
                    let finish = Finish { on, ..finish.clone() };
                    self.cx.tx.send(Command::SetFinish(k, Box::new(finish)));
                }
            }
            _ => {}
        }
    }

    /// The mark of the place that one has climbed to.
    fn mark(&self, ui: &Ui) {
        if self.cx.state.view.ladder.climbed.is_none() {
            return;
        }
        let place = self.layout.row(self.marked);
        let colour = self.cx.state.colours().accent();
        let painter = ui.painter();
        painter.hline(place.x_range(), place.top(), Stroke::new(2.0, colour));
        let corners = vec![
            pos2(place.right(), place.top() - 4.5),
            pos2(place.right() - 6.0, place.top()),
            pos2(place.right(), place.top() + 4.5),
        ];
        painter.add(Shape::convex_polygon(corners, colour, Stroke::NONE));
    }

    /// The button between this row and the next one that adds a step there: where the pointer is near, and at the mark.
    fn plus(&self, ui: &mut Ui, at: usize, near: bool) {
        let row = self.row(at);
        let Some(place) = row.place else { return };
        // Between the last course of a step and the step's own plate there is no other place than above the plate.
        let next = self.ladder.rows.get(at + 1);
        if next.is_some_and(|n| n.place == row.place) {
            return;
        }
        let id = self.id(at).with("plus");
        let popup = id.with("steps");
        let climbed = self.cx.state.view.ladder.climbed;
        let marked = climbed.is_some() && climbed == row.place;
        if !near && !marked && !Popup::is_id_open(ui.ctx(), popup) {
            return;
        }
        let edge = self.layout.row(at);
        let middle = pos2(edge.left() + 8.0, edge.top());
        let response = ui.interact(Rect::from_center_size(middle, vec2(16.0, 16.0)), id, Sense::click());
        let after = match row.kind {
            RowKind::Course { .. } => {
                let name = name(&row, self.cx.state.shape());
                name.split(':').next().unwrap_or_default().to_lowercase()
            }
            RowKind::Step(k) => format!("step {}", k + 1),
            RowKind::Start | RowKind::Finish(_) => "the start".to_owned(),
        };
        let called = format!("Add a step after {after}");
        response.widget_info(|| WidgetInfo::labeled(Role::Button, true, &called));
        self.plus_sign(ui, middle, &response);
        Popup::menu(&response)
            .id(popup)
            .close_behavior(PopupCloseBehavior::CloseOnClick)
            .show(|ui| add_menu::entries(self.cx, ui, Some(place)));
        response.on_hover_text(called);
    }

    fn plus_sign(&self, ui: &Ui, at: Pos2, response: &Response) {
        let colours = self.cx.state.colours();
        let hot = response.hovered() || response.has_focus();
        let (fill, ink) = if hot {
            (colours.accent(), colours.field())
        } else {
            (colours.field(), colours.accent())
        };
        let painter = ui.painter();
        painter.circle(at, 7.0, fill, Stroke::new(1.2, colours.accent()));
        let pen = Stroke::new(1.5, ink);
        painter.hline(at.x - 3.5..=at.x + 3.5, at.y, pen);
        painter.vline(at.x, at.y - 3.5..=at.y + 3.5, pen);
    }

    /// What a drag that is going on does.
    fn drag_on(&self, ui: &Ui, widgets: &mut LadderWidgets) {
        let Some(held) = widgets.held else { return };
        let (pointer, down, stop) = ui.input(|i| {
            let down = i.pointer.primary_down();
            (i.pointer.latest_pos(), down, i.key_pressed(egui::Key::Escape))
        });
        let steps = &self.cx.state.shape().steps;
        let Some(pos) = pointer.filter(|_| !stop) else {
            widgets.held = None;
            return;
        };
        match held {
            Held::Climbed => {
                let at = self.layout.row_at(pos.y);
                let to = self.row(at).place.filter(|place| !self.ladder.is_top(*place));
                if to != self.cx.state.view.ladder.climbed {
                    self.cx.tx.send(Command::Ladder(LadderAct::Climb(to)));
                }
            }
            Held::Step(id) => {
                ui.set_cursor_icon(CursorIcon::Grabbing);
                if let Some(from) = steps.iter().position(|s| s.id == id) {
                    let (to, above) = self.layout.step_at(self.ladder, from, pos.y);
                    if !down && from != to {
                        self.cx.tx.send(Command::MoveStep(from, to));
                    }
                    let place = self.layout.row(above);
                    let pen = Stroke::new(3.0, self.cx.state.colours().preview());
                    ui.painter().hline(place.x_range(), place.top(), pen);
                }
            }
        }
        if !down {
            widgets.held = None;
        }
    }
}

/// The command that climbs to a row.
fn climb(row: Row) -> Command {
    Command::Ladder(LadderAct::Climb(row.place))
}
