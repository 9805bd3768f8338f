//! The curve as a sheet would use it. Here stand the species that the tests share; they are invented.

use uom::si::f64::{AvailableEnergy, MassDensity, MolarMass, Pressure, ThermodynamicTemperature};

mod build;
mod places;
mod routes;

use super::*;
use crate::numeric::math;
use crate::thermo::si::typed;
use crate::thermo::{Basis, HeatCapacity, VapourPressure, VapourPressureForm};

pub(in crate::thermo) fn k(t: f64) -> ThermodynamicTemperature {
    typed(t)
}

pub(in crate::thermo) fn j(h: f64) -> AvailableEnergy {
    typed(h)
}

pub(in crate::thermo) fn atmosphere() -> Pressure {
    typed(101_325.0)
}

fn law(terms: &[(f64, f64)]) -> HeatCapacity {
    HeatCapacity::powers(terms, Basis::Mass).unwrap()
}

/// Lowest and highest temperature, and the terms of a sum of powers.
pub(in crate::thermo) type TestRange<'a> = (f64, f64, &'a [(f64, f64)]);

pub(in crate::thermo) fn phase(name: &str, class: PhaseClass, ranges: &[TestRange<'_>]) -> PhaseData {
    let ranges = ranges.iter().map(|&(lo, hi, terms)| LawRange { lo: k(lo), hi: k(hi), law: law(terms) });
    PhaseData { name: name.to_owned(), class, ranges: ranges.collect(), density: None, formation: None }
}

pub(in crate::thermo) fn data(phases: Vec<PhaseData>, links: Vec<Link>) -> CurveData {
    CurveData { phases, links, formation: None, decomposes_at: None, vapour_pressure: None, molar_mass: None }
}

/// The zinc of the demo works, per mole over 65.38 g/mol.
pub(in crate::thermo) fn zinc_data() -> CurveData {
    let basis = Basis::Molar(typed::<<MolarMass as DimensionOf>::D>(0.065_38));
    let mut solid = phase("solid", PhaseClass::Solid, &[(273.15, 692.68, &[(1.0, 0.0)])]);
    let mut liquid = phase("liquid", PhaseClass::Liquid, &[(692.68, 1180.0, &[(1.0, 0.0)])]);
    solid.ranges[0].law = HeatCapacity::powers(&[(22.40, 0.0), (10.05e-3, 1.0)], basis).unwrap();
    liquid.ranges[0].law = HeatCapacity::powers(&[(31.38, 0.0)], basis).unwrap();
    solid.density = Some(Density::Constant(typed::<<MassDensity as DimensionOf>::D>(7140.0)));
    liquid.density = Some(Density::Constant(typed::<<MassDensity as DimensionOf>::D>(6570.0)));
    let mut data =
        data(vec![solid, liquid], vec![Link::At { temperature: k(692.68), latent: j(7322.0 / 0.065_38) }]);
    data.formation = Some(j(0.0));
    data.molar_mass = Some(typed(0.065_38));
    data
}

pub(in crate::thermo) fn zinc() -> HeatingCurve {
    HeatingCurve::build(zinc_data()).unwrap()
}

/// An alloy that melts from 843 K to 893 K: solid cp 800, liquid cp 1000, 389 kJ/kg along three points.
fn alloy_data() -> CurveData {
    let along = vec![(k(843.0), 0.0), (k(850.0), 0.48), (k(893.0), 1.0)];
    data(
        vec![
            phase("solid", PhaseClass::Solid, &[(293.0, 843.0, &[(800.0, 0.0)])]),
            phase("liquid", PhaseClass::Liquid, &[(893.0, 1200.0, &[(1000.0, 0.0)])]),
        ],
        vec![Link::Over { from: k(843.0), to: k(893.0), latent: j(389e3), along }],
    )
}

/// A species with everything: two solids, the second with two ranges, a melting range, a boiling point, and a
/// second gas that stands apart; invented numbers.
pub(in crate::thermo) fn rich_data() -> CurveData {
    let mut vapour = phase("dimer", PhaseClass::Gas, &[(250.0, 900.0, &[(700.0, 0.0)])]);
    vapour.formation = Some(j(2.0e6));
    let mut data = data(
        vec![
            phase("alpha", PhaseClass::Solid, &[(250.0, 420.0, &[(500.0, 0.0), (0.3, 1.0)])]),
            phase(
                "gamma",
                PhaseClass::Solid,
                &[
                    (380.0, 500.0, &[(560.0, 0.0), (0.2, 1.0), (1e6, -2.0)]),
                    (500.0, 650.0, &[(650.0, 0.0), (2000.0, -0.5)]),
                ],
            ),
            phase("liquid", PhaseClass::Liquid, &[(590.0, 1000.0, &[(900.0, 0.0)])]),
            phase("gas", PhaseClass::Gas, &[(300.0, 2000.0, &[(400.0, 0.0), (0.1, 1.0), (1e4, -1.0)])]),
            vapour,
        ],
        vec![
            Link::At { temperature: k(400.0), latent: j(12e3) },
            Link::Over { from: k(600.0), to: k(640.0), latent: j(150e3), along: vec![] },
            Link::At { temperature: k(950.0), latent: j(1.1e6) },
            Link::Apart,
        ],
    );
    data.formation = Some(j(-3e6));
    data.molar_mass = Some(typed(0.060));
    data
}

pub(in crate::thermo) fn rich() -> HeatingCurve {
    HeatingCurve::build(rich_data()).unwrap()
}

pub(in crate::thermo) fn at(curve: &HeatingCurve, t: f64, pin: Pin) -> Result<Place, LocateError> {
    curve.locate(k(t), atmosphere(), pin, None, Allowance::none())
}

pub(in crate::thermo) fn h(curve: &HeatingCurve, t: f64) -> f64 {
    curve.enthalpy(at(curve, t, Pin::Stable).unwrap()).value
}

/// The dimension of a quantity, to name it in `typed`.
trait DimensionOf {
    type D: uom::si::Dimension + ?Sized;
}
impl<D: uom::si::Dimension + ?Sized> DimensionOf for uom::si::Quantity<D, uom::si::SI<f64>, f64> {
    type D = D;
}
