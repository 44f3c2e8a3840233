//! The record of a shape: what is kept, edited, saved and replayed.

mod names;
mod shape;
mod step;

pub use names::{LetterName, Maker, PanelName, Sign, StepId, VName, ZoneRef};
pub use shape::{Outside, Placement, Shape, Tolerances, ZoneRule, ZoneVector};
pub use step::{Act, Courses, Direction, Finish, FinishAct, RoleRule, Side, Spurs, Step, Vs};
