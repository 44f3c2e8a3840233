use std::collections::BTreeMap;

use super::*;
use crate::FamilyTolerance;
use crate::test_shells::{butted, fan, mirror_pair, polar};
use zonewright_geometry::Shell;

type Rows = Vec<BTreeMap<String, String>>;

/// Reads a list back with the csv crate; every row must have all columns.
fn rows(list: &str) -> Rows {
    let mut reader = csv::ReaderBuilder::new().flexible(false).from_reader(list.as_bytes());
    let header: Vec<String> = reader.headers().unwrap().iter().map(str::to_owned).collect();
    let unique: std::collections::BTreeSet<_> = header.iter().collect();
    assert_eq!(unique.len(), header.len(), "two columns of the same name");
    (reader.records())
        .map(|record| {
            header
                .iter()
                .cloned()
                .zip(record.unwrap().iter().map(str::to_owned))
                .collect()
        })
        .collect()
}

fn lists(shell: &Shell) -> [String; 3] {
    let parts = Parts::new(shell, &FamilyTolerance::default());
    [
        panels_csv(shell, &parts),
        edges_csv(&parts),
        families_csv(shell, &parts),
    ]
}

fn number(row: &BTreeMap<String, String>, column: &str) -> f64 {
    row[column]
        .parse()
        .unwrap_or_else(|_| panic!("{column}: '{}'", row[column]))
}

fn near(a: f64, b: f64, within: f64) -> bool {
    (a - b).abs() <= within
}

#[test]
fn panels_of_the_polar_nine() {
    let [panels, edges, families] = lists(&polar(9, 38.0, 300.0)).map(|l| rows(&l));
    assert_eq!((panels.len(), edges.len(), families.len()), (72, 144, 4));
    // Fixture F1 (derived): level 3, and its bevels 9.76 towards level 2 and 13.59 towards level 4.
    let row = panels.iter().find(|r| r["mark"] == "F03P07").unwrap();
    assert!(near(number(row, "acute_deg"), 86.0687990795, 5e-5));
    assert!(near(number(row, "long_diagonal_mm"), 438.566465, 5e-4));
    assert!(near(number(row, "short_diagonal_mm"), 409.462399, 5e-4));
    assert!(near(number(row, "area_m2"), 0.0897882383, 5e-7));
    assert_eq!(
        (row["part_mark"].as_str(), row["family"].as_str(), row["hand"].as_str()),
        ("P3", "3", "none")
    );
    let mut bevels: Vec<f64> = ["a", "b", "c", "d"]
        .iter()
        .map(|l| number(row, &format!("{l}_bevel_deg")))
        .collect();
    bevels.sort_by(f64::total_cmp);
    for (bevel, expected) in bevels
        .iter()
        .zip([9.7591861856, 9.7591861856, 13.5894235630, 13.5894235630])
    {
        assert!(near(*bevel, expected, 5e-5));
    }
    // Fixture F1: edges 43.2 m in all, area 5.4579091310 m2.
    assert!(near(edges.iter().map(|r| number(r, "length_mm")).sum(), 43_200.0, 1e-6));
    assert!(near(
        families.iter().map(|r| number(r, "area_total_m2")).sum(),
        5.457_909_131,
        4e-6
    ));
    assert_eq!(families.iter().map(|r| number(r, "quantity")).sum::<f64>(), 72.0);
    let placed: Vec<&str> = families.iter().flat_map(|r| r["place_marks"].split(' ')).collect();
    assert_eq!(placed.len(), 72);
    assert!(
        edges
            .iter()
            .all(|r| r["kind"] == "ridge" && near(number(r, "fold_deg"), 2.0 * number(r, "bevel_deg"), 1.1e-4))
    );
}

/// Derived: 800 x 500 at 60 degrees.
#[test]
fn a_handed_pair() {
    let [panels, _, families] = lists(&mirror_pair()).map(|l| rows(&l));
    for row in &panels {
        assert!(near(number(row, "long_diagonal_mm"), 1135.78, 0.005));
        assert!(near(number(row, "short_diagonal_mm"), 700.0, 5e-4));
        assert!(near(number(row, "area_m2"), 0.34641, 5e-6));
        assert_eq!(row["acute_deg"], "60");
    }
    let hands: Vec<_> = families.iter().map(|r| r["hand"].as_str()).collect();
    assert!(hands.contains(&"L") && hands.contains(&"R"));
    assert_eq!(families[0]["mirror_part"], families[1]["part_mark"]);
    assert_eq!(panels[1]["course"], "-1");
}

