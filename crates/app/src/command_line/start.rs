//! `start`: one set of options a kind, and the design that they make.

use std::path::{Path, PathBuf};

use clap::{Args, Subcommand, ValueEnum};
use zonewright_geometry::{
    Angle, Finding, Point, Spurs, Vector, grow,
    start::{
        ColumnForm, Curve, FreePath, HelicalForm, LoopForm, PolarBy, PolarForm, RibbonForm, RibbonFrom, Star,
        StarLetter, StarPath, StarSolid, Start, TranslationForm,
    },
};

use super::{curve_words, refusal, star_words, values};
use crate::{
    document::{new_design, write_design},
    import::import,
};

/// The kinds of start.
#[derive(Subcommand, Debug)]
pub(super) enum Kind {
    /// A path of free points, zig and zag by turns; typed, or read from a file.
    Zigzag(Zigzag),
    /// A path moved along a path.
    Translation(Translation),
    /// Ribs round a pole: give two of --pitch, --edge, --width, --height; with one, the pitch is 35 or the edge 1 m.
    Polar(Polar),
    /// A closed zigzag that grows into a tube.
    Loop(Loop),
    /// A ribbon wound on a helicoid.
    Ribbon(Ribbon),
    /// A closed front that climbs.
    Column(Column),
    /// Ribs from pole to pole; --turn should divide --ribs, or panels cross.
    Helical(Helical),
    /// A path along the directions of a star.
    StarPath(Along),
    /// The convex solid of a star.
    StarSolid(Solid),
}

/// Options of every kind.
#[derive(Args, Debug)]
pub(super) struct Common {
    /// The design file to make.
    #[arg(short, long, value_name = "FILE")]
    output: PathBuf,
    /// Overwrite a file that is there.
    #[arg(long)]
    force: bool,
    /// How many courses to lay; without it, until still.
    #[arg(long, value_name = "N", value_parser = values::count, allow_hyphen_values = true)]
    courses: Option<u32>,
    /// What laying does with spurs.
    #[arg(long, value_enum, default_value = "retract")]
    spurs: SpurWord,
    /// The design's name; without it, the file's.
    #[arg(long)]
    name: Option<String>,
}

#[derive(Clone, Copy, ValueEnum, Debug)]
enum SpurWord {
    /// Cancel the pair: its two edges become one.
    Retract,
    /// Leave them.
    Hold,
    /// Pass through the node and go on.
    Cross,
}

#[derive(Args, Debug)]
pub(super) struct Zigzag {
    /// The points: "0,0,0 300,0,200 ..."; with `;` between them where lengths have spaces. Without it, a zigzag of three Vs.
    #[arg(long, value_parser = parse_points, allow_hyphen_values = true)]
    points: Option<Points>,
    /// Read the path from a CSV, DXF or SVG file.
    #[arg(long, value_name = "FILE", conflicts_with = "points")]
    from: Option<PathBuf>,
    /// How far chords may be from imported curves.
    #[arg(long, value_name = "LENGTH", default_value = "0.1", value_parser = values::length, allow_hyphen_values = true)]
    tolerance: f64,
    /// Close the path: one more edge leads back to the first point.
    #[arg(long)]
    closed: bool,
    #[command(flatten)]
    common: Common,
}

#[derive(Args, Debug)]
pub(super) struct Translation {
    #[arg(long, value_name = "CURVE", default_value = "arc span=4000 rise=900 parts=10", value_parser = curve_words::curve, help = curve_words::CURVE_HELP)]
    zig: Curve,
    /// The second curve, in the same words.
    #[arg(long, value_name = "CURVE", default_value = "arc span=3000 rise=600 parts=8 azimuth=90", value_parser = curve_words::curve)]
    zag: Curve,
    #[command(flatten)]
    common: Common,
}

#[derive(Args, Debug)]
pub(super) struct Polar {
    /// How many ribs.
    #[arg(long, value_name = "N", default_value = "12", value_parser = values::count, allow_hyphen_values = true)]
    ribs: u32,
    /// Pitch of the ribs, from the horizontal.
    #[arg(long, value_name = "ANGLE", value_parser = values::angle, allow_hyphen_values = true)]
    pitch: Option<Angle>,
    /// Length of the edges.
    #[arg(long, value_name = "LENGTH", value_parser = values::length, allow_hyphen_values = true)]
    edge: Option<f64>,
    /// Width in plan along rib 0, of the whole form.
    #[arg(long, value_name = "LENGTH", value_parser = values::length, allow_hyphen_values = true)]
    width: Option<f64>,
    /// Height from pole to pole, of the whole form.
    #[arg(long, value_name = "LENGTH", value_parser = values::length, allow_hyphen_values = true)]
    height: Option<f64>,
    #[command(flatten)]
    common: Common,
}

