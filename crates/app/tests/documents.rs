//! Design files: what is written is read again, and what cannot be read is refused with its place and left alone.

#![expect(clippy::unwrap_used, reason = "a test may stop where it stands")]

mod designs;

use std::fs;

use proptest::prelude::*;
use zonewright::document::{Design, DesignError, parse_design, read_design, to_text, write_design};
use zonewright_geometry::{
    Act, LetterName, Maker, Sign, StepId, VName, Vs,
    start::{PolarBy, Start},
};

fn polar() -> Design {
    parse_design(designs::POLAR).unwrap()
}

proptest! {
    #![proptest_config(ProptestConfig::with_cases(300))]

    #[test]
    fn a_written_design_is_read_again(design in designs::any_design()) {
        let text = to_text(&design);
        let read = parse_design(&text);
        prop_assert_eq!(read.as_ref().ok(), Some(&design), "{:?}\n{}", read.as_ref().err(), text);
    }

    #[test]
    fn a_cut_file_is_refused_and_never_panics(design in designs::any_design(), part in 0.0..1.0_f64) {
        let text = to_text(&design);
        let text = text.trim_end();
        let mut at = (text.len() as f64 * part) as usize;
        while !text.is_char_boundary(at) {
            at -= 1;
        }
        prop_assert!(parse_design(&text[..at]).is_err());
    }

    #[test]
    fn a_spoilt_file_never_panics(design in designs::any_design(), at in any::<prop::sample::Index>(), by in "[ -~]{0,3}") {
        let text = to_text(&design);
        let mut chars: Vec<char> = text.chars().collect();
        let at = at.index(chars.len());
        chars.splice(at..=at, by.chars());
        let _ = parse_design(&chars.into_iter().collect::<String>());
    }
}

#[test]
fn an_unknown_field_is_named_with_its_place() {
    let text = "(\n    format: 1,\n    shape: (\n        start: polar(\n            ribs: 9,\n            rips: 8,\n        ),\n    ),\n)";
    let error = parse_design(text).unwrap_err();
    let DesignError::Syntax { line, column, ref what } = error else {
        panic!("{error}")
    };
    assert!(line == 6 && column > 12, "{error}");
    assert!(what.contains("`rips`") && what.contains("ribs"), "{error}");
}

#[test]
fn unknown_fields_are_refused_at_every_level() {
    for (place, with) in [
        ("format: 1,", "format: 1, colour: 3,"),
        ("shape: (", "shape: (colour: 3, "),
        ("pitch_edge(", "pitch_edge(colour: 3, "),
        ("id: 1,", "id: 1, colour: 3,"),
        ("lay(", "lay(colour: 3, "),
    ] {
        assert!(designs::POLAR.contains(place), "{place}");
        let error = parse_design(&designs::POLAR.replacen(place, with, 1))
            .unwrap_err()
            .to_string();
        assert!(
            error.contains("`colour`") && error.starts_with("line "),
            "{place}: {error}"
        );
    }
}

#[test]
fn a_newer_format_is_refused_politely_whatever_else_it_holds() {
    let error = parse_design("(format: 7, shape: 3, crowns: [(a: 1)])").unwrap_err();
    assert!(matches!(error, DesignError::Newer { found: 7 }));
    assert_eq!(
        error.to_string(),
        "it was made by a newer version: format 7; this program reads up to 1; get a newer version"
    );
}

#[test]
fn no_format_and_format_nought_are_refused() {
    assert!(matches!(
        parse_design("(format: 0)"),
        Err(DesignError::NoSuchFormat { found: 0 })
    ));
    assert!(parse_design("(shape: 3)").unwrap_err().to_string().contains("format"));
    assert!(parse_design("").is_err());
}

#[test]
fn deep_nesting_is_refused_without_overflow() {
    for bomb in ["(", "[", "at:(", "some("] {
        let text = format!("(format: 1, shape: {}", bomb.repeat(1_000_000));
        assert!(parse_design(&text).is_err(), "{bomb}");
    }
}

#[test]
fn a_design_that_would_not_come_back_is_not_written() {
    let folder = tempfile::tempdir().unwrap();
    let path = folder.path().join("deep.ron");
    fs::write(&path, "kept").unwrap();
    let mut name = LetterName::of_start(0, Sign::Plus);
    for step in 0..300 {
        name = LetterName {
            maker: Maker::Step(StepId(step)),
            index: 0,
            sign: Sign::Plus,
            at: Some(Box::new(name)),
        };
    }
    let zag = name.clone();
    let mut design = polar();
    design.shape.steps[0].act = Act::Fill {
        at: Vs::Picked(vec![VName { zig: name, zag }]),
    };
    assert!(matches!(write_design(&path, &design), Err(DesignError::Unkeepable(_))));
    assert_eq!(fs::read_to_string(&path).unwrap(), "kept");
}

