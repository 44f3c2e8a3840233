//! The grown shell: shared vertices, panels, edges, rims, seams.

use crate::{LetterName, Maker, PanelName, Point, Role, Side, Sign, StepId, Vector, ZoneRef, finding::Finding};

/// Stands for "no panel" and "no letter" in the packed arrays.
pub const NONE: u32 = u32::MAX;

/// A panel: a parallelogram.
///
/// Side k runs from corner k to corner k + 1. Sides 0 and 2 belong to the zone of `letters[0]`, sides 1 and 3
/// to the zone of `letters[1]`.
#[derive(Clone, Copy, PartialEq, Eq, Debug)]
pub struct Panel {
    /// Vertices, counter-clockwise seen from outside.
    pub corners: [u32; 4],
    /// The two letters whose exchange made it, by index in [`Shell::letters`].
    pub letters: [u32; 2],
    /// The course: 1, 2, 3 ... on the fore side, -1, -2, -3 ... on the aft side.
    pub course: i32,
}

/// An edge. Where panels meet along part of a side, the side is split into several edges first.
#[derive(Clone, Copy, PartialEq, Eq, Debug)]
pub struct Edge {
    /// Its two vertices.
    pub ends: [u32; 2],
    /// The panel that runs along it from `ends[0]` to `ends[1]`, and the one that runs against it; [`NONE`] on a rim.
    ///
    /// Where sides disagree (see [`crate::Code::SidesDisagree`]) both run the same way.
    pub panels: [u32; 2],
}

impl Edge {
    /// The only panel of a rim edge.
    #[must_use]
    pub const fn rim_panel(&self) -> Option<u32> {
        match self.panels {
            [NONE, NONE] => None,
            [panel, NONE] | [NONE, panel] => Some(panel),
            _ => None,
        }
    }
}

/// Vertices that lie inside a side of a panel, where a neighbour's corner butts against it.
#[derive(Clone, PartialEq, Eq, Debug)]
pub struct Tee {
    /// The panel.
    pub panel: u32,
    /// The side, 0 to 3.
    pub side: u8,
    /// The vertices, in order from corner `side` to the next.
    pub vertices: Vec<u32>,
}

/// An edge where more than two panels meet: the two in [`Edge::panels`], and these.
#[derive(Clone, PartialEq, Eq, Debug)]
pub struct CrowdedEdge {
    /// The edge.
    pub edge: u32,
    /// The panels beyond the second.
    pub more: Vec<u32>,
}

/// A closed walk along the border of the shell, with the shell on its left seen from outside. Where it comes to an edge of three panels, the walk
/// may end.
#[derive(Clone, PartialEq, Eq, Debug)]
pub struct Rim {
    /// The vertices in order.
    pub vertices: Vec<u32>,
    /// `edges[k]` runs from `vertices[k]` to the next.
    pub edges: Vec<u32>,
}

/// A line along which panels meet with parts of their sides.
#[derive(Clone, PartialEq, Eq, Debug)]
pub struct Seam {
    /// Its vertices, in order along the line; at least one is a T.
    pub vertices: Vec<u32>,
}

/// Vertices at the same place, of sheets that touch only there.
#[derive(Clone, PartialEq, Eq, Debug)]
pub struct Pinch {
    /// Two or more vertices.
    pub vertices: Vec<u32>,
}

/// Where a zone's vector comes from.
#[derive(Clone, Copy, PartialEq, Eq, Debug)]
pub enum ZoneKind {
    /// The user's own vector.
    Own,
    /// Another zone's vector.
    Linked,
    /// The start's parameters.
    Derived,
}

/// A zone: one edge vector.
#[derive(Clone, Copy, PartialEq, Debug)]
pub struct Zone {
    /// Its vector in the grown frame, before placement, in millimetres.
    pub vector: Vector,
    /// Its name.
    pub name: ZoneRef,
    /// Where the vector comes from.
    pub kind: ZoneKind,
    /// The zone that it counts as: itself, or the one it is linked to.
    pub counts_as: u32,
    /// Whether it is linked against the zone it counts as.
    pub reversed: bool,
}

