//! What the pictures show.

use egui_kittest::{Harness, kittest::Queryable};
use zonewright::window::{App, Command};
use zonewright_painter::View;

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
        name: "spread",
        design: "plant-house.ron",
        size: USUAL,
        act: |harness| {
            send(harness, Command::Look(View::Front));
            harness.get_by_label("Spread").click();
            harness.run();
        },
    },
];

fn send(harness: &mut Harness<'_, App>, command: Command) {
    harness.state().send(command);
    harness.run();
}
