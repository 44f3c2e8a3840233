//! Parameters outside their limits, and what is said of them. The limits are the design plan's.

use zonewright_geometry::start::{
    AxisClass, ColumnForm, Curve, CurveShape, HelicalForm, LoopForm, PolarBy, PolarForm, RibbonForm, RibbonFrom, Star,
    StarSolid, TranslationForm,
};
use zonewright_geometry::{Angle, Code, Place, Point, Start, Vector};

const NAN: f64 = f64::NAN;
const INF: f64 = f64::INFINITY;

/// Says whether a start with one parameter at a value is grown, and if not, which parameter and why.
fn refusal(start: &Start) -> Option<(Code, &'static str)> {
    let finding = start.first_word().err()?;
    match finding.place {
        Place::Parameter(name) => Some((finding.code, name)),
        place => panic!("{place:?}"),
    }
}

fn each_bad_length(name: &'static str, start: impl Fn(f64) -> Start) {
    assert_eq!(refusal(&start(300.0)), None, "{name}");
    for bad in [-5.0, -0.1, 1.1e7, 1e300] {
        assert_eq!(refusal(&start(bad)), Some((Code::ParameterLimit, name)), "{name} {bad}");
    }
    for bad in [NAN, INF, -INF] {
        assert_eq!(refusal(&start(bad)), Some((Code::NotFinite, name)), "{name} {bad}");
    }
}

fn each_bad_edge(name: &'static str, start: impl Fn(f64) -> Start) {
    for bad in [0.0, 1e-300] {
        assert_eq!(refusal(&start(bad)), Some((Code::ParameterLimit, name)), "{name} {bad}");
    }
    each_bad_length(name, start);
}

fn each_bad_pitch(start: impl Fn(f64) -> Start) {
    for good in [1e-9, 45.0, 89.999] {
        assert_eq!(refusal(&start(good)), None, "{good}");
    }
    for bad in [0.0, -0.0, 90.0, -1.0, 135.0] {
        assert_eq!(refusal(&start(bad)), Some((Code::ParameterLimit, "pitch")), "{bad}");
    }
    assert_eq!(refusal(&start(NAN)), Some((Code::NotFinite, "pitch")));
}

fn each_bad_count(name: &'static str, start: impl Fn(u32) -> Start) {
    for good in [3, 2000] {
        assert_eq!(refusal(&start(good)), None, "{name} {good}");
    }
    for bad in [0, 1, 2, 2001, u32::MAX] {
        assert_eq!(refusal(&start(bad)), Some((Code::ParameterLimit, name)), "{name} {bad}");
    }
}

fn polar(ribs: u32, pitch: f64, edge_mm: f64) -> Start {
    let pitch = Angle::from_degrees(pitch);
    Start::Polar(PolarForm {
        ribs,
        by: PolarBy::PitchEdge { pitch, edge_mm },
    })
}

fn polar_by(by: PolarBy) -> Start {
    Start::Polar(PolarForm { ribs: 9, by })
}

fn helical(ribs: u32, pitch: f64, edge_mm: f64) -> Start {
    Start::Helical(HelicalForm {
        ribs,
        turn: 1,
        pitch: Angle::from_degrees(pitch),
        edge_mm,
    })
}

fn ribbon(ribs: u32, turn: f64, pitch: f64, edge_mm: f64) -> Start {
    Start::Ribbon(RibbonForm {
        ribs,
        turn: Angle::from_degrees(turn),
        pitch: Angle::from_degrees(pitch),
        edge_mm,
        from: RibbonFrom::Edge,
    })
}

fn column(ribs: u32, zag_run_mm: f64, zig_run_mm: f64, rise_mm: f64) -> Start {
    Start::Column(ColumnForm {
        ribs,
        zag_run_mm,
        zig_run_mm,
        rise_mm,
        turn: 1,
    })
}

