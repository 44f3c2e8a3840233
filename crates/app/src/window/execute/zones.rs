//! Zones: dragged, typed, linked, picked.

use std::sync::Arc;

use zonewright_geometry::{
    Finding, Shape, Tolerances, Vector, ZoneRef,
    edit::{derive_zone, link_zone, set_together, set_zone, unlink_zone},
};

use super::path::refusal;
use crate::{
    document::Design,
    window::{
        state::State,
        zone_table::{index_of, zone_name},
        zones::ZoneAct,
    },
};

/// Carries a command about zones out.
pub(super) fn run(state: &mut State, act: ZoneAct) {
    match act {
        ZoneAct::Drag {
            base,
            zone,
            vector,
            together,
        } => drag(state, &base, zone, vector, together),
        ZoneAct::TakeBack => {
            if state.history.take_back() {
                state.say("The drag was taken back");
            }
        }
        ZoneAct::Set(zone, vector, measure) => {
            let name = name(state, zone);
            let set = if state.view.zones.together {
                set_together
            } else {
                set_zone
            };
            let label = format!("{measure} of {}", name.to_lowercase());
            let key = Some(format!("{measure} {zone:?}"));
            take(state, set(state.shape(), zone, vector), &label, key);
        }
        ZoneAct::Link(zone, to, sign) => {
            let label = format!(
                "Link {} to {}",
                name(state, zone).to_lowercase(),
                name(state, to).to_lowercase()
            );
            take(state, link_zone(state.shape(), zone, to, sign), &label, None);
        }
        ZoneAct::Unlink(zone) => {
            let label = format!("Unlink {}", name(state, zone).to_lowercase());
            take(state, unlink_zone(state.shape(), zone), &label, None);
        }
        ZoneAct::Derive(zone) => {
            let label = format!("Derive {} again", name(state, zone).to_lowercase());
            take(state, derive_zone(state.shape(), zone), &label, None);
        }
        ZoneAct::Pick(zone) => state.view.zones.picked = zone,
        ZoneAct::LinkTo(zone) => state.view.zones.link_to = zone,
        ZoneAct::Together => {
            let view = &mut state.view.zones;
            view.together = !view.together;
            let now = if view.together { "together" } else { "alone" };
            state.say(format!("A changed zone changes {now}"));
        }
        ZoneAct::Snap => {
            let view = &mut state.view.zones;
            view.snap = !view.snap;
            let now = if view.snap { "snap" } else { "do not snap" };
            state.say(format!("Drags {now}"));
        }
        ZoneAct::Star(star) => state.view.zones.star = star,
        ZoneAct::Tolerances(tolerances) => set_tolerances(state, tolerances),
    }
}

fn name(state: &State, zone: ZoneRef) -> String {
    index_of(&state.derived.shell, zone).map_or_else(|| "The zone".to_owned(), zone_name)
}

fn drag(state: &mut State, base: &Arc<Design>, zone: ZoneRef, vector: Vector, together: bool) {
    let set = if together { set_together } else { set_zone };
    let name = name(state, zone);
    match set(&base.shape, zone, vector) {
        Ok(shape) => {
            let label = format!("Drag {}", name.to_lowercase());
            state.change(&label, Some("drag a zone".to_owned()), |design| design.shape = shape);
            state.say(format!(
                "{label} · x, y, z: an axis · l: length only · a: alike · n: no snapping · Esc: back"
            ));
            state.view.zones.picked = Some(zone);
        }
        // The drag stays where it was last possible.
        Err(finding) => state.say(refusal(&format!("{name} cannot go there"), &finding)),
    }
}

/// Takes a changed shape over, or says why there is none.
fn take(state: &mut State, changed: Result<Shape, Finding>, label: &str, key: Option<String>) {
    match changed {
        Ok(shape) => {
            state.change(label, key, |design| design.shape = shape);
            state.say(format!("{label}: done"));
        }
        Err(finding) => state.say(refusal(label, &finding)),
    }
}

fn set_tolerances(state: &mut State, tolerances: Tolerances) {
    let usable = |mm: f64| mm.is_finite() && 0.0 <= mm;
    if !usable(tolerances.join_mm) || !usable(tolerances.near_mm) {
        state.say("A tolerance must be 0 or more");
        return;
    }
    state.change("Change the tolerances", Some("tolerances".to_owned()), |design| {
        design.shape.tolerances = tolerances;
    });
}
