//! The numbers of a curve.

use super::walk::{COORDINATE, LENGTH, LENGTH_OR_ZERO, Walk};
use crate::start::{Curve, CurveShape, limits};

impl Walk<'_> {
    /// The numbers of a curve; `key` and `name` say which.
    pub(super) fn curve(&mut self, key: &str, name: &str, curve: &mut Curve) {
        if !self.wants(key) {
            return;
        }
        let key_of = |what: &str| format!("{key}.{what}");
        let named = |what: &str| format!("{name}: {what}");
        let parts = f64::from(curve.parts);
        match &mut curve.shape {
            CurveShape::Line { run_mm, rise_mm } => {
                self.length(&key_of("run"), &named("run"), LENGTH_OR_ZERO, "run_mm", run_mm);
                self.length(&key_of("rise"), &named("rise"), COORDINATE, "rise_mm", rise_mm);
            }
            CurveShape::Arc { span_mm, rise_mm } | CurveShape::Catenary { span_mm, rise_mm } => {
                self.length(&key_of("span"), &named("span"), LENGTH, "span_mm", span_mm);
                self.length(&key_of("rise"), &named("rise"), COORDINATE, "rise_mm", rise_mm);
            }
            CurveShape::Sine {
                length_mm,
                amplitude_mm,
                waves,
            } => {
                let most = [-limits::MAX_TURNS, limits::MAX_TURNS];
                self.length(&key_of("length"), &named("length"), LENGTH, "length_mm", length_mm);
                let amplitude = named("amplitude");
                self.length(
                    &key_of("amplitude"),
                    &amplitude,
                    COORDINATE,
                    "amplitude_mm",
                    amplitude_mm,
                );
                self.factor(&key_of("waves"), &named("waves"), most, "waves", waves);
            }
            CurveShape::Helix {
                radius_mm,
                turn,
                rise_mm,
            } => {
                // A chord may go no more than half round.
                let most = (360.0 * limits::MAX_TURNS).min(180.0 * parts);
                self.length(&key_of("radius"), &named("radius"), LENGTH, "radius_mm", radius_mm);
                self.angle(&key_of("turn"), &named("turn"), [-most, most], "turn", turn);
                self.length(&key_of("rise"), &named("rise"), COORDINATE, "rise_mm", rise_mm);
            }
            CurveShape::Free(points) => {
                for (k, point) in points.iter_mut().enumerate() {
                    self.vector(
                        &format!("{key}.point.{k}"),
                        &format!("{name}: point {}", k + 1),
                        "free",
                        &mut point.0,
                    );
                }
            }
        }
        if !matches!(curve.shape, CurveShape::Free(_)) {
            let bounds = [1, limits::MAX_PARTS];
            self.count(&key_of("parts"), &named("parts"), bounds, "parts", &mut curve.parts);
        }
        self.turn(&key_of("azimuth"), &named("azimuth"), "azimuth", &mut curve.azimuth);
    }
}
