//! The numbers of the nine starts.

use std::collections::BTreeMap;

use super::{
    ParameterKind,
    walk::{COORDINATE, LENGTH, LENGTH_OR_ZERO, Range, Walk},
};
use crate::{
    Point, Vector,
    start::{
        ColumnForm, DragRule, FreePath, HelicalForm, LoopForm, PolarBy, PolarForm, RibbonForm, Star, StarLength,
        StarPath, StarSolid, Start, limits,
    },
};

const ROUND: [u32; 2] = [limits::MIN_RIBS, limits::MAX_RIBS];

impl Walk<'_> {
    pub(super) fn start(&mut self, start: &mut Start) {
        if !self.wants("start.") {
            return;
        }
        match start {
            Start::Zigzag(path) => self.free_path(path),
            Start::Translation(form) => {
                self.curve("start.zig", "Zig path", &mut form.zig);
                self.curve("start.zag", "Zag path", &mut form.zag);
            }
            Start::Polar(form) => self.polar(form),
            Start::Loop(form) => self.tube(form),
            Start::Ribbon(form) => self.ribbon(form),
            Start::Column(form) => self.column(form),
            Start::Helical(form) => self.helical(form),
            Start::StarPath(path) => self.star_path(path),
            Start::StarSolid(StarSolid { star, edge_mm }) => {
                self.star(star);
                self.length("start.edge", "Edge", LENGTH, "edge_mm", edge_mm);
            }
        }
    }

    /// The points of a path, from 0; on a closed one the last is the first again, and is not named twice.
    fn free_path(&mut self, path: &mut FreePath) {
        let Ok(points) = path.points() else { return };
        let range = Range {
            kind: ParameterKind::Length,
            bounds: COORDINATE,
            field: "letters",
        };
        let named = points.len() - usize::from(path.closed);
        for (k, point) in points.iter().take(named).enumerate() {
            let key = format!("start.point.{k}.");
            if !self.wants(&key) {
                continue;
            }
            for (part, axis) in ["x", "y", "z"].into_iter().enumerate() {
                let at = point.0[part];
                self.number(
                    &format!("{key}{axis}"),
                    &format!("Point {}, {axis}", k + 1),
                    range,
                    at,
                    |to| {
                        let mut place = point.0;
                        place[part] = to;
                        path.set_point(k, Point(place), DragRule::Neighbours)
                    },
                );
            }
        }
    }

    fn polar(&mut self, form: &mut PolarForm) {
        self.count("start.ribs", "Ribs", ROUND, "ribs", &mut form.ribs);
        let (pitch, edge, width, height) = match &mut form.by {
            PolarBy::PitchEdge { pitch, edge_mm } => (Some(pitch), Some(edge_mm), None, None),
            PolarBy::PitchWidth { pitch, width_mm } => (Some(pitch), None, Some(width_mm), None),
            PolarBy::PitchHeight { pitch, height_mm } => (Some(pitch), None, None, Some(height_mm)),
            PolarBy::EdgeWidth { edge_mm, width_mm } => (None, Some(edge_mm), Some(width_mm), None),
            PolarBy::EdgeHeight { edge_mm, height_mm } => (None, Some(edge_mm), None, Some(height_mm)),
            PolarBy::WidthHeight { width_mm, height_mm } => (None, None, Some(width_mm), Some(height_mm)),
        };
        if let Some(pitch) = pitch {
            self.pitch("start.pitch", pitch);
        }
        if let Some(edge) = edge {
            self.length("start.edge", "Edge", LENGTH, "edge_mm", edge);
        }
        if let Some(width) = width {
            self.length("start.width", "Width", LENGTH, "width_mm", width);
        }
        if let Some(height) = height {
            self.length("start.height", "Height", LENGTH, "height_mm", height);
        }
    }

    fn tube(&mut self, form: &mut LoopForm) {
        self.count("start.sides", "Sides", ROUND, "sides", &mut form.sides);
        self.length("start.radius", "Radius", LENGTH, "radius_mm", &mut form.radius_mm);
        self.length("start.rise", "Rise", LENGTH, "rise_mm", &mut form.rise_mm);
        // A node that is moved twice is moved by the sum; it is one parameter, kept in the first of its movements.
        let mut nodes: BTreeMap<u32, (usize, Vector)> = BTreeMap::new();
        for (k, &(node, by)) in form.moved.iter().enumerate() {
            nodes.entry(node).or_insert((k, Vector::ZERO)).1 += by;
        }
        for (node, (first, sum)) in nodes {
            let own = &mut form.moved[first].1;
            let others = sum - *own;
            let mut whole = sum;
            let (key, name) = (format!("start.moved.{node}"), format!("Movement of node {node}"));
            self.vector(&key, &name, "moved", &mut whole);
            if whole != sum {
                *own = whole - others;
            }
        }
    }

    fn ribbon(&mut self, form: &mut RibbonForm) {
        // Two ribs make the first panel.
        self.count("start.ribs", "Ribs", [2, limits::MAX_RIBS], "ribs", &mut form.ribs);
        self.turn("start.turn", "Turn", "turn", &mut form.turn);
        self.pitch("start.pitch", &mut form.pitch);
        self.length("start.edge", "Edge", LENGTH, "edge_mm", &mut form.edge_mm);
    }

    fn column(&mut self, form: &mut ColumnForm) {
        self.count("start.ribs", "Ribs", ROUND, "ribs", &mut form.ribs);
        let (zag, zig) = (&mut form.zag_run_mm, &mut form.zig_run_mm);
        self.length("start.zag_run", "Zag run", LENGTH_OR_ZERO, "zag_run_mm", zag);
        self.length("start.zig_run", "Zig run", LENGTH_OR_ZERO, "zig_run_mm", zig);
        self.length("start.rise", "Rise", LENGTH, "rise_mm", &mut form.rise_mm);
        let most = limits::MAX_RIBS;
        self.signed("start.turn", "Turns of the zigs", most, "turn", &mut form.turn);
    }

    fn helical(&mut self, form: &mut HelicalForm) {
        self.count("start.ribs", "Ribs", ROUND, "ribs", &mut form.ribs);
        // At least one letter is zig and one zag.
        let most = form.ribs.clamp(2, limits::MAX_RIBS) - 1;
        self.count("start.turn", "Turn", [1, most], "turn", &mut form.turn);
        self.pitch("start.pitch", &mut form.pitch);
        self.length("start.edge", "Edge", LENGTH, "edge_mm", &mut form.edge_mm);
    }

    fn star(&mut self, star: &mut Star) {
        if let Star::Prismatic(level) = star {
            let bounds = [2, limits::MAX_RIBS];
            self.count("start.level_axes", "Level axes", bounds, "star", level);
        }
    }

    fn star_path(&mut self, path: &mut StarPath) {
        self.star(&mut path.star);
        self.length("start.unit", "Unit length", LENGTH, "unit_mm", &mut path.unit_mm);
        let most = limits::MAX_GOLDEN_STEPS.unsigned_abs();
        for (k, letter) in path.letters.iter_mut().enumerate() {
            let key = format!("start.letter.{k}.");
            if !self.wants(&key) {
                continue;
            }
            match &mut letter.length {
                StarLength::Mm(length) => {
                    let name = format!("Letter {}, length", k + 1);
                    self.length(&format!("{key}length"), &name, LENGTH, "length", length);
                }
                StarLength::Golden(steps) => {
                    let name = format!("Letter {}, golden steps", k + 1);
                    self.signed(&format!("{key}golden"), &name, most, "golden", steps);
                }
            }
        }
    }
}
