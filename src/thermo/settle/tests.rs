//! Temperatures from heat contents, against closed forms and as the inverse of the curve.

use proptest::prelude::*;
use uom::si::f64::{Energy, MolarMass};

use super::*;
use crate::numeric::math;
use crate::thermo::constants::GAS_CONSTANT;
use crate::thermo::curve::tests::{at, atmosphere, data, h, j, k, phase, rich, zinc};
use crate::thermo::curve::{Allowance, HeatingCurve, Link, PhaseClass, Pin, Side};
use crate::thermo::si::typed;
use crate::thermo::{VapourPressure, VapourPressureForm};

fn part(curve: &HeatingCurve, pin: Pin, mass: f64) -> Part<'_> {
    Part { curve, pin, allowance: Allowance::none(), mass: typed(mass) }
}

fn energy(value: f64) -> Energy {
    typed(value)
}

fn constant(name: &str, class: PhaseClass, (lo, hi): (f64, f64), cp: f64) -> HeatingCurve {
    HeatingCurve::build(data(vec![phase(name, class, &[(lo, hi, &[(cp, 0.0)])])], vec![])).unwrap()
}

/// Ice and water with constants: 2100 and 4200 J/(kg K), 333 kJ/kg at 273.15 K.
fn ice() -> HeatingCurve {
    let solid = phase("solid", PhaseClass::Solid, &[(200.0, 273.15, &[(2100.0, 0.0)])]);
    let liquid = phase("liquid", PhaseClass::Liquid, &[(273.15, 373.0, &[(4200.0, 0.0)])]);
    let melting = Link::At { temperature: k(273.15), latent: j(333e3) };
    HeatingCurve::build(data(vec![solid, liquid], vec![melting])).unwrap()
}

#[test]
fn a_heat_that_ends_on_the_plateau_gives_its_share() {
    // 450 kg from 291.15 K with sensible heat up to the melting point and 40 % of 7322 J/mol over 65.38
    // g/mol.
    let zinc = zinc();
    let sensible = 22.40 * (692.68 - 291.15) + 0.5 * 10.05e-3 * (692.68 * 692.68 - 291.15 * 291.15);
    let heat = 450.0 * (sensible + 0.4 * 7322.0) / 0.065_38;
    let target = energy(450.0 * h(&zinc, 291.15) + heat);
    let settled = temperature_for_enthalpy(&[part(&zinc, Pin::Stable, 450.0)], target, atmosphere()).unwrap();
    assert_eq!(settled.temperature, k(692.68));
    assert!((settled.upper_share.unwrap() - 0.4).abs() < 1e-12, "{settled:?}");
}

#[test]
fn quenching_ends_at_the_mean_weighted_by_heat_capacity() {
    // 120 kg of 630 J/(kg K) at 1123.15 K in 900 kg of 4180 J/(kg K) at 293.15 K: T = Σ m cp T / Σ m cp.
    let steel = constant("solid", PhaseClass::Solid, (273.15, 1200.0), 630.0);
    let water = constant("liquid", PhaseClass::Liquid, (273.15, 373.15), 4180.0);
    let parts = [part(&steel, Pin::Stable, 120.0), part(&water, Pin::Stable, 900.0)];
    let target = 120.0 * h(&steel, 1123.15) + 900.0 * h(&water, 293.15);
    let (a, b) = (120.0 * 630.0, 900.0 * 4180.0);
    let expected = (a * 1123.15 + b * 293.15) / (a + b);
    let settled = temperature_for_enthalpy(&parts, energy(target), atmosphere()).unwrap();
    assert!((settled.temperature.value - expected).abs() < 1e-10, "{settled:?}");
    // Twenty times the rings would leave the water's data.
    let parts = [part(&steel, Pin::Stable, 2400.0), part(&water, Pin::Stable, 900.0)];
    let target = 2400.0 * h(&steel, 1123.15) + 900.0 * h(&water, 293.15);
    let Err(SettleError::Unreachable(reach)) = temperature_for_enthalpy(&parts, energy(target), atmosphere())
    else {
        panic!("too much heat for liquid water")
    };
    assert_eq!((reach.lo, reach.hi, reach.boiling), (k(273.15), k(373.15), false));
    let most = 2400.0 * 630.0 * 100.0 + 900.0 * 4180.0 * 100.0;
    assert!((reach.most.value - most).abs() < 1e-4 && reach.least.value.abs() < 1e-4);
}

