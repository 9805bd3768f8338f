//! Species blocks as written.

use super::{Datum, Expression, Suffixes, Text, Word};
use crate::span::Span;

/// A species, mixture or state as named: `Zn`, `H2O(g)`.
#[derive(Debug, Clone, PartialEq, Eq)]
pub struct SpeciesName {
    /// The word or formula.
    pub name: String,
    /// The state symbol that touches it.
    pub symbol: Option<Word>,
    /// All of it.
    pub span: Span,
}

impl SpeciesName {
    /// As written.
    pub fn to_text(&self) -> String {
        match &self.symbol {
            Some(symbol) => format!("{}({})", self.name, symbol.text),
            None => self.name.clone(),
        }
    }
}

/// A `species` block.
#[derive(Debug, Clone, PartialEq)]
pub struct SpeciesBlock {
    /// Its name.
    pub name: Word,
    /// The plain name in quotes.
    pub label: Option<Text>,
    /// The entries in order.
    pub entries: Vec<SpeciesEntry>,
    /// The opening line.
    pub head: Span,
    /// Whether something in it could not be read, so that what is missing is not missed twice.
    pub damaged: bool,
}

/// An entry of a species block.
#[derive(Debug, Clone, PartialEq)]
pub enum SpeciesEntry {
    /// `formula Zn`.
    Formula(Word),
    /// `source "..."`.
    Source(Text),
    /// `formation 0 kJ/mol at 298.15 K`.
    Formation(LawText<Datum>, Datum),
    /// `cas "7440-66-6"`.
    Cas(Text),
    /// `molar_mass 65.39 g/mol`.
    MolarMass(LawText<Datum>),
    /// `phase solid { ... }`.
    Phase(PhaseBlock),
    /// `melting at ...`.
    Transition(TransitionEntry),
    /// `vapour_pressure antoine { ... }`.
    VapourPressure(VapourPressure),
    /// `decomposes at 1172 K`.
    Decomposes(LawText<Datum>),
    /// A remark.
    Remark(Text),
}

/// Something said of a species, with what follows it.
#[derive(Debug, Clone, PartialEq)]
pub struct LawText<T> {
    /// What is said.
    pub value: T,
    /// Interval, source, spread.
    pub suffixes: Suffixes,
    /// The whole entry.
    pub span: Span,
}

/// A `phase` block.
#[derive(Debug, Clone, PartialEq)]
pub struct PhaseBlock {
    /// Its name.
    pub name: Word,
    /// `is solid`.
    pub class: Option<Word>,
    /// The entries in order.
    pub entries: Vec<PhaseEntry>,
    /// The opening line.
    pub head: Span,
    /// Whether something in it could not be read, so that what is missing is not missed twice.
    pub damaged: bool,
}

/// An entry of a phase block.
#[derive(Debug, Clone, PartialEq)]
pub enum PhaseEntry {
    /// `cp ...`, `enthalpy table ...` or `mean_cp ...`.
    HeatCapacity(LawText<HeatCapacityEntry>),
    /// `density ...`, with its range.
    Density(LawText<(Expression, Option<(Datum, Datum)>)>),
    /// The phase's own formation enthalpy.
    Formation(LawText<Datum>, Datum),
    /// `source "..."`.
    Source(Text),
    /// A remark.
    Remark(Text),
}

/// How the heat capacity of a range is given.
#[derive(Debug, Clone, PartialEq)]
pub struct HeatCapacityEntry {
    /// The form.
    pub form: CoefficientForm,
    /// `for A to B`.
    pub range: Option<(Datum, Datum)>,
}

/// The forms of heat-capacity data.
#[derive(Debug, Clone, PartialEq)]
pub enum CoefficientForm {
    /// A formula in `T`.
    Formula(Expression),
    /// A published form by name with its coefficients.
    Published(Word, Vec<Coefficient>),
    /// `table { ... }`, with whether it is `linear`.
    Table(Vec<Row>, bool),
    /// `enthalpy table from T { ... }`.
    EnthalpyTable(Datum, Vec<Row>),
    /// `mean_cp from T table { ... }`.
    MeanTable(Datum, Vec<Row>),
}

/// `a1 = -62518.1143`.
#[derive(Debug, Clone, PartialEq)]
pub struct Coefficient {
    /// Its name.
    pub name: Word,
    /// Its value.
    pub value: Datum,
}

/// `300 K 25.1 J/(mol K)`.
#[derive(Debug, Clone, PartialEq)]
pub struct Row {
    /// The first number.
    pub at: Datum,
    /// The second.
    pub value: Datum,
}

/// Which transition.
#[derive(Debug, Clone, PartialEq)]
pub enum TransitionKind {
    /// `melting`, `boiling` or `sublimation`.
    Named(Word),
    /// `transition alpha to gamma`.
    Between(Word, Word),
}

/// Where it takes place.
#[derive(Debug, Clone, PartialEq)]
pub enum TransitionPlace {
    /// `at T`.
    At(Datum),
    /// `over T1 to T2`.
    Over(Datum, Datum),
}

/// A transition line.
#[derive(Debug, Clone, PartialEq)]
pub struct TransitionEntry {
    /// Which.
    pub kind: TransitionKind,
    /// Where.
    pub place: TransitionPlace,
    /// `takes`.
    pub takes: Option<Datum>,
    /// `along { ... }`.
    pub along: Option<Vec<Row>>,
    /// Interval, source, spread.
    pub suffixes: Suffixes,
    /// The whole line.
    pub span: Span,
}

/// A vapour-pressure law.
#[derive(Debug, Clone, PartialEq)]
pub struct VapourPressure {
    /// `antoine` or `wagner`.
    pub form: Word,
    /// The coefficients.
    pub coefficients: Vec<Coefficient>,
    /// `for A to B`.
    pub range: Option<(Datum, Datum)>,
    /// Interval, source, spread.
    pub suffixes: Suffixes,
    /// The whole line.
    pub span: Span,
}
