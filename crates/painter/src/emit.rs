//! From a scene, a camera and a look to a picture.

use zonewright_geometry::{NONE, Point, Shell, Vector};

use crate::{
    Anchor, Camera, Colour, ColourBy, Faces, Lens, Look, Mark, MarkKind, Paint, Picture, Scene, Text, Tints,
    brink::Brink,
    clip::{Clip, GUARD},
    picture::{Item, index},
    tint::Paints,
};

/// Positions so many pixels outside the picture can still show, by the width of a stroke.
const MARGIN: f32 = 16.0;
/// The width of a dimension line, in pixels.
const DIMENSION_WIDTH: f32 = 1.5;
/// Half the length of the ticks at its ends, by axis, in pixels.
const TICK: f32 = 4.0;
/// How opaque a marked polygon is, of 255.
const PREVIEW_ALPHA: u8 = 120;

/// How much wider edges are that tell something by their colour.
const WIDE: f32 = 1.6;

const LEFT: u8 = 1;
const RIGHT: u8 = 2;
const ABOVE: u8 = 4;
const BELOW: u8 = 8;
const BEHIND: u8 = 16;
/// Not finite.
const NOWHERE: u8 = 32;
/// So far outside that it is cut before it becomes an f32.
const FAR: u8 = 64;
const OUT: u8 = LEFT | RIGHT | ABOVE | BELOW | BEHIND | NOWHERE;
const TO_CUT: u8 = BEHIND | NOWHERE | FAR;

impl Scene {
    /// The picture of the shell that the scene was built from.
    ///
    /// What is not in the scene, because the shell was changed since, makes a wrong picture but no panic as long as there are no
    /// fewer panels, points and edges.
    #[must_use]
    pub fn picture(&self, shell: &Shell, camera: &Camera, look: &Look, tints: &Tints<'_>, marks: &[Mark]) -> Picture {
        let mut picture = Picture::default();
        self.picture_into(shell, camera, look, tints, marks, &mut picture);
        picture
    }

    /// The same, into the arrays of a picture that is no longer needed.
    pub fn picture_into(
        &self,
        shell: &Shell,
        camera: &Camera,
        look: &Look,
        tints: &Tints<'_>,
        marks: &[Mark],
        picture: &mut Picture,
    ) {
        picture.size = camera.size;
        picture.background = look.palette.background;
        picture.items.clear();
        picture.points.clear();
        picture.texts.clear();
        let lens = camera.lens();
        let mut emitter = Emitter::new(self, shell, lens, look, tints, picture);
        if look.faces == Faces::Wireframe && !look.hidden_edges {
            emitter.all_edges(false);
        } else {
            emitter.pieces(tints);
            if look.hidden_edges && !look.only_rims {
                emitter.all_edges(true);
            }
        }
        for mark in marks {
            emitter.mark(mark);
        }
    }
}

struct Emitter<'a> {
    scene: &'a Scene,
    shell: &'a Shell,
    lens: Lens,
    look: &'a Look,
    picture: &'a mut Picture,
    places: Vec<[f32; 2]>,
    codes: Vec<u8>,
    edge_colours: Option<Vec<Colour>>,
    paints: Paints<'a>,
    clip: Clip,
    cut: Vec<Vector>,
}

impl<'a> Emitter<'a> {
    fn new(
        scene: &'a Scene,
        shell: &'a Shell,
        lens: Lens,
        look: &'a Look,
        tints: &'a Tints<'a>,
        picture: &'a mut Picture,
    ) -> Self {
        let paints = Paints::new(scene, shell, &lens, look, tints);
        let count = shell.points.len() + scene.extra.len();
        let mut places = Vec::with_capacity(count);
        let mut codes = Vec::with_capacity(count);
        let extra = scene.extra.iter().map(|&p| Point(p));
        let guard = picture.size.map(f64::from);
        let guard = GUARD * guard[0].max(guard[1]);
        for point in shell.points.iter().copied().chain(extra) {
            let (place, code) = seen(&lens, picture.size, guard, point);
            places.push(place);
            codes.push(code);
        }
        Self {
            edge_colours: paints.edges(),
            paints,
            scene,
            shell,
            lens,
            look,
            picture,
            places,
            codes,
            clip: Clip::new(&lens),
            cut: Vec::new(),
        }
    }

