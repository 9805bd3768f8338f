//! The laws of one interface: cp and its two integrals.

use uom::si::f64::{AvailableEnergy, MolarMass, SpecificHeatCapacity, ThermodynamicTemperature};

use super::powers::Powers;
use crate::numeric::{Formula, Interpolant, InterpolantError, Shape, Tolerance, integrate};
use crate::thermo::si::typed;

/// How exactly a formula without a closed integral is integrated.
const QUADRATURE: Tolerance = Tolerance { absolute: 0.0, relative: 1e-12 };

/// What a published heat capacity refers to.
#[derive(Debug, Clone, Copy, PartialEq)]
pub enum Basis {
    /// Per mass, in J/(kg K).
    Mass,
    /// Per amount of substance, in J/(mol K), with the molar mass that turns it into J/(kg K).
    Molar(MolarMass),
}

impl Basis {
    /// What a published number is multiplied by.
    fn factor(self) -> f64 {
        match self {
            Basis::Mass => 1.0,
            Basis::Molar(molar_mass) => 1.0 / molar_mass.value,
        }
    }
}

/// Why a law cannot be built.
#[derive(Debug, Clone, Copy, PartialEq)]
pub enum HeatCapacityError {
    /// The law has no term.
    NoTerms,
    /// A coefficient or an exponent that is not a finite number, by its place.
    NotFinite {
        /// Its place.
        at: usize,
    },
    /// The molar mass, or the published gas constant, is not a positive number.
    Factor,
    /// A table that cannot be interpolated.
    Table(InterpolantError),
    /// A table with a temperature that is not above 0 K, by its place.
    BelowAbsoluteZero {
        /// Its place.
        at: usize,
    },
}

/// A law of heat capacity, per mass.
#[derive(Debug, Clone, PartialEq)]
pub struct HeatCapacity {
    law: Law,
    factor: f64,
}

#[derive(Debug, Clone, PartialEq)]
enum Law {
    Powers(Box<Powers>),
    /// Tabulated, with cp between the points a polynomial whose integral is the tabulated enthalpy.
    Table(Interpolant),
    /// Integrated by quadrature from `from`, in K.
    Formula {
        formula: Formula,
        from: f64,
    },
}

impl HeatCapacity {
    /// The same cp at every temperature.
    ///
    /// # Errors
    /// [`HeatCapacityError::NotFinite`].
    pub fn constant(cp: SpecificHeatCapacity) -> Result<HeatCapacity, HeatCapacityError> {
        HeatCapacity::powers(&[(cp.value, 0.0)], Basis::Mass)
    }

    /// `cp = Σ c T^n` with T in K. Each term is `(c, n)`; exponents may be any real numbers.
    ///
    /// # Errors
    /// [`HeatCapacityError`] for no term, a number that is not finite, or a molar mass that is not positive.
    pub fn powers(terms: &[(f64, f64)], basis: Basis) -> Result<HeatCapacity, HeatCapacityError> {
        HeatCapacity::scaled_powers(terms, basis.factor())
    }

    pub(super) fn scaled_powers(
        terms: &[(f64, f64)],
        factor: f64,
    ) -> Result<HeatCapacity, HeatCapacityError> {
        if terms.is_empty() {
            return Err(HeatCapacityError::NoTerms);
        }
        if let Some(at) = terms.iter().position(|(c, n)| !c.is_finite() || !n.is_finite()) {
            return Err(HeatCapacityError::NotFinite { at });
        }
        HeatCapacity::new(Law::Powers(Box::new(Powers::new(terms))), factor)
    }

    /// A table of `(T in K, cp)`, interpolated.
    ///
    /// # Errors
    /// [`HeatCapacityError`] for a table that cannot be interpolated or goes below 0 K.
    pub fn table(
        points: &[(f64, f64)],
        shape: Shape,
        basis: Basis,
    ) -> Result<HeatCapacity, HeatCapacityError> {
        HeatCapacity::new(Law::Table(interpolated(points, shape)?), basis.factor())
    }

    /// A table of `(T in K, enthalpy)`, above any one level; cp is the slope of the interpolated enthalpy.
    /// The temperature that the table counts from belongs among the points, with enthalpy 0.
    ///
    /// # Errors
    /// As for [`HeatCapacity::table`].
    pub fn enthalpy_table(
        points: &[(f64, f64)],
        shape: Shape,
        basis: Basis,
    ) -> Result<HeatCapacity, HeatCapacityError> {
        HeatCapacity::new(Law::Table(interpolated(points, shape)?.slope()), basis.factor())
    }

