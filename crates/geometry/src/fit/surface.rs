//! The iteration.

use super::{
    cover::{Cover, Held},
    hurry::Hurry,
    net::{Net, Solver, many},
    paths::{Fit, FitEnd, FitOptions, FitStep, Paths},
    target::{Closest, Target},
};
use crate::{Point, Vector};

/// Fits the two paths of a translation surface to a target, from where they are.
///
/// `watch` is told each step and says whether to go on. The fit is the best there was, whenever it ends.
pub fn fit_translation(
    begin: &Paths,
    target: &Target,
    options: &FitOptions,
    mut watch: impl FnMut(&FitStep) -> bool,
) -> Fit {
    let net = Net::of(begin);
    let solver = Solver::new(&net, options);
    let cover = Cover::new(target, net.r.len() * net.s.len(), options.cover).filter(|_| net.r.len() > 1);
    let cover = cover.as_ref();
    let mut now = State::new(net, target, cover, None);
    let mut step = now.step(&solver, cover);
    let mut history = vec![step];
    let mut hurry = Hurry::default();
    let mut end = FitEnd::Iterations;
    if !watch(&step) {
        end = FitEnd::Stopped;
    } else {
        for _ in 0..options.iterations {
            let plain = solver.solve(&now.net, &now.places(), cover.map(|cover| (cover, &now.held[..])));
            let moved = moved(&now.net, &plain);
            if moved <= options.settled_mm {
                end = FitEnd::Settled;
                break;
            }
            let ahead = hurry.ahead(&now.net, &plain);
            let mut next = ahead.map(|net| State::new(net, target, cover, Some(&now)));
            if next
                .as_ref()
                .is_none_or(|next| next.step(&solver, cover).sum_mm2 > step.sum_mm2)
            {
                if next.is_some() {
                    hurry.forget();
                }
                next = Some(State::new(plain, target, cover, Some(&now)));
            }
            let Some(next) = next else { break };
            let after = next.step(&solver, cover);
            // Only rounding can make it grow: there is nothing left to gain.
            if after.sum_mm2 > step.sum_mm2 {
                end = FitEnd::Settled;
                break;
            }
            now = next;
            step = after;
            history.push(step);
            if !watch(&step) {
                end = FitEnd::Stopped;
                break;
            }
        }
    }
    Fit {
        paths: now.net.paths(),
        history,
        left_mm: now.closest.iter().map(|c| c.distance_mm).collect(),
        end,
    }
}

/// Fits one path to a target: to the line of an arch or a site.
///
/// `begin` are its points. Without smoothing the points that are near the target go to its closest places and stay there.
/// `watch` as in [`fit_translation`]; the fit's second path is empty.
pub fn fit_path(begin: &[Point], target: &Target, options: &FitOptions, watch: impl FnMut(&FitStep) -> bool) -> Fit {
    let paths = Paths {
        origin: begin.first().copied().unwrap_or_default(),
        a: begin.windows(2).map(|two| two[1] - two[0]).collect(),
        b: Vec::new(),
    };
    fit_translation(&paths, target, options, watch)
}

/// A net with the closest places of its nodes.
struct State {
    net: Net,
    closest: Vec<Closest>,
    held: Vec<Held>,
}

impl State {
    fn new(net: Net, target: &Target, cover: Option<&Cover>, before: Option<&Self>) -> Self {
        let hint = |k: usize| before.and_then(|b| b.closest.get(k)).map(|c| c.part);
        let closest = net
            .nodes()
            .enumerate()
            .map(|(k, node)| target.closest_from(node, hint(k)))
            .collect();
        let held = cover.map_or_else(Vec::new, |cover| cover.held(&net));
        Self { net, closest, held }
    }

    fn places(&self) -> Vec<Point> {
        self.closest.iter().map(|c| c.at).collect()
    }

    fn step(&self, solver: &Solver, cover: Option<&Cover>) -> FitStep {
        let squares: f64 = self.closest.iter().map(|c| c.distance_mm * c.distance_mm).sum();
        let covering: f64 = self.held.iter().map(|h| h.distance_mm * h.distance_mm).sum();
        let weight = cover.map_or(0.0, |cover| cover.weight);
        let (sum, counted) = (
            squares + covering * weight + solver.roughness(&self.net),
            weight * many(self.held.len()),
        );
        FitStep {
            rms_mm: (squares / many(self.closest.len())).sqrt(),
            largest_mm: self.closest.iter().map(|c| c.distance_mm).fold(0.0, f64::max),
            uncovered_mm: self.held.iter().map(|h| h.distance_mm).fold(0.0, f64::max),
            mean_mm: (sum / (many(self.closest.len()) + counted)).sqrt(),
            sum_mm2: sum,
        }
    }
}

/// How far a node can have moved.
fn moved(from: &Net, to: &Net) -> f64 {
    let most = |a: &[Vector], b: &[Vector]| a.iter().zip(b).map(|(a, b)| a.distance(*b)).fold(0.0, f64::max);
    most(&from.r, &to.r) + most(&from.s, &to.s)
}
