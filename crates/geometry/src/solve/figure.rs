//! Figures of a shell that a client names: span, height, headroom, footprint ...

use super::{ground, headroom};
use crate::{
    Angle, Shape, Shell, Start, Vector, ZoneRef,
    measure::{Totals, totals},
};

/// A figure of a grown shell. Lengths are in millimetres, angles in degrees, areas in square millimetres, the volume in cubic millimetres.
#[derive(Clone, Copy, PartialEq, Debug)]
pub enum Figure {
    /// The largest horizontal extent: the greatest distance in plan between two vertices.
    Span,
    /// Overall size along x.
    SizeX,
    /// Overall size along y.
    SizeY,
    /// Overall size along z.
    Height,
    /// Height of the underside above the ground, z = 0.
    Headroom(Headroom),
    /// Area of the convex hull, in plan, of the ground rim: the rim with the lowest vertex.
    FootprintArea,
    /// Length of the narrowest rectangle round the ground rim in plan.
    FootprintLength,
    /// Width of the narrowest rectangle round the ground rim in plan: the least clear width at the ground.
    FootprintWidth,
    /// Area of all panels.
    Area,
    /// Enclosed volume; only a closed shell has one.
    Volume,
    /// Length of the longest edge.
    LongestEdge,
    /// Length of the shortest edge.
    ShortestEdge,
    /// Length of the edges of one zone.
    Edge(ZoneRef),
    /// The smallest acute angle of the panels.
    LeastAngle,
    /// The largest acute angle of the panels, up to a right angle.
    MostAngle,
    /// By how much a front that is meant to close misses.
    ClosingGap,
}

/// Where headroom is measured: on vertical lines at a distance from a place in plan.
#[derive(Clone, Copy, PartialEq, Debug, Default)]
pub struct Headroom {
    /// The distance from the place, in millimetres; 0 measures at the place itself.
    pub distance_mm: f64,
    /// The place in plan, in millimetres; none is the middle of the shell, see [`middle`].
    pub from: Option<[f64; 2]>,
    /// The direction from the place, from x towards y; none looks all round, and the lowest underside counts.
    pub azimuth: Option<Angle>,
}

/// What the number of a figure is.
#[derive(Clone, Copy, PartialEq, Eq, Debug)]
pub enum FigureKind {
    /// Millimetres.
    Length,
    /// Degrees.
    Angle,
    /// Square millimetres.
    Area,
    /// Cubic millimetres.
    Volume,
}

impl Figure {
    /// What its number is.
    #[must_use]
    pub const fn kind(self) -> FigureKind {
        match self {
            Self::FootprintArea | Self::Area => FigureKind::Area,
            Self::Volume => FigureKind::Volume,
            Self::LeastAngle | Self::MostAngle => FigureKind::Angle,
            _ => FigureKind::Length,
        }
    }

    /// By how much it may usually miss: half a millimetre, as lengths in a workshop; angles and the rest, what half a millimetre in a metre makes of them.
    #[must_use]
    pub const fn usual_tolerance(self) -> f64 {
        match self.kind() {
            FigureKind::Length => 0.5,
            FigureKind::Angle => 0.03,
            FigureKind::Area => 1000.0,
            FigureKind::Volume => 1.5e6,
        }
    }
}

/// The middle of a shell in plan: the foot of its axis where the start has one that stands upright, else the middle of its box in plan.
#[must_use]
pub fn middle(shape: &Shape, shell: &Shell) -> [f64; 2] {
    let upright = shape.placement.turn[..2].iter().all(|turn| turn.degrees() == 0.0);
    match shape.start {
        Start::Polar(_) | Start::Loop(_) | Start::Column(_) | Start::Helical(_) if upright => {
            [shape.placement.shift.x, shape.placement.shift.y]
        }
        _ => {
            let [mut least, mut most] = [Vector::INFINITY, Vector::NEG_INFINITY];
            for panel in &shell.panels {
                for vertex in panel.corners {
                    let at = shell.points[vertex as usize].0;
                    (least, most) = (least.min(at), most.max(at));
                }
            }
            [f64::midpoint(least.x, most.x), f64::midpoint(least.y, most.y)]
        }
    }
}

/// The value of a figure of a shell grown from a shape; none when the shell has no such figure, as a volume that is not enclosed, or headroom where
/// nothing is overhead.
#[must_use]
pub fn figure(shape: &Shape, shell: &Shell, which: Figure) -> Option<f64> {
    figures(shape, shell, &[which]).pop().flatten()
}

/// The values of several figures, as [`figure`] gives them; what they share is worked out once.
#[must_use]
pub fn figures(shape: &Shape, shell: &Shell, which: &[Figure]) -> Vec<Option<f64>> {
    let mut once = Once::default();
    which.iter().map(|figure| once.value(shape, shell, *figure)).collect()
}

/// What several figures share.
#[derive(Default)]
struct Once {
    totals: Option<Totals>,
    rim: Option<Option<ground::Rectangle>>,
}

impl Once {
    fn value(&mut self, shape: &Shape, shell: &Shell, which: Figure) -> Option<f64> {
        if shell.panels.is_empty() {
            return None;
        }
        let value = match which {
            Figure::Span => ground::span(shell),
            Figure::SizeX => self.totals(shell).size.x,
            Figure::SizeY => self.totals(shell).size.y,
            Figure::Height => self.totals(shell).size.z,
            Figure::Headroom(at) => {
                let from = at.from.unwrap_or_else(|| middle(shape, shell));
                headroom::headroom(shell, from, at)?
            }
            Figure::FootprintArea => self.rim(shell)?.hull_area,
            Figure::FootprintLength => self.rim(shell)?.length,
            Figure::FootprintWidth => self.rim(shell)?.width,
            Figure::Area => self.totals(shell).area_mm2,
            Figure::Volume => self.totals(shell).volume_mm3?,
            Figure::LongestEdge => self.totals(shell).lengths?.most,
            Figure::ShortestEdge => self.totals(shell).lengths?.least,
            Figure::Edge(zone) => {
                let found = shell.zones.iter().find(|z| z.name == zone)?;
                found.vector.length() * shape.placement.scale
            }
            Figure::LeastAngle => self.totals(shell).acute_angles?.least.to_degrees(),
            Figure::MostAngle => self.totals(shell).acute_angles?.most.to_degrees(),
            Figure::ClosingGap => shell.closing_gap?,
        };
        value.is_finite().then_some(value)
    }

    fn totals(&mut self, shell: &Shell) -> &Totals {
        self.totals.get_or_insert_with(|| totals(shell))
    }

    fn rim(&mut self, shell: &Shell) -> Option<ground::Rectangle> {
        *self.rim.get_or_insert_with(|| ground::footprint(shell))
    }
}
