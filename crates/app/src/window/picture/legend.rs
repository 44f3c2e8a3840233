//! What the colours of the picture mean: a small plate in the lower right corner of the main view.

use egui::{Align, Color32, Layout, Mesh, Pos2, Rect, Sense, Ui, UiBuilder, pos2, vec2};
use zonewright_geometry::{Level, Shell};
use zonewright_painter::{Colour, ColourBy, Palette};
use zonewright_shop::text;

use crate::window::{command::Command, panels::Cx, state::State, zone_table::zone_name};

/// Most entries that are listed; the rest is counted.
const MOST: usize = 9;
/// Side of a swatch, height of a row, room round the rows, least width of the words, in points.
const SWATCH: f32 = 10.0;
const ROW: f32 = 17.0;
const ROOM: f32 = 8.0;
const LEAST: f32 = 96.0;

/// What a legend shows.
struct Legend {
    title: &'static str,
    /// Colours one by one, with what each stands for.
    rows: Vec<(Colour, String)>,
    /// How many more there are than rows.
    more: usize,
    /// Colours that run into each other, with the words at their ends and in the middle.
    ramp: Option<(Vec<Colour>, [String; 3])>,
}

impl Legend {
    /// The first entries in words, the rest counted: there may be thousands, in each frame.
    fn of_rows<T>(
        title: &'static str,
        mut entries: impl Iterator<Item = T>,
        most: usize,
        words: impl Fn(T) -> (Colour, String),
    ) -> Self {
        let rows = entries.by_ref().take(most).map(words).collect();
        Self {
            title,
            rows,
            more: entries.count(),
            ramp: None,
        }
    }

    const fn of_ramp(title: &'static str, colours: Vec<Colour>, words: [String; 3]) -> Self {
        Self {
            title,
            rows: Vec::new(),
            more: 0,
            ramp: Some((colours, words)),
        }
    }
}

/// Draws the legend in a view, or the button that brings it back.
pub(super) fn legend_ui(cx: Cx<'_>, ui: &mut Ui, rect: Rect) {
    // Half of a low view is left to the shell.
    let most = ((rect.height() * 0.5 - 2.0 * ROW) / ROW).max(1.0) as usize;
    let Some(legend) = legend(cx.state, most.min(MOST)) else {
        return;
    };
    let corner = rect.max - vec2(ROOM, ROOM);
    if !cx.state.view.legend {
        let size = vec2(64.0, ui.spacing().interact_size.y);
        let button = egui::Button::new("Legend").small();
        let button = ui.put(Rect::from_min_size(corner - size, size), button);
        let hint = Command::SwapLegend.words().hint;
        if button.on_hover_text(hint).accessible_name("Show the legend").clicked() {
            cx.tx.send(Command::SwapLegend);
        }
        return;
    }
    let font = egui::TextStyle::Small.resolve(ui.style());
    let width_of = |text: &str| {
        let galley = ui
            .painter()
            .layout_no_wrap(text.to_owned(), font.clone(), Color32::PLACEHOLDER);
        galley.size().x
    };
    let mut width = width_of(legend.title) + ROW + ROOM;
    for (_, words) in &legend.rows {
        width = width.max(width_of(words) + SWATCH + 6.0);
    }
    if let Some((_, words)) = &legend.ramp {
        width = width.max(words.iter().map(|w| width_of(w)).sum::<f32>() + 2.0 * ROOM);
    }
    let width = width.max(LEAST).min((rect.width() * 0.6).max(LEAST));
    let lines = 1 + legend.rows.len() + usize::from(0 < legend.more) + 2 * usize::from(legend.ramp.is_some());
    let size = vec2(width, ROW * lines as f32) + vec2(ROOM, ROOM) * 2.0;
    let plate = Rect::from_min_size(corner - size, size);
    let colours = cx.state.colours();
    ui.painter()
        .rect_filled(plate, 4.0, colours.picture().gamma_multiply(0.88));
    let mut at = plate.min + vec2(ROOM, ROOM);
    line(ui, at, width, |ui| {
        ui.label(egui::RichText::new(legend.title).small().strong());
        ui.with_layout(Layout::right_to_left(Align::Center), |ui| {
            ui.spacing_mut().button_padding = vec2(3.0, 0.0);
            let hide = ui.add(egui::Button::new("×").small().frame_when_inactive(false));
            let hide = hide.on_hover_text("Hides the legend.");
            if hide.accessible_name("Hide the legend").clicked() {
                cx.tx.send(Command::SwapLegend);
            }
        });
    });
    at.y += ROW;
    for (colour, words) in &legend.rows {
        line(ui, at, width, |ui| {
            let (swatch, _) = ui.allocate_exact_size(vec2(SWATCH, SWATCH), Sense::hover());
            ui.painter().rect_filled(swatch, 2.0, ink(*colour));
            ui.add(egui::Label::new(egui::RichText::new(words).small()).truncate());
        });
        at.y += ROW;
    }
    if 0 < legend.more {
        line(ui, at, width, |ui| {
            ui.label(
                egui::RichText::new(format!("and {} more", text::count(legend.more)))
                    .small()
                    .weak(),
            );
        });
    }
    if let Some((colours, [first, middle, last])) = &legend.ramp {
        ramp(
            ui,
            Rect::from_min_size(at + vec2(0.0, 3.0), vec2(width, ROW - 6.0)),
            colours,
        );
        at.y += ROW;
        line(ui, at, width, |ui| {
            ui.label(egui::RichText::new(first).small());
            ui.with_layout(Layout::right_to_left(Align::Center), |ui| {
                ui.label(egui::RichText::new(last).small());
                if !middle.is_empty() {
                    ui.with_layout(Layout::centered_and_justified(egui::Direction::LeftToRight), |ui| {
                        ui.label(egui::RichText::new(middle).small());
                    });
                }
            });
        });
    }
}

