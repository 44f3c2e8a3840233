//! What a picture holds, on shells small enough to count; derived.

#![expect(clippy::unwrap_used, reason = "a test may")]

mod common;

use std::collections::BTreeMap;

use common::{cube, polar, shell};
use zonewright_geometry::{
    Angle, Edge, Letter, Level, Maker, NONE, Point, Role, Shell, Sign, Tee, Vector, Zone, ZoneKind, ZoneRef,
};
use zonewright_painter::{
    Bounds, Camera, Colour, ColourBy, Faces, Item, Look, Mark, MarkKind, Paint, Palette, Picture, Projection, Scene,
    Tints, Tone, View,
};

fn seen(shell: &Shell, view: View) -> Camera {
    Camera::view(
        view,
        Projection::Perspective,
        &Bounds::of(shell).unwrap(),
        [400.0, 300.0],
    )
}

fn draw(shell: &Shell, look: &Look, tints: &Tints<'_>) -> Picture {
    Scene::exact(shell).picture(shell, &seen(shell, View::Iso), look, tints, &[])
}

fn strokes(picture: &Picture) -> Vec<(Item, f32, bool, u32)> {
    let stroke = |item: &Item| match item.paint {
        Paint::Stroke {
            width, dashed, edge, ..
        } => Some((*item, width, dashed, edge)),
        Paint::Fill { .. } => None,
    };
    picture.items.iter().filter_map(stroke).collect()
}

/// One square with its outside up, and the camera above or below.
fn square(view_from_above: bool, look: &Look, tints: &Tints<'_>) -> Colour {
    let shell = shell(&[[Vector::ZERO, Vector::X * 100.0, Vector::Y * 100.0]]);
    let mut camera = seen(&shell, View::Plan);
    camera.elevation = Angle::from_degrees(if view_from_above { 90.0 } else { -90.0 });
    let picture = Scene::exact(&shell).picture(&shell, &camera, look, tints, &[]);
    picture.items[0].colour
}

#[test]
fn each_edge_is_drawn_once_after_both_its_panels() {
    let shell = cube();
    for scene in [Scene::exact(&shell), Scene::quick(&shell)] {
        let picture = scene.picture(
            &shell,
            &seen(&shell, View::Iso),
            &Look::default(),
            &Tints::default(),
            &[],
        );
        let mut at_panel = BTreeMap::new();
        let mut at_edge = BTreeMap::new();
        for (k, item) in picture.items.iter().enumerate() {
            match item.paint {
                Paint::Fill { panel } => assert_eq!(at_panel.insert(panel, k), None),
                Paint::Stroke { edge, .. } => assert_eq!(at_edge.insert(edge, k), None),
            }
        }
        assert_eq!((at_panel.len(), at_edge.len()), (6, 12));
        for (edge, at) in at_edge {
            assert!(
                shell.edges[edge as usize]
                    .panels
                    .iter()
                    .all(|panel| at_panel[panel] < at)
            );
        }
    }
}

#[test]
fn the_back_of_a_closed_shell_can_be_left_out() {
    let shell = cube();
    let look = Look {
        cull: true,
        ..Look::default()
    };
    let picture = draw(&shell, &look, &Tints::default());
    // A cube shows three faces and their nine edges.
    assert_eq!((picture.fill_count(), strokes(&picture).len()), (3, 9));
    // From inside, and while findings are shown, nothing is left out.
    let mut inside = seen(&shell, View::Iso);
    inside.distance = 10.0;
    let scene = Scene::exact(&shell);
    let looked_through = |cull| {
        let look = Look {
            cull,
            ..Look::default()
        };
        scene.picture(&shell, &inside, &look, &Tints::default(), &[])
    };
    assert_eq!(looked_through(true), looked_through(false));
    let none = [None; 6];
    let tints = Tints {
        finding: Some(&none),
        ..Tints::default()
    };
    let finding = Look {
        colour: ColourBy::Finding,
        ..look
    };
    assert_eq!(draw(&shell, &finding, &tints).fill_count(), 6);
}

