use core::f64::consts::PI;

use proptest::prelude::*;

use super::*;
use crate::{
    Act, Angle, Courses, Outside, Placement, Spurs, Start, Step, StepId, Tolerances, grow,
    parameter::parameter,
    set_parameter,
    start::{
        ColumnForm, Curve, CurveShape, FreePath, PolarBy, PolarForm, RibbonForm, RibbonFrom, Star, StarSolid,
        TranslationForm,
    },
};

fn shape(start: Start, courses: Courses) -> Shape {
    Shape {
        start,
        zones: Vec::new(),
        steps: vec![Step {
            id: StepId(1),
            name: None,
            on: true,
            side: crate::Side::Fore,
            act: Act::Lay {
                courses,
                spurs: Spurs::Retract,
            },
        }],
        finish: Vec::new(),
        placement: Placement::default(),
        outside: Outside::Grown,
        tolerances: Tolerances::default(),
    }
}

const fn deg(degrees: f64) -> Angle {
    Angle::from_degrees(degrees)
}

fn polar(ribs: u32, pitch: f64, edge_mm: f64, courses: Courses) -> Shape {
    let by = PolarBy::PitchEdge {
        pitch: deg(pitch),
        edge_mm,
    };
    shape(Start::Polar(PolarForm { ribs, by }), courses)
}

fn arc(span_mm: f64, rise_mm: f64, parts: u32, azimuth: f64) -> Curve {
    Curve {
        shape: CurveShape::Arc { span_mm, rise_mm },
        parts,
        azimuth: deg(azimuth),
    }
}

fn vault() -> Shape {
    let form = TranslationForm {
        zig: arc(4000.0, 900.0, 6, 0.0),
        zag: arc(3000.0, 600.0, 4, 90.0),
    };
    shape(Start::Translation(form), Courses::UntilStill)
}

fn column() -> Shape {
    let form = ColumnForm {
        ribs: 6,
        zag_run_mm: 300.0,
        zig_run_mm: 150.0,
        rise_mm: 250.0,
        turn: 1,
    };
    shape(Start::Column(form), Courses::Count(5))
}

const fn want(figure: Figure, value: f64, tolerance: f64) -> Want {
    Want {
        figure,
        value,
        tolerance,
    }
}

fn free(keys: &[&str]) -> Vec<Free> {
    keys.iter().copied().map(Free::new).collect()
}

fn bounded(key: &str, least: f64, most: f64) -> Free {
    Free {
        key: key.to_owned(),
        bounds: [Some(least), Some(most)],
    }
}

fn run(shape: &Shape, wants: &[Want], free: &[Free]) -> Result<Solution, Unsolved> {
    solve(shape, wants, free, Effort::default(), &mut || false)
}

fn value(shape: &Shape, key: &str) -> f64 {
    parameter(shape, key).unwrap().value
}

fn measured(shape: &Shape, which: Figure) -> Option<f64> {
    figure(shape, &grow(shape).0, which)
}

fn headroom(distance_mm: f64) -> Figure {
    Figure::Headroom(Headroom {
        distance_mm,
        ..Headroom::default()
    })
}

#[track_caller]
fn near(value: f64, expected: f64) {
    assert!(
        (value - expected).abs() < 1e-6 * (1.0 + expected.abs()),
        "{value} is not {expected}"
    );
}

