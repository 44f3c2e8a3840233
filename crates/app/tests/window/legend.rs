//! The legend of the picture, by what it says.

use egui_kittest::{Harness, kittest::Queryable};
use zonewright::window::{App, Command};
use zonewright_painter::ColourBy;

use crate::common::{open, polar};

fn colour(harness: &mut Harness<'_, App>, by: ColourBy) {
    harness.state().send(Command::SetColour(by));
    harness.run();
}

#[test]
fn every_colouring_says_what_its_colours_mean() {
    let mut harness = open(polar(Some(2)));
    // Eight ribs of 500 mm; the n-th course of a dome has as many panels as ribs, all of one family (derived: the dome turns into itself).
    colour(&mut harness, ColourBy::Zone);
    harness.get_by_label("Zone 1: 500 mm");
    harness.get_by_label("Zone 8: 500 mm");
    colour(&mut harness, ColourBy::Course);
    harness.get_by_label("Course 1, 8 panels");
    harness.get_by_label("Course 2, 8 panels");
    colour(&mut harness, ColourBy::Family);
    harness.get_by_label("Family 1: 8 panels");
    harness.get_by_label("Family 2: 8 panels");
    colour(&mut harness, ColourBy::Slope);
    harness.get_by_label("0° level");
    harness.get_by_label("90° upright");
    colour(&mut harness, ColourBy::Fold);
    harness.get_by_label("valley");
    harness.get_by_label("ridge");
    colour(&mut harness, ColourBy::Finding);
    harness.get_by_label("No finding");
    colour(&mut harness, ColourBy::Plain);
    assert!(harness.query_by_label("Hide the legend").is_none(), "nothing to say");
}

#[test]
fn the_legend_is_hidden_and_shown_again() {
    let mut harness = open(polar(Some(2)));
    harness.get_by_label("Hide the legend").click();
    harness.run();
    assert!(harness.query_by_label("Zone 1: 500 mm").is_none());
    harness.get_by_label("Show the legend").click();
    harness.run();
    harness.get_by_label("Zone 1: 500 mm");
}

#[test]
fn more_entries_than_have_room_are_counted() {
    use zonewright::document::new_design;
    use zonewright_geometry::{
        Angle, Spurs, Start,
        start::{PolarBy, PolarForm},
    };
    let form = PolarForm {
        ribs: 30,
        by: PolarBy::PitchEdge {
            pitch: Angle::from_degrees(35.0),
            edge_mm: 500.0,
        },
    };
    let mut harness = open(new_design(Start::Polar(form), Some(1), Spurs::default()).unwrap());
    colour(&mut harness, ColourBy::Zone);
    harness.get_by_label("Zone 9: 500 mm");
    assert!(harness.query_by_label("Zone 10: 500 mm").is_none());
    harness.get_by_label("and 21 more");
}
