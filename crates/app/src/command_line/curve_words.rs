//! Words for the curves of a translation surface: `arc span=3000 rise=600 parts=8`.

use zonewright_geometry::{
    Angle,
    start::{Curve, CurveShape},
};

use super::values::{angle, count, length, number, points};

/// What `--zig` and `--zag` take, for the help.
pub(super) const CURVE_HELP: &str = "A curve: a word and its measures. line run= rise=; arc span= rise=; catenary span= rise= (a negative rise hangs); \
    sine length= amplitude= waves=; helix radius= turn= rise=; each with parts= and perhaps azimuth= (degrees in plan from x). \
    Or free points: free 0,0,0 300,0,200 ...";

/// Reads a curve.
pub(super) fn curve(text: &str) -> Result<Curve, String> {
    let (word, rest) = text.trim().split_once(char::is_whitespace).unwrap_or((text.trim(), ""));
    if word == "free" {
        return Ok(Curve {
            shape: CurveShape::Free(points(rest)?),
            parts: 0,
            azimuth: Angle::default(),
        });
    }
    let mut given = measures(rest)?;
    let shape = match word {
        "line" => CurveShape::Line {
            run_mm: take(&mut given, "run", length)?,
            rise_mm: take_or(&mut given, "rise", 0.0, length)?,
        },
        "arc" => CurveShape::Arc {
            span_mm: take(&mut given, "span", length)?,
            rise_mm: take(&mut given, "rise", length)?,
        },
        "catenary" => CurveShape::Catenary {
            span_mm: take(&mut given, "span", length)?,
            rise_mm: take(&mut given, "rise", length)?,
        },
        "sine" => CurveShape::Sine {
            length_mm: take(&mut given, "length", length)?,
            amplitude_mm: take(&mut given, "amplitude", length)?,
            waves: take_or(&mut given, "waves", 1.0, number)?,
        },
        "helix" => CurveShape::Helix {
            radius_mm: take(&mut given, "radius", length)?,
            turn: take(&mut given, "turn", angle)?,
            rise_mm: take(&mut given, "rise", length)?,
        },
        other => {
            return Err(format!(
                "there is no curve `{other}`; write line, arc, catenary, sine, helix or free"
            ));
        }
    };
    let curve = Curve {
        shape,
        parts: take(&mut given, "parts", count)?,
        azimuth: take_or(&mut given, "azimuth", Angle::default(), angle)?,
    };
    match given.first() {
        Some((key, _)) => Err(format!(
            "the curve `{word}` has no measure `{key}`, or it is given twice; see --help"
        )),
        None => Ok(curve),
    }
}

/// Splits `span=3000 rise=11 3/4in` into names and texts; words without `=` belong to the measure before.
fn measures(text: &str) -> Result<Vec<(String, String)>, String> {
    let mut found: Vec<(String, String)> = Vec::new();
    for word in text.split_whitespace() {
        match (word.split_once('='), found.last_mut()) {
            (Some((key, value)), _) => found.push((key.to_owned(), value.to_owned())),
            (None, Some((_, value))) => {
                value.push(' ');
                value.push_str(word);
            }
            (None, None) => return Err(format!("`{word}` has no name; write name=value, as in span=3000")),
        }
    }
    Ok(found)
}

type Read<T> = fn(&str) -> Result<T, String>;

fn take<T>(given: &mut Vec<(String, String)>, key: &str, read: Read<T>) -> Result<T, String> {
    let at = given.iter().position(|(k, _)| k == key);
    let at = at.ok_or_else(|| format!("the curve needs `{key}=`"))?;
    let (_, text) = given.remove(at);
    read(&text).map_err(|what| format!("{key}={text}: {what}"))
}

fn take_or<T>(given: &mut Vec<(String, String)>, key: &str, otherwise: T, read: Read<T>) -> Result<T, String> {
    if given.iter().any(|(k, _)| k == key) {
        take(given, key, read)
    } else {
        Ok(otherwise)
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn measures_may_have_units_and_spaces() {
        let read = curve("arc span=3m rise=11 3/4in parts=8 azimuth=90").unwrap();
        let shape = CurveShape::Arc {
            span_mm: 3000.0,
            rise_mm: 11.75 * 25.4,
        };
        assert_eq!(
            read,
            Curve {
                shape,
                parts: 8,
                azimuth: Angle::from_degrees(90.0)
            }
        );
        assert!(matches!(curve("free 0,0,0 1,2,3").unwrap().shape, CurveShape::Free(p) if p.len() == 2));
    }

    #[test]
    fn what_is_missing_unknown_or_twice_is_named() {
        let error = |text: &str| curve(text).unwrap_err();
        assert!(error("arc span=1 parts=2").contains("`rise=`"));
        assert!(error("arc span=1 rise=1 parts=2 wave=3").contains("`wave`"));
        assert!(error("arc span=1 rise=1 parts=2 parts=3").contains("`parts`"));
        assert!(error("bow span=1").contains("`bow`"));
        assert!(error("line 5").contains("`5`"));
        assert!(error("line run=x parts=1").starts_with("run=x"));
    }
}
