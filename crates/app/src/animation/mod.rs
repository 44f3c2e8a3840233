//! Animations: the growth of a shell, course by course, or one parameter that runs from a value to another.

mod encode;
mod film;
mod save;

pub use encode::{Kind, Written, kind_of, pictures_font, write};
pub use film::{Film, MOST_FRAMES, Subject, projection_of};
pub use save::save;
