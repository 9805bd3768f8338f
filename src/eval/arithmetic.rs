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
    let (x, y, out) = frame.two_to(a, b, to);
    let mut finite = true;
    for lane in 0..N {
        let value = work(x[lane], y[lane]);
        finite &= value.is_finite();
        out[lane] = value;
    }
    if !finite {
        refuse(frame, at, [a, b], to, fault);
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
    binary(frame, at, a, a, to, |x, _| work(x), |x, _| fault(x));
}

/// The lanes in which numbers gave no number: each is a fault and holds NaN.
#[cold]
#[inline(never)]
fn refuse<const N: usize>(
    frame: &mut Frame<N>,
    at: usize,
    [a, b]: [Slot; 2],
    to: Slot,
    fault: impl Fn(f64, f64) -> Fault,
) {
    for lane in 0..N {
        let (x, y, out) = frame.two_to(a, b, to);
        if !out[lane].is_finite() && x[lane].is_finite() && y[lane].is_finite() {
            out[lane] = f64::NAN;
            let fault = fault(x[lane], y[lane]);
            frame.fail(at, lane, fault);
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
    let (value, given, out) = frame.two_to(value, given, to);
    for lane in 0..N {
        out[lane] = if given[lane].is_nan() { f64::NAN } else { value[lane] };
    }
}

#[inline]
pub(super) fn guard<const N: usize>(
    frame: &mut Frame<N>,
    at: usize,
    check: Check,
    [a, b, value]: [Slot; 3],
    to: Slot,
) {
    let slots = [a, b, value];
    let all = match check {
        Check::PositiveAmount | Check::PositivePressure | Check::PositiveTime => {
            pass(frame, slots, to, |a, b| holds(Check::PositiveAmount, a, b))
        }
        Check::Share | Check::Efficiency => pass(frame, slots, to, |a, b| holds(Check::Share, a, b)),
        Check::Heating => pass(frame, slots, to, |a, b| holds(Check::Heating, a, b)),
        check => pass(frame, slots, to, |a, b| holds(check, a, b)),
    };
    if !all {
        refuse_unguarded(frame, at, check, [a, b], to);
    }
}

/// Lets the value pass in the lanes that are good; whether all are.
#[inline]
fn pass<const N: usize>(
    frame: &mut Frame<N>,
    [a, b, value]: [Slot; 3],
    to: Slot,
    good: impl Fn(f64, f64) -> bool,
) -> bool {
    let (known, open) = frame.slots.split_at_mut(to.0 as usize);
    let (x, y, value) = (&known[a.0 as usize], &known[b.0 as usize], &known[value.0 as usize]);
    let out = &mut open[0];
    let mut all = true;
    for lane in 0..N {
        let good = good(x[lane], y[lane]);
        all &= good;
        out[lane] = if good { value[lane] } else { f64::NAN };
    }
    all
}

/// The lanes in which a check on numbers does not hold.
#[cold]
#[inline(never)]
fn refuse_unguarded<const N: usize>(
    frame: &mut Frame<N>,
    at: usize,
    check: Check,
    [a, b]: [Slot; 2],
    to: Slot,
) {
    for lane in 0..N {
        let (x, y, _) = frame.two_to(a, b, to);
        let (a, b) = (x[lane], y[lane]);
        if !(a.is_nan() || b.is_nan() || holds(check, a, b)) {
            frame.fail(at, lane, Fault::Check { check, a, b });
        }
    }
}

/// Whether a check holds; of NaN it does not.
#[inline]
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
