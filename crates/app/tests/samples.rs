//! The bundled designs can be built, and the pictures of a corpus of designs agree with a ray cast.

#![expect(clippy::unwrap_used, reason = "a test may")]

#[path = "../../../tests/src/ray_cast.rs"]
#[allow(unreachable_pub, dead_code, reason = "the file is a public module of another member")]
mod ray_cast;

use std::{collections::BTreeMap, path::Path};

use zonewright::{
    document::{bundled, parse_design, read_design},
    report::{any_stop, report},
};
use zonewright_geometry::{Angle, Shell, grow};
use zonewright_painter::{Bounds, Camera, Projection, Scene, View};

const SIZE: [f32; 2] = [160.0, 120.0];

/// The corpus: the bundled designs, and one whole design of each kind of start and of steps that hold or cross. Among them are
/// star solids, columns, canopies, screens, and helical solids through each other.
fn corpus() -> BTreeMap<String, Shell> {
    let mut shells = BTreeMap::new();
    for (name, text) in bundled() {
        let design = parse_design(text).unwrap();
        let (shell, findings) = grow(&design.shape);
        assert_eq!(findings, [], "{name}");
        assert_eq!(shell.check(design.shape.tolerances.join_mm), Ok(()), "{name}");
        shells.insert((*name).to_owned(), shell);
    }
    let examples = Path::new(env!("CARGO_MANIFEST_DIR")).join("../../docs/examples");
    for entry in std::fs::read_dir(examples).unwrap() {
        let path = entry.unwrap().path();
        let name = path.file_stem().unwrap().to_string_lossy().into_owned();
        let (shell, _) = grow(&read_design(&path).unwrap().shape);
        // Where rims were joined within a tolerance panels are a little bent; the ray cast knows only parallelograms.
        let flat = |panel| {
            let [a, b, c, d] = shell.corner_points(panel);
            (c - b).distance(d - a) < 1e-6
        };
        if !shell.panels.is_empty() && (0..shell.panels.len() as u32).all(flat) {
            shells.insert(name, shell);
        }
    }
    shells
}

/// Every standard view, as a drawing and with perspective by turns, and odd ones: steep from below, nearly level and edge-on.
fn cameras(bounds: &Bounds) -> Vec<(String, Camera)> {
    let mut cameras = Vec::new();
    for (k, view) in View::ALL.into_iter().enumerate() {
        let projection = [Projection::Parallel, Projection::Perspective][k % 2];
        let camera = Camera::view(view, projection, bounds, SIZE);
        cameras.push((format!("{} {projection:?}", view.name()), camera));
    }
    for (azimuth, elevation, projection) in [
        (13.0, -71.0, Projection::Perspective),
        (101.0, 7.0, Projection::Perspective),
        (-157.0, 0.0, Projection::Parallel),
        (45.0, 0.0, Projection::Perspective),
    ] {
        let mut camera = Camera::view(View::Fit, projection, bounds, SIZE);
        camera.azimuth = Angle::from_degrees(azimuth);
        camera.elevation = Angle::from_degrees(elevation);
        cameras.push((format!("{azimuth} {elevation} {projection:?}"), camera));
    }
    // From inside, or from very near.
    let mut camera = Camera::view(View::Fit, Projection::Perspective, bounds, SIZE);
    camera.distance = bounds.diagonal() * 0.2;
    cameras.push(("from inside".to_owned(), camera));
    cameras
}

#[test]
fn pictures_of_the_corpus_agree_with_a_ray_cast_to_a_fiftieth_of_a_percent() {
    let corpus = corpus();
    assert!(12 <= corpus.len(), "{}", corpus.len());
    for (name, shell) in &corpus {
        let scene = Scene::exact(shell);
        assert!(scene.is_exact(), "{name}");
        let mut covered = 0;
        for (view, camera) in cameras(&Bounds::of(shell).unwrap()) {
            let agreement = ray_cast::compare(shell, &scene, &camera);
            assert!(agreement.holds(), "{name} {view}: {agreement:?}");
            covered += agreement.covered;
        }
        // Below that a single wrong pixel in all views together would be more than is allowed.
        assert!(
            ray_cast::ONE_IN < covered,
            "{name} shows too little to say anything: {covered}"
        );
    }
}

#[test]
fn every_sample_can_be_built() {
    for (name, text) in bundled() {
        let report = report(&parse_design(text).unwrap());
        assert!(!any_stop(&report), "{name}");
        let json: serde_json::Value = serde_json::from_str(&report.to_json()).unwrap();
        assert_eq!(json["crossings"], 0, "{name}");
        assert_eq!(json["doubled"], 0, "{name}");
    }
}
