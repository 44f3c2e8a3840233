//! What a search answers: the solution, or why there is none.

use super::{
    Effort, Figure, Free,
    problem::{Problem, Tried},
    solve,
};
use crate::{Code, ParameterKind, Shape};

/// A bound holds when the value is as near to it as this part of the way that the variable could go.
const AT_BOUND: f64 = 1e-6;

/// A figure that varies by less than this part of itself over all that was tried does not depend on what may change.
const SAME: f64 = 1e-9;

/// A parameter and what became of it.
#[derive(Clone, PartialEq, Debug)]
pub struct Change {
    /// Its key.
    pub key: String,
    /// Its plain name.
    pub name: String,
    /// What its number is.
    pub kind: ParameterKind,
    /// Its value before.
    pub before: f64,
    /// Its value now.
    pub after: f64,
}

/// A figure and what became of it, in the figure's unit.
#[derive(Clone, Copy, PartialEq, Debug)]
pub struct Reached {
    /// Which.
    pub figure: Figure,
    /// Its value before; none when there was none.
    pub before: Option<f64>,
    /// The wanted value.
    pub wanted: f64,
    /// By how much it may miss.
    pub tolerance: f64,
    /// Its value now.
    pub after: f64,
}

impl Reached {
    /// Whether it is as wanted, within its tolerance.
    #[must_use]
    pub fn is_met(&self) -> bool {
        (self.after - self.wanted).abs() <= self.tolerance
    }
}

/// A shape whose figures are as wanted, or as near as was reached.
#[derive(Clone, PartialEq, Debug)]
pub struct Solution {
    /// The shape.
    pub shape: Shape,
    /// Every parameter that may change, also those that did not, in the order in which they were given.
    pub changes: Vec<Change>,
    /// Every wanted figure.
    pub figures: Vec<Reached>,
    /// How many shells were grown to find it.
    pub shells: usize,
}

/// A figure that is missed.
#[derive(Clone, Copy, PartialEq, Debug)]
pub struct Missed {
    /// Which, by its place among the wanted.
    pub want: usize,
    /// By how much: the nearest value less the wanted one.
    pub by: f64,
}

/// A bound that holds a parameter back.
#[derive(Clone, PartialEq, Debug)]
pub struct Held {
    /// The parameter, by its place among those that may change.
    pub parameter: usize,
    /// The bound.
    pub bound: f64,
    /// Whether it is the greatest value, not the least.
    pub upper: bool,
}

/// What a parameter would have to be, were it not held.
#[derive(Clone, Copy, PartialEq, Debug)]
pub struct Needed {
    /// The parameter, by its place among those that may change.
    pub parameter: usize,
    /// The value with which all figures would be as wanted.
    pub value: f64,
}

/// Why there is no solution.
#[derive(Clone, PartialEq, Debug)]
pub enum Why {
    /// No figure is wanted.
    NothingWanted,
    /// No parameter may change.
    NothingFree,
    /// A wanted value is no finite number, or its tolerance is not more than 0.
    NoNumber(Figure),
    /// There is no parameter of this key.
    NoSuchParameter(String),
    /// The bounds of this parameter leave no value.
    EmptyBounds(String),
    /// The shape as it is does not grow.
    NotGrown(Code),
    /// A figure that no shape tried has: it does not exist here.
    NoFigure(Figure),
    /// This figure stays the same whatever the chosen parameters are.
    Independent(Figure),
    /// What was reached falls short; a bound may hold it.
    Missed {
        /// The figures that are missed, the worst first.
        missed: Vec<Missed>,
        /// The bounds that hold.
        held: Vec<Held>,
        /// What the parameters that are held would have to be; empty when that is not known.
        needed: Vec<Needed>,
        /// Whether the search ended only because it had done all the work that is allowed.
        exhausted: bool,
    },
    /// The search was stopped.
    Stopped,
}

/// Why there is no solution, and the nearest that was reached.
#[derive(Clone, PartialEq, Debug)]
pub struct Unsolved {
    /// Why.
    pub why: Why,
    /// The nearest; none when nothing was tried.
    pub nearest: Option<Box<Solution>>,
}

impl Unsolved {
    pub(super) const fn bare(why: Why) -> Self {
        Self { why, nearest: None }
    }
}

