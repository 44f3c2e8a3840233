//! The window.
//!
//! `logic()` changes the state, `ui()` only draws and sends commands. One enum of commands ([`command::Command`]), one executor
//! (`execute`), an undo stack of snapshots (`history`), and everything that follows from the design kept by revision
//! (`derived`).

mod animating;
mod app;
mod backdrop;
mod backdrop_view;
mod command;
mod derived;
mod dialogs;
mod execute;
mod fields;
mod frames;
mod guide;
mod history;
mod history_pack;
mod history_stack;
mod kinds;
mod ladder;
mod menu;
mod open;
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
mod selection;
mod session;
mod solving;
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

pub use animating::{AnimateAct, Animating, Playing, Wish};
pub use app::App;
pub use backdrop::{BackdropAct, BackdropState};
pub use backdrop_view::BackdropView;
pub use command::{Command, Unsaved};
pub use derived::{Counts, Derived, Pending};
pub use guide::{Going, Guide, GuideAct, STEPS, Target};
pub use history::History;
pub use ladder::{Climbed, Ladder, LadderAct, LadderView, Laid, Row, RowKind, Said};
pub use open::{Options, Renderer, run};
pub use panes::{Layout, Pane, PaneAct, Panes};
pub use path_edit::PathEdit;
pub use picture::NAME as PICTURE;
pub use readings::{End, ReadingAct, Remembered, Shown};
pub use safe::{Banner, Disk, InTheWay, Orphan, Overwrite, Safe, SafeAct, Stamp};
pub use selection::{Dimension, SelectAct, Selection};
pub use session::STATE_DIR;
pub use solving::{Answer, SolveAct, Solving};
pub use state::State;
pub use strip::{NAME as STRIP, Picks, Span, StripAct, StripFront, StripView};
pub use thing::{Held, Kind, Thing};
pub use view::{Hand, ViewState};
pub use zone_table::ZoneTable;
pub use zones::{SnapStar, ZoneAct, ZoneView};
