//! Which side is outside, by the kind of start.

use super::grow;
use crate::{Outside, Shape, Shell, Vector, measure, start::OutsideRule};

impl Outside {
    /// The side that the rule of the start's kind calls outside, for the shape as it grows now.
    ///
    /// A closed shell always looks outwards. It is meant for new designs and for changes of kind; a shape keeps its side otherwise.
    #[must_use]
    pub fn by_rule(shape: &Shape) -> Self {
        let grown = Shape {
            outside: Self::Grown,
            ..shape.clone()
        };
        let (shell, _) = grow(&grown);
        if outwardness(&shell, shape.start.outside_rule()) < 0.0 {
            Self::Reversed
        } else {
            Self::Grown
        }
    }
}

/// Positive when the panels' normals look the way the rule asks.
fn outwardness(shell: &Shell, rule: OutsideRule) -> f64 {
    if let Some(volume) = measure::totals(shell).volume_mm3.filter(|_| shell.is_closed()) {
        return volume;
    }
    let panels = 0..u32::try_from(shell.panels.len()).unwrap_or(0);
    let axis = middle(shell);
    let look = |panel: u32| {
        let [a, _, c, _] = shell.corner_points(panel);
        let centre = (a.0 + c.0) / 2.0;
        let normal = shell.area_vector(panel);
        match rule {
            OutsideRule::Up => normal.z,
            OutsideRule::AwayFromAxis => {
                let out = centre - axis;
                normal.dot(Vector::new(out.x, out.y, 0.0).normalize_or_zero())
            }
            OutsideRule::PositiveVolume => normal.dot((centre - axis).normalize_or_zero()),
        }
    };
    panels.map(look).sum()
}

fn middle(shell: &Shell) -> Vector {
    let count = shell.points.len().max(1) as f64;
    shell.points.iter().map(|p| p.0).sum::<Vector>() / count
}
