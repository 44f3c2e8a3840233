//! Filling what is left of a closed front to nothing, by exchanges of neighbours of any role, and retractions.
//!
//! Letters are matched in opposite pairs; a pair is a chord of the word's circle, and every crossing of two chords
//! is one panel (the arrangements of de Bruijn and Elnitsky). Few crossings mean few panels. Which chords are
//! exchanged first decides between surfaces of the same panels; a surface without crossings is looked for.

use std::collections::{BTreeMap, BTreeSet};

use super::{
    Growing,
    alphabet::{Alphabet, Meeting},
    front::Front,
    lay::Laid,
};
use crate::{Courses, Point, Side, Vector, inspect};

/// Surfaces looked at before the best so far is taken. A rim of six letters has 2, of eight 8, of ten 62 (OEIS A006245).
const MOST_SURFACES: usize = 64;

/// A rim of more letters than this is filled in one way only: looking for another would take as long as growing did.
const MOST_LETTERS_SEARCHED: usize = 24;

/// How a rim was closed.
#[derive(Clone, Copy, PartialEq, Eq, Debug)]
pub(super) struct Closed {
    /// Panels made.
    pub(super) panels: usize,
    /// Pairs of panels among those made, or with the shell, that cross.
    pub(super) crossings: usize,
}

/// What filling on the hull keeps about a front, so that two steps do what one does.
#[derive(Clone, PartialEq, Debug)]
pub(super) struct Hull {
    /// The middle of the silhouette, from before the first step.
    centre: Vector,
    /// The zones that have met.
    met: BTreeSet<[u32; 2]>,
}

/// A word while a way to fill it is looked for: a chord number and a vector a letter, and the places before them.
#[derive(Clone)]
struct Sketch {
    chords: Vec<usize>,
    vectors: Vec<Vector>,
    nodes: Vec<Point>,
    panels: Vec<[Point; 4]>,
    exchanges: Vec<usize>,
}

/// Closes a front; none when it is open or its zones do not cancel. A front that cannot be closed is left as it was.
pub(super) fn close(front: &mut Front, growing: &mut Growing<'_>) -> Option<Closed> {
    if !front.closed || !cancels(front, &growing.alphabet) {
        return None;
    }
    retract_any(front, growing);
    let chords = fewest_crossings(front, &growing.alphabet);
    let first = Sketch {
        vectors: front.slots.iter().map(|s| growing.alphabet.vector(s.letter)).collect(),
        nodes: front.nodes.iter().map(|v| growing.mesh.points[*v as usize]).collect(),
        chords,
        panels: Vec::new(),
        exchanges: Vec::new(),
    };
    let (best, crossings) = best_surface(&first, growing);
    let before = growing.mesh.panels.len();
    let course = growing.mesh.open_course(front.side);
    for at in best.exchanges {
        front.exchange(at, course, &growing.alphabet, &mut growing.mesh);
        retract_any(front, growing);
    }
    growing.mesh.close_course(course, before);
    Some(Closed {
        panels: growing.mesh.panels.len() - before,
        crossings,
    })
}

/// Fills a front whose panels must lie on the convex hull of the sum of its zones, for a number of courses or until nothing is left.
pub(super) fn fill_on_hull(front: &mut Front, courses: Courses, growing: &mut Growing<'_>) -> Laid {
    let zones: Vec<Vector> = growing.alphabet.zones.iter().map(|z| z.vector).collect();
    let of_side = usize::from(front.side == Side::Aft);
    let Hull { centre, mut met } = growing.hull[of_side].take().unwrap_or_else(|| {
        // The sum of the segments is centred on the middle of the silhouette.
        let nodes: Vec<Vector> = front.nodes.iter().map(|v| growing.mesh.points[*v as usize].0).collect();
        Hull {
            centre: nodes.iter().sum::<Vector>() / nodes.len().max(1) as f64,
            met: BTreeSet::new(),
        }
    });
    let mut left = match courses {
        Courses::Count(count) => count,
        Courses::UntilStill => u32::MAX,
    };
    loop {
        retract_any(front, growing);
        if left == 0 {
            break;
        }
        left -= 1;
        let before = growing.mesh.panels.len();
        let course = growing.mesh.open_course(front.side);
        let mut at = 0;
        while at < front.slots.len() {
            let Some(behind) = front.after(at) else { break };
            let letters = [front.slots[at].letter, front.slots[behind].letter];
            let mut pair = letters.map(|l| growing.alphabet.counted(l).0);
            pair.sort_unstable();
            let prev = growing.mesh.points[front.nodes[at] as usize].0 - centre;
            let vectors = letters.map(|l| growing.alphabet.vector(l));
            if met.contains(&pair) || !on_hull(prev, vectors, &zones, front.side) {
                at += 1;
                continue;
            }
            front.exchange(at, course, &growing.alphabet, &mut growing.mesh);
            met.insert(pair);
            at += 2;
        }
        growing.mesh.close_course(course, before);
        if before == growing.mesh.panels.len() {
            break;
        }
    }
    growing.hull[of_side] = Some(Hull { centre, met });
    Laid::Done
}

