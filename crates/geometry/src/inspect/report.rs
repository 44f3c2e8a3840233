//! What an inspection has to say.

use super::Inspection;
use crate::{Code, Finding, Place, Tolerances, Unit};

/// After this many findings of one kind, the rest are gathered in one: nobody reads a longer list.
pub const LISTED: usize = 100;

impl Inspection {
    /// The findings of this inspection.
    ///
    /// Each pair has a finding of its own, up to [`LISTED`] of a kind. When there are more, one further finding has the places
    /// of all the others, and the count of all pairs as its figure. Passages are one finding of code crossing, with their edges as
    /// place and their count as figure. A near miss has its gap as figure, and the
    /// near tolerance as limit.
    #[must_use]
    pub fn findings(&self, tolerances: &Tolerances) -> Vec<Finding> {
        let mut findings = Vec::new();
        listed(
            &mut findings,
            Code::DoubledPanel,
            self.doubled.iter().copied(),
            Place::Panels,
        );
        let crossings = self.crossings.iter().map(|c| c.panels);
        listed(&mut findings, Code::Crossing, crossings, Place::Panels);

        if !self.passages.is_empty() {
            let mut edges: Vec<u32> = self.passages.iter().map(|p| p.edge).collect();
            edges.dedup();
            let all = Finding::new(Code::Crossing, Place::Edges(edges));
            findings.push(all.with(figure(self.passages.len()), None, Unit::Count));
        }

        let from = findings.len();
        let misses = self.near_misses.iter().map(|m| m.vertices);
        listed(&mut findings, Code::NearMiss, misses, Place::Vertices);
        let limit = Some(tolerances.near_mm);
        for (finding, miss) in findings[from..].iter_mut().zip(&self.near_misses).take(LISTED) {
            finding.figure = Some(miss.gap_mm);
            finding.limit = limit;
            finding.unit = Unit::Millimetres;
        }
        findings
    }
}

/// One finding a pair, and one for all that are left over.
fn listed(
    findings: &mut Vec<Finding>,
    code: Code,
    pairs: impl ExactSizeIterator<Item = [u32; 2]>,
    place: fn(Vec<u32>) -> Place,
) {
    let count = pairs.len();
    let mut rest = Vec::new();
    for (k, pair) in pairs.enumerate() {
        if k < LISTED {
            findings.push(Finding::new(code, place(pair.to_vec())));
        } else {
            rest.extend(pair);
        }
    }
    if !rest.is_empty() {
        rest.sort_unstable();
        rest.dedup();
        findings.push(Finding::new(code, place(rest)).with(figure(count), None, Unit::Count));
    }
}

#[expect(clippy::cast_precision_loss, reason = "a count of pairs in memory is far below 2^53")]
const fn figure(count: usize) -> f64 {
    count as f64
}
