//! Families: which panels are the same part.
//!
//! Two panels are the same part when their sides, corner angles and bevels agree in order, under rotation in the plane
//! only. A mirror image is another part: its bevels come in the wrong order at the saw. A pair of mirror images shares a
//! number and differs by the hand.
//!
//! Panels are met in order; the first of its kind stands for the family, and a later one joins when it agrees with that
//! first one. To find candidates, numbers that neither rotation nor reflection changes (smallest and largest side, ...)
//! are put on a grid several tolerances wide; only cells within one tolerance are looked at.

mod grid;

use grid::Grid;

/// How far two panels may differ and still be cut as one part.
#[derive(Clone, Copy, PartialEq, Debug)]
pub struct FamilyTolerance {
    /// Of a side, in millimetres.
    pub side_mm: f64,
    /// Of a corner angle, in degrees.
    pub corner_deg: f64,
    /// Of a bevel, in degrees.
    pub bevel_deg: f64,
}

impl Default for FamilyTolerance {
    /// 0.1 mm is below what a saw stop holds, 0.05 degrees half of what a digital gauge shows (house rule).
    fn default() -> Self {
        Self {
            side_mm: 0.1,
            corner_deg: 0.05,
            bevel_deg: 0.05,
        }
    }
}

/// Whether a part differs from its mirror image, and which of the two it is.
///
/// Going round counter-clockwise, seen from outside, a part is a ring of (corner angle, side, bevel). Of all places to
/// begin, take the one whose sequence is first in the order of a dictionary: that sequence names the part. The left-hand
/// part is the one of the pair whose sequence comes first. The rule looks at the parts alone: numbering, the place on the
/// shell, and which was met first do not matter.
#[derive(Clone, Copy, PartialEq, Eq, PartialOrd, Ord, Hash, Debug)]
pub enum Hand {
    /// Its own mirror image.
    None,
    /// The left-hand part of a pair.
    Left,
    /// The right-hand part of a pair.
    Right,
}

impl Hand {
    /// `L`, `R`, or `none`: the word of the lists and of the report.
    #[must_use]
    pub const fn word(self) -> &'static str {
        match self {
            Self::None => "none",
            hand => hand.letter(),
        }
    }

    /// `L`, `R`, or nothing: the end of a part mark.
    #[must_use]
    pub const fn letter(self) -> &'static str {
        match self {
            Self::None => "",
            Self::Left => "L",
            Self::Right => "R",
        }
    }

    /// The hand of the mirror image.
    #[must_use]
    pub const fn other(self) -> Self {
        match self {
            Self::None => Self::None,
            Self::Left => Self::Right,
            Self::Right => Self::Left,
        }
    }
}

/// A corner of an outline, and the side that leaves it counter-clockwise.
#[derive(Clone, Copy, PartialEq, Debug)]
pub struct Side {
    /// The angle inside at the corner, in degrees.
    pub corner_deg: f64,
    /// The length of the side, in millimetres.
    pub side_mm: f64,
    /// The bevel along the side, in degrees.
    pub bevel_deg: f64,
}

impl Side {
    fn agrees(&self, other: &Self, within: &FamilyTolerance) -> bool {
        (self.corner_deg - other.corner_deg).abs() <= within.corner_deg
            && (self.side_mm - other.side_mm).abs() <= within.side_mm
            && (self.bevel_deg - other.bevel_deg).abs() <= within.bevel_deg
    }

    /// Differences within the tolerance do not decide, so that rounding cannot change a hand.
    fn compare(&self, other: &Self, within: &FamilyTolerance) -> core::cmp::Ordering {
        let by = |a: f64, b: f64, within: f64| {
            if (a - b).abs() <= within {
                core::cmp::Ordering::Equal
            } else {
                a.total_cmp(&b)
            }
        };
        by(self.corner_deg, other.corner_deg, within.corner_deg)
            .then(by(self.side_mm, other.side_mm, within.side_mm))
            .then(by(self.bevel_deg, other.bevel_deg, within.bevel_deg))
    }
}

/// A kind of part.
#[derive(Clone, Copy, PartialEq, Eq, Debug)]
pub struct Kind {
    /// The number that it shares with its mirror image; 1, 2, 3 ... as they are first met.
    pub number: u32,
    /// Its hand.
    pub hand: Hand,
    /// How many were met before the first of this kind.
    pub first: u32,
    /// Its mirror image among the kinds, when one was met.
    pub twin: Option<u32>,
}

/// A shape, whichever way it is turned over.
struct Form {
    from: usize,
    len: usize,
    hand: Hand,
    /// The kind of the first one met, and that of its mirror image.
    kinds: [Option<u32>; 2],
}

/// Sorts parts into kinds, one after the other.
pub struct Sorter {
    within: FamilyTolerance,
    grid: Grid,
    forms: Vec<Form>,
    sides: Vec<Side>,
    kinds: Vec<Kind>,
    met: u32,
    mirrored: Vec<Side>,
}