    fn pieces(&mut self, tints: &Tints<'_>) {
        let scene = self.scene;
        let eye_inside = scene.bounds.is_none_or(|b| b.contains(self.lens.eye));
        let findings_shown = self.look.colour == ColourBy::Finding && tints.finding.is_some();
        let cull = self.look.cull && scene.encloses && !eye_inside && !findings_shown;
        let hollow = self.look.faces == Faces::Wireframe;
        let edges = self.look.faces != Faces::Shaded || self.look.colour == ColourBy::Fold;
        let only_rims = self.look.only_rims;
        let colours: Vec<Option<Colour>> = scene
            .planes
            .iter()
            .enumerate()
            .map(|(panel, plane)| {
                let outside = self.lens.side(plane.normal, plane.offset) > 0.0;
                if cull && !outside {
                    None
                } else if hollow {
                    Some(self.picture.background)
                } else {
                    Some(self.paints.panel(panel, outside))
                }
            })
            .collect();
        let mut left = if edges { scene.uses.clone() } else { Vec::new() };
        let mut drawn = vec![false; if edges && cull { left.len() } else { 0 }];
        let expected = scene.corners.len() + if edges { 2 * left.len() } else { 0 };
        self.picture.points.reserve(expected);
        self.picture.items.reserve(scene.piece_count() + left.len());
        let (lens, shell) = (self.lens, self.shell);
        // Wide enough for every stroke of an edge.
        let reach = f64::from(self.look.edge_width * WIDE).max(self.look.rim_width.into()) * 0.5;
        let slimmest = if edges { scene.slimmest(&lens, reach) } else { 0.0 };
        scene.walk(&lens, shell, slimmest, |piece, brinks| {
            let range = scene.first[piece] as usize..scene.first[piece + 1] as usize;
            let panel = scene.piece_panel[piece];
            let colour = colours[panel as usize];
            if let Some(colour) = colour {
                self.fill(&scene.corners[range.clone()], colour, panel);
            }
            if !edges {
                return;
            }
            // A segment is drawn after the last piece that borders it, so that none of them covers half its width.
            for &segment in &scene.sides[range] {
                if segment == NONE {
                    continue;
                }
                let segment = segment as usize;
                if only_rims && !scene.rim[scene.segments[segment].edge as usize] {
                    continue;
                }
                left[segment] -= 1;
                let shows = if cull {
                    drawn[segment] |= colour.is_some();
                    drawn[segment]
                } else {
                    true
                };
                if left[segment] == 0 && shows {
                    self.segment(segment, false, brinks);
                }
            }
        });
    }

    fn fill(&mut self, corners: &[u32], colour: Colour, panel: u32) {
        let (mut any, mut all) = (0, u8::MAX);
        let first = self.picture.points.len();
        for &v in corners {
            let code = self.codes[v as usize];
            any |= code;
            all &= code;
            self.picture.points.push(self.places[v as usize]);
        }
        let paint = Paint::Fill { panel };
        if all & OUT != 0 || any & TO_CUT != 0 {
            self.picture.points.truncate(first);
            if all & OUT == 0 && any & NOWHERE == 0 {
                self.cut.clear();
                for &v in corners {
                    self.cut.push(self.lens.to_camera(self.point(v)));
                }
                self.polygon(colour, paint);
            }
            return;
        }
        self.picture.items.push(Item {
            first: index(first),
            count: index(corners.len()),
            colour,
            paint,
        });
    }

    /// What is in `cut`, after cutting.
    fn polygon(&mut self, colour: Colour, paint: Paint) {
        self.clip.polygon(&mut self.cut);
        if self.cut.len() >= 3 {
            let lens = &self.lens;
            self.picture
                .push(self.cut.iter().map(|&seen| lens.onto(seen)), colour, paint);
        }
    }

