//! Solving for wanted figures.

use zonewright_geometry::{
    Shape,
    solve::{Figure, Free, Want, figure},
};
use zonewright_shop::figure_name;

use crate::window::{
    solving::{Answer, SearchDone, SolveAct},
    state::State,
};

/// Carries out what the search is told.
pub(super) fn run(state: &mut State, act: SolveAct) {
    match act {
        SolveAct::Add(figure) => add(state, figure),
        SolveAct::Set(row, want) => set(state, row, want),
        SolveAct::Remove(row) => {
            if row < state.solving.wants.len() {
                state.solving.wants.remove(row);
            }
        }
        SolveAct::Allow(free) => allow(state, free),
        SolveAct::Forbid(key) => state.solving.free.retain(|f| f.key != key),
        SolveAct::Run => begin(state),
        SolveAct::Stop => state.solving.stop(),
        SolveAct::TakeNearest => take_nearest(state),
    }
}

fn add(state: &mut State, which: Figure) {
    let now = figure(state.shape(), &state.derived.shell, which);
    state.solving.wants.push(Want {
        figure: which,
        value: now.unwrap_or(0.0),
        tolerance: which.usual_tolerance(),
    });
}

fn set(state: &mut State, row: usize, mut want: Want) {
    let Some(before) = state.solving.wants.get(row).copied() else {
        return;
    };
    // Another kind of figure begins with its present value.
    if core::mem::discriminant(&before.figure) != core::mem::discriminant(&want.figure) {
        let now = figure(state.shape(), &state.derived.shell, want.figure);
        want.value = now.unwrap_or(0.0);
        want.tolerance = want.figure.usual_tolerance();
    }
    state.solving.wants[row] = want;
}

fn allow(state: &mut State, free: Free) {
    let all = &mut state.solving.free;
    match all.iter_mut().find(|f| f.key == free.key) {
        Some(there) => *there = free,
        None => all.push(free),
    }
}

fn begin(state: &mut State) {
    if state.solving.wants.is_empty() {
        state.say("No figure is wanted yet: add one under Solve for");
        return;
    }
    if state.solving.free_in(state.shape()).is_empty() {
        state.say("Nothing may change yet: tick parameters under Solve for");
        return;
    }
    let shape = state.shape().clone();
    let revision = state.history.revision();
    state.worker.solving.request(state.solving.begin(&shape, revision));
    state.say("Searching…");
}

/// Takes the answer of a search that has ended; a solution changes the design, as one undo step.
pub(crate) fn follow_search(state: &mut State) {
    let Some(SearchDone { revision, result }) = state.worker.solving.poll() else {
        return;
    };
    state.solving.ended();
    if revision != state.history.revision() {
        state.say("The design has changed since the search began; solve again");
        return;
    }
    match &result {
        Ok(found) if found.shape == *state.shape() => state.say("All figures are as wanted already"),
        Ok(found) => take(state, found.shape.clone(), "Solve for"),
        Err(_) => state.say("No solution: see Solve for"),
    }
    state.solving.answer = Some(Answer {
        revision: state.history.revision(),
        result,
        nearest_taken: false,
    });
}

fn take_nearest(state: &mut State) {
    let Some(mut answer) = state.solving.answer_at(state.history.revision()).cloned() else {
        state.say("There is no nearest to take: the design has changed since");
        return;
    };
    if let Err(failed) = &answer.result
        && let Some(nearest) = &failed.nearest
    {
        take(state, nearest.shape.clone(), "Take the nearest to");
        answer.nearest_taken = true;
        answer.revision = state.history.revision();
        state.solving.answer = Some(answer);
    }
}

fn take(state: &mut State, shape: Shape, what: &str) {
    let units = state.units();
    let wants = &state.solving.wants;
    let names: Vec<String> = wants
        .iter()
        .map(|w| figure_name(w.figure, units).to_lowercase())
        .collect();
    let label = format!("{what} {}", names.join(" and "));
    state.change(&label, None, |design| design.shape = shape);
    state.say(label);
}
