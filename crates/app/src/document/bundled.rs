//! The designs that come with the program.

/// Name and text of each bundled design; the first is the demo that an empty window shows.
#[must_use]
pub const fn bundled() -> &'static [(&'static str, &'static str)] {
    &[
        (
            "Plant house",
            include_str!("../../../../assets/designs/plant-house.ron"),
        ),
        (
            "Stage canopy",
            include_str!("../../../../assets/designs/stage-canopy.ron"),
        ),
        (
            "Climbing column",
            include_str!("../../../../assets/designs/climbing-column.ron"),
        ),
        (
            "Helical lantern",
            include_str!("../../../../assets/designs/helical-lantern.ron"),
        ),
        ("Star solid", include_str!("../../../../assets/designs/star-solid.ron")),
        (
            "Folded screen",
            include_str!("../../../../assets/designs/folded-screen.ron"),
        ),
    ]
}
