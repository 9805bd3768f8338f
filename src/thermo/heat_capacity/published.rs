//! The published forms, each fed with its coefficients as printed.

use uom::si::f64::{MolarHeatCapacity, MolarMass};

use super::law::{Basis, HeatCapacity, HeatCapacityError};

/// Coefficients of the Maier-Kelley form `cp = a + b T + c/T² + d/√T + e T²` (C. G. Maier, K. K. Kelley, J.
/// Am. Chem. Soc. 1932, 54, 3243, which has a, b and c; d and e as in USGS Bulletin 2131), T in K.
#[derive(Debug, Clone, Copy, PartialEq, Default)]
pub struct MaierKelley {
    /// The constant.
    pub a: f64,
    /// Coefficient of T.
    pub b: f64,
    /// Coefficient of 1/T².
    pub c: f64,
    /// Coefficient of 1/√T.
    pub d: f64,
    /// Coefficient of T².
    pub e: f64,
}

impl HeatCapacity {
    /// The NASA 9-term form `cp/R = a1/T² + a2/T + a3 + a4 T + a5 T² + a6 T³ + a7 T⁴` (B. J. McBride, M. J.
    /// Zehe, S. Gordon, NASA/TP-2002-211556). `gas_constant` is the one that the publication used.
    ///
    /// # Errors
    /// [`HeatCapacityError`] for a coefficient that is not finite or a factor that is not positive.
    pub fn nasa9(
        a: [f64; 7],
        gas_constant: MolarHeatCapacity,
        molar_mass: MolarMass,
    ) -> Result<HeatCapacity, HeatCapacityError> {
        let exponents = [-2.0, -1.0, 0.0, 1.0, 2.0, 3.0, 4.0];
        HeatCapacity::scaled_powers(&terms(a, exponents), gas_constant.value / molar_mass.value)
    }

    /// The NASA 7-term form `cp/R = a1 + a2 T + a3 T² + a4 T³ + a5 T⁴` (S. Gordon, B. J. McBride, NASA
    /// SP-273, 1971). `gas_constant` is the one that the publication used.
    ///
    /// # Errors
    /// As for [`HeatCapacity::nasa9`].
    pub fn nasa7(
        a: [f64; 5],
        gas_constant: MolarHeatCapacity,
        molar_mass: MolarMass,
    ) -> Result<HeatCapacity, HeatCapacityError> {
        let exponents = [0.0, 1.0, 2.0, 3.0, 4.0];
        HeatCapacity::scaled_powers(&terms(a, exponents), gas_constant.value / molar_mass.value)
    }

    /// The Shomate form `cp = A + B t + C t² + D t³ + E/t²` in J/(mol K), `t = T/(1000 K)` (C. H. Shomate, J.
    /// Phys. Chem. 1954, 58, 368, for the method; the form as NIST prints it). The coefficients, in the order
    /// A to E, are turned to T in K once, which moves them by no more than their last bit.
    ///
    /// # Errors
    /// As for [`HeatCapacity::nasa9`].
    pub fn shomate(coefficients: [f64; 5], molar_mass: MolarMass) -> Result<HeatCapacity, HeatCapacityError> {
        let [a, b, c, d, e] = coefficients;
        let terms = [(a, 0.0), (b / 1e3, 1.0), (c / 1e6, 2.0), (d / 1e9, 3.0), (e * 1e6, -2.0)];
        HeatCapacity::powers(&terms, Basis::Molar(molar_mass))
    }

    /// The Maier-Kelley form.
    ///
    /// # Errors
    /// As for [`HeatCapacity::powers`].
    pub fn maier_kelley(coefficients: MaierKelley, basis: Basis) -> Result<HeatCapacity, HeatCapacityError> {
        let MaierKelley { a, b, c, d, e } = coefficients;
        HeatCapacity::powers(&[(a, 0.0), (b, 1.0), (c, -2.0), (d, -0.5), (e, 2.0)], basis)
    }
}

fn terms<const N: usize>(coefficients: [f64; N], exponents: [f64; N]) -> [(f64, f64); N] {
    let mut terms = [(0.0, 0.0); N];
    for ((term, coefficient), exponent) in terms.iter_mut().zip(coefficients).zip(exponents) {
        *term = (coefficient, exponent);
    }
    terms
}
