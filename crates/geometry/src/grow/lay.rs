//! Laying a course: every open V is filled at once.

use super::{
    alphabet::{Alphabet, Meeting},
    front::{Front, Slot},
    mesh::{MAX_PANELS, Mesh},
};
use crate::{Courses, Role, Spurs};

/// How laying ended.
#[derive(Clone, Copy, PartialEq, Eq, Debug)]
pub(super) enum Laid {
    /// As asked, or the front is still.
    Done,
    /// The front never falls still; every zig has met every zag.
    NeverStill,
    /// More panels than can be grown.
    TooMany,
}

/// One change of a front, with what undoing it needs.
#[derive(Clone, Copy, PartialEq, Eq, Debug)]
pub(super) enum Change {
    /// The letters at a position and behind it were exchanged; what stood there before.
    Exchanged { at: usize, slots: [Slot; 2], mid: u32 },
    /// A spur was taken out at a position; what stood there before, and its three nodes.
    Retracted {
        at: usize,
        across_seam: bool,
        slots: [Slot; 2],
        nodes: [u32; 3],
    },
}

impl Front {
    /// Lays courses until as many are laid, the front is still, or every zig has met every zag.
    pub(super) fn lay(&mut self, courses: Courses, spurs: Spurs, alphabet: &Alphabet, mesh: &mut Mesh) -> Laid {
        let wanted = match courses {
            Courses::Count(count) => count as usize,
            Courses::UntilStill => usize::MAX,
        };
        let zigs = self.slots.iter().filter(|s| s.role == Role::Zig).count();
        let every_meeting = zigs * (self.slots.len() - zigs);
        // Room for all that may come: what stays unused is never touched.
        let most = every_meeting.min(wanted.saturating_mul(self.slots.len() / 2));
        mesh.reserve(most.min(MAX_PANELS - mesh.panels.len().min(MAX_PANELS)));
        let (mut meetings, mut passes_without_panel) = (0, 0);
        let mut active = self.open_after_spurs(spurs, alphabet, mesh, None);
        for _ in 0..wanted {
            if active.is_empty() {
                return Laid::Done;
            }
            if courses == Courses::UntilStill && every_meeting <= meetings {
                return Laid::NeverStill;
            }
            if MAX_PANELS < mesh.panels.len() + active.len() {
                return Laid::TooMany;
            }
            let before = mesh.panels.len();
            meetings += active.len();
            active = self.lay_once(&active, spurs, alphabet, mesh, None);
            passes_without_panel = if before == mesh.panels.len() {
                passes_without_panel + 1
            } else {
                0
            };
            // A closed front whose letters all run one way turns for ever without making a panel.
            if self.slots.len() < passes_without_panel {
                return Laid::NeverStill;
            }
        }
        Laid::Done
    }

    /// Fills the given open Vs once, as one course; returns those that are open next.
    pub(super) fn lay_once(
        &mut self,
        active: &[usize],
        spurs: Spurs,
        alphabet: &Alphabet,
        mesh: &mut Mesh,
        mut log: Option<&mut Vec<Change>>,
    ) -> Vec<usize> {
        let before = mesh.panels.len();
        let course = mesh.open_course(self.side);
        let count = self.slots.len();
        let mut next = Vec::with_capacity(active.len() + 1);
        let mut spur_seen = false;
        for &at in active {
            let Some(behind) = self.after(at) else { continue };
            if let Some(log) = log.as_deref_mut() {
                log.push(Change::Exchanged {
                    at,
                    slots: [self.slots[at], self.slots[behind]],
                    mid: self.nodes[behind],
                });
            }
            self.exchange(at, course, alphabet, mesh);
            for near in [self.before(at), Some(behind)].into_iter().flatten() {
                if next.last() != Some(&near) {
                    next.push(near);
                }
            }
        }
        mesh.close_course(course, before);
        // Around a closed front's seam the candidates are out of order, or there twice.
        if next
            .first()
            .zip(next.last())
            .is_some_and(|(first, last)| *first + 1 == count || *last == 0 || last <= first)
        {
            next.sort_unstable();
            next.dedup();
        }
        next.retain(|at| {
            if !self.is_open_v(*at) {
                return false;
            }
            let held = self.held(*at, spurs, alphabet);
            spur_seen |= held;
            !held
        });
        if spur_seen && spurs == Spurs::Retract {
            return self.open_after_spurs(spurs, alphabet, mesh, log);
        }
        next
    }

