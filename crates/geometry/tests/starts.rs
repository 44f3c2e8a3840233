//! First words against published and derived figures. "theory N" is the section of the project's collected theory, with its sources.

#![expect(clippy::unwrap_used, reason = "a test that cannot go on fails")]

use std::f64::consts::{PI, TAU};

use zonewright_geometry::start::{
    AxisClass, ColumnForm, Curve, CurveShape, HelicalForm, LoopForm, OutsideRule, PolarBy, PolarForm, PolarPair,
    RibbonForm, RibbonFrom, Star, StarLength, StarLetter, StarPath, StarSolid, TranslationForm,
};
use zonewright_geometry::{Angle, Code, FirstWord, Place, Point, Role, Sign, Start, StartLetter, Vector};

fn close(found: f64, expected: f64, within: f64) {
    assert!((found - expected).abs() <= within, "found {found}, expected {expected}");
}

fn degrees(d: f64) -> Angle {
    Angle::from_degrees(d)
}

fn sum(word: &FirstWord) -> Vector {
    word.letters.iter().map(|letter| word.vector(letter)).sum()
}

/// Fills every open V of a closed word at once; enough for words without parallel neighbours.
fn lay(word: &mut FirstWord) {
    let n = word.letters.len();
    let open = |&k: &usize| word.letters[k].role == Role::Zig && word.letters[(k + 1) % n].role == Role::Zag;
    let zigs: Vec<usize> = (0..n).filter(open).collect();
    for k in zigs {
        if k + 1 == n {
            // The V is at the first node, which moves.
            word.origin += word.vector(&word.letters[0]) - word.vector(&word.letters[k]);
        }
        word.letters.swap(k, (k + 1) % n);
    }
}

fn polar(ribs: u32, pitch: f64, edge_mm: f64) -> PolarForm {
    let pitch = degrees(pitch);
    PolarForm {
        ribs,
        by: PolarBy::PitchEdge { pitch, edge_mm },
    }
}

fn column(ribs: u32, zag_run_mm: f64, zig_run_mm: f64, turn: i32) -> ColumnForm {
    ColumnForm {
        ribs,
        zag_run_mm,
        zig_run_mm,
        rise_mm: 70.0,
        turn,
    }
}

fn ribbon(ribs: u32, turn: f64, from: RibbonFrom) -> RibbonForm {
    RibbonForm {
        ribs,
        turn: degrees(turn),
        pitch: degrees(30.0),
        edge_mm: 200.0,
        from,
    }
}

fn curve(shape: CurveShape, parts: u32) -> Curve {
    let azimuth = Angle::default();
    Curve { shape, parts, azimuth }
}

fn line(run_mm: f64, rise_mm: f64, parts: u32) -> Curve {
    curve(CurveShape::Line { run_mm, rise_mm }, parts)
}

fn arc(span_mm: f64, rise_mm: f64, parts: u32) -> Vec<Vector> {
    curve(CurveShape::Arc { span_mm, rise_mm }, parts).edges().unwrap()
}

fn catenary(span_mm: f64, rise_mm: f64, parts: u32) -> Vec<Vector> {
    curve(CurveShape::Catenary { span_mm, rise_mm }, parts).edges().unwrap()
}

fn helical(ribs: u32, turn: u32) -> HelicalForm {
    HelicalForm {
        ribs,
        turn,
        pitch: degrees(30.0),
        edge_mm: 200.0,
    }
}

fn tube(moved: Vec<(u32, Vector)>) -> LoopForm {
    LoopForm {
        sides: 6,
        radius_mm: 500.0,
        rise_mm: 200.0,
        moved,
    }
}

fn translation() -> TranslationForm {
    TranslationForm {
        zig: line(900.0, 10.0, 4),
        zag: curve(
            CurveShape::Arc {
                span_mm: 900.0,
                rise_mm: 200.0,
            },
            5,
        ),
    }
}