#[test]
fn ice_in_warm_water_melts_by_the_balance() {
    // 10 kg of ice at 263.15 K in 30 kg of water at 290 K: cooling to 273.15 K gives 30·4200·16.85 = 2.1231
    // MJ, warming the ice takes 0.21 MJ, 1.9131 MJ melts 5.745 kg: of all 40 kg, 35.745/40 are liquid.
    let ice = ice();
    let parts = [part(&ice, Pin::Stable, 10.0), part(&ice, Pin::Stable, 30.0)];
    let target = 10.0 * h(&ice, 263.15) + 30.0 * h(&ice, 290.0);
    let settled = temperature_for_enthalpy(&parts, energy(target), atmosphere()).unwrap();
    let melted = (30.0 * 4200.0 * 16.85 - 10.0 * 2100.0 * 10.0) / 333e3;
    assert_eq!(settled.temperature, k(273.15));
    assert!((settled.upper_share.unwrap() - (30.0 + melted) / 40.0).abs() < 1e-12, "{settled:?}");
}

#[test]
fn pressure_counts_in_condensed_matter_with_density() {
    // At 20 MPa solid zinc holds v (p - p0) more: the same target is met at a lower temperature.
    let zinc = zinc();
    let pressure = typed(20e6);
    let extra = (20e6 - 101_325.0) / 7140.0;
    let parts = [part(&zinc, Pin::Stable, 2.0)];
    let target = energy(2.0 * (h(&zinc, 500.0) + extra));
    let settled = temperature_for_enthalpy(&parts, target, pressure).unwrap();
    assert!((settled.temperature.value - 500.0).abs() < 1e-10, "{settled:?}");
    // Half melted: the mean of both volumes counts.
    let place = |share| {
        let side = Some(Side { phase: 1, share });
        zinc.locate(k(692.68), pressure, Pin::Stable, side, Allowance::none()).unwrap()
    };
    let half = place(0.5);
    let held = zinc.enthalpy(half) + zinc.condensed_pressure_enthalpy(half, pressure).unwrap();
    let settled = temperature_for_enthalpy(&parts, energy(2.0 * held.value), pressure).unwrap();
    assert_eq!(settled.temperature, k(692.68));
    assert!((settled.upper_share.unwrap() - 0.5).abs() < 1e-10, "{settled:?}");
}

#[test]
fn off_its_pressure_a_boiling_point_is_an_end() {
    let rich = rich();
    let parts = [part(&rich, Pin::Stable, 1.0)];
    let vapour = energy(h(&rich, 1000.0));
    assert!(temperature_for_enthalpy(&parts, vapour, atmosphere()).is_ok());
    let Err(SettleError::Unreachable(reach)) = temperature_for_enthalpy(&parts, vapour, typed(5e5)) else {
        panic!("the boiling point does not hold at 5 bar")
    };
    assert!(reach.boiling);
    assert_eq!(reach.hi, k(950.0));
    // The most that the liquid holds is without the latent heat.
    assert!((reach.most.value - (h(&rich, 949.0) + 900.0)).abs() < 1e-6);
    assert!(temperature_for_enthalpy(&parts, vapour, typed(5e4)).is_ok(), "a gas below the pressure");
}

#[test]
fn an_allowance_widens_the_search() {
    let zinc = zinc();
    let allowance = Allowance::default().allow(1, k(692.68), k(1250.0));
    let target = energy(h(&zinc, 1180.0) + 30.0 * 31.38 / 0.065_38);
    let closed = [part(&zinc, Pin::Stable, 1.0)];
    assert!(matches!(
        temperature_for_enthalpy(&closed, target, atmosphere()),
        Err(SettleError::Unreachable(_))
    ));
    let open = [Part { allowance: &allowance, ..closed[0] }];
    let settled = temperature_for_enthalpy(&open, target, atmosphere()).unwrap();
    assert!((settled.temperature.value - 1210.0).abs() < 1e-10, "{settled:?}");
}

