//! Why a heating curve cannot be built, as indices of phases, ranges and links.

use uom::si::f64::{AvailableEnergy, ThermodynamicTemperature};

use super::saturation::SaturationFault;

/// What is wrong with the data of a species.
#[derive(Debug, Clone, Copy, PartialEq)]
#[allow(missing_docs)]
pub enum CurveError {
    /// No phase at all.
    NoPhase,
    /// The links are not one fewer than the phases.
    LinkCount { phases: usize, links: usize },
    /// A phase without a heat capacity law.
    NoLaw { phase: usize },
    /// A range that does not rise, or does not lie above 0 K.
    EmptyRange { phase: usize, range: usize },
    /// A gap between this range and the one before it.
    Gap { phase: usize, range: usize, from: ThermodynamicTemperature, to: ThermodynamicTemperature },
    /// This range begins before the one before it ends.
    Overlap { phase: usize, range: usize, from: ThermodynamicTemperature, to: ThermodynamicTemperature },
    /// A table that ends inside its range.
    TableShort { phase: usize, range: usize, lo: ThermodynamicTemperature, hi: ThermodynamicTemperature },
    /// A phase whose laws do not reach the transition.
    RangeShort {
        phase: usize,
        link: usize,
        reaches: ThermodynamicTemperature,
        transition: ThermodynamicTemperature,
    },
    /// A transition that does not lie above the one before it.
    TransitionOrder { link: usize, temperature: ThermodynamicTemperature, before: ThermodynamicTemperature },
    /// A transition temperature that is no temperature.
    TransitionTemperature { link: usize },
    /// A transition on heating from liquid to solid, from gas to either, or from gas to gas.
    ClassOrder { link: usize },
    /// A latent heat that is not positive.
    LatentSign { link: usize, latent: AvailableEnergy },
    /// A melting range that cannot be.
    MeltingRange { link: usize, fault: MeltingFault },
    /// A transition or a phase that rests on a formation enthalpy which is not given.
    FormationMissing { phase: usize },
    /// The species' formation enthalpy belongs to no phase: none is stable at 298.15 K within its data.
    FormationUnplaced,
    /// A phase's own formation enthalpy, while its laws do not reach 298.15 K.
    FormationOutside { phase: usize },
    /// The species' formation enthalpy and the phase's own for one phase.
    FormationTwice { phase: usize },
    /// The latent heats up to this phase contradict its own formation enthalpy by more than 1 % of the last
    /// of them.
    LatentContradiction { phase: usize, given: AvailableEnergy, follows: AvailableEnergy },
    /// A heat capacity that is not a positive number somewhere in its range.
    HeatCapacityNotPositive { phase: usize, range: usize, temperature: ThermodynamicTemperature },
    /// A density that is not a positive number somewhere in its phase.
    DensityNotPositive { phase: usize, temperature: ThermodynamicTemperature },
    /// A molar mass that is not positive.
    MolarMass,
    /// A vapour-pressure law that does not fit the curve.
    VapourPressure(SaturationFault),
    /// A decomposition temperature below all data.
    DecompositionOrder { temperature: ThermodynamicTemperature },
}

/// What is wrong with a melting range.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum MeltingFault {
    /// It does not rise.
    Ends,
    /// Its points do not begin with 0 at its lower end and finish with 1 at its upper.
    Corners,
    /// A point, by its place, that does not lie above the one before it, or whose share falls.
    Order {
        /// Its place.
        at: usize,
    },
    /// It ends in a gas.
    Gas,
}