/// Polar zonohedra (derived; the limit is Chilton and Coxeter, Amer. Math. Monthly 70 (1963) 946-951): of n ribs of length e at pitch t, the rings are
/// e sin t apart, and ring j has radius e cos t sin(j pi / n) / sin(pi / n).
#[test]
fn figures_of_a_dome_by_their_formulas() {
    // Two courses of 8 ribs: rings 0 to 3 at even depths; the rim runs between rings 2 and 3.
    let (n, e, t) = (8.0, 1000.0, 40.0_f64.to_radians());
    let dome = polar(8, 40.0, 1000.0, Courses::Count(2));
    let radius = |j: f64| e * t.cos() * (j * PI / n).sin() / (PI / n).sin();
    let fall = e * t.sin();
    near(measured(&dome, Figure::Height).unwrap(), 3.0 * fall);
    near(measured(&dome, Figure::Span).unwrap(), 2.0 * radius(3.0));
    near(measured(&dome, headroom(0.0)).unwrap(), 3.0 * fall);
    // All ribs of ring 1 are as far from the axis; between them the panels hang no lower there, as each falls away outwards.
    let ridge = Figure::Headroom(Headroom {
        distance_mm: radius(1.0),
        from: None,
        azimuth: Some(deg(0.0)),
    });
    near(measured(&dome, ridge).unwrap(), 2.0 * fall);
    // The plan of the rim's hull: a regular octagon through ring 3, with its corners half way between the ribs.
    let octagon = n / 2.0 * radius(3.0).powi(2) * (2.0 * PI / n).sin();
    let ring_2_inside = radius(2.0) < radius(3.0) * (PI / n).cos();
    assert!(ring_2_inside);
    near(measured(&dome, Figure::FootprintArea).unwrap(), octagon);
    near(
        measured(&dome, Figure::FootprintWidth).unwrap(),
        2.0 * radius(3.0) * (PI / n).cos(),
    );
    near(measured(&dome, Figure::LongestEdge).unwrap(), e);
    // At the pole the ribs meet at a, with sin(a / 2) = cos t sin(pi / n).
    let at_pole = 2.0 * (t.cos() * (PI / n).sin()).asin().to_degrees();
    near(measured(&dome, Figure::LeastAngle).unwrap(), at_pole);
    assert_eq!(measured(&dome, Figure::Volume), None);
    assert_eq!(measured(&dome, headroom(2.0 * radius(3.0))), None);
}

#[test]
fn figures_of_a_vault_by_their_formulas() {
    let vault = vault();
    near(measured(&vault, Figure::SizeX).unwrap(), 4000.0);
    near(measured(&vault, Figure::SizeY).unwrap(), 3000.0);
    near(measured(&vault, Figure::Height).unwrap(), 1500.0);
    near(measured(&vault, Figure::Span).unwrap(), 5000.0);
    near(measured(&vault, Figure::FootprintArea).unwrap(), 12e6);
    near(measured(&vault, Figure::FootprintLength).unwrap(), 4000.0);
    near(measured(&vault, Figure::FootprintWidth).unwrap(), 3000.0);
    near(measured(&vault, headroom(0.0)).unwrap(), 1500.0);
    // Above the middle of the rim along x, the arc along y is at its top, the other at its foot.
    let at_rim = Figure::Headroom(Headroom {
        distance_mm: 2000.0,
        from: None,
        azimuth: Some(deg(180.0)),
    });
    near(measured(&vault, at_rim).unwrap(), 600.0);
    // All round at half the width, the lowest is above the middle of the rim along y: the arc along x at its top.
    let rim = measured(&vault, headroom(1500.0)).unwrap();
    let along_y = Figure::Headroom(Headroom {
        distance_mm: 1500.0,
        from: None,
        azimuth: Some(deg(90.0)),
    });
    near(measured(&vault, along_y).unwrap(), 900.0);
    assert!(rim <= 900.0);
}

/// The circle's lowest point against many single lines: none is lower, and one is near.
#[test]
fn headroom_all_round_is_the_lowest_of_all_directions() {
    for (shape, distance_mm) in [
        (vault(), 900.0),
        (vault(), 1400.0),
        (polar(7, 35.0, 800.0, Courses::Count(3)), 1100.0),
    ] {
        let all_round = measured(&shape, headroom(distance_mm)).unwrap();
        let lines = (0..7200).map(|k| {
            let azimuth = Some(deg(f64::from(k) * 0.05));
            let at = Headroom {
                distance_mm,
                from: None,
                azimuth,
            };
            measured(&shape, Figure::Headroom(at)).unwrap()
        });
        let lowest = lines.fold(f64::INFINITY, f64::min);
        assert!(
            all_round <= lowest + 1e-6 && lowest < all_round + 2.0,
            "{all_round}, {lowest}"
        );
    }
}

