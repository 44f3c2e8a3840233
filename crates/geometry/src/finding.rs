//! Findings: what is to be said about a shape, with its place and its figure.
//!
//! A finding carries numbers as numbers; turning them into text is the shop's business.

use crate::StepId;

/// How much a finding matters.
#[derive(Clone, Copy, PartialEq, Eq, PartialOrd, Ord, Hash, Debug)]
pub enum Level {
    /// This cannot be built, or was not grown.
    Stop,
    /// This wants a look.
    Look,
    /// This is worth knowing.
    Note,
}

/// The unit of a finding's figure and limit.
#[derive(Clone, Copy, PartialEq, Eq, Debug)]
pub enum Unit {
    /// A plain count or ratio.
    Count,
    /// Millimetres.
    Millimetres,
    /// Degrees.
    Degrees,
    /// Cubic metres.
    CubicMetres,
}

/// Where a finding is.
#[derive(Clone, PartialEq, Debug)]
pub enum Place {
    /// The design as a whole.
    Design,
    /// A parameter of the start, by its name in the file.
    Parameter(&'static str),
    /// A step.
    Step(StepId),
    /// Vertices, by index in the shell.
    Vertices(Vec<u32>),
    /// Edges, by index in the shell.
    Edges(Vec<u32>),
    /// Panels, by index in the shell.
    Panels(Vec<u32>),
}

/// What is found. [`Code::text`] has the key that `check --json` prints.
#[derive(Clone, Copy, PartialEq, Eq, PartialOrd, Ord, Hash, Debug)]
#[non_exhaustive]
pub enum Code {
    /// A parameter is outside its limits.
    ParameterLimit,
    /// A parameter or a coordinate is not a finite number.
    NotFinite,
    /// A zone's vector has no length.
    ZeroVector,
    /// A zone refers to itself through its links, or to no zone.
    BrokenLink,
    /// More panels than can be grown.
    TooManyPanels,
    /// The first word has no letters.
    EmptyWord,
    /// A front meant to be closed does not close.
    ClosingGap,
    /// A step found nothing to work on.
    StepFoundNothing,
    /// A step found its V, with another zag letter behind its zig.
    VChanged,
    /// Letters or panels that a step or finishing step names are no longer there.
    NameLost,
    /// Laying until still was stopped after every zig had met every zag.
    NeverStill,
    /// A front that is to be closed is open, or its zones do not cancel.
    RimNotBalanced,
    /// A rim could be closed only with panels that cross.
    RimClosedCrossing,
    /// Sheets touch only at a point.
    Pinch,
    /// Two panels lie on the same place.
    DoubledPanel,
    /// More than two panels meet in an edge.
    CrowdedEdge,
    /// Panels pass through each other.
    Crossing,
    /// Rims that nearly meet.
    NearMiss,
    /// A closed shell whose outside looks inwards.
    InsideOut,
    /// Two panels meet in an edge with opposite sides out.
    SidesDisagree,
    /// No panel grew.
    NoPanels,
    /// No parameter has the key that was asked for.
    NoSuchParameter,
}

/// Something to be said about a shape.
#[derive(Clone, PartialEq, Debug)]
pub struct Finding {
    /// What.
    pub code: Code,
    /// Where.
    pub place: Place,
    /// The figure that was found, in `unit`.
    pub figure: Option<f64>,
    /// The limit that it is held against, in `unit`.
    pub limit: Option<f64>,
    /// The unit of both.
    pub unit: Unit,
}

impl Finding {
    /// A finding without figures.
    #[must_use]
    pub const fn new(code: Code, place: Place) -> Self {
        Self {
            code,
            place,
            figure: None,
            limit: None,
            unit: Unit::Count,
        }
    }

    /// The same finding with a figure and the limit that it is held against.
    #[must_use]
    pub const fn with(mut self, figure: f64, limit: Option<f64>, unit: Unit) -> Self {
        self.figure = Some(figure);
        self.limit = limit;
        self.unit = unit;
        self
    }

    /// A parameter that is outside its limit.
    #[must_use]
    pub const fn parameter(name: &'static str, value: f64, limit: f64, unit: Unit) -> Self {
        Self::new(Code::ParameterLimit, Place::Parameter(name)).with(value, Some(limit), unit)
    }

