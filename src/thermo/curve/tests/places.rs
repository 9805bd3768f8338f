//! Places, what they say, and what is refused.

use super::*;

#[test]
fn zinc_is_heated_as_worked_by_hand() {
    // Per mole: 22.40 (692.68 - 291.15) + 0.5 · 10.05e-3 (692.68² - 291.15²) = 10 979.334 J; + 7322 J;
    // + 31.38 (733.15 - 692.68) = 1269.949 J; 19 571.283 J over 65.38 g/mol is 299 346.63 J/kg.
    let zinc = zinc();
    let sensible = 22.40 * (692.68 - 291.15) + 0.5 * 10.05e-3 * (692.68 * 692.68 - 291.15 * 291.15);
    let expected = (sensible + 7322.0 + 31.38 * (733.15 - 692.68)) / 0.065_38;
    let found = h(&zinc, 733.15) - h(&zinc, 291.15);
    assert!((found - expected).abs() < 1e-6, "{found} for {expected}");
    assert!((found - 299_346.63).abs() < 0.01, "{found}");
    let melt = at(&zinc, 733.15, Pin::Stable).unwrap();
    assert!((zinc.latent(melt).value - 7322.0 / 0.065_38).abs() < 1e-9);
    assert!((zinc.heat_capacity(melt).unwrap().value - 479.963_29).abs() < 1e-5);
    assert!((h(&zinc, 298.15)).abs() < 1e-9, "an element at 298.15 K is zero");
    assert!(zinc.absolute() && !zinc.formation_extrapolated());
}

#[test]
fn near_a_transition_the_side_is_wanted() {
    let zinc = zinc();
    for t in [692.18, 692.68, 693.1] {
        let error = at(&zinc, t, Pin::Stable).unwrap_err();
        assert_eq!(error, LocateError::OnTransition { temperature: k(692.68), below: 0, above: 1 });
        // A pinned phase has no side to name.
        assert!(at(&zinc, 692.68, Pin::Phase(1)).is_ok());
    }
    assert!(at(&zinc, 692.1, Pin::Stable).is_ok() && at(&zinc, 693.3, Pin::Stable).is_ok());
    let side = |phase, share| {
        zinc.locate(k(692.9), atmosphere(), Pin::Stable, Some(Side { phase, share }), Allowance::none())
    };
    let forty = side(1, 0.4).unwrap();
    assert_eq!(forty.temperature(), k(692.68), "the place is on the transition itself");
    assert_eq!(side(0, 0.6).unwrap(), forty);
    assert_eq!(zinc.phases_at(forty).share(1), 0.4);
    let solid = zinc.enthalpy(side(0, 1.0).unwrap()).value;
    assert!((zinc.enthalpy(forty).value - solid - 0.4 * 7322.0 / 0.065_38).abs() < 1e-6);
    assert_eq!(zinc.heat_capacity(forty), None);
    assert_eq!(side(1, 1.1), Err(LocateError::ShareOutOfBounds));
    let far = zinc.locate(
        k(600.0),
        atmosphere(),
        Pin::Stable,
        Some(Side { phase: 1, share: 0.4 }),
        Allowance::none(),
    );
    assert_eq!(far, Err(LocateError::NoTransition));
}

#[test]
fn outside_the_data_only_by_leave() {
    let zinc = zinc();
    assert_eq!(
        at(&zinc, 1200.0, Pin::Stable),
        Err(LocateError::OutsideRange { phase: 1, lo: k(692.68), hi: k(1180.0) })
    );
    assert!(at(&zinc, 272.0, Pin::Stable).is_err());
    assert_eq!(at(&zinc, 500.0, Pin::Class(PhaseClass::Gas)), Err(LocateError::NoSuchPhase));
    assert_eq!(at(&zinc, -1.0, Pin::Stable), Err(LocateError::NotATemperature));
    let allowed = Allowance::default().allow(1, k(692.68), k(1250.0));
    let place = zinc.locate(k(1200.0), atmosphere(), Pin::Stable, None, &allowed).unwrap();
    assert!(place.extrapolated());
    let rise = zinc.enthalpy(place).value - h(&zinc, 1180.0);
    assert!((rise - 20.0 * 31.38 / 0.065_38).abs() < 1e-6, "the law goes on: {rise}");
    assert!(zinc.locate(k(1260.0), atmosphere(), Pin::Stable, None, &allowed).is_err());
}

