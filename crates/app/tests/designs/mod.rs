//! Designs for the tests: one as text, and random ones.
#![allow(dead_code, reason = "each test file uses its part")]

use proptest::{collection::vec, option, prelude::*};
use zonewright::document::{Backdrop, BackdropPlacement, Design, Drawn};
use zonewright_geometry::{start::*, *};
use zonewright_shop::text::Units;

/// Nine ribs, three courses.
pub(crate) const POLAR: &str = r#"// A plant house.
(
    format: 1,
    name: "Plant house",
    shape: (
        start: polar(
            ribs: 9,
            by: pitch_edge(pitch: 35.26, edge_mm: 600),
        ),
        steps: [
            (id: 1, act: lay(courses: count(3))),
        ],
    ),
)
"#;

fn number() -> BoxedStrategy<f64> {
    prop_oneof![-1e4..1e4_f64, Just(0.0), Just(1.0), prop::num::f64::NORMAL].boxed()
}

fn vector() -> BoxedStrategy<Vector> {
    (number(), number(), number())
        .prop_map(|(x, y, z)| Vector::new(x, y, z))
        .boxed()
}

fn point() -> BoxedStrategy<Point> {
    vector().prop_map(Point).boxed()
}

fn angle() -> BoxedStrategy<Angle> {
    number().prop_map(Angle::from_degrees).boxed()
}

fn sign() -> BoxedStrategy<Sign> {
    prop_oneof![Just(Sign::Plus), Just(Sign::Minus)].boxed()
}

fn role() -> BoxedStrategy<Role> {
    prop_oneof![Just(Role::Zig), Just(Role::Zag)].boxed()
}

fn side() -> BoxedStrategy<Side> {
    prop_oneof![Just(Side::Fore), Just(Side::Aft)].boxed()
}

fn step_id() -> BoxedStrategy<StepId> {
    any::<u32>().prop_map(StepId).boxed()
}

fn zone() -> BoxedStrategy<ZoneRef> {
    prop_oneof![
        any::<u32>().prop_map(ZoneRef::Start),
        (step_id(), any::<u32>()).prop_map(|(s, i)| ZoneRef::Spliced(s, i))
    ]
    .boxed()
}

fn letter() -> BoxedStrategy<LetterName> {
    let maker = prop_oneof![Just(Maker::Start), step_id().prop_map(Maker::Step)];
    let leaf = (maker, any::<u32>(), sign()).prop_map(|(maker, index, sign)| LetterName {
        maker,
        index,
        sign,
        at: None,
    });
    leaf.prop_recursive(5, 8, 1, |inner| {
        (inner.clone(), inner).prop_map(|(own, at)| LetterName {
            at: Some(Box::new(at)),
            ..own
        })
    })
    .boxed()
}

fn vs() -> BoxedStrategy<Vs> {
    let name = (letter(), letter()).prop_map(|(zig, zag)| VName { zig, zag });
    prop_oneof![
        Just(Vs::All),
        vec(name, 0..3).prop_map(Vs::Picked),
        (letter(), any::<u32>()).prop_map(|(from, k)| Vs::EveryKth { from, k })
    ]
    .boxed()
}

fn direction() -> BoxedStrategy<Direction> {
    prop_oneof![
        vector().prop_map(Direction::Own),
        zone().prop_map(Direction::Zone),
        zone().prop_map(Direction::Against),
        Just(Direction::Between)
    ]
    .boxed()
}

fn act() -> BoxedStrategy<Act> {
    let spurs = prop_oneof![Just(Spurs::Retract), Just(Spurs::Hold), Just(Spurs::Cross)];
    let courses = prop_oneof![any::<u32>().prop_map(Courses::Count), Just(Courses::UntilStill)];
    let rule = prop_oneof![
        any::<u32>().prop_map(RoleRule::FirstAreZig),
        Just(RoleRule::Alternate),
        Just(RoleRule::Swap),
        vec(letter(), 0..3).prop_map(RoleRule::Flip)
    ];
    prop_oneof![
        (courses, spurs).prop_map(|(courses, spurs)| Act::Lay { courses, spurs }),
        vs().prop_map(|at| Act::Fill { at }),
        (vs(), vec(direction(), 0..4)).prop_map(|(at, directions)| Act::Splice { at, directions }),
        Just(Act::Retract),
        vs().prop_map(|at| Act::Cross { at }),
        rule.prop_map(Act::SetRoles),
        Just(Act::CloseRim),
        number().prop_map(|within_mm| Act::JoinRims { within_mm }),
    ]
    .boxed()
}

