//! The backdrop: what it is, where it stands, and fitting the paths to it.

use egui::Ui;
use zonewright_geometry::{Role, Start, fit::FitEnd, fit::FitStep};
use zonewright_painter::Bounds;

use super::Cx;
use crate::{
    document::Backdrop,
    fitting::Begin,
    window::{
        backdrop::BackdropAct,
        command::Command,
        fields::{angle, choice, count, length, number},
    },
};

/// Units that the numbers of a file may be in.
const READ_AS: [(&str, f64); 5] = [
    ("Millimetres", 1.0),
    ("Centimetres", 10.0),
    ("Metres", 1000.0),
    ("Inches", 25.4),
    ("Feet", 304.8),
];

/// Height of the chart of a fit, in points.
const CHART: f32 = 64.0;

/// Draws the section.
pub(super) fn backdrop_ui(cx: Cx<'_>, ui: &mut Ui, backdrop: &Backdrop) {
    head_ui(cx, ui, backdrop);
    egui::CollapsingHeader::new("Where it stands")
        .id_salt("backdrop placement")
        .show(ui, |ui| place_ui(cx, ui, backdrop));
    ui.separator();
    fit_ui(cx, ui, backdrop);
    left_ui(cx, ui);
}

fn send(cx: Cx<'_>, act: BackdropAct) {
    cx.tx.send(Command::Backdrop(act));
}

fn button(cx: Cx<'_>, ui: &mut Ui, text: &str, act: BackdropAct) {
    if ui.button(text).on_hover_text(act.words().hint).clicked() {
        send(cx, act);
    }
}

fn head_ui(cx: Cx<'_>, ui: &mut Ui, backdrop: &Backdrop) {
    let units = cx.state.units();
    ui.add(egui::Label::new(&backdrop.name).truncate());
    let parts = if backdrop.drawn.triangles.is_empty() {
        format!("{} lines", backdrop.drawn.lines.len())
    } else {
        format!("{} triangles", backdrop.drawn.triangles.len())
    };
    let places = backdrop.drawn.points.iter().map(|p| backdrop.placement.place(*p));
    let bounds = cx.state.derived.backdrop.bounds.or_else(|| Bounds::of_points(places));
    let size = bounds.map(|b| b.size().to_array().map(|side| units.length(side)).join(" × "));
    ui.weak(format!("{parts}, {}", size.unwrap_or_default()));
    ui.horizontal_wrapped(|ui| {
        let mut shown = backdrop.shown;
        let check = ui.checkbox(&mut shown, "Shown");
        if check.accessible_name("Backdrop shown").changed() {
            send(cx, BackdropAct::Show(shown));
        }
        button(cx, ui, "Load another…", BackdropAct::Load);
        let remove = ui
            .button("Remove")
            .on_hover_text(BackdropAct::Remove.words().hint)
            .accessible_name(BackdropAct::Remove.words().name);
        if remove.clicked() {
            send(cx, BackdropAct::Remove);
        }
    });
}

fn place_ui(cx: Cx<'_>, ui: &mut Ui, backdrop: &Backdrop) {
    let mut placement = backdrop.placement;
    let units = cx.state.units();
    let now = READ_AS.iter().position(|(_, mm)| *mm == placement.scale);
    let names: Vec<&str> = READ_AS.iter().map(|(name, _)| *name).chain(["By the scale"]).collect();
    let mut changed = false;
    if let Some(chosen) = choice(ui, "Its numbers are", now.unwrap_or(READ_AS.len()), &names)
        && let Some((_, mm)) = READ_AS.get(chosen)
    {
        placement.scale = *mm;
        changed = true;
    }
    changed |= number(ui, "Backdrop scale", &mut placement.scale, 0.01);
    if let Some(chosen) = choice(ui, "Up in the file", usize::from(placement.y_up), &["z", "y"]) {
        placement.y_up = chosen == 1;
        changed = true;
    }
    for (name, part) in ["Move backdrop x", "Move backdrop y", "Move backdrop z"]
        .into_iter()
        .zip(placement.shift.as_mut())
    {
        changed |= length(ui, name, part, units);
    }
    changed |= angle(ui, "Turn backdrop", &mut placement.turn);
    if changed {
        send(cx, BackdropAct::Place(placement));
    }
}

fn fit_ui(cx: Cx<'_>, ui: &mut Ui, backdrop: &Backdrop) {
    let before = cx.state.backdrop.wish;
    let mut wish = before;
    let most = zonewright_geometry::fit::MAX_FIT_PARTS;
    if backdrop.drawn.triangles.is_empty() {
        let zag = usize::from(wish.path == Role::Zag);
        if let Some(chosen) = choice(ui, "Path to fit", zag, &["Zig path", "Zag path"]) {
            wish.path = if chosen == 0 { Role::Zig } else { Role::Zag };
        }
        let zag = usize::from(wish.path == Role::Zag);
        count(ui, "Its parts", &mut wish.parts[zag], 1..=most);
        if !matches!(cx.state.shape().start, Start::Translation(_)) {
            count(ui, "Parts across", &mut wish.parts[1 - zag], 1..=most);
        }
    } else {
        count(ui, "Zig parts", &mut wish.parts[0], 1..=most);
        count(ui, "Zag parts", &mut wish.parts[1], 1..=most);
        let shell = usize::from(wish.begin == Begin::Shell);
        if let Some(chosen) = choice(ui, "Begin with", shell, &["Its middle lines", "The shell"]) {
            wish.begin = if chosen == 0 { Begin::MiddleLines } else { Begin::Shell };
        }
    }
    number(ui, "Smoothing", &mut wish.smoothing, 0.001);
    wish.smoothing = wish.smoothing.clamp(0.0, crate::fitting::MAX_SMOOTHING);
    if !backdrop.drawn.triangles.is_empty() {
        number(ui, "Cover", &mut wish.cover, 0.01);
        wish.cover = wish.cover.clamp(0.0, crate::fitting::MAX_COVER);
    }
    count(
        ui,
        "Most iterations",
        &mut wish.iterations,
        1..=crate::fitting::MAX_ITERATIONS,
    );
    ui.checkbox(&mut wish.hold_ends, "Hold the ends")
        .on_hover_text("The corners of the surface, or the ends of the path, stay where the fit begins.");
    if wish != before {
        send(cx, BackdropAct::Wish(wish));
    }
    if cx.state.backdrop.fitting.is_some() {
        button(cx, ui, "Stop fitting", BackdropAct::Stop);
    } else {
        button(cx, ui, "Fit the paths", BackdropAct::Fit);
    }
    progress_ui(cx, ui);
}

