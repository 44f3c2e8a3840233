//! Holds a picture against a ray cast that knows nothing of depth order.
//!
//! At each pixel's centre a ray is sent at every panel, in f64, by solving for the panel's own coordinates; what it meets first must
//! be what was painted last. Derived; no figure comes from the painter. The file is shared by the tests of three members.

use zonewright_geometry::{NONE, Point, Shell, Vector};
use zonewright_painter::{Camera, Faces, Look, Paint, Picture, Projection, Scene, Tints};

/// Picture positions are f32: at 160 pixels they are rounded by some 1e-5, cut ones more. A centre that near to a border may go either way.
pub const ROUNDING: f32 = 4e-5;

/// So few of the covered pixels may be wrong: 0.02 %.
pub const ONE_IN: usize = 5000;

/// Where the ray `from + t along` meets the parallelogram `a + r u + s w`, 0 <= r, s <= 1, by Cramer's rule.
#[must_use]
pub fn meets(shell: &Shell, panel: u32, from: Point, along: Vector) -> Option<f64> {
    let [a, b, _, d] = shell.corner_points(panel);
    let (u, w, to) = (b - a, d - a, from - a);
    let whole = u.cross(w).dot(-along);
    let r = to.cross(w).dot(-along) / whole;
    let s = u.cross(to).dot(-along) / whole;
    let inside = (0.0..=1.0).contains(&r) && (0.0..=1.0).contains(&s);
    (whole != 0.0 && inside).then(|| u.cross(w).dot(to) / whole)
}

/// Whether a point is in a polygon, by crossings of a ray to the right; points on the border belong to one side only.
#[must_use]
pub fn covers(polygon: &[[f32; 2]], x: f64, y: f64) -> bool {
    let mut odd = false;
    for (k, a) in polygon.iter().enumerate() {
        // The same order of ends for both neighbours of a line, so that rounding is the same for both.
        let b = polygon[(k + 1) % polygon.len()];
        let (low, high) = if a[1] <= b[1] { (*a, b) } else { (b, *a) };
        let [lx, ly, hx, hy] = [low[0], low[1], high[0], high[1]].map(f64::from);
        if (ly <= y) != (hy <= y) && (hx - lx) * (y - ly) > (x - lx) * (hy - ly) {
            odd = !odd;
        }
    }
    odd
}

/// The panel painted last at each pixel's centre; [`NONE`] where there is none.
#[must_use]
pub fn rasterise(picture: &Picture) -> Vec<u32> {
    let [w, h] = picture.size.map(|side| side as usize);
    let mut pixels = vec![NONE; w * h];
    for item in &picture.items {
        let Paint::Fill { panel } = item.paint else { continue };
        let polygon = picture.points_of(item);
        let range = |axis: usize, size: usize| {
            let low = polygon.iter().map(|p| p[axis]).fold(f32::MAX, f32::min);
            let high = polygon.iter().map(|p| p[axis]).fold(f32::MIN, f32::max);
            (low.floor().max(0.0) as usize)..(high.ceil().max(0.0) as usize).min(size)
        };
        for y in range(1, h) {
            for x in range(0, w) {
                if covers(polygon, x as f64 + 0.5, y as f64 + 0.5) {
                    pixels[y * w + x] = panel;
                }
            }
        }
    }
    pixels
}

/// How a picture agrees with the ray cast.
#[derive(Clone, Copy, PartialEq, Eq, Debug, Default)]
pub struct Agreement {
    /// Pixels at which the ray meets something.
    pub covered: usize,
    /// Pixels at which something else is painted than what the ray meets first, or something where it meets nothing, or nothing where it does.
    pub wrong: usize,
}

impl Agreement {
    /// Whether it is as good as asked for.
    #[must_use]
    pub const fn holds(self) -> bool {
        self.wrong * ONE_IN <= self.covered
    }
}

/// Draws the scene as fills and compares every pixel.
#[must_use]
pub fn compare(shell: &Shell, scene: &Scene, camera: &Camera) -> Agreement {
    let look = Look {
        faces: Faces::Shaded,
        ..Look::default()
    };
    let picture = scene.picture(shell, camera, &look, &Tints::default(), &[]);
    let lens = camera.lens();
    // The panel's own place on the ray, and that of the nearest panel.
    let cast = |pos: [f32; 2], panel: u32| {
        let ray = camera.ray(pos);
        // The near plane of the camera hides what lies before it; the ray cast must too.
        let least = match camera.projection {
            Projection::Perspective => lens.near / ray.along.dot(lens.forward),
            Projection::Parallel => f64::MIN,
        };
        let hit = |panel| meets(shell, panel, ray.from, ray.along).filter(|&t| t >= least);
        let nearest = (0..shell.panels.len() as u32).filter_map(hit).min_by(f64::total_cmp);
        let own = if panel == NONE { None } else { hit(panel) };
        match [own, nearest] {
            [None, None] => (panel == NONE, false),
            // Of two panels at the same place either is right.
            [Some(own), Some(nearest)] => (own - nearest <= 1e-6 * camera.distance, true),
            _ => (false, nearest.is_some()),
        }
    };
    let width = picture.size[0] as usize;
    let mut agreement = Agreement::default();
    for (at, panel) in rasterise(&picture).into_iter().enumerate() {
        let [x, y] = [(at % width) as f32 + 0.5, (at / width) as f32 + 0.5];
        let (right, covered) = cast([x, y], panel);
        agreement.covered += usize::from(covered);
        let off = [-ROUNDING, ROUNDING];
        let right = right
            || off
                .iter()
                .any(|dx| off.iter().any(|dy| cast([x + dx, y + dy], panel).0));
        agreement.wrong += usize::from(!right);
    }
    agreement
}
