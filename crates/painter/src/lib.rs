//! Camera, projection, depth order, shading and picking of shells.
//!
//! A [`Scene`] holds the depth order of a still shell; [`Scene::picture`] turns it, a [`Camera`] and a [`Look`] into a
//! [`Picture`]: flat arrays of fills, strokes and texts, back to front, that any 2D surface can draw. Behind the feature `egui`
//! stands the adapter for egui's 2D painter, behind `raster` the one that makes pixels on the CPU.
//!
//! Picture positions are pixels from the top left corner, x right and y down.

mod bounds;
mod brink;
mod camera;
mod clip;
mod colour;
mod emit;
mod look;
mod mark;
mod palette;
mod pick;
mod picture;
mod scene;
mod tint;

#[cfg(feature = "raster")]
pub mod raster;
#[cfg(any(feature = "egui", feature = "raster"))]
mod stroke;
#[cfg(feature = "egui")]
pub mod with_egui;

pub use bounds::Bounds;
pub use camera::{Camera, Lens, Projected, Projection, Ray, View};
pub use colour::Colour;
pub use look::{ColourBy, Faces, Look, Tints};
pub use mark::{Mark, MarkKind, Tone};
pub use palette::Palette;
pub use pick::{Pick, pick};
pub use picture::{Anchor, Item, Paint, Picture, Text};
pub use scene::Scene;
