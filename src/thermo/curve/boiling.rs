//! Boiling away from 101.325 kPa: where a vapour-pressure law has it.
//!
//! The law's temperatures are moved by a constant, so that at 101.325 kPa it boils where the species says: boiling
//! then moves evenly with the pressure, with no jump. Where the law's range lies far from that point it stands as
//! published.

use uom::si::f64::{AvailableEnergy, Pressure, ThermodynamicTemperature};

use super::assemble::HeatingCurve;
use super::check::link_span;
use super::data::{CurveData, PhaseClass};
use super::locate::LocateError;
use super::place::{Allowance, Pin, Place};
use super::segment::Body;
use super::track::{BOILING_BAND, Course, Piece, Track, lay_track};
use crate::numeric::math;
use crate::thermo::VapourPressure;
use crate::thermo::constants::{GAS_CONSTANT, STANDARD_ATMOSPHERE};
use crate::thermo::si::typed;

/// How near, relative, the normal boiling point lies to the range of a law that is to pass through it.
const NEIGHBOURHOOD: f64 = 0.01;

/// How far, relative, law and stated boiling point may lie apart before one of them must be wrong.
const GROSS: f64 = 0.05;

/// Why a vapour-pressure law does not fit a curve.
#[derive(Debug, Clone, Copy, PartialEq)]
pub enum SaturationFault {
    /// No liquid of the species boils.
    NoBoiling,
    /// The law gives this pressure at the stated boiling point, far from 101.325 kPa.
    Contradiction {
        /// The stated boiling point.
        temperature: ThermodynamicTemperature,
        /// What the law gives there.
        pressure: Pressure,
    },
    /// Its range lies below the melting of the liquid.
    BelowMelting,
}

/// The vapour-pressure law of the boiling link.
#[derive(Debug, Clone, Copy, PartialEq)]
pub(super) struct Saturation {
    link: usize,
    /// The stated boiling point at 101.325 kPa.
    normal: f64,
    law: VapourPressure,
    /// What is added to the law's temperatures.
    shift: f64,
    /// Where the law ends, in its own temperatures, with `ln(p/Pa)`.
    lo: (f64, f64),
    hi: (f64, f64),
}

/// Where a link boils at a pressure.
#[derive(Debug, Clone, Copy, PartialEq)]
enum Boiling {
    /// Where the curve has it.
    Normal,
    /// Here, and the data of both phases reach it.
    At(f64),
    /// Liquid up to the first temperature, gas from the second; data or law do not lead across.
    Between(Option<f64>, Option<f64>),
}

/// A track as it is at a pressure.
pub(in crate::thermo) enum Moved {
    /// In one piece.
    Whole(Track),
    /// In two that do not meet.
    Parted(Box<Halves>),
}

/// The stretches of a track on both sides of a boiling that cannot be crossed.
pub(in crate::thermo) struct Halves {
    below: Option<Track>,
    above: Option<Track>,
    error: LocateError,
    /// Why the plateau itself is refused, where its place is known.
    short: Option<LocateError>,
    ends: (f64, f64),
}

impl Halves {
    /// The half that holds `t`.
    pub(super) fn at(&self, t: f64) -> Result<&Track, LocateError> {
        let half = if t <= self.ends.0 { self.below.as_ref() } else { None };
        let other = if t >= self.ends.1 { self.above.as_ref() } else { None };
        half.or(other).ok_or(self.error)
    }

    /// Why a state on the plateau is refused.
    pub(super) fn on_plateau(&self) -> LocateError {
        self.short.unwrap_or(self.error)
    }

    /// The half in which a temperature is sought: of the liquid above 101.325 kPa, of the gas below.
    fn sought(self, pressure: f64) -> Option<Track> {
        if pressure >= STANDARD_ATMOSPHERE { self.below.or(self.above) } else { self.above.or(self.below) }
    }
}