/// Whether the panel at `prev` (from the centre) with sides a and b supports the sum of segments +-zone/2: with `a x b` outwards on
/// the fore side, inwards on the aft side, so that each front fills its own half of the hull.
fn on_hull(prev: Vector, [a, b]: [Vector; 2], zones: &[Vector], side: Side) -> bool {
    let normal = a.cross(b).normalize_or_zero();
    let reach: f64 = zones.iter().map(|z| z.dot(normal).abs()).sum::<f64>() / 2.0;
    let height = match side {
        Side::Fore => prev.dot(normal),
        Side::Aft => -prev.dot(normal),
    };
    normal != Vector::ZERO && (height - reach).abs() <= super::PARALLEL_SINE * 10.0 * reach
}

/// Whether the signed count of letters is zero in every zone.
fn cancels(front: &Front, alphabet: &Alphabet) -> bool {
    let mut counts: BTreeMap<u32, f64> = BTreeMap::new();
    for slot in &front.slots {
        let (zone, sign) = alphabet.counted(slot.letter);
        *counts.entry(zone).or_default() += sign;
    }
    counts.values().all(|count| *count == 0.0)
}

/// Cancels neighbours that are opposite and equal, whatever their roles, until none is left.
fn retract_any(front: &mut Front, growing: &mut Growing<'_>) {
    let mut at = 0;
    while at < front.slots.len() {
        let spur = front.after(at).is_some_and(|behind| {
            growing
                .alphabet
                .meeting(front.slots[at].letter, front.slots[behind].letter)
                == Meeting::Spur
        });
        if spur {
            let across_seam = front.after(at) == Some(0);
            front.retract(at, &mut growing.mesh);
            at = if across_seam { 0 } else { at.saturating_sub(1) };
        } else {
            at += 1;
        }
    }
}

/// Matches the letters of each zone in opposite pairs, without crossing within the zone, and with few crossings in all.
fn fewest_crossings(front: &Front, alphabet: &Alphabet) -> Vec<usize> {
    let count = front.slots.len();
    let mut by_zone: BTreeMap<u32, Vec<(usize, f64)>> = BTreeMap::new();
    for (at, slot) in front.slots.iter().enumerate() {
        let (zone, sign) = alphabet.counted(slot.letter);
        by_zone.entry(zone).or_default().push((at, sign));
    }
    let mut chords: Vec<[usize; 2]> = Vec::new();
    for letters in by_zone.values() {
        // Each turn of the word gives one matching like brackets; the one that crosses the others least is kept.
        let matchings = (0..letters.len()).map(|turn| brackets(letters, turn));
        let best = matchings.min_by_key(|m| {
            m.iter()
                .map(|c| chords.iter().filter(|d| cross(*c, **d)).count())
                .sum::<usize>()
        });
        chords.extend(best.unwrap_or_default());
    }
    let mut of = vec![0; count];
    for (number, [a, b]) in chords.into_iter().enumerate() {
        of[a] = number;
        of[b] = number;
    }
    of
}

fn brackets(letters: &[(usize, f64)], turn: usize) -> Vec<[usize; 2]> {
    let mut open: Vec<(usize, f64)> = Vec::new();
    let mut pairs = Vec::new();
    for k in 0..letters.len() {
        let (at, sign) = letters[(k + turn) % letters.len()];
        match open.last() {
            Some(last) if last.1 != sign => {
                pairs.push([last.0.min(at), last.0.max(at)]);
                open.pop();
            }
            _ => open.push((at, sign)),
        }
    }
    pairs
}

