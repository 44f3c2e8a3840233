//! Columns: a closed front that climbs.

use serde::{Deserialize, Serialize};

use super::{FirstWord, Role, StartLetter, StartZone, circle, limits};
use crate::{Finding, Point, Sign, Unit, Vector};

/// A closed front of `-h_i` zig, `g_{i+1}` zag. All rise alike; g runs `zag_run_mm` and turns a full turn / n a rib, h runs `zig_run_mm` and turns `turn` times that.
#[derive(Clone, PartialEq, Debug, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct ColumnForm {
    /// n: how many zigs, and how many zags.
    pub ribs: u32,
    /// Horizontal run of the zags, in millimetres.
    pub zag_run_mm: f64,
    /// Horizontal run of the zigs, in millimetres.
    pub zig_run_mm: f64,
    /// Rise of each, in millimetres.
    pub rise_mm: f64,
    /// How many times round the zigs turn while the zags turn once; 1 oscillates, others spiral. Not 0.
    pub turn: i32,
}

impl ColumnForm {
    /// See [`crate::Start::first_word`].
    ///
    /// The axis is x = y = 0 and the lower nodes lie at z = 0. Zones 0 to n - 1 are g of the same number, rising; zones n to 2 n - 1 are
    /// the falling `-h_i`, so that every zone has a letter that runs along it.
    ///
    /// # Errors
    /// As there. `turn` may not be a multiple of the ribs: all zigs would be parallel, and the front would not close.
    pub fn first_word(&self) -> Result<FirstWord, Finding> {
        self.check()?;
        let n = self.ribs;
        let zone = |id, vector| StartZone {
            id,
            vector,
            derived: true,
        };
        let mut zones = Vec::with_capacity(2 * n as usize);
        for i in 0..n {
            let (cos, sin) = circle::part_of_turn(i64::from(i), n);
            zones.push(zone(
                i,
                Vector::new(self.zag_run_mm * cos, self.zag_run_mm * sin, self.rise_mm),
            ));
        }
        for i in 0..n {
            let (cos, sin) = circle::part_of_turn(i64::from(i) * i64::from(self.turn), n);
            let h = Vector::new(self.zig_run_mm * cos, self.zig_run_mm * sin, self.rise_mm);
            zones.push(zone(n + i, -h));
        }
        let letters = (0..n)
            .flat_map(|i| {
                [(n + i, Role::Zig), ((i + 1) % n, Role::Zag)].map(|(zone, role)| StartLetter {
                    index: 2 * i + u32::from(role == Role::Zag),
                    zone,
                    sign: Sign::Plus,
                    role,
                })
            })
            .collect();
        Ok(FirstWord {
            origin: self.first_node(),
            closed: true,
            zones,
            letters,
            grounded: false,
            on_hull: false,
        })
    }

    /// Where the first node must be for the axis to be x = y = 0.
    ///
    /// In the plane of complex numbers, with w a turn of 1 / n, node 2 k is a constant plus `a w^(k+1) / (w - 1) - b w^(m k) / (w^m - 1)`; the
    /// constant vanishes for a first node of `a w / (w - 1) - b / (w^m - 1)`. (Geometric sums; derived.)
    fn first_node(&self) -> Point {
        let (m, n) = (i64::from(self.turn), 2 * self.ribs);
        // 1 / (w^m - 1) = -(1 + i cot(pi m / n)) / 2, and w / (w - 1) = (1 - i cot(pi / n)) / 2.
        let cot = |m: i64| {
            let (cos, sin) = circle::part_of_turn(m, n);
            cos / sin
        };
        Point::new(
            f64::midpoint(self.zag_run_mm, self.zig_run_mm),
            (self.zig_run_mm * cot(m) - self.zag_run_mm * cot(1)) / 2.0,
            self.rise_mm,
        )
    }

    fn check(&self) -> Result<(), Finding> {
        limits::count("ribs", self.ribs, limits::MIN_RIBS, limits::MAX_RIBS)?;
        limits::length_or_zero("zag_run_mm", self.zag_run_mm)?;
        limits::length_or_zero("zig_run_mm", self.zig_run_mm)?;
        // Either run may be 0, which stands that family upright; with both there is nothing but one line.
        limits::length("zag_run_mm", self.zag_run_mm.max(self.zig_run_mm))?;
        limits::length("rise_mm", self.rise_mm)?;
        let most = f64::from(limits::MAX_RIBS);
        limits::within("turn", f64::from(self.turn), -most, most, Unit::Count)?;
        if i64::from(self.turn) % i64::from(self.ribs) == 0 {
            let turn = f64::from(self.turn);
            return Err(Finding::parameter("turn", turn, turn, Unit::Count));
        }
        Ok(())
    }
}