#[test]
fn the_ground_rim_is_the_one_with_the_lowest_vertex() {
    // In the plane of complex numbers, with w a sixth of a turn, the foot's nodes are w^(k+1) (a - b) / (w - 1), of radius 150, and those of the ring
    // above it w^k (a w - b) / (w - 1), of radius sqrt(a a + b b - a b), half a step on (derived). The wider hexagon is the hull.
    let column = column();
    let (shell, _) = grow(&column);
    assert_eq!(shell.rims.len(), 2);
    let hexagon = 1.5 * 3.0_f64.sqrt() * (300.0_f64.powi(2) + 150.0_f64.powi(2) - 300.0 * 150.0);
    near(measured(&column, Figure::FootprintArea).unwrap(), hexagon);
    near(measured(&column, Figure::Height).unwrap(), 6.0 * 250.0);
}

#[test]
fn height_and_span_of_a_whole_form_in_closed_form() {
    // Until still: from pole to pole, n e sin t high, and with n even 2 e cos t / sin(pi / n) wide.
    let whole = polar(8, 50.0, 700.0, Courses::UntilStill);
    let wants = [want(Figure::Height, 3200.0, 0.5), want(Figure::Span, 8000.0, 0.5)];
    let found = run(&whole, &wants, &free(&["start.pitch", "start.edge"])).unwrap();
    let [fall, run_mm] = [3200.0 / 8.0, 4000.0 * (PI / 8.0).sin()];
    let (pitch, edge) = (value(&found.shape, "start.pitch"), value(&found.shape, "start.edge"));
    assert!((pitch - fall.atan2(run_mm).to_degrees()).abs() < 1e-3, "{pitch}");
    assert!((edge - fall.hypot(run_mm)).abs() < 0.05, "{edge}");
    assert!(found.figures.iter().all(Reached::is_met));
    assert_eq!(found.changes[0].before, 50.0);
    assert_eq!(found.changes[0].after, pitch);
}

#[test]
fn rise_of_a_vault_from_its_headroom() {
    let wants = [want(headroom(0.0), 2500.0, 0.1)];
    let found = run(&vault(), &wants, &free(&["start.zig.rise"])).unwrap();
    assert!((value(&found.shape, "start.zig.rise") - 1900.0).abs() < 0.1);
    // Two that can both change share the change; nothing else does.
    let found = run(&vault(), &wants, &free(&["start.zig.rise", "start.zag.rise"])).unwrap();
    let (zig, zag) = (
        value(&found.shape, "start.zig.rise"),
        value(&found.shape, "start.zag.rise"),
    );
    assert!((zig + zag - 2500.0).abs() < 0.1);
    // Both weigh alike: the least change shares it evenly.
    assert!((zig - 900.0 - (zag - 600.0)).abs() < 5.0, "{zig}, {zag}");
    assert_eq!(value(&found.shape, "start.zig.span"), 4000.0);
}

/// The change is measured as stated: lengths by the logarithm of their ratio, angles in parts of 40 degrees.
#[test]
fn of_many_solutions_the_least_change_is_found() {
    let whole = polar(8, 40.0, 500.0, Courses::UntilStill);
    let found = run(
        &whole,
        &[want(Figure::Height, 9000.0, 0.5)],
        &free(&["start.pitch", "start.edge"]),
    )
    .unwrap();
    let change = |pitch: f64, edge: f64| ((pitch - 40.0) / 40.0).hypot((edge / 500.0).ln());
    // All pairs with 8 e sin t = 9000, one a hundredth of a degree.
    let all = (100..8900).map(|k| f64::from(k) / 100.0);
    let least = all
        .map(|t| change(t, 9000.0 / 8.0 / t.to_radians().sin()))
        .fold(f64::INFINITY, f64::min);
    let own = change(value(&found.shape, "start.pitch"), value(&found.shape, "start.edge"));
    assert!(own < 1.002 * least, "{own}, {least}");
}

