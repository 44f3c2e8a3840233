//! How large a design may be, so that a hostile file gets an error and not an exhausted machine.

use zonewright_geometry::{Act, Direction, FinishAct, RoleRule, Shape, Vs, start::CurveShape, start::Start};

use super::{Design, DesignError};

/// The most bytes that a design file may have: 64 MiB, some hundred times the largest path that can be grown.
pub const MAX_FILE_BYTES: u64 = 64 << 20;

/// The most letters that a start may list.
pub const MAX_LETTERS: usize = 100_000;

/// The most steps, growing and finishing together.
pub const MAX_STEPS: usize = 100_000;

/// The most letters, panels, zones and directions that all steps together may name.
pub const MAX_NAMES: usize = 2_000_000;

/// The longest name of a design or a step, in bytes.
pub const MAX_NAME_BYTES: usize = 10_000;

/// Looks whether a design is within the bounds.
pub(super) fn check(design: &Design) -> Result<(), DesignError> {
    let shape = &design.shape;
    bound("letters in its start", letters(&shape.start), MAX_LETTERS)?;
    bound("steps", shape.steps.len() + shape.finish.len(), MAX_STEPS)?;
    bound("names of Vs, letters, zones and panels", names(shape), MAX_NAMES)?;
    let steps = shape.steps.iter().map(|s| &s.name);
    let given = steps.chain(shape.finish.iter().map(|f| &f.name)).flatten();
    let longest = given.chain([&design.name]).map(String::len).max();
    bound("bytes in a name", longest.unwrap_or(0), MAX_NAME_BYTES)?;
    if let Some(backdrop) = &design.backdrop {
        bound("bytes in the name of its backdrop", backdrop.name.len(), MAX_NAME_BYTES)?;
        backdrop.check().map_err(DesignError::Backdrop)?;
    }
    Ok(())
}

/// About how many bytes a design holds, without its backdrop, which all its states share.
#[must_use]
pub fn weight(design: &Design) -> usize {
    let shape = &design.shape;
    let steps = (shape.steps.len() + shape.finish.len()) * size_of::<zonewright_geometry::Step>();
    let letters = letters(&shape.start) * size_of::<zonewright_geometry::start::FreeLetter>();
    // Names nest; three words and some is what most have.
    size_of::<Design>() + steps + letters + names(shape) * 64
}

fn bound(what: &'static str, count: usize, limit: usize) -> Result<(), DesignError> {
    if count > limit {
        return Err(DesignError::TooMany { what, count, limit });
    }
    Ok(())
}

fn letters(start: &Start) -> usize {
    match start {
        Start::Zigzag(path) => path.letters.len(),
        Start::Translation(form) => [&form.zig, &form.zag].map(|c| listed(&c.shape)).iter().sum(),
        Start::Loop(form) => form.moved.len(),
        Start::StarPath(path) => path.letters.len(),
        Start::Polar(_) | Start::Ribbon(_) | Start::Column(_) | Start::Helical(_) | Start::StarSolid(_) => 0,
    }
}

const fn listed(curve: &CurveShape) -> usize {
    match curve {
        CurveShape::Free(points) => points.len(),
        _ => 0,
    }
}

fn names(shape: &Shape) -> usize {
    let steps = shape.steps.iter().map(|step| match &step.act {
        Act::Fill { at } | Act::Cross { at } => picked(at),
        Act::Splice { at, directions } => picked(at) + splices(directions),
        Act::SetRoles(RoleRule::Flip(letters)) => letters.len(),
        Act::Lay { .. } | Act::Retract | Act::SetRoles(_) | Act::CloseRim | Act::JoinRims { .. } => 0,
    });
    let dropped = shape.finish.iter().map(|step| match &step.act {
        FinishAct::Drop(panels) => panels.len(),
    });
    shape.zones.len() + steps.chain(dropped).sum::<usize>()
}

const fn picked(vs: &Vs) -> usize {
    match vs {
        Vs::Picked(names) => names.len(),
        Vs::All | Vs::EveryKth { .. } => 0,
    }
}

const fn splices(directions: &[Direction]) -> usize {
    directions.len()
}
