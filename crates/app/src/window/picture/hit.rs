//! What is under the pointer: a point of the path, or an open V.

use zonewright_geometry::{NONE, OpenV, Point};
use zonewright_painter::{Camera, Pick, pick};

use crate::window::state::State;

/// How near the pointer must come to something small, in points.
const REACH: f32 = 9.0;

/// How near the pointer must come to an edge that is picked before the panel there: only when it is exactly on it.
const EXACT: f32 = 0.0;

/// Something that the pointer is over.
#[derive(Clone, Copy, PartialEq, Eq, Debug)]
pub(super) enum Hit {
    /// A point of the path.
    Point(usize),
    /// An open V of the live front, by its place among the open Vs.
    V(usize),
}

/// Finds what is at a place of the picture. A point of the path goes before a V; the nearest goes first.
pub(super) fn at(state: &State, camera: &Camera, pos: egui::Vec2) -> Option<Hit> {
    let path = state.derived.path.as_ref();
    let points = path.map_or(&[][..], |p| &p.placed);
    let point = nearest(camera, pos, points.iter().copied());
    let vs = state.derived.open_on(state.view.side);
    point
        .map(Hit::Point)
        .or_else(|| nearest(camera, pos, vs.iter().map(middle)).map(Hit::V))
}

/// The middle of the panel that an open V would make: where its dot is.
pub(super) fn middle(v: &OpenV) -> Point {
    v.nodes[0] + (v.nodes[2] - v.nodes[0]) * 0.5
}

/// The panel at a place of the picture; exactly on an edge it is one of the edge's panels.
pub(super) fn panel_at(state: &State, camera: &Camera, pos: egui::Vec2) -> Option<u32> {
    let (scene, shell) = (&state.derived.scene, &state.derived.shell);
    match pick(scene, shell, camera, [pos.x, pos.y], EXACT)? {
        Pick::Panel(panel) => Some(panel),
        Pick::Edge(edge) => {
            let panels = shell.edges.get(edge as usize)?.panels;
            panels.into_iter().find(|p| *p != NONE)
        }
        Pick::Vertex(vertex) => {
            let at = shell.panels.iter().position(|p| p.corners.contains(&vertex))?;
            u32::try_from(at).ok()
        }
    }
}

fn nearest(camera: &Camera, pos: egui::Vec2, points: impl Iterator<Item = Point>) -> Option<usize> {
    let lens = camera.lens();
    let mut best: Option<(f32, usize)> = None;
    for (index, point) in points.enumerate() {
        let Some(seen) = lens.project(point) else { continue };
        let far = (egui::Vec2::from(seen.pos) - pos).length();
        if far <= REACH && best.is_none_or(|(least, _)| far < least) {
            best = Some((far, index));
        }
    }
    best.map(|(_, index)| index)
}
