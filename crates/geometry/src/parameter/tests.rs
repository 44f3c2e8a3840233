use core::f64::consts::SQRT_2;

use proptest::prelude::*;

use super::*;
use crate::{
    Act, Angle, Courses, Direction, FirstWord, LetterName, Outside, Placement, Point, RoleRule, Sign, Spurs, Start,
    Step, StepId, Tolerances, Vector, Vs, ZoneRef, ZoneRule, ZoneVector, grow,
    start::{
        AxisClass, ColumnForm, Curve, CurveShape, FreePath, HelicalForm, LoopForm, PolarBy, PolarForm, RibbonForm,
        RibbonFrom, Star, StarLength, StarLetter, StarPath, StarSolid, TranslationForm,
    },
};

fn shape(start: Start, acts: Vec<Act>) -> Shape {
    let steps = (1..).zip(acts).map(|(id, act)| Step {
        id: StepId(id),
        name: None,
        on: true,
        side: crate::Side::Fore,
        act,
    });
    Shape {
        start,
        zones: Vec::new(),
        steps: steps.collect(),
        finish: Vec::new(),
        placement: Placement::default(),
        outside: Outside::Grown,
        tolerances: Tolerances::default(),
    }
}

fn lay(count: u32) -> Act {
    Act::Lay {
        courses: Courses::Count(count),
        spurs: Spurs::Retract,
    }
}

const fn deg(degrees: f64) -> Angle {
    Angle::from_degrees(degrees)
}

fn curve(shape: CurveShape, azimuth: f64) -> Curve {
    Curve {
        shape,
        parts: 4,
        azimuth: deg(azimuth),
    }
}

fn translation(zig: CurveShape, zag: CurveShape) -> Start {
    Start::Translation(TranslationForm {
        zig: curve(zig, 0.0),
        zag: curve(zag, 90.0),
    })
}

fn zigzag(closed: bool) -> Start {
    let points = [
        [0.0, 0.0, 0.0],
        [300.0, 0.0, 250.0],
        [600.0, 50.0, 0.0],
        [500.0, 400.0, 200.0],
    ];
    let points = points.map(|[x, y, z]| Point::new(x, y, z));
    Start::Zigzag(FreePath::from_points(&points, closed).unwrap())
}

fn polar(by: PolarBy) -> Start {
    Start::Polar(PolarForm { ribs: 8, by })
}

