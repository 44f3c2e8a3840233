//! What follows from the design, kept by revision: the shell, its readouts, its parts, what is wrong with it.
//!
//! With each change the window asks for a new shell and waits for it, but never longer than a share of a frame: what takes longer
//! arrives when it is there, the shell and its readouts first, families, bevels and marks after them, and until then the old ones
//! stay. [`Derived::pending`] says what is behind. The exact depth order and the inspection follow when the design has been
//! still for a moment.

use std::{
    sync::Arc,
    time::{Duration, Instant},
};

use zonewright_geometry::{
    Finding, Level, OpenV, Place, Shell, Side,
    inspect::Inspection,
    measure::{Totals, totals},
};
use zonewright_painter::Scene;
use zonewright_shop::{FamilyTolerance, FindingWriter, Parts};

use super::{
    backdrop_view::BackdropView,
    ladder::{Climbed, Ladder, Laid},
    path_place::PlacedPath,
    stages::{Coarse, Grow, Grown, Inspect, Inspected, grow_stages},
    strip::StripFront,
    worker::Worker,
    zone_table::ZoneTable,
};
use crate::document::Design;

/// How long a design must have been still before the slow stages begin, in seconds. With these, the exact order is there
/// within 300 ms of rest.
const STILL_SECONDS: f64 = 0.12;

/// How long a frame waits for what follows from a change: half a frame at 60 Hz, the other half is for the picture. What is there
/// by then is in the same frame as the change.
const PATIENCE: Duration = Duration::from_millis(8);

/// Findings that are put into words; a shell with thousands of them is not mended one by one.
pub(super) const MOST_SHOWN: usize = 100;

/// How often each stage was worked out; an idle window leaves all of them alone.
#[derive(Clone, Copy, PartialEq, Eq, Debug, Default)]
pub struct Counts {
    /// Shells and readouts.
    pub grown: u64,
    /// Requests for the exact order and the inspection.
    pub requested: u64,
    /// Inspections that were used.
    pub inspected: u64,
}

/// What is not there yet of what follows from the design.
#[derive(Clone, Copy, PartialEq, Eq, Debug)]
pub enum Pending {
    /// Everything: what is shown is of an older revision.
    Shell,
    /// Families, bevels and marks.
    Parts,
}

/// What follows from the design.
#[derive(Debug)]
pub struct Derived {
    /// The revision that the shell and its readouts are about.
    pub revision: u64,
    /// How far up the ladder the shell is shown; none is the whole.
    pub climbed: Option<Climbed>,
    /// The ladder of the design as it is: its steps at once, the courses of the whole shell when that has grown.
    pub ladder: Ladder,
    /// The shell, up to where one has climbed.
    pub shell: Arc<Shell>,
    /// What growing found, and, once it is there, what the inspection found.
    pub findings: Vec<Finding>,
    /// The readouts that need no inspection.
    pub totals: Totals,
    /// Panels as parts; of an older shell while they are pending.
    pub parts: Parts,
    /// The family of each panel; while parts are pending, those of an older shell of as many panels, or none.
    pub families: Vec<u32>,
    /// The first findings in words; empty while parts are pending.
    pub texts: Vec<String>,
    /// The gravest finding of each panel.
    pub levels: Vec<Option<Level>>,
    /// Open Vs of the fore and the aft front.
    pub open: [Vec<OpenV>; 2],
    /// The fore and the aft front as the strip shows them.
    pub strip: [StripFront; 2],
    /// The start's path where it stands in the picture.
    pub path: Option<PlacedPath>,
    /// The zones of the shell and their edges.
    pub zones: ZoneTable,
    /// What is drawn.
    pub scene: Scene,
    /// Grows whenever `scene` or `families` are other ones.
    pub scene_revision: u64,
    /// What follows from the backdrop.
    pub backdrop: BackdropView,
    /// What the inspection found; none until it is there.
    pub inspection: Option<Inspection>,
    /// How often each stage was worked out.
    pub counts: Counts,
    /// The revision that was asked for last, and how far up the ladder.
    asked_for: (u64, Option<Climbed>),
    /// How far up the ladder is to be shown.
    climbing: Option<Climbed>,
    /// What the whole shell laid, and the revision that it is about.
    laid: (u64, Laid),
    /// Each growth that is asked for has a ticket, the newest the highest: a part of the same revision is another shell. These
    /// are the tickets of the growth asked for last, of the shell that is there, and of the parts.
    wanted: u64,
    ticket: u64,
    parts_ticket: u64,
    /// Whether the shell was asked for while something was dragged.
    by_drag: bool,
    changed_at: f64,
    asked: bool,
}

