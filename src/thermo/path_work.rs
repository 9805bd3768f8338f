//! Work along a path, positive into the system (IUPAC Green Book, 3rd ed., 2.11: `ΔU = Q + W`).

use uom::si::f64::{AmountOfSubstance, Energy, Pressure, ThermodynamicTemperature, Volume};

use super::constants::GAS_CONSTANT;
use super::si::typed;
use crate::numeric::math;

/// Work on an ideal gas from `p1` to `p2` at one temperature, reversibly: `n R T ln(p2/p1)`.
#[inline]
pub fn isothermal_reversible(
    amount: AmountOfSubstance,
    temperature: ThermodynamicTemperature,
    p1: Pressure,
    p2: Pressure,
) -> Energy {
    typed(amount.value * GAS_CONSTANT * temperature.value * math::ln(p2.value / p1.value))
}

/// Work at constant pressure from volume `v1` to `v2`: `-p (v2 - v1)`.
#[inline]
pub fn constant_pressure(pressure: Pressure, v1: Volume, v2: Volume) -> Energy {
    typed(-pressure.value * (v2.value - v1.value))
}

/// The work of a real machine whose reversible twin takes `ideal`: a compression (positive) takes `ideal/η`,
/// an expansion (negative) gives `η · ideal`. None for an efficiency that is not above 0 and at most 1.
#[inline]
pub fn with_isentropic_efficiency(ideal: Energy, efficiency: f64) -> Option<Energy> {
    let fits = efficiency > 0.0 && efficiency <= 1.0;
    fits.then(|| typed(if ideal.value > 0.0 { ideal.value / efficiency } else { ideal.value * efficiency }))
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn work_worked_by_hand() {
        // 2 mol at 300 K to tenfold pressure: 2 · 8.314 462 618 · 300 · ln 10 = 11 486.855 J.
        let w = isothermal_reversible(typed(2.0), typed(300.0), typed(1e5), typed(1e6));
        assert!((w.value - 11_486.855).abs() < 0.001, "{}", w.value);
        // 1 bar over 10 L pushed out: the system loses 1000 J.
        assert!((constant_pressure(typed(1e5), typed(0.01), typed(0.02)).value + 1000.0).abs() < 1e-9);
    }

    #[test]
    fn efficiency_costs_on_both_ways() {
        assert_eq!(with_isentropic_efficiency(typed(76.0), 0.76), Some(typed(100.0)));
        assert_eq!(with_isentropic_efficiency(typed(-100.0), 0.76), Some(typed(-76.0)));
        assert_eq!(with_isentropic_efficiency(typed(1.0), 0.0), None);
        assert_eq!(with_isentropic_efficiency(typed(1.0), 1.01), None);
        assert_eq!(with_isentropic_efficiency(typed(1.0), f64::NAN), None);
    }
}