#[test]
fn a_melting_range_releases_its_heat_with_the_share() {
    // To 850 K: 48 % melted; cp = (1 - f) 800 + f 1000, mean f 0.24 over 7 K: 5936 J. Whole range: sensible
    // 5936 + 43 K · (800 + 200 · 0.74) = 46700 J.
    let alloy = HeatingCurve::build(alloy_data()).unwrap();
    let to = |t: f64| h(&alloy, t) - h(&alloy, 843.0);
    assert!((to(850.0) - (5936.0 + 0.48 * 389e3)).abs() < 1e-6, "{}", to(850.0));
    assert!((to(893.0) - (46_700.0 + 389e3)).abs() < 1e-6, "{}", to(893.0));
    let half = at(&alloy, 850.0, Pin::Stable).unwrap();
    assert!((alloy.phases_at(half).share(1) - 0.48).abs() < 1e-12);
    assert!((alloy.heat_capacity(half).unwrap().value - 896.0).abs() < 1e-9);
    assert!((alloy.latent(half).value - 0.48 * 389e3).abs() < 1e-6);
    assert!(!alloy.absolute());
    assert_eq!(h(&alloy, 293.0), 0.0, "counts from the lowest temperature");
}

#[test]
fn boiling_holds_at_one_atmosphere() {
    let rich = rich();
    let at = |t: f64, p: f64, pin| rich.locate(k(t), typed(p), pin, None, Allowance::none());
    let refused = Err(LocateError::BoilingPressure { temperature: k(950.0) });
    assert_eq!(at(960.0, 105_000.0, Pin::Stable), refused);
    assert_eq!(at(940.0, 98_000.0, Pin::Stable), refused);
    assert_eq!(at(950.1, 98_000.0, Pin::Stable), refused);
    assert!(at(940.0, 500_000.0, Pin::Stable).is_ok(), "a liquid under pressure stays one");
    assert!(at(960.0, 50_000.0, Pin::Stable).is_ok(), "a gas expanded stays one");
    assert!(at(960.0, 102_000.0, Pin::Stable).is_ok(), "within 2 %");
    assert!(at(960.0, 500_000.0, Pin::Class(PhaseClass::Gas)).is_ok(), "a symbol says which");
}

#[test]
fn a_symbol_leads_along_its_class_and_past_its_transitions() {
    let rich = rich();
    let phase_at = |t, pin| rich.phases_at(at(&rich, t, pin).unwrap()).lower.0;
    assert_eq!(phase_at(390.0, Pin::Class(PhaseClass::Solid)), 0);
    assert_eq!(phase_at(450.0, Pin::Class(PhaseClass::Solid)), 1);
    assert_eq!(phase_at(645.0, Pin::Class(PhaseClass::Solid)), 1, "superheated within its own data");
    assert!(at(&rich, 651.0, Pin::Class(PhaseClass::Solid)).is_err());
    assert!(matches!(at(&rich, 400.2, Pin::Class(PhaseClass::Solid)), Err(LocateError::OnTransition { .. })));
    assert_eq!(phase_at(410.0, Pin::Phase(0)), 0, "alpha past its transition");
    assert_eq!(phase_at(310.0, Pin::Class(PhaseClass::Gas)), 3, "the linked gas, not the one apart");
    assert_eq!(phase_at(310.0, Pin::Phase(4)), 4);
    assert_eq!(rich.latent(at(&rich, 310.0, Pin::Phase(4)).unwrap()).value, 0.0);
    assert!((rich.enthalpy(at(&rich, 298.15, Pin::Phase(4)).unwrap()).value - 2e6).abs() < 1e-6);
}

