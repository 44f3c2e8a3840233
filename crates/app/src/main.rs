//! The zonewright program: the command line, or the window.

use std::process::ExitCode;

use zonewright::{
    command_line::{Asked, fail, run},
    document::read_design,
};

fn main() -> ExitCode {
    let options = match run(std::env::args_os()) {
        Asked::Leave(status) => return status,
        Asked::Window(options) => options,
    };
    if let Some(Err(error)) = options.file.as_deref().map(read_design) {
        return fail(&error.to_string());
    }
    match zonewright::window::run(&options) {
        Ok(()) => ExitCode::SUCCESS,
        Err(what) => fail(&what),
    }
}
