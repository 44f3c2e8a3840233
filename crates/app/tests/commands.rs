//! What the commands make and print, through the real program.

#![expect(clippy::unwrap_used, reason = "a test may stop where it stands")]

mod animating;
mod designs;
mod program;
mod solving;

use std::{collections::BTreeSet, fs};

use program::{done, errors, printed, run, status, zonewright};
use serde_json::Value;

const STARTS: [&[&str]; 14] = [
    &[
        "polar",
        "--ribs",
        "9",
        "--pitch",
        "40",
        "--edge",
        "600",
        "--courses",
        "3",
    ],
    &["polar", "--ribs", "9", "--width", "6m", "--height", "13ft"],
    &[
        "helical", "--ribs", "6", "--turn", "2", "--pitch", "40", "--edge", "11 3/4in",
    ],
    &["star-solid", "--star", "6", "--edge", "500"],
    &["star-solid", "--star", "c3+4", "--edge", "500"],
    &["star-solid", "--star", "p5", "--edge", "0.5m"],
    &[
        "star-path",
        "--star",
        "6",
        "--letters",
        "+0 +1^1 -2 +3=250mm",
        "--unit",
        "300",
    ],
    &["zigzag", "--points", "0,0,0 300,0,200 600,100,0 900,0,200mm"],
    &[
        "zigzag",
        "--points",
        "-10,0,0; 300,0,11 3/4in; 600,100,0",
        "--closed",
        "--courses",
        "1",
    ],
    &[
        "translation",
        "--zig",
        "arc span=3000 rise=600 parts=8",
        "--zag",
        "line run=2m rise=0 parts=4 azimuth=90",
    ],
    &[
        "loop",
        "--sides",
        "8",
        "--radius",
        "900",
        "--rise",
        "500",
        "--courses",
        "3",
        "--move",
        "3:0,0,50",
    ],
    &[
        "ribbon",
        "--ribs",
        "12",
        "--turn",
        "20",
        "--pitch",
        "30",
        "--edge",
        "500",
        "--courses",
        "2",
    ],
    &[
        "ribbon", "--ribs", "12", "--turn", "20", "--pitch", "30", "--edge", "500", "--from", "across",
    ],
    &[
        "column",
        "--ribs",
        "12",
        "--zag-run",
        "300",
        "--zig-run",
        "120",
        "--rise",
        "250",
        "--turn",
        "-1",
        "--courses",
        "4",
    ],
];

#[test]
fn every_kind_starts_reports_checks_and_draws() {
    let folder = tempfile::tempdir().unwrap();
    for start in STARTS {
        let mut words = vec!["start"];
        words.extend(start);
        words.extend(["-o", "d.ron", "--force"]);
        let output = zonewright(folder.path(), &words);
        assert_eq!(status(&output), 0, "{start:?}: {}", errors(&output));
        assert!(printed(&output).is_empty());
        let report: Value = serde_json::from_str(&done(folder.path(), "report d.ron --json")).unwrap();
        assert_eq!(report["kind"], start[0]);
        assert_eq!(report["name"], "d");
        assert!(report["panels"].as_u64().unwrap() > 0, "{start:?}");
        let check = run(folder.path(), "check d.ron --json");
        assert!(status(&check) < 2);
        assert!(serde_json::from_str::<Value>(&printed(&check)).unwrap().is_array());
        assert!(done(folder.path(), "report d.ron").contains("Panels"));
    }
}

