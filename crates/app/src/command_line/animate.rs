//! `animate`: the growth of a design, or one parameter that runs between two values, as moving pictures.

use std::path::PathBuf;

use clap::Args;
use zonewright_geometry::parameter::parameter;

use super::values;
use crate::{
    animation::{Film, Subject, kind_of, save, write},
    document::read_design,
};

/// What `animate` is told.
#[derive(Args, Debug)]
pub(super) struct Animate {
    /// The design.
    file: PathBuf,
    /// What to write: a .gif, a .png (animated), or a folder for numbered PNGs.
    #[arg(short, long, value_name = "OUT")]
    output: PathBuf,
    /// One parameter that runs between two values; without it, the growth is shown course by course.
    #[arg(long, value_name = "KEY=FROM..TO", value_parser = values::sweep)]
    sweep: Option<[String; 3]>,
    /// How many frames a sweep has.
    #[arg(long, value_name = "N", default_value = "48", value_parser = values::count)]
    frames: u32,
    /// Frames a second. The growth has one frame a course.
    #[arg(long, value_name = "N", value_parser = values::count)]
    rate: Option<u32>,
    /// Run back to the first frame, too.
    #[arg(long)]
    back: bool,
    /// From where: plan, front, side, iso, or fit (the window's first view).
    #[arg(long, value_name = "NAME", default_value = "iso")]
    view: String,
    /// Width and height in pixels.
    #[arg(long, value_name = "WxH", default_value = "800x600", value_parser = values::size)]
    size: [u32; 2],
}

impl Animate {
    /// Makes the animation.
    pub(super) fn make(&self) -> Result<(), String> {
        let view = values::view(&self.view)?;
        let design = read_design(&self.file).map_err(|error| error.to_string())?;
        let subject = match &self.sweep {
            None => Subject::Growth,
            Some([key, from, to]) => {
                let known = parameter(&design.shape, key).ok_or_else(|| {
                    format!("this design has no parameter `{key}`; zonewright parameters lists those that it has")
                })?;
                let value = |text: &str| {
                    values::of_kind(known.kind, text).map_err(|what| format!("in the sweep of `{key}`: {what}"))
                };
                Subject::Sweep {
                    key: key.clone(),
                    from: value(from)?,
                    to: value(to)?,
                    frames: self.frames,
                }
            }
        };
        // A course is read more slowly than a movement.
        let usual = if subject == Subject::Growth { 4 } else { 24 };
        let rate = u16::try_from(self.rate.unwrap_or(usual)).unwrap_or(u16::MAX);
        let film = Film::new(&design.shape, &subject, self.back)
            .map_err(|what| format!("cannot animate {}: {what}", self.file.display()))?;
        let kind = kind_of(&self.output);
        let written = write(&film, kind, view, self.size, rate, &mut |_| true)?;
        save(&self.output, written)
    }
}
