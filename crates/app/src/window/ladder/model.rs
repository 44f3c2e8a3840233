//! What stands on the ladder, from the start upwards: courses as rungs, and above the courses that it laid each step.

use std::collections::BTreeMap;

use zonewright_geometry::{
    Act, Code, Course, Courses, Finding, FinishAct, Level, Place, Shape, Shell, Side, Spurs, Step, StepId, Vs,
};
use zonewright_shop::{FamilyTolerance, FindingWriter, Parts, text};

use super::Climbed;

/// What a row of the ladder is.
#[derive(Clone, Copy, PartialEq, Eq, Debug)]
pub enum RowKind {
    /// The start.
    Start,
    /// A course: its number on its side, and how many panels it has.
    Course {
        /// 1, 2, 3 ... fore; -1, -2, -3 ... aft.
        number: i32,
        /// Its panels.
        panels: u32,
    },
    /// A growing step, by its place in the record.
    Step(usize),
    /// A finishing step, by its place in the record.
    Finish(usize),
}

/// A row of the ladder.
#[derive(Clone, Copy, PartialEq, Eq, Debug)]
pub struct Row {
    /// What it is.
    pub kind: RowKind,
    /// The place that one climbs to there; none for a finishing step, which shows the whole.
    pub place: Option<Climbed>,
    /// Whether climbing stops here. A step above its own courses shows what the last of them shows.
    pub stop: bool,
}

/// A finding that belongs to a step.
#[derive(Clone, PartialEq, Eq, Debug)]
pub struct Said {
    /// How much it matters.
    pub level: Level,
    /// The sentence.
    pub text: String,
    /// Whether something that the step names is gone or has changed, so that it can be picked again.
    pub names: bool,
}

/// What the ladder shows of a whole shell.
#[derive(Clone, PartialEq, Debug, Default)]
pub struct Laid {
    /// The courses of each step, in the order they were laid.
    pub courses: BTreeMap<StepId, Vec<Course>>,
    /// By how much a grounded start is lifted; none when nothing has grown.
    pub lift_mm: Option<f64>,
    /// What was found at each step, the gravest first.
    pub said: BTreeMap<StepId, Vec<Said>>,
}

impl Laid {
    /// What a whole shell laid, and what growing it found.
    #[must_use]
    pub fn of(shell: &Shell, findings: &[Finding]) -> Self {
        let mut courses: BTreeMap<StepId, Vec<Course>> = BTreeMap::new();
        for course in &shell.courses {
            courses.entry(course.step).or_default().push(*course);
        }
        Self {
            courses,
            lift_mm: (!shell.panels.is_empty()).then_some(shell.lift_mm),
            said: said(findings),
        }
    }
}

/// The ladder of a design.
#[derive(Clone, PartialEq, Debug, Default)]
pub struct Ladder {
    /// The rows, from the start upwards.
    pub rows: Vec<Row>,
    /// Panels of the longest fore and the longest aft course.
    pub longest: [u32; 2],
    /// How many courses lie on the fore and on the aft side.
    pub courses: [u32; 2],
    /// What was found at each step, the gravest first.
    pub said: BTreeMap<StepId, Vec<Said>>,
}

impl Ladder {
    /// The ladder of a shape: its steps, and the courses that were laid when it was last grown whole.
    #[must_use]
    pub fn of(shape: &Shape, laid: &Laid) -> Self {
        let mut ladder = Self {
            said: laid.said.clone(),
            ..Self::default()
        };
        let start = Climbed::Start;
        ladder.push(RowKind::Start, Some(start), true);
        for (at, step) in shape.steps.iter().enumerate() {
            let courses = laid.courses.get(&step.id).map_or(&[][..], Vec::as_slice);
            for (k, course) in courses.iter().enumerate() {
                let side = usize::from(course.number < 0);
                ladder.courses[side] += 1;
                ladder.longest[side] = ladder.longest[side].max(course.panels);
                let kind = RowKind::Course {
                    number: course.number,
                    panels: course.panels,
                };
                // The last course of a step is where the step ends.
                let place = if k + 1 < courses.len() {
                    Climbed::Course(step.id, course.pass)
                } else {
                    Climbed::Step(step.id)
                };
                ladder.push(kind, Some(place), true);
            }
            ladder.push(RowKind::Step(at), Some(Climbed::Step(step.id)), courses.is_empty());
        }
        for at in 0..shape.finish.len() {
            ladder.push(RowKind::Finish(at), None, false);
        }
        ladder
    }

    fn push(&mut self, kind: RowKind, place: Option<Climbed>, stop: bool) {
        self.rows.push(Row { kind, place, stop });
    }

    /// The row that is shown as climbed to: at the top the last one before the finishing steps.
    #[must_use]
    pub fn row_of(&self, climbed: Option<Climbed>) -> usize {
        let growing = |row: &Row| row.place.is_some();
        let top = self.rows.iter().rposition(growing).unwrap_or(0);
        match climbed {
            None => top,
            Some(place) => self.rows.iter().position(|r| r.place == Some(place)).unwrap_or(top),
        }
    }

    /// Whether a place shows the whole.
    #[must_use]
    pub fn is_top(&self, place: Climbed) -> bool {
        let top = self.rows.get(self.row_of(None));
        top.is_some_and(|row| row.place == Some(place))
    }