/// Every kind of start, every curve, every pair of measures, every step with a number.
fn samples() -> Vec<Shape> {
    let (pitch, edge_mm, width_mm, height_mm) = (deg(40.0), 500.0, 2000.0, 2100.0);
    let letter = |axis, sign, length| StarLetter { axis, sign, length };
    let star_letters = vec![
        letter(0, Sign::Plus, StarLength::Golden(1)),
        letter(3, Sign::Minus, StarLength::Mm(300.0)),
        letter(1, Sign::Plus, StarLength::Golden(-1)),
    ];
    let starts = vec![
        zigzag(false),
        zigzag(true),
        translation(
            CurveShape::Arc {
                span_mm: 4000.0,
                rise_mm: 900.0,
            },
            CurveShape::Catenary {
                span_mm: 3000.0,
                rise_mm: -500.0,
            },
        ),
        translation(
            CurveShape::Line {
                run_mm: 2000.0,
                rise_mm: 100.0,
            },
            CurveShape::Sine {
                length_mm: 3000.0,
                amplitude_mm: 300.0,
                waves: 1.5,
            },
        ),
        translation(
            CurveShape::Helix {
                radius_mm: 900.0,
                turn: deg(200.0),
                rise_mm: 700.0,
            },
            CurveShape::Free(vec![
                Point::ORIGIN,
                Point::new(0.0, 500.0, 200.0),
                Point::new(100.0, 900.0, 0.0),
            ]),
        ),
        polar(PolarBy::PitchEdge { pitch, edge_mm }),
        polar(PolarBy::PitchWidth { pitch, width_mm }),
        polar(PolarBy::PitchHeight { pitch, height_mm }),
        polar(PolarBy::EdgeWidth {
            edge_mm,
            width_mm: 1500.0,
        }),
        polar(PolarBy::EdgeHeight { edge_mm, height_mm }),
        polar(PolarBy::WidthHeight { width_mm, height_mm }),
        Start::Loop(LoopForm {
            sides: 6,
            radius_mm: 800.0,
            rise_mm: 300.0,
            moved: vec![(3, Vector::new(0.0, 20.0, 40.0)), (5, Vector::X), (3, Vector::Z)],
        }),
        Start::Ribbon(RibbonForm {
            ribs: 7,
            turn: deg(20.0),
            pitch: deg(30.0),
            edge_mm: 200.0,
            from: RibbonFrom::Edge,
        }),
        Start::Column(ColumnForm {
            ribs: 6,
            zag_run_mm: 300.0,
            zig_run_mm: 150.0,
            rise_mm: 250.0,
            turn: -1,
        }),
        Start::Helical(HelicalForm {
            ribs: 6,
            turn: 2,
            pitch: deg(35.0),
            edge_mm: 400.0,
        }),
        Start::StarPath(StarPath {
            star: Star::Icosahedral(vec![AxisClass::FiveFold]),
            unit_mm: 400.0,
            closed: false,
            letters: star_letters,
        }),
        Start::StarSolid(StarSolid {
            star: Star::Prismatic(5),
            edge_mm: 300.0,
        }),
    ];
    let mut all: Vec<Shape> = starts.into_iter().map(|start| shape(start, vec![lay(2)])).collect();
    let mut stepped = shape(
        polar(PolarBy::PitchEdge { pitch, edge_mm }),
        vec![
            lay(1),
            Act::Splice {
                at: Vs::EveryKth {
                    from: LetterName::of_start(0, Sign::Minus),
                    k: 2,
                },
                directions: vec![Direction::Between, Direction::Own(Vector::new(0.0, 30.0, 400.0))],
            },
            Act::SetRoles(RoleRule::FirstAreZig(3)),
            Act::JoinRims { within_mm: 0.5 },
            lay(1),
        ],
    );
    stepped.zones.push(ZoneRule {
        zone: ZoneRef::Start(2),
        vector: ZoneVector::Own(Vector::new(10.0, 300.0, -200.0)),
    });
    stepped.zones.push(ZoneRule {
        zone: ZoneRef::Spliced(StepId(2), 1),
        vector: ZoneVector::Own(Vector::new(0.0, 30.0, 500.0)),
    });
    all.push(stepped);
    all
}

/// A value within the bounds that is not the one there: `part` from 0 to 1 of the way, near the value for lengths, so that shells stay small.
fn another(parameter: &Parameter, part: f64) -> f64 {
    let [least, most] = parameter.bounds;
    let reach = match parameter.kind {
        // Rims are joined across gaps, not across panels.
        ParameterKind::Length if parameter.key.ends_with(".within") => 1.0,
        ParameterKind::Length => 1000.0,
        ParameterKind::Angle => 90.0,
        ParameterKind::Factor => 2.0,
        ParameterKind::Count => 6.0,
    };
    let (low, high) = (
        (parameter.value - reach).max(least),
        (parameter.value + reach).min(most),
    );
    let value = low + part * (high - low);
    if parameter.kind == ParameterKind::Count {
        value.round()
    } else {
        value
    }
}

fn keys(start: Start) -> Vec<String> {
    let all = parameters(&shape(start, Vec::new()));
    let of_start = all.into_iter().filter(|p| p.key.starts_with("start."));
    of_start.map(|p| p.key["start.".len()..].to_owned()).collect()
}