#[derive(Args, Debug)]
pub(super) struct Loop {
    /// How many points each of the two rings has.
    #[arg(long, value_name = "N", value_parser = values::count, allow_hyphen_values = true, default_value = "12")]
    sides: u32,
    /// Radius of both rings.
    #[arg(long, value_name = "LENGTH", value_parser = values::length, allow_hyphen_values = true, default_value = "600mm")]
    radius: f64,
    /// Height of the upper ring above the lower.
    #[arg(long, value_name = "LENGTH", value_parser = values::length, allow_hyphen_values = true, default_value = "300mm")]
    rise: f64,
    /// Move a point of the zigzag, as in 3:0,0,50; may be given again.
    #[arg(long = "move", value_name = "NODE:x,y,z", value_parser = values::moved, allow_hyphen_values = true)]
    moved: Vec<(u32, Vector)>,
    /// Read the closed path from a CSV, DXF or SVG file; it becomes free points.
    #[arg(long, value_name = "FILE", conflicts_with_all = ["sides", "radius", "rise", "moved"])]
    from: Option<PathBuf>,
    /// How far chords may be from imported curves.
    #[arg(long, value_name = "LENGTH", default_value = "0.1", value_parser = values::length, allow_hyphen_values = true)]
    tolerance: f64,
    #[command(flatten)]
    common: Common,
}

#[derive(Args, Debug)]
pub(super) struct Ribbon {
    /// How many ribs.
    #[arg(long, value_name = "N", default_value = "12", value_parser = values::count, allow_hyphen_values = true)]
    ribs: u32,
    /// Turn from rib to rib, about the vertical.
    #[arg(long, value_name = "ANGLE", default_value = "20", value_parser = values::angle, allow_hyphen_values = true)]
    turn: Angle,
    /// Pitch of the ribs, from the horizontal.
    #[arg(long, value_name = "ANGLE", default_value = "30", value_parser = values::angle, allow_hyphen_values = true)]
    pitch: Angle,
    /// Length of the ribs.
    #[arg(long, value_name = "LENGTH", default_value = "300mm", value_parser = values::length, allow_hyphen_values = true)]
    edge: f64,
    /// Where the first word runs: along the outer edge, or in a zigzag across the ribbon.
    #[arg(long, value_enum, default_value = "edge")]
    from: FromWord,
    #[command(flatten)]
    common: Common,
}

#[derive(Clone, Copy, ValueEnum, Debug)]
enum FromWord {
    Edge,
    Across,
}

#[derive(Args, Debug)]
pub(super) struct Column {
    /// How many zigs, and how many zags.
    #[arg(long, value_name = "N", default_value = "12", value_parser = values::count, allow_hyphen_values = true)]
    ribs: u32,
    /// Horizontal run of the zags.
    #[arg(long, value_name = "LENGTH", default_value = "300mm", value_parser = values::length, allow_hyphen_values = true)]
    zag_run: f64,
    /// Horizontal run of the zigs.
    #[arg(long, value_name = "LENGTH", default_value = "200mm", value_parser = values::length, allow_hyphen_values = true)]
    zig_run: f64,
    /// Rise of each.
    #[arg(long, value_name = "LENGTH", default_value = "300mm", value_parser = values::length, allow_hyphen_values = true)]
    rise: f64,
    /// How many times round the zigs turn while the zags turn once; 1 oscillates, others spiral.
    #[arg(long, value_name = "M", default_value = "1", allow_hyphen_values = true)]
    turn: i32,
    #[command(flatten)]
    common: Common,
}

