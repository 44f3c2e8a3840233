//! Random records, on a small lattice of vectors so that parallel, equal and opposite letters are common.

use proptest::prelude::*;

use super::*;

fn vector() -> impl Strategy<Value = Vector> {
    // A small lattice, so that parallel, equal and opposite letters are common.
    let axis = || -2_i32..=2;
    (axis(), axis(), axis())
        .prop_filter("a letter has a length", |(x, y, z)| (*x, *y, *z) != (0, 0, 0))
        .prop_map(|(x, y, z)| Vector::new(f64::from(x), f64::from(y), f64::from(z)))
}

fn role() -> impl Strategy<Value = Role> {
    prop_oneof![Just(Role::Zig), Just(Role::Zag)]
}

fn spurs() -> impl Strategy<Value = Spurs> {
    prop_oneof![Just(Spurs::Retract), Just(Spurs::Hold), Just(Spurs::Cross)]
}

fn path() -> impl Strategy<Value = FreePath> {
    (prop::collection::vec((vector(), role()), 1..9), any::<bool>()).prop_map(|(mut letters, closed)| {
        let sum: Vector = letters.iter().map(|l| l.0).sum();
        if closed && sum != Vector::ZERO {
            letters.push((-sum, Role::Zag));
        }
        FreePath {
            closed,
            ..open_word(&letters)
        }
    })
}

fn act() -> impl Strategy<Value = Act> {
    let directions = prop::collection::vec(
        prop_oneof![
            vector().prop_map(Direction::Own),
            (0_u32..4).prop_map(|z| Direction::Zone(ZoneRef::Start(z))),
            (0_u32..4).prop_map(|z| Direction::Against(ZoneRef::Start(z))),
            Just(Direction::Between),
        ],
        1..3,
    );
    let sign = prop_oneof![Just(Sign::Plus), Just(Sign::Minus)];
    let kth = (0_u32..6, sign, 1_u32..4).prop_map(|(index, sign, k)| Vs::EveryKth {
        from: crate::LetterName::of_start(index, sign),
        k,
    });
    let vs = prop_oneof![Just(Vs::All), kth].boxed();
    prop_oneof![
        4 => (1_u32..4, spurs()).prop_map(|(count, spurs)| lay(count, spurs)),
        1 => spurs().prop_map(until_still),
        1 => vs.clone().prop_map(|at| Act::Fill { at }),
        2 => (vs.clone(), directions).prop_map(|(at, directions)| Act::Splice { at, directions }),
        1 => Just(Act::Retract),
        1 => vs.prop_map(|at| Act::Cross { at }),
        1 => Just(Act::SetRoles(RoleRule::Alternate)),
        1 => Just(Act::SetRoles(RoleRule::Swap)),
        1 => (0_u32..9).prop_map(|n| Act::SetRoles(RoleRule::FirstAreZig(n))),
        1 => Just(Act::CloseRim),
    ]
}

pub(super) fn record() -> impl Strategy<Value = Shape> {
    (path(), prop::collection::vec((act(), any::<bool>()), 0..6)).prop_map(|(path, acts)| {
        let (acts, aft): (Vec<Act>, Vec<bool>) = acts.into_iter().unzip();
        let mut shape = shape(path, acts);
        for (step, aft) in shape.steps.iter_mut().zip(aft) {
            step.side = if aft { Side::Aft } else { Side::Fore };
        }
        shape
    })
}

fn front_sum(shell: &Shell, side: usize) -> Vector {
    let letters = shell.fronts[side].letters.iter();
    letters
        .map(|l| &shell.letters[l.letter as usize])
        .map(|l| shell.zones[l.zone as usize].vector * l.sign.factor())
        .sum()
}

proptest! {
    #![proptest_config(ProptestConfig::with_cases(400))]

    #[test]
    fn any_record_grows_and_holds_its_check(shape in record()) {
        let (shell, findings) = grow(&shape);
        prop_assert_eq!(shell.check(0.001), Ok(()), "{:?}", findings);
    }

    #[test]
    fn growth_keeps_the_vector_sum(shape in record()) {
        let (shell, findings) = grow(&shape);
        prop_assume!(findings.iter().all(|f| f.level() != crate::Level::Stop || f.code == Code::NoPanels || f.code == Code::CrowdedEdge));
        let Start::Zigzag(path) = &shape.start else { unreachable!() };
        let sum: Vector = path.letters.iter().map(|l| match l.vector {
            FreeVector::Own(v) => v,
            FreeVector::Same(..) => Vector::ZERO,
        }).sum();
        for side in [0, 1] {
            prop_assert!((front_sum(&shell, side) - sum).length() < 1e-9);
        }
    }

    #[test]
    fn undoing_a_course_restores_the_front(path in path(), before in 0_u32..3, spurs in spurs()) {
        let shape = shape(path, Vec::new());
        let word = shape.start.first_word().unwrap();
        let alphabet = Alphabet::of_start(&word, &shape).unwrap();
        let mut growing = Growing { shape: &shape, alphabet, mesh: Mesh::default(), start_zones: 0, hull: [None, None], lift: None };
        for mut front in Front::both(&word, word.closed, &growing.alphabet, &mut growing.mesh) {
            front.lay(Courses::Count(before), spurs, &growing.alphabet, &mut growing.mesh);
            front.check(&growing.alphabet, &growing.mesh);
            let kept = front.clone();
            let mut log: Vec<Change> = Vec::new();
            let open = front.open_vs();
            front.lay_once(&open, spurs, &growing.alphabet, &mut growing.mesh, Some(&mut log));
            front.check(&growing.alphabet, &growing.mesh);
            front.undo(&log);
            prop_assert_eq!(&front, &kept);
        }
    }

    #[test]
    fn moving_and_scaling_the_input_moves_and_scales_the_shell(shape in record(), by in 0.1_f64..10.0, shift in vector()) {
        let (first, _) = grow(&shape);
        let mut moved = shape.clone();
        let Start::Zigzag(path) = &mut moved.start else { unreachable!() };
        path.origin += shift;
        path.origin = Point(path.origin.0 * by);
        for letter in &mut path.letters {
            if let FreeVector::Own(v) = &mut letter.vector {
                *v *= by;
            }
        }
        for step in &mut moved.steps {
            if let Act::Splice { directions, .. } = &mut step.act {
                for direction in directions {
                    if let Direction::Own(v) = direction {
                        *v *= by;
                    }
                }
            }
        }
        let (second, _) = grow(&moved);
        prop_assert_eq!(&first.panels, &second.panels);
        prop_assert_eq!(&first.edges, &second.edges);
        for (p, q) in first.points.iter().zip(&second.points) {
            let expected = (p.0 + shift) * by;
            prop_assert!((expected - q.0).length() < 1e-9 * (1.0 + expected.length()));
        }
    }
}