    /// The place one stop up or down from another; none is the top.
    #[must_use]
    pub fn next_stop(&self, from: Option<Climbed>, up: bool) -> Option<Climbed> {
        let at = self.row_of(from);
        // A step above its own courses shows what the last of them shows.
        let stop = self.rows.iter().take(at + 1).rposition(|r| r.stop);
        let at = stop.unwrap_or(at);
        let found = if up {
            self.rows.iter().skip(at + 1).find(|r| r.stop)
        } else {
            self.rows.iter().take(at).rfind(|r| r.stop)
        };
        match (found, up) {
            (Some(row), _) => row.place,
            (None, true) => None,
            (None, false) => Some(Climbed::Start),
        }
    }

    /// Where one is, in words.
    #[must_use]
    pub fn shown(&self, climbed: Option<Climbed>, shape: &Shape) -> String {
        let whole: u32 = self.courses.iter().sum();
        let Some(place) = climbed else {
            return match whole {
                1 => "1 course".to_owned(),
                n => format!("{} courses", text::count(n as usize)),
            };
        };
        match self
            .rows
            .get(self.row_of(Some(place)))
            .map_or(RowKind::Start, |r| r.kind)
        {
            RowKind::Course { number, .. } => {
                let side = usize::from(number < 0);
                let aft = if number < 0 { " aft" } else { "" };
                let [at, of] = [number.unsigned_abs(), self.courses[side]].map(|n| text::count(n as usize));
                format!("course {at}{aft} of {of}")
            }
            RowKind::Step(at) => format!("step {} of {}", at + 1, shape.steps.len()),
            RowKind::Start | RowKind::Finish(_) => "the start alone".to_owned(),
        }
    }
}

/// The findings that belong to steps, in words. Their sentences need no shell.
fn said(findings: &[Finding]) -> BTreeMap<StepId, Vec<Said>> {
    let mut said: BTreeMap<StepId, Vec<Said>> = BTreeMap::new();
    let of_steps = findings.iter().filter_map(|f| match f.place {
        Place::Step(id) => Some((id, f)),
        _ => None,
    });
    let mut of_steps = of_steps.peekable();
    if of_steps.peek().is_none() {
        return said;
    }
    let nothing = Shell::default();
    let parts = Parts::new(&nothing, &FamilyTolerance::default());
    let writer = FindingWriter::new(&nothing, &parts);
    for (id, finding) in of_steps {
        said.entry(id).or_default().push(Said {
            level: finding.level(),
            text: writer.write(finding).text,
            names: matches!(finding.code, Code::NameLost | Code::VChanged),
        });
    }
    for all in said.values_mut() {
        all.sort_by_key(|s| s.level);
    }
    said
}

/// What a step does: two or three words, and what there is to say about how.
#[must_use]
pub(in crate::window) fn title(step: &Step) -> (&'static str, String) {
    match &step.act {
        Act::Lay { courses, spurs } => {
            let mut how = match courses {
                Courses::Count(1) => "1 course".to_owned(),
                Courses::Count(n) => format!("{} courses", text::count(*n as usize)),
                Courses::UntilStill => "until still".to_owned(),
            };
            match spurs {
                Spurs::Retract => {}
                Spurs::Hold => how.push_str(", hold"),
                Spurs::Cross => how.push_str(", cross"),
            }
            ("Lay", how)
        }
        Act::Fill { at } => ("Fill", which(at)),
        Act::Splice { directions, .. } => (
            "Splice",
            match directions.len() {
                1 => "1 direction".to_owned(),
                n => format!("{n} directions"),
            },
        ),
        Act::Retract => ("Retract spurs", String::new()),
        Act::Cross { at } => ("Cross spurs", which(at)),
        Act::SetRoles(_) => ("Set roles", String::new()),
        Act::CloseRim => ("Close the rim", String::new()),
        Act::JoinRims { .. } => ("Join rims", String::new()),
    }
}

fn which(at: &Vs) -> String {
    match at {
        Vs::All => "all open Vs".to_owned(),
        Vs::Picked(names) if names.len() == 1 => "1 V".to_owned(),
        Vs::Picked(names) => format!("{} Vs", names.len()),
        Vs::EveryKth { k, .. } => format!("one V in {k}"),
    }
}

/// The accessible name of a row.
#[must_use]
pub(in crate::window) fn name(row: &Row, shape: &Shape) -> String {
    match row.kind {
        RowKind::Start => "Start of the ladder".to_owned(),
        RowKind::Course { number, panels } => {
            let side = if number < 0 { " aft" } else { "" };
            let number = number.unsigned_abs();
            match panels {
                1 => format!("Course {number}{side}: 1 panel"),
                n => format!("Course {number}{side}: {} panels", text::count(n as usize)),
            }
        }
        RowKind::Step(at) => {
            let step = &shape.steps[at];
            let (what, how) = title(step);
            let how = if how.is_empty() { how } else { format!(", {how}") };
            let aft = if step.side == Side::Aft { ", aft" } else { "" };
            let named = step.name.as_ref().map_or_else(String::new, |n| format!(", {n}"));
            format!("Step {}: {what}{how}{aft}{named}, {}", at + 1, on_off(step.on))
        }
        RowKind::Finish(at) => {
            let step = &shape.finish[at];
            let named = step.name.as_ref().map_or_else(String::new, |n| format!(", {n}"));
            format!(
                "Finishing step {}: {}{named}, {}",
                at + 1,
                left_out(step),
                on_off(step.on)
            )
        }
    }
}

/// What a finishing step leaves out.
#[must_use]
pub(in crate::window) fn left_out(step: &zonewright_geometry::Finish) -> String {
    let FinishAct::Drop(names) = &step.act;
    match names.len() {
        1 => "1 panel left out".to_owned(),
        n => format!("{} panels left out", text::count(n)),
    }
}

const fn on_off(on: bool) -> &'static str {
    if on { "on" } else { "off" }
}
