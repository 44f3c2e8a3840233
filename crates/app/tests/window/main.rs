//! The window, driven by its accessible names, without a display. One file a subject.

#![expect(clippy::unwrap_used, reason = "a test may stop where it stands")]

mod animation;
mod backdrop;
mod common;
mod editing;
mod first_shell;
mod import;
mod ladder;
mod legend;
mod panels;
mod panes;
mod readings;
mod safe;
mod selection;
mod solving;
mod strip;
mod view;
mod zones;