impl Derived {
    /// Nothing yet.
    #[must_use]
    pub fn new() -> Self {
        let shell = Shell::default();
        Self {
            revision: 0,
            climbed: None,
            ladder: Ladder::default(),
            totals: totals(&shell),
            parts: Parts::new(&shell, &FamilyTolerance::default()),
            families: Vec::new(),
            texts: Vec::new(),
            levels: Vec::new(),
            open: [Vec::new(), Vec::new()],
            strip: [StripFront::empty(), StripFront::empty()],
            path: None,
            zones: ZoneTable::default(),
            scene: Scene::quick(&shell),
            scene_revision: 0,
            shell: Arc::new(shell),
            findings: Vec::new(),
            backdrop: BackdropView::default(),
            inspection: None,
            counts: Counts::default(),
            asked_for: (0, None),
            climbing: None,
            laid: (0, Laid::default()),
            wanted: 0,
            ticket: 0,
            parts_ticket: 0,
            by_drag: false,
            changed_at: f64::NEG_INFINITY,
            asked: false,
        }
    }

    /// What is still being worked out for the revision that was asked for last.
    #[must_use]
    pub const fn pending(&self) -> Option<Pending> {
        if self.ticket != self.wanted {
            Some(Pending::Shell)
        } else if self.parts_ticket != self.ticket {
            Some(Pending::Parts)
        } else {
            None
        }
    }

    /// Which growth is there. A part of the same revision is another one.
    #[must_use]
    pub const fn growth(&self) -> u64 {
        self.ticket
    }

    /// Which growth the parts are of; another one has another number.
    #[must_use]
    pub const fn parts_revision(&self) -> u64 {
        self.parts_ticket
    }

    /// Whether the shell was asked for while something was dragged.
    #[must_use]
    pub const fn by_drag(&self) -> bool {
        self.by_drag
    }

    /// How far up the ladder is to be shown from now on; none is the whole.
    pub const fn climb(&mut self, to: Option<Climbed>) {
        self.climbing = to;
    }

    /// Asks for what follows from the design when the revision is another one, or the place on the ladder, and takes what is
    /// there. `now` is in seconds.
    pub fn follow(&mut self, design: &Arc<Design>, revision: u64, dragging: bool, worker: &mut Worker, now: f64) {
        let until = Instant::now() + PATIENCE;
        let fresh = (revision, self.climbing) != self.asked_for;
        if fresh {
            let job = self.ask(design, revision, dragging);
            self.backdrop.follow(design.backdrop.as_ref());
            worker.growing.request(job);
        }
        while let Some(grown) = if fresh && self.pending().is_some() {
            worker.growing.poll_until(until)
        } else {
            worker.growing.poll()
        } {
            self.take(grown, design, now);
        }
    }

    fn ask(&mut self, design: &Arc<Design>, revision: u64, dragging: bool) -> Grow {
        if revision != self.asked_for.0 {
            // The steps are those of the design at once; the courses stay what they were until it has grown.
            self.ladder = Ladder::of(&design.shape, &self.laid.1);
        }
        self.asked_for = (revision, self.climbing);
        self.wanted += 1;
        Grow {
            ticket: self.wanted,
            revision,
            design: Arc::clone(design),
            dragging,
            climbed: self.climbing,
            lift_mm: (self.laid.0 == revision).then_some(self.laid.1.lift_mm),
        }
    }

    /// Works out at once what is pending: for what has to be of the design as it is, at whatever time it takes.
    pub fn catch_up(&mut self, design: &Arc<Design>, revision: u64) {
        if self.asked_for == (revision, self.climbing) && self.pending().is_none() {
            return;
        }
        self.backdrop.follow(design.backdrop.as_ref());
        let now = self.changed_at;
        let job = self.ask(design, revision, false);
        grow_stages(job, &mut |grown| {
            self.take(grown, design, now);
            true
        });
    }

