//! `docs/format.md` and the whole files beside it: every field is named there, and every file is read and grown.

#![expect(clippy::unwrap_used, reason = "a test may stop where it stands")]

mod designs;

use std::{collections::BTreeSet, fs, path::Path};

use proptest::{strategy::Strategy, strategy::ValueTree, test_runner::TestRunner};
use zonewright::document::{Design, bundled, parse_design, read_design, to_text};
use zonewright::report::report;
use zonewright::window::Command;
use zonewright_geometry::{Act, Code, Level, Outside, grow};

fn docs() -> std::path::PathBuf {
    Path::new(env!("CARGO_MANIFEST_DIR")).join("../../docs")
}

fn examples() -> Vec<(String, Design)> {
    let mut files: Vec<_> = fs::read_dir(docs().join("examples"))
        .unwrap()
        .map(|f| f.unwrap().path())
        .collect();
    files.sort();
    let read = |p: &std::path::PathBuf| {
        let design = read_design(p).unwrap_or_else(|error| panic!("{error}"));
        (p.file_name().unwrap().to_string_lossy().into_owned(), design)
    };
    files.iter().map(read).collect()
}

#[test]
fn every_example_grows() {
    for (name, design) in examples() {
        let (shell, findings) = grow(&design.shape);
        assert!(!shell.panels.is_empty(), "{name}");
        let bad = findings.iter().find(|f| {
            f.level() == Level::Stop
                || matches!(
                    f.code,
                    Code::StepFoundNothing | Code::VChanged | Code::NameLost | Code::RimNotBalanced
                )
        });
        assert!(bad.is_none(), "{name}: {bad:?}");
    }
}

#[test]
fn every_start_and_step_kind_has_an_example() {
    let examples = examples();
    let kinds: BTreeSet<_> = examples.iter().map(|(_, d)| d.shape.start.kind()).collect();
    assert_eq!(kinds.len(), 9);
    let acts: BTreeSet<_> = examples
        .iter()
        .flat_map(|(_, d)| &d.shape.steps)
        .map(|step| match step.act {
            Act::Lay { .. } => 0,
            Act::Fill { .. } => 1,
            Act::Splice { .. } => 2,
            Act::Retract => 3,
            Act::Cross { .. } => 4,
            Act::SetRoles(_) => 5,
            Act::CloseRim => 6,
            Act::JoinRims { .. } => 7,
        })
        .collect();
    assert_eq!(acts.len(), 8);
    assert!(examples.iter().any(|(_, d)| !d.shape.finish.is_empty()));
    let format = fs::read_to_string(docs().join("format.md")).unwrap();
    for (name, _) in &examples {
        assert!(format.contains(&format!("`{name}`")), "{name}");
    }
}

#[test]
fn every_field_and_word_of_the_file_is_documented() {
    let mut runner = TestRunner::deterministic();
    let mut words = BTreeSet::new();
    for _ in 0..400 {
        let mut design = designs::any_design().new_tree(&mut runner).unwrap().current();
        design.name = "n".to_owned();
        if let Some(backdrop) = &mut design.backdrop {
            backdrop.name = "n".to_owned();
        }
        for name in design
            .shape
            .steps
            .iter_mut()
            .map(|s| &mut s.name)
            .chain(design.shape.finish.iter_mut().map(|f| &mut f.name))
        {
            *name = name.as_ref().map(|_| "n".to_owned());
        }
        let text = to_text(&design);
        let found = text.split(|c: char| !(c.is_ascii_alphabetic() || c == '_'));
        words.extend(found.filter(|w| w.len() > 1).map(str::to_owned));
    }
    assert!(words.len() > 80, "{}", words.len());
    let format = fs::read_to_string(docs().join("format.md")).unwrap();
    let named: BTreeSet<&str> = format.split(|c: char| !(c.is_ascii_alphabetic() || c == '_')).collect();
    let missing: Vec<_> = words.iter().filter(|w| !named.contains(w.as_str())).collect();
    assert!(missing.is_empty(), "{missing:?}");
}