#[test]
fn faces_and_hidden_edges() {
    let shell = cube();
    let count = |faces, hidden_edges| {
        let look = Look {
            faces,
            hidden_edges,
            ..Look::default()
        };
        let picture = draw(&shell, &look, &Tints::default());
        let dashed = strokes(&picture).iter().filter(|s| s.2).count();
        (picture.fill_count(), strokes(&picture).len() - dashed, dashed)
    };
    assert_eq!(count(Faces::Shaded, false), (6, 0, 0));
    assert_eq!(count(Faces::Shaded, true), (6, 0, 12));
    assert_eq!(count(Faces::Wireframe, false), (0, 12, 0));
    assert_eq!(count(Faces::Wireframe, true), (6, 12, 12));
    assert_eq!(count(Faces::ShadedWithEdges, false), (6, 12, 0));
    assert_eq!(count(Faces::ShadedWithEdges, true), (6, 12, 12));
}

#[test]
fn rims_are_drawn_as_such() {
    let shell = shell(&[
        [Vector::ZERO, Vector::X * 100.0, Vector::Y * 100.0],
        [Vector::X * 100.0, Vector::X * 100.0, Vector::Y * 100.0],
    ]);
    let look = Look::default();
    let picture = draw(&shell, &look, &Tints::default());
    let rims = strokes(&picture)
        .iter()
        .filter(|s| s.1 == look.rim_width && s.0.colour == look.palette.rim)
        .count();
    let inner = strokes(&picture)
        .iter()
        .filter(|s| s.1 == look.edge_width && s.0.colour == look.palette.edge)
        .count();
    assert_eq!((rims, inner), (6, 1));
}

/// The light is fixed to the camera: a square straight before it is equally light from both sides, in the two sides' colours.
#[test]
fn outside_and_inside_differ_and_none_is_dark() {
    let look = Look::default();
    // Half ambient, and the light's part towards the eye: 0.8 of its length of 1.
    let light = 0.5 + 0.5 * 0.8;
    assert_eq!(
        square(true, &look, &Tints::default()),
        look.palette.outside.shade(light)
    );
    assert_eq!(
        square(false, &look, &Tints::default()),
        look.palette.inside.shade(light)
    );
    let shell = polar(12);
    for view in View::ALL {
        let picture = Scene::exact(&shell).picture(&shell, &seen(&shell, view), &look, &Tints::default(), &[]);
        for item in picture
            .items
            .iter()
            .filter(|item| matches!(item.paint, Paint::Fill { .. }))
        {
            let dark = [look.palette.outside, look.palette.inside].map(|c| c.shade(0.49));
            assert!(
                item.colour.r >= dark[1].r && item.colour.g >= dark[1].g && item.colour.b >= dark[1].b.min(dark[0].b)
            );
        }
    }
}

#[test]
fn colours_tell_what_they_are_asked_for() {
    let palette = Palette::light();
    let by = |colour| Look {
        colour,
        ..Look::default()
    };
    let light = 0.9;
    let family = Tints {
        family: Some(&[3]),
        ..Tints::default()
    };
    assert_eq!(
        square(true, &by(ColourBy::Family), &family),
        palette.categories[3].shade(light)
    );
    assert_ne!(
        square(false, &by(ColourBy::Family), &family),
        palette.categories[3].shade(light)
    );
    let finding = Tints {
        finding: Some(&[Some(Level::Stop)]),
        ..Tints::default()
    };
    assert_eq!(
        square(true, &by(ColourBy::Finding), &finding),
        palette.finding[0].shade(light)
    );
    // A level panel has no slope; course 1 is the first.
    assert_eq!(
        square(true, &by(ColourBy::Slope), &Tints::default()),
        palette.slope[0].shade(light)
    );
    assert_eq!(
        square(true, &by(ColourBy::Course), &Tints::default()),
        palette.categories[0].shade(light)
    );
    let plain = square(true, &Look::default(), &Tints::default());
    let selected = Tints {
        selected: Some(&[true]),
        ..Tints::default()
    };
    assert_ne!(square(true, &Look::default(), &selected), plain);
}

