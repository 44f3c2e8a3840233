//! Findings in words.

use zonewright_geometry::{Code, Finding, Level, NONE, Place, Shell, Unit};

use crate::Parts;
use crate::marks::edge_letter;
use crate::text::{count, cubic_metres, degrees, millimetres, trimmed};

/// A finding, ready to be shown.
#[derive(Clone, PartialEq, Debug)]
pub struct FindingText {
    /// `stop`, `look` or `note`.
    pub level: &'static str,
    /// The key of what is found.
    pub code: &'static str,
    /// What, where, with which figure, and what to do.
    pub text: String,
    /// Where, with the marks of the panels and edges.
    pub place: String,
    /// The figure, in the unit that the text names.
    pub figure: Option<f64>,
    /// The limit that it is held against.
    pub limit: Option<f64>,
}

/// The word for a level.
#[must_use]
pub const fn level_word(level: Level) -> &'static str {
    match level {
        Level::Stop => "stop",
        Level::Look => "look",
        Level::Note => "note",
    }
}

/// So many places are named one by one; the others are counted.
const MOST_NAMED: usize = 6;

/// Puts findings about one shell into words.
pub struct FindingWriter<'a> {
    parts: &'a Parts,
    /// For each vertex the first panel that has it, and the corner's index there.
    at_vertex: Vec<(u32, u32)>,
    /// For each edge of the shell the first panel that has it, and the edge's index there.
    at_edge: Vec<(u32, u32)>,
}

impl<'a> FindingWriter<'a> {
    /// A writer for a shell, given its parts.
    #[must_use]
    pub fn new(shell: &Shell, parts: &'a Parts) -> Self {
        let mut at_vertex = vec![(NONE, NONE); shell.points.len()];
        let mut at_edge = vec![(NONE, NONE); shell.edges.len()];
        for (index, panel) in (0_u32..).zip(&parts.panels) {
            for (slot, edge) in (0_u32..).zip(&panel.edges) {
                let seen = [
                    at_vertex.get_mut(edge.corner as usize),
                    at_edge.get_mut(edge.edge as usize),
                ];
                for first in seen.into_iter().flatten().filter(|f| f.0 == NONE) {
                    *first = (index, slot);
                }
            }
        }
        Self {
            parts,
            at_vertex,
            at_edge,
        }
    }

    /// A finding in words.
    #[must_use]
    pub fn write(&self, finding: &Finding) -> FindingText {
        let words = finding.code.text();
        let place = self.place(&finding.place);
        let mut text = words.what.to_owned();
        if !place.is_empty() {
            text.push_str(": ");
            text.push_str(&place);
        }
        if let Some(figure) = figure_words(finding) {
            text.push_str(", ");
            text.push_str(&figure);
        }
        text.push_str(". ");
        text.push_str(words.remedy);
        FindingText {
            level: level_word(finding.level()),
            code: words.key,
            text,
            place,
            figure: finding.figure,
            limit: finding.limit,
        }
    }

    /// All findings in words, the gravest first; those of one level stay in their order.
    #[must_use]
    pub fn write_all(&self, findings: &[Finding]) -> Vec<FindingText> {
        let mut sorted: Vec<&Finding> = findings.iter().collect();
        sorted.sort_by_key(|f| f.level());
        sorted.into_iter().map(|f| self.write(f)).collect()
    }

    fn place(&self, place: &Place) -> String {
        match place {
            Place::Design => String::new(),
            Place::Parameter(name) => (*name).to_owned(),
            Place::Step(id) => format!("step {}", count(id.0 as usize)),
            Place::Vertices(vertices) => named("corner", "corners", vertices, |v| self.corner(v)),
            Place::Edges(edges) => named("edge", "edges", edges, |e| self.edge(e)),
            Place::Panels(panels) => named("panel", "panels", panels, |p| self.panel(p)),
        }
    }

    fn panel(&self, panel: u32) -> Option<String> {
        self.parts.panels.get(panel as usize).map(|p| p.mark.to_string())
    }

    fn slot(&self, slot: Option<&(u32, u32)>) -> Option<String> {
        let &(panel, edge) = slot?;
        Some(format!("{} {}", self.panel(panel)?, edge_letter(edge as usize)))
    }

    /// A corner has the letter of the edge that leaves it.
    fn corner(&self, vertex: u32) -> Option<String> {
        self.slot(self.at_vertex.get(vertex as usize))
    }

    fn edge(&self, edge: u32) -> Option<String> {
        let on_panel = self.slot(self.at_edge.get(edge as usize))?;
        Some(format!("{} ({on_panel})", self.parts.edge_mark(edge)))
    }
}

