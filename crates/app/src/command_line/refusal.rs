//! Findings that stop a command, as one sentence.

use zonewright_geometry::{Code, Finding, Shell};
use zonewright_shop::{FindingWriter, Parts};

/// Whether a code says that nothing was grown, as against a shell that grew and has something wrong.
pub(super) const fn not_grown(code: Code) -> bool {
    matches!(
        code,
        Code::ParameterLimit
            | Code::NotFinite
            | Code::ZeroVector
            | Code::BrokenLink
            | Code::TooManyPanels
            | Code::EmptyWord
            | Code::NoPanels
    )
}

/// A finding about a design that was not grown, as the rest of a sentence: what, where, the figure, what to do.
pub(super) fn sentence(finding: &Finding) -> String {
    let parts = Parts::default();
    let text = FindingWriter::new(&Shell::default(), &parts).write(finding).text;
    let remedy = finding.code.text().remedy;
    let what = text.strip_suffix(remedy).unwrap_or(&text).trim_end_matches(['.', ' ']);
    format!(
        "{}; {}",
        uncapitalised(what),
        uncapitalised(remedy.trim_end_matches('.'))
    )
}

/// The text with its first letter small, to stand inside a sentence.
pub(super) fn uncapitalised(text: &str) -> String {
    let mut letters = text.chars();
    let first = letters.next().into_iter().flat_map(char::to_lowercase);
    first.chain(letters).collect()
}
