//! Things that can be picked: points of the path, and vertices, edges and panels of the shell.
//!
//! A vertex or an edge has no name of its own in the shell; it is held by a panel that it belongs to, whose name survives edits
//! upstream, and by its place round that panel.

use zonewright_geometry::{NONE, PanelName, Point, Shell, measure::Figure};

use super::derived::Derived;

/// Something that can be picked.
#[derive(Clone, PartialEq, Eq, Debug)]
pub enum Thing {
    /// A point of the path, by its place.
    Point(usize),
    /// A vertex of the shell.
    Vertex(Held),
    /// An edge of the shell.
    Edge(Held),
    /// A panel of the shell.
    Panel(Held),
}

/// What kind of thing it is.
#[derive(Clone, Copy, PartialEq, Eq, Debug)]
pub enum Kind {
    /// A point of the path.
    Point,
    /// A vertex of the shell.
    Vertex,
    /// An edge of the shell.
    Edge,
    /// A panel of the shell.
    Panel,
}

impl Kind {
    /// All kinds, small things first.
    pub const ALL: [Self; 4] = [Self::Point, Self::Vertex, Self::Edge, Self::Panel];

    /// The thing of this kind with an index; none when there is none.
    #[must_use]
    pub fn thing(self, derived: &Derived, index: u32) -> Option<Thing> {
        let shell = &derived.shell;
        match self {
            Self::Point => {
                let at = index as usize;
                (at < derived.path.as_ref()?.placed.len()).then_some(Thing::Point(at))
            }
            Self::Vertex => {
                let panel = shell.panels.iter().position(|p| p.corners.contains(&index))?;
                Held::at(shell, panel, |outline| outline.iter().position(|v| *v == index)).map(Thing::Vertex)
            }
            Self::Edge => {
                let edge = shell.edges.get(index as usize)?;
                let panel = edge.panels.into_iter().find(|p| *p != NONE)?;
                Held::at(shell, panel as usize, |outline| {
                    sides(outline).position(|side| same(side, edge.ends))
                })
                .map(Thing::Edge)
            }
            Self::Panel => Held::at(shell, index as usize, |_| Some(0)).map(Thing::Panel),
        }
    }

    /// How many things of this kind there are.
    #[must_use]
    pub(super) fn count(self, derived: &Derived) -> usize {
        match self {
            Self::Point => derived.path.as_ref().map_or(0, |p| p.placed.len()),
            Self::Vertex => derived.shell.points.len(),
            Self::Edge => derived.shell.edges.len(),
            Self::Panel => derived.shell.panels.len(),
        }
    }
}

/// A place round a panel.
#[derive(Clone, PartialEq, Eq, Debug)]
pub struct Held {
    name: PanelName,
    /// The panel's index in the shell that it was last found in; [`NONE`] while it is lost.
    panel: u32,
    /// The corner, or the side that leaves it, in the panel's outline.
    slot: usize,
    /// How many corners the outline has: with another number the place means another one.
    corners: usize,
}

impl Held {
    fn at(shell: &Shell, panel: usize, slot: impl FnOnce(&[u32]) -> Option<usize>) -> Option<Self> {
        shell.panels.get(panel)?;
        let panel = u32::try_from(panel).ok()?;
        let outline = shell.outline(panel);
        Some(Self {
            name: shell.panel_name(panel),
            panel,
            slot: slot(&outline)?,
            corners: outline.len(),
        })
    }

    /// The outline of the panel and the place in it, while it is found.
    fn outline(&self, shell: &Shell) -> Option<Vec<u32>> {
        ((self.panel as usize) < shell.panels.len()).then(|| shell.outline(self.panel))
    }

    /// Finds the panel again in a shell that has grown anew. `side` says whether the place is a side.
    fn follow(&mut self, shell: &Shell, side: bool) {
        let stays = (self.panel as usize) < shell.panels.len() && shell.panel_name(self.panel) == self.name;
        if !stays {
            let Some((panel, turned)) = shell.panel_named(&self.name) else {
                self.panel = NONE;
                return;
            };
            self.panel = panel;
            if turned {
                // Inside out, the corners run the other way from the same first one.
                self.name = shell.panel_name(panel);
                self.slot = if side {
                    self.corners - 1 - self.slot
                } else {
                    (self.corners - self.slot) % self.corners
                };
            }
        }
        if shell.outline(self.panel).len() != self.corners {
            self.panel = NONE;
        }
    }
}

