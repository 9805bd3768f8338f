//! Constants and conventional values that the physics rests on.

use uom::si::f64::MolarHeatCapacity;

use super::si::typed;

/// The molar gas constant in J/(mol K), exact since the SI of 2019 (SI Brochure, 9th ed.: N_A k).
pub const GAS_CONSTANT: f64 = 8.314_462_618_153_24;

/// The pressure in Pa at which boiling points hold and above which condensed matter carries `v (p - p0)`: one
/// standard atmosphere (ISO 80000-4).
pub const STANDARD_ATMOSPHERE: f64 = 101_325.0;

/// The temperature in K of tabulated formation enthalpies (IUPAC Green Book, 3rd ed., 2.11).
pub const REFERENCE_TEMPERATURE: f64 = 298.15;

/// The molar gas constant.
pub fn gas_constant() -> MolarHeatCapacity {
    typed(GAS_CONSTANT)
}
