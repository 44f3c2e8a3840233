//! Pixels against areas worked out by hand.

#![cfg(feature = "raster")]
#![expect(clippy::unwrap_used, reason = "a test may")]

use zonewright_geometry::NONE;
use zonewright_painter::{
    Anchor, Colour, Paint, Picture, Text,
    raster::{self, RasterError},
};

const GROUND: Colour = Colour::hex(0xFF_FFFF);
const INK: Colour = Colour::hex(0x00_0000);

fn blank(size: [f32; 2]) -> Picture {
    Picture {
        size,
        background: GROUND,
        ..Picture::default()
    }
}

fn pixel(picture: &Picture, x: u32, y: u32) -> [u8; 4] {
    let image = raster::rgba(picture, None).unwrap();
    let at = ((y * image.width + x) * 4) as usize;
    image.rgba[at..at + 4].try_into().unwrap()
}

#[test]
fn a_half_covered_pixel_is_half_dark() {
    let mut picture = blank([8.0, 8.0]);
    let fill = Paint::Fill { panel: 0 };
    picture.push([[2.0, 2.0], [4.5, 2.0], [4.5, 6.0], [2.0, 6.0]], INK, fill);
    assert_eq!(pixel(&picture, 0, 0), [255; 4]);
    assert_eq!(pixel(&picture, 3, 3), [0, 0, 0, 255]);
    // Half of 255, rounded to the nearest: 8 of 16 samples.
    assert_eq!(pixel(&picture, 4, 3), [128, 128, 128, 255]);
}

/// Two halves of a square leave no seam along their common slanted line.
#[test]
fn neighbours_leave_no_seam() {
    let mut picture = blank([40.0, 40.0]);
    let fill = Paint::Fill { panel: 0 };
    picture.push([[0.0, 0.0], [23.3, 0.0], [11.7, 40.0], [0.0, 40.0]], INK, fill);
    picture.push([[23.3, 0.0], [40.0, 0.0], [40.0, 40.0], [11.7, 40.0]], INK, fill);
    let image = raster::rgba(&picture, None).unwrap();
    assert!(image.rgba.chunks(4).all(|p| p == [0, 0, 0, 255]));
}

/// A line of width 2 down the middle of two columns covers them and no other; half of it when dashed.
#[test]
fn lines_have_their_width() {
    let mut picture = blank([20.0, 40.0]);
    let stroke = |dashed| Paint::Stroke {
        width: 2.0,
        dashed,
        closed: false,
        edge: NONE,
    };
    picture.push([[5.0, 0.0], [5.0, 40.0]], INK, stroke(false));
    picture.push([[15.0, 0.0], [15.0, 40.0]], INK, stroke(true));
    let image = raster::rgba(&picture, None).unwrap();
    let dark = |x: usize| (0..40).filter(|y| image.rgba[(y * 20 + x) * 4] < 64).count();
    assert_eq!([3, 4, 5, 6].map(dark), [0, 40, 40, 0]);
    assert_eq!([13, 14, 15, 16].map(dark), [0, 20, 20, 0]);
}

/// Large pictures are drawn strip by strip; nothing shows where strips meet.
#[test]
fn strips_meet() {
    let mut picture = blank([1000.0, 1200.0]);
    picture.push(
        [[0.0, 0.0], [1000.0, 0.0], [1000.0, 1200.0], [0.0, 1200.0]],
        INK,
        Paint::Fill { panel: 0 },
    );
    let image = raster::rgba(&picture, None).unwrap();
    assert_eq!((image.width, image.height), (1000, 1200));
    assert!(image.rgba.chunks(4).all(|p| p == [0, 0, 0, 255]));
}

#[test]
fn what_cannot_be_drawn_is_said() {
    for size in [[0.0, 5.0], [5.0, f32::NAN], [1e9, 5.0]] {
        assert!(matches!(raster::png(&blank(size), None), Err(RasterError::Size { .. })));
    }
    let mut picture = blank([50.0, 20.0]);
    picture.texts.push(Text {
        pos: [25.0, 10.0],
        anchor: Anchor::Centre,
        size: 14.0,
        colour: INK,
        halo: GROUND,
        text: "H".to_owned(),
    });
    assert_eq!(raster::png(&picture, None), Err(RasterError::NoFont));
    assert!(matches!(
        raster::png(&picture, Some(b"no font")),
        Err(RasterError::Font(_))
    ));
}

/// The letter H set in the middle is dark left and right of it, and as dark on both sides; the file is a PNG.
#[cfg(feature = "egui")]
#[test]
fn text_is_set_about_its_anchor() {
    let fonts = egui::FontDefinitions::default();
    let font: &[u8] = (*fonts.font_data["Ubuntu-Light"].font).as_ref();
    let mut picture = blank([40.0, 40.0]);
    picture.texts.push(Text {
        pos: [20.0, 20.0],
        anchor: Anchor::Centre,
        size: 32.0,
        colour: INK,
        halo: GROUND,
        text: "H".to_owned(),
    });
    let image = raster::rgba(&picture, Some(font)).unwrap();
    let dark = |xs: core::ops::Range<usize>, ys: core::ops::Range<usize>| -> u32 {
        ys.flat_map(|y| xs.clone().map(move |x| (y * 40 + x) * 4))
            .map(|at| u32::from(255 - image.rgba[at]))
            .sum()
    };
    let sides = [
        dark(0..20, 0..40),
        dark(20..40, 0..40),
        dark(0..40, 0..20),
        dark(0..40, 20..40),
    ];
    assert!(sides.iter().all(|&s| s > 5000), "{sides:?}");
    let even = |a: u32, b: u32| a.abs_diff(b) * 10 < a + b;
    assert!(even(sides[0], sides[1]) && even(sides[2], sides[3]), "{sides:?}");
    assert!(
        raster::png(&picture, Some(font))
            .unwrap()
            .starts_with(b"\x89PNG\r\n\x1a\n")
    );
}
