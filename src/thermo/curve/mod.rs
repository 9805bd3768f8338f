//! The heating curve of a species: enthalpy over temperature, through all its phases.
//!
//! In come phases in the order of heating, each with its laws, and what links them ([`CurveData`]); they are
//! checked once and laid out as segments - a law's range, a plateau, a piece of a melting range - on each of
//! which enthalpy is a constant plus an antiderivative. Out come a [`Place`] for a temperature, and from a
//! place its enthalpy, latent heat, heat capacity, volume and phases, and the legs of the
//! [route](HeatingCurve::route) between two places.
//!
//! A vapour-pressure law moves boiling with the pressure: the plateau then stands where the law has it, between the
//! same laws of liquid and gas, as far as their data reach; at 101.325 kPa it stands at the stated boiling point.
//!
//! Guaranteed: along the chain of linked phases enthalpy is continuous but for the plateaus; a place exists
//! only where data hold, or where an [`Allowance`] says that they may be stretched, and then it says so
//! itself; near a transition the side has to be named. Enthalpies are absolute (elements at 298.15 K are
//! zero) where a formation enthalpy is known, else they count from the lowest temperature.

mod assemble;
mod boiling;
mod check;
mod data;
mod error;
mod formation;
mod locate;
mod measure;
mod place;
mod properties;
mod route;
mod saturation;
mod segment;
mod track;

#[cfg(test)]
pub(in crate::thermo) mod tests;

pub use assemble::HeatingCurve;
pub use data::{CurveData, Density, LawRange, Link, PhaseClass, PhaseData};
pub use error::{CurveError, MeltingFault};
pub use locate::{LocateError, Locator};
pub(super) use measure::Measure;
pub use place::{Allowance, PhaseShares, Pin, Place, Side};
pub use properties::Transition;
pub use route::{Leg, LegKind};
pub use saturation::SaturationFault;
pub use track::Edge;
pub(super) use track::Track;