/// All edges of a cube are ridges of 90 degrees; of a cube turned inside out, valleys.
#[test]
fn folds_tell_ridges_from_valleys() {
    let look = Look {
        colour: ColourBy::Fold,
        faces: Faces::Shaded,
        ..Look::default()
    };
    let mut shell = cube();
    let colours = |shell: &Shell| -> Vec<Colour> {
        strokes(&draw(shell, &look, &Tints::default()))
            .iter()
            .map(|s| s.0.colour)
            .collect()
    };
    assert_eq!(colours(&shell), [look.palette.fold[2]; 12]);
    for panel in &mut shell.panels {
        panel.corners.reverse();
    }
    shell.edges.clear();
    common::add_edges(&mut shell);
    assert_eq!(colours(&shell), [look.palette.fold[0]; 12]);
}

/// The edges of a square take the colours of the two zones of its letters.
#[test]
fn zones_colour_their_edges() {
    let mut shell = shell(&[[Vector::ZERO, Vector::X * 100.0, Vector::Y * 50.0]]);
    for k in 0..2 {
        shell.zones.push(Zone {
            vector: Vector::X,
            name: ZoneRef::Start(k),
            kind: ZoneKind::Own,
            counts_as: k,
            reversed: false,
        });
        shell.letters.push(Letter {
            maker: Maker::Start,
            index: k,
            sign: Sign::Plus,
            at: NONE,
            zone: k,
            born: Role::Zig,
        });
    }
    let look = Look {
        colour: ColourBy::Zone,
        ..Look::default()
    };
    for (item, _, _, edge) in strokes(&draw(&shell, &look, &Tints::default())) {
        let [a, b] = shell.edges[edge as usize].ends.map(|v| shell.points[v as usize]);
        let zone = usize::from(a.0.x == b.0.x);
        assert_eq!(item.colour, look.palette.categories[zone].shade(0.8));
    }
}

/// Two panels butt against the long side of a third: the side is two edges, each drawn once, and no gap opens at the T.
#[test]
fn split_sides_are_drawn_part_by_part() {
    let (x, y) = (Vector::X * 100.0, Vector::Y * 100.0);
    let mut shell = shell(&[[Vector::ZERO, x * 2.0, y], [y, x, y], [y + x, x, y]]);
    let at = |x, y| shell.points.iter().position(|p| *p == Point::new(x, y, 0.0)).unwrap() as u32;
    let (left, tee, right) = (at(0.0, 100.0), at(100.0, 100.0), at(200.0, 100.0));
    shell.tees.push(Tee {
        panel: 0,
        side: 2,
        vertices: vec![tee],
    });
    shell
        .edges
        .retain(|e| !e.ends.iter().all(|v| [left, tee, right].contains(v)));
    shell.edges.push(Edge {
        ends: [left, tee],
        panels: [1, 0],
    });
    shell.edges.push(Edge {
        ends: [tee, right],
        panels: [2, 0],
    });
    let picture = draw(&shell, &Look::default(), &Tints::default());
    let mut edges: Vec<u32> = strokes(&picture).iter().map(|s| s.3).collect();
    edges.sort_unstable();
    assert_eq!(edges, (0..10).collect::<Vec<_>>());
    assert_eq!(picture.fill_count(), 3);
}

#[test]
fn marks_lie_on_top() {
    let shell = cube();
    let at = vec![Point::new(-500.0, 500.0, -500.0)];
    let kinds = [
        MarkKind::Dot { radius: 4.0 },
        MarkKind::Ring {
            radius: 6.0,
            width: 2.0,
        },
        MarkKind::Label {
            text: "B2".to_owned(),
            size: 14.0,
        },
    ];
    let marks: Vec<Mark> = kinds
        .into_iter()
        .map(|kind| Mark {
            at: at.clone(),
            kind,
            tone: Tone::Selection,
        })
        .collect();
    let look = Look::default();
    let picture = Scene::exact(&shell).picture(&shell, &seen(&shell, View::Iso), &look, &Tints::default(), &marks);
    // A dot is a disc on a disc of the ground's colour, a ring a closed line.
    assert_eq!(picture.items.len(), 6 + 12 + 2 + 1);
    assert!(
        picture.items[19..]
            .iter()
            .all(|item| item.colour == look.palette.selection && item.count == 24)
    );
    assert_eq!(picture.texts.len(), 1);
    let centre = seen(&shell, View::Iso).project(at[0]).unwrap().pos;
    for p in picture.points_of(&picture.items[20]) {
        assert!(((p[0] - centre[0]).hypot(p[1] - centre[1]) - 6.0).abs() < 1e-3);
    }
    // Nothing to see is nothing to draw, also when it is nowhere or behind the eye.
    let lost = Mark {
        at: vec![Point::new(f64::NAN, 0.0, 0.0), Point::new(1e7, -1e7, 1e7)],
        kind: MarkKind::Polygon,
        tone: Tone::Mark,
    };
    let picture = Scene::exact(&shell).picture(&shell, &seen(&shell, View::Iso), &look, &Tints::default(), &[lost]);
    assert_eq!(picture.items.len(), 18);
}

