//! From the shell to the parts: bevels, families, marks, lists and models.
//!
//! Pure: everything comes out as text or bytes; nothing here opens a file or a window.

pub mod bevel;
pub mod family;
pub mod marks;
pub mod text;