#[test]
fn the_report_has_every_key_of_the_contract() {
    let folder = tempfile::tempdir().unwrap();
    fs::write(folder.path().join("p.ron"), designs::POLAR).unwrap();
    let report: Value = serde_json::from_str(&done(folder.path(), "report p.ron --json")).unwrap();
    let keys = |value: &Value| value.as_object().unwrap().keys().cloned().collect::<BTreeSet<_>>();
    let has = |value: &Value, names: &str| {
        let found = keys(value);
        for name in names.split_whitespace() {
            assert!(found.contains(name), "{name} in {found:?}");
        }
    };
    has(
        &report,
        "name kind panels vertices edges open_edges rims euler zones families distinct_bevels butted_seams doubled pinches \
         crossings area_m2 volume_m3 size_mm closing_gap_mm courses panel_list",
    );
    for integer in "panels vertices edges open_edges rims euler zones families distinct_bevels butted_seams doubled pinches crossings"
        .split_whitespace()
    {
        assert!(report[integer].is_i64(), "{integer}");
    }
    has(&report["courses"][0], "course panels");
    let panel = &report["panel_list"][0];
    has(
        panel,
        "mark part_mark zones family hand course corners_mm sides_mm acute_deg area_m2 edges",
    );
    has(
        &panel["edges"][0],
        "length_mm mate mate_edge mates dihedral_deg bevel_deg kind",
    );
    let mate = report["panel_list"]
        .as_array()
        .unwrap()
        .iter()
        .flat_map(|p| p["edges"].as_array().unwrap());
    let mate = mate.flat_map(|e| e["mates"].as_array().unwrap()).next().unwrap();
    has(mate, "mark edge from_mm to_mm dihedral_deg");
}

/// Nine ribs and three courses: 27 panels. Counted by hand: the crown, 9 vertices a ring and four rings less none: a course of n
/// panels adds n vertices and 2 n edges to the n + 1 vertices and n edges of the ribs.
#[test]
fn a_polar_form_of_three_courses() {
    let folder = tempfile::tempdir().unwrap();
    fs::write(folder.path().join("p.ron"), designs::POLAR).unwrap();
    let report: Value = serde_json::from_str(&done(folder.path(), "report p.ron --json")).unwrap();
    assert_eq!(report["panels"], 27);
    assert_eq!(report["vertices"], 9 + 1 + 27);
    assert_eq!(report["edges"], 9 + 2 * 27);
    assert_eq!(report["open_edges"], 18);
    assert_eq!(report["rims"], 1);
    assert_eq!(report["euler"], 1);
    assert_eq!(report["zones"], 9);
    assert_eq!(report["families"], 3);
    assert_eq!(report["volume_m3"], Value::Null);
    assert_eq!(report["closing_gap_mm"].as_f64().unwrap().round(), 0.0);
    let courses: Vec<_> = report["courses"]
        .as_array()
        .unwrap()
        .iter()
        .map(|c| (c["course"].as_i64(), c["panels"].as_i64()))
        .collect();
    assert_eq!(courses, [(Some(1), Some(9)), (Some(2), Some(9)), (Some(3), Some(9))]);
    // Each mate names the edge back, with the same length and angle.
    let panels = report["panel_list"].as_array().unwrap();
    let mut met = 0;
    for panel in panels {
        for (k, edge) in panel["edges"].as_array().unwrap().iter().enumerate() {
            assert!((edge["length_mm"].as_f64().unwrap() - 600.0).abs() < 1e-9);
            let Some(mate) = edge["mate"].as_str() else {
                assert_eq!(edge["kind"], "rim");
                continue;
            };
            let other = panels.iter().find(|p| p["mark"] == mate).unwrap();
            let back = &other["edges"][edge["mate_edge"].as_u64().unwrap() as usize];
            assert_eq!(
                (&back["mate"], back["mate_edge"].as_u64()),
                (&panel["mark"], Some(k as u64))
            );
            assert_eq!(back["dihedral_deg"], edge["dihedral_deg"]);
            met += 1;
        }
    }
    assert_eq!(met, 2 * (9 + 54 - 18));
}

/// The rhombic triacontahedron: 32, 60, 30 and, with edge 1, the volume 4 sqrt(5 + 2 sqrt 5) = 12.310734 (published).
#[test]
fn a_star_solid_is_closed_and_has_its_volume() {
    let folder = tempfile::tempdir().unwrap();
    done(
        folder.path(),
        "start star-solid --star 6 --edge 1m -o s.ron --name Globe",
    );
    let report: Value = serde_json::from_str(&done(folder.path(), "report s.ron --json")).unwrap();
    assert_eq!(
        (&report["vertices"], &report["edges"], &report["panels"]),
        (&32.into(), &60.into(), &30.into())
    );
    let volume = 4.0 * (5.0 + 2.0 * 5.0_f64.sqrt()).sqrt();
    assert!((report["volume_m3"].as_f64().unwrap() - volume).abs() < 1e-9);
    assert_eq!(report["name"], "Globe");
    assert_eq!(status(&run(folder.path(), "check s.ron")), 0);
}