    fn take(&mut self, grown: Grown, design: &Design, now: f64) {
        match grown {
            // Of an older growth than what is there, when that was caught up with meanwhile.
            Grown::Coarse(coarse) if coarse.ticket > self.ticket => self.take_coarse(*coarse, design, now),
            Grown::Parts { ticket, parts } if ticket == self.ticket && self.parts_ticket != ticket => {
                self.parts = *parts;
                self.parts_ticket = ticket;
                let families: Vec<u32> = self.parts.panels.iter().map(|p| p.family).collect();
                if families != self.families {
                    self.families = families;
                    self.scene_revision += 1;
                }
                self.put_into_words();
            }
            _ => {}
        }
    }

    fn take_coarse(&mut self, coarse: Coarse, design: &Design, now: f64) {
        if let Some(laid) = coarse.laid {
            self.laid = (coarse.revision, laid);
            self.ladder = Ladder::of(&design.shape, &self.laid.1);
        }
        self.ticket = coarse.ticket;
        self.revision = coarse.revision;
        self.climbed = coarse.climbed;
        self.by_drag = coarse.dragging;
        self.totals = coarse.totals;
        self.open = coarse.open;
        self.strip = coarse.strip;
        self.path = coarse.path;
        self.zones = coarse.zones;
        self.scene = coarse.scene;
        self.scene_revision += 1;
        self.shell = coarse.shell;
        self.findings = coarse.findings;
        if self.families.len() != self.shell.panels.len() {
            self.families.clear();
        }
        self.backdrop.grown(self.shell.panels.len());
        self.put_into_words();
        self.inspection = None;
        self.changed_at = now;
        self.asked = false;
        self.counts.grown += 1;
    }

    /// Asks for the exact order and the inspection when the design has been still long enough, and takes the answers. Gives
    /// how many seconds to wait before asking again, when there is something to wait for.
    pub fn settle(&mut self, design: &Design, worker: &mut Worker, now: f64) -> Option<f64> {
        let mut wait = None;
        // While something is pending, its answer wakes the window.
        if !self.asked && self.pending().is_none() {
            let rest = STILL_SECONDS - (now - self.changed_at);
            if rest <= 0.0 || worker.inspecting.is_inline() {
                self.asked = true;
                self.counts.requested += 1;
                worker.inspecting.request(Inspect {
                    ticket: self.ticket,
                    shell: Arc::clone(&self.shell),
                    tolerances: design.shape.tolerances,
                    backdrop: design.backdrop.clone(),
                });
            } else {
                wait = Some(rest);
            }
        }
        while let Some(inspected) = worker.inspecting.poll() {
            match inspected {
                Inspected::Order { ticket, scene } if ticket == self.ticket => {
                    self.scene = *scene;
                    self.scene_revision += 1;
                }
                Inspected::Inspection { ticket, inspection } if ticket == self.ticket => {
                    self.findings.extend(inspection.findings(&design.shape.tolerances));
                    self.put_into_words();
                    self.inspection = Some(*inspection);
                    self.scene_revision += 1;
                    self.counts.inspected += 1;
                }
                Inspected::Left { ticket, left } if ticket == self.ticket => {
                    self.backdrop.left = left;
                    self.scene_revision += 1;
                }
                _ => {}
            }
        }
        wait
    }

    fn put_into_words(&mut self) {
        self.findings.sort_by_key(Finding::level);
        self.levels = levels(&self.findings, self.shell.panels.len());
        let first = self.findings.iter().take(MOST_SHOWN);
        self.texts = if self.findings.is_empty() || self.parts_ticket != self.ticket {
            Vec::new()
        } else {
            let writer = FindingWriter::new(&self.shell, &self.parts);
            first.map(|f| writer.write(f).text).collect()
        };
    }

    /// A front as the strip shows it.
    #[must_use]
    pub const fn strip_on(&self, side: Side) -> &StripFront {
        match side {
            Side::Fore => &self.strip[0],
            Side::Aft => &self.strip[1],
        }
    }

    /// Open Vs of a front.
    #[must_use]
    pub fn open_on(&self, side: Side) -> &[OpenV] {
        match side {
            Side::Fore => &self.open[0],
            Side::Aft => &self.open[1],
        }
    }
}

