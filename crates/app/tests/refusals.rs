//! What the command line refuses: with status 2, one line on standard error, and no file touched.

#![expect(clippy::unwrap_used, reason = "a test may stop where it stands")]

mod designs;
mod program;

use std::{fs, time::Instant};

use program::{done, errors, printed, run, status, zonewright};

/// One line, not empty, that starts with the program's name.
fn assert_refused(output: &std::process::Output, line: &str) {
    let said = errors(output);
    assert_eq!(status(output), 2, "{line}: {said}");
    assert!(
        said.starts_with("zonewright: ") && said.trim_end().lines().count() == 1,
        "{line}: {said}"
    );
    assert!(printed(output).is_empty(), "{line}");
}

#[test]
fn starts_that_cannot_be_used_make_no_file() {
    let lines = [
        "polar --ribs 2 --pitch 40 --edge 600",
        "polar --ribs -4 --pitch 40 --edge 600",
        "polar --ribs 1e9 --pitch 40 --edge 600",
        "polar --ribs 4000000000 --pitch 40 --edge 600",
        "polar --ribs 9.5 --pitch 40 --edge 600",
        "polar --ribs nan --pitch 40 --edge 600",
        "polar --ribs 9 --pitch 90 --edge 600",
        "polar --ribs 9 --pitch nan --edge 600",
        "polar --ribs 9 --pitch 40 --edge 0",
        "polar --ribs 9 --pitch 40 --edge -5",
        "polar --ribs 9 --pitch 40 --edge inf",
        "polar --ribs 9 --pitch 40 --edge 1e400",
        "polar --ribs 9 --pitch 40 --edge 600 --width 5000",
        "polar --ribs 9 --pitch 40 --edge 600 --courses -1",
        "polar --ribs 9 --pitch 40 --edge 600 --courses 0",
        "polar --ribs 9 --pitch 40 --edge 600 --spurs sideways",
        "polar --ribs 9 --pitch 40 --edge 600mmm",
        "helical --ribs 1e9 --turn 3 --pitch 40 --edge 600",
        "helical --ribs 9 --turn 0 --pitch 40 --edge 600",
        "helical --ribs 9 --turn 9 --pitch 40 --edge 600",
        "column --ribs 4 --zag-run 1 --zig-run 1 --rise 1 --turn 0",
        "loop --sides 1e8 --radius 900 --rise 500",
        "loop --sides 8 --radius -900 --rise 500",
        "zigzag --points 0,0,0",
        "zigzag --points 0,0,0_1",
        "zigzag --points 0,0,0;0,0,0;1,1,1",
        "zigzag --from none.csv",
        "star-solid --star 7 --edge 500",
        "star-solid --star 6 --edge 0",
        "star-path --star 6 --letters +0;-99",
        "translation --zig arc --zag line",
        "cone --ribs 9",
    ];
    let folder = tempfile::tempdir().unwrap();
    for line in lines {
        let begun = Instant::now();
        let output = run(folder.path(), &format!("start {line} -o new.ron"));
        assert_refused(&output, line);
        assert!(begun.elapsed().as_secs() < 10, "{line}");
        assert_eq!(fs::read_dir(folder.path()).unwrap().count(), 0, "{line}");
    }
}

#[test]
fn the_limit_is_named() {
    let folder = tempfile::tempdir().unwrap();
    let said = errors(&run(
        folder.path(),
        "start polar --ribs 2 --pitch 40 --edge 600 -o x.ron",
    ));
    assert!(
        said.contains("ribs") && said.contains('2') && said.contains('3'),
        "{said}"
    );
    let said = errors(&run(
        folder.path(),
        "start polar --ribs 9 --pitch 40 --edge -5 -o x.ron",
    ));
    assert!(said.contains("edge") && said.contains("-5"), "{said}");
}

#[test]
fn a_file_that_is_there_is_overwritten_only_when_forced() {
    let folder = tempfile::tempdir().unwrap();
    let path = folder.path().join("x.ron");
    fs::write(&path, "mine").unwrap();
    let line = "start polar --ribs 9 --pitch 40 --edge 600 --courses 3 -o x.ron";
    let output = run(folder.path(), line);
    assert_refused(&output, line);
    assert!(errors(&output).contains("--force"));
    assert_eq!(fs::read_to_string(&path).unwrap(), "mine");
    // Forced, but refused for another reason.
    assert_refused(&run(folder.path(), &line.replace("600", "0 --force")), line);
    assert_eq!(fs::read_to_string(&path).unwrap(), "mine");
    done(folder.path(), &format!("{line} --force"));
    assert!(fs::read_to_string(&path).unwrap().contains("format: 1"));
}

