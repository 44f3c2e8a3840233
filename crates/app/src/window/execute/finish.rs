//! Panels that are left out: the finishing steps.

use zonewright_geometry::{Finish, FinishAct, PanelName};

use crate::window::state::State;

/// Leaves a panel of the shell out: in the last finishing step, or in a new one.
pub(super) fn leave_out(state: &mut State, panel: u32) {
    let shell = &state.derived.shell;
    let fresh = state.derived.revision == state.history.revision();
    if !fresh || shell.panels.len() <= panel as usize {
        state.say("The shell has changed since: pick the panel again");
        return;
    }
    let name = shell.panel_name(panel);
    let id = state.shape().next_step_id();
    state.change("Leave a panel out", None, |design| {
        let finish = &mut design.shape.finish;
        // The names in a step are looked up in the shell that the steps before it leave. A step that is off leaves all as it is.
        match finish.iter_mut().rfind(|f| f.on).map(|f| &mut f.act) {
            Some(FinishAct::Drop(names)) => {
                let name = among(names, name);
                names.push(name);
            }
            None => finish.push(Finish {
                id,
                name: None,
                on: true,
                act: FinishAct::Drop(vec![name]),
            }),
        }
    });
    state.view.panel = None;
    state.view.finding = None;
    state.say("The panel is left out; the finishing steps list it");
}

/// The name that a panel of the shell has in the step that these names belong to: there, the panels that the step itself
/// leaves out are still counted.
fn among(names: &[PanelName], mut name: PanelName) -> PanelName {
    let (a, b) = &name.letters;
    let alike = |other: &&PanelName| {
        let (c, d) = &other.letters;
        other.side == name.side && ((a, b) == (c, d) || (a, b) == (d, c))
    };
    let mut turns: Vec<u32> = names.iter().filter(alike).map(|n| n.turn).collect();
    turns.sort_unstable();
    turns.dedup();
    for gone in turns {
        if gone <= name.turn {
            name.turn += 1;
        }
    }
    name
}

/// Replaces a finishing step: its name, or whether it is on.
pub(super) fn set(state: &mut State, at: usize, step: Finish) {
    if at < state.shape().finish.len() {
        let key = Some(format!("finish {}", step.id.0));
        state.change("Change a finishing step", key, |design| design.shape.finish[at] = step);
    }
}

/// Puts a panel back. A step that leaves nothing out any more goes with it.
pub(super) fn put_back(state: &mut State, at: usize, panel: usize) {
    let Some(FinishAct::Drop(names)) = state.shape().finish.get(at).map(|f| &f.act) else {
        return;
    };
    if names.len() <= panel {
        return;
    }
    state.change("Put a panel back", None, |design| {
        let finish = &mut design.shape.finish;
        let FinishAct::Drop(names) = &mut finish[at].act;
        names.remove(panel);
        if names.is_empty() {
            finish.remove(at);
        }
    });
    state.say("The panel is back");
}

/// Deletes a finishing step: all its panels are back.
pub(super) fn delete(state: &mut State, at: usize) {
    if at < state.shape().finish.len() {
        state.change("Delete a finishing step", None, |design| {
            design.shape.finish.remove(at);
        });
        state.say("The finishing step was deleted; undo brings it back");
    }
}

/// Keeps what is picked and measured after the shell has grown anew, as long as it is there.
pub(crate) fn keep_picked(state: &mut State) {
    let growth = state.derived.growth();
    if state.followed == growth {
        return;
    }
    state.followed = growth;
    let shell = &state.derived.shell;
    if let Some((panel, name)) = &mut state.view.panel {
        let stays = (*panel as usize) < shell.panels.len() && shell.panel_name(*panel) == *name;
        match shell.panel_named(name).filter(|_| !stays) {
            Some((found, _)) => (*panel, *name) = (found, shell.panel_name(found)),
            None if stays => {}
            None => state.view.panel = None,
        }
    }
    state.view.selection.follow(&state.derived);
}

#[cfg(test)]
mod tests {
    use zonewright_geometry::{LetterName, Side, Sign};

    use super::*;

    #[test]
    fn a_panel_is_counted_among_those_that_the_same_step_leaves_out() {
        let of = |turn| PanelName {
            side: Side::Fore,
            letters: (LetterName::of_start(0, Sign::Plus), LetterName::of_start(1, Sign::Plus)),
            turn,
        };
        // Of the panels 0, 1, 2, 3 the step leaves 0 and 2 out: what is first in the shell is 1, what is second is 3.
        let gone = [of(2), of(0)];
        assert_eq!(among(&gone, of(0)).turn, 1);
        assert_eq!(among(&gone, of(1)).turn, 3);
    }
}