fn line(ui: &mut Ui, at: Pos2, width: f32, contents: impl FnOnce(&mut Ui)) {
    let rect = Rect::from_min_size(at, vec2(width, ROW));
    let builder = UiBuilder::new()
        .max_rect(rect)
        .layout(Layout::left_to_right(Align::Center));
    ui.scope_builder(builder, |ui| {
        ui.spacing_mut().item_spacing.x = 6.0;
        ui.spacing_mut().interact_size.y = ROW;
        // A text that can be selected would take the drags that turn the picture.
        ui.style_mut().interaction.selectable_labels = false;
        contents(ui);
    });
}

/// A bar of colours that run into each other.
fn ramp(ui: &Ui, bar: Rect, colours: &[Colour]) {
    let mut mesh = Mesh::default();
    let last = colours.len().saturating_sub(1).max(1) as f32;
    for (k, colour) in (0_u32..).zip(colours) {
        let x = bar.left() + bar.width() * k as f32 / last;
        mesh.colored_vertex(pos2(x, bar.top()), ink(*colour));
        mesh.colored_vertex(pos2(x, bar.bottom()), ink(*colour));
        if 0 < k {
            let at = 2 * k;
            mesh.add_triangle(at - 2, at - 1, at);
            mesh.add_triangle(at - 1, at, at + 1);
        }
    }
    ui.painter().add(mesh);
}

const fn ink(colour: Colour) -> Color32 {
    Color32::from_rgb(colour.r, colour.g, colour.b)
}

