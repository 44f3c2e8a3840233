//! The colours of panels and edges.

use core::f64::consts::FRAC_PI_2;

use zonewright_geometry::{NONE, Shell, Vector};

use crate::{Colour, ColourBy, Lens, Look, Scene, Tints};

/// Light that reaches every panel.
const AMBIENT: f64 = 0.5;
/// Where the light stands: right, up and towards the eye. It turns with the camera, so that no view is dark.
const LIGHT: Vector = Vector::new(-0.36, 0.48, 0.8);
/// The share of the inside's colour on panels that have a colour of their own.
const INSIDE_SHARE: f32 = 0.55;
/// Where all folds are flatter than this, a degree in radians, none takes the full colour: rounding is not shown as folds.
const LEAST_STEEP: f64 = core::f64::consts::PI / 180.0;

/// The colour of one side of a panel before shading, and whether the eye sees the outside.
pub(crate) struct Paints<'a> {
    scene: &'a Scene,
    shell: &'a Shell,
    look: &'a Look,
    tints: &'a Tints<'a>,
    /// To the light, in space.
    light: Vector,
}

impl<'a> Paints<'a> {
    pub(crate) fn new(scene: &'a Scene, shell: &'a Shell, lens: &Lens, look: &'a Look, tints: &'a Tints<'a>) -> Self {
        Self {
            scene,
            shell,
            look,
            tints,
            light: lens.right * LIGHT.x + lens.up * LIGHT.y - lens.forward * LIGHT.z,
        }
    }

    /// The shaded colour of a panel; `outside` says which side the eye sees.
    #[expect(clippy::cast_possible_truncation, reason = "shares need no more than f32")]
    pub(crate) fn panel(&self, panel: usize, outside: bool) -> Colour {
        let palette = &self.look.palette;
        let colour = match (self.own(panel), outside) {
            (None, true) => palette.outside,
            (None, false) => palette.inside,
            (Some(own), true) => own,
            (Some(own), false) => own.mix(palette.inside, INSIDE_SHARE),
        };
        let selected = self.tints.selected.and_then(|all| all.get(panel)).is_some_and(|&s| s);
        let colour = if selected {
            colour.mix(palette.selection, 0.6)
        } else {
            colour
        };
        let towards = self.scene.planes[panel].normal.dot(self.light) * if outside { 1.0 } else { -1.0 };
        colour.shade((AMBIENT + (1.0 - AMBIENT) * towards.max(0.0)) as f32)
    }

    /// The colour that tells something about a panel.
    #[expect(clippy::cast_possible_truncation, reason = "shares need no more than f32")]
    fn own(&self, panel: usize) -> Option<Colour> {
        let palette = &self.look.palette;
        match self.look.colour {
            ColourBy::Plain => None,
            ColourBy::Zone => {
                let [a, b] = self.shell.panels[panel].letters.map(|letter| self.zone(letter));
                Some(a?.mix(b?, 0.5).mix(palette.outside, 0.35))
            }
            ColourBy::Family => self
                .tints
                .family
                .and_then(|all| all.get(panel))
                .map(|&family| palette.category(family as usize)),
            ColourBy::Course => {
                // Fore 1, 2, 3 ... and aft -1, -2, -3 ... take turns, so that the first courses differ too.
                let course = self.shell.panels[panel].course;
                let number = 2 * course.unsigned_abs() as usize + usize::from(course < 0);
                Some(palette.category(number.saturating_sub(2)))
            }
            ColourBy::Slope => {
                let slope = self.scene.planes[panel].normal.z.abs().min(1.0).acos();
                Some(palette.slope[0].mix(palette.slope[1], (slope / FRAC_PI_2) as f32))
            }
            ColourBy::Fold => Some(palette.outside.mix(palette.background, 0.5)),
            ColourBy::Distance => self
                .tints
                .distance
                .and_then(|all| all.get(panel))
                .map(|&share| palette.distance(share)),
            ColourBy::Finding => Some(
                self.tints
                    .finding
                    .and_then(|all| all.get(panel).copied().flatten())
                    .map_or_else(
                        || palette.outside.mix(palette.background, 0.5),
                        |level| palette.level(level),
                    ),
            ),
        }
    }

    fn zone(&self, letter: u32) -> Option<Colour> {
        let zone = self.shell.letters.get(letter as usize)?.zone;
        let zone = self.shell.zones.get(zone as usize)?.counts_as;
        Some(self.look.palette.category(zone as usize))
    }

    /// The colours of all edges where they differ; none where they are those of the palette.
    pub(crate) fn edges(&self) -> Option<Vec<Colour>> {
        let edges = self.shell.edges.iter();
        match self.look.colour {
            ColourBy::Zone => Some(
                edges
                    .map(|edge| {
                        let panel = if edge.panels[0] == NONE {
                            edge.panels[1]
                        } else {
                            edge.panels[0]
                        };
                        self.edge_zone(edge.ends, panel)
                            .unwrap_or(self.look.palette.edge)
                            .shade(0.8)
                    })
                    .collect(),
            ),
            ColourBy::Fold => Some(self.folds()),
            _ => None,
        }
    }

    /// An edge belongs to the zone whose side of the panel it lies on; the two sides of a zone are parallel.
    fn edge_zone(&self, ends: [u32; 2], panel: u32) -> Option<Colour> {
        let panel = self.shell.panels.get(panel as usize)?;
        let place = |v: u32| self.shell.points.get(v as usize);
        let along = *place(ends[1])? - *place(ends[0])?;
        let [a, b, _, d] = panel.corners;
        let [first, second] = [*place(b)? - *place(a)?, *place(d)? - *place(a)?];
        // The side that an edge is parallel to makes the smaller parallelogram with it, for sides of one length.
        let [off_first, off_second] =
            [first, second].map(|side| along.cross(side.normalize_or_zero()).length_squared());
        self.zone(panel.letters[usize::from(off_second < off_first)])
    }

    /// Edges by fold, the steepest in the full colour of a ridge or valley; rims in their own.
    #[expect(clippy::cast_possible_truncation, reason = "shares need no more than f32")]
    fn folds(&self) -> Vec<Colour> {
        let palette = &self.look.palette;
        let folds: Vec<Option<f64>> = self
            .shell
            .edges
            .iter()
            .map(|edge| self.fold(edge.ends, edge.panels))
            .collect();
        let steepest = folds
            .iter()
            .flatten()
            .fold(LEAST_STEEP, |most, fold| most.max(fold.abs()));
        folds
            .into_iter()
            .map(|fold| {
                fold.map_or(palette.rim, |fold| {
                    let end = palette.fold[if fold > 0.0 { 2 } else { 0 }];
                    palette.fold[1].mix(end, (fold.abs() / steepest) as f32)
                })
            })
            .collect()
    }

    /// The fold at an edge in radians; ridges, positive, turn to the left about the direction in which the first panel runs.
    fn fold(&self, ends: [u32; 2], panels: [u32; 2]) -> Option<f64> {
        let [one, other] = panels.map(|panel| self.scene.planes.get(panel as usize));
        let [from, to] = ends.map(|v| self.shell.points.get(v as usize));
        let (one, other) = (one?.normal, other?.normal);
        let along = (*to? - *from?).normalize_or_zero();
        Some(along.dot(one.cross(other)).atan2(one.dot(other)))
    }
}
