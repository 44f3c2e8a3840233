//! Changing zones: closed forms (all derived), then properties with a planted answer.

#![expect(clippy::unwrap_used, reason = "a test may stop where it stands")]

use proptest::prelude::*;
use zonewright_geometry::{
    Act, Angle, Code, Courses, Direction, Outside, Placement, Point, Shape, Shell, Side, Sign, Spurs, Start, Step,
    StepId, Tolerances, Vector, Vs, ZoneKind, ZoneRef, ZoneVector,
    edit::{
        Freedom, derive_zone, freedom, link_zone, set_together, set_zone, set_zones, symmetric, unlink_zone,
        zone_states,
    },
    grow,
    measure::totals,
    snap::still_vertices,
    start::{
        AxisClass, ColumnForm, Curve, CurveShape, FreePath, HelicalForm, LoopForm, PolarBy, PolarForm, PolarPair,
        RibbonForm, RibbonFrom, Star, StarSolid, TranslationForm,
    },
};

fn shape(start: Start, courses: Courses) -> Shape {
    Shape {
        start,
        zones: Vec::new(),
        steps: vec![lay(1, courses)],
        finish: Vec::new(),
        placement: Placement::default(),
        outside: Outside::Grown,
        tolerances: Tolerances::default(),
    }
}

fn lay(id: u32, courses: Courses) -> Step {
    let act = Act::Lay {
        courses,
        spurs: Spurs::Retract,
    };
    step(id, act)
}

fn step(id: u32, act: Act) -> Step {
    Step {
        id: StepId(id),
        name: None,
        on: true,
        side: Side::Fore,
        act,
    }
}

fn polar(by: PolarBy) -> Shape {
    shape(Start::Polar(PolarForm { ribs: 9, by }), Courses::Count(4))
}

fn plain_polar() -> Shape {
    polar(PolarBy::PitchEdge {
        pitch: Angle::from_degrees(35.0),
        edge_mm: 400.0,
    })
}

fn shell(shape: &Shape) -> Shell {
    grow(shape).0
}

fn vector(shape: &Shape, zone: ZoneRef) -> Vector {
    let all = zone_states(shape).unwrap();
    all.iter().find(|z| z.name == zone).unwrap().vector
}

const fn start(id: u32) -> ZoneRef {
    ZoneRef::Start(id)
}

fn turned(v: Vector, angle: f64) -> Vector {
    let (sin, cos) = angle.sin_cos();
    Vector::new(cos * v.x - sin * v.y, sin * v.x + cos * v.y, v.z)
}

#[track_caller]
fn near(a: Vector, b: Vector, within: f64) {
    assert!(a.distance(b) <= within, "{a:?} instead of {b:?}");
}

fn curve(shape: CurveShape, parts: u32, azimuth: f64) -> Curve {
    Curve {
        shape,
        parts,
        azimuth: Angle::from_degrees(azimuth),
    }
}

/// An arc of five parts along x, a line of three along y.
fn canopy() -> Shape {
    let arc = CurveShape::Arc {
        span_mm: 4000.0,
        rise_mm: 900.0,
    };
    let line = CurveShape::Line {
        run_mm: 1500.0,
        rise_mm: 0.0,
    };
    let form = TranslationForm {
        zig: curve(arc, 5, 0.0),
        zag: curve(line, 3, 90.0),
    };
    shape(Start::Translation(form), Courses::UntilStill)
}

#[test]
fn the_table_of_zones_is_what_growing_makes() {
    let mut linked = plain_polar();
    linked.steps.push(step(
        2,
        Act::Splice {
            at: Vs::All,
            directions: vec![Direction::Own(Vector::new(0.0, 10.0, 300.0)), Direction::Zone(start(2))],
        },
    ));
    let linked = link_zone(&linked, start(4), start(1), Sign::Minus).unwrap();
    let linked = link_zone(&linked, ZoneRef::Spliced(StepId(2), 0), start(4), Sign::Minus).unwrap();
    for shape in [canopy(), plain_polar(), linked] {
        let shell = shell(&shape);
        let zones = zone_states(&shape).unwrap();
        assert_eq!(zones.len(), shell.zones.len());
        for (a, b) in zones.iter().zip(&shell.zones) {
            assert_eq!((a.name, a.vector, a.kind), (b.name, b.vector, b.kind));
            assert_eq!(a.root, shell.zones[b.counts_as as usize].name);
        }
    }
}