/// What the colours mean now; nothing while there is nothing that has one.
fn legend(state: &State, most: usize) -> Option<Legend> {
    let shell = &state.derived.shell;
    if shell.panels.is_empty() {
        return None;
    }
    let palette = super::palette(state);
    match state.view.colour {
        ColourBy::Plain => None,
        ColourBy::Zone => Some(zones(state, &palette, most)),
        ColourBy::Family => Some(families(state, &palette, most)),
        ColourBy::Course => Some(courses(shell, &palette, most)),
        ColourBy::Slope => {
            let ends = palette.slope.to_vec();
            let words = ["0° level".to_owned(), String::new(), "90° upright".to_owned()];
            Some(Legend::of_ramp("Slope of panels", ends, words))
        }
        ColourBy::Fold => {
            let words = ["valley", "flat", "ridge"].map(str::to_owned);
            Some(Legend::of_ramp("Fold at edges", palette.fold.to_vec(), words))
        }
        ColourBy::Finding => Some(findings(state, &palette)),
        ColourBy::Distance => distance(state, &palette),
    }
}

/// Zones that count as one have one colour.
fn zones(state: &State, palette: &Palette, most: usize) -> Legend {
    let zones = (0_u32..).zip(&state.derived.shell.zones);
    let first = zones.filter(|(at, zone)| zone.counts_as == *at);
    Legend::of_rows("Zones", first, most, |(at, zone)| {
        let length = state.units().length(zone.vector.length());
        (palette.category(at as usize), format!("{}: {length}", zone_name(at)))
    })
}

fn families(state: &State, palette: &Palette, most: usize) -> Legend {
    let mut panels: Vec<usize> = Vec::new();
    for family in &state.derived.families {
        let family = *family as usize;
        if panels.len() <= family {
            panels.resize(family + 1, 0);
        }
        panels[family] += 1;
    }
    let counted = panels.into_iter().enumerate().filter(|(_, count)| 0 < *count);
    Legend::of_rows("Families", counted, most, |(at, count)| {
        let words = format!("Family {}: {}", at + 1, counted_panels(count));
        (palette.category(at), words)
    })
}

fn courses(shell: &Shell, palette: &Palette, most: usize) -> Legend {
    Legend::of_rows("Courses", shell.courses.iter(), most, |course| {
        // As the picture has it: fore and aft take turns.
        let place = 2 * course.number.unsigned_abs() as usize + usize::from(course.number < 0);
        let side = if course.number < 0 { "Aft course" } else { "Course" };
        let panels = counted_panels(course.panels as usize);
        let words = format!("{side} {}, {panels}", course.number.unsigned_abs());
        (palette.category(place.saturating_sub(2)), words)
    })
}

fn findings(state: &State, palette: &Palette) -> Legend {
    let levels = &state.derived.levels;
    let all = [(Level::Stop, "Stop"), (Level::Look, "Look"), (Level::Note, "Note")];
    let mut legend = Legend::of_rows("Findings", all.into_iter(), all.len(), |(level, word)| {
        let count = levels.iter().filter(|l| **l == Some(level)).count();
        (palette.level(level), format!("{word}: {}", counted_panels(count)))
    });
    let none = palette.outside.mix(palette.background, 0.5);
    legend.rows.push((none, "No finding".to_owned()));
    legend
}

fn distance(state: &State, palette: &Palette) -> Option<Legend> {
    let (_, largest) = state.derived.backdrop.largest()?;
    let most = state.units().length(largest.signed_mm.abs());
    let without_sign = state.view.without_sign;
    let from = if without_sign { 0.0 } else { -1.0 };
    let shares = (0..=16_u8).map(|k| from + (1.0 - from) * f32::from(k) / 16.0);
    let colours = shares.map(|share| palette.distance(share)).collect();
    let (title, words) = if without_sign {
        ("Distance to the backdrop", ["0".to_owned(), String::new(), most])
    } else {
        let words = [format!("inside {most}"), "0".to_owned(), format!("{most} outside")];
        ("Distance to the backdrop", words)
    };
    Some(Legend::of_ramp(title, colours, words))
}

fn counted_panels(count: usize) -> String {
    match count {
        1 => "1 panel".to_owned(),
        count => format!("{} panels", text::count(count)),
    }
}
