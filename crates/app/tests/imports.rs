//! Imported paths: planted coordinates come out, and bad files are refused without a panic.

#![expect(clippy::unwrap_used, reason = "a test may stop where it stands")]

use std::{fs, path::PathBuf};

use proptest::prelude::*;
use zonewright::{
    document::Drawn,
    import::{ImportedPath, import, import_backdrop},
};
use zonewright_geometry::Point;

fn file(name: &str, content: impl AsRef<[u8]>) -> (tempfile::TempDir, PathBuf) {
    let folder = tempfile::tempdir().unwrap();
    let path = folder.path().join(name);
    fs::write(&path, content).unwrap();
    (folder, path)
}

fn read(name: &str, content: impl AsRef<[u8]>, tolerance: f64) -> ImportedPath {
    let (_folder, path) = file(name, content);
    import(&path, tolerance).unwrap_or_else(|error| panic!("{error}"))
}

fn refused(name: &str, content: impl AsRef<[u8]>) -> String {
    let (_folder, path) = file(name, content);
    import(&path, 0.1).unwrap_err().to_string()
}

fn assert_points(found: &[Point], expected: &[[f64; 3]], within: f64) {
    assert_eq!(found.len(), expected.len(), "{found:?}");
    for (f, e) in found.iter().zip(expected) {
        let e = Point::new(e[0], e[1], e[2]);
        assert!(f.distance(e) <= within, "{f:?} {e:?}");
    }
}

#[test]
fn csv_with_and_without_a_header() {
    let expected = [[0.0, 0.0, 0.0], [300.0, 0.0, 200.0], [600.0, -1.5, 0.0]];
    assert_points(
        &read("a.csv", "0,0,0\n300,0,200\n600,-1.5,0\n", 0.1).points,
        &expected,
        0.0,
    );
    assert_points(
        &read("a.csv", "\u{feff}x,y,z\r\n0,0,0\r\n300,0,200\r\n600,-1.5,0\r\n", 0.1).points,
        &expected,
        0.0,
    );
    // Columns are found by name, each with its unit; 1 in = 25.4 mm by definition.
    let mixed = read("a.csv", "# path\nname;z_cm;x [m];y (in)\na;0;0;0\nb;20;0.3;1\n", 0.1);
    assert_points(&mixed.points, &[[0.0; 3], [300.0, 25.4, 200.0]], 1e-12);
    assert_points(
        &read("a.csv", "0,0\n\n1,2\n", 0.1).points,
        &[[0.0; 3], [1.0, 2.0, 0.0]],
        0.0,
    );
}

#[test]
fn a_path_that_comes_back_to_its_beginning_is_closed() {
    let path = read("a.csv", "0,0\n1,0\n1,1\n0,0\n", 0.1);
    assert!(path.closed && path.points.len() == 3);
}

#[test]
fn bad_csv_is_refused_with_its_line() {
    assert!(refused("a.csv", "x,y\n0,0\n1,b\n").contains("line 3: `b` is no number for y"));
    assert!(refused("a.csv", "0,0\nnan,1\n").contains("line 2"));
    assert!(refused("a.csv", "0,0\n1\n").contains("line 2"));
    assert!(refused("a.csv", "a,b\n0,0\n").contains("line 1"));
    assert!(refused("a.csv", "x_furlong,y\n0,0\n").contains("`furlong`"));
    assert!(refused("a.csv", "").contains("fewer than two"));
    assert!(refused("a.csv", "1,1\n1,1\n").contains("fewer than two"));
    assert!(refused("a.csv", [0xff, 0xfe, 0x31]).contains("UTF-8"));
    assert!(refused("a.obj", "").contains(".csv, .dxf or .svg"));
}

/// A drawing in R12 text: header units and entities, written as group code and value by turns.
fn dxf(units: u32, entities: &str) -> String {
    let head = format!("0 SECTION 2 HEADER 9 $ACADVER 1 AC1015 9 $INSUNITS 70 {units} 0 ENDSEC");
    let all = format!("{head} 0 SECTION 2 ENTITIES {entities} 0 ENDSEC 0 EOF");
    all.split_whitespace().map(|word| format!("{word}\n")).collect()
}

