//! The program: the document and its files, the command line, imports, reports and the window.

#![cfg_attr(test, expect(clippy::unwrap_used, reason = "a test may stop where it stands"))]

pub mod command_line;
pub mod document;
pub mod import;
pub mod report;
pub mod window;
