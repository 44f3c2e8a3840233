//! What the window tests share: opening a window on a design, pointing at things in its picture, dragging.

use egui_kittest::{Harness, kittest::Queryable};
use zonewright::{
    document::{Design, new_design},
    window::{App, Command, PICTURE, ZoneAct},
};
use zonewright_geometry::{
    Angle, Point, Role, Spurs, Start, Vector,
    start::{FreeLetter, FreePath, FreeVector, PolarBy, PolarForm},
};

/// A window of 1280 x 800 on a design.
pub(crate) fn open(design: Design) -> Harness<'static, App> {
    let mut harness = Harness::builder()
        .with_size([1280.0, 800.0])
        .with_max_steps(20)
        .build_eframe(move |cc| App::new_headless(&cc.egui_ctx, design));
    harness.run();
    harness
}

/// A dome of eight ribs at a pitch of 35 degrees with edges of 500 mm; until still without a number of courses.
pub(crate) fn polar(courses: Option<u32>) -> Design {
    let form = PolarForm {
        ribs: 8,
        by: PolarBy::PitchEdge {
            pitch: Angle::from_degrees(35.0),
            edge_mm: 500.0,
        },
    };
    new_design(Start::Polar(form), courses, Spurs::default()).unwrap()
}

/// Where a point of the shell stands in the window.
pub(crate) fn picture_place(harness: &Harness<'_, App>, point: Point) -> egui::Pos2 {
    let corner = harness.get_by_label(PICTURE).rect().min;
    let seen = harness.state().state().camera().project(point).unwrap();
    corner + egui::Vec2::from(seen.pos)
}

/// A start of four edges: zig (3, 0, -4), zag (3, 0, 4), zig (0, 3, -4), zag (0, 3, 4), in units of 100 mm.
pub(crate) fn zigzag() -> Design {
    let edges = [
        (300.0, 0.0, -400.0, Role::Zig),
        (300.0, 0.0, 400.0, Role::Zag),
        (0.0, 300.0, -400.0, Role::Zig),
        (0.0, 300.0, 400.0, Role::Zag),
    ];
    let letters = (0..).zip(edges).map(|(id, (x, y, z, role))| FreeLetter {
        id,
        vector: FreeVector::Own(Vector::new(x, y, z)),
        role,
    });
    let path = FreePath {
        origin: Point::ORIGIN,
        closed: false,
        letters: letters.collect(),
    };
    new_design(Start::Zigzag(path), Some(1), Spurs::default()).unwrap()
}

/// A point of the free path, in its own frame.
pub(crate) fn point(app: &App, at: usize) -> Point {
    let Start::Zigzag(path) = &app.state().shape().start else {
        panic!("free points")
    };
    path.first_word().unwrap().nodes()[at]
}

/// Lets drags go exactly where the pointer goes.
pub(crate) fn snap_off(harness: &mut Harness<'_, App>) {
    harness.state().send(Command::Zone(ZoneAct::Snap));
    harness.run();
    assert!(!harness.state().state().view.zones.snap);
}

/// Drags with the pointer in ten movements.
pub(crate) fn drag(harness: &mut Harness<'_, App>, from: egui::Pos2, by: egui::Vec2) {
    harness.hover_at(from);
    harness.run_steps(1);
    harness.drag_at(from);
    harness.run_steps(1);
    for step in 1..=10 {
        harness.hover_at(from + by * (step as f32 / 10.0));
        harness.run_steps(2);
    }
    harness.drop_at(from + by);
    harness.run();
}
