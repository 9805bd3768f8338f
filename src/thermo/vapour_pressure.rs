//! The vapour pressure of a liquid by a published law.
//!
//! Every law gives `ln(p/Pa)` as a function of T in K; the boiling temperature is found from it in closed form or
//! by Newton's method within the law's range.

use uom::si::f64::{Pressure, ThermodynamicTemperature};

use super::si::typed;
use crate::numeric::{find_rising_root, math};

/// At how many points of its range a law is tried for rising.
const SAMPLES: u32 = 64;

/// ln 10.
const LN_10: f64 = std::f64::consts::LN_10;

/// The form of a law with its coefficients: temperatures in K, pressures in Pa.
#[derive(Debug, Clone, Copy, PartialEq)]
pub enum VapourPressureForm {
    /// `log10(p/unit) = A − B/(T + C)` (Antoine, Comptes rendus 107 (1888) 681).
    Antoine {
        /// A.
        a: f64,
        /// B, K.
        b: f64,
        /// C, K.
        c: f64,
        /// The unit of pressure of the publication, Pa.
        unit: f64,
    },
    /// `ln(p/unit) = A + B/T + C ln(T/K)` (Kirchhoff, Annalen der Physik 103 (1858) 177).
    Kirchhoff {
        /// A.
        a: f64,
        /// B, K.
        b: f64,
        /// C.
        c: f64,
        /// The unit of pressure of the publication, Pa.
        unit: f64,
    },
    /// `ln(p/pc) = (Tc/T) Σ aᵢ τ^nᵢ` with `τ = 1 − T/Tc` (Wagner, Cryogenics 13 (1973) 470).
    Wagner {
        /// Coefficients and exponents, those not used with coefficient zero.
        terms: [(f64, f64); 6],
        /// Critical temperature, K.
        critical_temperature: f64,
        /// Critical pressure, Pa.
        critical_pressure: f64,
    },
}

/// The exponents of the 2.5-5 form.
pub const WAGNER_25: [f64; 4] = [1.0, 1.5, 2.5, 5.0];
/// The exponents of the 3-6 form.
pub const WAGNER_36: [f64; 4] = [1.0, 1.5, 3.0, 6.0];
/// The exponents of the equation for water of IAPWS SR1-86(1992).
pub const WAGNER_WATER: [f64; 6] = [1.0, 1.5, 3.0, 3.5, 4.0, 7.5];

impl VapourPressureForm {
    /// A Wagner form from coefficients and exponents, at most six of them.
    pub fn wagner(
        coefficients: &[f64],
        exponents: &[f64],
        critical_temperature: f64,
        critical_pressure: f64,
    ) -> VapourPressureForm {
        let mut terms = [(0.0, 1.0); 6];
        for (slot, (a, n)) in terms.iter_mut().zip(coefficients.iter().zip(exponents)) {
            *slot = (*a, *n);
        }
        VapourPressureForm::Wagner { terms, critical_temperature, critical_pressure }
    }

    /// `ln(p/Pa)` at `t` in K, and how it rises with T, per K.
    fn value(&self, t: f64) -> (f64, f64) {
        match *self {
            VapourPressureForm::Antoine { a, b, c, unit } => {
                let below = t + c;
                (LN_10 * (a - b / below) + math::ln(unit), LN_10 * b / (below * below))
            }
            VapourPressureForm::Kirchhoff { a, b, c, unit } => {
                (a + b / t + c * math::ln(t) + math::ln(unit), (c - b / t) / t)
            }
            VapourPressureForm::Wagner { terms, critical_temperature: tc, critical_pressure: pc } => {
                let tau = (1.0 - t / tc).max(0.0);
                let (mut sum, mut slope) = (0.0, 0.0);
                for (a, n) in terms.iter().filter(|(a, _)| *a != 0.0) {
                    let below = if *n == 1.0 { 1.0 } else { math::pow(tau, n - 1.0) };
                    sum += a * below * tau;
                    slope += a * n * below;
                }
                let reduced = tc / t;
                (math::ln(pc) + reduced * sum, -(reduced * sum + slope) / t)
            }
        }
    }

