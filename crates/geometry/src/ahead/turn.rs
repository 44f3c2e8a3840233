//! Vs that are each other turned about the vertical axis, and directions turned along with them.

use crate::{Direction, OpenV, Shell, Vector, ZoneRef, ahead::panel::letters};

/// Two vectors count as equal when they differ by at most this part of their length: what rounding leaves on ribs
/// computed round a circle is about a ten-millionth of it.
pub const TURN_FIT: f64 = 1e-9;

/// A turn about the vertical axis of the grown frame, in which directions are given.
#[derive(Clone, Copy, PartialEq, Debug)]
pub struct Turn {
    cos: f64,
    sin: f64,
}

fn same(a: Vector, b: Vector) -> bool {
    (a - b).length() <= TURN_FIT * a.length().max(b.length())
}

impl Turn {
    /// The turn that takes the letters of one open V to those of another; none when no turn about the vertical axis does.
    #[must_use]
    pub fn between(shell: &Shell, from: &OpenV, to: &OpenV) -> Option<Self> {
        let vectors = |v: &OpenV| {
            letters(shell, v).map(|l| {
                let letter = &shell.letters[l as usize];
                shell.zones[letter.zone as usize].vector * letter.sign.factor()
            })
        };
        let (from, to) = (vectors(from), vectors(to));
        // The letter with the longer run in plan fixes the angle best; an upright one fixes none.
        let run = |v: Vector| v.truncate().length();
        let at = usize::from(run(from[0]) < run(from[1]));
        let (a, b) = (from[at].truncate(), to[at].truncate());
        let length = a.length() * b.length();
        if length == 0.0 {
            return None;
        }
        let turn = Self {
            cos: a.dot(b) / length,
            sin: a.perp_dot(b) / length,
        };
        (0..2).all(|k| same(turn.apply(from[k]), to[k])).then_some(turn)
    }

    /// A vector turned.
    #[must_use]
    pub fn apply(self, v: Vector) -> Vector {
        Vector::new(self.cos * v.x - self.sin * v.y, self.sin * v.x + self.cos * v.y, v.z)
    }
}

/// Directions turned about the vertical axis. What a turn leaves alone stays as it is; a zone turned onto another zone becomes
/// that one, and else a direction of its own. [`Direction::Between`] turns by itself.
#[must_use]
pub fn turned(shell: &Shell, directions: &[Direction], turn: Turn) -> Vec<Direction> {
    let vector = |name: ZoneRef| shell.zones.iter().find(|z| z.name == name).map(|z| z.vector);
    let named = |wanted: Vector| shell.zones.iter().find(|z| same(z.vector, wanted)).map(|z| z.name);
    let turn_one = |direction: &Direction| {
        let out = match *direction {
            Direction::Own(own) => Some(own),
            Direction::Zone(name) => vector(name),
            Direction::Against(name) => vector(name).map(|v| -v),
            Direction::Between => None,
        };
        let Some(now) = out else { return direction.clone() };
        let wanted = turn.apply(now);
        if same(wanted, now) {
            return direction.clone();
        }
        let along = || named(wanted).map(Direction::Zone);
        let against = || named(-wanted).map(Direction::Against);
        match direction {
            Direction::Zone(_) => along().or_else(against),
            Direction::Against(_) => against().or_else(along),
            _ => None,
        }
        .unwrap_or(Direction::Own(wanted))
    };
    directions.iter().map(turn_one).collect()
}
