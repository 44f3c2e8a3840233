//! Turning a still shell of 100,000 panels: the picture in depth order beside the same panels emitted in any order.
//!
//! The baseline projects each vertex once, shades each panel and pushes the same kinds of item into the same kinds of array; it
//! orders nothing and divides nothing. Building the order is measured apart.

#[path = "../tests/common/mod.rs"]
mod common;

use divan::{Bencher, black_box};
use zonewright_geometry::{NONE, Shell, Vector};
use zonewright_painter::{Bounds, Camera, Colour, Faces, Item, Look, Paint, Picture, Projection, Scene, Tints, View};

const SHELLS: [&str; 3] = ["polar", "waves", "helicoid"];
const SIZE: [f32; 2] = [1280.0, 800.0];

fn shell(name: &str) -> Shell {
    match name {
        "polar" => common::polar(317),
        "waves" => common::turned_waves(316),
        _ => common::helicoid(1000, 100),
    }
}

fn camera(shell: &Shell) -> Camera {
    let bounds = Bounds::of(shell).expect("the shell has panels");
    Camera::view(View::Fit, Projection::Perspective, &bounds, SIZE)
}

fn unordered(shell: &Shell, camera: &Camera, edges: bool, picture: &mut Picture) {
    picture.items.clear();
    picture.points.clear();
    let lens = camera.lens();
    let places: Vec<[f32; 2]> = shell
        .points
        .iter()
        .map(|&p| lens.project(p).map_or([0.0; 2], |p| p.pos))
        .collect();
    let light = Vector::new(0.3, 0.4, 0.86);
    for (panel, p) in (0..).zip(&shell.panels) {
        let normal = shell.area_vector(panel).normalize();
        let outside = lens.side(normal, normal.dot(shell.points[p.corners[0] as usize].0)) > 0.0;
        let colour = Colour::hex(if outside { 0xE9_DFC7 } else { 0x8F_A9BF });
        let first = picture.points.len() as u32;
        for v in p.corners {
            picture.points.push(places[v as usize]);
        }
        picture.items.push(Item {
            first,
            count: 4,
            colour: colour.shade((0.5 + 0.5 * normal.dot(light).abs()) as f32),
            paint: Paint::Fill { panel },
        });
    }
    for (edge, e) in (0..).zip(&shell.edges).filter(|_| edges) {
        let first = picture.points.len() as u32;
        for v in e.ends {
            picture.points.push(places[v as usize]);
        }
        picture.items.push(Item {
            first,
            count: 2,
            colour: Colour::hex(if e.panels[1] == NONE { 0 } else { 0x33_3333 }),
            paint: Paint::Stroke {
                width: 1.2,
                dashed: false,
                closed: false,
                edge,
            },
        });
    }
}

fn turn(bencher: Bencher<'_, '_>, name: &str, faces: Option<Faces>, edges: bool) {
    let shell = shell(name);
    let scene = Scene::exact(&shell);
    let mut camera = camera(&shell);
    let mut picture = Picture::default();
    let mut look = Look::default();
    bencher.bench_local(|| {
        camera.orbit(3.0, 0.2);
        match faces {
            None => unordered(&shell, &camera, edges, &mut picture),
            Some(faces) => {
                look.faces = faces;
                scene.picture_into(&shell, &camera, &look, &Tints::default(), &[], &mut picture);
            }
        }
        black_box(picture.items.len())
    });
}

#[divan::bench(args = SHELLS)]
fn fills_baseline(bencher: Bencher<'_, '_>, name: &str) {
    turn(bencher, name, None, false);
}

#[divan::bench(args = SHELLS)]
fn fills_in_order(bencher: Bencher<'_, '_>, name: &str) {
    turn(bencher, name, Some(Faces::Shaded), false);
}

#[divan::bench(args = SHELLS)]
fn with_edges_baseline(bencher: Bencher<'_, '_>, name: &str) {
    turn(bencher, name, None, true);
}

#[divan::bench(args = SHELLS)]
fn with_edges_in_order(bencher: Bencher<'_, '_>, name: &str) {
    turn(bencher, name, Some(Faces::ShadedWithEdges), true);
}

#[divan::bench(args = SHELLS, sample_count = 5, sample_size = 1)]
fn build_exact(bencher: Bencher<'_, '_>, name: &str) {
    let shell = shell(name);
    bencher.bench_local(|| Scene::exact(black_box(&shell)).piece_count());
}

#[divan::bench(args = SHELLS, sample_count = 10, sample_size = 1)]
fn build_quick(bencher: Bencher<'_, '_>, name: &str) {
    let shell = shell(name);
    bencher.bench_local(|| Scene::quick(black_box(&shell)).piece_count());
}

/// A frame while dragging: the scene is built and drawn each time.
#[divan::bench(args = SHELLS)]
fn quick_frame(bencher: Bencher<'_, '_>, name: &str) {
    let shell = shell(name);
    let camera = camera(&shell);
    let mut picture = Picture::default();
    bencher.bench_local(|| {
        let scene = Scene::quick(&shell);
        scene.picture_into(&shell, &camera, &Look::default(), &Tints::default(), &[], &mut picture);
        black_box(picture.items.len())
    });
}

fn main() {
    for name in SHELLS {
        let shell = shell(name);
        let (panels, pieces) = (shell.panels.len(), Scene::exact(&shell).piece_count());
        #[expect(clippy::print_stdout, reason = "a bench tells what it measures")]
        {
            println!("{name}: {panels} panels in {pieces} pieces");
        }
    }
    divan::main();
}
