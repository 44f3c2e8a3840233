//! Pointer and keys on the picture.

use egui::{Event, Key, PointerButton, Pos2, Rect, Response, Ui, Vec2};
use zonewright_geometry::{Point, Vector};
use zonewright_painter::Camera;

use super::{
    hit::{self, Hit},
    point_snap, zone_drag,
};
use crate::window::{
    command::Command,
    panels::Cx,
    panes::PaneAct,
    path_edit::PathEdit,
    path_place::PlacedPath,
    selection::SelectAct,
    splice_marks::v_name,
    thing::{Kind, Thing},
    widgets::{Drag, Widgets},
    zones::ZoneAct,
};

/// Points of scrolling that double the size.
const WHEEL_DOUBLES: f32 = 250.0;

/// Points that an arrow key turns or moves the camera by.
const KEY_STEP: f32 = 24.0;

/// A pane as it stands in the window.
#[derive(Clone, Copy, Debug)]
pub(super) struct Seen<'a> {
    /// Which.
    pub at: usize,
    /// Where.
    pub rect: Rect,
    /// What happens on it.
    pub response: &'a Response,
}

/// Turns what pointer and keys do on the picture into commands.
pub(super) fn handle(cx: Cx<'_>, ui: &Ui, seen: Seen<'_>, widgets: &mut Widgets) {
    let Seen { at, rect, response } = seen;
    let camera = &cx.state.panes.pane(at).camera;
    let hovered = response.hover_pos().map(|pos| pos - rect.min);
    let hit = hovered
        .filter(|_| widgets.drag.is_none())
        .and_then(|pos| hit::at(cx.state, camera, pos));
    if let Some(Hit::V(index)) = hit {
        widgets.over_next = Some((cx.state.view.side, index));
    }
    if let Some(pos) = hovered.filter(|_| widgets.drag.is_none()) {
        let over = match hit {
            Some(Hit::Point(point)) => Some(Thing::Point(point)),
            Some(Hit::V(_)) => None,
            None => hit::part_at(cx.state, camera, pos),
        };
        widgets.over_thing = over.map(|thing| (at, thing));
    }
    if hit.is_none()
        && let Some(pos) = hovered.filter(|_| widgets.drag.is_none())
    {
        zone_drag::hover(cx, ui, at, pos, &mut widgets.zones);
    }
    if hit.is_some() {
        ui.ctx().set_cursor_icon(egui::CursorIcon::PointingHand);
    }
    if response.contains_pointer() {
        widgets.over_pane = Some(at);
    }
    if response.clicked() || response.drag_started() {
        // Keys go where the pointer worked last.
        response.request_focus();
        activate(cx, at);
    }
    if response.clicked() {
        clicked(cx, ui, seen);
    }
    if response.drag_started() {
        widgets.drag = begin(cx, ui, seen, widgets);
        widgets.drag_pane = at;
    }
    if let Some(drag) = widgets.drag.filter(|_| widgets.drag_pane == at) {
        if response.dragged() {
            drag_on(cx, ui, seen, drag, widgets);
        } else {
            // Escape ends a drag while the button is still down.
            if drag.edits() && ui.input(|i| i.key_pressed(Key::Escape)) {
                cx.tx.send(Command::Zone(ZoneAct::TakeBack));
            }
            widgets.drag = None;
            widgets.zones.end();
        }
    }
    if response.contains_pointer() {
        wheel(cx, ui, seen);
    }
    if widgets.focus != cx.state.panes.focus && cx.state.panes.active() == at {
        widgets.focus = cx.state.panes.focus;
        response.request_focus();
    }
    if response.gained_focus() {
        activate(cx, at);
    }
    if response.has_focus() {
        keys(cx, ui, seen);
        // While something is dragged, letters are its locks.
        if widgets.drag.is_none() {
            step_keys(cx, ui);
        }
    }
}

/// Makes a pane the one that commands act on; what follows in the same frame acts on it already.
fn activate(cx: Cx<'_>, at: usize) {
    if cx.state.panes.active() != at {
        cx.tx.send(Command::Pane(PaneAct::Activate(at)));
    }
}

