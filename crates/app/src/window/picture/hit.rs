//! What is under the pointer: a point of the path, an open V, or a part of the shell.

use zonewright_geometry::{OpenV, Point, Shell};
use zonewright_painter::{Camera, Pick, pick};

use crate::window::{
    state::State,
    thing::{Kind, Thing},
};

/// How near the pointer must come to something small, in points.
const REACH: f32 = 9.0;

/// How near the pointer must come to a vertex or an edge of the shell, in points.
const PART_REACH: f32 = 5.0;

/// Of a panel that is narrow on the picture, vertices and edges take up no more than this part of its width on each side.
const PART_SHARE: f32 = 0.15;

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

/// The vertex, edge or panel at a place of the picture: small things first, but never so that the panel there cannot be reached.
pub(super) fn part_at(state: &State, camera: &Camera, pos: egui::Vec2) -> Option<Thing> {
    let (scene, shell) = (&state.derived.scene, &state.derived.shell);
    let at = |reach| pick(scene, shell, camera, [pos.x, pos.y], reach);
    let found = match at(0.0) {
        Some(Pick::Panel(panel)) => at(PART_REACH.min(PART_SHARE * width(shell, camera, panel))),
        _ => at(PART_REACH),
    };
    let (kind, index) = match found? {
        Pick::Vertex(vertex) => (Kind::Vertex, vertex),
        Pick::Edge(edge) => (Kind::Edge, edge),
        Pick::Panel(panel) => (Kind::Panel, panel),
    };
    kind.thing(&state.derived, index)
}

/// How wide a panel is across its longer sides on the picture, in points.
fn width(shell: &Shell, camera: &Camera, panel: u32) -> f32 {
    let lens = camera.lens();
    let [a, b, c, d] = shell.corner_points(panel).map(|p| lens.project(p));
    let (Some(a), Some(b), Some(c), Some(d)) = (a, b, c, d) else {
        return f32::INFINITY;
    };
    let [a, b, c, d] = [a, b, c, d].map(|seen| egui::Vec2::from(seen.pos));
    let (one, other) = (c - a, d - b);
    let area = (one.x * other.y - one.y * other.x).abs() * 0.5;
    let longest = [b - a, c - b, d - c, a - d].map(egui::Vec2::length);
    area / longest.into_iter().fold(1.0, f32::max)
}

/// How near the pointer must come to an edge to take hold of it, in points: less than to something that is drawn larger, so
/// that faces can still be pressed on.
const EDGE_REACH: f32 = 5.0;

/// An edge shorter than this on the picture, in points, cannot be taken hold of: nothing of the faces beside it would be left.
const LEAST_EDGE: f32 = 14.0;

/// The edge of the shell that the pointer takes hold of; near a vertex it is the nearest of the edges there.
pub(super) fn edge_at(state: &State, camera: &Camera, pos: egui::Vec2) -> Option<u32> {
    let (scene, shell) = (&state.derived.scene, &state.derived.shell);
    let lens = camera.lens();
    let seen = |v: u32| Some(egui::Vec2::from(lens.project(*shell.points.get(v as usize)?)?.pos));
    let edge = match pick(scene, shell, camera, [pos.x, pos.y], EDGE_REACH)? {
        Pick::Panel(_) => return None,
        Pick::Edge(edge) => edge,
        Pick::Vertex(vertex) => {
            let mut best: Option<(f32, u32)> = None;
            for (index, edge) in (0_u32..).zip(&shell.edges) {
                if !edge.ends.contains(&vertex) {
                    continue;
                }
                let (a, b) = (seen(edge.ends[0])?, seen(edge.ends[1])?);
                let share = ((pos - a).dot(b - a) / (b - a).length_sq().max(f32::MIN_POSITIVE)).clamp(0.0, 1.0);
                let away = (a + (b - a) * share - pos).length();
                if best.is_none_or(|(least, _)| away < least) {
                    best = Some((away, index));
                }
            }
            best?.1
        }
    };
    let [a, b] = shell.edges.get(edge as usize)?.ends;
    (LEAST_EDGE <= (seen(b)? - seen(a)?).length()).then_some(edge)
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
