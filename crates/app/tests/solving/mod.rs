//! `solve` and `parameters`.

use std::{fs, path::Path};

use serde_json::Value;

use super::program::{done, errors, printed, run, status};

/// Two arcs over 4 m and 3 m, 900 mm and 600 mm high: the vault is 1500 mm high and 5 m across (3-4-5).
const VAULT: &str = "start translation --zig ZIG --zag ZAG -o vault.ron";

fn vault(folder: &Path) {
    let words = VAULT.split_whitespace().map(|word| match word {
        "ZIG" => "arc span=4000 rise=900 parts=6",
        "ZAG" => "arc span=3000 rise=600 parts=4 azimuth=90",
        word => word,
    });
    let made = super::program::zonewright(folder, &words.collect::<Vec<_>>());
    assert_eq!(status(&made), 0, "{}", errors(&made));
}

fn number(folder: &Path, file: &str, key: &str) -> f64 {
    let listed: Value = serde_json::from_str(&done(folder, &format!("parameters {file} --json"))).unwrap();
    let rows = listed.as_array().unwrap();
    let row = rows.iter().find(|row| row["key"] == key).unwrap();
    row["value"].as_f64().unwrap()
}

#[test]
fn parameters_are_listed_with_keys_and_values() {
    let folder = tempfile::tempdir().unwrap();
    vault(folder.path());
    let text = done(folder.path(), "parameters vault.ron");
    let rise = text.lines().find(|l| l.starts_with("start.zag.rise ")).unwrap();
    assert!(rise.contains("600 mm") && rise.ends_with("Zag path: rise"), "{rise}");
    let azimuth = text.lines().find(|l| l.starts_with("start.zag.azimuth ")).unwrap();
    assert!(azimuth.contains(" 90\u{b0} "), "{azimuth}");
    assert_eq!(number(folder.path(), "vault.ron", "start.zig.span"), 4000.0);
}

#[test]
fn a_design_is_solved_for_its_figures() {
    let folder = tempfile::tempdir().unwrap();
    vault(folder.path());
    let line = "solve vault.ron --want height=2.1m --want span=5m~1mm --change start.zig.rise,start.zag.rise:500mm..600mm -o out.ron";
    let text = done(folder.path(), line);
    assert!(text.contains("Height: 1500 mm \u{2192} 2100 mm"), "{text}");
    let (zig, zag) = (
        number(folder.path(), "out.ron", "start.zig.rise"),
        number(folder.path(), "out.ron", "start.zag.rise"),
    );
    assert!((zig + zag - 2100.0).abs() < 0.5 && zag <= 600.0, "{zig}, {zag}");
    let report: Value = serde_json::from_str(&done(folder.path(), "report out.ron --json")).unwrap();
    let height = report["size_mm"][2].as_f64().unwrap();
    assert!((height - 2100.0).abs() < 0.5, "{height}");
    // Headroom in the middle is the height of a vault that stands on its corners.
    done(
        folder.path(),
        "solve vault.ron --want headroom=1.8m --change start.zig.rise -o head.ron",
    );
    assert!((number(folder.path(), "head.ron", "start.zig.rise") - 1200.0).abs() < 0.5);
    // Over the middle of the rim along x only the arc along y is left.
    done(
        folder.path(),
        "solve vault.ron --want headroom@2m@180deg=700mm --change start.zag.rise -o rim.ron",
    );
    assert!((number(folder.path(), "rim.ron", "start.zag.rise") - 700.0).abs() < 0.5);
    done(
        folder.path(),
        "solve vault.ron --want footprint-area=16m2 --change start.zig.span -o foot.ron",
    );
    assert!((number(folder.path(), "foot.ron", "start.zig.span") - 16e3 / 3.0).abs() < 0.5);
}

#[test]
fn what_cannot_be_solved_is_said_and_writes_nothing() {
    let folder = tempfile::tempdir().unwrap();
    vault(folder.path());
    let lines = [
        (
            "--want height=2.1m --change start.zig.rise:0..1m",
            "height comes to 1600 mm, 500 mm short of 2100 mm. It needs Zig path: rise above 1000 mm: 1500 mm would do.",
        ),
        (
            "--want height=2.1m --change placement.shift.x",
            "height does not depend on anything that may change.",
        ),
        (
            "--want volume=2 --change start.zig.rise",
            "volume has no value on this shell",
        ),
        ("--want height=2.1m --change start.pitch", "no parameter `start.pitch`"),
        (
            "--want tallness=2.1m --change start.zig.rise",
            "`tallness` is no figure",
        ),
        ("--want height --change start.zig.rise", "write FIGURE=VALUE"),
        ("--want height=2.1m~0 --change start.zig.rise", "must be more than 0"),
        ("--want height=2.1m --change start.zig.rise:9", "LEAST..GREATEST"),
        ("--want height=tall --change start.zig.rise", "height=tall"),
        ("--want height=2m", "--change"),
        ("--change start.zig.rise", "--want"),
    ];
    for (line, sentence) in lines {
        let output = run(folder.path(), &format!("solve vault.ron {line} -o out.ron"));
        assert_eq!(status(&output), 2, "{line}");
        assert!(errors(&output).contains(sentence), "{line}: {}", errors(&output));
        assert!(printed(&output).is_empty());
        assert!(!folder.path().join("out.ron").exists());
    }
}

#[test]
fn solving_overwrites_only_when_told() {
    let folder = tempfile::tempdir().unwrap();
    vault(folder.path());
    let before = fs::read(folder.path().join("vault.ron")).unwrap();
    let line = "solve vault.ron --want height=1.6m --change start.zig.rise -o vault.ron";
    let output = run(folder.path(), line);
    assert_eq!(status(&output), 2);
    assert!(errors(&output).contains("--force"));
    assert_eq!(fs::read(folder.path().join("vault.ron")).unwrap(), before);
    done(folder.path(), &format!("{line} --force"));
    assert!((number(folder.path(), "vault.ron", "start.zig.rise") - 1000.0).abs() < 0.5);
}
