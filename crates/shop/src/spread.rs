//! How a measure is spread over the parts: a few classes of equal width with round bounds, and how many fall into each.

use crate::parts::Parts;

/// A measure that many parts have.
#[derive(Clone, Copy, PartialEq, Eq, PartialOrd, Ord, Hash, Debug)]
pub enum Measure {
    /// Length of the edges, in millimetres; each edge counts once.
    Sides,
    /// Angle in the acute corners of the parallelograms, in degrees.
    AcuteAngles,
    /// Fold at the edges where two panels meet, in degrees, ridges positive, valleys negative; each edge counts once.
    Folds,
}

impl Measure {
    /// All of them.
    pub const ALL: [Self; 3] = [Self::Sides, Self::AcuteAngles, Self::Folds];

    /// Whether it belongs to panels; the others belong to edges.
    #[must_use]
    pub const fn of_panels(self) -> bool {
        matches!(self, Self::AcuteAngles)
    }

    /// The smallest step between two lengths or angles that a class is made for: 0.1 mm and 0.01 degrees, which is what the
    /// readouts show.
    const fn finest(self) -> f64 {
        match self {
            Self::Sides => 0.1,
            Self::AcuteAngles | Self::Folds => 0.01,
        }
    }
}

/// Every value of a measure with the index of its edge or panel, in rising order of the indices.
#[must_use]
pub fn values(parts: &Parts, measure: Measure) -> Vec<(u32, f64)> {
    let mut all: Vec<(u32, f64)> = Vec::new();
    for (index, panel) in (0_u32..).zip(&parts.panels) {
        match measure {
            Measure::AcuteAngles => all.extend(panel.acute_deg.map(|deg| (index, deg))),
            Measure::Sides => all.extend(panel.edges.iter().map(|e| (e.edge, e.length_mm))),
            Measure::Folds => all.extend(panel.edges.iter().filter_map(|e| Some((e.edge, e.fold_deg()?)))),
        }
    }
    if !measure.of_panels() {
        all.sort_unstable_by_key(|(edge, _)| *edge);
        all.dedup_by_key(|(edge, _)| *edge);
    }
    all
}

/// A class: the values from `from` up to but not including `to`; the last class also has `to` itself.
#[derive(Clone, Copy, PartialEq, Debug)]
pub struct Class {
    /// Its lower bound.
    pub from: f64,
    /// Its upper bound.
    pub to: f64,
    /// How many values fall into it.
    pub count: usize,
}

/// How a measure is spread.
#[derive(Clone, PartialEq, Debug)]
pub struct Spread {
    /// The measure.
    pub measure: Measure,
    /// The classes from the smallest up, of one width, without a gap.
    pub classes: Vec<Class>,
}

impl Spread {
    /// Spreads the values of a measure over at most `most` classes; none when there are no values.
    ///
    /// The width is 1, 2 or 5 times a power of ten, the smallest that does, and the bounds are its multiples, so that they are round numbers.
    /// Where all values read the same there is one class.
    #[must_use]
    pub fn of(parts: &Parts, measure: Measure, most: usize) -> Option<Self> {
        let values = values(parts, measure);
        let least = values.iter().map(|v| v.1).min_by(f64::total_cmp)?;
        let largest = values.iter().map(|v| v.1).max_by(f64::total_cmp)?;
        let width = round_width(least, largest, most.max(2), measure.finest());
        let first = ((least + ROUNDING) / width).floor();
        let count = class_of(largest, first, width) + 1;
        let bound = |k: usize| (first + k as f64) * width;
        let mut classes: Vec<Class> = (0..count)
            .map(|k| Class {
                from: bound(k),
                to: bound(k + 1),
                count: 0,
            })
            .collect();
        for (_, value) in values {
            classes[class_of(value, first, width).min(count - 1)].count += 1;
        }
        Some(Self { measure, classes })
    }

    /// The edges or panels that fall into a class, by index; none for a class that is not there.
    #[must_use]
    pub fn members(&self, parts: &Parts, class: usize) -> Vec<u32> {
        let (Some(first), Some(last)) = (self.classes.first(), self.classes.len().checked_sub(1)) else {
            return Vec::new();
        };
        let width = first.to - first.from;
        let base = (first.from / width).round();
        let falls = |value: f64| class_of(value, base, width).min(last) == class;
        let all = values(parts, self.measure).into_iter();
        all.filter(|(_, value)| falls(*value)).map(|(at, _)| at).collect()
    }

    /// The largest count of a class.
    #[must_use]
    pub fn tallest(&self) -> usize {
        self.classes.iter().map(|c| c.count).max().unwrap_or(0)
    }

