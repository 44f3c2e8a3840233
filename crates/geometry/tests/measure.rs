//! Measures against closed forms and published values.

#![allow(clippy::unwrap_used, reason = "a test may stop where there is nothing")]

#[path = "common/by_hand.rs"]
mod by_hand;

use std::f64::consts::{FRAC_PI_2, PI, TAU};

use by_hand::{Quad, block, joined, polar, quad, reversed};
use proptest::prelude::*;
use zonewright_geometry::{
    NONE, Shell, Vector,
    measure::{
        Borders, Range, Sum, acute_angle, angle_deficits, centroid, diagonals, dihedral, edge_length, panel_area,
        sides_agree, slope, totals,
    },
};

fn near(found: f64, expected: f64, slack: f64) {
    assert!((found - expected).abs() <= slack, "{found} is not {expected}");
}

fn scaled(quads: &[Quad], by: f64) -> Vec<Quad> {
    quads
        .iter()
        .map(|q| q.map(|p| zonewright_geometry::Point(p.0 * by)))
        .collect()
}

fn dihedrals(shell: &Shell) -> Vec<f64> {
    let edges = 0..shell.edges.len() as u32;
    edges.filter_map(|e| dihedral(shell, e)).map(f64::to_degrees).collect()
}

/// How many of the values are within 1e-8 of each expected one; every value has to be near one.
fn classes(values: &[f64], expected: &[f64]) -> Vec<usize> {
    let counts: Vec<usize> = expected
        .iter()
        .map(|e| values.iter().filter(|v| (*v - e).abs() < 1e-8).count())
        .collect();
    assert_eq!(counts.iter().sum::<usize>(), values.len(), "{values:?}");
    counts
}

/// Closed forms of a box.
#[test]
fn a_block() {
    let shell = joined(&block(2.0, 3.0, 5.0));
    let all = totals(&shell);
    assert_eq!(
        [all.panels, all.vertices, all.edges, all.open_edges, all.rims, all.zones],
        [6, 8, 12, 0, 0, 3]
    );
    assert_eq!((all.euler, all.size), (2, Vector::new(2.0, 3.0, 5.0)));
    near(all.area_mm2, 62.0, 1e-12);
    near(all.volume_mm3.unwrap(), 30.0, 1e-12);
    let lengths = all.lengths.unwrap();
    assert_eq!([lengths.least, lengths.most], [2.0, 5.0]);
    let first = |length: f64| (0..12).find(|&e| edge_length(&shell, e) == length);
    assert_eq!(
        [Some(lengths.least_at), Some(lengths.most_at)],
        [first(2.0), first(5.0)]
    );
    for range in [all.dihedrals.unwrap(), all.acute_angles.unwrap()] {
        near(range.least, FRAC_PI_2, 1e-12);
        near(range.most, FRAC_PI_2, 1e-12);
        assert_eq!([range.least_at, range.most_at], [0, 0]);
    }
    assert_eq!(classes(&dihedrals(&shell), &[90.0]), [12]);
    assert!(angle_deficits(&shell).iter().all(|d| (d - FRAC_PI_2).abs() < 1e-12));
}

/// Turned over, the volume is negative and ridges are valleys.
#[test]
fn a_block_inside_out() {
    let shell = joined(&reversed(&block(2.0, 3.0, 5.0)));
    near(totals(&shell).volume_mm3.unwrap(), -30.0, 1e-12);
    assert_eq!(classes(&dihedrals(&shell), &[270.0]), [12]);
    near(totals(&shell).dihedrals.unwrap().most, 1.5 * PI, 1e-12);
}

/// Theory, section 9, fixture F1: polar zonohedron, n = 9, t = 38 degrees, L = 300 mm.
#[test]
fn polar_nine() {
    let shell = joined(&scaled(&polar(9, 38_f64.to_radians(), 8), 300.0));
    let all = totals(&shell);
    assert_eq!([all.vertices, all.edges, all.panels, all.zones], [74, 144, 72, 9]);
    near(all.area_mm2 * 1e-6, 5.457_909_131_0, 1e-9);
    near(all.volume_mm3.unwrap() * 1e-9, 1.148_574_542_5, 1e-9);
    near(all.size.z, 1_662.285_983_4, 1e-6);
    near(all.size.x.max(all.size.y), 1_361.391_920_5, 1e-6);
    let expected = [
        154.739_329_589_6,
        165.309_399_334_9,
        160.481_627_628_9,
        152.821_152_874_1,
        148.036_310_734_7,
    ];
    assert_eq!(classes(&dihedrals(&shell), &expected), [18, 36, 36, 36, 18]);
    let range = all.dihedrals.unwrap();
    near(range.least.to_degrees(), expected[4], 1e-8);
    near(range.most.to_degrees(), expected[1], 1e-8);
    near(dihedral(&shell, range.most_at).unwrap(), range.most, 1e-12);
    let acute = all.acute_angles.unwrap();
    near(acute.least.to_degrees(), 31.270_882_697_5, 1e-8);
    near(acute.most.to_degrees(), 86.068_799_079_5, 1e-8);
    assert_eq!([acute.least_at, acute.most_at], [0, 18]);
}