fn tube(sides: u32, radius_mm: f64, rise_mm: f64, moved: Vec<(u32, Vector)>) -> Start {
    Start::Loop(LoopForm {
        sides,
        radius_mm,
        rise_mm,
        moved,
    })
}

fn translation(shape: CurveShape, parts: u32, azimuth: f64) -> Start {
    let line = CurveShape::Line {
        run_mm: 100.0,
        rise_mm: 0.0,
    };
    let zig = Curve {
        shape,
        parts,
        azimuth: Angle::from_degrees(azimuth),
    };
    let zag = Curve {
        shape: line,
        parts: 3,
        azimuth: Angle::from_degrees(90.0),
    };
    Start::Translation(TranslationForm { zig, zag })
}

#[test]
fn ribs_that_cannot_be() {
    each_bad_count("ribs", |n| polar(n, 40.0, 300.0));
    each_bad_count("ribs", |n| helical(n, 40.0, 300.0));
    each_bad_count("ribs", |n| column(n, 300.0, 100.0, 50.0));
    each_bad_count("sides", |n| tube(n, 300.0, 100.0, vec![]));
    for bad in [0, 1, 2001, u32::MAX] {
        assert_eq!(
            refusal(&ribbon(bad, 20.0, 40.0, 300.0)),
            Some((Code::ParameterLimit, "ribs"))
        );
    }
}

#[test]
fn pitches_and_turns_that_cannot_be() {
    each_bad_pitch(|t| polar(9, t, 300.0));
    each_bad_pitch(|t| helical(9, t, 300.0));
    each_bad_pitch(|t| ribbon(9, 20.0, t, 300.0));
    let pitch = Angle::from_degrees;
    let width_mm = 300.0;
    each_bad_pitch(|t| {
        polar_by(PolarBy::PitchWidth {
            pitch: pitch(t),
            width_mm: width_mm / 1000.0,
        })
    });
    for bad in [0.0, 360.0, -720.0] {
        assert_eq!(
            refusal(&ribbon(9, bad, 40.0, 300.0)),
            Some((Code::ParameterLimit, "turn"))
        );
    }
    assert_eq!(refusal(&ribbon(9, NAN, 40.0, 300.0)), Some((Code::NotFinite, "turn")));
}

#[test]
fn lengths_that_cannot_be() {
    let pitch = Angle::from_degrees(40.0);
    each_bad_edge("edge_mm", |l| polar(9, 40.0, l));
    each_bad_edge("width_mm", |width_mm| polar_by(PolarBy::PitchWidth { pitch, width_mm }));
    each_bad_edge("height_mm", |height_mm| {
        polar_by(PolarBy::PitchHeight { pitch, height_mm })
    });
    each_bad_edge("edge_mm", |edge_mm| {
        polar_by(PolarBy::EdgeWidth {
            edge_mm,
            width_mm: 300.0,
        })
    });
    each_bad_edge("height_mm", |height_mm| {
        polar_by(PolarBy::EdgeHeight {
            edge_mm: 1e6,
            height_mm,
        })
    });
    each_bad_edge("width_mm", |width_mm| {
        polar_by(PolarBy::WidthHeight {
            width_mm,
            height_mm: 300.0,
        })
    });
    each_bad_edge("edge_mm", |l| helical(9, 40.0, l));
    each_bad_edge("edge_mm", |l| ribbon(9, 20.0, 40.0, l));
    each_bad_edge("rise_mm", |l| column(9, 300.0, 100.0, l));
    each_bad_length("zag_run_mm", |l| column(9, l, 100.0, 50.0));
    each_bad_length("zig_run_mm", |l| column(9, 100.0, l, 50.0));
    assert_eq!(
        refusal(&column(9, 0.0, 0.0, 50.0)),
        Some((Code::ParameterLimit, "zag_run_mm"))
    );
    each_bad_edge("radius_mm", |l| tube(9, l, 100.0, vec![]));
    each_bad_edge("rise_mm", |l| tube(9, 300.0, l, vec![]));
    let star = || Star::Cubic(vec![AxisClass::FourFold]);
    each_bad_edge("edge_mm", |edge_mm| {
        Start::StarSolid(StarSolid { star: star(), edge_mm })
    });
    let moved = |by| tube(9, 300.0, 100.0, vec![(0, by)]);
    assert_eq!(
        refusal(&moved(Vector::new(0.0, NAN, 0.0))),
        Some((Code::NotFinite, "moved"))
    );
    assert_eq!(
        refusal(&moved(Vector::new(0.0, 0.0, 1e8))),
        Some((Code::ParameterLimit, "moved"))
    );
}

