//! States: matter at a temperature and a pressure.

use super::{Expr, SpeciesId, StateId};
use crate::span::Span;
use crate::thermo::Pin;

/// In what an amount is counted.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum Quantum {
    /// A mass.
    Mass,
    /// An amount of substance.
    Substance,
    /// A volume at the state's own temperature and pressure.
    Volume,
    /// A share of a state.
    Share,
}

/// A species in a state, in a phase that is said or follows.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Constituent {
    /// Which.
    pub species: SpeciesId,
    /// Its phase.
    pub pin: Pin,
}

/// A constituent of a material with its share by mass.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Portion {
    /// Which constituent of the state.
    pub constituent: usize,
    /// Its share by mass.
    pub share: f64,
}

/// Where a state's matter comes from.
#[derive(Debug, Clone, PartialEq)]
pub enum Source {
    /// An amount of a species or a mixture.
    Fresh {
        /// How much.
        amount: Expr,
        /// Counted how.
        quantum: Quantum,
        /// Of what.
        portions: Vec<Portion>,
    },
    /// All of a state.
    Whole(StateId),
    /// An amount or a share of other matter.
    PartOf {
        /// How much.
        amount: Expr,
        /// Counted how.
        quantum: Quantum,
        /// Of what.
        of: Box<Source>,
    },
    /// Several together.
    Sum(Vec<Source>),
}

/// A temperature or a pressure.
#[derive(Debug, Clone, PartialEq)]
pub enum Condition {
    /// Said.
    Value(Expr),
    /// That of another state.
    Of(StateId),
    /// That of several states, which must be one; `true` where the site's atmosphere is among them.
    Agreed(Vec<StateId>, bool),
    /// The site's atmosphere.
    Atmosphere,
    /// Not known; settled by a step.
    Unknown(Span),
    /// Where the species boils: the temperature that belongs to the pressure, or the pressure to the temperature.
    Boiling,
}

impl Condition {
    /// The expression, where one is said.
    pub fn value(&self) -> Option<&Expr> {
        match self {
            Condition::Value(value) => Some(value),
            _ => None,
        }
    }
}

/// A state.
#[derive(Debug, Clone, PartialEq)]
pub struct State {
    /// Its name.
    pub name: String,
    /// Where it is declared.
    pub span: Span,
    /// Whether its amounts are rates.
    pub flow: bool,
    /// Its species.
    pub constituents: Vec<Constituent>,
    /// Where the matter comes from.
    pub source: Source,
    /// Its temperature.
    pub temperature: Condition,
    /// Its pressure.
    pub pressure: Condition,
    /// How much has changed, where it lies on a transition: the phase and the share of it.
    pub share: Option<(usize, Expr)>,
    /// The statement's right side as written.
    pub text: String,
}

impl State {
    /// The states that matter is made from, in order.
    pub fn origins_of(source: &Source) -> Vec<StateId> {
        match source {
            Source::Fresh { .. } => Vec::new(),
            Source::Whole(state) => vec![*state],
            Source::PartOf { of, .. } => State::origins_of(of),
            Source::Sum(parts) => parts.iter().flat_map(State::origins_of).collect(),
        }
    }

    /// The expressions of its amounts and conditions.
    pub fn expressions(&self) -> impl Iterator<Item = &Expr> {
        let conditions =
            [self.temperature.value(), self.pressure.value(), self.share.as_ref().map(|(_, share)| share)];
        let mut amounts = Vec::new();
        gather_amounts(&self.source, &mut amounts);
        conditions.into_iter().flatten().chain(amounts)
    }
}

fn gather_amounts<'a>(source: &'a Source, into: &mut Vec<&'a Expr>) {
    match source {
        Source::Fresh { amount, .. } => into.push(amount),
        Source::Whole(_) => {}
        Source::PartOf { amount, of, .. } => {
            into.push(amount);
            gather_amounts(of, into);
        }
        Source::Sum(parts) => parts.iter().for_each(|part| gather_amounts(part, into)),
    }
}
