//! The zonewright program: the command line, or the window.

use std::process::ExitCode;

use zonewright::{
    command_line::{Asked, fail, run},
    document::read_design,
};

fn main() -> ExitCode {
    let file = match run(std::env::args_os()) {
        Asked::Leave(status) => return status,
        Asked::Window(file) => file,
    };
    if let Some(Err(error)) = file.as_deref().map(read_design) {
        return fail(&error.to_string());
    }
    match zonewright::window::run(file.as_deref()) {
        Ok(()) => ExitCode::SUCCESS,
        Err(what) => fail(&what),
    }
}
