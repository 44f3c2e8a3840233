//! What lies under the pointer.

use zonewright_geometry::{Point, Shell};

use crate::{Camera, Lens, Projection, Ray, Scene, picture::index, scene::Plane};

/// How much nearer, in parts of the distance, a panel must be to hide a point: rounding is far below, a sheet's gap far above.
const HIDES: f64 = 1e-6;

/// What was picked, by index in the shell.
#[derive(Clone, Copy, PartialEq, Eq, Debug)]
pub enum Pick {
    /// A panel.
    Panel(u32),
    /// An edge.
    Edge(u32),
    /// A vertex.
    Vertex(u32),
}

/// What lies under a place on the picture: the nearest visible vertex within reach, or else the nearest visible edge, or else
/// the panel exactly there. `reach_px` is in pixels.
///
/// `scene` may be exact or quick, but must be of this shell.
#[must_use]
pub fn pick(scene: &Scene, shell: &Shell, camera: &Camera, pos: [f32; 2], reach_px: f32) -> Option<Pick> {
    let sight = Sight::new(scene, shell, camera, pos, reach_px);
    sight
        .vertex()
        .map(Pick::Vertex)
        .or_else(|| sight.edge().map(Pick::Edge))
        .or_else(|| sight.panel().map(Pick::Panel))
}

struct Sight<'a> {
    scene: &'a Scene,
    shell: &'a Shell,
    camera: &'a Camera,
    lens: Lens,
    pos: [f64; 2],
    reach: f64,
    /// Panels whose corners' box comes within reach: only they can be picked there, or hide what is there.
    near: Vec<u32>,
}

impl<'a> Sight<'a> {
    fn new(scene: &'a Scene, shell: &'a Shell, camera: &'a Camera, pos: [f32; 2], reach_px: f32) -> Self {
        let lens = camera.lens();
        let pos = pos.map(f64::from);
        let reach = f64::from(reach_px).max(0.0);
        let places: Vec<Option<[f64; 2]>> = shell
            .points
            .iter()
            .map(|&p| lens.project(p).map(|p| p.pos.map(f64::from)))
            .collect();
        let near = (0..index(shell.panels.len().min(scene.planes.len())))
            .filter(|&panel| {
                if !scene.planes[panel as usize].exists() {
                    return false;
                }
                let corners = shell.panels[panel as usize].corners.map(|v| places[v as usize]);
                (0..2).all(|axis| {
                    let [mut low, mut high] = [f64::MAX, f64::MIN];
                    for corner in corners {
                        // A corner behind the eye: the panel may be anywhere on the picture.
                        let Some(place) = corner else { return true };
                        low = low.min(place[axis]);
                        high = high.max(place[axis]);
                    }
                    low - reach <= pos[axis] && pos[axis] <= high + reach
                })
            })
            .collect();
        Self {
            scene,
            shell,
            camera,
            lens,
            pos,
            reach,
            near,
        }
    }

    fn vertex(&self) -> Option<u32> {
        let mut found: Vec<(f64, u32)> = self
            .near
            .iter()
            .flat_map(|&panel| self.shell.panels[panel as usize].corners)
            .filter_map(|v| {
                let place = self.lens.project(self.shell.points[v as usize])?.pos.map(f64::from);
                let away = distance(place, self.pos);
                (away <= self.reach).then_some((away, v))
            })
            .collect();
        found.sort_by(|a, b| a.0.total_cmp(&b.0).then(a.1.cmp(&b.1)));
        found.dedup();
        found.into_iter().map(|(_, v)| v).find(|&v| {
            let point = self.shell.points[v as usize];
            !self.hidden(point, |panel| self.shell.panels[panel as usize].corners.contains(&v))
        })
    }

