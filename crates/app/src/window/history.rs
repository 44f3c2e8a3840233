//! Undo and redo without end.
//!
//! A design is parameters, not meshes, so a snapshot of it is small; every change keeps one, and older ones are packed
//! ([`super::history_stack`]). Changes with the same merge
//! key that follow each other without a pause become one undo step: that is how a drag is one.

use std::sync::Arc;

use super::history_stack::Stack;
use crate::document::Design;

/// What makes neighbouring changes one undo step.
pub(super) type MergeKey = String;

/// The states before and after the one shown.
#[derive(Debug)]
pub struct History {
    now: Arc<Design>,
    past: Stack,
    future: Stack,
    open: Option<MergeKey>,
    saved: Option<Arc<Design>>,
    revision: u64,
    unsaved: bool,
}

impl History {
    /// Begins with a design. `saved` says whether a file holds it as it is.
    #[must_use]
    pub fn new(design: Design, saved: bool) -> Self {
        let now = Arc::new(design);
        Self {
            saved: saved.then(|| Arc::clone(&now)),
            now,
            past: Stack::default(),
            future: Stack::default(),
            open: None,
            revision: 1,
            unsaved: !saved,
        }
    }

    /// Begins with a design that no file holds, and with states before it, the newest last.
    #[must_use]
    pub fn recovered(design: Arc<Design>, earlier: Vec<(String, Arc<Design>)>) -> Self {
        let mut past = Stack::default();
        for (label, design) in earlier {
            past.push(design, label);
        }
        Self {
            now: design,
            past,
            future: Stack::default(),
            open: None,
            saved: None,
            revision: 1,
            unsaved: true,
        }
    }

    /// The newest states before the one shown, at most so many, the newest last, each with the change that leads away.
    #[must_use]
    pub fn newest(&self, most: usize) -> Vec<(String, Arc<Design>)> {
        let open = self.past.open().take(most);
        let mut newest: Vec<_> = open.map(|(label, d)| (label.to_owned(), Arc::clone(d))).collect();
        newest.reverse();
        newest
    }

    /// Labels of the changes that can be taken back, the newest first.
    pub fn undo_labels(&self) -> impl Iterator<Item = &str> {
        self.past.labels()
    }

    /// Labels of the changes that can be made again, the next first.
    pub fn redo_labels(&self) -> impl Iterator<Item = &str> {
        self.future.labels()
    }

    /// The same history, with a revision later than this one: what was kept by revision is worked out again.
    #[must_use]
    pub const fn after(mut self, revision: u64) -> Self {
        self.revision = revision + 1;
        self
    }

    /// The design as it is.
    #[must_use]
    pub const fn now(&self) -> &Arc<Design> {
        &self.now
    }

    /// Grows with every change, undo and redo included.
    #[must_use]
    pub const fn revision(&self) -> u64 {
        self.revision
    }

    /// Whether no file holds the design as it is.
    #[must_use]
    pub const fn unsaved(&self) -> bool {
        self.unsaved
    }

    /// Changes the design. Nothing happens when it stays the same. With the key of the change before, it joins that undo step.
    pub fn change(&mut self, design: impl Into<Arc<Design>>, label: impl Into<String>, key: Option<MergeKey>) {
        let design = design.into();
        if *design == *self.now {
            return;
        }
        let joins = key.is_some() && key == self.open && !self.past.is_empty();
        if !joins {
            self.past.push(Arc::clone(&self.now), label.into());
        }
        self.future.clear();
        self.open = key;
        self.show(design);
    }

    /// Ends the undo step that further changes would join.
    pub fn seal(&mut self) {
        self.open = None;
    }

    /// Takes an undo step back that further changes would join, as if it had never been made. Gives whether there was one.
    pub fn take_back(&mut self) -> bool {
        if self.open.take().is_none() {
            return false;
        }
        let entry = self.past.pop(&self.now);
        entry.map(|(design, _)| self.show(design)).is_some()
    }

