//! Counts are searched around their value, fewest changes first.

use super::problem::{Problem, Tried, Values};

/// How far one count goes when it changes alone.
const FAR_ALONE: i32 = 60;

/// How far two counts go together, the sum of both.
const FAR_TOGETHER: i32 = 10;

/// Places to start from with each choice of counts: they are many, and near each other.
const PLACES: u32 = 1;

impl Problem<'_> {
    /// Looks for a solution with other counts: one changed, then two; near values first.
    pub(super) fn with_other_counts(&mut self) -> Option<Tried> {
        let counts: Vec<usize> = (0..self.variables.len())
            .filter(|&k| self.variables[k].is_count())
            .collect();
        for far in 1..=FAR_ALONE {
            for &k in &counts {
                for by in [far, -far] {
                    let found = self.changed(&[(k, by)]);
                    if found.is_some() || self.spent() {
                        return found;
                    }
                }
            }
        }
        for far in 2..=FAR_TOGETHER {
            for (n, &j) in counts.iter().enumerate() {
                for &k in &counts[n + 1..] {
                    for one in 1..far {
                        for by in [(one, far - one), (one, one - far), (-one, far - one), (-one, one - far)] {
                            let found = self.changed(&[(j, by.0), (k, by.1)]);
                            if found.is_some() || self.spent() {
                                return found;
                            }
                        }
                    }
                }
            }
        }
        None
    }

    fn changed(&mut self, by: &[(usize, i32)]) -> Option<Tried> {
        let mut values: Values = self.start.clone();
        for &(k, by) in by {
            let value = values[k] + f64::from(by);
            let [least, most] = self.variables[k].bounds;
            if value < least || value > most {
                return None;
            }
            values[k] = value;
        }
        self.near(&values, PLACES)
    }
}