    fn segment(&mut self, segment: usize, dashed: bool, brinks: &[Brink]) {
        let crate::scene::Segment { ends, edge } = self.scene.segments[segment];
        let rim = self.scene.rim[edge as usize];
        let width = if rim { self.look.rim_width } else { self.look.edge_width };
        let colour = match &self.edge_colours {
            Some(colours) => colours[edge as usize],
            None if rim => self.look.palette.rim,
            None => self.look.palette.edge,
        };
        let wide = if self.edge_colours.is_some() && !rim { WIDE } else { 1.0 };
        // Dashes over what is drawn already stay within its width: where an edge is visible they do not show.
        let width = width * if dashed { 0.8 } else { 1.0 } * wide;
        let paint = Paint::Stroke {
            width,
            dashed,
            closed: false,
            edge,
        };
        let [a, b] = ends.map(|v| self.codes[v as usize]);
        if a & b & OUT != 0 || (a | b) & NOWHERE != 0 {
            return;
        }
        if !brinks.is_empty() {
            let ends = ends.map(|v| self.lens.to_camera(self.point(v)));
            if let Some(ends) = self.clip.line(ends) {
                let reach = f64::from(width) * 0.5;
                let places = self.scene.held_back(self.shell, &self.lens, brinks, ends, reach);
                self.picture.push(places, colour, paint);
            }
        } else if (a | b) & TO_CUT == 0 {
            let places = ends.map(|v| self.places[v as usize]);
            self.picture.push(places, colour, paint);
        } else {
            self.line(ends.map(|v| self.point(v)), colour, paint);
        }
    }

    fn line(&mut self, ends: [Point; 2], colour: Colour, paint: Paint) {
        let ends = ends.map(|p| self.lens.to_camera(p));
        if let Some(ends) = self.clip.line(ends) {
            self.picture.push(ends.map(|seen| self.lens.onto(seen)), colour, paint);
        }
    }

    fn all_edges(&mut self, dashed: bool) {
        for edge in 0..self.shell.edges.len().min(self.scene.segments.len()) {
            self.segment(edge, dashed, &[]);
        }
    }

    fn point(&self, vertex: u32) -> Point {
        self.scene.vertex(self.shell, vertex)
    }

    fn mark(&mut self, mark: &Mark) {
        let palette = &self.look.palette;
        let colour = mark.tone.colour(palette);
        let halo = palette.background;
        match &mark.kind {
            MarkKind::Dot { radius } => {
                for place in self.seen(&mark.at) {
                    self.picture
                        .push(circle(place, *radius + 1.0), halo, Paint::Fill { panel: NONE });
                    self.picture
                        .push(circle(place, *radius), colour, Paint::Fill { panel: NONE });
                }
            }
            MarkKind::Ring { radius, width } => {
                for place in self.seen(&mark.at) {
                    self.picture
                        .push(circle(place, *radius), colour, stroke(*width, false, true));
                }
            }
            MarkKind::Line { width, dashed } => {
                for ends in mark.at.windows(2) {
                    if ends[0].is_finite() && ends[1].is_finite() {
                        self.line([ends[0], ends[1]], colour, stroke(*width, *dashed, false));
                    }
                }
            }
            MarkKind::Polygon => {
                if !mark.at.iter().all(|p| p.is_finite()) {
                    return;
                }
                self.cut.clear();
                self.cut.extend(mark.at.iter().map(|&p| self.lens.to_camera(p)));
                self.polygon(colour.with_alpha(PREVIEW_ALPHA), Paint::Fill { panel: NONE });
                for (k, &from) in mark.at.iter().enumerate() {
                    let to = mark.at[(k + 1) % mark.at.len()];
                    self.line([from, to], colour, stroke(self.look.edge_width, false, false));
                }
            }
            MarkKind::Dimension { text, size } => self.dimension(&mark.at, colour, text, *size),
            MarkKind::Label { text, size } => {
                for place in self.seen(&mark.at) {
                    self.picture.texts.push(Text {
                        pos: [place[0] + size * 0.5, place[1] - size * 0.5],
                        anchor: Anchor::Left,
                        size: *size,
                        colour: palette.text,
                        halo,
                        text: text.clone(),
                    });
                }
            }
        }
    }

