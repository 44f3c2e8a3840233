//! What a readout shows in the picture: where its smallest or largest is, or all that fall into a class of a spread.

use zonewright_geometry::Place;
use zonewright_shop::spread::{Measure, Spread};

use super::values::{Value, readings};
use crate::window::derived::Derived;

/// Classes of a spread, at the most: as many as bars can be told apart in a narrow column.
pub(in crate::window) const MOST_CLASSES: usize = 24;

/// One end of a range.
#[derive(Clone, Copy, PartialEq, Eq, Debug)]
pub enum End {
    /// The smallest.
    Least,
    /// The largest.
    Most,
}

/// What is shown. It names a measure and not an edge, so that it follows while the shell changes.
#[derive(Clone, Copy, PartialEq, Eq, Debug)]
pub enum Shown {
    /// Where the smallest or the largest is.
    Extreme(Measure, End),
    /// All that fall into this class of the spread, counted from 0.
    Class(Measure, usize),
}

impl Shown {
    /// Where it is; none when there is nothing to show any more.
    #[must_use]
    pub(in crate::window) fn place(self, derived: &Derived) -> Option<Place> {
        let (measure, at) = match self {
            Self::Extreme(measure, end) => {
                let range = readings(derived).into_iter().find_map(|r| match r.value {
                    Value::Range(of, range) if of == measure => range,
                    _ => None,
                })?;
                let at = match end {
                    End::Least => range.least_at,
                    End::Most => range.most_at,
                };
                (measure, vec![at])
            }
            // Until the parts are there, the places in them are those of another shell.
            Self::Class(..) if derived.pending().is_some() => return None,
            Self::Class(measure, class) => {
                let spread = Spread::of(&derived.parts, measure, MOST_CLASSES)?;
                (measure, spread.members(&derived.parts, class))
            }
        };
        Some(if measure.of_panels() {
            Place::Panels(at)
        } else {
            Place::Edges(at)
        })
    }
}