/// (5, 2) crosses itself in 15 pairs, 10 of which share a corner; (4, 2) has 4 doubled pairs.
#[test]
fn check_says_stop_where_panels_cross_or_double() {
    let folder = tempfile::tempdir().unwrap();
    for (ribs, turn, key, count, code) in [
        (5, 2, "crossings", 15, "crossing"),
        (4, 2, "doubled", 4, "doubled-panel"),
    ] {
        let line = format!("start helical --ribs {ribs} --turn {turn} --pitch 40 --edge 500 -o h.ron --force");
        done(folder.path(), &line);
        let report: Value = serde_json::from_str(&done(folder.path(), "report h.ron --json")).unwrap();
        assert_eq!(report[key], count, "({ribs}, {turn})");
        assert_eq!(report["volume_m3"], Value::Null);
        let check = run(folder.path(), "check h.ron --json");
        assert_eq!(status(&check), 1);
        let list: Value = serde_json::from_str(&printed(&check)).unwrap();
        let stop = list.as_array().unwrap().iter().find(|f| f["code"] == code).unwrap();
        assert_eq!(stop["level"], "stop");
        for key in ["text", "where", "figure", "limit"] {
            assert!(stop.get(key).is_some(), "{key}");
        }
        assert_eq!(status(&run(folder.path(), "check h.ron")), 1);
    }
}

/// A helical solid of n ribs has n r (n - r) / gcd(n, r) panels.
#[test]
fn helical_solids_take_all_their_rounds() {
    let folder = tempfile::tempdir().unwrap();
    for (n, r, panels) in [(3, 1, 6), (4, 1, 12), (6, 2, 24), (9, 3, 54), (7, 2, 70)] {
        done(
            folder.path(),
            &format!("start helical --ribs {n} --turn {r} --pitch 40 --edge 500 -o h.ron --force"),
        );
        let report: Value = serde_json::from_str(&done(folder.path(), "report h.ron --json")).unwrap();
        assert_eq!(report["panels"], panels, "({n}, {r})");
    }
    // Eight courses of (6, 2): a round of five, and three more.
    done(
        folder.path(),
        "start helical --ribs 6 --turn 2 --pitch 40 --edge 500 --courses 8 -o h.ron --force",
    );
    let report: Value = serde_json::from_str(&done(folder.path(), "report h.ron --json")).unwrap();
    assert_eq!(report["courses"].as_array().unwrap().len(), 8);
}

#[test]
fn export_writes_the_lists_and_only_what_is_asked_for() {
    let folder = tempfile::tempdir().unwrap();
    fs::write(folder.path().join("p.ron"), designs::POLAR).unwrap();
    done(folder.path(), "export p.ron --to out/all");
    for name in ["panels.csv", "edges.csv"] {
        assert!(
            fs::metadata(folder.path().join("out/all").join(name)).unwrap().len() > 100,
            "{name}"
        );
    }
    done(folder.path(), "export p.ron --to out/some --only panels");
    let names: Vec<_> = fs::read_dir(folder.path().join("out/some"))
        .unwrap()
        .map(|f| f.unwrap().file_name())
        .collect();
    assert_eq!(names, ["panels.csv"]);
}

#[test]
fn pictures_have_the_size_asked_for_and_something_on_them() {
    let folder = tempfile::tempdir().unwrap();
    fs::write(folder.path().join("p.ron"), designs::POLAR).unwrap();
    let mut seen = BTreeSet::new();
    for view in ["plan", "front", "side", "iso", "fit"] {
        done(
            folder.path(),
            &format!("picture p.ron -o o.png --view {view} --size 320x200"),
        );
        let png = fs::read(folder.path().join("o.png")).unwrap();
        assert_eq!(&png[..8], b"\x89PNG\r\n\x1a\n");
        // The header's first chunk: width and height, big-endian.
        assert_eq!(&png[16..24], [0, 0, 1, 64, 0, 0, 0, 200]);
        assert!(png.len() > 1500, "{view}: {}", png.len());
        seen.insert(png);
    }
    assert_eq!(seen.len(), 5);
}