/// Derived: 600 rhombi at 70.5288 and 63.4349 degrees.
#[test]
fn rhombi() {
    let [_, _, dodecahedron] = lists(&polar(4, 0.5_f64.sqrt().atan().to_degrees(), 600.0)).map(|l| rows(&l));
    let row = &dodecahedron[0];
    assert_eq!(
        (row["long_diagonal_mm"].as_str(), row["short_diagonal_mm"].as_str()),
        ("979.796", "692.82")
    );
    assert_eq!(
        (row["acute_deg"].as_str(), row["area_each_m2"].as_str()),
        ("70.5288", "0.339411")
    );
    assert_eq!((row["a_bevel_deg"].as_str(), row["quantity"].as_str()), ("30", "12"));
    let [_, _, icosahedron] = lists(&polar(5, 0.5_f64.atan().to_degrees(), 600.0)).map(|l| rows(&l));
    for row in &icosahedron {
        assert_eq!(
            (row["long_diagonal_mm"].as_str(), row["short_diagonal_mm"].as_str()),
            ("1020.781", "630.877")
        );
        assert_eq!(row["acute_deg"], "63.4349");
    }
}

#[test]
fn mates_agree_both_ways() {
    for shell in [polar(7, 40.0, 250.0), butted(), mirror_pair()] {
        let [panels, edges, _] = lists(&shell).map(|l| rows(&l));
        let by_mark: BTreeMap<&str, _> = panels.iter().map(|r| (r["mark"].as_str(), r)).collect();
        let mut rims = 0;
        for row in &panels {
            let corners: usize = row["corners"].parse().unwrap();
            for letter in (0..corners).map(edge_letter) {
                let cell = |column: &str| row[&format!("{letter}_{column}")].as_str();
                if cell("mate").is_empty() {
                    assert_eq!(
                        (cell("kind"), cell("bevel_deg"), cell("dihedral_deg")),
                        ("rim", "0", "")
                    );
                    rims += 1;
                    continue;
                }
                let mate = by_mark[cell("mate")];
                let theirs = |column: &str| mate[&format!("{}_{column}", cell("mate_edge"))].as_str();
                assert_eq!(
                    (theirs("mate"), theirs("mate_edge")),
                    (row["mark"].as_str(), letter.as_str())
                );
                for column in ["edge", "length_mm", "dihedral_deg", "bevel_deg", "kind"] {
                    assert_eq!(cell(column), theirs(column));
                }
            }
        }
        assert_eq!(edges.iter().filter(|r| r["panel_2"].is_empty()).count(), rims);
    }
}

use crate::marks::edge_letter;

#[test]
fn lists_survive_a_spreadsheet() {
    for shell in [polar(12, 30.0, 400.0), butted(), mirror_pair(), fan(), Shell::default()] {
        for list in lists(&shell) {
            assert!(list.ends_with("\r\n") && list.matches('\n').count() == list.matches("\r\n").count());
            let mut reader = csv::ReaderBuilder::new()
                .has_headers(false)
                .from_reader(list.as_bytes());
            for cell in reader
                .records()
                .flat_map(|r| r.unwrap().iter().map(str::to_owned).collect::<Vec<_>>())
            {
                let plain_number = cell.parse::<f64>().is_ok_and(f64::is_finite) && !cell.contains(['e', 'E', '+']);
                let word = cell.starts_with(|c: char| c.is_ascii_alphabetic()) && cell.parse::<f64>().is_err();
                assert!(cell.is_empty() || plain_number || word, "'{cell}'");
                assert!(cell != "-0" && !cell.starts_with(['=', '+', '@']));
            }
        }
    }
}

#[test]
fn columns_are_those_of_the_most_corners() {
    let [panels, _, families] = lists(&butted()).map(|l| rows(&l));
    assert!(panels[0].contains_key("e_length_mm") && !panels[0].contains_key("f_length_mm"));
    assert_eq!(
        (panels[1]["e_length_mm"].as_str(), panels[0]["e_length_mm"].as_str()),
        ("", "600")
    );
    assert_eq!(panels[0]["side_1_mm"], "600");
    assert!(families.iter().all(|r| r["place_marks"].starts_with('F')));
    let [plain, _, _] = lists(&polar(3, 30.0, 100.0)).map(|l| rows(&l));
    assert!(plain[0].contains_key("d_kind") && !plain[0].contains_key("e_kind"));
    assert_eq!(plain[0]["zones"].split(' ').count(), 2);
}

#[test]
fn crowded_edges_name_all_panels() {
    let [panels, edges, _] = lists(&fan()).map(|l| rows(&l));
    assert_eq!(panels[0]["a_mate"], "F01P02 F02P01");
    assert_eq!(edges[0]["more"], "F02P01 c");
    assert_eq!(
        (edges[0]["dihedral_deg"].as_str(), edges[0]["bevel_deg"].as_str()),
        ("", "0")
    );
}
