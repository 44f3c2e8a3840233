//! The links of a free path: which letter's zone each letter belongs to.

use std::collections::BTreeMap;

use super::{FreePath, FreeVector, limits};
use crate::{Code, Finding, Place, Sign, Vector};

/// The letter whose zone a letter belongs to, and which way it runs along it.
#[derive(Clone, Copy, PartialEq, Debug)]
pub(super) struct Owner {
    /// Position in the path of the letter with the vector.
    pub(super) position: usize,
    /// Which way the letter runs along that vector.
    pub(super) sign: Sign,
}

/// Two signs, one after the other.
pub(super) const fn times(a: Sign, b: Sign) -> Sign {
    match a {
        Sign::Plus => b,
        Sign::Minus => b.opposite(),
    }
}

impl FreePath {
    /// Follows the links of all letters, each once.
    ///
    /// # Errors
    /// [`Code::BrokenLink`] when an id comes twice, or a link leads to no letter or round in a circle.
    pub(super) fn owners(&self) -> Result<Vec<Owner>, Finding> {
        let broken = || Finding::new(Code::BrokenLink, Place::Parameter("letters"));
        let mut positions = BTreeMap::new();
        for (position, letter) in self.letters.iter().enumerate() {
            if positions.insert(letter.id, position).is_some() {
                return Err(broken());
            }
        }
        let mut owners: Vec<Option<Owner>> = vec![None; self.letters.len()];
        let mut chain = Vec::new();
        for start in 0..self.letters.len() {
            let mut at = start;
            let mut owner = loop {
                if let Some(owner) = owners[at] {
                    break owner;
                }
                match self.letters[at].vector {
                    FreeVector::Own(_) => {
                        let owner = Owner {
                            position: at,
                            sign: Sign::Plus,
                        };
                        owners[at] = Some(owner);
                        break owner;
                    }
                    FreeVector::Same(id, sign) => {
                        // A chain longer than the path goes round in a circle.
                        if chain.len() >= self.letters.len() {
                            return Err(broken());
                        }
                        chain.push((at, sign));
                        at = *positions.get(&id).ok_or_else(broken)?;
                    }
                }
            };
            while let Some((link, sign)) = chain.pop() {
                owner.sign = times(sign, owner.sign);
                owners[link] = Some(owner);
            }
        }
        owners.into_iter().collect::<Option<_>>().ok_or_else(broken)
    }

    /// The vectors of all letters, in millimetres.
    ///
    /// # Errors
    /// When a link is broken.
    pub fn vectors(&self) -> Result<Vec<Vector>, Finding> {
        Ok(self.vectors_with(&self.owners()?))
    }

    pub(super) fn vectors_with(&self, owners: &[Owner]) -> Vec<Vector> {
        let vector = |owner: &Owner| match self.letters[owner.position].vector {
            FreeVector::Own(own) => own * owner.sign.factor(),
            // An owner has its own vector.
            FreeVector::Same(..) => Vector::ZERO,
        };
        owners.iter().map(vector).collect()
    }

    /// What must hold for a path to be grown: some letters, not too many, all ids different, all links leading to a letter with a vector of
    /// its own, all vectors and the origin finite, none without length, none beyond the greatest length.
    ///
    /// A closed path need not close: how far it misses is [`Self::closing_gap`].
    ///
    /// # Errors
    /// The first thing that does not hold.
    pub fn check(&self) -> Result<(), Finding> {
        limits::letter_count("letters", self.letters.len())?;
        for part in self.origin.to_array() {
            limits::signed_length("origin", part)?;
        }
        self.owners()?;
        for letter in &self.letters {
            if let FreeVector::Own(vector) = letter.vector {
                if !vector.is_finite() {
                    return Err(Finding::new(Code::NotFinite, Place::Parameter("letters")));
                }
                let length = vector.length();
                if length < limits::MIN_LENGTH_MM {
                    return Err(Finding::new(Code::ZeroVector, Place::Parameter("letters")));
                }
                if length > limits::MAX_LENGTH_MM {
                    let most = limits::MAX_LENGTH_MM;
                    return Err(Finding::parameter("letters", length, most, crate::Unit::Millimetres));
                }
            }
        }
        Ok(())
    }

    /// Gives a letter a zone of its own, with its vector of now. Letters that are linked to it stay in the zone that they were in: the
    /// letter's own owner keeps them, or the first of them takes the zone over.
    pub(super) fn leave_zone(&mut self, position: usize, vectors: &[Vector]) {
        let leaving = self.letters[position];
        let mut keeper = match leaving.vector {
            FreeVector::Same(id, sign) => Some((id, sign)),
            FreeVector::Own(_) => None,
        };
        for (letter, vector) in self.letters.iter_mut().zip(vectors) {
            if let FreeVector::Same(to, sign) = letter.vector
                && to == leaving.id
            {
                letter.vector = if let Some((id, of_leaving)) = keeper {
                    FreeVector::Same(id, times(sign, of_leaving))
                } else {
                    keeper = Some((letter.id, sign));
                    FreeVector::Own(*vector)
                };
            }
        }
        self.letters[position].vector = FreeVector::Own(vectors[position]);
    }
}
