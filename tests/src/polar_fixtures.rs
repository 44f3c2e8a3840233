//! The polar fixtures F1, F2 and F3 of docs/checks.md: derived there, and checked against convex hulls.

/// A fixture of docs/checks.md; lengths, areas and volumes in its unit.
pub struct Fixture {
    /// n.
    pub ribs: u32,
    /// Pitch from the horizontal, in degrees.
    pub pitch_deg: f64,
    /// Length of the ribs.
    pub edge: f64,
    /// Vertices, edges, panels.
    pub counts: [usize; 3],
    /// From pole to pole.
    pub height: f64,
    /// Of the rings from the first to the equator.
    pub radii: &'static [f64],
    /// Size in plan along x and y; 0 where none is printed.
    pub plan: [f64; 2],
    /// What it covers in plan.
    pub plan_area: f64,
    /// Of all panels.
    pub area: f64,
    /// Enclosed.
    pub volume: f64,
    /// Top angle, area, slope of the levels to the equator; level k and n - k are alike, their slopes supplementary.
    pub levels: &'static [[f64; 3]],
    /// Dihedrals: at the pole, then between level k and k + 1 up to the equator.
    pub dihedrals: &'static [f64],
}

/// Nine ribs.
pub const F1: Fixture = Fixture {
    ribs: 9,
    pitch_deg: 38.0,
    edge: 0.3,
    counts: [74, 144, 72],
    height: 1.662_285_983_4,
    radii: &[0.236_403_226_1, 0.444_292_734_2, 0.598_593_981_4, 0.680_695_960_2],
    plan: [1.361_391_920_5, 1.340_709_318_2],
    plan_area: 1.426_266_036_2,
    area: 5.457_909_131_0,
    volume: 1.148_574_542_5,
    levels: &[
        [31.270_882_697_5, 0.046_717_633_3, 39.741_043_204_7],
        [60.865_082_488_6, 0.078_612_810_8, 45.564_344_518_3],
        [86.068_799_079_5, 0.089_788_238_3, 57.381_943_177_9],
        [101.798_672_270_3, 0.088_098_491_5, 77.469_155_214_2],
    ],
    dihedrals: &[
        154.739_329_589_6,
        165.309_399_334_9,
        160.481_627_628_9,
        152.821_152_874_1,
        148.036_310_734_7,
    ],
};

/// Eight ribs.
#[expect(clippy::approx_constant, reason = "the figure as the source prints it")]
pub const F2: Fixture = Fixture {
    ribs: 8,
    pitch_deg: 45.0,
    edge: 1.0,
    counts: [58, 112, 56],
    height: 5.656_854_249_5,
    radii: &[0.707_106_781_2, 1.306_562_964_9, 1.707_106_781_2, 1.847_759_065_0],
    plan: [3.414_213_562_4, 3.414_213_562_4],
    plan_area: 9.656_854_249_5,
    area: 46.019_989_804_9,
    volume: 27.313_708_499_0,
    levels: &[
        [31.399_714_809_9, 0.521_005_383_3, 47.265_790_399_1],
        [60.0, 0.866_025_403_8, 54.735_610_317_2],
        [81.578_941_881_9, 0.989_218_575_7, 69.058_979_527_8],
        [90.0, 1.0, 90.0],
    ],
    dihedrals: &[
        147.350_100_126_2,
        161.060_560_254_1,
        155.625_583_087_6,
        149.638_806_595_2,
    ],
};

/// Ten ribs. The pitch is atan(1 / sqrt 2), printed 35.2643896828.
pub const F3: Fixture = Fixture {
    ribs: 10,
    pitch_deg: 35.264_389_682_754_654,
    edge: 0.5,
    counts: [92, 180, 90],
    height: 2.886_751_345_9,
    radii: &[
        0.408_248_290_5,
        0.776_534_393_8,
        1.068_807_900_3,
        1.256_459_042_6,
        1.321_119_219_6,
    ],
    plan: [0.0, 0.0],
    plan_area: 5.129_472_562_0,
    area: 18.860_984_041_7,
    volume: 7.403_755_911_1,
    levels: &[
        [29.228_652_828_0, 0.122_074_033_6, 0.0],
        [57.360_961_651_8, 0.210_521_277_8, 0.0],
        [82.685_131_582_2, 0.247_965_358_9, 0.0],
        [101.888_707_722_7, 0.244_637_401_6, 0.0],
        [109.471_220_634_5, 0.235_702_260_4, 90.0],
    ],
    dihedrals: &[
        158.750_452_759_2,
        167.868_209_257_1,
        164.283_997_456_6,
        157.842_393_652_7,
        150.630_173_254_0,
    ],
};
