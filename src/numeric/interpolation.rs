//! Interpolation of a table over strictly rising abscissae: straight lines, or a cubic that keeps every rise
//! and fall of the table (F. N. Fritsch, R. E. Carlson, SIAM J. Numer. Anal. 1980, 17, 238; slopes limited by
//! the circle of radius 3 given there). Outside the table the answer is `NaN`, never a guess.

use super::math;

/// What is drawn between the points.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum Shape {
    /// Straight lines.
    Linear,
    /// Monotone cubics.
    MonotoneCubic,
}

/// Why a table cannot be interpolated.
#[derive(Debug, Clone, Copy, PartialEq)]
pub enum InterpolantError {
    /// Fewer than two points.
    TooFewPoints,
    /// A point that does not lie to the right of the one before it.
    NotRising {
        /// Its place in the table.
        at: usize,
    },
    /// A point that is not a finite number.
    NotFinite {
        /// Its place in the table.
        at: usize,
    },
}

/// The curve between two points: `y = c0 + c1 s + c2 s² + c3 s³` with `s = x - left`, and the integrals of
/// `y` and of `y/x` from the start of the table to `left`.
#[derive(Debug, Clone, Copy, PartialEq)]
struct Piece {
    left: f64,
    coefficients: [f64; 4],
    area: f64,
    area_over_x: f64,
}

/// An interpolated table.
#[derive(Debug, Clone, PartialEq)]
pub struct Interpolant {
    pieces: Box<[Piece]>,
    low: f64,
    high: f64,
}

impl Interpolant {
    /// How far outside its ends, relative to the end, an argument is still taken as the end itself: what
    /// rounding may do to it.
    pub const EDGE: f64 = 1e-9;

    /// Draws the curve through `points`, each `(x, y)`.
    ///
    /// # Errors
    /// [`InterpolantError`] for fewer than two points, points out of order, and points that are not finite.
    pub fn new(points: &[(f64, f64)], shape: Shape) -> Result<Interpolant, InterpolantError> {
        check_points(points)?;
        let (Some(first), Some(last)) = (points.first(), points.last()) else {
            return Err(InterpolantError::TooFewPoints);
        };
        let slopes = match shape {
            Shape::Linear => Vec::new(),
            Shape::MonotoneCubic => monotone_slopes(points),
        };
        let steps = points.iter().zip(points.iter().skip(1)).enumerate();
        let cubics = steps.map(|(i, (&(x0, y0), &(x1, y1)))| {
            let width = x1 - x0;
            let secant = (y1 - y0) / width;
            match (slopes.get(i), slopes.get(i + 1)) {
                (Some(&m0), Some(&m1)) => (x0, hermite(y0, m0, m1, secant, width)),
                _ => (x0, [y0, secant, 0.0, 0.0]),
            }
        });
        Ok(Interpolant::from_cubics(cubics, (first.0, last.0)))
    }

    /// Cubics with the place where each begins, and the integrals up to there.
    fn from_cubics(
        cubics: impl Iterator<Item = (f64, [f64; 4])> + Clone,
        (low, high): (f64, f64),
    ) -> Interpolant {
        let rights = cubics.clone().skip(1).map(|(left, _)| left).chain(std::iter::once(high));
        let (mut area, mut area_over_x) = (0.0, 0.0);
        let pieces = cubics.zip(rights).map(|((left, coefficients), right)| {
            let piece = Piece { left, coefficients, area, area_over_x };
            area = piece.integral(right - left);
            area_over_x = piece.integral_over_x(right - left);
            piece
        });
        Interpolant { pieces: pieces.collect(), low, high }
    }

    /// The curve's slope as a curve of its own.
    #[must_use]
    pub fn slope(&self) -> Interpolant {
        let cubics = self.pieces.iter().map(|piece| {
            let [_, c1, c2, c3] = piece.coefficients;
            (piece.left, [c1, 2.0 * c2, 3.0 * c3, 0.0])
        });
        Interpolant::from_cubics(cubics, self.span())
    }