    /// Whether an open V is left alone: a spur that is not crossed, or an unequal fold that is not.
    fn held(&self, at: usize, spurs: Spurs, alphabet: &Alphabet) -> bool {
        let Some(behind) = self.after(at) else { return true };
        spurs != Spurs::Cross && alphabet.is_back_on_itself(self.slots[at].letter, self.slots[behind].letter)
    }

    /// The open Vs that laying would fill, after retracting where that is the policy.
    fn open_after_spurs(
        &mut self,
        spurs: Spurs,
        alphabet: &Alphabet,
        mesh: &mut Mesh,
        log: Option<&mut Vec<Change>>,
    ) -> Vec<usize> {
        if spurs == Spurs::Retract {
            self.retract_all(alphabet, mesh, log);
        }
        let mut open = self.open_vs();
        open.retain(|at| !self.held(*at, spurs, alphabet));
        open
    }

    /// Cancels every spur, leftmost first from the word's first letter, until none is left. Returns how many.
    pub(super) fn retract_all(
        &mut self,
        alphabet: &Alphabet,
        mesh: &mut Mesh,
        mut log: Option<&mut Vec<Change>>,
    ) -> usize {
        let mut retracted = 0;
        let mut at = 0;
        while at < self.slots.len() {
            let spur = self.is_open_v(at)
                && self.after(at).is_some_and(|behind| {
                    alphabet.meeting(self.slots[at].letter, self.slots[behind].letter) == Meeting::Spur
                });
            if !spur {
                at += 1;
                continue;
            }
            let behind = self.after(at).unwrap_or(at);
            if let Some(log) = log.as_deref_mut() {
                let last = self.nodes[self.node_after(behind)];
                log.push(Change::Retracted {
                    at,
                    across_seam: behind == 0,
                    slots: [self.slots[at], self.slots[behind]],
                    nodes: [self.nodes[at], self.nodes[behind], last],
                });
            }
            self.retract(at, mesh);
            retracted += 1;
            // Only the pair that has just come together can be new, and it begins one letter to the left.
            at = if behind == 0 { 0 } else { at.saturating_sub(1) };
        }
        retracted
    }

    /// Fills chosen Vs as one course: panels and slides; spurs and folds are left alone.
    pub(super) fn fill(&mut self, chosen: &[usize], alphabet: &Alphabet, mesh: &mut Mesh) -> usize {
        let open: Vec<usize> = chosen
            .iter()
            .copied()
            .filter(|at| !self.held(*at, Spurs::Hold, alphabet))
            .collect();
        self.lay_once(&open, Spurs::Hold, alphabet, mesh, None);
        open.len()
    }

    /// Passes through the node at chosen spurs and folds.
    pub(super) fn cross(&mut self, chosen: &[usize], alphabet: &Alphabet, mesh: &mut Mesh) -> usize {
        let spurs: Vec<usize> = chosen
            .iter()
            .copied()
            .filter(|at| self.held(*at, Spurs::Hold, alphabet))
            .collect();
        self.lay_once(&spurs, Spurs::Cross, alphabet, mesh, None);
        spurs.len()
    }

    /// Undoes a course: refills exactly what it filled, in reverse.
    #[cfg(test)]
    pub(super) fn undo(&mut self, log: &[Change]) {
        for change in log.iter().rev() {
            match *change {
                Change::Exchanged { at, slots, mid } => {
                    let Some(behind) = self.after(at) else { continue };
                    self.slots[at] = slots[0];
                    self.slots[behind] = slots[1];
                    self.nodes[behind] = mid;
                }
                Change::Retracted {
                    at,
                    across_seam,
                    slots,
                    nodes,
                } => {
                    if across_seam {
                        self.slots.insert(0, slots[1]);
                        self.nodes.insert(0, nodes[1]);
                        self.slots.push(slots[0]);
                        self.nodes.push(nodes[0]);
                    } else {
                        self.slots.splice(at..at, slots);
                        let end = self.nodes.len().min(at);
                        if self.closed && end == self.slots.len() - 2 {
                            // The node kept was the one behind the pair, node 0.
                            self.nodes.splice(end..end, [nodes[0], nodes[1]]);
                        } else {
                            self.nodes.splice(at + 1..at + 1, [nodes[1], nodes[2]]);
                        }
                    }
                }
            }
        }
    }
}