#[test]
fn all_ribs_of_a_polar_form_stretched_by_a_factor_scale_the_shell_whichever_two_measures_it_goes_by() {
    let Start::Polar(plain) = plain_polar().start else {
        panic!("polar")
    };
    for pair in PolarPair::ALL {
        let before = polar(plain.by_pair(pair).unwrap().by);
        let zone = start(4);
        let after = set_together(&before, zone, vector(&before, zone) * 1.25).unwrap();
        let Start::Polar(form) = &after.start else {
            panic!("{pair:?} stays polar")
        };
        assert_eq!(form.by.pair(), pair);
        assert!(after.zones.is_empty(), "{pair:?}: no rule is needed");
        let (a, b) = (shell(&before), shell(&after));
        for (p, q) in a.points.iter().zip(&b.points) {
            near(q.0, p.0 * 1.25, 1e-8);
        }
    }
}

#[test]
fn a_rib_turned_in_its_upright_plane_changes_the_pitch_and_keeps_the_edge() {
    let before = plain_polar();
    let azimuth = 5.0 * std::f64::consts::TAU / 9.0;
    let (sin, cos) = 42.0_f64.to_radians().sin_cos();
    let to = turned(Vector::new(400.0 * cos, 0.0, -400.0 * sin), azimuth);
    let after = set_together(&before, start(5), to).unwrap();
    let Start::Polar(form) = &after.start else {
        panic!("polar")
    };
    let (pitch, edge) = form.pitch_and_edge().unwrap();
    assert!((pitch.degrees() - 42.0).abs() < 1e-9 && (edge - 400.0).abs() < 1e-9);
    assert_eq!(
        set_together(&before, start(5), Vector::new(to.x, to.y, 10.0))
            .unwrap_err()
            .code,
        Code::ParameterLimit,
        "ribs do not rise"
    );
}

#[test]
fn a_stretched_zone_of_a_translation_surface_moves_everything_behind_it_by_as_much() {
    let before = canopy();
    let by = Vector::new(120.0, -70.0, 0.0);
    for k in 0..5 {
        let after = set_zone(&before, start(k), vector(&before, start(k)) + by).unwrap();
        let (a, b) = (shell(&before), shell(&after));
        let mut moved = 0;
        for (p, q) in a.points.iter().zip(&b.points) {
            if (*q - *p).length() < 1e-9 {
                continue;
            }
            near(*q - *p, by, 1e-9);
            moved += 1;
        }
        // Of 6 x 4 vertices those behind k + 1 edges of the arc.
        assert_eq!(moved, (5 - k) * 4, "zone {k}");
        let back = derive_zone(&after, start(k)).unwrap();
        assert_eq!(back, before, "the rule can be taken away");
    }
}

#[test]
fn the_zone_of_a_straight_line_is_its_run_rise_and_azimuth() {
    let before = canopy();
    let after = set_zone(&before, start(5), Vector::new(300.0, 400.0, 50.0)).unwrap();
    let Start::Translation(form) = &after.start else {
        panic!("translation")
    };
    let CurveShape::Line { run_mm, rise_mm } = form.zag.shape else {
        panic!("a line")
    };
    assert!((run_mm - 1500.0).abs() < 1e-9 && (rise_mm - 150.0).abs() < 1e-9);
    assert!((form.zag.azimuth.degrees() - 53.130_102_354_155_98).abs() < 1e-9);
    assert!(after.zones.is_empty());
    let stretched = set_zone(&before, start(5), Vector::new(0.0, 620.0, 0.0)).unwrap();
    let Start::Translation(form) = &stretched.start else {
        panic!("translation")
    };
    assert_eq!(form.zag.azimuth, Angle::from_degrees(90.0), "as it was typed");
}

#[test]
fn a_point_of_a_free_curve_takes_those_behind_it_along() {
    let points: Vec<Point> = [(0.0, 0.0), (500.0, 100.0), (900.0, 400.0), (1500.0, 300.0)]
        .map(|(x, z)| Point::new(x, 0.0, z))
        .to_vec();
    let mut before = canopy();
    if let Start::Translation(form) = &mut before.start {
        form.zig = curve(CurveShape::Free(points.clone()), 1, 90.0);
        form.zag.azimuth = Angle::from_degrees(0.0);
    }
    let by = Vector::new(0.0, 30.0, -20.0);
    let after = set_zone(&before, start(1), vector(&before, start(1)) + by).unwrap();
    let Start::Translation(form) = &after.start else {
        panic!("translation")
    };
    let CurveShape::Free(moved) = &form.zig.shape else {
        panic!("free points")
    };
    // The curve runs along y: 30 along y is 30 along its own x.
    for (k, (p, q)) in points.iter().zip(moved).enumerate() {
        let meant = if k < 2 {
            Vector::ZERO
        } else {
            Vector::new(30.0, 0.0, -20.0)
        };
        near(*q - *p, meant, 1e-9);
    }
}

