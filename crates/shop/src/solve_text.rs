//! Solving in words: figures, their values, and why there is no solution.

use zonewright_geometry::{
    Code, ParameterKind, ZoneRef,
    solve::{Change, Figure, FigureKind, Headroom, Held, Missed, Needed, Reached, Solution, Unsolved, Why},
};

use crate::text::{Units, count, cubic_metres, square_metres, trimmed};

/// Decimals of an angle in a sentence.
const ANGLE: usize = 2;

/// The plain name of a figure, with the places and distances that belong to it.
#[must_use]
pub fn figure_name(figure: Figure, units: Units) -> String {
    let name = match figure {
        Figure::Span => "Span",
        Figure::SizeX => "Width along x",
        Figure::SizeY => "Width along y",
        Figure::Height => "Height",
        Figure::Headroom(at) => return headroom_name(at, units),
        Figure::FootprintArea => "Footprint area",
        Figure::FootprintLength => "Footprint length",
        Figure::FootprintWidth => "Footprint width",
        Figure::Area => "Area",
        Figure::Volume => "Volume",
        Figure::LongestEdge => "Longest edge",
        Figure::ShortestEdge => "Shortest edge",
        Figure::Edge(zone) => return format!("Edge of {}", zone_name(zone)),
        Figure::LeastAngle => "Smallest acute angle",
        Figure::MostAngle => "Largest acute angle",
        Figure::ClosingGap => "Closing gap",
    };
    name.to_owned()
}

/// A zone in words; zones are counted from 1.
#[must_use]
pub fn zone_name(zone: ZoneRef) -> String {
    match zone {
        ZoneRef::Start(id) => format!("zone {}", count(id as usize + 1)),
        ZoneRef::Spliced(step, k) => format!("zone {} of step {}", count(k as usize + 1), count(step.0 as usize)),
    }
}

fn headroom_name(at: Headroom, units: Units) -> String {
    let from = at.from.map_or_else(
        || "the middle".to_owned(),
        |[x, y]| format!("x {}, y {}", units.length(x), units.length(y)),
    );
    let mut name = if at.distance_mm == 0.0 {
        format!("Headroom at {from}")
    } else {
        format!("Headroom {} from {from}", units.length(at.distance_mm))
    };
    if let Some(azimuth) = at.azimuth {
        name.push_str(" towards ");
        name.push_str(&angle(azimuth.degrees()));
    }
    name
}

/// The value of a figure, its unit written.
#[must_use]
pub fn figure_value(figure: Figure, value: f64, units: Units) -> String {
    match figure.kind() {
        FigureKind::Length => units.length(value),
        FigureKind::Angle => angle(value),
        FigureKind::Area => square_metres(value),
        FigureKind::Volume => cubic_metres(value),
    }
}

/// The value of a parameter, its unit written.
#[must_use]
pub fn parameter_value(kind: ParameterKind, value: f64, units: Units) -> String {
    match kind {
        ParameterKind::Length => units.length(value),
        ParameterKind::Angle => angle(value),
        ParameterKind::Factor => trimmed(value, 4),
        ParameterKind::Count => trimmed(value, 0),
    }
}

fn angle(value: f64) -> String {
    format!("{}\u{b0}", trimmed(value, ANGLE))
}

/// A parameter of a solution: from what to what.
#[must_use]
pub fn change_line(change: &Change, units: Units) -> String {
    let [before, after] = [change.before, change.after].map(|v| parameter_value(change.kind, v, units));
    if change.before == change.after {
        format!("{}: stays {after}", change.name)
    } else {
        format!("{}: {before} \u{2192} {after}", change.name)
    }
}

/// A figure of a solution: from what to what.
#[must_use]
pub fn reached_line(reached: &Reached, units: Units) -> String {
    let name = figure_name(reached.figure, units);
    let after = figure_value(reached.figure, reached.after, units);
    match reached.before {
        Some(before) => {
            let before = figure_value(reached.figure, before, units);
            format!("{name}: {before} \u{2192} {after}")
        }
        None => format!("{name}: {after}"),
    }
}

