//! Which way the zones of a parametric start can go together without leaving its parameters.

use super::{symmetry::helix, table::Table};
use crate::{Finding, Shape, Start, Vector, ZoneRef};

/// Where the end of a zone can go.
#[derive(Clone, Copy, PartialEq, Debug)]
pub enum Freedom {
    /// Anywhere.
    Space,
    /// In the plane through its beginning across this direction, of length 1: out of it all zones would turn about the axis alike, which is
    /// the same shell turned.
    Plane(Vector),
    /// Along this direction, of length 1.
    Line(Vector),
}

impl Freedom {
    /// The vector nearest to `to` that is free, seen along `sight`, a direction of length 1 that need not be in the plane: where the line
    /// of sight through `to` meets the plane. Along a plane seen edge-on, and along a line, it is the nearest one in space.
    #[must_use]
    pub fn nearest(self, to: Vector, sight: Vector) -> Vector {
        match self {
            Self::Space => to,
            Self::Plane(across) => {
                let steep = sight.dot(across);
                if steep.abs() < EDGE_ON {
                    to - across * to.dot(across)
                } else {
                    let met = to - sight * (to.dot(across) / steep);
                    // What the division left is taken out straight.
                    met - across * met.dot(across)
                }
            }
            Self::Line(along) => along * to.dot(along),
        }
    }
}

/// A plane less steep than this to the line of sight, about 15 degrees, counts as seen edge-on: a pixel would move the end by more than four.
const EDGE_ON: f64 = 0.25;

/// Which way a zone can go when its symmetric zones go with it and the start's parameters are to stay. Where rules stand against the
/// parameters already, anywhere.
///
/// # Errors
/// When there is no such zone, or the shape cannot be read.
pub fn freedom(shape: &Shape, zone: ZoneRef) -> Result<Freedom, Finding> {
    let table = Table::of(shape)?;
    let state = table.get(zone)?;
    let ZoneRef::Start(id) = state.root else {
        return Ok(Freedom::Space);
    };
    if !table.start_is_derived() {
        return Ok(Freedom::Space);
    }
    let in_plane = match &shape.start {
        Start::Polar(_) | Start::Helical(_) | Start::Ribbon(_) | Start::Column(_) | Start::Loop(_) => true,
        Start::Translation(form) => helix(form, id)?.is_some(),
        Start::StarSolid(_) => return Ok(Freedom::Line(state.vector.normalize())),
        Start::Zigzag(_) | Start::StarPath(_) => false,
    };
    let level = Vector::new(-state.vector.y, state.vector.x, 0.0);
    Ok(if in_plane && level.length() > 0.0 {
        Freedom::Plane(level.normalize())
    } else {
        Freedom::Space
    })
}
