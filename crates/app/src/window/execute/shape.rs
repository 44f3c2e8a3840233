//! The start, the placement, the outside, the unit.

use std::path::Path;

use zonewright_geometry::{Outside, Placement, Shape, Start, Vector, start::FreePath};
use zonewright_shop::text::{self, Units};

use super::path::refusal;
use crate::{
    import::import,
    window::{kinds, state::State},
};

/// How far the chords of an imported curve may be from it, in millimetres: a tenth, as on the command line.
pub(super) const FLATTENING_MM: f64 = 0.1;

/// Changes the kind of start. The steps stay: they say so themselves when they find nothing.
pub(super) fn set_kind(state: &mut State, word: &'static str) {
    if state.shape().start.kind() == word {
        return;
    }
    let kind = kinds::kind(word);
    let start = if word == "zigzag" {
        state
            .shape()
            .start
            .to_free()
            .map_or_else(|_| kind.usual(), Start::Zigzag)
    } else {
        kind.usual()
    };
    state.change(&format!("{} as the start", kind.name), None, |design| {
        design.shape.start = start;
        design.shape.outside = Outside::by_rule(&design.shape);
    });
    state.view.point = None;
    state.panes.start_afresh();
    state.say(format!("The start is a {} now", kind.name.to_lowercase()));
}

/// Replaces the start after a parameter was edited.
pub(super) fn set_start(state: &mut State, start: Start, field: &'static str) {
    state.change(&format!("Change {field}"), Some(format!("start {field}")), |design| {
        design.shape.start = start;
    });
}

/// Turns the start into free points, where it stands.
pub(super) fn free_points(state: &mut State) {
    if matches!(state.shape().start, Start::Zigzag(_)) {
        state.say("The start is free points already");
        return;
    }
    match freed(state.shape()) {
        Ok(shape) => {
            state.change("Turn into free points", None, |design| design.shape = shape);
            state.say("The start is free points now; undo brings its parameters back");
        }
        Err(text) => state.complain(text),
    }
}

/// Makes the path in a file the start, as free points. The steps stay: they say so themselves when they find nothing.
pub(super) fn import_path(state: &mut State, file: &Path) {
    let kept = "The design in the window was kept.";
    let path = match import(file, FLATTENING_MM) {
        Ok(path) => path,
        Err(error) => return state.complain(super::sentence(&format!("{error}. {kept}"))),
    };
    let (count, closed) = (path.points.len(), path.closed);
    let start = match FreePath::from_points(&path.points, closed) {
        Ok(start) => Start::Zigzag(start),
        Err(finding) => {
            let what = format!("{} cannot be the start", file.display());
            return state.complain(format!("{} {kept}", refusal(&what, &finding)));
        }
    };
    state.change("Import a path", None, |design| {
        design.shape.start = start;
        design.shape.outside = Outside::by_rule(&design.shape);
    });
    state.view.point = None;
    state.panes.start_afresh();
    let way = if closed { "a closed" } else { "an open" };
    let within = text::millimetres(FLATTENING_MM, 1);
    state.say(format!(
        "Imported {way} path of {count} points; curves became chords within {within}"
    ));
}

/// The same shape with free points. A kind that is lifted to the ground keeps its place: the lift goes into the origin.
pub(super) fn freed(shape: &Shape) -> Result<Shape, String> {
    let refused = |finding| refusal("The start cannot be turned into free points", &finding);
    let mut freed = shape.to_free().map_err(refused)?;
    let (shell, _) = zonewright_geometry::grow(shape);
    if let Start::Zigzag(path) = &mut freed.start {
        path.origin += Vector::Z * shell.lift_mm;
    }
    Ok(freed)
}

/// Moves, turns, scales or mirrors the shell.
pub(super) fn set_placement(state: &mut State, placement: Placement) {
    let usable = placement.scale.is_finite() && 0.0 < placement.scale;
    if !usable {
        state.say("The scale must be more than 0");
        return;
    }
    state.change("Place the shell", Some("placement".to_owned()), |design| {
        design.shape.placement = placement;
    });
}

/// Sets which side is outside.
pub(super) fn set_outside(state: &mut State, outside: Outside) {
    state.change("Flip the outside", None, |design| design.shape.outside = outside);
}

/// Turns the shell inside out.
pub(super) fn flip_outside(state: &mut State) {
    let other = match state.shape().outside {
        Outside::Grown => Outside::Reversed,
        Outside::Reversed => Outside::Grown,
    };
    set_outside(state, other);
}

/// Sets the unit in which lengths are shown and typed.
pub(super) fn set_units(state: &mut State, units: Units) {
    state.change("Change the unit", None, |design| design.units = units);
    if let Err(error) = state.safe.remember(|session| session.set_units(units)) {
        state.say(format!("{error}; the unit will not be remembered"));
    }
}

/// Millimetres to inches and back.
pub(super) fn swap_units(state: &mut State) {
    let other = match state.units() {
        Units::Mm => Units::Inch,
        Units::Inch => Units::Mm,
    };
    set_units(state, other);
}
