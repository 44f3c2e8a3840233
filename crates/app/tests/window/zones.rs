//! Zones in the window: dragged by their edges with keys held, snapped, typed, linked.

use egui::Role;
use egui_kittest::{
    Harness,
    kittest::{NodeT, Queryable},
};
use zonewright::{
    document::{Design, new_design},
    window::{App, Command, PICTURE, ZoneAct},
};
use zonewright_geometry::{
    Angle, Point, Spurs, Start, Vector, ZoneKind,
    edit::{Measures, set_zone},
    grow,
    snap::{MM_STEPS, round_step},
    start::{Curve, CurveShape, FreePath, TranslationForm},
};
use zonewright_painter::{Pick, View, pick};

use crate::common::{drag, open, picture_place, polar, snap_off, zigzag};

/// A place on an edge of a zone where nothing else can be taken hold of, two thirds of the way from its held end, and both ends.
struct Grip {
    at: egui::Pos2,
    near: Point,
    far: Point,
}

/// The ends are told apart as the window does: the far one is the one that moves when the zone is changed.
fn grip(harness: &Harness<'_, App>, zone: u32) -> Grip {
    let state = harness.state().state();
    let name = state.derived.shell.zones[zone as usize].name;
    let change = Vector::new(0.3, -0.2, 0.25);
    let changed = set_zone(
        state.shape(),
        name,
        state.derived.shell.zones[zone as usize].vector + change,
    )
    .unwrap();
    let (after, _) = grow(&changed);
    let moves = |v: u32| (after.points[v as usize] - state.derived.shell.points[v as usize]).length();
    let state = harness.state().state();
    let (derived, camera) = (&state.derived, &state.panes.pane(0).camera);
    let shell = &derived.shell;
    let corner = harness.get_by_label(PICTURE).rect().min;
    let busy: Vec<Point> = derived
        .path
        .iter()
        .flat_map(|p| p.placed.clone())
        .chain(
            derived
                .open
                .iter()
                .flatten()
                .map(|v| v.nodes[0] + (v.nodes[2] - v.nodes[0]) * 0.5),
        )
        .collect();
    for (index, edge) in (0_u32..).zip(&shell.edges) {
        if derived.zones.of_edge[index as usize] != Some(zone) {
            continue;
        }
        for [near, far] in [edge.ends, [edge.ends[1], edge.ends[0]]] {
            if moves(far) < moves(near) {
                continue;
            }
            let [near, far] = [near, far].map(|v| shell.points[v as usize]);
            let at = picture_place(harness, near + (far - near) * 0.68);
            let pos = at - corner;
            let found = pick(&derived.scene, shell, camera, [pos.x, pos.y], 5.0);
            let free = busy.iter().all(|p| (picture_place(harness, *p) - at).length() > 12.0);
            if found == Some(Pick::Edge(index)) && free {
                return Grip { at, near, far };
            }
        }
    }
    panic!("no edge of zone {zone} can be taken hold of")
}

fn vector(harness: &Harness<'_, App>, zone: usize) -> Vector {
    harness.state().state().derived.shell.zones[zone].vector
}

fn send(harness: &mut Harness<'_, App>, act: ZoneAct) {
    harness.state().send(Command::Zone(act));
    harness.run();
}

/// The zone's vector as the dragged edge runs, from the held end to the other.
fn along(grip: &Grip, zone: Vector) -> Vector {
    zone * (grip.far - grip.near).dot(zone).signum()
}

fn near(a: Vector, b: Vector, within: f64) {
    assert!(a.distance(b) <= within, "{a:?} instead of {b:?}");
}

/// An arc of six parts along x, a line of four along y.
fn canopy() -> Design {
    let curve = |shape, parts, azimuth| Curve {
        shape,
        parts,
        azimuth: Angle::from_degrees(azimuth),
    };
    let arc = CurveShape::Arc {
        span_mm: 4000.0,
        rise_mm: 900.0,
    };
    let line = CurveShape::Line {
        run_mm: 2400.0,
        rise_mm: 0.0,
    };
    let form = TranslationForm {
        zig: curve(arc, 6, 0.0),
        zag: curve(line, 4, 90.0),
    };
    new_design(Start::Translation(form), None, Spurs::default()).unwrap()
}

