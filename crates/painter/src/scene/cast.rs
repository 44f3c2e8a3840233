//! What a ray meets, found with the tree.

use zonewright_geometry::{NONE, Point, Shell};

use super::{Node, Scene};
use crate::Ray;

impl Scene {
    /// Whether a ray meets a piece between two places along it, both in millimetres from its beginning.
    ///
    /// Nothing is met in a quick scene, which has no tree. What only touches a piece's border may go either way.
    pub(crate) fn meets(&self, shell: &Shell, ray: &Ray, between: [f64; 2]) -> bool {
        let mut stack = Vec::new();
        if !self.nodes.is_empty() && between[0] < between[1] {
            stack.push((0, between));
        }
        while let Some((id, [from, to])) = stack.pop() {
            if id == NONE {
                continue;
            }
            let node = &self.nodes[id as usize];
            let [at_from, at_to] = [from, to].map(|t| node.normal.dot(ray.from.0 + ray.along * t) - node.offset);
            let [before, behind] = node.children;
            if at_from > 0.0 && at_to > 0.0 {
                stack.push((before, [from, to]));
            } else if at_from < 0.0 && at_to < 0.0 {
                stack.push((behind, [from, to]));
            } else if at_from == at_to {
                // The ray runs in the plane.
                stack.push((before, [from, to]));
                stack.push((behind, [from, to]));
            } else {
                let through = from + (to - from) * at_from / (at_from - at_to);
                if self.any_at(shell, node, ray.from + ray.along * through) {
                    return true;
                }
                let [first, last] = if at_from > at_to {
                    [before, behind]
                } else {
                    [behind, before]
                };
                stack.push((first, [from, through]));
                stack.push((last, [through, to]));
            }
        }
        false
    }

    /// Whether one of a node's own pieces covers a point of its plane.
    fn any_at(&self, shell: &Shell, node: &Node, point: Point) -> bool {
        (node.first..node.first + node.count).any(|piece| {
            let piece = piece as usize;
            let normal = self.planes[self.piece_panel[piece] as usize].normal;
            let corners = &self.corners[self.first[piece] as usize..self.first[piece + 1] as usize];
            corners.iter().enumerate().all(|(k, &a)| {
                let next = corners[(k + 1) % corners.len()];
                let [a, b] = [a, next].map(|v| self.vertex(shell, v));
                (b - a).cross(point - a).dot(normal) >= 0.0
            })
        })
    }

    /// A vertex of the shell, or one of those where panels are divided.
    pub(crate) fn vertex(&self, shell: &Shell, vertex: u32) -> Point {
        let vertex = vertex as usize;
        let own = shell.points.len();
        if vertex < own {
            shell.points[vertex]
        } else {
            Point(self.extra[vertex - own])
        }
    }
}
