//! The box around a shell.

use zonewright_geometry::{Point, Shell, Vector};

/// An axis-aligned box, in millimetres.
#[derive(Clone, Copy, PartialEq, Debug)]
pub struct Bounds {
    /// The corner with the smallest coordinates.
    pub min: Point,
    /// The corner with the greatest coordinates.
    pub max: Point,
}

impl Bounds {
    /// The box around the corners of a shell's panels; none when there is no panel with finite corners.
    #[must_use]
    pub fn of(shell: &Shell) -> Option<Self> {
        Self::of_points(
            shell
                .panels
                .iter()
                .flat_map(|panel| panel.corners)
                .filter_map(|v| shell.points.get(v as usize).copied()),
        )
    }

    /// The box around points; those that are not finite are passed over. None when no point is left.
    #[must_use]
    pub fn of_points(points: impl IntoIterator<Item = Point>) -> Option<Self> {
        let mut bounds: Option<Self> = None;
        for point in points.into_iter().filter(|point| point.is_finite()) {
            bounds = Some(bounds.map_or(Self { min: point, max: point }, |b| Self {
                min: Point(b.min.0.min(point.0)),
                max: Point(b.max.0.max(point.0)),
            }));
        }
        bounds
    }

    /// The middle of the box.
    #[must_use]
    pub fn centre(&self) -> Point {
        self.min + self.size() * 0.5
    }

    /// The size along x, y and z, in millimetres.
    #[must_use]
    pub fn size(&self) -> Vector {
        self.max - self.min
    }

    /// The diagonal, in millimetres.
    #[must_use]
    pub fn diagonal(&self) -> f64 {
        self.size().length()
    }

    /// The eight corners.
    #[must_use]
    pub fn corners(&self) -> [Point; 8] {
        core::array::from_fn(|k| {
            let pick = |bit: usize, low: f64, high: f64| if k & bit == 0 { low } else { high };
            Point::new(
                pick(1, self.min.0.x, self.max.0.x),
                pick(2, self.min.0.y, self.max.0.y),
                pick(4, self.min.0.z, self.max.0.z),
            )
        })
    }

    /// Whether a point lies in the box or on it.
    #[must_use]
    pub fn contains(&self, point: Point) -> bool {
        point.0.cmpge(self.min.0).all() && point.0.cmple(self.max.0).all()
    }
}
