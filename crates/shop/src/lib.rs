//! From the shell to the parts: bevels, families, marks, lists and models.
//!
//! Pure: everything comes out as text or bytes; nothing here opens a file or a window.

pub mod bevel;
pub mod export;
pub mod family;
mod finding_text;
pub mod lists;
pub mod marks;
pub mod models;
pub mod parts;
mod solve_text;
pub mod spread;
#[cfg(test)]
mod test_shells;
pub mod text;

pub use bevel::EdgeKind;
pub use export::{ExportFile, FILES, UnknownWord, export};
pub use family::{FamilyTolerance, Hand};
pub use finding_text::{FindingText, FindingWriter, level_word};
pub use marks::Mark;
pub use parts::{Family, Mate, Mates, PartEdge, PartPanel, Parts};
pub use solve_text::{change_line, figure_name, figure_value, parameter_value, reached_line, unsolved_text, zone_name};
