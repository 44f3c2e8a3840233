//! Taking hold of an edge and dragging its zone.

use std::sync::Arc;

use egui::{Key, Pos2, Rect, Ui, Vec2};
use glam::DMat3;
use zonewright_geometry::{
    NONE, Point, Shell, Vector, ZoneRef,
    edit::{Freedom, Measures, freedom, set_together, set_zone},
    grow,
    snap::{Around, Drawing, on_axis, snap_edge, still_vertices},
};
use zonewright_painter::{Camera, Projection};
use zonewright_shop::text;

use super::{
    hit,
    point_snap::PointSnap,
    snapping::{Names, rules, star_directions, words},
};
use crate::{
    document::Design,
    window::{panels::Cx, path_place::turned, state::State, zone_table::zone_name, zones::ZoneAct},
};

/// How a drag goes: keys that are held, the toggles they turn round, and the kind of view.
#[derive(Clone, Copy, PartialEq, Debug)]
pub(crate) struct Held {
    /// The axis that is locked: x, y or z.
    pub axis: Option<Vector>,
    /// l: the length alone.
    pub length: bool,
    /// a: symmetric zones together, or not.
    pub together: bool,
    /// n: no snapping.
    pub snap: bool,
    /// The drawing that the drag goes on in, when the pane is one.
    pub drawing: Option<Drawing>,
}

impl Held {
    /// What is held now.
    pub(super) fn now(state: &State, ui: &Ui, pane: usize) -> Self {
        let pane = state.panes.pane(pane);
        let down = |key| ui.input(|i| i.key_down(key) && !i.modifiers.command);
        let axes = [(Key::X, Vector::X), (Key::Y, Vector::Y), (Key::Z, Vector::Z)];
        let view = &state.view.zones;
        Self {
            axis: axes.into_iter().find(|(key, _)| down(*key)).map(|(_, axis)| axis),
            length: down(Key::L),
            together: view.together != down(Key::A),
            snap: view.snap && !down(Key::N),
            drawing: pane.is_measured().then(|| Drawing::along(pane.camera.lens().forward)),
        }
    }
}

/// What is said at the pointer and marked in the picture.
#[derive(Clone, PartialEq, Debug, Default)]
pub(crate) struct Tip {
    /// Lines of text.
    pub lines: Vec<String>,
    /// Where something was snapped to.
    pub ring: Option<Point>,
    /// The line that something was snapped onto.
    pub line: Option<[Point; 2]>,
}

impl Tip {
    /// Moves the marks along.
    fn shift(&mut self, by: Vector) {
        self.ring = self.ring.map(|point| point + by);
        self.line = self.line.map(|ends| ends.map(|point| point + by));
    }
}

/// What the pointer is over among the zones, and what is dragged there.
#[derive(Debug, Default)]
pub(crate) struct ZoneWork {
    /// The zone that the pointer is over, by index in the shell, and where the pointer is in which pane.
    pub(super) over: Option<(u32, usize, Vec2)>,
    probed: Option<(Probe, Option<u32>)>,
    /// The zone that is dragged.
    pub(super) drag: Option<ZoneDrag>,
    /// What a dragged point snaps to.
    pub(super) point: Option<PointSnap>,
    /// What the drag has to say, and where the pointer is.
    pub(super) tip: Option<(Tip, Pos2)>,
}

impl ZoneWork {
    /// The drag is over.
    pub(super) fn end(&mut self) {
        self.drag = None;
        self.point = None;
        self.tip = None;
    }

    /// The zone that is dragged, by index in the shell.
    pub(super) fn dragged(&self) -> Option<u32> {
        self.drag.as_ref().map(|drag| drag.zone)
    }

    /// A movement of the pointer in a drag of a zone.
    pub(super) fn drag_on(&mut self, cx: Cx<'_>, camera: &Camera, pos: Pos2, held: Held) -> Option<ZoneAct> {
        let (act, tip) = self.drag.as_mut()?.step(cx.state, camera, pos, held);
        self.tip = Some((tip, pos));
        Some(act)
    }
}

