//! Runs the real program.
#![allow(dead_code, reason = "each test file uses its part")]

use std::{
    path::Path,
    process::{Command, Output},
};

/// Runs the program in a folder, with no display.
pub(crate) fn zonewright<S: AsRef<std::ffi::OsStr>>(folder: &Path, arguments: &[S]) -> Output {
    Command::new(env!("CARGO_BIN_EXE_zonewright"))
        .args(arguments)
        .current_dir(folder)
        .env_remove("DISPLAY")
        .env_remove("WAYLAND_DISPLAY")
        .env_remove("WAYLAND_SOCKET")
        .output()
        .unwrap()
}

/// The same from one line of words.
pub(crate) fn run(folder: &Path, line: &str) -> Output {
    zonewright(folder, &line.split_whitespace().collect::<Vec<_>>())
}

pub(crate) fn errors(output: &Output) -> String {
    String::from_utf8(output.stderr.clone()).unwrap()
}

pub(crate) fn printed(output: &Output) -> String {
    String::from_utf8(output.stdout.clone()).unwrap()
}

pub(crate) fn status(output: &Output) -> i32 {
    output.status.code().unwrap()
}

/// Runs and expects success; what it prints.
pub(crate) fn done(folder: &Path, line: &str) -> String {
    let output = run(folder, line);
    assert_eq!(status(&output), 0, "{line}: {}", errors(&output));
    printed(&output)
}
