//! From the mesh as it grew to the finished shell.

use super::{
    Growing,
    front::Front,
    mesh::{Mesh, as_index},
    place::Placed,
    rims,
};
use crate::{Code, Finding, FinishAct, FirstWord, NONE, PanelName, Pinch, Place, Point, Shell, Side, Unit, measure};

/// Settles everything that growth left open, and places the shell.
pub(super) fn finish(
    growing: Growing<'_>,
    fronts: &[Front; 2],
    word: &FirstWord,
    closing_gap: Option<f64>,
    join_mm: f64,
    findings: &mut Vec<Finding>,
) -> Result<Shell, Finding> {
    let Growing {
        shape,
        alphabet,
        mut mesh,
        lift,
        ..
    } = growing;
    let front_points: [Vec<Point>; 2] = [0, 1].map(|k| {
        let nodes = &fronts[k].nodes;
        nodes.iter().map(|v| mesh.points[*v as usize]).collect()
    });
    mesh.settle_links();
    for finish in shape.finish.iter().filter(|f| f.on) {
        let FinishAct::Drop(names) = &finish.act;
        let lost = drop_panels(&mut mesh, names, |name| alphabet.find(name));
        if 0 < lost {
            let place = Place::Step(finish.id);
            findings.push(Finding::new(Code::NameLost, place).with(lost as f64, None, Unit::Count));
        }
    }
    mesh.split_seams(shape.tolerances.join_mm);
    let mut border = mesh.rim_edges();
    if mesh.join_rims(&border, join_mm, findings) {
        border = mesh.rim_edges();
    }
    let mut pinches = mesh.part_fans(&border);
    compact(&mut mesh, &mut pinches);
    let (lowest, finite) = lowest(&mesh.points);
    if !finite {
        return Err(Finding::new(Code::NotFinite, Place::Design));
    }
    let lift = if word.grounded { lift.unwrap_or(-lowest) } else { 0.0 };
    let placed = Placed::new(&shape.placement, lift);
    if !placed.is_nothing() {
        for point in &mut mesh.points {
            *point = placed.apply(*point);
        }
    }
    let states = [0, 1].map(|k| fronts[k].state(front_points[k].iter().map(|p| placed.apply(*p)).collect()));
    let shell = Shell {
        rims: rims::trace(&mesh.edges),
        points: mesh.points,
        panels: mesh.panels,
        edges: mesh.edges,
        tees: mesh.tees,
        crowded: mesh.crowded,
        seams: mesh.seams,
        pinches,
        zones: alphabet.zones,
        letters: alphabet.letters,
        courses: mesh.courses,
        fronts: states,
        closing_gap,
        lift_mm: lift,
    };
    report(&shell, findings);
    Ok(shell)
}

/// The lowest z, and whether all coordinates are finite: one that is not makes the sum so.
fn lowest(points: &[Point]) -> (f64, bool) {
    let start = (f64::MAX, crate::Vector::ZERO);
    let (low, sum) = points.iter().fold(start, |(low, sum), p| {
        (if p.0.z < low { p.0.z } else { low }, sum + p.0)
    });
    (if points.is_empty() { 0.0 } else { low }, sum.is_finite())
}

fn report(shell: &Shell, findings: &mut Vec<Finding>) {
    for crowded in &shell.crowded {
        let panels = (2 + crowded.more.len()) as f64;
        let place = Place::Edges(vec![crowded.edge]);
        findings.push(Finding::new(Code::CrowdedEdge, place).with(panels, Some(2.0), Unit::Count));
    }
    if !shell.pinches.is_empty() {
        let vertices = shell.pinches.iter().map(|p| p.vertices[0]).collect();
        let count = shell.pinches.len() as f64;
        findings.push(Finding::new(Code::Pinch, Place::Vertices(vertices)).with(count, None, Unit::Count));
    }
    if shell.is_closed()
        && let Some(volume) = measure::totals(shell).volume_mm3.filter(|v| *v < 0.0)
    {
        let finding = Finding::new(Code::InsideOut, Place::Design);
        findings.push(finding.with(volume * 1e-9, Some(0.0), Unit::CubicMetres));
    }
}

