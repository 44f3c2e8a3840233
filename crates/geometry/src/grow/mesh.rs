//! The mesh while it grows: vertices, panels and edges, and the debts that finishing settles.

use crate::{
    Edge, NONE, Panel, Point, Seam, Side, StepId, Tee,
    shell::{Course, CrowdedEdge},
};

/// More panels than this are not grown: a bound on what a file can ask of the machine (5 million panels take about 450 MB).
pub const MAX_PANELS: usize = 5_000_000;

/// Everything grown so far, before it is finished.
#[derive(Clone, Debug, Default)]
pub(super) struct Mesh {
    pub(super) points: Vec<Point>,
    pub(super) panels: Vec<Panel>,
    pub(super) edges: Vec<Edge>,
    /// Panels that came to an edge whose place was taken.
    pub(super) crowded: Vec<CrowdedEdge>,
    pub(super) courses: Vec<Course>,
    /// How many courses lie on the fore and on the aft side.
    pub(super) laid: [i32; 2],
    /// The step that is being taken, and how many passes it has made so far.
    pub(super) taking: (StepId, u32),
    /// Vertices that the word zips together.
    pub(super) vertex_links: Vec<[u32; 2]>,
    /// Edges that the word zips together.
    pub(super) edge_links: Vec<[u32; 2]>,
    /// Edges that lie on one line: two before a slide, two after.
    pub(super) slides: Vec<[u32; 4]>,
    /// Sides that are split, once they are.
    pub(super) tees: Vec<Tee>,
    /// Butted seams, once sides are split.
    pub(super) seams: Vec<Seam>,
    /// Vertices where sheets may touch only at a point: those that a front passes more than once, and merged ones. Everywhere else
    /// a touch shows by four rim edges.
    pub(super) suspects: Vec<u32>,
    /// Edges that were made without a panel; they may never get one.
    pub(super) loose: Vec<u32>,
    /// Whether vertices or panels went away since they were made.
    pub(super) gaps: bool,
    /// Whether panels are wound the other way round, so that the chosen outside sees them counter-clockwise.
    pub(super) reversed: bool,
}

impl Mesh {
    /// Makes room for this many more panels.
    pub(super) fn reserve(&mut self, panels: usize) {
        self.points.reserve(panels);
        self.panels.reserve(panels);
        self.edges.reserve(2 * panels);
    }

    pub(super) fn add_point(&mut self, at: Point) -> u32 {
        let index = as_index(self.points.len());
        self.points.push(at);
        index
    }

    pub(super) fn add_edge(&mut self, ends: [u32; 2]) -> u32 {
        let index = as_index(self.edges.len());
        self.edges.push(Edge {
            ends,
            panels: [NONE; 2],
        });
        index
    }

    /// The slot of [`Edge::panels`] that a panel above a front takes at an edge that runs with the front.
    pub(super) fn slot_above(&self, side: Side) -> usize {
        usize::from((side == Side::Aft) != self.reversed)
    }

    #[inline]
    pub(super) fn put_panel(&mut self, edge: u32, slot: usize, panel: u32) {
        let place = &mut self.edges[edge as usize].panels[slot];
        if *place == NONE {
            *place = panel;
        } else {
            self.crowd(edge, panel);
        }
    }

    #[cold]
    fn crowd(&mut self, edge: u32, panel: u32) {
        match self.crowded.iter_mut().find(|c| c.edge == edge) {
            Some(found) => found.more.push(panel),
            None => self.crowded.push(CrowdedEdge {
                edge,
                more: vec![panel],
            }),
        }
    }

    /// The number of a new course on a side; panels made until it is closed belong to it.
    pub(super) fn open_course(&self, side: Side) -> i32 {
        match side {
            Side::Fore => self.laid[0] + 1,
            Side::Aft => -self.laid[1] - 1,
        }
    }

    /// Closes a course that was opened with this many panels present; a course without panels is not kept.
    pub(super) fn close_course(&mut self, number: i32, panels_before: usize) {
        let panels = as_index(self.panels.len() - panels_before);
        self.taking.1 += 1;
        if 0 < panels {
            self.laid[usize::from(number < 0)] += 1;
            let (step, pass) = self.taking;
            self.courses.push(Course {
                number,
                panels,
                step,
                pass,
            });
        }
    }
}

/// Indices are u32: [`MAX_PANELS`] keeps every array far below that.
pub(super) fn as_index(length: usize) -> u32 {
    u32::try_from(length).unwrap_or(NONE)
}
