//! `picture`: the neutral picture, rasterised without a display.

use std::path::Path;

use zonewright_geometry::grow;
use zonewright_painter::{Bounds, Camera, Faces, Look, Scene, Tints, raster};

use super::{refusal, values};
use crate::animation::{pictures_font, projection_of};
use crate::document::{read_design, write_whole};

/// Draws a design to a PNG file.
pub(super) fn write(file: &Path, output: &Path, view: &str, size: [u32; 2]) -> Result<(), String> {
    let view = values::view(view)?;
    let design = read_design(file).map_err(|error| error.to_string())?;
    let (shell, findings) = grow(&design.shape);
    let Some(bounds) = Bounds::of(&shell) else {
        let why = findings.iter().find(|f| refusal::not_grown(f.code));
        let why = why.map_or_else(|| "it has no panels; lay a course".to_owned(), refusal::sentence);
        return Err(format!("cannot draw {}: {why}", file.display()));
    };
    #[expect(clippy::cast_precision_loss, reason = "at most 16384")]
    let camera = Camera::view(view, projection_of(view), &bounds, size.map(|side| side as f32));
    let look = Look {
        faces: Faces::ShadedWithEdges,
        ..Look::default()
    };
    let picture = Scene::exact(&shell).picture(&shell, &camera, &look, &Tints::default(), &[]);
    let png = raster::png(&picture, pictures_font().as_deref()).map_err(|error| error.to_string())?;
    write_whole(output, &png)
        .map_err(|cause| format!("cannot write {}: {cause}; choose another place", output.display()))
}