fn cross([a, b]: [usize; 2], [c, d]: [usize; 2]) -> bool {
    let inside = |x: usize| a < x && x < b;
    inside(c) != inside(d)
}

impl Sketch {
    /// Positions whose letter and the next belong to crossing chords: exchanging them is one panel of the fill. Sharpest first.
    fn choices(&self) -> Vec<usize> {
        let count = self.chords.len();
        let ends = |chord: usize| {
            let mut at = (0..count).filter(|k| self.chords[*k] == chord);
            [at.next().unwrap_or(0), at.next().unwrap_or(0)]
        };
        let mut found: Vec<(f64, usize)> = Vec::new();
        for at in 0..count {
            let behind = (at + 1) % count;
            if self.chords[at] != self.chords[behind] && cross(ends(self.chords[at]), ends(self.chords[behind])) {
                let (a, b) = (-self.vectors[at], self.vectors[behind]);
                found.push((a.angle_between(b), at));
            }
        }
        found.sort_by(|p, q| p.0.total_cmp(&q.0).then(p.1.cmp(&q.1)));
        found.into_iter().map(|(_, at)| at).collect()
    }

    fn exchange(&mut self, at: usize) {
        let count = self.chords.len();
        let behind = (at + 1) % count;
        let after = (at + 2) % count;
        let new = self.nodes[at] + self.vectors[behind];
        self.panels
            .push([self.nodes[at], self.nodes[behind], self.nodes[after], new]);
        self.exchanges.push(at);
        self.nodes[behind] = new;
        self.chords.swap(at, behind);
        self.vectors.swap(at, behind);
        self.cancel();
    }

    /// The same cancelling, in the same order, as the front will do.
    fn cancel(&mut self) {
        let mut at = 0;
        while at < self.chords.len() {
            let count = self.chords.len();
            let behind = (at + 1) % count;
            let sum = self.vectors[at] + self.vectors[behind];
            let spur = 1 < count && sum.length() <= super::PARALLEL_SINE * self.vectors[at].length();
            if !spur {
                at += 1;
                continue;
            }
            // When equal letters of one zone meet other than matched, their partners become a pair.
            let [kept, gone] = [self.chords[at], self.chords[behind]];
            for chord in &mut self.chords {
                if *chord == gone {
                    *chord = kept;
                }
            }
            let across_seam = behind == 0;
            let mut places = [at, behind];
            places.sort_unstable();
            for place in places.into_iter().rev() {
                self.chords.remove(place);
                self.vectors.remove(place);
            }
            // The node behind the pair stays when the pair lies at or across the seam, else the one before it.
            if across_seam || behind + 1 == count {
                let mut nodes = [at, behind];
                nodes.sort_unstable();
                for place in nodes.into_iter().rev() {
                    self.nodes.remove(place);
                }
            } else {
                self.nodes.remove(behind);
                self.nodes.remove(at + 1);
            }
            at = if across_seam { 0 } else { at.saturating_sub(1) };
        }
    }
}

/// The first surface found without crossings, else the one with the fewest, and its count.
fn best_surface(first: &Sketch, growing: &Growing<'_>) -> (Sketch, usize) {
    let searched = first.chords.len() <= MOST_LETTERS_SEARCHED;
    let mut best: Option<(Sketch, usize)> = None;
    let mut seen = 0;
    let mut open = vec![first.clone()];
    while let Some(sketch) = open.pop() {
        let choices = sketch.choices();
        if choices.is_empty() {
            seen += 1;
            let crossings = if searched { crossings(&sketch, growing) } else { 0 };
            if best.as_ref().is_none_or(|(_, fewest)| crossings < *fewest) {
                best = Some((sketch, crossings));
            }
            if best.as_ref().is_some_and(|(_, fewest)| *fewest == 0) || MOST_SURFACES <= seen {
                break;
            }
            continue;
        }
        let tried = if searched { &choices[..] } else { &choices[..1] };
        for at in tried.iter().rev() {
            let mut next = sketch.clone();
            next.exchange(*at);
            open.push(next);
        }
    }
    best.unwrap_or_else(|| (first.clone(), 0))
}

fn crossings(sketch: &Sketch, growing: &Growing<'_>) -> usize {
    let mesh = &growing.mesh;
    let grown = mesh.panels.iter().map(|p| p.corners.map(|v| mesh.points[v as usize]));
    inspect::crossings_of_new(&grown.collect::<Vec<_>>(), &sketch.panels)
}
