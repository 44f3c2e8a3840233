//! What can be done about a finding with one click, and what could be done next.

use zonewright_geometry::{Act, Code, Finding, Place, Side, Start, Step, StepId, grow::can_close};

use super::{command::Command, state::State};

/// Something to be done about a finding.
#[derive(Clone, Debug)]
pub(super) struct Remedy {
    /// What its button says.
    pub text: &'static str,
    /// What it does.
    pub command: Command,
}

const fn remedy(text: &'static str, command: Command) -> Remedy {
    Remedy { text, command }
}

/// How much farther than the gap found the rims may be that are joined: the figure is what was measured, and rounding must not undo it.
const BEYOND_THE_GAP: f64 = 1.001;

/// What can be done about a finding; none where only another form helps.
#[must_use]
pub(super) fn remedy_of(state: &State, finding: &Finding) -> Option<Remedy> {
    let step = |act| Command::AddStep(Box::new(new_step(state.view.side, act)));
    match finding.code {
        Code::ClosingGap => Some(match &state.shape().start {
            Start::Zigzag(_) => remedy("Share out the gap", Command::ShareGap),
            _ => remedy("Turn into free points", Command::FreePoints),
        }),
        Code::DoubledPanel => spare(&finding.place).map(|panel| remedy("Leave one out", Command::LeaveOut(panel))),
        Code::CrowdedEdge => {
            beyond_two(state, &finding.place).map(|panel| remedy("Leave one out", Command::LeaveOut(panel)))
        }
        Code::NearMiss => finding.figure.map(|gap| {
            let within_mm = gap * BEYOND_THE_GAP;
            remedy("Join the rims", step(Act::JoinRims { within_mm }))
        }),
        Code::InsideOut => Some(remedy("Flip the outside", Command::FlipOutside)),
        Code::NoPanels => Some(remedy("Add a course", Command::AddCourse)),
        Code::Pinch => Some(remedy("Add a course", Command::AddCourse)),
        Code::StepFoundNothing | Code::NameLost | Code::VChanged | Code::RimNotBalanced | Code::RimClosedCrossing => {
            switched_off(state, &finding.place).map(|off| remedy("Switch the step off", off))
        }
        _ => None,
    }
}

/// What could be done next on the live front, although nothing is wrong with it.
#[must_use]
pub(super) fn next_steps(state: &State) -> Vec<Remedy> {
    let side = state.view.side;
    let step = |act| Command::AddStep(Box::new(new_step(side, act)));
    let mut next = Vec::new();
    let vs = state.derived.open_on(side);
    if vs.iter().any(|v| v.degenerate) {
        next.push(remedy("Retract the spurs", step(Act::Retract)));
    }
    let still = vs.iter().all(|v| v.degenerate);
    if still && can_close(&state.derived.shell, side) {
        next.push(remedy("Close the rim", step(Act::CloseRim)));
    }
    next
}

fn new_step(side: Side, act: Act) -> Step {
    Step {
        // The executor gives the number.
        id: StepId(0),
        name: None,
        on: true,
        side,
        act,
    }
}

/// The step that a finding is about, switched off.
fn switched_off(state: &State, place: &Place) -> Option<Command> {
    let Place::Step(id) = place else { return None };
    let shape = state.shape();
    if let Some((at, step)) = shape.steps.iter().enumerate().find(|(_, s)| s.id == *id && s.on) {
        let step = Step {
            on: false,
            ..step.clone()
        };
        return Some(Command::SetStep(at, Box::new(step)));
    }
    let (at, step) = shape.finish.iter().enumerate().find(|(_, s)| s.id == *id && s.on)?;
    let mut step = step.clone();
    step.on = false;
    Some(Command::SetFinish(at, Box::new(step)))
}

/// The panel to leave out of two that lie on the same place: the later one.
fn spare(place: &Place) -> Option<u32> {
    match place {
        Place::Panels(panels) => match panels[..] {
            [_, later] => Some(later),
            _ => None,
        },
        _ => None,
    }
}

/// The latest panel at an edge where more than two meet.
fn beyond_two(state: &State, place: &Place) -> Option<u32> {
    let Place::Edges(edges) = place else { return None };
    let crowded = &state.derived.shell.crowded;
    let at = crowded.iter().find(|c| edges.contains(&c.edge))?;
    at.more.iter().copied().max()
}
