//! `animate`, through the real program; what it writes is decoded again.

use std::{fs, fs::File, io::BufReader, path::Path};

use crate::program::{done, errors, run, status};

/// A dome of five ribs that closes after four courses.
fn dome(folder: &Path) {
    done(folder, "start polar --ribs 5 --pitch 35 --edge 400 -o dome.ron");
}

/// How many frames an animated PNG says it has, and how many can be read.
fn png_frames(path: &Path) -> (u32, u32) {
    let mut reader = png::Decoder::new(BufReader::new(File::open(path).unwrap()))
        .read_info()
        .unwrap();
    let said = reader.info().animation_control().unwrap().num_frames;
    let mut pixels = vec![0; reader.output_buffer_size().unwrap()];
    let read = (0..said).filter(|_| reader.next_frame(&mut pixels).is_ok()).count();
    (said, u32::try_from(read).unwrap())
}

#[test]
fn the_growth_has_a_frame_a_course() {
    let folder = tempfile::tempdir().unwrap();
    dome(folder.path());
    done(folder.path(), "animate dome.ron -o growth.png --size 160x120");
    // n ribs close in n - 1 courses.
    assert_eq!(png_frames(&folder.path().join("growth.png")), (4, 4));
    done(folder.path(), "animate dome.ron -o frames --size 160x120 --back");
    // There and back without showing the ends twice: 1 2 3 4 3 2.
    assert_eq!(fs::read_dir(folder.path().join("frames")).unwrap().count(), 6);
    assert!(folder.path().join("frames/frame-0006.png").is_file());
}

#[test]
fn a_sweep_has_as_many_frames_as_asked_for_and_loops() {
    let folder = tempfile::tempdir().unwrap();
    dome(folder.path());
    done(
        folder.path(),
        "animate dome.ron -o pitch.gif --sweep start.pitch=20..60deg --frames 7 --rate 10 --size 120x90",
    );
    let mut options = gif::DecodeOptions::new();
    options.set_color_output(gif::ColorOutput::RGBA);
    let mut decoder = options
        .read_info(File::open(folder.path().join("pitch.gif")).unwrap())
        .unwrap();
    assert_eq!((decoder.width(), decoder.height()), (120, 90));
    assert_eq!(decoder.repeat(), gif::Repeat::Infinite);
    let mut frames = Vec::new();
    while let Some(frame) = decoder.read_next_frame().unwrap() {
        frames.push((frame.delay, frame.buffer.to_vec()));
    }
    assert_eq!(frames.len(), 7);
    assert_eq!(frames[0].0, 10, "a tenth of a second");
    assert!(frames.windows(2).all(|w| w[0].1 != w[1].1), "every frame is another");
}

#[test]
fn what_cannot_be_animated_is_said_in_one_sentence_and_nothing_is_written() {
    let folder = tempfile::tempdir().unwrap();
    dome(folder.path());
    for (words, said) in [
        ("--sweep start.rib=3..9", "no parameter `start.rib`"),
        ("--sweep start.pitch", "KEY=FROM..TO"),
        ("--sweep start.pitch=20..120", "start.pitch"),
        ("--sweep start.pitch=20..50 --frames 1", "2 to 600"),
        ("--sweep start.pitch=20..50 --frames 100000", "2 to 600"),
        ("--rate 1000", "1 to 60"),
        ("--view top", "there is no view"),
    ] {
        let output = run(folder.path(), &format!("animate dome.ron -o out.gif {words}"));
        assert_eq!(status(&output), 2, "{words}");
        let text = errors(&output);
        assert!(
            text.contains(said) && text.trim_end().lines().count() == 1,
            "{words}: {text}"
        );
        assert!(!folder.path().join("out.gif").exists(), "{words}");
    }
}
