//! The panes' cameras: turned, moved, fitted, and fitted again when the shell has another size.

use zonewright_painter::{Bounds, View};

use crate::window::{
    derived::Pending,
    panes::{PaneAct, Wait},
    state::State,
};

/// Carries out what is done to panes.
pub(super) fn run(state: &mut State, act: PaneAct) {
    match act {
        PaneAct::LayOut(layout) => state.panes.lay_out(layout),
        PaneAct::Activate(at) => state.panes.activate(at),
        PaneAct::Next => {
            let shown = state.panes.layout.shown();
            state.panes.activate((state.panes.active() + 1) % shown);
            state.panes.focus += 1;
        }
        PaneAct::Resize(at, size) => {
            let bounds = bounds(state);
            let pane = state.panes.pane_mut(at);
            pane.camera.resize([size.x, size.y]);
            if pane.wait == Wait::Fit
                && let Some(bounds) = bounds
            {
                pane.wait = Wait::No;
                if !pane.moved {
                    pane.fit(&bounds);
                }
            }
            fit_when_pending(state);
        }
        PaneAct::Free => look(state, View::Fit, true),
    }
}

/// Turns the active pane: it is no named view any more.
pub(super) fn orbit(state: &mut State, by: egui::Vec2) {
    let pane = state.panes.active_mut();
    pane.camera.orbit(by.x, by.y);
    pane.view = None;
    pane.moved = true;
}

/// Moves the active pane along.
pub(super) fn pan(state: &mut State, by: egui::Vec2) {
    let pane = state.panes.active_mut();
    pane.camera.pan(by.x, by.y);
    pane.moved = true;
}

/// Zooms the active pane.
pub(super) fn zoom(state: &mut State, at: egui::Pos2, factor: f32) {
    let pane = state.panes.active_mut();
    pane.camera.zoom_at([at.x, at.y], factor);
    pane.moved = true;
}

/// Looks from a side in the active pane. `Fit` keeps the direction, unless the free view is asked for.
pub(super) fn look(state: &mut State, to: View, anew: bool) {
    let Some(bounds) = bounds(state) else { return };
    let pane = state.panes.active_mut();
    if to == View::Fit && !anew {
        pane.fit(&bounds);
    } else {
        pane.look(Some(to), &bounds);
    }
}

/// What the pictures are fitted to.
fn bounds(state: &State) -> Option<Bounds> {
    let path = state.derived.path.iter().flat_map(|p| p.placed.iter().copied());
    let shell = Bounds::of(&state.derived.shell).or_else(|| Bounds::of_points(path));
    let corners = [shell, state.derived.backdrop.bounds];
    Bounds::of_points(corners.iter().flatten().flat_map(Bounds::corners))
}

/// Looks and fits anew with each camera that waits for it, once there is something to fit it to and a picture to fit it into.
pub(crate) fn fit_when_pending(state: &mut State) {
    // What is shown may still be the design before.
    if state.derived.revision != state.history.revision() {
        return;
    }
    let Some(bounds) = bounds(state) else { return };
    for pane in state.panes.all_mut().filter(|p| p.camera.size[0] > 1.0) {
        if pane.wait == Wait::Fresh {
            pane.look(pane.view, &bounds);
        }
    }
}

/// Fits every camera again when the shell's box is another one and the user has left that camera alone. While something is
/// dragged, and for what it leaves behind, the cameras stay: a dragged point must stay under the pointer.
pub(crate) fn refit(state: &mut State, dragging: bool) {
    // A part of the shell is looked at from where the whole was: climbing must not move the picture.
    if state.view.ladder.climbed.is_some() || state.derived.pending() == Some(Pending::Shell) {
        return;
    }
    let bounds = bounds(state);
    for pane in state.panes.all_mut() {
        if pane.fitted == bounds {
            continue;
        }
        pane.fitted = bounds;
        if let Some(bounds) = bounds
            && !dragging
            && !pane.moved
        {
            pane.camera.fit(&bounds);
        }
    }
}
