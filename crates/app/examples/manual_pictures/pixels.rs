//! Pixels of the window, without a display and without a driver: the triangles that the window is made of, filled one by one.

use std::{cell::RefCell, collections::BTreeMap, rc::Rc};

use egui::{
    Color32, FullOutput, ImageData, Pos2, TextureId, TexturesDelta,
    epaint::{ClippedPrimitive, ImageDelta, Primitive, Vertex},
};
use egui_kittest::TestRenderer;

/// An image that triangles take their colours from.
#[derive(Clone, Default)]
struct Texture {
    size: [usize; 2],
    colours: Vec<Color32>,
}

/// All textures that the window has made so far; one owner is the harness, the other draws.
#[derive(Clone, Default)]
pub(crate) struct Textures(Rc<RefCell<BTreeMap<String, Texture>>>);

fn key(id: TextureId) -> String {
    format!("{id:?}")
}

impl TestRenderer for Textures {
    fn handle_delta(&mut self, delta: &mut TexturesDelta) {
        let mut all = self.0.borrow_mut();
        // Each texture has its changes in their order; textures do not touch each other, so their order does not matter.
        #[expect(clippy::iter_over_hash_type, reason = "the order of textures does not matter")]
        for (id, changes) in std::mem::take(&mut delta.set) {
            let texture = all.entry(key(id)).or_default();
            for change in changes {
                change_texture(texture, &change);
            }
        }
        #[expect(clippy::iter_over_hash_type, reason = "the order of textures does not matter")]
        for id in std::mem::take(&mut delta.free) {
            all.remove(&key(id));
        }
    }
}

fn change_texture(texture: &mut Texture, change: &ImageDelta) {
    let ImageData::Color(image) = &change.image;
    let Some([left, top]) = change.pos else {
        texture.size = image.size;
        texture.colours.clone_from(&image.pixels);
        return;
    };
    for (row, line) in image.pixels.chunks(image.size[0]).enumerate() {
        let at = (top + row) * texture.size[0] + left;
        texture.colours[at..at + line.len()].copy_from_slice(line);
    }
}

/// A canvas of opaque pixels, rows from the top.
pub(crate) struct Canvas {
    pub(crate) size: [usize; 2],
    pub(crate) pixels: Vec<Color32>,
}

/// Draws what the window put out last; `scale` is pixels a point.
pub(crate) fn draw(
    ctx: &egui::Context,
    output: &FullOutput,
    textures: &Textures,
    size: [usize; 2],
    scale: f32,
) -> Canvas {
    let mut canvas = Canvas {
        size,
        pixels: vec![Color32::BLACK; size[0] * size[1]],
    };
    let textures = textures.0.borrow();
    for ClippedPrimitive { clip_rect, primitive } in ctx.tessellate(output.shapes.clone(), scale) {
        let Primitive::Mesh(mesh) = primitive else { continue };
        let Some(texture) = textures.get(&key(mesh.texture_id)) else {
            continue;
        };
        let clip = [
            [clip_rect.min.x, clip_rect.max.x].map(|x| (x * scale).round().clamp(0.0, size[0] as f32) as usize),
            [clip_rect.min.y, clip_rect.max.y].map(|y| (y * scale).round().clamp(0.0, size[1] as f32) as usize),
        ];
        for corners in mesh.indices.chunks_exact(3) {
            let triangle = [0, 1, 2].map(|k| mesh.vertices[corners[k] as usize]);
            canvas.fill(triangle, texture, clip, scale);
        }
    }
    canvas
}

