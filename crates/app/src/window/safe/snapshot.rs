//! What is kept of an unsaved design: a design file with one more line of comment at its beginning.
//!
//! Because the rest is an ordinary design file, a snapshot can be opened by every means that opens designs, even when
//! the line is of a newer version. The last undo steps follow as comments.

use std::{
    path::{Path, PathBuf},
    sync::Arc,
    time::{Duration, SystemTime, UNIX_EPOCH},
};

use serde::{Deserialize, Serialize};

use super::stamp::Stamp;
use crate::document::{self, Design};

/// The number of the head's format, and the newest that is read.
const FORMAT: u32 = 1;

/// How the first line begins.
const HEAD: &str = "// zonewright snapshot: ";

/// How the lines of earlier states begin.
const EARLIER: &str = "// earlier: ";

/// Earlier states that are kept; more would make the writing slow for no likely use.
pub(super) const MOST_EARLIER: usize = 32;

/// The most bytes that all earlier states may have together.
const MOST_EARLIER_BYTES: usize = 256 << 10;

/// An unsaved design, and what belongs to it.
#[derive(Clone, PartialEq, Debug)]
pub(crate) struct Snapshot {
    /// The file that the design has.
    pub path: Option<PathBuf>,
    /// When it was changed last.
    pub changed: SystemTime,
    /// The file as it was when it was read or written last.
    pub stamp: Option<Stamp>,
    /// Snapshots of earlier windows that this one carries on.
    pub follows: Vec<String>,
    /// The design.
    pub design: Arc<Design>,
    /// States before it, the newest last, each with the change that leads away from it.
    pub earlier: Vec<(String, Arc<Design>)>,
}

impl Snapshot {
    /// What the design is called.
    #[must_use]
    pub(crate) fn name(&self) -> String {
        let file = self.path.as_ref().and_then(|p| p.file_name());
        match file {
            Some(file) => file.to_string_lossy().into_owned(),
            None if self.design.name.is_empty() => "Untitled".to_owned(),
            None => self.design.name.clone(),
        }
    }
}

#[derive(Default, Serialize, Deserialize)]
#[serde(default)]
struct Head {
    format: u32,
    path: Option<String>,
    changed_ms: u64,
    stamp: Option<Stamp>,
    follows: Vec<String>,
}

/// Texts of earlier states that were put together before, so that each is put together once.
#[derive(Debug, Default)]
pub(super) struct Texts(Vec<(Arc<Design>, Arc<str>)>);

impl Texts {
    /// The text of a design without line breaks.
    fn of(&mut self, design: &Arc<Design>) -> Arc<str> {
        if let Some((_, text)) = self.0.iter().find(|(d, _)| Arc::ptr_eq(d, design)) {
            return Arc::clone(text);
        }
        let text: Arc<str> = document::to_line(design).into();
        self.0.push((Arc::clone(design), Arc::clone(&text)));
        text
    }

    /// Forgets what this snapshot does not need.
    fn tidy(&mut self, snapshot: &Snapshot) {
        self.0
            .retain(|(kept, _)| snapshot.earlier.iter().any(|(_, d)| Arc::ptr_eq(d, kept)));
    }
}

/// The text of a snapshot's file.
///
/// # Errors
/// A sentence, when the design cannot be kept in a file.
pub(super) fn to_text(snapshot: &Snapshot, texts: &mut Texts) -> Result<String, String> {
    let path = snapshot.path.as_deref().and_then(Path::to_str).map(str::to_owned);
    let changed = snapshot.changed.duration_since(UNIX_EPOCH).unwrap_or_default();
    let head = Head {
        format: FORMAT,
        path,
        changed_ms: u64::try_from(changed.as_millis()).unwrap_or(u64::MAX),
        stamp: snapshot.stamp,
        follows: snapshot.follows.clone(),
    };
    let head = ron::ser::to_string(&head).map_err(|error| error.to_string())?;
    let design = document::to_text(&snapshot.design);
    if design.trim().is_empty() {
        return Err("the design nests names deeper than a file may".to_owned());
    }
    let mut text = format!("{HEAD}{head}\n{design}");
    let mut lines = Vec::new();
    let mut bytes = 0;
    for (label, design) in snapshot.earlier.iter().rev().take(MOST_EARLIER) {
        let design = texts.of(design);
        bytes += design.len();
        if design.is_empty() || bytes > MOST_EARLIER_BYTES {
            break;
        }
        let label = label.replace(['\n', '\r', '\t'], " ");
        lines.push(format!("{EARLIER}{label}\t{design}\n"));
    }
    texts.tidy(snapshot);
    text.extend(lines.into_iter().rev());
    Ok(text)
}

