//! Zones and letters: all that were ever on a front.

use std::collections::BTreeMap;

use crate::{
    Code, Finding, FirstWord, Letter, LetterName, Maker, NONE, Place, Role, Shape, Sign, StepId, Vector, Zone,
    ZoneKind, ZoneRef, ZoneVector, grow::mesh::as_index,
};

/// Two letters count as parallel when the sine of their angle is at most this: about ten million times the rounding of a
/// computed direction, and a hundred thousand times finer than a bench can tell on a 10 m edge.
pub const PARALLEL_SINE: f64 = 1e-9;

/// How two letters of a V lie to each other.
#[derive(Clone, Copy, PartialEq, Eq, Debug)]
pub(super) enum Meeting {
    /// They span a panel.
    Panel,
    /// Equal: only the order changes.
    Equal,
    /// The same direction, unequal lengths: the vertex slides.
    Slide,
    /// Opposite and equal.
    Spur,
    /// Opposite and unequal.
    Fold,
}

/// The zones and letters of a growing shape.
#[derive(Clone, Debug, Default)]
pub(super) struct Alphabet {
    pub(super) zones: Vec<Zone>,
    pub(super) letters: Vec<Letter>,
    /// The signed vector of each letter, kept because laying asks for nothing else.
    vectors: Vec<Vector>,
    by_key: BTreeMap<(Maker, u32, Sign, u32), u32>,
    zone_by_name: BTreeMap<ZoneRef, u32>,
}

impl Alphabet {
    /// The alphabet of a first word, with the shape's own zone rules applied.
    pub(super) fn of_start(word: &FirstWord, shape: &Shape) -> Result<Self, Finding> {
        let mut alphabet = Self::default();
        for zone in &word.zones {
            let kind = if zone.derived { ZoneKind::Derived } else { ZoneKind::Own };
            alphabet.add_zone(ZoneRef::Start(zone.id), zone.vector, kind, shape)?;
        }
        alphabet.apply_links(shape)?;
        for letter in &word.letters {
            alphabet.add_letter(Letter {
                maker: Maker::Start,
                index: letter.index,
                sign: letter.sign,
                at: NONE,
                zone: letter.zone,
                born: letter.role,
            });
        }
        Ok(alphabet)
    }

    /// Adds a zone; a rule of the shape about it replaces the vector.
    pub(super) fn add_zone(
        &mut self,
        name: ZoneRef,
        vector: Vector,
        kind: ZoneKind,
        shape: &Shape,
    ) -> Result<u32, Finding> {
        let own = shape.zones.iter().rev().find_map(|rule| match rule.vector {
            ZoneVector::Own(own) if rule.zone == name => Some(own),
            _ => None,
        });
        let (vector, kind) = own.map_or((vector, kind), |own| (own, ZoneKind::Own));
        usable(vector, Place::Design)?;
        let index = as_index(self.zones.len());
        self.zones.push(Zone {
            vector,
            name,
            kind,
            counts_as: index,
            reversed: false,
        });
        self.zone_by_name.insert(name, index);
        Ok(index)
    }

    /// Adds a splice's own direction, and follows its link when the shape has a rule for it.
    pub(super) fn add_spliced_zone(
        &mut self,
        step: StepId,
        index: u32,
        vector: Vector,
        shape: &Shape,
    ) -> Result<u32, Finding> {
        usable(vector, Place::Step(step))?;
        let name = ZoneRef::Spliced(step, index);
        let zone = self
            .add_zone(name, vector, ZoneKind::Own, shape)
            .map_err(|refusal| Finding {
                place: Place::Step(step),
                ..refusal
            })?;
        if let Some((to, sign)) = link_of(shape, name) {
            self.link(zone, to, sign)?;
        }
        Ok(zone)
    }

    fn apply_links(&mut self, shape: &Shape) -> Result<(), Finding> {
        let names: Vec<ZoneRef> = self.zones.iter().map(|z| z.name).collect();
        for (zone, name) in names.into_iter().enumerate() {
            // A link may lead to a zone that is itself linked; a chain longer than the zones is a ring.
            let Some((mut to, mut sign)) = link_of(shape, name) else {
                continue;
            };
            let mut hops = 0;
            while let Some((next, turn)) = link_of(shape, to) {
                to = next;
                sign = if turn == Sign::Minus { sign.opposite() } else { sign };
                hops += 1;
                if self.zones.len() < hops {
                    return Err(Finding::new(Code::BrokenLink, Place::Parameter("zones")));
                }
            }
            self.link(as_index(zone), to, sign)?;
        }
        Ok(())
    }

    fn link(&mut self, zone: u32, to: ZoneRef, sign: Sign) -> Result<(), Finding> {
        let target = self.zone_by_name.get(&to).copied().filter(|t| *t != zone);
        let Some(target) = target else {
            return Err(Finding::new(Code::BrokenLink, Place::Parameter("zones")));
        };
        let root = self.zones[target as usize];
        let linked = &mut self.zones[zone as usize];
        linked.vector = root.vector * sign.factor();
        linked.kind = ZoneKind::Linked;
        linked.counts_as = root.counts_as;
        linked.reversed = (sign == Sign::Minus) != root.reversed;
        Ok(())
    }