#[test]
fn a_dragged_edge_takes_its_whole_zone_along_in_the_view_plane_and_is_one_undo_step() {
    for (design, zone) in [(zigzag(), 1), (canopy(), 2)] {
        let mut harness = open(design.clone());
        snap_off(&mut harness);
        let before = vector(&harness, zone);
        let grip = grip(&harness, u32::try_from(zone).unwrap());
        let camera = harness.state().state().panes.pane(0).camera;
        let by = egui::vec2(24.0, -18.0);
        drag(&mut harness, grip.at, by);
        let meant = along(&grip, before) + camera.move_in_view_plane(grip.far, by.x, by.y);
        let after = vector(&harness, zone);
        near(after * along(&grip, before).dot(before).signum(), meant, 1e-6);
        // Every edge of the zone is that vector.
        let derived = &harness.state().state().derived;
        for (edge, of) in derived.shell.edges.iter().zip(&derived.zones.of_edge) {
            if *of == Some(u32::try_from(zone).unwrap()) {
                let [a, b] = edge.ends.map(|v| derived.shell.points[v as usize]);
                assert!((b - a).cross(after).length() < 1e-6 * after.length_squared());
                assert!(((b - a).length() - after.length()).abs() < 1e-6);
            }
        }
        let history = &harness.state().state().history;
        assert_eq!(history.undo_label(), Some(&*format!("Drag zone {}", zone + 1)));
        harness.state().send(Command::Undo);
        harness.run();
        assert_eq!(**harness.state().state().design(), design, "one undo takes it all back");
        harness.state().state().history.check().unwrap();
    }
}

#[test]
fn keys_lock_an_axis_or_the_length_alone() {
    for (key, axis) in [
        (egui::Key::X, Vector::X),
        (egui::Key::Y, Vector::Y),
        (egui::Key::Z, Vector::Z),
    ] {
        let mut harness = open(canopy());
        snap_off(&mut harness);
        let before = vector(&harness, 3);
        let grip = grip(&harness, 3);
        harness.key_down(key);
        drag(&mut harness, grip.at, egui::vec2(22.0, -27.0));
        harness.key_up(key);
        let change = vector(&harness, 3) - before;
        assert!(change.length() > 5.0, "{key:?} moved by {change:?}");
        near(change, axis * change.dot(axis), 1e-9);
    }
    let mut harness = open(canopy());
    snap_off(&mut harness);
    let before = vector(&harness, 3);
    let grip = grip(&harness, 3);
    harness.key_down(egui::Key::L);
    drag(&mut harness, grip.at, egui::vec2(30.0, 10.0));
    let after = vector(&harness, 3);
    assert!((after.length() - before.length()).abs() > 5.0);
    near(after / after.length(), before / before.length(), 1e-12);
}

#[test]
fn all_ribs_go_together_when_asked_and_the_form_stays_polar() {
    for by_key in [false, true] {
        let mut harness = open(polar(Some(3)));
        if by_key {
            harness.key_down(egui::Key::A);
        } else {
            harness.key_press_modifiers(egui::Modifiers::COMMAND, egui::Key::T);
            harness.run();
            assert!(harness.state().state().view.zones.together);
        }
        snap_off(&mut harness);
        let grip = grip(&harness, 1);
        harness.key_down(egui::Key::L);
        drag(&mut harness, grip.at, egui::vec2(18.0, 30.0));
        let state = harness.state().state();
        let Start::Polar(form) = &state.shape().start else {
            panic!("by key {by_key}: the form stays polar")
        };
        let (pitch, edge) = form.pitch_and_edge().unwrap();
        assert!((pitch.degrees() - 35.0).abs() < 1e-9, "the length alone changes");
        assert!((edge - 500.0).abs() > 5.0, "{edge}");
        assert!(state.shape().zones.is_empty());
        for zone in &state.derived.shell.zones {
            assert!((zone.vector.length() - edge).abs() < 1e-9);
        }
    }
    // Without, a rib is changed alone.
    let mut harness = open(polar(Some(3)));
    let grip = grip(&harness, 1);
    drag(&mut harness, grip.at, egui::vec2(18.0, 30.0));
    let kinds: Vec<ZoneKind> = harness
        .state()
        .state()
        .derived
        .shell
        .zones
        .iter()
        .map(|z| z.kind)
        .collect();
    assert_eq!(kinds.iter().filter(|kind| **kind == ZoneKind::Own).count(), 1);
}

#[test]
fn together_a_free_movement_turns_the_ribs_in_their_upright_planes_under_the_pointer() {
    let mut harness = open(polar(Some(3)));
    send(&mut harness, ZoneAct::Together);
    snap_off(&mut harness);
    let grip = grip(&harness, 1);
    let camera = harness.state().state().panes.pane(0).camera;
    let by = egui::vec2(-12.0, 25.0);
    drag(&mut harness, grip.at, by);
    let state = harness.state().state();
    assert!(matches!(state.shape().start, Start::Polar(_)));
    assert!(state.shape().zones.is_empty());
    // Held end and new vector: the far end is seen where the pointer took it.
    let new = along(&grip, vector(&harness, 1));
    let meant = camera.project(grip.far).unwrap().pos;
    let got = camera.project(grip.near + new).unwrap().pos;
    let off = (egui::Vec2::from(got) - egui::Vec2::from(meant) - by).length();
    assert!(off < 0.5, "{off} pixels off");
}

