//! Undo and redo without end.
//!
//! A design is parameters, not meshes, so a snapshot of it is small; every change keeps one. Changes with the same merge
//! key that follow each other without a pause become one undo step: that is how a drag is one.

use std::sync::Arc;

use crate::document::Design;

/// What makes neighbouring changes one undo step.
pub(super) type MergeKey = String;

/// A state that can be gone back to, and the change that leads away from it.
#[derive(Clone, Debug)]
struct Entry {
    design: Arc<Design>,
    label: String,
}

/// The states before and after the one shown.
#[derive(Debug)]
pub struct History {
    now: Arc<Design>,
    past: Vec<Entry>,
    future: Vec<Entry>,
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
            past: Vec::new(),
            future: Vec::new(),
            open: None,
            revision: 1,
            unsaved: !saved,
        }
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
    pub fn change(&mut self, design: Design, label: impl Into<String>, key: Option<MergeKey>) {
        if design == *self.now {
            return;
        }
        let joins = key.is_some() && key == self.open && !self.past.is_empty();
        if !joins {
            self.past.push(Entry {
                design: Arc::clone(&self.now),
                label: label.into(),
            });
        }
        self.future.clear();
        self.open = key;
        self.show(Arc::new(design));
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
        let entry = self.past.pop();
        entry.map(|entry| self.show(entry.design)).is_some()
    }

    /// Goes one step back; gives the label of the change taken back.
    pub fn undo(&mut self) -> Option<String> {
        let entry = self.past.pop()?;
        self.future.push(Entry {
            design: Arc::clone(&self.now),
            label: entry.label.clone(),
        });
        self.open = None;
        self.show(entry.design);
        Some(entry.label)
    }

    /// Goes one step forward; gives the label of the change made again.
    pub fn redo(&mut self) -> Option<String> {
        let entry = self.future.pop()?;
        self.past.push(Entry {
            design: Arc::clone(&self.now),
            label: entry.label.clone(),
        });
        self.open = None;
        self.show(entry.design);
        Some(entry.label)
    }

    /// Label of the change that undo would take back.
    #[must_use]
    pub fn undo_label(&self) -> Option<&str> {
        self.past.last().map(|e| e.label.as_str())
    }

    /// Label of the change that redo would make again.
    #[must_use]
    pub fn redo_label(&self) -> Option<&str> {
        self.future.last().map(|e| e.label.as_str())
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
        let line: Vec<&Arc<Design>> = self
            .past
            .iter()
            .map(|e| &e.design)
            .chain([&self.now])
            .chain(self.future.iter().rev().map(|e| &e.design))
            .collect();
        if let Some(at) = self.past.iter().chain(&self.future).position(|e| e.label.is_empty()) {
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

    proptest! {
        /// Planted answer: a plain list of all states and a place in it.
        #[test]
        fn any_sequence_keeps_every_state(acts in proptest::collection::vec(0_u8..4, 1..60)) {
            let mut history = History::new(design("0"), true);
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
