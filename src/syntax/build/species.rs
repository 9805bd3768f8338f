//! Species and phase blocks.

use super::builder::{Builder, parts};
use crate::syntax::grammar::Rule;
use crate::syntax::tree::{
    Coefficient, CoefficientForm, Datum, HeatCapacityEntry, LawText, PhaseEntry, Row, SpeciesEntry, Suffixes,
    Text, TransitionEntry, TransitionKind, TransitionPlace, VapourPressure, Word,
};
use pest::iterators::Pair;

impl Builder<'_> {
    pub(in crate::syntax) fn species_head(&mut self, pair: Pair<'_, Rule>) -> Option<(Word, Option<Text>)> {
        let mut inner = parts(pair);
        let name = self.word(&inner.next()?);
        let label = inner.next().filter(|part| part.as_rule() == Rule::text).map(|part| self.text(&part));
        Some((name, label))
    }

    pub(in crate::syntax) fn phase_head(&mut self, pair: Pair<'_, Rule>) -> Option<(Word, Option<Word>)> {
        let mut words = parts(pair).filter(|part| part.as_rule() == Rule::word);
        let name = self.word(&words.next()?);
        Some((name, words.next().map(|part| self.word(&part))))
    }

    pub(in crate::syntax) fn species_entry(&mut self, pair: Pair<'_, Rule>) -> Option<SpeciesEntry> {
        let entry = parts(pair).next()?;
        Some(match entry.as_rule() {
            Rule::formula => SpeciesEntry::Formula(self.word(&parts(entry).next()?)),
            Rule::source => SpeciesEntry::Source(self.first_text(entry)?),
            Rule::formation => {
                let (value, at) = self.formation(entry)?;
                SpeciesEntry::Formation(value, at)
            }
            Rule::cas => SpeciesEntry::Cas(self.first_text(entry)?),
            Rule::molar_mass => SpeciesEntry::MolarMass(self.datum_entry(entry)?),
            Rule::decomposes => SpeciesEntry::Decomposes(self.datum_entry(entry)?),
            Rule::transition => SpeciesEntry::Transition(self.transition(entry)?),
            _ => SpeciesEntry::VapourPressure(self.vapour_pressure(entry)?),
        })
    }

    pub(in crate::syntax) fn phase_entry(&mut self, pair: Pair<'_, Rule>) -> Option<PhaseEntry> {
        let entry = parts(pair).next()?;
        Some(match entry.as_rule() {
            Rule::heat_capacity => PhaseEntry::HeatCapacity(self.heat_capacity(entry)?),
            Rule::enthalpy_table | Rule::mean_cp => PhaseEntry::HeatCapacity(self.table_from(entry)?),
            Rule::density => PhaseEntry::Density(self.density(entry)?),
            Rule::formation => {
                let (value, at) = self.formation(entry)?;
                PhaseEntry::Formation(value, at)
            }
            _ => PhaseEntry::Source(self.first_text(entry)?),
        })
    }

    fn datum_entry(&mut self, pair: Pair<'_, Rule>) -> Option<LawText<Datum>> {
        let span = self.span(&pair);
        let mut suffixes = Suffixes::default();
        let mut value = None;
        for part in parts(pair) {
            if part.as_rule() == Rule::datum {
                value = self.datum(part);
            } else {
                self.suffix(part, &mut suffixes);
            }
        }
        Some(LawText { value: value?, suffixes, span })
    }

    fn formation(&mut self, pair: Pair<'_, Rule>) -> Option<(LawText<Datum>, Datum)> {
        let span = self.span(&pair);
        let mut suffixes = Suffixes::default();
        let mut data = Vec::new();
        for part in parts(pair) {
            if part.as_rule() == Rule::datum {
                data.push(self.datum(part)?);
            } else {
                self.suffix(part, &mut suffixes);
            }
        }
        let at = data.pop()?;
        Some((LawText { value: data.pop()?, suffixes, span }, at))
    }

    fn transition(&mut self, pair: Pair<'_, Rule>) -> Option<TransitionEntry> {
        let span = self.span(&pair);
        let mut suffixes = Suffixes::default();
        let (mut kind, mut place, mut takes, mut along) = (None, None, None, None);
        for part in parts(pair) {
            match part.as_rule() {
                Rule::change => kind = Some(TransitionKind::Named(self.word(&part))),
                Rule::between => {
                    let mut words = parts(part);
                    let lower = self.word(&words.next()?);
                    kind = Some(TransitionKind::Between(lower, self.word(&words.next()?)));
                }
                Rule::at_point => place = Some(TransitionPlace::At(self.datum(parts(part).next()?)?)),
                Rule::over_range => {
                    let (low, high) = self.range(part)?;
                    place = Some(TransitionPlace::Over(low, high));
                }
                Rule::takes => takes = self.datum(parts(part).next()?),
                Rule::along => along = Some(self.rows(parts(part).next()?)?),
                _ => self.suffix(part, &mut suffixes),
            }
        }
        Some(TransitionEntry { kind: kind?, place: place?, takes, along, suffixes, span })
    }

    fn vapour_pressure(&mut self, pair: Pair<'_, Rule>) -> Option<VapourPressure> {
        let span = self.span(&pair);
        let mut suffixes = Suffixes::default();
        let (mut form, mut coefficients, mut range) = (None, Vec::new(), None);
        for part in parts(pair) {
            match part.as_rule() {
                Rule::word => form = Some(self.word(&part)),
                Rule::coefficients => coefficients = self.coefficients(part)?,
                Rule::range => range = self.range(part),
                _ => self.suffix(part, &mut suffixes),
            }
        }
        Some(VapourPressure { form: form?, coefficients, range, suffixes, span })
    }

    fn heat_capacity(&mut self, pair: Pair<'_, Rule>) -> Option<LawText<HeatCapacityEntry>> {
        let span = self.span(&pair);
        let mut suffixes = Suffixes::default();
        let (mut form, mut name, mut range) = (None, None, None);
        for part in parts(pair) {
            match part.as_rule() {
                Rule::expr => form = Some(CoefficientForm::Formula(self.expression(part)?)),
                Rule::form => name = Some(self.word(&part)),
                Rule::coefficients => {
                    form = Some(CoefficientForm::Published(name.take()?, self.coefficients(part)?))
                }
                Rule::tabled => {
                    let linear = part.clone().into_inner().any(|inner| inner.as_rule() == Rule::kw_linear);
                    form = Some(CoefficientForm::Table(self.rows(parts(part).next()?)?, linear));
                }
                Rule::range => range = self.range(part),
                _ => self.suffix(part, &mut suffixes),
            }
        }
        Some(LawText { value: HeatCapacityEntry { form: form?, range }, suffixes, span })
    }

    fn table_from(&mut self, pair: Pair<'_, Rule>) -> Option<LawText<HeatCapacityEntry>> {
        let span = self.span(&pair);
        let mean = pair.as_rule() == Rule::mean_cp;
        let mut suffixes = Suffixes::default();
        let (mut from, mut rows) = (None, Vec::new());
        for part in parts(pair) {
            match part.as_rule() {
                Rule::datum => from = self.datum(part),
                Rule::rows => rows = self.rows(part)?,
                _ => self.suffix(part, &mut suffixes),
            }
        }
        let from = from?;
        let form = if mean {
            CoefficientForm::MeanTable(from, rows)
        } else {
            CoefficientForm::EnthalpyTable(from, rows)
        };
        Some(LawText { value: HeatCapacityEntry { form, range: None }, suffixes, span })
    }

    #[allow(clippy::type_complexity)]
    fn density(
        &mut self,
        pair: Pair<'_, Rule>,
    ) -> Option<LawText<(crate::syntax::tree::Expression, Option<(Datum, Datum)>)>> {
        let span = self.span(&pair);
        let mut suffixes = Suffixes::default();
        let (mut value, mut range) = (None, None);
        for part in parts(pair) {
            match part.as_rule() {
                Rule::expr => value = self.expression(part),
                Rule::range => range = self.range(part),
                _ => self.suffix(part, &mut suffixes),
            }
        }
        Some(LawText { value: (value?, range), suffixes, span })
    }

    fn coefficients(&mut self, pair: Pair<'_, Rule>) -> Option<Vec<Coefficient>> {
        parts(pair)
            .map(|part| {
                let mut inner = parts(part);
                let name = self.word(&inner.next()?);
                Some(Coefficient { name, value: self.coefficient_datum(inner.next()?)? })
            })
            .collect()
    }

    fn rows(&mut self, pair: Pair<'_, Rule>) -> Option<Vec<Row>> {
        parts(pair)
            .map(|part| {
                let (at, value) = self.range(part)?;
                Some(Row { at, value })
            })
            .collect()
    }
}
