//! The command line. It is kept stable: other programs call it.

mod animate;
mod curve_words;
mod fit;
mod jobs;
mod picture;
mod refusal;
mod solve;
mod star_words;
mod start;
mod values;
mod wants;

use std::{ffi::OsString, io::Write, path::PathBuf, process::ExitCode};

use clap::{Parser, Subcommand, error::ErrorKind};

use start::Kind;

use crate::window;

/// Done.
const DONE: u8 = 0;
/// `check` found something of level stop.
const STOPPED: u8 = 1;
/// Bad arguments, or an input that cannot be used.
const UNUSABLE: u8 = 2;

/// Designs shells of flat parallelogram panels, and hands the bench its lists.
#[derive(Parser, Debug)]
#[command(
    name = "zonewright",
    version,
    args_conflicts_with_subcommands = true,
    max_term_width = 110
)]
#[command(
    after_help = "Without a command the window opens: on FILE, else on the last design, else on the bundled demo.\n\
    Angles are in degrees; lengths in mm unless a unit is written (300mm, 0.3m, 11 3/4in).\n\
    Exit status: 0 done; 1 only from check, when a finding says stop; 2 bad arguments or an input that cannot be used."
)]
struct Cli {
    #[command(subcommand)]
    command: Option<Command>,
    /// What draws the window: opengl, wgpu (Vulkan), or auto, which takes the first of these that works.
    #[arg(
        long,
        value_name = "WHICH",
        value_enum,
        default_value = "auto",
        hide_possible_values = true
    )]
    renderer: WhichRenderer,
    /// Write how long each frame takes while the picture changes, in ms, to a CSV file.
    #[arg(long, value_name = "FILE.csv")]
    frame_times: Option<PathBuf>,
    /// The design to open in the window.
    file: Option<PathBuf>,
}

/// What draws the window.
#[derive(clap::ValueEnum, Clone, Copy, Debug)]
enum WhichRenderer {
    Auto,
    Opengl,
    Wgpu,
}

#[derive(Subcommand, Debug)]
enum Command {
    /// Make a design.
    #[command(subcommand)]
    Start(Kind),
    /// Bring the paths of a design to a drawn target: an arch, a site line, a form.
    Fit(Box<fit::FitArguments>),
    /// Print the readouts of a design.
    Report {
        /// The design.
        file: PathBuf,
        /// Print one JSON object, numbers at full precision.
        #[arg(long)]
        json: bool,
    },
    /// Print the findings about a design; exit 1 when one says stop.
    Check {
        /// The design.
        file: PathBuf,
        /// Print a JSON list.
        #[arg(long)]
        json: bool,
    },
    /// Write lists, cut files and drawings.
    Export {
        /// The design.
        file: PathBuf,
        /// The folder to write to; it is made when it is not there.
        #[arg(long, value_name = "DIR")]
        to: PathBuf,
        /// Only these, separated by commas; see docs/format.md for the words.
        #[arg(long, value_delimiter = ',', value_name = "WORDS")]
        only: Vec<String>,
    },
    /// Change parameters until figures of the shell are as wanted; exit 2 with the reason when they cannot be.
    Solve(solve::Solve),
    /// List the parameters of a design: keys, values, names.
    Parameters {
        /// The design.
        file: PathBuf,
        /// Print a JSON list, numbers at full precision.
        #[arg(long)]
        json: bool,
    },
    /// Draw a picture, without a display.
    Picture {
        /// The design.
        file: PathBuf,
        /// The PNG to write.
        #[arg(short, long, value_name = "OUT.png")]
        output: PathBuf,
        /// From where: plan, front, side, iso, or fit (the window's first view).
        #[arg(long, value_name = "NAME", default_value = "iso")]
        view: String,
        /// Width and height in pixels.
        #[arg(long, value_name = "WxH", default_value = "1200x800", value_parser = values::size)]
        size: [u32; 2],
    },
    /// Show the growth, or a parameter that runs between two values, as moving pictures.
    Animate(animate::Animate),
}

