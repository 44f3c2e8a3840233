//! A parameter that may change, in a scale of its own.

use super::{Free, Unsolved, Why};
use crate::{Parameter, ParameterKind, Shape, parameter::parameter};

/// A turn or a tilt of this much counts as a change like a length changed by a factor of e^(1/2): what a hand would call large.
const LARGE_ANGLE_DEG: f64 = 40.0;

/// A parameter and its bounds.
#[derive(Clone, PartialEq, Debug)]
pub(super) struct Variable {
    /// The parameter as it was.
    pub(super) parameter: Parameter,
    /// The least and the greatest value.
    pub(super) bounds: [f64; 2],
    scale: Scale,
}

#[derive(Clone, Copy, PartialEq, Debug)]
enum Scale {
    /// By its logarithm.
    Log,
    /// Divided by this.
    Linear(f64),
}

impl Variable {
    /// # Errors
    /// When there is no such parameter, or the bounds leave nothing.
    pub(super) fn new(shape: &Shape, free: &Free, size: f64) -> Result<Self, Unsolved> {
        let Some(found) = parameter(shape, &free.key) else {
            return Err(Unsolved::bare(Why::NoSuchParameter(free.key.clone())));
        };
        let [least, most] = found.bounds;
        let mut bounds = [
            free.bounds[0].unwrap_or(least).max(least),
            free.bounds[1].unwrap_or(most).min(most),
        ];
        if found.kind == ParameterKind::Count {
            bounds = [bounds[0].ceil(), bounds[1].floor()];
        }
        if !bounds.iter().all(|b| b.is_finite()) || bounds[0] > bounds[1] {
            return Err(Unsolved::bare(Why::EmptyBounds(free.key.clone())));
        }
        let value = found.value.abs();
        let scale = match found.kind {
            ParameterKind::Length | ParameterKind::Factor if found.bounds[0] > 0.0 => Scale::Log,
            ParameterKind::Length => Scale::Linear((size / 4.0).max(value / 2.0).max(1.0)),
            ParameterKind::Angle => Scale::Linear(LARGE_ANGLE_DEG),
            ParameterKind::Factor | ParameterKind::Count => Scale::Linear(value.max(1.0)),
        };
        Ok(Self {
            parameter: found,
            bounds,
            scale,
        })
    }

    pub(super) fn is_count(&self) -> bool {
        self.parameter.kind == ParameterKind::Count
    }

    /// The value in the scale.
    pub(super) fn scaled(&self, value: f64) -> f64 {
        match self.scale {
            Scale::Log => value.ln(),
            Scale::Linear(unit) => value / unit,
        }
    }

    /// The value of what is in the scale, within the bounds.
    pub(super) fn value(&self, scaled: f64) -> f64 {
        let value = match self.scale {
            Scale::Log => scaled.exp(),
            Scale::Linear(unit) => scaled * unit,
        };
        value.clamp(self.bounds[0], self.bounds[1])
    }

    /// The bounds in the scale.
    pub(super) fn scaled_bounds(&self) -> [f64; 2] {
        self.bounds.map(|b| self.scaled(b))
    }
}
