//! A front: the rim that grows, as a word.

use std::collections::BTreeMap;

use super::{
    alphabet::{Alphabet, Meeting, role_on},
    mesh::Mesh,
};
use crate::{FirstWord, FrontLetter, FrontState, Panel, Role, Side, shell::Shell};

/// A letter on a front, and the edge that it stands for.
#[derive(Clone, Copy, PartialEq, Eq, Debug)]
pub(super) struct Slot {
    pub(super) letter: u32,
    pub(super) edge: u32,
    pub(super) role: Role,
    /// Whether the front runs along the edge from its second end to its first.
    pub(super) reversed: bool,
}

/// A front. `nodes[k]` is the vertex before letter k; an open front has one more.
#[derive(Clone, PartialEq, Eq, Debug)]
pub(super) struct Front {
    pub(super) side: Side,
    pub(super) closed: bool,
    pub(super) slots: Vec<Slot>,
    pub(super) nodes: Vec<u32>,
}

impl Front {
    /// Both fronts of a first word. Letters that run out and straight back share their edge.
    pub(super) fn both(word: &FirstWord, closed: bool, alphabet: &Alphabet, mesh: &mut Mesh) -> [Self; 2] {
        let count = word.letters.len();
        let places = {
            // The zones may have rules of their own, so the places come from the alphabet, not from the word.
            let mut at = word.origin;
            let mut places = vec![at];
            for letter in 0..count {
                at += alphabet.vector(super::mesh::as_index(letter));
                places.push(at);
            }
            places
        };
        let spur = |a: usize, b: usize| {
            let [a, b] = [a, b].map(super::mesh::as_index);
            alphabet.meeting(a, b) == Meeting::Spur
        };
        let mut nodes = vec![mesh.add_point(places[0])];
        let mut slots: Vec<Slot> = Vec::with_capacity(count);
        for k in 0..count {
            let back = 0 < k && spur(k - 1, k);
            let last = k + 1 == count;
            let next = if back {
                nodes[k - 1]
            } else if last && closed {
                nodes[0]
            } else {
                mesh.add_point(places[k + 1])
            };
            let (edge, reversed) = if back {
                (slots[k - 1].edge, !slots[k - 1].reversed)
            } else {
                (mesh.add_edge([nodes[k], next]), false)
            };
            if back && last && closed && next != nodes[0] {
                mesh.vertex_links.push([nodes[0], next]);
            }
            slots.push(Slot {
                letter: super::mesh::as_index(k),
                edge,
                role: word.letters[k].role,
                reversed,
            });
            nodes.push(next);
        }
        if closed {
            nodes.pop();
            if 2 < count && spur(count - 1, 0) {
                mesh.vertex_links.push([nodes[count - 1], nodes[1]]);
                mesh.edge_links.push([slots[count - 1].edge, slots[0].edge]);
            }
        }
        mesh.loose.extend(slots.iter().map(|s| s.edge));
        let mut passed = nodes.clone();
        passed.sort_unstable();
        mesh.suspects
            .extend(passed.chunk_by(|a, b| a == b).filter(|c| 1 < c.len()).map(|c| c[0]));
        [Side::Fore, Side::Aft].map(|side| Self {
            side,
            closed,
            slots: slots
                .iter()
                .map(|s| Slot {
                    role: role_on(side, s.role),
                    ..*s
                })
                .collect(),
            nodes: nodes.clone(),
        })
    }

    /// The position after `at`, round on a closed front.
    pub(super) fn after(&self, at: usize) -> Option<usize> {
        if at + 1 < self.slots.len() {
            Some(at + 1)
        } else {
            (self.closed && 1 < self.slots.len()).then_some(0)
        }
    }

    /// The position before `at`, round on a closed front.
    pub(super) fn before(&self, at: usize) -> Option<usize> {
        match at.checked_sub(1) {
            Some(before) => Some(before),
            None => (self.closed && 1 < self.slots.len()).then(|| self.slots.len() - 1),
        }
    }

