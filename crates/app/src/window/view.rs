//! What is not part of the design: where one looks from, what is picked, what is in hand.

use zonewright_geometry::{Direction, PanelName, Side, Vector, start::DragRule};
use zonewright_painter::{ColourBy, Faces, View};

use super::{
    command::Words, ladder::LadderView, readings::Shown, selection::Selection, strip::StripView, zones::ZoneView,
};

/// What a splice inserts.
#[derive(Clone, PartialEq, Debug)]
pub struct Hand {
    /// The directions, in order.
    pub directions: Vec<Direction>,
}

impl Default for Hand {
    /// One vertical direction of 400 mm: it shows at once, and is easy to edit.
    fn default() -> Self {
        Self {
            directions: vec![Direction::Own(Vector::new(0.0, 0.0, 400.0))],
        }
    }
}

/// The state of the window that is not saved with the design.
#[derive(Clone, PartialEq, Debug)]
pub struct ViewState {
    /// How faces are drawn.
    pub faces: Faces,
    /// Whether edges behind faces are drawn.
    pub hidden_edges: bool,
    /// What colours say.
    pub colour: ColourBy,
    /// Whether the picture says what they mean.
    pub legend: bool,
    /// The live front.
    pub side: Side,
    /// The directions in hand.
    pub hand: Hand,
    /// What of the front strip belongs to the view.
    pub strip: StripView,
    /// The picked point of the path.
    pub point: Option<usize>,
    /// The picked panel, by its index in the shell and by its name.
    pub panel: Option<(u32, PanelName)>,
    /// The picked vertex or edge, and what is measured.
    pub selection: Selection,
    /// Whether distances to the backdrop are coloured without their side.
    pub without_sign: bool,
    /// The picked zone, and how zones are dragged.
    pub zones: ZoneView,
    /// What follows a dragged point.
    pub rule: DragRule,
    /// How far one has climbed on the ladder, and which step's card is open.
    pub ladder: LadderView,
    /// The finding that is shown in the picture.
    pub finding: Option<usize>,
    /// What a readout shows in the picture.
    pub shown: Option<Shown>,
    /// Whether the look is dark.
    pub dark: bool,
}

impl Default for ViewState {
    fn default() -> Self {
        Self {
            faces: Faces::ShadedWithEdges,
            hidden_edges: false,
            colour: ColourBy::Zone,
            legend: true,
            side: Side::Fore,
            hand: Hand::default(),
            strip: StripView::default(),
            point: None,
            panel: None,
            selection: Selection::default(),
            without_sign: false,
            zones: ZoneView::default(),
            rule: DragRule::Neighbours,
            ladder: LadderView::default(),
            finding: None,
            shown: None,
            dark: false,
        }
    }
}

/// Words of the commands that look from a side.
#[must_use]
pub(super) const fn look_words(view: View) -> Words {
    let (name, hint) = match view {
        View::Plan => ("Plan", "Looks down from above."),
        View::Front => ("Front", "Looks from the front, along y."),
        View::Side => ("Side", "Looks from the side, along x."),
        View::Iso => ("Iso", "Looks along the diagonal."),
        View::Fit => ("Fit", "Brings the whole shell into the picture."),
    };
    Words { name, hint }
}
