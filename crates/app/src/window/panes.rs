//! Several views of one shell: which panes the middle of the window shows, and from where each of them looks.

use serde::{Deserialize, Serialize};
use zonewright_geometry::Point;
use zonewright_painter::{Bounds, Camera, Projection, View};

use super::command::Words;

/// How many panes there can be.
pub(super) const PANES: usize = 4;

/// Which panes are shown, and how they share the middle of the window.
#[derive(Clone, Copy, PartialEq, Eq, Debug, Default, Serialize, Deserialize)]
pub enum Layout {
    /// The main pane alone.
    #[default]
    One,
    /// The main pane and one beside it.
    Two,
    /// A plan above an elevation, and the main pane beside them.
    Three,
    /// Plan above front, side beside front, and the main pane in the free corner.
    Four,
}

impl Layout {
    /// All layouts.
    pub const ALL: [Self; 4] = [Self::One, Self::Two, Self::Three, Self::Four];

    /// How many panes it shows. The first ones are shown, whichever the layout.
    #[must_use]
    pub const fn shown(self) -> usize {
        match self {
            Self::One => 1,
            Self::Two => 2,
            Self::Three => 3,
            Self::Four => PANES,
        }
    }

    /// Its words as a command.
    #[must_use]
    pub(super) const fn words(self) -> Words {
        let (name, hint) = match self {
            Self::One => ("One view", "Shows one picture of the shell."),
            Self::Two => ("Two views", "Shows two pictures side by side."),
            Self::Three => ("Three views", "Shows a plan and an elevation beside the picture."),
            Self::Four => ("Four views", "Shows plan, front, side and a free picture."),
        };
        Words { name, hint }
    }
}

/// What a camera waits for.
#[derive(Clone, Copy, PartialEq, Eq, Debug)]
pub(crate) enum Wait {
    /// Nothing.
    No,
    /// To be fitted when it gets another size; the direction stays.
    Fit,
    /// To look from its named side and be fitted, when there is something to look at.
    Fresh,
}

/// One view of the shell.
#[derive(Clone, PartialEq, Debug)]
pub struct Pane {
    /// Where it looks from.
    pub camera: Camera,
    /// The named side that it looks from; none once it has been turned freely.
    pub view: Option<View>,
    /// The projection of views that are no measured drawing.
    pub(crate) free: Projection,
    /// What the camera waits for.
    pub(crate) wait: Wait,
    /// Whether the user has turned, moved or zoomed the camera since it was last fitted: it is then left where it is.
    pub(crate) moved: bool,
    /// The box of the shell that the camera was last fitted to, or that was left as it came.
    pub(crate) fitted: Option<Bounds>,
}

impl Pane {
    fn new(view: Option<View>) -> Self {
        let mut pane = Self {
            camera: Camera::view(View::Fit, Projection::Perspective, &NOTHING_YET, [1.0, 1.0]),
            view: None,
            free: Projection::Perspective,
            wait: Wait::Fresh,
            moved: false,
            fitted: None,
        };
        pane.look(view, &NOTHING_YET);
        pane
    }

    /// Whether it is a drawing to measure in: plan, front or side in parallel projection. Dragging such a pane moves it along
    /// and does not turn it.
    #[must_use]
    pub fn is_measured(&self) -> bool {
        self.camera.projection == Projection::Parallel && self.view.is_some_and(is_drawing)
    }

    /// What it shows, in a word.
    #[must_use]
    pub const fn word(&self) -> &'static str {
        match self.view {
            Some(view) => super::view::look_words(view).name,
            None => "Free",
        }
    }

    /// Looks from a named side; none is the free three-quarter view. A plan, a front or a side becomes a measured drawing.
    pub(crate) fn look(&mut self, view: Option<View>, bounds: &Bounds) {
        self.view = view.filter(|v| *v != View::Fit);
        let projection = if self.view.is_some_and(is_drawing) {
            Projection::Parallel
        } else {
            self.free
        };
        self.camera = Camera::view(self.view.unwrap_or(View::Fit), projection, bounds, self.camera.size);
        self.settled(*bounds);
    }

    /// Perspective or parallel, without moving.
    pub(crate) fn project(&mut self, projection: Projection) {
        self.camera.projection = projection;
        if !self.view.is_some_and(is_drawing) {
            self.free = projection;
        }
    }

    /// Brings a box into the picture; the direction stays.
    pub(crate) fn fit(&mut self, bounds: &Bounds) {
        self.camera.fit(bounds);
        self.settled(*bounds);
    }

    fn settled(&mut self, bounds: Bounds) {
        self.wait = Wait::No;
        self.moved = false;
        self.fitted = Some(bounds);
    }
}

/// Whether a named side is one of a drawing.
pub(super) const fn is_drawing(view: View) -> bool {
    matches!(view, View::Plan | View::Front | View::Side)
}

/// What a camera looks at before there is anything.
const NOTHING_YET: Bounds = Bounds {
    min: Point::new(-1000.0, -1000.0, -1000.0),
    max: Point::new(1000.0, 1000.0, 1000.0),
};

/// The panes.
#[derive(Clone, PartialEq, Debug)]
pub struct Panes {
    /// How they share the middle of the window.
    pub layout: Layout,
    active: usize,
    list: [Pane; PANES],
    /// Grows when the keyboard is to go to the active pane.
    pub(crate) focus: u64,
}

impl Default for Panes {
    fn default() -> Self {
        Self {
            layout: Layout::One,
            active: 0,
            list: [None, Some(View::Plan), Some(View::Front), Some(View::Side)].map(Pane::new),
            focus: 0,
        }
    }
}