    /// Index in `nodes` of the place behind the letter at `at`.
    pub(super) fn node_after(&self, at: usize) -> usize {
        if self.closed && at + 1 == self.slots.len() {
            0
        } else {
            at + 1
        }
    }

    /// Whether the letter at `at` and the next are an open V.
    pub(super) fn is_open_v(&self, at: usize) -> bool {
        self.slots[at].role == Role::Zig && self.after(at).is_some_and(|next| self.slots[next].role == Role::Zag)
    }

    /// Positions of all open Vs, from the word's first letter on.
    pub(super) fn open_vs(&self) -> Vec<usize> {
        (0..self.slots.len()).filter(|at| self.is_open_v(*at)).collect()
    }

    /// Exchanges the letters at `at` and behind it, whatever their roles: one vertex, and one panel unless they are parallel.
    ///
    /// A spur passes through its node, an unequal fold likewise. Returns whether a panel was made.
    pub(super) fn exchange(&mut self, at: usize, course: i32, alphabet: &Alphabet, mesh: &mut Mesh) -> bool {
        let Some(next_at) = self.after(at) else { return false };
        let [a, b] = [self.slots[at], self.slots[next_at]];
        let behind = self.node_after(next_at);
        let [prev, mid, next] = [self.nodes[at], self.nodes[next_at], self.nodes[behind]];
        let meeting = alphabet.meeting(a.letter, b.letter);
        if meeting == Meeting::Equal {
            // The vertex is reused: the places of the edges stay, the letters change.
            self.slots[at] = Slot {
                letter: b.letter,
                role: b.role,
                ..a
            };
            self.slots[next_at] = Slot {
                letter: a.letter,
                role: a.role,
                ..b
            };
            return false;
        }
        let new = mesh.add_point(mesh.points[prev as usize] + alphabet.vector(b.letter));
        self.nodes[next_at] = new;
        let edge_b = mesh.add_edge([prev, new]);
        if meeting == Meeting::Spur {
            zip([a, b], [prev, next], mesh);
            mesh.suspects.extend([prev, new]);
            mesh.loose.push(edge_b);
            self.slots[at] = Slot {
                edge: edge_b,
                reversed: false,
                ..b
            };
            self.slots[next_at] = Slot {
                edge: edge_b,
                reversed: true,
                ..a
            };
            return false;
        }
        let edge_a = mesh.add_edge([new, next]);
        self.slots[at] = Slot {
            edge: edge_b,
            reversed: false,
            ..b
        };
        self.slots[next_at] = Slot {
            edge: edge_a,
            reversed: false,
            ..a
        };
        if meeting != Meeting::Panel {
            mesh.slides.push([a.edge, b.edge, edge_b, edge_a]);
            mesh.suspects.extend([prev, mid, next, new]);
            mesh.loose.extend([edge_b, edge_a]);
            return false;
        }
        let above = mesh.slot_above(self.side);
        let panel = super::mesh::as_index(mesh.panels.len());
        mesh.panels.push(if above == 0 {
            Panel {
                corners: [prev, mid, next, new],
                letters: [a.letter, b.letter],
                course,
            }
        } else {
            Panel {
                corners: [prev, new, next, mid],
                letters: [b.letter, a.letter],
                course,
            }
        });
        for lower in [a, b] {
            mesh.put_panel(lower.edge, above ^ usize::from(lower.reversed), panel);
        }
        for upper in [edge_b, edge_a] {
            mesh.edges[upper as usize].panels[1 - above] = panel;
        }
        true
    }

    /// Takes the spur at `at` out, zipping its two edges and the vertices at their ends.
    pub(super) fn retract(&mut self, at: usize, mesh: &mut Mesh) {
        let Some(next_at) = self.after(at) else { return };
        let [a, b] = [self.slots[at], self.slots[next_at]];
        let [prev, next] = [self.nodes[at], self.nodes[self.node_after(next_at)]];
        zip([a, b], [prev, next], mesh);
        mesh.suspects.extend([prev, self.nodes[next_at], next]);
        if next_at == 0 {
            // The pair lies across the word's seam: the letters go from both its ends.
            self.slots.pop();
            self.nodes.pop();
            self.slots.remove(0);
            self.nodes.remove(0);
        } else {
            self.slots.drain(at..=next_at);
            self.nodes.drain(at + 1..=at + 1);
            // On a closed front the node behind the pair may be node 0; the one before it stands for both.
            if at + 1 < self.nodes.len() {
                self.nodes.remove(at + 1);
            } else {
                self.nodes.remove(at);
            }
        }
    }

