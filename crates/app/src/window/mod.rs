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
mod search;
mod selection;
mod session;
mod splice_marks;
mod stages;
mod state;
mod strip;
mod theme;
mod thing;
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
pub use selection::{Dimension, SelectAct, Selection};
pub use session::STATE_DIR;
pub use state::State;
pub use strip::{NAME as STRIP, Picks, Span, StripAct, StripFront, StripView};
pub use thing::{Held, Kind, Thing};
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
    let (design, path, message) = first_design(file, session.as_deref())?;
    let options = eframe::NativeOptions {
        viewport: egui::ViewportBuilder::default()
            .with_title("zonewright")
            .with_app_id("zonewright")
            .with_inner_size([1280.0, 800.0])
            .with_min_inner_size([900.0, 560.0])
            .with_drag_and_drop(true),
        ..eframe::NativeOptions::default()
    };
    let create: eframe::AppCreator<'_> = Box::new(|cc| {
        let app = App::new(&cc.egui_ctx, design, path);
        Ok(Box::new(app.with_session(session).with_message(message)))
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

/// The design to begin with, its file, and what is to be said about it.
fn first_design(
    file: Option<&Path>,
    session: Option<&Path>,
) -> Result<(Design, Option<PathBuf>, Option<String>), String> {
    if let Some(file) = file {
        let design = document::read_design(file).map_err(|error| error.to_string())?;
        return Ok((design, Some(file.to_path_buf()), None));
    }
    let mut message = None;
    if let Some(last) = session.and_then(session::last).filter(|last| last.is_file()) {
        match document::read_design(&last) {
            Ok(design) => return Ok((design, Some(last), None)),
            // The last design may be broken by now; that must not keep the window from opening.
            Err(error) => message = Some(execute::sentence(&format!("{error}. The sample is shown instead."))),
        }
    }
    Ok((session::sample()?, None, message))
}