#[test]
fn files_that_cannot_be_read_stay_as_they_are() {
    let folder = tempfile::tempdir().unwrap();
    let cut = &designs::POLAR[..designs::POLAR.len() - 12];
    let files = [
        ("truncated", cut.to_owned(), "line "),
        (
            "newer",
            designs::POLAR.replace("format: 1", "format: 7"),
            "newer version: format 7",
        ),
        (
            "unknown",
            designs::POLAR.replace("ribs: 9", "ribs: 9, rips: 9"),
            "`rips`",
        ),
        ("empty", String::new(), "line 1"),
        ("binary", "\u{0}\u{1}".to_owned(), "line 1"),
        ("mine.csv", "0,0,0\n".to_owned(), "line 1"),
    ];
    for (name, text, why) in files {
        let path = folder.path().join(name);
        fs::write(&path, &text).unwrap();
        let jobs = [
            format!("report {name} --json"),
            format!("check {name}"),
            format!("export {name} --to out"),
            format!("picture {name} -o out.png"),
            name.to_owned(),
        ];
        for line in jobs {
            let output = run(folder.path(), &line);
            assert_refused(&output, &line);
            let said = errors(&output);
            assert!(said.contains(why) && said.contains(name), "{line}: {said}");
            assert_eq!(fs::read_to_string(&path).unwrap(), text, "{line}");
        }
        fs::remove_file(&path).unwrap();
        assert_eq!(fs::read_dir(folder.path()).unwrap().count(), 0, "{name}");
    }
}

#[test]
fn bad_arguments_are_answered_in_one_line() {
    let folder = tempfile::tempdir().unwrap();
    fs::write(folder.path().join("p.ron"), designs::POLAR).unwrap();
    for line in [
        "report",
        "report p.ron --jsom",
        "report none.ron",
        "export p.ron",
        "export p.ron --to out --only everything",
        "picture p.ron",
        "picture p.ron -o o.png --view top",
        "picture p.ron -o o.png --size 1200",
        "picture p.ron -o o.png --size 0x0",
        "picture p.ron -o o.png --size 100000x100000",
        "picture p.ron -o none/o.png",
        "p.ron q.ron",
        "none.ron",
    ] {
        let output = run(folder.path(), line);
        assert_refused(&output, line);
    }
    assert_eq!(fs::read_dir(folder.path()).unwrap().count(), 1);
}

#[test]
fn a_hostile_file_is_answered_in_time() {
    let folder = tempfile::tempdir().unwrap();
    let begun = Instant::now();
    for (name, with) in [("ribs", "ribs: 4294967295"), ("courses", "count(4294967295)")] {
        let from = if name == "ribs" { "ribs: 9" } else { "count(3)" };
        fs::write(folder.path().join(name), designs::POLAR.replace(from, with)).unwrap();
        let output = run(folder.path(), &format!("check {name} --json"));
        assert!(status(&output) <= 2, "{name}");
    }
    fs::write(
        folder.path().join("deep"),
        format!("(format: 1, shape: {}", "[".repeat(5_000_000)),
    )
    .unwrap();
    assert_refused(&run(folder.path(), "report deep"), "deep");
    assert!(begun.elapsed().as_secs() < 20);
}

#[test]
fn without_a_display_one_sentence_names_the_command_line() {
    let folder = tempfile::tempdir().unwrap();
    fs::write(folder.path().join("p.ron"), designs::POLAR).unwrap();
    for arguments in [&["p.ron"][..], &[]] {
        let output = zonewright(folder.path(), arguments);
        assert_refused(&output, "window");
        assert!(errors(&output).contains("--help"), "{}", errors(&output));
    }
}

#[test]
fn help_is_no_error() {
    let folder = tempfile::tempdir().unwrap();
    for line in [
        "--help",
        "--version",
        "start --help",
        "start polar --help",
        "start star-solid --help",
        "help export",
    ] {
        assert!(!done(folder.path(), line).is_empty(), "{line}");
    }
    let help = done(folder.path(), "start star-solid --help");
    assert!(help.contains("c13") && help.contains("p5"));
}
