//! A root of one equation between two ends, by Brent's method (R. P. Brent, Algorithms for Minimization
//! without Derivatives, Prentice-Hall 1973, chapter 4): inverse quadratic or linear steps, halving where they
//! fail.

/// How many steps are taken at most; halving alone needs fewer than 64 inside any bracket that a double can
/// halve evenly, and the bound below adds what uneven brackets may cost.
const STEP_LIMIT: usize = 200;

/// A root with what it cost.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Root {
    /// The place.
    pub x: f64,
    /// What is left of the function there.
    pub residual: f64,
    /// Steps taken.
    pub iterations: usize,
    /// How many times the function was evaluated.
    pub evaluations: usize,
}

/// Why no root could be had.
#[derive(Debug, Clone, Copy, PartialEq)]
pub enum RootFailure {
    /// The function has the same sign at both ends.
    NotBracketed {
        /// The function at the first end.
        at_first: f64,
        /// The function at the second end.
        at_second: f64,
    },
    /// The function is no number here.
    NotFinite {
        /// The place.
        at: f64,
    },
    /// The step limit was reached.
    NotConverged {
        /// Best place so far.
        x: f64,
        /// What is left of the function there.
        residual: f64,
    },
}

/// Finds `x` between `a` and `b` with `f(x) = 0`, to within `tolerance` (absolute, and never finer than the
/// doubles allow). The evaluations come in one fixed order: `a`, `b`, then one for each step.
///
/// # Errors
/// [`RootFailure`] when the ends do not bracket a root, the function is not a number, or the steps run out.
pub fn find_root(mut f: impl FnMut(f64) -> f64, a: f64, b: f64, tolerance: f64) -> Result<Root, RootFailure> {
    let mut counted = Counted { evaluations: 0 };
    let (mut a, mut b) = (a, b);
    let mut fa = counted.value(&mut f, a)?;
    let mut fb = counted.value(&mut f, b)?;
    if fa != 0.0 && fb != 0.0 && (fa > 0.0) == (fb > 0.0) {
        return Err(RootFailure::NotBracketed { at_first: fa, at_second: fb });
    }
    let (mut c, mut fc) = (a, fa);
    let mut step = b - a;
    let mut last = step;
    for iterations in 0..STEP_LIMIT {
        if fc.abs() < fb.abs() {
            (a, b, c) = (b, c, b);
            (fa, fb, fc) = (fb, fc, fb);
        }
        let fine = 2.0 * f64::EPSILON * b.abs() + 0.5 * tolerance;
        let half = 0.5 * (c - b);
        if half.abs() <= fine || fb == 0.0 {
            return Ok(Root { x: b, residual: fb, iterations, evaluations: counted.evaluations });
        }
        (step, last) = match interpolated((a, fa), (b, fb), (c, fc)) {
            Some(try_step)
                if last.abs() >= fine
                    && fa.abs() > fb.abs()
                    && try_step.abs() < (0.75 * (2.0 * half)).abs()
                    && (try_step > 0.0) == (half > 0.0)
                    && try_step.abs() < 0.5 * last.abs() =>
            {
                (try_step, step)
            }
            _ => (half, half),
        };
        (a, fa) = (b, fb);
        b += if step.abs() > fine { step } else { fine.copysign(half) };
        fb = counted.value(&mut f, b)?;
        if (fb > 0.0) == (fc > 0.0) {
            (c, fc) = (a, fa);
            step = b - a;
            last = step;
        }
    }
    Err(RootFailure::NotConverged { x: b, residual: fb })
}

/// Finds the root of a rising function between `a` and `b` (`a < b`, taken as bracketing) by Newton's method
/// from `start`, halving wherever a step would leave the bracket. `f` gives the value and the slope. The
/// search ends with the first Newton step below 1e-9 of the place: as each squares the error of the one
/// before, it is exact to rounding.
///
/// # Errors
/// [`RootFailure`] when the function is not a number or the steps run out.
#[inline]
pub fn find_rising_root(
    mut f: impl FnMut(f64) -> (f64, f64),
    (mut a, mut b): (f64, f64),
    start: f64,
) -> Result<Root, RootFailure> {
    let mut x = if start > a && start < b { start } else { a + 0.5 * (b - a) };
    let mut residual = f64::NAN;
    for iterations in 1..=STEP_LIMIT {
        let (value, slope) = f(x);
        residual = value;
        if value.is_nan() {
            return Err(RootFailure::NotFinite { at: x });
        }
        if value > 0.0 {
            b = x
        } else {
            a = x
        }
        let newton = x - value / slope;
        let inside = newton >= a && newton <= b;
        let next = if inside { newton } else { a + 0.5 * (b - a) };
        let fine = if inside { 1e-9 } else { f64::EPSILON };
        if value == 0.0 || (next - x).abs() <= fine * x.abs() {
            return Ok(Root { x: next, residual, iterations, evaluations: iterations });
        }
        x = next;
    }
    Err(RootFailure::NotConverged { x, residual })
}

