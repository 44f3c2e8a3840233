//! Playing and writing animations.

use std::path::PathBuf;

use crate::{
    animation::{Film, Subject},
    window::{
        animating::{AnimateAct, Playing, Progress, Writing},
        dialogs::Asked,
        state::State,
    },
};

/// Carries out what the animations are told.
pub(super) fn run(state: &mut State, act: AnimateAct) {
    match act {
        AnimateAct::Wish(wish) => {
            state.animating.playing = None;
            state.animating.wish = wish;
        }
        AnimateAct::Play => play(state),
        AnimateAct::Stop => stop(state),
        AnimateAct::Save => {
            let name = state.file_name();
            state.dialogs.ask(Asked::Animation, state.path.as_deref(), &name);
        }
        AnimateAct::SaveTo(path) => save(state, path),
    }
}

fn film(state: &mut State) -> Option<Film> {
    let wish = &state.animating.wish;
    match Film::new(state.shape(), &wish.subject, wish.back) {
        Ok(film) => Some(film),
        Err(why) => {
            state.complain(super::sentence(&format!("{why}.")));
            None
        }
    }
}

fn play(state: &mut State) {
    if let Some(film) = film(state) {
        let revision = state.history.revision();
        let rate = state.animating.wish.rate;
        state.animating.playing = Some(Playing::new(film, rate, revision));
        state.say(match state.animating.wish.subject {
            Subject::Growth => "Playing the growth; Escape ends it",
            Subject::Sweep { .. } => "Playing; Escape ends it",
        });
    }
}

fn stop(state: &mut State) {
    if let Some(writing) = &state.animating.writing {
        writing.stop();
    }
    if state.animating.playing.take().is_some() {
        state.say("The design is shown as it is");
    }
}

fn save(state: &mut State, path: PathBuf) {
    if state.animating.writing.is_some() {
        return state.say("An animation is being written already: wait, or stop it");
    }
    if let Some(film) = film(state) {
        let rate = u16::try_from(state.animating.wish.rate).unwrap_or(u16::MAX);
        let ctx = state.dialogs.system.clone();
        state.animating.writing = Some(Writing::begin(film, path, rate, ctx));
        state.say("Writing the animation…");
    }
}

/// Takes what was written, and goes to the frame of this time, in seconds. Gives how long to wait for the next one.
pub(crate) fn follow_animation(state: &mut State, now: f64) -> Option<f64> {
    if let Some(Progress::Ended(result)) = state.animating.writing.as_ref().map(Writing::progress) {
        state.animating.writing = None;
        match result {
            Ok(path) => state.say(format!("The animation was written: {}", path.display())),
            Err(why) if why == "stopped" => state.say("Writing was stopped; nothing was written"),
            Err(why) => state.complain(super::sentence(&format!("{why}."))),
        }
    }
    let revision = state.history.revision();
    let playing = state.animating.playing.as_mut()?;
    // A change of the design ends it: what plays would be another design.
    let next = if playing.revision == revision {
        playing.go_to(now)
    } else {
        Ok(None)
    };
    match next {
        Ok(Some(wait)) => return Some(wait),
        Ok(None) => {}
        Err(why) => state.complain(super::sentence(&format!("{why}."))),
    }
    state.animating.playing = None;
    None
}
