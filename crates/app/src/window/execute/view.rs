//! Where one looks from, and everything else that is not part of the design.

use zonewright_geometry::Side;

use super::{guide, panes, select};
use crate::window::{
    command::Command,
    state::State,
    thing::{Kind, Thing},
};

/// Carries out a command that leaves the design alone.
pub(super) fn run(state: &mut State, command: Command) {
    let view = &mut state.view;
    match command {
        Command::Pane(act) => panes::run(state, act),
        Command::Orbit(by) => panes::orbit(state, by),
        Command::Pan(by) => panes::pan(state, by),
        Command::Zoom(at, factor) => panes::zoom(state, at, factor),
        Command::Look(to) => panes::look(state, to, false),
        Command::SetProjection(projection) => state.panes.active_mut().project(projection),
        Command::SetFaces(faces) => view.faces = faces,
        Command::HiddenEdges => view.hidden_edges = !view.hidden_edges,
        Command::SetColour(colour) => view.colour = colour,
        Command::SwapLegend => view.legend = !view.legend,
        Command::SetDragRule(rule) => view.rule = rule,
        Command::SetSide(side) => view.side = side,
        Command::SwapSide => {
            view.side = match view.side {
                Side::Fore => Side::Aft,
                Side::Aft => Side::Fore,
            };
        }
        Command::ShowFinding(finding) => {
            view.finding = finding;
            view.shown = None;
        }
        Command::SelectPoint(point) => {
            let thing = point.map(Thing::Point);
            select::take(state, thing);
        }
        Command::SelectPanel(panel) => {
            let thing = panel.and_then(|p| Kind::Panel.thing(&state.derived, p));
            select::take(state, thing);
        }
        Command::SwapTheme => {
            view.dark = !view.dark;
            let dark = view.dark;
            if let Err(error) = state.safe.remember(|session| session.dark = dark) {
                state.say(format!("{error}; the look will not be remembered"));
            }
        }
        Command::Find => state.search = Some(String::new()),
        Command::Dismiss => dismiss(state),
        _ => {}
    }
}

/// Closes what is open: a span that is being chosen and the search first, then a question, then a message, then the first shell, then a
/// measure that was begun, then what is picked.
fn dismiss(state: &mut State) {
    if state.animating.playing.take().is_some() {
        return state.say("The design is shown as it is");
    }
    if state.view.strip.span.take().is_some() {
        return;
    }
    if state.search.take().is_some()
        || state.safe.overwrite.take().is_some()
        || state.waiting.take().is_some()
        || state.dialogs.close()
    {
        return;
    }
    if state.message.take().is_some() {
        return;
    }
    if state.guide.going.is_some() {
        guide::leave(state);
        return;
    }
    // One looks at the whole again before anything is let go.
    if state.view.selection.from.take().is_none() && state.view.ladder.climbed.take().is_none() {
        state.view.finding = None;
        state.view.shown = None;
        state.view.point = None;
        state.view.panel = None;
        state.view.selection.part = None;
        state.view.ladder.picked = None;
    }
}
