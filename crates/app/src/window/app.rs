//! The window: `logic` changes the state, `ui` draws it and sends commands.

use std::{path::PathBuf, time::Instant};

use egui::{CentralPanel, Frame, Key, Modifiers, Panel, Ui, ViewportCommand};

use super::{
    command::{Command, Sender},
    derived::Counts,
    execute,
    frames::{FrameLog, Frames},
    guide, ladder, menu,
    panels::{self, Cx},
    panes::PaneAct,
    path_box, picture, prompts,
    safe::{self, SafeAct, Stamp},
    search,
    state::State,
    strip,
    widgets::Widgets,
    worker::Worker,
};
use crate::document::Design;

/// The window.
#[derive(Debug)]
pub struct App {
    state: State,
    sender: Sender,
    widgets: Widgets,
    title: String,
    dark: Option<bool>,
    focused: bool,
    size: Option<egui::Vec2>,
}

impl App {
    /// The window on a design, with its worker and the system's dialogs.
    #[must_use]
    pub fn new(ctx: &egui::Context, design: Design, path: Option<PathBuf>) -> Self {
        let mut app = Self::on(ctx, State::new(design, path, Worker::start(ctx)));
        app.state.dialogs.system = Some(ctx.clone());
        app.widgets.frames = Frames::watched();
        app
    }

    /// The window on a design for tests: slow stages are worked out at once, and the system is asked nothing.
    #[must_use]
    pub fn new_headless(ctx: &egui::Context, design: Design) -> Self {
        Self::on(ctx, State::new(design, None, Worker::inline()))
    }

    fn on(ctx: &egui::Context, state: State) -> Self {
        state.theme.apply(ctx);
        Self {
            state,
            sender: Sender::default(),
            widgets: Widgets::default(),
            title: String::new(),
            dark: None,
            focused: true,
            size: None,
        }
    }

    /// Remembers in this file which design is open, keeps unsaved designs beside it, and offers those that a crash left.
    #[must_use]
    pub fn with_session(mut self, session: Option<PathBuf>) -> Self {
        let Some(file) = session else { return self };
        let state = &mut self.state;
        state.safe = safe::Safe::start(&file, state.dialogs.system.clone());
        state.view.dark = state.safe.session.dark;
        if let Some(path) = state.path.clone()
            && let Err(error) = state.safe.remember(|session| session.opened(&path))
        {
            state.say(format!(
                "{error}; the program will not find this design by itself next time"
            ));
        }
        self
    }

    /// Gives the design a file.
    #[must_use]
    pub fn with_path(mut self, path: Option<PathBuf>) -> Self {
        self.state.path = path;
        self
    }

    /// Offers the first shell, to whoever has not opened a design before.
    #[must_use]
    pub const fn with_offer(mut self, offered: bool) -> Self {
        self.state.guide.offered = offered;
        self
    }

    /// Says what the design's file was just before it was read.
    #[must_use]
    pub fn with_stamp(mut self, stamp: Option<Stamp>) -> Self {
        self.state.safe.knows(stamp);
        self
    }

    /// Writes how long frames take.
    #[must_use]
    pub(super) fn with_frame_log(mut self, log: Option<FrameLog>) -> Self {
        self.widgets.frames.set_log(log);
        self
    }

    /// Says something when the window opens.
    #[must_use]
    pub fn with_message(mut self, message: Option<String>) -> Self {
        if let Some(text) = message {
            self.state.complain(text);
        }
        self
    }

    /// The state, to read.
    #[must_use]
    pub const fn state(&self) -> &State {
        &self.state
    }

    /// Sends a command, as a widget does.
    pub fn send(&self, command: Command) {
        self.sender.send(command);
    }

    /// How often each stage was worked out.
    #[must_use]
    pub const fn counts(&self) -> Counts {
        self.state.derived.counts
    }

    /// How often a picture was put together.
    #[must_use]
    pub const fn pictures(&self) -> u64 {
        self.widgets.pictures
    }

    /// How often an outline of the strip was drawn anew.
    #[must_use]
    pub const fn outlines(&self) -> u64 {
        self.widgets.strip.outlines()
    }

    /// Carries out what has been sent and works out what follows from it, as before each frame; for the bench of the strip.
    pub fn work(&mut self) {
        for command in self.sender.take() {
            execute::run(&mut self.state, command);
        }
        let design = std::sync::Arc::clone(self.state.design());
        self.state.derived.catch_up(&design, self.state.history.revision());
    }

