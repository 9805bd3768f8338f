//! The syntax tree: what a sheet says, with places, before anything is known about it.
//!
//! In comes nothing but text (through `parse_sheet`); out goes a [`Tree`] that keeps every number and unit as
//! written. No name is resolved, no unit read, no dimension known.

mod expression;
mod quantity;
mod species;
mod statement;

pub use expression::{Expression, ExpressionKind, Factor, Subject};
pub use quantity::{Datum, Interval, IntervalMark, Literal, Spread, Suffixes, Text, UnitText, Word};
pub use species::{
    Coefficient, CoefficientForm, HeatCapacityEntry, LawText, PhaseBlock, PhaseEntry, Row, SpeciesBlock,
    SpeciesEntry, SpeciesName, TransitionEntry, TransitionKind, TransitionPlace, VapourPressure,
};
pub use statement::{
    Allow, Balance, BalanceEntry, Clause, ClauseKind, Column, Comparison, Condition, ConditionKind,
    Conversion, Correlate, Duty, DutyClause, Head, Input, InputRole, InputValue, Item, Matter, MatterKind,
    Mixture, Part, Participant, Portion, PortionShare, Reaction, Require, Requirement, ResultLine, Settle,
    Sought, State, Statement, Step, Table, Tree, Use, UseFrom,
};
