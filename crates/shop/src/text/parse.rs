//! Lengths and angles from what a user types: numbers, fractions, units and small sums.
//!
//! A recursive descent parser:
//!
//! ```text
//! sum     = product { ("+" | "-") product }
//! product = signed { ("*" | "/") signed }
//! signed  = { "+" | "-" } factor
//! factor  = "(" sum ")" | measure
//! measure = number unit [ number unit ]        the second only after feet: 3' 11 1/4"
//! number  = decimal | [ whole space ] whole "/" whole
//! ```
//!
//! A number without a unit stays a plain number in products, and takes the default unit where it is added to a measure
//! or where the text ends.

use super::{MM_PER_FOOT, MM_PER_INCH, Units};
use zonewright_geometry::Angle;

/// Longer texts are refused; nobody types so much into a field.
const MOST_BYTES: usize = 1000;
/// Brackets and signs may nest this deep, so that a hostile text cannot exhaust the stack.
const MOST_DEEP: usize = 64;

/// What is wrong with a typed text, where, and what to do.
#[derive(Clone, PartialEq, Eq, Debug)]
pub struct ParseError {
    /// What is wrong.
    pub what: String,
    /// Where: the byte in the text, from 0.
    pub at: usize,
    /// What to do.
    pub remedy: &'static str,
}

impl core::fmt::Display for ParseError {
    fn fmt(&self, f: &mut core::fmt::Formatter<'_>) -> core::fmt::Result {
        write!(f, "{} at column {}. {}", self.what, self.at + 1, self.remedy)
    }
}

impl core::error::Error for ParseError {}

/// Reads a length; gives millimetres.
///
/// Plain numbers take the unit of `default`. Negative lengths are read; whether they make sense is for the caller to say.
///
/// # Errors
/// The text is not a length, or the value is not finite.
pub fn parse_length(text: &str, default: Units) -> Result<f64, ParseError> {
    let plain = match default {
        Units::Mm => 1.0,
        Units::Inch => MM_PER_INCH,
    };
    Parser::new(text, Kind::Length, plain).whole()
}

/// Reads an angle; a plain number is degrees.
///
/// # Errors
/// The text is not an angle, or the value is not finite.
pub fn parse_angle(text: &str) -> Result<Angle, ParseError> {
    Parser::new(text, Kind::Angle, 1.0).whole().map(Angle::from_degrees)
}

#[derive(Clone, Copy, PartialEq, Eq)]
enum Kind {
    Length,
    Angle,
}

impl Kind {
    const fn examples(self) -> &'static str {
        match self {
            Self::Length => "Write a length such as 300, 300mm, 0.3m, 11 3/4in or 3' 11 1/4\".",
            Self::Angle => "Write an angle such as 38, 38deg or 0.66rad.",
        }
    }
}

/// A value on the way: a plain number, or a measure in millimetres or degrees.
#[derive(Clone, Copy)]
struct Value {
    number: f64,
    measure: bool,
}

struct Parser<'a> {
    text: &'a str,
    at: usize,
    kind: Kind,
    /// What a plain number is multiplied with to become a measure.
    plain: f64,
    depth: usize,
}

/// A number as it is written.
struct Written {
    value: f64,
    /// Digits only, so that it may be part of a fraction.
    whole: bool,
}

impl<'a> Parser<'a> {
    const fn new(text: &'a str, kind: Kind, plain: f64) -> Self {
        Self {
            text,
            at: 0,
            kind,
            plain,
            depth: 0,
        }
    }

    fn error(&self, at: usize, what: impl Into<String>, remedy: &'static str) -> ParseError {
        ParseError {
            what: what.into(),
            at,
            remedy,
        }
    }

    fn whole(mut self) -> Result<f64, ParseError> {
        if self.text.len() > MOST_BYTES {
            return Err(self.error(MOST_BYTES, "The text is too long", self.kind.examples()));
        }
        let value = self.sum()?;
        if let Some(c) = self.peek() {
            return Err(self.unexpected(c));
        }
        let value = self.as_measure(value);
        self.finite(value, 0)
    }

