//! The picture of the shell in the middle of the window.

mod backdrop;
mod bar;
mod front_marks;
mod headroom_marks;
mod hit;
mod input;
mod legend;
mod marks;
mod overlay;
mod point_snap;
mod select_marks;
mod snapping;
mod zone_drag;

pub(super) use zone_drag::ZoneWork;

use std::sync::Arc;

use egui::{Rect, Role, Sense, Ui, WidgetInfo};
use zonewright_geometry::{Shell, Side, solve::Headroom};
use zonewright_painter::{Camera, Colour, Faces, Look, Palette, Scene, Tints, with_egui};

use super::{
    command::Command,
    frames::Detail,
    guide,
    panels::Cx,
    panes::{Layout, PaneAct},
    state::State,
    view::ViewState,
    widgets::Widgets,
};

pub(super) use select_marks::{dimension_text, measured};

/// The accessible name of the picture.
pub const NAME: &str = "Picture of the shell";

/// Space between two panes, in points.
const GAP: f32 = 6.0;

/// What a picture was put together from: an equal key means an equal picture.
#[derive(Clone, PartialEq, Debug)]
pub(super) struct Key {
    revision: u64,
    scene: u64,
    camera: Camera,
    view: ViewState,
    over: Option<(Side, usize)>,
    detail: Detail,
    headroom: Vec<Headroom>,
    /// The frame of the animation that plays.
    played: Option<usize>,
}

/// Colours of the picture: those of the painter, with the window's own for what belongs to the window.
#[must_use]
pub(super) fn palette(state: &State) -> Palette {
    let palette = if state.view.dark {
        Palette::dark()
    } else {
        Palette::light()
    };
    let own = |colour: egui::Color32| {
        let [r, g, b, a] = colour.to_array();
        Colour { r, g, b, a }
    };
    Palette {
        background: own(state.colours().picture()),
        mark: own(state.colours().handle()),
        preview: own(state.colours().preview()),
        ..palette
    }
}

/// Draws the bar above the pictures, and the pictures.
pub(super) fn picture_ui(cx: Cx<'_>, ui: &mut Ui, widgets: &mut Widgets) {
    bar::bar_ui(cx, ui);
    let size = ui.available_size().max(egui::vec2(50.0, 50.0));
    let (whole, _) = ui.allocate_exact_size(size, Sense::hover());
    widgets.over_pane = None;
    widgets.over_thing = None;
    widgets.zones.over = None;
    let layout = cx.state.panes.layout;
    for (at, rect) in places(layout, whole, GAP).into_iter().enumerate() {
        pane_ui(cx, ui, at, rect, widgets);
        bar::pane_bar_ui(cx, ui, at, rect);
        if at == 0 && cx.state.derived.shell.panels.is_empty() {
            empty_ui(cx, ui, rect);
        }
        overlay::overlay_ui(cx, ui, at, rect, &widgets.zones);
        if at == 0 {
            legend::legend_ui(cx, ui, rect);
        }
    }
}

/// Where the shown panes stand. Drawings stand on the left; a front is under its plan and a side beside its front, so that
/// the same point is in the same column or row.
fn places(layout: Layout, whole: Rect, gap: f32) -> Vec<Rect> {
    let halves = |r: Rect, share: f32| {
        let (left, right) = r.split_left_right_at_fraction(share);
        (
            left.with_max_x(left.max.x - gap * 0.5),
            right.with_min_x(right.min.x + gap * 0.5),
        )
    };
    let stacked = |r: Rect| {
        let (top, bottom) = r.split_top_bottom_at_fraction(0.5);
        (
            top.with_max_y(top.max.y - gap * 0.5),
            bottom.with_min_y(bottom.min.y + gap * 0.5),
        )
    };
    match layout {
        Layout::One => vec![whole],
        Layout::Two => {
            let (left, right) = halves(whole, 0.5);
            vec![right, left]
        }
        Layout::Three => {
            let (left, right) = halves(whole, 0.42);
            let (top, bottom) = stacked(left);
            vec![right, top, bottom]
        }
        Layout::Four => {
            let (top, bottom) = stacked(whole);
            let ((plan, free), (front, side)) = (halves(top, 0.5), halves(bottom, 0.5));
            vec![free, plan, front, side]
        }
    }
}

/// Draws one pane.
fn pane_ui(cx: Cx<'_>, ui: &Ui, at: usize, rect: Rect, widgets: &mut Widgets) {
    let panes = &cx.state.panes;
    let response = ui.interact(rect, ui.scope_id().with(("pane", at)), Sense::click_and_drag());
    if panes.pane(at).camera.size != [rect.width(), rect.height()] {
        cx.tx.send(Command::Pane(PaneAct::Resize(at, rect.size())));
    }
    let panels = cx.state.derived.totals.panels;
    let name = panes.name(at);
    response.widget_info(|| WidgetInfo::labeled(Role::Canvas, true, &name));
    ui.ctx()
        .accesskit_node_builder(response.id, |node| node.set_value(format!("{panels} panels")));
    let seen = input::Seen {
        at,
        rect,
        response: &response,
    };
    input::handle(cx, ui, seen, widgets);
    if let Some(said) = overlay::said(cx.state, at, &widgets.zones) {
        ui.ctx()
            .accesskit_node_builder(response.id, |node| node.set_description(said));
    }
    put_together(cx, at, widgets);
    let painter = ui.painter_at(rect);
    let cache = &mut widgets.cache[at];
    let corner = rect.min.to_vec2();
    if cache.mesh.0 != Some(corner) {
        cache.mesh.0 = Some(corner);
        with_egui::mesh_into(&cache.picture, corner, Arc::make_mut(&mut cache.mesh.1));
    }
    with_egui::paint_with(&cache.picture, &cache.mesh.1, &painter, rect);
    hover_ui(cx, at, rect, &painter, widgets);
    if panes.layout != Layout::One && panes.active() == at {
        let edge = egui::Stroke::new(1.5, cx.state.colours().accent());
        painter.rect_stroke(rect, 0.0, edge, egui::StrokeKind::Inside);
    }
}