/// What a search under the pointer depends on.
#[derive(Clone, Copy, PartialEq, Debug)]
struct Probe {
    pane: usize,
    pos: Vec2,
    camera: Camera,
    scene: u64,
}

/// Finds the edge under the pointer, lights its zone and names it.
pub(super) fn hover(cx: Cx<'_>, ui: &Ui, pane: usize, pos: Vec2, work: &mut ZoneWork) {
    let camera = cx.state.panes.pane(pane).camera;
    let probe = Probe {
        pane,
        pos,
        camera,
        scene: cx.state.derived.scene_revision,
    };
    let zone = match work.probed {
        Some((before, found)) if before == probe => found,
        _ => {
            let edge = hit::edge_at(cx.state, &camera, pos);
            edge.and_then(|edge| *cx.state.derived.zones.of_edge.get(edge as usize)?)
        }
    };
    work.probed = Some((probe, zone));
    if let Some(zone) = zone {
        work.over = Some((zone, pane, pos));
        ui.ctx().set_cursor_icon(egui::CursorIcon::Grab);
    }
}

/// A drag of a zone.
#[derive(Debug)]
pub(crate) struct ZoneDrag {
    /// The design and its shell when the drag began.
    base: Arc<Design>,
    shell: Arc<Shell>,
    /// The zone, by index in the shell and by name.
    zone: u32,
    name: ZoneRef,
    /// The edge that was taken, and its end that is held.
    edge: u32,
    near: u32,
    far: u32,
    near_at: Point,
    far_at: Point,
    /// From the held end to the other, as the shell stands.
    vector: Vector,
    /// 1 when that is along the zone, -1 when against it.
    along: f64,
    /// How many times the change of the vector the far end moves: more than once where edges of the zone lie before it.
    carried: f64,
    /// From the grown frame to the one where the shell stands, for vectors.
    placed: DMat3,
    from: Pos2,
    /// What stays while the zone changes alone, and while its symmetric zones go along.
    still: [Option<Still>; 2],
}

/// What stays during a drag.
#[derive(Debug, Default)]
struct Still {
    vertices: Vec<Point>,
    neighbours: Vec<(u32, Vector)>,
}

/// Begins a drag when there is an edge at the place that was pressed. The end that the zone carries along follows the pointer, the other one is
/// held; where the zone carries both alike, the one nearer to the pointer follows.
pub(super) fn begin(state: &State, camera: &Camera, from: Pos2, rect: Rect) -> Option<ZoneDrag> {
    if state.derived.revision != state.history.revision() {
        // The shell that is shown is not that of the design yet.
        return None;
    }
    let pos = from - rect.min;
    let edge = hit::edge_at(state, camera, pos)?;
    let shell = Arc::clone(&state.derived.shell);
    let zone = (*state.derived.zones.of_edge.get(edge as usize)?)?;
    let away = |v: u32| {
        let seen = camera.project(shell.points[v as usize]);
        seen.map_or(f32::MAX, |seen| (Vec2::from(seen.pos) - pos).length())
    };
    let mut ends = shell.edges[edge as usize].ends;
    if away(ends[0]) < away(ends[1]) {
        ends.reverse();
    }
    let mut drag = ZoneDrag {
        base: Arc::clone(state.design()),
        name: shell.zones[zone as usize].name,
        zone,
        edge,
        near: ends[0],
        far: ends[1],
        near_at: Point::ORIGIN,
        far_at: Point::ORIGIN,
        vector: Vector::ZERO,
        along: 1.0,
        carried: 1.0,
        placed: turned(&state.shape().placement),
        from,
        still: [None, None],
        shell,
    };
    let trial = drag.trial(false);
    let moved = |v: u32| trial.as_ref().and_then(|(after, _)| drag.moved(after, v));
    if let (Some(near), Some(far)) = (moved(drag.near), moved(drag.far))
        && far.length() < near.length() * (1.0 - ALIKE)
    {
        core::mem::swap(&mut drag.near, &mut drag.far);
    }
    drag.take_hold(trial.as_ref());
    Some(drag)
}