    /// Draws the strip alone: one frame of it for its bench.
    pub fn strip_frame(&mut self, ui: &mut Ui) {
        let cx = Cx {
            state: &self.state,
            tx: &self.sender,
        };
        self.widgets.over_next = None;
        strip::strip_ui(cx, ui, &mut self.widgets);
        self.widgets.over = self.widgets.over_next;
    }

    fn shortcuts(&self, ctx: &egui::Context) {
        if self.state.waiting.is_some() || self.state.safe.overwrite.is_some() {
            // The question comes first; it has keys of its own.
            return;
        }
        let typing = ctx.text_edit_focused();
        let mut commands = Command::listed();
        // A shortcut with fewer modifiers also matches the keys of one with more.
        commands.sort_by_key(|c| c.shortcut().is_none_or(|s| !s.modifiers.shift));
        for command in commands {
            let Some(keys) = command.shortcut() else { continue };
            let of_text = matches!(
                command,
                Command::Undo | Command::Redo | Command::AddCourse | Command::RemoveCourse | Command::LayUntilStill
            );
            if !(typing && of_text) && ctx.input_mut(|i| i.consume_shortcut(&keys)) {
                self.to_pane_under_pointer(&command);
                self.sender.send(command);
            }
        }
        if !typing && ctx.input_mut(|i| i.consume_key(Modifiers::COMMAND, Key::Y)) {
            self.sender.send(Command::Redo);
        }
        let popup = egui::Popup::is_any_open(ctx);
        let editing = self.widgets.drag.is_some_and(|drag| drag.edits());
        if !typing && !popup && !editing && ctx.input(|i| i.key_pressed(Key::Escape)) {
            self.sender.send(Command::Dismiss);
        }
    }

    /// Keys that choose a view mean the view under the pointer; without one there, the active one.
    fn to_pane_under_pointer(&self, command: &Command) {
        let looks = matches!(command, Command::Look(_) | Command::Pane(PaneAct::Free));
        if let Some(at) = self.widgets.over_pane.filter(|_| looks) {
            self.sender.send(Command::Pane(PaneAct::Activate(at)));
        }
    }

    fn system_events(&mut self, ctx: &egui::Context) {
        let dropped = ctx.input(|i| {
            i.raw
                .dropped_files
                .iter()
                .map(|f| f.path().to_path_buf())
                .filter(|p| !p.as_os_str().is_empty())
                .collect::<Vec<PathBuf>>()
        });
        if !dropped.is_empty() {
            self.sender.send(Command::Safe(SafeAct::Drop(dropped)));
        }
        let focused = ctx.input(|i| i.focused);
        if focused && !self.focused {
            self.state.safe.look_at_file();
        }
        self.focused = focused;
        if ctx.input(|i| i.viewport().close_requested()) && !self.state.closing && self.state.history.unsaved() {
            ctx.send_viewport_cmd(ViewportCommand::CancelClose);
            self.sender.send(Command::Quit);
        }
        self.size = ctx.input(|i| i.viewport().inner_rect).map(|r| r.size()).or(self.size);
        if let Some(command) = self.state.dialogs.poll() {
            self.sender.send(command);
        }
    }

    fn show_outside(&mut self, ctx: &egui::Context) {
        let title = self.state.title();
        if title != self.title {
            ctx.send_viewport_cmd(ViewportCommand::Title(title.clone()));
            self.title = title;
        }
        if self.dark != Some(self.state.view.dark) {
            self.dark = Some(self.state.view.dark);
            ctx.set_theme(if self.state.view.dark {
                egui::Theme::Dark
            } else {
                egui::Theme::Light
            });
        }
        if self.state.closing {
            self.state.safe.leave();
            ctx.send_viewport_cmd(ViewportCommand::Close);
        }
    }

    /// Works out what follows from the design. When it is worked out anew, the camera may have something to be fitted to.
    fn follow(&mut self, ctx: &egui::Context) {
        let (now, dragging) = ctx.input(|i| (i.time, i.pointer.any_down() || i.pointer.any_released()));
        let state = &mut self.state;
        execute::follow_search(state);
        execute::follow_fit(state);
        if let Some(seconds) = execute::follow_animation(state, now) {
            ctx.request_repaint_after(std::time::Duration::from_secs_f64(seconds));
        }
        let design = std::sync::Arc::clone(state.design());
        execute::keep_climbed(state);
        state.derived.climb(state.view.ladder.climbed);
        let revision = state.history.revision();
        state
            .derived
            .follow(&design, revision, dragging, &mut state.worker, now);
        execute::keep_picked(state);
        if let Some(seconds) = state.derived.settle(&design, &mut state.worker, now) {
            ctx.request_repaint_after(std::time::Duration::from_secs_f64(seconds));
        }
        guide::follow(state);
        execute::fit_when_pending(state);
        execute::refit(state, dragging || state.derived.by_drag());
    }
}

