//! What must hold between parts. For tests, and for whoever doubts a list.

use std::collections::BTreeSet;

use super::Parts;

/// Lengths and angles of the two sides of one edge come from the same figures; this only allows for rounding.
const SAME: f64 = 1e-9;

impl Parts {
    /// Whatever does not hold between the parts, as sentences; empty when all is well.
    #[must_use]
    pub fn check(&self) -> Vec<String> {
        let mut faults = Vec::new();
        self.check_mates(&mut faults);
        self.check_families(&mut faults);
        let marks: BTreeSet<&str> = self.panels.iter().map(|p| p.mark.as_str()).collect();
        if marks.len() != self.panels.len() {
            faults.push("Two panels have the same place mark.".to_owned());
        }
        faults
    }

    fn check_mates(&self, faults: &mut Vec<String>) {
        for (index, panel) in (0_u32..).zip(&self.panels) {
            for (slot, edge) in (0_u32..).zip(&panel.edges) {
                let name = || format!("Edge {} of panel {}", Self::edge_letter(slot as usize), panel.mark);
                for mate in &edge.mates {
                    let other = self
                        .panels
                        .get(mate.panel as usize)
                        .and_then(|p| p.edges.get(mate.edge as usize));
                    let Some(other) = other else {
                        faults.push(format!("{} has a mate that does not exist.", name()));
                        continue;
                    };
                    let Some(back) = other.mates.iter().find(|m| (m.panel, m.edge) == (index, slot)) else {
                        faults.push(format!("{} is not the mate of its mate.", name()));
                        continue;
                    };
                    if (other.length_mm - edge.length_mm).abs() > SAME
                        || mate.to_mm - mate.from_mm > edge.length_mm + SAME
                    {
                        faults.push(format!("{} is not as long as its mate.", name()));
                    }
                    // Seen from the two sides of a sheet an angle and the rest of the turn are the same thing.
                    let sum = back.dihedral_deg + mate.dihedral_deg;
                    let turned = edge.mates.len() > 1 && (sum - 360.0).abs() <= SAME;
                    if (back.dihedral_deg - mate.dihedral_deg).abs() > SAME && !turned {
                        faults.push(format!("{} has another dihedral angle than its mate.", name()));
                    }
                }
            }
        }
    }

    fn check_families(&self, faults: &mut Vec<String>) {
        let quantity: usize = self.families.iter().map(|f| f.panels.len()).sum();
        if quantity != self.panels.len() {
            faults.push("The quantities of the families do not add up to the panels.".to_owned());
        }
        for (index, family) in (0_u32..).zip(&self.families) {
            let wrong = |p: &u32| {
                let panel = self.panels.get(*p as usize);
                panel.is_none_or(|p| p.family != index || p.part_mark != family.mark || p.hand != family.hand)
            };
            if family.panels.is_empty() || family.panels.iter().any(wrong) {
                faults.push(format!(
                    "Family {} does not hold the panels that belong to it.",
                    family.mark
                ));
            }
            if let Some(twin) = family.twin {
                let twin = self.families.get(twin as usize);
                let fits = |t: &super::Family| {
                    t.twin == Some(index) && t.number == family.number && t.hand == family.hand.other()
                };
                if !twin.is_some_and(fits) {
                    faults.push(format!("Family {} and its mirror image do not agree.", family.mark));
                }
            }
        }
    }
}