/// The step from `b` that inverse interpolation through the known points proposes.
fn interpolated((a, fa): (f64, f64), (b, fb): (f64, f64), (c, fc): (f64, f64)) -> Option<f64> {
    let s = fb / fa;
    let (p, q) = if a == c {
        ((c - b) * s, 1.0 - s)
    } else {
        let (q, r) = (fa / fc, fb / fc);
        (s * ((c - b) * q * (q - r) - (b - a) * (r - 1.0)), (q - 1.0) * (r - 1.0) * (s - 1.0))
    };
    let step = -(p / q);
    step.is_finite().then_some(step)
}

struct Counted {
    evaluations: usize,
}

impl Counted {
    fn value(&mut self, f: &mut impl FnMut(f64) -> f64, x: f64) -> Result<f64, RootFailure> {
        self.evaluations += 1;
        let value = f(x);
        if value.is_nan() { Err(RootFailure::NotFinite { at: x }) } else { Ok(value) }
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::numeric::math;

    #[test]
    fn roots_known_in_closed_form() {
        // x² = 2, e^x = 5 and x³ = x at 1; the exact roots stand beside them.
        type Case = (fn(f64) -> f64, f64, f64, f64);
        let cases: [Case; 4] = [
            (|x| x * x - 2.0, 0.0, 2.0, std::f64::consts::SQRT_2),
            (|x| math::exp(x) - 5.0, -10.0, 10.0, math::ln(5.0)),
            (|x| x * x * x - x, 0.5, 30.0, 1.0),
            (|x| math::ln(x) + 3.0, 1e-9, 1e9, math::exp(-3.0)),
        ];
        for (i, (f, a, b, exact)) in cases.into_iter().enumerate() {
            let root = find_root(f, a, b, 0.0).unwrap();
            assert!((root.x - exact).abs() <= 4.0 * f64::EPSILON * exact, "case {i}: {root:?}");
            assert!(root.evaluations <= 60, "case {i}: {root:?}");
            assert!(find_root(f, b, a, 0.0).unwrap().residual.abs() < 1e-12, "case {i} reversed");
        }
    }

    #[test]
    fn newton_agrees_with_the_closed_form() {
        // x² = 2 from both sides, and a curve with a kink at 1 whose root is 1.5: 3(x - 1) = 1.5.
        for start in [0.01, 1.9, 5.0] {
            let root = find_rising_root(|x| (x * x - 2.0, 2.0 * x), (0.0, 2.0), start).unwrap();
            assert!((root.x - std::f64::consts::SQRT_2).abs() <= 4.0 * f64::EPSILON, "{root:?}");
        }
        let kinked =
            |x: f64| if x < 1.0 { (0.1 * (x - 1.0) - 1.5, 0.1) } else { (3.0 * (x - 1.0) - 1.5, 3.0) };
        assert_eq!(find_rising_root(kinked, (0.0, 10.0), 0.5).unwrap().x, 1.5);
    }

    #[test]
    fn an_end_that_is_the_root_is_taken() {
        assert_eq!(find_root(|x| x, 0.0, 1.0, 0.0).unwrap().x, 0.0);
        assert_eq!(find_root(|x| x - 1.0, 0.0, 1.0, 0.0).unwrap().x, 1.0);
    }

    #[test]
    fn failures_say_why() {
        assert_eq!(
            find_root(|x| x * x + 1.0, 0.0, 2.0, 0.0),
            Err(RootFailure::NotBracketed { at_first: 1.0, at_second: 5.0 })
        );
        assert_eq!(find_root(|_| f64::NAN, 0.5, 2.0, 0.0), Err(RootFailure::NotFinite { at: 0.5 }));
    }
}