fn clicked(cx: Cx<'_>, ui: &Ui, seen: Seen<'_>) {
    let Seen { at, rect, response } = seen;
    let camera = &cx.state.panes.pane(at).camera;
    let Some(pos) = response.interact_pointer_pos() else {
        return;
    };
    let pos = pos - rect.min;
    let hit = hit::at(cx.state, camera, pos);
    let shift = ui.input(|i| {
        let released =
            |e: &Event| matches!(e, Event::PointerButton { pressed: false, modifiers, .. } if modifiers.shift);
        i.events.iter().any(released)
    });
    if shift || cx.state.view.selection.from.is_some() {
        // What is measured to is never spliced.
        let to = match hit {
            Some(Hit::Point(point)) => Some(Thing::Point(point)),
            _ => hit::part_at(cx.state, camera, pos),
        };
        if let Some(to) = to {
            cx.tx.send(Command::Select(SelectAct::MeasureTo(to)));
        }
        return;
    }
    match hit {
        Some(Hit::Point(point)) => cx.tx.send(Command::Select(SelectAct::Pick(Thing::Point(point)))),
        Some(Hit::V(index)) => {
            if let Some(name) = v_name(cx.state, cx.state.view.side, index) {
                cx.tx.send(Command::ToggleSplice(cx.state.view.side, name));
            }
        }
        None => cx.tx.send(match hit::part_at(cx.state, camera, pos) {
            Some(thing) => Command::Select(SelectAct::Pick(thing)),
            None => Command::SelectPoint(None),
        }),
    }
}

/// The drag that a pressed button begins. The ground of a free view turns it, that of a measured drawing moves it along; with shift it
/// is the other way round. The middle button always moves, the second one always turns.
fn begin(cx: Cx<'_>, ui: &Ui, seen: Seen<'_>, widgets: &mut Widgets) -> Option<Drag> {
    let Seen { at, rect, response } = seen;
    let pane = cx.state.panes.pane(at);
    let shift = ui.input(|i| i.modifiers.shift);
    if response.drag_started_by(PointerButton::Middle) {
        return Some(Drag::Pan);
    }
    if response.drag_started_by(PointerButton::Secondary) {
        return Some(Drag::Orbit);
    }
    let ground = if pane.is_measured() == shift {
        Drag::Orbit
    } else {
        Drag::Pan
    };
    if shift && response.drag_started_by(PointerButton::Primary) {
        return Some(ground);
    }
    if !response.drag_started_by(PointerButton::Primary) {
        return None;
    }
    // Where the button went down: the pointer has moved on before it counts as a drag.
    let from = ui
        .input(|i| i.pointer.press_origin())
        .or_else(|| response.interact_pointer_pos())?;
    let point = match hit::at(cx.state, &pane.camera, from - rect.min) {
        Some(Hit::Point(point)) => point,
        Some(Hit::V(_)) => return Some(ground),
        None => {
            let zone = zone_drag::begin(cx.state, &pane.camera, from, rect);
            let drag = if zone.is_some() { Drag::Zone } else { ground };
            widgets.zones.drag = zone;
            return Some(drag);
        }
    };
    let path = cx.state.derived.path.as_ref()?;
    cx.tx.send(Command::SelectPoint(Some(point)));
    widgets.zones.point = point_snap::PointSnap::begin(cx.state, path, point);
    Some(Drag::Point {
        point,
        own: *path.own.get(point)?,
        placed: *path.placed.get(point)?,
        from,
    })
}

fn drag_on(cx: Cx<'_>, ui: &Ui, seen: Seen<'_>, drag: Drag, widgets: &mut Widgets) {
    let Seen { at, response, .. } = seen;
    let camera = &cx.state.panes.pane(at).camera;
    // What lies under the pointer when the button goes down stays under it, also through the first small movements, which do
    // not count as a drag yet.
    let by = if response.drag_started() {
        response.total_drag_delta().unwrap_or_default()
    } else {
        response.drag_delta()
    };
    match drag {
        Drag::Orbit if by != Vec2::ZERO => cx.tx.send(Command::Orbit(by)),
        Drag::Pan if by != Vec2::ZERO => cx.tx.send(Command::Pan(by)),
        Drag::Point {
            point,
            own,
            placed,
            from,
        } if by != Vec2::ZERO => {
            let (Some(pos), Some(path)) = (response.interact_pointer_pos(), &cx.state.derived.path) else {
                return;
            };
            let held = zone_drag::Held::now(cx.state, ui, at);
            let by = moved(camera, path, placed, pos - from, held);
            let by = widgets.zones.snap_point(cx, camera, placed, path, by, held);
            let rule = cx.state.view.rule;
            cx.tx.send(Command::Path(PathEdit::Move {
                point,
                to: own + by,
                rule,
            }));
        }
        Drag::Zone => {
            let held = zone_drag::Held::now(cx.state, ui, at);
            if let Some(pos) = response.interact_pointer_pos()
                && let Some(act) = widgets.zones.drag_on(cx, camera, pos, held)
            {
                cx.tx.send(Command::Zone(act));
            }
            ui.ctx().set_cursor_icon(egui::CursorIcon::Grabbing);
        }
        _ => {}
    }
}