#[test]
fn an_edge_of_a_free_path_is_changed_as_the_path_itself_changes_it() {
    let points: Vec<Point> = [
        (0.0, 0.0, 0.0),
        (900.0, 0.0, 300.0),
        (800.0, 700.0, -100.0),
        (-100.0, 500.0, 250.0),
    ]
    .map(|(x, y, z)| Point::new(x, y, z))
    .to_vec();
    for closed in [false, true] {
        let path = FreePath::from_points(&points, closed).unwrap();
        let to = Vector::new(1000.0, 50.0, 280.0);
        let mut meant = path.clone();
        meant.drag_edge(0, to).unwrap();
        let after = set_zone(&shape(Start::Zigzag(path), Courses::Count(1)), start(0), to).unwrap();
        let Start::Zigzag(got) = &after.start else {
            panic!("free points")
        };
        for (a, b) in got.vectors().unwrap().iter().zip(meant.vectors().unwrap()) {
            near(*a, b, 1e-9);
        }
        assert_eq!(got.origin, meant.origin);
        assert!(after.zones.is_empty());
    }
}

#[test]
fn a_splice_direction_is_changed_in_its_step() {
    let mut before = plain_polar();
    let directions = vec![
        Direction::Own(Vector::new(0.0, 0.0, 300.0)),
        Direction::Own(Vector::X * 200.0),
    ];
    before.steps.push(step(
        7,
        Act::Splice {
            at: Vs::All,
            directions,
        },
    ));
    let to = Vector::new(10.0, 20.0, 340.0);
    let after = set_zone(&before, ZoneRef::Spliced(StepId(7), 0), to).unwrap();
    let Act::Splice { directions, .. } = &after.steps[1].act else {
        panic!("a splice")
    };
    assert_eq!(directions[..], [Direction::Own(to), Direction::Own(Vector::X * 200.0)]);
    assert_eq!((&after.start, &after.zones), (&before.start, &before.zones));
    let lost = set_zone(&before, ZoneRef::Spliced(StepId(8), 0), to).unwrap_err();
    assert_eq!(lost.code, Code::NameLost);
}

fn column() -> Shape {
    let form = ColumnForm {
        ribs: 6,
        zag_run_mm: 500.0,
        zig_run_mm: 300.0,
        rise_mm: 250.0,
        turn: 1,
    };
    shape(Start::Column(form), Courses::Count(3))
}

fn tube(moved: Vec<(u32, Vector)>) -> Shape {
    let form = LoopForm {
        sides: 7,
        radius_mm: 1000.0,
        rise_mm: 600.0,
        moved,
    };
    shape(Start::Loop(form), Courses::Count(2))
}

#[test]
fn a_closed_front_stays_closed_and_its_other_zones_share_the_gap() {
    let before = column();
    let by = Vector::new(30.0, -20.0, 44.0);
    let after = set_zone(&before, start(2), vector(&before, start(2)) + by).unwrap();
    assert!(shell(&after).closing_gap.unwrap() < 1e-9);
    // Twelve zones, each once: eleven take up an eleventh each.
    for id in 0..12 {
        let meant = if id == 2 { by } else { -by / 11.0 };
        near(vector(&after, start(id)) - vector(&before, start(id)), meant, 1e-9);
    }
    let before = tube(vec![(3, Vector::Z * 40.0)]);
    let after = set_zone(&before, start(4), vector(&before, start(4)) + by).unwrap();
    assert!(after.zones.is_empty(), "a loop keeps its moved nodes");
    for id in 0..14 {
        let meant = if id == 4 { by } else { -by / 13.0 };
        near(vector(&after, start(id)) - vector(&before, start(id)), meant, 1e-9);
    }
}