impl Default for Derived {
    fn default() -> Self {
        Self::new()
    }
}

/// The gravest finding of each panel. The findings come sorted by level, the gravest first.
fn levels(findings: &[Finding], panels: usize) -> Vec<Option<Level>> {
    let mut levels = vec![None; panels];
    for finding in findings {
        let Place::Panels(places) = &finding.place else {
            continue;
        };
        for panel in places {
            if let Some(level) = levels.get_mut(*panel as usize) {
                let _ = level.get_or_insert_with(|| finding.level());
            }
        }
    }
    levels
}

#[cfg(test)]
mod tests {
    use zonewright_geometry::{
        Angle, Spurs, Start,
        start::{PolarBy, PolarForm},
    };

    use super::*;
    use crate::document::new_design;

    fn polar(ribs: u32) -> Arc<Design> {
        let form = PolarForm {
            ribs,
            by: PolarBy::PitchEdge {
                pitch: Angle::from_degrees(35.0),
                edge_mm: 500.0,
            },
        };
        Arc::new(new_design(Start::Polar(form), None, Spurs::default()).unwrap())
    }

    /// Follows until nothing is pending.
    fn arrive(derived: &mut Derived, design: &Arc<Design>, revision: u64, worker: &mut Worker) {
        let until = Instant::now() + Duration::from_secs(60);
        while derived.pending().is_some() {
            assert!(Instant::now() < until, "no answer within a minute");
            std::thread::sleep(Duration::from_millis(1));
            derived.follow(design, revision, false, worker, 0.0);
        }
    }

    /// n (n - 1) rhombs for n ribs (polar zonohedra; Coxeter, Regular Polytopes, from memory).
    #[test]
    fn a_large_shell_is_not_waited_for_and_what_was_there_stays() {
        let (small, large) = (polar(8), polar(240));
        let mut worker = Worker::start(&egui::Context::default());
        let mut derived = Derived::new();
        derived.follow(&small, 1, true, &mut worker, 0.0);
        arrive(&mut derived, &small, 1, &mut worker);
        assert_eq!((derived.totals.panels, derived.parts.panels.len()), (56, 56));
        // Growing 57,360 panels takes far longer than a frame is made to wait, in whatever build.
        derived.follow(&large, 2, true, &mut worker, 0.0);
        assert_eq!(derived.pending(), Some(Pending::Shell));
        assert_eq!((derived.revision, derived.totals.panels), (1, 56));
        // The order and the inspection are not asked for meanwhile.
        assert_eq!(derived.settle(&large, &mut worker, 1e3), None);
        assert_eq!(derived.counts.requested, 0);
        arrive(&mut derived, &large, 2, &mut worker);
        assert_eq!((derived.totals.panels, derived.families.len()), (57_360, 57_360));
        assert!(derived.by_drag());
    }

    #[test]
    fn what_must_be_fresh_is_caught_up_with_and_a_late_answer_changes_nothing() {
        let (small, large) = (polar(8), polar(240));
        let mut worker = Worker::start(&egui::Context::default());
        let mut derived = Derived::new();
        derived.follow(&large, 1, false, &mut worker, 0.0);
        derived.catch_up(&small, 2);
        assert_eq!(
            (derived.pending(), derived.revision, derived.parts.panels.len()),
            (None, 2, 56)
        );
        let until = Instant::now() + Duration::from_secs(60);
        // Until the answer of the thread has come in and been left.
        while worker.growing.poll_until(until).is_none() {}
        derived.follow(&small, 2, false, &mut worker, 0.0);
        assert_eq!((derived.totals.panels, derived.pending()), (56, None));
    }

    #[test]
    fn without_threads_all_is_there_at_once() {
        let design = polar(40);
        let (mut worker, mut derived) = (Worker::inline(), Derived::new());
        derived.follow(&design, 1, false, &mut worker, 0.0);
        assert_eq!((derived.pending(), derived.parts.panels.len()), (None, 40 * 39));
        assert_eq!(derived.settle(&design, &mut worker, 0.0), None);
        assert!(derived.inspection.is_some() && derived.scene.is_exact());
    }
}
