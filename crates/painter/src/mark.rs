//! What is drawn on top of the shell.

use zonewright_geometry::{Level, Point};

use crate::{Colour, Palette};

/// Where a mark's colour comes from.
#[derive(Clone, Copy, PartialEq, Eq, Debug, Default)]
pub enum Tone {
    /// [`Palette::mark`].
    #[default]
    Mark,
    /// [`Palette::selection`].
    Selection,
    /// [`Palette::preview`].
    Preview,
    /// [`Palette::finding`].
    Finding(Level),
    /// A colour of its own.
    Own(Colour),
}

impl Tone {
    /// The colour in a palette.
    #[must_use]
    pub const fn colour(self, palette: &Palette) -> Colour {
        match self {
            Self::Mark => palette.mark,
            Self::Selection => palette.selection,
            Self::Preview => palette.preview,
            Self::Finding(level) => palette.level(level),
            Self::Own(colour) => colour,
        }
    }
}

/// What a mark looks like. Sizes are in pixels.
#[derive(Clone, PartialEq, Debug)]
pub enum MarkKind {
    /// A disc at each point.
    Dot {
        /// Its radius.
        radius: f32,
    },
    /// A circle round each point.
    Ring {
        /// Its radius.
        radius: f32,
        /// The width of the line.
        width: f32,
    },
    /// A line through the points; one that is not finite makes a gap.
    Line {
        /// The width of the line.
        width: f32,
        /// Whether it is dashed.
        dashed: bool,
    },
    /// A translucent convex polygon with the points as corners, such as the panel that a step would make.
    Polygon,
    /// A dimension line from the first point to the last, a slanting tick at each end, its text across the middle.
    Dimension {
        /// The text.
        text: String,
        /// The height of the letters' line.
        size: f32,
    },
    /// A text beside each point.
    Label {
        /// The text.
        text: String,
        /// The height of the letters' line.
        size: f32,
    },
}

/// A mark, drawn on top of everything; never hidden by panels.
#[derive(Clone, PartialEq, Debug)]
pub struct Mark {
    /// Where it is.
    pub at: Vec<Point>,
    /// What it looks like.
    pub kind: MarkKind,
    /// Where its colour comes from.
    pub tone: Tone,
}