/// What the command line asks for.
pub enum Asked {
    /// The window.
    Window(window::Options),
    /// Nothing more; leave with this status.
    Leave(ExitCode),
}

/// Does what the arguments ask, except opening the window. The first argument is the program's name.
#[must_use]
pub fn run(arguments: impl IntoIterator<Item = OsString>) -> Asked {
    let cli = match Cli::try_parse_from(arguments) {
        Ok(cli) => cli,
        Err(error) => return Asked::Leave(ExitCode::from(explain(&error))),
    };
    let done = match cli.command {
        None => {
            return Asked::Window(window::Options {
                file: cli.file,
                renderer: match cli.renderer {
                    WhichRenderer::Auto => window::Renderer::Auto,
                    WhichRenderer::Opengl => window::Renderer::OpenGl,
                    WhichRenderer::Wgpu => window::Renderer::Wgpu,
                },
                frame_times: cli.frame_times,
            });
        }
        Some(Command::Start(kind)) => kind.make().map(|()| DONE),
        Some(Command::Fit(arguments)) => arguments.run().map(|()| DONE),
        Some(Command::Report { file, json }) => jobs::report(&file, json).map(|()| DONE),
        Some(Command::Check { file, json }) => jobs::check(&file, json).map(|stop| if stop { STOPPED } else { DONE }),
        Some(Command::Export { file, to, only }) => jobs::export(&file, &to, &only).map(|()| DONE),
        Some(Command::Animate(animate)) => animate.make().map(|()| DONE),
        Some(Command::Solve(options)) => options.run().map(|()| DONE),
        Some(Command::Parameters { file, json }) => solve::list(&file, json).map(|()| DONE),
        Some(Command::Picture {
            file,
            output,
            view,
            size,
        }) => picture::write(&file, &output, &view, size).map(|()| DONE),
    };
    Asked::Leave(ExitCode::from(done.unwrap_or_else(|what| {
        complain(&what);
        UNUSABLE
    })))
}

/// Says what went wrong, on standard error, and gives the status to leave with.
#[must_use]
pub fn fail(what: &str) -> ExitCode {
    complain(what);
    ExitCode::from(UNUSABLE)
}

fn complain(what: &str) {
    // Nothing is left to be done when standard error is closed.
    let one_line = what.split_whitespace().collect::<Vec<_>>().join(" ");
    let _ = writeln!(std::io::stderr(), "zonewright: {one_line}");
}

/// Prints to standard output. A reader that stops reading is no error.
fn say(text: &str) -> Result<(), String> {
    let mut out = std::io::stdout().lock();
    match out.write_all(text.as_bytes()).and_then(|()| out.flush()) {
        Err(error) if error.kind() != std::io::ErrorKind::BrokenPipe => {
            Err(format!("cannot write to standard output: {error}"))
        }
        _ => Ok(()),
    }
}

/// Prints help where it is asked for; puts everything else into one line.
fn explain(error: &clap::Error) -> u8 {
    match error.kind() {
        ErrorKind::DisplayHelp | ErrorKind::DisplayVersion => {
            let _ = error.print();
            DONE
        }
        ErrorKind::DisplayHelpOnMissingArgumentOrSubcommand | ErrorKind::MissingSubcommand => {
            let _ = error.print();
            UNUSABLE
        }
        _ => {
            complain(&one_line(&error.render().to_string()));
            UNUSABLE
        }
    }
}

/// The first part of clap's message: what is wrong and, where there is one, its hint.
fn one_line(message: &str) -> String {
    let lines = message
        .lines()
        .take_while(|l| !l.starts_with("Usage:") && !l.starts_with("For more information"))
        .map(str::trim)
        .filter(|l| !l.is_empty());
    let joined = lines.collect::<Vec<_>>().join(" ");
    format!("{}; see --help", joined.trim_start_matches("error: "))
}