/// Positions never run far from the picture, however near the eye is.
#[test]
fn positions_stay_near_the_picture() {
    let shell = polar(20);
    for distance in [1.0, 30.0, 300.0, 3000.0] {
        let mut camera = seen(&shell, View::Fit);
        camera.distance = distance;
        let look = Look {
            hidden_edges: true,
            ..Look::default()
        };
        let picture = Scene::exact(&shell).picture(&shell, &camera, &look, &Tints::default(), &[]);
        assert!(
            picture
                .points
                .iter()
                .flatten()
                .all(|x| x.is_finite() && x.abs() < 400.0 * 8.0)
        );
    }
}

/// A dimension: a line, a tick at 45 degrees over each end, a text beside the middle and clear of the line.
#[test]
fn a_dimension_has_ticks_at_its_ends_and_its_text_beside_it() {
    let shell = cube();
    let camera = Camera {
        projection: Projection::Parallel,
        ..seen(&shell, View::Front)
    };
    let dimension = |at: Vec<Point>| Mark {
        at,
        kind: MarkKind::Dimension {
            text: "100 mm".to_owned(),
            size: 13.0,
        },
        tone: Tone::Selection,
    };
    let draw = |mark: Mark| Scene::exact(&shell).picture(&shell, &camera, &Look::default(), &Tints::default(), &[mark]);
    let plain = Scene::exact(&shell).picture(&shell, &camera, &Look::default(), &Tints::default(), &[]);
    let (a, b) = (shell.points[0], shell.points[0] + Vector::new(40.0, 0.0, 30.0));
    let [from, to] = [a, b].map(|p| camera.project(p).unwrap().pos);
    let picture = draw(dimension(vec![a, b]));
    let added = &picture.items[plain.items.len()..];
    assert_eq!(added.len(), 3);
    assert_eq!(picture.points_of(&added[0]), [from, to]);
    let along = [to[0] - from[0], to[1] - from[1]];
    for (item, end) in added[1..].iter().zip([from, to]) {
        let [p, q] = [picture.points_of(item)[0], picture.points_of(item)[1]];
        assert!(((p[0] + q[0]) * 0.5 - end[0]).hypot((p[1] + q[1]) * 0.5 - end[1]) < 1e-3);
        let tick = [q[0] - p[0], q[1] - p[1]];
        let cosine = (tick[0] * along[0] + tick[1] * along[1]) / (tick[0].hypot(tick[1]) * along[0].hypot(along[1]));
        assert!((cosine.abs() - 0.5_f32.sqrt()).abs() < 1e-4, "{cosine}");
    }
    let text = &picture.texts[0];
    assert_eq!(text.colour, Look::default().palette.selection);
    let middle = [(from[0] + to[0]) * 0.5, (from[1] + to[1]) * 0.5];
    let off = [text.pos[0] - middle[0], text.pos[1] - middle[1]];
    assert!(
        (off[0] * along[0] + off[1] * along[1]).abs() < 1e-2,
        "straight across the line"
    );
    assert!(off[1] < -6.5, "above it");
    // No length: the text alone. Nowhere: nothing.
    let none = draw(dimension(vec![a, a]));
    assert_eq!((none.items.len(), none.texts.len()), (plain.items.len(), 1));
    let lost = draw(dimension(vec![a, Point::new(f64::NAN, 0.0, 0.0)]));
    assert_eq!((lost.items.len(), lost.texts.len()), (plain.items.len(), 0));
    assert!(draw(dimension(Vec::new())).texts.is_empty());
}