impl Canvas {
    /// Fills a triangle. A pixel belongs to it when its middle does; one on a common side belongs to the triangle whose top or left side that is.
    fn fill(&mut self, mut triangle: [Vertex; 3], texture: &Texture, clip: [[usize; 2]; 2], scale: f32) {
        let place = |v: &Vertex| v.pos * scale;
        let whole = cross(place(&triangle[0]), place(&triangle[1]), place(&triangle[2]));
        if whole == 0.0 {
            return;
        }
        if whole < 0.0 {
            triangle.swap(1, 2);
        }
        let whole = whole.abs();
        let [a, b, c] = [0, 1, 2].map(|k| place(&triangle[k]));
        let reach = |of: fn(&Pos2) -> f32, [from, to]: [usize; 2]| {
            let (least, most) = [a, b, c]
                .iter()
                .map(of)
                .fold((f32::MAX, f32::MIN), |(l, m), v| (l.min(v), m.max(v)));
            let least = (least.floor().max(0.0) as usize).max(from);
            let most = (most.ceil().max(0.0) as usize).min(to);
            least..most
        };
        let sides = [(b, c), (c, a), (a, b)];
        for y in reach(|p| p.y, clip[1]) {
            for x in reach(|p| p.x, clip[0]) {
                let at = Pos2::new(x as f32 + 0.5, y as f32 + 0.5);
                let parts = sides.map(|(from, to)| cross(from, to, at));
                let inside = parts.iter().zip(sides).all(|(part, (from, to))| {
                    let owns = to.y < from.y || (to.y == from.y && from.x < to.x);
                    *part > 0.0 || (*part == 0.0 && owns)
                });
                if inside {
                    let shares = parts.map(|part| part / whole);
                    self.blend(x, y, colour(&triangle, shares, texture));
                }
            }
        }
    }

    /// Lays a colour, whose parts are already multiplied with its alpha, over a pixel.
    fn blend(&mut self, x: usize, y: usize, [r, g, b, a]: [f32; 4]) {
        let pixel = &mut self.pixels[y * self.size[0] + x];
        let mix = |over: f32, under: u8| (over + f32::from(under) * (1.0 - a / 255.0)).round().clamp(0.0, 255.0) as u8;
        *pixel = Color32::from_rgb(mix(r, pixel.r()), mix(g, pixel.g()), mix(b, pixel.b()));
    }
}

/// Twice the area of the triangle, positive where it turns to the right on the screen, whose y goes down.
fn cross(a: Pos2, b: Pos2, c: Pos2) -> f32 {
    (b.x - a.x) * (c.y - a.y) - (b.y - a.y) * (c.x - a.x)
}

/// The colour at a place in a triangle: that of its corners times that of the texture, blended between the four nearest texels.
fn colour(triangle: &[Vertex; 3], shares: [f32; 3], texture: &Texture) -> [f32; 4] {
    let mut own = [0.0; 4];
    let mut uv = [0.0; 2];
    for (vertex, share) in triangle.iter().zip(shares) {
        for (part, of) in own.iter_mut().zip(vertex.color.to_array()) {
            *part += f32::from(of) * share;
        }
        uv[0] += vertex.uv.x * share;
        uv[1] += vertex.uv.y * share;
    }
    let [width, height] = texture.size;
    let (u, v) = (uv[0] * width as f32 - 0.5, uv[1] * height as f32 - 0.5);
    let texel = |x: f32, y: f32| {
        let x = x.clamp(0.0, (width - 1) as f32) as usize;
        let y = y.clamp(0.0, (height - 1) as f32) as usize;
        texture.colours[y * width + x].to_array().map(f32::from)
    };
    let (left, top) = (u.floor(), v.floor());
    let (right_share, low_share) = (u - left, v - top);
    let four = [
        (texel(left, top), (1.0 - right_share) * (1.0 - low_share)),
        (texel(left + 1.0, top), right_share * (1.0 - low_share)),
        (texel(left, top + 1.0), (1.0 - right_share) * low_share),
        (texel(left + 1.0, top + 1.0), right_share * low_share),
    ];
    let mut result = [0.0; 4];
    for (k, part) in result.iter_mut().enumerate() {
        let sampled: f32 = four.iter().map(|(texel, share)| texel[k] * share).sum();
        *part = own[k] * sampled / 255.0;
    }
    result
}
