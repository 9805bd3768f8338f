//! The state functions that a temperature is found by, each rising with temperature along a track.

use super::assemble::HeatingCurve;
use super::data::PhaseClass;
use super::segment::{Body, Segment};
use super::track::{Piece, Track};
use crate::thermo::constants::GAS_CONSTANT;

/// A state function, per mass.
#[derive(Debug, Clone, Copy, PartialEq)]
pub(in crate::thermo) enum Measure {
    /// Enthalpy at a pressure that lies this much above 101.325 kPa, in Pa.
    Enthalpy { excess: f64 },
    /// Internal energy.
    InternalEnergy,
    /// Entropy above the lowest temperature of the phase.
    Entropy,
}

impl HeatingCurve {
    /// Whether pressure does not enter the enthalpies of this curve, so that those of its pieces hold as they
    /// are.
    #[inline]
    pub(in crate::thermo) fn pressure_free(&self, excess: f64) -> bool {
        excess == 0.0 || !self.has_density
    }

    /// The measure on a track at `t`; exactly on a plateau its lower or its `upper` end.
    #[inline]
    pub(in crate::thermo) fn measure(&self, track: &Track, measure: Measure, t: f64, upper: bool) -> f64 {
        let piece = if upper {
            track.pieces.iter().rev().find(|piece| t >= piece.lo).or(track.pieces.first())
        } else {
            track.pieces.iter().find(|piece| t <= piece.hi).or(track.pieces.last())
        };
        let segment = piece.and_then(|piece| self.segments.get(piece.segment));
        let share = if upper { 1.0 } else { 0.0 };
        segment.map_or(f64::NAN, |segment| self.segment_measure(segment, measure, t, share))
    }

    #[inline]
    fn segment_measure(&self, segment: &Segment, measure: Measure, t: f64, share: f64) -> f64 {
        match measure {
            Measure::Enthalpy { excess } if self.pressure_free(excess) => segment.enthalpy(t, share),
            Measure::Enthalpy { excess } => {
                segment.enthalpy(t, share) + excess * self.incompressible_volume(segment, t, share)
            }
            Measure::InternalEnergy => segment.enthalpy(t, share) - self.flow_work(segment, t, share),
            Measure::Entropy => segment.entropy(t),
        }
    }

    /// The measure at `t`, on a plateau at its lower end, and how it rises with temperature there, thermal
    /// expansion of condensed phases left out.
    #[inline]
    pub(in crate::thermo) fn measure_and_slope(&self, track: &Track, measure: Measure, t: f64) -> (f64, f64) {
        let piece = track.pieces.iter().find(|piece| t <= piece.hi).or(track.pieces.last());
        let Some(segment) = piece.and_then(|piece| self.segments.get(piece.segment)) else {
            return (f64::NAN, f64::NAN);
        };
        let slope = match measure {
            Measure::Enthalpy { .. } => segment.slope(t),
            Measure::InternalEnergy => segment.slope(t) - self.gas_constant_of(segment),
            Measure::Entropy => segment.cp(t) / t,
        };
        (self.segment_measure(segment, measure, t, 0.0), slope)
    }

    /// `R/M` in a gas, zero elsewhere.
    fn gas_constant_of(&self, segment: &Segment) -> f64 {
        match segment.body {
            Body::Range { phase, .. } if self.is_gas(phase) => {
                self.molar_mass.map_or(f64::NAN, |mass| GAS_CONSTANT / mass.value)
            }
            _ => 0.0,
        }
    }

    fn is_gas(&self, phase: usize) -> bool {
        self.phases.get(phase).is_some_and(|phase| phase.class == PhaseClass::Gas)
    }

    /// Whether a track leads through gas alone.
    pub(in crate::thermo) fn all_gas(&self, track: &Track) -> bool {
        (track.first..=track.last).all(|phase| self.is_gas(phase))
    }

    /// Whether a track leads through a gas.
    pub(in crate::thermo) fn holds_gas(&self, track: &Track) -> bool {
        (track.first..=track.last).any(|phase| self.is_gas(phase))
    }

    /// The temperature on a piece at which enthalpy is `h`, which lies between those of its ends.
    #[inline]
    pub(in crate::thermo) fn temperature_on(&self, piece: &Piece, h: f64) -> f64 {
        let (rise, whole) = (h - piece.h_lo, piece.h_hi - piece.h_lo);
        let segment = self.segments.get(piece.segment);
        segment.map_or(f64::NAN, |segment| segment.temperature_after((piece.lo, piece.hi), rise, whole))
    }
}
