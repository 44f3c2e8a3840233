//! States on one side of the one that is shown, with a bound on the memory that they hold.
//!
//! The nearest are kept as they are, older ones packed ([`super::history_pack`]). Packing goes on beside the window's own
//! work; until it is done, the state stays as it is.

use std::{
    sync::{Arc, OnceLock},
    thread,
};

use super::history_pack::Packed;
use crate::document::{self, Design};

/// Bytes of states that are kept as they are, on each side: some thousand steps of a usual design, twenty of a path of ten
/// thousand edges.
const OPEN_BYTES: usize = 12 << 20;

#[derive(Debug)]
enum Kept {
    /// As it is; also a state that would not come back exactly from its text.
    Open(Arc<Design>),
    /// Being packed against its newer neighbour.
    Packing(Arc<Design>, Arc<OnceLock<Option<Packed>>>),
    Packed(Box<Packed>),
}

#[derive(Debug)]
struct Entry {
    kept: Kept,
    label: String,
}

/// States, with the one next to what is shown on top.
#[derive(Debug)]
pub(super) struct Stack {
    entries: Vec<Entry>,
    /// Entries below this one have been packed, or could not be.
    settled: usize,
    /// Entries below this one are being packed at least.
    begun: usize,
    /// What the entries from `begun` on hold.
    open_bytes: usize,
    limit: usize,
    /// Whether packing is waited for; tests do.
    at_once: bool,
}

impl Default for Stack {
    fn default() -> Self {
        Self {
            entries: Vec::new(),
            settled: 0,
            begun: 0,
            open_bytes: 0,
            limit: OPEN_BYTES,
            at_once: false,
        }
    }
}

impl Stack {
    /// A stack that keeps so many bytes as they are, and waits for the packing.
    #[cfg(test)]
    pub(super) fn limited(limit: usize) -> Self {
        Self {
            limit,
            at_once: true,
            ..Self::default()
        }
    }

    /// Puts a state on top: what was shown until now.
    pub(super) fn push(&mut self, design: Arc<Design>, label: String) {
        self.open_bytes += document::weight(&design);
        self.entries.push(Entry {
            kept: Kept::Open(design),
            label,
        });
        // The top has no neighbour here yet, and stays as it is.
        while self.open_bytes > self.limit && self.begun + 1 < self.entries.len() {
            self.pack_next();
        }
        self.settle();
    }

    /// Takes the top. `shown` is the state that is shown: the one that was above it.
    pub(super) fn pop(&mut self, shown: &Design) -> Option<(Arc<Design>, String)> {
        let entry = self.entries.last()?;
        let design = match &entry.kept {
            Kept::Open(design) | Kept::Packing(design, _) => Arc::clone(design),
            // It was tried when it was packed.
            Kept::Packed(packed) => Arc::new(packed.unpack(shown)?),
        };
        let entry = self.entries.pop()?;
        if self.entries.len() < self.begun {
            self.begun = self.entries.len();
            self.settled = self.settled.min(self.begun);
        } else {
            self.open_bytes = self.open_bytes.saturating_sub(document::weight(&design));
        }
        Some((design, entry.label))
    }

    /// Forgets all.
    pub(super) fn clear(&mut self) {
        self.entries.clear();
        (self.settled, self.begun, self.open_bytes) = (0, 0, 0);
    }

    /// Whether there is nothing.
    pub(super) const fn is_empty(&self) -> bool {
        self.entries.is_empty()
    }

    /// Labels, from the top.
    pub(super) fn labels(&self) -> impl DoubleEndedIterator<Item = &str> {
        self.entries.iter().rev().map(|e| e.label.as_str())
    }

    /// The states on top that are kept as they are, from the top.
    pub(super) fn open(&self) -> impl Iterator<Item = (&str, &Arc<Design>)> {
        self.entries.iter().rev().map_while(|entry| match &entry.kept {
            Kept::Open(design) | Kept::Packing(design, _) => Some((entry.label.as_str(), design)),
            Kept::Packed(_) => None,
        })
    }

    /// About how many bytes it holds.
    #[cfg(test)]
    pub(super) fn bytes(&self) -> usize {
        let kept = self.entries.iter().map(|entry| {
            let kept = match &entry.kept {
                Kept::Open(design) | Kept::Packing(design, _) => document::weight(design),
                Kept::Packed(packed) => packed.bytes(),
            };
            kept + entry.label.capacity() + size_of::<Entry>()
        });
        kept.sum()
    }

    /// Begins to pack the lowest state that is kept as it is.
    fn pack_next(&mut self) {
        let at = self.begun;
        let (Kept::Open(state), Kept::Open(newer)) = (&self.entries[at].kept, &self.entries[at + 1].kept) else {
            self.begun += 1;
            return;
        };
        let (state, newer) = (Arc::clone(state), Arc::clone(newer));
        self.open_bytes = self.open_bytes.saturating_sub(document::weight(&state));
        self.begun += 1;
        let done = Arc::new(OnceLock::new());
        let (theirs, own) = (Arc::clone(&done), Arc::clone(&state));
        let work = move || {
            let _ = theirs.set(Packed::of(&own, &newer));
        };
        if self.at_once {
            work();
        } else if thread::Builder::new()
            .name("zonewright-undo".to_owned())
            .spawn(work)
            .is_err()
        {
            // Without a thread the state stays as it is: better memory than a window that waits.
            let _ = done.set(None);
        }
        self.entries[at].kept = Kept::Packing(state, done);
    }

    /// Puts what has been packed in place of what it was packed from.
    fn settle(&mut self) {
        while self.settled < self.begun {
            let entry = &mut self.entries[self.settled];
            if let Kept::Packing(state, done) = &entry.kept {
                let Some(packed) = done.get() else { return };
                entry.kept = match packed {
                    Some(packed) => Kept::Packed(Box::new(packed.clone())),
                    None => Kept::Open(Arc::clone(state)),
                };
            }
            self.settled += 1;
        }
    }
}