/// A gas with constant cp = 7/2 R/M, M = 28 g/mol, beside its molar mass.
fn diatomic() -> (HeatingCurve, f64) {
    let r = GAS_CONSTANT / 0.028;
    let mut data = data(vec![phase("gas", PhaseClass::Gas, &[(100.0, 3000.0, &[(3.5 * r, 0.0)])])], vec![]);
    data.molar_mass = Some(typed::<<MolarMass as DimensionOf>::D>(0.028));
    (HeatingCurve::build(data).unwrap(), r)
}

trait DimensionOf {
    type D: uom::si::Dimension + ?Sized;
}
impl<D: uom::si::Dimension + ?Sized> DimensionOf for uom::si::Quantity<D, uom::si::SI<f64>, f64> {
    type D = D;
}

#[test]
fn a_closed_gas_is_heated_by_cv() {
    // U rises by m cv ΔT with cv = 5/2 R/M.
    let (gas, r) = diatomic();
    let from = at(&gas, 300.0, Pin::Stable).unwrap();
    let target = energy(3.0 * (gas.internal_energy(from).unwrap().value + 2.5 * r * 250.0));
    let settled =
        temperature_for_internal_energy(&[part(&gas, Pin::Stable, 3.0)], target, atmosphere()).unwrap();
    assert!((settled.temperature.value - 550.0).abs() < 1e-10, "{settled:?}");
    let unknown = constant("gas", PhaseClass::Gas, (100.0, 3000.0), 1000.0);
    let refused = temperature_for_internal_energy(&[part(&unknown, Pin::Stable, 1.0)], target, atmosphere());
    assert_eq!(refused, Err(SettleError::NotAGas { part: 0 }), "a gas without molar mass");
}

#[test]
fn isentropic_compression_follows_the_poisson_law() {
    // T2 = T1 (p2/p1)^(R/(M cp)) = T1 (p2/p1)^(2/7) for constant cp.
    let (gas, _) = diatomic();
    let parts = [part(&gas, Pin::Stable, 0.4), part(&gas, Pin::Stable, 0.6)];
    for ratio in [8.0, 0.1, 1.0] {
        let settled = temperature_isentropic(&parts, k(300.0), math::ln(ratio)).unwrap();
        let expected = 300.0 * math::pow(ratio, 2.0 / 7.0);
        assert!((settled.temperature.value - expected).abs() < 1e-9 * expected, "{ratio}: {settled:?}");
    }
    assert!(matches!(
        temperature_isentropic(&parts, k(300.0), 100.0),
        Err(SettleError::RatioUnreachable { hi, .. }) if hi == k(3000.0)
    ));
    let outside = temperature_isentropic(&parts, k(90.0), 1.0);
    assert_eq!(outside, Err(SettleError::StartOutsideRange { part: 0, lo: k(100.0), hi: k(3000.0) }));
    let ice = ice();
    let refused = temperature_isentropic(&[part(&ice, Pin::Stable, 1.0)], k(250.0), 1.0);
    assert_eq!(refused, Err(SettleError::NotAGas { part: 0 }));
}

