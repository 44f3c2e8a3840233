//! What belongs to the widgets alone: half-typed texts, what the pointer is over, a drag that is going on.

use std::path::PathBuf;

use zonewright_geometry::{Point, Side};
use zonewright_painter::Picture;

use super::{panes::PANES, thing::Thing};

/// A drag in the picture.
#[derive(Clone, Copy, PartialEq, Debug)]
pub(super) enum Drag {
    /// The camera turns.
    Orbit,
    /// The camera moves along.
    Pan,
    /// A point of the path follows the pointer.
    Point {
        /// Which.
        point: usize,
        /// Where it was, in the path's own frame.
        own: Point,
        /// Where it was in the picture.
        placed: Point,
        /// Where the pointer was.
        from: egui::Pos2,
    },
    /// A zone follows the pointer; see [`Widgets::zones`].
    Zone,
}

impl Drag {
    /// Whether it changes the design.
    pub(super) const fn edits(&self) -> bool {
        matches!(self, Self::Point { .. } | Self::Zone)
    }
}

/// The text of the path box and what it shows.
#[derive(Debug, Default)]
pub(super) struct PathText {
    /// The box that this belongs to.
    pub serial: u64,
    /// What is typed.
    pub text: String,
    /// The folder whose entries are shown.
    pub folder: PathBuf,
    /// Its entries: name, and whether it is a folder.
    pub entries: Vec<(String, bool)>,
    /// Whether the typed file is there already.
    pub exists: bool,
}

/// The picture as it was put together last, and from what.
#[derive(Debug, Default)]
pub(super) struct PictureCache {
    /// What it was put together from.
    pub key: Option<super::picture::Key>,
    /// The picture.
    pub picture: Picture,
    /// The picture as triangles, and where its corner stands in them.
    pub mesh: (Option<egui::Vec2>, std::sync::Arc<egui::Mesh>),
}

/// State of the widgets.
#[derive(Debug, Default)]
pub(super) struct Widgets {
    /// The path box.
    pub path: PathText,
    /// The command search.
    pub search: String,
    /// The drag that is going on.
    pub drag: Option<Drag>,
    /// What the pointer is over among the zones, and what is dragged there.
    pub zones: super::picture::ZoneWork,
    /// The pane that it goes on in.
    pub drag_pane: usize,
    /// The pane that the pointer is over.
    pub over_pane: Option<usize>,
    /// What a click would pick, and in which pane.
    pub over_thing: Option<(usize, Thing)>,
    /// The last call for the keyboard that a pane has answered.
    pub focus: u64,
    /// The open V that the pointer is over, in the strip or in the picture: its side, and its place among the open Vs.
    pub over: Option<(Side, usize)>,
    /// The same, as it is found while this frame is drawn.
    pub over_next: Option<(Side, usize)>,
    /// How long frames take, and how much of the pictures is drawn.
    pub frames: super::frames::Frames,
    /// The ladder.
    pub ladder: super::ladder::LadderWidgets,
    /// The front strip.
    pub strip: super::strip::StripWidgets,
    /// How sides, angles and folds are spread.
    pub spreads: super::panels::SpreadCache,
    /// What solving shows.
    pub solving: super::panels::SolveCache,
    /// The picture of each pane.
    pub cache: [PictureCache; PANES],
    /// How often a picture was put together.
    pub pictures: u64,
}