impl Sorter {
    /// A sorter that has met nothing.
    #[must_use]
    pub fn new(within: FamilyTolerance) -> Self {
        Self {
            within,
            grid: Grid::new(&within),
            forms: Vec::new(),
            sides: Vec::new(),
            kinds: Vec::new(),
            met: 0,
            mirrored: Vec::new(),
        }
    }

    /// Gives a part to the sorter; says its kind, by index in what [`Sorter::kinds`] gives.
    pub fn place(&mut self, part: &[Side]) -> u32 {
        mirror_into(part, &mut self.mirrored);
        let (forms, sides, within, mirrored) = (&self.forms, &self.sides, &self.within, &self.mirrored);
        let found = self.grid.find(part, |form: u32| {
            let form = &forms[form as usize];
            let first = &sides[form.from..form.from + form.len];
            if same_under_rotation(first, part, within) {
                Some(0)
            } else if form.hand != Hand::None && same_under_rotation(first, mirrored, within) {
                Some(1)
            } else {
                None
            }
        });
        let (form, turned) = match found {
            Some((form, turned)) => (form as usize, turned),
            None => (self.new_form(part), 0),
        };
        let met = self.met;
        self.met += 1;
        let form_ref = &mut self.forms[form];
        if let Some(kind) = form_ref.kinds[turned] {
            return kind;
        }
        let kind = index(self.kinds.len());
        form_ref.kinds[turned] = Some(kind);
        let twin = form_ref.kinds[1 - turned];
        let hand = if turned == 0 {
            form_ref.hand
        } else {
            form_ref.hand.other()
        };
        if let Some(twin) = twin {
            self.kinds[twin as usize].twin = Some(kind);
        }
        self.kinds.push(Kind {
            number: index(form + 1),
            hand,
            first: met,
            twin,
        });
        kind
    }

    fn new_form(&mut self, part: &[Side]) -> usize {
        let form = self.forms.len();
        self.grid.add(part, index(form));
        self.forms.push(Form {
            from: self.sides.len(),
            len: part.len(),
            hand: hand_of(part, &self.mirrored, &self.within),
            kinds: [None; 2],
        });
        self.sides.extend_from_slice(part);
        form
    }

    /// The kinds met so far.
    #[must_use]
    pub fn kinds(&self) -> &[Kind] {
        &self.kinds
    }
}

/// Counts above `u32` cannot come: a shell has fewer panels.
fn index(n: usize) -> u32 {
    u32::try_from(n).unwrap_or(u32::MAX)
}

/// The mirror image, counter-clockwise again: the same corners backwards, each with the side that came before it.
fn mirror_into(part: &[Side], mirrored: &mut Vec<Side>) {
    mirrored.clear();
    let n = part.len();
    mirrored.extend((0..n).rev().map(|corner| Side {
        corner_deg: part[corner].corner_deg,
        ..part[(corner + n - 1) % n]
    }));
}

/// Whether two parts agree for some turn of one of them.
#[must_use]
pub fn same_under_rotation(a: &[Side], b: &[Side], within: &FamilyTolerance) -> bool {
    a.len() == b.len()
        && (0..a.len()).any(|turn| {
            let (head, tail) = b.split_at(turn);
            tail.iter().chain(head).zip(a).all(|(b, a)| a.agrees(b, within))
        })
}

fn turned(part: &[Side], turn: usize) -> impl Iterator<Item = &Side> {
    let (head, tail) = part.split_at(turn);
    tail.iter().chain(head)
}

fn compare<'a>(
    a: impl Iterator<Item = &'a Side>,
    b: impl Iterator<Item = &'a Side>,
    within: &FamilyTolerance,
) -> core::cmp::Ordering {
    a.zip(b)
        .map(|(a, b)| a.compare(b, within))
        .find(|o| o.is_ne())
        .unwrap_or(core::cmp::Ordering::Equal)
}

/// Where to begin for the sequence that comes first.
fn first_turn(part: &[Side], within: &FamilyTolerance) -> usize {
    (1..part.len()).fold(0, |best, turn| {
        if compare(turned(part, turn), turned(part, best), within).is_lt() {
            turn
        } else {
            best
        }
    })
}

fn hand_of(part: &[Side], mirrored: &[Side], within: &FamilyTolerance) -> Hand {
    if same_under_rotation(part, mirrored, within) {
        return Hand::None;
    }
    let (own, other) = (first_turn(part, within), first_turn(mirrored, within));
    match compare(turned(part, own), turned(mirrored, other), within) {
        core::cmp::Ordering::Less => Hand::Left,
        core::cmp::Ordering::Equal => Hand::None,
        core::cmp::Ordering::Greater => Hand::Right,
    }
}

/// How many different saw settings a set of bevels asks for: values within `within` degrees of the lowest of a group
/// are one setting. The sign counts: a valley is another set-up than a ridge.
#[must_use]
pub fn distinct_settings(mut bevels: Vec<f64>, within: f64) -> usize {
    bevels.sort_unstable_by(f64::total_cmp);
    let mut lowest = f64::NEG_INFINITY;
    let mut settings = 0;
    for bevel in bevels {
        if bevel - lowest > within {
            lowest = bevel;
            settings += 1;
        }
    }
    settings
}

#[cfg(test)]
mod tests;
