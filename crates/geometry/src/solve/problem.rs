//! What is searched: a shape, the figures that are wanted of it, the parameters that may change.

use super::{Effort, Figure, Free, Unsolved, Want, Why, figures, variable::Variable};
use crate::{Code, Level, ParameterKind, Shape, grow, measure::totals, parameter::set_parameter_in};

/// Values of the parameters that may change, in their own units.
pub(super) type Values = Vec<f64>;

/// A shape that was tried.
#[derive(Clone, PartialEq, Debug)]
pub(super) struct Tried {
    /// The values of the parameters.
    pub(super) values: Values,
    /// The figures, none missing.
    pub(super) figures: Vec<f64>,
}

pub(super) struct Problem<'a> {
    pub(super) shape: &'a Shape,
    pub(super) wants: &'a [Want],
    pub(super) variables: Vec<Variable>,
    /// The values of the shape as it is, brought within the bounds.
    pub(super) start: Values,
    /// The figures of the shape as it is.
    pub(super) before: Vec<Option<f64>>,
    /// What a miss of each figure is measured by.
    pub(super) scales: Vec<f64>,
    /// The nearest that was reached.
    pub(super) nearest: Option<Tried>,
    /// The least and the greatest value that each figure had.
    pub(super) seen: Vec<[f64; 2]>,
    effort: Effort,
    pub(super) shells: usize,
    panels: usize,
    pub(super) stop: &'a mut dyn FnMut() -> bool,
    pub(super) stopped: bool,
}

impl<'a> Problem<'a> {
    /// # Errors
    /// When something is wanted that cannot be looked for.
    pub(super) fn new(
        shape: &'a Shape,
        wants: &'a [Want],
        free: &[Free],
        effort: Effort,
        stop: &'a mut dyn FnMut() -> bool,
    ) -> Result<Self, Unsolved> {
        let bare = |why| Err(Unsolved::bare(why));
        if wants.is_empty() {
            return bare(Why::NothingWanted);
        }
        if free.is_empty() {
            return bare(Why::NothingFree);
        }
        if let Some(k) = wants
            .iter()
            .position(|w| !w.value.is_finite() || w.tolerance.is_nan() || w.tolerance <= 0.0)
        {
            return bare(Why::NoNumber(wants[k].figure));
        }
        let (shell, findings) = grow(shape);
        if shell.panels.is_empty() {
            let stop = findings.into_iter().find(|f| f.level() == Level::Stop);
            return bare(Why::NotGrown(stop.map_or(Code::NoPanels, |f| f.code)));
        }
        let size = totals(&shell).size.length();
        let mut variables: Vec<Variable> = Vec::new();
        for one in free {
            if variables.iter().all(|v| v.parameter.key != one.key) {
                variables.push(Variable::new(shape, one, size)?);
            }
        }
        let which: Vec<Figure> = wants.iter().map(|w| w.figure).collect();
        let before = figures(shape, &shell, &which);
        let scales = wants.iter().zip(&before);
        let scales = scales
            .map(|(want, now)| want.value.abs().max(now.unwrap_or(0.0).abs()).max(want.tolerance))
            .collect();
        let start = variables
            .iter()
            .map(|v| v.parameter.value.clamp(v.bounds[0], v.bounds[1]))
            .collect();
        Ok(Self {
            shape,
            wants,
            variables,
            start,
            before,
            scales,
            nearest: None,
            seen: vec![[f64::INFINITY, f64::NEG_INFINITY]; wants.len()],
            effort,
            shells: 0,
            panels: 0,
            stop,
            stopped: false,
        })
    }

    /// Whether the search must end.
    pub(super) fn spent(&mut self) -> bool {
        self.stopped |= (self.stop)();
        self.stopped || self.exhausted()
    }

    /// Whether all the work that is allowed was done.
    pub(super) const fn exhausted(&self) -> bool {
        self.shells >= self.effort.shells || self.panels >= self.effort.panels
    }

    /// The shape with these values; none when one cannot be set.
    pub(super) fn shape_with(&self, values: &Values) -> Option<Shape> {
        let mut shape = self.shape.clone();
        for (variable, value) in self.variables.iter().zip(values) {
            // What stays is not set again, so that its last digit stays too.
            if *value != variable.parameter.value {
                set_parameter_in(&mut shape, &variable.parameter.key, *value).ok()?;
            }
        }
        Some(shape)
    }

    /// Grows the shape with these values and measures it; none when it does not grow, or a figure is missing, or the search must end.
    pub(super) fn try_values(&mut self, values: &Values) -> Option<Tried> {
        if self.spent() {
            return None;
        }
        self.shells += 1;
        let shape = self.shape_with(values)?;
        let (shell, _) = grow(&shape);
        self.panels += shell.panels.len();
        let which: Vec<Figure> = self.wants.iter().map(|w| w.figure).collect();
        let figures: Vec<f64> = figures(&shape, &shell, &which).into_iter().collect::<Option<_>>()?;
        for (seen, figure) in self.seen.iter_mut().zip(&figures) {
            *seen = [seen[0].min(*figure), seen[1].max(*figure)];
        }
        let tried = Tried {
            values: values.clone(),
            figures,
        };
        let miss = self.miss(&tried);
        if self.nearest.as_ref().is_none_or(|best| miss < self.miss(best)) {
            self.nearest = Some(tried.clone());
        }
        Some(tried)
    }

    /// By how much each figure misses, in its scale.
    pub(super) fn residuals(&self, tried: &Tried) -> Vec<f64> {
        let wants = self.wants.iter().zip(&tried.figures).zip(&self.scales);
        wants
            .map(|((want, figure), scale)| (figure - want.value) / scale)
            .collect()
    }

    /// The sum of the squares of what is missed.
    pub(super) fn miss(&self, tried: &Tried) -> f64 {
        self.residuals(tried).iter().map(|r| r * r).sum()
    }

    /// Whether every figure is within this part of its tolerance.
    pub(super) fn within(&self, tried: &Tried, part: f64) -> bool {
        let mut wants = self.wants.iter().zip(&tried.figures);
        wants.all(|(want, figure)| (figure - want.value).abs() <= part * want.tolerance)
    }

    /// Positions of the parameters that are not counts.
    pub(super) fn continuous(&self) -> Vec<usize> {
        let of = |k: &usize| self.variables[*k].parameter.kind != ParameterKind::Count;
        (0..self.variables.len()).filter(of).collect()
    }
}