/// A width that only an edge beyond 10 km could give at so steep a pitch.
#[test]
fn a_solved_edge_has_limits_too() {
    let pitch = Angle::from_degrees(89.999_999);
    let start = polar_by(PolarBy::PitchWidth { pitch, width_mm: 1e6 });
    assert_eq!(refusal(&start), Some((Code::ParameterLimit, "edge_mm")));
}

#[test]
fn curves_that_cannot_be() {
    let arc = |span_mm, rise_mm| CurveShape::Arc { span_mm, rise_mm };
    for parts in [0, 10_001, u32::MAX] {
        let start = translation(arc(900.0, 100.0), parts, 0.0);
        assert_eq!(refusal(&start), Some((Code::ParameterLimit, "parts")));
    }
    each_bad_edge("span_mm", |l| translation(arc(l, 100.0), 4, 0.0));
    each_bad_edge("span_mm", |span_mm| {
        translation(CurveShape::Catenary { span_mm, rise_mm: -9.0 }, 4, 0.0)
    });
    let sine = |length_mm, waves| CurveShape::Sine {
        length_mm,
        amplitude_mm: 9.0,
        waves,
    };
    each_bad_edge("length_mm", |l| translation(sine(l, 2.0), 16, 0.0));
    assert_eq!(
        refusal(&translation(sine(900.0, 1e9), 16, 0.0)),
        Some((Code::ParameterLimit, "waves"))
    );
    let helix = |radius_mm, turn| CurveShape::Helix {
        radius_mm,
        turn: Angle::from_degrees(turn),
        rise_mm: 0.0,
    };
    each_bad_edge("radius_mm", |l| translation(helix(l, 90.0), 4, 0.0));
    assert_eq!(
        refusal(&translation(helix(300.0, 800.0), 4, 0.0)),
        Some((Code::ParameterLimit, "turn"))
    );
    assert_eq!(
        refusal(&translation(helix(300.0, 0.0), 4, 0.0)),
        Some((Code::ZeroVector, "shape"))
    );
    assert_eq!(
        refusal(&translation(arc(900.0, NAN), 4, 0.0)),
        Some((Code::NotFinite, "rise_mm"))
    );
    assert_eq!(
        refusal(&translation(arc(900.0, 100.0), 4, INF)),
        Some((Code::NotFinite, "azimuth"))
    );
    let nothing = CurveShape::Line {
        run_mm: 0.0,
        rise_mm: 0.0,
    };
    assert_eq!(
        refusal(&translation(nothing, 4, 0.0)),
        Some((Code::ZeroVector, "shape"))
    );
    let free = |points: &[Point]| translation(CurveShape::Free(points.to_vec()), 0, 0.0);
    let (a, b) = (Point::ORIGIN, Point::new(10.0, 0.0, 5.0));
    assert_eq!(refusal(&free(&[a, b])), None, "parts are not used by free points");
    assert_eq!(refusal(&free(&[a])), Some((Code::EmptyWord, "free")));
    assert_eq!(refusal(&free(&[a, b, b])), Some((Code::ZeroVector, "shape")));
    assert_eq!(
        refusal(&free(&[a, Point::new(NAN, 0.0, 0.0)])),
        Some((Code::NotFinite, "free"))
    );
}
