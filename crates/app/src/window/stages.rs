//! What is worked out of a design, in parts: the coarse answer first, the full one after it.

use std::sync::Arc;

use zonewright_geometry::{
    Finding, OpenV, Shell, Side, Tolerances,
    fit::{PanelLeft, left_of_panels},
    grow,
    grow::open_vs,
    grow_part,
    inspect::{Inspection, inspect},
    measure::{Totals, totals},
};
use zonewright_painter::Scene;
use zonewright_shop::{FamilyTolerance, Parts};

use super::{
    ladder::{Climbed, Laid},
    path_place::PlacedPath,
    strip::StripFront,
    zone_table::ZoneTable,
};
use crate::document::{Backdrop, Design};

/// What is to be grown.
#[derive(Clone, Debug)]
pub struct Grow {
    /// Which growth this is; the newest has the highest.
    pub ticket: u64,
    /// The revision that it is about.
    pub revision: u64,
    /// The design.
    pub design: Arc<Design>,
    /// Whether something is being dragged.
    pub dragging: bool,
    /// How far up the ladder; none is the whole.
    pub climbed: Option<Climbed>,
    /// [`Laid::lift_mm`] of the whole shell, where that has grown already.
    pub lift_mm: Option<Option<f64>>,
}

/// What has been grown.
#[derive(Debug)]
pub enum Grown {
    /// The shell and what is read off it at once.
    Coarse(Box<Coarse>),
    /// The panels as parts: families, bevels, marks.
    Parts {
        /// Which growth they are of.
        ticket: u64,
        /// The parts.
        parts: Box<Parts>,
    },
}

/// The shell and what is read off it at once.
#[derive(Debug)]
pub struct Coarse {
    /// Which growth this is.
    pub ticket: u64,
    /// The revision that it is about.
    pub revision: u64,
    /// How far up the ladder; none is the whole.
    pub climbed: Option<Climbed>,
    /// What the whole shell laid, where it has grown for this.
    pub laid: Option<Laid>,
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
        ticket,
        revision,
        design,
        dragging,
        climbed,
        lift_mm,
    } = job;
    let shape = &design.shape;
    let stage = climbed.and_then(|place| place.stage(shape));
    let whole = (stage.is_none() || lift_mm.is_none()).then(|| grow(shape));
    let laid = whole.as_ref().map(|(shell, findings)| Laid::of(shell, findings));
    let lift = lift_mm.unwrap_or_else(|| laid.as_ref().and_then(|l| l.lift_mm));
    let (shell, findings) = match (stage, whole) {
        (None, Some(whole)) => whole,
        (stage, _) => grow_part(shape, stage.unwrap_or_default(), lift),
    };
    let part = stage.map(|stage| shape.up_to(stage));
    let shown = part.as_ref().unwrap_or(shape);
    let shell = Arc::new(shell);
    let sides = [Side::Fore, Side::Aft];
    let open = sides.map(|side| open_vs(&shell, side));
    let strip = [0, 1].map(|at| StripFront::of(shown, &shell, sides[at], &open[at]));
    let coarse = Coarse {
        ticket,
        revision,
        climbed,
        laid,
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
        answer(Grown::Parts { ticket, parts });
    }
}

/// What is to be inspected.
#[derive(Clone, Debug)]
pub struct Inspect {
    /// Which growth it is about.
    pub ticket: u64,
    /// The shell.
    pub shell: Arc<Shell>,
    /// What counts as the same place.
    pub tolerances: Tolerances,
    /// What the panels' distances are measured to.
    pub backdrop: Option<Backdrop>,
}

/// What was found.
#[derive(Debug)]
pub enum Inspected {
    /// The scene whose depth order is exact.
    Order {
        /// Which growth it is about.
        ticket: u64,
        /// The scene.
        scene: Box<Scene>,
    },
    /// Crossings, doubled panels, near misses.
    Inspection {
        /// Which growth it is about.
        ticket: u64,
        /// The inspection.
        inspection: Box<Inspection>,
    },
    /// How far each panel is from the backdrop.
    Left {
        /// Which growth it is about.
        ticket: u64,
        /// The distances, one a panel.
        left: Vec<PanelLeft>,
    },
}

/// Makes the exact depth order, which shows at once, and then inspects.
pub(super) fn inspect_stages(job: Inspect, answer: &mut dyn FnMut(Inspected) -> bool) {
    let ticket = job.ticket;
    let scene = Box::new(Scene::exact(&job.shell));
    if answer(Inspected::Order { ticket, scene }) {
        let target = job.backdrop.as_ref().and_then(|backdrop| backdrop.target().ok());
        if let Some(target) = target {
            let left = left_of_panels(&job.shell, &target);
            if !answer(Inspected::Left { ticket, left }) {
                return;
            }
        }
        let inspection = Box::new(inspect(&job.shell, &job.tolerances));
        answer(Inspected::Inspection { ticket, inspection });
    }
}