/// Theory, section 9, F1: one panel a level.
#[test]
fn polar_nine_panels() {
    let shell = joined(&scaled(&polar(9, 38_f64.to_radians(), 8), 300.0));
    // Acute angle, area in square metres, slope, horizontal and slant diagonal in metres.
    let levels = [
        [
            31.270_882_697_5,
            0.046_717_633_3,
            39.741_043_204_7,
            0.161_709_330_5,
            0.577_797_622_4,
        ],
        [
            60.865_082_488_6,
            0.078_612_810_8,
            45.564_344_518_3,
            0.303_914_129_2,
            0.517_335_676_4,
        ],
        [
            86.068_799_079_5,
            0.089_788_238_3,
            57.381_943_177_9,
            0.409_462_398_6,
            0.438_566_464_9,
        ],
        [
            180.0 - 101.798_672_270_3,
            0.088_098_491_7,
            77.469_155_214_2,
            0.465_623_459_8,
            0.378_410_879_5,
        ],
    ];
    for (level, [acute, area, tilt, horizontal, slant]) in levels.into_iter().enumerate() {
        for panel in [9 * level as u32 + 4, 9 * (7 - level) as u32 + 4] {
            near(acute_angle(&shell, panel).to_degrees(), acute, 1e-8);
            near(panel_area(&shell, panel) * 1e-6, area, 1e-9);
            let [short, long] = diagonals(&shell, panel);
            near(short * 1e-3, horizontal.min(slant), 1e-9);
            near(long * 1e-3, horizontal.max(slant), 1e-9);
            let tilt = if panel < 36 { tilt } else { 180.0 - tilt };
            near(slope(&shell, panel).to_degrees(), tilt, 1e-8);
        }
    }
}

/// Theory, section 8: deficits of F1, whole and open after three and five levels.
#[test]
fn polar_nine_deficits() {
    let dome = |levels| joined(&polar(9, 38_f64.to_radians(), levels));
    let deficits = angle_deficits(&dome(8));
    near(deficits[0].to_degrees(), 78.562_055_722_4, 1e-8);
    for (ring, expected) in [(1, 1.676_682_906_5), (2, 4.390_483_200_2), (3, 9.473_843_400_1)] {
        let found = deficits
            .iter()
            .filter(|d| (d.to_degrees() - expected).abs() < 1e-8)
            .count();
        assert_eq!(found, 18, "ring {ring} and its mirror image");
    }
    near(deficits.iter().sum::<f64>(), 2.0 * TAU, 1e-10);
    for (levels, inside, border) in [(3, 133.166_550_681_9, 226.833_449_318_1), (5, 360.0, 0.0)] {
        let shell = dome(levels);
        let deficits = angle_deficits(&shell);
        let mut on_rim = vec![false; deficits.len()];
        for &v in shell.rims.iter().flat_map(|r| &r.vertices) {
            on_rim[v as usize] = true;
        }
        let sum = |rim: bool| -> f64 { deficits.iter().zip(&on_rim).filter(|d| *d.1 == rim).map(|d| d.0).sum() };
        near(sum(false).to_degrees(), inside, 1e-8);
        near(sum(true).to_degrees(), border, 1e-8);
        let all = totals(&shell);
        assert_eq!((all.volume_mm3, all.euler, all.rims, all.open_edges), (None, 1, 1, 18));
    }
}

/// Theory, sections 3 and 8: the rhombic dodecahedron with edge 1.
#[test]
fn rhombic_dodecahedron() {
    let shell = joined(&polar(4, 0.5_f64.sqrt().atan(), 3));
    let all = totals(&shell);
    assert_eq!([all.vertices, all.edges, all.panels, all.zones], [14, 24, 12, 4]);
    near(all.volume_mm3.unwrap(), 16.0 * 3_f64.sqrt() / 9.0, 1e-12);
    near(all.area_mm2, 8.0 * 2_f64.sqrt(), 1e-12);
    assert_eq!(classes(&dihedrals(&shell), &[120.0]), [24]);
    let deficits: Vec<f64> = angle_deficits(&shell).iter().map(|d| d.to_degrees()).collect();
    let count = |of: f64| deficits.iter().filter(|d| (*d - of).abs() < 1e-6).count();
    assert_eq!([count(31.586_338), count(77.884_883)], [8, 6]);
}