fn one_of_each() -> Vec<Start> {
    let star = Star::Icosahedral(vec![AxisClass::FiveFold, AxisClass::ThreeFold]);
    let letter = |axis, sign, length| StarLetter { axis, sign, length };
    vec![
        Start::Polar(polar(9, 38.0, 300.0)),
        Start::Translation(translation()),
        Start::Ribbon(ribbon(9, 20.0, RibbonFrom::Across)),
        Start::Ribbon(ribbon(8, -20.0, RibbonFrom::Edge)),
        Start::StarPath(StarPath {
            star: star.clone(),
            unit_mm: 100.0,
            closed: true,
            letters: vec![
                letter(0, Sign::Minus, StarLength::Golden(1)),
                letter(9, Sign::Plus, StarLength::Mm(50.0)),
                letter(0, Sign::Plus, StarLength::Golden(1)),
                letter(9, Sign::Minus, StarLength::Mm(50.0)),
            ],
        }),
        Start::Loop(tube(vec![(3, Vector::new(1.0, 2.0, 3.0))])),
        Start::Column(column(12, 300.0, 100.0, -1)),
        Start::Helical(helical(9, 3)),
        Start::StarSolid(StarSolid { star, edge_mm: 100.0 }),
    ]
}

#[test]
fn words_hold_together_and_become_free_letters() {
    for start in one_of_each() {
        let word = start.first_word().unwrap();
        let kind = start.kind();
        for (k, letter) in word.letters.iter().enumerate() {
            assert_eq!(letter.index as usize, k, "{kind}: letters are counted along the word");
        }
        for (k, zone) in word.zones.iter().enumerate() {
            assert_eq!(zone.id as usize, k, "{kind}: zones are counted");
            let along = |l: &StartLetter| l.zone as usize == k && l.sign == Sign::Plus;
            assert!(word.letters.iter().any(along), "{kind}: zone {k} has a letter along it");
        }
        if word.closed {
            close(sum(&word).length(), 0.0, 1e-9);
        }
        let free = start.to_free().unwrap();
        free.check().unwrap();
        let again = free.first_word().unwrap();
        assert_eq!(again.nodes(), word.nodes(), "{kind}");
        assert_eq!(again.zones.len(), word.zones.len(), "{kind}");
        for (a, b) in again.letters.iter().zip(&word.letters) {
            assert_eq!((a.index, a.sign, a.role), (b.index, b.sign, b.role), "{kind}");
        }
        for ((_, id), zone) in word.free_zone_ids().into_iter().zip(&word.zones) {
            let found = again.zones.iter().find(|z| z.id == id).unwrap();
            assert_eq!(found.vector, zone.vector, "{kind}");
        }
    }
}

#[test]
fn outside_by_kind() {
    let rules: Vec<_> = one_of_each().iter().map(Start::outside_rule).collect();
    assert_eq!(rules[..5], [OutsideRule::Up; 5]);
    assert_eq!(rules[5..8], [OutsideRule::AwayFromAxis; 3]);
    assert_eq!(rules[8], OutsideRule::PositiveVolume);
}

/// theory 9, fixtures F1 and F2: ring radii, heights and plan boxes, made with another program.
#[test]
fn polar_fixtures() {
    let mut front = polar(9, 38.0, 300.0).first_word().unwrap();
    let nodes = front.nodes();
    for k in 0..9 {
        close(nodes[2 * k].0.truncate().length(), 236.403_226_1, 1e-6);
        close(nodes[2 * k].0.z, -184.698_442_6, 1e-6);
        close(nodes[2 * k + 1].0.length(), 0.0, 1e-9);
    }
    assert_eq!(nodes[0].0.y, 0.0, "rib 0 runs along x");
    assert!(
        nodes[0].0.x > 0.0 && nodes[2].0.y > 0.0,
        "ribs go round from x towards y"
    );
    assert_eq!((front.letters[0].role, front.letters[1].role), (Role::Zig, Role::Zag));
    assert!(front.grounded && front.closed);
    for (course, radius) in (2..).zip([444.292_734_2, 598.593_981_4, 680.695_960_2]) {
        lay(&mut front);
        let nodes = front.nodes();
        let widest = nodes.iter().map(|p| p.0.truncate().length()).fold(0.0, f64::max);
        let lowest = nodes.iter().map(|p| p.0.z).fold(0.0, f64::min);
        close(widest, radius, 1e-6);
        close(lowest, -184.698_442_6 * f64::from(course), 1e-6);
    }
    for (form, height, width) in [
        (polar(9, 38.0, 300.0), 1_662.285_983_4, 1_361.391_920_5),
        (polar(8, 45.0, 1000.0), 5_656.854_249_5, 3_414.213_562_4),
    ] {
        close(form.height_mm().unwrap(), height, 1e-6);
        close(form.width_mm().unwrap(), width, 1e-6);
    }
}

