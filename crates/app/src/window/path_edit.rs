//! Edits of a free path.

use zonewright_geometry::{Point, Role, start::DragRule};

/// An edit of a free path. Points are counted along the path from 0, edges by the point where they begin.
#[derive(Clone, Copy, PartialEq, Debug)]
pub enum PathEdit {
    /// Moves a point.
    Move {
        /// Which.
        point: usize,
        /// Where to, in the path's own frame.
        to: Point,
        /// What follows.
        rule: DragRule,
    },
    /// Inserts a point in the middle of an edge; the edge becomes a zig and a zag of their own.
    Insert(usize),
    /// Splits an edge into two equal halves of one zone.
    Split(usize),
    /// Deletes a point.
    Delete(usize),
    /// Adds a point behind the last one.
    Add,
    /// Gives an edge a role.
    Role(usize, Role),
    /// Says whether the last point leads back to the first.
    Close(bool),
}

impl PathEdit {
    /// What the undo list calls it.
    #[must_use]
    pub const fn label(&self) -> &'static str {
        match self {
            Self::Move { .. } => "Move a point",
            Self::Insert(_) => "Insert a point",
            Self::Split(_) => "Split an edge",
            Self::Delete(_) => "Delete a point",
            Self::Add => "Add a point",
            Self::Role(..) => "Change a role",
            Self::Close(true) => "Close the path",
            Self::Close(false) => "Open the path",
        }
    }

    /// Edits of one drag have one key.
    #[must_use]
    pub fn key(&self) -> Option<String> {
        match self {
            Self::Move { point, .. } => Some(format!("point {point}")),
            _ => None,
        }
    }
}