fn step_name() -> BoxedStrategy<Option<String>> {
    option::of("\\PC{0,12}").boxed()
}

fn step() -> BoxedStrategy<Step> {
    (step_id(), step_name(), any::<bool>(), side(), act())
        .prop_map(|(id, name, on, side, act)| Step {
            id,
            name,
            on,
            side,
            act,
        })
        .boxed()
}

fn curve() -> BoxedStrategy<Curve> {
    let shape = prop_oneof![
        (number(), number()).prop_map(|(run_mm, rise_mm)| CurveShape::Line { run_mm, rise_mm }),
        (number(), number()).prop_map(|(span_mm, rise_mm)| CurveShape::Arc { span_mm, rise_mm }),
        (number(), number()).prop_map(|(span_mm, rise_mm)| CurveShape::Catenary { span_mm, rise_mm }),
        (number(), number(), number()).prop_map(|(length_mm, amplitude_mm, waves)| CurveShape::Sine {
            length_mm,
            amplitude_mm,
            waves
        }),
        (number(), angle(), number()).prop_map(|(radius_mm, turn, rise_mm)| CurveShape::Helix {
            radius_mm,
            turn,
            rise_mm
        }),
        vec(point(), 0..4).prop_map(CurveShape::Free),
    ];
    (shape, any::<u32>(), angle())
        .prop_map(|(shape, parts, azimuth)| Curve { shape, parts, azimuth })
        .boxed()
}

fn star() -> BoxedStrategy<Star> {
    let class = prop_oneof![
        Just(AxisClass::FiveFold),
        Just(AxisClass::FourFold),
        Just(AxisClass::ThreeFold),
        Just(AxisClass::TwoFold)
    ];
    let classes = vec(class, 0..4);
    prop_oneof![
        classes.clone().prop_map(Star::Icosahedral),
        classes.prop_map(Star::Cubic),
        any::<u32>().prop_map(Star::Prismatic)
    ]
    .boxed()
}

fn start() -> BoxedStrategy<Start> {
    let own = prop_oneof![
        vector().prop_map(FreeVector::Own),
        (any::<u32>(), sign()).prop_map(|(of, sign)| FreeVector::Same(of, sign))
    ];
    let free = (any::<u32>(), own, role()).prop_map(|(id, vector, role)| FreeLetter { id, vector, role });
    let path = (point(), any::<bool>(), vec(free, 0..5)).prop_map(|(origin, closed, letters)| FreePath {
        origin,
        closed,
        letters,
    });
    let by = prop_oneof![
        (angle(), number()).prop_map(|(pitch, edge_mm)| PolarBy::PitchEdge { pitch, edge_mm }),
        (angle(), number()).prop_map(|(pitch, width_mm)| PolarBy::PitchWidth { pitch, width_mm }),
        (angle(), number()).prop_map(|(pitch, height_mm)| PolarBy::PitchHeight { pitch, height_mm }),
        (number(), number()).prop_map(|(edge_mm, width_mm)| PolarBy::EdgeWidth { edge_mm, width_mm }),
        (number(), number()).prop_map(|(edge_mm, height_mm)| PolarBy::EdgeHeight { edge_mm, height_mm }),
        (number(), number()).prop_map(|(width_mm, height_mm)| PolarBy::WidthHeight { width_mm, height_mm }),
    ];
    let length = prop_oneof![
        number().prop_map(StarLength::Mm),
        any::<i32>().prop_map(StarLength::Golden)
    ];
    let star_letter = (any::<u32>(), sign(), length).prop_map(|(axis, sign, length)| StarLetter { axis, sign, length });
    let from = prop_oneof![Just(RibbonFrom::Edge), Just(RibbonFrom::Across)];
    prop_oneof![
        path.prop_map(Start::Zigzag),
        (curve(), curve()).prop_map(|(zig, zag)| Start::Translation(TranslationForm { zig, zag })),
        (any::<u32>(), by).prop_map(|(ribs, by)| Start::Polar(PolarForm { ribs, by })),
        (any::<u32>(), number(), number(), vec((any::<u32>(), vector()), 0..3)).prop_map(
            |(sides, radius_mm, rise_mm, moved)| Start::Loop(LoopForm {
                sides,
                radius_mm,
                rise_mm,
                moved
            })
        ),
        (any::<u32>(), angle(), angle(), number(), from).prop_map(|(ribs, turn, pitch, edge_mm, from)| {
            Start::Ribbon(RibbonForm {
                ribs,
                turn,
                pitch,
                edge_mm,
                from,
            })
        }),
        (any::<u32>(), number(), number(), number(), any::<i32>()).prop_map(
            |(ribs, zag_run_mm, zig_run_mm, rise_mm, turn)| Start::Column(ColumnForm {
                ribs,
                zag_run_mm,
                zig_run_mm,
                rise_mm,
                turn
            })
        ),
        (any::<u32>(), any::<u32>(), angle(), number()).prop_map(|(ribs, turn, pitch, edge_mm)| {
            Start::Helical(HelicalForm {
                ribs,
                turn,
                pitch,
                edge_mm,
            })
        }),
        (star(), number(), any::<bool>(), vec(star_letter, 0..4)).prop_map(|(star, unit_mm, closed, letters)| {
            Start::StarPath(StarPath {
                star,
                unit_mm,
                closed,
                letters,
            })
        }),
        (star(), number()).prop_map(|(star, edge_mm)| Start::StarSolid(StarSolid { star, edge_mm })),
    ]
    .boxed()
}

