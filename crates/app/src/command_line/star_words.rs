//! Words for stars and for the letters of a star path.

use zonewright_geometry::{
    Sign,
    start::{AxisClass, Star, StarLength, StarLetter},
};

use super::values::{count, length};

/// What `--star` takes, for the help.
pub(super) const STAR_HELP: &str = "Which axes. Of the icosahedron: 6 (5-fold), 10 (3-fold), 15 (2-fold), 31 (all), or sums as 6+10, 6+15, 10+15. \
    Of the cube, with c before: c3 (4-fold), c4 (3-fold), c6 (2-fold), c13 (all), or sums as c3+4, c3+6, c4+6; 3, 4 and 13 need no c. \
    Prismatic: p and the number of horizontal axes, as p5; the vertical one comes with them";

/// Reads a star.
pub(super) fn star(text: &str) -> Result<Star, String> {
    let word = text.trim().to_lowercase();
    if let Some(axes) = word.strip_prefix('p') {
        return count(axes).map(Star::Prismatic).map_err(|_| unknown(text));
    }
    let (cube, classes) = match word.strip_prefix('c') {
        Some(rest) => (true, rest),
        None => (matches!(word.as_str(), "3" | "4" | "13"), word.as_str()),
    };
    let mut found = Vec::new();
    for class in classes.split('+') {
        let named: &[AxisClass] = match (cube, class.trim().trim_start_matches('c')) {
            (false, "6") => &[AxisClass::FiveFold],
            (false, "10") => &[AxisClass::ThreeFold],
            (false, "15") => &[AxisClass::TwoFold],
            (false, "31") => &[AxisClass::FiveFold, AxisClass::ThreeFold, AxisClass::TwoFold],
            (true, "3") => &[AxisClass::FourFold],
            (true, "4") => &[AxisClass::ThreeFold],
            (true, "6") => &[AxisClass::TwoFold],
            (true, "13") => &[AxisClass::FourFold, AxisClass::ThreeFold, AxisClass::TwoFold],
            _ => return Err(unknown(text)),
        };
        found.extend_from_slice(named);
    }
    found.sort_unstable();
    let before = found.len();
    found.dedup();
    if found.len() < before {
        return Err(format!("the star `{text}` names axes twice; name each once"));
    }
    Ok(if cube {
        Star::Cubic(found)
    } else {
        Star::Icosahedral(found)
    })
}

fn unknown(text: &str) -> String {
    format!("there is no star `{text}`; write 6, 10, 15, 31, 6+10, c3, c4, c6, c13, c3+4, p5 or the like")
}

/// Reads the letters of a star path: `+0 -3^1 +5=250mm`.
pub(super) fn letters(text: &str) -> Result<Vec<StarLetter>, String> {
    let words = if text.contains(';') {
        text.split(';').collect::<Vec<_>>()
    } else {
        text.split_whitespace().collect()
    };
    words
        .into_iter()
        .map(str::trim)
        .filter(|w| !w.is_empty())
        .map(letter)
        .collect()
}

fn letter(word: &str) -> Result<StarLetter, String> {
    let wrong = || {
        format!(
            "`{word}` is no letter; write a sign and an axis, then ^ and a golden step or = and a length, as in +0, -3^1, +5=250mm"
        )
    };
    let (sign, rest) = match word.split_at_checked(1) {
        Some(("+", rest)) => (Sign::Plus, rest),
        Some(("-", rest)) => (Sign::Minus, rest),
        _ => return Err(wrong()),
    };
    let digits = rest.find(|c: char| !c.is_ascii_digit()).unwrap_or(rest.len());
    let (axis, behind) = rest.split_at(digits);
    let axis = axis.parse().map_err(|_| wrong())?;
    let length = match behind.split_at_checked(1) {
        None => StarLength::Golden(0),
        Some(("^", power)) => StarLength::Golden(power.parse().map_err(|_| wrong())?),
        Some(("=", mm)) => StarLength::Mm(length(mm).map_err(|what| format!("in `{word}`: {what}"))?),
        Some(_) => return Err(wrong()),
    };
    Ok(StarLetter { axis, sign, length })
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn stars_of_the_same_number_are_told_apart() {
        assert_eq!(star("6"), Ok(Star::Icosahedral(vec![AxisClass::FiveFold])));
        assert_eq!(star("c6"), Ok(Star::Cubic(vec![AxisClass::TwoFold])));
        assert_eq!(star("3"), star("c3"));
        assert_eq!(
            star("c3+6"),
            Ok(Star::Cubic(vec![AxisClass::FourFold, AxisClass::TwoFold]))
        );
        assert_eq!(
            star("15+6"),
            Ok(Star::Icosahedral(vec![AxisClass::FiveFold, AxisClass::TwoFold]))
        );
        assert_eq!(star("p7"), Ok(Star::Prismatic(7)));
        for wrong in ["", "7", "6+6", "31+6", "c10", "3+6", "p", "p-1", "6+"] {
            assert!(star(wrong).is_err(), "{wrong}");
        }
    }

    #[test]
    fn letters_have_sign_axis_and_length() {
        let read = letters("+0 -3^-1 +12=1in").unwrap();
        let lengths = [StarLength::Golden(0), StarLength::Golden(-1), StarLength::Mm(25.4)];
        assert_eq!(read.iter().map(|l| l.length).collect::<Vec<_>>(), lengths);
        assert_eq!(
            read.iter().map(|l| (l.axis, l.sign)).collect::<Vec<_>>(),
            [(0, Sign::Plus), (3, Sign::Minus), (12, Sign::Plus)]
        );
        for wrong in ["0", "+", "+x", "+1^", "+1^1.5", "+1=", "+1*2", "é1"] {
            assert!(letters(wrong).is_err(), "{wrong}");
        }
    }
}
