//! The window.
//!
//! `logic()` changes the state, `ui()` only draws and sends commands. One enum of commands ([`command::Command`]), one executor
//! (`execute`), an undo stack of snapshots (`history`), and everything that follows from the design kept by revision
//! (`derived`).

mod app;
mod backdrop;
mod backdrop_view;
mod command;
mod derived;
mod dialogs;
mod execute;
mod fields;
mod history;
mod history_pack;
mod history_stack;
mod kinds;
mod ladder;
mod menu;
mod panels;
mod panes;
mod path_box;
mod path_edit;
mod path_place;
mod picture;
mod prompts;
mod readings;
mod remedies;
mod safe;
mod search;
mod session;
mod splice_marks;
mod stages;
mod state;
mod strip;
mod theme;
mod view;
mod widgets;
mod worker;
mod zone_table;
mod zones;

use std::path::{Path, PathBuf};

pub use app::App;
pub use backdrop::{BackdropAct, BackdropState};
pub use backdrop_view::BackdropView;
pub use command::{Command, Unsaved};
pub use derived::{Counts, Derived, Pending};
pub use history::History;
pub use ladder::{Climbed, Ladder, LadderAct, LadderView, Laid, Row, RowKind, Said};
pub use panes::{Layout, Pane, PaneAct, Panes};
pub use path_edit::PathEdit;
pub use picture::NAME as PICTURE;
pub use readings::{End, ReadingAct, Remembered, Shown};
pub use safe::{Banner, Disk, InTheWay, Orphan, Overwrite, Safe, SafeAct, Stamp};
pub use session::STATE_DIR;
pub use state::State;
pub use strip::{NAME as STRIP, Picks, Span, StripAct, StripFront, StripView};
pub use view::{Hand, ViewState};
pub use zone_table::ZoneTable;
pub use zones::{SnapStar, ZoneAct, ZoneView};

use crate::document::{self, Design};

/// Opens the window on a file, or else on the last design, or else on the sample. Comes back when the window is closed.
///
/// # Errors
/// One sentence, when no window can be opened; it names the command line, which needs none.
pub fn run(file: Option<&Path>) -> Result<(), String> {
    let session = session::file();
    let remembered = session.as_deref().map(session::read).unwrap_or_default();
    let First {
        design,
        path,
        stamp,
        message,
    } = first_design(file, &remembered)?;
    let options = eframe::NativeOptions {
        viewport: egui::ViewportBuilder::default()
            .with_title("zonewright")
            .with_app_id("zonewright")
            .with_inner_size(remembered.size().unwrap_or([1280.0, 800.0]))
            .with_min_inner_size([900.0, 560.0])
            .with_drag_and_drop(true),
        ..eframe::NativeOptions::default()
    };
    let create: eframe::AppCreator<'_> = Box::new(|cc| {
        let app = App::new(&cc.egui_ctx, design, path);
        Ok(Box::new(
            app.with_session(session).with_stamp(stamp).with_message(message),
        ))
    });
    eframe::run_native("zonewright", options, create).map_err(|error| {
        let why = refused(&error);
        format!("No window can be opened: {why}. Everything also works without one: see zonewright --help.")
    })
}

/// Why no window was opened, in a few words: what the system's libraries say names their own sources.
const fn refused(error: &eframe::Error) -> &'static str {
    match error {
        eframe::Error::Winit(_) | eframe::Error::WinitEventLoop(_) => "there is no display that answers",
        eframe::Error::Glutin(_) | eframe::Error::NoGlutinConfigs(..) | eframe::Error::OpenGL(_) => {
            "there is no OpenGL driver, not even one in software"
        }
        _ => "the system refused it",
    }
}

/// The design to begin with.
struct First {
    design: Design,
    path: Option<PathBuf>,
    /// Of its file, from before it was read.
    stamp: Option<Stamp>,
    /// What is to be said about it.
    message: Option<String>,
}

/// Reads the design to begin with: this file, or else the last design, or else the sample.
fn first_design(file: Option<&Path>, session: &session::Session) -> Result<First, String> {
    let read = |file: &Path| {
        let stamp = Stamp::of_file(file).ok();
        let path = Some(file.to_path_buf());
        document::read_design(file).map(|design| First {
            design,
            path,
            stamp,
            message: None,
        })
    };
    if let Some(file) = file {
        return read(file).map_err(|error| error.to_string());
    }
    let mut message = None;
    if let Some(last) = session.last().filter(|last| last.is_file()) {
        match read(&last) {
            Ok(first) => return Ok(first),
            // The last design may be broken by now; that must not keep the window from opening.
            Err(error) => message = Some(execute::sentence(&format!("{error}. The sample is shown instead."))),
        }
    }
    let mut design = session::sample()?;
    design.units = session.units().unwrap_or(design.units);
    Ok(First {
        design,
        path: None,
        stamp: None,
        message,
    })
}
