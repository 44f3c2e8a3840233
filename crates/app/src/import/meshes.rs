//! Triangles and lines from OBJ and STL.

use std::collections::HashMap;

use zonewright_geometry::Point;

use super::drawn::index;
use crate::document::{Drawn, MAX_BACKDROP_PARTS, MAX_BACKDROP_POINTS};

/// Points, each kept once; two are the same when all their digits are.
#[derive(Default)]
struct Welded {
    drawn: Drawn,
    seen: HashMap<[u64; 3], u32>,
}

impl Welded {
    fn point(&mut self, place: [f64; 3]) -> u32 {
        // Minus zero is zero.
        let key = place.map(|c| (c + 0.0).to_bits());
        let next = index(self.drawn.points.len());
        let at = *self.seen.entry(key).or_insert(next);
        if at == next {
            let [x, y, z] = place;
            self.drawn.points.push(Point::new(x, y, z));
        }
        at
    }

    /// A convex polygon as a fan of triangles; those without area through repeated corners are left out.
    fn face(&mut self, corners: &[u32]) {
        for k in 1..corners.len().saturating_sub(1) {
            let [a, b, c] = [corners[0], corners[k], corners[k + 1]];
            if a != b && b != c && c != a {
                self.drawn.triangles.push([a, b, c]);
            }
        }
    }

    /// A straight part of a line; it goes on with the last line where it begins at its end.
    fn part(&mut self, from: u32, to: u32) {
        if from == to {
            return;
        }
        match self.drawn.lines.last_mut() {
            Some(line) if line.last() == Some(&from) => line.push(to),
            _ => self.drawn.lines.push(vec![from, to]),
        }
    }

    fn bounded(&self) -> Result<(), String> {
        let parts = self.drawn.triangles.len().max(self.drawn.segments());
        if self.drawn.points.len() > MAX_BACKDROP_POINTS || parts > MAX_BACKDROP_PARTS {
            return Err(format!(
                "it has more than {MAX_BACKDROP_POINTS} points or {MAX_BACKDROP_PARTS} triangles, the most that a design keeps; export it coarser"
            ));
        }
        Ok(())
    }
}

/// Reads an OBJ: `v`, `f` and `l`, relative indices included. Materials, normals and textures do not matter.
pub(super) fn obj(bytes: &[u8]) -> Result<Drawn, String> {
    let text = std::str::from_utf8(bytes).map_err(|_| "it is not text in UTF-8; export it as OBJ again".to_owned())?;
    let options = tobj::LoadOptions {
        ignore_points: true,
        ..tobj::LoadOptions::default()
    };
    let mut reader = std::io::Cursor::new(shapes_only(text));
    let (models, _) = tobj::load_obj_buf(&mut reader, &options, |_| Ok(Default::default()))
        .map_err(|error| format!("it is no OBJ: {error}; export it as OBJ again"))?;
    let mut welded = Welded::default();
    for model in models {
        let mesh = model.mesh;
        let corners: Vec<u32> = mesh
            .positions
            .as_chunks::<3>()
            .0
            .iter()
            .map(|p| welded.point(*p))
            .collect();
        let named: Vec<u32> = mesh
            .indices
            .iter()
            .filter_map(|v| corners.get(*v as usize).copied())
            .collect();
        let threes = vec![3; named.len() / 3];
        // Without a list of arities all faces are triangles.
        let arities = if mesh.face_arities.is_empty() {
            &threes
        } else {
            &mesh.face_arities
        };
        let mut rest = &named[..];
        for arity in arities {
            let Some((face, others)) = rest.split_at_checked(*arity as usize) else {
                break;
            };
            rest = others;
            match face {
                [from, to] => welded.part(*from, *to),
                face => welded.face(face),
            }
        }
        welded.bounded()?;
    }
    Ok(welded.drawn)
}

/// The lines of an OBJ that say where something is. A line through many points becomes lines of two: the reader takes
/// any longer one for a face.
fn shapes_only(text: &str) -> String {
    let joined = text.replace("\\\r\n", " ").replace("\\\n", " ");
    let mut kept = String::with_capacity(joined.len());
    for line in joined.lines() {
        let mut words = line.split('#').next().unwrap_or_default().split_whitespace();
        match words.next() {
            // Colours behind the three coordinates do not matter.
            Some("v") => {
                kept.push('v');
                for word in words.take(3) {
                    kept.push(' ');
                    kept.push_str(word);
                }
                kept.push('\n');
            }
            // Only the place of a corner, not its texture or normal.
            Some("f") => {
                kept.push('f');
                for word in words {
                    kept.push(' ');
                    kept.push_str(word.split('/').next().unwrap_or_default());
                }
                kept.push('\n');
            }
            Some("l") => {
                let names: Vec<&str> = words.map(|w| w.split('/').next().unwrap_or_default()).collect();
                for two in names.windows(2) {
                    kept.push_str("l ");
                    kept.push_str(&two.join(" "));
                    kept.push('\n');
                }
            }
            _ => {}
        }
    }
    kept
}

/// Bytes before the triangles of a binary STL, and bytes of each triangle.
const BINARY: (usize, usize) = (84, 50);

/// Reads an STL, in text or binary.
pub(super) fn stl(bytes: &[u8]) -> Result<Drawn, String> {
    let mut bytes = bytes.to_vec();
    let count = bytes
        .get(80..84)
        .and_then(|four| <[u8; 4]>::try_from(four).ok())
        .map(u32::from_le_bytes);
    // Some programs begin a binary one with the word that marks a text: its length tells.
    let is_binary = count.is_some_and(|count| bytes.len() == BINARY.0 + count as usize * BINARY.1);
    if is_binary {
        bytes[..80].fill(0);
    }
    let wrong = |error: std::io::Error| format!("it is no STL: {error}; export it as STL again");
    let mut reader = std::io::Cursor::new(bytes);
    let mut welded = Welded::default();
    for triangle in stl_io::create_stl_reader(&mut reader).map_err(wrong)? {
        let corners = triangle
            .map_err(wrong)?
            .vertices
            .map(|v| welded.point([0, 1, 2].map(|axis| f64::from(v[axis]))));
        welded.face(&corners);
        welded.bounded()?;
    }
    Ok(welded.drawn)
}