/// Movements that differ by less than this part are alike.
const ALIKE: f64 = 1e-6;

impl ZoneDrag {
    /// Works out what the ends and a trial say.
    fn take_hold(&mut self, trial: Option<&(Shell, Vector)>) {
        let [near_at, far_at] = [self.near, self.far].map(|v| self.shell.points[v as usize]);
        let whole = self.placed * self.shell.zones[self.zone as usize].vector;
        self.along = if (far_at - near_at).dot(whole) < 0.0 { -1.0 } else { 1.0 };
        self.vector = whole * self.along;
        self.far_at = far_at;
        // Of a side that is met in its middle only a part may have been pressed.
        self.near_at = far_at - self.vector;
        let Some((after, change)) = trial else { return };
        let change = self.placed * *change * self.along;
        if let Some(moved) = self.moved(after, self.far) {
            let times = moved.dot(change) / change.length_squared();
            // Otherwise the ground or the closing of the front moves the shell besides, and the held end is what counts.
            if 1.0 <= times && moved.distance(change * times) <= ALIKE * change.length() {
                self.carried = times;
            }
        }
        self.still[0] = Some(self.still_after(after, change.length()));
    }

    /// By how much a vertex has moved in a trial; none when the shell has grown otherwise.
    fn moved(&self, after: &Shell, v: u32) -> Option<Vector> {
        let same = after.points.len() == self.shell.points.len();
        same.then(|| after.points[v as usize] - self.shell.points[v as usize])
    }

    /// What a place of the pointer makes of the zone.
    fn step(&mut self, state: &State, camera: &Camera, pos: Pos2, held: Held) -> (ZoneAct, Tip) {
        let by = pos - self.from;
        let moved = camera.move_in_view_plane(self.far_at, by.x, by.y) / if held.together { 1.0 } else { self.carried };
        let free = if held.length {
            Freedom::Line(self.vector.normalize())
        } else if held.together {
            self.free_together()
        } else {
            Freedom::Space
        };
        let sight = sight(camera, self.far_at + moved);
        let wanted = match held.axis {
            // A locked axis wins over the line of sight.
            Some(axis) => self.vector + axis * moved.dot(axis),
            None => self.vector + moved,
        };
        let wanted = match (held.axis, free) {
            (Some(_), Freedom::Plane(across)) => free.nearest(wanted, across),
            _ => free.nearest(wanted, sight),
        };
        let mut tip = Tip::default();
        let vector = if held.snap {
            self.snapped(state, camera, wanted, free, held, &mut tip)
        } else {
            wanted
        };
        let measures = Measures::of(vector);
        let units = state.units();
        tip.lines.insert(
            0,
            format!(
                "{}: {}, slope {}, azimuth {}",
                zone_name(self.zone),
                units.length(measures.length_mm),
                text::degrees(measures.slope.degrees(), 1),
                text::degrees(measures.azimuth.degrees(), 1)
            ),
        );
        let act = ZoneAct::Drag {
            base: Arc::clone(&self.base),
            zone: self.name,
            vector: self.placed.inverse() * vector * self.along,
            together: held.together,
        };
        (act, tip)
    }

    fn free_together(&self) -> Freedom {
        let turned = |v: Vector| (self.placed * v).normalize();
        match freedom(&self.base.shape, self.name) {
            Ok(Freedom::Plane(across)) => Freedom::Plane(turned(across)),
            Ok(Freedom::Line(along)) => Freedom::Line(turned(along)),
            Ok(Freedom::Space) | Err(_) => Freedom::Space,
        }
    }

