//! Colours of letters: those of their zones, as the picture has them.

use egui::Color32;
use zonewright_geometry::{Shell, Side};
use zonewright_painter::Palette;

use crate::window::{picture, state::State};

/// How much of the text's colour letters get on a light ground.
const DARKER: f32 = 0.2;

/// The colours of zones.
#[derive(Debug)]
pub(super) struct ZoneColours<'a> {
    shell: &'a Shell,
    palette: Palette,
    light: bool,
}

impl<'a> ZoneColours<'a> {
    /// The colours of the look that is on.
    #[must_use]
    pub(super) fn new(state: &'a State) -> Self {
        Self {
            shell: &state.derived.shell,
            palette: picture::palette(state),
            light: !state.view.dark,
        }
    }

    /// The colour of a letter as drawn; round a closed front the first is drawn again behind the last.
    #[must_use]
    pub(super) fn of(&self, side: Side, drawn: usize) -> Color32 {
        let letters = &self.shell.fronts[usize::from(side == Side::Aft)].letters;
        let letter = letters[drawn % letters.len().max(1)].letter;
        let zone = &self.shell.zones[self.shell.zone_of(letter) as usize];
        let colour = self.palette.category(zone.counts_as as usize);
        // A thin line in a pale colour is hard to see on a light ground.
        let colour = if self.light {
            colour.mix(self.palette.text, DARKER)
        } else {
            colour
        };
        Color32::from_rgb(colour.r, colour.g, colour.b)
    }
}