#[test]
fn every_number_of_a_start_has_a_key() {
    let pair = polar(PolarBy::EdgeHeight {
        edge_mm: 500.0,
        height_mm: 2000.0,
    });
    assert_eq!(keys(pair), ["ribs", "edge", "height"]);
    let arcs = keys(samples()[2].start.clone());
    let both = [
        "zig.span",
        "zig.rise",
        "zig.parts",
        "zig.azimuth",
        "zag.span",
        "zag.rise",
        "zag.parts",
        "zag.azimuth",
    ];
    assert_eq!(arcs, both);
    let column = samples()
        .into_iter()
        .find(|s| matches!(s.start, Start::Column(_)))
        .unwrap();
    assert_eq!(keys(column.start), ["ribs", "zag_run", "zig_run", "rise", "turn"]);
    let letters = samples()
        .into_iter()
        .find(|s| matches!(s.start, Start::StarPath(_)))
        .unwrap();
    assert_eq!(
        keys(letters.start),
        ["unit", "letter.0.golden", "letter.1.length", "letter.2.golden"]
    );
    // Four points, open: three edges. Closed, the fifth would be the first again.
    assert_eq!(keys(zigzag(false)).len(), 12);
    assert_eq!(keys(zigzag(true)).len(), 12);
    assert!(keys(zigzag(true)).contains(&"point.3.z".to_owned()));
}

#[test]
fn keys_are_unique_and_values_within_bounds() {
    for shape in samples() {
        let all = parameters(&shape);
        let mut keys: Vec<&str> = all.iter().map(|p| p.key.as_str()).collect();
        keys.sort_unstable();
        keys.dedup();
        assert_eq!(keys.len(), all.len(), "{:?}", shape.start);
        for p in &all {
            assert!(p.bounds[0] <= p.value && p.value <= p.bounds[1], "{p:?}");
            assert_eq!(parameter(&shape, &p.key).as_ref(), Some(p));
        }
    }
}

#[test]
fn a_value_that_is_set_is_read_and_nothing_else_changes() {
    for shape in samples() {
        let before = parameters(&shape);
        for p in &before {
            let value = another(p, 0.8);
            let changed = set_parameter(&shape, &p.key, value).unwrap_or_else(|f| panic!("{}: {f:?}", p.key));
            let after = parameters(&changed);
            let [old, new] = [&before, &after].map(|list| list.iter().map(|p| &p.key).collect::<Vec<_>>());
            assert_eq!(old, new, "{}", p.key);
            for (old, new) in before.iter().zip(&after) {
                let expected = if old.key == p.key { value } else { old.value };
                // The length of a vector and its parts are the same number said twice.
                let [a, b] = [&old.key, &p.key].map(|k| k.rsplit_once('.').map(|k| k.0));
                let twice = old.key != p.key && a == b && (old.key.ends_with("length") || p.key.ends_with("length"));
                let near = (new.value - expected).abs() < 1e-9 * (1.0 + expected.abs());
                assert!(near || twice, "{} set to {value}: {} is {}", p.key, new.key, new.value);
            }
        }
    }
}

#[test]
fn what_is_read_and_set_again_changes_nothing() {
    for shape in samples() {
        for p in parameters(&shape) {
            let same = set_parameter(&shape, &p.key, p.value).unwrap();
            let vector_length = p.key.ends_with(".length") && !p.key.starts_with("start.");
            if !vector_length {
                assert_eq!(same, shape, "{}", p.key);
            }
        }
    }
}

