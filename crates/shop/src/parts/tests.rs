use super::*;
use crate::bevel::EdgeKind::{Flat, Ridge, Rim};
use crate::test_shells::{butted, fan, mirror_pair, polar};

fn parts(shell: &Shell) -> Parts {
    let parts = Parts::new(shell, &FamilyTolerance::default());
    assert_eq!(parts.check(), Vec::<String>::new());
    parts
}

fn bevels(parts: &Parts) -> Vec<f64> {
    let mut all: Vec<f64> = parts
        .panels
        .iter()
        .flat_map(|p| p.edges.iter().map(|e| e.bevel_deg))
        .collect();
    all.sort_by(f64::total_cmp);
    all.dedup_by(|a, b| (*a - *b).abs() < 1e-6);
    all
}

/// Fixture F1 (derived, checked against a hull): n 9, pitch 38, edge 300.
#[test]
fn polar_nine() {
    let parts = parts(&polar(9, 38.0, 300.0));
    assert_eq!((parts.panels.len(), parts.shell_edges), (72, 144));
    let expected = [7.3453003325, 9.7591861856, 12.6303352052, 13.5894235630, 15.9818446327];
    let found = bevels(&parts);
    assert_eq!(found.len(), expected.len());
    for (a, b) in found.iter().zip(expected) {
        assert!((a - b).abs() < 1e-9, "{a} {b}");
    }
    assert_eq!(parts.distinct_bevels, 5);
    assert_eq!(parts.families.len(), 4);
    assert!(
        parts
            .families
            .iter()
            .all(|f| f.hand == Hand::None && f.panels.len() == 18)
    );
    let acute: Vec<f64> = parts
        .families
        .iter()
        .filter_map(|f| parts.panels[f.panels[0] as usize].acute_deg)
        .collect();
    let angles = [31.2708826975, 60.8650824886, 86.0687990795, 180.0 - 101.7986722703];
    assert!(acute.iter().zip(angles).all(|(a, b)| (a - b).abs() < 1e-9), "{acute:?}");
    let areas = [46717.6333, 78612.8108, 89788.2383, 88098.4915];
    for (family, area) in parts.families.iter().zip(areas) {
        assert!((parts.panels[family.panels[0] as usize].area_mm2 - area).abs() < 1e-3);
    }
    assert_eq!(parts.panels[0].mark, "F01P01");
    assert_eq!(parts.panels[71].mark, "F08P09");
    assert_eq!(parts.panels[71].part_mark, "P1");
}

/// Derived: ceil(n/2) different bevels on a polar form.
#[test]
fn polar_forms_have_half_as_many_bevels_as_ribs() {
    for n in [5, 6, 7, 8, 10, 12, 13] {
        assert_eq!(
            parts(&polar(n, 31.0, 500.0)).distinct_bevels,
            n.div_ceil(2) as usize,
            "{n}"
        );
    }
}

/// Derived: bevel 30 all round, one part, its own mirror image.
#[test]
fn rhombic_dodecahedron() {
    let parts = parts(&polar(4, 0.5_f64.sqrt().atan().to_degrees(), 600.0));
    assert_eq!((parts.families.len(), parts.distinct_bevels), (1, 1));
    assert_eq!((parts.families[0].hand, &*parts.families[0].mark), (Hand::None, "P1"));
    for panel in &parts.panels {
        assert!((panel.acute_deg.unwrap() - 70.528_779_365_5).abs() < 1e-9);
        assert!(
            (panel.area_mm2 - 339_411.255).abs() < 1e-3,
            "600 x 600 at 70.5288: 0.339411 m2"
        );
        assert!(
            panel
                .edges
                .iter()
                .all(|e| (e.bevel_deg - 30.0).abs() < 1e-9 && e.kind == Ridge)
        );
        assert!(panel.sides_mm().all(|s| (s - 600.0).abs() < 1e-9));
    }
}

/// Derived: cube 45, rhombic icosahedron 18 and 36.
#[test]
fn other_solids() {
    let cube = parts(&polar(3, 0.5_f64.sqrt().atan().to_degrees(), 600.0));
    assert!((bevels(&cube)[0] - 45.0).abs() < 1e-9);
    assert_eq!((cube.families.len(), cube.distinct_bevels), (1, 1));
    let icosahedron = parts(&polar(5, 0.5_f64.atan().to_degrees(), 600.0));
    let found = bevels(&icosahedron);
    assert!(
        found.len() == 2 && (found[0] - 18.0).abs() < 1e-9 && (found[1] - 36.0).abs() < 1e-9,
        "{found:?}"
    );
}

#[test]
fn mirror_images_are_two_parts() {
    let shell = mirror_pair();
    let parts = parts(&shell);
    assert_eq!(parts.families.len(), 2);
    let [one, other] = [&parts.panels[0], &parts.panels[1]];
    assert_eq!(one.hand, other.hand.other());
    assert_ne!(one.hand, Hand::None);
    assert_eq!(one.part_mark[..2], other.part_mark[..2]);
    assert_eq!((&*one.mark, &*other.mark), ("F01P01", "A01P01"));
    assert_eq!(parts.families[0].twin, Some(1));
    // Turned about z by half a turn and met the other way round, each is what it was.
    let mut turned = shell.clone();
    for point in &mut turned.points {
        *point = zonewright_geometry::Point::new(-point.0.x, -point.0.y, point.0.z);
    }
    turned.panels.swap(0, 1);
    for edge in &mut turned.edges {
        edge.panels = edge
            .panels
            .map(|p| if p == zonewright_geometry::NONE { p } else { 1 - p });
    }
    let turned = Parts::new(&turned, &FamilyTolerance::default());
    assert_eq!(turned.check(), Vec::<String>::new());
    assert_eq!((turned.panels[1].hand, turned.panels[0].hand), (one.hand, other.hand));
}