/// Why there is no solution: what is missed and by how much, what holds it, and what to do.
#[must_use]
pub fn unsolved_text(unsolved: &Unsolved, units: Units) -> String {
    match &unsolved.why {
        Why::NothingWanted => "No figure is wanted. Add one and give its value.".to_owned(),
        Why::NothingFree => "Nothing may change. Choose the parameters that may.".to_owned(),
        Why::NoNumber(figure) => format!(
            "{}: the wanted value is no number, or its tolerance is not more than 0. Give both.",
            figure_name(*figure, units)
        ),
        Why::NoSuchParameter(key) => {
            format!("The design has no parameter `{key}`. Choose one of those that are listed for it.")
        }
        Why::EmptyBounds(key) => {
            format!("The bounds of `{key}` leave no value that it can have. Give a least value below the greatest.")
        }
        Why::NotGrown(code) => not_grown(*code),
        Why::NoFigure(figure) => format!(
            "{} has no value on this shell, nor on any that was tried. {}",
            figure_name(*figure, units),
            no_figure_remedy(*figure)
        ),
        Why::Independent(figure) => format!(
            "{} does not depend on anything that may change. Let another parameter change.",
            figure_name(*figure, units)
        ),
        Why::Missed {
            missed,
            held,
            needed,
            exhausted,
        } => match &unsolved.nearest {
            Some(nearest) => missed_text(nearest, missed, held, needed, *exhausted, units),
            None => "Nothing was reached.".to_owned(),
        },
        Why::Stopped => "The search was stopped.".to_owned(),
    }
}

fn not_grown(code: Code) -> String {
    let text = code.text();
    format!(
        "The design as it is does not grow: {}. {}",
        lower(text.what),
        text.remedy
    )
}

const fn no_figure_remedy(figure: Figure) -> &'static str {
    match figure {
        Figure::Volume => "Only a closed shell has one.",
        Figure::Headroom(_) => "Nothing is overhead there; measure nearer to the middle.",
        Figure::FootprintArea | Figure::FootprintLength | Figure::FootprintWidth => "Only a shell with a rim has one.",
        Figure::ClosingGap => "Only a front that is meant to close has one.",
        Figure::Edge(_) => "Choose another zone.",
        _ => "Choose another figure.",
    }
}

fn missed_text(
    nearest: &Solution,
    missed: &[Missed],
    held: &[Held],
    needed: &[Needed],
    exhausted: bool,
    units: Units,
) -> String {
    let mut text = String::new();
    for miss in missed {
        let Some(one) = nearest.figures.get(miss.want) else {
            continue;
        };
        let value = |v| figure_value(one.figure, v, units);
        let side = if miss.by < 0.0 { "short of" } else { "beyond" };
        text.push_str(&format!(
            "{} comes to {}, {} {side} {}. ",
            figure_name(one.figure, units),
            value(one.after),
            value(miss.by.abs()),
            value(one.wanted)
        ));
    }
    for hold in held {
        let Some(change) = nearest.changes.get(hold.parameter) else {
            continue;
        };
        let value = |v| parameter_value(change.kind, v, units);
        let (bound, side) = if hold.upper {
            ("greatest", "above")
        } else {
            ("least", "below")
        };
        let name = &change.name;
        match needed.iter().find(|n| n.parameter == hold.parameter) {
            Some(need) => text.push_str(&format!(
                "It needs {name} {side} {}: {} would do. ",
                value(hold.bound),
                value(need.value)
            )),
            None => text.push_str(&format!("{name} is at its {bound}, {}. ", value(hold.bound))),
        }
    }
    text.push_str(match (held.is_empty(), needed.is_empty(), exhausted) {
        (_, _, true) => {
            "The search ended before everything was tried: let fewer parameters change, or narrow their bounds."
        }
        (_, false, _) => "Widen the bounds, or take the nearest.",
        (false, true, _) => "Let another parameter change, or take the nearest.",
        (true, ..) if missed.len() > 1 => "What may change cannot meet them together: want less, or let more change.",
        (true, ..) => "Nothing that may change brings it nearer: let another parameter change, or take the nearest.",
    });
    text
}

