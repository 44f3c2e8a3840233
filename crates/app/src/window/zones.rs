//! What can be done with zones, and how: one family of commands, and the view state that belongs to it.

use std::sync::Arc;

use egui::{Key, Modifiers};
use zonewright_geometry::{
    Sign, Start, Tolerances, Vector, ZoneRef,
    start::{AxisClass, Star},
};

use super::command::Words;
use crate::document::Design;

/// A command about zones. Vectors are in the grown frame, before placement, in millimetres.
#[derive(Clone, Debug)]
pub enum ZoneAct {
    /// A movement of a drag: the zone's vector, from the design as it was when the drag began.
    Drag {
        /// The design at the beginning.
        base: Arc<Design>,
        /// The zone.
        zone: ZoneRef,
        /// Its vector now.
        vector: Vector,
        /// Whether all symmetric zones go along.
        together: bool,
    },
    /// Escape: the drag that is going on never was.
    TakeBack,
    /// Gives a zone a typed vector; symmetric zones go along when they are set to. The text names the measure that was typed.
    Set(ZoneRef, Vector, &'static str),
    /// Links the first zone to the second, the same way or against.
    Link(ZoneRef, ZoneRef, Sign),
    /// Takes a link away.
    Unlink(ZoneRef),
    /// Gives a zone its derived vector again.
    Derive(ZoneRef),
    /// Picks a zone; none picks nothing.
    Pick(Option<ZoneRef>),
    /// The zone, counted from 0, that the next link leads to.
    LinkTo(u32),
    /// Whether symmetric zones go along with a changed one.
    Together,
    /// Whether drags snap.
    Snap,
    /// The star whose directions drags snap to.
    Star(SnapStar),
    /// What counts as the same place.
    Tolerances(Tolerances),
}

impl ZoneAct {
    /// The commands that need nothing but their name.
    pub(super) fn listed() -> [Self; 2] {
        [Self::Together, Self::Snap]
    }

    /// Its words.
    pub(super) const fn words(&self) -> Words {
        let (name, hint) = match self {
            Self::Drag { .. } => ("Drag a zone", "Stretches and turns all edges of a zone."),
            Self::TakeBack => ("Take the drag back", "Puts back what is being dragged."),
            Self::Set(..) => ("Set a zone", "Gives a zone a typed vector."),
            Self::Link(..) => ("Link a zone", "Makes two zones count as one."),
            Self::Unlink(_) => ("Unlink a zone", "Gives a linked zone a vector of its own."),
            Self::Derive(_) => ("Derive a zone again", "Takes a zone's own vector or link away."),
            Self::Pick(_) => ("Pick a zone", "Picks a zone and shows all its edges."),
            Self::LinkTo(_) => ("Choose a zone to link to", "Chooses the zone that a link leads to."),
            Self::Together => (
                "Symmetric zones together",
                "Changes all zones alike that the form makes alike.",
            ),
            Self::Snap => ("Snap", "Drags go to round lengths and angles, and to what is there."),
            Self::Star(_) => (
                "Directions to snap to",
                "Chooses the star whose directions drags snap to.",
            ),
            Self::Tolerances(_) => ("Change the tolerances", "Changes what counts as the same place."),
        };
        Words { name, hint }
    }

    /// What a toggle says: what it does, its keys, and the key that turns it round during a drag.
    pub(super) fn hint(&self, ctx: &egui::Context) -> String {
        let words = self.words();
        let keys = self
            .shortcut()
            .map(|(modifiers, key)| egui::KeyboardShortcut::new(modifiers, key));
        let keys = keys.map_or_else(String::new, |keys| format!(" ({})", ctx.format_shortcut(&keys)));
        let held = match self {
            Self::Together => " Hold a during a drag for the opposite.",
            Self::Snap => " Hold n during a drag for none.",
            _ => "",
        };
        format!("{}{keys}: {}{held}", words.name, words.hint)
    }

    /// Its keys.
    pub(super) const fn shortcut(&self) -> Option<(Modifiers, Key)> {
        match self {
            Self::Together => Some((Modifiers::COMMAND, Key::T)),
            Self::Snap => Some((Modifiers::COMMAND, Key::J)),
            _ => None,
        }
    }
}

/// The star whose directions drags snap to.
#[derive(Clone, Copy, PartialEq, Eq, Debug, Default)]
pub enum SnapStar {
    /// That of the start, when it has one.
    #[default]
    OfStart,
    /// None.
    Off,
    /// A class of axes of the icosahedron.
    Icosahedral(AxisClass),
    /// A class of axes of the cube.
    Cubic(AxisClass),
    /// This many level axes, and the vertical.
    Prismatic(u32),
}

impl SnapStar {
    /// All choices and their names. The prism of a list is replaced by one with the wanted number of axes.
    pub(super) const ALL: [(Self, &'static str); 9] = [
        (Self::OfStart, "The start's star"),
        (Self::Off, "None"),
        (Self::Icosahedral(AxisClass::FiveFold), "Icosahedron, 6 five-fold"),
        (Self::Icosahedral(AxisClass::ThreeFold), "Icosahedron, 10 three-fold"),
        (Self::Icosahedral(AxisClass::TwoFold), "Icosahedron, 15 two-fold"),
        (Self::Cubic(AxisClass::FourFold), "Cube, 3 four-fold"),
        (Self::Cubic(AxisClass::ThreeFold), "Cube, 4 three-fold"),
        (Self::Cubic(AxisClass::TwoFold), "Cube, 6 two-fold"),
        (Self::Prismatic(6), "Prism"),
    ];

    /// The star, and the order of symmetry of its axes where they are of one class.
    pub(super) fn star(self, start: &Start) -> Option<Star> {
        match self {
            Self::OfStart => match start {
                Start::StarPath(path) => Some(path.star.clone()),
                Start::StarSolid(solid) => Some(solid.star.clone()),
                _ => None,
            },
            Self::Off => None,
            Self::Icosahedral(class) => Some(Star::Icosahedral(vec![class])),
            Self::Cubic(class) => Some(Star::Cubic(vec![class])),
            Self::Prismatic(level) => Some(Star::Prismatic(level)),
        }
    }
}

/// What is picked among the zones, and how they are dragged.
#[derive(Clone, PartialEq, Debug)]
pub struct ZoneView {
    /// The picked zone.
    pub picked: Option<ZoneRef>,
    /// Whether symmetric zones go along.
    pub together: bool,
    /// Whether drags snap.
    pub snap: bool,
    /// The star whose directions drags snap to.
    pub star: SnapStar,
    /// The zone, counted from 0, that the next link leads to.
    pub link_to: u32,
}

impl Default for ZoneView {
    /// One zone at a time until the user asks for more; what is dragged lands on something that can be said.
    fn default() -> Self {
        Self {
            picked: None,
            together: false,
            snap: true,
            star: SnapStar::default(),
            link_to: 0,
        }
    }
}