    /// The slope of `y · (x - origin)` as a curve of its own: what the mean of a quantity above `origin` says
    /// about the quantity itself.
    #[must_use]
    pub fn slope_above(&self, origin: f64) -> Interpolant {
        let cubics = self.pieces.iter().map(|piece| {
            let [c0, c1, c2, c3] = piece.coefficients;
            let d = piece.left - origin;
            (piece.left, [c0 + c1 * d, 2.0 * (c1 + c2 * d), 3.0 * (c2 + c3 * d), 4.0 * c3])
        });
        Interpolant::from_cubics(cubics, self.span())
    }

    /// The first and the last abscissa.
    pub fn span(&self) -> (f64, f64) {
        (self.low, self.high)
    }

    /// The curve at `x`.
    pub fn value(&self, x: f64) -> f64 {
        self.with(x, |piece, s| piece.value(s))
    }

    /// Its slope at `x`; at a point of the table the slope to the right, at the last one to the left.
    pub fn derivative(&self, x: f64) -> f64 {
        self.with(x, |piece, s| piece.derivative(s))
    }

    /// The integral of the curve from the start of the table to `x`, in closed form.
    pub fn integral(&self, x: f64) -> f64 {
        self.with(x, |piece, s| piece.integral(s))
    }

    /// The integral of the curve over `x` from the start of the table to `x`, in closed form; the table must
    /// lie above zero.
    pub fn integral_over_x(&self, x: f64) -> f64 {
        self.with(x, |piece, s| piece.integral_over_x(s))
    }

    fn with(&self, x: f64, use_piece: impl Fn(&Piece, f64) -> f64) -> f64 {
        let x = self.snapped(x);
        let at = self.pieces.partition_point(|piece| piece.left <= x).saturating_sub(1);
        self.pieces.get(at).map_or(f64::NAN, |piece| use_piece(piece, x - piece.left))
    }

    /// `x`, moved onto an end that it misses by rounding alone; `NaN` outside.
    fn snapped(&self, x: f64) -> f64 {
        if x >= self.low && x <= self.high {
            x
        } else if x < self.low && x >= self.low - Self::EDGE * self.low.abs() {
            self.low
        } else if x > self.high && x <= self.high + Self::EDGE * self.high.abs() {
            self.high
        } else {
            f64::NAN
        }
    }
}

impl Piece {
    fn value(&self, s: f64) -> f64 {
        let [c0, c1, c2, c3] = self.coefficients;
        c0 + s * (c1 + s * (c2 + s * c3))
    }

    fn derivative(&self, s: f64) -> f64 {
        let [_, c1, c2, c3] = self.coefficients;
        c1 + s * (2.0 * c2 + s * 3.0 * c3)
    }

    fn integral(&self, s: f64) -> f64 {
        let [c0, c1, c2, c3] = self.coefficients;
        self.area + s * (c0 + s * (c1 / 2.0 + s * (c2 / 3.0 + s * c3 / 4.0)))
    }

    fn integral_over_x(&self, s: f64) -> f64 {
        let moments = moments_over_x(s, self.left);
        let sum: f64 = self.coefficients.iter().zip(moments).map(|(c, j)| c * j).sum();
        self.area_over_x + sum
    }
}

/// The integrals of `u^k/(u + x)` over `u` from 0 to `s`, for `k` from 0 to 3.
///
/// `J₀ = ln(1 + s/x)` and `J_k = s^k/k - x J_{k-1}`; upwards this loses digits where `s` is small against
/// `x`, so there `J₃` is summed as a power series and the recurrence is run downwards, which is stable.
fn moments_over_x(s: f64, x: f64) -> [f64; 4] {
    let z = s / x;
    let (s2, s3) = (s * s / 2.0, s * s * s / 3.0);
    if z > 0.25 {
        let j0 = math::ln_1p(z);
        let j1 = s - x * j0;
        let j2 = s2 - x * j1;
        return [j0, j1, j2, s3 - x * j2];
    }
    let mut series = 0.0;
    for k in (4..32_u32).rev() {
        series = 1.0 / f64::from(k) - z * series;
    }
    let j3 = s * s * s * z * series;
    let j2 = (s3 - j3) / x;
    let j1 = (s2 - j2) / x;
    [(s - j1) / x, j1, j2, j3]
}

