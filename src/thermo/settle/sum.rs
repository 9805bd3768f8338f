//! The total of several parts, and the temperature at which it meets a target.

use super::part::{Part, SettleError, Settled, Unreachable};
use crate::numeric::find_rising_root;
use crate::thermo::constants::STANDARD_ATMOSPHERE;
use crate::thermo::curve::{Measure, Track};
use crate::thermo::si::typed;

/// By how much of the total the target may lie outside the reach of the data, as rounding brings about.
const ROUNDING: f64 = 1e-12;

/// The total of a measure over parts at one temperature.
pub(super) struct Sum<'a> {
    pub(super) parts: &'a [Part<'a>],
    pub(super) measure: Measure,
    pub(super) pressure: f64,
    /// The tracks that the pressure makes other than the curves have them; empty where there are none.
    moved: Vec<Option<Track>>,
}

/// The temperatures that all parts share.
#[derive(Debug, Clone, Copy)]
struct Window {
    lo: f64,
    hi: f64,
    /// Whether an end is a boiling point that does not hold at the pressure.
    boiling: bool,
}

/// An end of the bracket, with the total there as seen from inside it; none at an end of the window not yet
/// looked at.
#[derive(Debug, Clone, Copy)]
struct End {
    t: f64,
    total: Option<f64>,
}

