//! Picking, and measuring from one picked thing to another.

use crate::window::{
    selection::{Dimension, SelectAct},
    state::State,
    thing::{Kind, Thing},
};

/// Carries out what is done about picked things.
pub(super) fn run(state: &mut State, act: SelectAct) {
    match act {
        SelectAct::Pick(thing) => {
            let again = picked(state).is_some_and(|now| same(state, &now, &thing));
            let again = again && state.view.selection.from.is_none();
            take(state, (!again).then_some(thing));
        }
        SelectAct::MeasureTo(thing) => measure_to(state, thing),
        SelectAct::Measure => measure(state),
        SelectAct::Step(kind, back) => step(state, kind, back),
        SelectAct::Dismiss(at) => {
            let dimensions = &mut state.view.selection.dimensions;
            if at < dimensions.len() {
                dimensions.remove(at);
            }
        }
        SelectAct::DismissAll => state.view.selection.dimensions.clear(),
    }
}

/// Picks a thing; while a measure has been begun, measures to it instead.
pub(super) fn take(state: &mut State, thing: Option<Thing>) {
    match thing {
        Some(thing) if state.view.selection.from.is_some() => measure_to(state, thing),
        thing => pick(state, thing),
    }
}

/// Whether two things are one: a vertex may be held by one or another of its panels.
fn same(state: &State, a: &Thing, b: &Thing) -> bool {
    a.kind() == b.kind() && a.index(&state.derived) == b.index(&state.derived)
}

/// What is picked, of whatever kind.
pub(crate) fn picked(state: &State) -> Option<Thing> {
    let view = &state.view;
    let panel = || {
        let (panel, _) = view.panel.as_ref()?;
        Kind::Panel.thing(&state.derived, *panel)
    };
    view.point
        .map(Thing::Point)
        .or_else(|| view.selection.part.clone())
        .or_else(panel)
}

/// Picks a thing and nothing else.
pub(super) fn pick(state: &mut State, thing: Option<Thing>) {
    let index = thing.as_ref().and_then(|t| t.index(&state.derived));
    let view = &mut state.view;
    (view.point, view.panel, view.selection.part) = (None, None, None);
    match (thing, index) {
        (Some(Thing::Point(at)), Some(_)) => view.point = Some(at),
        (Some(Thing::Panel(_)), Some(panel)) => view.panel = Some((panel, state.derived.shell.panel_name(panel))),
        (Some(part), Some(_)) => view.selection.part = Some(part),
        _ => {}
    }
}

/// Begins to measure from what is picked; when that has been begun, measures to what is picked now.
fn measure(state: &mut State) {
    let picked = picked(state);
    let from = state.view.selection.from.as_ref();
    let begun = from
        .zip(picked.as_ref())
        .is_some_and(|(from, now)| !same(state, from, now));
    match picked {
        Some(thing) if begun => measure_to(state, thing),
        Some(thing) => {
            state.say(format!(
                "Measuring from {}: pick what to measure to",
                thing.title(&state.derived)
            ));
            state.view.selection.from = Some(thing);
        }
        None => state.say("Pick what to measure from first"),
    }
}

fn measure_to(state: &mut State, to: Thing) {
    let from = state.view.selection.from.take().or_else(|| picked(state));
    let Some(from) = from else {
        return pick(state, Some(to));
    };
    if same(state, &from, &to) {
        pick(state, Some(from));
        return state.say("Pick something else to measure to");
    }
    // What it was measured from stays picked: the next one can be measured from there too.
    pick(state, Some(from.clone()));
    let ends = [from, to];
    let [a, b] = ends.each_ref().map(|t| t.title(&state.derived));
    let alike = |d: &Dimension| {
        [[0, 1], [1, 0]]
            .iter()
            .any(|[k, l]| same(state, &d.ends[*k], &ends[0]) && same(state, &d.ends[*l], &ends[1]))
    };
    if state.view.selection.dimensions.iter().any(alike) {
        return state.say("That is measured already");
    }
    state.view.selection.dimensions.push(Dimension { ends });
    state.say(format!("Measured from {a} to {b}"));
}

fn step(state: &mut State, kind: Kind, back: bool) {
    let Ok(count) = u32::try_from(kind.count(&state.derived)) else {
        return;
    };
    if count == 0 {
        return state.say("There is nothing of that kind to pick");
    }
    let now = picked(state).filter(|t| t.kind() == kind);
    let now = now.and_then(|t| t.index(&state.derived));
    let next = match (now, back) {
        (None, false) => 0,
        (None, true) => count - 1,
        (Some(now), false) => (now + 1) % count,
        (Some(now), true) => (now + count - 1) % count,
    };
    let thing = kind.thing(&state.derived, next);
    if let Some(thing) = &thing {
        state.say(format!("{} of {count}", thing.title(&state.derived)));
    }
    pick(state, thing);
}