#[test]
fn parameters_go_along_when_all_symmetric_zones_do() {
    let before = column();
    // Zig zone 6 + 2 falls and runs back: h runs 300 at azimuth 2 / 6.
    let to = turned(Vector::new(-360.0, 0.0, -280.0), std::f64::consts::TAU / 3.0);
    let after = set_together(&before, start(8), to).unwrap();
    let Start::Column(form) = &after.start else {
        panic!("a column")
    };
    assert!((form.zig_run_mm - 360.0).abs() < 1e-9 && (form.rise_mm - 280.0).abs() < 1e-9);
    assert_eq!(form.zag_run_mm, 500.0);

    let before = tube(Vec::new());
    let zone = vector(&before, start(5));
    let after = set_together(
        &before,
        start(5),
        Vector::new(zone.x * 1.3, zone.y * 1.3, zone.z + 50.0),
    )
    .unwrap();
    let Start::Loop(form) = &after.start else {
        panic!("a loop")
    };
    assert!((form.radius_mm - 1300.0).abs() < 1e-9 && (form.rise_mm - 650.0).abs() < 1e-9);

    let form = HelicalForm {
        ribs: 9,
        turn: 3,
        pitch: Angle::from_degrees(30.0),
        edge_mm: 400.0,
    };
    let before = shape(Start::Helical(form), Courses::UntilStill);
    let after = set_together(&before, start(7), vector(&before, start(7)) * 0.5).unwrap();
    let Start::Helical(form) = &after.start else {
        panic!("helical")
    };
    assert!((form.edge_mm - 200.0).abs() < 1e-9 && (form.pitch.degrees() - 30.0).abs() < 1e-9);

    for from in [RibbonFrom::Edge, RibbonFrom::Across] {
        let form = RibbonForm {
            ribs: 10,
            turn: Angle::from_degrees(24.0),
            pitch: Angle::from_degrees(20.0),
            edge_mm: 500.0,
            from,
        };
        let before = shape(Start::Ribbon(form), Courses::UntilStill);
        for id in [1, 8] {
            let after = set_together(&before, start(id), vector(&before, start(id)) * 1.5).unwrap();
            let Start::Ribbon(form) = &after.start else {
                panic!("a ribbon")
            };
            assert!((form.edge_mm - 750.0).abs() < 1e-9 && (form.pitch.degrees() - 20.0).abs() < 1e-9);
        }
    }

    let star = Star::Icosahedral(vec![AxisClass::FiveFold]);
    let mut before = shape(
        Start::StarSolid(StarSolid { star, edge_mm: 300.0 }),
        Courses::UntilStill,
    );
    before.steps.push(Step {
        side: Side::Aft,
        ..lay(2, Courses::UntilStill)
    });
    let after = set_together(&before, start(2), vector(&before, start(2)) * 2.0).unwrap();
    let volume = |shape: &Shape| totals(&shell(shape)).volume_mm3.unwrap();
    assert!((volume(&after) / volume(&before) - 8.0).abs() < 1e-9);
}

#[test]
fn a_helix_goes_along_in_radius_and_rise() {
    let mut before = canopy();
    let helix = CurveShape::Helix {
        radius_mm: 800.0,
        turn: Angle::from_degrees(270.0),
        rise_mm: 900.0,
    };
    if let Start::Translation(form) = &mut before.start {
        form.zag = curve(helix, 9, 10.0);
    }
    let v = vector(&before, start(8));
    let after = set_together(&before, start(8), Vector::new(v.x * 1.5, v.y * 1.5, v.z * 2.0)).unwrap();
    let Start::Translation(form) = &after.start else {
        panic!("translation")
    };
    let CurveShape::Helix { radius_mm, rise_mm, .. } = form.zag.shape else {
        panic!("a helix")
    };
    assert!((radius_mm - 1200.0).abs() < 1e-8 && (rise_mm - 1800.0).abs() < 1e-8);
}