fn check_points(points: &[(f64, f64)]) -> Result<(), InterpolantError> {
    if points.len() < 2 {
        return Err(InterpolantError::TooFewPoints);
    }
    let mut before = f64::NEG_INFINITY;
    for (at, &(x, y)) in points.iter().enumerate() {
        if !x.is_finite() || !y.is_finite() {
            return Err(InterpolantError::NotFinite { at });
        }
        if x <= before {
            return Err(InterpolantError::NotRising { at });
        }
        before = x;
    }
    Ok(())
}

/// Coefficients of the cubic with end slopes `m0`, `m1`.
fn hermite(y0: f64, m0: f64, m1: f64, secant: f64, width: f64) -> [f64; 4] {
    [y0, m0, (3.0 * secant - 2.0 * m0 - m1) / width, (m0 + m1 - 2.0 * secant) / (width * width)]
}

/// Slopes at the points: three-point estimates, then limited.
fn monotone_slopes(points: &[(f64, f64)]) -> Vec<f64> {
    let steps: Vec<(f64, f64)> = points
        .iter()
        .zip(points.iter().skip(1))
        .map(|(&(x0, y0), &(x1, y1))| (x1 - x0, (y1 - y0) / (x1 - x0)))
        .collect();
    let mut slopes = initial_slopes(&steps);
    for (i, &(_, secant)) in steps.iter().enumerate() {
        if let Some([m0, m1]) = slopes.get_mut(i..i + 2).and_then(|pair| <&mut [f64; 2]>::try_from(pair).ok())
        {
            (*m0, *m1) = limited(*m0, *m1, secant);
        }
    }
    slopes
}

fn initial_slopes(steps: &[(f64, f64)]) -> Vec<f64> {
    let inner = steps
        .iter()
        .zip(steps.iter().skip(1))
        .map(|(&(h0, d0), &(h1, d1))| if d0 * d1 <= 0.0 { 0.0 } else { (h1 * d0 + h0 * d1) / (h0 + h1) });
    let first = end_slope(steps.first(), steps.get(1));
    let last = end_slope(steps.last(), steps.len().checked_sub(2).and_then(|i| steps.get(i)));
    std::iter::once(first).chain(inner).chain(std::iter::once(last)).collect()
}

/// One-sided three-point slope at an end, next to the step `near`; zero where it would turn against the
/// table.
fn end_slope(near: Option<&(f64, f64)>, next: Option<&(f64, f64)>) -> f64 {
    match (near, next) {
        (Some(&(h0, d0)), Some(&(h1, d1))) => {
            let slope = ((2.0 * h0 + h1) * d0 - h0 * d1) / (h0 + h1);
            if slope * d0 <= 0.0 { 0.0 } else { slope }
        }
        (Some(&(_, d0)), None) => d0,
        _ => 0.0,
    }
}

