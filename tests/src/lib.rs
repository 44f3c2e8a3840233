//! Whole designs in, every output compared: what the tests of this member share.
//!
//! Expected numbers are worked out here from edge vectors alone (determinants, cross products, convexity), never from a
//! grown shell.

pub mod closed_forms;
pub mod look;
pub mod polar_fixtures;
pub mod ray_cast;
pub mod zonohedron;

use zonewright_geometry::{
    Act, Courses, Finding, Level, Outside, Placement, Shape, Shell, Side, Spurs, Start, Step, StepId, Tolerances, grow,
};

/// Half a unit in the last of the ten decimals of a printed figure, and room for rounding.
pub const PRINTED: f64 = 6e-11;

/// Where both sides are computed, they may differ by this part of themselves: some hundred roundings.
pub const ROUNDING: f64 = 1e-12;

/// Whether two numbers differ by no more than this.
#[must_use]
pub fn near(actual: f64, expected: f64, within: f64) -> bool {
    (actual - expected).abs() <= within
}

/// Fails with both numbers unless they differ by no more than `within`; what comes behind is printed too.
#[macro_export]
macro_rules! assert_near {
    ($actual:expr, $expected:expr, $within:expr) => {
        $crate::assert_near!($actual, $expected, $within, "where it is asked")
    };
    ($actual:expr, $expected:expr, $within:expr, $($what:tt)+) => {{
        let (actual, expected): (f64, f64) = ($actual, $expected);
        assert!(
            $crate::near(actual, expected, $within),
            "{actual} is not {expected}: {}",
            format_args!($($what)+)
        );
    }};
}

/// A shape with these steps on the fore side, numbered from 1.
#[must_use]
pub fn shape(start: Start, acts: Vec<Act>) -> Shape {
    let acts = acts.into_iter().map(|act| (Side::Fore, act)).collect();
    two_sided(start, acts)
}

/// A shape with these steps, numbered from 1, each on its side.
#[must_use]
pub fn two_sided(start: Start, acts: Vec<(Side, Act)>) -> Shape {
    let step = |(id, (side, act)): (u32, (Side, Act))| Step {
        id: StepId(id),
        name: None,
        on: true,
        side,
        act,
    };
    Shape {
        start,
        zones: Vec::new(),
        steps: (1..).zip(acts).map(step).collect(),
        finish: Vec::new(),
        placement: Placement::default(),
        outside: Outside::Grown,
        tolerances: Tolerances::default(),
    }
}

/// Lay this many courses.
#[must_use]
pub const fn lay(count: u32, spurs: Spurs) -> Act {
    Act::Lay {
        courses: Courses::Count(count),
        spurs,
    }
}

/// Lay until the front is still.
#[must_use]
pub const fn until_still(spurs: Spurs) -> Act {
    Act::Lay {
        courses: Courses::UntilStill,
        spurs,
    }
}

/// The same shape with the outside that the rule of its start asks for.
#[must_use]
pub fn outside_out(mut shape: Shape) -> Shape {
    shape.outside = Outside::by_rule(&shape);
    shape
}

/// Grows a shape and holds what every shell must hold; nothing may say stop.
///
/// # Panics
/// When a finding says stop, or the shell breaks one of its rules.
#[must_use]
pub fn grown(shape: &Shape) -> Shell {
    let (shell, findings) = grow(shape);
    let stops: Vec<&Finding> = findings.iter().filter(|f| f.level() == Level::Stop).collect();
    assert!(stops.is_empty(), "{stops:?}");
    assert_eq!(shell.check(shape.tolerances.join_mm), Ok(()));
    shell
}
