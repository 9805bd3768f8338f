//! A species in the making, and the pedigree of its data.

use super::checker::Checker;
use crate::diagnostic::{Code, Diagnostic};
use crate::program::{Datum, DatumKind};
use crate::span::Span;
use crate::syntax::tree::{self, SpeciesBlock, Suffixes, TransitionEntry, TransitionPlace};

/// A species being read.
pub(super) struct Draft<'a> {
    pub(super) block: &'a SpeciesBlock,
    pub(super) source: Option<String>,
    pub(super) molar_mass: Option<f64>,
    pub(super) data: Vec<Datum>,
}

impl Checker<'_> {
    /// A datum with its pedigree: its own source, else that of the block around it.
    pub(super) fn datum(
        &mut self,
        draft: &Draft<'_>,
        kind: DatumKind,
        suffixes: &Suffixes,
        span: Span,
        valid: Option<(f64, f64)>,
    ) -> Datum {
        let interval = suffixes.intervals.first().map(|interval| self.written(interval.span));
        if let [_, second, ..] = suffixes.intervals.as_slice() {
            self.diagnostics.push(given_twice(second.span, span));
        }
        let spread = suffixes.spreads.first().map(|spread| {
            let amount = self.written(spread.amount.span);
            format!("{amount} against \"{}\"", spread.against.text)
        });
        let text = without_suffixes(&self.written(span));
        let source = suffixes.source().map(str::to_owned).or_else(|| draft.source.clone());
        Datum { kind, text, valid, source, interval, spread, span }
    }
}

pub(super) fn transition_range(
    checker: &mut Checker<'_>,
    transition: &TransitionEntry,
) -> Option<(f64, f64)> {
    let read = |datum: &tree::Datum| {
        let unit = datum.literal.unit.as_ref()?;
        let unit = crate::units::read_unit(&unit.text).ok()?;
        let value = if datum.negative { -datum.literal.value } else { datum.literal.value };
        Some(unit.to_si(value, checker.program.site.atmosphere))
    };
    match &transition.place {
        TransitionPlace::At(at) => read(at).map(|kelvin| (kelvin, kelvin)),
        TransitionPlace::Over(low, high) => Some((read(low)?, read(high)?)),
    }
}

/// The entry without what follows the datum: interval, source and spread are kept apart.
fn without_suffixes(text: &str) -> String {
    let ends = [" source \"", " spread ", " ±", " +-", " +/-"];
    let end = ends.iter().filter_map(|mark| text.find(mark)).min().unwrap_or(text.len());
    text[..end].trim_end().to_owned()
}

pub(super) fn given_twice(second: Span, first: Span) -> Diagnostic {
    Diagnostic::new(Code::DatumTwice, "a datum given twice")
        .label(second, "given again here")
        .label(first, "given first here")
        .help("keep one of the two")
}
