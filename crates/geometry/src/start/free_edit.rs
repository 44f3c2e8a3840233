//! Editing a free path point by point.
//!
//! Points are counted from 0 before the first letter; on a closed path the last point is the first again. Letters are given by their position.
//! An edit that cannot be done leaves the path as it is and says why.
//!
//! A letter that must change leaves the zone that it is linked to. Where other letters are linked to the letter that changes, they follow, unless
//! that would carry the moved point elsewhere or open a path that closes; then the letter leaves them its zone.
//!
//! Roles that alternate along the whole path alternate again after points are inserted or deleted; otherwise a new letter has the role of
//! the letter that it was made from.

use super::free::nodes;
use super::free_gap::out_of_path;
use super::{DragRule, FreeLetter, FreePath, FreeVector, PathEnd, Role, limits};
use crate::{Code, Finding, Place, Point, Sign, Vector};

/// Vectors nearer than this, in millimetres, are the same: far above the rounding of coordinates of 10 km (2e-9), far below any joint.
const SAME_MM: f64 = 1e-6;

impl FreePath {
    /// Moves a point.
    ///
    /// With [`DragRule::Neighbours`] the letters before and behind it turn. With [`DragRule::Tail`] only the letter before it turns, and all
    /// points behind come along; on a closed path that is all up to the first point, which stays, so the last letter turns too. The first
    /// point takes the whole path along.
    ///
    /// # Errors
    /// When there is no such point, or an edge would have no length, or the place is not within the limits.
    pub fn set_point(&mut self, point: usize, to: Point, rule: DragRule) -> Result<(), Finding> {
        for part in to.to_array() {
            limits::signed_length("letters", part)?;
        }
        self.check()?;
        let vectors = self.vectors()?;
        let count = vectors.len();
        if point > count {
            return Err(out_of_path(point));
        }
        let point = if self.closed && point == count { 0 } else { point };
        let by = to - nodes(self.origin, &vectors)[point];
        let before = match point {
            0 => self.closed.then_some(count - 1),
            _ => Some(point - 1),
        };
        let behind = match rule {
            DragRule::Neighbours => (point < count).then_some(point),
            DragRule::Tail => (self.closed && point > 0).then_some(count - 1),
        };
        let origin = if point == 0 { to } else { self.origin };
        let mut turns = Vec::new();
        let whole_path = rule == DragRule::Tail && point == 0;
        if !whole_path {
            turns.extend(before.map(|k| (k, vectors[k] + by)));
            turns.extend(behind.map(|k| (k, vectors[k] - by)));
        }
        // A closed path of one letter has the same letter on both sides.
        if turns.len() == 2 && turns[0].0 == turns[1].0 {
            turns.clear();
        }
        let gap: Vector = vectors.iter().sum();
        let landed = |path: &Self| -> Result<bool, Finding> {
            let points = path.points()?;
            let kept = !path.closed || path.closing_gap()?.distance(gap) < SAME_MM;
            Ok(kept && points[point].distance(to) < SAME_MM)
        };
        let mut next = self.clone();
        next.origin = origin;
        next.turn_letters(&turns, &vectors)?;
        if !landed(&next)? {
            next = self.clone();
            next.origin = origin;
            for (k, _) in &turns {
                next.leave_zone(*k, &vectors);
            }
            next.turn_letters(&turns, &vectors)?;
        }
        next.check()?;
        *self = next;
        Ok(())
    }

    /// Gives letters new vectors; owners first, so that letters linked to them need not change when they follow rightly.
    fn turn_letters(&mut self, turns: &[(usize, Vector)], vectors: &[Vector]) -> Result<(), Finding> {
        let (own, linked): (Vec<_>, Vec<_>) = turns
            .iter()
            .partition(|(k, _)| matches!(self.letters[*k].vector, FreeVector::Own(_)));
        for (k, vector) in own {
            self.letters[k].vector = FreeVector::Own(vector);
        }
        for (k, vector) in linked {
            if self.vectors()?[k].distance(vector) >= SAME_MM {
                self.leave_zone(k, vectors);
                self.letters[k].vector = FreeVector::Own(vector);
            }
        }
        Ok(())
    }

    /// Splits a letter in two at a place, or at its middle. The first part keeps its id, the second has the [`Self::next_id`]; both are
    /// zones of their own, so that the new point can be moved.
    ///
    /// # Errors
    /// When there is no such letter, or a part would have no length.
    pub fn insert_point(&mut self, letter: usize, at: Option<Point>) -> Result<(), Finding> {
        self.edit(|path, vectors| {
            let whole = *vectors.get(letter).ok_or_else(|| out_of_path(letter))?;
            let from = nodes(path.origin, &vectors[..letter])[letter];
            let first = at.map_or(whole / 2.0, |at| at - from);
            path.leave_zone(letter, vectors);
            path.letters[letter].vector = FreeVector::Own(first);
            path.insert_letter(letter + 1, FreeVector::Own(whole - first), path.letters[letter].role)
        })
    }

