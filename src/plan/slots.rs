//! Which slot holds what, and where each operation comes from.

use super::{PlaceSlot, Slot};
use crate::program::{DutyId, StateId, StepId, Unknown};
use crate::span::Span;
use std::collections::BTreeMap;

/// What an operation was made for.
#[derive(Debug, Clone, PartialEq)]
pub enum OriginKind {
    /// An expression.
    Expression,
    /// A state, and of its constituents the one of this index.
    State(StateId, usize),
    /// A step.
    Step(StepId),
    /// What a step conserves: the name of a species, or of an element.
    Conserved(StepId, String),
    /// A step that settles an unknown of a state.
    Settle(StepId, StateId, Unknown),
    /// A duty.
    Duty(DutyId),
}

/// Where an operation comes from.
#[derive(Debug, Clone, PartialEq)]
pub struct Origin {
    /// Its place in the sheet.
    pub span: Span,
    /// What it was made for.
    pub kind: OriginKind,
}

/// The slots of a state.
#[derive(Debug, Clone, PartialEq)]
pub struct StateSlots {
    /// Its temperature.
    pub temperature: Slot,
    /// Its pressure.
    pub pressure: Slot,
    /// Its mass.
    pub mass: Slot,
    /// Its amount of substance, where every species has a molar mass.
    pub amount: Option<Slot>,
    /// Its enthalpy.
    pub enthalpy: Slot,
    /// The masses of its constituents.
    pub masses: Vec<Slot>,
    /// The materials of its constituents.
    pub materials: Vec<u32>,
    /// The places of its constituents.
    pub places: Vec<PlaceSlot>,
    /// Whether the temperature was settled, here or where it is taken from.
    pub settled: bool,
}

/// The slots of a step.
#[derive(Debug, Clone, PartialEq)]
pub struct StepSlots {
    /// ΔH.
    pub enthalpy_change: Slot,
    /// ΔU.
    pub internal_energy_change: Slot,
    /// ΔV, volumes without density neglected.
    pub volume_change: Slot,
    /// Q, with a path.
    pub heat: Option<Slot>,
    /// W, with a path.
    pub work: Option<Slot>,
    /// Q and the losses, with a path.
    pub supply: Option<Slot>,
    /// The heat lost.
    pub losing: Option<Slot>,
    /// The work that ends in the matter.
    pub working: Option<Slot>,
}

/// The slots of a duty.
#[derive(Debug, Clone, PartialEq)]
pub struct DutySlots {
    /// What the matter takes.
    pub useful: Slot,
    /// Useful over efficiency.
    pub supplied: Slot,
}

/// The slots of a requirement.
#[derive(Debug, Clone, PartialEq)]
pub struct LimitSlots {
    /// The value.
    pub value: Slot,
    /// The limits.
    pub limits: Vec<Slot>,
}

/// The slots of a table.
#[derive(Debug, Clone, PartialEq)]
pub struct TableSlots {
    /// The input that is varied.
    pub over: Slot,
    /// First, last and step.
    pub bounds: [Slot; 3],
    /// The columns.
    pub columns: Vec<Slot>,
}

/// Which slot holds what.
#[derive(Debug, Clone, PartialEq, Default)]
pub struct SlotMap {
    /// The site's atmosphere.
    pub atmosphere: Option<Slot>,
    /// The named quantities.
    pub quantities: Vec<Slot>,
    /// The states.
    pub states: Vec<StateSlots>,
    /// The steps.
    pub steps: Vec<StepSlots>,
    /// The duties.
    pub duties: Vec<DutySlots>,
    /// The requirements.
    pub requirements: Vec<LimitSlots>,
    /// The tables.
    pub tables: Vec<TableSlots>,
    /// The members of states and steps, `cold.V` or `heat_up.latent`, by their places in the sheet.
    pub members: BTreeMap<Span, Slot>,
    /// The origins of the operations.
    pub origins: Vec<Origin>,
}
