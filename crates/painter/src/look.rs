//! How a picture looks.

use zonewright_geometry::Level;

use crate::Palette;

/// How panels are drawn.
#[derive(Clone, Copy, PartialEq, Eq, Debug, Default)]
pub enum Faces {
    /// Filled.
    Shaded,
    /// Edges only. With [`Look::hidden_edges`] the panels still hide what is behind them.
    Wireframe,
    /// Filled, with the edges.
    #[default]
    ShadedWithEdges,
}

/// What colours tell.
#[derive(Clone, Copy, PartialEq, Eq, Debug, Default)]
pub enum ColourBy {
    /// Outside and inside.
    #[default]
    Plain,
    /// Edges take the colour of their zone, panels that of both their zones, mixed and pale.
    Zone,
    /// Panels take the colour of their family.
    Family,
    /// Panels take the colour of their course.
    Course,
    /// Panels between level and upright.
    Slope,
    /// Edges between valley and ridge, the shell's steepest in full colour. Edges are drawn whatever [`Look::faces`] says.
    Fold,
    /// Panels with findings stand out by their gravest level.
    Finding,
    /// Panels take the colour of their distance to something, on either side of it.
    Distance,
}

/// How a picture looks.
#[derive(Clone, PartialEq, Debug)]
pub struct Look {
    /// How panels are drawn.
    pub faces: Faces,
    /// Whether edges behind panels are drawn dashed.
    pub hidden_edges: bool,
    /// Whether of the edges only those on a rim are drawn: a lighter picture, for while it moves.
    pub only_rims: bool,
    /// What colours tell.
    pub colour: ColourBy,
    /// The colours.
    pub palette: Palette,
    /// Width of edges, in pixels.
    pub edge_width: f32,
    /// Width of rims, in pixels.
    pub rim_width: f32,
    /// Whether panels seen from inside are left out on a closed shell, where they are hidden anyway.
    ///
    /// It has no effect on an open shell, with the eye inside the box around the shell, on a shell turned inside out, nor
    /// while findings are shown. Set it only when the shell is known not to cross itself: where it does, an inside can show.
    pub cull: bool,
}

impl Default for Look {
    fn default() -> Self {
        Self {
            faces: Faces::default(),
            hidden_edges: false,
            only_rims: false,
            colour: ColourBy::default(),
            palette: Palette::light(),
            edge_width: 1.2,
            rim_width: 2.0,
            cull: false,
        }
    }
}

/// What the painter cannot know by itself, one entry a panel. Missing entries are drawn plain.
#[derive(Clone, Copy, PartialEq, Debug, Default)]
pub struct Tints<'a> {
    /// The family of each panel, by index.
    pub family: Option<&'a [u32]>,
    /// The gravest finding of each panel.
    pub finding: Option<&'a [Option<Level>]>,
    /// The distance of each panel as a share of the largest, from -1 inside to 1 outside.
    pub distance: Option<&'a [f32]>,
    /// Which panels are selected: their colour is mixed with that of the selection.
    pub selected: Option<&'a [bool]>,
}