    /// Where the form itself has a meaning, K.
    fn domain(&self) -> (f64, f64) {
        match *self {
            VapourPressureForm::Antoine { c, .. } => ((-c).max(0.0), f64::INFINITY),
            VapourPressureForm::Kirchhoff { .. } => (0.0, f64::INFINITY),
            VapourPressureForm::Wagner { critical_temperature, .. } => (0.0, critical_temperature),
        }
    }
}

/// Why a law cannot be.
#[derive(Debug, Clone, Copy, PartialEq)]
#[allow(missing_docs)]
pub enum VapourPressureError {
    /// A range that does not rise, or does not lie above 0 K.
    EmptyRange,
    /// The range leaves where the form has a meaning: above the critical point, below the pole of Antoine's.
    Domain { lo: ThermodynamicTemperature, hi: ThermodynamicTemperature },
    /// A value that is no finite number.
    NotFinite { temperature: ThermodynamicTemperature },
    /// A pressure that does not rise with temperature.
    Falls { temperature: ThermodynamicTemperature },
}

/// A vapour-pressure law with its range, in which it rises.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct VapourPressure {
    form: VapourPressureForm,
    lo: f64,
    hi: f64,
}

impl VapourPressure {
    /// A law that holds from `lo` to `hi`.
    ///
    /// # Errors
    /// [`VapourPressureError`].
    pub fn new(
        form: VapourPressureForm,
        lo: ThermodynamicTemperature,
        hi: ThermodynamicTemperature,
    ) -> Result<VapourPressure, VapourPressureError> {
        let law = VapourPressure { form, lo: lo.value, hi: hi.value };
        let rises = law.lo > 0.0 && law.lo < law.hi && law.hi.is_finite();
        if !rises {
            return Err(VapourPressureError::EmptyRange);
        }
        let (least, most) = form.domain();
        if law.lo <= least || law.hi > most {
            return Err(VapourPressureError::Domain { lo: typed(least), hi: typed(most) });
        }
        for at in 0..=SAMPLES {
            let t = law.lo + (law.hi - law.lo) * (f64::from(at) / f64::from(SAMPLES));
            let (value, slope) = form.value(t);
            if !(value.is_finite() && slope.is_finite()) {
                return Err(VapourPressureError::NotFinite { temperature: typed(t) });
            }
            if slope <= 0.0 {
                return Err(VapourPressureError::Falls { temperature: typed(t) });
            }
        }
        Ok(law)
    }

    /// The temperatures between which it holds.
    pub fn span(&self) -> (ThermodynamicTemperature, ThermodynamicTemperature) {
        (typed(self.lo), typed(self.hi))
    }

    /// The vapour pressure at a temperature; the form is followed whatever the range.
    pub fn pressure(&self, temperature: ThermodynamicTemperature) -> Pressure {
        typed(math::exp(self.log_pressure(temperature.value)))
    }

    /// `ln(p/Pa)` at `t` in K.
    pub(super) fn log_pressure(&self, t: f64) -> f64 {
        self.form.value(t).0
    }

    /// `d ln p/dT` at `t` in K.
    pub(super) fn log_slope(&self, t: f64) -> f64 {
        self.form.value(t).1
    }

    /// The temperatures between which it holds, K.
    pub(super) fn range(&self) -> (f64, f64) {
        (self.lo, self.hi)
    }

    /// A temperature with its `ln(p/Pa)`, moved into where the form has a meaning.
    pub(super) fn end(&self, t: f64) -> (f64, f64) {
        let (least, most) = self.form.domain();
        let t = t.max(least * (1.0 + 1e-6)).min(most);
        (t, self.log_pressure(t))
    }

