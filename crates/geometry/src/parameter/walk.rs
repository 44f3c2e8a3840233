//! One walk over the record serves listing and setting: each number is named in one place only.

use super::{Parameter, ParameterKind};
use crate::{Angle, Finding, Shape, Unit, Vector, start::limits};

/// The flattest and the steepest pitch: level and upright themselves are refused, and this near to them nothing can be told apart.
const PITCH_DEG: [f64; 2] = [0.001, 89.999];

/// Angles that go round: a full turn either way.
const TURN_DEG: [f64; 2] = [-360.0, 360.0];

pub(super) const LENGTH: [f64; 2] = [limits::MIN_LENGTH_MM, limits::MAX_LENGTH_MM];
pub(super) const LENGTH_OR_ZERO: [f64; 2] = [0.0, limits::MAX_LENGTH_MM];
pub(super) const COORDINATE: [f64; 2] = [-limits::MAX_LENGTH_MM, limits::MAX_LENGTH_MM];

/// What the walk is for.
enum Job<'k> {
    /// All numbers, or the one with this key, are written down.
    List(Option<&'k str>, Vec<Parameter>),
    /// The number with this key is set.
    Set(&'k str, f64, Option<Result<(), Finding>>),
}

/// A walk over the numbers of a record.
pub(super) struct Walk<'k> {
    job: Job<'k>,
}

/// What a number is, where it may lie, and its name in the file, which findings use.
#[derive(Clone, Copy)]
pub(super) struct Range {
    pub(super) kind: ParameterKind,
    pub(super) bounds: [f64; 2],
    pub(super) field: &'static str,
}

impl<'k> Walk<'k> {
    pub(super) const fn listing() -> Self {
        Self {
            job: Job::List(None, Vec::new()),
        }
    }

    pub(super) const fn listing_only(key: &'k str) -> Self {
        Self {
            job: Job::List(Some(key), Vec::new()),
        }
    }

    pub(super) const fn setting(key: &'k str, value: f64) -> Self {
        Self {
            job: Job::Set(key, value, None),
        }
    }

    pub(super) fn listed(self) -> Vec<Parameter> {
        match self.job {
            Job::List(_, found) => found,
            Job::Set(..) => Vec::new(),
        }
    }

    pub(super) fn was_set(self) -> Option<Result<(), Finding>> {
        match self.job {
            Job::List(..) => None,
            Job::Set(_, _, done) => done,
        }
    }

    pub(super) fn shape(&mut self, shape: &mut Shape) {
        self.start(&mut shape.start);
        self.steps(&mut shape.steps);
        self.zones(&mut shape.zones);
        self.placement(&mut shape.placement);
    }

    /// Whether a number whose key begins like this can be of interest. A number is set once: the first with its key.
    pub(super) fn wants(&self, beginning: &str) -> bool {
        match &self.job {
            Job::List(key, _) => key.is_none_or(|key| key.starts_with(beginning)),
            Job::Set(key, _, done) => done.is_none() && key.starts_with(beginning),
        }
    }

    /// A number: its key, its name, what it is, its value, and how it is set.
    pub(super) fn number(
        &mut self,
        key: &str,
        name: &str,
        range: Range,
        value: f64,
        set: impl FnOnce(f64) -> Result<(), Finding>,
    ) {
        let [least, most] = range.bounds;
        // What is there already can stay, whatever a file says.
        let bounds = [least.min(value), most.max(value)];
        match &mut self.job {
            Job::List(only, found) => {
                if only.is_none_or(|only| only == key) {
                    found.push(Parameter {
                        key: key.to_owned(),
                        name: name.to_owned(),
                        kind: range.kind,
                        value,
                        bounds,
                    });
                }
            }
            Job::Set(wanted, to, done) => {
                if done.is_none() && *wanted == key {
                    *done = Some(usable(range, bounds, *to).and_then(set));
                }
            }
        }
    }

