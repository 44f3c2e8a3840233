//! Values of the command line's options.

use zonewright_geometry::{Angle, Point, parameter::ParameterKind};
use zonewright_painter::View;
use zonewright_shop::text::{ParseError, Units, parse_angle, parse_length};

use super::refusal::uncapitalised;

/// A length in millimetres; another unit may be written.
pub(super) fn length(text: &str) -> Result<f64, String> {
    parse_length(text, Units::Mm).map_err(|error| explained(&error))
}

/// An angle in degrees.
pub(super) fn angle(text: &str) -> Result<Angle, String> {
    parse_angle(text).map_err(|error| explained(&error))
}

/// A parser's error as the rest of a sentence.
fn explained(error: &ParseError) -> String {
    let remedy = uncapitalised(error.remedy.trim_end_matches('.'));
    format!("{} at column {}; {remedy}", uncapitalised(&error.what), error.at + 1)
}

/// How many of something. Numbers far beyond every limit are let through, so that the limit can be named.
pub(super) fn count(text: &str) -> Result<u32, String> {
    let value: f64 = text.trim().parse().map_err(|_| "give a whole number".to_owned())?;
    if value.is_nan() || value < 0.0 || value.fract() != 0.0 || value > f64::from(u32::MAX) {
        return Err(format!("give a whole number from 0 to {}", u32::MAX));
    }
    #[expect(
        clippy::cast_possible_truncation,
        clippy::cast_sign_loss,
        reason = "just seen to be a whole number within the range"
    )]
    Ok(value as u32)
}

/// A plain number, such as how many waves.
pub(super) fn number(text: &str) -> Result<f64, String> {
    let value: f64 = text.trim().parse().map_err(|_| format!("`{text}` is no number"))?;
    if value.is_finite() {
        Ok(value)
    } else {
        Err(format!("`{text}` is not finite"))
    }
}

/// Points: `0,0,0 300,0,200 ...`. Where lengths are written with spaces in them, `;` separates the points.
pub(super) fn points(text: &str) -> Result<Vec<Point>, String> {
    let words: Vec<&str> = if text.contains(';') {
        text.split(';').map(str::trim).filter(|w| !w.is_empty()).collect()
    } else {
        text.split_whitespace().collect()
    };
    words.into_iter().map(point).collect()
}

/// A point or a vector: `x,y,z`, or `x,y` with z = 0.
pub(super) fn point(word: &str) -> Result<Point, String> {
    let parts: Vec<&str> = word.split(',').collect();
    if !(2..=3).contains(&parts.len()) {
        return Err(format!("`{word}` is no point; write x,y,z"));
    }
    let mut at = [0.0; 3];
    for (slot, part) in at.iter_mut().zip(parts) {
        *slot = length(part).map_err(|what| format!("in the point `{word}`: {what}"))?;
    }
    Ok(Point::new(at[0], at[1], at[2]))
}

/// A picture's size: `1200x800`.
pub(super) fn size(text: &str) -> Result<[u32; 2], String> {
    // Larger pictures would not fit into the memory of a small machine.
    const LIMIT: u32 = 16_384;
    let wrong = || format!("write width x height in pixels, each from 16 to {LIMIT}, as in 1200x800");
    let (w, h) = text.split_once(['x', 'X']).ok_or_else(wrong)?;
    let read = |s: &str| s.trim().parse().ok().filter(|n: &u32| (16..=LIMIT).contains(n));
    match (read(w), read(h)) {
        (Some(w), Some(h)) => Ok([w, h]),
        _ => Err(wrong()),
    }
}

/// A point moved: `3:0,0,50` moves node 3 by 50 mm up.
pub(super) fn moved(text: &str) -> Result<(u32, zonewright_geometry::Vector), String> {
    let (node, by) = text
        .split_once(':')
        .ok_or_else(|| format!("`{text}` moves no point; write NODE:x,y,z, as in 3:0,0,50"))?;
    Ok((count(node)?, point(by)?.0))
}

/// A named view.
pub(super) fn view(name: &str) -> Result<View, String> {
    View::parse(name).ok_or_else(|| {
        let names = View::ALL.map(View::name).join(", ");
        format!("there is no view `{name}`; there are {names}")
    })
}

/// A parameter that runs between two values: `start.pitch=20..50`. The values are read when the parameter's kind is known.
pub(super) fn sweep(text: &str) -> Result<[String; 3], String> {
    let wrong = || "write KEY=FROM..TO, as in start.pitch=20..50".to_owned();
    let (key, range) = text.split_once('=').ok_or_else(wrong)?;
    let (from, to) = range.split_once("..").ok_or_else(wrong)?;
    let parts = [key, from, to].map(|part| part.trim().to_owned());
    if parts.iter().any(String::is_empty) {
        return Err(wrong());
    }
    Ok(parts)
}

/// A value of a parameter: a length, an angle, or a plain number.
pub(super) fn of_kind(kind: ParameterKind, text: &str) -> Result<f64, String> {
    match kind {
        ParameterKind::Length => length(text),
        ParameterKind::Angle => angle(text).map(Angle::degrees),
        ParameterKind::Factor | ParameterKind::Count => number(text),
    }
}
