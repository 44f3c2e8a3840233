//! The picture of the shell in the middle of the window.

mod bar;
mod hit;
mod input;
mod marks;

use egui::{Role, Sense, Ui, WidgetInfo};
use zonewright_geometry::{Point, Side};
use zonewright_painter::{Bounds, Camera, Colour, Faces, Look, Palette, Projection, Tints, View, with_egui};

use super::{command::Command, panels::Cx, state::State, view::ViewState, widgets::Widgets};

/// The accessible name of the picture.
pub const NAME: &str = "Picture of the shell";

/// What a picture was put together from: an equal key means an equal picture.
#[derive(Clone, PartialEq, Debug)]
pub(super) struct Key {
    revision: u64,
    scene: u64,
    camera: Camera,
    view: ViewState,
    over: Option<(Side, usize)>,
    light: bool,
}

/// Beyond this many panels edges are left out while the picture is dragged: the triangles that reach software OpenGL are what
/// costs (a probe of 10,000 panels took 29 ms a frame filled, 93 ms with four edge strips each).
const LIGHT_BEYOND: usize = 8000;

/// The camera before there is anything to look at.
#[must_use]
pub(super) fn first_camera(projection: Projection) -> Camera {
    let bounds = Bounds {
        min: Point::new(-1000.0, -1000.0, -1000.0),
        max: Point::new(1000.0, 1000.0, 1000.0),
    };
    Camera::view(View::Fit, projection, &bounds, [1.0, 1.0])
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

/// Draws the bar above the picture, and the picture.
pub(super) fn picture_ui(cx: Cx<'_>, ui: &mut Ui, widgets: &mut Widgets) {
    bar::bar_ui(cx, ui);
    let size = ui.available_size().max(egui::vec2(50.0, 50.0));
    let (rect, response) = ui.allocate_exact_size(size, Sense::click_and_drag());
    if cx.state.camera.size != [size.x, size.y] {
        cx.tx.send(Command::Resize(size));
    }
    let panels = cx.state.derived.totals.panels;
    response.widget_info(|| WidgetInfo::labeled(Role::Canvas, true, NAME));
    ui.ctx()
        .accesskit_node_builder(response.id, |node| node.set_value(format!("{panels} panels")));
    input::handle(cx, ui, rect, &response, widgets);
    put_together(cx, widgets);
    let painter = ui.painter_at(rect);
    painter.rect_filled(rect, 0.0, cx.state.colours().picture());
    with_egui::paint(&widgets.cache.picture, &painter, rect);
    if cx.state.derived.shell.panels.is_empty() {
        empty_ui(cx, ui, rect);
    }
}

fn put_together(cx: Cx<'_>, widgets: &mut Widgets) {
    let state = cx.state;
    let key = Key {
        revision: state.derived.revision,
        scene: state.derived.scene_revision,
        camera: state.camera,
        view: state.view.clone(),
        over: widgets.over,
        light: widgets.drag.is_some() && LIGHT_BEYOND < state.derived.totals.panels,
    };
    if widgets.cache.key.as_ref() == Some(&key) {
        return;
    }
    let derived = &state.derived;
    let uncrossed = derived.inspection.as_ref().is_some_and(|i| i.crossings.is_empty());
    let look = Look {
        faces: match state.view.faces {
            Faces::ShadedWithEdges if key.light => Faces::Shaded,
            faces => faces,
        },
        hidden_edges: state.view.hidden_edges,
        colour: state.view.colour,
        palette: palette(state),
        cull: uncrossed,
        ..Look::default()
    };
    let tints = Tints {
        family: Some(&derived.families),
        finding: Some(&derived.levels),
        ..Tints::default()
    };
    let marks = marks::marks(state, widgets.over);
    widgets.cache.picture = derived
        .scene
        .picture(&derived.shell, &state.camera, &look, &tints, &marks);
    widgets.cache.key = Some(key);
    widgets.pictures += 1;
}

/// What an empty picture says.
fn empty_ui(cx: Cx<'_>, ui: &mut Ui, rect: egui::Rect) {
    let lines = [
        "Nothing has grown yet.",
        "Choose a start on the left and give its parameters.",
        "Add a course to fill every open V at once.",
        "Click an open V in the strip below to splice there.",
        "The findings on the right say what stands in the way.",
    ];
    let step = cx.state.theme.sizes.text * 1.8;
    let top = rect.center().y - step * 2.0;
    for (at, line) in lines.into_iter().enumerate() {
        let pos = egui::pos2(rect.center().x, top + step * at as f32);
        let font = egui::TextStyle::Body.resolve(ui.style());
        let colour = if at == 0 {
            cx.state.colours().text()
        } else {
            cx.state.colours().text_weak()
        };
        ui.painter().text(pos, egui::Align2::CENTER_CENTER, line, font, colour);
    }
}