    pub(super) fn add_letter(&mut self, letter: Letter) -> u32 {
        let index = as_index(self.letters.len());
        self.vectors
            .push(self.zones[letter.zone as usize].vector * letter.sign.factor());
        self.by_key
            .entry(key_of(letter.maker, letter.index, letter.sign, letter.at))
            .or_insert(index);
        self.letters.push(letter);
        index
    }

    pub(super) fn vector(&self, letter: u32) -> Vector {
        self.vectors[letter as usize]
    }

    pub(super) fn zone(&self, name: ZoneRef) -> Option<u32> {
        self.zone_by_name.get(&name).copied()
    }

    /// The letter with this name, if it was ever on a front.
    pub(super) fn find(&self, name: &LetterName) -> Option<u32> {
        let at = match &name.at {
            Some(at) => self.find(at)?,
            None => NONE,
        };
        self.by_key.get(&key_of(name.maker, name.index, name.sign, at)).copied()
    }

    /// A letter's zone as it counts, and its sign along that zone.
    pub(super) fn counted(&self, letter: u32) -> (u32, f64) {
        let l = &self.letters[letter as usize];
        let zone = &self.zones[l.zone as usize];
        (zone.counts_as, l.sign.factor() * if zone.reversed { -1.0 } else { 1.0 })
    }

    /// How two letters lie to each other.
    #[inline]
    pub(super) fn meeting(&self, zig: u32, zag: u32) -> Meeting {
        let (a, b) = (self.vector(zig), self.vector(zag));
        let lengths = a.length_squared() * b.length_squared();
        if PARALLEL_SINE * PARALLEL_SINE * lengths < a.cross(b).length_squared() {
            Meeting::Panel
        } else {
            meeting_of_parallel(a, b)
        }
    }
    /// Whether two letters run out and back along one line: a spur or a fold.
    #[inline]
    pub(super) fn is_back_on_itself(&self, zig: u32, zag: u32) -> bool {
        // Most are told by the sign of one product.
        self.vector(zig).dot(self.vector(zag)) < 0.0 && matches!(self.meeting(zig, zag), Meeting::Spur | Meeting::Fold)
    }

    /// The letters of one family in the order they were made: same maker, sign and role at birth.
    pub(super) fn family(&self, of: u32) -> impl Iterator<Item = u32> + '_ {
        let key = |l: &Letter| (l.maker, l.sign, l.born);
        let wanted = key(&self.letters[of as usize]);
        (0..as_index(self.letters.len())).filter(move |l| key(&self.letters[*l as usize]) == wanted)
    }

    /// The zones of the start that lie between two letters' zones, going up and round.
    pub(super) fn zones_between(&self, zig: u32, zag: u32, start_zones: u32) -> Vec<u32> {
        let [from, to] = [zig, zag].map(|l| self.letters[l as usize].zone);
        if start_zones <= from || start_zones <= to {
            return Vec::new();
        }
        let steps = (to + start_zones - from) % start_zones;
        (1..steps).map(|k| (from + k) % start_zones).collect()
    }
}

#[cold]
fn meeting_of_parallel(a: Vector, b: Vector) -> Meeting {
    let near = |d: Vector| d.length_squared() <= PARALLEL_SINE * PARALLEL_SINE * a.length_squared();
    match (0.0 < a.dot(b), near(a - b), near(a + b)) {
        (true, true, _) => Meeting::Equal,
        (true, false, _) => Meeting::Slide,
        (false, _, true) => Meeting::Spur,
        (false, _, false) => Meeting::Fold,
    }
}

/// A letter of the first word is told by its index alone: an edit may turn its vector round, and with it the sign.
const fn key_of(maker: Maker, index: u32, sign: Sign, at: u32) -> (Maker, u32, Sign, u32) {
    match maker {
        Maker::Start => (maker, index, Sign::Plus, at),
        Maker::Step(_) => (maker, index, sign, at),
    }
}

fn link_of(shape: &Shape, name: ZoneRef) -> Option<(ZoneRef, Sign)> {
    shape.zones.iter().rev().find_map(|rule| match rule.vector {
        ZoneVector::Linked(to, sign) if rule.zone == name => Some((to, sign)),
        _ => None,
    })
}

fn usable(vector: Vector, place: Place) -> Result<(), Finding> {
    if !vector.is_finite() || !vector.length_squared().is_finite() {
        return Err(Finding::new(Code::NotFinite, place));
    }
    // A square that underflows cannot be told from parallel to everything.
    if vector.length_squared() < f64::MIN_POSITIVE {
        return Err(Finding::new(Code::ZeroVector, place));
    }
    Ok(())
}

/// The role with which a letter of the first word comes to a front.
pub(super) const fn role_on(side: crate::Side, role: Role) -> Role {
    match side {
        crate::Side::Fore => role,
        crate::Side::Aft => role.other(),
    }
}