#[test]
fn courses_are_counted_for_a_height() {
    // A column of k courses is k + 1 rises high.
    let wants = [want(Figure::Height, 3000.0, 0.5)];
    let found = run(&column(), &wants, &free(&["step.1.courses"])).unwrap();
    assert_eq!(value(&found.shape, "step.1.courses"), 11.0);
    // With the rise free as well, the courses stay: fewest changes.
    let found = run(&column(), &wants, &free(&["step.1.courses", "start.rise"])).unwrap();
    assert_eq!(value(&found.shape, "step.1.courses"), 5.0);
    assert!((value(&found.shape, "start.rise") - 500.0).abs() < 0.1);
    // With the rise bounded to 300, at least 9 courses are needed.
    let both = [Free::new("step.1.courses"), bounded("start.rise", 200.0, 300.0)];
    let found = run(&column(), &wants, &both).unwrap();
    assert_eq!(value(&found.shape, "step.1.courses"), 9.0);
    assert!((value(&found.shape, "start.rise") - 300.0).abs() < 0.1);
}

#[test]
fn a_rise_beyond_a_bound_says_what_would_be_needed() {
    // 8 e sin t: at 50 degrees 8 * 500 * sin 50 high; 3500 needs asin(7 / 8).
    let whole = polar(8, 40.0, 500.0, Courses::UntilStill);
    let missed_by = 4000.0 * 50.0_f64.to_radians().sin() - 3500.0;
    let failed = run(
        &whole,
        &[want(Figure::Height, 3500.0, 0.5)],
        &[bounded("start.pitch", 10.0, 50.0)],
    )
    .unwrap_err();
    let Why::Missed {
        missed,
        held,
        needed,
        exhausted,
    } = failed.why
    else {
        panic!("{:?}", failed.why)
    };
    assert_eq!(missed.len(), 1);
    assert!((missed[0].by - missed_by).abs() < 0.1, "{missed:?}");
    assert_eq!((held.len(), held[0].upper, held[0].bound), (1, true, 50.0));
    assert!(
        (needed[0].value - (7.0_f64 / 8.0).asin().to_degrees()).abs() < 0.01,
        "{needed:?}"
    );
    assert!(!exhausted);
    // The nearest can be taken.
    let nearest = failed.nearest.unwrap();
    assert!((value(&nearest.shape, "start.pitch") - 50.0).abs() < 1e-3);
}

#[test]
fn what_no_pitch_can_reach_is_held_by_its_own_bound() {
    // No pitch makes 8 edges of 500 higher than 4000.
    let whole = polar(8, 40.0, 500.0, Courses::UntilStill);
    let failed = run(&whole, &[want(Figure::Height, 4500.0, 0.5)], &free(&["start.pitch"])).unwrap_err();
    let Why::Missed {
        missed, held, needed, ..
    } = failed.why
    else {
        panic!("{:?}", failed.why)
    };
    assert!((missed[0].by + 500.0).abs() < 0.1, "{missed:?}");
    assert!(held.len() == 1 && held[0].upper && needed.is_empty());
}

#[test]
fn a_figure_that_does_not_depend_is_named() {
    let failed = run(
        &vault(),
        &[want(Figure::Height, 2000.0, 0.5)],
        &free(&["placement.shift.x", "start.zig.span"]),
    );
    assert_eq!(failed.unwrap_err().why, Why::Independent(Figure::Height));
    let whole = polar(8, 40.0, 500.0, Courses::UntilStill);
    let wants = [want(Figure::Height, 2600.0, 0.5), want(Figure::LongestEdge, 600.0, 0.5)];
    let failed = run(&whole, &wants, &free(&["start.pitch"])).unwrap_err();
    assert_eq!(failed.why, Why::Independent(Figure::LongestEdge));
}

#[test]
fn wants_that_exclude_each_other_give_the_nearest() {
    // The height of the edges by their pitch alone, and the edges: with the edge free both can be met, with the width asked too not.
    let whole = polar(8, 40.0, 500.0, Courses::UntilStill);
    let wants = [
        want(Figure::Height, 3000.0, 0.5),
        want(Figure::Span, 2000.0, 0.5),
        want(Figure::LongestEdge, 600.0, 0.5),
    ];
    let failed = run(&whole, &wants, &free(&["start.pitch", "start.edge"])).unwrap_err();
    let Why::Missed {
        missed,
        held,
        exhausted,
        ..
    } = failed.why
    else {
        panic!("{:?}", failed.why)
    };
    assert!(
        missed.len() >= 2 && held.is_empty() && !exhausted,
        "{missed:?}, {held:?}"
    );
}

