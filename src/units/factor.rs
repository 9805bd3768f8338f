//! A conversion factor as its definition gives it, rounded only when its number is asked for.

/// `numerator / denominator * 10^ten`. Definitions are decimal numbers and ratios of them, so both are whole numbers,
/// which products keep exact up to 2^53.
#[derive(Debug, Clone, Copy, PartialEq)]
pub(crate) struct Factor {
    numerator: f64,
    denominator: f64,
    ten: i32,
}

impl Factor {
    /// The factor of a coherent unit.
    pub(crate) const ONE: Factor = Factor::decimal(1.0, 0);

    /// `digits * 10^ten`, for a whole number of digits: the pound's 0.45359237 kg is `decimal(45_359_237.0, -8)`.
    pub(crate) const fn decimal(digits: f64, ten: i32) -> Factor {
        Factor { numerator: digits, denominator: 1.0, ten }
    }

    /// The product.
    pub(crate) const fn times(self, other: Factor) -> Factor {
        Factor {
            numerator: self.numerator * other.numerator,
            denominator: self.denominator * other.denominator,
            ten: self.ten + other.ten,
        }
    }

    /// The quotient.
    pub(crate) const fn over(self, other: Factor) -> Factor {
        self.times(other.inverse())
    }

    /// This factor `exponent` times over; a negative exponent divides.
    pub(crate) const fn power(self, exponent: i32) -> Factor {
        let base = if exponent < 0 { self.inverse() } else { self };
        let mut result = Factor::ONE;
        let mut left = exponent.unsigned_abs();
        while left > 0 {
            result = result.times(base);
            left -= 1;
        }
        result
    }

    /// The number, rounded once where the whole numbers and the power of ten (up to 10^22) are exact. It is infinite,
    /// zero or no number where the factor is out of range.
    pub(crate) fn value(self) -> f64 {
        let scale = power_of_ten(self.ten.unsigned_abs());
        if self.ten < 0 {
            self.numerator / (self.denominator * scale)
        } else {
            self.numerator * scale / self.denominator
        }
    }

    const fn inverse(self) -> Factor {
        Factor { numerator: self.denominator, denominator: self.numerator, ten: -self.ten }
    }
}

fn power_of_ten(exponent: u32) -> f64 {
    (0..exponent).fold(1.0, |power, _| power * 10.0)
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn decimals_are_rounded_once() {
        // 0.01 * 0.01 * 0.01 in floating point is not 1e-6; a cubic centimetre is.
        assert_eq!(Factor::decimal(1.0, -2).power(3).value(), 1e-6);
        assert_eq!(Factor::decimal(45_359_237.0, -8).value(), 0.45359237);
        assert_eq!(Factor::decimal(5.0, 0).over(Factor::decimal(9.0, 0)).value(), 5.0 / 9.0);
        assert_eq!(Factor::decimal(1.0, 3).over(Factor::decimal(1.0, -2).power(2)).value(), 1e7);
    }

    #[test]
    fn negative_powers_divide() {
        assert_eq!(Factor::decimal(60.0, 0).power(-2).value(), 1.0 / 3600.0);
        assert_eq!(Factor::decimal(60.0, 0).power(0).value(), 1.0);
    }

    #[test]
    fn an_overflow_shows_in_the_value() {
        assert!(!Factor::decimal(1.0, 30).power(99).value().is_finite());
    }
}