    fn edge(&self) -> Option<u32> {
        let mut found: Vec<(f64, u32, Point)> = (0_u32..)
            .zip(&self.shell.edges)
            .filter(|(_, edge)| edge.panels.iter().any(|panel| self.near.binary_search(panel).is_ok()))
            .filter_map(|(k, edge)| {
                let ends = edge.ends.map(|v| self.shell.points[v as usize]);
                let (away, point) = self.nearest(ends)?;
                (away <= self.reach).then_some((away, k, point))
            })
            .collect();
        found.sort_by(|a, b| a.0.total_cmp(&b.0).then(a.1.cmp(&b.1)));
        found
            .into_iter()
            .find(|&(_, edge, point)| {
                let own = self.shell.edges[edge as usize].panels;
                !self.hidden(point, |panel| own.contains(&panel))
            })
            .map(|(_, edge, _)| edge)
    }

    fn panel(&self) -> Option<u32> {
        let ray = self.ray(self.pos);
        self.near
            .iter()
            .filter_map(|&panel| Some((self.hit(&ray, panel)?, panel)))
            .min_by(|a, b| a.0.total_cmp(&b.0).then(a.1.cmp(&b.1)))
            .map(|(_, panel)| panel)
    }

    /// The point of a line whose picture is nearest to the pointer, and how near that is in pixels.
    fn nearest(&self, ends: [Point; 2]) -> Option<(f64, Point)> {
        let clipped = crate::clip::Clip::new(&self.lens).line(ends.map(|p| self.lens.to_camera(p)))?;
        let [a, b] = clipped.map(|seen| self.lens.onto(seen).map(f64::from));
        let along = [b[0] - a[0], b[1] - a[1]];
        let length = along[0].hypot(along[1]);
        let share = if length > 0.0 {
            ((self.pos[0] - a[0]) * along[0] + (self.pos[1] - a[1]) * along[1]) / (length * length)
        } else {
            0.0
        }
        .clamp(0.0, 1.0);
        let place = [a[0] + along[0] * share, a[1] + along[1] * share];
        // Equal steps on the picture are not equal steps in space: weigh the ends by their scale.
        let [wa, wb] = clipped.map(|seen| self.lens.scale(seen.z));
        let weight = share * wb / (wa + share * (wb - wa));
        let seen = clipped[0].lerp(clipped[1], weight);
        let point = self.lens.eye + self.lens.right * seen.x + self.lens.up * seen.y + self.lens.forward * seen.z;
        Some((distance(place, self.pos), point))
    }

    /// Whether a panel, other than its own, stands before a point.
    fn hidden(&self, point: Point, own: impl Fn(u32) -> bool) -> bool {
        let from = match self.lens.projection {
            Projection::Perspective => self.lens.eye,
            Projection::Parallel => point - self.lens.forward * self.lens.distance,
        };
        let far = point.distance(from);
        let ray = Ray {
            from,
            along: (point - from) / far,
        };
        let slack = HIDES * self.camera.distance.max(far.abs());
        self.near
            .iter()
            .any(|&panel| !own(panel) && self.hit(&ray, panel).is_some_and(|t| t < far - slack))
    }

    #[expect(clippy::cast_possible_truncation, reason = "pixels need no more than f32")]
    fn ray(&self, pos: [f64; 2]) -> Ray {
        self.camera.ray(pos.map(|x| x as f32))
    }

    /// Where a ray meets a panel, as a length along the ray.
    fn hit(&self, ray: &Ray, panel: u32) -> Option<f64> {
        let Plane { normal, offset } = self.scene.planes[panel as usize];
        let steep = normal.dot(ray.along);
        let t = (offset - normal.dot(ray.from.0)) / steep;
        let point = ray.from + ray.along * t;
        if !t.is_finite() || !self.lens.shows(self.lens.to_camera(point).z) {
            return None;
        }
        let corners = self.shell.corner_points(panel);
        (0..4)
            .all(|k| {
                let [a, b] = [corners[k], corners[(k + 1) % 4]];
                normal.dot((b - a).cross(point - a)) >= 0.0
            })
            .then_some(t)
    }
}

fn distance(a: [f64; 2], b: [f64; 2]) -> f64 {
    (a[0] - b[0]).hypot(a[1] - b[1])
}
