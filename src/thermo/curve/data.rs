//! What a heating curve is built from.

use uom::si::f64::{AvailableEnergy, MassDensity, MolarMass, ThermodynamicTemperature};

use crate::numeric::Formula;
use crate::thermo::{HeatCapacity, VapourPressure};

/// Solid, liquid or gas; the order is that of heating.
#[derive(Debug, Clone, Copy, PartialEq, Eq, PartialOrd, Ord, Hash)]
pub enum PhaseClass {
    /// Condensed, with a shape.
    Solid,
    /// Condensed, without one.
    Liquid,
    /// Taken as ideal.
    Gas,
}

/// A law with the temperatures between which it holds.
#[derive(Debug, Clone, PartialEq)]
pub struct LawRange {
    /// Lowest temperature.
    pub lo: ThermodynamicTemperature,
    /// Highest temperature.
    pub hi: ThermodynamicTemperature,
    /// The law.
    pub law: HeatCapacity,
}

/// Density of a condensed phase.
#[derive(Debug, Clone, PartialEq)]
pub enum Density {
    /// The same at every temperature.
    Constant(MassDensity),
    /// A formula of T in K that gives kg/m³.
    Formula(Formula),
}

impl Density {
    /// In kg/m³ at `t` in K.
    #[inline]
    pub(crate) fn value(&self, t: f64) -> f64 {
        match self {
            Density::Constant(density) => density.value,
            Density::Formula(formula) => formula.eval(t),
        }
    }
}

/// One phase of a species.
#[derive(Debug, Clone, PartialEq)]
pub struct PhaseData {
    /// Its name, such as `liquid` or `gamma`.
    pub name: String,
    /// What it is.
    pub class: PhaseClass,
    /// Its laws, by rising temperature, one touching the next.
    pub ranges: Vec<LawRange>,
    /// Its density, of use for a solid or a liquid.
    pub density: Option<Density>,
    /// Its own formation enthalpy at 298.15 K.
    pub formation: Option<AvailableEnergy>,
}

/// What stands between a phase and the next.
#[derive(Debug, Clone, PartialEq)]
pub enum Link {
    /// A transition at one temperature.
    At {
        /// Where it is.
        temperature: ThermodynamicTemperature,
        /// What it takes.
        latent: AvailableEnergy,
    },
    /// A transition at one temperature whose latent heat follows from the formation enthalpies of both
    /// phases.
    AtFromFormations {
        /// Where it is.
        temperature: ThermodynamicTemperature,
    },
    /// Melting over a range.
    Over {
        /// Where it begins: no liquid.
        from: ThermodynamicTemperature,
        /// Where it ends: all liquid.
        to: ThermodynamicTemperature,
        /// What it takes altogether.
        latent: AvailableEnergy,
        /// Points `(temperature, share of the upper phase)` between which the share rises in straight lines,
        /// from 0 at `from` to 1 at `to`; empty for one straight line.
        along: Vec<(ThermodynamicTemperature, f64)>,
    },
    /// No transition: the next phase has its own formation enthalpy and is reached by its state symbol alone.
    Apart,
}

/// A species as a heating curve: phases in the order in which they appear on heating.
#[derive(Debug, Clone, PartialEq)]
pub struct CurveData {
    /// The phases.
    pub phases: Vec<PhaseData>,
    /// What stands between them, one fewer than phases.
    pub links: Vec<Link>,
    /// Formation enthalpy at 298.15 K of the phase that is stable there.
    pub formation: Option<AvailableEnergy>,
    /// Temperature above which the species decomposes.
    pub decomposes_at: Option<ThermodynamicTemperature>,
    /// The vapour pressure of the liquid that boils.
    pub vapour_pressure: Option<VapourPressure>,
    /// Molar mass, of use for gas volumes.
    pub molar_mass: Option<MolarMass>,
}