impl<'a> Sum<'a> {
    pub(super) fn new(parts: &'a [Part<'a>], measure: Measure, pressure: f64) -> Sum<'a> {
        let moved = |part: &Part<'_>| part.curve.sought_track(part.pin, pressure, part.allowance);
        let moves = pressure != STANDARD_ATMOSPHERE && parts.iter().any(|part| part.curve.follows_law());
        let moved = if moves { parts.iter().map(moved).collect() } else { Vec::new() };
        Sum { parts, measure, pressure, moved }
    }

    pub(super) fn tracks(&self) -> impl Iterator<Item = (usize, Option<&Track>)> {
        self.parts.iter().enumerate().map(|(at, part)| (at, self.track(at, part)))
    }

    #[inline]
    fn track(&self, at: usize, part: &Part<'a>) -> Option<&Track> {
        match self.moved.get(at) {
            Some(Some(track)) => Some(track),
            _ => part.curve.track(part.pin),
        }
    }

    /// The total at `t`, on plateaus at their lower or their `upper` end.
    #[inline]
    pub(super) fn total(&self, t: f64, upper: bool) -> f64 {
        self.over_parts(|part, track| part.curve.measure(track, self.measure, t, upper))
    }

    #[inline]
    fn total_and_slope(&self, t: f64) -> (f64, f64) {
        let (mut total, mut slope) = (0.0, 0.0);
        for (at, part) in self.parts.iter().enumerate() {
            let track = self.track(at, part);
            let (value, rise) = track
                .map_or((f64::NAN, f64::NAN), |track| part.curve.measure_and_slope(track, self.measure, t));
            total += part.mass.value * value;
            slope += part.mass.value * rise;
        }
        (total, slope)
    }

    #[inline]
    fn over_parts(&self, of: impl Fn(&Part<'_>, &Track) -> f64) -> f64 {
        let value = |(at, part): (usize, &Part<'a>)| {
            self.track(at, part).map_or(f64::NAN, |track| part.mass.value * of(part, track))
        };
        self.parts.iter().enumerate().map(value).sum()
    }

    pub(super) fn settle(&self, target: f64) -> Result<Settled, SettleError> {
        self.check()?;
        let window = self.window()?;
        if !target.is_finite() {
            return Err(SettleError::NotFinite);
        }
        match self.narrow(window, target)? {
            Narrowed::Met(settled) => Ok(settled),
            Narrowed::Between { a, b } => {
                let start = a.0 + (b.0 - a.0) * ((target - a.1) / (b.1 - a.1));
                let f = |t: f64| {
                    let (total, slope) = self.total_and_slope(t);
                    (total - target, slope)
                };
                let root = find_rising_root(f, (a.0, b.0), start).map_err(|_| SettleError::NotFinite)?;
                Ok(self.beside(root.x, a.0))
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
        for (at, part) in self.parts.iter().enumerate() {
            let Some(track) = self.track(at, part) else { continue };
            let limits = part.curve.limits(track, part.allowance, self.pressure);
            boiling |= (limits.gas_only && limits.lo >= lo) || (limits.condensed_only && limits.hi <= hi);
            lo = lo.max(limits.lo);
            hi = hi.min(limits.hi);
        }
        if lo > hi {
            return Err(SettleError::NoCommonRange { lo: typed(lo), hi: typed(hi) });
        }
        Ok(Window { lo, hi, boiling })
    }

    /// Tries every edge between the ends, then the ends as far as they are still open, until the target is
    /// met or the bracket holds no edge.
    fn narrow(&self, window: Window, target: f64) -> Result<Narrowed, SettleError> {
        let (mut a, mut b) = (End { t: window.lo, total: None }, End { t: window.hi, total: None });
        for (_, track) in self.tracks() {
            for edge in track.map_or(&[][..], |track| &track.pieces).iter().map(|piece| piece.hi) {
                if edge <= a.t || edge >= b.t {
                    continue;
                }
                let below = self.total(edge, false);
                let above = if self.changes_at(edge) { self.total(edge, true) } else { below };
                if target < below {
                    b = End { t: edge, total: Some(below) };
                } else if target > above {
                    a = End { t: edge, total: Some(above) };
                } else {
                    return Ok(met(edge, (below, above), target));
                }
            }
        }
        self.close(window, (a, b), target)
    }

    /// Looks at the ends of the window that no edge has replaced.
    fn close(&self, window: Window, (a, b): (End, End), target: f64) -> Result<Narrowed, SettleError> {
        let at_a = match a.total {
            Some(total) => total,
            None => {
                let (least, top) = self.ends_at(a.t, true);
                if target <= top || top.is_nan() {
                    return self.met_or_missed(window, a.t, (least, top), target);
                }
                top
            }
        };
        let at_b = match b.total {
            Some(total) => total,
            None => {
                let (bottom, most) = self.ends_at(b.t, false);
                if target >= bottom || bottom.is_nan() {
                    return self.met_or_missed(window, b.t, (bottom, most), target);
                }
                bottom
            }
        };
        Ok(Narrowed::Between { a: (a.t, at_a), b: (b.t, at_b) })
    }

    /// The target at an end of the window, unless it lies outside by more than rounding can bring about.
    fn met_or_missed(
        &self,
        window: Window,
        t: f64,
        (below, above): (f64, f64),
        target: f64,
    ) -> Result<Narrowed, SettleError> {
        let (_, slope) = self.total_and_slope(t);
        let slack = ROUNDING * (below.abs() + (slope * t).abs());
        if target >= below - slack && target <= above + slack {
            Ok(met(t, (below, above), target))
        } else {
            Err(self.unreachable(window))
        }
    }

    /// The totals on the lower and the upper side of an end of the window; a boiling point that does not hold
    /// has but one side.
    fn ends_at(&self, t: f64, lower_end: bool) -> (f64, f64) {
        let side = |upper: bool| {
            self.over_parts(|part, track| {
                let limits = part.curve.limits(track, part.allowance, self.pressure);
                let forced = if lower_end {
                    limits.gas_only && limits.lo == t
                } else {
                    limits.condensed_only && limits.hi == t
                };
                let upper = if forced { lower_end } else { upper };
                part.curve.measure(track, self.measure, t, upper)
            })
        };
        let below = side(false);
        (below, if self.changes_at(t) { side(true) } else { below })
    }

    /// A temperature found between two edges; where rounding puts it onto a transition, the side it came from
    /// is kept.
    fn beside(&self, t: f64, lower_edge: f64) -> Settled {
        let share = if t == lower_edge { 1.0 } else { 0.0 };
        Settled { temperature: typed(t), upper_share: self.changes_at(t).then_some(share) }
    }

    /// Whether any part has a transition exactly at `t`.
    fn changes_at(&self, t: f64) -> bool {
        self.tracks().any(|(_, track)| track.is_some_and(|track| track.changes_at(t)))
    }

    fn unreachable(&self, window: Window) -> SettleError {
        let (least, most) = (self.ends_at(window.lo, true).0, self.ends_at(window.hi, false).1);
        if !(least.is_finite() && most.is_finite()) {
            return SettleError::NotFinite;
        }
        SettleError::Unreachable(Unreachable {
            least: typed(least),
            most: typed(most),
            lo: typed(window.lo),
            hi: typed(window.hi),
            boiling: window.boiling,
        })
    }
}

enum Narrowed {
    Met(Settled),
    /// Temperatures with the totals there.
    Between {
        a: (f64, f64),
        b: (f64, f64),
    },
}

/// The target is met at `t`, where the total goes from `below` to `above`.
fn met(t: f64, (below, above): (f64, f64), target: f64) -> Narrowed {
    let share = (above > below).then(|| ((target - below) / (above - below)).clamp(0.0, 1.0));
    Narrowed::Met(Settled { temperature: typed(t), upper_share: share })
}
