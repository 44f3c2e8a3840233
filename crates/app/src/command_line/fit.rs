//! `fit`: brings the paths of a design to a drawn target.

use std::{
    fmt::Write as _,
    path::{Path, PathBuf},
    sync::Arc,
};

use clap::{Args, ValueEnum};
use zonewright_geometry::{Angle, Role, fit::FitEnd};
use zonewright_shop::text;

use super::{say, values};
use crate::{
    document::{Backdrop, BackdropPlacement, read_design, write_design},
    fitting::{Begin, FitWish},
    import::import_backdrop,
};

/// The unit that the numbers of an OBJ or STL are in.
#[derive(ValueEnum, Clone, Copy, PartialEq, Eq, Debug)]
enum MeshUnit {
    Mm,
    Cm,
    M,
    In,
    Ft,
}

impl MeshUnit {
    const fn mm(self) -> f64 {
        match self {
            Self::Mm => 1.0,
            Self::Cm => 10.0,
            Self::M => 1000.0,
            Self::In => 25.4,
            Self::Ft => 304.8,
        }
    }
}

/// Where a surface begins.
#[derive(ValueEnum, Clone, Copy, PartialEq, Eq, Debug)]
enum BeginWord {
    /// The middle lines of the target.
    Middle,
    /// The shell as it stands.
    Shell,
}

/// Which path a target of lines is for.
#[derive(ValueEnum, Clone, Copy, PartialEq, Eq, Debug)]
enum PathWord {
    Zig,
    Zag,
}

/// Brings the two paths of a translation surface to a target, or one path to a line; prints how far the nodes are from it.
#[derive(Args, Debug)]
pub(super) struct FitArguments {
    /// The design whose paths are fitted; one of another kind becomes a translation surface.
    file: PathBuf,
    /// What to fit to: OBJ, STL, CSV, DXF or SVG. Without it, the backdrop of the design.
    #[arg(long, value_name = "MESH")]
    target: Option<PathBuf>,
    /// The unit of OBJ and STL, which say none.
    #[arg(long, default_value = "mm", requires = "target")]
    unit: MeshUnit,
    /// The target's y points up.
    #[arg(long, requires = "target")]
    y_up: bool,
    /// Turn of the target about z.
    #[arg(long, value_name = "ANGLE", default_value = "0", value_parser = values::angle, allow_hyphen_values = true, requires = "target")]
    turn: Angle,
    /// Movement of the target: x,y,z.
    #[arg(long, value_name = "X,Y,Z", default_value = "0,0,0", value_parser = values::point, allow_hyphen_values = true, requires = "target")]
    shift: zonewright_geometry::Point,
    /// Parts of the zig path.
    #[arg(long, value_name = "N", default_value_t = FitWish::default().parts[0])]
    zig: u32,
    /// Parts of the zag path.
    #[arg(long, value_name = "N", default_value_t = FitWish::default().parts[1])]
    zag: u32,
    /// The most iterations.
    #[arg(long, value_name = "N", default_value_t = FitWish::default().iterations)]
    iterations: u32,
    /// How much the paths are smoothed and their edges made alike; 0 only comes close.
    #[arg(long, value_name = "S", default_value_t = FitWish::default().smoothing)]
    smoothing: f64,
    /// How much covering the whole target counts, beside that the nodes come close to it.
    #[arg(long, value_name = "C", default_value_t = FitWish::default().cover)]
    cover: f64,
    /// Leave the corners of the surface, or the ends of the path, where the fit begins.
    #[arg(long)]
    hold_ends: bool,
    /// Where a surface begins.
    #[arg(long, default_value = "middle")]
    begin: BeginWord,
    /// The path that a target of lines is for.
    #[arg(long, default_value = "zig")]
    path: PathWord,
    /// The design to write; it keeps the target as its backdrop.
    #[arg(short, long, value_name = "OUT")]
    output: PathBuf,
    /// Replace a file that is there.
    #[arg(long)]
    force: bool,
}

/// Curves of a target become chords this near, in millimetres, as for imported paths.
const FLATTENING_MM: f64 = 0.1;

impl FitArguments {
    pub(super) fn run(&self) -> Result<(), String> {
        if !self.force && self.output.symlink_metadata().is_ok() {
            return Err(format!(
                "{} is there already and was left as it is; give another name, or --force to replace it",
                self.output.display()
            ));
        }
        let mut design = read_design(&self.file).map_err(|error| error.to_string())?;
        if let Some(path) = &self.target {
            design.backdrop = Some(self.backdrop(path)?);
        }
        let Some(backdrop) = &design.backdrop else {
            return Err(format!("{} has no backdrop; give --target", self.file.display()));
        };
        let unusable = |what: String| format!("cannot fit to {}: {what}", backdrop.name);
        let target = backdrop.target().map_err(unusable)?;
        let wish = FitWish {
            parts: [self.zig, self.zag],
            smoothing: self.smoothing,
            cover: self.cover,
            iterations: self.iterations,
            hold_ends: self.hold_ends,
            begin: match self.begin {
                BeginWord::Middle => Begin::MiddleLines,
                BeginWord::Shell => Begin::Shell,
            },
            path: match self.path {
                PathWord::Zig => Role::Zig,
                PathWord::Zag => Role::Zag,
            },
        };
        let begin = wish.begin(&design.shape, &target).map_err(unusable)?;
        let fit = wish.run(&begin, &target, |_| true);
        design.shape = wish.applied(&design.shape, &fit)?;
        write_design(&self.output, &design).map_err(|error| error.to_string())?;
        let mut history = "iteration,rms_mm,largest_mm,uncovered_mm\n".to_owned();
        for (k, step) in fit.history.iter().enumerate() {
            let figures = [step.rms_mm, step.largest_mm, step.uncovered_mm].map(|mm| text::trimmed(mm, 6));
            let _ = writeln!(history, "{k},{}", figures.join(","));
        }
        history.push_str(match fit.end {
            FitEnd::Settled => "# settled: nothing moves any more\n",
            FitEnd::Iterations | FitEnd::Stopped => "# the most iterations were reached; more may come closer\n",
        });
        say(&history)
    }

    fn backdrop(&self, path: &Path) -> Result<Backdrop, String> {
        let drawn = import_backdrop(path, FLATTENING_MM).map_err(|error| error.to_string())?;
        let name = path.file_name().map(|n| n.to_string_lossy().into_owned());
        let backdrop = Backdrop {
            name: name.unwrap_or_default(),
            shown: true,
            placement: BackdropPlacement {
                shift: self.shift.0,
                turn: self.turn,
                scale: self.unit.mm(),
                y_up: self.y_up,
            },
            drawn: Arc::new(drawn),
        };
        backdrop
            .check()
            .map_err(|what| format!("cannot fit to {}: {what}", path.display()))?;
        Ok(backdrop)
    }
}