    /// A dimension line. Its text stands beside the middle of what is seen of it, on the upper side, so that it does not lie on the line.
    fn dimension(&mut self, at: &[Point], colour: Colour, text: &str, size: f32) {
        let [Some(&first), Some(&last)] = [at.first(), at.last()] else {
            return;
        };
        if !(first.is_finite() && last.is_finite()) {
            return;
        }
        let Some(ends) = self.clip.line([first, last].map(|p| self.lens.to_camera(p))) else {
            return;
        };
        let [a, b] = ends.map(|seen| self.lens.onto(seen));
        let along = [b[0] - a[0], b[1] - a[1]];
        let length = along[0].hypot(along[1]);
        let mut up = [0.0, -1.0];
        if length > 0.0 {
            let [x, y] = along.map(|d| d / length);
            // Of the two directions across the line, the one that leads up; beside an upright line, to the right.
            up = if x.abs() < 1e-3 {
                [1.0, 0.0]
            } else {
                [y * x.signum(), -x.abs()]
            };
            self.picture.push([a, b], colour, stroke(DIMENSION_WIDTH, false, false));
            // Halfway between along and across.
            let slant = [(x - y) * TICK, (x + y) * TICK];
            for end in self.seen(&[first, last]) {
                let tick = [-1.0, 1.0].map(|k| [end[0] + slant[0] * k, end[1] + slant[1] * k]);
                self.picture
                    .push(tick, colour, stroke(DIMENSION_WIDTH * 1.6, false, false));
            }
        }
        // A text has about half its height a letter; beside a steep line it keeps clear by its width.
        let half = size * 0.25 * text.chars().count() as f32;
        let away = (up[1].abs() * size * 0.75).max(up[0].abs() * (half + size * 0.5));
        let middle = [(a[0] + b[0]) * 0.5, (a[1] + b[1]) * 0.5];
        let [w, h] = self.picture.size;
        if (0.0..=w).contains(&middle[0]) && (0.0..=h).contains(&middle[1]) {
            let pos = [middle[0] + up[0] * away, middle[1] + up[1] * away];
            self.picture.texts.push(Text {
                // The whole text stays on the picture.
                pos: [
                    pos[0].clamp(half.min(w * 0.5), (w - half).max(w * 0.5)),
                    pos[1].clamp((size * 0.5).min(h * 0.5), (h - size * 0.5).max(h * 0.5)),
                ],
                anchor: Anchor::Centre,
                size,
                colour,
                halo: self.look.palette.background,
                text: text.to_owned(),
            });
        }
    }

    fn seen(&self, points: &[Point]) -> Vec<[f32; 2]> {
        let size = self.picture.size;
        points
            .iter()
            .filter_map(|&p| self.lens.project(p))
            .map(|p| p.pos)
            .filter(|p| (0..2).all(|k| p[k] > -MARGIN && p[k] < size[k] + MARGIN))
            .collect()
    }
}

const fn stroke(width: f32, dashed: bool, closed: bool) -> Paint {
    Paint::Stroke {
        width,
        dashed,
        closed,
        edge: NONE,
    }
}

/// A circle as a polygon, round to the eye.
fn circle(centre: [f32; 2], radius: f32) -> impl Iterator<Item = [f32; 2]> {
    (0_u8..24).map(move |k| {
        let (sin, cos) = (f32::from(k) * core::f32::consts::TAU / 24.0).sin_cos();
        [centre[0] + radius * cos, centre[1] + radius * sin]
    })
}

/// Where a vertex comes, and how that lies to the picture.
fn seen(lens: &Lens, size: [f32; 2], guard: f64, point: Point) -> ([f32; 2], u8) {
    let seen = lens.to_camera(point);
    if !lens.shows(seen.z) {
        return ([0.0; 2], if seen.z.is_finite() { BEHIND } else { NOWHERE });
    }
    let place = lens.onto(seen);
    let [x, y] = place;
    if !(x.is_finite() && y.is_finite()) {
        return ([0.0; 2], NOWHERE);
    }
    let mut code = 0;
    code |= if x < -MARGIN { LEFT } else { 0 };
    code |= if x > size[0] + MARGIN { RIGHT } else { 0 };
    code |= if y < -MARGIN { ABOVE } else { 0 };
    code |= if y > size[1] + MARGIN { BELOW } else { 0 };
    if code != 0 {
        let [x, y] = place.map(f64::from);
        let far = x < -guard || y < -guard || x > f64::from(size[0]) + guard || y > f64::from(size[1]) + guard;
        code |= if far { FAR } else { 0 };
    }
    (place, code)
}
