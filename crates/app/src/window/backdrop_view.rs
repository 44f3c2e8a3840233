//! What follows from the backdrop: its lines as they are drawn, its box, and how far each panel is from it.

use std::sync::Arc;

use zonewright_geometry::{
    Point,
    fit::{PanelLeft, Target},
};
use zonewright_painter::Bounds;

use crate::document::{Backdrop, Drawn};

/// What follows from the backdrop.
#[derive(Debug, Default)]
pub struct BackdropView {
    /// Lines that show it, one after the other with a point that is nowhere between them; empty while it is hidden.
    pub wire: Vec<Point>,
    /// The box around it, while it is shown.
    pub bounds: Option<Bounds>,
    /// How far each panel is from it; empty while that is not known, and without a backdrop.
    pub left: Vec<PanelLeft>,
    about: Option<Backdrop>,
    /// The lines before they are placed, and what they are of.
    drawn: Option<(Arc<Drawn>, Vec<[Point; 2]>)>,
}

impl BackdropView {
    /// Follows the shell. Distances of as many panels stay until newer ones come.
    pub(super) fn grown(&mut self, panels: usize) {
        if self.left.len() != panels {
            self.left.clear();
        }
    }

    /// Follows the design's backdrop.
    pub(super) fn follow(&mut self, backdrop: Option<&Backdrop>) {
        if backdrop.is_none() {
            self.left.clear();
        }
        if self.about.as_ref() == backdrop {
            return;
        }
        self.about = backdrop.cloned();
        self.wire.clear();
        self.bounds = None;
        let Some(backdrop) = backdrop else {
            self.drawn = None;
            return;
        };
        if self
            .drawn
            .as_ref()
            .is_none_or(|(of, _)| !Arc::ptr_eq(of, &backdrop.drawn))
        {
            let drawn = &backdrop.drawn;
            let target = Target::new(drawn.points.clone(), drawn.triangles.clone(), &drawn.lines);
            let wire = target.map(|target| target.wire()).unwrap_or_default();
            self.drawn = Some((Arc::clone(drawn), wire));
        }
        if !backdrop.shown {
            return;
        }
        let place = |p: &Point| backdrop.placement.place(*p);
        let mut last = None;
        for [from, to] in self.drawn.iter().flat_map(|(_, wire)| wire) {
            if last != Some(*from) {
                self.wire.push(Point::new(f64::NAN, f64::NAN, f64::NAN));
                self.wire.push(place(from));
            }
            self.wire.push(place(to));
            last = Some(*to);
        }
        self.bounds = Bounds::of_points(backdrop.drawn.points.iter().map(place));
    }

    /// The panel that is farthest from the backdrop, and how far.
    #[must_use]
    pub fn largest(&self) -> Option<(u32, PanelLeft)> {
        let mut largest: Option<(u32, PanelLeft)> = None;
        for (panel, left) in (0..).zip(&self.left) {
            if largest.is_none_or(|(_, most)| left.signed_mm.abs() > most.signed_mm.abs()) {
                largest = Some((panel, *left));
            }
        }
        largest
    }

    /// The distances as shares of the largest, from -1 to 1, for the painter.
    #[must_use]
    #[expect(clippy::cast_possible_truncation, reason = "shares need no more than f32")]
    pub(super) fn shares(&self, without_sign: bool) -> Vec<f32> {
        let most = self.largest().map_or(0.0, |(_, left)| left.signed_mm.abs());
        let share = |left: &PanelLeft| {
            let far = if without_sign {
                left.signed_mm.abs()
            } else {
                left.signed_mm
            };
            if most > 0.0 { (far / most) as f32 } else { 0.0 }
        };
        self.left.iter().map(share).collect()
    }
}