#[test]
fn dxf_lines_chain_whichever_way_they_run() {
    let lines = "0 LINE 8 0 10 2 20 0 30 0 11 1 21 1 31 5 \
                 0 LINE 8 0 10 0 20 0 30 0 11 1 21 1 31 5 \
                 0 LINE 8 0 10 3 20 1 30 0 11 2 21 0 31 0";
    let path = read("a.dxf", dxf(4, lines), 0.1);
    // From the first line on at its end, then back from its beginning.
    assert_points(
        &path.points,
        &[[3.0, 1.0, 0.0], [2.0, 0.0, 0.0], [1.0, 1.0, 5.0], [0.0; 3]],
        1e-12,
    );
    assert!(!path.closed);
    // In metres.
    let metres = read("a.dxf", dxf(6, "0 LINE 8 0 10 0 20 0 30 0 11 1 21 2 31 3"), 0.1);
    assert_points(&metres.points, &[[0.0; 3], [1000.0, 2000.0, 3000.0]], 1e-9);
}

#[test]
fn a_bulge_is_the_tangent_of_a_quarter_of_the_angle() {
    // Bulge 1: a half circle, counter-clockwise, over the chord from (0, 0) to (200, 0); it dips below the chord.
    let text = dxf(4, "0 LWPOLYLINE 8 0 90 2 70 0 38 7 10 0 20 0 42 1 10 200 20 0");
    for tolerance in [5.0, 0.1, 0.001] {
        let path = read("a.dxf", &text, tolerance);
        let n = path.points.len() - 1;
        for (k, p) in path.points.iter().enumerate() {
            let turn = std::f64::consts::PI * k as f64 / n as f64;
            let on = Point::new(100.0 - 100.0 * turn.cos(), -100.0 * turn.sin(), 7.0);
            assert!(p.distance(on) < 1e-9, "{p:?} {on:?}");
        }
        // The chords' sagitta keeps the tolerance, and one chord less would not.
        let sagitta = |n: usize| 100.0 * (1.0 - (std::f64::consts::PI / (2.0 * n as f64)).cos());
        assert!(
            sagitta(n) <= tolerance * (1.0 + 1e-9) && sagitta(n - 1) > tolerance,
            "{n}"
        );
    }
    // tan(22.5 deg) is a quarter turn; negative runs clockwise, above the chord; the centre is (100, -100), the radius 100 sqrt 2.
    let bulge = -(std::f64::consts::PI / 8.0).tan();
    let path = read(
        "a.dxf",
        dxf(
            4,
            &format!(
                "0 POLYLINE 8 0 66 1 70 0 0 VERTEX 8 0 10 0 20 0 30 0 42 {bulge} 0 VERTEX 8 0 10 200 20 0 30 0 0 SEQEND"
            ),
        ),
        0.01,
    );
    let centre = Point::new(100.0, -100.0, 0.0);
    assert!(path.points.len() > 5);
    for p in &path.points {
        assert!(
            (p.distance(centre) - 100.0 * 2.0_f64.sqrt()).abs() < 1e-9 && p.0.y >= -1e-9,
            "{p:?}"
        );
    }
}

#[test]
fn closed_and_mirrored_polylines() {
    let text = dxf(
        4,
        "0 LWPOLYLINE 8 0 90 3 70 1 210 0 220 0 230 -1 10 1 20 0 10 5 20 0 10 5 20 2",
    );
    let path = read("a.dxf", text, 0.1);
    assert!(path.closed);
    // By the arbitrary axis rule a normal of -z gives x = (-1, 0, 0), y = (0, 1, 0).
    assert_points(
        &path.points,
        &[[-1.0, 0.0, 0.0], [-5.0, 0.0, 0.0], [-5.0, 2.0, 0.0]],
        1e-12,
    );
}

