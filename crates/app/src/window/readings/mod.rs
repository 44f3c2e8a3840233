//! The readouts: what they say now, how they differ from a remembered state, and where their extremes are.

mod remembered;
mod shown;
mod values;

pub use remembered::{ReadingAct, Remembered};
pub(super) use shown::MOST_CLASSES;
pub use shown::{End, Shown};
pub(super) use values::{Reading, Value, measured, readings};
