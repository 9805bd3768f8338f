//! The sheet as a whole.

use super::{DutyId, Expr, Quantity, QuantityId, Species, SpeciesId, State, StateId, Step, StepId};
use crate::span::Span;
use crate::units::Unit;

/// The head.
#[derive(Debug, Clone, PartialEq, Eq, Default)]
pub struct Head {
    /// The title.
    pub title: String,
    /// The entries, word and text.
    pub entries: Vec<(String, String)>,
}

/// A remark.
#[derive(Debug, Clone, PartialEq, Eq)]
pub struct Remark {
    /// Its text.
    pub text: String,
}

/// The site.
#[derive(Debug, Clone, PartialEq)]
pub struct Site {
    /// The atmosphere, Pa.
    pub atmosphere: f64,
    /// As written, where it is said.
    pub text: Option<String>,
    /// The unit that it is written in.
    pub unit: Option<Unit>,
    /// Where it comes from.
    pub source: Option<String>,
    /// Its interval.
    pub interval: Option<super::Interval>,
}

/// A mixture, for the report.
#[derive(Debug, Clone, PartialEq)]
pub struct MixtureNote {
    /// Its name.
    pub name: String,
    /// As written, after the name.
    pub text: String,
    /// Species, share by mass, share by mole where every part has a molar mass.
    pub portions: Vec<(String, f64, Option<f64>)>,
    /// Where it comes from.
    pub source: Option<String>,
}

/// A duty.
#[derive(Debug, Clone, PartialEq)]
pub struct Duty {
    /// Its name.
    pub name: String,
    /// Where it is declared.
    pub span: Span,
    /// Heat, or heat per time.
    pub value: Expr,
    /// The time over which heat is brought.
    pub over: Option<Expr>,
    /// Useful over supplied.
    pub efficiency: Option<Expr>,
    /// As written.
    pub text: String,
}

/// A comparison.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
#[allow(missing_docs)]
pub enum Comparison {
    Less,
    AtMost,
    Greater,
    AtLeast,
}

impl Comparison {
    /// As written.
    pub fn as_str(self) -> &'static str {
        match self {
            Comparison::Less => "<",
            Comparison::AtMost => "<=",
            Comparison::Greater => ">",
            Comparison::AtLeast => ">=",
        }
    }

    /// Whether it holds. Values that differ by no more than rounding brings about, 1e-12 of the larger, are equal.
    pub fn holds(self, left: f64, right: f64) -> bool {
        let equal = (left - right).abs() <= 1e-12 * left.abs().max(right.abs());
        match self {
            Comparison::Less => left < right && !equal,
            Comparison::AtMost => left <= right || equal,
            Comparison::Greater => left > right && !equal,
            Comparison::AtLeast => left >= right || equal,
        }
    }
}

/// What a requirement asks.
#[derive(Debug, Clone, PartialEq)]
pub enum Limit {
    /// A comparison with a limit.
    Compared(Comparison, Expr),
    /// A value between two limits, both admitted.
    Within(Expr, Expr),
}

/// A requirement.
#[derive(Debug, Clone, PartialEq)]
pub struct Requirement {
    /// The value.
    pub value: Expr,
    /// What is asked of it.
    pub limit: Limit,
    /// As written.
    pub text: String,
    /// Why.
    pub because: Option<String>,
    /// Where it stands.
    pub span: Span,
}

/// A column of a table.
#[derive(Debug, Clone, PartialEq)]
pub struct Column {
    /// Its name: the expression as written.
    pub name: String,
    /// Its value.
    pub value: Expr,
    /// The unit it is shown in.
    pub display: Option<Unit>,
}

/// A table over one input.
#[derive(Debug, Clone, PartialEq)]
pub struct Table {
    /// Its title.
    pub title: String,
    /// Its columns.
    pub columns: Vec<Column>,
    /// The input that is varied.
    pub over: QuantityId,
    /// The first value.
    pub from: Expr,
    /// The last value.
    pub to: Expr,
    /// The step.
    pub by: Expr,
    /// Where it stands.
    pub span: Span,
}

/// A statement of the sheet, in its place.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
#[allow(missing_docs)]
pub enum Entry {
    Remark(usize),
    Species(SpeciesId),
    Mixture(usize),
    Site,
    Quantity(QuantityId),
    State(StateId),
    Step(StepId),
    Duty(DutyId),
    Requirement(usize),
    Table(usize),
}

/// A checked sheet.
#[derive(Debug, Clone, PartialEq)]
pub struct Program {
    /// The head.
    pub head: Head,
    /// The remarks.
    pub remarks: Vec<Remark>,
    /// The site.
    pub site: Site,
    /// The named quantities.
    pub quantities: Vec<Quantity>,
    /// The species.
    pub species: Vec<Species>,
    /// The mixtures.
    pub mixtures: Vec<MixtureNote>,
    /// The states.
    pub states: Vec<State>,
    /// The steps.
    pub steps: Vec<Step>,
    /// The duties.
    pub duties: Vec<Duty>,
    /// The requirements.
    pub requirements: Vec<Requirement>,
    /// The tables.
    pub tables: Vec<Table>,
    /// The statements in the order of the sheet.
    pub order: Vec<Entry>,
}

impl Program {
    /// Calls `see` for every expression of the sheet, those inside others too.
    pub fn each_expression(&self, see: &mut impl FnMut(&Expr)) {
        self.quantities.iter().for_each(|quantity| quantity.value.walk(see));
        for state in &self.states {
            state.expressions().for_each(|expr| expr.walk(see));
        }
        for step in &self.steps {
            step.expressions().for_each(|expr| expr.walk(see));
        }
        for duty in &self.duties {
            [Some(&duty.value), duty.over.as_ref(), duty.efficiency.as_ref()]
                .into_iter()
                .flatten()
                .for_each(|expr| expr.walk(see));
        }
        for requirement in &self.requirements {
            requirement.value.walk(see);
            match &requirement.limit {
                Limit::Compared(_, limit) => limit.walk(see),
                Limit::Within(low, high) => [low, high].into_iter().for_each(|limit| limit.walk(see)),
            }
        }
        for table in &self.tables {
            let columns = table.columns.iter().map(|column| &column.value);
            columns.chain([&table.from, &table.to, &table.by]).for_each(|expr| expr.walk(see));
        }
    }
}