impl Panes {
    /// The pane that keys and menus act on.
    #[must_use]
    pub const fn active(&self) -> usize {
        self.active
    }

    /// The panes that are shown.
    #[must_use]
    pub fn shown(&self) -> &[Pane] {
        &self.list[..self.layout.shown()]
    }

    /// A pane; the main one when there is none of that number.
    #[must_use]
    pub fn pane(&self, at: usize) -> &Pane {
        self.list.get(at).unwrap_or(&self.list[0])
    }

    pub(crate) fn pane_mut(&mut self, at: usize) -> &mut Pane {
        let at = if at < PANES { at } else { 0 };
        &mut self.list[at]
    }

    pub(crate) fn active_mut(&mut self) -> &mut Pane {
        self.pane_mut(self.active)
    }

    pub(crate) fn all_mut(&mut self) -> impl Iterator<Item = &mut Pane> {
        self.list.iter_mut()
    }

    /// Makes a pane the active one, if it is shown.
    pub(crate) const fn activate(&mut self, at: usize) {
        if at < self.layout.shown() {
            self.active = at;
        }
    }

    /// Shows other panes. Those that the user has left alone are fitted into their new sizes.
    pub(crate) fn lay_out(&mut self, layout: Layout) {
        self.layout = layout;
        self.active = self.active.min(layout.shown() - 1);
        for pane in self.list.iter_mut().filter(|p| !p.moved && p.wait == Wait::No) {
            pane.wait = Wait::Fit;
        }
    }

    /// Lets every camera look from its side again as soon as there is a shell and a size.
    pub(crate) fn start_afresh(&mut self) {
        for pane in &mut self.list {
            pane.wait = Wait::Fresh;
        }
    }

    /// The accessible name of a pane. The main one always has the same; of two that show the same the later is numbered.
    #[must_use]
    pub fn name(&self, at: usize) -> String {
        if at == 0 {
            return super::picture::NAME.to_owned();
        }
        let word = self.pane(at).word();
        let before = self.list[1..at].iter().filter(|p| p.word() == word).count();
        if before == 0 {
            format!("{word} picture")
        } else {
            format!("{word} picture {}", before + 1)
        }
    }
}

/// What can be done to panes.
#[derive(Clone, Copy, PartialEq, Debug)]
pub enum PaneAct {
    /// Shows other panes.
    LayOut(Layout),
    /// Makes this pane the active one.
    Activate(usize),
    /// Makes the next pane the active one and takes the keyboard there.
    Next,
    /// This pane has another size.
    Resize(usize, egui::Vec2),
    /// The active pane shows the free view.
    Free,
}

impl PaneAct {
    /// Those that need nothing but their name.
    pub(super) fn listed() -> impl Iterator<Item = Self> {
        Layout::ALL
            .into_iter()
            .map(Self::LayOut)
            .chain([Self::Next, Self::Free])
    }

    /// Name and hint.
    #[must_use]
    pub(super) const fn words(self) -> Words {
        let (name, hint) = match self {
            Self::LayOut(layout) => return layout.words(),
            Self::Activate(_) => ("This view", "Makes this view the one that keys act on."),
            Self::Next => ("Next view", "Takes the keyboard to the next of the views."),
            Self::Resize(..) => ("Resize a view", "Fits a view to the window."),
            Self::Free => ("Free", "Looks from three quarters; dragging turns the view."),
        };
        Words { name, hint }
    }

    /// The keys that send it.
    #[must_use]
    pub(super) const fn shortcut(self) -> Option<(egui::Modifiers, egui::Key)> {
        use egui::{Key, Modifiers};
        Some(match self {
            Self::LayOut(Layout::One) => (Modifiers::COMMAND, Key::Num6),
            Self::LayOut(Layout::Two) => (Modifiers::COMMAND, Key::Num7),
            Self::LayOut(Layout::Three) => (Modifiers::COMMAND, Key::Num8),
            Self::LayOut(Layout::Four) => (Modifiers::COMMAND, Key::Num9),
            Self::Next => (Modifiers::NONE, Key::F6),
            Self::Free => (Modifiers::COMMAND, Key::Num5),
            Self::Activate(_) | Self::Resize(..) => return None,
        })
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn panes_are_told_apart_by_name() {
        let mut panes = Panes::default();
        panes.lay_out(Layout::Four);
        let names = |p: &Panes| (0..PANES).map(|at| p.name(at)).collect::<Vec<_>>();
        assert_eq!(
            names(&panes),
            ["Picture of the shell", "Plan picture", "Front picture", "Side picture"]
        );
        panes.pane_mut(3).look(Some(View::Plan), &NOTHING_YET);
        assert_eq!(panes.name(3), "Plan picture 2");
    }

    #[test]
    fn only_a_drawing_in_parallel_projection_is_measured() {
        let mut panes = Panes::default();
        let measured = |p: &Panes| (0..PANES).map(|at| p.pane(at).is_measured()).collect::<Vec<_>>();
        assert_eq!(measured(&panes), [false, true, true, true]);
        panes.pane_mut(1).project(Projection::Perspective);
        panes.pane_mut(2).look(Some(View::Iso), &NOTHING_YET);
        assert_eq!(measured(&panes), [false, false, false, true]);
        assert_eq!(
            panes.pane(2).camera.projection,
            Projection::Perspective,
            "its free projection"
        );
    }

    #[test]
    fn a_pane_that_is_not_shown_is_not_active() {
        let mut panes = Panes::default();
        panes.activate(2);
        assert_eq!(panes.active(), 0);
        panes.lay_out(Layout::Three);
        panes.activate(2);
        assert_eq!(panes.active(), 2);
        panes.lay_out(Layout::Two);
        assert_eq!(panes.active(), 1);
    }
}
