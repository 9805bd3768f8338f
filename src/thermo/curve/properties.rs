//! What a place on the curve says.

use uom::si::f64::{
    AvailableEnergy, MolarMass, Pressure, SpecificHeatCapacity, SpecificVolume, ThermodynamicTemperature,
};

use super::assemble::{HeatingCurve, Phase};
use super::data::PhaseClass;
use super::place::{PhaseShares, Place};
use super::segment::{Body, Segment};
use crate::thermo::constants::{GAS_CONSTANT, STANDARD_ATMOSPHERE};
use crate::thermo::si::typed;

/// A transition of the curve.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Transition {
    /// The phase below it, by its index; the one above is the next.
    pub lower: usize,
    /// Where it begins.
    pub from: ThermodynamicTemperature,
    /// Where it ends; the same unless it is a melting range.
    pub to: ThermodynamicTemperature,
    /// What it takes.
    pub latent: AvailableEnergy,
}

impl HeatingCurve {
    /// Enthalpy at a place, at 101.325 kPa. Absolute when [`HeatingCurve::absolute`].
    #[inline]
    pub fn enthalpy(&self, place: Place) -> AvailableEnergy {
        let Some(segment) = self.segments.get(place.segment) else { return typed(f64::NAN) };
        typed(match segment.body {
            Body::Plateau { link, .. } if place.temperature != segment.lo => {
                let (below, above) = self.enthalpies_beside(link, place.temperature);
                below + place.share * (above - below)
            }
            _ => segment.enthalpy(place.temperature, place.share),
        })
    }

    /// Latent heat passed from the first phase of the place's chain up to the place, boiling where it is at
    /// 101.325 kPa.
    #[inline]
    pub fn latent(&self, place: Place) -> AvailableEnergy {
        let segment = self.segments.get(place.segment);
        typed(segment.map_or(f64::NAN, |segment| segment.latent_at(place.temperature, place.share)))
    }

    /// cp at a place, the latent heat of a melting range left out; none on a plateau.
    #[inline]
    pub fn heat_capacity(&self, place: Place) -> Option<SpecificHeatCapacity> {
        let cp = self.segments.get(place.segment)?.cp(place.temperature);
        cp.is_finite().then(|| typed(cp))
    }

    /// `∫ cp/T dT` between two places of one phase; none when they are not.
    pub fn entropy_increment(&self, from: Place, to: Place) -> Option<SpecificHeatCapacity> {
        let (a, b) = (self.segments.get(from.segment)?, self.segments.get(to.segment)?);
        match (&a.body, &b.body) {
            (Body::Range { phase: first, .. }, Body::Range { phase: second, .. }) if first == second => {
                Some(typed(b.entropy(to.temperature) - a.entropy(from.temperature)))
            }
            _ => None,
        }
    }

    /// Volume per mass at a place: `R T/(M p)` for a gas, one over the density else, by mass share between
    /// two phases. None when a gas has no molar mass or a condensed phase no density.
    #[inline]
    pub fn specific_volume(&self, place: Place, pressure: Pressure) -> Option<SpecificVolume> {
        let PhaseShares { lower, upper } = self.phases_at(place);
        let part = |(phase, share): (usize, f64)| {
            Some(share * self.phase_volume(self.phases.get(phase)?, place.temperature, pressure.value)?)
        };
        let sum = match upper {
            Some(upper) => part(lower)? + part(upper)?,
            None => part(lower)?,
        };
        Some(typed(sum))
    }

    /// What pressure adds to the enthalpy of the condensed phases at a place: `v (p - 101.325 kPa)`, their
    /// volume taken as the same at every pressure. A gas adds nothing; none when a condensed phase has no
    /// density.
    #[inline]
    pub fn condensed_pressure_enthalpy(&self, place: Place, pressure: Pressure) -> Option<AvailableEnergy> {
        let volume = self.condensed_volume(place)?;
        Some(typed(volume * (pressure.value - STANDARD_ATMOSPHERE)))
    }

    /// Internal energy at a place: enthalpy less `R T/M` for a gas, less `v · 101.325 kPa` for a condensed
    /// phase, whose volume is neglected where it has no density. None when a gas has no molar mass.
    pub fn internal_energy(&self, place: Place) -> Option<AvailableEnergy> {
        let segment = self.segments.get(place.segment)?;
        let less = self.flow_work(segment, place.temperature, place.share);
        less.is_finite().then(|| typed(self.enthalpy(place).value - less))
    }

