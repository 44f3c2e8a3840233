//! Where one looks from, and everything else that is not part of the design.

use zonewright_geometry::Side;
use zonewright_painter::{Bounds, Camera, View};

use crate::window::{command::Command, state::State};

/// Carries out a command that leaves the design alone.
pub(super) fn run(state: &mut State, command: Command) {
    if matches!(command, Command::Orbit(_) | Command::Pan(_) | Command::Zoom(..)) {
        state.camera_moved = true;
    }
    let view = &mut state.view;
    match command {
        Command::Orbit(by) => state.camera.orbit(by.x, by.y),
        Command::Pan(by) => state.camera.pan(by.x, by.y),
        Command::Zoom(at, factor) => state.camera.zoom_at([at.x, at.y], factor),
        Command::Resize(size) => {
            state.camera.resize([size.x, size.y]);
            fit_when_pending(state);
        }
        Command::Look(to) => look(state, to),
        Command::SetProjection(projection) => {
            view.projection = projection;
            state.camera.projection = projection;
        }
        Command::SetFaces(faces) => view.faces = faces,
        Command::HiddenEdges => view.hidden_edges = !view.hidden_edges,
        Command::SetColour(colour) => view.colour = colour,
        Command::SetDragRule(rule) => view.rule = rule,
        Command::SetSide(side) => view.side = side,
        Command::SwapSide => {
            view.side = match view.side {
                Side::Fore => Side::Aft,
                Side::Aft => Side::Fore,
            };
        }
        Command::ShowFinding(finding) => view.finding = finding,
        Command::SelectPoint(point) => {
            view.point = point;
            view.panel = None;
        }
        Command::SelectPanel(panel) => {
            let shell = &state.derived.shell;
            view.point = None;
            view.panel = panel
                .filter(|p| (*p as usize) < shell.panels.len())
                .map(|p| (p, shell.panel_name(p)));
        }
        Command::SwapTheme => view.dark = !view.dark,
        Command::Find => state.search = Some(String::new()),
        Command::Dismiss => dismiss(state),
        _ => {}
    }
}

/// Closes what is open: the search first, then a question, then a message, then what is picked.
fn dismiss(state: &mut State) {
    if state.search.take().is_some() || state.waiting.take().is_some() || state.dialogs.close() {
        return;
    }
    if state.message.take().is_some() {
        return;
    }
    // One looks at the whole again before anything is let go.
    if state.view.ladder.climbed.take().is_none() {
        state.view.finding = None;
        state.view.point = None;
        state.view.panel = None;
        state.view.ladder.picked = None;
    }
}

fn bounds(state: &State) -> Option<Bounds> {
    let path = state.derived.path.iter().flat_map(|p| p.placed.iter().copied());
    Bounds::of(&state.derived.shell).or_else(|| Bounds::of_points(path))
}

fn look(state: &mut State, to: View) {
    let Some(bounds) = bounds(state) else { return };
    state.camera_moved = false;
    state.fitted = Some(bounds);
    if to == View::Fit {
        state.camera.fit(&bounds);
    } else {
        state.camera = Camera::view(to, state.view.projection, &bounds, state.camera.size);
    }
}

/// Fits the camera once there is something to fit it to and a picture to fit it into.
pub(crate) fn fit_when_pending(state: &mut State) {
    if state.fit_pending
        && state.camera.size[0] > 1.0
        && let Some(bounds) = bounds(state)
    {
        state.camera = Camera::view(View::Fit, state.view.projection, &bounds, state.camera.size);
        state.fit_pending = false;
        state.camera_moved = false;
        state.fitted = Some(bounds);
    }
}

/// Fits the camera again when the shell's box is another one and the user has left the camera alone. While something is
/// dragged, and for what it leaves behind, the camera stays: a dragged point must stay under the pointer.
pub(crate) fn refit(state: &mut State, dragging: bool) {
    // A part of the shell is looked at from where the whole was: climbing must not move the picture.
    if state.view.ladder.climbed.is_some() {
        return;
    }
    let bounds = bounds(state);
    if state.fitted == bounds {
        return;
    }
    state.fitted = bounds;
    if let Some(bounds) = bounds
        && !dragging
        && !state.camera_moved
    {
        state.camera.fit(&bounds);
    }
}
