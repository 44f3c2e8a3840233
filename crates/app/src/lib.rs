//! The program: the document and its files, the command line, imports, reports and the window.

pub mod animation;
pub mod command_line;
pub mod document;
pub mod fitting;
pub mod import;
pub mod report;
pub mod window;