    /// Splits a letter into equal parts of one zone, all with its role. The first keeps its id.
    ///
    /// # Errors
    /// When there is no such letter, fewer than 2 parts, or more than a path can have.
    pub fn split_letter(&mut self, letter: usize, parts: u32) -> Result<(), Finding> {
        limits::count("parts", parts, 2, limits::MAX_LETTERS)?;
        let mut next = self.clone();
        next.check()?;
        let vectors = next.vectors()?;
        let whole = *vectors.get(letter).ok_or_else(|| out_of_path(letter))?;
        limits::letter_count("letters", vectors.len() + parts as usize - 1)?;
        next.leave_zone(letter, &vectors);
        next.letters[letter].vector = FreeVector::Own(whole / f64::from(parts));
        let FreeLetter { id, role, .. } = next.letters[letter];
        for part in 1..parts as usize {
            next.insert_letter(letter + part, FreeVector::Same(id, Sign::Plus), role)?;
        }
        next.check()?;
        *self = next;
        Ok(())
    }

    /// Deletes a point. The letters before and behind it become one, with the id of the one before; at the end of an open path the last
    /// letter goes. Deleting the first point of a closed path makes the second one the first.
    ///
    /// # Errors
    /// When there is no such point, too few would be left, or the joined letter would have no length.
    pub fn delete_point(&mut self, point: usize) -> Result<(), Finding> {
        self.edit(|path, vectors| {
            let count = vectors.len();
            if point > count {
                return Err(out_of_path(point));
            }
            // A closed path needs two letters to come back on.
            if count <= if path.closed { 2 } else { 1 } {
                return Err(Finding::new(Code::EmptyWord, Place::Parameter("letters")));
            }
            let first = point == 0 || (path.closed && point == count);
            let (kept, gone) = match (first, path.closed) {
                (true, true) => (Some(count - 1), 0),
                (true, false) => (None, 0),
                (false, _) if point == count => (None, count - 1),
                (false, _) => (Some(point - 1), point),
            };
            if first {
                path.origin += vectors[0];
            }
            path.leave_zone(gone, vectors);
            if let Some(kept) = kept {
                path.leave_zone(kept, &path.vectors()?);
                path.letters[kept].vector = FreeVector::Own(vectors[kept] + vectors[gone]);
            }
            path.letters.remove(gone);
            Ok(())
        })
    }

    /// Adds a point behind the last one or before the first. On a closed path it comes between the last point and the first.
    ///
    /// # Errors
    /// When an edge would have no length, or the path would be too long.
    pub fn add_point(&mut self, end: PathEnd, to: Point) -> Result<(), Finding> {
        if self.closed {
            return self.insert_point(self.letters.len().saturating_sub(1), Some(to));
        }
        let alternates = self.alternates();
        let role_beside = |beside: Option<&FreeLetter>| match beside {
            Some(letter) if alternates => letter.role.other(),
            Some(letter) => letter.role,
            None => Role::Zig,
        };
        let mut next = self.clone();
        match end {
            PathEnd::First => {
                let role = role_beside(next.letters.first());
                next.insert_letter(0, FreeVector::Own(next.origin - to), role)?;
                next.origin = to;
            }
            PathEnd::Last => {
                let role = role_beside(next.letters.last());
                let last = next.origin + next.closing_gap()?;
                next.insert_letter(next.letters.len(), FreeVector::Own(to - last), role)?;
            }
        }
        next.check()?;
        *self = next;
        Ok(())
    }

    /// Closes the path, with one more letter back to the first point unless the last is within `join_mm` of it; or opens it, all letters kept.
    ///
    /// # Errors
    /// When the path cannot be read or would be too long.
    pub fn set_closed(&mut self, closed: bool, join_mm: f64) -> Result<(), Finding> {
        let mut next = self.clone();
        if closed && !next.closed {
            let gap = next.closing_gap()?;
            if gap.length() > join_mm {
                next.add_point(PathEnd::Last, next.origin)?;
            }
        }
        next.closed = closed;
        next.check()?;
        *self = next;
        Ok(())
    }

    /// Gives a letter a role.
    ///
    /// # Errors
    /// When there is no such letter.
    pub fn set_role(&mut self, letter: usize, role: Role) -> Result<(), Finding> {
        self.letters.get_mut(letter).ok_or_else(|| out_of_path(letter))?.role = role;
        Ok(())
    }

    /// Whether zig and zag take turns from the first letter to the last.
    #[must_use]
    pub fn alternates(&self) -> bool {
        self.letters.windows(2).all(|pair| pair[0].role != pair[1].role)
    }

    /// Edits a copy, lets its roles alternate again if they did, and keeps it if it holds.
    fn edit(&mut self, change: impl FnOnce(&mut Self, &[Vector]) -> Result<(), Finding>) -> Result<(), Finding> {
        self.check()?;
        let vectors = self.vectors()?;
        let alternates = self.alternates();
        let mut next = self.clone();
        change(&mut next, &vectors)?;
        if alternates {
            let mut role = self.letters[0].role;
            for letter in &mut next.letters {
                letter.role = role;
                role = role.other();
            }
        }
        next.check()?;
        *self = next;
        Ok(())
    }

    fn insert_letter(&mut self, position: usize, vector: FreeVector, role: Role) -> Result<(), Finding> {
        let id = self.next_id();
        if self.letters.iter().any(|letter| letter.id == id) {
            return Err(out_of_path(id as usize));
        }
        self.letters.insert(position, FreeLetter { id, vector, role });
        Ok(())
    }
}