#[test]
fn imports_are_embedded() {
    let folder = tempfile::tempdir().unwrap();
    fs::write(
        folder.path().join("path.csv"),
        "x_cm,y_cm,z_cm\n0,0,0\n30,0,20\n60,10,0\n90,0,20\n",
    )
    .unwrap();
    done(folder.path(), "start zigzag --from path.csv -o z.ron");
    fs::remove_file(folder.path().join("path.csv")).unwrap();
    let report: Value = serde_json::from_str(&done(folder.path(), "report z.ron --json")).unwrap();
    // Zig, zag, zig: one V.
    assert_eq!(report["panels"], 1);
    assert!(
        fs::read_to_string(folder.path().join("z.ron"))
            .unwrap()
            .contains("own(300.0, 0.0, 200.0)")
    );
}

/// A paraboloid of 4 by 3 m, which is a translation surface: its height is a part of x and a part of y, added (derived).
fn paraboloid(scale: f64) -> String {
    let mut text = String::new();
    let height = |share: f64| 900.0 * (1.0 - (2.0 * share - 1.0).powi(2));
    for j in 0..=6 {
        for i in 0..=8 {
            let (u, v) = (f64::from(i) / 8.0, f64::from(j) / 6.0);
            let place = [4000.0 * u, 3000.0 * v, height(u) + height(v)].map(|c| c * scale);
            text.push_str(&format!("v {} {} {}\n", place[0], place[1], place[2]));
        }
    }
    for j in 0..6 {
        for i in 0..8 {
            let a = 9 * j + i + 1;
            text.push_str(&format!("f {a} {} {} {}\n", a + 1, a + 10, a + 9));
        }
    }
    text
}

#[test]
fn fit_brings_a_design_to_a_mesh_and_prints_its_history() {
    let folder = tempfile::tempdir().unwrap();
    let at = folder.path();
    done(at, "start polar --ribs 8 -o a.ron");
    fs::write(at.join("a.obj"), paraboloid(0.001)).unwrap();
    let history = done(
        at,
        "fit a.ron --target a.obj --unit m --zig 8 --zag 6 --smoothing 0 -o out.ron",
    );
    let lines: Vec<&str> = history.lines().collect();
    assert_eq!(lines[0], "iteration,rms_mm,largest_mm,uncovered_mm");
    let largest: f64 = lines[1].split(',').nth(2).unwrap().parse().unwrap();
    assert!(largest < 1e-5, "{history}");
    assert!(history.contains("# settled"));
    let report: Value = serde_json::from_str(&done(at, "report out.ron --json")).unwrap();
    assert_eq!(report["panels"], 48);
    let size = report["size_mm"].as_array().unwrap();
    for (size, want) in size.iter().zip([4000.0, 3000.0, 1800.0]) {
        assert!((size.as_f64().unwrap() - want).abs() < 1e-6, "{size} {want}");
    }
    // The target is the backdrop of what was written: the next fit needs no other.
    fs::remove_file(at.join("a.obj")).unwrap();
    let again = done(at, "fit out.ron --begin shell --zig 8 --zag 6 -o a.ron --force");
    assert!(again.starts_with("iteration"));
}

#[test]
fn fit_refuses_what_it_cannot_use() {
    let folder = tempfile::tempdir().unwrap();
    let at = folder.path();
    done(at, "start polar --ribs 8 -o a.ron");
    fs::write(at.join("a.obj"), paraboloid(1.0)).unwrap();
    for (line, why) in [
        ("fit a.ron -o out.ron", "has no backdrop"),
        ("fit a.ron --target a.obj -o a.ron", "is there already"),
        ("fit a.ron --target a.obj --zig 0 -o out.ron", "0 parts"),
        (
            "fit a.ron --target a.obj --begin shell -o out.ron",
            "translation surface",
        ),
        ("fit a.ron --target a.ron -o out.ron", "must end in"),
    ] {
        let output = run(at, line);
        assert_eq!(status(&output), 2, "{line}");
        assert!(errors(&output).contains(why), "{}", errors(&output));
        assert!(!at.join("out.ron").exists());
    }
}
