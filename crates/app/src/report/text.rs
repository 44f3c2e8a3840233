//! The readouts as text.

use std::fmt::Write;

use zonewright_geometry::measure::Range;
use zonewright_shop::text::{Units, count, cubic_metres, degrees, square_metres};

use super::Report;

/// Width of the column of names, in characters.
const NAMES: usize = 18;

/// How many families are listed before the rest is summed up.
const FAMILIES: usize = 40;

impl Report {
    /// The readouts, laid out to be read. Lengths are in the design's units.
    #[must_use]
    pub fn to_text(&self) -> String {
        let mut out = String::new();
        let title = if self.name.is_empty() { "Design" } else { &self.name };
        // Writing to a string cannot fail.
        let _ = writeln!(out, "{title} ({})\n", self.kind);
        self.counts(&mut out);
        out.push('\n');
        self.measures(&mut out);
        self.course_lines(&mut out);
        self.family_lines(&mut out);
        out
    }

    fn counts(&self, out: &mut String) {
        let totals = &self.totals;
        line(out, "Panels", &count(totals.panels));
        line(out, "Families", &count(self.parts.families.len()));
        line(out, "Distinct bevels", &count(self.parts.distinct_bevels));
        line(out, "Zones", &count(totals.zones));
        line(out, "Vertices", &count(totals.vertices));
        line(
            out,
            "Edges",
            &format!("{} ({} open)", count(totals.edges), count(totals.open_edges)),
        );
        line(out, "Rims", &count(totals.rims));
        line(out, "V - E + F", &totals.euler.to_string());
        let some = [
            ("Butted seams", self.shell.seams.len()),
            ("Pinches", self.shell.pinches.len()),
            ("Doubled pairs", self.inspection.doubled.len()),
            ("Crossing pairs", self.inspection.crossings.len()),
        ];
        for (name, n) in some.into_iter().filter(|(_, n)| *n > 0) {
            line(out, name, &count(n));
        }
    }

    fn measures(&self, out: &mut String) {
        let totals = &self.totals;
        let size = totals.size.to_array().map(|side| self.units.length(side)).join(" x ");
        line(out, "Size x, y, z", &size);
        line(out, "Area", &square_metres(totals.area_mm2));
        if let Some(volume) = self.volume_mm3() {
            line(out, "Volume", &cubic_metres(volume));
        }
        if let Some(gap) = self.shell.closing_gap {
            line(out, "Closing gap", &self.units.length(gap));
        }
        range(out, "Edge lengths", totals.lengths, |mm| self.units.length(mm));
        range(out, "Acute angles", totals.acute_angles, angle);
        range(out, "Dihedral angles", totals.dihedrals, angle);
    }

    fn course_lines(&self, out: &mut String) {
        if self.shell.courses.is_empty() {
            return;
        }
        let _ = writeln!(out, "\nCourse  Panels");
        for course in &self.shell.courses {
            let _ = writeln!(out, "{:>6}  {:>6}", course.number, course.panels);
        }
    }

    fn family_lines(&self, out: &mut String) {
        if self.parts.families.is_empty() {
            return;
        }
        let _ = writeln!(out, "\nPart    Number  Acute    Sides");
        for family in self.parts.families.iter().take(FAMILIES) {
            let Some(pattern) = family.panels.first().and_then(|&p| self.parts.panels.get(p as usize)) else {
                continue;
            };
            let acute = pattern.acute_deg.map_or_else(|| "-".to_owned(), |a| degrees(a, 2));
            let sides: Vec<String> = sides(pattern.sides_mm().collect(), self.units);
            let mark = family.mark.as_str();
            let _ = writeln!(
                out,
                "{mark:<6}  {:>6}  {acute:<7}  {}",
                family.panels.len(),
                sides.join(", ")
            );
        }
        let more = self.parts.families.len().saturating_sub(FAMILIES);
        if more > 0 {
            let _ = writeln!(out, "and {} more; report --json and export list them all", count(more));
        }
    }
}

/// The sides as they are written; a parallelogram's first two stand for all four.
fn sides(all: Vec<f64>, units: Units) -> Vec<String> {
    let shown = if all.len() == 4 { 2 } else { all.len() };
    all.into_iter().take(shown).map(|mm| units.length(mm)).collect()
}

fn angle(radians: f64) -> String {
    degrees(radians.to_degrees(), 2)
}

fn line(out: &mut String, name: &str, value: &str) {
    let _ = writeln!(out, "{name:<NAMES$}{value}");
}

fn range(out: &mut String, name: &str, range: Option<Range>, shown: impl Fn(f64) -> String) {
    let Some(range) = range else { return };
    let (least, most) = (shown(range.least), shown(range.most));
    let value = if least == most {
        least
    } else {
        format!("{least} to {most}")
    };
    line(out, name, &value);
}
