//! Stars: sets of axes, in one consistent orientation.

use serde::{Deserialize, Serialize};

use crate::{Finding, Vector};

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

impl Star {
    /// One unit vector an axis, class by class.
    ///
    /// # Errors
    /// When the star has no axes, or a class that its kind does not have.
    pub fn directions(&self) -> Result<Vec<Vector>, Finding> {
        Err(Finding::new(crate::Code::EmptyWord, crate::Place::Design))
    }
}