impl eframe::App for App {
    fn logic(&mut self, ctx: &egui::Context, _frame: &mut eframe::Frame) {
        let panels = self.state.derived.totals.panels;
        self.widgets.frames.begin(Instant::now(), panels);
        self.shortcuts(ctx);
        self.system_events(ctx);
        for command in self.sender.take() {
            execute::run(&mut self.state, command);
        }
        // A drag is one undo step; it ends when the button is let go.
        if !ctx.input(|i| i.pointer.any_down()) {
            self.state.history.seal();
        }
        let state = &mut self.state;
        // What was to follow a save is forgotten when the save was given up.
        if state.after_save.is_some() && !state.dialogs.is_open() && state.safe.overwrite.is_none() {
            state.after_save = None;
        }
        state.safe.follow(&state.history, state.path.as_deref());
        self.follow(ctx);
        self.show_outside(ctx);
    }

    fn ui(&mut self, ui: &mut Ui, _frame: &mut eframe::Frame) {
        let cx = Cx {
            state: &self.state,
            tx: &self.sender,
        };
        let sizes = self.state.theme.sizes;
        let widgets = &mut self.widgets;
        widgets.over_next = None;
        let pictures = widgets.pictures;
        let bar = Frame::side_top_panel(ui.style()).inner_margin(egui::Margin::symmetric(sizes.margin, 4));
        let side = Frame::side_top_panel(ui.style()).inner_margin(egui::Margin::same(sizes.margin));
        Panel::top("menu").frame(bar).show(ui, |ui| menu::menu_ui(cx, ui));
        Panel::bottom("status")
            .frame(bar)
            .show(ui, |ui| prompts::status_ui(cx, ui));
        Panel::left("start and steps")
            .frame(side)
            .default_size(sizes.left)
            .size_range(sizes.left..=520.0)
            .show(ui, |ui| panels::left_ui(cx, ui));
        let upright = Frame::side_top_panel(ui.style()).inner_margin(egui::Margin::symmetric(8, sizes.margin));
        Panel::left("ladder")
            .frame(upright)
            .exact_size(sizes.ladder)
            .show(ui, |ui| ladder::ladder_ui(cx, ui, widgets));
        Panel::right("readouts and findings")
            .frame(side)
            .default_size(sizes.right)
            .size_range(220.0..=480.0)
            .show(ui, |ui| panels::right_ui(cx, ui, widgets));
        Panel::bottom("strip")
            .frame(side)
            .exact_size(sizes.strip)
            .show(ui, |ui| strip::strip_ui(cx, ui, widgets));
        CentralPanel::no_frame().frame(side).show(ui, |ui| {
            safe::banners_ui(cx, ui);
            prompts::banners_ui(cx, ui);
            guide::card_ui(cx, ui);
            picture::picture_ui(cx, ui, widgets);
            ladder::banner_ui(cx, ui, ui.max_rect());
        });
        search::search_ui(cx, ui, widgets);
        path_box::path_box_ui(cx, ui, widgets);
        prompts::unsaved_ui(cx, ui);
        safe::overwrite_ui(cx, ui);
        safe::hover_ui(cx, ui);
        let held = ui.ctx().input(|i| i.pointer.any_down());
        let (changed, panels) = (widgets.pictures != pictures, self.state.derived.totals.panels);
        if let Some(wait) = widgets.frames.end(Instant::now(), changed, held, panels) {
            ui.ctx().request_repaint_after(wait);
        }
        let moved_on = widgets.over != widgets.over_next;
        widgets.over = widgets.over_next;
        if moved_on || !self.sender.is_empty() {
            ui.ctx().request_repaint();
        }
    }
}

impl Drop for App {
    /// The size of the window is remembered at its end.
    fn drop(&mut self) {
        if let Some(size) = self.size {
            // At its end, the window has nobody to tell.
            let _ = self.state.safe.remember(|session| session.set_size(size.into()));
        }
    }
}