/// A running bond of 2 by 1 panels on a fold: two upright panels above one flat one.
fn bond() -> Shell {
    joined(&[
        quad([0.0; 3], [4.0, 0.0, 0.0], [0.0, 3.0, 0.0]),
        quad([0.0, 3.0, 0.0], [1.0, 0.0, 0.0], [0.0, 0.0, 2.0]),
        quad([1.0, 3.0, 0.0], [3.0, 0.0, 0.0], [0.0, 0.0, 2.0]),
    ])
}

/// Derived: a split side has an edge for each part, in the order of the outline.
#[test]
fn split_sides() {
    let shell = bond();
    let borders = Borders::new(&shell);
    assert_eq!(shell.tees.len(), 1);
    for panel in 0..3 {
        let outline = shell.outline(panel);
        assert_eq!(borders.edges(panel).len(), outline.len());
        for (k, &edge) in borders.edges(panel).iter().enumerate() {
            let mut ends = shell.edges[edge as usize].ends;
            let mut expected = [outline[k], outline[(k + 1) % outline.len()]];
            ends.sort_unstable();
            expected.sort_unstable();
            assert_eq!(ends, expected);
        }
    }
    assert_eq!(borders.edges(0).len(), 5);
    // The valley between floor and wall, in two parts; the walls are flat to each other.
    let (mut valleys, mut flats) = (Vec::new(), 0);
    for edge in 0..shell.edges.len() as u32 {
        match dihedral(&shell, edge) {
            Some(angle) if (angle - 1.5 * PI).abs() < 1e-12 => valleys.push(edge_length(&shell, edge)),
            Some(angle) if (angle - PI).abs() < 1e-12 => flats += 1,
            other => assert_eq!(other, None),
        }
    }
    valleys.sort_by(f64::total_cmp);
    assert_eq!((valleys, flats), (vec![1.0, 3.0], 1));
    // The T vertex has half a turn of the floor and two right angles.
    let t = shell.tees[0].vertices[0] as usize;
    let deficits = angle_deficits(&shell);
    near(deficits[t], 0.0, 1e-12);
    near(deficits.iter().sum::<f64>(), TAU, 1e-12);
    assert_eq!(totals(&shell).euler, 1);
}

/// Derived: three panels at an edge.
#[test]
fn crowded_edges() {
    let shell = joined(&[
        quad([0.0; 3], [4.0, 0.0, 0.0], [0.0, 3.0, 0.0]),
        quad([0.0; 3], [4.0, 0.0, 0.0], [0.0, 0.0, 3.0]),
        quad([0.0; 3], [4.0, 0.0, 0.0], [0.0, -3.0, 0.0]),
    ]);
    assert_eq!(shell.crowded.len(), 1);
    let edge = shell.crowded[0].edge;
    assert_eq!(dihedral(&shell, edge), None);
    assert_eq!(totals(&shell).dihedrals, None);
    let borders = Borders::new(&shell);
    for panel in 0..3 {
        assert_eq!(borders.edges(panel)[0], edge);
        assert!(!borders.edges(panel).contains(&NONE));
    }
    assert!(!shell.is_closed());
    near(angle_deficits(&shell).iter().sum::<f64>(), TAU, 1e-12);
}

/// Derived: a block with one face turned over has no volume; its edges keep their dihedrals, seen from their first panel.
#[test]
fn sides_that_disagree() {
    let mut quads = block(1.0, 1.0, 1.0);
    quads[5].reverse();
    let shell = joined(&quads);
    assert!(shell.is_closed());
    assert_eq!(shell.edges.iter().filter(|e| !sides_agree(&shell, e)).count(), 4);
    assert_eq!(totals(&shell).volume_mm3, None);
    assert_eq!(classes(&dihedrals(&shell), &[90.0]), [12]);
}

/// Two panels folded flat onto each other, and laid out flat.
#[test]
fn extreme_folds() {
    let floor = quad([0.0; 3], [4.0, 0.0, 0.0], [0.0, 3.0, 0.0]);
    let fold = |y: f64, z: f64| {
        let other = quad([0.0; 3], [1.0, y, z], [4.0, 0.0, 0.0]);
        let shell = joined(&[floor, other]);
        let range = totals(&shell).dihedrals.unwrap();
        let single = dihedrals(&shell);
        assert_eq!(
            (single.len(), range.least, range.least_at),
            (1, range.most, range.most_at)
        );
        near(single[0], range.least.to_degrees(), 1e-9);
        single[0]
    };
    for (y, z, expected) in [
        (-3.0, 0.0, 180.0),
        (0.0, -3.0, 90.0),
        (0.0, 3.0, 270.0),
        (1e-9, -1.0, 90.0),
    ] {
        near(fold(y, z), expected, 1e-6);
    }
    assert_eq!(fold(2.0, 0.0) % 360.0, 0.0);
    near(fold(2.0, -1e-9), 0.0, 1e-6);
    near(fold(2.0, 1e-9), 360.0, 1e-6);
}

