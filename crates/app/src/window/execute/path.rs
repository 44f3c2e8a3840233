//! The points of the free path.

use zonewright_geometry::{Shape, Start, start::FreePath};

use crate::window::{path_edit::PathEdit, state::State};

/// Edits the path. A start of another kind is turned into free points first, in the same undo step.
pub(super) fn edit(state: &mut State, edit: PathEdit) {
    let converts = !matches!(state.shape().start, Start::Zigzag(_));
    let freed = if converts { super::shape::freed(state.shape()) } else { Ok(state.shape().clone()) };
    let mut shape = match freed {
        Ok(shape) => shape,
        Err(text) => return state.complain(text),
    };
    let Start::Zigzag(path) = &mut shape.start else { return };
    if let Err(text) = apply(path, edit) {
        return state.say(text);
    }
    commit(state, shape, edit, converts);
}

fn commit(state: &mut State, shape: Shape, edit: PathEdit, converts: bool) {
    // A drag that converts opens an undo step that the rest of the drag joins.
    state.change(edit.label(), edit.key(), |design| design.shape = shape);
    if converts {
        state.say("The start was turned into free points; undo brings its parameters back");
    } else if !matches!(edit, PathEdit::Move { .. }) {
        state.say(format!("{}: done", edit.label()));
    }
    let points = match &state.shape().start {
        Start::Zigzag(path) => path.letters.len() + usize::from(!path.closed),
        _ => 0,
    };
    state.view.point = match edit {
        PathEdit::Insert(at) | PathEdit::Split(at) => Some(at + 1),
        PathEdit::Delete(_) | PathEdit::Close(_) => None,
        PathEdit::Move { point, .. } => Some(point),
        PathEdit::Add(_) => points.checked_sub(1),
        PathEdit::Role(..) => state.view.point,
    };
}

/// Applies an edit to a path.
fn apply(path: &mut FreePath, edit: PathEdit) -> Result<(), String> {
    match edit {
        PathEdit::Move { point, to, rule } => path.set_point(point, to, rule),
        PathEdit::Insert(at) => path.insert_point(at),
        PathEdit::Split(at) => path.split_letter(at),
        PathEdit::Delete(at) => path.delete_point(at),
        PathEdit::Add(role) => path.add_point(role),
        PathEdit::Role(at, role) => path.set_role(at, role),
        PathEdit::Close(closed) => path.set_closed(closed),
    }
}

/// Shares the closing gap of a closed path out over its edges.
pub(super) fn share_gap(state: &mut State) {
    let Start::Zigzag(path) = &state.shape().start else {
        state.say("Only free points can have a closing gap: turn the start into free points first");
        return;
    };
    if !path.closed {
        state.say("The path is open: it has no closing gap");
        return;
    }
    let mut path = path.clone();
    path.share_gap();
    state.change("Share out the closing gap", None, |design| {
        design.shape.start = Start::Zigzag(path);
    });
    state.say("The closing gap was shared out");
}