#[test]
fn a_change_that_parameters_cannot_say_turns_every_rib_alike() {
    let before = plain_polar();
    let by = turned(Vector::new(20.0, 60.0, -15.0), 2.0 * std::f64::consts::TAU / 9.0);
    let after = set_together(&before, start(2), vector(&before, start(2)) + by).unwrap();
    assert_eq!(after.start, before.start);
    assert_eq!(after.zones.len(), 9);
    // A ninth of a turn about its middle takes the shell to itself.
    let points = shell(&after).points;
    let middle = points.iter().map(|p| p.0).sum::<Vector>() / points.len() as f64;
    for p in &points {
        let image = middle + turned(p.0 - middle, std::f64::consts::TAU / 9.0);
        assert!(points.iter().any(|q| q.0.distance(image) < 1e-6), "{p:?}");
    }
    // The same shell is a polar form of another edge, turned: the twist is left out by the plane of freedom.
    let Freedom::Plane(across) = freedom(&before, start(2)).unwrap() else {
        panic!("a plane")
    };
    let to = vector(&before, start(2)) + by;
    let sight = Vector::new(0.6, 0.64, -0.48);
    let met = Freedom::Plane(across).nearest(to, sight);
    assert!(met.dot(across).abs() < 1e-12 * met.length());
    near((met - to).cross(sight), Vector::ZERO, 1e-9);
    assert!(matches!(
        set_together(&before, start(2), met).unwrap().start,
        Start::Polar(_)
    ));
}

#[test]
fn free_ribs_and_turned_splices_are_found_by_their_fan() {
    let free = plain_polar().to_free().unwrap();
    let zones = zone_states(&free).unwrap();
    let family = symmetric(&free, zones[3].name).unwrap();
    assert_eq!(family.len(), 9);
    let after = set_together(&free, zones[3].name, zones[3].vector * 1.1).unwrap();
    for (old, new) in zones.iter().zip(zone_states(&after).unwrap()) {
        near(new.vector, old.vector * 1.1, 1e-9);
    }
    let mut spliced = plain_polar();
    for k in 0..3_u32 {
        let direction = turned(
            Vector::new(200.0, 10.0, 100.0),
            f64::from(k) * std::f64::consts::TAU / 3.0,
        );
        let directions = vec![Direction::Own(direction)];
        spliced.steps.push(step(
            2 + k,
            Act::Splice {
                at: Vs::All,
                directions,
            },
        ));
    }
    let zone = ZoneRef::Spliced(StepId(3), 0);
    assert_eq!(symmetric(&spliced, zone).unwrap().len(), 3);
    let up = vector(&spliced, zone) + Vector::Z * 55.0;
    let after = set_together(&spliced, zone, up).unwrap();
    for k in 0..3_u32 {
        assert!((vector(&after, ZoneRef::Spliced(StepId(2 + k), 0)).z - 155.0).abs() < 1e-9);
    }
    assert_eq!(
        symmetric(&canopy(), start(1)).unwrap().len(),
        1,
        "an arc's part is alone"
    );
}

#[test]
fn zones_are_linked_unlinked_and_derived_again() {
    let before = canopy();
    let linked = link_zone(&before, start(1), start(3), Sign::Minus).unwrap();
    assert_eq!(vector(&linked, start(1)), -vector(&before, start(3)));
    assert_eq!(totals(&shell(&linked)).zones + 1, totals(&shell(&before)).zones);
    let to = Vector::new(700.0, 0.0, 100.0);
    let dragged = set_zone(&linked, start(1), to).unwrap();
    near(vector(&dragged, start(3)), -to, 1e-9);
    let apart = unlink_zone(&dragged, start(1)).unwrap();
    assert_eq!(vector(&apart, start(1)), to);
    let moved = set_zone(&apart, start(3), Vector::X * 500.0).unwrap();
    assert_eq!(vector(&moved, start(1)), to, "no longer linked");
    let derived = derive_zone(&derive_zone(&moved, start(1)).unwrap(), start(3)).unwrap();
    assert_eq!(derived, before);
    for refused in [
        link_zone(&linked, start(3), start(1), Sign::Plus),
        link_zone(&linked, start(3), start(3), Sign::Plus),
        link_zone(&linked, start(3), start(99), Sign::Plus),
        unlink_zone(&before, start(3)),
        derive_zone(&before, start(3)),
    ] {
        assert!(matches!(refused.unwrap_err().code, Code::BrokenLink | Code::NameLost));
    }
    let mut spliced = before;
    let directions = vec![Direction::Own(Vector::Z * 300.0)];
    spliced.steps.push(step(
        2,
        Act::Splice {
            at: Vs::All,
            directions,
        },
    ));
    let splice = ZoneRef::Spliced(StepId(2), 0);
    assert_eq!(
        link_zone(&spliced, start(1), splice, Sign::Plus).unwrap_err().code,
        Code::BrokenLink
    );
    let linked = link_zone(&spliced, splice, start(1), Sign::Plus).unwrap();
    let rule = &linked.zones[0];
    assert!(matches!(rule.vector, ZoneVector::Linked(ZoneRef::Start(1), Sign::Plus)));
    assert_eq!(shell(&linked).zones.last().unwrap().kind, ZoneKind::Linked);
}

