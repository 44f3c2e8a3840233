//! New designs: the steps that each kind of start needs.

use zonewright_geometry::{
    Act, Courses, Finding, Outside, Placement, RoleRule, Shape, Side, Spurs, Step, StepId, Tolerances,
    start::{HelicalForm, Start},
};
use zonewright_shop::text::Units;

use super::Design;

/// A design of a start, laid for a number of courses, or until still.
///
/// A helical solid is laid round after round, each round beginning with the first letters made zig again; a star solid
/// is laid on both its fronts; every other kind on its fore front.
///
/// # Errors
/// The finding that says which parameter of the start cannot be used.
pub fn new_design(start: Start, courses: Option<u32>, spurs: Spurs) -> Result<Design, Finding> {
    // Before any step is made: the number of steps may follow from the parameters.
    start.first_word()?;
    let how_many = courses.map_or(Courses::UntilStill, Courses::Count);
    let steps = match &start {
        Start::Helical(form) => helical(form, courses, spurs),
        Start::StarSolid(_) => vec![lay(1, Side::Fore, how_many, spurs), lay(2, Side::Aft, how_many, spurs)],
        _ => vec![lay(1, Side::Fore, how_many, spurs)],
    };
    let mut shape = Shape {
        start,
        zones: Vec::new(),
        steps,
        finish: Vec::new(),
        placement: Placement::default(),
        outside: Outside::Grown,
        tolerances: Tolerances::default(),
    };
    shape.outside = Outside::by_rule(&shape);
    Ok(Design {
        name: String::new(),
        units: Units::Mm,
        shape,
        backdrop: None,
    })
}

/// Lay until still, make the first r letters zig again, and so on for n / gcd(n, r) rounds, after which the front is
/// the first front again. A round has n - 1 courses.
fn helical(form: &HelicalForm, courses: Option<u32>, spurs: Spurs) -> Vec<Step> {
    let rounds = form.ribs / gcd(form.ribs, form.turn).max(1);
    let per_round = form.ribs.saturating_sub(1).max(1);
    let mut left = courses.unwrap_or(u32::MAX);
    let mut steps = Vec::new();
    for round in 0..rounds {
        if left == 0 {
            break;
        }
        if round > 0 {
            let act = Act::SetRoles(RoleRule::FirstAreZig(form.turn));
            steps.push(step(next(&steps), Side::Fore, act));
        }
        let until = if left < per_round {
            Courses::Count(left)
        } else {
            Courses::UntilStill
        };
        steps.push(lay(next(&steps), Side::Fore, until, spurs));
        left = if courses.is_some() {
            left.saturating_sub(per_round)
        } else {
            left
        };
    }
    if steps.is_empty() {
        steps.push(lay(1, Side::Fore, Courses::Count(0), spurs));
    }
    steps
}

fn next(steps: &[Step]) -> u32 {
    steps.last().map_or(1, |last| last.id.0 + 1)
}

const fn lay(id: u32, side: Side, courses: Courses, spurs: Spurs) -> Step {
    step(id, side, Act::Lay { courses, spurs })
}

const fn step(id: u32, side: Side, act: Act) -> Step {
    Step {
        id: StepId(id),
        name: None,
        on: true,
        side,
        act,
    }
}

const fn gcd(a: u32, b: u32) -> u32 {
    if b == 0 { a } else { gcd(b, a % b) }
}
