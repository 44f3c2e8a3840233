//! Marks: what is written on the panels.
//!
//! Every mark starts with a letter, uses neither I nor O (they look like 1 and 0), and cannot be taken by a spreadsheet
//! for a number, a date or a formula.

use core::fmt;

use zonewright_geometry::Shell;

use crate::text::{digits_of, push_count};

/// A mark, kept in place: making one for each of many panels asks for no memory.
#[derive(Clone, Copy, PartialEq, Eq, PartialOrd, Ord, Hash)]
pub struct Mark {
    bytes: [u8; Self::MOST],
    len: u8,
}

impl Mark {
    /// Two letters, and two counts of at most ten digits.
    const MOST: usize = 23;

    fn build(text: &mut String, fill: impl FnOnce(&mut String)) -> Self {
        text.clear();
        fill(text);
        let mut bytes = [0; Self::MOST];
        // All marks are built in this file, from ASCII letters and counts of u32.
        let len = text.len().min(Self::MOST);
        bytes[..len].copy_from_slice(&text.as_bytes()[..len]);
        Self { bytes, len: len as u8 }
    }

    /// The mark as text.
    #[must_use]
    pub fn as_str(&self) -> &str {
        core::str::from_utf8(&self.bytes[..usize::from(self.len)]).unwrap_or_default()
    }
}

impl core::ops::Deref for Mark {
    type Target = str;
    fn deref(&self) -> &str {
        self.as_str()
    }
}

impl fmt::Display for Mark {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        f.pad(self.as_str())
    }
}

impl fmt::Debug for Mark {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        fmt::Debug::fmt(self.as_str(), f)
    }
}

impl PartialEq<str> for Mark {
    fn eq(&self, other: &str) -> bool {
        self.as_str() == other
    }
}

impl PartialEq<&str> for Mark {
    fn eq(&self, other: &&str) -> bool {
        self.as_str() == *other
    }
}

/// The place marks of all panels, in the order of [`Shell::panels`].
///
/// `F03P07` is the seventh panel of the third course on the fore side, `A02P11` the eleventh of the second on the aft
/// side. Courses and positions each have as many digits as the largest needs, and at least two.
#[must_use]
pub fn place_marks(shell: &Shell) -> Vec<Mark> {
    let highest = shell.panels.iter().map(|p| p.course.unsigned_abs()).max().unwrap_or(0);
    let mut courses: Vec<i32> = shell.panels.iter().map(|p| p.course).collect();
    courses.dedup();
    courses.sort_unstable();
    courses.dedup();
    let mut counts = vec![0_u32; courses.len()];
    let mut slot = (i32::MIN, 0);
    let positions: Vec<u32> = (shell.panels.iter())
        .map(|panel| {
            // Panels come course by course: the search is rarely needed.
            if slot.0 != panel.course {
                slot = (panel.course, courses.binary_search(&panel.course).unwrap_or(0));
            }
            counts[slot.1] += 1;
            counts[slot.1]
        })
        .collect();
    let most = counts.iter().copied().max().unwrap_or(0);
    let width = |n: u32| digits_of(u64::from(n)).max(2);
    let (course_width, position_width) = (width(highest), width(most));
    let mut text = String::new();
    (shell.panels.iter().zip(positions))
        .map(|(panel, position)| {
            Mark::build(&mut text, |text| {
                text.push(if panel.course < 0 { 'A' } else { 'F' });
                push_count(text, u64::from(panel.course.unsigned_abs()), course_width);
                text.push('P');
                push_count(text, u64::from(position), position_width);
            })
        })
        .collect()
}

/// The part mark: `P7`, or `P7L` and `P7R` for a pair of mirror images.
#[must_use]
pub fn part_mark(number: u32, hand: crate::family::Hand) -> Mark {
    Mark::build(&mut String::new(), |text| {
        text.push('P');
        push_count(text, u64::from(number), 1);
        text.push_str(hand.letter());
    })
}

/// The mark of an edge of the shell: `E0042`, with as many digits as the last edge of `edges` needs, and at least two.
#[must_use]
pub fn edge_mark(edge: u32, edges: usize) -> Mark {
    Mark::build(&mut String::new(), |text| {
        text.push('E');
        push_count(text, u64::from(edge) + 1, digits_of(edges as u64).max(2));
    })
}

/// The mark of a zone: `Z1` for the first.
#[must_use]
pub fn zone_mark(zone: u32) -> Mark {
    Mark::build(&mut String::new(), |text| {
        text.push('Z');
        push_count(text, u64::from(zone) + 1, 1);
    })
}

/// The letters of edges, without i and o.
const LETTERS: &[u8; 24] = b"abcdefghjklmnpqrstuvwxyz";

/// The letter of an edge of a panel: a, b, c ... counter-clockwise seen from outside; after z come aa, ab ...
#[must_use]
pub fn edge_letter(edge: usize) -> String {
    let letter = char::from(LETTERS[edge % LETTERS.len()]);
    match (edge / LETTERS.len()).checked_sub(1) {
        None => letter.to_string(),
        Some(before) => {
            let mut text = edge_letter(before);
            text.push(letter);
            text
        }
    }
}

#[cfg(test)]
mod tests {
    use std::collections::BTreeSet;

    use super::*;
    use crate::family::Hand;
    use zonewright_geometry::Panel;

    fn shell(courses: &[(i32, u32)]) -> Shell {
        let panel = |course| Panel {
            corners: [0; 4],
            letters: [0; 2],
            course,
        };
        let panels = courses.iter().flat_map(|&(c, n)| (0..n).map(move |_| panel(c)));
        Shell {
            panels: panels.collect(),
            ..Shell::default()
        }
    }

    #[test]
    fn addresses() {
        let marks = place_marks(&shell(&[(1, 2), (-2, 11), (3, 7), (1, 1)]));
        assert_eq!(marks[0], "F01P01");
        assert_eq!(marks[12], "A02P11");
        assert_eq!(marks[19], "F03P07");
        assert_eq!(marks[20], "F01P03");
        assert!(place_marks(&Shell::default()).is_empty());
    }

    #[test]
    fn widths_are_the_same_and_marks_unique() {
        let marks = place_marks(&shell(&[(1, 120), (2, 3), (-14, 9), (i32::MIN, 1)]));
        assert!(marks.iter().all(|m| m.len() == marks[0].len()));
        assert_eq!(marks[0], "F0000000001P001");
        assert_eq!(
            marks.iter().map(|m| m.as_str()).collect::<BTreeSet<_>>().len(),
            marks.len()
        );
    }

    #[test]
    fn other_marks() {
        assert_eq!(part_mark(3, Hand::Left), "P3L");
        assert_eq!(part_mark(3, Hand::Right), "P3R");
        assert_eq!(part_mark(u32::MAX, Hand::None), "P4294967295");
        assert_eq!(zone_mark(0), "Z1");
        assert_eq!(edge_mark(41, 1200), "E0042");
        assert_eq!(edge_mark(u32::MAX, usize::MAX).len(), 21);
        let letters: Vec<_> = (0..60).map(edge_letter).collect();
        assert_eq!(letters[..10].concat(), "abcdefghjk");
        assert_eq!(letters[23..26], ["z", "aa", "ab"]);
        assert!(letters.iter().all(|l| !l.contains(['i', 'o'])));
        assert_eq!(letters.iter().collect::<BTreeSet<_>>().len(), 60);
    }
}
