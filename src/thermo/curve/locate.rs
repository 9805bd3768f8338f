//! From a temperature to a place on the curve.

use uom::si::f64::{Pressure, ThermodynamicTemperature};

use super::assemble::HeatingCurve;
use super::boiling::Moved;
use super::data::PhaseClass;
use super::place::{Allowance, Pin, Place, Side};
use super::segment::Body;
use super::track::{Limits, Piece, Track};
use crate::thermo::si::typed;

/// Within how many kelvin of a transition the side has to be named.
const TRANSITION_BAND: f64 = 0.5;

/// How far beyond a range, relative, a temperature still counts as its end.
const TOUCH: f64 = 1e-9;

/// Why a temperature has no place on a curve; phases by their index.
#[derive(Debug, Clone, Copy, PartialEq)]
#[allow(missing_docs)]
pub enum LocateError {
    /// The species has no such phase.
    NoSuchPhase,
    /// A temperature that is not above 0 K, or no number.
    NotATemperature,
    /// Within 0.5 K of a transition, and no side named.
    OnTransition { temperature: ThermodynamicTemperature, below: usize, above: usize },
    /// Outside the data of the phase.
    OutsideRange { phase: usize, lo: ThermodynamicTemperature, hi: ThermodynamicTemperature },
    /// Above the temperature at which the species decomposes.
    Decomposes { at: ThermodynamicTemperature },
    /// Across the boiling point at a pressure where it does not hold.
    BoilingPressure { temperature: ThermodynamicTemperature },
    /// The vapour-pressure law does not hold at the pressure: what is liquid below and what is gas above two
    /// temperatures is known, what lies between is not.
    OutsideVapourPressure {
        liquid_below: ThermodynamicTemperature,
        gas_above: ThermodynamicTemperature,
        lo: Pressure,
        hi: Pressure,
    },
    /// A side named where no transition of that phase is near.
    NoTransition,
    /// A share that is not from 0 to 1.
    ShareOutOfBounds,
}

impl HeatingCurve {
    /// The place at `temperature` and `pressure` of the phase that `pin` says. Within 0.5 K of a transition
    /// on the way a `side` is wanted, and the place is on the transition itself; elsewhere a side is refused.
    ///
    /// # Errors
    /// [`LocateError`].
    #[inline]
    pub fn locate(
        &self,
        temperature: ThermodynamicTemperature,
        pressure: Pressure,
        pin: Pin,
        side: Option<Side>,
        allowance: &Allowance,
    ) -> Result<Place, LocateError> {
        let t = temperature.value;
        let track = self.track(pin).ok_or(LocateError::NoSuchPhase)?;
        if side.is_none()
            && let Some(place) = self.locator(pin, allowance).and_then(|plain| plain.place(t, pressure.value))
        {
            return Ok(place);
        }
        self.locate_on(track, t, pressure.value, side, allowance)
    }

