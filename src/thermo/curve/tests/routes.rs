//! Routes and their sums.

use proptest::prelude::*;

use super::*;

#[test]
fn the_route_names_every_leg() {
    let rich = rich();
    let legs = rich.route(at(&rich, 300.0, Pin::Stable).unwrap(), at(&rich, 1000.0, Pin::Stable).unwrap());
    let kinds: Vec<LegKind> = legs.iter().map(|leg| leg.kind).collect();
    let turn = |link| LegKind::Transition { from: link, to: link + 1, link: Some(link) };
    assert_eq!(
        kinds,
        [
            LegKind::Sensible { phase: 0 },
            turn(0),
            LegKind::Sensible { phase: 1 },
            LegKind::SensibleInRange { link: 1 },
            turn(1),
            LegKind::Sensible { phase: 2 },
            turn(2),
            LegKind::Sensible { phase: 3 },
        ]
    );
    assert_eq!((legs[3].from, legs[3].to), (k(600.0), k(640.0)));
    assert!((legs[1].enthalpy.value - 12e3).abs() < 1e-9);
    // Down from gas to the gas apart: across at 298.15 K is outside the linked gas's data, so at its 300 K.
    let legs = rich.route(
        at(&rich, 1000.0, Pin::Class(PhaseClass::Gas)).unwrap(),
        at(&rich, 700.0, Pin::Phase(4)).unwrap(),
    );
    assert_eq!(legs.len(), 3);
    assert_eq!(legs[1].kind, LegKind::Transition { from: 3, to: 4, link: None });
    assert_eq!((legs[1].from, legs[1].to), (k(300.0), k(300.0)));
    assert!(
        rich.route(at(&rich, 300.0, Pin::Stable).unwrap(), at(&rich, 300.0, Pin::Stable).unwrap()).is_empty()
    );
}

#[test]
fn edges_list_the_plateaus() {
    let edges: Vec<Edge> = zinc().edges(Pin::Stable).collect();
    let temperatures: Vec<f64> = edges.iter().map(|edge| edge.temperature.value).collect();
    assert_eq!(temperatures, [273.15, 692.68, 1180.0]);
    assert!((edges[1].above.value - edges[1].below.value - 7322.0 / 0.065_38).abs() < 1e-6);
    assert_eq!(edges[0].above, edges[0].below);
}

/// Any place on the rich curve: stable, on a plateau, past a transition, or in the phase apart.
fn any_place() -> impl Strategy<Value = Place> {
    let plateau = |t: f64, phase: usize, share: f64| {
        let side = Some(Side { phase, share });
        rich().locate(k(t), atmosphere(), Pin::Stable, side, Allowance::none()).unwrap()
    };
    prop_oneof![
        4 => (250.0_f64..2000.0).prop_filter_map("on a transition", |t| at(&rich(), t, Pin::Stable).ok()),
        1 => (0.0_f64..=1.0).prop_map(move |share| plateau(400.0, 1, share)),
        1 => (0.0_f64..=1.0).prop_map(move |share| plateau(950.0, 3, share)),
        1 => (380.0_f64..650.0).prop_map(|t| at(&rich(), t, Pin::Phase(1)).unwrap()),
        1 => (300.0_f64..2000.0).prop_map(|t| at(&rich(), t, Pin::Phase(3)).unwrap()),
        1 => (250.0_f64..900.0).prop_map(|t| at(&rich(), t, Pin::Phase(4)).unwrap()),
    ]
}

proptest! {
    #[test]
    fn the_legs_of_a_route_add_up(from in any_place(), to in any_place()) {
        let rich = rich();
        let legs = rich.route(from, to);
        let sum: f64 = legs.iter().map(|leg| leg.enthalpy.value).sum();
        let whole = rich.enthalpy(to).value - rich.enthalpy(from).value;
        prop_assert!((sum - whole).abs() < 1e-7, "{sum} for {whole}: {legs:?}");
        if let (Some(first), Some(last)) = (legs.first(), legs.last()) {
            prop_assert_eq!(first.from, from.temperature());
            prop_assert_eq!(last.to, to.temperature());
        }
        for (a, b) in legs.iter().zip(legs.iter().skip(1)) {
            let parallel = matches!(a.kind, LegKind::SensibleInRange { .. }) || matches!(b.kind, LegKind::SensibleInRange { .. });
            prop_assert!(a.to == b.from || parallel);
        }
        let back: f64 = rich.route(to, from).iter().map(|leg| leg.enthalpy.value).sum();
        prop_assert!((sum + back).abs() < 1e-7);
    }

    #[test]
    fn latent_legs_add_up_to_the_latent_heat(a in 250.0_f64..2000.0, b in 250.0_f64..2000.0) {
        let rich = rich();
        if let (Ok(from), Ok(to)) = (at(&rich, a, Pin::Stable), at(&rich, b, Pin::Stable)) {
            let latent = |leg: &Leg| matches!(leg.kind, LegKind::Transition { .. });
            let sum: f64 = rich.route(from, to).iter().filter(|leg| latent(leg)).map(|leg| leg.enthalpy.value).sum();
            let whole = rich.latent(to).value - rich.latent(from).value;
            prop_assert!((sum - whole).abs() < 1e-7, "{sum} for {whole}");
        }
    }

    #[test]
    fn enthalpy_rises_along_the_stable_track(a in 250.0_f64..2000.0, b in 250.0_f64..2000.0) {
        let rich = rich();
        let (low, high) = (a.min(b), a.max(b));
        if let (Ok(low), Ok(high)) = (at(&rich, low, Pin::Stable), at(&rich, high, Pin::Stable)) {
            prop_assert!(rich.enthalpy(low) <= rich.enthalpy(high));
        }
    }
}