/// The falling line of a fit, and where it stands.
fn progress_ui(cx: Cx<'_>, ui: &mut Ui) {
    let history = &cx.state.backdrop.history;
    let Some(last) = history.last() else { return };
    chart(cx, ui, history);
    let units = cx.state.units();
    let end = match cx.state.backdrop.end {
        _ if cx.state.backdrop.fitting.is_some() => "",
        Some(FitEnd::Settled) => ", settled",
        Some(FitEnd::Stopped) => ", stopped",
        Some(FitEnd::Iterations) => ", not settled",
        None => "",
    };
    ui.label(format!("Iteration {}{end}", history.len() - 1));
    super::readouts::readout(ui, "Points: root mean square", &units.length(last.rms_mm));
    super::readouts::readout(ui, "Points: largest", &units.length(last.largest_mm));
    if last.uncovered_mm > 0.0 {
        super::readouts::readout(ui, "Backdrop: farthest from it", &units.length(last.uncovered_mm));
    }
}

/// What the fit makes small, as one length, and the largest distance of a point, against the iterations.
fn chart(cx: Cx<'_>, ui: &mut Ui, history: &[FitStep]) {
    let size = egui::vec2(ui.available_width(), CHART);
    let (rect, response) = ui.allocate_exact_size(size, egui::Sense::hover());
    response.widget_info(|| egui::WidgetInfo::labeled(egui::Role::Image, true, "Distances by iteration"));
    let colours = cx.state.colours();
    let painter = ui.painter_at(rect);
    painter.rect_filled(rect, 3.0, colours.field());
    let inner = rect.shrink(5.0);
    let most = history.iter().map(|s| s.largest_mm).fold(f64::MIN_POSITIVE, f64::max);
    let steps = history.len().saturating_sub(1).max(1) as f32;
    #[expect(clippy::cast_possible_truncation, reason = "places on the screen")]
    let at = |k: usize, mm: f64| {
        egui::pos2(
            inner.left() + inner.width() * k as f32 / steps,
            inner.bottom() - inner.height() * (mm / most) as f32,
        )
    };
    let floor = [inner.left_bottom(), inner.right_bottom()];
    painter.line_segment(floor, (1.0, colours.line()));
    for (colour, width, of) in [
        (
            colours.text_weak(),
            1.0,
            (|s: &FitStep| s.largest_mm) as fn(&FitStep) -> f64,
        ),
        (colours.accent(), 2.0, |s: &FitStep| s.mean_mm),
    ] {
        let points: Vec<egui::Pos2> = history.iter().enumerate().map(|(k, s)| at(k, of(s))).collect();
        if let [only] = points[..] {
            painter.circle_filled(only, 2.0, colour);
        }
        painter.line(points, (width, colour));
    }
    let first = cx.state.units().length(most);
    let font = egui::TextStyle::Small.resolve(ui.style());
    painter.text(
        inner.right_top(),
        egui::Align2::RIGHT_TOP,
        first,
        font,
        colours.text_weak(),
    );
    response.on_hover_text(
        "Thick: the mean of all that is made small; it never rises. Thin: the largest distance of a point.",
    );
}

/// What is left between the panels and the backdrop.
fn left_ui(cx: Cx<'_>, ui: &mut Ui) {
    let Some((panel, left)) = cx.state.derived.backdrop.largest() else {
        return;
    };
    ui.separator();
    let mark = cx
        .state
        .derived
        .parts
        .panels
        .get(panel as usize)
        .map(|p| p.mark.as_str());
    let far = cx.state.units().length(left.signed_mm.abs());
    super::readouts::readout(ui, "Panels: largest distance", &far);
    ui.horizontal_wrapped(|ui| {
        let text = format!("Show it at {}", mark.unwrap_or_default());
        let show = ui.button(text).on_hover_text(BackdropAct::Largest.words().hint);
        if show.accessible_name(BackdropAct::Largest.words().name).clicked() {
            send(cx, BackdropAct::Largest);
        }
        let mut alone = cx.state.view.without_sign;
        let check = ui.checkbox(&mut alone, "Without side");
        if check
            .on_hover_text(BackdropAct::WithoutSign(alone).words().hint)
            .changed()
        {
            send(cx, BackdropAct::WithoutSign(alone));
        }
    });
}
