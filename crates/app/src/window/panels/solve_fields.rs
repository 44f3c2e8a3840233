//! The fields of solving: a wanted figure with its value, where headroom is measured, bounds of what may change.

use egui::{Align, DragValue, Layout, Role, Ui, WidgetInfo};
use zonewright_geometry::{
    Angle, Parameter, ParameterKind, ZoneRef,
    solve::{Figure, FigureKind, Free, Headroom, Want, middle},
};
use zonewright_shop::{
    figure_value,
    text::{self, MM2_PER_M2, MM3_PER_M3},
    zone_name,
};

use super::{Cx, solve_panel::remove};
use crate::window::{
    command::Command,
    fields::{bare_choice, bare_length, wide_choice},
    solving::{SolveAct, speed},
};

/// Zones that can be chosen; of longer lists the first.
const MOST_ZONES: usize = 200;

/// The figures, in the order of the list, with their names there.
const FIGURES: [(&str, Figure); 16] = [
    ("Height", Figure::Height),
    ("Span", Figure::Span),
    ("Width along x", Figure::SizeX),
    ("Width along y", Figure::SizeY),
    (
        "Headroom",
        Figure::Headroom(Headroom {
            distance_mm: 0.0,
            from: None,
            azimuth: None,
        }),
    ),
    ("Footprint area", Figure::FootprintArea),
    ("Footprint length", Figure::FootprintLength),
    ("Footprint width", Figure::FootprintWidth),
    ("Area", Figure::Area),
    ("Volume", Figure::Volume),
    ("Longest edge", Figure::LongestEdge),
    ("Shortest edge", Figure::ShortestEdge),
    ("Edge of a zone", Figure::Edge(ZoneRef::Start(0))),
    ("Smallest acute angle", Figure::LeastAngle),
    ("Largest acute angle", Figure::MostAngle),
    ("Closing gap", Figure::ClosingGap),
];

fn place_of(figure: Figure) -> usize {
    let same = |f: &(&str, Figure)| core::mem::discriminant(&f.1) == core::mem::discriminant(&figure);
    FIGURES.iter().position(same).unwrap_or(0)
}

/// A button that adds a wanted figure: the first that is not wanted yet.
pub(super) fn add_ui(cx: Cx<'_>, ui: &mut Ui) {
    let wants = &cx.state.solving.wants;
    let wanted = |figure: Figure| wants.iter().any(|w| place_of(w.figure) == place_of(figure));
    let next = FIGURES
        .iter()
        .map(|f| f.1)
        .find(|f| !wanted(*f))
        .unwrap_or(Figure::Height);
    let text = if wants.is_empty() {
        "Want a figure"
    } else {
        "Want another figure"
    };
    if ui.button(text).clicked() {
        cx.tx.send(Command::Solving(SolveAct::Add(next)));
    }
}

/// One wanted figure.
pub(super) fn want_ui(cx: Cx<'_>, ui: &mut Ui, row: usize, want: Want, now: Option<f64>) {
    let number = row + 1;
    let mut next = want;
    let send = |act| cx.tx.send(Command::Solving(act));
    ui.horizontal(|ui| {
        let names: Vec<&str> = FIGURES.iter().map(|f| f.0).collect();
        let chosen = wide_choice(ui, &format!("Figure {number}"), place_of(want.figure), &names);
        if let Some(chosen) = chosen {
            next.figure = FIGURES[chosen].1;
            if let Figure::Edge(zone) = &mut next.figure {
                *zone = first_zone(cx).unwrap_or(*zone);
            }
        }
        ui.with_layout(Layout::right_to_left(Align::Center), |ui| {
            if remove(ui, &format!("Remove figure {number}")) {
                send(SolveAct::Remove(row));
            }
            let now = now.map_or_else(
                || "none now".to_owned(),
                |v| format!("{} now", figure_value(want.figure, v, cx.state.units())),
            );
            let shown = ui.add(egui::Label::new(egui::RichText::new(&now).weak()).truncate());
            shown.widget_info(|| WidgetInfo::labeled(Role::Label, true, format!("Figure {number}: {now}")));
        });
    });
    match &mut next.figure {
        Figure::Headroom(at) => headroom_ui(cx, ui, number, at),
        Figure::Edge(zone) => zone_ui(cx, ui, number, zone),
        _ => {}
    }
    ui.horizontal(|ui| {
        ui.weak("wanted");
        ui.spacing_mut().interact_size.x = 86.0;
        figure_field(cx, ui, &format!("Wanted value {number}"), want.figure, &mut next.value);
        ui.weak("±");
        ui.spacing_mut().interact_size.x = 52.0;
        figure_field(cx, ui, &format!("Tolerance {number}"), want.figure, &mut next.tolerance);
        next.tolerance = next.tolerance.abs();
    });
    if next != want {
        send(SolveAct::Set(row, next));
    }
}

/// The value of a figure in the unit that it is read in.
fn figure_field(cx: Cx<'_>, ui: &mut Ui, name: &str, figure: Figure, value: &mut f64) {
    let (factor, unit) = match figure.kind() {
        FigureKind::Length => {
            bare_length(ui, name, value, cx.state.units());
            return;
        }
        FigureKind::Angle => (1.0, "°"),
        FigureKind::Area => (MM2_PER_M2, " m²"),
        FigureKind::Volume => (MM3_PER_M3, " m³"),
    };
    let mut shown = *value / factor;
    let before = shown;
    ui.add(
        DragValue::new(&mut shown)
            .speed(0.05)
            .range(0.0..=f64::MAX)
            .max_decimals(4)
            .suffix(unit)
            .update_while_editing(false),
    )
    .accessible_name(name);
    if shown != before {
        *value = shown * factor;
    }
}

