//! Zones, fronts, steps, growing, the shell and its measures.
//!
//! Conventions: millimetres, radians, f64; right-handed with z up; panels counter-clockwise seen from outside; dihedral
//! angles measured inside, from 0 to a full turn. Nothing here reads or writes files, knows colours, formats numbers or starts threads.

pub mod ahead;
pub mod edit;
pub mod finding;
pub mod fit;
pub mod grow;
pub mod inspect;
pub mod measure;
pub mod parameter;
mod record;
mod shell;
mod shell_check;
pub mod snap;
pub mod solve;
mod space;
pub mod start;

pub use finding::{Code, Finding, Level, Place, Unit};
pub use grow::{Stage, grow, grow_part, grow_until, split_lay};
pub use parameter::{Parameter, ParameterKind, parameters, set_parameter};
pub use record::{
    Act, Courses, Direction, Finish, FinishAct, LetterName, Maker, Outside, PanelName, Placement, RoleRule, Shape,
    Side, Sign, Spurs, Step, StepId, Tolerances, VName, Vs, ZoneRef, ZoneRule, ZoneVector,
};
pub use shell::{
    Course, CrowdedEdge, Edge, FrontLetter, FrontState, Grown, Letter, NONE, OpenV, Panel, Pinch, Rim, Seam, Shell,
    Tee, Zone, ZoneKind,
};
pub use shell_check::Broken;
pub use space::{Angle, Point, Vector};
pub use start::{FirstWord, Role, Start, StartLetter, StartZone};