#[test]
fn decomposition_ends_the_curve_unless_allowed() {
    let mut data = zinc_data();
    data.decomposes_at = Some(k(900.0));
    let curve = HeatingCurve::build(data).unwrap();
    assert_eq!(at(&curve, 950.0, Pin::Stable), Err(LocateError::Decomposes { at: k(900.0) }));
    let allowed = Allowance::default().allow(1, k(692.68), k(1000.0));
    let place = curve.locate(k(950.0), atmosphere(), Pin::Stable, None, &allowed).unwrap();
    assert!(place.extrapolated());
    assert!(curve.locate(k(1001.0), atmosphere(), Pin::Stable, None, &allowed).is_err());
}

#[test]
fn volumes_and_internal_energy() {
    let zinc = zinc();
    let solid = at(&zinc, 300.0, Pin::Stable).unwrap();
    assert_eq!(zinc.specific_volume(solid, typed(2e5)).unwrap().value, 1.0 / 7140.0);
    // v (p - 101.325 kPa) = 98 675 / 7140.
    let extra = zinc.condensed_pressure_enthalpy(solid, typed(2e5)).unwrap().value;
    assert!((extra - 98_675.0 / 7140.0).abs() < 1e-12);
    let u = zinc.internal_energy(solid).unwrap().value;
    assert!((u - (zinc.enthalpy(solid).value - 101_325.0 / 7140.0)).abs() < 1e-9);
    let rich = rich();
    let gas = at(&rich, 1000.0, Pin::Stable).unwrap();
    // R T/(M p) = 8.314 462 618 · 1000/(0.060 · 101 325).
    let v = rich.specific_volume(gas, atmosphere()).unwrap().value;
    assert!((v - 8_314.462_618_153_24 / (0.060 * 101_325.0)).abs() < 1e-12);
    let less = rich.enthalpy(gas).value - rich.internal_energy(gas).unwrap().value;
    assert!((less - 8_314.462_618_153_24 / 0.060).abs() < 1e-6);
    assert_eq!(rich.condensed_pressure_enthalpy(gas, typed(2e5)).unwrap().value, 0.0);
    assert_eq!(rich.specific_volume(at(&rich, 300.0, Pin::Stable).unwrap(), atmosphere()), None);
}

/// The rich species with a law of Antoine's that boils at 950.2 K at 101.325 kPa: ln p is steep enough that
/// 500 kPa lie below 1000 K, where the data of the liquid end.
fn rich_with_law(lo: f64, hi: f64) -> HeatingCurve {
    let (b, c) = (16_000.0, -20.0);
    let a = b / (950.2 + c);
    let form = VapourPressureForm::Antoine { a, b, c, unit: 101_325.0 };
    let mut data = rich_data();
    data.vapour_pressure = Some(VapourPressure::new(form, k(lo), k(hi)).unwrap());
    HeatingCurve::build(data).unwrap()
}

/// Where `rich_with_law` boils, by hand: T = B/(A − log10(p/p0)) − C, moved by 950 − 950.2.
fn boils(p: f64) -> f64 {
    let a = 16_000.0 / 930.2;
    16_000.0 / (a - math::log10(p / 101_325.0)) + 20.0 - 0.2
}

