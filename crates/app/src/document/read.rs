//! Reading a design file.

use std::{fs::File, io::Read, path::Path};

use ron::{Options, extensions::Extensions};
use serde::{Deserialize, de::DeserializeOwned};
use zonewright_geometry::Shape;
use zonewright_shop::text::Units;

use super::{Backdrop, Design, DesignError, MAX_FILE_BYTES, bounds, units_word};

/// How deep a file may nest. A letter spliced into a V of a spliced letter nests by three; deeper names than this are
/// refused on reading and on writing alike.
const MAX_DEPTH: usize = 200;

/// The syntax, for reading and writing alike: single-field words take their content without a second pair of
/// parentheses, and optional fields need no `Some`.
pub(super) fn syntax() -> Options {
    Options::default()
        .with_default_extension(Extensions::UNWRAP_VARIANT_NEWTYPES | Extensions::IMPLICIT_SOME)
        .with_recursion_limit(MAX_DEPTH)
}

/// The file as format 1 has it.
#[derive(Deserialize)]
#[serde(deny_unknown_fields)]
struct FileOne {
    #[serde(rename = "format")]
    _format: u32,
    #[serde(default)]
    name: String,
    #[serde(default = "units_word::mm", with = "units_word")]
    units: Units,
    shape: Shape,
    #[serde(default)]
    backdrop: Option<Backdrop>,
}

/// What every format has.
#[derive(Deserialize)]
struct Head {
    format: u32,
}

/// Reads a design file.
///
/// # Errors
/// When it cannot be read, is no design, or is of a newer format.
pub fn read_design(path: &Path) -> Result<Design, DesignError> {
    let shown = || path.display().to_string();
    let text = read_text(path)?;
    parse_design(&text).map_err(|cause| DesignError::InFile {
        path: shown(),
        cause: Box::new(cause),
    })
}

/// Reads a file of text that is not larger than a design may be.
fn read_text(path: &Path) -> Result<String, DesignError> {
    let shown = || path.display().to_string();
    let in_file = |cause| DesignError::InFile {
        path: shown(),
        cause: Box::new(cause),
    };
    let unread = |cause| DesignError::Read { path: shown(), cause };
    let file = File::open(path).map_err(unread)?;
    let mut bytes = Vec::new();
    file.take(MAX_FILE_BYTES + 1).read_to_end(&mut bytes).map_err(unread)?;
    if bytes.len() as u64 > MAX_FILE_BYTES {
        return Err(in_file(DesignError::TooLarge { limit: MAX_FILE_BYTES }));
    }
    String::from_utf8(bytes).map_err(|_| in_file(DesignError::NotText))
}

/// Reads a design from its text.
///
/// # Errors
/// As [`read_design`], without the path.
pub fn parse_design(text: &str) -> Result<Design, DesignError> {
    if text.len() as u64 > MAX_FILE_BYTES {
        return Err(DesignError::TooLarge { limit: MAX_FILE_BYTES });
    }
    let head: Head = parse(text)?;
    let design = migrate(head.format, text)?;
    bounds::check(&design)?;
    Ok(design)
}

/// Reads each format that there was. An older one is read as it was written, and brought up to date here.
fn migrate(format: u32, text: &str) -> Result<Design, DesignError> {
    match format {
        0 => Err(DesignError::NoSuchFormat { found: 0 }),
        1 => {
            let file: FileOne = parse(text)?;
            Ok(Design {
                name: file.name,
                units: file.units,
                shape: file.shape,
                backdrop: file.backdrop,
            })
        }
        newer => Err(DesignError::Newer { found: newer }),
    }
}

fn parse<T: DeserializeOwned>(text: &str) -> Result<T, DesignError> {
    syntax().from_str(text).map_err(|error| {
        let at = error.span.start;
        DesignError::Syntax {
            line: at.line,
            column: at.col,
            what: sentence(&error.code),
        }
    })
}

/// What the parser says, as the middle of a sentence.
fn sentence(error: &ron::Error) -> String {
    match error {
        ron::Error::NoSuchStructField { expected, found, outer } => format!(
            "there is no field `{found}`{}; there are {}",
            outer.as_deref().map(|o| format!(" in `{o}`")).unwrap_or_default(),
            expected.join(", ")
        ),
        ron::Error::NoSuchEnumVariant { expected, found, .. } => {
            format!("there is no `{found}` here; there are {}", expected.join(", "))
        }
        ron::Error::ExceededRecursionLimit => format!("it nests deeper than {MAX_DEPTH}"),
        ron::Error::Eof | ron::Error::ExpectedStructLikeEnd => "the file ends, or a bracket is missing".to_owned(),
        other => {
            let text = other.to_string();
            let mut letters = text.chars();
            letters
                .next()
                .map(|first| first.to_lowercase().chain(letters).collect())
                .unwrap_or_default()
        }
    }
}
