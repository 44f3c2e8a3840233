//! Colours and sizes, read from `assets/theme.ron`: the only place that knows a colour of the window.

use egui::{Color32, CornerRadius, Stroke, Theme as Look, Visuals, style::WidgetVisuals, vec2};
use serde::Deserialize;

/// An opaque colour: red, green, blue.
type Rgb = (u8, u8, u8);

/// Colours of one look.
#[derive(Clone, Copy, PartialEq, Eq, Debug, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct Colours {
    window: Rgb,
    panel: Rgb,
    field: Rgb,
    control: Rgb,
    control_hover: Rgb,
    control_active: Rgb,
    line: Rgb,
    text: Rgb,
    text_weak: Rgb,
    accent: Rgb,
    accent_weak: Rgb,
    stop: Rgb,
    look: Rgb,
    note: Rgb,
    picture: Rgb,
    handle: Rgb,
    preview: Rgb,
}

/// Sizes, in points.
#[derive(Clone, Copy, PartialEq, Debug, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct Sizes {
    /// Body text.
    pub text: f32,
    /// Small text.
    pub small: f32,
    /// Headings of sections.
    pub heading: f32,
    /// Space between controls.
    pub gap: f32,
    /// Margin inside panels.
    pub margin: i8,
    /// Rounding of corners.
    pub corner: u8,
    /// Height of a control.
    pub control: f32,
    /// Width of the left panel.
    pub left: f32,
    /// Width of the course ladder.
    pub ladder: f32,
    /// Width of the right panel.
    pub right: f32,
    /// Height of the front strip.
    pub strip: f32,
}

/// The theme file.
#[derive(Clone, PartialEq, Debug, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct Theme {
    /// The light look.
    pub light: Colours,
    /// The dark look.
    pub dark: Colours,
    /// Sizes of both.
    pub sizes: Sizes,
}

const fn opaque((r, g, b): Rgb) -> Color32 {
    Color32::from_rgb(r, g, b)
}

macro_rules! colours {
    ($($(#[$doc:meta])* $name:ident),* $(,)?) => {
        impl Colours {
            $($(#[$doc])* #[must_use] pub const fn $name(&self) -> Color32 { opaque(self.$name) })*
        }
    };
}

colours! {
    /// Weak text.
    text_weak,
    /// Text.
    text,
    /// What is picked or live.
    accent,
    /// A quiet mark of what is live.
    accent_weak,
    /// A finding of level stop.
    stop,
    /// A finding of level look.
    look,
    /// A finding of level note.
    note,
    /// The ground of the picture and of the strip.
    picture,
    /// Lines between things.
    line,
    /// The ground of fields.
    field,
    /// Handles of path points.
    handle,
    /// The panel that a V would make.
    preview,
}

impl Theme {
    /// The theme that the program is built with.
    ///
    /// # Panics
    /// Never on a build whose tests passed: they read the same text.
    #[must_use]
    pub fn bundled() -> Self {
        ron::from_str(include_str!("../../../../assets/theme.ron")).expect("assets/theme.ron was read by the tests")
    }

    /// Colours of the look that is on.
    #[must_use]
    pub const fn colours(&self, dark: bool) -> &Colours {
        if dark { &self.dark } else { &self.light }
    }

    /// Hands colours and sizes to egui.
    pub fn apply(&self, ctx: &egui::Context) {
        for (look, colours) in [(Look::Light, &self.light), (Look::Dark, &self.dark)] {
            ctx.set_visuals_of(look, self.visuals(look, colours));
            ctx.style_mut_of(look, |style| self.spacing(style));
        }
    }

    fn spacing(&self, style: &mut egui::Style) {
        let sizes = &self.sizes;
        for (kind, font) in &mut style.text_styles {
            font.size = match kind {
                egui::TextStyle::Heading => sizes.heading,
                egui::TextStyle::Small => sizes.small,
                _ => sizes.text,
            };
        }
        style.spacing.item_spacing = vec2(sizes.gap, sizes.gap);
        style.spacing.button_padding = vec2(sizes.gap, sizes.gap * 0.5);
        style.spacing.interact_size = vec2(sizes.control * 1.5, sizes.control);
        style.spacing.window_margin = egui::Margin::same(sizes.margin);
        style.spacing.scroll = egui::style::ScrollStyle::thin();
        style.animation_time = 0.0;
    }

    fn visuals(&self, look: Look, c: &Colours) -> Visuals {
        let mut v = look.default_visuals();
        let radius = CornerRadius::same(self.sizes.corner);
        let widget = |fill: Rgb, line: Rgb, text: Rgb| WidgetVisuals {
            bg_fill: opaque(fill),
            weak_bg_fill: opaque(fill),
            bg_stroke: Stroke::new(1.0, opaque(line)),
            corner_radius: radius,
            fg_stroke: Stroke::new(1.0, opaque(text)),
            expansion: 0.0,
        };
        v.widgets.noninteractive = widget(c.panel, c.line, c.text);
        v.widgets.inactive = widget(c.control, c.line, c.text);
        v.widgets.hovered = widget(c.control_hover, c.accent, c.text);
        v.widgets.active = widget(c.control_active, c.accent, c.text);
        v.widgets.open = widget(c.control_hover, c.line, c.text);
        v.panel_fill = opaque(c.panel);
        v.window_fill = opaque(c.window);
        v.window_stroke = Stroke::new(1.0, opaque(c.line));
        v.window_corner_radius = radius;
        v.menu_corner_radius = radius;
        v.extreme_bg_color = opaque(c.field);
        v.text_edit_bg_color = Some(opaque(c.field));
        v.faint_bg_color = opaque(c.window);
        v.weak_text_color = Some(opaque(c.text_weak));
        v.selection.bg_fill = opaque(c.accent_weak);
        v.selection.stroke = Stroke::new(1.0, opaque(c.text));
        v.warn_fg_color = opaque(c.look);
        v.error_fg_color = opaque(c.stop);
        v.hyperlink_color = opaque(c.accent);
        v
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    /// Relative luminance and contrast as WCAG 2.2 defines them (sections "relative luminance" and "contrast ratio").
    fn contrast(a: Rgb, b: Rgb) -> f64 {
        let luminance = |(r, g, b): Rgb| {
            let part = |v: u8| {
                let v = f64::from(v) / 255.0;
                if v <= 0.04045 {
                    v / 12.92
                } else {
                    ((v + 0.055) / 1.055).powf(2.4)
                }
            };
            0.2126 * part(r) + 0.7152 * part(g) + 0.0722 * part(b)
        };
        let (high, low) = (luminance(a).max(luminance(b)), luminance(a).min(luminance(b)));
        (high + 0.05) / (low + 0.05)
    }

    #[test]
    fn text_can_be_read_on_every_ground_of_both_looks() {
        let theme = Theme::bundled();
        for c in [theme.light, theme.dark] {
            for ground in [c.panel, c.window, c.field, c.control, c.picture, c.accent_weak] {
                assert!(contrast(c.text, ground) >= 7.0, "{:?} on {ground:?}", c.text);
            }
            for (ink, ground) in [
                (c.text_weak, c.panel),
                (c.stop, c.panel),
                (c.look, c.panel),
                (c.note, c.panel),
            ] {
                assert!(
                    contrast(ink, ground) >= 4.5,
                    "{ink:?} on {ground:?}: {}",
                    contrast(ink, ground)
                );
            }
        }
    }
}