#[test]
fn a_law_moves_boiling() {
    let rich = rich_with_law(800.0, 1100.0);
    assert_eq!(rich.boiling_temperature(atmosphere()), Ok(k(950.0)), "the stated boiling point stays");
    let five = typed(5e5);
    let t = rich.boiling_temperature(five).unwrap().value;
    assert!((t - boils(5e5)).abs() < 1e-9 && t > 980.0 && t < 1000.0, "{t}");
    let at = |t: f64, p: f64| rich.locate(k(t), typed(p), Pin::Stable, None, Allowance::none());
    let phase = |t: f64, p: f64| rich.phases_at(at(t, p).unwrap()).lower.0;
    assert_eq!((phase(t - 0.6, 5e5), phase(t + 0.6, 5e5)), (2, 3));
    assert_eq!(at(t + 0.1, 5e5), Err(LocateError::OnTransition { temperature: k(t), below: 2, above: 3 }));
    // 98 kPa lies within 2 %: without a law it would boil at 950 K.
    let low = boils(98_000.0);
    assert_eq!((phase(low - 0.6, 98e3), phase(low + 0.6, 98e3)), (2, 3));
    // Enthalpies beside and on the plateau: those of the phases there, 900 J/(kg K) for the liquid.
    let side = Some(Side { phase: 3, share: 0.25 });
    let wet = rich.locate(k(t), five, Pin::Stable, side, Allowance::none()).unwrap();
    let liquid = h(&rich, 940.0) + 900.0 * (t - 940.0);
    let gas = |t: f64| {
        rich.enthalpy(rich.place(k(t), atmosphere(), Pin::Phase(3), None, Allowance::none()).unwrap()).value
    };
    let expected = 0.75 * liquid + 0.25 * gas(t);
    assert!((rich.enthalpy(wet).value - expected).abs() < 1e-6, "{:?}", rich.enthalpy(wet));
    assert_eq!(rich.phases_at(wet).upper, Some((3, 0.25)));
    assert!((rich.saturation_pressure(k(t)).unwrap().value - 5e5).abs() < 1e-4);
}

#[test]
fn boiling_moves_evenly_through_the_stated_point() {
    let rich = rich_with_law(800.0, 1100.0);
    let mut before = 0.0;
    for step in -200..=200 {
        let p = 101_325.0 * (1.0 + f64::from(step) * 1e-4);
        let t = rich.boiling_temperature(typed(p)).unwrap().value;
        assert!(t > before && (before == 0.0 || t - before < 0.01), "{t} after {before} at {p} Pa");
        before = t;
    }
}

#[test]
fn where_the_law_or_the_data_end_only_the_sure_side_is_given() {
    let at = |curve: &HeatingCurve, t: f64, p: f64, allowance: &Allowance| {
        curve.locate(k(t), typed(p), Pin::Stable, None, allowance)
    };
    // The law ends at 960 K, some 145 kPa: above that pressure liquid is sure up to 959.8 K.
    let short = rich_with_law(800.0, 960.0);
    let none = Allowance::none();
    assert!(at(&short, 955.0, 5e5, none).is_ok());
    assert!(matches!(at(&short, 970.0, 5e5, none), Err(LocateError::OutsideVapourPressure { .. })));
    // At 2 MPa it boils near 1030 K, but the data of the liquid end at 1000 K: the gas above is sure.
    let rich = rich_with_law(800.0, 1100.0);
    let t = boils(2e6);
    assert!(at(&rich, 999.0, 2e6, none).is_ok() && at(&rich, t + 1.0, 2e6, none).is_ok());
    assert_eq!(
        at(&rich, 1010.0, 2e6, none),
        Err(LocateError::OutsideRange { phase: 2, lo: k(590.0), hi: k(1000.0) })
    );
    let allowed = Allowance::default().allow(2, k(590.0), k(1050.0));
    assert!(at(&rich, 1010.0, 2e6, &allowed).unwrap().extrapolated());
    assert!(!at(&rich, t + 1.0, 2e6, &allowed).unwrap().extrapolated());
    let side = Some(Side { phase: 3, share: 0.5 });
    assert!(rich.locate(k(t), typed(2e6), Pin::Stable, side, &allowed).unwrap().extrapolated());
}

#[test]
fn a_law_that_cannot_belong_to_the_curve_is_refused() {
    let law = |a: f64| {
        let form = VapourPressureForm::Antoine { a, b: 16_000.0, c: -20.0, unit: 101_325.0 };
        Some(VapourPressure::new(form, k(800.0), k(1100.0)).unwrap())
    };
    let mut data = rich_data();
    data.vapour_pressure = law(20.0);
    let error = HeatingCurve::build(data).unwrap_err();
    assert!(matches!(error, CurveError::VapourPressure(SaturationFault::Contradiction { .. })), "{error:?}");
    let mut data = zinc_data();
    data.vapour_pressure = law(17.2);
    assert_eq!(
        HeatingCurve::build(data).unwrap_err(),
        CurveError::VapourPressure(SaturationFault::NoBoiling)
    );
}