#[test]
fn every_exported_file_word_and_column_is_documented() {
    let format = fs::read_to_string(docs().join("format.md")).unwrap();
    let named = |word: &str| assert!(format.contains(&format!("`{word}`")), "{word}");
    let report = report(&parse_design(designs::POLAR).unwrap());
    for file in zonewright_shop::FILES {
        named(file.name);
        named(file.word);
        let (_, bytes) = zonewright_shop::export(&report.shell, &report.parts, &[file.word])
            .unwrap()
            .remove(0);
        if file.name.ends_with(".csv") {
            let text = String::from_utf8(bytes).unwrap();
            for column in text.lines().next().unwrap().split(',') {
                // Columns of the edges b, c, d are documented by those of edge a.
                let of_edge = ["b_", "c_", "d_"].iter().find_map(|letter| column.strip_prefix(letter));
                named(&of_edge.map_or_else(|| column.to_owned(), |rest| format!("a_{rest}")));
            }
        }
    }
}

#[test]
fn every_code_is_documented_with_its_level() {
    let format = fs::read_to_string(docs().join("format.md")).unwrap();
    let codes = [
        Code::ParameterLimit,
        Code::NotFinite,
        Code::ZeroVector,
        Code::BrokenLink,
        Code::TooManyPanels,
        Code::EmptyWord,
        Code::ClosingGap,
        Code::StepFoundNothing,
        Code::VChanged,
        Code::NameLost,
        Code::NeverStill,
        Code::RimNotBalanced,
        Code::RimClosedCrossing,
        Code::Pinch,
        Code::DoubledPanel,
        Code::CrowdedEdge,
        Code::Crossing,
        Code::NearMiss,
        Code::InsideOut,
        Code::SidesDisagree,
        Code::NoPanels,
        Code::NoSuchParameter,
    ];
    for code in codes {
        let row = format!(
            "| `{}` | {} |",
            code.text().key,
            zonewright_shop::level_word(code.level())
        );
        assert!(format.contains(&row), "{row}");
    }
}

#[test]
fn the_outside_is_the_one_that_a_new_design_would_have() {
    let bundled = bundled()
        .iter()
        .map(|(name, text)| ((*name).to_owned(), parse_design(text).unwrap()));
    // One example shows the other side on purpose.
    let all = examples()
        .into_iter()
        .chain(bundled)
        .filter(|(name, _)| name != "zones-and-placement.ron");
    let wrong: Vec<_> = all
        .filter(|(_, d)| d.shape.outside != Outside::by_rule(&d.shape))
        .map(|(name, _)| name)
        .collect();
    assert!(wrong.is_empty(), "{wrong:?}");
}

#[test]
fn bundled_designs_grow_clean() {
    assert!(!bundled().is_empty());
    for (name, text) in bundled() {
        let design = parse_design(text).unwrap_or_else(|error| panic!("{name}: {error}"));
        assert_eq!(design.name, *name);
        let report = report(&design);
        assert!(report.shell.panels.len() > 5, "{name}");
        let stop = report.findings.iter().find(|f| f.level() != Level::Note);
        assert!(stop.is_none(), "{name}: {stop:?}");
    }
}

#[test]
fn the_manual_names_every_key_and_has_every_picture_that_it_shows() {
    let folder = docs().join("manual");
    let keys = fs::read_to_string(folder.join("keys.md")).unwrap();
    let named: BTreeSet<&str> = keys.split([' ', ',', '(', ')', '|', '\n']).collect();
    for command in Command::listed() {
        if let Some(shortcut) = command.shortcut() {
            let shortcut = shortcut.format(&egui::ModifierNames::NAMES, false);
            assert!(
                named.contains(shortcut.as_str()),
                "{shortcut}: {}",
                command.words().name
            );
        }
    }
    let mut shown = BTreeSet::new();
    for file in fs::read_dir(&folder).unwrap().map(|f| f.unwrap().path()) {
        if file.extension().is_none_or(|e| e != "md") {
            continue;
        }
        for link in fs::read_to_string(&file).unwrap().split("](").skip(1) {
            let target = link.split([')', '#']).next().unwrap();
            assert!(folder.join(target).exists(), "{}: {target}", file.display());
            shown.extend(target.strip_suffix(".png").map(str::to_owned));
        }
    }
    let scenes = include_str!("../examples/manual_pictures/scenes.rs")
        .split("name: \"")
        .skip(1);
    let scenes: BTreeSet<String> = scenes.map(|s| s.split('"').next().unwrap().to_owned()).collect();
    assert_eq!(shown, scenes, "pictures shown, scenes made");
}
