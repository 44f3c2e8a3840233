//! Growing a part of a record, and splitting a step that lays courses.

use super::{grow_lifted, replay};
use crate::{Act, Code, Courses, Place, Shape, Step, shell::Grown};

/// How far a record is replayed: so many whole steps, and of the next one so many passes, where it lays courses.
#[derive(Clone, Copy, PartialEq, Eq, PartialOrd, Ord, Hash, Debug, Default)]
pub struct Stage {
    /// Steps that are taken whole, whether they are on or off.
    pub steps: usize,
    /// Passes of the step after them; see [`crate::Course::pass`].
    pub passes: u32,
}

impl Stage {
    /// The first steps, taken whole.
    #[must_use]
    pub const fn after(steps: usize) -> Self {
        Self { steps, passes: 0 }
    }
}

impl Shape {
    /// The shape with the growing steps only up to a stage. Everything else stays, finishing steps included.
    #[must_use]
    pub fn up_to(&self, stage: Stage) -> Self {
        let mut part = self.clone();
        let next = self.steps.get(stage.steps);
        part.steps.truncate(stage.steps);
        if let Some(next) = next
            && let Act::Lay { courses, spurs } = next.act
            && 0 < stage.passes
        {
            let passes = match courses {
                Courses::Count(count) => count.min(stage.passes),
                Courses::UntilStill => stage.passes,
            };
            let act = Act::Lay {
                courses: Courses::Count(passes),
                spurs,
            };
            part.steps.push(Step { act, ..next.clone() });
        }
        part
    }
}

/// Grows a shape up to a stage. `lift` in millimetres is [`crate::Shell::lift_mm`] of the whole: with it a grounded start
/// stands where it stands in the whole; without it, on z = 0.
///
/// A finishing step whose panels have not grown yet is not reported.
#[must_use]
pub fn grow_part(shape: &Shape, stage: Stage, lift: Option<f64>) -> Grown {
    let part = shape.up_to(stage);
    let (shell, mut findings) = grow_lifted(&part, usize::MAX, lift);
    let finishing = |place: &Place| matches!(place, Place::Step(id) if shape.finish.iter().any(|f| f.id == *id));
    findings.retain(|f| f.code != Code::NameLost || !finishing(&f.place));
    (shell, findings)
}

/// The shape with the laying step at `at` split in two after so many passes. The shell stays what it was, and so do all
/// names: the first part keeps the step's number, the second one has a new number.
///
/// None when there is no such step, or nothing to split it into.
#[must_use]
pub fn split_lay(shape: &Shape, at: usize, passes: u32) -> Option<Shape> {
    let step = shape.steps.get(at)?;
    let Act::Lay { courses, spurs } = step.act else {
        return None;
    };
    let rest = match courses {
        Courses::Count(count) => Courses::Count(count.checked_sub(passes).filter(|rest| 0 < *rest)?),
        Courses::UntilStill => {
            let mut findings = Vec::new();
            let made = replay(shape, at + 1, &mut findings).map(|r| r.growing.mesh.taking);
            let made = made.ok().filter(|(id, _)| *id == step.id).map_or(0, |(_, made)| made);
            let never = findings
                .iter()
                .any(|f| f.code == Code::NeverStill && f.place == Place::Step(step.id));
            // A front that never falls still was stopped at a count of meetings; two steps would count anew.
            if never {
                Courses::Count(made.checked_sub(passes).filter(|rest| 0 < *rest)?)
            } else {
                Courses::UntilStill
            }
        }
    };
    if passes == 0 {
        return None;
    }
    let mut split = shape.clone();
    split.steps[at].act = Act::Lay {
        courses: Courses::Count(passes),
        spurs,
    };
    let second = Step {
        id: shape.next_step_id(),
        name: None,
        act: Act::Lay { courses: rest, spurs },
        ..step.clone()
    };
    split.steps.insert(at + 1, second);
    Some(split)
}