impl Saturation {
    /// The law of a species at its boiling link.
    pub(super) fn place(data: &CurveData) -> Result<Option<Saturation>, SaturationFault> {
        let Some(law) = data.vapour_pressure else { return Ok(None) };
        let class = |phase: usize| data.phases.get(phase).map(|phase| phase.class);
        let boils = |link: &usize| {
            class(*link) == Some(PhaseClass::Liquid) && class(link + 1) == Some(PhaseClass::Gas)
        };
        let link = (0..data.links.len()).find(boils).ok_or(SaturationFault::NoBoiling)?;
        let span = data.links.get(link).and_then(link_span);
        let (normal, _) = span.ok_or(SaturationFault::NoBoiling)?;
        let (lo, hi) = law.range();
        let contradiction = || SaturationFault::Contradiction {
            temperature: typed(normal),
            pressure: law.pressure(typed(normal)),
        };
        let shift = if normal >= lo * (1.0 - NEIGHBOURHOOD) && normal <= hi * (1.0 + NEIGHBOURHOOD) {
            shift(&law, normal).ok_or_else(contradiction)?
        } else {
            let (pressure, atmosphere) = (law.log_pressure(hi), math::ln(STANDARD_ATMOSPHERE));
            let fits = if normal > hi { pressure < atmosphere } else { law.log_pressure(lo) > atmosphere };
            if !fits {
                return Err(contradiction());
            }
            0.0
        };
        let melting = link.checked_sub(1).and_then(|below| data.links.get(below)).and_then(link_span);
        let lo = melting.map_or(lo, |(_, end)| lo.max(end - shift));
        if lo >= hi {
            return Err(SaturationFault::BelowMelting);
        }
        Ok(Some(Saturation { link, normal, law, shift, lo: law.end(lo), hi: law.end(hi) }))
    }

    /// Where the law boils at a pressure; none outside its range.
    fn temperature(&self, pressure: f64) -> Option<f64> {
        if pressure == STANDARD_ATMOSPHERE {
            return Some(self.normal);
        }
        let log = if pressure > 0.0 { math::ln(pressure) } else { f64::NAN };
        if !(log >= self.lo.1 && log <= self.hi.1) {
            return None;
        }
        Some(self.law.temperature_between(log, self.lo, self.hi) + self.shift)
    }

    /// Pressures, with the temperatures at which it boils there, that are known whatever the law's range.
    fn anchors(&self) -> [(f64, f64); 3] {
        let end = |(t, log): (f64, f64)| (math::exp(log), t + self.shift);
        [end(self.lo), end(self.hi), (STANDARD_ATMOSPHERE, self.normal)]
    }

    fn outside(&self, below: Option<f64>, above: Option<f64>) -> LocateError {
        let [lo, hi, _] = self.anchors();
        LocateError::OutsideVapourPressure {
            liquid_below: typed(below.unwrap_or(0.0)),
            gas_above: typed(above.unwrap_or(f64::INFINITY)),
            lo: typed(lo.0),
            hi: typed(hi.0),
        }
    }
}

/// What has to be added to a law's temperatures so that it boils at `normal` at 101.325 kPa.
fn shift(law: &VapourPressure, normal: f64) -> Option<f64> {
    let (lo, hi) = (law.end(normal * (1.0 - GROSS)), law.end(normal * (1.0 + GROSS)));
    let log = math::ln(STANDARD_ATMOSPHERE);
    (lo.1 <= log && log <= hi.1).then(|| normal - law.temperature_between(log, lo, hi))
}

impl HeatingCurve {
    /// Whether a vapour-pressure law moves the boiling of a link.
    pub(super) fn boils_by_law(&self, link: usize) -> bool {
        self.saturation.is_some_and(|saturation| saturation.link == link)
    }

    /// Whether a vapour-pressure law moves the boiling of the curve.
    #[inline]
    pub(in crate::thermo) fn follows_law(&self) -> bool {
        self.saturation.is_some()
    }

    /// Whether a link boils at `t`, and that is not where the curve has it.
    pub(super) fn boils_off(&self, link: usize, t: f64) -> bool {
        self.saturation.is_some_and(|saturation| saturation.link == link && saturation.normal != t)
    }

    /// The enthalpies of the phases below and above a link at `t`.
    pub(super) fn enthalpies_beside(&self, link: usize, t: f64) -> (f64, f64) {
        (self.phase_enthalpy(link, t), self.phase_enthalpy(link + 1, t))
    }

    /// The plateau of a link, with the segment it has on the curve, moved to `t`.
    pub(super) fn moved_plateau(&self, link: usize, segment: usize, t: f64) -> Piece {
        let (h_lo, h_hi) = self.enthalpies_beside(link, t);
        Piece { segment, lo: t, hi: t, h_lo, h_hi, plateau: true, melting: false }
    }