/// A letter that was on a front at some time.
#[derive(Clone, Copy, PartialEq, Eq, Debug)]
pub struct Letter {
    /// What put it there.
    pub maker: Maker,
    /// Its index in what the maker made.
    pub index: u32,
    /// Its sign.
    pub sign: Sign,
    /// The zig letter of the V that it was spliced into, by index in [`Shell::letters`]; [`NONE`] for the first word's.
    pub at: u32,
    /// Its zone, by index in [`Shell::zones`].
    pub zone: u32,
    /// The role with which it came.
    pub born: Role,
}

/// A letter on a front as it stands.
#[derive(Clone, Copy, PartialEq, Eq, Debug)]
pub struct FrontLetter {
    /// The letter, by index in [`Shell::letters`].
    pub letter: u32,
    /// The role that it has now.
    pub role: Role,
}

/// A front as it stands after the last step, in the placed frame.
#[derive(Clone, PartialEq, Debug, Default)]
pub struct FrontState {
    /// Whether the last letter leads back to the first.
    pub closed: bool,
    /// The letters in order.
    pub letters: Vec<FrontLetter>,
    /// `nodes[k]` is the place before letter k; the last is the place after the last letter (on a closed front, the first again).
    pub nodes: Vec<Point>,
}

/// How many panels a course has.
#[derive(Clone, Copy, PartialEq, Eq, Debug)]
pub struct Course {
    /// 1, 2, 3 ... fore; -1, -2, -3 ... aft.
    pub number: i32,
    /// Its panels.
    pub panels: u32,
    /// The step that laid it.
    pub step: StepId,
    /// Which pass of that step laid it: 1 for the first. A pass that makes no panel counts too, but is no course.
    pub pass: u32,
}

/// An open V of a front as it stands.
#[derive(Clone, PartialEq, Debug)]
pub struct OpenV {
    /// The side it is on.
    pub side: Side,
    /// Position of its zig letter on the front.
    pub position: usize,
    /// The places before, at and after it.
    pub nodes: [Point; 3],
    /// Where filling would put the new vertex.
    pub new: Point,
    /// Whether its letters are parallel, so that filling makes no panel.
    pub degenerate: bool,
}

/// The grown shell.
#[derive(Clone, PartialEq, Debug, Default)]
pub struct Shell {
    /// Vertices, in millimetres, in the placed frame.
    pub points: Vec<Point>,
    /// Panels, course by course in the order they grew.
    pub panels: Vec<Panel>,
    /// Edges: each borders at least one panel.
    pub edges: Vec<Edge>,
    /// Panel sides that are split, sorted by panel and side.
    pub tees: Vec<Tee>,
    /// Edges with more than two panels, sorted by edge.
    pub crowded: Vec<CrowdedEdge>,
    /// The border.
    pub rims: Vec<Rim>,
    /// Butted seams.
    pub seams: Vec<Seam>,
    /// Touches at a point.
    pub pinches: Vec<Pinch>,
    /// All zones, also those without a panel.
    pub zones: Vec<Zone>,
    /// All letters that were on a front.
    pub letters: Vec<Letter>,
    /// Courses in the order they were laid.
    pub courses: Vec<Course>,
    /// The fore and the aft front.
    pub fronts: [FrontState; 2],
    /// By how much a front that is meant to close misses, in millimetres; 0 when it closes, none on an open one.
    pub closing_gap: Option<f64>,
    /// By how much the shell was lifted along z before it was placed, in millimetres: a grounded start is put on z = 0.
    pub lift_mm: f64,
}

impl Shell {
    /// The zone of a letter, by index in [`Shell::zones`].
    #[must_use]
    pub fn zone_of(&self, letter: u32) -> u32 {
        self.letters[letter as usize].zone
    }

    /// The two zones of a panel, as they count.
    #[must_use]
    pub fn panel_zones(&self, panel: u32) -> [u32; 2] {
        self.panels[panel as usize]
            .letters
            .map(|l| self.zones[self.zone_of(l) as usize].counts_as)
    }

    /// The full name of a letter.
    #[must_use]
    pub fn letter_name(&self, letter: u32) -> LetterName {
        let l = &self.letters[letter as usize];
        let at = (l.at != NONE).then(|| Box::new(self.letter_name(l.at)));
        LetterName {
            maker: l.maker,
            index: l.index,
            sign: l.sign,
            at,
        }
    }