#[derive(Args, Debug)]
pub(super) struct Helical {
    /// How many ribs.
    #[arg(long, value_name = "N", default_value = "12", value_parser = values::count, allow_hyphen_values = true)]
    ribs: u32,
    /// How many letters are zig; it should divide --ribs.
    #[arg(long, value_name = "R", default_value = "3", value_parser = values::count, allow_hyphen_values = true)]
    turn: u32,
    /// Pitch of the ribs, from the horizontal.
    #[arg(long, value_name = "ANGLE", default_value = "35", value_parser = values::angle, allow_hyphen_values = true)]
    pitch: Angle,
    /// Length of the ribs.
    #[arg(long, value_name = "LENGTH", default_value = "1m", value_parser = values::length, allow_hyphen_values = true)]
    edge: f64,
    #[command(flatten)]
    common: Common,
}

#[derive(Args, Debug)]
pub(super) struct Along {
    #[arg(long, default_value = "6", value_parser = star_words::star, help = star_words::STAR_HELP)]
    star: Star,
    /// Length of golden step 0.
    #[arg(long, value_name = "LENGTH", default_value = "300", value_parser = values::length, allow_hyphen_values = true)]
    unit: f64,
    /// The letters: sign and axis, then ^ and a golden step or = and a length: "+0 -3^1 +5=250mm". Axes count from 0.
    #[arg(long, default_value = "+0 +1 +2 +3 +4 +5", value_parser = parse_letters, allow_hyphen_values = true)]
    letters: Letters,
    /// The path is meant to close.
    #[arg(long)]
    closed: bool,
    #[command(flatten)]
    common: Common,
}

#[derive(Args, Debug)]
pub(super) struct Solid {
    #[arg(long, default_value = "6", value_parser = star_words::star, help = star_words::STAR_HELP)]
    star: Star,
    /// Length of the edges.
    #[arg(long, value_name = "LENGTH", default_value = "1m", value_parser = values::length, allow_hyphen_values = true)]
    edge: f64,
    #[command(flatten)]
    common: Common,
}

/// The zigzag of a `start zigzag` without points: three Vs.
const USUAL_POINTS: &str = "0,0,0 400,0,-150 800,100,0 1200,60,-180 1600,180,0 2000,100,-150 2400,160,0";

/// The pitch of a polar form that is not told one, in degrees, and the edge of one that is not told that, in millimetres.
const USUAL: (f64, f64) = (35.0, 1000.0);

/// Lists in types of their own, because a plain list would be taken as an option given several times.
#[derive(Clone, Debug)]
struct Points(Vec<Point>);

#[derive(Clone, Debug)]
struct Letters(Vec<StarLetter>);

fn parse_points(text: &str) -> Result<Points, String> {
    values::points(text).map(Points)
}

fn parse_letters(text: &str) -> Result<Letters, String> {
    star_words::letters(text).map(Letters)
}

impl Kind {
    /// Makes the design and writes its file.
    pub(super) fn make(self) -> Result<(), String> {
        let (start, common) = self.start()?;
        let path = &common.output;
        free_to_write(path, common.force)?;
        let spurs = match common.spurs {
            SpurWord::Retract => Spurs::Retract,
            SpurWord::Hold => Spurs::Hold,
            SpurWord::Cross => Spurs::Cross,
        };
        let mut design = new_design(start, common.courses, spurs).map_err(|finding| refused(&finding))?;
        design.name = common.name.clone().unwrap_or_else(|| stem(path));
        let (_, findings) = grow(&design.shape);
        if let Some(finding) = findings.into_iter().find(|f| refusal::not_grown(f.code)) {
            return Err(refused(&finding));
        }
        write_design(path, &design).map_err(|error| error.to_string())
    }