    fn boiling(&self, saturation: &Saturation, pressure: f64, allowance: &Allowance) -> Boiling {
        if pressure == STANDARD_ATMOSPHERE {
            return Boiling::Normal;
        }
        let link = saturation.link;
        match saturation.temperature(pressure) {
            Some(t) => {
                let reach = |phase: usize| {
                    let (lo, hi) = self.reach(phase, allowance);
                    t >= lo && t <= hi
                };
                let (below, above) = self.enthalpies_beside(link, t);
                let ends = self.reach(link + 1, allowance).1 <= t;
                if reach(link) && reach(link + 1) && !ends && above > below {
                    Boiling::At(t)
                } else {
                    Boiling::Between(Some(t), Some(t))
                }
            }
            None if (pressure / STANDARD_ATMOSPHERE - 1.0).abs() <= BOILING_BAND => Boiling::Normal,
            None => {
                let (mut below, mut above) = (None, None);
                for (known, t) in saturation.anchors() {
                    if known <= pressure {
                        below = Some(below.map_or(t, |best: f64| best.max(t)));
                    } else {
                        above = Some(above.map_or(t, |best: f64| best.min(t)));
                    }
                }
                Boiling::Between(below, above)
            }
        }
    }

    /// The track as it is at a pressure, where a law makes it another.
    pub(in crate::thermo) fn moved(
        &self,
        track: &Track,
        pressure: f64,
        allowance: &Allowance,
    ) -> Option<Moved> {
        let saturation = self.saturation.as_ref().filter(|_| track.moves)?;
        let link = saturation.link;
        match self.boiling(saturation, pressure, allowance) {
            Boiling::Normal => None,
            Boiling::At(t) => {
                Some(Moved::Whole(lay_track(self, track.first, track.last, Course::Moved(link, t))))
            }
            Boiling::Between(below, above) => {
                let liquid = |t: f64| lay_track(self, track.first, link, Course::Cut(f64::NEG_INFINITY, t));
                let gas = |t: f64| lay_track(self, link + 1, track.last, Course::Cut(t, f64::INFINITY));
                Some(Moved::Parted(Box::new(Halves {
                    below: below.map(liquid).filter(|half| !half.pieces.is_empty()),
                    above: above.map(gas).filter(|half| !half.pieces.is_empty()),
                    error: saturation.outside(below, above),
                    short: below.filter(|_| below == above).map(|t| self.short_of(link, t, allowance)),
                    ends: (below.unwrap_or(f64::NEG_INFINITY), above.unwrap_or(f64::INFINITY)),
                })))
            }
        }
    }

    /// Which phase has no data at the boiling temperature `t`.
    fn short_of(&self, link: usize, t: f64, allowance: &Allowance) -> LocateError {
        let reaches = |phase: usize| {
            let (lo, hi) = self.reach(phase, allowance);
            t >= lo && t <= hi
        };
        let phase = if reaches(link) { link + 1 } else { link };
        let (lo, hi) = self.reach(phase, allowance);
        LocateError::OutsideRange { phase, lo: typed(lo), hi: typed(hi) }
    }

    /// The track along which a temperature is sought at a pressure, where a law makes it another.
    pub(in crate::thermo) fn sought_track(
        &self,
        pin: Pin,
        pressure: f64,
        allowance: &Allowance,
    ) -> Option<Track> {
        self.saturation.as_ref()?;
        match self.moved(self.track(pin)?, pressure, allowance)? {
            Moved::Whole(track) => Some(track),
            Moved::Parted(halves) => halves.sought(pressure),
        }
    }

    /// The boiling link and where it boils at a pressure as far as the data reach by themselves; none where that is
    /// where the curve has it.
    pub(super) fn boiling_moved(&self, pressure: f64) -> Option<(usize, f64)> {
        let saturation = self.saturation.as_ref()?;
        let t = match self.boiling(saturation, pressure, Allowance::none()) {
            Boiling::At(t) => t,
            Boiling::Normal | Boiling::Between(..) => saturation.normal,
        };
        Some((saturation.link, t))
    }

    /// The temperature at which the liquid boils at a pressure: by its vapour-pressure law, without one the stated
    /// one within 2 % of 101.325 kPa.
    ///
    /// # Errors
    /// [`LocateError`].
    pub fn boiling_temperature(&self, pressure: Pressure) -> Result<ThermodynamicTemperature, LocateError> {
        let p = pressure.value;
        match &self.saturation {
            Some(saturation) => match saturation.temperature(p) {
                Some(t) => Ok(typed(t)),
                None if (p / STANDARD_ATMOSPHERE - 1.0).abs() <= BOILING_BAND => Ok(typed(saturation.normal)),
                None => Err(saturation.outside(None, None)),
            },
            None => {
                let normal = self.normal_boiling().ok_or(LocateError::NoTransition)?;
                if (p / STANDARD_ATMOSPHERE - 1.0).abs() <= BOILING_BAND {
                    Ok(typed(normal))
                } else {
                    Err(LocateError::BoilingPressure { temperature: typed(normal) })
                }
            }
        }
    }