#[test]
fn escape_during_a_drag_takes_it_back() {
    let design = canopy();
    let mut harness = open(design.clone());
    let grip = grip(&harness, 2);
    harness.hover_at(grip.at);
    harness.run_steps(1);
    harness.drag_at(grip.at);
    harness.run_steps(1);
    for step in 1..6 {
        harness.hover_at(grip.at + egui::vec2(6.0, -4.0) * step as f32);
        harness.run_steps(2);
    }
    assert_ne!(**harness.state().state().design(), design, "the drag is going on");
    harness.key_press(egui::Key::Escape);
    harness.run_steps(2);
    assert_eq!(**harness.state().state().design(), design);
    harness.hover_at(grip.at + egui::vec2(60.0, 60.0));
    harness.run_steps(2);
    harness.drop_at(grip.at + egui::vec2(60.0, 60.0));
    harness.run();
    let state = harness.state().state();
    assert_eq!(**state.design(), design, "what follows does nothing");
    assert_eq!((state.history.undo_label(), state.history.redo_label()), (None, None));
    assert!(state.view.zones.picked.is_some(), "Escape closes nothing else");
}

#[test]
fn a_length_snaps_to_the_round_step_of_the_zoom_unless_n_is_held() {
    for suspended in [false, true] {
        let mut harness = open(canopy());
        let grip = grip(&harness, 3);
        let camera = harness.state().state().panes.pane(0).camera;
        let step = round_step(&MM_STEPS, camera.pixels_per_mm_at(grip.far)).unwrap();
        let length = vector(&harness, 3).length();
        let round = (length / step).round() * step + 2.0 * step;
        // To where the end would be at 3 pixels beyond the round length, seen straight across.
        let unit = (grip.far - grip.near) / length;
        let lens = camera.lens();
        let across = unit - lens.forward * unit.dot(lens.forward);
        let wanted = round - length + 3.0 / camera.pixels_per_mm_at(grip.far);
        let move_by = across * (wanted / unit.dot(across));
        let scale = camera.pixels_per_mm_at(grip.far);
        let by = egui::vec2(
            (move_by.dot(lens.right) * scale) as f32,
            (-move_by.dot(lens.up) * scale) as f32,
        );
        harness.key_down(egui::Key::L);
        if suspended {
            harness.key_down(egui::Key::N);
        }
        drag(&mut harness, grip.at, by);
        let got = vector(&harness, 3).length();
        assert_eq!((got - round).abs() < 1e-9, !suspended, "{got} for {round}");
        assert!((got - round).abs() < 8.0 / scale);
    }
}

#[test]
fn what_a_drag_snaps_to_is_named_while_it_goes_on() {
    let mut harness = open(canopy());
    let grip = grip(&harness, 3);
    // The end of the line that runs level along y comes to stand upright below its beginning: far from anything, then near.
    harness.key_down(egui::Key::Z);
    harness.hover_at(grip.at);
    harness.run_steps(1);
    harness.drag_at(grip.at);
    harness.run_steps(1);
    for step in 1..40 {
        harness.hover_at(grip.at + egui::vec2(0.0, step as f32));
        harness.run_steps(2);
    }
    let said = harness
        .get_by_label(PICTURE)
        .accesskit_node()
        .description()
        .unwrap_or_default();
    assert!(said.starts_with("Zone 4: "), "{said}");
    let snapped = said.split("Snaps to ").nth(1);
    let snapped = snapped.unwrap_or_else(|| panic!("{said}"));
    assert!(
        snapped.contains("along the axis") || snapped.contains("height"),
        "{snapped}"
    );
    harness.drop_at(grip.at + egui::vec2(0.0, 39.0));
    harness.run();
}

#[test]
fn a_dragged_point_snaps_to_the_height_of_another() {
    for on in [true, false] {
        let mut harness = open(zigzag());
        if !on {
            snap_off(&mut harness);
        }
        let path = harness.state().state().derived.path.clone().unwrap();
        let camera = harness.state().state().panes.pane(0).camera;
        // The upper points are all at z = 0, this one is 400 below; the pointer stops 4 pixels short.
        let low = path.placed[1];
        let (scale, up) = (camera.pixels_per_mm_at(low), camera.lens().up.z);
        let by = egui::vec2(0.0, (4.0 - 400.0 * scale / up) as f32);
        harness.key_down(egui::Key::Z);
        let at = picture_place(&harness, low);
        drag(&mut harness, at, by);
        let z = crate::common::point(harness.state(), 1).0.z;
        assert_eq!(z.abs() < 1e-9, on, "{z}");
        assert!(z.abs() < 8.0 / scale, "{z}");
    }
}