    /// What finds the plain places of a pin, one temperature after another; none where nothing is plain: the phase
    /// is not there, data are stretched or the species decomposes.
    #[inline]
    pub fn locator(&self, pin: Pin, allowance: &Allowance) -> Option<Locator<'_>> {
        let track = self.track(pin)?;
        (allowance.is_none() && !track.decomposes).then_some(Locator { curve: self, track })
    }

    #[cold]
    #[inline(never)]
    fn locate_on(
        &self,
        track: &Track,
        t: f64,
        pressure: f64,
        side: Option<Side>,
        allowance: &Allowance,
    ) -> Result<Place, LocateError> {
        if !(t > 0.0 && t.is_finite()) {
            return Err(LocateError::NotATemperature);
        }
        match self.moved(track, pressure, allowance) {
            None => self.locate_along(track, t, pressure, side, allowance),
            Some(Moved::Whole(track)) => self.locate_along(&track, t, pressure, side, allowance),
            Some(Moved::Parted(halves)) if side.is_some() && nearest_point(track, t, side).is_none() => {
                Err(halves.on_plateau())
            }
            Some(Moved::Parted(halves)) => self.locate_along(halves.at(t)?, t, pressure, side, allowance),
        }
    }

    fn locate_along(
        &self,
        track: &Track,
        t: f64,
        pressure: f64,
        side: Option<Side>,
        allowance: &Allowance,
    ) -> Result<Place, LocateError> {
        if let Some((at, link)) = nearest_point(track, t, side) {
            return self.on_point(track, (at, link), side, (pressure, allowance));
        }
        if side.is_some() {
            return Err(LocateError::NoTransition);
        }
        self.check_limits(track, t, pressure, allowance)?;
        Ok(self.place_on(track, t))
    }

    /// The place at a temperature that was worked out and not written: no transition is too near. Exactly on
    /// a point transition `upper_share` says how far along it is; if none is given, the lower phase alone is
    /// meant, or the gas where the pressure lets the liquid be none.
    ///
    /// # Errors
    /// [`LocateError`], but never `OnTransition` or `NoTransition`.
    pub fn place(
        &self,
        temperature: ThermodynamicTemperature,
        pressure: Pressure,
        pin: Pin,
        upper_share: Option<f64>,
        allowance: &Allowance,
    ) -> Result<Place, LocateError> {
        let t = temperature.value;
        let track = self.track(pin).ok_or(LocateError::NoSuchPhase)?;
        if !(t > 0.0 && t.is_finite()) {
            return Err(LocateError::NotATemperature);
        }
        match self.moved(track, pressure.value, allowance) {
            None => self.place_along(track, t, pressure.value, upper_share, allowance),
            Some(Moved::Whole(track)) => self.place_along(&track, t, pressure.value, upper_share, allowance),
            Some(Moved::Parted(halves)) => {
                self.place_along(halves.at(t)?, t, pressure.value, upper_share, allowance)
            }
        }
    }

    fn place_along(
        &self,
        track: &Track,
        t: f64,
        pressure: f64,
        upper_share: Option<f64>,
        allowance: &Allowance,
    ) -> Result<Place, LocateError> {
        let limits = self.limits(track, allowance, pressure);
        let share = upper_share.unwrap_or(if limits.gas_only && limits.lo == t { 1.0 } else { 0.0 });
        if !(0.0..=1.0).contains(&share) {
            return Err(LocateError::ShareOutOfBounds);
        }
        self.check_limits(track, t, pressure, allowance)?;
        match track.points.iter().find(|(at, _)| *at == t) {
            Some(&(at, link)) => Ok(self.plateau(at, link, share)),
            None => Ok(self.place_on(track, t)),
        }
    }

    fn on_point(
        &self,
        track: &Track,
        (at, link): (f64, usize),
        side: Option<Side>,
        (pressure, allowance): (f64, &Allowance),
    ) -> Result<Place, LocateError> {
        let boils = self.phases.get(link + 1).is_some_and(|upper| upper.class == PhaseClass::Gas);
        let limits = self.limits(track, allowance, pressure);
        if boils && track.cut.is_none() && (limits.gas_only || limits.condensed_only) {
            return Err(LocateError::BoilingPressure { temperature: typed(at) });
        }
        let Some(Side { phase, share }) = side else {
            return Err(LocateError::OnTransition { temperature: typed(at), below: link, above: link + 1 });
        };
        if !(0.0..=1.0).contains(&share) {
            return Err(LocateError::ShareOutOfBounds);
        }
        if limits.decomposes && at > limits.hi {
            return Err(LocateError::Decomposes { at: typed(limits.hi) });
        }
        Ok(self.plateau(at, link, if phase == link { 1.0 - share } else { share }))
    }

    fn plateau(&self, temperature: f64, link: usize, share: f64) -> Place {
        let segment = self.joints.get(link).map_or(0, |joint| joint.segments.start);
        let beyond =
            |phase: usize| self.phases.get(phase).is_some_and(|phase| !near(phase.lo, phase.hi, temperature));
        Place { segment, temperature, share, extrapolated: beyond(link) || beyond(link + 1) }
    }

    fn check_limits(
        &self,
        track: &Track,
        t: f64,
        pressure: f64,
        allowance: &Allowance,
    ) -> Result<(), LocateError> {
        let data = self.data_limits(track, allowance);
        if t < data.lo || t > data.hi {
            return Err(self.outside(track, t, &data));
        }
        let limits = self.limits(track, allowance, pressure);
        let across_up = limits.condensed_only && t > limits.hi;
        let across_down = limits.gas_only && t < limits.lo;
        match track.boiling {
            Some(boiling) if across_up || across_down => {
                Err(LocateError::BoilingPressure { temperature: typed(boiling) })
            }
            _ => Ok(()),
        }
    }

    fn outside(&self, track: &Track, t: f64, limits: &Limits) -> LocateError {
        if limits.decomposes && t > limits.hi {
            return LocateError::Decomposes { at: typed(limits.hi) };
        }
        let (phase, (lo, hi)) = if t < limits.lo {
            (track.first, (limits.lo, self.phases.get(track.first).map_or(limits.hi, |phase| phase.hi)))
        } else {
            (track.last, (self.phases.get(track.last).map_or(limits.lo, |phase| phase.lo), limits.hi))
        };
        LocateError::OutsideRange { phase, lo: typed(lo), hi: typed(hi) }
    }

    /// The place on a track at a temperature within its limits.
    fn place_on(&self, track: &Track, t: f64) -> Place {
        let piece = track.pieces.iter().find(|piece| t < piece.hi).or(track.pieces.last());
        let segment = piece.map_or(0, |piece| piece.segment);
        let inside = self.segments.get(segment).is_some_and(|segment| t >= segment.lo && t <= segment.hi);
        let edge = piece.is_some_and(|piece| t >= piece.lo && t <= piece.hi)
            && self.segments.get(segment).is_some_and(|segment| near(segment.lo, segment.hi, t));
        let decomposed = self.decomposes_at.is_some_and(|at| t > at);
        let share = self.melting_share(segment, t);
        Place { segment, temperature: t, share, extrapolated: !(inside || edge) || decomposed }
    }

    /// The upper phase's share in a piece of a melting range; zero elsewhere.
    fn melting_share(&self, segment: usize, t: f64) -> f64 {
        match self.segments.get(segment).map(|segment| (&segment.body, segment.lo)) {
            Some((Body::Melting { melting, .. }, lo)) => melting.share_at(t - lo).clamp(0.0, 1.0),
            _ => 0.0,
        }
    }
}