    /// A table of `(T in K, mean cp between reference and T)`: the mean is interpolated and `h(T) -
    /// h(reference) = mean(T) (T - reference)`. Between the reference and a table that begins beyond it, the
    /// nearest mean holds.
    ///
    /// # Errors
    /// As for [`HeatCapacity::table`].
    pub fn mean_table(
        reference: ThermodynamicTemperature,
        points: &[(f64, f64)],
        shape: Shape,
        basis: Basis,
    ) -> Result<HeatCapacity, HeatCapacityError> {
        let origin = reference.value;
        let mut reaching = points.to_vec();
        if let Some(&(_, mean)) = points.first().filter(|(t, _)| origin < *t) {
            reaching.insert(0, (origin, mean));
        }
        if let Some(&(_, mean)) = points.last().filter(|(t, _)| origin > *t) {
            reaching.push((origin, mean));
        }
        let mean = interpolated(&reaching, shape)?;
        HeatCapacity::new(Law::Table(mean.slope_above(origin)), basis.factor())
    }

    /// Any formula of T in K. Its integrals are taken numerically from `from`, which lies in the range where
    /// the law holds, to 1e-12 of their value.
    ///
    /// # Errors
    /// [`HeatCapacityError`] when `from` is not above 0 K or the molar mass is not positive.
    pub fn formula(
        formula: Formula,
        from: ThermodynamicTemperature,
        basis: Basis,
    ) -> Result<HeatCapacity, HeatCapacityError> {
        if from.value.is_nan() || from.value <= 0.0 {
            return Err(HeatCapacityError::BelowAbsoluteZero { at: 0 });
        }
        HeatCapacity::new(Law::Formula { formula, from: from.value }, basis.factor())
    }

    fn new(law: Law, factor: f64) -> Result<HeatCapacity, HeatCapacityError> {
        if factor.is_finite() && factor > 0.0 {
            Ok(HeatCapacity { law, factor })
        } else {
            Err(HeatCapacityError::Factor)
        }
    }

    /// cp at `temperature`.
    #[inline]
    pub fn cp(&self, temperature: ThermodynamicTemperature) -> SpecificHeatCapacity {
        typed(self.value(temperature.value))
    }

    /// `∫ cp dT` from `from` to `to`.
    #[inline]
    pub fn enthalpy_increment(
        &self,
        from: ThermodynamicTemperature,
        to: ThermodynamicTemperature,
    ) -> AvailableEnergy {
        typed(self.enthalpy(to.value) - self.enthalpy(from.value))
    }

    /// `∫ cp/T dT` from `from` to `to`.
    #[inline]
    pub fn entropy_increment(
        &self,
        from: ThermodynamicTemperature,
        to: ThermodynamicTemperature,
    ) -> SpecificHeatCapacity {
        typed(self.entropy(to.value) - self.entropy(from.value))
    }

    /// The first and the last temperature of a table; none for a formula, whose range stands beside it.
    pub fn span(&self) -> Option<(ThermodynamicTemperature, ThermodynamicTemperature)> {
        match &self.law {
            Law::Table(table) => Some((typed(table.span().0), typed(table.span().1))),
            Law::Powers(_) | Law::Formula { .. } => None,
        }
    }

    /// cp in J/(kg K) at `t` in K.
    #[inline]
    pub(crate) fn value(&self, t: f64) -> f64 {
        self.factor
            * match &self.law {
                Law::Powers(powers) => powers.value(t),
                Law::Table(table) => table.value(t),
                Law::Formula { formula, .. } => formula.eval(t),
            }
    }

    /// An antiderivative of cp in J/kg.
    #[inline]
    pub(crate) fn enthalpy(&self, t: f64) -> f64 {
        self.factor
            * match &self.law {
                Law::Powers(powers) => powers.integral(t),
                Law::Table(table) => table.integral(t),
                Law::Formula { formula, from } => quadrature(|t| formula.eval(t), *from, t),
            }
    }

    /// An antiderivative of cp/T in J/(kg K).
    #[inline]
    pub(crate) fn entropy(&self, t: f64) -> f64 {
        self.factor
            * match &self.law {
                Law::Powers(powers) => powers.integral_over_t(t),
                Law::Table(table) => table.integral_over_x(t),
                Law::Formula { formula, from } => quadrature(|t| formula.eval(t) / t, *from, t),
            }
    }

    /// `(a, b)` in J/(kg K) and J/(kg K²) when cp is `a + b T`.
    pub(crate) fn straight_line(&self) -> Option<(f64, f64)> {
        match &self.law {
            Law::Powers(powers) => powers.straight_line().map(|(a, b)| (a * self.factor, b * self.factor)),
            Law::Table(_) | Law::Formula { .. } => None,
        }
    }
}

fn interpolated(points: &[(f64, f64)], shape: Shape) -> Result<Interpolant, HeatCapacityError> {
    if let Some(at) = points.iter().position(|(t, _)| *t <= 0.0) {
        return Err(HeatCapacityError::BelowAbsoluteZero { at });
    }
    Interpolant::new(points, shape).map_err(HeatCapacityError::Table)
}

/// The integral, or `NaN` where it does not exist.
fn quadrature(f: impl Fn(f64) -> f64, from: f64, to: f64) -> f64 {
    integrate(f, from, to, QUADRATURE).map_or(f64::NAN, |integral| integral.value)
}
