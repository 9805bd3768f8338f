//! What a species is: its formula, molar mass, formation enthalpy and decomposition.

use super::checker::Checker;
use super::pedigree::Draft;
use crate::diagnostic::{Code, Diagnostic};
use crate::program::DatumKind;
use crate::span::Span;
use crate::syntax::tree::{self, LawText, SpeciesBlock, SpeciesEntry, Word};
use crate::thermo::{Composition, Fault};
use crate::units::Dimension;

impl Checker<'_> {
    pub(super) fn species_formula(&mut self, block: &SpeciesBlock) -> Option<(String, Composition)> {
        let word = self.single(block, |entry| match entry {
            SpeciesEntry::Formula(word) => Some((word.clone(), word.span)),
            _ => None,
        })?;
        match Composition::parse(&word.text) {
            Ok(composition) => Some((word.text, composition)),
            Err(error) => {
                self.formula_error(&word, &error);
                None
            }
        }
    }

    fn formula_error(&mut self, word: &Word, error: &crate::thermo::CompositionError) {
        let place = |range: &std::ops::Range<usize>| {
            let at =
                |offset: usize| word.span.start + u32::try_from(offset.min(word.text.len())).unwrap_or(0);
            if range.is_empty() {
                word.span
            } else {
                Span { start: at(range.start), end: at(range.end), ..word.span }
            }
        };
        let found = match error {
            crate::thermo::CompositionError::UnknownElement { symbol, range } => Diagnostic::new(
                Code::UnknownElement,
                format!("`{symbol}` in `{}` is no element", word.text),
            )
            .label(place(range), "no element of this symbol")
            .help("symbols are IUPAC's: a capital, then a small letter where there are two, such as `Zn`"),
            crate::thermo::CompositionError::NoAtomicWeight { element, range } => Diagnostic::new(
                Code::UnknownElement,
                format!("`{}` has no standard atomic weight", element.symbol()),
            )
            .label(place(range), "no stable isotopes")
            .help("leave the formula out and give `molar_mass ... g/mol`"),
            crate::thermo::CompositionError::Malformed { fault, range } => {
                Diagnostic::new(Code::BadFormula, format!("the formula `{}` cannot be read", word.text))
                    .label(place(range), fault_in_words(*fault))
                    .help("write formulas such as `Ca(OH)2`, `Fe0.947O` or `CuSO4·5H2O`")
            }
        };
        self.report(found);
    }

    pub(super) fn given_molar_mass(&mut self, draft: &mut Draft<'_>) -> Option<f64> {
        let entry = self.single(draft.block, |entry| match entry {
            SpeciesEntry::MolarMass(entry) => Some((entry.clone(), entry.span)),
            _ => None,
        })?;
        let value = self.datum_of(&entry.value, Dimension::MOLAR_MASS, "a molar mass")?;
        let datum = self.datum(draft, DatumKind::MolarMass, &entry.suffixes, entry.span, None);
        draft.data.push(datum);
        if value > 0.0 {
            return Some(value);
        }
        self.report(
            Diagnostic::new(Code::DatumNotPositive, "a molar mass that is not positive")
                .label(entry.value.span, "here")
                .help("write such as `molar_mass 65.38 g/mol`"),
        );
        None
    }

    /// The formation enthalpy at 298.15 K in J/kg.
    pub(super) fn formation(
        &mut self,
        value: &LawText<tree::Datum>,
        at: &tree::Datum,
        species: &str,
        molar_mass: Option<f64>,
    ) -> Option<f64> {
        let kelvin = self.datum_temperature(at, "the temperature of a formation enthalpy")?;
        if (kelvin - 298.15).abs() > 1e-9 {
            self.report(
                Diagnostic::new(
                    Code::FormationWrong,
                    "a formation enthalpy at another temperature than 298.15 K",
                )
                .label(at.span, "298.15 K is wanted")
                .help("give the standard formation enthalpy, `at 298.15 K`"),
            );
            return None;
        }
        let read = self.datum_value(&value.value)?;
        match (read.unit.dimension, molar_mass) {
            (Dimension::SPECIFIC_ENERGY, _) => Some(read.si),
            (Dimension::MOLAR_ENERGY, Some(molar_mass)) => Some(read.si / molar_mass),
            (Dimension::MOLAR_ENERGY, None) => {
                self.molar_datum(value.value.span, species);
                None
            }
            (found, _) => {
                let wanted = [Dimension::MOLAR_ENERGY, Dimension::SPECIFIC_ENERGY];
                self.wrong_dimension(value.value.span, found, &wanted, "a formation enthalpy");
                None
            }
        }
    }

    pub(super) fn species_formation(&mut self, draft: &mut Draft<'_>) -> Option<f64> {
        let (value, at) = self.single(draft.block, |entry| match entry {
            SpeciesEntry::Formation(value, at) => Some(((value.clone(), at.clone()), value.span)),
            _ => None,
        })?;
        let kind = DatumKind::Formation { phase: None };
        let datum = self.datum(draft, kind, &value.suffixes, value.span, Some((298.15, 298.15)));
        draft.data.push(datum);
        self.formation(&value, &at, &draft.block.name.text, draft.molar_mass)
    }

    pub(super) fn decomposition(&mut self, draft: &mut Draft<'_>) -> Option<f64> {
        let entry = self.single(draft.block, |entry| match entry {
            SpeciesEntry::Decomposes(entry) => Some((entry.clone(), entry.span)),
            _ => None,
        })?;
        let datum = self.datum(draft, DatumKind::Decomposition, &entry.suffixes, entry.span, None);
        draft.data.push(datum);
        self.datum_temperature(&entry.value, "the temperature of decomposition")
    }
}

fn fault_in_words(fault: Fault) -> &'static str {
    match fault {
        Fault::Empty => "an element or a group is wanted here",
        Fault::Character => "no formula has this character",
        Fault::Bracket => "a bracket without its partner",
        Fault::TooDeep => "brackets nested too deep",
        Fault::Count => "a count that is no positive number",
    }
}
