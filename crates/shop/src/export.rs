//! The files that are handed out, and the words that choose them.

use zonewright_geometry::Shell;

use crate::{Parts, lists, models};

/// A file that is handed out.
#[derive(Clone, Copy, PartialEq, Eq, Debug)]
pub struct ExportFile {
    /// Its name.
    pub name: &'static str,
    /// The word that chooses it.
    pub word: &'static str,
    /// What it is.
    pub what: &'static str,
}

/// All files, in the order in which they are written.
pub const FILES: &[ExportFile] = &[
    ExportFile {
        name: "panels.csv",
        word: "panels",
        what: "one row a panel: marks, shape, and its edges with mates and bevels",
    },
    ExportFile {
        name: "edges.csv",
        word: "edges",
        what: "one row an edge: its panels, length, dihedral angle, fold and bevel",
    },
    ExportFile {
        name: "families.csv",
        word: "families",
        what: "one row a kind of part: quantity, shape, bevels in order, place marks",
    },
    ExportFile {
        name: "surface.obj",
        word: "obj",
        what: "the drawn surface as a mesh in millimetres, a group for each panel",
    },
    ExportFile {
        name: "surface.stl",
        word: "stl",
        what: "the drawn surface in triangles, in millimetres",
    },
];

/// A word that chooses no file.
#[derive(Clone, PartialEq, Eq, Debug)]
pub struct UnknownWord(pub String);

impl core::fmt::Display for UnknownWord {
    fn fmt(&self, f: &mut core::fmt::Formatter<'_>) -> core::fmt::Result {
        let words: Vec<&str> = FILES.iter().map(|file| file.word).collect();
        write!(
            f,
            "No file is called '{}'. The words are {}.",
            self.0.escape_default(),
            words.join(", ")
        )
    }
}

impl core::error::Error for UnknownWord {}

/// Makes the files that `only` names, or all when it names none: names and contents, in the order of [`FILES`].
///
/// # Errors
/// A word chooses no file; nothing is made then.
pub fn export(shell: &Shell, parts: &Parts, only: &[&str]) -> Result<Vec<(String, Vec<u8>)>, UnknownWord> {
    if let Some(unknown) = only.iter().find(|word| FILES.iter().all(|file| file.word != **word)) {
        return Err(UnknownWord((*unknown).to_owned()));
    }
    let chosen = FILES.iter().filter(|file| only.is_empty() || only.contains(&file.word));
    Ok(chosen
        .map(|file| (file.name.to_owned(), contents(file.word, shell, parts)))
        .collect())
}

fn contents(word: &str, shell: &Shell, parts: &Parts) -> Vec<u8> {
    match word {
        "panels" => lists::panels_csv(shell, parts).into_bytes(),
        "edges" => lists::edges_csv(parts).into_bytes(),
        "families" => lists::families_csv(shell, parts).into_bytes(),
        "obj" => models::surface_obj(shell, parts).into_bytes(),
        "stl" => models::surface_stl(shell, parts),
        _ => Vec::new(),
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::FamilyTolerance;
    use crate::test_shells::polar;

    #[test]
    fn words_choose_files() {
        let shell = polar(5, 30.0, 300.0);
        let parts = Parts::new(&shell, &FamilyTolerance::default());
        let names = |only: &[&str]| -> Vec<String> {
            export(&shell, &parts, only)
                .unwrap()
                .into_iter()
                .map(|(name, _)| name)
                .collect()
        };
        assert_eq!(names(&[]), FILES.iter().map(|f| f.name).collect::<Vec<_>>());
        assert_eq!(names(&["stl", "panels", "stl"]), ["panels.csv", "surface.stl"]);
        for (name, bytes) in export(&shell, &parts, &[]).unwrap() {
            assert!(bytes.len() > 200, "{name}");
        }
        let error = export(&shell, &parts, &["edges", "sheets"]).unwrap_err();
        assert_eq!(
            error.to_string(),
            "No file is called 'sheets'. The words are panels, edges, families, obj, stl."
        );
    }

    #[test]
    fn the_same_shell_gives_the_same_bytes() {
        let shell = polar(8, 45.0, 300.0);
        let once = || export(&shell, &Parts::new(&shell, &FamilyTolerance::default()), &[]).unwrap();
        assert_eq!(once(), once());
    }
}
