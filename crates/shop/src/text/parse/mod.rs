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

mod measure;

use zonewright_geometry::Angle;

use super::{MM_PER_INCH, Units};

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
}
