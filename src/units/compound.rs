//! From the terms of a unit text to the unit.

use std::ops::Range;

use super::dimension::Dimension;
use super::error::UnitError;
use super::factor::Factor;
use super::read::HIGHEST_POWER;
use super::table::Known;
use super::unit::{Calorie, Unit, Zero};

/// A unit of the table raised to a power.
#[derive(Debug, Clone)]
pub(crate) struct Term {
    /// The unit.
    pub(crate) known: Known,
    /// The power.
    pub(crate) exponent: i32,
    /// Its place in the text.
    pub(crate) range: Range<usize>,
}

impl Term {
    /// The term below a solidus.
    pub(crate) fn inverse(self) -> Term {
        Term { exponent: -self.exponent, ..self }
    }

    /// The term inside a group that is raised to a power; `None` if that leads out of range.
    pub(crate) fn raised(self, power: i32) -> Option<Term> {
        let exponent = self.exponent.checked_mul(power)?;
        (exponent.abs() <= HIGHEST_POWER).then_some(Term { exponent, ..self })
    }

    fn factor(&self) -> Factor {
        let ten = self.known.prefix.map_or(0, |prefix| prefix.ten);
        self.known.entry.factor.times(Factor::decimal(1.0, ten)).power(self.exponent)
    }
}

/// The product of the terms. One unit alone keeps the zero of its scale.
pub(crate) fn compound(text: &str, terms: &[Term]) -> Result<Unit, UnitError> {
    let zero = zero_of(text, terms)?;
    let (mut dimension, mut factor) = (Dimension::ONE, Factor::ONE);
    for term in terms {
        let out_of_range = || UnitError::Power { word: word_of(text, term), range: term.range.clone() };
        dimension = term
            .known
            .entry
            .dimension
            .power(term.exponent)
            .and_then(|power| dimension.times(power))
            .ok_or_else(out_of_range)?;
        factor = factor.times(term.factor());
        if !factor.value().is_normal() {
            return Err(out_of_range());
        }
    }
    Ok(Unit {
        text: text.to_owned(),
        dimension,
        factor: factor.value(),
        zero,
        flavour: terms.iter().filter_map(|term| term.known.entry.flavour).reduce(Calorie::with),
        gas_volume: terms.iter().any(|term| term.known.entry.gas_volume),
    })
}

fn zero_of(text: &str, terms: &[Term]) -> Result<Zero, UnitError> {
    if let [term] = terms
        && term.exponent == 1
    {
        return Ok(term.known.entry.zero);
    }
    match terms.iter().find(|term| term.known.entry.zero == Zero::Atmosphere) {
        Some(term) => {
            Err(UnitError::ReadingInCompound { word: word_of(text, term), range: term.range.clone() })
        }
        None => Ok(Zero::None),
    }
}

fn word_of(text: &str, term: &Term) -> String {
    text.get(term.range.clone()).unwrap_or("").to_owned()
}
