//! A place on a heating curve, and how it is asked for.

use uom::si::f64::ThermodynamicTemperature;

use super::PhaseClass;
use crate::thermo::si::typed;

/// Which phase a state is in.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Hash)]
pub enum Pin {
    /// The one that is stable at the temperature.
    Stable,
    /// A phase of this class, whichever is stable at the temperature.
    Class(PhaseClass),
    /// This one, by its index, also past its transitions.
    Phase(usize),
}

/// Which side of a transition, or how far along it: the mass share of one of the two phases.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Side {
    /// The phase, by its index.
    pub phase: usize,
    /// Its mass share, 0 to 1.
    pub share: f64,
}

/// By how much data may be stretched, phase by phase.
#[derive(Debug, Clone, PartialEq, Default)]
pub struct Allowance {
    entries: Vec<(usize, f64, f64)>,
}

impl Allowance {
    /// Nothing may be stretched.
    #[inline]
    pub fn none() -> &'static Allowance {
        static NONE: Allowance = Allowance { entries: Vec::new() };
        &NONE
    }

    /// Lets the data of `phase` serve from `lo` to `hi` as well.
    #[must_use]
    pub fn allow(
        mut self,
        phase: usize,
        lo: ThermodynamicTemperature,
        hi: ThermodynamicTemperature,
    ) -> Allowance {
        self.entries.push((phase, lo.value, hi.value));
        self
    }

    /// Whether nothing may be stretched.
    #[inline]
    pub fn is_none(&self) -> bool {
        self.entries.is_empty()
    }

    /// The lowest temperature allowed for `phase`, or infinity.
    pub(super) fn lowest(&self, phase: usize) -> f64 {
        self.of(phase).fold(f64::INFINITY, |lowest, (lo, _)| lowest.min(lo))
    }

    /// The highest temperature allowed for `phase`, or minus infinity.
    pub(super) fn highest(&self, phase: usize) -> f64 {
        self.of(phase).fold(f64::NEG_INFINITY, |highest, (_, hi)| highest.max(hi))
    }

    fn of(&self, phase: usize) -> impl Iterator<Item = (f64, f64)> {
        self.entries.iter().filter(move |(known, _, _)| *known == phase).map(|&(_, lo, hi)| (lo, hi))
    }
}

/// A place on a heating curve. It belongs to the curve that gave it.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Place {
    pub(super) segment: usize,
    pub(super) temperature: f64,
    pub(super) share: f64,
    pub(super) extrapolated: bool,
}

impl Place {
    /// Its temperature.
    #[inline]
    pub fn temperature(self) -> ThermodynamicTemperature {
        typed(self.temperature)
    }

    /// Whether a datum is used outside its range here.
    #[inline]
    pub fn extrapolated(self) -> bool {
        self.extrapolated
    }
}

/// The phases present at a place, with their mass shares.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct PhaseShares {
    /// The only phase, or the lower one of a transition.
    pub lower: (usize, f64),
    /// The upper one of a transition.
    pub upper: Option<(usize, f64)>,
}

impl PhaseShares {
    /// The phases that are there, with their mass shares.
    pub fn present(self) -> impl Iterator<Item = (usize, f64)> {
        std::iter::once(self.lower).chain(self.upper).filter(|(_, share)| *share > 0.0)
    }

    /// The mass share of `phase`, by its index.
    pub fn share(self, phase: usize) -> f64 {
        self.present().filter(|(known, _)| *known == phase).fold(0.0, |sum, (_, share)| sum + share)
    }
}
