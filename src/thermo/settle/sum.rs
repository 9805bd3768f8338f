//! The total of several parts, and the temperature at which it meets a target.

use super::part::{Part, SettleError, Settled, Unreachable};
use crate::numeric::find_rising_root;
use crate::thermo::curve::{Measure, Track};
use crate::thermo::si::typed;

/// By how much of the total the target may lie outside the reach of the data, as rounding brings about.
const ROUNDING: f64 = 1e-12;

/// The total of a measure over parts at one temperature.
pub(super) struct Sum<'a> {
    pub(super) parts: &'a [Part<'a>],
    pub(super) measure: Measure,
    pub(super) pressure: f64,
}

/// The temperatures that all parts share, with the totals at both ends.
struct Window {
    lo: f64,
    hi: f64,
    at_lo: f64,
    at_hi: f64,
    boiling: bool,
}

impl<'a> Sum<'a> {
    pub(super) fn tracks(&self) -> impl Iterator<Item = (usize, Option<&'a Track>)> + use<'a> {
        self.parts.iter().map(|part| part.curve.track(part.pin)).enumerate()
    }

    /// The total at `t`, on plateaus at their lower or their `upper` end.
    #[inline]
    pub(super) fn total(&self, t: f64, upper: bool) -> f64 {
        self.over_parts(|part, track| part.curve.measure(track, self.measure, t, upper))
    }

    #[inline]
    fn total_and_slope(&self, t: f64) -> (f64, f64) {
        let (mut total, mut slope) = (0.0, 0.0);
        for part in self.parts {
            let track = part.curve.track(part.pin);
            let (value, rise) = track
                .map_or((f64::NAN, f64::NAN), |track| part.curve.measure_and_slope(track, self.measure, t));
            total += part.mass.value * value;
            slope += part.mass.value * rise;
        }
        (total, slope)
    }

    #[inline]
    fn over_parts(&self, of: impl Fn(&Part<'_>, &Track) -> f64) -> f64 {
        let value = |part: &Part<'_>| {
            part.curve.track(part.pin).map_or(f64::NAN, |track| part.mass.value * of(part, track))
        };
        self.parts.iter().map(value).sum()
    }

    pub(super) fn settle(&self, target: f64) -> Result<Settled, SettleError> {
        self.check()?;
        let window = self.window()?;
        let plain = |t: f64| Settled { temperature: typed(t), upper_share: None };
        if !(target.is_finite() && window.at_lo.is_finite() && window.at_hi.is_finite()) {
            return Err(SettleError::NotFinite);
        }
        let slack = ROUNDING * (window.at_lo.abs() + window.at_hi.abs());
        if target <= window.at_lo && target >= window.at_lo - slack {
            return Ok(plain(window.lo));
        }
        if target > window.at_hi && target <= window.at_hi + slack {
            return Ok(plain(window.hi));
        }
        if target < window.at_lo || target > window.at_hi {
            return Err(SettleError::Unreachable(Unreachable {
                least: typed(window.at_lo),
                most: typed(window.at_hi),
                lo: typed(window.lo),
                hi: typed(window.hi),
                boiling: window.boiling,
            }));
        }
        match self.narrow(window, target) {
            Narrowed::Met(settled) => Ok(settled),
            Narrowed::Between { a, b, at_a, at_b } => {
                let start = a + (b - a) * ((target - at_a) / (at_b - at_a));
                let f = |t: f64| {
                    let (total, slope) = self.total_and_slope(t);
                    (total - target, slope)
                };
                let root = find_rising_root(f, (a, b), start).map_err(|_| SettleError::NotFinite)?;
                Ok(plain(root.x))
            }
        }
    }

    fn check(&self) -> Result<(), SettleError> {
        for ((index, track), part) in self.tracks().zip(self.parts) {
            if track.is_none() {
                return Err(SettleError::NoSuchPhase { part: index });
            }
            if !(part.mass.value >= 0.0 && part.mass.value.is_finite()) {
                return Err(SettleError::Mass { part: index });
            }
        }
        if self.parts.iter().any(|part| part.mass.value > 0.0) {
            Ok(())
        } else {
            Err(SettleError::NothingThere)
        }
    }

    fn window(&self) -> Result<Window, SettleError> {
        let (mut lo, mut hi) = (0.0_f64, f64::INFINITY);
        let mut boiling = false;
        for part in self.parts {
            let Some(track) = part.curve.track(part.pin) else { continue };
            let limits = part.curve.limits(track, part.allowance, self.pressure);
            boiling |= (limits.gas_only && limits.lo >= lo) || (limits.condensed_only && limits.hi <= hi);
            lo = lo.max(limits.lo);
            hi = hi.min(limits.hi);
        }
        if lo > hi {
            return Err(SettleError::NoCommonRange { lo: typed(lo), hi: typed(hi) });
        }
        let at_lo = self.over_parts(|part, track| {
            let limits = part.curve.limits(track, part.allowance, self.pressure);
            part.curve.measure(track, self.measure, lo, limits.gas_only && limits.lo == lo)
        });
        let at_hi = self.over_parts(|part, track| {
            let limits = part.curve.limits(track, part.allowance, self.pressure);
            part.curve.measure(track, self.measure, hi, !(limits.condensed_only && limits.hi == hi))
        });
        Ok(Window { lo, hi, at_lo, at_hi, boiling })
    }

    /// Tries every edge between the ends until the target is met or no edge is left.
    fn narrow(&self, window: Window, target: f64) -> Narrowed {
        let Window { lo: mut a, hi: mut b, at_lo: mut at_a, at_hi: mut at_b, .. } = window;
        let (mut a_tried, mut b_tried) = (false, false);
        for (_, track) in self.tracks() {
            for edge in track.map_or(&[][..], |track| &track.pieces).iter().map(|piece| piece.hi) {
                if edge < a || edge > b || (a_tried && edge == a) || (b_tried && edge == b) {
                    continue;
                }
                let (below, above) = (self.total(edge, false), self.total(edge, true));
                if target < below {
                    (b, at_b, b_tried) = (edge, below, true);
                } else if target > above {
                    (a, at_a, a_tried) = (edge, above, true);
                } else {
                    let upper_share = (above > below).then(|| (target - below) / (above - below));
                    return Narrowed::Met(Settled { temperature: typed(edge), upper_share });
                }
            }
        }
        Narrowed::Between { a, b, at_a, at_b }
    }
}

enum Narrowed {
    Met(Settled),
    Between { a: f64, b: f64, at_a: f64, at_b: f64 },
}
