//! Climbing the ladder, and what is done there.

use zonewright_geometry::{
    Act, Direction, LetterName, Maker, RoleRule, Shape, Stage, Step, StepId, Vs, ZoneRef, grow_until,
};

use super::{splice, steps};
use crate::window::{
    ladder::{Climbed, LadderAct},
    state::State,
};

/// Carries out a command about the ladder.
pub(super) fn run(state: &mut State, act: LadderAct) {
    match act {
        LadderAct::Climb(to) => climb(state, to),
        LadderAct::Up | LadderAct::Down => {
            let up = act == LadderAct::Up;
            let to = state.derived.ladder.next_stop(state.view.ladder.climbed, up);
            climb(state, to);
        }
        LadderAct::Foot => climb(state, Some(Climbed::Start)),
        LadderAct::Pick(step) => state.view.ladder.picked = step,
        LadderAct::Add(place, act) => {
            let step = Step {
                id: StepId(0),
                name: None,
                on: true,
                side: state.view.side,
                act: *act,
            };
            let id = steps::insert(state, place, vec![step], "Add a step");
            state.view.ladder.picked = id;
            state.say("A step was added; its card is on the left");
        }
        LadderAct::Mend(id) => mend(state, id),
    }
}

fn climb(state: &mut State, to: Option<Climbed>) {
    let to = to.filter(|place| !state.derived.ladder.is_top(*place));
    if state.view.ladder.climbed != to {
        // Findings are those of what is shown.
        state.view.finding = None;
    }
    state.view.ladder.climbed = to;
    // The live front is the one that was worked on there.
    let shape = state.shape();
    let step = to.and_then(Climbed::step);
    if let Some(step) = shape.steps.iter().find(|s| Some(s.id) == step) {
        state.view.side = step.side;
    }
}

/// Goes back to the top when the place that one had climbed to is gone, or is the top now.
pub(crate) fn keep_climbed(state: &mut State) {
    let shape = state.shape();
    let end = Stage::after(shape.steps.len());
    let stays = |place: &Climbed| place.stage(shape).is_some_and(|stage| stage != end);
    let there = |id: &StepId| shape.steps.iter().any(|s| s.id == *id) || shape.finish.iter().any(|f| f.id == *id);
    let mut ladder = state.view.ladder;
    ladder.climbed = ladder.climbed.filter(stays);
    ladder.picked = ladder.picked.filter(there);
    state.view.ladder = ladder;
}

/// Keeps of what a step names only what is there when the step comes, as it is now.
fn mend(state: &mut State, id: StepId) {
    let Some(at) = state.shape().steps.iter().position(|s| s.id == id) else {
        return;
    };
    let mended = mended(state.shape(), at);
    let nothing_left = match &mended.act {
        Act::Splice { at: vs, directions } => directions.is_empty() || *vs == Vs::Picked(Vec::new()),
        Act::Fill { at: vs } | Act::Cross { at: vs } => *vs == Vs::Picked(Vec::new()),
        Act::SetRoles(RoleRule::Flip(letters)) => letters.is_empty(),
        _ => false,
    };
    if nothing_left {
        state.say("Nothing that the step names is there any more: pick anew, switch it off, or delete it");
        return;
    }
    state.change("Keep what is found", None, |design| design.shape.steps[at] = mended);
    state.say("The step names only what is there now");
}

fn mended(shape: &Shape, at: usize) -> Step {
    let mut step = shape.steps[at].clone();
    let (shell, _) = grow_until(shape, at);
    let open = splice::v_names(shape, step.side, at);
    // An edit may turn a letter of the first word round, and with it its sign.
    let same =
        |a: &LetterName, b: &LetterName| a.maker == Maker::Start && b.maker == Maker::Start && a.index == b.index;
    if let Act::Splice { at: vs, .. } | Act::Fill { at: vs } | Act::Cross { at: vs } = &mut step.act {
        match vs {
            Vs::Picked(names) => {
                let found = |zig: &LetterName| open.iter().find(|v| v.zig == *zig || same(&v.zig, zig)).cloned();
                *names = names.iter().filter_map(|v| found(&v.zig)).collect();
            }
            // The letter that is counted from is gone: the count begins at the first open V.
            Vs::EveryKth { from, .. } => {
                let there = open.iter().any(|v| v.zig == *from);
                if let Some(first) = open.first().filter(|_| !there) {
                    *from = first.zig.clone();
                }
            }
            Vs::All => {}
        }
    }
    if let Act::Splice { directions, .. } = &mut step.act {
        let zone = |name: &ZoneRef| shell.zones.iter().any(|z| z.name == *name);
        directions.retain(|d| match d {
            Direction::Zone(name) | Direction::Against(name) => zone(name),
            Direction::Own(_) | Direction::Between => true,
        });
    }
    if let Act::SetRoles(RoleRule::Flip(letters)) = &mut step.act {
        let count = u32::try_from(shell.letters.len()).unwrap_or(u32::MAX);
        let there: Vec<LetterName> = (0..count).map(|l| shell.letter_name(l)).collect();
        letters.retain(|l| there.contains(l));
    }
    step
}
