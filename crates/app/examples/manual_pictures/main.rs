//! Makes the pictures of the manual and of the README, by the window itself, without a display.
//!
//!     cargo run --release -p zonewright --example manual_pictures [FOLDER [NAME]]
//!
//! FOLDER is docs/manual by default; with NAME only that picture is made.

#![expect(
    clippy::unwrap_used,
    reason = "it makes pictures for the repository, and may stop where it stands"
)]

mod palette;
mod pixels;
mod scenes;

use std::path::{Path, PathBuf};

use egui_kittest::Harness;
use zonewright::{document::read_design, window::App};

use pixels::{Canvas, Textures};
use scenes::{SCENES, Scene};

fn main() {
    let mut arguments = std::env::args_os().skip(1);
    let root = Path::new(env!("CARGO_MANIFEST_DIR")).join("../..");
    let folder = arguments.next().map_or_else(|| root.join("docs/manual"), PathBuf::from);
    let only = arguments.next();
    std::fs::create_dir_all(&folder).unwrap();
    for scene in SCENES {
        if only.as_ref().is_none_or(|name| name == scene.name) {
            let canvas = make(&root, scene);
            save(&folder.join(format!("{}.png", scene.name)), &canvas);
        }
    }
}

/// Opens the window on the scene's design, does what the scene does, and draws it.
fn make(root: &Path, scene: &Scene) -> Canvas {
    let design = read_design(&root.join("assets/designs").join(scene.design)).unwrap();
    let textures = Textures::default();
    let mut harness: Harness<'_, App> = Harness::builder()
        .with_size(scene.size)
        .with_max_steps(40)
        .renderer(textures.clone())
        .build_eframe(move |cc| App::new_headless(&cc.egui_ctx, design));
    harness.run();
    (scene.act)(&mut harness);
    harness.run();
    let size = scene.size.map(|side| side as usize);
    pixels::draw(&harness.ctx, harness.output(), &textures, size, 1.0)
}

fn save(path: &Path, canvas: &Canvas) {
    let file = std::fs::File::create(path).unwrap();
    let mut encoder = png::Encoder::new(file, canvas.size[0] as u32, canvas.size[1] as u32);
    let (palette, indices) = palette::of(canvas);
    encoder.set_color(png::ColorType::Indexed);
    encoder.set_palette(palette);
    // Neighbouring indices say nothing about each other, so that filters between pixels only cost.
    encoder.set_filter(png::Filter::NoFilter);
    encoder.set_deflate_compression(png::DeflateCompression::Level(9));
    encoder.write_header().unwrap().write_image_data(&indices).unwrap();
}
