//! Sums that keep their digits.

/// A sum that carries what rounding drops, so that a million small terms lose no digits.
///
/// Source: A. Neumaier, Rundungsfehleranalyse einiger Verfahren zur Summation endlicher Summen, ZAMM 54 (1974) 39-51 (from memory).
#[derive(Clone, Copy, PartialEq, Debug, Default)]
pub struct Sum {
    total: f64,
    dropped: f64,
}

impl Sum {
    /// Adds a term.
    pub fn add(&mut self, term: f64) {
        let next = self.total + term;
        self.dropped += if self.total.abs() >= term.abs() {
            (self.total - next) + term
        } else {
            (term - next) + self.total
        };
        self.total = next;
    }

    /// The sum so far.
    #[must_use]
    pub fn value(self) -> f64 {
        self.total + self.dropped
    }
}