    /// Goes one step back; gives the label of the change taken back.
    pub fn undo(&mut self) -> Option<String> {
        let (design, label) = self.past.pop(&self.now)?;
        self.future.push(Arc::clone(&self.now), label.clone());
        self.open = None;
        self.show(design);
        Some(label)
    }

    /// Goes one step forward; gives the label of the change made again.
    pub fn redo(&mut self) -> Option<String> {
        let (design, label) = self.future.pop(&self.now)?;
        self.past.push(Arc::clone(&self.now), label.clone());
        self.open = None;
        self.show(design);
        Some(label)
    }

    /// Label of the change that undo would take back.
    #[must_use]
    pub fn undo_label(&self) -> Option<&str> {
        self.past.labels().next()
    }

    /// Label of the change that redo would make again.
    #[must_use]
    pub fn redo_label(&self) -> Option<&str> {
        self.future.labels().next()
    }

    /// Says that a file holds this design now.
    pub fn mark_saved(&mut self, design: Arc<Design>) {
        self.saved = Some(design);
        self.unsaved = self.differs_from_saved();
    }

    /// What must always hold; the first thing that does not.
    ///
    /// # Errors
    /// A sentence that names it.
    pub fn check(&self) -> Result<(), String> {
        let near = |stack: &Stack| stack.open().map(|(_, d)| Arc::clone(d)).collect::<Vec<_>>();
        let (past, future) = (near(&self.past), near(&self.future));
        let now = [Arc::clone(&self.now)];
        let line: Vec<&Arc<Design>> = past.iter().rev().chain(&now).chain(&future).collect();
        if let Some(at) = self.past.labels().chain(self.future.labels()).position(str::is_empty) {
            return Err(format!("undo step {at} has no label"));
        }
        if self.open.is_some() && !self.future.is_empty() {
            return Err("an undo step is open although there is something to redo".to_owned());
        }
        if self.unsaved != self.differs_from_saved() {
            return Err("the mark for unsaved changes is wrong".to_owned());
        }
        if let Some(at) = line.windows(2).position(|w| Arc::ptr_eq(w[0], w[1])) {
            return Err(format!("undo step {at} changes nothing"));
        }
        Ok(())
    }

    fn show(&mut self, design: Arc<Design>) {
        self.now = design;
        self.revision += 1;
        self.unsaved = self.differs_from_saved();
    }

    fn differs_from_saved(&self) -> bool {
        self.saved
            .as_ref()
            .is_none_or(|saved| !Arc::ptr_eq(saved, &self.now) && **saved != *self.now)
    }
}

#[cfg(test)]
mod tests {
    use proptest::prelude::*;

    use super::*;
    use crate::window::kinds;

    fn design(name: &str) -> Design {
        let mut design = crate::document::new_design(kinds::kind("loop").usual(), Some(1), Default::default()).unwrap();
        name.clone_into(&mut design.name);
        design
    }

    #[test]
    fn changes_with_one_key_are_one_step_until_the_step_is_sealed() {
        let mut history = History::new(design("a"), true);
        for name in ["b", "c", "d"] {
            history.change(design(name), "Drag", Some("point 1".to_owned()));
        }
        history.seal();
        history.change(design("e"), "Drag", Some("point 1".to_owned()));
        assert_eq!(history.undo().as_deref(), Some("Drag"));
        assert_eq!(history.now().name, "d");
        history.undo();
        assert_eq!(history.now().name, "a");
        assert_eq!(history.undo(), None);
        assert!(!history.unsaved(), "back at what the file holds");
    }

    #[test]
    fn an_open_step_taken_back_leaves_nothing_to_undo_or_redo() {
        let mut history = History::new(design("a"), true);
        history.change(design("b"), "Drag", Some("zone".to_owned()));
        history.change(design("c"), "Drag", Some("zone".to_owned()));
        assert!(history.take_back());
        assert_eq!(history.now().name, "a");
        assert_eq!((history.undo_label(), history.redo_label()), (None, None));
        assert!(!history.take_back(), "nothing is open");
        history.check().unwrap();
    }

