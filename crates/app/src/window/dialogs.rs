//! Asking for a file or a folder without blocking the window.
//!
//! The system's dialog is asked from a thread of its own. When no dialog service answers, or when the user would rather
//! type, the program's own path box takes over (see [`super::path_box`]).

use std::{
    path::{Path, PathBuf},
    sync::mpsc,
    thread,
    time::{Duration, Instant},
};

use crate::import::BACKDROPS;

use super::{animating::AnimateAct, backdrop::BackdropAct, command::Command, execute::ENDING};

/// An answer of "nothing" that comes faster than this was not given by a user: there is no dialog service. Measured: 3 to
/// 4 ms without one.
const NO_SERVICE: Duration = Duration::from_millis(100);

/// The endings of files that paths are imported from, without the dot.
pub(crate) const IMPORTS: [&str; 3] = ["csv", "dxf", "svg"];

/// What is asked for.
#[derive(Clone, Copy, PartialEq, Eq, Debug)]
pub enum Asked {
    /// A design to open.
    Open,
    /// A path to import.
    Import,
    /// A backdrop to load.
    Backdrop,
    /// A name to save the design under.
    Save,
    /// A folder to export into.
    Export,
    /// A file for an animation, or a folder for its frames.
    Animation,
}

impl Asked {
    /// The heading of the question.
    #[must_use]
    pub const fn heading(self) -> &'static str {
        match self {
            Self::Open => "Open a design",
            Self::Import => "Import a path",
            Self::Backdrop => "Load a backdrop",
            Self::Save => "Save the design as",
            Self::Export => "Export into a folder",
            Self::Animation => "Save the animation (.gif, .png, or a folder)",
        }
    }

    /// What the answer is called.
    #[must_use]
    pub const fn action(self) -> &'static str {
        match self {
            Self::Open => "Open",
            Self::Import => "Import",
            Self::Backdrop => "Load",
            Self::Save => "Save",
            Self::Export => "Export",
            Self::Animation => "Save",
        }
    }

    /// The endings of the files that it is about, without the dot; none when it is about a folder.
    #[must_use]
    pub const fn endings(self) -> &'static [&'static str] {
        match self {
            Self::Open | Self::Save => &[ENDING],
            Self::Import => &IMPORTS,
            Self::Backdrop => &BACKDROPS,
            Self::Export => &[],
            Self::Animation => &["gif", "png"],
        }
    }

    /// The command that the answer becomes.
    #[must_use]
    pub fn command(self, path: PathBuf) -> Command {
        match self {
            Self::Open => Command::OpenPath(path),
            Self::Import => Command::ImportPath(path),
            Self::Backdrop => Command::Backdrop(BackdropAct::LoadPath(path)),
            Self::Save => Command::SaveTo(path),
            Self::Export => Command::ExportTo(path),
            Self::Animation => Command::Animate(AnimateAct::SaveTo(path)),
        }
    }
}

/// A question to the system that has not been answered.
#[derive(Debug)]
struct Pending {
    asked: Asked,
    since: Instant,
    answer: mpsc::Receiver<Option<PathBuf>>,
}

/// The program's own question.
#[derive(Clone, PartialEq, Eq, Debug)]
pub struct OwnBox {
    /// What is asked for.
    pub asked: Asked,
    /// The folder to begin in.
    pub folder: PathBuf,
    /// The name to begin with.
    pub name: String,
    /// Counts the questions, so that the box knows when it is a new one.
    pub serial: u64,
}

/// Questions for files and folders.
#[derive(Debug, Default)]
pub struct Dialogs {
    /// Whether the system is asked at all; it is not in tests.
    pub system: Option<egui::Context>,
    /// The program's own box, when it is open.
    pub own: Option<OwnBox>,
    pending: Option<Pending>,
    start: (PathBuf, String),
    serial: u64,
}

impl Dialogs {
    /// Asks; the answer comes as a command from [`Dialogs::poll`] or from the box.
    pub fn ask(&mut self, asked: Asked, file: Option<&Path>, name: &str) {
        let folder = file
            .and_then(Path::parent)
            .map(Path::to_path_buf)
            .filter(|f| f.is_dir());
        let folder = folder.or_else(|| std::env::current_dir().ok()).unwrap_or_default();
        let stem = name.strip_suffix(&format!(".{ENDING}")).unwrap_or(name);
        let name = match asked {
            Asked::Save => format!("{}.{ENDING}", stem.to_lowercase().replace(' ', "-")),
            Asked::Animation => format!("{}.gif", stem.to_lowercase().replace(' ', "-")),
            Asked::Open | Asked::Import | Asked::Backdrop | Asked::Export => String::new(),
        };
        self.start = (folder, name);
        self.own = None;
        match self.system.clone() {
            Some(ctx) => self.ask_system(asked, ctx),
            None => self.open_own(asked),
        }
    }

    /// Whether a question is open.
    #[must_use]
    pub const fn is_open(&self) -> bool {
        self.own.is_some() || self.pending.is_some()
    }

    /// What the system is being asked for.
    #[must_use]
    pub fn waiting_for(&self) -> Option<Asked> {
        self.pending.as_ref().map(|p| p.asked)
    }

    /// Opens the program's own box; an answer of the system that still comes is not heard any more.
    pub fn open_own(&mut self, asked: Asked) {
        self.pending = None;
        self.serial += 1;
        self.own = Some(OwnBox {
            asked,
            folder: self.start.0.clone(),
            name: self.start.1.clone(),
            serial: self.serial,
        });
    }

    /// Closes the question that is open. Gives whether there was one.
    pub fn close(&mut self) -> bool {
        let was_open = self.own.is_some() || self.pending.is_some();
        self.own = None;
        self.pending = None;
        was_open
    }

    /// Takes the system's answer, when it has come.
    pub fn poll(&mut self) -> Option<Command> {
        let pending = self.pending.as_ref()?;
        let answer = match pending.answer.try_recv() {
            Ok(answer) => answer,
            Err(mpsc::TryRecvError::Empty) => return None,
            Err(mpsc::TryRecvError::Disconnected) => None,
        };
        let (asked, took) = (pending.asked, pending.since.elapsed());
        self.pending = None;
        match answer {
            Some(path) => Some(asked.command(path)),
            None => {
                if took < NO_SERVICE {
                    self.open_own(asked);
                }
                None
            }
        }
    }

    fn ask_system(&mut self, asked: Asked, ctx: egui::Context) {
        let (send, answer) = mpsc::channel();
        let (folder, name) = self.start.clone();
        let started = thread::Builder::new()
            .name("zonewright-dialog".to_owned())
            .spawn(move || {
                let dialog = rfd::FileDialog::new().set_title(asked.heading()).set_directory(folder);
                let path = match asked {
                    Asked::Open => dialog.add_filter("Designs", &[ENDING]).pick_file(),
                    Asked::Import => dialog.add_filter("Paths", &IMPORTS).pick_file(),
                    Asked::Backdrop => dialog.add_filter("Backdrops", &BACKDROPS).pick_file(),
                    Asked::Save => dialog.add_filter("Designs", &[ENDING]).set_file_name(name).save_file(),
                    Asked::Export => dialog.pick_folder(),
                    Asked::Animation => dialog
                        .add_filter("Animations", &["gif", "png"])
                        .set_file_name(name)
                        .save_file(),
                };
                // Nobody listens any more when the question was closed meanwhile.
                let _ = send.send(path);
                ctx.request_repaint();
            });
        match started {
            Ok(_) => {
                let since = Instant::now();
                self.pending = Some(Pending { asked, since, answer });
            }
            Err(_) => self.open_own(asked),
        }
    }
}
