//! Stars: sets of axes, in one consistent orientation.

use serde::{Deserialize, Serialize};

use super::{circle, limits};
use crate::{Code, Finding, Place, Unit, Vector};

/// A set of axes.
#[derive(Clone, PartialEq, Eq, Debug, Serialize, Deserialize)]
#[serde(rename_all = "snake_case")]
pub enum Star {
    /// Axes of the icosahedron: 6 five-fold, 10 three-fold, 15 two-fold.
    Icosahedral(Vec<AxisClass>),
    /// Axes of the cube: 3 four-fold, 4 three-fold, 6 two-fold.
    Cubic(Vec<AxisClass>),
    /// This many horizontal axes at equal angles, and the vertical one.
    Prismatic(u32),
}

/// A class of axes, named by its order of symmetry.
#[derive(Clone, Copy, PartialEq, Eq, PartialOrd, Ord, Hash, Debug, Serialize, Deserialize)]
#[serde(rename_all = "snake_case")]
pub enum AxisClass {
    /// 5-fold.
    FiveFold,
    /// 4-fold.
    FourFold,
    /// 3-fold.
    ThreeFold,
    /// 2-fold.
    TwoFold,
}

impl AxisClass {
    /// Its order of symmetry: 5, 4, 3 or 2.
    #[must_use]
    pub const fn order(self) -> u32 {
        match self {
            Self::FiveFold => 5,
            Self::FourFold => 4,
            Self::ThreeFold => 3,
            Self::TwoFold => 2,
        }
    }
}

impl Star {
    /// One unit vector an axis, class by class in the order in which they are listed.
    ///
    /// Each points up; when level, towards +y; when along x, towards +x. All icosahedral classes belong to one icosahedron, all cubic ones to
    /// one cube with its 4-fold axes along x, y and z. The axes of a prismatic star are the level ones, counted from +x towards +y, then the vertical.
    ///
    /// # Errors
    /// When the star has no axes, a class twice, a class that its kind does not have, or a number of axes outside 2 to [`limits::MAX_RIBS`].
    pub fn directions(&self) -> Result<Vec<Vector>, Finding> {
        let axes = match self {
            Self::Icosahedral(classes) => gather(classes, icosahedral)?,
            Self::Cubic(classes) => gather(classes, cubic)?,
            Self::Prismatic(level) => {
                let level = limits::count("star", *level, 2, limits::MAX_RIBS)?;
                let mut axes = Vec::with_capacity(level as usize + 1);
                for k in 0..level {
                    let (cos, sin) = circle::part_of_turn(i64::from(k), 2 * level);
                    axes.push(Vector::new(cos, sin, 0.0));
                }
                axes.push(Vector::Z);
                axes
            }
        };
        Ok(axes.into_iter().map(upward).collect())
    }
}

fn gather(classes: &[AxisClass], axes_of: fn(AxisClass) -> Vec<Vector>) -> Result<Vec<Vector>, Finding> {
    let mut axes = Vec::new();
    for (k, &class) in classes.iter().enumerate() {
        let of_class = axes_of(class);
        if of_class.is_empty() || classes[..k].contains(&class) {
            let order = f64::from(class.order());
            return Err(Finding::new(Code::ParameterLimit, Place::Parameter("star")).with(order, None, Unit::Count));
        }
        axes.extend(of_class);
    }
    if axes.is_empty() {
        return Err(Finding::parameter("star", 0.0, 1.0, Unit::Count));
    }
    Ok(axes)
}

/// The axes of one icosahedron: the usual coordinates of icosahedron, dodecahedron and icosidodecahedron (standard; Coxeter, Regular
/// Polytopes). The mirror choice (0, 1/phi, phi) for the 3-fold ones belongs to the other icosahedron; the angles between classes tell them apart.
fn icosahedral(class: AxisClass) -> Vec<Vector> {
    const PHI: f64 = core::f64::consts::GOLDEN_RATIO;
    const INV: f64 = PHI - 1.0;
    match class {
        AxisClass::FiveFold => cyclic(&[Vector::new(0.0, 1.0, PHI), Vector::new(0.0, -1.0, PHI)]),
        AxisClass::ThreeFold => {
            let mut axes = cube_diagonals();
            axes.extend(cyclic(&[Vector::new(0.0, PHI, INV), Vector::new(0.0, PHI, -INV)]));
            axes
        }
        AxisClass::TwoFold => cyclic(&[
            Vector::X,
            Vector::new(INV, PHI, 1.0),
            Vector::new(INV, PHI, -1.0),
            Vector::new(INV, -PHI, 1.0),
            Vector::new(INV, -PHI, -1.0),
        ]),
        AxisClass::FourFold => Vec::new(),
    }
}

fn cubic(class: AxisClass) -> Vec<Vector> {
    match class {
        AxisClass::FourFold => cyclic(&[Vector::X]),
        AxisClass::ThreeFold => cube_diagonals(),
        AxisClass::TwoFold => cyclic(&[Vector::new(1.0, 1.0, 0.0), Vector::new(1.0, -1.0, 0.0)]),
        AxisClass::FiveFold => Vec::new(),
    }
}

fn cube_diagonals() -> Vec<Vector> {
    [(1.0, 1.0), (-1.0, 1.0), (-1.0, -1.0), (1.0, -1.0)]
        .map(|(x, y)| Vector::new(x, y, 1.0))
        .to_vec()
}

/// Each vector with its coordinates in all three cyclic orders.
fn cyclic(vectors: &[Vector]) -> Vec<Vector> {
    let orders = |v: &Vector| [*v, Vector::new(v.z, v.x, v.y), Vector::new(v.y, v.z, v.x)];
    vectors.iter().flat_map(orders).collect()
}

/// The unit vector along an axis that points up.
fn upward(axis: Vector) -> Vector {
    let down = [axis.z, axis.y, axis.x]
        .into_iter()
        .find(|part| *part != 0.0)
        .is_some_and(|part| part < 0.0);
    let unit = axis / axis.length();
    // Adding 0 turns -0 into 0.
    if down {
        -unit + Vector::ZERO
    } else {
        unit + Vector::ZERO
    }
}