/// Far from the origin the volume and the middle of a panel keep their digits.
#[test]
fn far_from_the_origin() {
    let shift = Vector::new(1048576.0, -4194304.0, 2097152.0);
    let quads: Vec<Quad> = block(0.5, 0.25, 1.0).iter().map(|q| q.map(|p| p + shift)).collect();
    let shell = joined(&quads);
    assert_eq!(totals(&shell).volume_mm3, Some(0.125));
    assert_eq!(centroid(&shell, 1).0 - shift, Vector::new(0.25, 0.125, 1.0));
}

#[test]
fn nothing_to_measure() {
    let shell = Shell::default();
    let all = totals(&shell);
    assert_eq!(all, zonewright_geometry::measure::Totals::default());
    assert_eq!(Borders::new(&shell), Borders::new(&Shell::default()));
    assert!(angle_deficits(&shell).is_empty());
    assert_eq!(Range::of(&[(3, f64::NAN)]), None);
    let range = Range::of(&[(3, f64::NAN), (5, 1.0), (6, 1.0 - 1e-15), (9, 0.5)]).unwrap();
    assert_eq!((range.least_at, range.most_at), (9, 5));
}

/// Vertices of no panel, as dropping may leave them, are not counted.
#[test]
fn bare_vertices_do_not_count() {
    let mut shell = joined(&block(1.0, 1.0, 1.0));
    shell.points.push(zonewright_geometry::Point::new(9.0, 9.0, 9.0));
    let all = totals(&shell);
    assert_eq!((all.vertices, all.euler, all.size), (8, 2, Vector::ONE));
    assert_eq!(angle_deficits(&shell)[8], 0.0);
}

/// A million tenths (as f64 has them) are 100 000 and not a digit more; and small terms outlive large ones that cancel.
#[test]
fn sums_keep_digits() {
    let mut sum = Sum::default();
    (0..1_000_000).for_each(|_| sum.add(0.1));
    assert_eq!(sum.value(), 100_000.0);
    let mut sum = Sum::default();
    [1.0, 1e100, 1.0, -1e100].into_iter().for_each(|x| sum.add(x));
    assert_eq!(sum.value(), 2.0);
}

proptest! {
    /// Derived: a panel folded out of a flat one by a planted angle.
    #[test]
    fn planted_dihedrals(angle in 0.01_f64..6.27, turn in 0.0_f64..6.0, skew in -2.0_f64..2.0, size in 0.1_f64..1e4) {
        // Turned about the x axis; the inside is below the floor.
        let rotate = |v: [f64; 3]| (glam::DQuat::from_rotation_z(turn) * Vector::from_array(v) * size).to_array();
        let along = rotate([1.0, 0.0, 0.0]);
        let floor = quad([0.0; 3], along, rotate([skew, 1.0, 0.0]));
        let other = quad([0.0; 3], rotate([-skew, angle.cos(), -angle.sin()]), along);
        let shell = joined(&[floor, other]);
        let edge = (0..7).find(|&e| shell.edges[e as usize].panels[1] != NONE).unwrap();
        prop_assert!((dihedral(&shell, edge).unwrap() - angle).abs() < 1e-9);
        prop_assert!((totals(&shell).dihedrals.unwrap().least - angle).abs() < 1e-9);
    }

    /// Derived: the volume of a parallelepiped is the determinant of its sides.
    #[test]
    fn volumes_are_determinants(m in prop::array::uniform9(-9_i32..9)) {
        let [u, v, w] = [0, 3, 6].map(|k| [m[k], m[k + 1], m[k + 2]].map(f64::from));
        let det = Vector::from_array(u).cross(Vector::from_array(v)).dot(Vector::from_array(w));
        prop_assume!(det.abs() > 0.5);
        let zero = [0.0; 3];
        let faces = [
            quad(zero, v, u), quad(w, u, v), quad(zero, u, w), quad(v, w, u), quad(zero, w, v), quad(u, v, w),
        ];
        let shell = joined(&faces);
        prop_assert!((totals(&shell).volume_mm3.unwrap() - det).abs() < 1e-9 * det.abs());
    }
}
