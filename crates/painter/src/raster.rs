//! Makes pixels of the neutral picture on the CPU, with no display and no driver.
//!
//! Fills and strokes are drawn without smoothing, several times larger, and averaged down. Smoothing each fill by itself would let
//! the ground shine through between neighbours, also along the cuts that depth order needs.

use thiserror::Error;
use tiny_skia::{FillRule, Paint as Ink, Path, PathBuilder, Pixmap, Stroke, Transform};
use ttf_parser::{Face, OutlineBuilder};

use crate::{Anchor, Colour, Paint, Picture, Text, stroke::parts};

/// The greatest side of an image, in pixels.
pub const GREATEST_SIDE: u32 = 16_384;
/// Samples a pixel, in each direction.
const SAMPLES: u32 = 4;
/// The drawing is done in strips of at most so many samples, to bound the memory.
const STRIP: u32 = 1 << 23;

/// Why no image was made.
#[derive(Clone, PartialEq, Eq, Debug, Error)]
pub enum RasterError {
    /// The picture has no pixels, or too many.
    #[error("an image of {width} x {height} pixels cannot be made; take sides from 1 to {GREATEST_SIDE}")]
    Size {
        /// The width asked for.
        width: u32,
        /// The height asked for.
        height: u32,
    },
    /// There is text but no font.
    #[error("the picture has text; give a font to draw it with")]
    NoFont,
    /// The font cannot be read.
    #[error("the font cannot be read: {0}")]
    Font(String),
    /// The image cannot be written as PNG.
    #[error("the image cannot be written as PNG: {0}")]
    Png(String),
}

/// An image: rows from the top, four bytes a pixel, sRGB with straight alpha.
#[derive(Clone, PartialEq, Eq, Debug)]
pub struct Image {
    /// Width in pixels.
    pub width: u32,
    /// Height in pixels.
    pub height: u32,
    /// Red, green, blue, alpha for each pixel.
    pub rgba: Vec<u8>,
}

/// The picture as a PNG file. `font` is a TrueType or OpenType file; it may be left out when there are no texts.
///
/// # Errors
/// When the size is out of limits, when there is text and no font that can be read, or when encoding fails.
pub fn png(picture: &Picture, font: Option<&[u8]>) -> Result<Vec<u8>, RasterError> {
    draw(picture, font)?
        .encode_png()
        .map_err(|error| RasterError::Png(error.to_string()))
}

/// The picture as pixels.
///
/// # Errors
/// When the size is out of limits, or when there is text and no font that can be read.
pub fn rgba(picture: &Picture, font: Option<&[u8]>) -> Result<Image, RasterError> {
    let pixmap = draw(picture, font)?;
    Ok(Image {
        width: pixmap.width(),
        height: pixmap.height(),
        rgba: pixmap
            .pixels()
            .iter()
            .flat_map(|pixel| {
                let c = pixel.demultiply();
                [c.red(), c.green(), c.blue(), c.alpha()]
            })
            .collect(),
    })
}

#[expect(
    clippy::cast_possible_truncation,
    clippy::cast_sign_loss,
    reason = "the cast saturates, and the limits are checked right after"
)]
fn draw(picture: &Picture, font: Option<&[u8]>) -> Result<Pixmap, RasterError> {
    let [width, height] = picture.size.map(|side| side.round() as u32);
    let sized = |width, height| Pixmap::new(width, height).ok_or(RasterError::Size { width, height });
    if width > GREATEST_SIDE || height > GREATEST_SIDE {
        return Err(RasterError::Size { width, height });
    }
    let mut image = sized(width, height)?;
    let rows = (STRIP / (width * SAMPLES * SAMPLES)).clamp(1, height);
    let mut strip = sized(width * SAMPLES, rows * SAMPLES)?;
    for top in (0..height).step_by(rows as usize) {
        strip.fill(solid(picture.background));
        items(picture, &mut strip, top as f32);
        average(&strip, &mut image, top);
    }
    texts(picture, font, &mut image)?;
    Ok(image)
}

/// Draws fills and strokes into a strip whose first row is `top`.
fn items(picture: &Picture, strip: &mut Pixmap, top: f32) {
    let scale = SAMPLES as f32;
    let onto = Transform::from_row(scale, 0.0, 0.0, scale, 0.0, -top * scale);
    let bottom = top + strip.height() as f32 / scale;
    let mut ink = Ink {
        anti_alias: false,
        ..Ink::default()
    };
    for item in &picture.items {
        let points = picture.points_of(item);
        let room = match item.paint {
            Paint::Fill { .. } => 0.0,
            Paint::Stroke { width, .. } => width,
        };
        if points.iter().all(|p| p[1] + room < top) || points.iter().all(|p| p[1] - room > bottom) {
            continue;
        }
        ink.set_color(solid(item.colour));
        match item.paint {
            Paint::Fill { .. } => {
                if let Some(path) = polygon(points) {
                    strip.fill_path(&path, &ink, FillRule::Winding, onto, None);
                }
            }
            Paint::Stroke {
                width, dashed, closed, ..
            } => {
                if let Some(path) = line(picture, points, closed, dashed, width) {
                    let stroke = Stroke {
                        width,
                        line_cap: if dashed {
                            tiny_skia::LineCap::Butt
                        } else {
                            tiny_skia::LineCap::Round
                        },
                        line_join: tiny_skia::LineJoin::Round,
                        ..Stroke::default()
                    };
                    strip.stroke_path(&path, &ink, &stroke, onto, None);
                }
            }
        }
    }
}