    pub(super) fn length(&mut self, key: &str, name: &str, bounds: [f64; 2], field: &'static str, slot: &mut f64) {
        let kind = ParameterKind::Length;
        self.number(key, name, Range { kind, bounds, field }, *slot, |to| {
            *slot = to;
            Ok(())
        });
    }

    pub(super) fn factor(&mut self, key: &str, name: &str, bounds: [f64; 2], field: &'static str, slot: &mut f64) {
        let kind = ParameterKind::Factor;
        self.number(key, name, Range { kind, bounds, field }, *slot, |to| {
            *slot = to;
            Ok(())
        });
    }

    pub(super) fn angle(&mut self, key: &str, name: &str, bounds: [f64; 2], field: &'static str, slot: &mut Angle) {
        let kind = ParameterKind::Angle;
        self.number(key, name, Range { kind, bounds, field }, slot.degrees(), |to| {
            *slot = Angle::from_degrees(to);
            Ok(())
        });
    }

    pub(super) fn pitch(&mut self, key: &str, slot: &mut Angle) {
        self.angle(key, "Pitch", PITCH_DEG, "pitch", slot);
    }

    pub(super) fn turn(&mut self, key: &str, name: &str, field: &'static str, slot: &mut Angle) {
        self.angle(key, name, TURN_DEG, field, slot);
    }

    pub(super) fn count(&mut self, key: &str, name: &str, bounds: [u32; 2], field: &'static str, slot: &mut u32) {
        let kind = ParameterKind::Count;
        let bounds = bounds.map(f64::from);
        self.number(key, name, Range { kind, bounds, field }, f64::from(*slot), |to| {
            *slot = whole(to);
            Ok(())
        });
    }

    pub(super) fn signed(&mut self, key: &str, name: &str, most: u32, field: &'static str, slot: &mut i32) {
        let kind = ParameterKind::Count;
        let bounds = [-f64::from(most), f64::from(most)];
        self.number(key, name, Range { kind, bounds, field }, f64::from(*slot), |to| {
            // Within an i32: the bounds and the value that was there are.
            #[expect(clippy::cast_possible_truncation, reason = "whole, and within the bounds of an i32")]
            let to = to as i32;
            *slot = to;
            Ok(())
        });
    }

    /// The three parts of a vector.
    pub(super) fn vector(&mut self, key: &str, name: &str, field: &'static str, slot: &mut Vector) {
        if !self.wants(key) {
            return;
        }
        for (axis, part) in ["x", "y", "z"].into_iter().zip(slot.as_mut()) {
            self.length(
                &format!("{key}.{axis}"),
                &format!("{name}, {axis}"),
                COORDINATE,
                field,
                part,
            );
        }
    }

    /// The three parts of a vector that has a length, and the length.
    pub(super) fn vector_and_length(&mut self, key: &str, name: &str, field: &'static str, slot: &mut Vector) {
        self.vector(key, name, field, slot);
        let length = slot.length();
        if length < limits::MIN_LENGTH_MM || !length.is_finite() {
            return;
        }
        let range = Range {
            kind: ParameterKind::Length,
            bounds: LENGTH,
            field,
        };
        self.number(
            &format!("{key}.length"),
            &format!("{name}, length"),
            range,
            length,
            |to| {
                *slot *= to / length;
                Ok(())
            },
        );
    }
}

/// Refuses a value that a number cannot have.
fn usable(range: Range, bounds: [f64; 2], value: f64) -> Result<f64, Finding> {
    let Range { kind, field, .. } = range;
    let value = limits::within(field, value, bounds[0], bounds[1], kind.unit())?;
    if kind == ParameterKind::Count && value.fract() != 0.0 {
        return Err(Finding::parameter(field, value, value.round(), Unit::Count));
    }
    Ok(value)
}

/// A whole number within the bounds of a count.
#[expect(
    clippy::cast_possible_truncation,
    clippy::cast_sign_loss,
    reason = "just seen to be whole, and within the bounds of a u32"
)]
const fn whole(value: f64) -> u32 {
    value as u32
}