#[test]
fn a_link_in_a_closed_path_keeps_it_closed() {
    let points: Vec<Point> = [
        (0.0, 0.0, 0.0),
        (900.0, 0.0, 300.0),
        (800.0, 700.0, -100.0),
        (-100.0, 500.0, 250.0),
    ]
    .map(|(x, y, z)| Point::new(x, y, z))
    .to_vec();
    let path = FreePath::from_points(&points, true).unwrap();
    let before = shape(Start::Zigzag(path), Courses::Count(1));
    let linked = link_zone(&before, start(2), start(0), Sign::Minus).unwrap();
    near(vector(&linked, start(2)), -vector(&before, start(0)), 1e-9);
    assert!(shell(&linked).closing_gap.unwrap() < 1e-9);
}

#[test]
fn every_edge_belongs_to_the_zone_that_it_runs_along_also_where_a_seam_splits_it() {
    let mut butted = canopy();
    // Parts of a line and its twice as long copies meet along parts of their sides.
    butted = set_zone(&butted, start(2), vector(&butted, start(1)) * 2.0).unwrap();
    for shape in [canopy(), plain_polar(), butted, column()] {
        let shell = shell(&shape);
        for (index, edge) in (0..).zip(&shell.edges) {
            let zone = shell.zones[shell.edge_zone(index).unwrap() as usize].vector;
            let [a, b] = edge.ends.map(|v| shell.points[v as usize]);
            assert!(
                (b - a).cross(zone).length() <= 1e-6 * zone.length_squared(),
                "edge {index}"
            );
        }
        assert_eq!(shell.edge_zone(u32::MAX), None);
    }
}

#[test]
fn what_stays_in_a_trial_change_is_what_lies_before_the_zone() {
    let before = canopy();
    let by = Vector::new(1.0, 2.0, 0.0);
    let after = set_zone(&before, start(3), vector(&before, start(3)) + by).unwrap();
    let (a, b) = (shell(&before), shell(&after));
    // Of 6 x 4 vertices those with at most three edges of the arc before them.
    assert_eq!(still_vertices(&a, &b, None, by.length()).len(), 4 * 4);
    let far = (0..)
        .zip(a.points.iter().zip(&b.points))
        .find(|(_, (p, q))| p.distance(**q) > 0.5)
        .unwrap()
        .0;
    assert_eq!(still_vertices(&a, &b, Some(far), by.length()).len(), 2 * 4);
}

proptest! {
    /// Planted answer: on an open front each zone asked for has its vector and no other changes.
    #[test]
    fn several_zones_change_at_once(parts in prop::collection::vec((0_u32..9, -300.0..300.0, -300.0..300.0, 20.0..400.0), 1..5)) {
        let form = HelicalForm { ribs: 9, turn: 3, pitch: Angle::from_degrees(30.0), edge_mm: 400.0 };
        let before = shape(Start::Helical(form), Courses::Count(2));
        let changes: std::collections::BTreeMap<u32, Vector> =
            parts.into_iter().map(|(id, x, y, z)| (id, Vector::new(x, y, z))).collect();
        let list: Vec<_> = changes.iter().map(|(id, v)| (start(*id), *v)).collect();
        let after = set_zones(&before, &list).unwrap();
        for id in 0..9 {
            let meant = changes.get(&id).copied().unwrap_or_else(|| vector(&before, start(id)));
            prop_assert_eq!(vector(&after, start(id)), meant);
        }
        prop_assert_eq!(shell(&after).check(1e-6), Ok(()));
    }

    /// A closed front stays closed whatever is changed.
    #[test]
    fn a_closed_front_never_opens(id in 0_u32..12, x in -200.0..200.0, y in -200.0..200.0, z in -200.0..200.0, all in any::<bool>()) {
        let before = column();
        let to = vector(&before, start(id)) + Vector::new(x, y, z);
        let change = if all { set_together } else { set_zone };
        if let Ok(after) = change(&before, start(id), to) {
            near(vector(&after, start(id)), to, 1e-9);
            prop_assert!(shell(&after).closing_gap.unwrap() < 1e-8);
        }
    }
}
