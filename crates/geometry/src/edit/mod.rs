//! Changing the zones of a shape.
//!
//! All vectors are in the grown frame, before placement, in millimetres. Nothing here changes a shape in place: every operation gives a
//! new one, or says why it cannot be. A zone that is linked changes the zone that it is linked to.
//!
//! Where a start's parameters can express a change, they are changed, and the design stays parametric; otherwise the zone gets a rule
//! of its own ([`crate::ZoneRule`]), which can be taken away again.

mod fan;
mod freedom;
mod measures;
mod rules;
mod set;
mod single;
mod symmetry;
mod table;
mod together;

pub use freedom::{Freedom, freedom};
pub use measures::Measures;
pub use rules::{derive_zone, link_zone, unlink_zone};
pub use set::{set_zone, set_zones};
pub use symmetry::{Image, Turn, symmetric};
pub use table::{ZoneState, zone_states};
pub use together::set_together;

use crate::{Code, Finding, Place, Vector, ZoneRef};

/// Vectors and angles that differ by less than this part are the same to an edit: ten thousand times the rounding of a turned vector, a
/// thousandth of a micrometre on a 1 m edge.
pub(crate) const SAME: f64 = 1e-9;

/// A vector turned about the vertical, by the angle with this cosine and sine.
fn turned(v: Vector, (cos, sin): (f64, f64)) -> Vector {
    Vector::new(cos * v.x - sin * v.y, sin * v.x + cos * v.y, v.z)
}

/// There is no such zone.
fn no_zone(zone: ZoneRef) -> Finding {
    let place = match zone {
        ZoneRef::Start(_) => Place::Parameter("zones"),
        ZoneRef::Spliced(step, _) => Place::Step(step),
    };
    Finding::new(Code::NameLost, place)
}
