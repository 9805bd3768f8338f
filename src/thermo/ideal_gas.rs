//! The ideal gas: `p V = n R T` solved for each of its quantities, and what follows for heat capacities.

use uom::si::f64::{
    AmountOfSubstance, MolarMass, Pressure, SpecificHeatCapacity, ThermodynamicTemperature, Volume,
};

use super::constants::GAS_CONSTANT;
use super::si::typed;

/// `p = n R T / V`.
#[inline]
pub fn pressure(
    amount: AmountOfSubstance,
    temperature: ThermodynamicTemperature,
    volume: Volume,
) -> Pressure {
    typed(amount.value * GAS_CONSTANT * temperature.value / volume.value)
}

/// `V = n R T / p`.
#[inline]
pub fn volume(
    amount: AmountOfSubstance,
    temperature: ThermodynamicTemperature,
    pressure: Pressure,
) -> Volume {
    typed(amount.value * GAS_CONSTANT * temperature.value / pressure.value)
}

/// `n = p V / (R T)`.
#[inline]
pub fn amount(
    pressure: Pressure,
    volume: Volume,
    temperature: ThermodynamicTemperature,
) -> AmountOfSubstance {
    typed(pressure.value * volume.value / (GAS_CONSTANT * temperature.value))
}

/// `T = p V / (n R)`.
#[inline]
pub fn temperature(
    pressure: Pressure,
    volume: Volume,
    amount: AmountOfSubstance,
) -> ThermodynamicTemperature {
    typed(pressure.value * volume.value / (amount.value * GAS_CONSTANT))
}

/// The gas constant per mass, `R/M`.
#[inline]
pub fn specific_gas_constant(molar_mass: MolarMass) -> SpecificHeatCapacity {
    typed(GAS_CONSTANT / molar_mass.value)
}

/// The heat capacity at constant volume, `cv = cp - R/M`.
#[inline]
pub fn isochoric_heat_capacity(cp: SpecificHeatCapacity, molar_mass: MolarMass) -> SpecificHeatCapacity {
    typed(cp.value - GAS_CONSTANT / molar_mass.value)
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn the_molar_volume_at_0_celsius_and_one_atmosphere() {
        // CODATA 2018: 22.413 969 54... L/mol at 273.15 K and 101.325 kPa.
        let v = volume(typed(1.0), typed(273.15), typed(101_325.0));
        assert!((v.value - 22.413_969_54e-3).abs() < 1e-11, "{}", v.value);
        assert!((pressure(typed(1.0), typed(273.15), v).value - 101_325.0).abs() < 1e-9);
        assert!((amount(typed(101_325.0), v, typed(273.15)).value - 1.0).abs() < 1e-15);
        assert!((temperature(typed(101_325.0), v, typed(1.0)).value - 273.15).abs() < 1e-12);
    }

    #[test]
    fn cv_of_argon_is_three_halves_of_r() {
        // A monatomic gas: cp = 5/2 R/M, cv = 3/2 R/M.
        let molar_mass = typed(0.039_95);
        let cp = typed(2.5 * specific_gas_constant(molar_mass).value);
        let cv = isochoric_heat_capacity(cp, molar_mass);
        assert!((cv.value / specific_gas_constant(molar_mass).value - 1.5).abs() < 1e-15);
    }
}