    /// How much it matters.
    #[must_use]
    pub const fn level(&self) -> Level {
        self.code.level()
    }
}

impl Code {
    /// How much it matters.
    #[must_use]
    pub const fn level(self) -> Level {
        match self {
            Self::ParameterLimit
            | Self::NotFinite
            | Self::ZeroVector
            | Self::BrokenLink
            | Self::TooManyPanels
            | Self::EmptyWord
            | Self::DoubledPanel
            | Self::CrowdedEdge
            | Self::Crossing
            | Self::NoPanels
            | Self::NoSuchParameter => Level::Stop,
            Self::ClosingGap
            | Self::NameLost
            | Self::RimNotBalanced
            | Self::RimClosedCrossing
            | Self::Pinch
            | Self::NearMiss
            | Self::InsideOut
            | Self::SidesDisagree => Level::Look,
            Self::StepFoundNothing | Self::VChanged | Self::NeverStill => Level::Note,
        }
    }

    /// Its key, a sentence that says what it means, and a sentence that says what to do.
    #[must_use]
    pub const fn text(self) -> CodeText {
        let (key, what, remedy) = match self {
            Self::ParameterLimit => (
                "parameter-limit",
                "A parameter is outside its limits",
                "Give a value within the limit.",
            ),
            Self::NotFinite => ("not-finite", "A value is not a finite number", "Give a finite number."),
            Self::ZeroVector => (
                "zero-vector",
                "An edge has no length",
                "Move one of its ends, or delete the point.",
            ),
            Self::BrokenLink => (
                "broken-link",
                "A zone is linked to itself or to no zone",
                "Give the zone its own vector.",
            ),
            Self::TooManyPanels => (
                "too-many-panels",
                "The shape has more panels than can be grown",
                "Lay fewer courses, or use fewer ribs.",
            ),
            Self::EmptyWord => ("empty-word", "The start has no edges", "Add points to the path."),
            Self::ClosingGap => (
                "closing-gap",
                "The closed front does not close, and was grown open",
                "Share the closing gap out over the zones.",
            ),
            Self::StepFoundNothing => (
                "step-found-nothing",
                "The step found nothing to work on",
                "Move it, change what it picks, or switch it off.",
            ),
            Self::VChanged => (
                "v-changed",
                "The step works on a V whose second edge has changed",
                "Look whether it is still the V that you meant.",
            ),
            Self::NameLost => (
                "name-lost",
                "The step names something that is no longer there",
                "Pick again, or switch the step off.",
            ),
            Self::NeverStill => (
                "never-still",
                "The front never falls still; it was laid until every zig had met every zag",
                "Say how many courses you want.",
            ),
            Self::RimNotBalanced => (
                "rim-not-balanced",
                "The front cannot be filled to nothing: it is open, or its zones do not cancel",
                "Leave this rim open.",
            ),
            Self::RimClosedCrossing => (
                "rim-closed-crossing",
                "The rim could be closed only with panels that cross",
                "Lay another course first, or leave it open.",
            ),
            Self::Pinch => (
                "pinch",
                "Sheets touch only at a point",
                "Lay another course, or drop a panel there.",
            ),
            Self::DoubledPanel => (
                "doubled-panel",
                "Two panels lie on the same place",
                "Drop one of the two.",
            ),
            Self::CrowdedEdge => (
                "crowded-edge",
                "More than two panels meet in an edge",
                "Drop panels until two are left.",
            ),
            Self::Crossing => (
                "crossing",
                "Panels pass through each other",
                "Change the form until they part.",
            ),
            Self::NearMiss => ("near-miss", "Rims nearly meet", "Join the rims, or move them apart."),
            Self::InsideOut => (
                "inside-out",
                "The outside of the closed shell looks inwards",
                "Flip the outside.",
            ),
            Self::SidesDisagree => (
                "sides-disagree",
                "Two panels meet with opposite sides out",
                "Look at the joined rims; one may be twisted.",
            ),
            Self::NoPanels => ("no-panels", "The shape has no panels", "Lay a course."),
            Self::NoSuchParameter => (
                "no-such-parameter",
                "The shape has no parameter of this key",
                "Choose one of the keys that are listed for it.",
            ),
        };
        CodeText { key, what, remedy }
    }
}

/// The words that belong to a [`Code`].
#[derive(Clone, Copy, PartialEq, Eq, Debug)]
pub struct CodeText {
    /// The key that `check --json` prints.
    pub key: &'static str,
    /// What it means, without the full stop.
    pub what: &'static str,
    /// What to do.
    pub remedy: &'static str,
}
