//! The panels on the other side of an edge.

/// A panel that meets an edge of another.
#[derive(Clone, Copy, PartialEq, Debug)]
pub struct Mate {
    /// The panel, by index.
    pub panel: u32,
    /// Which of its edges, by index in its outline.
    pub edge: u32,
    /// Where along the edge the mate begins, in millimetres from the corner that the edge leaves.
    pub from_mm: f64,
    /// Where it ends.
    pub to_mm: f64,
    /// Dihedral angle between the two, measured inside, in degrees from 0 to 360.
    pub dihedral_deg: f64,
}

/// The mates of an edge: mostly one, which asks for no memory of its own. Reads as a slice.
#[derive(Clone, PartialEq, Debug, Default)]
pub enum Mates {
    /// None: a rim.
    #[default]
    None,
    /// One.
    One([Mate; 1]),
    /// Several: more than two panels meet in the edge.
    Many(Vec<Mate>),
}

impl core::ops::Deref for Mates {
    type Target = [Mate];
    fn deref(&self) -> &[Mate] {
        match self {
            Self::None => &[],
            Self::One(mate) => mate,
            Self::Many(mates) => mates,
        }
    }
}

impl<'a> IntoIterator for &'a Mates {
    type Item = &'a Mate;
    type IntoIter = core::slice::Iter<'a, Mate>;
    fn into_iter(self) -> Self::IntoIter {
        self.iter()
    }
}
