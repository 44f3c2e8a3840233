//! Giving letters new roles.

use super::{alphabet::Alphabet, front::Front};
use crate::{Role, RoleRule};

/// Applies a rule; returns how many named letters are not on the front.
pub(super) fn set_roles(front: &mut Front, rule: &RoleRule, alphabet: &Alphabet) -> usize {
    match rule {
        RoleRule::FirstAreZig(count) => {
            for (at, slot) in front.slots.iter_mut().enumerate() {
                slot.role = if at < *count as usize { Role::Zig } else { Role::Zag };
            }
        }
        RoleRule::Alternate => {
            for (at, slot) in front.slots.iter_mut().enumerate() {
                slot.role = if at % 2 == 0 { Role::Zig } else { Role::Zag };
            }
        }
        RoleRule::Swap => {
            for slot in &mut front.slots {
                slot.role = slot.role.other();
            }
        }
        RoleRule::Flip(names) => {
            let mut lost = 0;
            for name in names {
                let letter = alphabet.find(name);
                match front.slots.iter_mut().find(|s| Some(s.letter) == letter) {
                    Some(slot) => slot.role = slot.role.other(),
                    None => lost += 1,
                }
            }
            return lost;
        }
    }
    0
}