    fn snapped(
        &mut self,
        state: &State,
        camera: &Camera,
        wanted: Vector,
        free: Freedom,
        held: Held,
        tip: &mut Tip,
    ) -> Vector {
        let rules = rules(camera, self.far_at, state.units());
        let star = star_directions(state);
        let near = self.near_at;
        // Where the held end stands by now, for the marks.
        let shell = &state.derived.shell;
        let now = shell.points.get(self.near as usize).copied();
        let now = now.filter(|_| shell.points.len() == self.shell.points.len());
        let shift = now.map_or(Vector::ZERO, |now| now - self.shell.points[self.near as usize]);
        let still = self.still(held.together);
        let neighbours: Vec<Vector> = still.neighbours.iter().map(|(_, v)| *v).collect();
        let around = Around {
            vertices: &still.vertices,
            directions: &star,
            neighbours: &neighbours,
        };
        let zones: Vec<u32> = still.neighbours.iter().map(|(zone, _)| *zone).collect();
        let snapped = match (held.axis, held.drawing.filter(|_| free == Freedom::Space)) {
            (Some(axis), _) => on_axis(near, wanted, axis, &around, &rules),
            (None, Some(drawing)) => drawing.snap_edge(near, wanted, &around, &rules),
            (None, None) => snap_edge(near, wanted, free, &around, &rules),
        };
        let names = Names {
            units: state.units(),
            star: state.view.zones.star.star(&state.shape().start),
            neighbours: &zones,
        };
        words(&snapped.to, &names, tip, &still.vertices, [near, near + snapped.value]);
        tip.shift(shift);
        snapped.value
    }

    /// What stays; it is found by trying a small change, once for each way of dragging.
    fn still(&mut self, together: bool) -> &Still {
        let place = usize::from(together);
        if self.still[place].is_none() {
            let trial = self.trial(together);
            let still = trial.map(|(after, change)| self.still_after(&after, (self.placed * change).length()));
            self.still[place] = Some(still.unwrap_or_default());
        }
        self.still[place].get_or_insert_with(Still::default)
    }

    /// The shell after a small change of the zone, and the change in the grown frame; none when the zone cannot be changed.
    fn trial(&self, together: bool) -> Option<(Shell, Vector)> {
        let own = self.shell.zones[self.zone as usize].vector;
        let change = Vector::from_array(AWRY).normalize() * (own.length() * TRIAL);
        let set = if together { set_together } else { set_zone };
        let shape = set(&self.base.shape, self.name, own + change).ok()?;
        Some((grow(&shape).0, change))
    }

    fn still_after(&self, after: &Shell, size_mm: f64) -> Still {
        let panels = self.shell.edges[self.edge as usize].panels;
        let neighbours = panels
            .into_iter()
            .filter(|panel| *panel != NONE)
            .flat_map(|panel| self.shell.panels[panel as usize].letters)
            .map(|letter| self.shell.zone_of(letter))
            .filter(|zone| {
                let vector = |shell: &Shell| shell.zones.get(*zone as usize).map(|z| z.vector);
                *zone != self.zone && vector(&self.shell) == vector(after)
            })
            .map(|zone| (zone, self.placed * self.shell.zones[zone as usize].vector));
        Still {
            neighbours: neighbours.collect(),
            vertices: still_vertices(&self.shell, after, Some(self.near), size_mm),
        }
    }
}

/// How much of a zone's length the trial change is: small, so that the shell grows alike.
const TRIAL: f64 = 1e-3;

/// The direction of the trial change, parallel to nothing that a design is likely to have.
const AWRY: [f64; 3] = [0.32, -0.57, 0.76];

/// The direction in which a point is seen, of length 1.
fn sight(camera: &Camera, point: Point) -> Vector {
    let lens = camera.lens();
    match camera.projection {
        Projection::Parallel => lens.forward,
        Projection::Perspective => (point - lens.eye).normalize_or(lens.forward),
    }
}
