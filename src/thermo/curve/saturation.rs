//! The vapour-pressure law of a curve: where its liquid boils at a pressure.
//!
//! The law's temperatures are moved by a constant, so that at 101.325 kPa it boils where the species says: boiling
//! then moves evenly with the pressure, with no jump. Where the law's range lies far from that point it stands as
//! published.

use uom::si::f64::{AvailableEnergy, Pressure, ThermodynamicTemperature};

use super::assemble::HeatingCurve;
use super::check::link_span;
use super::data::{CurveData, PhaseClass};
use super::locate::LocateError;
use super::track::BOILING_BAND;
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
    /// Its range does not meet the temperatures over which the liquid has data.
    BeyondLiquid {
        /// Where the data of the liquid begin.
        lo: ThermodynamicTemperature,
        /// Where they end.
        hi: ThermodynamicTemperature,
    },
    /// Its range lies below the melting of the liquid.
    BelowMelting,
}

/// The vapour-pressure law of the boiling link.
#[derive(Debug, Clone, Copy, PartialEq)]
pub(super) struct Saturation {
    pub(super) link: usize,
    /// The stated boiling point at 101.325 kPa.
    pub(super) normal: f64,
    law: VapourPressure,
    /// What is added to the law's temperatures.
    shift: f64,
    /// Where the law ends, in its own temperatures, with `ln(p/Pa)`.
    lo: (f64, f64),
    hi: (f64, f64),
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
        let ranges = data.phases.get(link).map_or(&[][..], |phase| &phase.ranges);
        if let (Some(first), Some(last)) = (ranges.first(), ranges.last())
            && (lo + shift > last.hi.value || hi + shift < first.lo.value)
        {
            return Err(SaturationFault::BeyondLiquid { lo: first.lo, hi: last.hi });
        }
        Ok(Some(Saturation { link, normal, law, shift, lo: law.end(lo), hi: law.end(hi) }))
    }

    /// Where the law boils at a pressure; none outside its range.
    pub(super) fn temperature(&self, pressure: f64) -> Option<f64> {
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
    pub(super) fn anchors(&self) -> [(f64, f64); 3] {
        let end = |(t, log): (f64, f64)| (math::exp(log), t + self.shift);
        [end(self.lo), end(self.hi), (STANDARD_ATMOSPHERE, self.normal)]
    }

    pub(super) fn outside(&self, below: Option<f64>, above: Option<f64>) -> LocateError {
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

    fn normal_boiling(&self) -> Option<f64> {
        let boils = |link: &usize| {
            let class = |phase: usize| self.phases.get(phase).map(|phase| phase.class);
            class(*link) == Some(PhaseClass::Liquid) && class(link + 1) == Some(PhaseClass::Gas)
        };
        let link = (0..self.joints.len()).find(boils)?;
        self.joints.get(link).and_then(|joint| joint.span).map(|span| span.0)
    }
}