fn named(one: &str, several: &str, items: &[u32], name: impl Fn(u32) -> Option<String>) -> String {
    let names: Vec<String> = items.iter().take(MOST_NAMED).filter_map(|&i| name(i)).collect();
    if names.is_empty() {
        return String::new();
    }
    let word = if items.len() == 1 { one } else { several };
    let mut text = format!("{word} {}", names.join(", "));
    if items.len() > MOST_NAMED {
        text.push_str(" and ");
        text.push_str(&count(items.len() - MOST_NAMED));
        text.push_str(" more");
    }
    text
}

/// The figure with its unit, and its limit where there is one.
fn figure_words(finding: &Finding) -> Option<String> {
    let figure = with_unit(finding.figure?, finding.unit);
    Some(match finding.limit {
        Some(limit) => format!("{figure} against a limit of {}", with_unit(limit, finding.unit)),
        None if finding.code == Code::ParameterLimit => format!("{figure} given"),
        None => figure,
    })
}

fn with_unit(value: f64, unit: Unit) -> String {
    match unit {
        Unit::Count => trimmed(value, 4),
        Unit::Millimetres => millimetres(value, 4),
        Unit::Degrees => degrees(value, 2),
        // The figure is in cubic metres already.
        Unit::CubicMetres => cubic_metres(value * crate::text::MM3_PER_M3),
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::FamilyTolerance;
    use crate::test_shells::{butted, polar};
    use zonewright_geometry::StepId;

    fn write(shell: &Shell, finding: &Finding) -> FindingText {
        FindingWriter::new(shell, &Parts::new(shell, &FamilyTolerance::default())).write(finding)
    }

    #[test]
    fn sentences() {
        let shell = polar(9, 38.0, 300.0);
        let text = write(&shell, &Finding::new(Code::Crossing, Place::Panels(vec![0, 71])));
        assert_eq!(
            (text.level, text.code, text.place.as_str()),
            ("stop", "crossing", "panels F01P01, F08P09")
        );
        assert_eq!(
            text.text,
            "Panels pass through each other: panels F01P01, F08P09. Change the form until they part."
        );
        let gap = Finding::new(Code::ClosingGap, Place::Design).with(1.5, Some(0.001), Unit::Millimetres);
        let text = write(&shell, &gap);
        assert_eq!(
            text.text,
            "The closed front does not close, and was grown open, 1.5 mm against a limit of 0.001 mm. Share the closing gap out over the zones."
        );
        assert_eq!(
            (text.figure, text.limit, text.place.as_str()),
            (Some(1.5), Some(0.001), "")
        );
        let ribs = Finding::parameter("ribs", 2.0, 3.0, Unit::Count);
        assert!(
            write(&shell, &ribs)
                .text
                .contains("limits: ribs, 2 against a limit of 3. Give")
        );
        let step = Finding::new(Code::VChanged, Place::Step(StepId(4)));
        assert_eq!(
            (write(&shell, &step).place.as_str(), write(&shell, &step).level),
            ("step 4", "note")
        );
    }

    #[test]
    fn places_have_marks() {
        let shell = butted();
        let edge = write(&shell, &Finding::new(Code::CrowdedEdge, Place::Edges(vec![1])));
        assert_eq!(edge.place, "edge E02 (F01P01 b)");
        let corner = write(&shell, &Finding::new(Code::Pinch, Place::Vertices(vec![4, 7])));
        assert_eq!(corner.place, "corners F01P01 b, F02P02 b");
        let many = write(
            &polar(9, 38.0, 300.0),
            &Finding::new(Code::DoubledPanel, Place::Panels((0..10).collect())),
        );
        assert!(many.place.ends_with("F01P06 and 4 more"));
        // Places that the shell does not have are left out.
        let lost = write(&shell, &Finding::new(Code::Pinch, Place::Vertices(vec![4000])));
        assert_eq!(lost.place, "");
    }

    #[test]
    fn the_gravest_comes_first() {
        let shell = butted();
        let parts = Parts::new(&shell, &FamilyTolerance::default());
        let findings = [
            Finding::new(Code::NeverStill, Place::Design),
            Finding::new(Code::Pinch, Place::Design),
            Finding::new(Code::NoPanels, Place::Design),
            Finding::new(Code::NearMiss, Place::Design),
        ];
        let codes: Vec<_> = FindingWriter::new(&shell, &parts)
            .write_all(&findings)
            .iter()
            .map(|f| f.code)
            .collect();
        assert_eq!(codes, ["no-panels", "pinch", "near-miss", "never-still"]);
    }
}
