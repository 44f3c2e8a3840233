//! The readouts as values, before they are put into words.

use zonewright_geometry::measure::Range;
use zonewright_shop::{
    spread::Measure,
    text::{self, Units},
};

use crate::window::derived::Derived;

/// A readout.
#[derive(Clone, PartialEq, Debug)]
pub(in crate::window) struct Reading {
    /// Its name.
    pub name: &'static str,
    /// What it says.
    pub value: Value,
}

/// What a readout says. Lengths in millimetres, angles in degrees.
#[derive(Clone, PartialEq, Debug)]
pub(in crate::window) enum Value {
    /// How many.
    Count(usize),
    /// A length.
    Length(f64),
    /// An area, in square millimetres.
    Area(f64),
    /// A volume, in cubic millimetres.
    Volume(f64),
    /// The smallest and the largest of something that can be shown in the picture; for folds, of the dihedral angles.
    Range(Measure, Option<Range>),
    /// Words.
    Words(&'static str),
}

impl Value {
    /// What it reads.
    #[must_use]
    pub(in crate::window) fn text(&self, units: Units) -> String {
        match self {
            Self::Count(count) => text::count(*count),
            Self::Length(mm) => units.length(*mm),
            Self::Area(mm2) => text::square_metres(*mm2),
            Self::Volume(mm3) => text::cubic_metres(*mm3),
            Self::Range(measure, Some(range)) => {
                let [least, most] = [range.least, range.most].map(|value| measured(*measure, value, units));
                if least == most {
                    least
                } else {
                    format!("{least} – {most}")
                }
            }
            Self::Range(_, None) => "–".to_owned(),
            Self::Words(words) => (*words).to_owned(),
        }
    }

    /// What has changed since then, in words; none when it reads the same.
    #[must_use]
    pub(in crate::window) fn since(&self, then: &Self, units: Units) -> Option<String> {
        if self.text(units) == then.text(units) {
            return None;
        }
        let more = |now: f64, then: f64, show: &dyn Fn(f64) -> String| {
            let sign = if now >= then { "+" } else { "−" };
            format!("{sign}{}", show((now - then).abs()))
        };
        Some(match (self, then) {
            (Self::Count(now), Self::Count(then)) => {
                let sign = if now >= then { "+" } else { "−" };
                format!("{sign}{}", text::count(now.abs_diff(*then)))
            }
            (Self::Length(now), Self::Length(then)) => more(*now, *then, &|mm| units.length(mm)),
            (Self::Area(now), Self::Area(then)) => more(*now, *then, &text::square_metres),
            (Self::Volume(now), Self::Volume(then)) => more(*now, *then, &text::cubic_metres),
            _ => format!("was {}", then.text(units)),
        })
    }
}

/// A length or an angle as the readouts show it.
#[must_use]
pub(in crate::window) fn measured(measure: Measure, value: f64, units: Units) -> String {
    match measure {
        Measure::Sides => units.length(value),
        Measure::AcuteAngles | Measure::Folds => text::degrees(value, 2),
    }
}

/// All readouts of what follows from the design.
#[must_use]
pub(in crate::window) fn readings(derived: &Derived) -> Vec<Reading> {
    use Value::{Area, Count, Length, Volume, Words};
    let totals = &derived.totals;
    let degrees = |range: Option<Range>| {
        range.map(|r| Range {
            least: r.least.to_degrees(),
            most: r.most.to_degrees(),
            ..r
        })
    };
    let volume = match volume(derived) {
        Some(mm3) => Volume(mm3),
        None if totals.open_edges > 0 => Words("open"),
        None => Words("–"),
    };
    let mut all = vec![
        ("Panels", Count(totals.panels)),
        ("Families", Count(derived.parts.families.len())),
        ("Bevels", Count(derived.parts.distinct_bevels)),
        ("Vertices", Count(totals.vertices)),
        ("Edges", Count(totals.edges)),
        ("Open edges", Count(totals.open_edges)),
        ("Rims", Count(totals.rims)),
        ("Zones", Count(totals.zones)),
        ("Area", Area(totals.area_mm2)),
        ("Sides", Value::Range(Measure::Sides, totals.lengths)),
        (
            "Acute angles",
            Value::Range(Measure::AcuteAngles, degrees(totals.acute_angles)),
        ),
        ("Dihedrals", Value::Range(Measure::Folds, degrees(totals.dihedrals))),
        ("Size x", Length(totals.size.x)),
        ("Size y", Length(totals.size.y)),
        ("Size z", Length(totals.size.z)),
        ("Volume", volume),
    ];
    all.extend(derived.shell.closing_gap.map(|gap| ("Closing gap", Length(gap))));
    all.into_iter().map(|(name, value)| Reading { name, value }).collect()
}

/// The volume, unless the inspection found panels that cross or lie on each other.
fn volume(derived: &Derived) -> Option<f64> {
    let crossed = derived
        .inspection
        .as_ref()
        .is_some_and(|i| !i.crossings.is_empty() || !i.doubled.is_empty());
    derived.totals.volume_mm3.filter(|_| !crossed)
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn a_difference_says_more_or_less_in_the_same_unit() {
        let since = |now: Value, then: Value| now.since(&then, Units::Mm);
        assert_eq!(since(Value::Count(12), Value::Count(9)).as_deref(), Some("+3"));
        assert_eq!(
            since(Value::Length(90.0), Value::Length(100.5)).as_deref(),
            Some("−10.5 mm")
        );
        assert_eq!(
            since(Value::Area(2.5e6), Value::Area(1e6)).as_deref(),
            Some("+1.500 m²")
        );
        assert_eq!(
            since(Value::Volume(1e9), Value::Words("open")).as_deref(),
            Some("was open")
        );
        assert_eq!(since(Value::Count(3), Value::Count(3)), None);
    }

    /// What reads the same counts as the same: the digits that are not shown are not news.
    #[test]
    fn what_reads_the_same_has_not_changed() {
        assert_eq!(Value::Length(100.01).since(&Value::Length(100.02), Units::Mm), None);
    }
}
