//! Adaptive quadrature by the Gauss-Kronrod pair of 7 and 15 points.
//!
//! Nodes and weights: Piessens, de Doncker-Kapenga, Überhuber, Kahaner, QUADPACK, Springer 1983, routine
//! QK15; the error estimate is the one given there. The tests check that the rule is exact to degree 22.

/// Nodes of the 15-point rule on one half of `[-1, 1]`, from the outside; odd places belong to the 7-point
/// rule.
const NODES: [f64; 7] = [
    0.991_455_371_120_812_6,
    0.949_107_912_342_758_5,
    0.864_864_423_359_769_1,
    0.741_531_185_599_394_4,
    0.586_087_235_467_691_1,
    0.405_845_151_377_397_2,
    0.207_784_955_007_898_47,
];
/// Kronrod weights of `NODES`.
const KRONROD: [f64; 7] = [
    0.022_935_322_010_529_224,
    0.063_092_092_629_978_55,
    0.104_790_010_322_250_18,
    0.140_653_259_715_525_92,
    0.169_004_726_639_267_9,
    0.190_350_578_064_785_4,
    0.204_432_940_075_298_9,
];
const KRONROD_CENTRE: f64 = 0.209_482_141_084_727_82;
/// Gauss weights of `NODES`, zero where a node is Kronrod's alone.
const GAUSS: [f64; 7] =
    [0.0, 0.129_484_966_168_869_7, 0.0, 0.279_705_391_489_276_64, 0.0, 0.381_830_050_505_118_9, 0.0];
const GAUSS_CENTRE: f64 = 0.417_959_183_673_469_4;

/// How deep an interval is halved at most.
const DEPTH_LIMIT: u32 = 40;
/// How many times the function is evaluated at most.
const EVALUATION_LIMIT: usize = 100_000;

/// What counts as good enough: either bound suffices.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Tolerance {
    /// Allowed absolute error.
    pub absolute: f64,
    /// Allowed error relative to the integral.
    pub relative: f64,
}

/// An integral with its estimated error.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Integral {
    /// The value.
    pub value: f64,
    /// Estimated absolute error, never negative.
    pub error: f64,
    /// How many times the function was evaluated.
    pub evaluations: usize,
}

/// Why an integral could not be had.
#[derive(Debug, Clone, Copy, PartialEq)]
pub enum QuadratureFailure {
    /// The function is not finite somewhere near `at`.
    NotFinite {
        /// Middle of the interval where it happened.
        at: f64,
    },
    /// The limit of depth or of evaluations was reached; the best value so far is given.
    NotConverged(Integral),
}

/// One interval's answer, with the bound below which its error is nothing but rounding.
struct Panel {
    value: f64,
    error: f64,
    rounding: f64,
}

/// Integrates `f` from `a` to `b` (either order). Intervals are halved until their share of the tolerance is
/// met, the left half always first.
///
/// # Errors
/// [`QuadratureFailure`] when the function is not finite, or the limits are reached first.
pub fn integrate(
    f: impl Fn(f64) -> f64,
    a: f64,
    b: f64,
    tolerance: Tolerance,
) -> Result<Integral, QuadratureFailure> {
    if a == b {
        return Ok(Integral { value: 0.0, error: 0.0, evaluations: 0 });
    }
    let mut search = Search { f, evaluations: 0, exhausted: false, floor: 0.0 };
    let whole = search.panel(a, b)?;
    let allowed = tolerance.absolute.max(tolerance.relative * whole.value.abs()).max(whole.rounding);
    search.floor = allowed / 1024.0;
    let (value, error) = search.refine(&whole, (a, b), allowed, 0)?;
    let integral = Integral { value, error, evaluations: search.evaluations };
    if search.exhausted || error > 2.0 * allowed {
        Err(QuadratureFailure::NotConverged(integral))
    } else {
        Ok(integral)
    }
}

struct Search<F> {
    f: F,
    evaluations: usize,
    exhausted: bool,
    /// What a single panel may always be wrong by, however narrow: a kink touches few panels.
    floor: f64,
}

