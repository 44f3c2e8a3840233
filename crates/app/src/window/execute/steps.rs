//! The steps of the record.
//!
//! What is added or taken away stands where one has climbed to on the ladder; at the top that is the end of the record.

use zonewright_geometry::{Act, Courses, Shape, Side, Spurs, Stage, Step, StepId, grow_until, split_lay};

use crate::window::{ladder::Climbed, state::State};

/// How many courses a front has.
fn courses_on(shape: &Shape, side: Side, steps: usize) -> u32 {
    let (shell, _) = grow_until(shape, steps);
    let on_side = shell.courses.iter().filter(|c| (c.number < 0) == (side == Side::Aft));
    u32::try_from(on_side.count()).unwrap_or(u32::MAX)
}

/// The last step of the live front up to where one has climbed, when it lays courses and nothing was done to that front
/// after it: its place, how many courses it lays in all, and how many of them are shown where only some are.
fn last_lay(state: &State) -> Option<(usize, Courses, Option<u32>)> {
    let side = state.view.side;
    let shown = state.shown_shape();
    let mut shown = shown.steps.iter().enumerate().rev();
    let (at, step) = shown.find(|(_, s)| s.side == side && s.on)?;
    let (Act::Lay { courses: part, .. }, Act::Lay { courses, .. }) = (&step.act, &state.shape().steps[at].act) else {
        return None;
    };
    let cut = match part {
        Courses::Count(passes) if part != courses => Some(*passes),
        _ => None,
    };
    Some((at, *courses, cut))
}

/// Puts steps in at a place of the ladder; none is the top. A step that lays courses is split there. Gives the number of
/// the last one.
pub(super) fn insert(state: &mut State, place: Option<Climbed>, steps: Vec<Step>, label: &str) -> Option<StepId> {
    let shape = state.shape();
    let end = Stage::after(shape.steps.len());
    let stage = place.and_then(|p| p.stage(shape)).unwrap_or(end);
    let split = split_lay(shape, stage.steps, stage.passes);
    let at = stage.steps + usize::from(0 < stage.passes);
    let mut last = None;
    state.change(label, None, |design| {
        let shape = &mut design.shape;
        if let Some(split) = split {
            *shape = split;
        }
        for (at, step) in (at..).zip(steps) {
            let id = shape.next_step_id();
            shape.steps.insert(at, Step { id, ..step });
            last = Some(id);
        }
    });
    let ladder = &mut state.view.ladder;
    if ladder.climbed.is_some() {
        ladder.climbed = last.map(Climbed::Step).or(ladder.climbed);
    }
    last
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
        Some((at, Courses::Count(count), cut)) => {
            set_courses(state, at, "Add a course", count.saturating_add(1));
            show_passes(state, at, cut.map(|passes| passes.saturating_add(1)));
        }
        Some((_, Courses::UntilStill, _)) => {
            state.say("The front is laid until it is still: there is no V left to fill");
        }
        None => {
            let spurs = Spurs::default();
            let act = Act::Lay {
                courses: Courses::Count(1),
                spurs,
            };
            let step = new_step(state, act);
            insert(state, state.view.ladder.climbed, vec![step], "Add a course");
            state.say("A course was added");
        }
    }
}

/// Takes the last course of the live front away.
pub(super) fn remove_course(state: &mut State) {
    let Some((at, courses, cut)) = last_lay(state) else {
        state.say("The last step of this front lays no course: delete it on the ladder first");
        return;
    };
    let laid = match courses {
        Courses::Count(count) => count,
        Courses::UntilStill => {
            let (shape, side) = (state.shape(), state.view.side);
            courses_on(shape, side, at + 1).saturating_sub(courses_on(shape, side, at))
        }
    };
    if laid <= 1 {
        take_out(state, at, "Remove a course");
        state.say("The step that laid the course was removed");
    } else {
        set_courses(state, at, "Remove a course", laid - 1);
        show_passes(state, at, cut.map(|passes| passes - 1));
    }
}

/// Keeps showing so many passes of a step of which only a part was shown.
fn show_passes(state: &mut State, at: usize, passes: Option<u32>) {
    let Some(passes) = passes else { return };
    let id = state.shape().steps[at].id;
    let place = match passes {
        0 => before(state.shape(), at),
        passes => Climbed::Course(id, passes),
    };
    state.view.ladder.climbed = Some(place);
}

/// The place on the ladder before a step.
fn before(shape: &Shape, at: usize) -> Climbed {
    let step = at.checked_sub(1).map(|before| shape.steps[before].id);
    step.map_or(Climbed::Start, Climbed::Step)
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
        Some((at, ..)) => {
            state.change("Lay until still", None, |design| {
                if let Act::Lay { courses, .. } = &mut design.shape.steps[at].act {
                    *courses = until;
                }
            });
            let id = state.shape().steps[at].id;
            if state.view.ladder.climbed.is_some() {
                state.view.ladder.climbed = Some(Climbed::Step(id));
            }
        }
        None => {
            let spurs = Spurs::default();
            let step = new_step(state, Act::Lay { courses: until, spurs });
            insert(state, state.view.ladder.climbed, vec![step], "Lay until still");
        }
    }
    state.say("Laid until still");
}

/// Adds a step where one has climbed to; its number is given here. Its card is opened.
pub(super) fn add(state: &mut State, step: Step) {
    let id = insert(state, state.view.ladder.climbed, vec![step], "Add a step");
    state.view.ladder.picked = id;
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
    if from < count && to < count && from != to {
        state.change("Move a step", None, |design| {
            let step = design.shape.steps.remove(from);
            design.shape.steps.insert(to, step);
        });
        state.say(format!("Step {} is step {} now", from + 1, to + 1));
    }
}

/// Deletes a step.
pub(super) fn delete(state: &mut State, at: usize) {
    if at < state.shape().steps.len() {
        take_out(state, at, "Delete a step");
        state.say("The step was deleted; undo brings it back");
    }
}

/// Takes a step out of the record. Who had climbed to it stands before it now.
fn take_out(state: &mut State, at: usize, label: &str) {
    step_down(state, &[at]);
    state.change(label, None, |design| {
        design.shape.steps.remove(at);
    });
}

/// Before steps go: who had climbed to one of them stands before it then.
pub(super) fn step_down(state: &mut State, gone: &[usize]) {
    let shape = state.shape();
    let id = state.view.ladder.climbed.and_then(Climbed::step);
    let Some(mut at) = shape.steps.iter().position(|s| Some(s.id) == id) else {
        return;
    };
    if !gone.contains(&at) {
        return;
    }
    while 0 < at && gone.contains(&(at - 1)) {
        at -= 1;
    }
    state.view.ladder.climbed = Some(before(shape, at));
}