    #[test]
    fn a_change_that_changes_nothing_is_no_step() {
        let mut history = History::new(design("a"), true);
        let revision = history.revision();
        history.change(design("a"), "Nothing", None);
        assert_eq!((history.revision(), history.undo_label()), (revision, None));
    }

    /// A closed path of so many edges round a circle, up and down.
    fn long_path(edges: u32) -> Design {
        use zonewright_geometry::{
            Point, Role, Start, Vector,
            start::{FreeLetter, FreePath, FreeVector},
        };
        let letters = (0..edges).map(|id| {
            let turn = std::f64::consts::TAU * f64::from(id) / f64::from(edges);
            let up = if id % 2 == 0 { -400.0 } else { 400.0 };
            FreeLetter {
                id,
                vector: FreeVector::Own(Vector::new(300.0 * turn.cos(), 300.0 * turn.sin(), up)),
                role: if id % 2 == 0 { Role::Zig } else { Role::Zag },
            }
        });
        let mut design = Design::clone(&design("long"));
        design.shape.start = Start::Zigzag(FreePath {
            origin: Point::ORIGIN,
            closed: true,
            letters: letters.collect(),
        });
        design
    }

    /// The design after step `turn`: two neighbouring edges are others, as a dragged point makes them.
    fn dragged(design: &Design, turn: u32) -> Design {
        let mut design = design.clone();
        if let zonewright_geometry::Start::Zigzag(path) = &mut design.shape.start {
            let at = (turn as usize * 37) % (path.letters.len() - 1);
            for letter in &mut path.letters[at..at + 2] {
                let by = f64::from(turn).sqrt();
                letter.vector = zonewright_geometry::start::FreeVector::Own(zonewright_geometry::Vector::new(
                    by,
                    300.0 - by,
                    by / 3.0,
                ));
            }
        }
        design
    }

    #[test]
    fn a_long_session_on_a_long_path_holds_little_and_comes_back_exactly() {
        const EDGES: u32 = 400;
        const STEPS: u32 = 100;
        let first = long_path(EDGES);
        let mut history = History::new(first.clone(), true);
        let open = 8 * crate::document::weight(&first);
        (history.past, history.future) = (Stack::limited(open), Stack::limited(open));
        let mut now = first.clone();
        for turn in 1..=STEPS {
            now = dragged(&now, turn);
            history.change(now.clone(), "Move a point", None);
        }
        let (held, plain) = (history.past.bytes(), STEPS as usize * crate::document::weight(&first));
        // Derived: two edges are a dozen lines of some twenty bytes; with a margin, a kilobyte a step.
        assert!(held < open + STEPS as usize * 1024, "{held} of {plain} bytes");
        while history.undo().is_some() {}
        assert_eq!(**history.now(), first);
        assert!(history.future.bytes() < open + STEPS as usize * 1024);
        while history.redo().is_some() {}
        assert_eq!(**history.now(), now);
    }

    proptest! {
        /// Planted answer: a plain list of all states and a place in it.
        #[test]
        fn any_sequence_keeps_every_state(acts in proptest::collection::vec(0_u8..4, 1..60)) {
            let mut history = History::new(design("0"), true);
            // So little room that nearly every state is packed.
            (history.past, history.future) = (Stack::limited(2500), Stack::limited(2500));
            let mut states = vec!["0".to_owned()];
            let mut at = 0;
            for (turn, act) in (1..).zip(acts) {
                match act {
                    0 => at = history.undo().map_or(at, |_| at - 1),
                    1 => at = history.redo().map_or(at, |_| at + 1),
                    2 => history.mark_saved(Arc::clone(history.now())),
                    _ => {
                        let name = format!("{turn}");
                        history.change(design(&name), "Change", None);
                        states.truncate(at + 1);
                        states.push(name);
                        at += 1;
                    }
                }
                prop_assert_eq!(&history.now().name, &states[at]);
                prop_assert_eq!(history.check(), Ok(()));
            }
        }
    }
}