#[test]
fn drawings_that_are_no_path_are_refused() {
    let line = "0 LINE 8 0 10 0 20 0 30 0 11 1 21 1 31 5";
    let apart = "0 LINE 8 0 10 9 20 9 30 9 11 8 21 8 31 8";
    let branch = "0 LINE 8 0 10 1 20 1 30 5 11 8 21 8 31 8 0 LINE 8 0 10 1 20 1 30 5 11 7 21 8 31 8";
    assert!(refused("a.dxf", dxf(4, "")).contains("holds no LINE"));
    assert!(refused("a.dxf", dxf(4, &format!("{line} {apart}"))).contains("do not touch"));
    assert!(refused("a.dxf", dxf(4, &format!("{line} {branch}"))).contains("branches at (1, 1, 5) mm"));
    assert!(refused("a.dxf", dxf(4, "0 ARC 8 0 10 0 20 0 30 0 40 5 50 0 51 90")).contains("ARC"));
    assert!(refused("a.dxf", dxf(18, line)).contains("unit"));
    assert!(
        refused(
            "a.dxf",
            dxf(4, "0 LWPOLYLINE 8 0 90 2 70 0 10 0 20 0 42 1e300 10 1e300 20 0")
        )
        .contains("cannot import")
    );
    for junk in [
        "",
        "0",
        "hello",
        "0\nSECTION\n2\nENTITIES\n0\nLINE\n10\nx\n",
        "\u{0}\u{1}\u{2}",
    ] {
        assert!(refused("a.dxf", junk).contains("cannot import"), "{junk}");
    }
}

#[test]
fn svg_units_transforms_and_the_page_turned_up() {
    // 100 mm a page, ten units: a unit is 10 mm. Turned a quarter about the origin, (x, y) goes to (-y, x); then moved.
    let svg = r#"<svg xmlns="http://www.w3.org/2000/svg" width="100mm" height="100mm" viewBox="0 0 10 10">
        <g transform="translate(5 1)"><path transform="rotate(90)" fill="none" d="M0 0 L 3 0 l 0 2"/></g></svg>"#;
    let path = read("a.svg", svg, 0.1);
    assert_points(
        &path.points,
        &[[50.0, 90.0, 0.0], [50.0, 60.0, 0.0], [30.0, 60.0, 0.0]],
        1e-3,
    );
    // Without units a pixel is 1/96 inch.
    let svg = r#"<svg xmlns="http://www.w3.org/2000/svg" width="96" height="96"><polyline points="0,96 96,0"/></svg>"#;
    assert_points(&read("a.svg", svg, 0.1).points, &[[0.0; 3], [25.4, 25.4, 0.0]], 1e-3);
}

#[test]
fn svg_curves_stay_within_the_tolerance() {
    let svg = r#"<svg xmlns="http://www.w3.org/2000/svg" width="200mm" height="200mm" viewBox="0 0 200 200">
        <circle cx="100" cy="100" r="80"/></svg>"#;
    let path = read("a.svg", svg, 0.05);
    assert!(path.closed && path.points.len() > 20);
    let centre = Point::new(100.0, 100.0, 0.0);
    let ends = path.points.iter().skip(1).chain(&path.points[..1]);
    for (p, q) in path.points.iter().zip(ends) {
        let middle = Point((p.0 + q.0) / 2.0);
        // Four cubics stand for a circle to 0.03 % of its radius (known, from the usual constant 0.5523).
        assert!((p.distance(centre) - 80.0).abs() < 0.03, "{p:?}");
        assert!(middle.distance(centre) > 80.0 - 0.05 - 0.03, "{middle:?}");
    }
    let coarse = read("a.svg", svg, 2.0);
    assert!(coarse.points.len() < path.points.len());
}