    /// The temperature in K between two ends at which `ln(p/Pa)` has a value between theirs.
    pub(super) fn temperature_between(&self, log_pressure: f64, lo: (f64, f64), hi: (f64, f64)) -> f64 {
        if let VapourPressureForm::Antoine { a, b, c, unit } = self.form {
            let t = b / (a - (log_pressure - math::ln(unit)) / LN_10) - c;
            return t.max(lo.0).min(hi.0);
        }
        // by Clausius and Clapeyron ln p is nearly a straight line of 1/T
        let share = (log_pressure - lo.1) / (hi.1 - lo.1);
        let start = 1.0 / (1.0 / lo.0 + share * (1.0 / hi.0 - 1.0 / lo.0));
        let f = |t: f64| {
            let (value, slope) = self.form.value(t);
            (value - log_pressure, slope)
        };
        find_rising_root(f, (lo.0, hi.0), start).map_or(f64::NAN, |root| root.x)
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    fn water() -> VapourPressure {
        // IAPWS SR1-86(1992); Wagner, Pruss, J. Phys. Chem. Ref. Data 22 (1993) 783.
        let a = [-7.859_517_83, 1.844_082_59, -11.786_649_7, 22.680_741_1, -15.961_871_9, 1.801_225_02];
        let form = VapourPressureForm::wagner(&a, &WAGNER_WATER, 647.096, 22.064e6);
        VapourPressure::new(form, typed(273.16), typed(647.096)).unwrap()
    }

    #[test]
    fn water_has_its_published_pressures() {
        // IAPWS-IF97, Table 35 (region 4): 3.536 589 41 kPa, 2.638 897 76 MPa, 12.344 314 6 MPa. The two
        // equations agree within their uncertainty of 0.03 %.
        for (t, p) in [(300.0, 3_536.589_41), (500.0, 2_638_897.76), (600.0, 12_344_314.6)] {
            let found = water().pressure(typed(t)).value;
            assert!((found / p - 1.0).abs() < 3e-4, "{found} for {p} at {t} K");
        }
    }

    #[test]
    fn temperature_undoes_pressure_and_slopes_are_derivatives() {
        // Slopes against central differences of ln p, whose error is some 1e-9 of them.
        let antoine = VapourPressureForm::Antoine { a: 5.2, b: 1733.9, c: -39.5, unit: 1e5 };
        let kirchhoff =
            VapourPressureForm::Kirchhoff { a: 33.577_489, b: -15369.605, c: -1.276_323_9, unit: 1.0 };
        let laws = [
            water(),
            VapourPressure::new(antoine, typed(300.0), typed(500.0)).unwrap(),
            VapourPressure::new(kirchhoff, typed(700.0), typed(1500.0)).unwrap(),
        ];
        for law in laws {
            let (lo, hi) = law.range();
            for share in [0.0, 0.2, 0.5, 0.9, 1.0] {
                let t = lo + share * (hi - lo);
                let found = law.temperature_between(law.log_pressure(t), law.end(lo), law.end(hi));
                assert!((found - t).abs() < 1e-9 * t, "{t}: {found}");
            }
            let t = 0.5 * (lo + hi);
            let numeric = (law.log_pressure(t + 0.01) - law.log_pressure(t - 0.01)) / 0.02;
            assert!((law.log_slope(t) / numeric - 1.0).abs() < 1e-7, "{}", law.log_slope(t));
        }
    }

    #[test]
    fn a_law_that_falls_or_leaves_its_domain_is_none() {
        let new = |form, lo, hi| VapourPressure::new(form, typed(lo), typed(hi)).err();
        let antoine = |b, c| VapourPressureForm::Antoine { a: 5.0, b, c, unit: 1e5 };
        assert_eq!(
            new(antoine(-1700.0, -40.0), 300.0, 400.0),
            Some(VapourPressureError::Falls { temperature: typed(300.0) })
        );
        assert!(matches!(
            new(antoine(1700.0, -350.0), 300.0, 400.0),
            Some(VapourPressureError::Domain { .. })
        ));
        assert_eq!(new(antoine(1700.0, -40.0), 400.0, 300.0), Some(VapourPressureError::EmptyRange));
        let wagner = VapourPressureForm::wagner(&[-7.0, 1.0, -2.0, -3.0], &WAGNER_36, 500.0, 4e6);
        assert!(matches!(new(wagner, 300.0, 501.0), Some(VapourPressureError::Domain { .. })));
    }
}
