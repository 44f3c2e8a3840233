//! The designs that come with the program: the commissions of one fishing village's waterfront.

/// Name and text of each bundled design; the first is the demo that an empty window shows.
#[must_use]
pub const fn bundled() -> &'static [(&'static str, &'static str)] {
    &[
        (
            "Plant house",
            include_str!("../../../../assets/designs/plant-house.ron"),
        ),
        (
            "Ferry steps canopy",
            include_str!("../../../../assets/designs/ferry-steps-canopy.ron"),
        ),
        (
            "Pier head housing",
            include_str!("../../../../assets/designs/pier-head-housing.ron"),
        ),
        (
            "Tide column",
            include_str!("../../../../assets/designs/tide-column.ron"),
        ),
        (
            "Harbour office screen",
            include_str!("../../../../assets/designs/harbour-office-screen.ron"),
        ),
        (
            "Ice house vent",
            include_str!("../../../../assets/designs/ice-house-vent.ron"),
        ),
    ]
}
