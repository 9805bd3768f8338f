//! Arithmetic over lanes. An operation on numbers that gives no number is a fault; NaN goes through in silence.

use super::frame::{Fault, Frame};
use crate::numeric::math;
use crate::plan::{Check, Slot};

#[inline]
pub(super) fn binary<const N: usize>(
    frame: &mut Frame<N>,
    at: usize,
    a: Slot,
    b: Slot,
    to: Slot,
    work: impl Fn(f64, f64) -> f64,
    fault: impl Fn(f64, f64) -> Fault,
) {
    let (x, y) = (frame.slots[a.0 as usize], frame.slots[b.0 as usize]);
    let mut out = [0.0; N];
    let mut finite = true;
    for lane in 0..N {
        out[lane] = work(x[lane], y[lane]);
        finite &= out[lane].is_finite();
    }
    frame.slots[to.0 as usize] = out;
    if !finite {
        for lane in 0..N {
            if !out[lane].is_finite() && x[lane].is_finite() && y[lane].is_finite() {
                frame.slots[to.0 as usize][lane] = f64::NAN;
                frame.fail(at, lane, fault(x[lane], y[lane]));
            }
        }
    }
}

#[inline]
pub(super) fn unary<const N: usize>(
    frame: &mut Frame<N>,
    at: usize,
    a: Slot,
    to: Slot,
    work: impl Fn(f64) -> f64,
    fault: impl Fn(f64) -> Fault,
) {
    let x = frame.slots[a.0 as usize];
    for (lane, x) in x.into_iter().enumerate() {
        let out = work(x);
        frame.slots[to.0 as usize][lane] = out;
        if !out.is_finite() && x.is_finite() {
            frame.slots[to.0 as usize][lane] = f64::NAN;
            frame.fail(at, lane, fault(x));
        }
    }
}

/// A quotient; by zero it is no number.
#[inline]
pub(super) fn quotient(a: f64, b: f64) -> f64 {
    a / b
}

pub(super) fn quotient_fault(a: f64, b: f64) -> Fault {
    if b == 0.0 { Fault::DivisionByZero { numerator: a } } else { Fault::Overflow }
}

/// The lesser of two; NaN where either is.
pub(super) fn lesser(a: f64, b: f64) -> f64 {
    if a.is_nan() || a < b { a } else { b }
}

/// The greater of two; NaN where either is.
pub(super) fn greater(a: f64, b: f64) -> f64 {
    if a.is_nan() || a > b { a } else { b }
}

pub(super) fn power(a: f64, b: f64) -> f64 {
    math::pow(a, b)
}

pub(super) fn power_fault(a: f64, b: f64) -> Fault {
    match (a == 0.0 && b < 0.0, a < 0.0) {
        (true, _) => Fault::DivisionByZero { numerator: 1.0 },
        (false, true) => Fault::Root { of: a },
        (false, false) => Fault::Overflow,
    }
}

pub(super) fn power_integer<const N: usize>(
    frame: &mut Frame<N>,
    at: usize,
    a: Slot,
    exponent: i32,
    to: Slot,
) {
    let fault = |x: f64| {
        if x == 0.0 && exponent < 0 { Fault::DivisionByZero { numerator: 1.0 } } else { Fault::Overflow }
    };
    unary(frame, at, a, to, |x| math::powi(x, exponent), fault);
}

pub(super) fn ln(a: f64) -> f64 {
    if a > 0.0 { math::ln(a) } else { f64::NAN }
}

pub(super) fn log10(a: f64) -> f64 {
    if a > 0.0 { math::log10(a) } else { f64::NAN }
}

/// The logarithmic mean of two numbers of one sign; of equal numbers that number.
pub(super) fn log_mean(a: f64, b: f64) -> f64 {
    let ratio = a / b;
    if a == b && a != 0.0 {
        a
    } else if (0.5..=2.0).contains(&ratio) {
        // near one another the difference is exact, and the logarithm of the rounded ratio is not
        (a - b) / math::ln_1p((a - b) / b)
    } else if ratio > 0.0 {
        (a - b) / math::ln(ratio)
    } else {
        f64::NAN
    }
}

/// A value that goes on where another is known.
pub(super) fn known<const N: usize>(frame: &mut Frame<N>, value: Slot, given: Slot, to: Slot) {
    let (value, given) = (frame.get(value), frame.get(given));
    frame.slots[to.0 as usize] =
        std::array::from_fn(|lane| if given[lane].is_nan() { f64::NAN } else { value[lane] });
}

pub(super) fn guard<const N: usize>(
    frame: &mut Frame<N>,
    at: usize,
    check: Check,
    read: [Slot; 3],
    to: Slot,
) {
    let [a, b, value] = read.map(|slot| frame.slots[slot.0 as usize]);
    for lane in 0..N {
        let (x, y) = (a[lane], b[lane]);
        let silent = x.is_nan() || y.is_nan();
        let holds = silent || holds(check, x, y);
        frame.slots[to.0 as usize][lane] = if holds && !silent { value[lane] } else { f64::NAN };
        if !holds {
            frame.fail(at, lane, Fault::Check { check, a: x, b: y });
        }
    }
}

fn holds(check: Check, a: f64, b: f64) -> bool {
    let near = |tolerance: f64| (a - b).abs() <= tolerance * greater(a.abs(), b.abs());
    match check {
        Check::PositiveAmount | Check::PositivePressure | Check::PositiveTime => a > 0.0,
        Check::Share | Check::Efficiency => a > 0.0 && a <= 1.0,
        Check::SamePressure | Check::AgreedPressure | Check::SameVolume => near(1e-6),
        Check::NoRise => b <= a * (1.0 + 1e-6),
        Check::SameTemperature => (a - b).abs() <= 1e-6,
        Check::Conserved => near(1e-5),
        Check::Heating => a >= 0.0,
    }
}