#[test]
fn svg_pieces_chain_and_several_paths_are_refused() {
    let page = |inner: &str| {
        format!(
            r#"<svg xmlns="http://www.w3.org/2000/svg" width="10mm" height="10mm" viewBox="0 0 10 10">{inner}</svg>"#
        )
    };
    let two = page(r#"<path d="M0 0 L 1 0 M 1 0 L 2 2"/><line x1="2" y1="2" x2="3" y2="0"/>"#);
    assert_eq!(read("a.svg", two, 0.1).points.len(), 4);
    assert!(refused("a.svg", page(r#"<circle r="2"/><circle r="3"/>"#)).contains("2 separate closed paths"));
    assert!(refused("a.svg", page("")).contains("holds no path"));
    assert!(refused("a.svg", page(r#"<path d="M0 0 L 1e30 0"/>"#)).contains("cannot import"));
    assert!(refused("a.svg", "<svg").contains("it is no SVG"));
    assert!(refused("a.svg", "").contains("it is no SVG"));
}

#[test]
fn a_tolerance_that_cannot_be_used_is_refused() {
    let (_folder, path) = file("a.csv", "0,0\n1,1\n");
    for tolerance in [0.0, -1.0, f64::NAN, f64::INFINITY] {
        assert!(import(&path, tolerance).is_err());
    }
}

fn drawn(name: &str, content: impl AsRef<[u8]>) -> Drawn {
    let (_folder, path) = file(name, content);
    import_backdrop(&path, 0.1).unwrap_or_else(|error| panic!("{error}"))
}

fn no_backdrop(name: &str, content: impl AsRef<[u8]>) -> String {
    let (_folder, path) = file(name, content);
    import_backdrop(&path, 0.1).unwrap_err().to_string()
}

#[test]
fn obj_keeps_every_digit_polygons_and_lines() {
    let text = "mtllib none.mtl\no roof\nv 0.1 0 0\nv 1000.000000001 0 0 0.5 0.5 0.5\nv 1 2 \\\n0\nv 0 1 0\nvn 0 0 1\n\
        usemtl red\nf 1//1 2//1 3//1 4//1 # a quad\nf -4 -3 -2\nl 1 2 3 4\n";
    let found = drawn("a.OBJ", text);
    // A quad is two triangles; the relative face names the points 1, 2, 3.
    assert_eq!(found.triangles, [[0, 1, 2], [0, 2, 3], [0, 1, 2]]);
    assert_eq!(found.lines, [[0, 1, 2, 3]]);
    assert_points(
        &found.points,
        &[
            [0.1, 0.0, 0.0],
            [1000.000000001, 0.0, 0.0],
            [1.0, 2.0, 0.0],
            [0.0, 1.0, 0.0],
        ],
        0.0,
    );
}

const STL: &str = "solid two\nfacet normal 0 0 1\nouter loop\nvertex 0 0 0\nvertex 2 0 0\nvertex 0 2 0\nendloop\nendfacet\n\
    facet normal 0 0 1\nouter loop\nvertex 2 0 0\nvertex 2 2 0\nvertex 0 2 0\nendloop\nendfacet\nendsolid two\n";

/// The same two triangles in binary, under a header that begins like a text.
fn binary_stl() -> Vec<u8> {
    let mut bytes = b"solid but binary".to_vec();
    bytes.resize(80, b' ');
    bytes.extend(2_u32.to_le_bytes());
    for corners in [
        [[0.0_f32, 0.0], [2.0, 0.0], [0.0, 2.0]],
        [[2.0, 0.0], [2.0, 2.0], [0.0, 2.0]],
    ] {
        bytes.extend([0.0_f32, 0.0, 1.0].iter().flat_map(|c| c.to_le_bytes()));
        for [x, y] in corners {
            bytes.extend([x, y, 0.0].iter().flat_map(|c| c.to_le_bytes()));
        }
        bytes.extend([0, 0]);
    }
    bytes
}

#[test]
fn stl_in_text_and_binary_is_the_same_and_its_corners_are_joined() {
    let text = drawn("a.stl", STL);
    assert_eq!(text, drawn("b.stl", binary_stl()));
    assert_eq!((text.points.len(), text.triangles.len()), (4, 2));
}

#[test]
fn lines_become_backdrops_whether_they_join_or_not() {
    let joined = drawn("a.csv", "x_m,y_m,z_m\n0,0,0\n1,0,2\n2,0,0\n");
    assert_eq!(joined.lines, [[0, 1, 2]]);
    assert!(joined.points[1].distance(Point::new(1000.0, 0.0, 2000.0)) < 1e-9);
    let apart = r#"<svg xmlns="http://www.w3.org/2000/svg" width="100mm" height="100mm" viewBox="0 0 100 100">
        <path d="M0 0 H50"/><path d="M0 20 H50 V60"/></svg>"#;
    assert_eq!(drawn("a.svg", apart).lines, [vec![0, 1], vec![2, 3, 4]]);
    assert!(refused("a.svg", apart).contains("do not touch"), "still no path");
    let lines = dxf(4, "0\nLINE\n8\n0\n10\n0\n20\n0\n30\n0\n11\n5\n21\n0\n31\n0\n");
    assert_eq!(drawn("a.dxf", lines).lines, [[0, 1]]);
}

#[test]
fn files_that_are_no_backdrop_say_why() {
    for (name, content, why) in [
        ("a.obj", "v 0 0 0\nf 1 2 3\n".to_owned(), "no OBJ"),
        ("a.obj", "v 0 0\n".to_owned(), "no OBJ"),
        ("a.obj", "v 0 0 0\nv 1 0 0\n".to_owned(), "no triangle and no line"),
        ("a.obj", "v 0 0 0\nv 1e12 0 0\nv 0 1 0\nf 1 2 3\n".to_owned(), "10 km"),
        (
            "a.obj",
            "v 0 0 0\nv nan 0 0\nv 0 1 0\nf 1 2 3\n".to_owned(),
            "not finite",
        ),
        ("a.stl", "solid\nfacet".to_owned(), "no STL"),
        ("a.csv", "0,0\n".to_owned(), "no triangle and no line"),
        ("a.ply", String::new(), "must end in .obj"),
    ] {
        let said = no_backdrop(name, &content);
        assert!(said.contains(why), "{content}: {said}");
    }
    let cut = &binary_stl()[..150];
    assert!(no_backdrop("a.stl", cut).contains("no STL"));
    // One triangle more than are kept.
    let most = zonewright::document::MAX_BACKDROP_PARTS;
    let text = format!("v 0 0 0\nv 1 0 0\nv 0 1 0\n{}", "f 1 2 3\n".repeat(most + 1));
    assert!(no_backdrop("a.obj", text).contains(&format!("{most} triangles")));
}

proptest! {
    /// Any spoilt mesh is read or refused, never more.
    #[test]
    fn spoilt_meshes_never_panic(at in any::<prop::sample::Index>(), by in "[ -~\n]{0,6}", cut in 0_usize..4, kind in 0..3) {
        let obj = "v 0.1 0 0\nv 1 0 0\nv 1 2 0\nv 0 1 0\nf 1//1 2/3 3 4\nf -4 -3 -2\nl 1 2 3 4\n";
        let (name, mut bytes) = match kind {
            0 => ("a.obj", obj.as_bytes().to_vec()),
            1 => ("a.stl", STL.as_bytes().to_vec()),
            _ => ("b.stl", binary_stl()),
        };
        let at = at.index(bytes.len());
        let end = bytes.len().min(at + cut);
        bytes.splice(at..end, by.bytes());
        let (_folder, path) = file(name, bytes);
        let _ = import_backdrop(&path, 0.1);
    }
}

proptest! {
    #![proptest_config(ProptestConfig::with_cases(150))]

    #[test]
    fn spoilt_files_never_panic(at in any::<prop::sample::Index>(), by in "[ -~\n]{0,6}", cut in 0_usize..4) {
        let line = "0 LWPOLYLINE 8 0 90 2 70 1 10 0 20 0 42 1 10 200 20 0 0 POLYLINE 8 0 66 1 70 0 0 VERTEX 8 0 10 0 20 0 30 0 0 SEQEND";
        let svg = r#"<svg xmlns="http://www.w3.org/2000/svg" width="9mm" viewBox="0 0 9 9"><path transform="rotate(9)" d="M0 0 C 1 2 3 4 5 6 Q 1 2 3 4 A 1 2 3 0 1 5 5 Z"/></svg>"#;
        for (name, text) in [("a.dxf", dxf(4, line)), ("a.svg", svg.to_owned()), ("a.csv", "x,y,z\n0,0,0\n\"1\",2,3\n".to_owned())] {
            let mut chars: Vec<char> = text.chars().collect();
            let at = at.index(chars.len());
            chars.splice(at..(at + cut).min(chars.len()), by.chars());
            let (_folder, path) = file(name, chars.into_iter().collect::<String>());
            let _ = import(&path, 0.1);
        }
    }
}
