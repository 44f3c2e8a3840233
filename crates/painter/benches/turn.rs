//! Turning a still shell of 100,000 panels: the picture in depth order beside the same panels emitted in any order.
//!
//! The baseline projects each vertex once, shades each panel and pushes the same kinds of item into the same kinds of array; it
//! orders nothing and divides nothing. Building the order is measured apart.
//!
//! `cargo bench -p zonewright-painter --bench turn`

#![expect(clippy::print_stdout, reason = "a bench prints its figures")]

#[path = "../tests/common/mod.rs"]
mod common;

use std::{hint::black_box, time::Instant};

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

/// Median seconds of a frame while the camera turns: in depth order, or the baseline.
fn frame(shell: &Shell, scene: &Scene, look: &Look, edges: bool, ordered: bool, camera: &mut Camera) -> f64 {
    let mut picture = Picture::default();
    median(41, || {
        camera.orbit(3.0, 0.2);
        if ordered {
            scene.picture_into(shell, camera, look, &Tints::default(), &[], &mut picture);
        } else {
            unordered(shell, camera, edges, &mut picture);
        }
        black_box(picture.items.len());
    })
}

fn median(runs: usize, mut work: impl FnMut()) -> f64 {
    let mut times: Vec<f64> = (0..runs)
        .map(|_| {
            let start = Instant::now();
            work();
            start.elapsed().as_secs_f64()
        })
        .collect();
    times.sort_by(f64::total_cmp);
    times[runs / 2]
}

fn main() {
    for name in SHELLS {
        let shell = shell(name);
        let scene = Scene::exact(&shell);
        let panels = shell.panels.len();
        println!("{name}: {panels} panels in {} pieces", scene.piece_count());
        for (what, faces, edges) in [
            ("fills", Faces::Shaded, false),
            ("fills and edges", Faces::ShadedWithEdges, true),
        ] {
            let look = Look {
                faces,
                ..Look::default()
            };
            let mut camera = camera(&shell);
            let baseline = frame(&shell, &scene, &look, edges, false, &mut camera);
            let ordered = frame(&shell, &scene, &look, edges, true, &mut camera);
            println!(
                "  turning, {what:<16} in order {:6.1} ms  baseline {:6.1} ms  ratio {:5.2}",
                ordered * 1e3,
                baseline * 1e3,
                ordered / baseline
            );
        }
        let exact = median(5, || {
            black_box(Scene::exact(&shell).piece_count());
        });
        let quick = median(11, || {
            black_box(Scene::quick(&shell).piece_count());
        });
        println!(
            "  building the exact order {:.0} ms, the quick one {:.1} ms",
            exact * 1e3,
            quick * 1e3
        );
    }
}
