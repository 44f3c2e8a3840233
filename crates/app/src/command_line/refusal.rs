//! Findings that stop a command, as one sentence.

use zonewright_geometry::{Code, Finding};

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
