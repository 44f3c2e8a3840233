//! At most 256 colours for a picture, so that its file is a third as large.

use std::collections::BTreeMap;

use crate::pixels::Canvas;

/// A colour of the picture.
struct Used {
    rgb: [u8; 3],
    /// How many pixels have it.
    pixels: u64,
    /// The entry of the palette that is nearest to it, and the squared distance.
    nearest: u8,
    off: u64,
}

/// The palette, three bytes a colour, and the entry of each pixel. Each entry is the colour that is missed most so far, by how far
/// off it would be drawn and how often: wide grounds keep their very colour, and no small mark gets another one.
pub(crate) fn of(canvas: &Canvas) -> (Vec<u8>, Vec<u8>) {
    let rgb = canvas.pixels.iter().map(|c| [c.r(), c.g(), c.b()]);
    let mut counts: BTreeMap<[u8; 3], u64> = BTreeMap::new();
    for colour in rgb.clone() {
        *counts.entry(colour).or_default() += 1;
    }
    // Until there is an entry, each is as far off as can be.
    let far = 3 * 255 * 255;
    let mut used: Vec<Used> = counts
        .into_iter()
        .map(|(rgb, pixels)| Used {
            rgb,
            pixels,
            nearest: 0,
            off: far,
        })
        .collect();
    let mut palette = Vec::new();
    for entry in 0..=u8::MAX {
        let missed = used.iter().max_by_key(|u| u.pixels * u.off).filter(|u| 0 < u.off);
        let Some(colour) = missed.map(|u| u.rgb) else { break };
        palette.extend(colour);
        for one in &mut used {
            let off = (0..3).map(|k| u64::from(one.rgb[k].abs_diff(colour[k])).pow(2)).sum();
            if off < one.off {
                (one.nearest, one.off) = (entry, off);
            }
        }
    }
    let entries: BTreeMap<[u8; 3], u8> = used.iter().map(|u| (u.rgb, u.nearest)).collect();
    (palette, rgb.map(|colour| entries[&colour]).collect())
}
