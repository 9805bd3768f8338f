//! The lowering: one file per construct.

mod builder;
mod duty;
mod expr;
mod matter;
mod member;
mod settle;
mod state;
mod step;
mod table;

use super::{Plan, SlotMap};
use crate::program::{Program, StateId, StepId};
use builder::Builder;

/// A lowered sheet.
#[derive(Debug, Clone, PartialEq)]
pub struct Lowered {
    /// The operations.
    pub plan: Plan,
    /// Which slot holds what.
    pub map: SlotMap,
}

/// Lowers a Program.
///
/// # Errors
/// The step, and the state whose unknown it settles, where unknowns wait for each other in a circle.
pub fn lower(program: &Program) -> Result<Lowered, (StepId, StateId)> {
    Builder::new(program).lower()
}
