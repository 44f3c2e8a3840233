//! The steps of the record.

use zonewright_geometry::{Act, Courses, Side, Spurs, Step, grow_until};

use crate::window::state::State;

/// How many courses a front has.
fn courses_on(state: &State, side: Side, steps: usize) -> u32 {
    let (shell, _) = grow_until(state.shape(), steps);
    let on_side = shell.courses.iter().filter(|c| (c.number < 0) == (side == Side::Aft));
    u32::try_from(on_side.count()).unwrap_or(u32::MAX)
}

/// The last step of the live front, when it lays courses and nothing was done to that front after it.
fn last_lay(state: &State) -> Option<(usize, Courses)> {
    let side = state.view.side;
    let (at, step) = state
        .shape()
        .steps
        .iter()
        .enumerate()
        .rev()
        .find(|(_, s)| s.side == side && s.on)?;
    match step.act {
        Act::Lay { courses, .. } => Some((at, courses)),
        _ => None,
    }
}

fn new_step(state: &State, act: Act) -> Step {
    Step {
        id: state.shape().next_step_id(),
        name: None,
        on: true,
        side: state.view.side,
        act,
    }
}

/// Lays one more course on the live front: in its last step, if that one counts courses, else in a new one.
pub(super) fn add_course(state: &mut State) {
    match last_lay(state) {
        Some((at, Courses::Count(count))) => set_courses(state, at, "Add a course", count.saturating_add(1)),
        Some((_, Courses::UntilStill)) => state.say("The front is laid until it is still: there is no V left to fill"),
        None => {
            let spurs = Spurs::default();
            let act = Act::Lay {
                courses: Courses::Count(1),
                spurs,
            };
            let step = new_step(state, act);
            state.change("Add a course", None, |design| design.shape.steps.push(step));
            state.say("A course was added");
        }
    }
}

/// Takes the last course of the live front away.
pub(super) fn remove_course(state: &mut State) {
    let Some((at, courses)) = last_lay(state) else {
        state.say("The last step of this front lays no course: delete it in the list of steps first");
        return;
    };
    let laid = match courses {
        Courses::Count(count) => count,
        Courses::UntilStill => {
            let side = state.view.side;
            courses_on(state, side, at + 1).saturating_sub(courses_on(state, side, at))
        }
    };
    if laid <= 1 {
        state.change("Remove a course", None, |design| {
            design.shape.steps.remove(at);
        });
        state.say("The step that laid the course was removed");
    } else {
        set_courses(state, at, "Remove a course", laid - 1);
    }
}

fn set_courses(state: &mut State, at: usize, label: &str, count: u32) {
    state.change(label, None, |design| {
        if let Act::Lay { courses, .. } = &mut design.shape.steps[at].act {
            *courses = Courses::Count(count);
        }
    });
    state.say(format!("Step {}: {count} courses", at + 1));
}

/// Lays the live front until it is still.
pub(super) fn lay_until_still(state: &mut State) {
    let until = Courses::UntilStill;
    match last_lay(state) {
        Some((at, _)) => state.change("Lay until still", None, |design| {
            if let Act::Lay { courses, .. } = &mut design.shape.steps[at].act {
                *courses = until;
            }
        }),
        None => {
            let spurs = Spurs::default();
            let step = new_step(state, Act::Lay { courses: until, spurs });
            state.change("Lay until still", None, |design| design.shape.steps.push(step));
        }
    }
    state.say("Laid until still");
}

/// Adds a step at the end; its number is given here.
pub(super) fn add(state: &mut State, mut step: Step) {
    step.id = state.shape().next_step_id();
    state.change("Add a step", None, |design| design.shape.steps.push(step));
}

/// Replaces a step.
pub(super) fn set(state: &mut State, at: usize, step: Step) {
    if state.shape().steps.len() <= at {
        return;
    }
    state.change("Change a step", Some(format!("step {}", step.id.0)), |design| {
        design.shape.steps[at] = step;
    });
}

/// Moves a step to another place.
pub(super) fn shift(state: &mut State, from: usize, to: usize) {
    let count = state.shape().steps.len();
    if from < count && to < count {
        state.change("Move a step", None, |design| {
            let step = design.shape.steps.remove(from);
            design.shape.steps.insert(to, step);
        });
    }
}

/// Deletes a step.
pub(super) fn delete(state: &mut State, at: usize) {
    if at < state.shape().steps.len() {
        state.change("Delete a step", None, |design| {
            design.shape.steps.remove(at);
        });
        state.say("The step was deleted; undo brings it back");
    }
}
