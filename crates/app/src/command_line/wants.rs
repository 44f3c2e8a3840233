//! The words of `solve`: figures that are wanted, parameters that may change.

use zonewright_geometry::{
    Angle, ParameterKind, Shape, StepId, ZoneRef,
    parameter::parameter,
    solve::{Figure, FigureKind, Free, Headroom, Want},
};

use super::values;

/// Figures that need nothing but their word.
const PLAIN: [(&str, Figure); 13] = [
    ("span", Figure::Span),
    ("width-x", Figure::SizeX),
    ("width-y", Figure::SizeY),
    ("height", Figure::Height),
    ("footprint-area", Figure::FootprintArea),
    ("footprint-length", Figure::FootprintLength),
    ("footprint-width", Figure::FootprintWidth),
    ("area", Figure::Area),
    ("volume", Figure::Volume),
    ("longest-edge", Figure::LongestEdge),
    ("shortest-edge", Figure::ShortestEdge),
    ("smallest-angle", Figure::LeastAngle),
    ("largest-angle", Figure::MostAngle),
];

/// What is wanted: `height=3.2m`, `headroom@1m=2.1m`, with `~` and a tolerance behind it or not.
pub(super) fn want(text: &str) -> Result<Want, String> {
    let (figure, rest) = text
        .split_once('=')
        .ok_or_else(|| format!("`{text}` wants nothing; write FIGURE=VALUE, as in height=3.2m"))?;
    let figure = self::figure(figure.trim())?;
    let (value_text, tolerance) = rest.split_once('~').map_or((rest, None), |(v, t)| (v, Some(t)));
    let tolerance = match tolerance {
        Some(text) => value(figure.kind(), text)?,
        None => figure.usual_tolerance(),
    };
    if tolerance <= 0.0 {
        return Err(format!("`{text}`: the tolerance behind ~ must be more than 0"));
    }
    Ok(Want {
        figure,
        value: value(figure.kind(), value_text)?,
        tolerance,
    })
}

fn figure(word: &str) -> Result<Figure, String> {
    let mut parts = word.split('@');
    let name = parts.next().unwrap_or_default();
    let places: Vec<&str> = parts.collect();
    match name {
        "headroom" => headroom(&places).map(Figure::Headroom),
        "edge" => match places.as_slice() {
            [zone] => self::zone(zone).map(Figure::Edge),
            _ => Err("an edge is named by its zone: edge@start.2, or edge@step.3.0".to_owned()),
        },
        "closing-gap" if places.is_empty() => Ok(Figure::ClosingGap),
        _ => match PLAIN.iter().find(|p| p.0 == name) {
            Some(found) if places.is_empty() => Ok(found.1),
            _ => {
                let words: Vec<&str> = PLAIN.iter().map(|p| p.0).collect();
                let words = words.join(", ");
                Err(format!(
                    "`{word}` is no figure; there are {words}, closing-gap, edge@ZONE and headroom@DISTANCE"
                ))
            }
        },
    }
}

/// `headroom@1m`, `headroom@1m@x,y`, and with `@45deg` in one direction.
fn headroom(places: &[&str]) -> Result<Headroom, String> {
    let mut at = Headroom::default();
    let mut distance = None;
    for place in places {
        if let Some(angle) = place.strip_suffix("deg").or_else(|| place.strip_suffix('\u{b0}')) {
            at.azimuth = Some(Angle::from_degrees(values::number(angle)?));
        } else if let Some((x, y)) = place.split_once(',') {
            at.from = Some([values::length(x)?, values::length(y)?]);
        } else {
            distance = Some(values::length(place)?);
        }
    }
    at.distance_mm = distance.unwrap_or(0.0);
    if at.distance_mm < 0.0 {
        return Err("headroom is measured at a distance of 0 or more".to_owned());
    }
    Ok(at)
}

fn zone(text: &str) -> Result<ZoneRef, String> {
    let wrong = || format!("`{text}` is no zone; write start.2, or step.3.0 for the first direction of step 3");
    let number = |t: &str| t.parse::<u32>().map_err(|_| wrong());
    match *text.split('.').collect::<Vec<_>>() {
        ["start", id] => Ok(ZoneRef::Start(number(id)?)),
        ["step", step, k] => Ok(ZoneRef::Spliced(StepId(number(step)?), number(k)?)),
        _ => Err(wrong()),
    }
}

/// A value in the unit of its kind; areas in m2 and volumes in m3 unless mm2 or mm3 is written.
fn value(kind: FigureKind, text: &str) -> Result<f64, String> {
    let text = text.trim();
    let scaled = |names: [&str; 2], factor: f64, small: &str| {
        if let Some(rest) = text.strip_suffix(small) {
            return values::number(rest);
        }
        let rest = names.iter().find_map(|n| text.strip_suffix(n)).unwrap_or(text);
        values::number(rest).map(|v| v * factor)
    };
    match kind {
        FigureKind::Length => values::length(text),
        FigureKind::Angle => values::angle(text.trim_end_matches("deg")).map(Angle::degrees),
        FigureKind::Area => scaled(["m2", "m\u{b2}"], 1e6, "mm2"),
        FigureKind::Volume => scaled(["m3", "m\u{b3}"], 1e9, "mm3"),
    }
}

/// Parameters that may change: `start.pitch`, or with bounds `start.pitch:20..50`; either bound may be left out.
pub(super) fn free(shape: &Shape, text: &str) -> Result<Free, String> {
    let (key, bounds) = text.split_once(':').map_or((text, None), |(k, b)| (k, Some(b)));
    let key = key.trim();
    let Some(parameter) = parameter(shape, key) else {
        return Err(format!(
            "the design has no parameter `{key}`; `zonewright parameters FILE` lists them"
        ));
    };
    let mut free = Free::new(key);
    if let Some(bounds) = bounds {
        let (least, most) = bounds
            .split_once("..")
            .ok_or_else(|| format!("`{bounds}` are no bounds; write LEAST..GREATEST, as in {key}:20..50"))?;
        for (slot, text) in free.bounds.iter_mut().zip([least, most]) {
            if !text.trim().is_empty() {
                *slot = Some(parameter_value(parameter.kind, text)?);
            }
        }
    }
    Ok(free)
}

fn parameter_value(kind: ParameterKind, text: &str) -> Result<f64, String> {
    match kind {
        ParameterKind::Length => values::length(text),
        ParameterKind::Angle => values::angle(text).map(Angle::degrees),
        ParameterKind::Factor | ParameterKind::Count => values::number(text),
    }
}
