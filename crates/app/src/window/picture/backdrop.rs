//! The backdrop in a picture: quiet lines behind the shell, fainter ones through it; and where the picked panel is farthest from it.

use zonewright_geometry::Shell;
use zonewright_painter::{Camera, Colour, ColourBy, Look, Mark, MarkKind, Picture, Scene, Tints, Tone};

use crate::window::state::State;

/// How opaque the lines are behind the shell and through it, of 255.
const ALPHA: [u8; 2] = [150, 46];

/// Adds the backdrop to a picture.
pub(super) fn add(state: &State, camera: &Camera, look: &Look, picture: &mut Picture) {
    let wire = &state.derived.backdrop.wire;
    if wire.is_empty() {
        return;
    }
    let [r, g, b, _] = state.colours().text_weak().to_array();
    let nothing = Shell::default();
    let lines = |alpha: u8| {
        let mark = Mark {
            at: wire.clone(),
            kind: MarkKind::Line {
                width: 1.0,
                dashed: false,
            },
            tone: Tone::Own(Colour { r, g, b, a: alpha }),
        };
        Scene::quick(&nothing).picture(&nothing, camera, look, &Tints::default(), &[mark])
    };
    picture.under(&lines(ALPHA[0]));
    picture.over(&lines(ALPHA[1]));
}

/// A mark from the farthest place of the picked panel to the backdrop, while distances are shown.
pub(super) fn marks(state: &State, marks: &mut Vec<Mark>) {
    let Some((panel, _)) = &state.view.panel else { return };
    if state.view.colour != ColourBy::Distance {
        return;
    }
    let Some(left) = state.derived.backdrop.left.get(*panel as usize) else {
        return;
    };
    let line = MarkKind::Line {
        width: 2.0,
        dashed: false,
    };
    marks.push(Mark {
        at: vec![left.at, left.closest],
        kind: line,
        tone: Tone::Selection,
    });
    marks.push(Mark {
        at: vec![left.at],
        kind: MarkKind::Dot { radius: 4.0 },
        tone: Tone::Selection,
    });
}