impl<F: Fn(f64) -> f64> Search<F> {
    fn refine(
        &mut self,
        panel: &Panel,
        (a, b): (f64, f64),
        allowed: f64,
        depth: u32,
    ) -> Result<(f64, f64), QuadratureFailure> {
        if panel.error <= allowed.max(self.floor).max(panel.rounding) {
            return Ok((panel.value, panel.error));
        }
        if depth >= DEPTH_LIMIT || self.evaluations >= EVALUATION_LIMIT {
            self.exhausted = true;
            return Ok((panel.value, panel.error));
        }
        let middle = a + 0.5 * (b - a);
        let left = self.panel(a, middle)?;
        let right = self.panel(middle, b)?;
        let (left, left_error) = self.refine(&left, (a, middle), 0.5 * allowed, depth + 1)?;
        let (right, right_error) = self.refine(&right, (middle, b), 0.5 * allowed, depth + 1)?;
        Ok((left + right, left_error + right_error))
    }

    fn panel(&mut self, a: f64, b: f64) -> Result<Panel, QuadratureFailure> {
        let half = 0.5 * (b - a);
        let centre = a + half;
        let middle = (self.f)(centre);
        let mut kronrod = KRONROD_CENTRE * middle;
        let mut gauss = GAUSS_CENTRE * middle;
        let mut size = KRONROD_CENTRE * middle.abs();
        let mut pairs = [(0.0, 0.0); 7];
        for (((node, weight), gauss_weight), pair) in NODES.iter().zip(KRONROD).zip(GAUSS).zip(&mut pairs) {
            let (low, high) = ((self.f)(centre - half * node), (self.f)(centre + half * node));
            kronrod += weight * (low + high);
            gauss += gauss_weight * (low + high);
            size += weight * (low.abs() + high.abs());
            *pair = (low, high);
        }
        self.evaluations += 15;
        if !kronrod.is_finite() {
            return Err(QuadratureFailure::NotFinite { at: centre });
        }
        let mean = 0.5 * kronrod;
        let mut spread = KRONROD_CENTRE * (middle - mean).abs();
        for (weight, (low, high)) in KRONROD.iter().zip(pairs) {
            spread += weight * ((low - mean).abs() + (high - mean).abs());
        }
        let raw = ((kronrod - gauss) * half).abs();
        let spread = spread * half.abs();
        Ok(Panel {
            value: kronrod * half,
            error: sharpened(raw, spread),
            rounding: 50.0 * f64::EPSILON * size * half.abs(),
        })
    }
}

/// The difference of the two rules overstates the error of the better one by far; QUADPACK's correction.
fn sharpened(raw: f64, spread: f64) -> f64 {
    if spread == 0.0 || raw == 0.0 {
        return raw;
    }
    let ratio = 200.0 * raw / spread;
    spread * (ratio * ratio.sqrt()).min(1.0)
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::numeric::math;

    const FINE: Tolerance = Tolerance { absolute: 0.0, relative: 1e-13 };

    #[test]
    fn fifteen_points_are_exact_for_every_even_degree_to_22() {
        // The integral of x^n over [-1, 1] is 2/(n + 1) for even n; a 15-point Kronrod rule is exact to 3·7 +
        // 1.
        for n in (0..=22).step_by(2) {
            let mut search = Search { f: |x| math::powi(x, n), evaluations: 0, exhausted: false, floor: 0.0 };
            let panel = search.panel(-1.0, 1.0).unwrap();
            let exact = 2.0 / f64::from(n + 1);
            assert!((panel.value - exact).abs() < 4e-16 * 8.0, "degree {n}: {} for {exact}", panel.value);
        }
    }

    #[test]
    fn a_kink_is_found_and_its_error_owned() {
        // The integral of |x - 1/3| over [0, 1] is (1/3)²/2 + (2/3)²/2 = 5/18.
        let kink = integrate(|x| (x - 1.0 / 3.0).abs(), 0.0, 1.0, FINE).unwrap();
        assert!((kink.value - 5.0 / 18.0).abs() <= kink.error.max(1e-14), "{kink:?}");
    }

    #[test]
    fn reversed_bounds_negate_and_equal_bounds_vanish() {
        let forth = integrate(math::exp, 0.0, 1.0, FINE).unwrap();
        let back = integrate(math::exp, 1.0, 0.0, FINE).unwrap();
        assert_eq!(forth.value, -back.value);
        assert_eq!(integrate(math::exp, 2.0, 2.0, FINE).unwrap().value, 0.0);
    }

    #[test]
    fn a_pole_is_a_failure_not_a_number() {
        assert!(integrate(|x| 1.0 / x, -1.0, 1.0, FINE).is_err());
        assert!(matches!(integrate(|_| f64::NAN, 0.0, 1.0, FINE), Err(QuadratureFailure::NotFinite { .. })));
    }
}