pub(super) fn solution(problem: &Problem<'_>, found: &Tried) -> Solution {
    let changes = problem
        .variables
        .iter()
        .zip(&found.values)
        .map(|(variable, after)| Change {
            key: variable.parameter.key.clone(),
            name: variable.parameter.name.clone(),
            kind: variable.parameter.kind,
            before: variable.parameter.value,
            after: *after,
        });
    let figures = problem.wants.iter().zip(&problem.before).zip(&found.figures);
    let figures = figures.map(|((want, before), after)| Reached {
        figure: want.figure,
        before: *before,
        wanted: want.value,
        tolerance: want.tolerance,
        after: *after,
    });
    Solution {
        shape: problem
            .shape_with(&found.values)
            .unwrap_or_else(|| problem.shape.clone()),
        changes: changes.collect(),
        figures: figures.collect(),
        shells: problem.shells,
    }
}

pub(super) fn unsolved(mut problem: Problem<'_>, free: &[Free]) -> Unsolved {
    let Some(nearest) = problem.nearest.clone() else {
        let missing = problem.before.iter().position(Option::is_none);
        return Unsolved::bare(match missing {
            _ if problem.stopped => Why::Stopped,
            Some(k) => Why::NoFigure(problem.wants[k].figure),
            None => Why::NotGrown(Code::NoPanels),
        });
    };
    let near = Some(Box::new(solution(&problem, &nearest)));
    if problem.stopped {
        return Unsolved {
            why: Why::Stopped,
            nearest: near,
        };
    }
    let mut missed: Vec<(f64, Missed)> = Vec::new();
    for (k, (want, figure)) in problem.wants.iter().zip(&nearest.figures).enumerate() {
        let by = figure - want.value;
        if by.abs() > want.tolerance {
            missed.push(((by / problem.scales[k]).abs(), Missed { want: k, by }));
        }
    }
    missed.sort_by(|a, b| b.0.total_cmp(&a.0));
    for (_, miss) in &missed {
        let [least, most] = problem.seen[miss.want];
        if most - least <= SAME * problem.scales[miss.want] {
            let why = Why::Independent(problem.wants[miss.want].figure);
            return Unsolved { why, nearest: near };
        }
    }
    let exhausted = problem.exhausted();
    let held = held(&mut problem, &nearest);
    let needed = if held.is_empty() {
        Vec::new()
    } else {
        needed(problem, free, &held)
    };
    Unsolved {
        why: Why::Missed {
            missed: missed.into_iter().map(|m| m.1).collect(),
            held,
            needed,
            exhausted,
        },
        nearest: near,
    }
}

/// The parameters that are at a bound where going on would bring the figures nearer.
fn held(problem: &mut Problem<'_>, nearest: &Tried) -> Vec<Held> {
    let mut held = Vec::new();
    let residuals = problem.residuals(nearest);
    for k in 0..problem.variables.len() {
        let variable = problem.variables[k].clone();
        let [least, most] = variable.bounds;
        let value = nearest.values[k];
        let slack = AT_BOUND * variable.parameter.value.abs().max(1e-3);
        let upper = (value - most).abs() <= slack;
        if !upper && (value - least).abs() > slack {
            continue;
        }
        let outward = if upper { 1.0 } else { -1.0 };
        let gains = if variable.is_count() {
            // Towards the inside it gets worse.
            let mut inside = nearest.clone();
            inside.values[k] -= outward;
            let back = problem.try_values(&inside.values);
            back.is_some_and(|back| problem.miss(&back) > problem.miss(nearest))
        } else {
            let slopes = problem.jacobian(nearest, &[k]);
            let gain: f64 = slopes.iter().zip(&residuals).map(|(row, r)| row[0] * r).sum();
            gain * outward < 0.0
        };
        if gains {
            held.push(Held {
                parameter: k,
                bound: if upper { most } else { least },
                upper,
            });
        }
    }
    held
}

/// What the held parameters would have to be, were their narrower bounds not there.
fn needed(problem: Problem<'_>, free: &[Free], held: &[Held]) -> Vec<Needed> {
    let mut wider: Vec<Free> = Vec::new();
    let mut narrowed = false;
    for (k, variable) in problem.variables.iter().enumerate() {
        let key = &variable.parameter.key;
        let mut own = free
            .iter()
            .find(|f| f.key == *key)
            .cloned()
            .unwrap_or_else(|| Free::new(key));
        for held in held.iter().filter(|h| h.parameter == k) {
            narrowed |= own.bounds[usize::from(held.upper)].take().is_some();
        }
        wider.push(own);
    }
    if !narrowed {
        return Vec::new();
    }
    let Problem { shape, wants, stop, .. } = problem;
    match solve(shape, wants, &wider, Effort::default(), stop) {
        Ok(found) => held
            .iter()
            .map(|h| Needed {
                parameter: h.parameter,
                value: found.changes[h.parameter].after,
            })
            .collect(),
        Err(_) => Vec::new(),
    }
}
