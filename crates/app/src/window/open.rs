//! Opening the window: with OpenGL, or else through Vulkan, on drivers in software where there is no graphics card.

use std::{
    cell::Cell,
    path::{Path, PathBuf},
    rc::Rc,
};

use eframe::egui_wgpu::{WgpuConfiguration, WgpuSetup};

use super::{App, execute, frames::FrameLog, safe::Stamp, session};
use crate::document::{self, Design};

/// What draws the window.
#[derive(Clone, Copy, PartialEq, Eq, Debug, Default)]
pub enum Renderer {
    /// OpenGL, or else Vulkan.
    #[default]
    Auto,
    /// OpenGL, in software where there is no graphics card.
    OpenGl,
    /// Vulkan by way of wgpu, in software where there is no graphics card.
    Wgpu,
}

/// How the window is to be opened.
#[derive(Clone, PartialEq, Eq, Debug, Default)]
pub struct Options {
    /// The design to open; else the last one, or the sample.
    pub file: Option<PathBuf>,
    /// What draws the window.
    pub renderer: Renderer,
    /// Where the times of all frames are written to.
    pub frame_times: Option<PathBuf>,
}

/// The packages, by their names on Debian, that hold drivers in software.
const PACKAGES: [&str; 2] = ["libgl1 libegl1 libgl1-mesa-dri", "libvulkan1 mesa-vulkan-drivers"];

/// Opens the window. Comes back when it is closed.
///
/// # Errors
/// One sentence, when no window can be opened: why, what to install, and that the command line needs none.
pub fn run(options: &Options) -> Result<(), String> {
    let session = session::file();
    let remembered = session.as_deref().map(session::read).unwrap_or_default();
    let first_shown = first_design(options.file.as_deref(), &remembered)?;
    // Whoever has opened or saved a design before knows the way.
    let newcomer = options.file.is_none() && remembered.last().is_none();
    let log = options.frame_times.as_deref().map(FrameLog::create).transpose()?;
    // Once the window has been there, a failure is no reason to open another one on the design as it was.
    let shown = Rc::new(Cell::new(false));
    let open = |renderer: eframe::Renderer| {
        let (first_shown, session) = (first_shown.clone(), session.clone());
        let (log, shown) = (log.clone(), Rc::clone(&shown));
        let create: eframe::AppCreator<'_> = Box::new(move |cc| {
            shown.set(true);
            let First {
                design,
                path,
                stamp,
                message,
            } = first_shown;
            let app = App::new(&cc.egui_ctx, design, path).with_frame_log(log);
            Ok(Box::new(
                app.with_session(session)
                    .with_stamp(stamp)
                    .with_message(message)
                    .with_offer(newcomer),
            ))
        });
        eframe::run_native("zonewright", native(renderer, remembered.size()), create)
    };
    let (first, second) = match options.renderer {
        Renderer::Auto => (eframe::Renderer::Glow, Some(eframe::Renderer::Wgpu)),
        Renderer::OpenGl => (eframe::Renderer::Glow, None),
        Renderer::Wgpu => (eframe::Renderer::Wgpu, None),
    };
    let mut opened = open(first);
    if let (Err(error), Some(second)) = (&opened, second)
        && !no_display(error)
        && !shown.get()
    {
        opened = open(second);
    }
    opened.map_err(|error| refused(&error, options.renderer, shown.get()))
}

fn native(renderer: eframe::Renderer, size: Option<[f32; 2]>) -> eframe::NativeOptions {
    let mut wgpu_options = WgpuConfiguration::default();
    if let WgpuSetup::CreateNew(setup) = &mut wgpu_options.wgpu_setup {
        setup.instance_descriptor.backends = wgpu::Backends::VULKAN;
        // Flat panels need no fast card, and the choice falls on a driver in software only when there is no other.
        setup.power_preference = wgpu::PowerPreference::LowPower;
    }
    eframe::NativeOptions {
        viewport: egui::ViewportBuilder::default()
            .with_title("zonewright")
            .with_app_id("zonewright")
            .with_inner_size(size.unwrap_or([1280.0, 800.0]))
            .with_min_inner_size([900.0, 560.0])
            .with_drag_and_drop(true),
        renderer,
        wgpu_options,
        // Noise against banding: flat colours have no bands, and in software every pixel pays for it.
        dithering: false,
        ..eframe::NativeOptions::default()
    }
}

const fn no_display(error: &eframe::Error) -> bool {
    matches!(error, eframe::Error::Winit(_) | eframe::Error::WinitEventLoop(_))
}

/// Why no window was opened, in one sentence: what the system's libraries say names their own sources.
fn refused(error: &eframe::Error, renderer: Renderer, shown: bool) -> String {
    let [opengl, vulkan] = PACKAGES;
    let why = if shown {
        return "The window was closed by the display or its driver.".to_owned();
    } else if no_display(error) {
        "there is no display that answers; set DISPLAY or WAYLAND_DISPLAY".to_owned()
    } else {
        match renderer {
            Renderer::Auto => format!(
                "neither OpenGL nor Vulkan has a driver, not even one in software; install {opengl}, or {vulkan} (so named on Debian)"
            ),
            Renderer::OpenGl => format!(
                "OpenGL has no driver, not even one in software; install {opengl} (so named on Debian), or try --renderer wgpu"
            ),
            Renderer::Wgpu => format!(
                "Vulkan has no driver, not even one in software; install {vulkan} (so named on Debian), or try --renderer opengl"
            ),
        }
    };
    format!(
        "No window can be opened: {why}; everything also works from the command line, without a window: see zonewright --help."
    )
}

/// The design to begin with.
#[derive(Clone)]
struct First {
    design: Design,
    path: Option<PathBuf>,
    /// Of its file, from before it was read.
    stamp: Option<Stamp>,
    /// What is to be said about it.
    message: Option<String>,
}

/// Reads the design to begin with: this file, or else the last design, or else the sample.
fn first_design(file: Option<&Path>, session: &session::Session) -> Result<First, String> {
    let read = |file: &Path| {
        let stamp = Stamp::of_file(file).ok();
        let path = Some(file.to_path_buf());
        document::read_design(file).map(|design| First {
            design,
            path,
            stamp,
            message: None,
        })
    };
    if let Some(file) = file {
        return read(file).map_err(|error| error.to_string());
    }
    let mut message = None;
    if let Some(last) = session.last().filter(|last| last.is_file()) {
        match read(&last) {
            Ok(first) => return Ok(first),
            // The last design may be broken by now; that must not keep the window from opening.
            Err(error) => message = Some(execute::sentence(&format!("{error}. The sample is shown instead."))),
        }
    }
    let mut design = session::sample()?;
    design.units = session.units().unwrap_or(design.units);
    Ok(First {
        design,
        path: None,
        stamp: None,
        message,
    })
}
