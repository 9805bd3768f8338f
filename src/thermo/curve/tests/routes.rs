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

#[test]
fn legs_at_pressure_boil_where_the_law_has_it() {
    // T = B/(A − log10(p/p0)) − C passes through the stated 950 K.
    let form = VapourPressureForm::Antoine { a: 16_000.0 / 930.0, b: 16_000.0, c: -20.0, unit: 101_325.0 };
    let mut data = rich_data();
    data.vapour_pressure = Some(VapourPressure::new(form, k(800.0), k(1100.0)).unwrap());
    let rich = HeatingCurve::build(data).unwrap();
    let at =
        |t: f64, p: f64, side| rich.locate(k(t), typed(p), Pin::Stable, side, Allowance::none()).unwrap();
    let wet = |p: f64, share: f64| {
        let t = rich.boiling_temperature(typed(p)).unwrap().value;
        at(t, p, Some(Side { phase: 3, share }))
    };
    let check = |from: Place, to: Place, p: f64, transitions: usize| {
        let legs = rich.route_at(from, to, typed(p));
        let sum: f64 = legs.iter().map(|leg| leg.enthalpy.value).sum();
        let rise = rich.enthalpy(to).value - rich.enthalpy(from).value;
        assert!((sum - rise).abs() < 1e-6 * rise.abs().max(1.0), "{sum} for {rise}: {legs:?}");
        let is_latent = |leg: &&Leg| matches!(leg.kind, LegKind::Transition { .. });
        let latent: f64 = legs.iter().filter(is_latent).map(|leg| leg.enthalpy.value).sum();
        let stated = rich.latent_at(to, typed(p)).value - rich.latent_at(from, typed(p)).value;
        assert!((latent - stated).abs() < 1e-6, "latent {latent} for {stated}: {legs:?}");
        assert_eq!(legs.iter().filter(is_latent).count(), transitions, "{legs:?}");
        legs
    };
    let t = rich.boiling_temperature(typed(5e5)).unwrap();
    let legs = check(at(900.0, 5e5, None), at(1100.0, 5e5, None), 5e5, 1);
    assert!(legs.iter().any(|leg| leg.from == t && leg.to == t), "{legs:?}");
    check(at(900.0, 5e5, None), wet(5e5, 0.3), 5e5, 1);
    check(wet(5e5, 0.3), wet(5e5, 0.8), 5e5, 1);
    check(at(1100.0, 5e5, None), at(1100.0, 1e5, None), 1e5, 0);
    // A flash from 500 kPa to 90 kPa: liquid and vapour go their ways, and some of the liquid boils at the end.
    check(wet(5e5, 0.0), wet(90e3, 0.2), 90e3, 1);
    check(wet(5e5, 0.6), wet(90e3, 0.2), 90e3, 1);
    check(wet(5e5, 0.6), at(1100.0, 90e3, None), 90e3, 1);
    // Two transitions of its liquid, and those and boiling of its vapour.
    check(at(300.0, 5e5, None), wet(5e5, 0.6), 101_325.0, 5);
}