#[test]
fn snapping_in_a_plan_stays_in_the_plan() {
    let mut harness = open(zigzag());
    harness.state().send(Command::Look(View::Plan));
    harness.run();
    let old = crate::common::point(harness.state(), 2);
    let at = picture_place(&harness, old);
    drag(&mut harness, at, egui::vec2(21.0, -13.0));
    let new = crate::common::point(harness.state(), 2);
    assert!((new - old).length() > 1.0);
    assert!((new.0.z - old.0.z).abs() < 1e-9, "{new:?}");
}

#[test]
fn the_pointer_over_an_edge_names_its_zone() {
    let mut harness = open(canopy());
    let grip = grip(&harness, 2);
    harness.hover_at(grip.at);
    harness.run();
    let said = harness.get_by_label(PICTURE).accesskit_node().description();
    let said = said.unwrap_or_default();
    let length = vector(&harness, 2).length();
    assert!(said.starts_with("Zone 3: "), "{said}");
    assert!(said.contains(&format!("{:.0}", length.floor())), "{said} for {length}");
}

/// Folds the sections above the zones away, so that the zones are seen.
fn show_zones(harness: &mut Harness<'_, App>) {
    for section in ["Start", "Path", "Directions in hand"] {
        harness.get_by_role_and_label(Role::DisclosureTriangle, section).click();
        harness.run();
    }
}

/// Types into a field and leaves it with Enter.
fn type_into(harness: &mut Harness<'_, App>, name: &str, text: &str) {
    let field = |harness: &Harness<'_, App>| harness.get_by_role_and_label(Role::SpinButton, name).rect();
    let at = field(harness).center();
    harness.hover_at(at);
    harness.drag_at(at);
    harness.drop_at(at);
    harness.run();
    harness.key_press_modifiers(egui::Modifiers::COMMAND, egui::Key::A);
    harness.run();
    harness.event(egui::Event::Text(text.to_owned()));
    harness.run();
    harness.key_press(egui::Key::Enter);
    harness.run();
}

#[test]
fn typed_measures_links_and_the_way_back() {
    let design = canopy();
    let mut harness = open(design.clone());
    show_zones(&mut harness);
    harness.get_by_label("Zone 2").click();
    harness.run();
    let before = vector(&harness, 1);
    type_into(&mut harness, "Zone length", "900");
    near(vector(&harness, 1), before * (900.0 / before.length()), 1e-9);
    type_into(&mut harness, "Zone slope", "30");
    assert!((Measures::of(vector(&harness, 1)).slope.degrees() - 30.0).abs() < 1e-9);
    type_into(&mut harness, "Zone 2 z", "100");
    assert!((vector(&harness, 1).z - 100.0).abs() < 1e-9);
    assert_eq!(harness.state().state().derived.shell.zones[1].kind, ZoneKind::Own);
    type_into(&mut harness, "Link to zone", "4");
    harness.get_by_label("Link").click();
    harness.run();
    near(vector(&harness, 1), vector(&harness, 3), 0.0);
    harness.get_by_label("Unlink").click();
    harness.run();
    assert_eq!(harness.state().state().derived.shell.zones[1].kind, ZoneKind::Own);
    harness.get_by_label("Back to derived").click();
    harness.run();
    assert_eq!(**harness.state().state().design(), design);
    for _ in 0..6 {
        harness.state().send(Command::Undo);
    }
    harness.run();
    assert_eq!(**harness.state().state().design(), design);
    harness.state().state().history.check().unwrap();
}

#[test]
fn tolerances_are_edited() {
    let mut harness = open(canopy());
    show_zones(&mut harness);
    harness
        .get_by_role_and_label(Role::DisclosureTriangle, "Tolerances")
        .click();
    harness.run();
    type_into(&mut harness, "Report gaps up to", "1.25");
    assert_eq!(harness.state().state().shape().tolerances.near_mm, 1.25);
}

#[test]
fn ten_thousand_zones_make_only_the_rows_that_are_seen() {
    let points: Vec<Point> = (0..10_001)
        .map(|k| {
            let k = f64::from(k);
            Point::new(
                k * 10.0,
                (k * 0.37).sin() * 40.0,
                if k % 2.0 == 0.0 { 0.0 } else { 30.0 },
            )
        })
        .collect();
    let path = FreePath::from_points(&points, false).unwrap();
    let mut harness = open(new_design(Start::Zigzag(path), Some(1), Spurs::default()).unwrap());
    show_zones(&mut harness);
    assert_eq!(harness.state().state().derived.shell.zones.len(), 10_000);
    let rows = harness.query_all_by_label_contains("Zone ").count();
    assert!((1..60).contains(&rows), "{rows} rows");
}
