//! Frames as an animated PNG, as an animated GIF, or as numbered PNGs.

use std::path::Path;

use eframe::egui::{FontDefinitions, FontFamily};
use zonewright_painter::{Look, View, raster};

use super::Film;

/// What an animation is written as.
#[derive(Clone, Copy, PartialEq, Eq, Debug)]
pub enum Kind {
    /// One animated GIF: at most 256 colours a frame, shown everywhere.
    Gif,
    /// One animated PNG: all colours.
    Png,
    /// A PNG a frame, `frame-0001.png` and so on.
    Frames,
}

/// The kind that a file's ending asks for; a name without a known ending is a folder of frames.
#[must_use]
pub fn kind_of(path: &Path) -> Kind {
    let ending = path.extension().unwrap_or_default();
    let is = |what: &str| ending.eq_ignore_ascii_case(what);
    if is("gif") {
        Kind::Gif
    } else if is("png") || is("apng") {
        Kind::Png
    } else {
        Kind::Frames
    }
}

/// What was made: names and bytes. A GIF or an animated PNG has one entry without a name.
pub type Written = Vec<(String, Vec<u8>)>;

/// The greatest side of a GIF, in pixels: its sizes have 16 bits.
const GREATEST_GIF_SIDE: u32 = u16::MAX as u32;

/// Draws and writes all frames. `rate` is in frames a second, from 1 to 60. `go_on` hears how many frames are done, and stops the work when it says no.
///
/// # Errors
/// One sentence: a frame that cannot be grown or drawn, or `stopped` when `go_on` said no.
pub fn write(
    film: &Film,
    kind: Kind,
    view: View,
    size: [u32; 2],
    rate: u16,
    go_on: &mut dyn FnMut(usize) -> bool,
) -> Result<Written, String> {
    if !(1..=60).contains(&rate) {
        return Err("take from 1 to 60 frames a second".to_owned());
    }
    if kind == Kind::Gif && size.iter().any(|side| *side > GREATEST_GIF_SIDE) {
        return Err(format!("a GIF has sides of at most {GREATEST_GIF_SIDE} pixels"));
    }
    let look = Look::default();
    let font = pictures_font();
    let mut frame = |at: usize| {
        if !go_on(at) {
            return Err("stopped".to_owned());
        }
        let picture = film.picture(at, view, size, &look)?;
        raster::rgba(&picture, font.as_deref()).map_err(|error| error.to_string())
    };
    match kind {
        Kind::Gif => gif(film.frames(), size, rate, &mut frame).map(|bytes| vec![(String::new(), bytes)]),
        Kind::Png => animated_png(film.frames(), size, rate, &mut frame).map(|bytes| vec![(String::new(), bytes)]),
        Kind::Frames => (0..film.frames())
            .map(|at| {
                let image = frame(at)?;
                let bytes = plain_png(&image)?;
                Ok((format!("frame-{:04}.png", at + 1), bytes))
            })
            .collect(),
    }
}

type Draw<'a> = &'a mut dyn FnMut(usize) -> Result<raster::Image, String>;

fn gif(frames: usize, size: [u32; 2], rate: u16, frame: Draw<'_>) -> Result<Vec<u8>, String> {
    let failed = |error: gif::EncodingError| format!("the GIF cannot be written: {error}");
    #[expect(clippy::cast_possible_truncation, reason = "checked against the greatest side")]
    let [width, height] = size.map(|side| side as u16);
    let mut encoder = gif::Encoder::new(Vec::new(), width, height, &[]).map_err(failed)?;
    encoder.set_repeat(gif::Repeat::Infinite).map_err(failed)?;
    for at in 0..frames {
        let mut image = frame(at)?;
        // 10 is the usual trade of speed for the choice of colours, from 1 to 30.
        let mut coded = gif::Frame::from_rgba_speed(width, height, &mut image.rgba, 10);
        coded.delay = delay(at, frames, rate);
        encoder.write_frame(&coded).map_err(failed)?;
    }
    encoder
        .into_inner()
        .map_err(|error| format!("the GIF cannot be written: {error}"))
}

/// How long a frame is shown, in hundredths of a second, so that all frames up to it take what the rate says.
fn delay(at: usize, frames: usize, rate: u16) -> u16 {
    let until = |k: usize| (k * 100 + usize::from(rate) / 2) / usize::from(rate);
    let own = until(at + 1) - until(at);
    // The last frame stays for a second: it is what one wants to see.
    let hold = if at + 1 == frames { 100 } else { 0 };
    u16::try_from(own + hold).unwrap_or(u16::MAX)
}

fn animated_png(frames: usize, size: [u32; 2], rate: u16, frame: Draw<'_>) -> Result<Vec<u8>, String> {
    let failed = |error: png::EncodingError| format!("the PNG cannot be written: {error}");
    let mut bytes = Vec::new();
    let mut encoder = png::Encoder::new(&mut bytes, size[0], size[1]);
    encoder.set_color(png::ColorType::Rgba);
    encoder.set_depth(png::BitDepth::Eight);
    let count = u32::try_from(frames).map_err(|_| "too many frames".to_owned())?;
    encoder.set_animated(count, 0).map_err(failed)?;
    encoder.set_frame_delay(1, rate).map_err(failed)?;
    let mut writer = encoder.write_header().map_err(failed)?;
    for at in 0..frames {
        if at + 1 == frames {
            // One frame more than a second of them.
            writer.set_frame_delay(rate + 1, rate).map_err(failed)?;
        }
        writer.write_image_data(&frame(at)?.rgba).map_err(failed)?;
    }
    writer.finish().map_err(failed)?;
    Ok(bytes)
}

fn plain_png(image: &raster::Image) -> Result<Vec<u8>, String> {
    let failed = |error: png::EncodingError| format!("the PNG cannot be written: {error}");
    let mut bytes = Vec::new();
    let mut encoder = png::Encoder::new(&mut bytes, image.width, image.height);
    encoder.set_color(png::ColorType::Rgba);
    encoder.set_depth(png::BitDepth::Eight);
    let mut writer = encoder.write_header().map_err(failed)?;
    writer.write_image_data(&image.rgba).map_err(failed)?;
    writer.finish().map_err(failed)?;
    Ok(bytes)
}

/// The window's own text font, so that pictures and window look alike.
#[must_use]
pub fn pictures_font() -> Option<Vec<u8>> {
    let fonts = FontDefinitions::default();
    let name = fonts.families.get(&FontFamily::Proportional)?.first()?;
    Some(fonts.font_data.get(name)?.font.as_ref().as_ref().to_vec())
}

#[cfg(test)]
mod tests {
    use super::*;

    /// The delays add up to the time that so many frames take, and the second at the end.
    #[test]
    fn delays_add_up() {
        for (frames, rate) in [(7, 12), (100, 30), (33, 7)] {
            let sum: u32 = (0..frames).map(|at| u32::from(delay(at, frames, rate))).sum();
            let whole = 100.0 * frames as f64 / f64::from(rate) + 100.0;
            assert!((f64::from(sum) - whole).abs() <= 0.5, "{sum} for {whole}");
        }
    }

    #[test]
    fn the_ending_says_what_is_written() {
        assert_eq!(kind_of(Path::new("a/b.GIF")), Kind::Gif);
        assert_eq!(kind_of(Path::new("b.apng")), Kind::Png);
        assert_eq!(kind_of(Path::new("frames")), Kind::Frames);
    }
}
