//! The bundled designs: each grows without a finding, and its pictures are in depth order in every standard view.
//!
//! The order is held against a ray cast that knows nothing of the painter: at each pixel's centre a ray is sent at every panel, in
//! f64, by solving for the panel's own coordinates. Derived; no figure comes from the painter.

#![expect(clippy::unwrap_used, reason = "a test may")]

use std::collections::BTreeMap;

use zonewright::{
    document::{bundled, parse_design},
    report::{any_stop, report},
};
use zonewright_geometry::{Point, Shell, Vector, grow};
use zonewright_painter::{Bounds, Camera, Faces, Look, Paint, Picture, Projection, Scene, Tints, View};

const SIZE: [f32; 2] = [160.0, 120.0];

/// Picture positions are f32: at 160 pixels they are rounded by some 1e-5. A centre that near to a border may go either way.
const ROUNDING: f32 = 4e-5;

fn shells() -> BTreeMap<&'static str, Shell> {
    let grown = |(name, text): &(&'static str, &str)| {
        let design = parse_design(text).unwrap();
        let (shell, findings) = grow(&design.shape);
        assert_eq!(findings, [], "{name}");
        assert_eq!(shell.check(design.shape.tolerances.join_mm), Ok(()), "{name}");
        (*name, shell)
    };
    bundled().iter().map(grown).collect()
}

/// Where the ray `from + t along` meets the parallelogram, by Cramer's rule.
fn meets(shell: &Shell, panel: u32, from: Point, along: Vector) -> Option<f64> {
    let [a, b, _, d] = shell.corner_points(panel);
    let (u, w, to) = (b - a, d - a, from - a);
    let whole = u.cross(w).dot(-along);
    let r = to.cross(w).dot(-along) / whole;
    let s = u.cross(to).dot(-along) / whole;
    let inside = (0.0..=1.0).contains(&r) && (0.0..=1.0).contains(&s);
    (whole != 0.0 && inside).then_some(u.cross(w).dot(to) / whole)
}

/// The panel painted last at each pixel's centre: fills only, no feathering.
fn painted(picture: &Picture) -> Vec<Option<u32>> {
    let [width, height] = SIZE.map(|s| s as usize);
    let mut pixels = vec![None; width * height];
    for item in &picture.items {
        let Paint::Fill { panel } = item.paint else { continue };
        let corners = picture.points_of(item);
        let low = |k: usize| corners.iter().map(|c| c[k]).fold(f32::MAX, f32::min).max(0.0) as usize;
        let high = |k: usize| {
            (corners.iter().map(|c| c[k]).fold(f32::MIN, f32::max).max(0.0) as usize + 1).min(SIZE[k] as usize)
        };
        for y in low(1)..high(1) {
            for x in low(0)..high(0) {
                if contains(corners, [x as f32 + 0.5, y as f32 + 0.5]) {
                    pixels[y * width + x] = Some(panel);
                }
            }
        }
    }
    pixels
}

/// Even-odd: whether a ray to the right crosses the border an odd number of times.
fn contains(corners: &[[f32; 2]], at: [f32; 2]) -> bool {
    let [x, y] = at.map(f64::from);
    let mut inside = false;
    for k in 0..corners.len() {
        let [a, b] = [corners[k], corners[(k + 1) % corners.len()]].map(|c| c.map(f64::from));
        if (a[1] > y) != (b[1] > y) && x < a[0] + (y - a[1]) / (b[1] - a[1]) * (b[0] - a[0]) {
            inside = !inside;
        }
    }
    inside
}

/// Whether what was painted at a place is what a ray meets first there; of two panels at the same place either is right.
fn right(shell: &Shell, camera: &Camera, pos: [f32; 2], painted: Option<u32>) -> (bool, bool) {
    let ray = camera.ray(pos);
    let least = match camera.projection {
        Projection::Perspective => camera.lens().near / ray.along.dot(camera.lens().forward),
        Projection::Parallel => f64::MIN,
    };
    let hit = |panel: u32| meets(shell, panel, ray.from, ray.along).filter(|t| least <= *t);
    let nearest = (0..shell.panels.len() as u32).filter_map(hit).min_by(f64::total_cmp);
    let own = painted.and_then(hit);
    let right = match (painted, own, nearest) {
        (None, _, None) => true,
        (Some(_), Some(own), Some(nearest)) => own - nearest <= 1e-6 * camera.distance,
        _ => false,
    };
    (right, nearest.is_some())
}

#[test]
fn every_sample_is_in_depth_order_in_every_standard_view() {
    let look = Look {
        faces: Faces::Shaded,
        ..Look::default()
    };
    for (name, shell) in shells() {
        let scene = Scene::exact(&shell);
        let bounds = Bounds::of(&shell).unwrap();
        for view in View::ALL {
            for projection in [Projection::Perspective, Projection::Parallel] {
                let camera = Camera::view(view, projection, &bounds, SIZE);
                let picture = scene.picture(&shell, &camera, &look, &Tints::default(), &[]);
                let (mut wrong, mut covered) = (0_usize, 0_usize);
                for (at, panel) in painted(&picture).into_iter().enumerate() {
                    let width = SIZE[0] as usize;
                    let centre = [(at % width) as f32 + 0.5, (at / width) as f32 + 0.5];
                    let (fine, hit) = right(&shell, &camera, centre, panel);
                    let off = [-ROUNDING, ROUNDING];
                    let beside = || {
                        let near = off
                            .iter()
                            .flat_map(|x| off.iter().map(move |y| [centre[0] + x, centre[1] + y]));
                        near.into_iter().any(|pos| right(&shell, &camera, pos, panel).0)
                    };
                    covered += usize::from(hit);
                    wrong += usize::from(!fine && !beside());
                }
                assert!(
                    1000 < covered,
                    "{name} {} shows too little to say anything",
                    view.name()
                );
                assert!(
                    wrong * 1000 <= covered,
                    "{name} {} {projection:?}: {wrong} wrong of {covered}",
                    view.name()
                );
            }
        }
    }
}

#[test]
fn every_sample_can_be_built() {
    for (name, text) in bundled() {
        let report = report(&parse_design(text).unwrap());
        assert!(!any_stop(&report), "{name}");
        let json: serde_json::Value = serde_json::from_str(&report.to_json()).unwrap();
        assert_eq!(json["crossings"], 0, "{name}");
        assert_eq!(json["doubled"], 0, "{name}");
    }
}