#[test]
fn names_nest_deep_enough_for_work() {
    let mut name = LetterName::of_start(0, Sign::Plus);
    for step in 0..40 {
        name = LetterName {
            maker: Maker::Step(StepId(step)),
            index: 0,
            sign: Sign::Minus,
            at: Some(Box::new(name)),
        };
    }
    let mut design = polar();
    let zag = name.clone();
    design.shape.steps[0].act = Act::Cross {
        at: Vs::Picked(vec![VName { zig: name, zag }]),
    };
    assert_eq!(parse_design(&to_text(&design)).unwrap(), design);
}

#[test]
fn numbers_come_back_to_the_last_bit() {
    for value in [
        0.1,
        1.0 / 3.0,
        f64::MIN_POSITIVE,
        5e-324,
        1.797e308,
        600.000_000_000_000_1,
        -0.0,
    ] {
        let mut design = polar();
        let Start::Polar(form) = &mut design.shape.start else {
            panic!()
        };
        form.by = PolarBy::WidthHeight {
            width_mm: value,
            height_mm: 1.0,
        };
        let read = parse_design(&to_text(&design)).unwrap();
        let Start::Polar(form) = read.shape.start else { panic!() };
        let PolarBy::WidthHeight { width_mm, .. } = form.by else {
            panic!()
        };
        assert_eq!(width_mm.to_bits(), value.to_bits(), "{value}");
    }
}

#[test]
fn a_file_that_is_too_large_or_no_text_is_refused() {
    let folder = tempfile::tempdir().unwrap();
    let path = folder.path().join("large.ron");
    fs::File::create(&path).unwrap().set_len((64 << 20) + 1).unwrap();
    assert!(read_design(&path).unwrap_err().to_string().contains("larger than"));
    fs::write(&path, [0xff, 0xfe, 0x00]).unwrap();
    assert!(read_design(&path).unwrap_err().to_string().contains("UTF-8"));
    assert!(matches!(read_design(folder.path()), Err(DesignError::Read { .. })));
    assert!(matches!(
        read_design(&folder.path().join("none")),
        Err(DesignError::Read { .. })
    ));
}

#[test]
fn too_many_letters_are_refused() {
    let points = "(0.0,0.0,0.0),".repeat(100_001);
    let text = format!(
        "(format: 1, shape: (start: translation(zig: (shape: free([{points}]), parts: 0), zag: (shape: line(run_mm: 1, rise_mm: 0), parts: 1))))"
    );
    let error = parse_design(&text).unwrap_err();
    assert!(
        matches!(
            error,
            DesignError::TooMany {
                count: 100_001,
                limit: 100_000,
                ..
            }
        ),
        "{error}"
    );
}

#[cfg(unix)]
#[test]
fn writing_keeps_permissions_and_follows_links() {
    use std::os::unix::fs::{PermissionsExt, symlink};
    let folder = tempfile::tempdir().unwrap();
    let real = folder.path().join("real.ron");
    let link = folder.path().join("link.ron");
    fs::write(&real, "old").unwrap();
    fs::set_permissions(&real, fs::Permissions::from_mode(0o640)).unwrap();
    symlink("real.ron", &link).unwrap();
    write_design(&link, &polar()).unwrap();
    assert!(fs::symlink_metadata(&link).unwrap().file_type().is_symlink());
    assert_eq!(read_design(&real).unwrap(), polar());
    assert_eq!(fs::metadata(&real).unwrap().permissions().mode() & 0o777, 0o640);
    // Nothing is left beside it.
    assert_eq!(fs::read_dir(folder.path()).unwrap().count(), 2);
}

#[cfg(unix)]
#[test]
fn a_new_file_is_readable_like_any_other() {
    use std::os::unix::fs::PermissionsExt;
    let folder = tempfile::tempdir().unwrap();
    let plain = folder.path().join("plain");
    fs::write(&plain, "").unwrap();
    let ours = folder.path().join("ours.ron");
    write_design(&ours, &polar()).unwrap();
    let mode = |p| fs::metadata(p).unwrap().permissions().mode();
    assert_eq!(mode(&ours), mode(&plain));
    assert!(write_design(&folder.path().join("none").join("x.ron"), &polar()).is_err());
    assert!(write_design(folder.path(), &polar()).is_err());
}