#[test]
fn what_cannot_be_set_is_refused_with_its_limit() {
    let shape = &samples()[5];
    let code = |key: &str, value: f64| set_parameter(shape, key, value).unwrap_err();
    assert_eq!(code("start.nothing", 1.0).code, Code::NoSuchParameter);
    assert_eq!(code("start", 1.0).code, Code::NoSuchParameter);
    assert_eq!(code("start.pitch.", 1.0).code, Code::NoSuchParameter);
    assert_eq!(code("", 1.0).code, Code::NoSuchParameter);
    assert_eq!(code("step.7.courses", 1.0).code, Code::NoSuchParameter);
    assert_eq!(code("start.edge", f64::NAN).code, Code::NotFinite);
    let steep = code("start.pitch", 95.0);
    assert_eq!(steep.code, Code::ParameterLimit);
    assert_eq!(
        (steep.place, steep.figure, steep.unit),
        (Place::Parameter("pitch"), Some(95.0), Unit::Degrees)
    );
    assert_eq!(code("start.ribs", 2.0).limit, Some(3.0));
    assert_eq!(code("start.ribs", 4.5).code, Code::ParameterLimit);
    assert_eq!(code("step.1.courses", -1.0).limit, Some(0.0));
}

#[test]
fn a_number_out_of_bounds_can_stay() {
    let mut shape = samples()[5].clone();
    let Start::Polar(form) = &mut shape.start else {
        unreachable!()
    };
    form.ribs = 5000;
    let ribs = parameter(&shape, "start.ribs").unwrap();
    assert_eq!((ribs.value, ribs.bounds[1]), (5000.0, 5000.0));
    assert!(set_parameter(&shape, "start.ribs", 5000.0).is_ok());
    assert!(set_parameter(&shape, "start.ribs", 5001.0).is_err());
}

/// The figure by its formula: the diagonal of a unit square has the square root of 2, so a vector with this length has these parts.
#[test]
fn the_length_of_a_direction_scales_it() {
    let stepped = samples().pop().unwrap();
    let stepped = set_parameter(&stepped, "step.2.direction.1.y", 0.0).unwrap();
    let stepped = set_parameter(&stepped, "step.2.direction.1.x", 400.0).unwrap();
    let longer = set_parameter(&stepped, "step.2.direction.1.length", 100.0 * SQRT_2).unwrap();
    let z = parameter(&longer, "step.2.direction.1.z").unwrap().value;
    assert!((z - 100.0).abs() < 1e-9, "{z}");
}

#[test]
fn a_node_moved_twice_is_one_parameter() {
    let tube = samples()
        .into_iter()
        .find(|s| matches!(s.start, Start::Loop(_)))
        .unwrap();
    assert_eq!(parameter(&tube, "start.moved.3.z").unwrap().value, 41.0);
    let back = set_parameter(&tube, "start.moved.3.z", 0.0).unwrap();
    let height = |shape: &Shape| -> f64 {
        let word: FirstWord = shape.start.first_word().unwrap();
        word.nodes()[3].0.z
    };
    assert!((height(&tube) - 41.0).abs() < 1e-9 && height(&back).abs() < 1e-9);
}

proptest! {
    #![proptest_config(ProptestConfig::with_cases(300))]

    #[test]
    fn any_values_within_bounds_grow_without_panic(which in 0_usize..18, parts in prop::collection::vec((any::<prop::sample::Index>(), 0.0_f64..=1.0), 1..6)) {
        let mut shape = samples()[which].clone();
        for (index, part) in parts {
            let all = parameters(&shape);
            let p = &all[index.index(all.len())];
            // A point that would fall on its neighbour is refused; the shape stays.
            if let Ok(next) = set_parameter(&shape, &p.key, another(p, part)) {
                shape = next;
            }
        }
        let (shell, findings) = grow(&shape);
        prop_assert_eq!(shell.check(0.001), Ok(()), "{:?}", findings);
    }

    #[test]
    fn the_ends_of_the_bounds_grow_without_panic(which in 0_usize..18, index in any::<prop::sample::Index>(), high in any::<bool>()) {
        let shape = samples()[which].clone();
        let all = parameters(&shape);
        let p = &all[index.index(all.len())];
        // Counts at their most grow for seconds; their own tests are elsewhere.
        prop_assume!(p.kind != ParameterKind::Count || !high);
        if let Ok(next) = set_parameter(&shape, &p.key, p.bounds[usize::from(high)]) {
            let _ = grow(&next);
        }
    }
}