#[test]
fn what_cannot_be_settled_says_why() {
    let (zinc, ice) = (zinc(), ice());
    let solve = |parts: &[Part<'_>]| temperature_for_enthalpy(parts, energy(0.0), atmosphere());
    assert_eq!(solve(&[]), Err(SettleError::NothingThere));
    assert_eq!(solve(&[part(&ice, Pin::Stable, 0.0)]), Err(SettleError::NothingThere));
    assert_eq!(solve(&[part(&ice, Pin::Stable, -1.0)]), Err(SettleError::Mass { part: 0 }));
    assert_eq!(
        solve(&[part(&ice, Pin::Stable, 1.0), part(&ice, Pin::Class(PhaseClass::Gas), 1.0)]),
        Err(SettleError::NoSuchPhase { part: 1 })
    );
    assert_eq!(
        solve(&[part(&ice, Pin::Stable, 1.0), part(&zinc, Pin::Phase(1), 1.0)]),
        Err(SettleError::NoCommonRange { lo: k(692.68), hi: k(373.0) })
    );
}

#[test]
fn a_settled_temperature_near_a_transition_has_a_place() {
    let zinc = zinc();
    let target = energy(zinc.enthalpy(at(&zinc, 692.9, Pin::Phase(1)).unwrap()).value);
    let settled = temperature_for_enthalpy(&[part(&zinc, Pin::Stable, 1.0)], target, atmosphere()).unwrap();
    let place =
        zinc.place(settled.temperature, atmosphere(), Pin::Stable, settled.upper_share, Allowance::none());
    assert_eq!(zinc.phases_at(place.unwrap()).lower, (1, 1.0));
}

/// What parts of 1 kg in all hold at a settled temperature, at the places that it names.
fn held(parts: &[Part<'_>], settled: Settled, pressure: f64) -> f64 {
    let hold = |part: &Part<'_>| {
        let (t, share) = (settled.temperature, settled.upper_share);
        let place = part.curve.place(t, typed(pressure), part.pin, share, part.allowance).unwrap();
        part.mass.value * part.curve.enthalpy(place).value
    };
    parts.iter().map(hold).sum()
}

proptest! {
    #[test]
    fn the_settled_place_holds_the_target(
        part_of_span in 0.0_f64..=1.0,
        edge in 0_usize..12,
        nudge in -3_i32..=3,
        at_edge in any::<bool>(),
        pressure in prop_oneof![Just(101_325.0), Just(50e3), Just(5e5)],
    ) {
        // Anywhere between the ends of the curve, or some last digits beside one of its edges.
        let rich = rich();
        let edges: Vec<_> = rich.edges(Pin::Stable).flat_map(|edge| [edge.below.value, edge.above.value]).collect();
        let (least, most) = (edges[0], edges[edges.len() - 1]);
        let spread = least + (most - least) * part_of_span;
        let beside = edges[edge % edges.len()] * (1.0 + f64::from(nudge) * f64::EPSILON);
        let target = if at_edge { beside } else { spread };
        let alone = [part(&rich, Pin::Stable, 1.0)];
        let halves = [part(&rich, Pin::Stable, 0.25), part(&rich, Pin::Stable, 0.75)];
        for parts in [&alone[..], &halves[..]] {
            match temperature_for_enthalpy(parts, energy(target), typed(pressure)) {
                Ok(settled) => {
                    let found = held(parts, settled, pressure);
                    prop_assert!((found - target).abs() < 1e-8, "{found} for {target}: {settled:?}");
                }
                Err(SettleError::Unreachable(reach)) => {
                    prop_assert!(target < reach.least.value || target > reach.most.value, "{reach:?}");
                }
                Err(other) => prop_assert!(false, "{other:?}"),
            }
        }
    }

    #[test]
    fn settling_undoes_enthalpy(t in 250.0_f64..2000.0, mass in 0.001_f64..1e6) {
        let rich = rich();
        if let Ok(place) = at(&rich, t, Pin::Stable) {
            let target = energy(mass * rich.enthalpy(place).value);
            let alone = [part(&rich, Pin::Stable, mass)];
            let settled = temperature_for_enthalpy(&alone, target, atmosphere()).unwrap();
            prop_assert!((settled.temperature.value - t).abs() < 1e-10 * t, "{settled:?} for {t}");
            // The same by way of the sum over two halves.
            let halves = [part(&rich, Pin::Stable, 0.5 * mass), part(&rich, Pin::Stable, 0.5 * mass)];
            let settled = temperature_for_enthalpy(&halves, target, atmosphere()).unwrap();
            prop_assert!((settled.temperature.value - t).abs() < 1e-10 * t, "halves: {settled:?} for {t}");
        }
    }

    #[test]
    fn a_plateau_gives_back_its_share(share in 0.0_f64..=1.0, boils in any::<bool>(), mass in 0.01_f64..1e4) {
        let rich = rich();
        let (t, phase) = if boils { (950.0, 3) } else { (400.0, 1) };
        let place = rich.locate(k(t), atmosphere(), Pin::Stable, Some(Side { phase, share }), Allowance::none()).unwrap();
        let target = energy(mass * rich.enthalpy(place).value);
        for parts in [vec![part(&rich, Pin::Stable, mass)], vec![part(&rich, Pin::Stable, 0.5 * mass); 2]] {
            let settled = temperature_for_enthalpy(&parts, target, atmosphere()).unwrap();
            prop_assert!((settled.temperature.value - t).abs() < 1e-9);
            let found = settled.upper_share.unwrap_or(if share < 0.5 { 0.0 } else { 1.0 });
            prop_assert!((found - share).abs() < 1e-6, "{found} for {share}");
        }
    }

    #[test]
    fn internal_energy_and_entropy_are_undone(t in 310.0_f64..1990.0) {
        let rich = rich();
        let gas = Pin::Class(PhaseClass::Gas);
        let place = at(&rich, t, gas).unwrap();
        let parts = [part(&rich, gas, 2.0)];
        let target = energy(2.0 * rich.internal_energy(place).unwrap().value);
        let settled = temperature_for_internal_energy(&parts, target, atmosphere()).unwrap();
        prop_assert!((settled.temperature.value - t).abs() < 1e-9 * t);
        // From 500 K to t: the pressure ratio that keeps entropy gives t back.
        let start = at(&rich, 500.0, gas).unwrap();
        let rise = rich.entropy_increment(start, place).unwrap().value;
        let settled = temperature_isentropic(&parts, k(500.0), rise * 0.060 / GAS_CONSTANT).unwrap();
        prop_assert!((settled.temperature.value - t).abs() < 1e-9 * t);
    }
}

/// The rich species with a vapour pressure that boils at 950 K at 101.325 kPa, and at 500 kPa below 1000 K.
fn rich_with_law() -> HeatingCurve {
    let form = VapourPressureForm::Antoine { a: 16_000.0 / 930.0, b: 16_000.0, c: -20.0, unit: 101_325.0 };
    let mut data = crate::thermo::curve::tests::rich_data();
    data.vapour_pressure = Some(VapourPressure::new(form, k(800.0), k(1100.0)).unwrap());
    HeatingCurve::build(data).unwrap()
}

#[test]
fn a_step_may_end_in_boiling_at_pressure() {
    let rich = rich_with_law();
    for p in [90e3, 101_325.0, 5e5] {
        let t = rich.boiling_temperature(typed(p)).unwrap();
        for share in [0.0, 0.35, 1.0] {
            let side = Some(Side { phase: 3, share });
            let place = rich.locate(t, typed(p), Pin::Stable, side, Allowance::none()).unwrap();
            let target = energy(2.0 * rich.enthalpy(place).value);
            for parts in [vec![part(&rich, Pin::Stable, 2.0)], vec![part(&rich, Pin::Stable, 1.0); 2]] {
                let settled = temperature_for_enthalpy(&parts, target, typed(p)).unwrap();
                assert!((settled.temperature.value - t.value).abs() < 1e-9, "{settled:?} for {t:?}");
                let found = settled.upper_share.unwrap_or(if share < 0.5 { 0.0 } else { 1.0 });
                assert!((found - share).abs() < 1e-9, "{settled:?} for {share}");
            }
        }
    }
}

proptest! {
    #[test]
    fn a_law_of_boiling_is_undone_too(t in 250.0_f64..1900.0, p in 60e3_f64..600e3) {
        let rich = rich_with_law();
        if let Ok(place) = rich.locate(k(t), typed(p), Pin::Stable, None, Allowance::none()) {
            let target = energy(rich.enthalpy(place).value);
            for parts in [vec![part(&rich, Pin::Stable, 1.0)], vec![part(&rich, Pin::Stable, 0.5); 2]] {
                let settled = temperature_for_enthalpy(&parts, target, typed(p)).unwrap();
                prop_assert!((settled.temperature.value - t).abs() < 1e-9 * t, "{settled:?} for {t}");
            }
        }
    }
}
