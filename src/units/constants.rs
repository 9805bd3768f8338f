//! Constants of nature and conventional values, in coherent SI units.

/// The molar gas constant in J/(mol K): the product of the Avogadro constant 6.02214076e23 mol-1 and the Boltzmann
/// constant 1.380649e-23 J/K, both exact (SI Brochure, 9th ed., 2019, table 1).
pub const GAS_CONSTANT: f64 = 8.31446261815324;

/// The Stefan-Boltzmann constant in W/(m2 K4): 2 π^5 k^4 / (15 h^3 c^2) with the exact values of k, h and c (SI
/// Brochure, 9th ed., 2019, table 1), rounded to the nearest number.
pub const STEFAN_BOLTZMANN: f64 = 5.670374419184429e-8;

/// The standard acceleration of free fall in m/s2 (3rd CGPM, 1901).
pub const STANDARD_GRAVITY: f64 = 9.80665;

/// The standard atmosphere in Pa (10th CGPM, 1954, resolution 4).
pub const STANDARD_ATMOSPHERE: f64 = 101_325.0;

#[cfg(test)]
mod tests {
    use super::*;

    const AVOGADRO: f64 = 6.02214076e23;
    const BOLTZMANN: f64 = 1.380649e-23;
    const PLANCK: f64 = 6.62607015e-34;
    const LIGHT: f64 = 299_792_458.0;

    #[test]
    fn the_gas_constant_is_its_definition() {
        assert!((GAS_CONSTANT / (AVOGADRO * BOLTZMANN) - 1.0).abs() < 4e-16);
    }

    #[test]
    fn the_stefan_boltzmann_constant_is_its_definition() {
        // Grouped so that no factor leaves the range of f64: k (k/h)^3 is about 1e8.
        let ratio = BOLTZMANN / PLANCK;
        let pi = std::f64::consts::PI;
        let sigma =
            2.0 * pi * pi * pi * pi * pi / 15.0 * BOLTZMANN * (ratio * ratio * ratio) / (LIGHT * LIGHT);
        assert!((STEFAN_BOLTZMANN / sigma - 1.0).abs() < 2e-15);
    }
}