fn sides(outline: &[u32]) -> impl Iterator<Item = [u32; 2]> + '_ {
    let next = outline.iter().cycle().skip(1);
    outline.iter().zip(next).map(|(a, b)| [*a, *b])
}

const fn same(a: [u32; 2], b: [u32; 2]) -> bool {
    (a[0] == b[0] && a[1] == b[1]) || (a[0] == b[1] && a[1] == b[0])
}

impl Thing {
    /// What kind of thing it is.
    #[must_use]
    pub const fn kind(&self) -> Kind {
        match self {
            Self::Point(_) => Kind::Point,
            Self::Vertex(_) => Kind::Vertex,
            Self::Edge(_) => Kind::Edge,
            Self::Panel(_) => Kind::Panel,
        }
    }

    /// Its index in the path or in the shell; none while it is not there.
    #[must_use]
    pub fn index(&self, derived: &Derived) -> Option<u32> {
        let shell = &derived.shell;
        match self {
            Self::Point(at) => {
                let there = *at < Kind::Point.count(derived);
                u32::try_from(*at).ok().filter(|_| there)
            }
            Self::Vertex(held) => held.outline(shell)?.get(held.slot).copied(),
            Self::Edge(held) => {
                let side = sides(&held.outline(shell)?).nth(held.slot)?;
                // Not from the parts: they may still be those of an older shell.
                let at = shell.edges.iter().position(|e| same(e.ends, side))?;
                u32::try_from(at).ok()
            }
            Self::Panel(held) => held.outline(shell).map(|_| held.panel),
        }
    }

    /// What is measured from or to; none while it is not there.
    #[must_use]
    pub fn figure(&self, derived: &Derived) -> Option<Figure> {
        let index = self.index(derived)?;
        let shell = &derived.shell;
        let place = |v: u32| shell.points.get(v as usize).copied();
        Some(match self {
            Self::Point(at) => Figure::Point(*derived.path.as_ref()?.placed.get(*at)?),
            Self::Vertex(_) => Figure::Point(place(index)?),
            Self::Edge(_) => {
                let [a, b] = shell.edges.get(index as usize)?.ends;
                Figure::Line([place(a)?, place(b)?])
            }
            Self::Panel(_) => Figure::Plane(shell.corner_points(index)),
        })
    }

    /// What it is called in sentences and lists.
    #[must_use]
    pub fn title(&self, derived: &Derived) -> String {
        let word = match self.kind() {
            Kind::Point => "Point",
            Kind::Vertex => "Vertex",
            Kind::Edge => "Edge",
            Kind::Panel => "Panel",
        };
        let Some(index) = self.index(derived) else {
            return format!("{word} (gone)");
        };
        match self.kind() {
            Kind::Point | Kind::Vertex => format!("{word} {}", index + 1),
            Kind::Edge => format!("{word} {}", derived.parts.edge_mark(index)),
            Kind::Panel => {
                let mark = derived.parts.panels.get(index as usize).map(|p| p.mark.to_string());
                format!("{word} {}", mark.unwrap_or_default())
            }
        }
    }

    /// Finds it again after the shell has grown anew.
    pub(super) fn follow(&mut self, shell: &Shell) {
        match self {
            Self::Point(_) => {}
            Self::Edge(held) => held.follow(shell, true),
            Self::Vertex(held) | Self::Panel(held) => held.follow(shell, false),
        }
    }
}

/// The point of the path that stands where a vertex stands: moving the one moves the other.
#[must_use]
pub(super) fn path_point_at(derived: &Derived, place: Point) -> Option<usize> {
    // The path's points and the shell's vertices are sums of the same edges in different order: they differ by rounding.
    const ROUNDING_MM: f64 = 1e-6;
    let path = derived.path.as_ref()?;
    path.placed.iter().position(|p| p.distance(place) < ROUNDING_MM)
}