    /// The front as the shell shows it, with the places of its nodes.
    pub(super) fn state(&self, mut nodes: Vec<crate::Point>) -> FrontState {
        if self.closed && !nodes.is_empty() {
            nodes.push(nodes[0]);
        }
        FrontState {
            closed: self.closed,
            letters: self
                .slots
                .iter()
                .map(|s| FrontLetter {
                    letter: s.letter,
                    role: s.role,
                })
                .collect(),
            nodes,
        }
    }

    /// States what must hold.
    #[cfg(test)]
    pub(super) fn check(&self, alphabet: &Alphabet, mesh: &Mesh) {
        let expected = self.slots.len() + usize::from(!self.closed);
        assert_eq!(self.nodes.len(), expected, "one node a letter, and one more when open");
        for (at, slot) in self.slots.iter().enumerate() {
            let [from, to] = [self.nodes[at], self.nodes[self.node_after(at)]].map(|v| mesh.points[v as usize]);
            let off = ((to - from) - alphabet.vector(slot.letter)).length();
            assert!(
                off < 1e-6,
                "letter {at} does not lead from its node to the next: off by {off}"
            );
            let mut ends = mesh.edges[slot.edge as usize].ends;
            if slot.reversed {
                ends.reverse();
            }
            let ends = ends.map(|v| mesh.points[v as usize]);
            assert!(
                ends[0].distance(from) < 1e-6 && ends[1].distance(to) < 1e-6,
                "letter {at} is not on its edge"
            );
        }
    }
}

/// Zips the two edges of a spur together, and with them the vertices at their open ends.
fn zip([a, b]: [Slot; 2], [prev, next]: [u32; 2], mesh: &mut Mesh) {
    if prev != next {
        mesh.vertex_links.push([prev, next]);
    }
    if a.edge != b.edge {
        mesh.edge_links.push([a.edge, b.edge]);
    }
}

/// The open Vs of a front as it stands, in the placed frame.
#[must_use]
pub fn open_vs(shell: &Shell, side: Side) -> Vec<crate::OpenV> {
    let state = &shell.fronts[usize::from(side == Side::Aft)];
    let count = state.letters.len();
    let mut found = Vec::new();
    for position in 0..count {
        let next = match position + 1 {
            next if next < count => next,
            _ if state.closed && 1 < count => 0,
            _ => break,
        };
        if state.letters[position].role != Role::Zig || state.letters[next].role != Role::Zag {
            continue;
        }
        let nodes = [state.nodes[position], state.nodes[next], state.nodes[next + 1]];
        let (a, b) = (nodes[1] - nodes[0], nodes[2] - nodes[1]);
        let flat = super::alphabet::PARALLEL_SINE * a.length() * b.length();
        found.push(crate::OpenV {
            side,
            position,
            nodes,
            new: nodes[0] + b,
            degenerate: a.cross(b).length() <= flat,
        });
    }
    found
}

/// Whether a front as it stands can be filled to nothing: it is closed, has letters, and its zones cancel.
#[must_use]
pub fn can_close(shell: &Shell, side: Side) -> bool {
    let front = &shell.fronts[usize::from(side == Side::Aft)];
    let mut counts: BTreeMap<u32, i64> = BTreeMap::new();
    for letter in front.letters.iter().map(|l| &shell.letters[l.letter as usize]) {
        let zone = &shell.zones[letter.zone as usize];
        let along = (letter.sign == crate::Sign::Plus) != zone.reversed;
        *counts.entry(zone.counts_as).or_default() += if along { 1 } else { -1 };
    }
    front.closed && !counts.is_empty() && counts.values().all(|count| *count == 0)
}
