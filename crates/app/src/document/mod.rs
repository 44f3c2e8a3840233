//! The document: what a design file holds, how it is read, written and made new.
//!
//! `docs/format.md` documents every field. Nothing outside this module knows the file's syntax.

mod backdrop;
mod bounds;
mod bundled;
mod new;
mod read;
mod write;

use zonewright_geometry::Shape;
use zonewright_shop::text::Units;

pub use backdrop::{Backdrop, BackdropPlacement, Drawn, MAX_BACKDROP_PARTS, MAX_BACKDROP_POINTS};
pub use bounds::{MAX_FILE_BYTES, MAX_LETTERS, MAX_NAME_BYTES, MAX_NAMES, MAX_STEPS, weight};
pub use bundled::bundled;
pub use new::new_design;
pub use read::{parse_design, read_design};
pub use write::{to_line, to_text, write_design, write_whole};

/// The number of the file format that this program writes, and the newest that it reads.
pub const FORMAT: u32 = 1;

/// What a design file holds.
#[derive(Clone, PartialEq, Debug)]
pub struct Design {
    /// The design's name, as the drawings and lists print it.
    pub name: String,
    /// The units in which lengths are shown; the file itself is in millimetres.
    pub units: Units,
    /// The shape: a start, steps, placement.
    pub shape: Shape,
    /// What the shape is held against.
    pub backdrop: Option<Backdrop>,
}

/// Why a design file cannot be read or written. Each says what, where, and what to do.
#[derive(Debug, thiserror::Error)]
pub enum DesignError {
    /// The file is not there, or the system does not let it be read.
    #[error("cannot read {path}: {cause}; give the path of a design file that may be read")]
    Read {
        /// The file.
        path: String,
        /// What the system says.
        cause: std::io::Error,
    },
    /// The file cannot be written.
    #[error("cannot write {path}: {cause}; the file that was there before is unchanged; choose another place")]
    Write {
        /// The file.
        path: String,
        /// What the system says.
        cause: std::io::Error,
    },
    /// The file is larger than any design.
    #[error("it is larger than {limit} bytes, the most that a design file may have; it is probably no design file")]
    TooLarge {
        /// The limit.
        limit: u64,
    },
    /// The file holds more of something than a design may have.
    #[error("it has {count} {what}, and at most {limit} are read; split the design")]
    TooMany {
        /// Of what.
        what: &'static str,
        /// How many.
        count: usize,
        /// The limit.
        limit: usize,
    },
    /// The backdrop cannot be used.
    #[error("its backdrop cannot be used: {0}")]
    Backdrop(String),
    /// The text is not a design.
    #[error("line {line}, column {column}: {what}; mend it there (docs/format.md lists every field)")]
    Syntax {
        /// Line, from 1.
        line: usize,
        /// Column, from 1.
        column: usize,
        /// What is wrong.
        what: String,
    },
    /// The text is not UTF-8.
    #[error("it is not text in UTF-8; it is probably no design file")]
    NotText,
    /// A newer version wrote it.
    #[error("it was made by a newer version: format {found}; this program reads up to {FORMAT}; get a newer version")]
    Newer {
        /// Its format.
        found: u32,
    },
    /// No version wrote it.
    #[error("there is no format {found}; formats count from 1")]
    NoSuchFormat {
        /// Its format.
        found: u32,
    },
    /// The design would not come back from the file as it is.
    #[error("the design cannot be kept in a file: {0}")]
    Unkeepable(String),
    /// An error in a file, with its path.
    #[error("cannot use {path}: {cause}")]
    InFile {
        /// The file.
        path: String,
        /// What is wrong in it.
        cause: Box<DesignError>,
    },
}

/// The file's words for the units.
mod units_word {
    use serde::{Deserialize, Deserializer, Serialize, Serializer};
    use zonewright_shop::text::Units;

    #[derive(Serialize, Deserialize)]
    #[serde(rename_all = "snake_case")]
    enum Word {
        Mm,
        Inch,
    }

    #[expect(clippy::trivially_copy_pass_by_ref, reason = "the signature serde asks for")]
    pub(super) fn serialize<S: Serializer>(units: &Units, to: S) -> Result<S::Ok, S::Error> {
        match units {
            Units::Mm => Word::Mm,
            Units::Inch => Word::Inch,
        }
        .serialize(to)
    }

    /// What a file means that does not say.
    pub(super) const fn mm() -> Units {
        Units::Mm
    }

    pub(super) fn deserialize<'a, D: Deserializer<'a>>(from: D) -> Result<Units, D::Error> {
        Ok(match Word::deserialize(from)? {
            Word::Mm => Units::Mm,
            Word::Inch => Units::Inch,
        })
    }
}
