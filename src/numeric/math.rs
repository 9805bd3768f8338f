//! The transcendental functions of the program. They come from the `libm` crate, which is plain Rust, and not
//! from the platform's C library, whose last bit differs between machines.

/// The exponential function.
#[inline]
pub fn exp(x: f64) -> f64 {
    libm::exp(x)
}

/// The natural logarithm; `NaN` below zero.
#[inline]
pub fn ln(x: f64) -> f64 {
    libm::log(x)
}

/// `ln(1 + x)` without loss for small `x`.
#[inline]
pub fn ln_1p(x: f64) -> f64 {
    libm::log1p(x)
}

/// The decimal logarithm; `NaN` below zero.
#[inline]
pub fn log10(x: f64) -> f64 {
    libm::log10(x)
}

/// `base` raised to a real exponent.
#[inline]
pub fn pow(base: f64, exponent: f64) -> f64 {
    libm::pow(base, exponent)
}

/// `base` raised to an integer, by squaring from the lowest bit of the exponent up; a negative exponent takes
/// the reciprocal at the end. The order of the products is fixed.
#[inline]
pub fn powi(base: f64, exponent: i32) -> f64 {
    let mut left = exponent.unsigned_abs();
    let (mut square, mut product) = (base, 1.0);
    while left > 0 {
        if left & 1 == 1 {
            product *= square;
        }
        square *= square;
        left >>= 1;
    }
    if exponent < 0 { 1.0 / product } else { product }
}

/// The square root, exactly rounded; `NaN` below zero.
#[inline]
pub fn sqrt(x: f64) -> f64 {
    x.sqrt()
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn integer_powers_of_two_and_three_are_exact() {
        // Counted by hand: all of these are exact in a double.
        for (base, exponent, expected) in
            [(2.0, 10, 1024.0), (3.0, 5, 243.0), (2.0, -3, 0.125), (-2.0, 3, -8.0), (7.0, 0, 1.0)]
        {
            assert_eq!(powi(base, exponent), expected, "{base}^{exponent}");
        }
    }

    #[test]
    fn logarithm_and_exponential_undo_each_other() {
        for x in [-3.0, 0.1, 1.0, 20.0] {
            assert!((ln(exp(x)) - x).abs() < 1e-14, "{x}");
        }
        assert!(ln(-1.0).is_nan());
        assert_eq!(log10(1000.0), 3.0);
    }
}
