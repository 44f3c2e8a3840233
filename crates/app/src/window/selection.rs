//! What is picked, and the dimensions that are kept in the picture.

use super::{
    command::Words,
    derived::Derived,
    thing::{Kind, Thing},
};

/// A dimension between two things; it follows them while the shell regrows.
#[derive(Clone, PartialEq, Eq, Debug)]
pub struct Dimension {
    /// From and to.
    pub ends: [Thing; 2],
}

/// What is picked beside a point or a panel, and what is measured.
#[derive(Clone, PartialEq, Eq, Debug, Default)]
pub struct Selection {
    /// The picked vertex or edge.
    pub part: Option<Thing>,
    /// What the next pick is measured from; none unless a measure has been begun.
    pub from: Option<Thing>,
    /// The dimensions, in the order in which they were measured.
    pub dimensions: Vec<Dimension>,
}

impl Selection {
    /// Finds everything again after the shell has grown anew. What is picked is let go when it is gone; a dimension waits, for undo can
    /// bring back what it measures.
    pub(super) fn follow(&mut self, derived: &Derived) {
        let things = self.part.iter_mut().chain(&mut self.from);
        let ends = self.dimensions.iter_mut().flat_map(|d| &mut d.ends);
        for thing in things.chain(ends) {
            thing.follow(&derived.shell);
        }
        for picked in [&mut self.part, &mut self.from] {
            if picked.as_ref().is_some_and(|t| t.index(derived).is_none()) {
                *picked = None;
            }
        }
    }
}

/// What can be done about picked things.
#[derive(Clone, PartialEq, Eq, Debug)]
pub enum SelectAct {
    /// Picks a thing, or lets it go when it is picked.
    Pick(Thing),
    /// Measures from what is picked to this.
    MeasureTo(Thing),
    /// Measures from what is picked to what is picked next.
    Measure,
    /// Picks the next thing of a kind; backwards, the one before.
    Step(Kind, bool),
    /// Takes a dimension away.
    Dismiss(usize),
    /// Takes all dimensions away.
    DismissAll,
}

impl SelectAct {
    /// Those that need nothing but their name.
    pub(super) fn listed() -> impl Iterator<Item = Self> {
        let steps = Kind::ALL
            .into_iter()
            .flat_map(|kind| [false, true].map(|back| Self::Step(kind, back)));
        [Self::Measure, Self::DismissAll].into_iter().chain(steps)
    }

    /// Name and hint.
    #[must_use]
    pub(super) const fn words(&self) -> Words {
        let (name, hint) = match self {
            Self::Pick(_) => ("Pick", "Picks this, or lets it go."),
            Self::MeasureTo(_) => ("Measure", "Measures from what is picked to this."),
            Self::Measure => ("Measure to…", "Measures from what is picked to what is picked next."),
            Self::Step(Kind::Point, false) => ("Next path point", "Picks the next point of the path."),
            Self::Step(Kind::Point, true) => ("Previous path point", "Picks the point of the path before this one."),
            Self::Step(Kind::Vertex, false) => ("Next vertex", "Picks the next vertex of the shell."),
            Self::Step(Kind::Vertex, true) => ("Previous vertex", "Picks the vertex of the shell before this one."),
            Self::Step(Kind::Edge, false) => ("Next edge", "Picks the next edge of the shell."),
            Self::Step(Kind::Edge, true) => ("Previous edge", "Picks the edge of the shell before this one."),
            Self::Step(Kind::Panel, false) => ("Next panel", "Picks the next panel of the shell."),
            Self::Step(Kind::Panel, true) => ("Previous panel", "Picks the panel of the shell before this one."),
            Self::Dismiss(_) => ("Dismiss a dimension", "Takes a dimension out of the picture."),
            Self::DismissAll => ("Dismiss all dimensions", "Takes all dimensions out of the picture."),
        };
        Words { name, hint }
    }

    /// The keys that send it.
    #[must_use]
    pub(super) const fn shortcut(&self) -> Option<(egui::Modifiers, egui::Key)> {
        match self {
            Self::Measure => Some((egui::Modifiers::COMMAND, egui::Key::M)),
            _ => None,
        }
    }
}
