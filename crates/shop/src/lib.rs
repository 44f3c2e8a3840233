//! From the shell to the parts: bevels, families, marks, lists and models.
//!
//! Pure: everything comes out as text or bytes; nothing here opens a file or a window.

pub mod bevel;
pub mod family;
pub mod marks;
pub mod text;

pub mod parts;
#[cfg(test)]
mod test_shells;

pub use bevel::EdgeKind;
pub use family::{FamilyTolerance, Hand};
pub use marks::Mark;
pub use parts::{Family, Mate, Mates, PartEdge, PartPanel, Parts};