fn lower(text: &str) -> String {
    let mut letters = text.chars();
    let first = letters.next().into_iter().flat_map(char::to_lowercase);
    first.chain(letters).collect()
}

#[cfg(test)]
mod tests {
    use zonewright_geometry::{
        Act, Angle, Courses, Outside, Placement, Shape, Side, Spurs, Start, Step, StepId, Tolerances,
        solve::{Effort, Free, Want, solve},
        start::{PolarBy, PolarForm},
    };

    use super::*;

    fn dome() -> Shape {
        let by = PolarBy::PitchEdge {
            pitch: Angle::from_degrees(40.0),
            edge_mm: 500.0,
        };
        let act = Act::Lay {
            courses: Courses::UntilStill,
            spurs: Spurs::Retract,
        };
        Shape {
            start: Start::Polar(PolarForm { ribs: 8, by }),
            zones: Vec::new(),
            steps: vec![Step {
                id: StepId(1),
                name: None,
                on: true,
                side: Side::Fore,
                act,
            }],
            finish: Vec::new(),
            placement: Placement::default(),
            outside: Outside::Grown,
            tolerances: Tolerances::default(),
        }
    }

    fn said(figure: Figure, value: f64, free: &Free) -> String {
        let want = Want {
            figure,
            value,
            tolerance: figure.usual_tolerance(),
        };
        let free = core::slice::from_ref(free);
        let failed = solve(&dome(), &[want], free, Effort::default(), &mut || false).unwrap_err();
        unsolved_text(&failed, Units::Mm)
    }

    /// 8 edges of 500 mm at 50 degrees rise 4000 sin 50 = 3064.2 mm; 3500 mm needs asin(7 / 8) = 61.04 degrees.
    #[test]
    fn a_bound_that_holds_is_named_with_what_is_needed() {
        let pitch = Free {
            key: "start.pitch".to_owned(),
            bounds: [None, Some(50.0)],
        };
        let text = "Height comes to 3064.2 mm, 435.8 mm short of 3500 mm. It needs Pitch above 50\u{b0}: 61.04\u{b0} would do. \
                    Widen the bounds, or take the nearest.";
        assert_eq!(said(Figure::Height, 3500.0, &pitch), text);
    }

    #[test]
    fn a_limit_of_the_parameter_itself_is_named() {
        let text = said(Figure::Height, 4500.0, &Free::new("start.pitch"));
        assert!(
            text.starts_with("Height comes to 4000 mm, 500 mm short of 4500 mm. Pitch is at its greatest, "),
            "{text}"
        );
    }

    #[test]
    fn what_has_no_effect_is_named() {
        let text = said(Figure::LongestEdge, 600.0, &Free::new("start.pitch"));
        let expected = "Longest edge does not depend on anything that may change. Let another parameter change.";
        assert_eq!(text, expected);
    }

    #[test]
    fn headroom_says_where() {
        let at = Headroom {
            distance_mm: 1000.0,
            from: None,
            azimuth: None,
        };
        let name = |at| figure_name(Figure::Headroom(at), Units::Mm);
        assert_eq!(name(at), "Headroom 1000 mm from the middle");
        let at = Headroom {
            distance_mm: 0.0,
            from: Some([500.0, -20.5]),
            azimuth: None,
        };
        assert_eq!(name(at), "Headroom at x 500 mm, y -20.5 mm");
        let at = Headroom {
            distance_mm: 40.0,
            from: None,
            azimuth: Some(Angle::from_degrees(45.0)),
        };
        assert_eq!(name(at), "Headroom 40 mm from the middle towards 45\u{b0}");
    }
}
