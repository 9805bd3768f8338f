//! Statements, in the order of the sheet.

use super::{
    Datum, Duty, Expression, Interval, SpeciesBlock, SpeciesName, State, Step, Suffixes, Text, UnitText, Word,
};
use crate::span::Span;

/// A file as read: its statements in order.
#[derive(Debug, Clone, PartialEq, Default)]
pub struct Tree {
    /// The statements that could be read.
    pub items: Vec<Item>,
}

/// A statement at its place.
#[derive(Debug, Clone, PartialEq)]
pub struct Item {
    /// What it says.
    pub statement: Statement,
    /// All of it (of a block, its opening line).
    pub span: Span,
}

/// The statements of the language.
#[derive(Debug, Clone, PartialEq)]
#[allow(missing_docs)]
pub enum Statement {
    Head(Head),
    Remark(Text),
    Use(Use),
    Species(SpeciesBlock),
    Mixture(Mixture),
    Reaction(Reaction),
    Site(Datum, Suffixes),
    Input(Input),
    Correlate(Correlate),
    State(State),
    Step(Step),
    Duty(Duty),
    Balance(Balance),
    Settle(Settle),
    Result(ResultLine),
    Require(Require),
    Table(Table),
    Allow(Allow),
}

/// `sheet "title" { word "text" ... }`.
#[derive(Debug, Clone, PartialEq)]
pub struct Head {
    /// The title.
    pub title: Text,
    /// The entries.
    pub entries: Vec<(Word, Text)>,
}

/// `use Zn, Cu from metals`.
#[derive(Debug, Clone, PartialEq)]
pub struct Use {
    /// What is taken.
    pub names: Vec<SpeciesName>,
    /// From where.
    pub from: UseFrom,
}

/// A family of the library, or a file.
#[derive(Debug, Clone, PartialEq)]
#[allow(missing_docs)]
pub enum UseFrom {
    Family(Word),
    File(Text),
}

/// Which sort of input.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum InputRole {
    /// A design input.
    Basis,
    /// An input that a reviewer must agree to.
    Assume,
    /// A derived value.
    Let,
}

/// `basis`, `assume` or `let`.
#[derive(Debug, Clone, PartialEq)]
pub struct Input {
    /// Which.
    pub role: InputRole,
    /// The name.
    pub name: Word,
    /// The value.
    pub value: InputValue,
    /// What follows it.
    pub suffixes: Suffixes,
}

/// The value of an input.
#[derive(Debug, Clone, PartialEq)]
#[allow(clippy::large_enum_variant)] // the large one is the usual one
pub enum InputValue {
    /// `?`.
    Unknown(Span),
    /// An expression; of `basis` and `assume` a single literal.
    Expression(Expression),
}

/// `correlate a, b = 0.9`.
#[derive(Debug, Clone, PartialEq)]
pub struct Correlate {
    /// The two inputs.
    pub names: [Word; 2],
    /// The coefficient.
    pub coefficient: Datum,
}

/// `mixture air by mole { ... }`.
#[derive(Debug, Clone, PartialEq)]
pub struct Mixture {
    /// The name.
    pub name: Word,
    /// `mass`, `mole` or `volume`.
    pub by: Word,
    /// The portions.
    pub portions: Vec<Portion>,
    /// What follows.
    pub suffixes: Suffixes,
}

/// One species of a mixture.
#[derive(Debug, Clone, PartialEq)]
pub struct Portion {
    /// Which.
    pub species: SpeciesName,
    /// How much.
    pub share: PortionShare,
    /// All of it.
    pub span: Span,
}

/// How much of a species a mixture holds.
#[derive(Debug, Clone, PartialEq)]
#[allow(clippy::large_enum_variant)] // the large one is the usual one
pub enum PortionShare {
    /// What the others leave.
    Rest,
    /// A share.
    Share(Datum, Option<Interval>),
}

/// `reaction name: a A -> b B`.
#[derive(Debug, Clone, PartialEq)]
pub struct Reaction {
    /// The name.
    pub name: Word,
    /// The left side.
    pub reactants: Vec<Participant>,
    /// The right side.
    pub products: Vec<Participant>,
}

/// A species with its coefficient.
#[derive(Debug, Clone, PartialEq)]
pub struct Participant {
    /// The coefficient; one where unsaid.
    pub coefficient: f64,
    /// The species.
    pub species: SpeciesName,
}

/// `balance name { ... }`.
#[derive(Debug, Clone, PartialEq)]
pub struct Balance {
    /// The name.
    pub name: Word,
    /// The entries.
    pub entries: Vec<BalanceEntry>,
}

/// An entry of a balance.
#[derive(Debug, Clone, PartialEq)]
#[allow(missing_docs)]
pub enum BalanceEntry {
    In(Vec<Expression>),
    Out(Vec<Expression>),
    Datum(Expression),
    HeatingValues(Word),
}

/// `settle a within x to y so that ...`.
#[derive(Debug, Clone, PartialEq)]
pub struct Settle {
    /// What is sought.
    pub sought: Vec<Sought>,
    /// The equations.
    pub goals: Vec<(Expression, Expression)>,
}

/// An unknown with its bounds.
#[derive(Debug, Clone, PartialEq)]
pub struct Sought {
    /// The unknown.
    pub name: Word,
    /// From where to where.
    pub within: Option<(Expression, Expression)>,
}

/// `result name = expression in unit`.
#[derive(Debug, Clone, PartialEq)]
pub struct ResultLine {
    /// The name.
    pub name: Word,
    /// The value.
    pub value: Expression,
    /// The unit to show it in.
    pub display: Option<UnitText>,
}

/// A comparison sign.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
#[allow(missing_docs)]
pub enum Comparison {
    Less,
    AtMost,
    Greater,
    AtLeast,
}

/// What is required of a value.
#[derive(Debug, Clone, PartialEq)]
#[allow(clippy::large_enum_variant)] // a sheet has few of them
pub enum Requirement {
    /// `<= limit` and its like.
    Compared(Comparison, Expression),
    /// `within a to b`.
    Within(Expression, Expression),
}

/// `require value <= limit because "..."`.
#[derive(Debug, Clone, PartialEq)]
pub struct Require {
    /// The value.
    pub value: Expression,
    /// What is required.
    pub requirement: Requirement,
    /// Why.
    pub because: Option<Text>,
    /// From the value to the limit.
    pub condition: Span,
}

/// A column of a table.
#[derive(Debug, Clone, PartialEq)]
pub struct Column {
    /// The value.
    pub value: Expression,
    /// The unit to show it in.
    pub display: Option<UnitText>,
}

/// `table "title": columns over input from a to b by c`.
#[derive(Debug, Clone, PartialEq)]
pub struct Table {
    /// The title.
    pub title: Text,
    /// The columns.
    pub columns: Vec<Column>,
    /// The input that is varied.
    pub over: Word,
    /// The first value.
    pub from: Expression,
    /// The last value.
    pub to: Expression,
    /// The step.
    pub by: Expression,
}

/// `allow Zn(l) to 1250 K because "..."`.
#[derive(Debug, Clone, PartialEq)]
pub struct Allow {
    /// The species and its phase.
    pub species: SpeciesName,
    /// The lower end.
    pub from: Option<Datum>,
    /// The upper end.
    pub to: Option<Datum>,
    /// Why.
    pub because: Option<Text>,
}
