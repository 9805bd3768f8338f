//! What the checker knows of names, materials and files.

use crate::program::{Constituent, DutyId, QuantityId, Species, SpeciesId, StateId, StepId};
use crate::span::Span;

/// What a name stands for.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub(super) enum Entity {
    Quantity(QuantityId),
    State(StateId),
    Step(StepId),
    Duty(DutyId),
    /// Declared, but not usable: its mistake is already reported.
    Broken,
}

/// What a material's name stands for.
#[derive(Debug, Clone, PartialEq)]
pub(super) enum Material {
    Species(SpeciesId),
    /// A mixture: species with phase and share by mass.
    Mixture(Blend),
    Broken,
}

/// A declared thing and where.
#[derive(Debug, Clone, PartialEq)]
pub(super) struct Declared<T> {
    pub(super) what: T,
    pub(super) span: Span,
}

/// A mixture: its constituents with their shares by mass.
#[derive(Debug, Clone, PartialEq)]
pub(super) struct Blend {
    pub(super) portions: Vec<(Constituent, f64)>,
}

/// The species of a file, or `None` where the file is at fault and that is reported.
pub(super) type FileSpecies = Option<Vec<Species>>;

/// What a published form says of its absolute enthalpy by its own constant.
#[derive(Debug, Clone, Copy)]
pub(super) struct Claim {
    /// The entry.
    pub(super) span: Span,
    /// A temperature in its range, K.
    pub(super) kelvin: f64,
    /// The enthalpy there, J/mol.
    pub(super) enthalpy: f64,
}