fn finish() -> BoxedStrategy<Finish> {
    let panel = (side(), letter(), letter(), any::<u32>()).prop_map(|(side, a, b, turn)| PanelName {
        side,
        letters: (a, b),
        turn,
    });
    let act = vec(panel, 0..3).prop_map(FinishAct::Drop);
    (step_id(), step_name(), any::<bool>(), act)
        .prop_map(|(id, name, on, act)| Finish { id, name, on, act })
        .boxed()
}

fn zone_rule() -> BoxedStrategy<ZoneRule> {
    let vector = prop_oneof![
        vector().prop_map(ZoneVector::Own),
        (zone(), sign()).prop_map(|(zone, sign)| ZoneVector::Linked(zone, sign))
    ];
    (zone(), vector)
        .prop_map(|(zone, vector)| ZoneRule { zone, vector })
        .boxed()
}

fn placement() -> BoxedStrategy<Placement> {
    (any::<bool>(), number(), [angle(), angle(), angle()], vector())
        .prop_map(|(mirrored, scale, turn, shift)| Placement {
            mirrored,
            scale,
            turn,
            shift,
        })
        .boxed()
}

/// Any design that a file can hold, sensible or not.
pub(crate) fn any_design() -> BoxedStrategy<Design> {
    let outside = prop_oneof![Just(Outside::Grown), Just(Outside::Reversed)];
    let tolerances = (number(), number()).prop_map(|(join_mm, near_mm)| Tolerances { join_mm, near_mm });
    let shape = (
        start(),
        vec(zone_rule(), 0..3),
        vec(step(), 0..5),
        vec(finish(), 0..3),
        placement(),
        outside,
        tolerances,
    )
        .prop_map(|(start, zones, steps, finish, placement, outside, tolerances)| Shape {
            start,
            zones,
            steps,
            finish,
            placement,
            outside,
            tolerances,
        });
    let units = prop_oneof![Just(Units::Mm), Just(Units::Inch)];
    ("\\PC{0,20}", units, shape, proptest::option::of(backdrop()))
        .prop_map(|(name, units, shape, backdrop)| Design {
            name,
            units,
            shape,
            backdrop,
        })
        .boxed()
}

fn backdrop() -> impl Strategy<Value = Backdrop> {
    let near = || -1e6..1e6_f64;
    let point = || (near(), near(), near()).prop_map(|(x, y, z)| Point::new(x, y, z));
    let drawn = (
        vec(point(), 4..9),
        vec([0_u32..4, 0..4, 0..4], 0..5),
        vec(vec(0_u32..4, 2..5), 1..3),
    )
        .prop_map(|(points, triangles, lines)| Drawn {
            points,
            triangles,
            lines,
        });
    let placement =
        (point(), near(), 1e-3..2.0_f64, any::<bool>()).prop_map(|(shift, turn, scale, y_up)| BackdropPlacement {
            shift: shift.0,
            turn: Angle::from_degrees(turn),
            scale,
            y_up,
        });
    ("\\PC{0,20}", any::<bool>(), placement, drawn).prop_map(|(name, shown, placement, drawn)| Backdrop {
        name,
        shown,
        placement,
        drawn: std::sync::Arc::new(drawn),
    })
}
