//! What is worked out of a design, in parts: the coarse answer first, the full one after it.

use std::sync::Arc;

use zonewright_geometry::{
    Finding, OpenV, Shell, Side, Tolerances, grow,
    grow::open_vs,
    inspect::{Inspection, inspect},
    measure::{Totals, totals},
};
use zonewright_painter::Scene;
use zonewright_shop::{FamilyTolerance, Parts};

use super::{path_place::PlacedPath, strip::StripFront, zone_table::ZoneTable};
use crate::document::Design;

/// What is to be grown.
#[derive(Clone, Debug)]
pub struct Grow {
    /// The revision that it is about.
    pub revision: u64,
    /// The design.
    pub design: Arc<Design>,
    /// Whether something is being dragged.
    pub dragging: bool,
}

/// What has been grown.
#[derive(Debug)]
pub enum Grown {
    /// The shell and what is read off it at once.
    Coarse(Box<Coarse>),
    /// The panels as parts: families, bevels, marks.
    Parts {
        /// The revision that they are about.
        revision: u64,
        /// The parts.
        parts: Box<Parts>,
    },
}

/// The shell and what is read off it at once.
#[derive(Debug)]
pub struct Coarse {
    /// The revision that it is about.
    pub revision: u64,
    /// Whether something was being dragged.
    pub dragging: bool,
    /// The shell.
    pub shell: Arc<Shell>,
    /// What growing found.
    pub findings: Vec<Finding>,
    /// The readouts that need neither parts nor inspection.
    pub totals: Totals,
    /// Open Vs of the fore and the aft front.
    pub open: [Vec<OpenV>; 2],
    /// The fore and the aft front as the strip shows them.
    pub strip: [StripFront; 2],
    /// The start's path where it stands in the picture.
    pub path: Option<PlacedPath>,
    /// The zones of the shell and their edges.
    pub zones: ZoneTable,
    /// The order by the middles of panels.
    pub scene: Scene,
}

/// Grows, and then makes parts of the panels.
pub(super) fn grow_stages(job: Grow, answer: &mut dyn FnMut(Grown) -> bool) {
    let Grow {
        revision,
        design,
        dragging,
    } = job;
    let (shell, findings) = grow(&design.shape);
    let shell = Arc::new(shell);
    let sides = [Side::Fore, Side::Aft];
    let open = sides.map(|side| open_vs(&shell, side));
    let strip = [0, 1].map(|at| StripFront::of(&design.shape, &shell, sides[at], &open[at]));
    let coarse = Coarse {
        revision,
        dragging,
        totals: totals(&shell),
        open,
        strip,
        path: PlacedPath::of(&design.shape, &shell),
        zones: ZoneTable::of(&shell),
        scene: Scene::quick(&shell),
        shell: Arc::clone(&shell),
        findings,
    };
    if answer(Grown::Coarse(Box::new(coarse))) {
        let parts = Box::new(Parts::new(&shell, &FamilyTolerance::default()));
        answer(Grown::Parts { revision, parts });
    }
}

/// What is to be inspected.
#[derive(Clone, Debug)]
pub struct Inspect {
    /// The revision that it is about.
    pub revision: u64,
    /// The shell.
    pub shell: Arc<Shell>,
    /// What counts as the same place.
    pub tolerances: Tolerances,
}

/// What was found.
#[derive(Debug)]
pub enum Inspected {
    /// The scene whose depth order is exact.
    Order {
        /// The revision that it is about.
        revision: u64,
        /// The scene.
        scene: Box<Scene>,
    },
    /// Crossings, doubled panels, near misses.
    Inspection {
        /// The revision that it is about.
        revision: u64,
        /// The inspection.
        inspection: Box<Inspection>,
    },
}

/// Makes the exact depth order, which shows at once, and then inspects.
pub(super) fn inspect_stages(job: Inspect, answer: &mut dyn FnMut(Inspected) -> bool) {
    let revision = job.revision;
    let scene = Box::new(Scene::exact(&job.shell));
    if answer(Inspected::Order { revision, scene }) {
        let inspection = Box::new(inspect(&job.shell, &job.tolerances));
        answer(Inspected::Inspection { revision, inspection });
    }
}