    /// The pressure at which the liquid boils at a temperature, by its vapour-pressure law.
    ///
    /// # Errors
    /// [`LocateError`]; [`LocateError::NoTransition`] without a law.
    pub fn saturation_pressure(
        &self,
        temperature: ThermodynamicTemperature,
    ) -> Result<Pressure, LocateError> {
        let saturation = self.saturation.as_ref().ok_or(LocateError::NoTransition)?;
        let t = temperature.value;
        if t == saturation.normal {
            return Ok(typed(STANDARD_ATMOSPHERE));
        }
        let own = t - saturation.shift;
        if own >= saturation.lo.0 && own <= saturation.hi.0 {
            Ok(typed(math::exp(saturation.law.log_pressure(own))))
        } else {
            Err(saturation.outside(None, None))
        }
    }

    /// The vapour-pressure law that boiling follows.
    pub fn vapour_pressure(&self) -> Option<VapourPressure> {
        self.saturation.map(|saturation| saturation.law)
    }

    /// By how much the stated boiling point lies above that of the law; none without a law, or with one whose range
    /// lies far from it.
    pub fn boiling_shift(&self) -> Option<f64> {
        self.saturation.map(|saturation| saturation.shift).filter(|shift| *shift != 0.0)
    }

    /// The latent heat that the slope of the vapour-pressure law gives at the stated boiling point, the vapour taken
    /// as ideal: `R T²/M · d ln p/dT` (Clausius and Clapeyron), beside that of the curve. None where the range of
    /// the law lies far from it.
    pub fn latent_by_slope(&self) -> Option<(AvailableEnergy, AvailableEnergy)> {
        let saturation = self.saturation.as_ref()?;
        let (lo, hi) = saturation.law.range();
        let t = saturation.normal;
        if t < lo * (1.0 - NEIGHBOURHOOD) || t > hi * (1.0 + NEIGHBOURHOOD) {
            return None;
        }
        let gas_constant = GAS_CONSTANT / self.molar_mass?.value;
        let slope = saturation.law.log_slope(t - saturation.shift);
        let latent = self.joints.get(saturation.link)?.latent;
        Some((typed(gas_constant * t * t * slope), typed(latent)))
    }

    /// The latent heat of boiling at a temperature: the difference of the two phases' enthalpies, the vapour ideal.
    pub fn boiling_latent(&self, temperature: ThermodynamicTemperature) -> Option<AvailableEnergy> {
        let saturation = self.saturation.as_ref()?;
        let (below, above) = self.enthalpies_beside(saturation.link, temperature.value);
        Some(typed(above - below))
    }

    /// As [`HeatingCurve::latent`], boiling where a vapour-pressure law has it at `pressure`.
    #[inline]
    pub fn latent_at(&self, place: Place, pressure: Pressure) -> AvailableEnergy {
        if self.saturation.is_none() { self.latent(place) } else { self.latent_by_law(place, pressure) }
    }

    #[inline(never)]
    fn latent_by_law(&self, place: Place, pressure: Pressure) -> AvailableEnergy {
        let (Some((link, t)), Some(segment)) =
            (self.boiling_moved(pressure.value), self.segments.get(place.segment))
        else {
            return self.latent(place);
        };
        let joint = self.joints.get(link).map_or(f64::NAN, |joint| joint.latent);
        let (below, above) = self.enthalpies_beside(link, t);
        let height = if self.boils_off(link, t) { above - below } else { joint };
        typed(match segment.body {
            Body::Plateau { link: at, .. } if at == link => segment.latent + place.share * height,
            Body::Range { phase, .. } if phase == link + 1 => segment.latent + (height - joint),
            _ => segment.latent_at(place.temperature, place.share),
        })
    }

    fn normal_boiling(&self) -> Option<f64> {
        let boils = |link: &usize| {
            let class = |phase: usize| self.phases.get(phase).map(|phase| phase.class);
            class(*link) == Some(PhaseClass::Liquid) && class(link + 1) == Some(PhaseClass::Gas)
        };
        let link = (0..self.joints.len()).find(boils)?;
        self.joints.get(link).and_then(|joint| joint.span).map(|span| span.0)
    }
}
