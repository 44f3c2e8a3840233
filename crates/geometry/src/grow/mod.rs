//! Growing: the record is replayed.
//!
//! A front is a word of letters (zone, sign); filling an open V exchanges its two letters, which adds one vertex and one panel.
//! That is the whole algorithm (Elnitsky's correspondence between rhombic tilings and reduced words, JCTA 77 (1997)
//! 193-221): a grown front is a permutation of its word, so growth keeps the vector sum, the closure and the edges.

mod alphabet;
mod close_rim;
mod fans;
mod finish;
mod front;
mod join;
mod lay;
mod mesh;
mod outside;
mod part;
mod pick;
pub(crate) mod place;
mod rims;
mod roles;
mod seams;
mod splice;
#[cfg(test)]
mod tests;
mod unite;

use alphabet::Alphabet;
pub use alphabet::PARALLEL_SINE;
use front::Front;
pub use front::{can_close, open_vs};
use lay::Laid;
pub use mesh::MAX_PANELS;
use mesh::Mesh;
pub use part::{Stage, grow_part, split_lay};
pub use place::placed_vector;

use crate::{Act, Code, Courses, Finding, FirstWord, Place, Shape, Side, Spurs, Step, Unit, shell::Grown};

/// What a replay works on.
struct Growing<'a> {
    shape: &'a Shape,
    alphabet: Alphabet,
    mesh: Mesh,
    /// How many zones the start has: spliced ones come behind them.
    start_zones: u32,
    /// What filling on the hull keeps about each front from step to step.
    hull: [Option<close_rim::Hull>; 2],
    /// By how much a grounded start is lifted; none to put its own lowest vertex at z = 0.
    lift: Option<f64>,
}

/// Grows a shape: replays all its steps.
///
/// Never panics. What cannot be grown is refused with a finding of level stop, and an empty shell.
#[must_use]
pub fn grow(shape: &Shape) -> Grown {
    grow_until(shape, usize::MAX)
}

/// Grows a shape with only its first `steps` growing steps; the finishing steps still apply.
#[must_use]
pub fn grow_until(shape: &Shape, steps: usize) -> Grown {
    grow_lifted(shape, steps, None)
}

fn grow_lifted(shape: &Shape, steps: usize, lift: Option<f64>) -> Grown {
    let mut findings = Vec::new();
    match finished(shape, steps, lift, &mut findings) {
        Ok(shell) => {
            if shell.panels.is_empty() {
                findings.push(Finding::new(Code::NoPanels, Place::Design));
            }
            (shell, findings)
        }
        Err(refusal) => {
            findings.push(refusal);
            (crate::Shell::default(), findings)
        }
    }
}

fn finished(
    shape: &Shape,
    steps: usize,
    lift: Option<f64>,
    findings: &mut Vec<Finding>,
) -> Result<crate::Shell, Finding> {
    let Replayed {
        mut growing,
        fronts,
        word,
        closing_gap,
        join_mm,
    } = replay(shape, steps, findings)?;
    growing.lift = lift;
    finish::finish(growing, &fronts, &word, closing_gap, join_mm, findings)
}

/// A record whose growing steps are taken, and nothing more.
struct Replayed<'a> {
    growing: Growing<'a>,
    fronts: [Front; 2],
    word: FirstWord,
    closing_gap: Option<f64>,
    join_mm: f64,
}

fn replay<'a>(shape: &'a Shape, steps: usize, findings: &mut Vec<Finding>) -> Result<Replayed<'a>, Finding> {
    place::usable(&shape.placement)?;
    let word = shape.start.first_word()?;
    if word.letters.is_empty() {
        return Err(Finding::new(Code::EmptyWord, Place::Design));
    }
    let alphabet = Alphabet::of_start(&word, shape)?;
    let mesh = Mesh {
        reversed: (shape.outside == crate::Outside::Reversed) != shape.placement.mirrored,
        ..Mesh::default()
    };
    let start_zones = mesh::as_index(word.zones.len());
    let mut growing = Growing {
        shape,
        alphabet,
        mesh,
        start_zones,
        hull: [None, None],
        lift: None,
    };
    let closing_gap = closing_gap(&word, &growing.alphabet);
    let closes = closing_gap.is_some_and(|gap| gap <= shape.tolerances.join_mm);
    if let Some(gap) = closing_gap.filter(|_| !closes) {
        let limit = Some(shape.tolerances.join_mm);
        findings.push(Finding::new(Code::ClosingGap, Place::Design).with(gap, limit, Unit::Millimetres));
    }
    let mut fronts = Front::both(&word, closes, &growing.alphabet, &mut growing.mesh);
    let mut join_mm = shape.tolerances.join_mm;
    for step in shape.steps.iter().take(steps).filter(|s| s.on) {
        growing.mesh.taking = (step.id, 0);
        let front = &mut fronts[usize::from(step.side == Side::Aft)];
        if let Act::JoinRims { within_mm } = step.act {
            join_mm = join_mm.max(within_mm);
        } else {
            take_step(step, front, word.on_hull, &mut growing, findings)?;
        }
    }
    Ok(Replayed {
        growing,
        fronts,
        word,
        closing_gap,
        join_mm,
    })
}