    /// What must hold; the first thing that does not.
    ///
    /// # Errors
    /// A sentence that names it.
    pub fn check(&self, parts: &Parts) -> Result<(), String> {
        let all: usize = self.classes.iter().map(|c| c.count).sum();
        if all != values(parts, self.measure).len() {
            return Err(format!("{all} values in the classes"));
        }
        if let Some(k) = (0..self.classes.len()).find(|&k| self.members(parts, k).len() != self.classes[k].count) {
            return Err(format!("class {k} has other members than it counts"));
        }
        match self
            .classes
            .windows(2)
            .position(|w| w[0].to.to_bits() != w[1].from.to_bits())
        {
            Some(k) => Err(format!("a gap behind class {k}")),
            None => Ok(()),
        }
    }
}

/// What rounding may leave on a value in millimetres or degrees: a value this near below a bound belongs to the class above it.
const ROUNDING: f64 = 1e-9;

fn class_of(value: f64, first: f64, width: f64) -> usize {
    let at = ((value + ROUNDING) / width).floor() - first;
    // At most a few dozen classes; anything below the first belongs to it.
    at.max(0.0) as usize
}

/// The smallest of 1, 2, 5, 10, 20 ... times the finest step with which `most` classes reach from the least to the largest.
fn round_width(least: f64, largest: f64, most: usize, finest: f64) -> f64 {
    let mut power = finest;
    // A span of 1e300 times the finest step ends here too.
    for _ in 0..320 {
        for times in [1.0, 2.0, 5.0] {
            let width = power * times;
            let classes = ((largest + ROUNDING) / width).floor() - ((least + ROUNDING) / width).floor() + 1.0;
            if classes <= most as f64 {
                return width;
            }
        }
        power *= 10.0;
    }
    (largest - least).max(finest)
}

#[cfg(test)]
mod tests {
    use proptest::prelude::*;

    use super::*;
    use crate::{family::FamilyTolerance, test_shells::polar};

    fn parts(ribs: u32, pitch: f64) -> Parts {
        Parts::new(&polar(ribs, pitch, 300.0), &FamilyTolerance::default())
    }

    /// Fixture F1 (derived, checked against a hull): n 9, pitch 38; 18 panels each of four kinds.
    #[test]
    fn the_acute_angles_of_nine_ribs_fall_into_four_classes_of_eighteen() {
        let parts = parts(9, 38.0);
        let spread = Spread::of(&parts, Measure::AcuteAngles, 24).unwrap();
        // 31.27, 60.87, 78.20 (the supplement of 101.80) and 86.07: from 30 to 90 in steps of 5 is 12, in steps of 2 it is 28.
        let found: Vec<(f64, usize)> = spread
            .classes
            .iter()
            .filter(|c| c.count > 0)
            .map(|c| (c.from, c.count))
            .collect();
        assert_eq!(found, [(30.0, 18), (60.0, 18), (75.0, 18), (85.0, 18)]);
        spread.check(&parts).unwrap();
    }

    /// Every edge of a polar form is as long as its ribs.
    #[test]
    fn equal_sides_are_one_class_and_each_edge_counts_once() {
        let parts = parts(9, 38.0);
        let spread = Spread::of(&parts, Measure::Sides, 24).unwrap();
        let [only] = spread.classes[..] else {
            panic!("{spread:?}")
        };
        assert_eq!(only.count, 144);
        assert!(only.from <= 300.0 + 1e-9 && 300.0 < only.to);
    }

    #[test]
    fn no_panels_no_spread() {
        assert_eq!(Spread::of(&Parts::default(), Measure::Folds, 24), None);
    }

    proptest! {
        /// Planted answer: every value falls into the class whose bounds hold it, and no class too many is made.
        #[test]
        fn classes_hold_what_lies_between_their_bounds(ribs in 3_u32..14, pitch in 5.0_f64..85.0, most in 2_usize..40) {
            let parts = parts(ribs, pitch);
            for measure in Measure::ALL {
                let spread = Spread::of(&parts, measure, most).unwrap();
                prop_assert!(spread.classes.len() <= most);
                prop_assert_eq!(spread.check(&parts), Ok(()));
                for class in &spread.classes {
                    let inside = |v: f64| class.from - 1e-6 <= v && v < class.to + 1e-6;
                    let sure = values(&parts, measure).iter().filter(|v| inside(v.1)).count();
                    prop_assert!(class.count <= sure, "{class:?} has {sure}");
                }
            }
        }
    }
}
