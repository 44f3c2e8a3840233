//! The backdrop: loaded, placed, removed; and paths fitted to it.

use std::{path::Path, sync::Arc};

use zonewright_geometry::{Role, fit::Fit, fit::FitEnd};
use zonewright_painter::{Bounds, ColourBy};

use super::{sentence, shape::FLATTENING_MM};
use crate::{
    document::{Backdrop, BackdropPlacement},
    fitting::FitWish,
    import::import_backdrop,
    window::{
        backdrop::{BackdropAct, Fitting, Told},
        dialogs::Asked,
        state::State,
    },
};

/// Carries out what is done with the backdrop.
pub(super) fn run(state: &mut State, act: BackdropAct) {
    match act {
        BackdropAct::Load => state
            .dialogs
            .ask(Asked::Backdrop, state.path.as_deref(), &state.file_name()),
        BackdropAct::LoadPath(path) => load(state, &path),
        BackdropAct::Wish(wish) => state.backdrop.wish = wish,
        BackdropAct::WithoutSign(on) => state.view.without_sign = on,
        act => with_one(state, act),
    }
}

/// What needs a backdrop.
fn with_one(state: &mut State, act: BackdropAct) {
    let Some(backdrop) = state.design().backdrop.clone() else {
        state.say("There is no backdrop: load one from the File menu");
        return;
    };
    match act {
        BackdropAct::Remove => {
            state.change("Remove the backdrop", None, |design| design.backdrop = None);
            if state.view.colour == ColourBy::Distance {
                state.view.colour = ColourBy::Zone;
            }
            state.say("The backdrop was removed; undo brings it back");
        }
        BackdropAct::Show(shown) => {
            let label = if shown {
                "Show the backdrop"
            } else {
                "Hide the backdrop"
            };
            state.change(label, None, |design| {
                design.backdrop = Some(Backdrop { shown, ..backdrop });
            });
        }
        BackdropAct::Place(placement) => place(state, Backdrop { placement, ..backdrop }),
        BackdropAct::Fit => fit(state, backdrop),
        BackdropAct::Stop => match &state.backdrop.fitting {
            Some(fitting) => fitting.stop(),
            None => state.say("No fit is going on"),
        },
        BackdropAct::Largest => largest(state),
        BackdropAct::Load | BackdropAct::LoadPath(_) | BackdropAct::Wish(_) | BackdropAct::WithoutSign(_) => {}
    }
}

fn load(state: &mut State, path: &Path) {
    let kept = "The design in the window was kept.";
    let drawn = match import_backdrop(path, FLATTENING_MM) {
        Ok(drawn) => drawn,
        Err(error) => return state.complain(sentence(&format!("{error}. {kept}"))),
    };
    let name = path.file_name().unwrap_or_default().to_string_lossy().into_owned();
    // The same file again, perhaps changed: it stays where it was put.
    let before = state.design().backdrop.as_ref().filter(|b| b.name == name);
    let placement = before.map_or_else(BackdropPlacement::default, |b| b.placement);
    let backdrop = Backdrop {
        name,
        shown: true,
        placement,
        drawn: Arc::new(drawn),
    };
    if let Err(what) = backdrop.check() {
        return state.complain(sentence(&format!("cannot load {}: {what}. {kept}", path.display())));
    }
    let (triangles, lines) = (backdrop.drawn.triangles.len(), backdrop.drawn.lines.len());
    let size = Bounds::of_points(backdrop.drawn.points.iter().map(|p| placement.place(*p)));
    let units = state.units();
    let size = size.map(|b| b.size().to_array().map(|side| units.length(side)).join(" × "));
    let name = backdrop.name.clone();
    state.backdrop.history.clear();
    state.backdrop.end = None;
    state.change("Load a backdrop", None, |design| design.backdrop = Some(backdrop));
    state.say(format!(
        "{name}: {triangles} triangles, {lines} lines, {}",
        size.unwrap_or_default()
    ));
}

fn place(state: &mut State, backdrop: Backdrop) {
    if let Err(what) = backdrop.check() {
        return state.say(format!("The backdrop cannot stand there: {what}"));
    }
    state.change("Place the backdrop", Some("backdrop placement".to_owned()), |design| {
        design.backdrop = Some(backdrop);
    });
}

fn fit(state: &mut State, backdrop: Backdrop) {
    state.backdrop.history.clear();
    state.backdrop.end = None;
    let (ctx, shape, wish) = (state.dialogs.system.clone(), state.shape().clone(), state.backdrop.wish);
    state.say("Fitting the paths to the backdrop");
    state.backdrop.fitting = Some(Fitting::start(ctx, backdrop, shape, wish));
}

/// Takes what a fit that is going on has told; when it has ended, its paths become those of the design, in one undo step.
pub(crate) fn follow_fit(state: &mut State) {
    let Some(fitting) = &state.backdrop.fitting else { return };
    let mut done = None;
    let told: Vec<Told> = fitting.told().collect();
    for told in told {
        match told {
            Told::Step(step) => state.backdrop.history.push(step),
            Told::Done(fitted) => done = Some(fitted),
        }
    }
    let now = state.design().backdrop.as_ref();
    if now.is_none_or(|now| !now.same_place(&fitting.about)) {
        state.backdrop.fitting = None;
        state.backdrop.history.clear();
        state.say("The backdrop was changed: the fit was given up");
        return;
    }
    let Some(fitted) = done else { return };
    let wish = fitting.wish;
    state.backdrop.fitting = None;
    match fitted {
        Ok(fit) => apply(state, &wish, &fit),
        Err(what) => state.complain(sentence(&format!("the paths cannot be fitted: {what}."))),
    }
}

fn apply(state: &mut State, wish: &FitWish, fit: &Fit) {
    let shape = match wish.applied(state.shape(), fit) {
        Ok(shape) => shape,
        Err(what) => return state.complain(sentence(&format!("{what}. The design was kept."))),
    };
    state.backdrop.end = Some(fit.end);
    state.change("Fit the paths to the backdrop", None, |design| design.shape = shape);
    state.view.point = None;
    state.view.panel = None;
    state.view.colour = ColourBy::Distance;
    let units = state.units();
    let Some(last) = fit.history.last() else { return };
    let what = match (fit.paths.b.is_empty(), wish.path) {
        (false, _) => "Both paths were fitted",
        (true, Role::Zig) => "The zig path was fitted",
        (true, Role::Zag) => "The zag path was fitted",
    };
    let how = match fit.end {
        FitEnd::Settled => "nothing moves any more",
        FitEnd::Iterations => "more iterations may come closer",
        FitEnd::Stopped => "stopped",
    };
    state.say(format!(
        "{what}: its points are at most {} away; {how}",
        units.length(last.largest_mm)
    ));
}

/// Picks the panel that is farthest from the backdrop.
fn largest(state: &mut State) {
    let Some((panel, _)) = state.derived.backdrop.largest() else {
        state.say("Nothing is measured yet: lay a course, and wait until the shell is still");
        return;
    };
    state.view.colour = ColourBy::Distance;
    super::view::run(state, crate::window::Command::SelectPanel(Some(panel)));
}