#[test]
fn what_cannot_be_looked_for_says_so() {
    let height = [want(Figure::Height, 2000.0, 0.5)];
    let why = |wants: &[Want], free: &[Free]| run(&vault(), wants, free).unwrap_err().why;
    assert_eq!(why(&[], &free(&["start.zig.rise"])), Why::NothingWanted);
    assert_eq!(why(&height, &[]), Why::NothingFree);
    assert_eq!(
        why(&height, &free(&["start.pitch"])),
        Why::NoSuchParameter("start.pitch".to_owned())
    );
    let empty = bounded("start.zig.rise", 500.0, 400.0);
    assert_eq!(why(&height, &[empty]), Why::EmptyBounds("start.zig.rise".to_owned()));
    let bad = [want(Figure::Height, f64::NAN, 0.5)];
    assert_eq!(why(&bad, &free(&["start.zig.rise"])), Why::NoNumber(Figure::Height));
    let volume = [want(Figure::Volume, 1e9, 1e6)];
    assert_eq!(why(&volume, &free(&["start.zig.rise"])), Why::NoFigure(Figure::Volume));
    let none = polar(8, 40.0, 500.0, Courses::Count(0));
    let failed = run(&none, &height, &free(&["start.pitch"])).unwrap_err();
    assert_eq!(failed.why, Why::NotGrown(crate::Code::NoPanels));
}

#[test]
fn a_search_can_be_stopped() {
    let mut asked = 0;
    let mut stop = || {
        asked += 1;
        asked > 5
    };
    let wants = [want(Figure::Height, 9000.0, 0.5), want(Figure::Span, 100.0, 0.5)];
    let failed = solve(
        &vault(),
        &wants,
        &free(&["start.zig.rise", "start.zag.rise"]),
        Effort::default(),
        &mut stop,
    );
    let failed = failed.unwrap_err();
    assert_eq!(failed.why, Why::Stopped);
    assert!(failed.nearest.unwrap().shells <= 6);
}

#[test]
fn what_is_wanted_already_changes_nothing() {
    let wants = [want(Figure::Height, 1500.0, 0.5)];
    let found = run(&vault(), &wants, &free(&["start.zig.rise", "start.zag.rise"])).unwrap();
    assert_eq!(found.shape, vault());
    assert_eq!(found.shells, 1);
}

/// The volume of the rhombic triacontahedron of edge 1 is 4 sqrt(5 + 2 sqrt 5) (published).
#[test]
fn the_edge_of_a_solid_from_its_volume() {
    let star = Star::Icosahedral(vec![crate::start::AxisClass::FiveFold]);
    let mut solid = shape(
        Start::StarSolid(StarSolid { star, edge_mm: 300.0 }),
        Courses::UntilStill,
    );
    let mut aft = solid.steps[0].clone();
    (aft.id, aft.side) = (StepId(2), crate::Side::Aft);
    solid.steps.push(aft);
    let found = run(&solid, &[want(Figure::Volume, 1e9, 1e3)], &free(&["start.edge"])).unwrap();
    let unit = 4.0 * (5.0 + 2.0 * 5.0_f64.sqrt()).sqrt();
    assert!((value(&found.shape, "start.edge") - 1000.0 / unit.cbrt()).abs() < 0.01);
}

