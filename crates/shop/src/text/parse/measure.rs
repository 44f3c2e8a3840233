//! Numbers, fractions and units: the smallest pieces of what is typed.

use super::{Kind, ParseError, Parser, Value};
use crate::text::{MM_PER_FOOT, MM_PER_INCH};

/// A number as it is written.
struct Written {
    value: f64,
    /// Digits only, so that it may be part of a fraction.
    whole: bool,
}

impl Parser<'_> {
    pub(super) fn measure(&mut self) -> Result<Value, ParseError> {
        let start = self.at;
        let number = self.number()?;
        let Some(factor) = self.unit()? else {
            return Ok(Value { number, measure: false });
        };
        let mut total = number * factor;
        if self.kind == Kind::Length && factor == MM_PER_FOOT {
            let tight = self.rest();
            if tight.starts_with('-') && tight[1..].starts_with(|c: char| c.is_ascii_digit()) {
                return Err(self.error(
                    self.at,
                    "A hyphen after feet, which may join inches or take them away",
                    "Write 3' 11\" for the sum, or put spaces round a minus.",
                ));
            }
            if self.peek().is_some_and(|c| c.is_ascii_digit()) {
                let at = self.at;
                let inches = self.number()?;
                match self.unit()? {
                    None => total += inches * MM_PER_INCH,
                    Some(unit) if unit == MM_PER_INCH => total += inches * MM_PER_INCH,
                    Some(_) => return Err(self.error(at, "Feet followed by another unit", "Only inches follow feet.")),
                }
            }
        }
        Ok(Value {
            number: self.finite(total, start)?,
            measure: true,
        })
    }

    /// A number, with its fraction if one follows.
    fn number(&mut self) -> Result<f64, ParseError> {
        let start = self.at;
        let first = self.decimal()?;
        if !first.whole {
            return Ok(first.value);
        }
        if let Some(bottom) = self.after_slash() {
            return self.over(first.value, bottom, start);
        }
        self.refuse_joined_fraction(start)?;
        // `11 3/4`: a space, then a fraction.
        let back = self.at;
        if self.rest().starts_with(char::is_whitespace) && self.peek().is_some_and(|c| c.is_ascii_digit()) {
            let top = self.decimal()?;
            if let (true, Some(bottom)) = (top.whole, self.after_slash()) {
                return Ok(first.value + self.over(top.value, bottom, start)?);
            }
        }
        self.at = back;
        Ok(first.value)
    }

    /// `11-3/4"` is 11 3/4 inches to one reader and a difference to another: neither is guessed.
    fn refuse_joined_fraction(&mut self, start: usize) -> Result<(), ParseError> {
        let back = self.at;
        if self.rest().starts_with('-') && self.rest()[1..].starts_with(|c: char| c.is_ascii_digit()) {
            self.at += 1;
            let top = self.decimal();
            let fraction = matches!(top, Ok(Written { whole: true, .. })) && self.after_slash().is_some();
            let inches =
                fraction && matches!(self.unit(), Ok(Some(unit)) if self.kind == Kind::Length && unit == MM_PER_INCH);
            if inches {
                return Err(self.error(
                    start,
                    "A hyphen before a fraction, which may join it or take it away",
                    "Write 11 3/4in for the sum, or 11in - 3/4in for the difference.",
                ));
            }
        }
        self.at = back;
        Ok(())
    }

    fn over(&self, top: f64, bottom: f64, at: usize) -> Result<f64, ParseError> {
        if bottom == 0.0 {
            return Err(self.error(at, "A fraction over zero", "Write another number below the line."));
        }
        Ok(top / bottom)
    }

    /// Takes `/ whole` where it follows; otherwise takes nothing.
    fn after_slash(&mut self) -> Option<f64> {
        let back = self.at;
        if self.peek() == Some('/') {
            self.take('/');
            if self.peek().is_some_and(|c| c.is_ascii_digit())
                && let Ok(Written { value, whole: true }) = self.decimal()
            {
                return Some(value);
            }
        }
        self.at = back;
        None
    }

    fn digits(&mut self) -> usize {
        let rest = self.rest();
        let n = rest.len() - rest.trim_start_matches(|c: char| c.is_ascii_digit()).len();
        self.at += n;
        n
    }

    fn decimal(&mut self) -> Result<Written, ParseError> {
        let start = self.at;
        let mut digits = self.digits();
        let mut whole = true;
        if self.rest().starts_with('.') {
            whole = false;
            self.at += 1;
            digits += self.digits();
        }
        if digits == 0 {
            return Err(self.error(start, "A point without digits", self.kind.examples()));
        }
        if self.rest().starts_with(['e', 'E']) {
            let back = self.at;
            self.at += 1;
            if self.rest().starts_with(['+', '-']) {
                self.at += 1;
            }
            if self.digits() == 0 {
                self.at = back;
            } else {
                whole = false;
            }
        }
        if self.rest().starts_with(',') {
            return Err(self.unexpected(','));
        }
        let written = &self.text[start..self.at];
        let Ok(value) = written.parse::<f64>() else {
            return Err(self.error(start, format!("'{written}' is not a number"), self.kind.examples()));
        };
        Ok(Written {
            value: self.finite(value, start)?,
            whole,
        })
    }

    /// Takes a unit where one follows; gives what to multiply with.
    fn unit(&mut self) -> Result<Option<f64>, ParseError> {
        let back = self.at;
        let found = self.peek();
        let start = self.at;
        let word: &str = match found {
            Some(c) if c.is_alphabetic() => {
                let rest = self.rest();
                &rest[..rest.len() - rest.trim_start_matches(char::is_alphabetic).len()]
            }
            Some(c @ ('"' | '\'' | '\u{2033}' | '\u{2032}' | '\u{b0}')) => &self.rest()[..c.len_utf8()],
            _ => {
                self.at = back;
                return Ok(None);
            }
        };
        self.at += word.len();
        let factor = match (self.kind, word) {
            (Kind::Length, "mm") | (Kind::Angle, "deg" | "degree" | "degrees" | "\u{b0}") => 1.0,
            (Kind::Length, "cm") => 10.0,
            (Kind::Length, "m") => 1000.0,
            (Kind::Length, "in" | "inch" | "inches" | "\"" | "\u{2033}") => MM_PER_INCH,
            (Kind::Length, "ft" | "foot" | "feet" | "'" | "\u{2032}") => MM_PER_FOOT,
            (Kind::Angle, "rad") => 1_f64.to_degrees(),
            (Kind::Length, _) => {
                return Err(self.error(
                    start,
                    format!("Unknown unit '{word}'"),
                    "The units are mm, cm, m, in and ft.",
                ));
            }
            (Kind::Angle, _) => {
                return Err(self.error(start, format!("Unknown unit '{word}'"), "The units are deg and rad."));
            }
        };
        Ok(Some(factor))
    }
}
