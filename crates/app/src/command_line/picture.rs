//! `picture`: the neutral picture, rasterised without a display.

use std::path::Path;

use eframe::egui::{FontDefinitions, FontFamily};
use zonewright_geometry::grow;
use zonewright_painter::{Bounds, Camera, Faces, Look, Projection, Scene, Tints, View, raster};

use super::refusal;
use crate::document::{read_design, write_whole};

/// Draws a design to a PNG file.
pub(super) fn write(file: &Path, output: &Path, view: &str, size: [u32; 2]) -> Result<(), String> {
    let view = View::parse(view).ok_or_else(|| {
        let names = View::ALL.map(View::name).join(", ");
        format!("there is no view `{view}`; there are {names}")
    })?;
    let design = read_design(file).map_err(|error| error.to_string())?;
    let (shell, findings) = grow(&design.shape);
    let Some(bounds) = Bounds::of(&shell) else {
        let why = findings.iter().find(|f| refusal::not_grown(f.code));
        let why = why.map_or_else(|| "it has no panels; lay a course".to_owned(), refusal::sentence);
        return Err(format!("cannot draw {}: {why}", file.display()));
    };
    // Measured views are drawn to scale; the others as an eye sees them.
    let projection = match view {
        View::Plan | View::Front | View::Side | View::Iso => Projection::Parallel,
        View::Fit => Projection::Perspective,
    };
    #[expect(clippy::cast_precision_loss, reason = "at most 16384")]
    let camera = Camera::view(view, projection, &bounds, size.map(|side| side as f32));
    let look = Look {
        faces: Faces::ShadedWithEdges,
        ..Look::default()
    };
    let picture = Scene::exact(&shell).picture(&shell, &camera, &look, &Tints::default(), &[]);
    let png = raster::png(&picture, font().as_deref()).map_err(|error| error.to_string())?;
    write_whole(output, &png)
        .map_err(|cause| format!("cannot write {}: {cause}; choose another place", output.display()))
}

/// The window's own text font, so that pictures and window look alike.
fn font() -> Option<Vec<u8>> {
    let fonts = FontDefinitions::default();
    let name = fonts.families.get(&FontFamily::Proportional)?.first()?;
    Some(fonts.font_data.get(name)?.font.as_ref().as_ref().to_vec())
}
