//! `solve` and `parameters`.

use std::path::{Path, PathBuf};

use clap::Args;
use serde_json::{Value, json};
use zonewright_geometry::{
    ParameterKind, parameters,
    solve::{Effort, Free, Want, solve},
};
use zonewright_shop::{
    change_line, parameter_value, reached_line,
    text::{Units, exact},
    unsolved_text,
};

use super::{refusal::uncapitalised, say, wants};
use crate::document::{read_design, write_design};

/// The options of `solve`.
#[derive(Args, Debug)]
pub(super) struct Solve {
    /// The design.
    file: PathBuf,
    /// A wanted figure, such as height=3.2m, span=8m, headroom@1m=2.1m, area=12m2; ~ puts a tolerance behind it. More than once for several.
    #[arg(long, value_name = "FIGURE=VALUE", required = true, value_parser = wants::want)]
    want: Vec<Want>,
    /// The keys of the parameters that may change, separated by commas; each with bounds or not, as in start.pitch:20..50.
    #[arg(long, value_name = "KEYS", value_delimiter = ',', required = true)]
    change: Vec<String>,
    /// The design file to make.
    #[arg(short, long, value_name = "OUT")]
    output: PathBuf,
    /// Overwrite a file that is there.
    #[arg(long)]
    force: bool,
}

impl Solve {
    /// Solves, writes the design, and prints what changed.
    pub(super) fn run(&self) -> Result<(), String> {
        super::start::free_to_write(&self.output, self.force)?;
        let mut design = read_design(&self.file).map_err(|error| error.to_string())?;
        let free = self.change.iter().map(|text| wants::free(&design.shape, text));
        let free: Vec<Free> = free.collect::<Result<_, _>>()?;
        let found = solve(&design.shape, &self.want, &free, Effort::default(), &mut || false);
        let found = found.map_err(|failed| uncapitalised(&unsolved_text(&failed, design.units)))?;
        let lines = found.figures.iter().map(|f| reached_line(f, design.units));
        let lines: Vec<String> = lines
            .chain(found.changes.iter().map(|c| change_line(c, design.units)))
            .collect();
        design.shape = found.shape;
        write_design(&self.output, &design).map_err(|error| error.to_string())?;
        say(&(lines.join("\n") + "\n"))
    }
}

/// Lists the parameters of a design: key, value, and plain name.
pub(super) fn list(file: &Path, as_json: bool) -> Result<(), String> {
    let design = read_design(file).map_err(|error| error.to_string())?;
    let all = parameters(&design.shape);
    if as_json {
        let rows: Vec<Value> = all
            .iter()
            .map(|p| {
                json!({
                    "key": p.key,
                    "name": p.name,
                    "kind": kind_word(p.kind),
                    "value": p.value,
                    "least": p.bounds[0],
                    "most": p.bounds[1],
                })
            })
            .collect();
        return say(&format!("{:#}\n", Value::Array(rows)));
    }
    let widest = |of: &dyn Fn(usize) -> usize| (0..all.len()).map(of).max().unwrap_or(0);
    let shown: Vec<String> = all.iter().map(|p| full_value(p.kind, p.value, design.units)).collect();
    let keys = widest(&|k| all[k].key.chars().count());
    let values = widest(&|k| shown[k].chars().count());
    let mut out = String::new();
    for (p, value) in all.iter().zip(&shown) {
        out.push_str(&format!("{:keys$}  {value:>values$}  {}\n", p.key, p.name));
    }
    say(&out)
}

/// A value that `--change` and `start` read back, with all its digits.
fn full_value(kind: ParameterKind, value: f64, units: Units) -> String {
    match (kind, units) {
        (ParameterKind::Length, Units::Mm) => format!("{} mm", exact(value)),
        (ParameterKind::Angle, _) => format!("{}\u{b0}", exact(value)),
        (ParameterKind::Factor | ParameterKind::Count, _) => exact(value),
        (ParameterKind::Length, Units::Inch) => parameter_value(kind, value, units),
    }
}

const fn kind_word(kind: ParameterKind) -> &'static str {
    match kind {
        ParameterKind::Length => "length",
        ParameterKind::Angle => "angle",
        ParameterKind::Factor => "factor",
        ParameterKind::Count => "count",
    }
}
