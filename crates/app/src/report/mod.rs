//! The readouts of a design: grown, inspected, measured and divided into parts.

mod check;
mod json;
mod text;

use zonewright_geometry::{
    Finding, Shell, grow,
    inspect::{Inspection, inspect},
    measure::{Totals, totals},
};
use zonewright_shop::{FamilyTolerance, Parts, text::Units};

use crate::document::Design;

pub use check::{any_stop, findings_to_json, findings_to_text};

/// The readouts of a design.
#[derive(Clone, Debug)]
pub struct Report {
    /// The design's name.
    pub name: String,
    /// The kind of its start.
    pub kind: &'static str,
    /// The units in which the text is written.
    pub units: Units,
    /// The grown shell.
    pub shell: Shell,
    /// What growing and inspecting found.
    pub findings: Vec<Finding>,
    /// The measures that need no inspection.
    pub totals: Totals,
    /// Crossings, doubled panels, near misses.
    pub inspection: Inspection,
    /// The panels as parts.
    pub parts: Parts,
}

/// Grows a design and works out its readouts.
#[must_use]
pub fn report(design: &Design) -> Report {
    let (shell, mut findings) = grow(&design.shape);
    let tolerances = &design.shape.tolerances;
    let inspection = inspect(&shell, tolerances);
    findings.extend(inspection.findings(tolerances));
    Report {
        name: design.name.clone(),
        kind: design.shape.start.kind(),
        units: design.units,
        totals: totals(&shell),
        parts: Parts::new(&shell, &FamilyTolerance::default()),
        inspection,
        findings,
        shell,
    }
}

impl Report {
    /// Volume in cubic millimetres; none unless every edge has exactly two panels, nothing crosses and no panel is doubled.
    #[must_use]
    pub fn volume_mm3(&self) -> Option<f64> {
        let clean = self.inspection.crossings.is_empty() && self.inspection.doubled.is_empty();
        self.totals.volume_mm3.filter(|_| clean)
    }
}