    fn start(self) -> Result<(Start, Common), String> {
        Ok(match self {
            Self::Zigzag(o) => {
                let path = match (o.points, o.from) {
                    (Some(Points(points)), _) => free_path(&points, o.closed)?,
                    (None, Some(file)) => imported(&file, o.tolerance, o.closed)?,
                    (None, None) => free_path(&values::points(USUAL_POINTS)?, o.closed)?,
                };
                (Start::Zigzag(path), o.common)
            }
            Self::Translation(o) => (Start::Translation(TranslationForm { zig: o.zig, zag: o.zag }), o.common),
            Self::Polar(o) => {
                let by = polar_by(&o)?;
                (Start::Polar(PolarForm { ribs: o.ribs, by }), o.common)
            }
            Self::Loop(o) => {
                let start = match o.from {
                    Some(file) => Start::Zigzag(imported(&file, o.tolerance, true)?),
                    None => Start::Loop(LoopForm {
                        sides: o.sides,
                        radius_mm: o.radius,
                        rise_mm: o.rise,
                        moved: o.moved,
                    }),
                };
                (start, o.common)
            }
            Self::Ribbon(o) => {
                let from = match o.from {
                    FromWord::Edge => RibbonFrom::Edge,
                    FromWord::Across => RibbonFrom::Across,
                };
                let form = RibbonForm {
                    ribs: o.ribs,
                    turn: o.turn,
                    pitch: o.pitch,
                    edge_mm: o.edge,
                    from,
                };
                (Start::Ribbon(form), o.common)
            }
            Self::Column(o) => {
                let form = ColumnForm {
                    ribs: o.ribs,
                    zag_run_mm: o.zag_run,
                    zig_run_mm: o.zig_run,
                    rise_mm: o.rise,
                    turn: o.turn,
                };
                (Start::Column(form), o.common)
            }
            Self::Helical(o) => {
                let form = HelicalForm {
                    ribs: o.ribs,
                    turn: o.turn,
                    pitch: o.pitch,
                    edge_mm: o.edge,
                };
                (Start::Helical(form), o.common)
            }
            Self::StarPath(o) => {
                let path = StarPath {
                    star: o.star,
                    unit_mm: o.unit,
                    closed: o.closed,
                    letters: o.letters.0,
                };
                (Start::StarPath(path), o.common)
            }
            Self::StarSolid(o) => {
                let solid = StarSolid {
                    star: o.star,
                    edge_mm: o.edge,
                };
                (Start::StarSolid(solid), o.common)
            }
        })
    }
}

/// Refuses to overwrite a file that is there, unless that is forced.
pub(super) fn free_to_write(path: &Path, force: bool) -> Result<(), String> {
    if !force && path.symlink_metadata().is_ok() {
        return Err(format!(
            "{} is there already and was left as it is; give another name, or --force to overwrite it",
            path.display()
        ));
    }
    Ok(())
}

fn imported(file: &Path, tolerance: f64, closed: bool) -> Result<FreePath, String> {
    let path = import(file, tolerance).map_err(|error| error.to_string())?;
    free_path(&path.points, closed || path.closed)
}

/// Free points: zig, zag, zig, zag ...; each edge is a zone of its own.
fn free_path(points: &[Point], closed: bool) -> Result<FreePath, String> {
    FreePath::from_points(points, closed).map_err(|finding| refused(&finding))
}

fn refused(finding: &Finding) -> String {
    format!("no design was made: {}", refusal::sentence(finding))
}

fn polar_by(o: &Polar) -> Result<PolarBy, String> {
    let usual_pitch = Angle::from_degrees(USUAL.0);
    Ok(match (o.pitch, o.edge, o.width, o.height) {
        (pitch, None, None, None) => PolarBy::PitchEdge {
            pitch: pitch.unwrap_or(usual_pitch),
            edge_mm: USUAL.1,
        },
        (None, Some(edge_mm), None, None) => PolarBy::PitchEdge {
            pitch: usual_pitch,
            edge_mm,
        },
        (None, None, Some(width_mm), None) => PolarBy::PitchWidth {
            pitch: usual_pitch,
            width_mm,
        },
        (None, None, None, Some(height_mm)) => PolarBy::PitchHeight {
            pitch: usual_pitch,
            height_mm,
        },
        (Some(pitch), Some(edge_mm), None, None) => PolarBy::PitchEdge { pitch, edge_mm },
        (Some(pitch), None, Some(width_mm), None) => PolarBy::PitchWidth { pitch, width_mm },
        (Some(pitch), None, None, Some(height_mm)) => PolarBy::PitchHeight { pitch, height_mm },
        (None, Some(edge_mm), Some(width_mm), None) => PolarBy::EdgeWidth { edge_mm, width_mm },
        (None, Some(edge_mm), None, Some(height_mm)) => PolarBy::EdgeHeight { edge_mm, height_mm },
        (None, None, Some(width_mm), Some(height_mm)) => PolarBy::WidthHeight { width_mm, height_mm },
        _ => {
            return Err(
                "a polar form is fixed by two measures; give two of --pitch, --edge, --width, --height, no more"
                    .to_owned(),
            );
        }
    })
}

fn stem(path: &Path) -> String {
    path.file_stem()
        .map(|s| s.to_string_lossy().into_owned())
        .unwrap_or_default()
}
