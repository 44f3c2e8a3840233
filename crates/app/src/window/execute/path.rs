//! The points of the free path.

use zonewright_geometry::{
    Finding, Point, Shape, Start, Vector,
    start::{DragRule, FreePath, PathEnd},
};

use crate::window::{path_edit::PathEdit, state::State};

/// Edits the path. A start of another kind is turned into free points first, in the same undo step.
pub(super) fn edit(state: &mut State, edit: PathEdit) {
    let converts = !matches!(state.shape().start, Start::Zigzag(_));
    let freed = if converts {
        super::shape::freed(state.shape())
    } else {
        Ok(state.shape().clone())
    };
    let mut shape = match freed {
        Ok(shape) => shape,
        Err(text) => return state.complain(text),
    };
    let Start::Zigzag(path) = &mut shape.start else { return };
    let join_mm = shape.tolerances.join_mm;
    if let Err(finding) = apply(path, edit, join_mm) {
        return state.say(refusal(edit.label(), &finding));
    }
    commit(state, shape, edit, converts);
}

/// The shape with a point of its path moved, as the next movement of a drag would make it; none when it cannot be.
pub(crate) fn moved_path(shape: &Shape, point: usize, to: Point, rule: DragRule) -> Option<Shape> {
    let mut moved = match shape.start {
        Start::Zigzag(_) => shape.clone(),
        _ => super::shape::freed(shape).ok()?,
    };
    let Start::Zigzag(path) = &mut moved.start else {
        return None;
    };
    path.set_point(point, to, rule).ok()?;
    Some(moved)
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
    state.view.panel = None;
    state.view.selection.part = None;
    state.view.point = match edit {
        PathEdit::Insert(at) | PathEdit::Split(at) => Some(at + 1),
        PathEdit::Delete(_) | PathEdit::Close(_) => None,
        PathEdit::Move { point, .. } => Some(point),
        PathEdit::Add => points.checked_sub(1),
        PathEdit::Role(..) => state.view.point,
    };
}

/// Applies an edit to a path.
fn apply(path: &mut FreePath, edit: PathEdit, join_mm: f64) -> Result<(), Finding> {
    match edit {
        PathEdit::Move { point, to, rule } => path.set_point(point, to, rule),
        PathEdit::Insert(at) => path.insert_point(at, None),
        PathEdit::Split(at) => path.split_letter(at, 2),
        PathEdit::Delete(at) => path.delete_point(at),
        PathEdit::Add => {
            let to = next_point(path)?;
            path.add_point(PathEnd::Last, to)
        }
        PathEdit::Role(at, role) => path.set_role(at, role),
        PathEdit::Close(closed) => path.set_closed(closed, join_mm),
    }
}

/// Where an added point goes: on an open path the zigzag is carried on, on a closed one the last edge is bent.
fn next_point(path: &FreePath) -> Result<Point, Finding> {
    let word = path.first_word()?;
    let nodes = word.nodes();
    let (last, before) = (nodes[nodes.len() - 1], nodes[nodes.len().saturating_sub(2)]);
    if path.closed {
        return Ok(before + (last - before) * 0.5);
    }
    let step = match word.letters.as_slice() {
        [.., one_before, _] => word.vector(one_before),
        [only] => word.vector(only),
        [] => Vector::X * 400.0,
    };
    Ok(last + step)
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
    if let Err(finding) = path.share_gap() {
        state.complain(refusal("The closing gap cannot be shared out", &finding));
        return;
    }
    state.change("Share out the closing gap", None, |design| {
        design.shape.start = Start::Zigzag(path);
    });
    state.say("The closing gap was shared out");
}

/// Says why something was refused, and what to do.
pub(super) fn refusal(what: &str, finding: &Finding) -> String {
    let text = finding.code.text();
    format!("{what}: {}. {}", text.what.to_lowercase(), text.remedy)
}