#[test]
fn free_points_move_to_a_height() {
    let points = [
        [0.0, 0.0, 0.0],
        [300.0, 0.0, 250.0],
        [600.0, 50.0, 0.0],
        [900.0, 0.0, 200.0],
    ];
    let points = points.map(|[x, y, z]| crate::Point::new(x, y, z));
    let path = FreePath::from_points(&points, false).unwrap();
    let zigzag = shape(Start::Zigzag(path), Courses::Count(1));
    let wants = [want(Figure::SizeX, 800.0, 0.1), want(Figure::Height, 400.0, 0.1)];
    let keys = ["start.point.2.x", "start.point.1.z", "start.point.2.z"];
    let found = run(&zigzag, &wants, &free(&keys)).unwrap();
    near(measured(&found.shape, Figure::SizeX).unwrap() / 800.0, 1.0);
    assert!((measured(&found.shape, Figure::Height).unwrap() - 400.0).abs() < 0.1);
}

/// Keys that may be planted, and the reach of each: least and most.
type Planted = Vec<(&'static str, f64, f64)>;

/// Shapes with keys of theirs.
fn planted() -> Vec<(Shape, Planted)> {
    let ribbon = RibbonForm {
        ribs: 7,
        turn: deg(20.0),
        pitch: deg(30.0),
        edge_mm: 200.0,
        from: RibbonFrom::Edge,
    };
    vec![
        (
            polar(9, 35.0, 800.0, Courses::Count(3)),
            vec![("start.pitch", 15.0, 65.0), ("start.edge", 300.0, 2000.0)],
        ),
        (
            vault(),
            vec![
                ("start.zig.span", 2000.0, 8000.0),
                ("start.zag.rise", 200.0, 1200.0),
                ("start.zig.rise", 200.0, 1500.0),
            ],
        ),
        (
            column(),
            vec![("start.rise", 100.0, 600.0), ("start.zag_run", 200.0, 700.0)],
        ),
        (
            shape(Start::Ribbon(ribbon), Courses::Count(4)),
            vec![("start.pitch", 15.0, 60.0), ("start.edge", 80.0, 600.0)],
        ),
    ]
}

proptest! {
    #![proptest_config(ProptestConfig::with_cases(60))]

    /// Parameters are planted, the figures of the planted shape are asked for: a shape with those figures is found.
    #[test]
    fn planted_figures_are_found(which in 0_usize..4, parts in prop::array::uniform3(0.0_f64..1.0)) {
        let (shape, keys) = planted().swap_remove(which);
        let mut target = shape.clone();
        for ((key, least, most), part) in keys.iter().zip(parts) {
            target = set_parameter(&target, key, least + part * (most - least)).unwrap();
        }
        let figures = [Figure::Height, Figure::Span, Figure::Area];
        let wants: Vec<Want> = figures[..keys.len()].iter().map(|f| want(*f, measured(&target, *f).unwrap(), 0.5)).collect();
        let keys: Vec<Free> = keys.iter().map(|k| Free::new(k.0)).collect();
        let found = run(&shape, &wants, &keys);
        prop_assert!(found.is_ok(), "{:?}", found);
        let found = found.unwrap();
        for one in &wants {
            let reached = measured(&found.shape, one.figure).unwrap();
            prop_assert!((reached - one.value).abs() <= 0.5, "{:?}: {} for {}", one.figure, reached, one.value);
        }
    }

    #[test]
    fn the_span_is_the_farthest_of_all_pairs(points in prop::collection::vec((-20_i32..20, -20_i32..20), 3..40)) {
        let points: Vec<glam::DVec2> = points.iter().map(|p| glam::DVec2::new(f64::from(p.0), f64::from(p.1))).collect();
        let pairs = points.iter().flat_map(|a| points.iter().map(move |b| a.distance(*b)));
        let farthest = pairs.fold(0.0, f64::max);
        let hull = ground::hull(points.clone());
        prop_assert!((ground::diameter(&hull) - farthest).abs() < 1e-9);
        // The least width, by brute force over the sides.
        if hull.len() > 2 {
            let n = hull.len();
            let width = |i: usize| {
                let along = (hull[(i + 1) % n] - hull[i]).normalize();
                points.iter().map(|p| along.perp_dot(*p - hull[i])).fold(0.0, f64::max)
            };
            let least = (0..n).map(width).fold(f64::INFINITY, f64::min);
            prop_assert!((ground::rectangle(&hull).width - least).abs() < 1e-9);
        }
    }
}