fn polygon(points: &[[f32; 2]]) -> Option<Path> {
    let mut path = PathBuilder::with_capacity(points.len() + 1, points.len());
    let (&[x, y], rest) = points.split_first()?;
    path.move_to(x, y);
    for &[x, y] in rest {
        path.line_to(x, y);
    }
    path.close();
    path.finish()
}

fn line(picture: &Picture, points: &[[f32; 2]], closed: bool, dashed: bool, width: f32) -> Option<Path> {
    if closed && !dashed {
        return polygon(points);
    }
    let mut path = PathBuilder::new();
    let mut last = None;
    parts(points, closed, dashed, picture.size, width, |a, b| {
        if last != Some(a) {
            path.move_to(a[0], a[1]);
        }
        path.line_to(b[0], b[1]);
        last = Some(b);
    });
    path.finish()
}

/// Averages the samples of a strip into the image from row `top` on. Both hold premultiplied alpha, which may be averaged.
#[expect(clippy::cast_possible_truncation, reason = "the mean of bytes is a byte")]
fn average(strip: &Pixmap, image: &mut Pixmap, top: u32) {
    let samples = SAMPLES as usize;
    let width = image.width() as usize;
    let row = width * 4;
    let rows = (strip.height() / SAMPLES).min(image.height() - top) as usize;
    let from = strip.data();
    let onto = &mut image.data_mut()[top as usize * row..][..rows * row];
    let mut sums = vec![0_u16; row];
    for (y, pixels) in onto.chunks_exact_mut(row).enumerate() {
        sums.fill(0);
        for line in from[y * samples * samples * row..]
            .chunks_exact(samples * row)
            .take(samples)
        {
            for (sum, block) in sums.chunks_exact_mut(4).zip(line.chunks_exact(4 * samples)) {
                for sample in block.chunks_exact(4) {
                    for channel in 0..4 {
                        sum[channel] += u16::from(sample[channel]);
                    }
                }
            }
        }
        let whole = (SAMPLES * SAMPLES) as u16;
        for (pixel, sum) in pixels.iter_mut().zip(&sums) {
            *pixel = ((sum + whole / 2) / whole) as u8;
        }
    }
}

fn texts(picture: &Picture, font: Option<&[u8]>, image: &mut Pixmap) -> Result<(), RasterError> {
    if picture.texts.is_empty() {
        return Ok(());
    }
    let face =
        Face::parse(font.ok_or(RasterError::NoFont)?, 0).map_err(|error| RasterError::Font(error.to_string()))?;
    for text in &picture.texts {
        let Some(path) = outline(&face, text) else { continue };
        let mut ink = Ink::default();
        ink.set_color(solid(text.halo));
        let halo = Stroke {
            width: 3.0,
            line_join: tiny_skia::LineJoin::Round,
            ..Stroke::default()
        };
        image.stroke_path(&path, &ink, &halo, Transform::identity(), None);
        ink.set_color(solid(text.colour));
        image.fill_path(&path, &ink, FillRule::Winding, Transform::identity(), None);
    }
    Ok(())
}

/// The letters of a text, set side by side. A letter that the font lacks is the font's own sign for that.
fn outline(face: &Face<'_>, text: &Text) -> Option<Path> {
    let scale = text.size / (f32::from(face.ascender()) - f32::from(face.descender()));
    if !scale.is_finite() {
        return None;
    }
    let glyphs: Vec<_> = text
        .text
        .chars()
        .map(|letter| face.glyph_index(letter).unwrap_or_default())
        .collect();
    let advance = |&id: &_| f32::from(face.glyph_hor_advance(id).unwrap_or_default()) * scale;
    let width: f32 = glyphs.iter().map(advance).sum();
    let left = match text.anchor {
        Anchor::Left => text.pos[0],
        Anchor::Centre => text.pos[0] - width * 0.5,
    };
    let capital = f32::from(face.capital_height().unwrap_or_else(|| face.ascender()));
    let mut pen = Pen {
        path: PathBuilder::new(),
        at: [left, text.pos[1] + capital * scale * 0.5],
        scale,
    };
    for id in &glyphs {
        face.outline_glyph(*id, &mut pen);
        pen.at[0] += advance(id);
    }
    pen.path.finish()
}

/// Takes a glyph's outline, y up in font units, to the picture.
struct Pen {
    path: PathBuilder,
    at: [f32; 2],
    scale: f32,
}

impl Pen {
    fn x(&self, x: f32) -> f32 {
        self.at[0] + x * self.scale
    }

    fn y(&self, y: f32) -> f32 {
        self.at[1] - y * self.scale
    }
}

impl OutlineBuilder for Pen {
    fn move_to(&mut self, x: f32, y: f32) {
        self.path.move_to(self.x(x), self.y(y));
    }

    fn line_to(&mut self, x: f32, y: f32) {
        self.path.line_to(self.x(x), self.y(y));
    }

    fn quad_to(&mut self, x1: f32, y1: f32, x: f32, y: f32) {
        self.path.quad_to(self.x(x1), self.y(y1), self.x(x), self.y(y));
    }

    fn curve_to(&mut self, x1: f32, y1: f32, x2: f32, y2: f32, x: f32, y: f32) {
        self.path
            .cubic_to(self.x(x1), self.y(y1), self.x(x2), self.y(y2), self.x(x), self.y(y));
    }

    fn close(&mut self) {
        self.path.close();
    }
}

fn solid(colour: Colour) -> tiny_skia::Color {
    tiny_skia::Color::from_rgba8(colour.r, colour.g, colour.b, colour.a)
}