/// The movement of a dragged point in the path's own frame; while x, y or z is held down, only along that axis.
fn moved(camera: &Camera, path: &PlacedPath, placed: Point, by: Vec2, held: zone_drag::Held) -> Vector {
    let across = camera.move_in_view_plane(placed, by.x, by.y);
    let own = path.own_movement(across);
    held.axis.map_or(own, |axis| axis * own.dot(axis))
}

fn wheel(cx: Cx<'_>, ui: &Ui, seen: Seen<'_>) {
    let Seen { at, rect, response } = seen;
    let (scroll, pinch) = ui.input(|i| (i.smooth_scroll_delta().y, i.zoom_delta()));
    let factor = (scroll / WHEEL_DOUBLES).exp2() * pinch;
    if factor != 1.0
        && let Some(pos) = response.hover_pos()
    {
        activate(cx, at);
        cx.tx.send(Command::Zoom((pos - rect.min).to_pos2(), factor));
    }
}

/// Keys that pick the next thing of a kind; with shift, the one before.
const STEPS: [(Key, Kind); 4] = [
    (Key::N, Kind::Point),
    (Key::V, Kind::Vertex),
    (Key::E, Kind::Edge),
    (Key::P, Kind::Panel),
];

fn step_keys(cx: Cx<'_>, ui: &Ui) {
    ui.input(|i| {
        for event in &i.events {
            let Event::Key {
                key,
                pressed: true,
                modifiers,
                ..
            } = event
            else {
                continue;
            };
            if modifiers.command || modifiers.alt {
                continue;
            }
            if let Some((_, kind)) = STEPS.iter().find(|(step, _)| step == key) {
                cx.tx.send(Command::Select(SelectAct::Step(*kind, modifiers.shift)));
            }
            if *key == Key::Enter && cx.state.view.selection.from.is_some() {
                cx.tx.send(Command::Select(SelectAct::Measure));
            }
        }
    });
}

/// Arrows turn a free view and move a measured drawing along, with shift the other way round; plus and minus zoom.
fn keys(cx: Cx<'_>, ui: &Ui, seen: Seen<'_>) {
    let Seen { at, rect, response } = seen;
    let measured = cx.state.panes.pane(at).is_measured();
    ui.memory_mut(|m| {
        let filter = egui::EventFilter {
            horizontal_arrows: true,
            vertical_arrows: true,
            ..egui::EventFilter::default()
        };
        m.set_focus_lock_filter(response.id, filter);
    });
    let (by, zoom, shift) = ui.input(|i| {
        let pressed = |key| {
            if i.modifiers.command {
                0.0
            } else {
                i.num_presses(key) as f32
            }
        };
        let x = pressed(Key::ArrowRight) - pressed(Key::ArrowLeft);
        let y = pressed(Key::ArrowDown) - pressed(Key::ArrowUp);
        let zoom = pressed(Key::Plus) + pressed(Key::Equals) - pressed(Key::Minus);
        (egui::vec2(x, y) * KEY_STEP, zoom, i.modifiers.shift)
    });
    if by != Vec2::ZERO {
        let turns = measured == shift;
        activate(cx, at);
        cx.tx.send(if turns { Command::Orbit(by) } else { Command::Pan(by) });
    }
    if zoom != 0.0 {
        activate(cx, at);
        let middle = Pos2::ZERO + rect.size() * 0.5;
        cx.tx.send(Command::Zoom(middle, 1.25_f32.powf(zoom)));
    }
}
