//! The neutral picture.

use crate::Colour;

/// How an [`Item`] is painted.
#[derive(Clone, Copy, PartialEq, Debug)]
pub enum Paint {
    /// A convex polygon.
    Fill {
        /// The panel it belongs to; [`zonewright_geometry::NONE`] for a mark.
        panel: u32,
    },
    /// A line through the points.
    Stroke {
        /// Its width in pixels.
        width: f32,
        /// Whether it is dashed; [`Picture::DASH`] on and as much off.
        dashed: bool,
        /// Whether the last point leads back to the first.
        closed: bool,
        /// The edge it belongs to; [`zonewright_geometry::NONE`] for a mark.
        edge: u32,
    },
}

/// One thing to paint.
#[derive(Clone, Copy, PartialEq, Debug)]
pub struct Item {
    /// Its first point in [`Picture::points`].
    pub first: u32,
    /// How many points it has.
    pub count: u32,
    /// Its colour.
    pub colour: Colour,
    /// How it is painted.
    pub paint: Paint,
}

/// Where a text stands from its position.
#[derive(Clone, Copy, PartialEq, Eq, Debug)]
pub enum Anchor {
    /// The position is the middle of the text.
    Centre,
    /// The position is the middle of the text's left side.
    Left,
}

/// A text.
#[derive(Clone, PartialEq, Debug)]
pub struct Text {
    /// Its position.
    pub pos: [f32; 2],
    /// Where it stands from the position.
    pub anchor: Anchor,
    /// The height of its line in pixels.
    pub size: f32,
    /// Its colour.
    pub colour: Colour,
    /// A thin border round the letters that keeps them readable on any ground.
    pub halo: Colour,
    /// What it says.
    pub text: String,
}

/// What to paint, back to front, in pixels from the top left corner, x right, y down. Texts come last.
#[derive(Clone, PartialEq, Debug, Default)]
pub struct Picture {
    /// Width and height.
    pub size: [f32; 2],
    /// Behind everything.
    pub background: Colour,
    /// Fills and strokes, back to front.
    pub items: Vec<Item>,
    /// The points of all items.
    pub points: Vec<[f32; 2]>,
    /// Texts, on top.
    pub texts: Vec<Text>,
}

impl Picture {
    /// Length of a dash and of the gap after it, in pixels.
    pub const DASH: f32 = 5.0;

    /// The points of an item.
    #[must_use]
    pub fn points_of(&self, item: &Item) -> &[[f32; 2]] {
        &self.points[item.first as usize..][..item.count as usize]
    }

    /// How many fills there are.
    #[must_use]
    pub fn fill_count(&self) -> usize {
        self.items
            .iter()
            .filter(|item| matches!(item.paint, Paint::Fill { .. }))
            .count()
    }

    /// Adds another picture's items behind all of this one's.
    pub fn under(&mut self, behind: &Self) {
        let first = index(self.points.len());
        self.points.extend_from_slice(&behind.points);
        let moved = behind.items.iter().map(|item| Item {
            first: item.first + first,
            ..*item
        });
        self.items.splice(0..0, moved);
    }

    /// Adds another picture's items in front of all of this one's.
    pub fn over(&mut self, before: &Self) {
        let first = index(self.points.len());
        self.points.extend_from_slice(&before.points);
        self.items.extend(before.items.iter().map(|item| Item {
            first: item.first + first,
            ..*item
        }));
    }

    /// Adds an item with its points.
    pub fn push(&mut self, points: impl IntoIterator<Item = [f32; 2]>, colour: Colour, paint: Paint) {
        let first = index(self.points.len());
        self.points.extend(points);
        let count = index(self.points.len()) - first;
        self.items.push(Item {
            first,
            count,
            colour,
            paint,
        });
    }
}

/// A position in an array of a picture or scene. Shells are bounded far below the limit.
#[expect(
    clippy::cast_possible_truncation,
    reason = "arrays here have fewer than 2^32 entries"
)]
pub(crate) const fn index(length: usize) -> u32 {
    length as u32
}
