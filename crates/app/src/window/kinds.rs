//! The kinds of start: their words, their names, and the parameters that a new one has.

use zonewright_geometry::{
    Angle, Point, Role, Sign, Start, Vector,
    start::{
        AxisClass, ColumnForm, Curve, CurveShape, FreeLetter, FreePath, FreeVector, HelicalForm, LoopForm, PolarBy,
        PolarForm, RibbonForm, RibbonFrom, Star, StarLength, StarLetter, StarPath, StarSolid, TranslationForm,
    },
};

use super::command::Words;

/// A kind of start.
#[derive(Clone, Copy, Debug)]
pub(super) struct Kind {
    /// The word of the file and of the command line.
    pub word: &'static str,
    /// Its name.
    pub name: &'static str,
    /// What the command to make a new one is called.
    new_name: &'static str,
    /// One sentence that says what it is.
    pub hint: &'static str,
    /// How many courses a new one gets; none lays until still.
    pub courses: Option<u32>,
    usual: fn() -> Start,
}

impl Kind {
    /// A start of this kind with its usual parameters.
    #[must_use]
    pub(super) fn usual(&self) -> Start {
        (self.usual)()
    }
}

/// All kinds, in the order of the chooser.
pub(super) const KINDS: [Kind; 9] = [
    Kind {
        word: "zigzag",
        name: "Zigzag",
        new_name: "New zigzag",
        hint: "A path of free points.",
        courses: Some(4),
        usual: zigzag,
    },
    Kind {
        word: "translation",
        name: "Translation surface",
        new_name: "New translation surface",
        hint: "A path moved along a path.",
        courses: None,
        usual: translation,
    },
    Kind {
        word: "polar",
        name: "Polar form",
        new_name: "New polar form",
        hint: "Equal ribs round a pole.",
        courses: Some(5),
        usual: polar,
    },
    Kind {
        word: "loop",
        name: "Loop",
        new_name: "New loop",
        hint: "A closed zigzag: a tube.",
        courses: Some(3),
        usual: tube,
    },
    Kind {
        word: "ribbon",
        name: "Ribbon",
        new_name: "New ribbon",
        hint: "A band wound about an axis.",
        courses: Some(4),
        usual: ribbon,
    },
    Kind {
        word: "column",
        name: "Column",
        new_name: "New column",
        hint: "A closed front that climbs.",
        courses: Some(16),
        usual: column,
    },
    Kind {
        word: "helical",
        name: "Helical solid",
        new_name: "New helical solid",
        hint: "Ribs from pole to pole.",
        courses: None,
        usual: helical,
    },
    Kind {
        word: "star-path",
        name: "Star path",
        new_name: "New star path",
        hint: "A path along the axes of a star.",
        courses: Some(2),
        usual: star_path,
    },
    Kind {
        word: "star-solid",
        name: "Star solid",
        new_name: "New star solid",
        hint: "The convex solid of a star.",
        courses: None,
        usual: star_solid,
    },
];

/// The kind with this word.
#[must_use]
pub(super) fn kind(word: &str) -> &'static Kind {
    KINDS.iter().find(|k| k.word == word).unwrap_or(&KINDS[0])
}

/// Words of the command that makes a new design of this kind.
#[must_use]
pub(super) fn new_words(word: &str) -> Words {
    let kind = kind(word);
    Words {
        name: kind.new_name,
        hint: kind.hint,
    }
}

fn zigzag() -> Start {
    let edges = [
        (400.0, 0.0, -150.0, Role::Zig),
        (400.0, 100.0, 150.0, Role::Zag),
        (400.0, -40.0, -180.0, Role::Zig),
        (400.0, 120.0, 180.0, Role::Zag),
        (400.0, -80.0, -150.0, Role::Zig),
        (400.0, 60.0, 150.0, Role::Zag),
    ];
    let letters = (0..).zip(edges).map(|(id, (x, y, z, role))| FreeLetter {
        id,
        vector: FreeVector::Own(Vector::new(x, y, z)),
        role,
    });
    Start::Zigzag(FreePath {
        origin: Point::ORIGIN,
        closed: false,
        letters: letters.collect(),
    })
}

fn translation() -> Start {
    let curve = |span_mm, rise_mm, parts, azimuth| Curve {
        shape: CurveShape::Arc { span_mm, rise_mm },
        parts,
        azimuth: Angle::from_degrees(azimuth),
    };
    Start::Translation(TranslationForm {
        zig: curve(4000.0, 900.0, 10, 0.0),
        zag: curve(3000.0, 600.0, 8, 90.0),
    })
}

fn polar() -> Start {
    Start::Polar(PolarForm {
        ribs: 10,
        by: PolarBy::PitchEdge {
            pitch: Angle::from_degrees(35.0),
            edge_mm: 600.0,
        },
    })
}

const fn tube() -> Start {
    Start::Loop(LoopForm {
        sides: 8,
        radius_mm: 800.0,
        rise_mm: 500.0,
        moved: Vec::new(),
    })
}

fn ribbon() -> Start {
    Start::Ribbon(RibbonForm {
        ribs: 24,
        turn: Angle::from_degrees(15.0),
        pitch: Angle::from_degrees(20.0),
        edge_mm: 400.0,
        from: RibbonFrom::Across,
    })
}

const fn column() -> Start {
    Start::Column(ColumnForm {
        ribs: 12,
        zag_run_mm: 300.0,
        zig_run_mm: 260.0,
        rise_mm: 200.0,
        turn: 1,
    })
}

fn helical() -> Start {
    Start::Helical(HelicalForm {
        ribs: 8,
        turn: 2,
        pitch: Angle::from_degrees(40.0),
        edge_mm: 400.0,
    })
}

fn star_path() -> Start {
    let zags = [1, 2, 3].map(|axis| (axis, Sign::Plus));
    let letters: Vec<(u32, Sign)> = zags.into_iter().flat_map(|zag| [(0, Sign::Minus), zag]).collect();
    Start::StarPath(StarPath {
        star: Star::Icosahedral(vec![AxisClass::FiveFold]),
        unit_mm: 400.0,
        closed: false,
        letters: letters
            .into_iter()
            .map(|(axis, sign)| StarLetter {
                axis,
                sign,
                length: StarLength::Golden(0),
            })
            .collect(),
    })
}

fn star_solid() -> Start {
    Start::StarSolid(StarSolid {
        star: Star::Icosahedral(vec![AxisClass::FiveFold]),
        edge_mm: 500.0,
    })
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn every_kind_makes_a_start_of_its_own_word() {
        for kind in &KINDS {
            assert_eq!(kind.usual().kind(), kind.word);
        }
    }
}
