//! Plain numbers as text.

/// What stands for a number that is not finite.
const NOT_FINITE: &str = "not finite";

/// A number with a fixed count of decimals, rounded to nearest; never `-0`, never in E-notation.
#[must_use]
pub fn fixed(value: f64, decimals: usize) -> String {
    if !value.is_finite() {
        return NOT_FINITE.to_owned();
    }
    let text = format!("{value:.decimals$}");
    match text.strip_prefix('-') {
        Some(rest) if rest.bytes().all(|b| b == b'0' || b == b'.') => rest.to_owned(),
        _ => text,
    }
}

/// A number with at most so many decimals; zeros at the end are left out.
#[must_use]
pub fn trimmed(value: f64, decimals: usize) -> String {
    let mut text = fixed(value, decimals);
    if text.contains('.') {
        let keep = text.trim_end_matches('0').trim_end_matches('.').len();
        text.truncate(keep);
    }
    text
}

/// A number with as many digits as it takes to read the same f64 back, never in E-notation.
#[must_use]
pub fn exact(value: f64) -> String {
    if !value.is_finite() {
        return NOT_FINITE.to_owned();
    }
    // Adding zero turns -0 into 0 and leaves all else as it is.
    format!("{}", value + 0.0)
}

/// A count: digits only.
#[must_use]
pub fn count(value: usize) -> String {
    let mut text = String::new();
    push_count(&mut text, value as u64, 1);
    text
}

/// Puts a count behind `text`, with zeros in front up to `width` digits.
///
/// Written by hand because marks are made for every panel while something is dragged.
pub(crate) fn push_count(text: &mut String, mut value: u64, width: usize) {
    let mut digits = [b'0'; 20];
    let mut at = digits.len();
    while value > 0 {
        at -= 1;
        digits[at] = b'0' + (value % 10) as u8;
        value /= 10;
    }
    let from = at.min(digits.len() - width.min(digits.len()));
    text.extend(digits[from..].iter().map(|&d| char::from(d)));
}

/// How many digits a count has; 1 for zero.
pub(crate) const fn digits_of(value: u64) -> usize {
    match value.checked_ilog10() {
        Some(log) => log as usize + 1,
        None => 1,
    }
}