/// Takes named panels out; returns how many names found none.
fn drop_panels(mesh: &mut Mesh, names: &[PanelName], find: impl Fn(&crate::LetterName) -> Option<u32>) -> usize {
    let mut gone = vec![false; mesh.panels.len()];
    let mut lost = 0;
    for name in names {
        let letters = find(&name.letters.0).zip(find(&name.letters.1));
        let wanted = letters.and_then(|(a, b)| {
            let same = |p: &crate::Panel| {
                (p.course < 0) == (name.side == Side::Aft) && (p.letters == [a, b] || p.letters == [b, a])
            };
            (0..mesh.panels.len())
                .filter(|k| same(&mesh.panels[*k]))
                .nth(name.turn as usize)
        });
        match wanted {
            Some(panel) => gone[panel] = true,
            None => lost += 1,
        }
    }
    if !gone.contains(&true) {
        return lost;
    }
    mesh.gaps = true;
    let mut kept = 0_u32;
    let renumbered: Vec<u32> = gone
        .iter()
        .map(|gone| {
            let number = if *gone { NONE } else { kept };
            kept += u32::from(!gone);
            number
        })
        .collect();
    for (panel, _) in mesh.panels.iter().zip(&gone).filter(|(_, gone)| **gone) {
        mesh.suspects.extend(panel.corners);
        for course in mesh.courses.iter_mut().filter(|c| c.number == panel.course) {
            course.panels -= 1;
        }
    }
    mesh.courses.retain(|c| 0 < c.panels);
    let mut at = 0;
    mesh.panels.retain(|_| {
        at += 1;
        !gone[at - 1]
    });
    let number = |p: u32| if p == NONE { NONE } else { renumbered[p as usize] };
    for edge in &mut mesh.edges {
        edge.panels = edge.panels.map(number);
    }
    let crowded = core::mem::take(&mut mesh.crowded);
    for mut crowd in crowded {
        crowd.more = crowd.more.iter().map(|p| number(*p)).filter(|p| *p != NONE).collect();
        // A panel beyond the second moves up when a place comes free.
        while let Some(slot) = mesh.edges[crowd.edge as usize].panels.iter().position(|p| *p == NONE) {
            match crowd.more.pop() {
                Some(panel) => mesh.edges[crowd.edge as usize].panels[slot] = panel,
                None => break,
            }
        }
        if !crowd.more.is_empty() {
            mesh.crowded.push(crowd);
        }
    }
    lost
}

/// Leaves out vertices and edges that border no panel.
fn compact(mesh: &mut Mesh, pinches: &mut [Pinch]) {
    // Every vertex and edge is made with a panel, but for the loose ones.
    if !mesh.gaps && mesh.loose.iter().all(|e| mesh.edges[*e as usize].panels != [NONE; 2]) {
        return;
    }
    let mut used = vec![false; mesh.points.len()];
    for corner in mesh.panels.iter().flat_map(|p| p.corners) {
        used[corner as usize] = true;
    }
    for vertex in mesh.tees.iter().flat_map(|t| &t.vertices) {
        used[*vertex as usize] = true;
    }
    // A panel names only vertices that were there when it was made, and makes at most one: vertex v is named by no panel before number
    // v less the vertices made without a panel, and by no edge before twice that. Seams and parted fans do not keep to this.
    let without_panel = mesh.points.len().saturating_sub(mesh.panels.len());
    let in_order = mesh.tees.is_empty() && pinches.is_empty();
    let vertices = fill_gaps(&mut mesh.points, |v, _| used[v]);
    if !vertices.moved.is_empty() {
        let first = if in_order {
            (vertices.kept as usize).saturating_sub(without_panel)
        } else {
            0
        };
        let panels = first.min(mesh.panels.len());
        let edges = (2 * first).min(mesh.edges.len());
        let corners = mesh.panels[panels..].iter_mut().flat_map(|p| &mut p.corners);
        for vertex in corners.chain(mesh.edges[edges..].iter_mut().flat_map(|e| &mut e.ends)) {
            *vertex = vertices.of(*vertex);
        }
    }
    let edges = fill_gaps(&mut mesh.edges, |_, e| e.panels != [NONE; 2]);
    for crowded in &mut mesh.crowded {
        crowded.edge = edges.of(crowded.edge);
    }
    mesh.crowded.sort_by_key(|c| c.edge);
    let tees = mesh.tees.iter_mut().flat_map(|t| &mut t.vertices);
    let seams = mesh.seams.iter_mut().flat_map(|s| &mut s.vertices);
    let pinches = pinches.iter_mut().flat_map(|p| &mut p.vertices);
    for vertex in tees.chain(seams).chain(pinches) {
        *vertex = vertices.of(*vertex);
    }
}

/// Where the last items went when they filled gaps before them.
struct Moved {
    /// How many items are left.
    kept: u32,
    /// New numbers of those that stood at `kept` and behind.
    moved: Vec<u32>,
}

impl Moved {
    fn of(&self, number: u32) -> u32 {
        if number < self.kept {
            number
        } else {
            self.moved[(number - self.kept) as usize]
        }
    }
}

/// Takes out what is not kept and fills the gaps with the last items: all but the last keep their numbers, so that few references change.
fn fill_gaps<T: Copy>(items: &mut Vec<T>, keep: impl Fn(usize, &T) -> bool) -> Moved {
    let gaps: Vec<usize> = (0..items.len()).filter(|k| !keep(*k, &items[*k])).collect();
    let kept = items.len() - gaps.len();
    let mut moved = vec![NONE; gaps.len()];
    let mut free = gaps.iter().take_while(|gap| **gap < kept);
    for from in kept..items.len() {
        if gaps.binary_search(&from).is_err()
            && let Some(gap) = free.next()
        {
            items[*gap] = items[from];
            moved[from - kept] = as_index(*gap);
        }
    }
    items.truncate(kept);
    Moved {
        kept: as_index(kept),
        moved,
    }
}
