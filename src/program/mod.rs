//! The checked sheet.
//!
//! In comes what the checker has established; out goes a [`Program`]: ids in place of names, every expression with
//! its dimension and kind, every value in SI, every species with its heating curve built. The Program keeps the
//! span of everything, so that a failure at run time carries an index and becomes a place only when shown. It
//! holds no text of the language beyond names, units as written and sources.
//!
//! Guaranteed: every id is in range, every expression is of the dimension that its place wants, and every unknown
//! is settled by exactly one step.

mod expr;
mod ids;
mod quantity;
mod sheet;
mod species;
mod state;
mod step;

pub use expr::{DutyMember, Expr, Function, Node, StateMember, StepMember};
pub use ids::{DutyId, QuantityId, SpeciesId, StateId, StepId};
pub use quantity::{Interval, IntervalShape, Quantity, Role};
pub use sheet::{
    Column, Comparison, Duty, Entry, Head, Limit, MixtureNote, Program, Remark, Requirement, Site, Table,
};
pub use species::{Allowance, Datum, DatumKind, PhaseInfo, Species};
pub use state::{Condition, Constituent, Portion, Quantum, Source, State};
pub use step::{Heat, Law, Path, Settles, Step, Unknown};
