//! Snapping a dragged point of the path.

use std::sync::Arc;

use zonewright_geometry::{
    Point, Shell, Vector, grow,
    snap::{Around, on_axis, snap_point, still_vertices},
    start::DragRule,
};
use zonewright_painter::Camera;

use super::{
    snapping::{Names, rules, star_directions, words},
    zone_drag::{Held, Tip, ZoneWork},
};
use crate::{
    document::Design,
    window::{execute, panels::Cx, path_place::PlacedPath, state::State},
};

/// What a dragged point snaps to.
#[derive(Debug)]
pub(crate) struct PointSnap {
    base: Arc<Design>,
    shell: Arc<Shell>,
    point: usize,
    own: Point,
    /// The neighbours that stay.
    before: Option<Point>,
    behind: Option<Point>,
    rule: DragRule,
    still: Option<Vec<Point>>,
}

/// How far the trial movement goes, in millimetres: small, so that the shell grows alike.
const TRIAL_MM: f64 = 0.01;

impl PointSnap {
    /// Begins with a point of the path.
    pub(super) fn begin(state: &State, path: &PlacedPath, point: usize) -> Option<Self> {
        let count = path.placed.len();
        let rule = state.view.rule;
        let before = match point {
            0 => path.closed.then(|| count.checked_sub(1)).flatten(),
            _ => Some(point - 1),
        };
        let behind = match rule {
            DragRule::Tail => None,
            DragRule::Neighbours if point + 1 < count => Some(point + 1),
            DragRule::Neighbours => path.closed.then_some(0),
        };
        let place = |at: Option<usize>| at.filter(|at| *at != point).and_then(|at| path.placed.get(at).copied());
        Some(Self {
            base: Arc::clone(state.design()),
            shell: Arc::clone(&state.derived.shell),
            point,
            own: *path.own.get(point)?,
            before: place(before),
            behind: place(behind),
            rule,
            still: None,
        })
    }

    /// The vertices that stay, found by a trial movement.
    fn find_still(&self) -> Vec<Point> {
        let trial = self.own + Vector::new(0.36, -0.48, 0.8) * TRIAL_MM;
        let moved = execute::moved_path(&self.base.shape, self.point, trial, self.rule);
        moved.map_or_else(Vec::new, |shape| {
            let (after, _) = grow(&shape);
            still_vertices(&self.shell, &after, None, TRIAL_MM)
        })
    }
}

impl ZoneWork {
    /// Snaps the movement of a dragged point; all movements are in the path's own frame.
    pub(super) fn snap_point(
        &mut self,
        cx: Cx<'_>,
        camera: &Camera,
        placed: Point,
        path: &PlacedPath,
        by: Vector,
        held: Held,
    ) -> Vector {
        self.tip = None;
        let Some(point) = self.point.as_mut().filter(|_| held.snap) else {
            return by;
        };
        let state = cx.state;
        let still = point.still.take().unwrap_or_else(|| point.find_still());
        let star = star_directions(state);
        let around = Around {
            vertices: &still,
            directions: &star,
            neighbours: &[],
        };
        let rules = rules(camera, placed, state.units());
        let wanted = placed + path.placed_movement(by);
        let snapped = match (held.axis, held.drawing) {
            (Some(axis), _) => {
                let axis = path.placed_movement(axis).normalize();
                let snapped = on_axis(Point::ORIGIN, wanted.0, axis, &around, &rules);
                (Point(snapped.value), snapped.to)
            }
            (None, Some(drawing)) => {
                let snapped = drawing.snap_point(wanted, point.before, point.behind, &around, &rules);
                (snapped.value, snapped.to)
            }
            (None, None) => {
                let snapped = snap_point(wanted, point.before, point.behind, &around, &rules);
                (snapped.value, snapped.to)
            }
        };
        let mut tip = Tip::default();
        let names = Names {
            units: state.units(),
            star: state.view.zones.star.star(&state.shape().start),
            neighbours: &[],
        };
        let from = point.before.or(point.behind).unwrap_or(snapped.0);
        words(&snapped.1, &names, &mut tip, &still, [from, snapped.0]);
        point.still = Some(still);
        let pos = camera.project(snapped.0).map(|seen| egui::Pos2::from(seen.pos));
        self.tip = pos.map(|pos| (tip, pos));
        path.own_movement(snapped.0 - placed)
    }
}