    /// The name of a panel, which survives edits upstream.
    #[must_use]
    pub fn panel_name(&self, panel: u32) -> PanelName {
        let p = &self.panels[panel as usize];
        let same = |q: &Panel| {
            (q.course < 0) == (p.course < 0) && (q.letters == p.letters || q.letters == [p.letters[1], p.letters[0]])
        };
        let turn = self.panels[..panel as usize].iter().filter(|q| same(q)).count();
        let side = if p.course < 0 { Side::Aft } else { Side::Fore };
        PanelName {
            side,
            letters: (self.letter_name(p.letters[0]), self.letter_name(p.letters[1])),
            turn: u32::try_from(turn).unwrap_or(NONE),
        }
    }

    /// The panel with a name, and whether the name has its letters the other way round: then the shell has been turned inside out
    /// since, and the panel's corners run the other way from the same first one.
    #[must_use]
    pub fn panel_named(&self, name: &PanelName) -> Option<(u32, bool)> {
        let letter = |name: &LetterName| {
            let alike = |l: &&Letter| (l.maker, l.index, l.sign) == (name.maker, name.index, name.sign);
            let found = (0_u32..).zip(&self.letters).filter(|(_, l)| alike(l));
            found.map(|(k, _)| k).find(|k| self.letter_name(*k) == *name)
        };
        let [a, b] = [letter(&name.letters.0)?, letter(&name.letters.1)?];
        let aft = name.side == Side::Aft;
        let named = |p: &Panel| (p.course < 0) == aft && (p.letters == [a, b] || p.letters == [b, a]);
        let turn = usize::try_from(name.turn).ok()?;
        let (found, panel) = (0_u32..).zip(&self.panels).filter(|(_, p)| named(p)).nth(turn)?;
        Some((found, panel.letters != [a, b]))
    }

    /// The zone of an edge, by index in [`Shell::zones`]; none for an edge without a panel.
    #[must_use]
    pub fn edge_zone(&self, edge: u32) -> Option<u32> {
        let Edge { ends, panels } = *self.edges.get(edge as usize)?;
        let panel = panels.into_iter().find(|p| *p != NONE)?;
        let Panel { corners, letters, .. } = self.panels[panel as usize];
        let side = (0_u8..4).find(|side| {
            let k = usize::from(*side);
            let own = [corners[k], corners[(k + 1) % 4]];
            let on = |v: &u32| own.contains(v) || self.tee_vertices(panel, *side).contains(v);
            ends.iter().all(on)
        })?;
        Some(self.zone_of(letters[usize::from(side % 2)]))
    }

    /// The vertices inside side `side` of a panel, in order; empty unless the side is split.
    #[must_use]
    pub fn tee_vertices(&self, panel: u32, side: u8) -> &[u32] {
        match self.tees.binary_search_by_key(&(panel, side), |t| (t.panel, t.side)) {
            Ok(found) => &self.tees[found].vertices,
            Err(_) => &[],
        }
    }

    /// The corners of a panel after T-splits, counter-clockwise from outside.
    #[must_use]
    pub fn outline(&self, panel: u32) -> Vec<u32> {
        let corners = self.panels[panel as usize].corners;
        if self.tees.is_empty() {
            return corners.to_vec();
        }
        let mut outline = Vec::with_capacity(6);
        for (side, corner) in (0_u8..).zip(corners) {
            outline.push(corner);
            outline.extend_from_slice(self.tee_vertices(panel, side));
        }
        outline
    }

    /// The places of a panel's four corners.
    #[must_use]
    pub fn corner_points(&self, panel: u32) -> [Point; 4] {
        self.panels[panel as usize].corners.map(|v| self.points[v as usize])
    }

    /// The outward normal of a panel times its area: the cross product of its sides, in square millimetres.
    #[must_use]
    pub fn area_vector(&self, panel: u32) -> Vector {
        let [a, b, _, d] = self.corner_points(panel);
        (b - a).cross(d - a)
    }

    /// Whether every edge has exactly two panels.
    #[must_use]
    pub fn is_closed(&self) -> bool {
        !self.edges.is_empty() && self.rims.is_empty() && self.crowded.is_empty()
    }
}

/// What growing gives.
pub type Grown = (Shell, Vec<Finding>);
