//! All colours of a picture, as data.

use zonewright_geometry::Level;

use crate::Colour;

/// The colours of a picture.
#[derive(Clone, PartialEq, Debug)]
pub struct Palette {
    /// Behind everything.
    pub background: Colour,
    /// The outside of a panel.
    pub outside: Colour,
    /// The inside of a panel; with other colourings it is mixed in, so that the two sides are always told apart.
    pub inside: Colour,
    /// Edges between panels.
    pub edge: Colour,
    /// Edges with one panel.
    pub rim: Colour,
    /// Marks.
    pub mark: Colour,
    /// What is selected.
    pub selection: Colour,
    /// A panel that would be made.
    pub preview: Colour,
    /// Labels.
    pub text: Colour,
    /// Findings that say stop, look, note.
    pub finding: [Colour; 3],
    /// Zones, families and courses, one after the other; when they run out they come again, paler.
    pub categories: Vec<Colour>,
    /// From level panels to upright ones.
    pub slope: [Colour; 2],
    /// Valleys, flat, ridges.
    pub fold: [Colour; 3],
}

/// The seven colours, without black, that Okabe and Ito proposed for all kinds of colour vision
/// (Color Universal Design, 2008), and two dark ones of Tol's muted scheme (SRON technical note, 2021).
const CATEGORIES: [u32; 9] = [
    0xE6_9F00, 0x56_B4E9, 0x00_9E73, 0xF0_E442, 0x00_72B2, 0xD5_5E00, 0xCC_79A7, 0x88_2255, 0x33_2288,
];

impl Palette {
    /// On a light ground.
    #[must_use]
    pub fn light() -> Self {
        Self {
            background: Colour::hex(0xFA_FAF7),
            outside: Colour::hex(0xE9_DFC7),
            inside: Colour::hex(0x8F_A9BF),
            edge: Colour::hex(0x3A_3A3A),
            rim: Colour::hex(0x11_1111),
            mark: Colour::hex(0x1F_5FA8),
            selection: Colour::hex(0xD6_3A00),
            preview: Colour::hex(0x2E_8B57),
            text: Colour::hex(0x1A_1A1A),
            finding: [Colour::hex(0xC0_1B2D), Colour::hex(0xE3_8A00), Colour::hex(0x2F_7DB5)],
            categories: CATEGORIES.map(Colour::hex).to_vec(),
            slope: [Colour::hex(0xF7_E9A0), Colour::hex(0x2C_4A7C)],
            fold: [Colour::hex(0x21_66AC), Colour::hex(0xB8_B8B8), Colour::hex(0xC2_4B1E)],
        }
    }

    /// On a dark ground.
    #[must_use]
    pub fn dark() -> Self {
        Self {
            background: Colour::hex(0x1E_2124),
            outside: Colour::hex(0xCF_C3A6),
            inside: Colour::hex(0x5F_7F9C),
            edge: Colour::hex(0x16_1616),
            rim: Colour::hex(0xF2_F2F2),
            mark: Colour::hex(0x7F_B8F5),
            selection: Colour::hex(0xFF_7A3C),
            preview: Colour::hex(0x5F_D092),
            text: Colour::hex(0xF0_F0F0),
            finding: [Colour::hex(0xFF_5A68), Colour::hex(0xFF_B03A), Colour::hex(0x6F_B7EA)],
            categories: CATEGORIES.map(Colour::hex).to_vec(),
            slope: [Colour::hex(0xF3_E29A), Colour::hex(0x3A_5C97)],
            fold: [Colour::hex(0x5A_A0E0), Colour::hex(0x8E_8E8E), Colour::hex(0xF0_8A50)],
        }
    }

    /// The colour of a category. After the last the first comes again, paler each time round.
    #[must_use]
    pub fn category(&self, index: usize) -> Colour {
        let Some(round) = index.checked_div(self.categories.len()) else {
            return self.outside;
        };
        let colour = self.categories[index % self.categories.len()];
        // Shares of white, so chosen that a round is not mistaken for the one before; then the same again.
        let pale = [0.0, 0.5, 0.28, 0.7][round % 4];
        colour.mix(Colour::hex(0xFF_FFFF), pale)
    }

    /// The colour of a distance: pale at 0, towards that of valleys at -1 and of ridges at 1.
    #[must_use]
    pub fn distance(&self, share: f32) -> Colour {
        let end = self.fold[if share < 0.0 { 0 } else { 2 }];
        self.outside.mix(self.background, 0.5).mix(end, share.abs())
    }

    /// The colour of a finding's level.
    #[must_use]
    pub const fn level(&self, level: Level) -> Colour {
        match level {
            Level::Stop => self.finding[0],
            Level::Look => self.finding[1],
            Level::Note => self.finding[2],
        }
    }
}