    /// The phases present at a place, with their mass shares.
    #[inline]
    pub fn phases_at(&self, place: Place) -> PhaseShares {
        let body = self.segments.get(place.segment).map(|segment| &segment.body);
        match body {
            Some(Body::Plateau { link, .. } | Body::Melting { link, .. }) => {
                PhaseShares { lower: (*link, 1.0 - place.share), upper: Some((link + 1, place.share)) }
            }
            Some(Body::Range { phase, .. }) => PhaseShares { lower: (*phase, 1.0), upper: None },
            None => PhaseShares { lower: (usize::MAX, f64::NAN), upper: None },
        }
    }

    /// How many phases the curve has.
    pub fn phase_count(&self) -> usize {
        self.phases.len()
    }

    /// The mass share of the phases of a class at a place.
    pub fn class_share(&self, place: Place, class: PhaseClass) -> f64 {
        let of_class = |(phase, _): &(usize, f64)| self.phase_class(*phase) == Some(class);
        self.phases_at(place).present().filter(of_class).fold(0.0, |sum, (_, share)| sum + share)
    }

    /// Whether a phase is solid, liquid or gas.
    pub fn phase_class(&self, phase: usize) -> Option<PhaseClass> {
        self.phases.get(phase).map(|phase| phase.class)
    }

    /// The temperatures between which a phase has data.
    pub fn phase_span(&self, phase: usize) -> Option<(ThermodynamicTemperature, ThermodynamicTemperature)> {
        self.phases.get(phase).map(|phase| (typed(phase.lo), typed(phase.hi)))
    }

    /// Whether a phase has a density.
    pub fn has_density(&self, phase: usize) -> bool {
        self.phases.get(phase).is_some_and(|phase| phase.density.is_some())
    }

    /// The transition of a link; none where the phases are apart.
    pub fn transition(&self, link: usize) -> Option<Transition> {
        let joint = self.joints.get(link)?;
        let (from, to) = joint.span?;
        Some(Transition { lower: link, from: typed(from), to: typed(to), latent: typed(joint.latent) })
    }

    /// The temperature above which the species decomposes.
    pub fn decomposes_at(&self) -> Option<ThermodynamicTemperature> {
        self.decomposes_at.map(typed)
    }

    /// The molar mass that the curve was built with.
    pub fn molar_mass(&self) -> Option<MolarMass> {
        self.molar_mass
    }

    fn phase_volume(&self, phase: &Phase, t: f64, pressure: f64) -> Option<f64> {
        match (phase.class, &phase.density) {
            (PhaseClass::Gas, _) => self.molar_mass.map(|mass| GAS_CONSTANT * t / (mass.value * pressure)),
            (_, Some(density)) => Some(1.0 / density.value(t)),
            (_, None) => None,
        }
    }

    fn condensed_volume(&self, place: Place) -> Option<f64> {
        let mut sum = 0.0;
        for (phase, share) in self.phases_at(place).present() {
            let phase = self.phases.get(phase)?;
            if phase.class != PhaseClass::Gas {
                sum += share / phase.density.as_ref()?.value(place.temperature);
            }
        }
        Some(sum)
    }

    /// The condensed phases' volume in m³/kg, zero for one without density, at a state of a segment.
    pub(super) fn incompressible_volume(&self, segment: &Segment, t: f64, share: f64) -> f64 {
        self.over_phases(segment, t, share, |phase| match (&phase.density, phase.class) {
            (_, PhaseClass::Gas) | (None, _) => 0.0,
            (Some(density), _) => 1.0 / density.value(t),
        })
    }

    /// What separates enthalpy at 101.325 kPa from internal energy, in J/kg.
    pub(super) fn flow_work(&self, segment: &Segment, t: f64, share: f64) -> f64 {
        let gas = self.molar_mass.map_or(f64::NAN, |mass| GAS_CONSTANT / mass.value);
        self.over_phases(segment, t, share, |phase| match (&phase.density, phase.class) {
            (_, PhaseClass::Gas) => gas * t,
            (None, _) => 0.0,
            (Some(density), _) => STANDARD_ATMOSPHERE / density.value(t),
        })
    }

    /// A property of the phases present, by mass share; `share` counts on a plateau only.
    #[inline]
    fn over_phases(&self, segment: &Segment, t: f64, share: f64, of: impl Fn(&Phase) -> f64) -> f64 {
        let (lower, share) = match &segment.body {
            Body::Range { phase, .. } => return self.phases.get(*phase).map_or(f64::NAN, of),
            Body::Plateau { link, .. } => (*link, share),
            Body::Melting { link, melting } => (*link, melting.share_at(t - segment.lo)),
        };
        let part = |phase: usize, share: f64| {
            if share == 0.0 {
                0.0
            } else {
                self.phases.get(phase).map_or(f64::NAN, |phase| share * of(phase))
            }
        };
        part(lower, 1.0 - share) + part(lower + 1, share)
    }
}
