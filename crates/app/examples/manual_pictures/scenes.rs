//! What the pictures show.

use egui_kittest::{Harness, kittest::Queryable};
use zonewright::window::{App, Command, GuideAct, Kind, LadderAct, Layout, PaneAct, ReadingAct, SelectAct, ZoneAct};
use zonewright_painter::ColourBy;

/// A picture.
pub(crate) struct Scene {
    /// Its file, without the ending.
    pub(crate) name: &'static str,
    /// The bundled design.
    pub(crate) design: &'static str,
    /// The size of the window, in points.
    pub(crate) size: [f32; 2],
    /// What is done in the window.
    pub(crate) act: fn(&mut Harness<'_, App>),
}

/// A laptop's window.
const USUAL: [f32; 2] = [1280.0, 800.0];

/// All pictures.
pub(crate) const SCENES: &[Scene] = &[
    Scene {
        name: "window-light",
        design: "plant-house.ron",
        size: USUAL,
        act: |_| {},
    },
    Scene {
        name: "window-dark",
        design: "plant-house.ron",
        size: USUAL,
        act: |harness| send(harness, Command::SwapTheme),
    },
    Scene {
        name: "first-shell",
        design: "plant-house.ron",
        size: USUAL,
        act: |harness| {
            send(harness, Command::Guide(GuideAct::Begin));
        },
    },
    Scene {
        name: "points",
        design: "ferry-steps-canopy.ron",
        size: USUAL,
        act: |harness| {
            send(harness, Command::FreePoints);
            send(harness, Command::SelectPoint(Some(3)));
        },
    },
    Scene {
        name: "ladder",
        design: "plant-house.ron",
        size: USUAL,
        act: |harness| {
            for _ in 0..4 {
                send(harness, Command::Ladder(LadderAct::Down));
            }
        },
    },
    Scene {
        name: "strip",
        design: "plant-house.ron",
        size: USUAL,
        act: |harness| {
            let notch = harness.get_by_label("Open V 3").rect();
            harness.hover_at(egui::pos2(notch.center().x, notch.top() + 6.0));
            harness.run();
        },
    },
    Scene {
        name: "zone",
        design: "plant-house.ron",
        size: USUAL,
        act: |harness| {
            let zone = harness.state().state().derived.shell.zones[0].name;
            send(harness, Command::Zone(ZoneAct::Pick(Some(zone))));
        },
    },
    Scene {
        name: "views",
        design: "plant-house.ron",
        size: USUAL,
        act: |harness| {
            send(harness, Command::Pane(PaneAct::LayOut(Layout::Four)));
            send(harness, Command::Select(SelectAct::Step(Kind::Vertex, false)));
            send(harness, Command::Select(SelectAct::Measure));
            send(harness, Command::Select(SelectAct::Step(Kind::Vertex, true)));
            if let Some(last) = harness.state().state().view.selection.part.clone() {
                send(harness, Command::Select(SelectAct::MeasureTo(last)));
            }
        },
    },
    Scene {
        name: "solve",
        design: "plant-house.ron",
        size: USUAL,
        act: |harness| {
            click(harness, "Solve for");
            click(harness, "Want a figure");
            click(harness, "Wanted value 1");
            harness.get_by_label("Wanted value 1").type_text("3500");
            harness.run();
            harness.key_press(egui::Key::Enter);
            harness.run();
            click(harness, "Let Pitch change");
            click(harness, "Solve for the wanted figures");
        },
    },
    Scene {
        name: "backdrop",
        design: "../../docs/examples/backdrop.ron",
        size: USUAL,
        act: |harness| send(harness, Command::SetColour(ColourBy::Distance)),
    },
    Scene {
        name: "spread",
        design: "pier-head-housing.ron",
        size: USUAL,
        act: |harness| {
            click(harness, "Readouts");
            click(harness, "Spread");
        },
    },
    Scene {
        name: "findings",
        design: "plant-house.ron",
        size: USUAL,
        act: |harness| {
            send(harness, Command::Readings(ReadingAct::Remember));
            send(harness, Command::AddCourse);
            send(harness, Command::ShowFinding(Some(0)));
            harness.get_by_label("Findings").scroll_to_me();
            harness.run();
        },
    },
    Scene {
        name: "unsaved",
        design: "plant-house.ron",
        size: USUAL,
        act: |harness| {
            send(harness, Command::AddCourse);
            send(harness, Command::OpenSample);
        },
    },
    Scene {
        name: "panel",
        design: "pier-head-housing.ron",
        size: USUAL,
        act: |harness| {
            send(harness, Command::SetColour(ColourBy::Family));
            send(harness, Command::SelectPanel(Some(40)));
        },
    },
    Scene {
        name: "search",
        design: "tide-column.ron",
        size: USUAL,
        act: |harness| send(harness, Command::Find),
    },
];

fn click(harness: &mut Harness<'_, App>, name: &str) {
    harness.get_by_label(name).scroll_to_me();
    harness.run();
    harness.get_by_label(name).click();
    harness.run();
}

fn send(harness: &mut Harness<'_, App>, command: Command) {
    harness.state().send(command);
    harness.run();
}
