//! Places on the ladder: how far one has climbed.

use zonewright_geometry::{Act, Courses, Shape, Stage, StepId};

/// A place on the ladder. It names its step by number, so that it stays where it is when steps are moved.
#[derive(Clone, Copy, PartialEq, Eq, Hash, Debug)]
pub enum Climbed {
    /// Before the first step: the start alone.
    Start,
    /// A pass of a step that lays courses; see [`zonewright_geometry::Course::pass`].
    Course(StepId, u32),
    /// After a step.
    Step(StepId),
}

impl Climbed {
    /// How far the record is replayed up to here; none when the step is gone.
    #[must_use]
    pub fn stage(self, shape: &Shape) -> Option<Stage> {
        let of = |id: StepId| shape.steps.iter().position(|s| s.id == id);
        match self {
            Self::Start => Some(Stage::default()),
            Self::Step(id) => of(id).map(|at| Stage::after(at + 1)),
            Self::Course(id, pass) => {
                let at = of(id)?;
                Some(match shape.steps[at].act {
                    Act::Lay {
                        courses: Courses::Count(count),
                        ..
                    } if pass < count => Stage {
                        steps: at,
                        passes: pass,
                    },
                    Act::Lay {
                        courses: Courses::UntilStill,
                        ..
                    } => Stage {
                        steps: at,
                        passes: pass,
                    },
                    _ => Stage::after(at + 1),
                })
            }
        }
    }

    /// The step that it belongs to.
    #[must_use]
    pub const fn step(self) -> Option<StepId> {
        match self {
            Self::Start => None,
            Self::Course(id, _) | Self::Step(id) => Some(id),
        }
    }
}

/// What one sees of the ladder: not part of the design.
#[derive(Clone, Copy, PartialEq, Eq, Debug, Default)]
pub struct LadderView {
    /// How far one has climbed; none at the top, where the whole shell is shown.
    pub climbed: Option<Climbed>,
    /// The step whose card is open, growing or finishing.
    pub picked: Option<StepId>,
}