#[test]
fn polar_pairs_give_one_form() {
    for ribs in [3, 4, 5, 9, 12, 37] {
        for pitch in [0.5, 10.0, 35.264_389_682_8, 60.0, 89.0] {
            let form = polar(ribs, pitch, 300.0);
            let nodes = form.first_word().unwrap().nodes();
            for first in PolarPair::ALL {
                let one = form.by_pair(first).unwrap();
                assert_eq!(one.by.pair(), first);
                for second in PolarPair::ALL {
                    let other = one.by_pair(second).unwrap();
                    let (found, edge) = other.pitch_and_edge().unwrap();
                    close(found.degrees(), pitch, 1e-7);
                    close(edge, 300.0, 1e-6);
                    for (a, b) in nodes.iter().zip(other.first_word().unwrap().nodes()) {
                        close(a.distance(b), 0.0, 1e-6);
                    }
                }
            }
        }
    }
}

/// 5 edges of 100 are 500 high when upright; 4 ribs of 100 laid flat are 200 wide.
#[test]
fn polar_pairs_that_cannot_go_together() {
    let high = |height_mm| PolarForm {
        ribs: 5,
        by: PolarBy::EdgeHeight {
            edge_mm: 100.0,
            height_mm,
        },
    };
    let wide = |width_mm| PolarForm {
        ribs: 4,
        by: PolarBy::EdgeWidth {
            edge_mm: 100.0,
            width_mm,
        },
    };
    for (form, name, limit) in [
        (high(500.0), "height_mm", 500.0),
        (wide(200.0), "width_mm", 200.0),
        (high(501.0), "height_mm", 500.0),
    ] {
        let finding = form.first_word().unwrap_err();
        assert_eq!(
            (finding.code, finding.place),
            (Code::ParameterLimit, Place::Parameter(name))
        );
        close(finding.limit.unwrap(), limit, 1e-9);
    }
    assert!(high(499.0).first_word().is_ok());
    assert!(wide(199.0).first_word().is_ok());
}

/// theory 5, fixture HP: f = 20, t = 30, L = 0.2 m.
#[test]
fn ribbon_points_are_sums_on_a_helicoid() {
    let word = ribbon(14, 20.0, RibbonFrom::Edge).first_word().unwrap();
    let p = |i: usize| word.zones[..i].iter().map(|z| z.vector).sum::<Vector>();
    let s = |i, j| p(i) + p(j);
    for ((i, j), expected) in [
        ((0, 9), Vector::new(173.205_080_8, 982.294_825_6, 900.0)),
        ((6, 13), Vector::new(173.205_080_8, 1_323.442_238_3, 1900.0)),
    ] {
        close(s(i, j).distance(expected), 0.0, 1e-6);
    }
    // Along the edge: S(k, k), S(k, k + 1), S(k + 1, k + 1) ...
    for (k, node) in word.nodes().into_iter().enumerate() {
        close(node.0.distance(s(k / 2, k.div_ceil(2))), 0.0, 1e-9);
    }
    assert_eq!((word.letters[0].role, word.letters[1].role), (Role::Zag, Role::Zig));
    // Across: S(m, m), S(m, m + 1), S(m - 1, m + 1) ...
    let across = ribbon(14, 20.0, RibbonFrom::Across).first_word().unwrap();
    for (k, node) in across.nodes().into_iter().enumerate() {
        close(node.0.distance(s(7 - k / 2, 7 + k.div_ceil(2)) - s(7, 7)), 0.0, 1e-9);
    }
    assert_eq!((across.letters[0].role, across.letters[1].role), (Role::Zag, Role::Zig));
}

