//! What the executor changes and what the widgets read.

use std::{borrow::Cow, path::PathBuf, sync::Arc};

use zonewright_geometry::Shape;
use zonewright_painter::Camera;
use zonewright_shop::text::Units;

use super::{
    animating::Animating, backdrop::BackdropState, command::Command, derived::Derived, dialogs::Dialogs, guide::Guide,
    history::History, panes::Panes, readings::Remembered, safe::Safe, solving::Solving, theme::Theme, view::ViewState,
    worker::Worker,
};
use crate::document::Design;

/// Something to be said to the user, above the picture, until it is closed.
#[derive(Clone, PartialEq, Eq, Debug)]
pub struct Message {
    /// What went wrong, where, and what to do.
    pub text: String,
}

/// The state of the window.
#[derive(Debug)]
pub struct State {
    /// The design and its past.
    pub history: History,
    /// The file that the design has.
    pub path: Option<PathBuf>,
    /// What is not saved with the design.
    pub view: ViewState,
    /// From where one looks, in each of the views.
    pub panes: Panes,
    /// The growth that what is picked was found again in.
    pub(crate) followed: u64,
    /// What follows from the design.
    pub derived: Derived,
    /// What is done with the backdrop.
    pub backdrop: BackdropState,
    /// Slow stages.
    pub worker: Worker,
    /// Questions to the system.
    pub dialogs: Dialogs,
    /// What is to be said.
    pub message: Option<Message>,
    /// One line about what was done last.
    pub status: String,
    /// What waits for the answer about unsaved changes.
    pub waiting: Option<Box<Command>>,
    /// What the save that is going on will be followed by.
    pub after_save: Option<Box<Command>>,
    /// The text of the command search, while it is open.
    pub search: Option<String>,
    /// Whether the window is to close.
    pub closing: bool,
    /// What keeps designs and files from being lost.
    pub safe: Safe,
    /// The state that the readouts are compared with.
    pub remembered: Option<Remembered>,
    /// Animations.
    pub animating: Animating,
    /// Solving for wanted figures.
    pub solving: Solving,
    /// The first shell.
    pub guide: Guide,
    /// Colours and sizes.
    pub theme: Theme,
}

impl State {
    /// A window on a design.
    #[must_use]
    pub fn new(design: Design, path: Option<PathBuf>, worker: Worker) -> Self {
        Self {
            history: History::new(design, true),
            path,
            view: ViewState::default(),
            panes: Panes::default(),
            followed: 0,
            derived: Derived::new(),
            backdrop: BackdropState::default(),
            worker,
            dialogs: Dialogs::default(),
            message: None,
            status: "Ready".to_owned(),
            waiting: None,
            after_save: None,
            search: None,
            closing: false,
            safe: Safe::default(),
            remembered: None,
            animating: Animating::default(),
            solving: Solving::default(),
            guide: Guide::default(),
            theme: Theme::bundled(),
        }
    }

    /// The design as it is.
    #[must_use]
    pub const fn design(&self) -> &Arc<Design> {
        self.history.now()
    }

    /// The camera of the view that keys act on.
    #[must_use]
    pub fn camera(&self) -> Camera {
        self.panes.pane(self.panes.active()).camera
    }

    /// The shape of the design as it is.
    #[must_use]
    pub fn shape(&self) -> &Shape {
        &self.design().shape
    }

    /// The shape up to where one has climbed on the ladder: what is shown, and what a step is added to.
    #[must_use]
    pub fn shown_shape(&self) -> Cow<'_, Shape> {
        let shape = self.shape();
        match self.view.ladder.climbed.and_then(|place| place.stage(shape)) {
            Some(stage) => Cow::Owned(shape.up_to(stage)),
            None => Cow::Borrowed(shape),
        }
    }

    /// The unit of lengths.
    #[must_use]
    pub fn units(&self) -> Units {
        self.design().units
    }

    /// Colours of the look that is on.
    #[must_use]
    pub const fn colours(&self) -> &super::theme::Colours {
        self.theme.colours(self.view.dark)
    }

    /// The title of the window: the file's name, and a dot while something is unsaved.
    #[must_use]
    pub fn title(&self) -> String {
        let name = self.file_name();
        let dot = if self.history.unsaved() { " •" } else { "" };
        format!("{name}{dot} – zonewright")
    }

    /// The name of the file, or what stands for it.
    #[must_use]
    pub fn file_name(&self) -> String {
        let file = self.path.as_ref().and_then(|p| p.file_name());
        match file {
            Some(file) => file.to_string_lossy().into_owned(),
            None if self.design().name.is_empty() => "Untitled".to_owned(),
            None => self.design().name.clone(),
        }
    }

    /// Changes the design: a new undo step, or part of the last one with the same key.
    pub fn change(&mut self, label: &str, key: Option<String>, edit: impl FnOnce(&mut Design)) {
        let mut design = Design::clone(self.design());
        edit(&mut design);
        self.history.change(design, label, key);
    }

    /// Says one line in the status bar.
    pub fn say(&mut self, text: impl Into<String>) {
        self.status = text.into();
    }

    /// Says what went wrong; it stays until it is closed.
    pub fn complain(&mut self, text: impl Into<String>) {
        self.message = Some(Message { text: text.into() });
    }
}