fn limited(m0: f64, m1: f64, secant: f64) -> (f64, f64) {
    if secant == 0.0 {
        return (0.0, 0.0);
    }
    let (alpha, beta) = (m0 / secant, m1 / secant);
    let radius = math::sqrt(alpha * alpha + beta * beta);
    if radius <= 3.0 { (m0, m1) } else { (3.0 * alpha / radius * secant, 3.0 * beta / radius * secant) }
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::numeric::{Tolerance, integrate};
    use proptest::prelude::*;

    const TABLE: [(f64, f64); 5] =
        [(300.0, 25.1), (400.0, 26.4), (450.0, 26.4), (700.0, 31.0), (701.0, 20.0)];

    #[test]
    fn passes_through_its_points_and_nowhere_else() {
        for shape in [Shape::Linear, Shape::MonotoneCubic] {
            let curve = Interpolant::new(&TABLE, shape).unwrap();
            for (x, y) in TABLE {
                assert!((curve.value(x) - y).abs() < 1e-12, "{shape:?} at {x}");
            }
            assert!(curve.value(299.0).is_nan() && curve.value(702.0).is_nan());
            assert_eq!(curve.value(300.0 - 1e-8), curve.value(300.0), "rounding at an end");
        }
    }

    #[test]
    fn a_straight_line_between_two_points_has_known_integrals() {
        // y = 2 + 3x on [1, 4]: integral 6 + 22.5, of y/x: 2 ln 4 + 9.
        let line = [(1.0, 5.0), (4.0, 14.0)];
        for shape in [Shape::Linear, Shape::MonotoneCubic] {
            let curve = Interpolant::new(&line, shape).unwrap();
            assert!((curve.integral(4.0) - 28.5).abs() < 1e-13);
            assert!((curve.integral_over_x(4.0) - (2.0 * math::ln(4.0) + 9.0)).abs() < 1e-13);
            assert!((curve.derivative(2.0) - 3.0).abs() < 1e-14);
        }
    }

    #[test]
    fn closed_integrals_agree_with_quadrature() {
        let fine = Tolerance { absolute: 0.0, relative: 1e-13 };
        for shape in [Shape::Linear, Shape::MonotoneCubic] {
            let curve = Interpolant::new(&TABLE, shape).unwrap();
            for (a, b) in [(300.0, 355.0), (410.0, 440.0), (450.0, 699.0), (700.0, 701.0)] {
                let plain = integrate(|x| curve.value(x), a, b, fine).unwrap().value;
                let over = integrate(|x| curve.value(x) / x, a, b, fine).unwrap().value;
                let (i, j) = (
                    curve.integral(b) - curve.integral(a),
                    curve.integral_over_x(b) - curve.integral_over_x(a),
                );
                assert!((i - plain).abs() < 1e-12 * curve.integral(701.0), "{shape:?} {a}..{b}: {i} {plain}");
                assert!(
                    (j - over).abs() < 1e-12 * curve.integral_over_x(701.0),
                    "{shape:?} {a}..{b}: {j} {over}"
                );
            }
        }
    }

    #[test]
    fn tables_that_cannot_be_drawn_are_refused() {
        let refused = |points: &[(f64, f64)]| Interpolant::new(points, Shape::Linear).unwrap_err();
        assert_eq!(refused(&[(1.0, 1.0)]), InterpolantError::TooFewPoints);
        assert_eq!(refused(&[(1.0, 1.0), (1.0, 2.0)]), InterpolantError::NotRising { at: 1 });
        assert_eq!(refused(&[(1.0, 1.0), (2.0, f64::NAN)]), InterpolantError::NotFinite { at: 1 });
    }

    proptest! {
        #[test]
        fn the_cubic_rises_wherever_the_table_rises(steps in proptest::collection::vec((0.1_f64..50.0, 0.0_f64..9.0), 2..9)) {
            let (mut x, mut y) = (300.0, 20.0);
            let mut points = vec![(x, y)];
            for (dx, dy) in steps {
                x += dx;
                y += dy;
                points.push((x, y));
            }
            let curve = Interpolant::new(&points, Shape::MonotoneCubic).unwrap();
            let mut before = curve.value(300.0);
            for i in 1..=200 {
                let now = curve.value(300.0 + (x - 300.0) * f64::from(i) / 200.0);
                prop_assert!(now >= before - 1e-12 * now.abs());
                before = now;
            }
        }
    }
}
