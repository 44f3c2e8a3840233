//! What the strip says about Vs and letters.

use zonewright_geometry::{
    Maker, OpenV, Role, Side,
    ahead::{PanelAhead, panels_of_splice, spurs_of_splice},
};
use zonewright_shop::text;

use super::choice::{Reached, all_turn, clicked, directions_at, reached};
use crate::window::{panels::zone_name, state::State};

/// How an open V is called.
#[must_use]
pub(super) fn v_name(state: &State, side: Side, at: usize) -> String {
    let held = state.derived.strip_on(side).held.get(at).copied().unwrap_or(false);
    let what = if held { "Held spur" } else { "Open V" };
    format!("{what} {}", at + 1)
}

fn panel(state: &State, panel: &PanelAhead) -> String {
    let sides = state.units().sides(panel.sides_mm);
    format!("{sides}, {}", text::degrees(panel.acute.degrees(), 2))
}

/// What filling an open V makes.
#[must_use]
pub(super) fn filled(state: &State, side: Side, at: usize) -> String {
    let Some(v) = state.derived.open_on(side).get(at) else {
        return String::new();
    };
    match PanelAhead::of_v(v) {
        Some(ahead) => format!("{}, {}", panel(state, &ahead), text::square_metres(ahead.area_mm2)),
        None if state.derived.strip_on(side).held[at] => "runs out and back, makes no panel".to_owned(),
        None => "parallel edges, makes no panel".to_owned(),
    }
}

/// What splicing the directions in hand at an open V adds: how many panels the next course makes there, and their sizes.
#[must_use]
pub(super) fn spliced(state: &State, side: Side, at: usize) -> String {
    let Some(v) = state.derived.open_on(side).get(at) else {
        return String::new();
    };
    let panels = panels_at(state, v, Reached { at, like: at });
    let mut sizes: Vec<(String, usize)> = Vec::new();
    for size in panels.iter().map(|p| panel(state, p)) {
        match sizes.iter_mut().find(|(known, _)| *known == size) {
            Some((_, count)) => *count += 1,
            None => sizes.push((size, 1)),
        }
    }
    if let [(size, count)] = &sizes[..] {
        return match count {
            1 => format!("spliced: 1 panel of {size}"),
            n => format!("spliced: {n} panels of {size}"),
        };
    }
    let listed: Vec<String> = sizes
        .into_iter()
        .map(|(size, count)| match count {
            1 => size,
            n => format!("{n} of {size}"),
        })
        .collect();
    match panels.len() {
        0 => "spliced: no panel".to_owned(),
        n => format!("spliced: {n} panels, {}", listed.join("; ")),
    }
}

fn panels_at(state: &State, v: &OpenV, at: Reached) -> Vec<PanelAhead> {
    let directions = directions_at(state, v.side, at);
    let spurs = spurs_of_splice(&state.derived.shell, &state.shape().placement, v, &directions);
    panels_of_splice(v, &spurs).into_iter().flatten().collect()
}

/// An open V in one line: its name, its panel, what a splice adds, and how many Vs an act there reaches.
#[must_use]
pub(super) fn v_line(state: &State, side: Side, at: usize) -> String {
    let fresh = state.derived.strip_on(side).fresh.get(at).copied().unwrap_or(false);
    let splice = if fresh {
        "spliced already".to_owned()
    } else {
        spliced(state, side, at)
    };
    let mut name = v_name(state, side, at);
    if state.view.strip.repeat.is_some() {
        let reached = clicked(state, side, &[at]);
        name += &format!(", at {} Vs", reached.len());
        if !all_turn(state, side, &reached) {
            name += ", directions not turned";
        }
    }
    format!("{name}: {}; {splice}", filled(state, side, at))
}

/// What filling a span makes, in one line. `at` are the Vs of the span.
#[must_use]
pub(super) fn span_line(state: &State, side: Side, at: &[usize]) -> String {
    let reached = reached(state, side, at);
    let open = state.derived.open_on(side);
    let panels: Vec<PanelAhead> = reached
        .iter()
        .filter_map(|r| PanelAhead::of_v(open.get(r.at)?))
        .collect();
    let area: f64 = panels.iter().map(|p| p.area_mm2).sum();
    let vs = match reached.len() {
        1 => "1 V".to_owned(),
        n => format!("{n} Vs"),
    };
    let panels = match panels.len() {
        1 => "1 panel".to_owned(),
        n => format!("{n} panels"),
    };
    format!("{vs}: fills {panels}, {}", text::square_metres(area))
}

/// A letter in one line: its place, role, zone, length and maker.
#[must_use]
pub(super) fn letter_line(state: &State, side: Side, at: usize) -> Option<String> {
    let shell = &state.derived.shell;
    let front = &shell.fronts[usize::from(side == Side::Aft)];
    let on_front = front.letters.get(at)?;
    let letter = &shell.letters[on_front.letter as usize];
    let zone = zone_name(shell.zones[letter.zone as usize].name);
    let role = match on_front.role {
        Role::Zig => "zig",
        Role::Zag => "zag",
    };
    let length = front.nodes.get(at)?.distance(*front.nodes.get(at + 1)?);
    let from = match letter.maker {
        Maker::Start => "from the start".to_owned(),
        Maker::Step(id) => {
            let step = state.shape().steps.iter().position(|s| s.id == id);
            step.map_or_else(|| "from a step".to_owned(), |at| format!("from step {}", at + 1))
        }
    };
    Some(format!(
        "Edge {}: {role}, {zone}, {}, {from}",
        at + 1,
        state.units().length(length)
    ))
}

/// "every V", "every 2nd V" ...
#[must_use]
pub(super) fn every(k: u32) -> String {
    let ending = match (k % 10, k % 100) {
        (_, 11..=13) => "th",
        (1, _) => "st",
        (2, _) => "nd",
        (3, _) => "rd",
        _ => "th",
    };
    match k {
        1 => "every V".to_owned(),
        k => format!("every {k}{ending} V"),
    }
}

#[cfg(test)]
mod tests {
    use super::every;

    #[test]
    fn ordinals_are_written_as_they_are_read() {
        let written: Vec<String> = [1, 2, 3, 4, 11, 12, 21, 22].map(every).into();
        let meant = [
            "every V",
            "every 2nd V",
            "every 3rd V",
            "every 4th V",
            "every 11th V",
            "every 12th V",
            "every 21st V",
            "every 22nd V",
        ];
        assert_eq!(written, meant);
    }
}
