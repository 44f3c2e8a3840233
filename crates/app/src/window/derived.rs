//! What follows from the design, kept by revision: the shell, its readouts, its parts, what is wrong with it.
//!
//! Growing and readouts are worked out at once with each change. The inspection and the exact depth order follow when
//! the design has been still for a moment, on the worker.

use std::sync::Arc;

use zonewright_geometry::{
    Finding, Level, OpenV, Place, Shell, Side, grow,
    grow::open_vs,
    inspect::Inspection,
    measure::{Totals, totals},
};
use zonewright_painter::Scene;
use zonewright_shop::{FamilyTolerance, FindingWriter, Parts};

use super::{
    path_place::PlacedPath,
    strip::StripFront,
    worker::{Job, Worker},
};
use crate::document::Design;

/// How long a design must have been still before the slow stages begin, in seconds. With these, the exact order is there
/// within 300 ms of rest.
const STILL_SECONDS: f64 = 0.12;

/// Findings that are put into words; a shell with thousands of them is not mended one by one.
pub(super) const MOST_SHOWN: usize = 100;

/// How often each stage was worked out; an idle window leaves all of them alone.
#[derive(Clone, Copy, PartialEq, Eq, Debug, Default)]
pub struct Counts {
    /// Shell, readouts and parts.
    pub grown: u64,
    /// Requests to the worker.
    pub requested: u64,
    /// Answers of the worker that were used.
    pub inspected: u64,
}

/// What follows from the design.
#[derive(Debug)]
pub struct Derived {
    /// The revision that all this is about.
    pub revision: u64,
    /// The shell.
    pub shell: Arc<Shell>,
    /// What growing found, and, once it is there, what the inspection found.
    pub findings: Vec<Finding>,
    /// The readouts that need no inspection.
    pub totals: Totals,
    /// Panels as parts.
    pub parts: Parts,
    /// The family of each panel.
    pub families: Vec<u32>,
    /// The first findings in words.
    pub texts: Vec<String>,
    /// The gravest finding of each panel.
    pub levels: Vec<Option<Level>>,
    /// Open Vs of the fore and the aft front.
    pub open: [Vec<OpenV>; 2],
    /// The fore and the aft front as the strip shows them.
    pub strip: [StripFront; 2],
    /// The start's path where it stands in the picture.
    pub path: Option<PlacedPath>,
    /// What is drawn.
    pub scene: Scene,
    /// Grows whenever `scene` is another one.
    pub scene_revision: u64,
    /// What the inspection found; none until it is there.
    pub inspection: Option<Inspection>,
    /// How often each stage was worked out.
    pub counts: Counts,
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
            totals: totals(&shell),
            parts: Parts::new(&shell, &FamilyTolerance::default()),
            families: Vec::new(),
            texts: Vec::new(),
            levels: Vec::new(),
            open: [Vec::new(), Vec::new()],
            strip: [StripFront::empty(), StripFront::empty()],
            path: None,
            scene: Scene::quick(&shell),
            scene_revision: 0,
            shell: Arc::new(shell),
            findings: Vec::new(),
            inspection: None,
            counts: Counts::default(),
            changed_at: f64::NEG_INFINITY,
            asked: false,
        }
    }

    /// Works the quick stages out when the revision is another one. `now` is in seconds.
    pub fn follow(&mut self, design: &Design, revision: u64, now: f64) {
        if revision == self.revision {
            return;
        }
        self.revision = revision;
        let (shell, findings) = grow(&design.shape);
        self.totals = totals(&shell);
        self.parts = Parts::new(&shell, &FamilyTolerance::default());
        self.families = self.parts.panels.iter().map(|p| p.family).collect();
        self.open = [open_vs(&shell, Side::Fore), open_vs(&shell, Side::Aft)];
        self.strip =
            [Side::Fore, Side::Aft].map(|side| StripFront::of(&design.shape, &shell, side, self.open_on(side)));
        self.path = PlacedPath::of(&design.shape, &shell);
        self.scene = Scene::quick(&shell);
        self.scene_revision += 1;
        self.shell = Arc::new(shell);
        self.findings = findings;
        self.put_into_words();
        self.inspection = None;
        self.changed_at = now;
        self.asked = false;
        self.counts.grown += 1;
    }

    /// Asks the worker when the design has been still long enough, and takes its answers. Gives how many seconds to wait
    /// before asking again, when there is something to wait for.
    pub fn settle(&mut self, design: &Design, worker: &mut Worker, now: f64) -> Option<f64> {
        let mut wait = None;
        if !self.asked {
            let rest = match worker {
                Worker::Thread { .. } => STILL_SECONDS - (now - self.changed_at),
                Worker::Inline(_) => 0.0,
            };
            if rest <= 0.0 {
                self.asked = true;
                self.counts.requested += 1;
                worker.request(Job {
                    revision: self.revision,
                    shell: Arc::clone(&self.shell),
                    tolerances: design.shape.tolerances,
                });
            } else {
                wait = Some(rest);
            }
        }
        if let Some(done) = worker.poll()
            && done.revision == self.revision
        {
            self.findings.extend(done.inspection.findings(&design.shape.tolerances));
            self.put_into_words();
            self.inspection = Some(done.inspection);
            self.scene = done.scene;
            self.scene_revision += 1;
            self.counts.inspected += 1;
        }
        wait
    }

    fn put_into_words(&mut self) {
        self.findings.sort_by_key(Finding::level);
        self.levels = levels(&self.findings, self.shell.panels.len());
        let first = self.findings.iter().take(MOST_SHOWN);
        self.texts = if self.findings.is_empty() {
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
