//! The numbers of steps, zone rules and placement.

use super::walk::{LENGTH_OR_ZERO, Walk};
use crate::{Act, Courses, Direction, Placement, RoleRule, Step, Vs, ZoneRef, ZoneRule, ZoneVector, start::limits};

/// The smallest and the greatest scale. Beyond them no shell of a length that is allowed is a shell of a length that is allowed.
const SCALE: [f64; 2] = [1e-6, 1e6];

impl Walk<'_> {
    pub(super) fn steps(&mut self, steps: &mut [Step]) {
        for step in steps {
            let key = format!("step.{}.", step.id.0);
            if self.wants(&key) {
                self.act(&key, &format!("Step {}", step.id.0), &mut step.act);
            }
        }
    }

    fn act(&mut self, key: &str, name: &str, act: &mut Act) {
        let some = [0, limits::MAX_LETTERS];
        match act {
            Act::Lay { courses, .. } => {
                if let Courses::Count(count) = courses {
                    let key = format!("{key}courses");
                    self.count(&key, &format!("{name}: courses"), some, "courses", count);
                }
            }
            Act::Fill { at } | Act::Cross { at } => self.vs(key, name, at),
            Act::Splice { at, directions } => {
                self.vs(key, name, at);
                for (k, direction) in directions.iter_mut().enumerate() {
                    if let Direction::Own(vector) = direction {
                        let (key, name) = (format!("{key}direction.{k}"), format!("{name}: direction {}", k + 1));
                        self.vector_and_length(&key, &name, "directions", vector);
                    }
                }
            }
            Act::SetRoles(RoleRule::FirstAreZig(count)) => {
                let key = format!("{key}first_are_zig");
                self.count(&key, &format!("{name}: first zigs"), some, "first_are_zig", count);
            }
            Act::JoinRims { within_mm } => {
                let key = format!("{key}within");
                let name = format!("{name}: largest gap");
                self.length(&key, &name, LENGTH_OR_ZERO, "within_mm", within_mm);
            }
            Act::Retract | Act::SetRoles(_) | Act::CloseRim => {}
        }
    }

    fn vs(&mut self, key: &str, name: &str, at: &mut Vs) {
        if let Vs::EveryKth { k, .. } = at {
            let key = format!("{key}every");
            self.count(&key, &format!("{name}: every k-th"), [1, limits::MAX_LETTERS], "k", k);
        }
    }

    pub(super) fn zones(&mut self, zones: &mut [ZoneRule]) {
        for rule in zones {
            let (key, name) = match rule.zone {
                ZoneRef::Start(id) => (format!("zone.start.{id}"), format!("Zone {}", u64::from(id) + 1)),
                ZoneRef::Spliced(step, k) => (
                    format!("zone.step.{}.{k}", step.0),
                    format!("Zone {} of step {}", u64::from(k) + 1, step.0),
                ),
            };
            if !self.wants(&key) {
                continue;
            }
            if let ZoneVector::Own(vector) = &mut rule.vector {
                self.vector_and_length(&key, &name, "zones", vector);
            }
        }
    }

    pub(super) fn placement(&mut self, placement: &mut Placement) {
        self.factor(
            "placement.scale",
            "Scale",
            SCALE,
            "placement.scale",
            &mut placement.scale,
        );
        for (axis, turn) in ["x", "y", "z"].into_iter().zip(&mut placement.turn) {
            let (key, name) = (format!("placement.turn.{axis}"), format!("Turn about {axis}"));
            self.turn(&key, &name, "placement.turn", turn);
        }
        self.vector("placement.shift", "Move", "placement.shift", &mut placement.shift);
    }
}
