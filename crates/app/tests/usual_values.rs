//! What a kind of start is not told has a usual value, and the forms of the first acceptance run grow from the command line.

#![expect(clippy::unwrap_used, reason = "a test may")]

mod program;

use program::{done, run, status};

const KINDS: [&str; 9] = [
    "zigzag",
    "translation",
    "polar",
    "loop",
    "ribbon",
    "column",
    "helical",
    "star-path",
    "star-solid",
];

fn report(folder: &std::path::Path, file: &str) -> serde_json::Value {
    serde_json::from_str(&done(folder, &format!("report {file} --json"))).unwrap()
}

fn near(value: &serde_json::Value, expected: f64) -> bool {
    (value.as_f64().unwrap() - expected).abs() <= 6e-11 * expected.max(1.0)
}

#[test]
fn every_kind_makes_a_shell_from_nothing_but_its_name() {
    let folder = tempfile::tempdir().unwrap();
    for kind in KINDS {
        done(folder.path(), &format!("start {kind} -o {kind}.ron"));
        assert!(
            0 < report(folder.path(), &format!("{kind}.ron"))["panels"]
                .as_u64()
                .unwrap(),
            "{kind}"
        );
    }
}

#[test]
fn nine_ribs_have_the_derived_figures() {
    // Fixture F1 (derived, checked against a convex hull).
    let folder = tempfile::tempdir().unwrap();
    done(folder.path(), "start polar --ribs 9 --pitch 38 --edge 300 -o a.ron");
    let report = report(folder.path(), "a.ron");
    for (key, expected) in [
        ("panels", 72),
        ("vertices", 74),
        ("edges", 144),
        ("families", 4),
        ("distinct_bevels", 5),
    ] {
        assert_eq!(report[key], expected, "{key}");
    }
    assert!(near(&report["area_m2"], 5.457_909_131_0));
    assert!(near(&report["volume_m3"], 1.148_574_542_5));
    let panels = report["panel_list"].as_array().unwrap();
    assert!(panels.iter().all(|p| p["hand"] == "none"));
    let dihedrals = panels
        .iter()
        .flat_map(|p| p["edges"].as_array().unwrap())
        .map(|e| e["dihedral_deg"].as_f64().unwrap());
    let known = [
        154.739_329_589_6,
        165.309_399_334_9,
        160.481_627_628_9,
        152.821_152_874_1,
        148.036_310_734_7,
    ];
    for dihedral in dihedrals {
        assert!(known.iter().any(|d| (d - dihedral).abs() < 6e-11 * 180.0), "{dihedral}");
    }
}

#[test]
fn ribs_from_pole_to_pole_cross_or_do_not() {
    let folder = tempfile::tempdir().unwrap();
    done(folder.path(), "start helical --ribs 12 --turn 3 -o clean.ron");
    done(folder.path(), "check clean.ron");
    assert_eq!(report(folder.path(), "clean.ron")["crossings"], 0);
    done(folder.path(), "start helical --ribs 5 --turn 2 -o crossed.ron");
    assert_eq!(status(&run(folder.path(), "check crossed.ron")), 1);
    let crossed = report(folder.path(), "crossed.ron");
    assert_eq!(crossed["crossings"], 15);
    assert!(crossed["volume_m3"].is_null());
}

#[test]
fn ten_three_fold_axes_make_the_enneacontahedron() {
    // 20 (7 + 4 sqrt 5) / (3 sqrt 3) at edge 1: published counts, derived volume.
    let folder = tempfile::tempdir().unwrap();
    done(folder.path(), "start star-solid --star 10 -o solid.ron");
    let report = report(folder.path(), "solid.ron");
    assert_eq!(
        [&report["vertices"], &report["edges"], &report["panels"]],
        [92, 180, 90]
    );
    assert!(near(&report["volume_m3"], 61.369_531_195_1));
}