    fn unexpected(&self, c: char) -> ParseError {
        match c {
            ',' => self.error(
                self.at,
                "A comma",
                "Write the decimal sign as a point, for instance 3.5.",
            ),
            ')' => self.error(self.at, "A closing bracket without an opening one", "Take it out."),
            _ => self.error(
                self.at,
                format!("Unexpected '{}'", c.escape_default()),
                self.kind.examples(),
            ),
        }
    }

    fn finite(&self, value: f64, at: usize) -> Result<f64, ParseError> {
        if value.is_finite() {
            Ok(value)
        } else {
            Err(self.error(
                at,
                "A value that is not finite",
                "Use smaller numbers, and do not divide by zero.",
            ))
        }
    }

    const fn as_measure(&self, value: Value) -> f64 {
        if value.measure {
            value.number
        } else {
            value.number * self.plain
        }
    }

    fn rest(&self) -> &'a str {
        &self.text[self.at..]
    }

    /// The next character that is not a space, without taking it; the spaces are taken.
    fn peek(&mut self) -> Option<char> {
        let rest = self.rest();
        self.at += rest.len() - rest.trim_start().len();
        self.rest().chars().next()
    }

    fn take(&mut self, c: char) {
        self.at += c.len_utf8();
    }

    fn sum(&mut self) -> Result<Value, ParseError> {
        let mut left = self.product()?;
        while let Some(c @ ('+' | '-' | '\u{2212}')) = self.peek() {
            let at = self.at;
            self.take(c);
            let right = self.product()?;
            let sign = if c == '+' { 1.0 } else { -1.0 };
            let measure = left.measure || right.measure;
            let number = if measure {
                self.as_measure(left) + sign * self.as_measure(right)
            } else {
                left.number + sign * right.number
            };
            left = Value {
                number: self.finite(number, at)?,
                measure,
            };
        }
        Ok(left)
    }

    fn product(&mut self) -> Result<Value, ParseError> {
        let mut left = self.signed()?;
        while let Some(c @ ('*' | '/' | '\u{d7}')) = self.peek() {
            let at = self.at;
            self.take(c);
            let right = self.signed()?;
            left = if c == '/' {
                self.divide(left, right, at)?
            } else {
                if left.measure && right.measure {
                    return Err(self.error(at, "Two measures multiplied", "Leave one of the two units out."));
                }
                Value {
                    number: self.finite(left.number * right.number, at)?,
                    measure: left.measure || right.measure,
                }
            };
        }
        Ok(left)
    }

    fn divide(&self, left: Value, right: Value, at: usize) -> Result<Value, ParseError> {
        if right.measure && !left.measure {
            return Err(self.error(
                at,
                "A plain number divided by a measure",
                "Give the number before it a unit too.",
            ));
        }
        if right.number == 0.0 {
            return Err(self.error(at, "A division by zero", "Divide by something else."));
        }
        Ok(Value {
            number: self.finite(left.number / right.number, at)?,
            measure: left.measure && !right.measure,
        })
    }

    fn signed(&mut self) -> Result<Value, ParseError> {
        self.depth += 1;
        if self.depth > MOST_DEEP {
            return Err(self.error(
                self.at,
                "Too many brackets or signs inside each other",
                "Write it more simply.",
            ));
        }
        let value = match self.peek() {
            Some(c @ ('+' | '-' | '\u{2212}')) => {
                self.take(c);
                let inner = self.signed()?;
                let sign = if c == '+' { 1.0 } else { -1.0 };
                Value {
                    number: sign * inner.number,
                    measure: inner.measure,
                }
            }
            Some('(') => self.bracket()?,
            Some(c) if c.is_ascii_digit() || c == '.' => self.measure()?,
            Some(c) => return Err(self.unexpected(c)),
            None => return Err(self.error(self.at, "Nothing where a number should be", self.kind.examples())),
        };
        self.depth -= 1;
        Ok(value)
    }

    fn bracket(&mut self) -> Result<Value, ParseError> {
        let opened = self.at;
        self.take('(');
        let inner = self.sum()?;
        match self.peek() {
            Some(')') => {
                self.take(')');
                Ok(inner)
            }
            Some(c) => Err(self.unexpected(c)),
            None => Err(self.error(opened, "A bracket that is not closed", "Close it with ')'.")),
        }
    }

    fn measure(&mut self) -> Result<Value, ParseError> {
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
