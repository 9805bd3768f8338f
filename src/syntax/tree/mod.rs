//! The syntax tree: what a sheet says, with places, before anything is known about it.
//!
//! In comes nothing but text (through `parse_sheet`); out goes a [`Tree`] that keeps every number and unit as
//! written. No name is resolved, no unit read, no dimension known.

mod expression;
mod process;
mod quantity;
mod species;
mod statement;

pub use expression::{Expression, ExpressionKind, Factor, Subject};
pub use process::{
    Clause, ClauseKind, Condition, ConditionKind, Conversion, Duty, DutyClause, Matter, MatterKind, Part,
    State, Step,
};
pub use quantity::{Datum, Interval, IntervalMark, Literal, Spread, Suffixes, Text, UnitText, Word};
pub use species::{
    Coefficient, CoefficientForm, HeatCapacityEntry, LawText, PhaseBlock, PhaseEntry, Row, SpeciesBlock,
    SpeciesEntry, SpeciesName, TransitionEntry, TransitionKind, TransitionPlace, VapourPressure,
};
pub use statement::{
    Allow, Balance, BalanceEntry, Column, Comparison, Correlate, Head, Input, InputRole, InputValue, Item,
    Mixture, Participant, Portion, PortionShare, Reaction, Require, Requirement, ResultLine, Settle, Sought,
    Statement, Table, Tree, Use, UseFrom,
};