/// Draws what a click would pick over the picture, which is not put together anew for it.
fn hover_ui(cx: Cx<'_>, at: usize, rect: Rect, painter: &egui::Painter, widgets: &Widgets) {
    let over = widgets.over_thing.as_ref().filter(|(pane, _)| *pane == at);
    let Some((_, thing)) = over else { return };
    let mut marks = Vec::new();
    select_marks::hover_marks(cx.state, thing, &mut marks);
    let look = Look {
        palette: palette(cx.state),
        ..Look::default()
    };
    let nothing = Shell::default();
    let camera = &cx.state.panes.pane(at).camera;
    let picture = Scene::quick(&nothing).picture(&nothing, camera, &look, &Tints::default(), &marks);
    // Without the ground that a whole picture has: it would cover what is there.
    let mesh = with_egui::mesh(&picture, rect.min.to_vec2());
    painter.add(egui::Shape::mesh(mesh));
}

fn put_together(cx: Cx<'_>, at: usize, widgets: &mut Widgets) {
    let state = cx.state;
    let camera = state.panes.pane(at).camera;
    let key = Key {
        revision: state.derived.revision,
        scene: state.derived.scene_revision,
        camera,
        view: state.view.clone(),
        over: widgets.over,
        detail: widgets.frames.detail(),
        headroom: headroom_marks::wanted(state),
        played: state.animating.playing.as_ref().map(|p| p.at().0),
    };
    if widgets.cache[at].key.as_ref() == Some(&key) {
        return;
    }
    let derived = &state.derived;
    let uncrossed = derived.inspection.as_ref().is_some_and(|i| i.crossings.is_empty());
    let look = Look {
        faces: state.view.faces,
        // The triangles that reach a driver in software are what costs, and two of three belong to edges.
        only_rims: key.detail == Detail::Rims && state.view.faces != Faces::Wireframe,
        hidden_edges: state.view.hidden_edges,
        colour: state.view.colour,
        palette: palette(state),
        cull: uncrossed,
        ..Look::default()
    };
    if let Some(playing) = &state.animating.playing {
        let cache = &mut widgets.cache[at];
        let (shell, tints) = (&playing.shell, Tints::default());
        playing
            .scene
            .picture_into(shell, &camera, &look, &tints, &[], &mut cache.picture);
        cache.key = Some(key);
        cache.mesh.0 = None;
        widgets.pictures += 1;
        return;
    }
    let shares = derived.backdrop.shares(state.view.without_sign);
    let tints = Tints {
        family: Some(&derived.families),
        finding: Some(&derived.levels),
        distance: Some(&shares),
        ..Tints::default()
    };
    let mut marks = marks::marks(state, widgets.over);
    backdrop::marks(state, &mut marks);
    let cache = &mut widgets.cache[at];
    derived
        .scene
        .picture_into(&derived.shell, &camera, &look, &tints, &marks, &mut cache.picture);
    backdrop::add(state, &camera, &look, &mut cache.picture);
    cache.key = Some(key);
    cache.mesh.0 = None;
    widgets.pictures += 1;
}

/// What an empty picture says.
fn empty_ui(cx: Cx<'_>, ui: &mut Ui, rect: Rect) {
    const LINES: [&str; 4] = [
        "Choose a start on the left and give its parameters.",
        "Add a course to fill every open V at once.",
        "Click an open V in the strip below to splice there.",
        "The findings on the right say what stands in the way.",
    ];
    let guided = cx.state.guide.going.is_some();
    // The card of the first shell says what to do, while there is one.
    let lines: &[&str] = if guided { &[] } else { &LINES };
    let step = ui.text_style_height(&egui::TextStyle::Body) + ui.spacing().item_spacing.y;
    // At the foot, so that the path in the middle stays to be seen.
    let above = rect.height() - step * (lines.len() as f32 + if guided { 1.5 } else { 3.5 });
    let room = Rect::from_min_max(egui::pos2(rect.left() + 16.0, rect.top() + above.max(36.0)), rect.max);
    let builder = egui::UiBuilder::new()
        .max_rect(room.with_max_x(rect.right() - 16.0))
        .id_salt("empty");
    ui.scope_builder(builder, |ui| {
        // A text that can be selected would take the drags that turn the picture.
        ui.style_mut().interaction.selectable_labels = false;
        ui.vertical_centered(|ui| {
            ui.label("Nothing has grown yet.");
            for line in lines {
                ui.weak(*line);
            }
            if !guided {
                ui.add_space(ui.spacing().item_spacing.y);
                guide::offer_ui(cx, ui);
            }
        });
    });
}
