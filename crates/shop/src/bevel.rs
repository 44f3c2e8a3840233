//! Folds and bevels.
//!
//! The dihedral angle is measured inside, from 0 to 360 degrees; the fold is 180 less it, a ridge positive, a valley
//! negative. The bevel is the tilt of the saw from the square cut: half the fold, the same on both panels.

/// Folds up to this many degrees count as flat (house rule; a bevel of 0.025 degrees is below what a saw can be set to).
pub const FLAT_FOLD_DEG: f64 = 0.05;

/// What kind of edge of a panel it is.
#[derive(Clone, Copy, PartialEq, Eq, PartialOrd, Ord, Hash, Debug)]
pub enum EdgeKind {
    /// The shell folds away from the outside: a positive bevel.
    Ridge,
    /// The shell folds towards the outside: a negative, or reverse, bevel.
    Valley,
    /// The panels lie in one plane, or more than two panels meet and the edge has no bevel of its own: cut square.
    Flat,
    /// No other panel: cut square.
    Rim,
    /// A cut made by trimming.
    Trim,
}

impl EdgeKind {
    /// The kind of an edge with this dihedral angle, in degrees.
    #[must_use]
    pub fn of_dihedral(dihedral_deg: f64) -> Self {
        let fold = fold_deg(dihedral_deg);
        if fold.abs() <= FLAT_FOLD_DEG {
            Self::Flat
        } else if fold > 0.0 {
            Self::Ridge
        } else {
            Self::Valley
        }
    }

    /// The word in lists and reports.
    #[must_use]
    pub const fn word(self) -> &'static str {
        match self {
            Self::Ridge => "ridge",
            Self::Valley => "valley",
            Self::Flat => "flat",
            Self::Rim => "rim",
            Self::Trim => "trim",
        }
    }

    /// Whether the saw has to be tilted for it.
    #[must_use]
    pub const fn is_bevelled(self) -> bool {
        matches!(self, Self::Ridge | Self::Valley)
    }
}

/// The fold of a dihedral angle, both in degrees.
#[must_use]
pub const fn fold_deg(dihedral_deg: f64) -> f64 {
    180.0 - dihedral_deg
}

/// The bevel of a dihedral angle, both in degrees.
#[must_use]
pub const fn bevel_deg(dihedral_deg: f64) -> f64 {
    fold_deg(dihedral_deg) / 2.0
}

#[cfg(test)]
mod tests {
    use super::*;

    /// Dihedral angles of classic solids and the saw tilt; the dodecahedron as makers publish it, the others derived.
    #[test]
    fn bevels_of_classic_solids() {
        let golden = (1.0 + 5_f64.sqrt()) / 2.0;
        for (cosine, bevel) in [
            (1.0 / 3.0, 54.7356),
            (0.0, 45.0),
            (-1.0 / 3.0, 35.2644),
            (-1.0 / 5_f64.sqrt(), 31.7175),
            (-1.0 / 3_f64.sqrt(), 27.3678),
            (-5_f64.sqrt() / 3.0, 20.9052),
            (-0.5, 30.0),
            (-golden / 2.0, 18.0),
        ] {
            let dihedral = f64::acos(cosine).to_degrees();
            assert!((bevel_deg(dihedral) - bevel).abs() < 5e-5, "{bevel}");
            assert_eq!(EdgeKind::of_dihedral(dihedral), EdgeKind::Ridge);
        }
        // The rhombic icosahedron's second ring: 108 degrees (derived).
        assert!((bevel_deg(108.0) - 36.0).abs() < 1e-12);
    }

    #[test]
    fn kinds() {
        assert_eq!(EdgeKind::of_dihedral(180.0), EdgeKind::Flat);
        assert_eq!(EdgeKind::of_dihedral(179.96), EdgeKind::Flat);
        assert_eq!(EdgeKind::of_dihedral(179.94), EdgeKind::Ridge);
        assert_eq!(EdgeKind::of_dihedral(180.06), EdgeKind::Valley);
        assert_eq!(EdgeKind::of_dihedral(300.0), EdgeKind::Valley);
        assert!((bevel_deg(300.0) + 60.0).abs() < 1e-12);
    }
}