/// By how much the word of a front that is meant to close misses; none when it is meant to be open.
fn closing_gap(word: &FirstWord, alphabet: &Alphabet) -> Option<f64> {
    let letters = 0..mesh::as_index(word.letters.len());
    let sum = letters.fold(crate::Vector::ZERO, |sum, letter| sum + alphabet.vector(letter));
    word.closed.then(|| sum.length())
}

fn take_step(
    step: &Step,
    front: &mut Front,
    on_hull: bool,
    growing: &mut Growing<'_>,
    findings: &mut Vec<Finding>,
) -> Result<(), Finding> {
    let place = || Place::Step(step.id);
    let note = |code: Code, count: usize, findings: &mut Vec<Finding>| {
        if 0 < count {
            findings.push(Finding::new(code, place()).with(count as f64, None, Unit::Count));
        }
    };
    let mut choose = |at: &crate::Vs, front: &Front, growing: &Growing<'_>| {
        let chosen = pick::choose(at, front, &growing.alphabet);
        note(Code::NameLost, chosen.lost, findings);
        note(Code::VChanged, chosen.changed, findings);
        chosen.at
    };
    let worked_on = match &step.act {
        Act::Lay { courses, spurs } => {
            let present = growing.mesh.panels.len();
            let before = front.slots.len();
            let laid = if on_hull {
                close_rim::fill_on_hull(front, *courses, growing)
            } else {
                lay(front, *courses, *spurs, growing)
            };
            match laid {
                Laid::Done => {}
                Laid::NeverStill => findings.push(Finding::new(Code::NeverStill, place())),
                Laid::TooMany => return Err(too_many(step, growing)),
            }
            (growing.mesh.panels.len() - present).max(before - front.slots.len())
        }
        Act::Fill { at } => {
            let chosen = choose(at, front, growing);
            front.fill(&chosen, &growing.alphabet, &mut growing.mesh)
        }
        Act::Cross { at } => {
            let chosen = choose(at, front, growing);
            front.cross(&chosen, &growing.alphabet, &mut growing.mesh)
        }
        Act::Retract => front.retract_all(&growing.alphabet, &mut growing.mesh, None),
        Act::Splice { at, directions } => {
            let chosen = choose(at, front, growing);
            let lost = splice::splice(front, &chosen, directions, step.id, growing)?;
            note(Code::NameLost, lost, findings);
            chosen.len().min(directions.len())
        }
        Act::SetRoles(rule) => {
            let lost = roles::set_roles(front, rule, &growing.alphabet);
            note(Code::NameLost, lost, findings);
            front.slots.len()
        }
        Act::CloseRim => match close_rim::close(front, growing) {
            Some(closed) => {
                note(Code::RimClosedCrossing, closed.crossings, findings);
                closed.panels.max(1)
            }
            None => {
                findings.push(Finding::new(Code::RimNotBalanced, place()));
                return Ok(());
            }
        },
        Act::JoinRims { .. } => 1,
    };
    if worked_on == 0 {
        findings.push(Finding::new(Code::StepFoundNothing, place()));
    }
    if MAX_PANELS < growing.mesh.panels.len() {
        return Err(too_many(step, growing));
    }
    Ok(())
}

fn lay(front: &mut Front, courses: Courses, spurs: Spurs, growing: &mut Growing<'_>) -> Laid {
    front.lay(courses, spurs, &growing.alphabet, &mut growing.mesh)
}

fn too_many(step: &Step, growing: &Growing<'_>) -> Finding {
    let limit = Some(MAX_PANELS as f64);
    Finding::new(Code::TooManyPanels, Place::Step(step.id)).with(growing.mesh.panels.len() as f64, limit, Unit::Count)
}