/// Reads a snapshot's text.
///
/// # Errors
/// Why it cannot be read, in a few words.
pub(super) fn parse(text: &str) -> Result<Snapshot, String> {
    let (first, _) = text.split_once('\n').ok_or("it is cut off")?;
    let head = first.strip_prefix(HEAD).ok_or("it does not begin as a snapshot does")?;
    let head: Head = ron::from_str(head).map_err(|error| format!("its first line cannot be read: {error}"))?;
    if head.format > FORMAT {
        return Err("it was made by a newer version".to_owned());
    }
    let design = document::parse_design(text).map_err(|error| error.to_string())?;
    let earlier = text.lines().filter_map(|line| {
        let (label, design) = line.strip_prefix(EARLIER)?.split_once('\t')?;
        Some((label.to_owned(), Arc::new(document::parse_design(design).ok()?)))
    });
    Ok(Snapshot {
        path: head.path.map(PathBuf::from),
        changed: UNIX_EPOCH
            .checked_add(Duration::from_millis(head.changed_ms))
            .unwrap_or(UNIX_EPOCH),
        stamp: head.stamp,
        follows: head.follows,
        design: Arc::new(design),
        earlier: earlier.collect(),
    })
}

#[cfg(test)]
pub(super) mod tests {
    use super::*;
    use crate::window::kinds;

    /// A small design with a name.
    pub(in super::super) fn design(name: &str) -> Arc<Design> {
        let mut design = document::new_design(kinds::kind("loop").usual(), Some(1), Default::default()).unwrap();
        name.clone_into(&mut design.name);
        Arc::new(design)
    }

    /// A snapshot of a small design.
    pub(in super::super) fn snapshot(name: &str) -> Snapshot {
        Snapshot {
            path: Some(PathBuf::from("/tmp/a \"design\"\n.ron")),
            changed: UNIX_EPOCH + Duration::from_millis(1_700_000_000_123),
            stamp: Some(Stamp::of_bytes(b"text")),
            follows: vec!["12-abc".to_owned()],
            design: design(name),
            earlier: vec![
                ("First".to_owned(), design("1")),
                ("Second\tone".to_owned(), design("2")),
            ],
        }
    }

    #[test]
    fn a_snapshot_comes_back_whole_and_is_a_design_file_too() {
        let mut before = snapshot("a */ name // \"with\" signs\n");
        let text = to_text(&before, &mut Texts::default()).unwrap();
        before.earlier[1].0 = "Second one".to_owned();
        assert_eq!(parse(&text).unwrap(), before);
        assert_eq!(document::parse_design(&text).unwrap(), *before.design);
    }

    #[test]
    fn a_snapshot_that_is_cut_off_or_newer_is_refused_with_the_reason() {
        let text = to_text(&snapshot("a"), &mut Texts::default()).unwrap();
        let design_ends = text.find(EARLIER).unwrap();
        for at in [0, 5, HEAD.len() + 3, text.find('\n').unwrap() + 20, design_ends - 3] {
            assert!(parse(&text[..at]).is_err(), "cut off at {at}");
        }
        let newer = text.replacen("format:1", "format:2", 1);
        assert_ne!(newer, text);
        assert!(parse(&newer).unwrap_err().contains("newer version"));
    }

    #[test]
    fn earlier_states_are_bounded_the_newest_stay() {
        let mut many = snapshot("a");
        many.earlier = (0..100)
            .map(|k| (format!("Step {k}"), design(&format!("{k}"))))
            .collect();
        let back = parse(&to_text(&many, &mut Texts::default()).unwrap()).unwrap();
        assert_eq!(back.earlier, many.earlier[100 - MOST_EARLIER..]);
    }
}