/// A curve and one of its tracks, to find places in a row.
#[derive(Debug, Clone, Copy)]
pub struct Locator<'a> {
    curve: &'a HeatingCurve,
    track: &'a Track,
}

impl Locator<'_> {
    /// The place at `t` in K and `pressure` in Pa, as [`HeatingCurve::locate`] gives it without a side. None where the
    /// pressure matters, where a transition is near and outside the data: there `locate` has to say more.
    #[inline]
    pub fn place(self, t: f64, pressure: f64) -> Option<Place> {
        let track = self.track;
        if !track.boils_at(pressure) || track.points.iter().any(|(at, _)| (t - at).abs() <= TRANSITION_BAND) {
            return None;
        }
        let inside = |piece: &&Piece| t < piece.hi;
        let piece = track.pieces.iter().find(inside).or(track.pieces.last().filter(|piece| t == piece.hi))?;
        let share = if piece.melting { self.curve.melting_share(piece.segment, t) } else { 0.0 };
        (t >= piece.lo).then_some(Place {
            segment: piece.segment,
            temperature: t,
            share,
            extrapolated: false,
        })
    }
}

/// Whether `t` lies between two temperatures, but for rounding.
fn near(lo: f64, hi: f64, t: f64) -> bool {
    t >= lo * (1.0 - TOUCH) && t <= hi * (1.0 + TOUCH)
}

/// The nearest point transition within the band; with a side, one that its phase takes part in.
fn nearest_point(track: &Track, t: f64, side: Option<Side>) -> Option<(f64, usize)> {
    let takes_part = |link: usize| side.is_none_or(|side| side.phase == link || side.phase == link + 1);
    let near =
        track.points.iter().filter(|(at, link)| (t - at).abs() <= TRANSITION_BAND && takes_part(*link));
    near.copied().min_by(|a, b| (t - a.0).abs().total_cmp(&(t - b.0).abs()))
}
