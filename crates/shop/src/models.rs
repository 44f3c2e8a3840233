//! The surface as a mesh for other programs: OBJ with the panels as they are, STL in triangles.

use zonewright_geometry::{Point, Shell};

use crate::Parts;
use crate::text::exact;

/// The surface as Wavefront OBJ: millimetres, one object, a group for each panel named by its place mark.
///
/// Vertices are written so that the same f64 is read back; faces keep their corners after T-splits, so that the mesh
/// closes where the shell does.
#[must_use]
pub fn surface_obj(shell: &Shell, parts: &Parts) -> String {
    let (vertices, numbers) = used_vertices(shell, parts);
    let mut text = String::from("# zonewright: drawn surface of the shell, unit millimetre, z up\no shell\n");
    for point in vertices {
        let [x, y, z] = point.to_array().map(exact);
        text.push_str(&format!("v {x} {y} {z}\n"));
    }
    for panel in &parts.panels {
        text.push_str("g ");
        text.push_str(&panel.mark);
        text.push_str("\nf");
        for corner in panel.outline() {
            text.push(' ');
            text.push_str(&crate::text::count(numbers[corner as usize]));
        }
        text.push('\n');
    }
    text
}

/// The vertices that panels use, and for each vertex of the shell its number among them, from 1.
fn used_vertices(shell: &Shell, parts: &Parts) -> (Vec<Point>, Vec<usize>) {
    let mut numbers = vec![0; shell.points.len()];
    for corner in parts.panels.iter().flat_map(|p| p.outline()) {
        numbers[corner as usize] = 1;
    }
    let mut vertices = Vec::new();
    for (number, &point) in numbers.iter_mut().zip(&shell.points) {
        if *number != 0 {
            vertices.push(point);
            *number = vertices.len();
        }
    }
    (vertices, numbers)
}

/// Length of an STL header, fixed by the format.
const STL_HEADER: usize = 80;

/// The surface as binary STL: triangles, counter-clockwise from outside, normals outward, millimetres.
///
/// STL has no unit of its own; the header says millimetres. A plain panel is cut along its short diagonal; one with
/// T-vertices gets a point in its middle, so that no triangle is without area and the mesh closes where the shell does.
#[must_use]
pub fn surface_stl(shell: &Shell, parts: &Parts) -> Vec<u8> {
    let mut body = Vec::new();
    let mut triangles = 0_u32;
    for (index, panel) in (0_u32..).zip(&parts.panels) {
        let normal = shell.area_vector(index).normalize_or_zero().to_array();
        let corners: Vec<Point> = panel.outline().map(|v| shell.points[v as usize]).collect();
        let mut put = |triangle: [Point; 3]| {
            triangles += 1;
            for value in [normal].into_iter().chain(triangle.map(Point::to_array)).flatten() {
                body.extend_from_slice(&(value as f32).to_le_bytes());
            }
            body.extend_from_slice(&[0; 2]);
        };
        if let [a, b, c, d] = corners[..] {
            if a.distance(c) <= b.distance(d) {
                put([a, b, c]);
                put([a, c, d]);
            } else {
                put([a, b, d]);
                put([b, c, d]);
            }
        } else {
            let [a, _, c, _] = shell.corner_points(index);
            let middle = a + (c - a) * 0.5;
            for (k, &corner) in corners.iter().enumerate() {
                put([middle, corner, corners[(k + 1) % corners.len()]]);
            }
        }
    }
    // The header must not begin with "solid": readers take that for the text form.
    let mut bytes = vec![b' '; STL_HEADER];
    let title = b"zonewright drawn surface, unit millimetre, z up";
    bytes[..title.len()].copy_from_slice(title);
    bytes.extend_from_slice(&triangles.to_le_bytes());
    bytes.append(&mut body);
    bytes
}

#[cfg(test)]
mod tests {
    use std::collections::BTreeMap;

    use super::*;
    use crate::FamilyTolerance;
    use crate::test_shells::{butted, fan, polar};
    use zonewright_geometry::measure::totals;

    fn parts(shell: &Shell) -> Parts {
        Parts::new(shell, &FamilyTolerance::default())
    }

