//! A sum of powers of temperature, integrated in closed form.

use crate::numeric::math;

/// Places for T⁰ to T⁶.
const RISING: usize = 7;
/// Places for T⁻² to T⁻⁶.
const FALLING: usize = 5;

/// `Σ c T^n`. Whole exponents from -6 to 6 and ±1/2 are worked without a call of `pow`.
#[derive(Debug, Clone, PartialEq)]
pub(super) struct Powers {
    /// T⁰ to T⁶, for the law, its integral over T (less one factor T) and its integral over ln T.
    rising: Three<RISING>,
    /// T⁻² to T⁻⁶, likewise.
    falling: Three<FALLING>,
    /// The coefficient of T⁻¹.
    inverse: f64,
    /// The coefficient of T^(1/2).
    root: f64,
    /// The coefficient of T^(-1/2).
    inverse_root: f64,
    /// Every other exponent, as coefficient and exponent.
    other: Box<[(f64, f64)]>,
    /// Whether there is nothing but T⁰ to T⁶.
    polynomial: bool,
}

/// Coefficients of one polynomial and of its two integrals, with the number of places in use.
#[derive(Debug, Clone, PartialEq)]
struct Three<const N: usize> {
    law: [f64; N],
    enthalpy: [f64; N],
    entropy: [f64; N],
    used: usize,
}

impl<const N: usize> Three<N> {
    /// Coefficients that belong to the exponents `first`, `first + step`, ...
    fn new(law: [f64; N], first: f64, step: f64) -> Self {
        let mut three = Three { law, enthalpy: law, entropy: law, used: 0 };
        let places = three.law.iter().zip(&mut three.enthalpy).zip(&mut three.entropy);
        let mut exponent = first;
        for (place, ((coefficient, enthalpy), entropy)) in places.enumerate() {
            *enthalpy = coefficient / (exponent + 1.0);
            *entropy = if exponent == 0.0 { 0.0 } else { coefficient / exponent };
            if *coefficient != 0.0 {
                three.used = place + 1;
            }
            exponent += step;
        }
        three
    }
}

/// `Σ c_k x^k` over the places in use, by Horner's rule.
#[inline]
fn horner(coefficients: &[f64], used: usize, x: f64) -> f64 {
    coefficients.iter().take(used).rev().fold(0.0, |sum, coefficient| sum * x + coefficient)
}

impl Powers {
    /// The sum of `terms`, each a coefficient and its exponent; equal exponents are added in the order given.
    pub(super) fn new(terms: &[(f64, f64)]) -> Powers {
        let (mut rising, mut falling) = ([0.0; RISING], [0.0; FALLING]);
        let (mut inverse, mut root, mut inverse_root) = (0.0, 0.0, 0.0);
        let mut other = Vec::new();
        for &(coefficient, exponent) in terms {
            if let Some(place) = place(&mut rising, exponent) {
                *place += coefficient;
            } else if let Some(place) = place(&mut falling, -2.0 - exponent) {
                *place += coefficient;
            } else if exponent == -1.0 {
                inverse += coefficient;
            } else if exponent == 0.5 {
                root += coefficient;
            } else if exponent == -0.5 {
                inverse_root += coefficient;
            } else {
                other.push((coefficient, exponent));
            }
        }
        let polynomial = falling == [0.0; FALLING]
            && inverse == 0.0
            && root == 0.0
            && inverse_root == 0.0
            && other.is_empty();
        Powers {
            rising: Three::new(rising, 0.0, 1.0),
            falling: Three::new(falling, -2.0, -1.0),
            inverse,
            root,
            inverse_root,
            other: other.into_boxed_slice(),
            polynomial,
        }
    }

    /// The law at `t`.
    #[inline]
    pub(super) fn value(&self, t: f64) -> f64 {
        let mut sum = horner(&self.rising.law, self.rising.used, t);
        if self.polynomial {
            return sum;
        }
        if self.falling.used > 0 || self.inverse != 0.0 {
            let r = 1.0 / t;
            sum += r * (self.inverse + r * horner(&self.falling.law, self.falling.used, r));
        }
        if self.root != 0.0 || self.inverse_root != 0.0 {
            let root = math::sqrt(t);
            sum += self.root * root + self.inverse_root / root;
        }
        for &(coefficient, exponent) in &self.other {
            sum += coefficient * math::pow(t, exponent);
        }
        sum
    }

    /// An antiderivative of the law.
    #[inline]
    pub(super) fn integral(&self, t: f64) -> f64 {
        let mut sum = t * horner(&self.rising.enthalpy, self.rising.used, t);
        if self.polynomial {
            return sum;
        }
        if self.falling.used > 0 {
            let r = 1.0 / t;
            sum += r * horner(&self.falling.enthalpy, self.falling.used, r);
        }
        if self.inverse != 0.0 {
            sum += self.inverse * math::ln(t);
        }
        if self.root != 0.0 || self.inverse_root != 0.0 {
            let root = math::sqrt(t);
            sum += root * (2.0 * self.inverse_root + t * (2.0 * self.root / 3.0));
        }
        for &(coefficient, exponent) in &self.other {
            sum += coefficient * math::pow(t, exponent + 1.0) / (exponent + 1.0);
        }
        sum
    }

    /// An antiderivative of the law over `t`.
    #[inline]
    pub(super) fn integral_over_t(&self, t: f64) -> f64 {
        let constant = self.rising.law.first().copied().unwrap_or(0.0);
        let mut sum = horner(&self.rising.entropy, self.rising.used, t);
        if constant != 0.0 {
            sum += constant * math::ln(t);
        }
        if self.falling.used > 0 || self.inverse != 0.0 {
            let r = 1.0 / t;
            sum += r * (r * horner(&self.falling.entropy, self.falling.used, r) - self.inverse);
        }
        if self.root != 0.0 || self.inverse_root != 0.0 {
            let root = math::sqrt(t);
            sum += 2.0 * (self.root * root - self.inverse_root / root);
        }
        for &(coefficient, exponent) in &self.other {
            sum += coefficient * math::pow(t, exponent) / exponent;
        }
        sum
    }

    /// `(a, b)` when the law is `a + b T` and nothing else.
    pub(super) fn straight_line(&self) -> Option<(f64, f64)> {
        let [a, b, ..] = self.rising.law;
        (self.polynomial && self.rising.used <= 2).then_some((a, b))
    }
}

/// The place of a whole exponent, counted from zero.
fn place(places: &mut [f64], exponent: f64) -> Option<&mut f64> {
    places
        .iter_mut()
        .enumerate()
        .find(|(at, _)| u32::try_from(*at).is_ok_and(|at| f64::from(at) == exponent))
        .map(|(_, p)| p)
}