fn headroom_ui(cx: Cx<'_>, ui: &mut Ui, number: usize, at: &mut Headroom) {
    let units = cx.state.units();
    ui.horizontal(|ui| {
        ui.weak("at");
        ui.spacing_mut().interact_size.x = 70.0;
        if bare_length(ui, &format!("Distance of figure {number}"), &mut at.distance_mm, units) {
            at.distance_mm = at.distance_mm.max(0.0);
        }
        ui.weak("from");
        let from = usize::from(at.from.is_some());
        let name = format!("Place of figure {number}");
        if let Some(chosen) = wide_choice(ui, &name, from, &["the middle", "a place"]) {
            at.from = (chosen == 1).then(|| middle(cx.state.shape(), &cx.state.derived.shell));
        }
    });
    if let Some(place) = &mut at.from {
        ui.horizontal(|ui| {
            ui.spacing_mut().interact_size.x = 78.0;
            for (axis, part) in ["x", "y"].into_iter().zip(place) {
                ui.weak(axis);
                bare_length(ui, &format!("Place of figure {number}, {axis}"), part, units);
            }
        });
    }
    ui.horizontal(|ui| {
        let one = usize::from(at.azimuth.is_some());
        let name = format!("Directions of figure {number}");
        if let Some(chosen) = wide_choice(ui, &name, one, &["all round, the lowest", "in one direction"]) {
            at.azimuth = (chosen == 1).then(Angle::default);
        }
        if let Some(azimuth) = &mut at.azimuth {
            ui.spacing_mut().interact_size.x = 60.0;
            let mut degrees = azimuth.degrees();
            let field = DragValue::new(&mut degrees)
                .speed(0.5)
                .suffix("°")
                .update_while_editing(false);
            ui.add(field).accessible_name(format!("Direction of figure {number}"));
            if degrees != azimuth.degrees() {
                *azimuth = Angle::from_degrees(degrees);
            }
        }
    });
}

fn first_zone(cx: Cx<'_>) -> Option<ZoneRef> {
    cx.state.derived.shell.zones.first().map(|z| z.name)
}

fn zone_ui(cx: Cx<'_>, ui: &mut Ui, number: usize, zone: &mut ZoneRef) {
    let zones: Vec<ZoneRef> = cx
        .state
        .derived
        .shell
        .zones
        .iter()
        .map(|z| z.name)
        .take(MOST_ZONES)
        .collect();
    let names: Vec<String> = zones.iter().map(|z| zone_name(*z)).collect();
    let names: Vec<&str> = names.iter().map(String::as_str).collect();
    let now = zones.iter().position(|z| z == zone).unwrap_or(usize::MAX);
    if let Some(chosen) = bare_choice(ui, &format!("Zone of figure {number}"), now, &names) {
        *zone = zones[chosen];
    }
}

/// The bounds of a parameter that may change; without one it has its own.
pub(super) fn bounds_ui(cx: Cx<'_>, ui: &mut Ui, parameter: &Parameter, free: &Free) {
    let mut next = free.clone();
    ui.horizontal(|ui| {
        ui.add_space(22.0);
        ui.spacing_mut().interact_size.x = 78.0;
        for (at, (word, name)) in [("from", "Least"), ("to", "Greatest")].into_iter().enumerate() {
            ui.weak(word);
            bound_field(
                cx,
                ui,
                &format!("{name} {}", parameter.name),
                parameter,
                &mut next.bounds[at],
            );
        }
    });
    if next != *free {
        cx.tx.send(Command::Solving(SolveAct::Allow(next)));
    }
}

/// What a bound that is not given shows.
const OPEN: &str = "any";

fn bound_field(cx: Cx<'_>, ui: &mut Ui, name: &str, parameter: &Parameter, bound: &mut Option<f64>) {
    let (kind, units) = (parameter.kind, cx.state.units());
    let given = bound.is_some();
    // A field that is dragged from "any" begins at the present value.
    let mut value = bound.unwrap_or(f64::INFINITY);
    let [least, most] = parameter.bounds;
    let show = move |value: f64| {
        if value.is_infinite() {
            return OPEN.to_owned();
        }
        match kind {
            ParameterKind::Length => units.field(value),
            ParameterKind::Angle => format!("{}°", text::trimmed(value, 4)),
            ParameterKind::Factor | ParameterKind::Count => text::trimmed(value, 4),
        }
    };
    let read = move |typed: &str| {
        let typed = typed.trim();
        if typed.is_empty() || typed == OPEN {
            return Some(f64::INFINITY);
        }
        match kind {
            ParameterKind::Length => text::parse_length(typed, units).ok(),
            ParameterKind::Angle => text::parse_angle(typed).ok().map(Angle::degrees),
            ParameterKind::Factor | ParameterKind::Count => typed.parse().ok(),
        }
    };
    let field = ui
        .add(
            DragValue::new(&mut value)
                .speed(speed(kind))
                .update_while_editing(false)
                .custom_formatter(move |value, _| show(value))
                .custom_parser(read),
        )
        .on_hover_text("Type a bound; empty lets it be anything.")
        .accessible_name(name);
    if field.dragged() && !given {
        *bound = Some(parameter.value);
    } else if field.changed() || given {
        *bound = value.is_finite().then(|| value.clamp(least, most));
    }
}