/// The design plan: the radius swings between |r(a) - r(b)| and r(a) + r(b), r(x) = x / (2 sin(pi / n)); the way between is derived.
#[test]
fn column_radii() {
    let (n, a, b) = (12, 300.0, 110.0);
    let mut word = column(n, a, b, 1).first_word().unwrap();
    let r = |x: f64| x / (2.0 * (PI / f64::from(n)).sin());
    for course in 0..2 * n {
        let nodes = word.nodes();
        for (k, node) in (0..2 * n).zip(&nodes) {
            // The lower nodes stand at |a w^course - b|, the upper ones a course further on.
            let c = f64::from(course + u32::from((k + course) % 2 == 0));
            let swing = 2.0 * r(a) * r(b) * (TAU * c / f64::from(n)).cos();
            close(
                node.0.truncate().length(),
                (r(a).powi(2) + r(b).powi(2) - swing).sqrt(),
                1e-9,
            );
            close(node.0.z, 70.0 * c, 1e-9);
        }
        let radii = nodes.iter().map(|p| p.0.truncate().length());
        if course == n / 2 {
            close(radii.clone().fold(0.0, f64::max), r(a) + r(b), 1e-9);
        }
        if course % n == 0 {
            close(radii.fold(f64::MAX, f64::min), r(a) - r(b), 1e-9);
        }
        lay(&mut word);
    }
}

#[test]
fn columns_stand_round_the_axis_and_close() {
    for n in [3, 5, 8, 13] {
        for turn in [-7, -2, -1, 1, 2, 4, 17] {
            let word = column(n, 200.0, 90.0, turn).first_word().unwrap();
            close(sum(&word).length(), 0.0, 1e-9);
            let centre: Vector = word.nodes().iter().skip(1).map(|p| p.0).sum();
            close(centre.truncate().length(), 0.0, 1e-8);
        }
    }
    for turn in [0, 5, -10] {
        let finding = column(5, 200.0, 90.0, turn).first_word().unwrap_err();
        assert_eq!(
            (finding.code, finding.place),
            (Code::ParameterLimit, Place::Parameter("turn"))
        );
    }
}

#[test]
fn helical_ribs_lead_to_the_upper_pole() {
    let word = helical(9, 3).first_word().unwrap();
    close(word.nodes()[9].distance(Point::new(0.0, 0.0, 900.0)), 0.0, 1e-9);
    let zigs = word.letters.iter().filter(|l| l.role == Role::Zig).count();
    assert_eq!((zigs, word.letters[2].role), (3, Role::Zig));
    assert!(helical(9, 0).first_word().is_err());
    assert!(helical(9, 9).first_word().is_err());
}

#[test]
fn loops_zigzag_between_two_rings() {
    let nodes = tube(vec![(5, Vector::new(0.0, 0.0, -30.0))])
        .first_word()
        .unwrap()
        .nodes();
    for (k, z) in [200.0, 0.0, 200.0, 0.0, 200.0, -30.0, 200.0, 0.0, 200.0, 0.0, 200.0, 0.0]
        .into_iter()
        .enumerate()
    {
        let azimuth = TAU * k as f64 / 12.0;
        let expected = Point::new(500.0 * azimuth.cos(), 500.0 * azimuth.sin(), z);
        close(nodes[k].distance(expected), 0.0, 1e-9);
    }
    close(nodes[12].distance(nodes[0]), 0.0, 1e-9);
    let lost = tube(vec![(12, Vector::X)]).first_word().unwrap_err();
    assert_eq!(lost.place, Place::Parameter("moved"));
}

fn total(edges: &[Vector]) -> Vector {
    edges.iter().sum()
}

/// The nodes of an arc lie on the circle of radius (s s / 4 + h h) / 2 h (elementary).
#[test]
fn arcs_lie_on_their_circle() {
    for (span, rise) in [
        (1000.0, 100.0),
        (1000.0, 500.0),
        (1000.0, 2400.0),
        (1000.0, -300.0),
        (1000.0, -1500.0),
        (10.0, 1e6),
        (1000.0, 1e-5),
    ] {
        let edges = arc(span, rise, 8);
        let within = 1e-9 * (span + f64::abs(rise));
        close(total(&edges).distance(Vector::new(span, 0.0, 0.0)), 0.0, within);
        close(
            total(&edges[..4]).distance(Vector::new(span / 2.0, 0.0, rise)),
            0.0,
            within,
        );
        let radius = (span * span / 4.0 + rise * rise) / (2.0 * rise);
        let centre = Vector::new(span / 2.0, 0.0, rise - radius);
        for k in 0..8 {
            close(total(&edges[..k]).distance(centre), radius.abs(), 1e-9 * radius.abs());
            close(edges[k].length(), edges[0].length(), 1e-9 * edges[0].length());
        }
    }
    assert_eq!(arc(900.0, 0.0, 3), [Vector::new(300.0, 0.0, 0.0); 3]);
}

