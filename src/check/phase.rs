//! Phases of a species.

use super::checker::Checker;
use super::pedigree::{Draft, given_twice};
use super::transition::Neighbour;
use crate::diagnostic::{Code, Diagnostic};
use crate::numeric::Formula;
use crate::program::{DatumKind, PhaseInfo};
use crate::span::Span;
use crate::syntax::tree::{
    self, CoefficientForm, Expression, HeatCapacityEntry, LawText, PhaseBlock, PhaseEntry,
};
use crate::thermo::{Density, LawRange, PhaseClass, PhaseData};
use crate::units::{Dimension, quantity};

/// A phase as read, with the places of its ranges.
pub(super) struct Phase {
    pub(super) data: PhaseData,
    pub(super) head: Span,
    pub(super) ranges: Vec<Span>,
    pub(super) density: Option<Span>,
}

impl Checker<'_> {
    /// Reads a phase; what its neighbours need to know of it comes back even where it is at fault.
    pub(super) fn phase(
        &mut self,
        draft: &mut Draft<'_>,
        block: &PhaseBlock,
        index: usize,
    ) -> (Option<Phase>, Neighbour) {
        let class = self.phase_class(block);
        let own_source = block.entries.iter().find_map(|entry| match entry {
            PhaseEntry::Source(text) => Some(text.text.clone()),
            _ => None,
        });
        let mut ranges = Vec::new();
        let mut spans = Vec::new();
        let (mut density, mut density_span) = (None, None);
        let (mut formation, mut has_formation) = (None, None);
        let mut complete = true;
        let name = draft.block.name.text.clone();
        let outer = draft.source.clone();
        draft.source = own_source.or_else(|| outer.clone());
        for entry in &block.entries {
            match entry {
                PhaseEntry::HeatCapacity(entry) => {
                    let law = self.heat_capacity(entry, draft.molar_mass, &name);
                    let valid = law.as_ref().map(|law: &LawRange| (law.lo.value, law.hi.value));
                    let kind = DatumKind::HeatCapacity { phase: index, range: spans.len() };
                    let datum = self.datum(draft, kind, &entry.suffixes, entry.span, valid);
                    draft.data.push(datum);
                    complete &= law.is_some();
                    ranges.extend(law);
                    spans.push(range_span(entry));
                }
                PhaseEntry::Density(entry) => {
                    if let Some(first) = density_span.replace(entry.span) {
                        self.diagnostics.push(given_twice(entry.span, first));
                        complete = false;
                    }
                    let (read, valid) = self.density(entry);
                    let datum = self.datum(
                        draft,
                        DatumKind::Density { phase: index },
                        &entry.suffixes,
                        entry.span,
                        valid,
                    );
                    draft.data.push(datum);
                    complete &= read.is_some();
                    density = read;
                }
                PhaseEntry::Formation(value, at) => {
                    if let Some(first) = has_formation.replace(value.span) {
                        self.diagnostics.push(given_twice(value.span, first));
                        complete = false;
                    }
                    formation = self.formation(value, at, &name, draft.molar_mass);
                    complete &= formation.is_some();
                    let kind = DatumKind::Formation { phase: Some(index) };
                    let datum = self.datum(draft, kind, &value.suffixes, value.span, Some((298.15, 298.15)));
                    draft.data.push(datum);
                }
                PhaseEntry::Source(_) | PhaseEntry::Remark(_) => {}
            }
        }
        draft.source = outer;
        if spans.is_empty() && !block.damaged {
            self.report(
                Diagnostic::new(
                    Code::DatumMissing,
                    format!("the phase `{}` of `{name}` has no heat capacity", block.name.text),
                )
                .label(block.head, "no `cp`")
                .help("add `cp = ... J/(mol K) for ... K to ... K`"),
            );
            complete = false;
        }
        let neighbour = Neighbour {
            name: block.name.text.clone(),
            class,
            own_formation: has_formation.is_some(),
            head: block.head,
        };
        let (Some(class), true) = (class, complete && !block.damaged) else { return (None, neighbour) };
        let name = block.name.text.clone();
        let data = PhaseData { name, class, ranges, density, formation: formation.map(quantity) };
        (Some(Phase { data, head: block.head, ranges: spans, density: density_span }), neighbour)
    }

    fn phase_class(&mut self, block: &PhaseBlock) -> Option<PhaseClass> {
        let word = block.class.as_ref().unwrap_or(&block.name);
        if let Some(class) = class_of(&word.text) {
            return Some(class);
        }
        let (message, help) = match &block.class {
            Some(class) => (
                format!("a phase cannot be `{}`", class.text),
                format!("write `phase {} is solid`, `is liquid` or `is gas`", block.name.text),
            ),
            None => (
                format!("is the phase `{}` solid, liquid or gas?", block.name.text),
                format!("write `phase {} is solid {{`", block.name.text),
            ),
        };
        self.report(Diagnostic::new(Code::UnknownPhase, message).label(word.span, "not said").help(help));
        None
    }

    /// A density, constant or a formula, in kg/m³.
    fn density(
        &mut self,
        entry: &LawText<(Expression, Option<(tree::Datum, tree::Datum)>)>,
    ) -> (Option<Density>, Option<(f64, f64)>) {
        let (expression, range) = &entry.value;
        let valid = range.as_ref().and_then(|(low, high)| {
            Some((
                self.datum_temperature(low, "the lower end of a range")?,
                self.datum_temperature(high, "the upper end of a range")?,
            ))
        });
        let Some(checked) = self.formula(expression) else { return (None, valid) };
        if checked.dimension != Dimension::DENSITY {
            self.wrong_dimension(checked.span, checked.dimension, &[Dimension::DENSITY], "a density");
            return (None, valid);
        }
        if let Some(value) = super::constant::value_of(&checked) {
            return (Some(Density::Constant(quantity(value))), valid);
        }
        let code: Option<Formula> = super::law_formula::compiled(&checked);
        (code.map(Density::Formula), valid)
    }
}

fn range_span(entry: &LawText<HeatCapacityEntry>) -> Span {
    match (&entry.value.range, &entry.value.form) {
        (Some((low, high)), _) => low.span.to(high.span),
        (None, CoefficientForm::Table(rows, _)) => rows.first().map_or(entry.span, |row| row.at.span),
        _ => entry.span,
    }
}

pub(super) fn class_of(word: &str) -> Option<PhaseClass> {
    match word {
        "solid" => Some(PhaseClass::Solid),
        "liquid" => Some(PhaseClass::Liquid),
        "gas" => Some(PhaseClass::Gas),
        _ => None,
    }
}

pub(super) fn phase_info(phase: &PhaseData) -> PhaseInfo {
    let symbol = match phase.name.as_str() {
        "solid" => "s",
        "liquid" => "l",
        "gas" => "g",
        other => other,
    };
    let constant_density = match &phase.density {
        Some(Density::Constant(density)) => Some(density.value),
        _ => None,
    };
    PhaseInfo { name: phase.name.clone(), class: phase.class, symbol: symbol.to_owned(), constant_density }
}
