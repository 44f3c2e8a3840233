//! Splicing: spurs of new directions at chosen Vs.

use super::{
    Growing,
    alphabet::Alphabet,
    front::{Front, Slot},
    mesh::Mesh,
};
use crate::{Direction, Finding, Letter, Maker, Role, Sign, StepId, ZoneRef};

/// A direction as it is inserted: its zone, and the sign of the zag letter.
type Spur = (u32, Sign);

/// Splices directions in at the Vs at these positions: `a b` becomes `a, x, -x, b` with x zag and -x zig, for each in turn.
///
/// Returns how many zones were named that do not exist.
///
/// # Errors
/// A direction without length or with a coordinate that is not finite.
pub(super) fn splice(
    front: &mut Front,
    chosen: &[usize],
    directions: &[Direction],
    step: StepId,
    growing: &mut Growing<'_>,
) -> Result<usize, Finding> {
    let Growing {
        shape,
        alphabet,
        mesh,
        start_zones,
        ..
    } = growing;
    let mut lost = 0;
    let mut common: Vec<Option<Spur>> = Vec::with_capacity(directions.len());
    for (index, direction) in (0_u32..).zip(directions) {
        let named = |name: &ZoneRef, sign: Sign, lost: &mut usize| {
            let zone = alphabet.zone(*name);
            *lost += usize::from(zone.is_none());
            zone.map(|zone| (zone, sign))
        };
        common.push(match direction {
            Direction::Own(vector) => Some((alphabet.add_spliced_zone(step, index, *vector, shape)?, Sign::Plus)),
            Direction::Zone(name) => named(name, Sign::Plus, &mut lost),
            Direction::Against(name) => named(name, Sign::Minus, &mut lost),
            Direction::Between => None,
        });
    }
    // From the back, so that positions in front stay what they are.
    for &at in chosen.iter().rev() {
        let Some(behind) = front.after(at) else { continue };
        let [zig, zag] = [front.slots[at].letter, front.slots[behind].letter];
        let mut spurs: Vec<Spur> = Vec::new();
        for (direction, spur) in directions.iter().zip(&common) {
            if *direction == Direction::Between {
                let sign = alphabet.letters[zag as usize].sign;
                spurs.extend(
                    alphabet
                        .zones_between(zig, zag, *start_zones)
                        .into_iter()
                        .map(|zone| (zone, sign)),
                );
            } else {
                spurs.extend(*spur);
            }
        }
        insert(front, at, &spurs, step, alphabet, mesh);
    }
    Ok(lost)
}

fn insert(front: &mut Front, at: usize, spurs: &[Spur], step: StepId, alphabet: &mut Alphabet, mesh: &mut Mesh) {
    let mid = front.nodes[front.node_after(at)];
    let zig = front.slots[at].letter;
    mesh.suspects.push(mid);
    let mut slots = Vec::with_capacity(2 * spurs.len());
    let mut nodes = Vec::with_capacity(2 * spurs.len());
    for (index, &(zone, sign)) in (0_u32..).zip(spurs) {
        let mut letter = |sign: Sign, born: Role| {
            alphabet.add_letter(Letter {
                maker: Maker::Step(step),
                index,
                sign,
                at: zig,
                zone,
                born,
            })
        };
        let [out, back] = [letter(sign, Role::Zag), letter(sign.opposite(), Role::Zig)];
        let tip = mesh.add_point(mesh.points[mid as usize] + alphabet.vector(out));
        mesh.suspects.push(tip);
        let edge = mesh.add_edge([mid, tip]);
        mesh.loose.push(edge);
        slots.push(Slot {
            letter: out,
            edge,
            role: Role::Zag,
            reversed: false,
        });
        slots.push(Slot {
            letter: back,
            edge,
            role: Role::Zig,
            reversed: true,
        });
        nodes.extend([tip, mid]);
    }
    // The node behind the zig letter is the V's own; on a closed front's seam that is node 0, and the new ones go to the end.
    front.slots.splice(at + 1..at + 1, slots);
    if at + 1 < front.nodes.len() {
        front.nodes.splice(at + 2..at + 2, nodes);
    } else {
        let last = nodes.pop();
        front.nodes.extend([mid]);
        front.nodes.extend(nodes);
        debug_assert!(last == Some(mid) || spurs.is_empty(), "a spur comes back to the V");
        if spurs.is_empty() {
            front.nodes.pop();
        }
    }
}