    #[test]
    fn obj_reads_back_to_the_same_bits() {
        let mut shell = polar(9, 38.0, 300.0);
        // A vertex that no panel uses is left out.
        shell.points.push(Point::ORIGIN);
        let text = surface_obj(&shell, &parts(&shell));
        let lines = |key: &str| -> Vec<&str> { text.lines().filter_map(|l| l.strip_prefix(key)).collect() };
        let vertices = lines("v ");
        assert_eq!(vertices.len(), 74);
        for (line, point) in vertices.iter().zip(&shell.points) {
            let read: Vec<f64> = line.split(' ').map(|n| n.parse().unwrap()).collect();
            assert_eq!(read, point.to_array());
        }
        assert_eq!(lines("g ")[..2], ["F01P01", "F01P02"]);
        for (line, panel) in lines("f ").iter().zip(&shell.panels) {
            let read: Vec<u32> = line.split(' ').map(|n| n.parse::<u32>().unwrap() - 1).collect();
            assert_eq!(read, panel.corners);
        }
        assert_eq!((lines("f ").len(), lines("o ").len()), (72, 1));
        assert!(text.starts_with("# zonewright: drawn surface of the shell, unit millimetre"));
        let butted = butted();
        assert!(surface_obj(&butted, &parts(&butted)).contains("\nf 1 5 2 3 4\n"));
    }

    struct Triangle {
        normal: [f32; 3],
        corners: [[f32; 3]; 3],
    }

    fn read_stl(bytes: &[u8]) -> Vec<Triangle> {
        assert!(!bytes.starts_with(b"solid") && bytes[..80].windows(10).any(|w| w == b"millimetre"));
        let count = u32::from_le_bytes(bytes[80..84].try_into().unwrap());
        assert_eq!(bytes.len(), 84 + 50 * count as usize);
        (bytes[84..].chunks_exact(50))
            .map(|c| {
                let value = |k: usize| f32::from_le_bytes(c[4 * k..4 * k + 4].try_into().unwrap());
                let vector = |k: usize| [value(k), value(k + 1), value(k + 2)];
                Triangle {
                    normal: vector(0),
                    corners: [vector(3), vector(6), vector(9)],
                }
            })
            .collect()
    }

    fn cross(t: &Triangle) -> [f64; 3] {
        let [a, b, c] = t.corners.map(|p| p.map(f64::from));
        let [u, v] = [b, c].map(|p| [p[0] - a[0], p[1] - a[1], p[2] - a[2]]);
        [
            u[1] * v[2] - u[2] * v[1],
            u[2] * v[0] - u[0] * v[2],
            u[0] * v[1] - u[1] * v[0],
        ]
    }

    #[test]
    fn stl_is_closed_and_has_the_volume() {
        let shell = polar(9, 38.0, 300.0);
        let triangles = read_stl(&surface_stl(&shell, &parts(&shell)));
        assert_eq!(triangles.len(), 144);
        let mut volume = 0.0;
        let mut balance: BTreeMap<[[u32; 3]; 2], i32> = BTreeMap::new();
        for t in &triangles {
            let n = cross(t);
            volume += n.iter().zip(t.corners[0]).map(|(n, p)| n * f64::from(p)).sum::<f64>() / 6.0;
            assert!(n.iter().zip(t.normal).map(|(n, m)| n * f64::from(m)).sum::<f64>() > 0.0);
            for k in 0..3 {
                let [a, b] = [t.corners[k], t.corners[(k + 1) % 3]].map(|p| p.map(f32::to_bits));
                *balance.entry([a, b]).or_default() += 1;
                *balance.entry([b, a]).or_default() -= 1;
            }
        }
        assert!(balance.values().all(|&n| n == 0));
        // Fixture F1 (derived): 1.1485745425 m3; f32 has about seven digits.
        assert!((volume / 1e9 - 1.148_574_542_5).abs() < 1e-6, "{volume}");
    }

    #[test]
    fn no_triangle_is_without_area() {
        for shell in [butted(), fan()] {
            let triangles = read_stl(&surface_stl(&shell, &parts(&shell)));
            let areas: Vec<f64> = triangles
                .iter()
                .map(|t| cross(t).iter().map(|c| c * c).sum::<f64>().sqrt() / 2.0)
                .collect();
            assert!(areas.iter().all(|&a| a > 1.0));
            assert!((areas.iter().sum::<f64>() - totals(&shell).area_mm2).abs() < 1.0);
        }
    }
}
