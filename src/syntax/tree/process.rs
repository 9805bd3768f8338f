//! States, steps and duties as written.

use super::{Expression, SpeciesName, Word};
use crate::span::Span;

/// `state name = matter after ... at ...`.
#[derive(Debug, Clone, PartialEq)]
pub struct State {
    /// The name.
    pub name: Word,
    /// What it is made of.
    pub matter: Matter,
    /// The reactions.
    pub after: Vec<Conversion>,
    /// The conditions.
    pub conditions: Vec<Condition>,
}

/// Something that has mass.
#[derive(Debug, Clone, PartialEq)]
pub struct Matter {
    /// What it is.
    pub kind: MatterKind,
    /// Its place.
    pub span: Span,
}

/// The phases that a part keeps.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
#[allow(missing_docs)]
pub enum Part {
    Solids,
    Liquids,
    Gases,
}

/// The kinds of matter.
#[derive(Debug, Clone, PartialEq)]
pub enum MatterKind {
    /// A state by name (or a species without an amount, which is refused).
    Named(SpeciesName),
    /// `AMOUNT of MATERIAL`; `None` is an amount `?`.
    Measured(Option<Expression>, Box<Matter>),
    /// `solids of s`.
    Parted(Part, Word),
    /// `a + b`.
    Sum(Vec<Matter>),
}

/// `combustion 96 % of CH4`, or `combustion complete`.
#[derive(Debug, Clone, PartialEq)]
pub struct Conversion {
    /// The reaction.
    pub reaction: Word,
    /// The share and of what; `None` is complete.
    pub extent: Option<(Expression, SpeciesName)>,
}

/// A condition at its place.
#[derive(Debug, Clone, PartialEq)]
pub struct Condition {
    /// What it says.
    pub kind: ConditionKind,
    /// Its place.
    pub span: Span,
}

/// The kinds of condition.
#[derive(Debug, Clone, PartialEq)]
pub enum ConditionKind {
    /// `?`.
    Unknown,
    /// A temperature or a pressure.
    Value(Expression),
    /// `40 % liquid`.
    Share(Expression, Word),
    /// `saturated vapour`.
    Saturated(Word),
    /// `CH3OH in equilibrium`.
    Equilibrium(SpeciesName),
}

/// `step name: a + b -> c, clauses`.
#[derive(Debug, Clone, PartialEq)]
pub struct Step {
    /// The name.
    pub name: Word,
    /// The states at the start.
    pub from: Vec<Word>,
    /// The states at the end.
    pub to: Vec<Word>,
    /// The clauses.
    pub clauses: Vec<Clause>,
}

/// A clause at its place.
#[derive(Debug, Clone, PartialEq)]
pub struct Clause {
    /// What it says.
    pub kind: ClauseKind,
    /// Its place.
    pub span: Span,
}

/// The clauses of a step.
#[derive(Debug, Clone, PartialEq)]
#[allow(missing_docs)]
pub enum ClauseKind {
    ConstantTemperatureAndPressure,
    ConstantPressure,
    ConstantVolume,
    IsothermalReversible,
    AdiabaticReversible,
    NoShaftWork,
    Throttled,
    Adiabatic,
    Taking(Expression),
    Losing(Expression),
    Working(Expression),
    IsentropicEfficiency(Expression),
}

/// `duty name = expression, clauses`.
#[derive(Debug, Clone, PartialEq)]
pub struct Duty {
    /// The name.
    pub name: Word,
    /// The heat.
    pub value: Expression,
    /// The clauses.
    pub clauses: Vec<DutyClause>,
}

/// The clauses of a duty.
#[derive(Debug, Clone, PartialEq)]
#[allow(missing_docs)]
pub enum DutyClause {
    Over(Expression),
    Efficiency(Expression),
    Carried(Word),
}