#[test]
fn a_butted_side_is_split() {
    let parts = parts(&butted());
    let long = &parts.panels[0];
    assert_eq!(long.outline().collect::<Vec<_>>(), [0, 4, 1, 2, 3]);
    assert_eq!(long.sides_mm().collect::<Vec<_>>(), [300.0, 300.0, 600.0, 600.0, 600.0]);
    let corners: Vec<f64> = long.corner_angles_deg().collect();
    assert_eq!(corners, [90.0, 180.0, 90.0, 90.0, 90.0]);
    assert_eq!(long.acute_deg, Some(90.0));
    let mates: Vec<_> = long.edges.iter().map(|e| e.mate().map(|m| (m.panel, m.edge))).collect();
    assert_eq!(mates, [Some((1, 2)), Some((2, 2)), None, None, None]);
    assert_eq!(long.edges[1].mates[0].to_mm, 300.0);
    assert!(
        long.edges[..2]
            .iter()
            .all(|e| (e.bevel_deg - 15.0).abs() < 1e-9 && e.kind == Ridge)
    );
    assert!(
        long.edges[2..]
            .iter()
            .all(|e| e.kind == Rim && e.bevel_deg == 0.0 && e.mates.is_empty())
    );
    // The seam between the two small ones is flat; it is no setting.
    assert_eq!(parts.panels[1].edges[1].kind, Flat);
    assert_eq!(parts.distinct_bevels, 1);
    // The small ones are mirror images: flat edge and rim are both cut square, so they are the same part.
    assert_eq!(parts.families.len(), 2);
}

#[test]
fn three_panels_on_an_edge() {
    let parts = Parts::new(&fan(), &FamilyTolerance::default());
    assert_eq!(parts.check(), Vec::<String>::new());
    let edge = &parts.panels[0].edges[0];
    assert_eq!((edge.mates.len(), edge.mate(), edge.dihedral_deg), (2, None, None));
    assert_eq!((edge.kind, edge.bevel_deg), (Flat, 0.0));
    let angles: Vec<f64> = edge.mates.iter().map(|m| m.dihedral_deg).collect();
    assert!(
        (angles[0] - 180.0).abs() < 1e-9 && (angles[1] - 90.0).abs() < 1e-9,
        "{angles:?}"
    );
}

#[test]
fn patterns_fit_when_turned() {
    let parts = parts(&polar(9, 38.0, 300.0));
    let mut turns = 0;
    for (index, panel) in (0_u32..).zip(&parts.panels) {
        let turn = parts.pattern_turn(index);
        turns += turn;
        let pattern = &parts.panels[parts.families[panel.family as usize].panels[0] as usize];
        for (k, edge) in panel.edges.iter().enumerate() {
            let theirs = &pattern.edges[(k + turn) % 4];
            assert!((edge.bevel_deg - theirs.bevel_deg).abs() < 1e-9);
            assert!((edge.corner_deg - theirs.corner_deg).abs() < 1e-9);
        }
    }
    // The lower half stands on its head.
    assert_eq!(turns, 36 * 2);
}

#[test]
fn faults_are_found() {
    let good = parts(&polar(5, 30.0, 300.0));
    let with = |change: &dyn Fn(&mut Parts)| {
        let mut parts = good.clone();
        change(&mut parts);
        parts.check()
    };
    assert!(!with(&|p| p.panels[3].edges[1].mates = Mates::None).is_empty());
    assert!(!with(&|p| p.panels[3].edges[1].length_mm += 0.1).is_empty());
    assert!(!with(&|p| p.panels[3].mark = p.panels[4].mark).is_empty());
    assert!(!with(&|p| p.families[0].panels.truncate(1)).is_empty());
    assert!(!with(&|p| p.panels[0].family = 1).is_empty());
    assert!(
        !with(&|p| {
            if let Mates::One([mate]) = &mut p.panels[2].edges[0].mates {
                mate.dihedral_deg += 1.0;
            }
        })
        .is_empty()
    );
}

#[test]
fn nothing_gives_nothing() {
    assert_eq!(parts(&Shell::default()), Parts::default());
}

/// The same two panels seen from the other side: the ridge is a valley of the same size.
#[test]
fn the_other_side_of_a_ridge_is_a_valley() {
    let ridge = mirror_pair();
    let mut valley = ridge.clone();
    for panel in &mut valley.panels {
        panel.corners.reverse();
    }
    for edge in &mut valley.edges {
        edge.ends.reverse();
    }
    let shared = |shell: &Shell| {
        let parts = parts(shell);
        let edges = parts.panels[0].edges.iter();
        edges
            .filter(|e| !e.mates.is_empty())
            .map(|e| (e.kind, e.bevel_deg, e.dihedral_deg))
            .next()
            .unwrap()
    };
    let ((kind, bevel, _), (other, negative, dihedral)) = (shared(&ridge), shared(&valley));
    assert_eq!((kind, other), (Ridge, crate::EdgeKind::Valley));
    // Both panels slope down with a cosine of 0.9: the fold is twice that angle.
    assert!((bevel - 0.9_f64.acos().to_degrees()).abs() < 1e-9);
    assert!((negative + bevel).abs() < 1e-9 && dihedral.unwrap() > 180.0);
}
