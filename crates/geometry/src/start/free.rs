//! A path of free points.

use serde::{Deserialize, Serialize};

use super::{FirstWord, Role, StartLetter, StartZone, free_links::times, limits};
use crate::{Code, Finding, Place, Point, Sign, Vector};

/// A path of free points, open or closed. Letters have ids of their own, so that names survive inserting and deleting.
#[derive(Clone, PartialEq, Debug, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct FreePath {
    /// The first point.
    pub origin: Point,
    /// Whether the last letter is meant to lead back to the first point.
    #[serde(default)]
    pub closed: bool,
    /// The edges of the path.
    pub letters: Vec<FreeLetter>,
}

/// An edge of a free path.
#[derive(Clone, Copy, PartialEq, Debug, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct FreeLetter {
    /// Its id: unique in the path. Only the highest one can come again, once its letter is deleted; see [`FreePath::next_id`].
    pub id: u32,
    /// Where its vector comes from.
    pub vector: FreeVector,
    /// Its role.
    pub role: Role,
}

/// Where a free letter's vector comes from.
#[derive(Clone, Copy, PartialEq, Debug, Serialize, Deserialize)]
#[serde(rename_all = "snake_case")]
pub enum FreeVector {
    /// Its own zone, in millimetres; the letter runs along it.
    Own(Vector),
    /// The zone of another letter, by that letter's id.
    Same(u32, Sign),
}

/// What follows when a point of the path is dragged.
#[derive(Clone, Copy, PartialEq, Eq, Debug)]
pub enum DragRule {
    /// Only the point moves; the edges before and behind it turn.
    Neighbours,
    /// Everything behind the point comes along.
    Tail,
}

/// An end of an open path.
#[derive(Clone, Copy, PartialEq, Eq, Debug)]
pub enum PathEnd {
    /// Before the first letter.
    First,
    /// Behind the last letter.
    Last,
}

impl FreePath {
    /// See [`crate::Start::first_word`].
    ///
    /// Every letter with a vector of its own brings a zone, whose id is the letter's; linked letters share it.
    ///
    /// # Errors
    /// As [`Self::check`].
    pub fn first_word(&self) -> Result<FirstWord, Finding> {
        self.check()?;
        let mut zones = Vec::new();
        let mut zone_of = vec![0; self.letters.len()];
        for (letter, zone) in self.letters.iter().zip(&mut zone_of) {
            if let FreeVector::Own(vector) = letter.vector {
                *zone = u32::try_from(zones.len()).unwrap_or(u32::MAX);
                zones.push(StartZone {
                    id: letter.id,
                    vector,
                    derived: false,
                });
            }
        }
        let letters = self.letters.iter().zip(self.owners()?);
        let letters = letters
            .map(|(letter, owner)| StartLetter {
                index: letter.id,
                zone: zone_of[owner.position],
                sign: owner.sign,
                role: letter.role,
            })
            .collect();
        Ok(FirstWord {
            origin: self.origin,
            closed: self.closed,
            zones,
            letters,
            grounded: false,
            on_hull: false,
        })
    }

    /// The same word as free letters: letter indices become ids.
    ///
    /// A zone becomes the vector of the first letter that runs along it, and its other letters are linked to that one, so that signs stay
    /// as they are; [`FirstWord::free_zone_ids`] says what each zone is called afterwards. (A zone that letters only run against is
    /// turned round.)
    #[must_use]
    pub fn from_word(word: &FirstWord) -> Self {
        let owners = word.zone_owners();
        let letters = word.letters.iter().enumerate().map(|(k, letter)| {
            let owner = owners[letter.zone as usize].unwrap_or(k);
            let vector = if owner == k {
                FreeVector::Own(word.vector(letter))
            } else {
                FreeVector::Same(word.letters[owner].index, times(letter.sign, word.letters[owner].sign))
            };
            FreeLetter {
                id: letter.index,
                vector,
                role: letter.role,
            }
        });
        Self {
            origin: word.origin,
            closed: word.closed,
            letters: letters.collect(),
        }
    }

    /// A path through points, every edge a zone of its own, roles alternating from zig.
    ///
    /// On a closed path the last letter leads from the last point back to the first; a last point that repeats the first is left out.
    ///
    /// # Errors
    /// As [`Self::check`]; points that follow one another may not coincide.
    pub fn from_points(points: &[Point], closed: bool) -> Result<Self, Finding> {
        let origin = *points
            .first()
            .ok_or_else(|| Finding::new(Code::EmptyWord, Place::Parameter("letters")))?;
        limits::letter_count("letters", points.len())?;
        for part in points.iter().flat_map(|point| point.to_array()) {
            limits::signed_length("letters", part)?;
        }
        let mut vectors: Vec<_> = points.windows(2).map(|pair| pair[1] - pair[0]).collect();
        if let Some(&last) = points.last()
            && closed
            && last.distance(origin) >= limits::MIN_LENGTH_MM
        {
            vectors.push(origin - last);
        }
        let letters = (0..).zip(vectors).map(|(id, vector)| FreeLetter {
            id,
            vector: FreeVector::Own(vector),
            role: if id % 2 == 0 { Role::Zig } else { Role::Zag },
        });
        let path = Self {
            origin,
            closed,
            letters: letters.collect(),
        };
        path.check()?;
        Ok(path)
    }

    /// The nodes of the path: one more than letters. On a path that closes the last one equals the first.
    ///
    /// # Errors
    /// When a link is broken.
    pub fn points(&self) -> Result<Vec<Point>, Finding> {
        Ok(nodes(self.origin, &self.vectors()?))
    }

    /// An id that no letter has: the highest and one more.
    ///
    /// Ids of letters that were deleted lie below it, except when the highest itself was deleted.
    #[must_use]
    pub fn next_id(&self) -> u32 {
        let highest = self.letters.iter().map(|letter| letter.id).max();
        highest.map_or(0, |id| id.saturating_add(1))
    }

    /// The position of a letter in the path.
    #[must_use]
    pub fn position(&self, id: u32) -> Option<usize> {
        self.letters.iter().position(|letter| letter.id == id)
    }
}

pub(super) fn nodes(origin: Point, vectors: &[Vector]) -> Vec<Point> {
    let mut at = origin;
    let mut nodes = Vec::with_capacity(vectors.len() + 1);
    nodes.push(at);
    for vector in vectors {
        at += *vector;
        nodes.push(at);
    }
    nodes
}
