//! What a step does, field by field.

use egui::Ui;
use zonewright_geometry::{Act, Courses, RoleRule, Side, Spurs, Step, Vs};

use super::{Cx, directions};
use crate::window::fields::{choice, count, length};

/// The most courses that a field takes; growing stops long before, at the most panels that a shell may have.
const MOST_COURSES: u32 = 100_000;

/// Draws the fields of a step. Gives whether it was changed.
pub(super) fn act_fields(cx: Cx<'_>, ui: &mut Ui, at: usize, step: &mut Step) -> bool {
    let number = at + 1;
    let units = cx.state.units();
    let mut changed = false;
    let aft = usize::from(step.side == Side::Aft);
    if !matches!(step.act, Act::JoinRims { .. })
        && let Some(chosen) = choice(ui, &format!("Front of step {number}"), aft, &["Fore", "Aft"])
    {
        step.side = if chosen == 0 { Side::Fore } else { Side::Aft };
        changed = true;
    }
    changed
        | match &mut step.act {
            Act::Lay { courses, spurs } => lay(ui, number, courses, spurs),
            Act::Fill { at } | Act::Cross { at } => which(cx, ui, number, at),
            Act::Splice { at, directions } => {
                let which = which(cx, ui, number, at);
                which | directions::list(cx, ui, &format!("of step {number}"), directions)
            }
            Act::SetRoles(rule) => roles(ui, number, rule),
            Act::JoinRims { within_mm } => length(ui, &format!("Largest gap of step {number}"), within_mm, units),
            Act::Retract | Act::CloseRim => false,
        }
}

fn lay(ui: &mut Ui, number: usize, courses: &mut Courses, spurs: &mut Spurs) -> bool {
    let mut changed = false;
    let still = usize::from(*courses == Courses::UntilStill);
    if let Some(chosen) = choice(ui, &format!("Lay of step {number}"), still, &["Courses", "Until still"]) {
        *courses = if chosen == 0 {
            Courses::Count(1)
        } else {
            Courses::UntilStill
        };
        changed = true;
    }
    if let Courses::Count(how_many) = courses {
        changed |= count(ui, &format!("Courses of step {number}"), how_many, 0..=MOST_COURSES);
    }
    let now = match spurs {
        Spurs::Retract => 0,
        Spurs::Hold => 1,
        Spurs::Cross => 2,
    };
    if let Some(chosen) = choice(
        ui,
        &format!("Spurs of step {number}"),
        now,
        &["Retract", "Hold", "Cross"],
    ) {
        *spurs = [Spurs::Retract, Spurs::Hold, Spurs::Cross][chosen];
        changed = true;
    }
    changed
}

fn which(cx: Cx<'_>, ui: &mut Ui, number: usize, at: &mut Vs) -> bool {
    let mut changed = false;
    let now = match at {
        Vs::All => 0,
        Vs::Picked(_) => 1,
        Vs::EveryKth { .. } => 2,
    };
    if let Some(chosen) = choice(
        ui,
        &format!("Vs of step {number}"),
        now,
        &["All open", "Picked", "Every k-th"],
    ) {
        let first = first_zig(cx, at);
        match (chosen, first) {
            (0, _) => *at = Vs::All,
            (1, _) => *at = Vs::Picked(Vec::new()),
            (_, Some(from)) => *at = Vs::EveryKth { from, k: 2 },
            // Without an open V there is no letter to count from.
            (_, None) => return false,
        }
        changed = true;
    }
    match at {
        Vs::All => {}
        Vs::Picked(names) => {
            ui.weak(match names.len() {
                0 => "None picked: click open Vs in the strip.".to_owned(),
                n => format!("{n} picked"),
            });
        }
        Vs::EveryKth { k, .. } => changed |= count(ui, &format!("k of step {number}"), k, 1..=MOST_COURSES),
    }
    changed
}

/// The letter that "every k-th" counts from at first: the first picked one, else the zig of the first open V.
fn first_zig(cx: Cx<'_>, at: &Vs) -> Option<zonewright_geometry::LetterName> {
    if let Vs::Picked(names) = at
        && let Some(first) = names.first()
    {
        return Some(first.zig.clone());
    }
    let shell = &cx.state.derived.shell;
    let front = &shell.fronts[usize::from(cx.state.view.side == Side::Aft)];
    let first = cx.state.derived.open_on(cx.state.view.side).first()?;
    Some(shell.letter_name(front.letters[first.position].letter))
}

fn roles(ui: &mut Ui, number: usize, rule: &mut RoleRule) -> bool {
    let now = match rule {
        RoleRule::FirstAreZig(_) => 0,
        RoleRule::Alternate => 1,
        RoleRule::Swap => 2,
        RoleRule::Flip(_) => 3,
    };
    let names = ["First are zig", "Alternate", "Swap all", "Flip named"];
    let shown = if now == 3 { &names[..] } else { &names[..3] };
    let mut changed = false;
    if let Some(chosen) = choice(ui, &format!("Roles of step {number}"), now, shown) {
        match chosen {
            0 => *rule = RoleRule::FirstAreZig(1),
            1 => *rule = RoleRule::Alternate,
            2 => *rule = RoleRule::Swap,
            _ => return false,
        }
        changed = true;
    }
    match rule {
        RoleRule::FirstAreZig(how_many) => {
            changed |= count(ui, &format!("Zigs of step {number}"), how_many, 0..=MOST_COURSES);
        }
        RoleRule::Flip(letters) => {
            ui.weak(format!("{} letters change their role", letters.len()));
        }
        RoleRule::Alternate | RoleRule::Swap => {}
    }
    changed
}
