//! Closing a free path: its gap, sharing it out, and dragging an edge of a path that stays closed.

use super::{FreePath, FreeVector};
use crate::{Code, Finding, Place, Sign, Unit, Vector};

impl FreePath {
    /// From the first point to the end of the last letter, in millimetres: what a closed path misses, the whole extent of an open one.
    ///
    /// # Errors
    /// When a link is broken.
    pub fn closing_gap(&self) -> Result<Vector, Finding> {
        Ok(self.vectors()?.into_iter().sum())
    }

    /// Closes the gap by the smallest change of the zones, measured by the sum of its squares.
    ///
    /// With `c` the signed count of a zone's letters, each zone changes by `-gap c / sum c c`: the least-squares solution of
    /// `sum c change = -gap` (one constraint, so in closed form; derived). Zones that cancel already stay as they are.
    ///
    /// # Errors
    /// When the path cannot be read; [`Code::ClosingGap`] when all zones cancel and still a gap is left; [`Code::ZeroVector`] when a zone
    /// would vanish. The path is then unchanged.
    pub fn share_gap(&mut self) -> Result<(), Finding> {
        let mut next = self.clone();
        next.share_among(None)?;
        next.check()?;
        *self = next;
        Ok(())
    }

    /// Gives the letter at a position a new vector, in millimetres, and with it its whole zone. On a closed path the other zones take up the gap,
    /// each as little as can be; on an open one everything behind comes along.
    ///
    /// # Errors
    /// As [`Self::share_gap`].
    pub fn drag_edge(&mut self, letter: usize, vector: Vector) -> Result<(), Finding> {
        let mut next = self.clone();
        let owner = *next.owners()?.get(letter).ok_or_else(|| out_of_path(letter))?;
        next.letters[owner.position].vector = FreeVector::Own(vector * owner.sign.factor());
        if next.closed {
            next.share_among(Some(owner.position))?;
        }
        next.check()?;
        *self = next;
        Ok(())
    }

    /// Shares the gap out over the zones of all owners but one.
    fn share_among(&mut self, but: Option<usize>) -> Result<(), Finding> {
        let owners = self.owners()?;
        let gap: Vector = self.vectors_with(&owners).into_iter().sum();
        let mut counts = vec![0.0; self.letters.len()];
        for owner in &owners {
            counts[owner.position] += match owner.sign {
                Sign::Plus => 1.0,
                Sign::Minus => -1.0,
            };
        }
        if let Some(but) = but {
            counts[but] = 0.0;
        }
        let squares: f64 = counts.iter().map(|c| c * c).sum();
        if squares == 0.0 {
            return if gap == Vector::ZERO {
                Ok(())
            } else {
                let missed = Finding::new(Code::ClosingGap, Place::Parameter("letters"));
                Err(missed.with(gap.length(), Some(0.0), Unit::Millimetres))
            };
        }
        for (letter, c) in self.letters.iter_mut().zip(counts) {
            if let FreeVector::Own(own) = &mut letter.vector
                && c != 0.0
            {
                *own -= gap * (c / squares);
            }
        }
        Ok(())
    }
}

/// There is no letter or point of this number.
#[expect(
    clippy::cast_precision_loss,
    reason = "paths have far fewer letters than f64 has integers"
)]
pub(super) fn out_of_path(number: usize) -> Finding {
    Finding::new(Code::ParameterLimit, Place::Parameter("letters")).with(number as f64, None, Unit::Count)
}
