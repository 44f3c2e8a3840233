//! The findings about a design, as JSON and as text.

use std::fmt::Write;

use serde::Serialize;
use zonewright_geometry::Level;
use zonewright_shop::{FindingText, FindingWriter, text::count};

use super::Report;

#[derive(Serialize)]
struct Line<'a> {
    level: &'a str,
    code: &'a str,
    text: &'a str,
    #[serde(rename = "where")]
    place: &'a str,
    figure: Option<f64>,
    limit: Option<f64>,
}

/// Whether a finding says stop.
#[must_use]
pub fn any_stop(report: &Report) -> bool {
    report.findings.iter().any(|f| f.level() == Level::Stop)
}

/// The findings as a JSON list, the gravest first.
#[must_use]
pub fn findings_to_json(report: &Report) -> String {
    let texts = texts(report);
    let lines = texts.iter().map(|f| Line {
        level: f.level,
        code: f.code,
        text: &f.text,
        place: &f.place,
        figure: f.figure,
        limit: f.limit,
    });
    // Writing plain numbers and texts to a string cannot fail.
    serde_json::to_string(&lines.collect::<Vec<_>>()).unwrap_or_default()
}

/// The findings as text, the gravest first, one a line.
#[must_use]
pub fn findings_to_text(report: &Report) -> String {
    let texts = texts(report);
    if texts.is_empty() {
        return "Nothing found.\n".to_owned();
    }
    let mut out = String::new();
    // Writing to a string cannot fail.
    for finding in &texts {
        let _ = writeln!(out, "{:<5}  {:<18}  {}", finding.level, finding.code, finding.text);
    }
    let stops = texts.iter().filter(|f| f.level == "stop").count();
    let _ = match stops {
        0 => writeln!(out, "\nNothing that says stop."),
        1 => writeln!(out, "\n1 finding says stop."),
        n => writeln!(out, "\n{} findings say stop.", count(n)),
    };
    out
}

fn texts(report: &Report) -> Vec<FindingText> {
    FindingWriter::new(&report.shell, &report.parts).write_all(&report.findings)
}