/// A catenary of parameter a over a span s rises a (cosh(s / 2 a) - 1) and is 2 a sinh(s / 2 a) long (elementary).
#[test]
fn catenaries_have_their_closed_forms() {
    let span = 1000.0;
    for a in [500.0, 100.0, 60.0, 1e6, 3000.0] {
        let u = span / (2.0 * a);
        let rise = 2.0 * a * f64::sinh(u / 2.0).powi(2);
        let edges = catenary(span, -rise, 2000);
        let scale = span + rise;
        close(total(&edges).distance(Vector::new(span, 0.0, 0.0)), 0.0, 1e-9 * scale);
        close(
            total(&edges[..1000]).distance(Vector::new(span / 2.0, 0.0, -rise)),
            0.0,
            1e-9 * scale,
        );
        let mut at = Vector::ZERO;
        for edge in &edges {
            at += *edge;
            close(at.z, a * (((at.x - span / 2.0) / a).cosh() - u.cosh()), 1e-7 * scale);
        }
        // Equal parts of the length 2 a sinh u; a chord of part p is shorter by p^3 / 24 a^2 at most (curvature at most 1 / a).
        let part = 2.0 * a * u.sinh() / 2000.0;
        for edge in &edges {
            assert!(edge.length() <= part * (1.0 + 1e-9), "a = {a}");
            assert!(
                edge.length() >= part * (1.0 - 1e-9) - part.powi(3) / (24.0 * a * a),
                "a = {a}"
            );
        }
    }
    assert!(catenary(1e-3, 1e7, 4).iter().all(|e| e.is_finite()));
    close(
        catenary(900.0, 0.0, 3)[1].distance(Vector::new(300.0, 0.0, 0.0)),
        0.0,
        1e-9,
    );
}

/// theory 5: equal steps on a cone lie on a helix of radius run / (2 sin(f / 2)).
#[test]
fn helix_and_sine_points() {
    let helix = CurveShape::Helix {
        radius_mm: 400.0,
        turn: degrees(180.0),
        rise_mm: 900.0,
    };
    let edges = curve(helix, 6).edges().unwrap();
    assert_eq!(edges[0].y, 0.0);
    // Half round a circle of radius 400: the way across is its diameter.
    close(total(&edges).truncate().length(), 800.0, 1e-9);
    close(total(&edges).z, 900.0, 1e-9);
    close(
        edges[2].truncate().length() / (2.0 * 15.0_f64.to_radians().sin()),
        400.0,
        1e-9,
    );
    let sine = CurveShape::Sine {
        length_mm: 800.0,
        amplitude_mm: 50.0,
        waves: 2.0,
    };
    let edges = curve(sine, 8).edges().unwrap();
    for (k, z) in [0.0, 50.0, 0.0, -50.0, 0.0, 50.0, 0.0, -50.0, 0.0]
        .into_iter()
        .enumerate()
    {
        close(
            total(&edges[..k]).distance(Vector::new(100.0 * k as f64, 0.0, z)),
            0.0,
            1e-9,
        );
    }
    let turned = Curve {
        azimuth: degrees(90.0),
        ..line(900.0, 30.0, 3)
    };
    assert_eq!(turned.edges().unwrap(), [Vector::new(0.0, 300.0, 10.0); 3]);
}

#[test]
fn translation_zones_are_shared_on_lines_only() {
    let word = translation().first_word().unwrap();
    let zones: Vec<_> = word.letters.iter().map(|l| l.zone).collect();
    assert_eq!(zones, [0, 0, 0, 0, 1, 2, 3, 4, 5]);
    let zigs = word.letters.iter().take_while(|l| l.role == Role::Zig).count();
    assert_eq!((zigs, word.letters[8].role), (4, Role::Zag));
    close(word.nodes()[9].distance(Point::new(1800.0, 0.0, 10.0)), 0.0, 1e-9);
}
