//! A colour as pictures carry it.

/// An sRGB colour with straight (not premultiplied) alpha.
#[derive(Clone, Copy, PartialEq, Eq, Debug, Default)]
pub struct Colour {
    /// Red.
    pub r: u8,
    /// Green.
    pub g: u8,
    /// Blue.
    pub b: u8,
    /// Alpha: 255 is opaque.
    pub a: u8,
}

impl Colour {
    /// An opaque colour from its six hexadecimal digits, `0xRRGGBB`.
    #[must_use]
    pub const fn hex(rgb: u32) -> Self {
        let [_, r, g, b] = rgb.to_be_bytes();
        Self { r, g, b, a: 255 }
    }

    /// The same colour with another alpha.
    #[must_use]
    pub const fn with_alpha(self, a: u8) -> Self {
        Self { a, ..self }
    }

    /// The way from this colour to another: 0 gives this one, 1 the other. Mixed in sRGB values, which is even to the eye.
    #[must_use]
    pub fn mix(self, other: Self, share: f32) -> Self {
        let share = if share.is_finite() { share.clamp(0.0, 1.0) } else { 0.0 };
        let mix = |a: u8, b: u8| round(f32::from(a) + (f32::from(b) - f32::from(a)) * share);
        Self {
            r: mix(self.r, other.r),
            g: mix(self.g, other.g),
            b: mix(self.b, other.b),
            a: mix(self.a, other.a),
        }
    }

    /// Darker by a factor from 0 to 1; alpha stays.
    #[must_use]
    pub fn shade(self, light: f32) -> Self {
        let light = light.clamp(0.0, 1.0);
        Self {
            r: round(f32::from(self.r) * light),
            g: round(f32::from(self.g) * light),
            b: round(f32::from(self.b) * light),
            a: self.a,
        }
    }
}

#[expect(
    clippy::cast_possible_truncation,
    clippy::cast_sign_loss,
    reason = "a channel between 0 and 255; the cast saturates"
)]
fn round(channel: f32) -> u8 {
    (channel + 0.5) as u8
}
