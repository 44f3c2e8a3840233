//! What the strip can be told to do, and what of it belongs to the view.

use std::ops::RangeInclusive;

use zonewright_geometry::Side;

use crate::window::{command::Words, derived::Derived};

/// Vs of a front as it stands at a revision, by their places among the open Vs.
#[derive(Clone, PartialEq, Eq, Debug)]
pub struct Picks {
    /// The front.
    pub side: Side,
    /// The revision that the places belong to; at another one they mean nothing.
    pub revision: u64,
    /// The places, ascending.
    pub at: Vec<usize>,
}

/// A span of Vs that is being chosen: from where it began to where it has come.
#[derive(Clone, Copy, PartialEq, Eq, Debug)]
pub struct Span {
    /// The front.
    pub side: Side,
    /// The revision that the places belong to.
    pub revision: u64,
    /// Where it began, by the place among the open Vs.
    pub anchor: usize,
    /// Where it has come.
    pub to: usize,
}

impl Span {
    /// The places of its Vs; none when the front has changed since.
    #[must_use]
    pub fn range(&self, derived: &Derived) -> Option<RangeInclusive<usize>> {
        let (from, to) = (self.anchor.min(self.to), self.anchor.max(self.to));
        let there = self.revision == derived.revision && to < derived.open_on(self.side).len();
        there.then_some(from..=to)
    }
}

/// What of the strip belongs to the view.
#[derive(Clone, PartialEq, Eq, Debug, Default)]
pub struct StripView {
    /// While set, what is done at a V is done at every k-th of its family.
    pub repeat: Option<u32>,
    /// The span that is being chosen.
    pub span: Option<Span>,
    /// The letter that is pointed at, by its position on the front.
    pub letter: Option<(Side, usize)>,
}

/// What the strip can be told to do.
#[derive(Clone, PartialEq, Eq, Debug)]
pub enum StripAct {
    /// Fills these Vs, as a course of their own.
    Fill(Picks),
    /// Splices the directions in hand at these Vs, or takes the splices there away.
    Splice(Picks),
    /// What is done at a V is done at every k-th of its family; none ends that.
    Repeat(Option<u32>),
    /// Every V, or no repeating.
    SwapRepeat,
    /// Chooses a span; none lets it go.
    Span(Option<Span>),
    /// Points at a letter.
    Letter(Option<(Side, usize)>),
}

impl StripAct {
    /// Those that need nothing but their name.
    #[must_use]
    pub(in crate::window) const fn listed() -> [Self; 1] {
        [Self::SwapRepeat]
    }

    /// Name and hint.
    #[must_use]
    pub(in crate::window) const fn words(&self) -> Words {
        let (name, hint) = match self {
            Self::Fill(_) => (
                "Fill these Vs",
                "Fills the chosen Vs of the front as a course of their own.",
            ),
            Self::Splice(_) => ("Splice at these Vs", "Splices the directions in hand at the chosen Vs."),
            Self::Repeat(_) | Self::SwapRepeat => (
                "Repeat round the front",
                "Does at every V of a family what is done at one of them, or stops that.",
            ),
            Self::Span(_) => ("Choose a span", "Chooses neighbouring Vs of the front."),
            Self::Letter(_) => ("Point at a letter", "Shows a letter's edge and zone in the picture."),
        };
        Words { name, hint }
    }
}
